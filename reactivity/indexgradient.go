package reactivity

import (
	"fmt"
	"math"

	"lobecast/frontier"
	"lobecast/frontier/terms"
)

// Derivatives of indices that are a function of the matrix, A_r = [g(H)]_rr =
// Σ_j g_j c²_jr, follow from first-order perturbation of the orbitals (C. A. Coulson,
// H. C. Longuet-Higgins, Proc. R. Soc. A 1947, 191, 39):
//
//	∂A_r/∂H_st = Σ_ij c_si c_ri D_ij c_rj c_tj,  D_ij = (g_i − g_j)/(x_i − x_j),
//
// D_ij being the slope of g where two levels of equal occupation coincide, so that
// degenerate levels need no care. The layout is that of [Workspace.LocalizationGradient].

// spectral writes the derivatives of A_r, g and its slope given level by level.
func (w *Workspace) spectral(r int, g, slope []float64, links []frontier.Link, dst []float64) {
	n, o := w.n, w.o
	// Close levels of one occupation: the mean slope is then right to second order.
	const close = 1e-5
	w.divided = grow(w.divided, n*n)
	row := o.C[r*n : (r+1)*n]
	for i := range n {
		for j := 0; j <= i; j++ {
			d := o.X[i] - o.X[j]
			x := 0.0
			if math.Abs(d) < close && math.Abs(o.Occupation[i]-o.Occupation[j]) < occupied {
				x = (slope[i] + slope[j]) / 2
			} else if d != 0 {
				x = (g[i] - g[j]) / d
			}
			x *= row[i] * row[j]
			w.divided[i*n+j], w.divided[j*n+i] = x, x
		}
	}
	// t[s][j] = Σ_i c_si D_ij c_ri c_rj; the derivative by H_st is then Σ_j t[s][j] c_tj.
	w.twice = grow(w.twice, n*n)
	for s := range n {
		t := w.twice[s*n : (s+1)*n]
		for j := range t {
			t[j] = 0
		}
		for i, c := range o.C[s*n : (s+1)*n] {
			for j, d := range w.divided[i*n : (i+1)*n] {
				t[j] += c * d
			}
		}
	}
	element := func(s, t int) float64 {
		sum := 0.0
		for j, c := range o.C[t*n : (t+1)*n] {
			sum += c * w.twice[s*n+j]
		}
		return sum
	}
	for s := range n {
		dst[s] = element(s, s)
	}
	for l, link := range links {
		dst[n+l] = 2 * element(link.I, link.J)
	}
}

// addDensity adds factor times the derivative of Σ_j weight_j x_j, that is, factor
// times the density matrix of the weights.
func addDensity(o *frontier.Orbitals, weight []float64, factor float64, links []frontier.Link, dst []float64) {
	element := func(s, t int) float64 {
		a, b := o.C[s*o.N:(s+1)*o.N], o.C[t*o.N:(t+1)*o.N]
		sum := 0.0
		for j, x := range weight {
			sum += x * a[j] * b[j]
		}
		return sum
	}
	for s := range o.N {
		dst[s] += factor * element(s, s)
	}
	for l, link := range links {
		dst[o.N+l] += 2 * factor * element(link.I, link.J)
	}
}

func (w *Workspace) centre(r int) error {
	if r < 0 || r >= w.n {
		return fmt.Errorf("centre %d is not one of the %d of this π system", r+1, w.n)
	}
	return nil
}

// levelFunctions returns two zeroed slices, one entry per level.
func (w *Workspace) levelFunctions() (g, slope []float64) {
	w.column = grow(w.column, 2*w.n)
	clear(w.column)
	return w.column[:w.n], w.column[w.n:]
}

// PopulationGradient writes the derivatives of the π population q_r, in electrons per
// |β|: half the atom–atom polarizabilities with the h, bond polarizabilities with the k.
// The derivative of the π charge is its negative. In a partly filled degenerate shell
// the occupations are held.
func (w *Workspace) PopulationGradient(r int, links []frontier.Link, dst []float64) ([]float64, error) {
	if err := w.centre(r); err != nil {
		return nil, err
	}
	dst = grow(dst, GradientLength(w.n, len(links)))
	_, slope := w.levelFunctions()
	w.spectral(r, w.o.Occupation, slope, links, dst)
	return dst, nil
}

