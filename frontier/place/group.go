package place

import (
	"fmt"

	"lobecast/frontier/molecule"
)

// group is the trade's short name of the substituent that atom g begins on atom at.
func group(m *molecule.Molecule, at, g int) string {
	a := m.Atoms[g]
	if m.InRing(g) && m.BondInRing(m.BondBetween(at, g)) {
		return "ring " + hydride(a)
	}
	double, single := around(m, at, g)
	switch a.Element {
	case 9, 17, 35, 53:
		return molecule.Symbol(a.Element)
	case 8:
		return oxygen(m, a, single)
	case 16:
		return sulfur(m, a, double, single)
	case 7:
		return nitrogen(m, a, double, single)
	case 6:
		return carbon(m, g, a, double, single)
	case 5:
		return "boron group"
	case 14:
		return "silyl"
	case 15:
		return "phosphorus group"
	}
	return molecule.Symbol(a.Element)
}

func hydride(a molecule.Atom) string {
	s := molecule.Symbol(a.Element)
	switch {
	case a.Aromatic || a.Hydrogens == 0:
		return s
	case a.Hydrogens == 1:
		return s + "H"
	}
	return fmt.Sprintf("%sH%d", s, a.Hydrogens)
}

// around sorts the neighbours of g other than at by bond order.
func around(m *molecule.Molecule, at, g int) (multiple, single []int) {
	for _, h := range m.Neighbours(g) {
		if h.Atom == at {
			continue
		}
		if m.Bonds[h.Bond].Order > 1 {
			multiple = append(multiple, h.Atom)
		} else {
			single = append(single, h.Atom)
		}
	}
	return multiple, single
}

func count(m *molecule.Molecule, atoms []int, element int) int {
	n := 0
	for _, a := range atoms {
		if m.Atoms[a].Element == element {
			n++
		}
	}
	return n
}

// acyl tells whether an atom is a carbon with =O.
func acyl(m *molecule.Molecule, a int) bool {
	return m.Atoms[a].Element == 6 && hasOxo(m, a)
}

func oxygen(m *molecule.Molecule, a molecule.Atom, single []int) string {
	switch {
	case a.Charge < 0:
		return "O−"
	case a.Hydrogens == 1:
		return "OH"
	case len(single) == 0:
		return "O"
	}
	r := single[0]
	switch {
	case m.Atoms[r].Element == 6 && m.Atoms[r].Hydrogens == 3:
		return "OMe"
	case acyl(m, r):
		return "OC(O)R"
	case m.Atoms[r].Element == 16:
		return "OSO2R"
	case m.Atoms[r].Element == 14:
		return "OSiR3"
	case m.Atoms[r].Aromatic:
		return "OAr"
	}
	return "OR"
}

func sulfur(m *molecule.Molecule, a molecule.Atom, double, single []int) string {
	oxo := count(m, double, 8)
	for _, s := range single {
		if m.Atoms[s].Element == 8 && m.Atoms[s].Charge < 0 {
			oxo++
		}
	}
	switch {
	case oxo >= 2 && count(m, single, 7) > 0:
		return "SO2NR2"
	case oxo >= 2 && count(m, single, 17)+count(m, single, 9) > 0:
		return "SO2Cl"
	case oxo >= 3 || oxo == 2 && count(m, single, 8) > 0:
		return "SO3R"
	case oxo == 2:
		return "SO2R"
	case oxo == 1:
		return "S(O)R"
	case a.Charge > 0:
		return "SR2+"
	case a.Hydrogens > 0:
		return "SH"
	}
	return "SR"
}

func nitrogen(m *molecule.Molecule, a molecule.Atom, double, single []int) string {
	oxygens := count(m, double, 8) + count(m, single, 8)
	switch {
	case oxygens == 2 && a.Hydrogens == 0:
		return "NO2"
	case len(double) > 0 && count(m, double, 8) == 1:
		return "NO"
	case len(double) > 0 && count(m, double, 7) == 1 && a.Charge > 0 && len(single) == 0:
		return "N2+"
	case len(double) > 0 && count(m, double, 7) == 1:
		if m.Atoms[double[0]].Charge > 0 {
			return "N3"
		}
		return "N=NR"
	case len(double) > 0 && !a.Aromatic:
		return "N=CR2"
	case a.Aromatic:
		return "N-azolyl"
	case a.Charge > 0:
		return "NR3+"
	}
	for _, s := range single {
		if acyl(m, s) {
			if a.Hydrogens > 0 {
				return "NHC(O)R"
			}
			return "NRC(O)R"
		}
	}
	if count(m, single, 16) > 0 {
		return "NHSO2R"
	}
	switch {
	case a.Hydrogens == 2:
		return "NH2"
	case a.Hydrogens == 1:
		return "NHR"
	case len(single) == 2 && m.Atoms[single[0]].Hydrogens == 3 && m.Atoms[single[1]].Hydrogens == 3:
		return "NMe2"
	}
	return "NR2"
}

func carbon(m *molecule.Molecule, g int, a molecule.Atom, double, single []int) string {
	if hasOxo(m, g) {
		switch {
		case a.Hydrogens > 0:
			return "CHO"
		case count(m, single, 8) > 0:
			o := single[0]
			for _, s := range single {
				if m.Atoms[s].Element == 8 {
					o = s
				}
			}
			switch {
			case m.Atoms[o].Hydrogens > 0:
				return "CO2H"
			case m.Atoms[o].Charge < 0:
				return "CO2−"
			}
			return "CO2R"
		case count(m, single, 7) > 0:
			return "C(O)NR2"
		case count(m, single, 17) > 0:
			return "COCl"
		}
		return "C(O)R"
	}
	for _, d := range double {
		if m.Bonds[m.BondBetween(g, d)].Order == 3 {
			if m.Atoms[d].Element == 7 {
				return "CN"
			}
			return "alkynyl"
		}
	}
	switch {
	case a.Aromatic:
		return "aryl"
	case len(double) > 0 && m.Atoms[double[0]].Element == 7:
		return "C=N"
	case len(double) > 0:
		return "vinyl"
	case count(m, single, 9) == 3:
		return "CF3"
	case count(m, single, 9) == 2:
		return "CHF2"
	case a.Hydrogens == 3:
		return "Me"
	case a.Hydrogens == 0 && count(m, single, 6) == 3 && methyls(m, single) == 3:
		return "tBu"
	case a.Hydrogens == 1 && count(m, single, 6) == 2 && methyls(m, single) == 2:
		return "iPr"
	case a.Hydrogens == 2 && methyls(m, single) == 1:
		return "Et"
	case a.Hydrogens == 2 && count(m, single, 6) == 0 && len(single) == 1:
		return "CH2" + molecule.Symbol(m.Atoms[single[0]].Element) + tail(m, single[0])
	}
	return "alkyl"
}

func tail(m *molecule.Molecule, a int) string {
	switch m.Atoms[a].Element {
	case 9, 17, 35, 53:
		return ""
	case 8:
		if m.Atoms[a].Hydrogens > 0 {
			return "H"
		}
	}
	return "R"
}

func methyls(m *molecule.Molecule, atoms []int) int {
	n := 0
	for _, a := range atoms {
		if m.Atoms[a].Element == 6 && m.Atoms[a].Hydrogens == 3 {
			n++
		}
	}
	return n
}
