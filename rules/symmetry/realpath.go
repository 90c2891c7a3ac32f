package symmetry

import (
	"fmt"
	"math"
	"slices"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
)

// RealPath is the path from reactant to product with the h and k of a published
// parameter set and every conjugated substituent, in one mode. Heteroatoms and
// unlike substituents leave no symmetry, so that levels which would cross avoid each
// other; how closely is what the least gap tells. It supports the verdict and does not
// decide it.
type RealPath struct {
	Set           string
	Centres       int     // orbitals in the common basis
	Electrons     int     // that fill them
	Before, After float64 // gap x_HOMO − x_LUMO of reactant and product, |β|
	Least         float64 // least gap on the way, |β|
	LeastOpposite float64 // the same in the opposite mode
}

// String puts the path into words.
func (r *RealPath) String() string {
	return fmt.Sprintf("with the h and k of %s (%d orbitals, %d electrons) the least gap on the way is %.2f |β|, in the opposite mode %.2f |β|",
		r.Set, r.Centres, r.Electrons, r.Least, r.LeastOpposite)
}

// supports reports whether the gap stays wider in the mode that is allowed in the dark.
func (r *RealPath) supports(thermal Verdict) bool {
	return (thermal == Allowed) == (r.Least > r.LeastOpposite)
}

// sigmaH is h of a hybrid orbital of a σ bond, by element: that of the element's
// one-electron π class (Van-Catledge 1980; hydrogen as carbon).
var sigmaH = map[int]frontier.Class{7: "N1", 8: "O1", 15: "P1", 16: "S1", 34: "Se1"}

// realMatrices are the matrices of reactant and product in one basis: the orbitals of
// the ring, then all other conjugated centres.
type realMatrices struct {
	n, k          int
	before, after []float64
	ring          *Cycle
}

// newRealMatrices builds them; ok is false where perception refuses a structure or the
// electrons of reactant and product cannot be matched. polar lists atoms that hold the
// pair of a double bond to the chain.
func newRealMatrices(set *frontier.Set, m *molecule.Molecule, q *Product, c *Cycle, polar []int) (*realMatrices, bool) {
	basis := make(map[int]int)
	twice := make(map[int]bool)
	n := len(c.Orbitals)
	for i, o := range c.Orbitals {
		if _, ok := basis[o.Atom]; ok {
			twice[o.Atom] = true
		}
		basis[o.Atom] = i
	}
	back := make(map[int]int, len(q.Atoms))
	for i, j := range q.Atoms {
		if j >= 0 {
			back[j] = i
		}
	}
	type side struct {
		pi    *frontier.Pi
		sol   *frontier.Solution
		atom  func(int) int
		sigma []bool // ring positions that hold a σ hybrid on this side
	}
	sides := [2]side{{atom: func(i int) int { return i }}, {atom: func(i int) int {
		if j, ok := back[i]; ok {
			return j
		}
		return -1
	}}}
	for s, x := range []*molecule.Molecule{m, q.Molecule} {
		sides[s].sigma = make([]bool, n)
		pi, err := frontier.Perceive(x, frontier.Options{})
		if err != nil {
			continue // no π system on this side: σ bonds only
		}
		sol, err := set.Solve(pi)
		if err != nil {
			return nil, false
		}
		sides[s].pi, sides[s].sol = pi, sol
	}
	for _, l := range c.Links {
		for s, v := range [2]float64{l.Reactant, l.Product} {
			if v == sigmaStrength {
				sides[s].sigma[l.I], sides[s].sigma[l.J] = true, true
			}
		}
	}
	electrons := float64(c.electrons())
	var diagonal []float64
	for i := range sides {
		x := &sides[i]
		if x.pi == nil {
			continue
		}
		for _, centre := range x.pi.Centres {
			a := x.atom(centre.Atom)
			if centre.Alkyl || a < 0 || twice[a] {
				continue
			}
			if _, ok := basis[a]; !ok {
				basis[a] = n + len(diagonal)
				diagonal = append(diagonal, 0)
				if slices.Contains(polar, a) {
					electrons += 2 // it holds the pair of the double bond to the chain
				} else {
					electrons += centre.Electrons
				}
			}
		}
	}
	size := n + len(diagonal)
	r := &realMatrices{n: size, ring: c, before: make([]float64, size*size), after: make([]float64, size*size)}
	rounded := math.Round(electrons)
	if math.Abs(electrons-rounded) > 1e-6 || int(rounded)%2 == 1 {
		return nil, false
	}
	r.k = int(rounded) / 2
	known := [2][]bool{make([]bool, size), make([]bool, size)}
	for s, h := range [][]float64{r.before, r.after} {
		x := &sides[s]
		if x.pi == nil {
			continue
		}
		for k, matrix := range x.sol.Matrices {
			index := make([]int, matrix.N)
			for i, centre := range matrix.Centres {
				index[i] = -1
				a := x.atom(x.pi.Centres[centre].Atom)
				b, ok := basis[a]
				if x.pi.Centres[centre].Alkyl || a < 0 || !ok || twice[a] || x.pi.Local[k] && x.pi.CentreOf[x.pi.Centres[centre].Atom] >= 0 {
					continue
				}
				if b < n && x.sigma[b] {
					continue // its π orbital, if any, is not the one that reacts
				}
				index[i] = b
				known[s][b] = true
			}
			for i := range index {
				for j := range index {
					if index[i] >= 0 && index[j] >= 0 {
						h[index[i]*size+index[j]] = matrix.H[i*matrix.N+j]
					}
				}
			}
		}
	}
	for i := 0; i < size; i++ {
		d := i*size + i
		switch {
		case known[0][i] && known[1][i]:
		case i < n:
			h := 0.0
			if class, ok := sigmaH[m.Atoms[c.Orbitals[i].Atom].Element]; ok {
				h, _ = set.Value("h " + string(class))
			}
			if !known[0][i] {
				r.before[d] = h
			}
			if !known[1][i] {
				r.after[d] = h
			}
		case known[0][i]:
			r.after[d] = r.before[d]
		case known[1][i]:
			r.before[d] = r.after[d]
		default:
			return nil, false
		}
	}
	for _, l := range c.Links {
		for s, v := range [2]float64{l.Reactant, l.Product} {
			h := [2][]float64{r.before, r.after}[s]
			if h[l.I*size+l.J] == 0 {
				h[l.I*size+l.J], h[l.J*size+l.I] = v, v
			}
		}
	}
	return r, r.k > 0 && r.k < size
}

