package reactivity

import (
	"slices"

	"lobecast/frontier/molecule"
)

// largestLockingRing is the largest ring taken to hold the two double bonds of a
// diene in their places (common practice (no source): a transoid diene across a ring
// of up to seven atoms cannot turn s-cis).
const largestLockingRing = 7

// Kinds of ends that give up an aromatic ring without making another.
const (
	kindVinylarene  = "vinylarene"
	kindBay         = "bay region"
	kindHeteroarene = "heteroarene"
)

// The reasons for which a diene is refused.
const (
	refusedTransoid = "held s-trans by the ring: its ends cannot reach a partner together"
	refusedBenzene  = "a single aromatic six-ring gives up its aromaticity to no ordinary partner"
)

// findDienes lists the four-centre components: conjugated dienes and heterodienes,
// rings that react across their 1,4 positions (furan, pyrrole, anthracene, tetrazine,
// 2-pyrone, …), vinylarenes and the bay regions of perylene-type hydrocarbons.
// Dienes that a ring holds in the s-trans form are refused.
func (f *endFinder) findDienes() {
	m := f.m
	for bc := range m.Bonds {
		if m.Bonds[bc].Order != 1 && !m.Bonds[bc].Aromatic || f.inDipole[bc] {
			continue
		}
		b, c := m.Bonds[bc].A, m.Bonds[bc].B
		if !dieneInner(m, b) || !dieneInner(m, c) {
			continue
		}
		for _, ha := range m.Neighbours(b) {
			if ha.Atom == c || !f.dieneOuter(ha, b) {
				continue
			}
			for _, hd := range m.Neighbours(c) {
				if hd.Atom == b || hd.Atom == ha.Atom || !f.dieneOuter(hd, c) {
					continue
				}
				f.tryDiene(ha, b, bc, c, hd)
			}
		}
	}
}

// dieneInner says whether an atom may stand at position 2 or 3 of a diene.
func dieneInner(m *molecule.Molecule, i int) bool {
	return m.Atoms[i].Element == 6 || m.Atoms[i].Element == 7
}

// dieneOuter says whether the bond to h from the inner atom b may be a double bond of
// a diene, with h.Atom as its end.
func (f *endFinder) dieneOuter(h molecule.Half, b int) bool {
	m := f.m
	bond := m.Bonds[h.Bond]
	if f.inDipole[h.Bond] || bond.Order == 3 || !bond.Aromatic && bond.Order != 2 {
		return false
	}
	end := m.Atoms[h.Atom]
	switch end.Element {
	case 6, 15:
		return true
	case 7:
		return end.Charge >= 0 && m.Valence(h.Atom) <= 4
	case 8:
		// a nitro group's N=O is none; an N-oxide written N=O neither
		return m.Degree(h.Atom) == 1 && !(m.Atoms[b].Element == 7 && m.Degree(b) > 2)
	case 16, 34:
		return m.Degree(h.Atom) == 1
	}
	return false
}

// tryDiene classifies the path a=b–c=d and adds it to the dienes or to the refused.
func (f *endFinder) tryDiene(ha molecule.Half, b, bc, c int, hd molecule.Half) {
	m := f.m
	a, d := ha.Atom, hd.Atom
	ab, cd := m.Bonds[ha.Bond].Aromatic, m.Bonds[hd.Bond].Aromatic
	path := []int{a, b, c, d}
	switch {
	case ab && cd && m.Bonds[bc].Aromatic:
		if !f.ringDiene(path) {
			f.bayDiene(path)
		}
		return
	case m.Bonds[bc].Aromatic:
		return
	case ab && cd:
		f.bayDiene(path)
		return
	case ab:
		f.vinylarene([]int{d, c, b, a})
		return
	case cd:
		f.vinylarene(path)
		return
	}
	if f.isAcidEnd(a, b, c) || f.isAcidEnd(d, c, b) {
		return
	}
	if m.BondBetween(a, d) >= 0 && f.smallRing(b, c, 3) != nil {
		return
	}
	if f.inAryne(a, b) || f.inAryne(d, c) {
		return
	}
	hetero := m.Atoms[a].Element != 6 || m.Atoms[d].Element != 6
	// in every small ring that holds the inner bond the two double bonds must lie
	// either both within it or both outside
	inRing := 0
	var ring []int
	for _, r := range f.ringsOf[b] {
		x := f.rings[r]
		if len(x) > largestLockingRing || !slices.Contains(x, c) || !adjacentInRing(x, b, c) {
			continue
		}
		n := 0
		if slices.Contains(x, a) && adjacentInRing(x, a, b) {
			n++
		}
		if slices.Contains(x, d) && adjacentInRing(x, c, d) {
			n++
		}
		if n == 1 {
			f.refuse(path, refusedTransoid)
			return
		}
		if ring == nil || n == 2 && inRing == 0 {
			ring, inRing = x, n
		}
	}
	// 1,2-dicarbonyls react as dienes only where a ring holds them s-cis
	if m.Atoms[a].Element == 8 && m.Atoms[d].Element == 8 && (ring == nil || inRing != 0) {
		return
	}
	kind := ""
	switch {
	case hetero || m.Atoms[b].Element != 6 || m.Atoms[c].Element != 6:
		kind = f.heterodieneWord(path)
	case inRing == 2:
		kind = "cyclic diene"
	case ring != nil && f.quinodimethane(ring):
		kind = "o-quinodimethane"
	case ring != nil:
		kind = "outer-ring diene"
	case f.cumulated(a, b) || f.cumulated(d, c):
		kind = "vinylallene"
	default:
		kind = "acyclic diene"
	}
	f.addDiene(End{Role: RoleDiene, Kind: kind, Atoms: path})
}

