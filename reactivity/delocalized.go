package reactivity

import "lobecast/frontier/molecule"

// chargeShift says how a charge comes to an atom: from another atom, over the middle atom
// of an allyl position. Where the charge is written, from and middle are -1.
type chargeShift struct {
	atom, from, middle int
}

// chargeShifts lists the carbons that bear a charge of the given sign in some resonance
// structure, those where it is written first: the ends of allyl positions that can be
// reached one after the other. Bonds are those of the structure as written.
func chargeShifts(m *molecule.Molecule, charge int) []chargeShift {
	var list []chargeShift
	for i := range m.Atoms {
		if a := &m.Atoms[i]; a.Element == 6 && a.Charge == charge && a.Unpaired == 0 && onlySingle(m, i) {
			list = append(list, chargeShift{i, -1, -1})
		}
	}
	if len(list) == 0 {
		return nil
	}
	reached := make([]bool, len(m.Atoms))
	for _, s := range list {
		reached[s.atom] = true
	}
	for k := 0; k < len(list); k++ {
		for _, h := range m.Neighbours(list[k].atom) {
			if m.Atoms[h.Atom].Element != 6 {
				continue
			}
			for _, d := range m.Neighbours(h.Atom) {
				if m.Bonds[d.Bond].Order == 2 && m.Atoms[d.Atom].Element == 6 && m.Atoms[d.Atom].Charge == 0 && !reached[d.Atom] {
					reached[d.Atom] = true
					list = append(list, chargeShift{d.Atom, list[k].atom, h.Atom})
				}
			}
		}
	}
	return list
}

func onlySingle(m *molecule.Molecule, i int) bool {
	for _, h := range m.Neighbours(i) {
		if m.Bonds[h.Bond].Order != 1 {
			return false
		}
	}
	return true
}

// resonanceClasses are the classes of equivalent atoms, where charges that several carbons
// share by resonance tell these apart no more: the seven carbons of the tropylium ion, the
// ends of an allyl anion.
func resonanceClasses(m *molecule.Molecule) []int {
	var shared, alike []bool
	for _, sign := range [2]int{1, -1} {
		for _, s := range chargeShifts(m, sign) {
			if s.from < 0 {
				continue
			}
			if shared == nil {
				shared, alike = make([]bool, len(m.Atoms)), make([]bool, len(m.Bonds))
			}
			shared[s.atom], shared[s.from] = true, true
			alike[m.BondBetween(s.from, s.middle)], alike[m.BondBetween(s.middle, s.atom)] = true, true
		}
	}
	if shared == nil {
		return m.Classes()
	}
	// A bond closes the ring where both its atoms have the charge, as in tropylium.
	for k := range m.Bonds {
		if b := &m.Bonds[k]; shared[b.A] && shared[b.B] {
			alike[k] = true
		}
	}
	return m.ClassesWith(shared, alike)
}

// withCharge is the molecule in the resonance structure that has the charge at an atom.
func withCharge(m *molecule.Molecule, list []chargeShift, atom int) (*molecule.Molecule, error) {
	by := make(map[int]chargeShift, len(list))
	for _, s := range list {
		by[s.atom] = s
	}
	e := m.Edit()
	s := by[atom]
	for ; s.from >= 0; s = by[s.from] {
		e.SetOrder(s.middle, s.atom, 1)
		e.SetOrder(s.from, s.middle, 2)
	}
	charge := m.Atoms[s.atom].Charge
	e.Atom(s.atom).Charge = 0
	e.Atom(atom).Charge = charge
	return e.Done()
}
