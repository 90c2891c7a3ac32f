package reactivity

import (
	"math"

	"lobecast/frontier"
	"lobecast/frontier/terms"
)

// Densities holds one density of every centre for attack by an electrophile, a
// nucleophile and a radical, in electrons (two in all per frontier shell).
type Densities struct {
	Electrophile, Nucleophile, Radical []float64
}

func newDensities(n int) Densities {
	s := make([]float64, 3*n)
	return Densities{s[:n:n], s[n : 2*n : 2*n], s[2*n:]}
}

// FrontierDensities gives the frontier electron densities of every centre: f^E = 2c²
// of the highest occupied level (K. Fukui, T. Yonezawa, H. Shingu, J. Chem. Phys. 1952,
// 20, 722), f^N = 2c² of the lowest empty one, f^R their mean (K. Fukui, T. Yonezawa,
// C. Nagata, H. Shingu, J. Chem. Phys. 1954, 22, 1433). A degenerate shell counts as a
// whole: the mean over its levels; a partly filled shell is both. It orders the sites
// of one molecule and never those of two. NaN where there is no such shell.
func FrontierDensities(o *frontier.Orbitals) Densities {
	d := newDensities(o.N)
	for r := range o.N {
		row := o.C[r*o.N : (r+1)*o.N]
		d.Electrophile[r] = shellDensity(row, o.HOMO)
		d.Nucleophile[r] = shellDensity(row, o.LUMO)
		d.Radical[r] = (d.Electrophile[r] + d.Nucleophile[r]) / 2
	}
	return d
}

// shellDensity is 2c² averaged over the shell, NaN for an empty range.
func shellDensity(row []float64, shell [2]int) float64 {
	if shell[0] < 0 || shell[1] <= shell[0] || shell[1] > len(row) {
		return math.NaN()
	}
	s := 0.0
	for _, c := range row[shell[0]:shell[1]] {
		s += c * c
	}
	return 2 * s / float64(shell[1]-shell[0])
}

// SmoothedDensities gives the frontier densities smoothed over the levels near the
// frontier, over all π systems of one molecule together:
//
//	f^E(λ) = 2 Σ_occ c²_jr w_j / Σ_occ w_j,  w_j = exp(−λ (x_j − x_HOMO)),
//
// and likewise f^N(λ) over the empty levels with w_j = exp(−λ (x_LUMO − x_j)); f^R is
// their mean. λ is in 1/|β|; a large one gives back [FrontierDensities]. A level that
// is occupied by a fraction counts by that fraction. One Densities per system, in
// order; NaN where the molecule has no occupied, or no empty, level.
//
// The smoothing is this project's own; it cures what degenerate and nearly degenerate
// frontier levels do to a density of one level.
func SmoothedDensities(systems []*frontier.Orbitals, lambda float64) []Densities {
	out := make([]Densities, len(systems))
	toE, sumE := smoothingWeights(systems, lambda, terms.Electrophile)
	toN, sumN := smoothingWeights(systems, lambda, terms.Nucleophile)
	for i, o := range systems {
		d := newDensities(o.N)
		for r := range o.N {
			var e, n float64
			we, wn := toE[i], toN[i]
			for j, c := range o.C[r*o.N : (r+1)*o.N] {
				e += c * c * we[j]
				n += c * c * wn[j]
			}
			d.Electrophile[r], d.Nucleophile[r] = 2*e/sumE, 2*n/sumN
			d.Radical[r] = (d.Electrophile[r] + d.Nucleophile[r]) / 2
		}
		out[i] = d
	}
	return out
}

// occupied is the least occupation, in electrons, that counts as one.
const occupied = 1e-9

// smoothingWeights gives w_j of every level of every system, times the share of the
// level that is occupied (or empty), and their sum over the molecule.
func smoothingWeights(systems []*frontier.Orbitals, lambda float64, toward terms.Toward) (weights [][]float64, sum float64) {
	edge := math.Inf(1)
	share := func(o *frontier.Orbitals, j int) float64 {
		f := o.Occupation[j] / 2
		if toward == terms.Nucleophile {
			f = 1 - f
		}
		if f <= occupied/2 {
			return 0
		}
		return f
	}
	for _, o := range systems {
		for j, x := range o.X {
			if toward == terms.Nucleophile {
				x = -x
			}
			if share(o, j) > 0 {
				edge = math.Min(edge, x)
			}
		}
	}
	weights = make([][]float64, len(systems))
	for i, o := range systems {
		weights[i] = make([]float64, o.N)
		for j, x := range o.X {
			if toward == terms.Nucleophile {
				x = -x
			}
			if f := share(o, j); f > 0 {
				weights[i][j] = f * math.Exp(-lambda*(x-edge))
				sum += weights[i][j]
			}
		}
	}
	return weights, sum
}
