package reading

import "lobecast/frontier/molecule"

// groups counts the functional groups of one or several molecules, for telling what a
// step did by what appeared and what went.
type groups struct {
	acid, ester, tertButylEster, benzylEster, amide, carbamate, boc, cbz, fmoc, urea int
	acylChloride, aldehyde, ketone, anhydride, carbonate                             int
	alcohol, phenol, arylEther, arylMethylEther, alkylEther, benzylEther, silylEther int
	primaryAmine, secondaryAmine, tertiaryAmine                                      int
	methylN, methylO, benzylN                                                        int
	nitro, nitrile, azide, imine, oxime, isocyanate                                  int
	sulfide, thiol, sulfoxide, sulfone, sulfonamide, sulfonylChloride, sulfonate     int
	arylHalide, alkylChloride, alkylBromide, alkylIodide, vinylHalide                int
	boronic, stannane, organozinc                                                    int
	terminalAlkyne, alkyne, alkene, ylide, phosphonate                               int
	nOxide, epoxide, acetal, nH                                                      int
}

func (g *groups) add(m *molecule.Molecule) {
	for i, a := range m.Atoms {
		switch a.Element {
		case 6:
			g.carbon(m, i)
		case 7:
			g.nitrogen(m, i)
		case 8:
			g.oxygen(m, i)
		case 16:
			g.sulfur(m, i)
		case 9, 17, 35, 53:
			g.halogen(m, i)
		case 5:
			if neighbours(m, i, 6, 1) > 0 {
				g.boronic++
			}
		case 50:
			g.stannane++
		case 30:
			g.organozinc++
		case 15:
			if neighbours(m, i, 8, 2) > 0 && neighbours(m, i, 6, 1) > 0 {
				g.phosphonate++
			} else if a.Charge > 0 || neighbours(m, i, 6, 2) > 0 {
				g.ylide++
			}
		}
	}
	for _, b := range m.Bonds {
		if b.Aromatic || m.Atoms[b.A].Element != 6 || m.Atoms[b.B].Element != 6 {
			continue
		}
		switch b.Order {
		case 2:
			g.alkene++
		case 3:
			g.alkyne++
			if m.Atoms[b.A].Hydrogens > 0 || m.Atoms[b.B].Hydrogens > 0 {
				g.terminalAlkyne++
			}
		}
	}
}

// neighbours counts the neighbours of i of an element through bonds of an order (0:
// any).
func neighbours(m *molecule.Molecule, i, element, order int) int {
	n := 0
	for _, h := range m.Neighbours(i) {
		if m.Atoms[h.Atom].Element == element && (order == 0 || m.Bonds[h.Bond].Order == order) {
			n++
		}
	}
	return n
}

func carbonyl(m *molecule.Molecule, i int) bool {
	return m.Atoms[i].Element == 6 && neighbours(m, i, 8, 2)+neighbours(m, i, 16, 2) > 0
}

// tertButyl tells whether i is the central carbon of a tert-butyl group.
func tertButyl(m *molecule.Molecule, i int) bool {
	n := 0
	for _, h := range m.Neighbours(i) {
		if m.Atoms[h.Atom].Element == 6 && m.Atoms[h.Atom].Hydrogens == 3 {
			n++
		}
	}
	return m.Atoms[i].Element == 6 && n >= 3
}

// benzyl tells whether i is a CH2 on an arene.
func benzyl(m *molecule.Molecule, i int) bool {
	if m.Atoms[i].Element != 6 || m.Atoms[i].Aromatic || m.Atoms[i].Hydrogens != 2 {
		return false
	}
	for _, h := range m.Neighbours(i) {
		if m.Atoms[h.Atom].Aromatic && m.Atoms[h.Atom].Element == 6 {
			return true
		}
	}
	return false
}

