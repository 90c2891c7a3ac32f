package reactivity

import (
	"fmt"
	"slices"

	"lobecast/frontier/molecule"
)

// relation names where the substituents of the two components end up in the new ring.
//
// For a six-ring: "ortho" (1,2-), "meta" (1,3-) and "para" (1,4-) between the
// weightiest substituent at an end of the diene, and at its middle, and that of the
// partner; with a heteroatom at one end "2-" or "3-", counted from it. For a five-ring:
// the locants of the heterocycle. Empty where either
// component has no substituent that tells its ends apart.
func relation(m [2]*molecule.Molecule, four *End, left, right int) string {
	sub := partnerSubstituted(m[1], left, right)
	if sub < 0 {
		return ""
	}
	atFirst := sub == left // the substituted partner atom is bound to four.First()
	if four.Role == RoleDipole {
		return dipoleRelation(m[0], four, atFirst)
	}
	if first, last := m[0].Atoms[four.First()].Element, m[0].Atoms[four.Last()].Element; first != last {
		// one end is a heteroatom, position 1 of the new ring: the partner atom bound to
		// it is C-2
		if (first != 6) == atFirst && (first == 6 || last == 6) {
			return "2-"
		} else if first == 6 || last == 6 {
			return "3-"
		}
	}
	weight := [4]int{}
	for k := range four.Atoms {
		weight[k] = pathWeight(m[0], four, k)
	}
	outer, inner := weight[0]-weight[3], weight[1]-weight[2]
	words := ""
	add := func(k int, word, locants string) {
		if outer != 0 && inner != 0 {
			words = joinWords(words, fmt.Sprintf("%s to atom %d", word, m[0].Atoms[four.Atoms[k]].Number))
			return
		}
		words = word + " " + locants
	}
	if outer != 0 {
		k := 0
		if outer < 0 {
			k = 3
		}
		if (k == 0) == atFirst {
			add(k, `"ortho"`, "(1,2-)")
		} else {
			add(k, `"meta"`, "(1,3-)")
		}
	}
	if inner != 0 {
		k := 1
		if inner < 0 {
			k = 2
		}
		if (k == 1) == atFirst {
			add(k, `"meta"`, "(1,3-)")
		} else {
			add(k, `"para"`, "(1,4-)")
		}
	}
	return words
}

// partnerSubstituted is the more heavily substituted atom of a partner, -1 where the
// two are alike. A heteroatom of the bond counts as the other end's own: in a C=O the
// carbon carries the substituent.
func partnerSubstituted(m *molecule.Molecule, left, right int) int {
	weigh := func(i, from int) (best, sum int) {
		for _, h := range m.Neighbours(i) {
			if h.Atom == from {
				continue
			}
			w := substituentWeight(m, h.Atom, i)
			sum += w
			best = max(best, w)
		}
		return
	}
	bl, sl := weigh(left, right)
	br, sr := weigh(right, left)
	switch {
	case bl > br || bl == br && sl > sr:
		return left
	case br > bl || sr > sl:
		return right
	}
	return -1
}

// pathWeight ranks the substituent at one atom of a diene; ring atoms that only close
// a cyclic diene count as none.
func pathWeight(m *molecule.Molecule, four *End, k int) int {
	best := 0
	i := four.Atoms[k]
	for _, h := range m.Neighbours(i) {
		if slices.Contains(four.Atoms, h.Atom) || closesRing(m, four, i, h.Atom) {
			continue
		}
		w := substituentWeight(m, h.Atom, i)
		if m.Atoms[h.Atom].Element == 7 || m.Atoms[h.Atom].Element == 8 || m.Atoms[h.Atom].Element == 16 {
			w = 5 // a donor directs before all else
		}
		best = max(best, w)
	}
	return best
}

// closesRing says whether next, bound to atom i of the path, is a member of a small
// ring that holds the whole path.
func closesRing(m *molecule.Molecule, four *End, i, next int) bool {
	for _, ring := range m.Rings() {
		if len(ring) > largestLockingRing || !slices.Contains(ring, next) || !slices.Contains(ring, i) {
			continue
		}
		all := true
		for _, a := range four.Atoms {
			all = all && slices.Contains(ring, a)
		}
		if all {
			return true
		}
	}
	return false
}

