package reactivity

import "slices"

// Kinds of partners that are listed after C=C and C≡C bonds.
const (
	kindAldehyde = "aldehyde"
	kindKetone   = "ketone"
	kindNitrile  = "nitrile"
)

const kindKetene = "ketene"

// findPartners lists the π bonds that a diene or a dipole can add to: alkenes,
// allenes, ketenes (C=C), alkynes, arynes, aldehydes and ketones, imines, nitriles,
// nitroso, azo, thiocarbonyl and sulfinyl groups, dioxygen, and the 2,3 bond of
// five-membered heteroarenes. The carbonyl group of an acid or its derivatives is
// left out.
func (f *endFinder) findPartners() {
	m := f.m
	for b := range m.Bonds {
		bond := &m.Bonds[b]
		if f.inDipole[b] {
			continue
		}
		e := End{Role: RolePartner, Atoms: []int{bond.A, bond.B}}
		switch {
		case bond.Order == 3:
			e.Kind = f.tripleWord(bond.A, bond.B)
			e.Local = e.Kind == "aryne"
		case bond.Aromatic:
			e.Kind = f.heteroareneBond(bond.A, bond.B)
			e.Aromatic = true
		case bond.Order == 2 && !f.inAryne(bond.A, bond.B):
			e.Kind = f.doubleWord(bond.A, bond.B)
		}
		if e.Kind != "" {
			f.ends.Partners = append(f.ends.Partners, e)
		}
	}
}

// tripleWord names a triple bond.
func (f *endFinder) tripleWord(p, q int) string {
	m := f.m
	if m.Atoms[p].Element > m.Atoms[q].Element {
		p, q = q, p
	}
	switch {
	case m.Atoms[p].Element == 6 && m.Atoms[q].Element == 6:
		if ring := f.smallRing(p, q, 6); ring != nil {
			return "aryne"
		}
		if f.smallRing(p, q, 9) != nil {
			return "cycloalkyne"
		}
		return "alkyne"
	case m.Atoms[p].Element == 6 && m.Atoms[q].Element == 7 && m.Degree(q) == 1 && m.Atoms[q].Charge == 0:
		return kindNitrile
	case m.Atoms[p].Element == 6 && m.Atoms[q].Element == 15:
		return "phosphaalkyne"
	}
	return ""
}

// doubleWord names a double bond outside aromatic rings, or "" where it takes no part.
func (f *endFinder) doubleWord(p, q int) string {
	m := f.m
	if m.Atoms[p].Element > m.Atoms[q].Element {
		p, q = q, p
	}
	zp, zq := m.Atoms[p].Element, m.Atoms[q].Element
	switch {
	case zp == 6 && zq == 6:
		for _, k := range [2][2]int{{p, q}, {q, p}} {
			for _, h := range m.Neighbours(k[0]) {
				if h.Atom == k[1] || m.Bonds[h.Bond].Order != 2 {
					continue
				}
				if z := m.Atoms[h.Atom].Element; z == 8 {
					return kindKetene
				} else if z == 6 {
					return "allene"
				}
			}
		}
		if f.quinoneBond(p, q) {
			return "quinone"
		}
		return "alkene"
	case zp == 6 && zq == 7:
		for _, h := range m.Neighbours(p) {
			if h.Atom == q || m.Bonds[h.Bond].Order != 2 {
				continue
			}
			switch m.Atoms[h.Atom].Element {
			case 8:
				return "isocyanate"
			case 16:
				return "isothiocyanate"
			case 7:
				return "carbodiimide"
			}
			return "ketenimine"
		}
		if m.Atoms[q].Charge == 1 {
			if m.Degree(q)+m.Atoms[q].Hydrogens != 3 {
				return ""
			}
			return "iminium"
		}
		return "imine"
	case zp == 6 && zq == 8:
		if m.Atoms[q].Charge != 0 || acidCarbonyl(m, p, -1) || f.cumulated(p, q) {
			return ""
		}
		if m.Atoms[p].Hydrogens > 0 {
			return kindAldehyde
		}
		return kindKetone
	case zp == 6 && zq == 15:
		return "phosphaalkene"
	case zp == 6 && (zq == 16 || zq == 34):
		if m.Degree(q) > 1 {
			if m.Degree(q) == 2 { // sulfine
				return "sulfine"
			}
			return ""
		}
		if zq == 34 {
			return "selenocarbonyl"
		}
		return "thiocarbonyl"
	case zp == 7 && zq == 7:
		if m.Atoms[p].Charge != 0 || m.Atoms[q].Charge != 0 || m.Valence(p) != 3 || m.Valence(q) != 3 {
			return ""
		}
		return "azo"
	case zp == 7 && zq == 8:
		if m.Degree(p) != 2 || m.Atoms[p].Charge != 0 || m.Valence(p) != 3 {
			return ""
		}
		for _, h := range m.Neighbours(p) {
			if h.Atom != q && m.Atoms[h.Atom].Element != 6 {
				return "" // nitrites, nitrosamines
			}
		}
		return "nitroso"
	case zp == 7 && zq == 16:
		if m.Degree(q) != 2 || m.Valence(q) > 4 {
			return ""
		}
		return "sulfinylamine"
	case zp == 8 && zq == 8:
		return "dioxygen"
	}
	return ""
}

// quinoneBond says whether a C=C lies in a six-ring between two carbonyl carbons of
// that ring (a 1,4-benzo- or naphthoquinone) or next to a 1,2-dione.
func (f *endFinder) quinoneBond(p, q int) bool {
	m := f.m
	ring := f.smallRing(p, q, 6)
	if len(ring) != 6 {
		return false
	}
	oxo := 0
	for _, i := range ring {
		for _, h := range m.Neighbours(i) {
			if m.Bonds[h.Bond].Order == 2 && m.Atoms[h.Atom].Element == 8 && !slices.Contains(ring, h.Atom) {
				oxo++
			}
		}
	}
	return oxo == 2
}

// heteroareneBond names the 2,3 bond of a five-membered heteroarene (furan, pyrrole,
// thiophene, indole, benzofuran, …), the only aromatic bond taken as a partner.
func (f *endFinder) heteroareneBond(p, q int) string {
	m := f.m
	if m.Atoms[p].Element != 6 || m.Atoms[q].Element != 6 || f.fusion(p) || f.fusion(q) {
		return ""
	}
	ring := f.smallRing(p, q, 5)
	if len(ring) != 5 {
		return ""
	}
	// one of the two must neighbour the heteroatom that brings the pair
	x := -1
	for _, i := range ring {
		if z := m.Atoms[i].Element; aromaticMate(m, i) < 0 && (z == 7 || z == 8 || z == 16) {
			x = i
		}
	}
	if x < 0 || !adjacentInRing(ring, x, p) && !adjacentInRing(ring, x, q) {
		return ""
	}
	if aromaticMate(m, p) < 0 || aromaticMate(m, q) < 0 {
		return ""
	}
	if _, ok := kekuleWithout(m, []int{p, q}); !ok {
		return ""
	}
	return kindHeteroarene
}