func (g *groups) carbon(m *molecule.Molecule, i int) {
	a := m.Atoms[i]
	if neighbours(m, i, 7, 3) > 0 {
		g.nitrile++
	}
	if neighbours(m, i, 8, 2) == 2 || neighbours(m, i, 8, 2)+neighbours(m, i, 7, 2) == 2 {
		g.isocyanate++
		return
	}
	if neighbours(m, i, 7, 2) > 0 && !a.Aromatic {
		g.imine++
	}
	if neighbours(m, i, 8, 1) >= 2 && !carbonyl(m, i) {
		g.acetal++
	}
	if !carbonyl(m, i) || a.Aromatic {
		return
	}
	oxygens, nitrogens := neighbours(m, i, 8, 1), neighbours(m, i, 7, 1)
	halides := neighbours(m, i, 17, 1) + neighbours(m, i, 35, 1) + neighbours(m, i, 9, 1)
	switch {
	case halides > 0:
		g.acylChloride++
	case nitrogens == 2:
		g.urea++
	case nitrogens == 1 && oxygens == 1:
		g.carbamate++
		for _, h := range m.Neighbours(i) {
			if m.Atoms[h.Atom].Element != 8 || m.Bonds[h.Bond].Order != 1 {
				continue
			}
			for _, k := range m.Neighbours(h.Atom) {
				switch {
				case k.Atom == i:
				case tertButyl(m, k.Atom):
					g.boc++
				case benzyl(m, k.Atom):
					g.cbz++
				case m.Atoms[k.Atom].Element == 6 && m.Atoms[k.Atom].Hydrogens == 2:
					for _, l := range m.Neighbours(k.Atom) {
						if m.InRing(l.Atom) && m.Atoms[l.Atom].Hydrogens == 1 && len(m.RingSizes(l.Atom)) > 0 && m.RingSizes(l.Atom)[0] == 5 && !m.Atoms[l.Atom].Aromatic && neighbours(m, l.Atom, 6, 1) == 3 {
							g.fmoc++
						}
					}
				}
			}
		}
	case nitrogens == 1:
		g.amide++
	case oxygens == 2:
		g.carbonate++
	case oxygens == 1:
		for _, h := range m.Neighbours(i) {
			o := h.Atom
			if m.Atoms[o].Element != 8 || m.Bonds[h.Bond].Order != 1 {
				continue
			}
			if m.Atoms[o].Hydrogens > 0 || m.Atoms[o].Charge < 0 {
				g.acid++
				continue
			}
			anhydride := false
			for _, k := range m.Neighbours(o) {
				if k.Atom == i {
					continue
				}
				switch {
				case carbonyl(m, k.Atom):
					anhydride = true
				case tertButyl(m, k.Atom):
					g.tertButylEster++
				case benzyl(m, k.Atom):
					g.benzylEster++
				}
			}
			if anhydride {
				g.anhydride++
			} else {
				g.ester++
			}
		}
	case a.Hydrogens > 0:
		g.aldehyde++
	default:
		g.ketone++
	}
}

func (g *groups) nitrogen(m *molecule.Molecule, i int) {
	a := m.Atoms[i]
	oxygens := neighbours(m, i, 8, 0)
	g.nH += a.Hydrogens
	switch {
	case oxygens == 2:
		g.nitro++
		return
	case oxygens == 1 && a.Charge > 0:
		g.nOxide++
		return
	case neighbours(m, i, 7, 2) > 0 && a.Charge > 0:
		g.azide++
		return
	case neighbours(m, i, 6, 2) > 0 && oxygens == 1:
		g.oxime++
		return
	case a.Aromatic || neighbours(m, i, 6, 2)+neighbours(m, i, 6, 3) > 0:
		for _, h := range m.Neighbours(i) {
			if m.Atoms[h.Atom].Element == 6 && m.Atoms[h.Atom].Hydrogens == 3 {
				g.methylN++
			}
		}
		return
	}
	acyl, sulfonyl := 0, 0
	for _, h := range m.Neighbours(i) {
		x := h.Atom
		switch {
		case carbonyl(m, x) && !m.Atoms[x].Aromatic:
			acyl++
		case m.Atoms[x].Element == 16 && neighbours(m, x, 8, 2) == 2:
			sulfonyl++
		}
		if m.Atoms[x].Element == 6 && m.Atoms[x].Hydrogens == 3 {
			g.methylN++
		}
		if benzyl(m, x) {
			g.benzylN++
		}
	}
	if sulfonyl > 0 {
		g.sulfonamide++
		return
	}
	if acyl > 0 {
		return
	}
	switch a.Hydrogens {
	case 2, 3:
		g.primaryAmine++
	case 1:
		g.secondaryAmine++
	default:
		g.tertiaryAmine++
	}
}

