package reactivity

import "slices"

// environment is what surrounds one ring atom: the facts the named terms are made of.
type environment struct {
	ring      []int          // smallest aromatic ring of the site, or smallest ring, or nil
	flank     [3]substituent // substituents on the ring neighbours
	flanks    int
	orthoRing [3]orthoAtom // ring neighbours that are no carbon
	orthos    int

	periH, periGroup, periHetero int // beyond a fused aromatic ring
	para                         [2]substituent
	paras                        int
	paraHetero                   bool
	metaHetero                   int

	five, alphaN, alphaO, alphaS, beta bool // of a five-membered ring
	betaGroups                         int
	ringN                              int // nitrogens of the pyridine type in the ring
	withdrawing, donating              int // groups on the ring
	fused                              int // aromatic rings fused to it
	field, charge                      float64
}

// orthoAtom is the kind of a ring heteroatom beside a site.
type orthoAtom uint8

const (
	orthoAza orthoAtom = iota // N that brings one electron
	orthoN                    // N that brings two
	orthoO
	orthoS
	orthoOther
	orthoAtoms
)

// surroundings describes the environment of ring atom r.
func (v *view) surroundings(r int) environment {
	var e environment
	m := v.m
	e.ring = v.homeRing(r)
	n := len(e.ring)
	e.five = n == 5
	for _, h := range m.Neighbours(r) {
		a := h.Atom
		if !m.BondInRing(h.Bond) {
			continue
		}
		if z := m.Atoms[a].Element; z != 6 {
			kind := orthoOther
			switch z {
			case 7:
				kind = orthoN
				if v.mostOrder(a) >= 2 {
					kind = orthoAza
				}
			case 8:
				kind = orthoO
			case 16:
				kind = orthoS
			}
			if e.orthos < len(e.orthoRing) {
				e.orthoRing[e.orthos] = kind
				e.orthos++
			}
			if z == 7 {
				for _, x := range m.Neighbours(a) {
					if x.Atom != r && !v.ringOfThree(r, a, x.Atom) {
						e.addFlank(v.onNitrogen(x.Atom))
					}
				}
			}
			continue
		}
		for _, x := range m.Neighbours(a) {
			if x.Atom == r || v.ringOfThree(r, a, x.Atom) {
				continue
			}
			kind := v.ringKind(a, x.Atom, x.Bond)
			e.addFlank(kind)
			if kind == subFusedRing {
				v.peri(&e, r, a, x.Atom)
			}
			break
		}
	}
	at := slices.Index(e.ring, r)
	if n == 6 {
		p := e.ring[(at+3)%6]
		if m.Atoms[p].Element != 6 {
			e.paraHetero = true
		} else {
			for _, x := range m.Neighbours(p) {
				if !slices.Contains(e.ring, x.Atom) && e.paras < len(e.para) {
					e.para[e.paras] = v.ringKind(p, x.Atom, x.Bond)
					e.paras++
				}
			}
		}
		for _, d := range [2]int{2, 4} {
			if m.Atoms[e.ring[(at+d)%6]].Element != 6 {
				e.metaHetero++
			}
		}
	}
	if n == 5 {
		v.fiveRing(&e, at)
	}
	for _, i := range e.ring {
		if m.Atoms[i].Element == 7 && v.mostOrder(i) >= 2 {
			e.ringN++
		}
		for _, x := range m.Neighbours(i) {
			if slices.Contains(e.ring, x.Atom) {
				continue
			}
			kind := v.ringKind(i, x.Atom, x.Bond)
			if kind.withdrawing() {
				e.withdrawing++
			}
			if kind.donating() {
				e.donating++
			}
		}
	}
	e.fused = v.fusedRings(e.ring)
	e.field, e.charge = v.field(r)
	return e
}

func (e *environment) addFlank(kind substituent) {
	if e.flanks < len(e.flank) {
		e.flank[e.flanks] = kind
		e.flanks++
	}
}

// homeRing is the smallest aromatic ring that holds r, else the smallest ring.
func (v *view) homeRing(r int) []int {
	m := v.m
	var best []int
	aromatic := false
	for _, k := range m.RingsOf(r) {
		ring := m.Rings()[k]
		all := true
		for _, i := range ring {
			all = all && m.Atoms[i].Aromatic
		}
		if best == nil || all && !aromatic || all == aromatic && len(ring) < len(best) {
			best, aromatic = ring, all
		}
	}
	return best
}

// ringOfThree tells whether one ring holds all three atoms.
func (v *view) ringOfThree(a, b, c int) bool {
	for _, k := range v.m.RingsOf(a) {
		ring := v.m.Rings()[k]
		if slices.Contains(ring, b) && slices.Contains(ring, c) {
			return true
		}
	}
	return false
}

// ringKind classes the neighbour x of ring atom a outside the ring at hand: a
// substituent, or an atom of a ring fused there.
func (v *view) ringKind(a, x, bond int) substituent {
	m := v.m
	if !m.BondInRing(bond) {
		return v.kindOf(a, x)
	}
	if m.Atoms[x].Aromatic {
		return subFusedRing
	}
	switch m.Atoms[x].Element {
	case 6:
		for _, h := range m.Neighbours(x) {
			if m.Bonds[h.Bond].Order == 2 && m.Atoms[h.Atom].Element == 8 {
				return subRingOxo
			}
		}
		for _, k := range m.RingsOf(x) {
			ring := m.Rings()[k]
			if len(ring) <= 5 && slices.Contains(ring, a) {
				return subRingAlkyl5
			}
		}
		return subRingAlkyl6
	case 8:
		return subRingO
	case 7:
		if v.acylated(x, a) {
			return subRingAmide
		}
		return subRingN
	case 16:
		return subRingS
	}
	return subOther
}

