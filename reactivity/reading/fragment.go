package reading

import (
	"lobecast/frontier/molecule"
	"lobecast/reactivity"
)

// composition counts atoms by element, hydrogens left out.
type composition [128]int16

func compositionOf(m *molecule.Molecule) composition {
	var c composition
	for i := range m.Atoms {
		c[m.Atoms[i].Element&127]++
	}
	return c
}

// side collects the atoms on b's side of the bond a–b, which must be no ring bond.
func side(m *molecule.Molecule, a, b int) []int {
	seen := make([]bool, len(m.Atoms))
	seen[a], seen[b] = true, true
	list := []int{b}
	for k := 0; k < len(list); k++ {
		for _, h := range m.Neighbours(list[k]) {
			if !seen[h.Atom] {
				seen[h.Atom] = true
				list = append(list, h.Atom)
			}
		}
	}
	return list
}

// without builds m less the given atoms, edit being called before they are removed.
// It returns the molecule and the new index of atom a.
func without(m *molecule.Molecule, remove []int, a int, edit func(e *molecule.Editor)) (*molecule.Molecule, int) {
	e := m.Edit()
	edit(e)
	gone := make([]bool, len(m.Atoms))
	for _, i := range remove {
		gone[i] = true
	}
	for i := len(m.Atoms) - 1; i >= 0; i-- {
		if gone[i] {
			e.RemoveAtom(i)
		}
	}
	x, err := e.Done()
	if err != nil {
		return nil, -1
	}
	number := m.Atoms[a].Number
	for i := range x.Atoms {
		if x.Atoms[i].Number == number {
			return x, i
		}
	}
	return nil, -1
}

// group makes the incoming group of one side of a bond a–b of m: b's side with a
// wildcard in the place of a.
func group(m *molecule.Molecule, a int, remove []int, b int) *reactivity.Incoming {
	keep := make([]bool, len(m.Atoms))
	for _, i := range remove {
		keep[i] = true
	}
	e := m.Edit()
	e.Atom(a).Element = 0
	e.Atom(a).Hydrogens, e.Atom(a).Charge, e.Atom(a).Isotope = 0, 0, 0
	for _, h := range m.Neighbours(a) {
		if h.Atom != b {
			e.RemoveBond(a, h.Atom)
		}
	}
	for i := len(m.Atoms) - 1; i >= 0; i-- {
		if !keep[i] && i != a {
			e.RemoveAtom(i)
		}
	}
	x, err := e.Done()
	if err != nil {
		return nil
	}
	for i := range x.Atoms {
		x.Atoms[i].Map = 0
	}
	x.Source = ""
	x.Source = x.SMILES()
	in, err := reactivity.NewIncoming(x)
	if err != nil {
		return nil
	}
	return in
}

// correspond maps the atoms of a onto those of b, two molecules with the same flat
// canonical form; nil where the numbering does not carry over.
func correspond(a, b *molecule.Molecule) []int {
	try := func(a, b *molecule.Molecule) []int {
		ra, rb := a.CanonicalOrder(), b.CanonicalOrder()
		at := make([]int, len(rb))
		for i, r := range rb {
			at[r] = i
		}
		to := make([]int, len(ra))
		for i, r := range ra {
			to[i] = at[r]
			if a.Atoms[i].Element != b.Atoms[to[i]].Element {
				return nil
			}
		}
		for _, x := range a.Bonds {
			if b.BondBetween(to[x.A], to[x.B]) < 0 {
				return nil
			}
		}
		return to
	}
	if len(a.Atoms) != len(b.Atoms) || len(a.Bonds) != len(b.Bonds) {
		return nil
	}
	if to := try(a, b); to != nil {
		return to
	}
	return try(flatten(a), flatten(b))
}

// flatten drops all configuration.
func flatten(m *molecule.Molecule) *molecule.Molecule {
	e := m.Edit()
	for i := range m.Atoms {
		e.Atom(i).Stereo = molecule.Stereo{}
	}
	x, err := e.Done()
	if err != nil {
		return m
	}
	for i := range x.Bonds {
		x.Bonds[i].Geometry = molecule.NoGeometry
	}
	return x
}

// orbit lists the atoms equivalent to one.
func orbit(m *molecule.Molecule, a int) []int {
	classes := m.Classes()
	var list []int
	for i, c := range classes {
		if c == classes[a] {
			list = append(list, i)
		}
	}
	return list
}
