package frontier

// LinkKind tells apart the links between two carbons whose k a set may want to give
// its own value: bonds alternate outside rings of π atoms (C. A. Coulson and A.
// Golebiewski, Proc. Phys. Soc. 1961, 78, 1310, from memory, make k depend on bond order).
// Sets that do not, the published ones, have one k for all.
type LinkKind uint8

// The kinds of link between two carbons.
const (
	AnyLink    LinkKind = iota // within a ring of π atoms, in a charged system, or not between carbons
	DoubleLink                 // C=C outside such rings
	SingleLink                 // single bond between two C=C
	ArylLink                   // single bond that starts from a ring of π atoms
	AcylLink                   // single bond to the carbon of C=O, C=N, C≡N
)

// linkKindNames are the parameters of the kinds, all children of "k C C".
var linkKindNames = []string{
	AnyLink: "k C C", DoubleLink: "k C C double", SingleLink: "k C C single",
	ArylLink: "k C C aryl", AcylLink: "k C C acyl",
}

var linkKindParameter []Parameter

// linkKinds sets the kinds of the links of p.pairs. Within rings of π atoms, and in
// systems with a charge that can move or an unpaired electron, the drawn bond order
// means nothing; there all links are alike. Elsewhere the pairing of p orbitals after
// charges were settled decides, not the drawing.
func (p *perception) linkKinds(pi *Pi) {
	sp := &p.systems
	moving := sp.bent // no longer needed; now: per root, a charge or a lone electron that may move
	clear(moving)
	for o := range p.has {
		if !p.has[o] || p.excess(int32(o)) == 0 && p.share[o] == float64(p.e[o]) && (p.e[o] != 1 || p.mate[o] >= 0) {
			continue
		}
		switch pi.Centres[sp.centre[o]].Class {
		case "N+ nitro", "O nitro", "N+ oxide", "O- oxide":
		default:
			moving[find(sp.root, int32(o))] = true
		}
	}
	p.findRingBonds()
	for k, l := range p.pairs {
		i, j := p.atom(l[0]), p.atom(l[1])
		if p.m.Atoms[i].Element != 6 || p.m.Atoms[j].Element != 6 || moving[find(sp.root, l[0])] {
			continue
		}
		if p.linear[i] && p.linear[j] && p.mate[l[0]] == l[1] || p.inRing(i, j) {
			continue
		}
		kind := SingleLink
		switch {
		case p.mate[l[0]] == l[1]:
			kind = DoubleLink
		case p.holdsHetero(l[0]) || p.holdsHetero(l[1]):
			kind = AcylLink
		case p.ringPi[i] || p.ringPi[j]:
			kind = ArylLink
		}
		pi.Links[k].Kind = kind
	}
}

// findRingBonds marks the bonds of rings all of whose members have a p orbital, of any
// size: around them the drawn double bonds could as well stand one place further.
func (p *perception) findRingBonds() {
	p.ringBond = size(p.ringBond, len(p.m.Bonds))
	for _, ring := range p.m.Rings() {
		all := true
		for _, a := range ring {
			all = all && p.has[a]
		}
		if !all {
			continue
		}
		for x, a := range ring {
			p.ringBond[p.m.BondBetween(a, ring[(x+1)%len(ring)])] = true
		}
	}
}

// inRing says whether two neighbours are joined by a bond findRingBonds marked.
func (p *perception) inRing(i, j int) bool {
	b := p.m.BondBetween(i, j)
	return b < 0 || p.ringBond[b]
}

// holdsHetero says whether a carbon outside rings of π atoms is paired with N, O or S.
func (p *perception) holdsHetero(o int32) bool {
	if p.ringPi[p.atom(o)] || p.mate[o] < 0 {
		return false
	}
	switch p.m.Atoms[p.atom(p.mate[o])].Element {
	case 7, 8, 16:
		return true
	}
	return false
}
