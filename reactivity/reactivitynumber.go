package reactivity

import (
	"math"

	"lobecast/frontier"
)

// ReactivityNumbers gives the reactivity number N_r of every centre of an alternant
// hydrocarbon (M. J. S. Dewar, J. Am. Chem. Soc. 1952, 74, 3357), in |β|:
//
//	N_r = 2 |Σ_s a_s| over the neighbours s of r,
//
// a the non-bonding orbital of the residue without r, signs kept. The smaller, the more
// readily r is attacked. NaN where it is not defined: not an alternant hydrocarbon (a
// centre with h ≠ 0, a k other than 1, an odd ring), or a residue without, or with more
// than one, non-bonding level.
//
// Where the parent has no non-bonding level, the residue has exactly one, the column r
// of the Green function at x = 0, and the sum over the neighbours is one over its norm:
// N_r = 2 / (Σ_j c²_jr/x²_j)^½.
func ReactivityNumbers(o *frontier.Orbitals) []float64 {
	out := make([]float64, o.N)
	if !alternantHydrocarbon(o) {
		for r := range out {
			out[r] = math.NaN()
		}
		return out
	}
	const zero = 1e-7 // |β|; levels of an adjacency matrix of this size are not nearer to 0
	nonbonding := 0
	for _, x := range o.X {
		if math.Abs(x) < zero {
			nonbonding++
		}
	}
	for r := range out {
		sum, share := 0.0, 0.0
		for j, c := range o.C[r*o.N : (r+1)*o.N] {
			if x := o.X[j]; math.Abs(x) < zero {
				share += c * c
			} else {
				sum += c * c / (x * x)
			}
		}
		switch {
		case nonbonding == 0:
			out[r] = 2 / math.Sqrt(sum)
		case nonbonding == 2 && share > 1e-12:
			// The orbital left is one of the parent's own with a node at r, where
			// (H a)_r = Σ_s a_s = 0.
			out[r] = 0
		default:
			out[r] = math.NaN()
		}
	}
	return out
}

// alternantHydrocarbon reports whether all h are 0, all k are 1 and the centres fall
// into two sets with links only between them.
func alternantHydrocarbon(o *frontier.Orbitals) bool {
	const same = 1e-9
	n := o.N
	colour := make([]int8, n)
	stack := make([]int, 0, n)
	for start := range n {
		if colour[start] != 0 {
			continue
		}
		colour[start] = 1
		stack = append(stack[:0], start)
		for len(stack) > 0 {
			i := stack[len(stack)-1]
			stack = stack[:len(stack)-1]
			for j := range n {
				k := o.H[i*n+j]
				if math.Abs(k) <= same {
					continue
				}
				if i == j || math.Abs(k-1) > same {
					return false
				}
				switch colour[j] {
				case 0:
					colour[j] = -colour[i]
					stack = append(stack, j)
				case colour[i]:
					return false
				}
			}
		}
	}
	return true
}
