package reading

import (
	"slices"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
)

// Sizes of what is tried as a cycloaddition other than [4+2] and [3+2]: atoms of a
// molecule, of a π component, and pairs of components.
const (
	mostAdditionAtoms = 60
	longestPolyene    = 8
	mostAdditionPairs = 400
)

// otherCycloaddition tries to explain p as a [2+2], [4+4], [6+4] … cycloaddition of a and b (nil:
// within a), which only orbital symmetry judges.
func (r *reader) otherCycloaddition(a, b, p *molecule.Molecule) bool {
	second := b
	if b == nil {
		second = a
	}
	if len(a.Atoms) > mostAdditionAtoms || len(second.Atoms) > mostAdditionAtoms {
		return false
	}
	tried := 0
	for _, ca := range polyenes(a) {
		for _, cb := range polyenes(second) {
			if len(ca)+len(cb) == 6 || b == nil && (ca[0] >= cb[0] || shareAtom(ca, cb)) {
				continue // [4+2] is sought before, with its way round
			}
			turned := slices.Clone(cb)
			slices.Reverse(turned)
			for _, path := range [2][]int{cb, turned} {
				if tried++; tried > mostAdditionPairs {
					return false
				}
				if x := added(a, b, ca, path); x != nil && x.SameConstitution(p) {
					r.Kind, r.Event, r.Substrate, r.Partner = terms.Cycloaddition, "", a, b
					r.Components = [2][]int{ca, path}
					return true
				}
			}
		}
	}
	return false
}

// shareAtom tells whether two paths have an atom in common.
func shareAtom(a, b []int) bool {
	return slices.ContainsFunc(a, func(x int) bool { return slices.Contains(b, x) })
}

// polyenes lists the chains of alternating double and single bonds of 2, 4, 6 or 8 atoms,
// each once, from its lower end. Aromatic bonds take no part; a π bond may end at O, N or S.
func polyenes(m *molecule.Molecule) [][]int {
	var list [][]int
	var grow func(path []int)
	grow = func(path []int) {
		last := path[len(path)-1]
		for _, h := range m.Neighbours(last) {
			b := &m.Bonds[h.Bond]
			if b.Aromatic || b.Order < 2 || b.Order > 3 || slices.Contains(path, h.Atom) {
				continue
			}
			whole := append(append([]int{}, path...), h.Atom)
			if whole[0] < h.Atom {
				list = append(list, whole)
			}
			if len(whole) == longestPolyene {
				continue
			}
			for _, s := range m.Neighbours(h.Atom) {
				if x := &m.Bonds[s.Bond]; x.Order == 1 && !x.Aromatic && !slices.Contains(whole, s.Atom) {
					grow(append(append([]int{}, whole...), s.Atom))
				}
			}
		}
	}
	for i := range m.Atoms {
		grow([]int{i})
	}
	return list
}

// added is the constitution of the adduct whose new bonds join the ends of the two chains,
// nil where there is none.
func added(a, b *molecule.Molecule, ca, cb []int) *molecule.Molecule {
	e := a.Edit()
	offset := 0
	if b != nil {
		offset = e.Merge(b)
	}
	shift := func(path []int, offset int) {
		for k := 0; k+1 < len(path); k++ {
			x, y := path[k]+offset, path[k+1]+offset
			if k%2 == 0 {
				e.SetOrder(x, y, e.Order(x, y)-1)
			} else {
				e.SetOrder(x, y, e.Order(x, y)+1)
			}
		}
	}
	shift(ca, 0)
	shift(cb, offset)
	e.AddBond(ca[0], cb[0]+offset, 1)
	e.AddBond(ca[len(ca)-1], cb[len(cb)-1]+offset, 1)
	x, err := e.Done()
	if err != nil {
		return nil
	}
	return x
}

// retro tries to explain the products as the diene and the partner that a reactant falls
// into.
func (r *reader) retro(p *molecule.Molecule) bool {
	for _, m := range r.reactants {
		if len(m.Atoms) <= len(p.Atoms) || len(m.Atoms) > mostAdditionAtoms {
			continue
		}
		ways, err := reactivity.RetroDielsAlder(m)
		if err != nil {
			continue
		}
		for k := range ways {
			if r.areProducts(ways[k].Molecules, p) {
				r.Kind, r.Event, r.Substrate, r.Retro = terms.Cycloaddition, "", m, true
				return true
			}
		}
	}
	return false
}

// areProducts tells whether p is one of two pieces, and the other one a product as well or
// one that is often left out: a small gas or alkene.
func (r *reader) areProducts(pieces []*molecule.Molecule, p *molecule.Molecule) bool {
	if len(pieces) != 2 {
		return false
	}
	for k, piece := range pieces {
		if !piece.SameConstitution(p) {
			continue
		}
		other := pieces[1-k]
		if len(r.products) == 1 {
			return len(other.Atoms) <= 3 || other.SameConstitution(p)
		}
		for _, q := range r.products {
			if q != p && q.SameConstitution(other) {
				return true
			}
		}
	}
	return false
}
