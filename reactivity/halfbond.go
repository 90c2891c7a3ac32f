package reactivity

import (
	"lobecast/frontier"
)

// halfBonds computes the π energy a cycloaddition costs when one new bond is formed
// and the other is under way: the ends of the first are gone from the π systems, the
// ends of the second are linked by a resonance integral τ,
//
//	ΔE(ab|cd) = E_A + E_B − E_π(A∖a and B∖b, filled together with N_A + N_B − 2 electrons, k_cd = τ) − h_a − h_b
//
// in |β|. τ = 0 is the first-bond energy of a stepwise addition; τ > 0 makes it that of
// a concerted but asynchronous one (after the localization energies of Wheland 1942 and
// Brown 1950, and the view of M. J. S. Dewar, J. Am. Chem. Soc. 1984, 106, 209, that the two
// bonds seldom form in step). Besides, no level crossing is left that could make ΔE kink
// with the parameters.
type halfBonds struct {
	matrices []*frontier.Matrix   // one, or two where the ends lie in two systems
	parents  []*frontier.Orbitals // aligned
	columns  *parameterColumns
	energy   float64
	n        int // centres of both
	h        []float64
	links    []frontier.Link // of both, local to the whole
	parentBy []float64       // derivative of E_A + E_B by parameters

	place, kept []int     // room for at
	left        []float64 // the matrix without two centres
}

// newHalfBonds prepares two systems (the same one twice in an intramolecular addition
// within one system). columns may be nil where no derivatives are wanted; their last
// column is τ.
func newHalfBonds(a *frontier.Solution, systemA int, b *frontier.Solution, systemB int, columns *parameterColumns) *halfBonds {
	x := &halfBonds{columns: columns}
	add := func(s *frontier.Solution, k int) {
		x.matrices = append(x.matrices, s.Matrices[k])
		x.parents = append(x.parents, s.Systems[k])
	}
	add(a, systemA)
	if a != b || systemA != systemB {
		add(b, systemB)
	}
	for _, m := range x.matrices {
		x.n += m.N
	}
	x.h = make([]float64, x.n*x.n)
	at := 0
	for k, m := range x.matrices {
		for i := range m.N {
			copy(x.h[(at+i)*x.n+at:], m.H[i*m.N:(i+1)*m.N])
		}
		for _, l := range m.Links {
			x.links = append(x.links, frontier.Link{I: l.I + at, J: l.J + at, Cos: l.Cos})
		}
		x.energy += x.parents[k].Energy
		at += m.N
	}
	if columns != nil {
		x.parentBy = make([]float64, columns.n)
		for k, o := range x.parents {
			p := o.Density()
			m := x.matrices[k]
			element := make([]float64, m.N+len(m.Links))
			for i := range m.N {
				element[i] = p[i*m.N+i]
			}
			for l, link := range m.Links {
				element[m.N+l] = 2 * p[link.I*m.N+link.J]
			}
			columns.contract(m, element, 1, x.parentBy)
		}
	}
	return x
}

// at is ΔE for the first bond between whole indices a and b, the second between c and
// d; by, where wanted, receives its derivatives by parameters and, last, by τ.
func (x *halfBonds) at(a, b, c, d int, tau float64, by []float64) (float64, error) {
	n := x.n
	if x.place == nil {
		x.place, x.kept, x.left = make([]int, n), make([]int, 0, n), make([]float64, n*n)
	}
	place, kept := x.place, x.kept[:0]
	for i := range n {
		place[i] = -1
		if i != a && i != b {
			place[i] = len(kept)
			kept = append(kept, i)
		}
	}
	m := len(kept)
	h := x.left[:m*m]
	for i, r := range kept {
		for j, s := range kept {
			h[i*m+j] = x.h[r*n+s]
		}
	}
	if u, v := place[c], place[d]; u >= 0 && v >= 0 {
		h[u*m+v] += tau
		h[v*m+u] += tau
	}
	electrons := -2.0
	for _, o := range x.parents {
		electrons += o.Electrons
	}
	if by == nil {
		e, err := frontier.PiEnergy(m, h, electrons)
		return x.energy - e - x.h[a*n+a] - x.h[b*n+b], err
	}
	o, err := frontier.Solve(m, h, electrons)
	if err != nil {
		return 0, err
	}
	e := x.energy - o.Energy - x.h[a*n+a] - x.h[b*n+b]
	copy(by, x.parentBy)
	p := o.Density()
	at := 0
	link := 0
	for _, mat := range x.matrices {
		element := make([]float64, mat.N+len(mat.Links))
		for i := range mat.N {
			if r := place[at+i]; r >= 0 {
				element[i] = -p[r*m+r]
			} else {
				element[i] = -1
			}
		}
		for l := range mat.Links {
			i, j := place[x.links[link].I], place[x.links[link].J]
			if i >= 0 && j >= 0 {
				element[mat.N+l] = -2 * p[i*m+j]
			}
			link++
		}
		x.columns.contract(mat, element, 1, by)
		at += mat.N
	}
	if u, v := place[c], place[d]; u >= 0 && v >= 0 {
		by[x.columns.n] = -2 * p[u*m+v]
	} else {
		by[x.columns.n] = 0
	}
	return e, nil
}