func (g *groups) oxygen(m *molecule.Molecule, i int) {
	a := m.Atoms[i]
	if a.Aromatic || m.Degree(i) == 0 || neighbours(m, i, 6, 2) > 0 {
		return
	}
	if neighbours(m, i, 14, 1) > 0 {
		g.silylEther++
		return
	}
	acyl, aryl, methyl, bn, carbons := 0, 0, 0, 0, 0
	for _, h := range m.Neighbours(i) {
		x := h.Atom
		if m.Atoms[x].Element != 6 {
			continue
		}
		carbons++
		switch {
		case carbonyl(m, x) && !m.Atoms[x].Aromatic:
			acyl++
		case m.Atoms[x].Aromatic:
			aryl++
		case m.Atoms[x].Hydrogens == 3:
			methyl++
		case benzyl(m, x):
			bn++
		}
	}
	g.methylO += methyl
	switch {
	case acyl > 0:
	case carbons == 1 && (a.Hydrogens == 1 || a.Charge < 0) && m.Degree(i) == 1:
		if aryl > 0 {
			g.phenol++
		} else {
			g.alcohol++
		}
	case carbons == 2 && aryl > 0:
		g.arylEther++
		if methyl > 0 {
			g.arylMethylEther++
		}
		if bn > 0 {
			g.benzylEther++
		}
	case carbons == 2:
		g.alkylEther++
		if bn > 0 {
			g.benzylEther++
		}
		if len(m.RingSizes(i)) > 0 && m.RingSizes(i)[0] == 3 {
			g.epoxide++
		}
	}
}

func (g *groups) sulfur(m *molecule.Molecule, i int) {
	if m.Atoms[i].Aromatic {
		return
	}
	oxo := neighbours(m, i, 8, 2)
	for _, h := range m.Neighbours(i) {
		if m.Atoms[h.Atom].Element == 8 && m.Atoms[h.Atom].Charge < 0 && m.Atoms[i].Charge > 0 {
			oxo++
		}
	}
	switch {
	case oxo == 2 && neighbours(m, i, 17, 1)+neighbours(m, i, 9, 1) > 0:
		g.sulfonylChloride++
	case oxo == 2 && neighbours(m, i, 7, 1) > 0:
	case oxo == 2 && neighbours(m, i, 8, 1) > 0:
		g.sulfonate++
	case oxo == 2:
		g.sulfone++
	case oxo == 1:
		g.sulfoxide++
	case m.Atoms[i].Hydrogens > 0:
		g.thiol++
	case neighbours(m, i, 6, 1) == 2:
		g.sulfide++
	}
}

func (g *groups) halogen(m *molecule.Molecule, i int) {
	if m.Degree(i) != 1 {
		return
	}
	c := m.Neighbours(i)[0].Atom
	if m.Atoms[c].Element != 6 || carbonyl(m, c) && !m.Atoms[c].Aromatic {
		return
	}
	if m.Atoms[c].Aromatic {
		g.arylHalide++
		return
	}
	for _, h := range m.Neighbours(c) {
		if m.Bonds[h.Bond].Order > 1 {
			g.vinylHalide++
			return
		}
	}
	switch m.Atoms[i].Element {
	case 17:
		g.alkylChloride++
	case 35:
		g.alkylBromide++
	case 53:
		g.alkylIodide++
	}
}