// dipoleRelation gives the locants of the substituents of a five-membered adduct.
func dipoleRelation(m *molecule.Molecule, four *End, atFirst bool) string {
	x := four.First()
	bare := m.Degree(x) == 1
	pick := func(first, last string) string {
		if atFirst {
			return first
		}
		return last
	}
	switch four.Kind {
	case "azide": // triazole: N-1 carries the substituent of the azide
		return pick("1,5-", "1,4-")
	case "nitrile oxide", "nitrone", "nitrile imine", "azomethine imine": // O-1 or N-1, N-2, C-3
		if bare {
			return pick("4-", "5-")
		}
		return pick("3,4-", "3,5-")
	case "diazo": // 1-pyrazoline N-1=N-2; the carbon beside nitrogen is C-3
		if bare {
			return pick("4-", "3-")
		}
		return pick("3,4-", "3,5-")
	}
	z := four.Last()
	if m.Degree(x) == m.Degree(z) && m.Atoms[x].Element == m.Atoms[z].Element {
		return ""
	}
	if m.Degree(x) < m.Degree(z) {
		atFirst = !atFirst
	}
	return pick("1,2-", "1,3-")
}

// tether is the shortest chain between the two reacting paths of one molecule: the
// atom of the diene or dipole and that of the partner it joins, and its length in
// atoms.
func tether(m *molecule.Molecule, four, partner *End) (x, y, length int) {
	// Breadth first from the whole path: atoms of a layer stand in the order of the atom
	// of the path that they are nearest to.
	const unseen = -1
	source, far := make([]int, len(m.Atoms)), make([]int, len(m.Atoms))
	for i := range source {
		source[i] = unseen
	}
	queue := make([]int, 0, len(m.Atoms))
	for k, i := range four.Atoms {
		if source[i] == unseen {
			source[i] = k
			queue = append(queue, i)
		}
	}
	for head := 0; head < len(queue); head++ {
		i := queue[head]
		for _, h := range m.Neighbours(i) {
			if source[h.Atom] == unseen {
				source[h.Atom], far[h.Atom] = source[i], far[i]+1
				queue = append(queue, h.Atom)
			}
		}
	}
	length = -1
	best := 0
	for _, j := range partner.Atoms {
		s := source[j]
		if s == unseen {
			continue
		}
		if d := far[j] - 1; length < 0 || d < length || d == length && s < best {
			x, y, length, best = four.Atoms[s], j, d, s
		}
	}
	return x, y, length
}

// tetherRelation says how an intramolecular adduct is built: fused when the tether
// joins atoms of the new ring that are bound to each other, bridged otherwise.
func tetherRelation(m *molecule.Molecule, four, partner *End, bonds [2][2]int) string {
	x, y, length := tether(m, four, partner)
	if length < 0 {
		return ""
	}
	for _, b := range bonds {
		if b == [2]int{x, y} {
			return "fused"
		}
	}
	return "bridged"
}

// shortestBridge is the shortest tether, in atoms, that is taken to reach across for a
// bridged adduct where a fused one could form as well (common practice (no source):
// trienes with three to five tether atoms at the end of the diene give fused rings).
const shortestBridge = 6

// markStrained marks the bridged adducts of a short tether between an end of the diene
// or dipole and the partner, where the other orientation is fused.
func markStrained(m *molecule.Molecule, c *Combination, list []Adduct) {
	x, _, length := tether(m, &c.A, &c.B)
	if length < 0 || length >= shortestBridge || x != c.A.First() && x != c.A.Last() || len(list) < 2 {
		return
	}
	for k := range list {
		if tetherRelation(m, &c.A, &c.B, list[k].Bonds) == "bridged" {
			list[k].Strained = fmt.Sprintf("a tether of %d atoms is too short for the bridged adduct", length)
		}
	}
}