// isAcidEnd says whether end is the oxygen of a carboxylic acid derivative, whose
// carbonyl does not serve as half of a heterodiene.
func (f *endFinder) isAcidEnd(end, inner, but int) bool {
	return f.m.Atoms[end].Element == 8 && f.m.Atoms[inner].Element == 6 && acidCarbonyl(f.m, inner, but)
}

// cumulated says whether end carries a second double bond beside the one to inner.
func (f *endFinder) cumulated(end, inner int) bool {
	for _, h := range f.m.Neighbours(end) {
		if h.Atom != inner && f.m.Bonds[h.Bond].Order == 2 {
			return true
		}
	}
	return false
}

// quinodimethane says whether a ring, to which both double bonds of a path are exocyclic,
// has six members and two double bonds or aromatic bonds of its own.
func (f *endFinder) quinodimethane(ring []int) bool {
	if len(ring) != 6 {
		return false
	}
	doubles := 0
	for k, i := range ring {
		b := f.m.BondBetween(i, ring[(k+1)%6])
		if b >= 0 && (f.m.Bonds[b].Order == 2 || f.m.Bonds[b].Aromatic) {
			doubles++
		}
	}
	return doubles >= 2
}

// heterodieneWord names a heterodiene by the places of its heteroatoms, counted from
// the end that gives the lower numbers: "1-oxadiene", "2-azadiene", "1,4-diazadiene".
func (f *endFinder) heterodieneWord(path []int) string {
	m := f.m
	word := func(z int) string {
		switch z {
		case 7:
			return "aza"
		case 8:
			return "oxa"
		case 15:
			return "phospha"
		case 16:
			return "thia"
		case 34:
			return "selena"
		}
		return ""
	}
	list := func(p [4]int) (places []int, words []string) {
		for k, i := range p {
			if w := word(m.Atoms[i].Element); w != "" {
				places = append(places, k+1)
				words = append(words, w)
			}
		}
		return
	}
	p1, w1 := list([4]int{path[0], path[1], path[2], path[3]})
	p2, w2 := list([4]int{path[3], path[2], path[1], path[0]})
	better := false
	for k := range p1 {
		if p1[k] != p2[k] {
			better = p2[k] < p1[k]
			break
		}
	}
	if better || (slices.Equal(p1, p2) && heteroRank(w2) < heteroRank(w1)) {
		p1, w1 = p2, w2
	}
	s := ""
	for k := range p1 {
		if k > 0 {
			s += ","
		}
		s += string(rune('0' + p1[k]))
	}
	s += "-"
	switch {
	case len(w1) == 2 && w1[0] == w1[1]:
		s += "di" + w1[0]
	case len(w1) == 3 && w1[0] == w1[1] && w1[1] == w1[2]:
		s += "tri" + w1[0]
	case len(w1) == 4 && w1[0] == w1[1] && w1[1] == w1[2] && w1[2] == w1[3]:
		s += "tetra" + w1[0]
	default: // 1-oxa-2-azadiene
		s = ""
		for k, w := range w1 {
			if k > 0 {
				s += "-"
			}
			s += string(rune('0'+p1[k])) + "-" + w
		}
	}
	return s + "diene"
}

// heteroRank orders replacement prefixes as nomenclature does: oxa before thia before
// selena before aza before phospha.
func heteroRank(words []string) int {
	if len(words) == 0 {
		return 9
	}
	switch words[0] {
	case "oxa":
		return 0
	case "thia":
		return 1
	case "selena":
		return 2
	case "aza":
		return 3
	}
	return 4
}