// onNitrogen classes a group x on a ring nitrogen beside the site.
func (v *view) onNitrogen(x int) substituent {
	a := &v.m.Atoms[x]
	switch {
	case a.Aromatic:
		return subOnNAryl
	case v.hypervalent(x):
		return subOnNSulfonyl
	case a.Element == 14:
		return subOnNSilyl
	case a.Element == 6 && v.mostOrder(x) == 2:
		for _, h := range v.m.Neighbours(x) {
			if v.m.Bonds[h.Bond].Order == 2 && v.m.Atoms[h.Atom].Element == 8 {
				return subOnNAcyl
			}
		}
	}
	return subOnNAlkyl
}

// peri counts what stands at the peri place: r and a lie in one ring, a and x in the
// next, and y is the other neighbour of x.
func (v *view) peri(e *environment, r, a, x int) {
	m := v.m
	for _, h := range m.Neighbours(x) {
		y := h.Atom
		if y == a || v.ringOfThree(r, a, y) || !m.Atoms[y].Aromatic || !v.ringOfThree(a, x, y) {
			continue
		}
		switch {
		case m.Atoms[y].Element != 6:
			e.periHetero++
		case m.Atoms[y].Hydrogens == 0:
			e.periGroup++
		default:
			e.periH++
		}
	}
}

// fiveRing describes the place of ring atom at in a five-membered ring with respect to
// its heteroatoms that bring a lone pair.
func (v *view) fiveRing(e *environment, at int) {
	m := v.m
	lone := func(i int) int {
		z := m.Atoms[i].Element
		if z == 8 || z == 16 || z == 7 && v.mostOrder(i) == 1 {
			return z
		}
		return 0
	}
	for _, d := range [2]int{1, 4} {
		switch lone(e.ring[(at+d)%5]) {
		case 7:
			e.alphaN = true
		case 8:
			e.alphaO = true
		case 16:
			e.alphaS = true
		}
	}
	for _, d := range [2]int{2, 3} {
		i := e.ring[(at+d)%5]
		if lone(i) != 0 {
			e.beta = true
		}
		if m.Atoms[i].Element != 6 {
			continue
		}
		for _, x := range m.Neighbours(i) {
			if !slices.Contains(e.ring, x.Atom) {
				e.betaGroups++
			}
		}
	}
}

// fusedRings counts the aromatic rings that share a bond with the given one.
func (v *view) fusedRings(ring []int) int {
	n := 0
	for _, other := range v.m.Rings() {
		if len(other) == 0 || !v.m.Atoms[other[0]].Aromatic {
			continue
		}
		shared, aromatic := 0, true
		for _, i := range other {
			aromatic = aromatic && v.m.Atoms[i].Aromatic
			if slices.Contains(ring, i) {
				shared++
			}
		}
		if aromatic && shared == 2 && len(other) > 2 {
			n++
		}
	}
	return n
}

// electronegativityOver holds Pauling electronegativities less that of carbon, 2.55 (L.
// Pauling, The Nature of the Chemical Bond, 3rd ed. 1960; values of A. L. Allred,
// J. Inorg. Nucl. Chem. 1961, 17, 215).
func electronegativityOver(z int) float64 {
	switch z {
	case 5:
		return 2.04 - 2.55
	case 7:
		return 3.04 - 2.55
	case 8:
		return 3.44 - 2.55
	case 9:
		return 3.98 - 2.55
	case 14:
		return 1.90 - 2.55
	case 15:
		return 2.19 - 2.55
	case 16:
		return 2.58 - 2.55
	case 17:
		return 3.16 - 2.55
	case 34:
		return 2.55 - 2.55
	case 35:
		return 2.96 - 2.55
	case 53:
		return 2.66 - 2.55
	}
	return 0
}

// field is the σ-inductive field of all heteroatoms at r, halved with every bond (the
// successive attenuation of G. E. K. Branch and M. Calvin, The Theory of Organic
// Chemistry, 1941): Σ (χ − χ_C)/2^(d−1), S(VI) counted as 1 and P(V) as 0.5; and the
// like sum of the formal charges that no neighbour compensates.
func (v *view) field(r int) (field, charge float64) {
	m := v.m
	for x := range m.Atoms {
		if x == r {
			continue
		}
		z, q := m.Atoms[x].Element, m.Atoms[x].Charge
		if z == 6 && q == 0 {
			continue
		}
		d := v.bonds(r, x)
		if d < 1 || d > 40 {
			continue
		}
		weight := 1 / float64(uint64(1)<<(d-1))
		if q != 0 {
			compensated := false
			for _, h := range m.Neighbours(x) {
				compensated = compensated || m.Atoms[h.Atom].Charge == -q
			}
			if !compensated {
				charge += float64(q) * weight
			}
		}
		if z == 6 {
			continue
		}
		chi := electronegativityOver(z)
		if v.hypervalent(x) {
			chi = 1
			if z == 15 {
				chi = 0.5
			}
		}
		field += chi * weight
	}
	return field, charge
}
