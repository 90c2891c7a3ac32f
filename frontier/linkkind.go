package frontier

// LinkKind tells apart the links between two carbons whose k a set may want to give
// its own value: bonds alternate outside rings of π atoms (C. A. Coulson and A.
// Golebiewski, Proc. Phys. Soc. 1961, 78, 1310, make k depend on bond order). Sets that
// do not, the published ones, have one k for all.
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
// systems with a charge that can move, the drawn bond order means nothing; there all
// links are alike.
func (p *perception) linkKinds(pi *Pi) {
	sp := &p.systems
	charged := sp.bent // no longer needed; now: per root, a formal charge that may move
	clear(charged)
	for o := range p.has {
		i := p.atom(int32(o))
		if !p.has[o] || p.charge[i] == 0 && p.share[o] == float64(p.e[o]) {
			continue
		}
		switch pi.Centres[sp.centre[o]].Class {
		case "N+ nitro", "O nitro", "N+ oxide", "O- oxide":
		default:
			charged[find(sp.root, int32(o))] = true
		}
	}
	for k, l := range p.pairs {
		i, j := p.atom(l[0]), p.atom(l[1])
		if p.m.Atoms[i].Element != 6 || p.m.Atoms[j].Element != 6 || charged[find(sp.root, l[0])] {
			continue
		}
		b := p.m.BondBetween(i, j)
		if b < 0 || p.ringPi[i] && p.ringPi[j] && p.m.BondInRing(b) {
			continue
		}
		kind := SingleLink
		switch {
		case p.order[b] == 2:
			kind = DoubleLink
		case p.order[b] != 1:
			kind = AnyLink
		case p.holdsHetero(i) || p.holdsHetero(j):
			kind = AcylLink
		case p.ringPi[i] || p.ringPi[j]:
			kind = ArylLink
		}
		pi.Links[k].Kind = kind
	}
}

// holdsHetero says whether a carbon outside rings of π atoms holds a multiple bond to N, O or S.
func (p *perception) holdsHetero(i int) bool {
	if p.ringPi[i] {
		return false
	}
	for _, h := range p.m.Neighbours(i) {
		if z := p.m.Atoms[h.Atom].Element; p.order[h.Bond] >= 2 && (z == 7 || z == 8 || z == 16) {
			return true
		}
	}
	return false
}