// least is the least gap on the straight path between the matrices, for a sign of the
// last link of the ring, and the gaps at its ends.
func (r *realMatrices) least(sign float64) (least, before, after float64, ok bool) {
	h := make([]float64, r.n*r.n)
	last := r.ring.Links[len(r.ring.Links)-1]
	ok = true
	gap := func(t float64) float64 {
		for i := range h {
			h[i] = (1-t)*r.before[i] + t*r.after[i]
		}
		for _, l := range r.ring.Links {
			if l.Reactant == 0 && l.Product == 0 {
				v := 4 * t * (1 - t) * ringStrength
				h[l.I*r.n+l.J] += v
				h[l.J*r.n+l.I] += v
			}
		}
		h[last.I*r.n+last.J] *= sign
		h[last.J*r.n+last.I] *= sign
		o, err := frontier.Solve(r.n, h, float64(2*r.k))
		if err != nil {
			ok = false
			return 0
		}
		return o.X[r.k-1] - o.X[r.k]
	}
	const steps = 24
	before, after = gap(0), gap(1)
	least = math.Min(before, after)
	at := 0.0
	for i := 1; i < steps; i++ {
		if g := gap(float64(i) / steps); g < least {
			least, at = g, float64(i)/steps
		}
	}
	for width := 1.0 / steps; width > 1e-3 && at > 0; width /= 2 {
		for _, t := range []float64{at - width/2, at + width/2} {
			if g := gap(t); g < least {
				least, at = g, t
			}
		}
	}
	return least, before, after, ok
}

// addRealPaths follows every mode with real matrices, where they can be built.
func (a *Answer) addRealPaths() {
	var matrices *realMatrices
	var set *frontier.Set
	for i := range a.Processes {
		p := &a.Processes[i]
		if p.Correlation == nil || len(p.Products) == 0 {
			continue
		}
		if matrices == nil {
			var err error
			if set, err = frontier.Load(summarySet); err != nil {
				return
			}
			var ok bool
			if matrices, ok = newRealMatrices(set, a.Joined, &p.Products[0], p.cycle, a.polar); !ok {
				return
			}
		}
		if p.Correlation.Real == nil {
			sign := p.cycle.Links[len(p.cycle.Links)-1].Sign
			least, before, after, ok := matrices.least(sign)
			opposite, _, _, okO := matrices.least(-sign)
			if !ok || !okO {
				return
			}
			p.Correlation.Real = &RealPath{
				Set: set.Name, Centres: matrices.n, Electrons: 2 * matrices.k,
				Before: before, After: after, Least: least, LeastOpposite: opposite,
			}
		}
		x := p.Correlation.Real
		p.Notes = append(p.Notes, x.String())
		if p.Agree && !x.supports(p.Thermal) {
			p.Notes = append(p.Notes, "these gaps do not bear the verdict out: heteroatoms or substituents outweigh the ring of orbitals, or a structure has no closed shell")
		}
	}
}