// vinylarene adds the diene of an exocyclic double bond a=b (C=C, or C=N with N on
// the ring) and the ring bond c=d next to it.
func (f *endFinder) vinylarene(path []int) {
	m := f.m
	a, b, c, d := path[0], path[1], path[2], path[3]
	if m.Atoms[a].Element != 6 || m.Atoms[c].Element != 6 || m.Atoms[d].Element != 6 || f.fusion(d) {
		return
	}
	if ring := f.smallRing(b, c, largestLockingRing); ring != nil {
		if slices.Contains(ring, a) != slices.Contains(ring, d) {
			f.refuse(path, refusedTransoid)
			return
		}
	}
	// in a five-ring d must be doubly bonded to c in the form that reacts
	if _, ok := kekuleWithout(m, []int{c, d}); !ok || aromaticMate(m, c) < 0 || aromaticMate(m, d) < 0 {
		return
	}
	kind := kindVinylarene
	if m.Atoms[b].Element == 7 {
		kind = "N-aryl imine (2-azadiene)"
	}
	f.addDiene(End{Role: RoleDiene, Kind: kind, Atoms: path, Aromatic: true})
}

// bayDiene adds the diene across a bond that joins two aromatic rings and lies in a
// ring itself, as in perylene: a bond that is single in every Kekulé form.
func (f *endFinder) bayDiene(path []int) {
	m := f.m
	a, b, c, d := path[0], path[1], path[2], path[3]
	for _, i := range path {
		if m.Atoms[i].Element != 6 {
			return
		}
	}
	ring := f.smallRing(b, c, 6)
	if ring == nil || slices.Contains(ring, a) || slices.Contains(ring, d) || m.Atoms[a].Hydrogens == 0 || m.Atoms[d].Hydrogens == 0 {
		return
	}
	if m.Bonds[m.BondBetween(b, c)].Aromatic {
		if _, double := kekuleWithout(m, []int{b, c}); double {
			return
		}
	}
	if _, ok := kekuleWithout(m, path); !ok || f.hasDiene(a, d) {
		return
	}
	f.addDiene(End{Role: RoleDiene, Kind: kindBay, Atoms: path, Aromatic: true})
}

// ringDiene judges a path of aromatic bonds: the 2,5 positions of a five-ring, or the
// 1,4 positions of a six-ring that is rich in nitrogen, fused, or a pyrone or pyridone.
// It returns false where the path does not lie in one ring.
func (f *endFinder) ringDiene(path []int) bool {
	m := f.m
	a, d := path[0], path[3]
	in := false
	for _, r := range f.ringsOf[a] {
		ring := f.rings[r]
		if !f.aromatic[r] || !slices.Contains(ring, path[1]) || !slices.Contains(ring, path[2]) || !slices.Contains(ring, d) {
			continue
		}
		in = true
		if f.fusion(a) || f.fusion(d) || f.hasDiene(a, d) {
			continue
		}
		if _, ok := kekuleWithout(m, path); !ok || !allPaired(m, path) {
			continue
		}
		kind := ""
		switch len(ring) {
		case 5:
			kind = f.fiveRingWord(ring, path)
		case 6:
			kind = f.sixRingWord(ring, path)
		}
		if kind != "" {
			f.addDiene(End{Role: RoleDiene, Kind: kind, Atoms: path, Aromatic: true})
			return true
		}
	}
	return in
}

// allPaired says whether every atom of the path is doubly bonded within its ring, so
// that none of them brings an electron pair or carries an exocyclic double bond.
func allPaired(m *molecule.Molecule, path []int) bool {
	for _, i := range path {
		if aromaticMate(m, i) < 0 {
			return false
		}
	}
	return true
}

// inAryne says whether a double bond lies in a six-ring with a triple bond: an aryne,
// whose ring is aromatic whatever way it is drawn.
func (f *endFinder) inAryne(i, j int) bool {
	ring := f.smallRing(i, j, 6)
	for k := range ring {
		b := f.m.BondBetween(ring[k], ring[(k+1)%len(ring)])
		if b >= 0 && f.m.Bonds[b].Order == 3 {
			return true
		}
	}
	return false
}

// fiveRingWord names the five-ring that reacts across its 2,5 positions, or "".
func (f *endFinder) fiveRingWord(ring, path []int) string {
	m := f.m
	if m.Atoms[path[0]].Element != 6 || m.Atoms[path[3]].Element != 6 {
		return ""
	}
	x := -1
	for _, i := range ring {
		if !slices.Contains(path, i) {
			x = i
		}
	}
	nitrogens := 0
	for _, i := range path[1:3] {
		if m.Atoms[i].Element == 7 {
			nitrogens++
		}
	}
	fused := f.fusion(path[1]) && f.fusion(path[2])
	names := map[int][4]string{
		7:  {"pyrrole", "imidazole", "1,2,4-triazole", "isoindole"},
		8:  {"furan", "oxazole", "1,3,4-oxadiazole", "isobenzofuran"},
		16: {"thiophene", "thiazole", "1,3,4-thiadiazole", "benzo[c]thiophene"},
		34: {"selenophene", "selenazole", "1,3,4-selenadiazole", "benzo[c]selenophene"},
	}[m.Atoms[x].Element]
	if fused && nitrogens == 0 {
		return names[3]
	}
	return names[nitrogens]
}

