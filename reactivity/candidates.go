package reactivity

import (
	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"slices"
)

// Candidate is a set of equivalent atoms that an event may hit.
type Candidate struct {
	Atoms []int // atom indices, ascending
	// Ipso marks a substituted carbon, ranked apart from the C–H positions.
	Ipso bool
	// Leaving is the leaving group of a nucleophilic substitution ("Cl", "SO2R", …).
	Leaving string
}

// candidates lists the sites that an event may hit in one molecule: sets of equivalent
// atoms, by lowest atom, substituted carbons of an electrophilic substitution last.
// Sites are atoms that hold a centre of pi.
//
//   - electrophilic substitution: aromatic C–H; where no ring offers one, the C–H β to
//     the donor of enamines and enol ethers; substituted aromatic carbons as ipso;
//   - radical substitution: aromatic C–H;
//   - electrophilic and radical addition: carbons of non-aromatic C=C;
//   - nucleophilic substitution: aromatic or vinylic carbons with a leaving group;
//   - nucleophilic addition: carbons of C=O, C=N, C≡N, β and δ carbons of acceptors,
//     C–H of azines and azinium ions, ring carbons of pyrylium ions, carbons that share
//     the charge of a carbocation.
func candidates(v *view, pi *frontier.Pi, event terms.Event) []Candidate {
	m := v.m
	var pick func(i int) bool
	switch event {
	case terms.ElectrophilicSubstitution:
		pick = func(i int) bool { return v.aromaticCH(i) }
		any := false
		for i := range m.Atoms {
			any = any || pick(i) && centreOf(pi, i) >= 0
		}
		if !any {
			pick = func(i int) bool { return v.donorAlkeneCH(i) }
		}
	case terms.RadicalSubstitution:
		pick = func(i int) bool { return v.aromaticCH(i) }
	case terms.ElectrophilicAddition, terms.RadicalAddition:
		pick = func(i int) bool { return v.alkeneCarbon(i) }
	case terms.NucleophilicSubstitution:
		return leavingCandidates(v, pi)
	case terms.NucleophilicAddition:
		cation := make(map[int]bool)
		for _, s := range chargeShifts(m, 1) {
			cation[s.atom] = true
		}
		pick = func(i int) bool { return cation[i] || v.acceptorCarbon(i) }
	default:
		return nil
	}
	list := v.grouped(pi, pick)
	if event == terms.ElectrophilicSubstitution {
		ipso := v.grouped(pi, func(i int) bool { return v.substitutedAromatic(i) })
		for k := range ipso {
			ipso[k].Ipso = true
		}
		list = append(list, ipso...)
	}
	return list
}

// grouped collects the chosen atoms that hold a centre into sets of equivalent atoms.
func (v *view) grouped(pi *frontier.Pi, pick func(i int) bool) []Candidate {
	var list []Candidate
	var at map[int]int
	for i := range v.m.Atoms {
		if !pick(i) || centreOf(pi, i) < 0 {
			continue
		}
		c := v.class[i]
		if at == nil {
			at = make(map[int]int, 8)
		}
		k, ok := at[c]
		if !ok {
			k = len(list)
			at[c] = k
			list = append(list, Candidate{})
		}
		list[k].Atoms = append(list[k].Atoms, i)
	}
	return list
}

// leavingCandidates are the carbons with a leaving group. Halogen, sulfonate, sulfonium,
// ammonium and diazonium count on every aromatic and vinylic carbon. Sulfinyl, sulfonyl
// and nitro groups leave as well, but beside a halogen they are acceptors first: they
// count only in a molecule without one.
func leavingCandidates(v *view, pi *frontier.Pi) []Candidate {
	m := v.m
	halogen := false
	for i := range m.Atoms {
		if v.unsaturatedCarbon(i) && v.halogenOn(i) >= 0 && centreOf(pi, i) >= 0 {
			halogen = true
		}
	}
	leaving := make([]string, len(m.Atoms))
	for i := range m.Atoms {
		if !v.unsaturatedCarbon(i) {
			continue
		}
		a := leavingAtom(m, i)
		if a < 0 {
			continue
		}
		if name, firm := v.leavingName(a); firm || !halogen {
			leaving[i] = name
		}
	}
	list := v.grouped(pi, func(i int) bool { return leaving[i] != "" })
	for k := range list {
		list[k].Leaving = leaving[list[k].Atoms[0]]
	}
	return list
}

// leavingName names the leaving group bound through atom a; firm is false for a group
// that is an acceptor as often as it leaves.
func (v *view) leavingName(a int) (name string, firm bool) {
	m := v.m
	switch z := m.Atoms[a].Element; z {
	case 9, 17, 35, 53:
		return molecule.Symbol(z), true
	case 16:
		if m.Atoms[a].Charge > 0 && v.oxygens(a) == 0 {
			return "SR2+", true
		}
		if v.oxygens(a) >= 2 {
			return "SO2R", false
		}
		return "SOR", false
	case 8:
		return "OSO2R", true
	case 7:
		switch {
		case v.oxygens(a) == 2:
			return "NO2", false
		case m.Degree(a) == 2:
			return "N2+", true
		}
		return "NR3+", true
	}
	return "", false
}

// beside tells whether a ring nitrogen of the azine type stands ortho or para to i.
func (v *view) beside(i int) bool {
	m := v.m
	for _, r := range m.RingsOf(i) {
		ring := m.Rings()[r]
		n := len(ring)
		at := slices.Index(ring, i)
		for _, d := range []int{1, n - 1, 3} {
			if d == 3 && n != 6 {
				continue
			}
			if x := ring[(at+d)%n]; m.Atoms[x].Element == 7 && v.azaNitrogen(x) {
				return true
			}
		}
	}
	return false
}

// centreOf is the centre an atom holds: its conjugated one, or else that of a local π
// bond; -1 for none.
func centreOf(pi *frontier.Pi, atom int) int {
	if c := pi.CentreOf[atom]; c >= 0 {
		return c
	}
	for k, system := range pi.Systems {
		if !pi.Local[k] {
			continue
		}
		for _, c := range system {
			if pi.Centres[c].Atom == atom && !pi.Centres[c].Alkyl {
				return c
			}
		}
	}
	return -1
}

// mergeClasses makes the classes of a molecule with a fast tautomer in which the same
// constitution is found with other atoms: atoms that correspond fall together.
func mergeClasses(class []int, a, b *molecule.Molecule) {
	orderA, orderB := a.CanonicalOrder(), b.CanonicalOrder()
	at := make([]int, len(orderB))
	for i, r := range orderB {
		at[r] = i
	}
	for i, r := range orderA {
		x, y := class[i], class[at[r]]
		if x == y {
			continue
		}
		if y < x {
			x, y = y, x
		}
		for k := range class {
			if class[k] == y {
				class[k] = x
			}
		}
	}
}