// SuperdelocalizabilityGradient writes the derivatives of S_r as
// [Superdelocalizabilities] gives it, in 1/β²; where the reference had to be moved to
// the middle of the frontier gap, it moves with the levels.
func (w *Workspace) SuperdelocalizabilityGradient(r int, toward terms.Toward, links []frontier.Link, dst []float64) ([]float64, error) {
	if err := w.centre(r); err != nil {
		return nil, err
	}
	o := w.o
	dst = grow(dst, GradientLength(w.n, len(links)))
	g, slope := w.levelFunctions()
	reference, moved, _ := referenceLevel(o)
	byReference := 0.0
	for j, x := range o.X {
		e, n := superdelocalizabilityTerms(x-reference, o.Occupation[j])
		switch toward {
		case terms.Electrophile:
			g[j] = e
		case terms.Nucleophile:
			g[j] = n
		default:
			g[j] = (e + n) / 2
		}
		if g[j] != 0 {
			slope[j] = -g[j] / (x - reference)
		}
		byReference -= slope[j] * w.square[r*w.n+j]
	}
	w.spectral(r, g, slope, links, dst)
	if !moved {
		return dst, nil
	}
	h, l := shellLevel(o, o.HOMO), shellLevel(o, o.LUMO)
	clear(g)
	share := 0.5
	if math.IsNaN(h) || math.IsNaN(l) {
		share = 1
	}
	for _, shell := range [][2]int{o.HOMO, o.LUMO} {
		for j := shell[0]; j < shell[1] && shell[1] <= w.n; j++ {
			g[j] += share / float64(shell[1]-shell[0])
		}
	}
	addDensity(o, g, byReference, links, dst)
	return dst, nil
}

// SmoothedDensityGradient writes the derivatives of the smoothed density of centre r of
// one system of a molecule, as [SmoothedDensities] gives it, by the matrices of all its
// systems: dst[i] belongs to systems[i] and links[i]. In electrons per |β|; toward a
// radical it is the mean of the other two.
func SmoothedDensityGradient(systems []*frontier.Orbitals, lambda float64, system, r int, toward terms.Toward, links [][]frontier.Link, dst [][]float64) ([][]float64, error) {
	if system < 0 || system >= len(systems) || len(links) != len(systems) {
		return nil, fmt.Errorf("system %d is not one of the %d of this molecule, given with %d lists of links", system+1, len(systems), len(links))
	}
	var w Workspace
	if err := w.Reset(systems[system]); err != nil {
		return nil, err
	}
	if err := w.centre(r); err != nil {
		return nil, err
	}
	if len(dst) != len(systems) {
		dst = make([][]float64, len(systems))
	}
	for i, o := range systems {
		dst[i] = grow(dst[i], GradientLength(o.N, len(links[i])))
		clear(dst[i])
	}
	sides := []terms.Toward{toward}
	if toward == terms.Radical {
		sides = []terms.Toward{terms.Electrophile, terms.Nucleophile}
	}
	for _, side := range sides {
		weights, sum := smoothingWeights(systems, lambda, side)
		sign := -lambda // slope of a weight over the weight itself
		if side == terms.Nucleophile {
			sign = lambda
		}
		g, slope := weights[system], make([]float64, w.n)
		a := 0.0
		for j, x := range g {
			a += x * w.square[r*w.n+j]
			slope[j] = sign * x
		}
		own := make([]float64, len(dst[system]))
		w.spectral(r, g, slope, links[system], own)
		factor := 2 / sum / float64(len(sides))
		for k, x := range own {
			dst[system][k] += factor * x
		}
		for i, o := range systems {
			addDensity(o, weights[i], -factor*a/sum*sign, links[i], dst[i])
		}
	}
	return dst, nil
}

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