// sixRingWord names the six-ring that reacts across its 1,4 positions, or "" where it
// does not: a single benzene or pyridine ring keeps its aromaticity.
func (f *endFinder) sixRingWord(ring, path []int) string {
	m := f.m
	nitrogens, oxo := 0, false
	bridge := 0 // ring atoms that bring an electron pair: O, S, N–R
	for _, i := range ring {
		switch m.Atoms[i].Element {
		case 7:
			nitrogens++
		}
		if aromaticMate(m, i) < 0 {
			if m.Atoms[i].Element != 6 {
				bridge = m.Atoms[i].Element
			}
			for _, h := range m.Neighbours(i) {
				if !slices.Contains(ring, h.Atom) && m.Bonds[h.Bond].Order == 2 {
					oxo = true
				}
			}
		}
	}
	if oxo {
		switch bridge {
		case 7:
			return "2-pyridone"
		case 8:
			return "2-pyrone"
		case 16:
			return "2-thiopyrone"
		}
		return ""
	}
	a, d := m.Atoms[path[0]].Element, m.Atoms[path[3]].Element
	carbons := a == 6 && d == 6
	sides := f.fusedSides(ring, path)
	switch {
	case nitrogens == 3 && a+d == 13 && alternates(m, ring):
		return "1,3,5-triazine"
	case !carbons:
		return ""
	case nitrogens >= 4:
		return "tetrazine"
	case nitrogens == 3:
		return "1,2,4-triazine"
	case nitrogens == 2 && sides > 0:
		return "benzodiazine"
	case nitrogens == 2:
		return "diazine"
	case sides == 2:
		return "anthracene type"
	case sides == 1:
		return "naphthalene type"
	}
	f.refuse(path, refusedBenzene)
	return ""
}

// alternates says whether C and N alternate round a six-ring.
func alternates(m *molecule.Molecule, ring []int) bool {
	for k := range ring {
		if m.Atoms[ring[k]].Element == m.Atoms[ring[(k+1)%len(ring)]].Element {
			return false
		}
	}
	return true
}

// fusedSides counts the sides of a six-ring, between the ends of the path, that are
// shared with another aromatic ring. Where only the path's own side is shared the
// path is moved to the other side, whose double bond then stands alone in the adduct.
func (f *endFinder) fusedSides(ring, path []int) int {
	var other []int
	i, from := path[0], path[1]
	for k := 0; k < 2; k++ {
		next := ringNeighbour(ring, i, from)
		other = append(other, next)
		i, from = next, i
	}
	n := 0
	if f.sixFused(other[0], other[1], ring) {
		n++
	}
	if f.sixFused(path[1], path[2], ring) {
		n++
		if n == 1 {
			if _, ok := kekuleWithout(f.m, []int{path[0], other[0], other[1], path[3]}); ok {
				path[1], path[2] = other[0], other[1]
			}
		}
	}
	return n
}

// sixFused says whether the bond between two atoms of a ring is shared with another
// aromatic six-ring.
func (f *endFinder) sixFused(i, j int, ring []int) bool {
	for _, r := range f.ringsOf[i] {
		second := f.rings[r]
		if f.aromatic[r] && len(second) == 6 && &second[0] != &ring[0] && slices.Contains(second, j) {
			return true
		}
	}
	return false
}

// hasDiene says whether a diene with the ends a and d is known already.
func (f *endFinder) hasDiene(a, d int) bool {
	for k := range f.ends.Dienes {
		e := &f.ends.Dienes[k]
		if e.First() == a && e.Last() == d || e.First() == d && e.Last() == a {
			return true
		}
	}
	return false
}

func (f *endFinder) addDiene(e End) { f.ends.Dienes = append(f.ends.Dienes, e) }

// refuse notes a diene that cannot react, once per path.
func (f *endFinder) refuse(path []int, reason string) {
	for _, r := range f.ends.Refused {
		if r.Reason == reason && (reason == refusedBenzene || slices.Equal(r.Atoms, path) || len(path) == 4 && len(r.Atoms) == 4 &&
			(r.Atoms[0] == path[0] && r.Atoms[3] == path[3] || r.Atoms[0] == path[3] && r.Atoms[3] == path[0])) {
			return
		}
	}
	f.ends.Refused = append(f.ends.Refused, RefusedEnd{Atoms: append([]int(nil), path...), Reason: reason})
}
