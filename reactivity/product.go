package reactivity

import (
	"errors"
	"fmt"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

var errNoProduct = errors.New("no product can be drawn for this event")

// Product builds the product of an event at one site: the incoming group in the
// place of a hydrogen (electrophilic and radical substitution) or of the leaving
// group (nucleophilic substitution), or added to the acceptor (nucleophilic
// addition: 1,2 at a carbonyl, imine or nitrile carbon, 1,4 at a β carbon).
//
// site is an atom index. The error says why there is none.
func Product(m *molecule.Molecule, event terms.Event, site int, in *Incoming) (*molecule.Molecule, error) {
	switch event {
	case terms.ElectrophilicSubstitution, terms.RadicalSubstitution:
		if m.Atoms[site].Hydrogens == 0 {
			return nil, fmt.Errorf("atom %d carries no hydrogen to be replaced", m.Atoms[site].Number)
		}
		e := m.Edit()
		e.SetHydrogens(site, m.Atoms[site].Hydrogens-1)
		in.join(e, site)
		return e.Done()
	case terms.NucleophilicSubstitution:
		leaving := leavingAtom(m, site)
		if leaving < 0 {
			return nil, fmt.Errorf("atom %d carries no leaving group", m.Atoms[site].Number)
		}
		return replaceLeaving(m, site, leaving, in)
	case terms.NucleophilicAddition:
		return additionProduct(m, site, in)
	}
	return nil, errNoProduct
}

// join adds the group of in to the molecule being edited, bound to site.
func (in *Incoming) join(e *molecule.Editor, site int) {
	g := in.Group
	at := make([]int, len(g.Atoms))
	for i, a := range g.Atoms {
		if i == in.Open {
			at[i] = -1
			continue
		}
		a.Stereo = molecule.Stereo{}
		a.Map = 0
		at[i] = e.AddAtom(a)
	}
	for _, b := range g.Bonds {
		if b.A == in.Open || b.B == in.Open {
			continue
		}
		e.AddBond(at[b.A], at[b.B], b.Order)
	}
	e.AddBond(site, at[in.Binds], 1)
}

// leavingAtom is the atom bound to site through which a leaving group is lost, or -1.
func leavingAtom(m *molecule.Molecule, site int) int {
	best, score := -1, 0
	for _, h := range m.Neighbours(site) {
		if m.Bonds[h.Bond].Order != 1 || m.BondInRing(h.Bond) {
			continue
		}
		if s := leavingScore(m, site, h.Atom); s > score {
			best, score = h.Atom, s
		}
	}
	return best
}

// leavingScore is positive for an atom that can leave an unsaturated carbon with its
// electrons; where two could, the higher one is meant.
func leavingScore(m *molecule.Molecule, site, a int) int {
	switch atom := m.Atoms[a]; atom.Element {
	case 9:
		return 9
	case 17:
		return 8
	case 35:
		return 7
	case 53:
		return 6
	case 16: // sulfone, sulfoxide, sulfonium
		if atom.Charge > 0 {
			return 5
		}
		for _, h := range m.Neighbours(a) {
			if n := m.Atoms[h.Atom]; n.Element == 8 && m.Degree(h.Atom) == 1 && n.Hydrogens == 0 {
				return 5
			}
		}
	case 8: // sulfonate ester, phosphate, aryloxide of a nitrophenol
		for _, h := range m.Neighbours(a) {
			if h.Atom != site && (m.Atoms[h.Atom].Element == 16 || m.Atoms[h.Atom].Element == 15) {
				return 4
			}
		}
	case 7: // nitro, ammonium, pyridinium, diazonium
		if atom.Charge > 0 {
			return 3
		}
	}
	return 0
}

// replaceLeaving puts the incoming group in the place of the whole leaving group.
func replaceLeaving(m *molecule.Molecule, site, leaving int, in *Incoming) (*molecule.Molecule, error) {
	e := m.Edit()
	in.join(e, site)
	for _, a := range branch(m, site, leaving) {
		e.RemoveAtom(a)
	}
	return e.Done()
}

// branch lists the atoms that hang on site through first, first included.
func branch(m *molecule.Molecule, site, first int) []int {
	seen := map[int]bool{site: true, first: true}
	list := []int{first}
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

// additionProduct adds the group to an acceptor carbon and a hydrogen to its other
// end: the heteroatom (1,2), or the α carbon (1,4 and 1,6, after the enol has become
// the carbonyl compound again). To a carbon that shares a positive charge it adds the group
// alone.
func additionProduct(m *molecule.Molecule, site int, in *Incoming) (*molecule.Molecule, error) {
	shifts := chargeShifts(m, 1)
	for _, s := range shifts {
		if s.atom != site {
			continue
		}
		x, err := withCharge(m, shifts, site)
		if err != nil {
			return nil, err
		}
		e := x.Edit()
		e.Atom(site).Charge = 0
		in.join(e, site)
		return e.Done()
	}
	for _, h := range m.Neighbours(site) {
		b := m.Bonds[h.Bond]
		if b.Order < 2 || m.Atoms[h.Atom].Element == 6 || b.Aromatic {
			continue
		}
		e := m.Edit()
		e.SetOrder(site, h.Atom, b.Order-1)
		if m.Atoms[h.Atom].Charge > 0 {
			e.Atom(h.Atom).Charge--
		} else {
			e.SetHydrogens(h.Atom, m.Atoms[h.Atom].Hydrogens+1)
		}
		in.join(e, site)
		return e.Done()
	}
	for _, h := range m.Neighbours(site) {
		b := m.Bonds[h.Bond]
		if b.Order < 2 || m.Atoms[h.Atom].Element != 6 || b.Aromatic {
			continue
		}
		e := m.Edit()
		e.SetOrder(site, h.Atom, b.Order-1)
		e.SetHydrogens(h.Atom, m.Atoms[h.Atom].Hydrogens+1)
		in.join(e, site)
		return e.Done()
	}
	return nil, errNoProduct
}
