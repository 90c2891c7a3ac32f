package reading

import (
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
)

// cycloaddition tries to explain p as the adduct of two reactants, of one reactant
// with itself, or of a nitrile oxide made in place.
func (r *reader) cycloaddition(p *molecule.Molecule) bool {
	all := append(append([]*molecule.Molecule(nil), r.reactants...), r.unlisted()...)
	want := compositionOf(p)
	for i, a := range all {
		for _, b := range all[i:] {
			if a == b {
				continue
			}
			if sum(a, b) == want && hydrogens(a)+hydrogens(b) == hydrogens(p) && r.adduct(a, b, p) {
				return true
			}
		}
	}
	for _, a := range all {
		if compositionOf(a) == want && hydrogens(a) == hydrogens(p) && ringCount(p) == ringCount(a)+2 && r.adduct(a, nil, p) {
			return true
		}
	}
	for i, a := range all {
		dipole := nitrileOxide(a)
		if dipole == nil {
			continue
		}
		for k, b := range all {
			if k != i && sum(dipole, b) == want && hydrogens(dipole)+hydrogens(b) == hydrogens(p) && r.adduct(dipole, b, p) {
				r.Notes = append(r.Notes, "the nitrile oxide is taken to form in place from "+a.SMILES())
				return true
			}
		}
	}
	return false
}

// unlisted are the reagents that are not among the reactants already.
func (r *reader) unlisted() []*molecule.Molecule {
	var list []*molecule.Molecule
next:
	for _, m := range r.reagents {
		for _, x := range r.reactants {
			if x == m {
				continue next
			}
		}
		list = append(list, m)
	}
	return list
}

func sum(a, b *molecule.Molecule) composition {
	c := compositionOf(a)
	for i, n := range compositionOf(b) {
		c[i] += n
	}
	return c
}

func hydrogens(m *molecule.Molecule) int {
	n := 0
	for i := range m.Atoms {
		n += m.Atoms[i].Hydrogens
	}
	return n
}

func ringCount(m *molecule.Molecule) int {
	return len(m.Bonds) - len(m.Atoms) + len(m.Components())
}

// adduct looks for p among the adducts of a and b (nil: intramolecular).
func (r *reader) adduct(a, b, p *molecule.Molecule) bool {
	meeting, err := reactivity.Meet(a, b)
	if err != nil {
		return false
	}
	for i := range meeting.Combinations {
		c := &meeting.Combinations[i]
		for _, o := range c.Orientations {
			x, err := reactivity.BuildAdduct(a, b, c, o)
			if err != nil || !x.SameConstitution(p) {
				continue
			}
			r.Kind, r.Event = terms.Cycloaddition, terms.CycloadditionOrientation
			r.Substrate, r.Partner, r.Meeting = a, b, meeting
			r.Bonds = [][2]int{o.Bonds[0], o.Bonds[1]}
			for _, m := range r.reactants {
				if m != a && m != b {
					r.Others = append(r.Others, m)
				}
			}
			return true
		}
	}
	return false
}

// nitrileOxide is the dipole that a hydroximoyl chloride or an aldoxime gives.
func nitrileOxide(m *molecule.Molecule) *molecule.Molecule {
	for c := range m.Atoms {
		if m.Atoms[c].Element != 6 {
			continue
		}
		n, o, halogen := -1, -1, -1
		for _, h := range m.Neighbours(c) {
			switch x := m.Atoms[h.Atom]; {
			case x.Element == 7 && m.Bonds[h.Bond].Order == 2:
				n = h.Atom
			case x.Element == 17 || x.Element == 35:
				halogen = h.Atom
			}
		}
		if n < 0 || halogen < 0 && m.Atoms[c].Hydrogens != 1 {
			continue
		}
		for _, h := range m.Neighbours(n) {
			if m.Atoms[h.Atom].Element == 8 && m.Atoms[h.Atom].Hydrogens == 1 {
				o = h.Atom
			}
		}
		if o < 0 {
			continue
		}
		e := m.Edit()
		if halogen < 0 {
			e.SetHydrogens(c, 0)
		} else {
			e.RemoveBond(c, halogen)
		}
		e.SetOrder(c, n, 3)
		e.Atom(n).Charge = 1
		e.SetHydrogens(o, 0)
		e.Atom(o).Charge = -1
		if halogen >= 0 {
			e.RemoveAtom(halogen)
		}
		if x, err := e.Done(); err == nil {
			return x
		}
	}
	return nil
}
