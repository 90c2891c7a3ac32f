package place

import (
	"fmt"

	"lobecast/frontier/molecule"
)

// chain names an atom outside the named rings by the trade's words: the carbonyl
// carbon and the positions α, β, γ, δ … from an acceptor along conjugated bonds, the
// carbons of an enamine or enol ether, the ends of a diene, of an alkene or alkyne.
func (n *Namer) chain(a int) string {
	m := n.m
	if m.Atoms[a].Element != 6 {
		return ""
	}
	if kind := acceptorKind(m, a); kind != "" {
		return kind
	}
	if !unsaturated(m, a) {
		return ""
	}
	if name := n.fromAcceptor(a); name != "" {
		return name
	}
	if name := n.fromDonor(a); name != "" {
		return name
	}
	return n.alkene(a)
}

func unsaturated(m *molecule.Molecule, a int) bool {
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Order > 1 {
			return true
		}
	}
	return m.Atoms[a].Charge != 0 || m.Atoms[a].Unpaired != 0
}

// acceptorKind names a carbon that is itself the electrophilic end of C=O, C=N, C≡N.
func acceptorKind(m *molecule.Molecule, a int) string {
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Order == 3 && m.Atoms[h.Atom].Element == 7 {
			return "nitrile carbon"
		}
	}
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Order != 2 || m.Bonds[h.Bond].Aromatic {
			continue
		}
		switch m.Atoms[h.Atom].Element {
		case 8:
			return "carbonyl carbon of the " + carbonylKind(m, a)
		case 16:
			return "thiocarbonyl carbon"
		case 7:
			if m.Atoms[h.Atom].Charge > 0 {
				return "iminium carbon"
			}
			return "imine carbon"
		}
	}
	return ""
}

func carbonylKind(m *molecule.Molecule, a int) string {
	_, single := around(m, -1, a)
	double := 0
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Order == 2 {
			double++
		}
	}
	oxygens, nitrogens := count(m, single, 8), count(m, single, 7)
	halogens := count(m, single, 9) + count(m, single, 17) + count(m, single, 35) + count(m, single, 53)
	switch {
	case double == 2:
		return "ketene"
	case halogens > 0:
		return "acid halide"
	case nitrogens == 2:
		return "urea"
	case nitrogens == 1 && oxygens == 1:
		return "carbamate"
	case nitrogens == 1:
		return "amide"
	case oxygens == 2:
		return "carbonate"
	case oxygens == 1:
		for _, s := range single {
			if m.Atoms[s].Element == 8 {
				switch {
				case m.Atoms[s].Hydrogens > 0:
					return "acid"
				case m.Atoms[s].Charge < 0:
					return "carboxylate"
				}
				for _, h := range m.Neighbours(s) {
					if h.Atom != a && acyl(m, h.Atom) {
						return "anhydride"
					}
				}
			}
		}
		return "ester"
	case m.Atoms[a].Hydrogens > 0:
		if n := vinylic(m, a); n {
			return "enal"
		}
		return "aldehyde"
	}
	if vinylic(m, a) {
		return "enone"
	}
	return "ketone"
}

// vinylic tells whether a single bond leads from a carbon to a non-aromatic C=C or C≡C.
func vinylic(m *molecule.Molecule, a int) bool {
	for _, h := range m.Neighbours(a) {
		if m.Atoms[h.Atom].Element != 6 || m.Bonds[h.Bond].Order != 1 {
			continue
		}
		for _, g := range m.Neighbours(h.Atom) {
			if b := m.Bonds[g.Bond]; b.Order >= 2 && !b.Aromatic && m.Atoms[g.Atom].Element == 6 {
				return true
			}
		}
	}
	return false
}

// greek are the positions counted from an acceptor.
var greek = []string{"", "α", "β", "γ", "δ", "ε", "ζ"}

// fromAcceptor counts the conjugated carbons from the nearest acceptor group.
func (n *Namer) fromAcceptor(a int) string {
	m := n.m
	seen := map[int]int{a: 1}
	for queue := []int{a}; len(queue) > 0; queue = queue[1:] {
		x := queue[0]
		if seen[x] >= len(greek) {
			break
		}
		for _, h := range m.Neighbours(x) {
			if _, ok := seen[h.Atom]; ok || m.Bonds[h.Bond].Aromatic {
				continue
			}
			if kind := acceptorWord(m, h.Atom); kind != "" {
				return fmt.Sprintf("%s-carbon of the %s", greek[seen[x]], kind)
			}
			if m.Atoms[h.Atom].Element == 6 && unsaturated(m, h.Atom) && !m.Atoms[h.Atom].Aromatic {
				seen[h.Atom] = seen[x] + 1
				queue = append(queue, h.Atom)
			}
		}
	}
	return ""
}