// view turns a joining and an adduct so that the diene or dipole comes first: its
// molecule and the partner's, the two ends, and the partner atoms bound to the first
// and the last atom of the diene or dipole.
func (p *PairJudgement) view(j *Joining, ad *Adduct) (m [2]*molecule.Molecule, four, partner *reacting, left, right int) {
	mb := p.B
	if mb == nil {
		mb = p.A
	}
	bonds := ad.Bonds
	if j.A.Role == RolePartner {
		m = [2]*molecule.Molecule{mb, p.A}
		four, partner = &j.b, &j.a
		for k := range bonds {
			bonds[k][0], bonds[k][1] = bonds[k][1], bonds[k][0]
		}
	} else {
		m = [2]*molecule.Molecule{p.A, mb}
		four, partner = &j.a, &j.b
	}
	if bonds[0][0] != four.end.First() {
		bonds[0], bonds[1] = bonds[1], bonds[0]
	}
	return m, four, partner, bonds[0][1], bonds[1][1]
}

func (p *PairJudgement) explainAll() {
	for k := range p.Adducts {
		p.explain(&p.Adducts[k])
	}
}

// explain fills in the words of an adduct: the relation, the secondary overlap and
// what decided.
func (p *PairJudgement) explain(ad *Adduct) {
	j := p.JoiningOf(ad)
	m, four, partner, left, right := p.view(j, ad)
	if p.B == nil {
		ad.Relation = tetherRelation(p.A, four.end, partner.end, ad.Bonds)
	} else {
		ad.Relation = relation(m, four.end, left, right)
	}
	ad.Secondary = secondaryOverlap(j, m, four, partner, left, right)
	ad.Because = p.because(j, ad)
	if ad.chanceReason != "" {
		ad.Because += "; " + ad.chanceReason
	}
}

// because says in words and numbers what decided between the two orientations.
func (p *PairJudgement) because(j *Joining, ad *Adduct) string {
	mb := p.B
	if mb == nil {
		mb = p.A
	}
	bond := func(x *Adduct) string {
		b := x.Bonds[x.First]
		first, second := "", ""
		if p.B != nil {
			first, second = " of the first", " of the second"
		}
		return fmt.Sprintf("%s%d%s with %s%d%s", molecule.Symbol(p.A.Atoms[b[0]].Element), p.A.Atoms[b[0]].Number, first,
			molecule.Symbol(mb.Atoms[b[1]].Element), mb.Atoms[b[1]].Number, second)
	}
	var rival *Adduct
	for _, x := range p.AdductsOf(j) {
		if x != ad && (rival == nil || x.Rank < rival.Rank) {
			rival = x
		}
	}
	if rival == nil {
		return fmt.Sprintf("both ways round give the same adduct; first bond %s, ΔE %.4f |β|", bond(ad), ad.DeltaE)
	}
	s := fmt.Sprintf("first bond %s, ΔE %.4f |β|, against %.4f for %s", bond(ad), ad.DeltaE, rival.DeltaE, bond(rival))
	main := func(x *Adduct) float64 {
		if j.Demand == InverseDemand {
			return x.Inverse
		}
		if j.Demand == NormalDemand {
			return x.Normal
		}
		return x.Normal + x.Inverse
	}
	if ad.Strained != "" {
		return s + "; " + ad.Strained
	}
	if rival.Strained != "" {
		return s + "; for the other " + rival.Strained
	}
	d := ad.DeltaE - rival.DeltaE
	f := main(ad) - main(rival)
	switch {
	case d > -1e-9 && d < 1e-9:
		s += "; ΔE does not decide"
	case f > -1e-9 && f < 1e-9:
		s += "; the frontier orbitals do not decide"
	case (d < 0) == (f > 0):
		s += fmt.Sprintf("; the frontier orbitals agree (%.4f against %.4f |β|)", main(ad), main(rival))
	default:
		s += fmt.Sprintf("; the frontier orbitals say the opposite (%.4f against %.4f |β|)", main(ad), main(rival))
	}
	return s
}

// configurationWords lists the configurations of the diastereomers of an adduct.
func configurationWords(list []AdductProduct) string {
	s := ""
	for _, q := range list {
		if q.Configuration == "" {
			continue
		}
		if s != "" {
			s += "; "
		}
		s += q.Configuration
	}
	for _, q := range list {
		if q.Racemic {
			return joinSemicolon(s, "racemic, one enantiomer is written")
		}
	}
	return s
}

func joinSemicolon(a, b string) string {
	if a == "" {
		return b
	}
	return a + "; " + b
}
