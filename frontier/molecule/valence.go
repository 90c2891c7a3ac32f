package molecule

import "fmt"

// valences returns the ordinary valence (bond orders and hydrogens together) of a
// nonmetal with a formal charge, and how far it can be raised in steps of two; ok is
// false for metals and the wildcard, whose valence is not judged.
//
// The ordinary valence is that of the isoelectronic neutral atom: with e valence
// electrons left, e up to four and 8 − e beyond. Raised valences are those of the
// OpenSMILES list (N 5, P 5, S 6) and of common inorganic chemistry: halogens but
// fluorine to 7, the sulfur and phosphorus groups to 6 and 5 (their anions to 6),
// silicon anions to 6, xenon to 8.
func valences(z, charge int) (ordinary, most int, ok bool) {
	e := mainGroupElectrons(z)
	if e < 0 {
		return 0, 0, false
	}
	if z == 1 {
		if charge == 0 {
			return 1, 1, true
		}
		return 0, 0, true
	}
	e -= charge
	switch {
	case e < 0:
		ordinary = 0
	case e <= 4:
		ordinary = e
	case e <= 8:
		ordinary = 8 - e
	default:
		ordinary = 0
	}
	most = ordinary
	raise := 0
	switch z {
	case 7:
		if charge == 0 {
			return 3, 5, true
		}
	case 15, 33, 51:
		raise = 5 - charge // P 5, P⁺ 4, P⁻ 6
	case 16, 34, 52:
		raise = 6 - abs(charge)
		if charge < 0 {
			raise = 6 + charge
		}
	case 17, 35, 53, 85:
		raise = 7 - abs(charge)
	case 14, 32:
		if charge < 0 {
			raise = 4 - charge
		}
	case 36, 54, 86:
		raise = 8
	}
	for most+2 <= raise {
		most += 2
	}
	return ordinary, most, true
}

func abs(x int) int {
	if x < 0 {
		return -x
	}
	return x
}

// nextValence is the smallest allowed valence of the element that is not below sum,
// or -1 when sum exceeds them all.
func nextValence(z, charge, sum int) int {
	v, most, ok := valences(z, charge)
	if !ok {
		return sum
	}
	for ; v <= most; v += 2 {
		if v >= sum {
			return v
		}
	}
	return -1
}

// implicitHydrogens is the number of hydrogens that an atom of the organic subset
// (B C N O P S F Cl Br I, no charge, no bracket) takes on beside bonds of total order
// sum: what is missing to the next of its valences. Nitrogen is not raised above 3
// and a halogen not above 1 by hydrogens. The result is negative when the bonds
// cannot be the whole story: such an atom is refused.
func implicitHydrogens(z, sum int) int {
	v := nextValence(z, 0, sum)
	if v < 0 {
		return -1
	}
	h := v - sum
	switch z {
	case 7:
		if sum > 3 && h > 0 {
			return -1
		}
	case 9, 17, 35, 53, 85:
		if sum > 1 && h > 0 {
			return -1
		}
	}
	return h
}

// checkValence refuses an atom with more bonds than its element and charge allow,
// and counts its unpaired electrons: what is missing to the next allowed valence.
func (m *Molecule) checkValence(i int) error {
	a := &m.Atoms[i]
	sum := m.Valence(i)
	v := nextValence(a.Element, a.Charge, sum)
	if v < 0 {
		_, most, _ := valences(a.Element, a.Charge)
		return m.refuseAtom(i, tooMany(describeAtom(a), sum, most),
			"check for a surplus bond, a surplus hydrogen or a missing charge")
	}
	if a.Element == 7 && a.Charge == 0 && sum == 5 && a.Hydrogens+len(m.adjacency[i]) > 4 {
		return m.refuseAtom(i, "nitrogen has 5 single bonds, at most 4 are possible", "write an ammonium nitrogen as [N+]")
	}
	a.Unpaired = 0
	if _, _, ok := valences(a.Element, a.Charge); ok {
		a.Unpaired = v - sum
	}
	return nil
}

// tooMany says that an atom has too many bonds.
func tooMany(name string, bonds, most int) string {
	switch most {
	case 0:
		return fmt.Sprintf("%s has %s, none is possible", name, count(bonds, "bond"))
	case 1:
		return fmt.Sprintf("%s has %d bonds, at most one is possible", name, bonds)
	}
	return fmt.Sprintf("%s has %d bonds, at most %d are possible", name, bonds, most)
}

// describeAtom names an atom in a refusal: "carbon", "nitrogen (charge +1)".
func describeAtom(a *Atom) string {
	s := elementName(a.Element)
	if a.Charge != 0 {
		s += fmt.Sprintf(" (charge %+d)", a.Charge)
	}
	return s
}

// refuseAtom is a refusal placed at atom i: at its offset in the source where that is
// known, else by its number.
func (m *Molecule) refuseAtom(i int, reason, remedy string) *Error {
	if off := m.Atoms[i].Offset; off >= 0 && off < len(m.Source) {
		return refuse(m.Source, off, reason, remedy)
	}
	return &Error{Text: m.Source, Reason: fmt.Sprintf("atom %d: %s", m.Atoms[i].Number, reason), Remedy: remedy}
}