// acceptorWord names the compound an acceptor atom makes of the C=C beside it.
func acceptorWord(m *molecule.Molecule, a int) string {
	x := m.Atoms[a]
	switch x.Element {
	case 6:
		switch kind := acceptorKind(m, a); kind {
		case "":
			return ""
		case "nitrile carbon":
			return "α,β-unsaturated nitrile"
		case "imine carbon", "iminium carbon":
			return "α,β-unsaturated " + kind[:len(kind)-len(" carbon")]
		case "thiocarbonyl carbon":
			return "α,β-unsaturated thiocarbonyl"
		default:
			switch k := carbonylKind(m, a); k {
			case "enone", "enal":
				return k
			case "ketone":
				return "enone"
			case "aldehyde":
				return "enal"
			default:
				return "α,β-unsaturated " + k
			}
		}
	case 7:
		oxygens := 0
		for _, h := range m.Neighbours(a) {
			if m.Atoms[h.Atom].Element == 8 {
				oxygens++
			}
		}
		if oxygens == 2 {
			return "nitroalkene"
		}
	case 16:
		oxo := 0
		for _, h := range m.Neighbours(a) {
			if m.Atoms[h.Atom].Element == 8 && m.Bonds[h.Bond].Order == 2 {
				oxo++
			}
		}
		if oxo == 2 {
			return "vinyl sulfone"
		}
		if oxo == 1 {
			return "vinyl sulfoxide"
		}
	}
	return ""
}

// fromDonor names the carbons of enamines, enol ethers and their kin.
func (n *Namer) fromDonor(a int) string {
	m := n.m
	if w := donorOn(m, a); w != "" {
		return "α-carbon of the " + w
	}
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Order == 2 && m.Atoms[h.Atom].Element == 6 {
			if w := donorOn(m, h.Atom); w != "" {
				return "β-carbon of the " + w
			}
		}
	}
	return ""
}

func donorOn(m *molecule.Molecule, a int) string {
	for _, h := range m.Neighbours(a) {
		x := m.Atoms[h.Atom]
		if m.Bonds[h.Bond].Order != 1 || x.Charge > 0 || x.Aromatic {
			continue
		}
		switch x.Element {
		case 7:
			for _, g := range m.Neighbours(h.Atom) {
				if acyl(m, g.Atom) {
					return "enamide"
				}
			}
			return "enamine"
		case 8:
			for _, g := range m.Neighbours(h.Atom) {
				switch {
				case g.Atom != a && acyl(m, g.Atom):
					return "enol ester"
				case m.Atoms[g.Atom].Element == 14:
					return "silyl enol ether"
				}
			}
			if x.Charge < 0 {
				return "enolate"
			}
			if x.Hydrogens > 0 {
				return "enol"
			}
			return "enol ether"
		case 16:
			return "vinyl sulfide"
		}
	}
	return ""
}

// alkene names a carbon of a plain C=C or C≡C.
func (n *Namer) alkene(a int) string {
	m := n.m
	kind, other, partners := "", -1, 0
	for _, h := range m.Neighbours(a) {
		if b := m.Bonds[h.Bond]; b.Order >= 2 && m.Atoms[h.Atom].Element == 6 && !b.Aromatic {
			partners++
			other = h.Atom
			kind = "alkene"
			if b.Order == 3 {
				kind = "alkyne"
			}
		}
	}
	if partners == 2 {
		return "central carbon of the allene"
	}
	if kind == "" {
		return ""
	}
	for _, h := range m.Neighbours(a) {
		if m.Atoms[h.Atom].Aromatic && h.Atom != other {
			return fmt.Sprintf("α-carbon of the styrene-type %s", kind)
		}
	}
	for _, h := range m.Neighbours(other) {
		if m.Atoms[h.Atom].Aromatic && h.Atom != a {
			return fmt.Sprintf("β-carbon of the styrene-type %s", kind)
		}
	}
	inner, outer := vinylic(m, a), vinylic(m, other)
	switch {
	case inner && !outer:
		return "inner carbon of the diene"
	case outer && !inner:
		return "outer carbon of the diene"
	}
	if kind == "alkene" {
		if ion := allylic(m, other); ion != "" {
			return "end of the allyl " + ion
		}
		if ion := allylic(m, a); ion != "" {
			return "central carbon of the allyl " + ion
		}
	}
	hs, ho := m.Atoms[a].Hydrogens, m.Atoms[other].Hydrogens
	switch {
	case hs > ho:
		return "less substituted carbon of the " + kind
	case hs < ho:
		return "more substituted carbon of the " + kind
	}
	return kind + " carbon"
}

// allylic says what a carbon of a C=C makes an allyl system with, where a single bond
// leads from it to a saturated carbon with a charge or an odd electron: "cation",
// "anion" or "radical"; empty where none does.
func allylic(m *molecule.Molecule, a int) string {
	for _, h := range m.Neighbours(a) {
		x := &m.Atoms[h.Atom]
		if multiple, _ := around(m, a, h.Atom); len(multiple) > 0 || m.Bonds[h.Bond].Order != 1 || x.Element != 6 || x.Aromatic {
			continue
		}
		switch {
		case x.Unpaired == 1 && x.Charge == 0:
			return "radical"
		case x.Charge > 0 && x.Unpaired == 0:
			return "cation"
		case x.Charge < 0 && x.Unpaired == 0:
			return "anion"
		}
	}
	return ""
}
