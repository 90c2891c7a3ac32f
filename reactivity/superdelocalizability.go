package reactivity

import (
	"fmt"
	"math"

	"lobecast/frontier"
)

// Superdelocalizability holds that index of every centre, in 1/|β| (K. Fukui,
// T. Yonezawa, C. Nagata, Bull. Chem. Soc. Japan 1954, 27, 423):
//
//	S^E = Σ n_j c²_jr/x_j,  S^N = Σ (2 − n_j) c²_jr/(−x_j),  S^R = (S^E + S^N)/2,
//
// with x counted from α, the level of an isolated carbon p orbital.
type Superdelocalizability struct {
	Electrophile, Nucleophile, Radical []float64
	// Reference is the level, in |β|, from which x was counted: 0, or the middle of the
	// frontier gap where an occupied level lies at or below x = 0 or an empty one at or
	// above it.
	Reference float64
	// Unreliable is set in that case: the published definition would then change sign
	// or diverge, and values are comparable within this molecule at most.
	Unreliable bool
	// Note says why, for the report; empty otherwise.
	Note string
}

// atReference is how near to the reference, in |β|, a level may lie before its term is
// taken to diverge.
const atReference = 1e-2

// Superdelocalizabilities computes the superdelocalizabilities of all centres.
func Superdelocalizabilities(o *frontier.Orbitals) Superdelocalizability {
	d := newDensities(o.N)
	s := Superdelocalizability{Electrophile: d.Electrophile, Nucleophile: d.Nucleophile, Radical: d.Radical}
	s.Reference, s.Unreliable, s.Note = referenceLevel(o)
	for j, x := range o.X {
		fe, fn := superdelocalizabilityTerms(x-s.Reference, o.Occupation[j])
		for r := range o.N {
			c := o.C[r*o.N+j]
			s.Electrophile[r] += fe * c * c
			s.Nucleophile[r] += fn * c * c
		}
	}
	for r := range o.N {
		s.Radical[r] = (s.Electrophile[r] + s.Nucleophile[r]) / 2
	}
	return s
}

// superdelocalizabilityTerms are the factors of c² for a level x above the reference.
// A level at the reference, which only a partly filled or very close-lying frontier
// shell leaves there, contributes nothing instead of diverging.
func superdelocalizabilityTerms(x, n float64) (toE, toN float64) {
	if math.Abs(x) < atReference {
		return 0, 0
	}
	return n / x, (2 - n) / -x
}

// referenceLevel is zero where every level lies on its proper side of it.
func referenceLevel(o *frontier.Orbitals) (level float64, unreliable bool, note string) {
	for j, x := range o.X {
		switch {
		case o.Occupation[j] > occupied && x < atReference:
			unreliable = true
		case o.Occupation[j] < 2-occupied && x > -atReference:
			unreliable = true
		}
	}
	if !unreliable {
		return 0, false, ""
	}
	h, l := shellLevel(o, o.HOMO), shellLevel(o, o.LUMO)
	switch {
	case math.IsNaN(h) && math.IsNaN(l):
	case math.IsNaN(h):
		level = l + 1
	case math.IsNaN(l):
		level = h - 1
	default:
		level = (h + l) / 2
	}
	return level, true, fmt.Sprintf("a frontier level lies at or across x = 0, so that levels were counted from x = %.4f instead", level+0)
}

// shellLevel is the mean level of a shell, NaN for an empty range.
func shellLevel(o *frontier.Orbitals, shell [2]int) float64 {
	if shell[0] < 0 || shell[1] <= shell[0] || shell[1] > o.N {
		return math.NaN()
	}
	s := 0.0
	for _, x := range o.X[shell[0]:shell[1]] {
		s += x
	}
	return s / float64(shell[1]-shell[0])
}
