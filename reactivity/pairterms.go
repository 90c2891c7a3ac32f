package reactivity

import "lobecast/frontier/molecule"

// Ends of a Diels–Alder pair as the terms of its orientation see them.
type endKind int

const (
	endGroups   endKind = iota // groups on the end
	endSize                    // their size: 1 for each, and ½ for each further branch
	endRing                    // groups that close a ring with it
	endAcceptor                // acceptor groups
	endDonor                   // N or O groups
	endAlkyl
	endAryl // aryl, alkenyl, alkynyl
	innerGroups
	innerDonor
	innerAlkyl
	innerAryl
	endKinds
)

// endFacts counts the kinds at one end.
type endFacts [endKinds]float64

// endOf describes end i of a chain whose next atom is inner; far is the atom after it,
// or -1 where inner is the other end.
func (v *view) endOf(i, inner, far int) endFacts {
	var f endFacts
	m := v.m
	for _, h := range m.Neighbours(i) {
		x := h.Atom
		if x == inner {
			continue
		}
		f[endGroups]++
		branches := m.Degree(x) - 1
		f[endSize] += 1 + 0.5*float64(max(0, branches-1))
		if m.BondInRing(h.Bond) {
			f[endRing]++
		}
		switch v.groupFamily(i, x) {
		case familyAcceptor:
			f[endAcceptor]++
		case familyDonor:
			f[endDonor]++
		case familyAryl:
			f[endAryl]++
		case familyAlkyl:
			f[endAlkyl]++
		}
	}
	if far < 0 {
		return f
	}
	for _, h := range m.Neighbours(inner) {
		x := h.Atom
		if x == i || x == far {
			continue
		}
		f[innerGroups]++
		switch v.groupFamily(inner, x) {
		case familyDonor:
			f[innerDonor]++
		case familyAryl:
			f[innerAryl]++
		case familyAlkyl:
			f[innerAlkyl]++
		}
	}
	return f
}

type groupFamily uint8

const (
	familyOther groupFamily = iota
	familyAcceptor
	familyDonor
	familyAryl
	familyAlkyl
)

// groupFamily sorts a group x on chain atom a.
func (v *view) groupFamily(a, x int) groupFamily {
	switch v.m.Atoms[x].Element {
	case 7:
		if v.kindOf(a, x) == subNitro {
			return familyAcceptor
		}
		return familyDonor
	case 8:
		return familyDonor
	case 16, 34:
		if v.hypervalent(x) {
			return familyAcceptor
		}
		return familyOther
	case 6:
		switch v.kindOf(a, x) {
		case subAcyl, subEster, subCarboxamide, subCyano, subImidoyl, subCX3:
			return familyAcceptor
		case subAryl, subVinyl:
			return familyAryl
		}
		return familyAlkyl
	}
	return familyOther
}

// pairTerm is a product of a fact of a diene end and one of the partner's end. In an
// orientation it counts over both new bonds; as a term of the first bond it counts at
// that bond only. A negative kind stands for one.
type pairTerm struct {
	term
	diene, partner endKind
	first          bool
}

const one endKind = -1

var pairTerms = []pairTerm{
	{term{"crowding, groups", "groups meet at one new bond", 0.5}, endGroups, endGroups, false},
	{term{"crowding, size", "large groups meet at one new bond", 0.5}, endSize, endSize, false},
	{term{"diene end group beside acceptor", "the substituted diene end beside the acceptor", 0.5}, endGroups, endAcceptor, false},
	{term{"inner diene group para to acceptor", "the end next to the inner group beside the acceptor", 0.5}, innerGroups, endAcceptor, false},
	{term{"ring diene end beside acceptor", "the ring end of the diene beside the acceptor", 0.5}, endRing, endAcceptor, false},
	{term{"ring diene end, crowding", "the ring end of the diene at the substituted end", 0.5}, endRing, endGroups, false},
	{term{"donor on diene end beside acceptor", "the donor end of the diene beside the acceptor", 0.5}, endDonor, endAcceptor, false},
	{term{"acceptor on diene end beside acceptor", "two acceptors side by side", 0.5}, endAcceptor, endAcceptor, false},
	{term{"aryl on the diene end beside acceptor", "the aryl end of the diene beside the acceptor", 0.5}, endAryl, endAcceptor, false},
	{term{"alkyl on the diene end beside acceptor", "the alkyl end of the diene beside the acceptor", 0.5}, endAlkyl, endAcceptor, false},
	{term{"inner alkyl beside acceptor", "the end next to the inner alkyl group beside the acceptor", 0.5}, innerAlkyl, endAcceptor, false},
	{term{"inner aryl beside acceptor", "the end next to the inner aryl group beside the acceptor", 0.5}, innerAryl, endAcceptor, false},
	{term{"inner donor beside acceptor", "the end next to the inner donor beside the acceptor", 0.5}, innerDonor, endAcceptor, false},
	{term{"alkyl diene end, crowding", "the alkyl end of the diene at the substituted end", 0.5}, endAlkyl, endGroups, false},
	{term{"aryl diene end, crowding", "the aryl end of the diene at the substituted end", 0.5}, endAryl, endGroups, false},
	{term{"inner alkyl, crowding", "the end next to the inner alkyl group at the substituted end", 0.5}, innerAlkyl, endGroups, false},
	{term{"inner donor, crowding", "the end next to the inner donor at the substituted end", 0.5}, innerDonor, endGroups, false},
	{term{"inner aryl, crowding", "the end next to the inner aryl group at the substituted end", 0.5}, innerAryl, endGroups, false},
	{term{"first bond: groups on the diene end", "groups on the diene end that bonds first", 0.5}, endGroups, one, true},
	{term{"first bond: groups on the partner's end", "groups on the partner's end that bonds first", 0.5}, one, endGroups, true},
	{term{"first bond: size at the diene end", "size of the groups on the diene end that bonds first", 0.5}, endSize, one, true},
	{term{"first bond: size at the partner's end", "size of the groups on the partner's end that bonds first", 0.5}, one, endSize, true},
	{term{"first bond: ring at the diene end", "a ring at the diene end that bonds first", 0.5}, endRing, one, true},
	{term{"first bond: acceptor on the partner's end", "an acceptor on the end that bonds first", 0.5}, one, endAcceptor, true},
	{term{"first bond: donor on the diene end", "a donor on the diene end that bonds first", 0.5}, endDonor, one, true},
}

func (t *pairTerm) value(a, b *endFacts) float64 {
	x := 1.0
	if t.diene >= 0 {
		x *= a[t.diene]
	}
	if t.partner >= 0 {
		x *= b[t.partner]
	}
	return x
}

// dienePath is the chain of four π atoms from end a to end c, following double bonds
// at the ends where it can; nil where there is none.
func dienePath(m *molecule.Molecule, has func(int) bool, a, c int) []int {
	var any []int
	for _, h := range m.Neighbours(a) {
		x := h.Atom
		if x == c || !has(x) {
			continue
		}
		for _, g := range m.Neighbours(x) {
			y := g.Atom
			if y == a || y == c || !has(y) {
				continue
			}
			last := m.BondBetween(y, c)
			if last < 0 {
				continue
			}
			if m.Bonds[h.Bond].Order == 2 && m.Bonds[last].Order == 2 {
				return []int{a, x, y, c}
			}
			if any == nil {
				any = []int{a, x, y, c}
			}
		}
	}
	return any
}
