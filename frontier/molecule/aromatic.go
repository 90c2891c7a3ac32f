package molecule

import "slices"

// Aromaticity, as this package defines it.
//
// An atom can take part when it has one p orbital for the ring. It brings
//
//	1  with a double bond to another such atom of a ring
//	2  as N, P, As with three σ bonds or as an anion, as O, S, Se, Te with two,
//	   or as a carbanion: a lone pair
//	0  as C with a double bond to N, O, S, Se or Te outside the ring, as a
//	   carbocation, or as trivalent boron: an empty orbital
//
// A circuit is a small ring of such atoms, or the outer bonds of two or three fused ones, in
// which the atoms that bring 1 can be paired by double bonds along the circuit in some
// Kekulé form of the whole molecule. With 4n + 2 electrons (n ≥ 1, or 2 electrons in a
// three-membered ring) it is aromatic (Hückel, Z. Phys. 70, 204 (1931)), and so are its
// atoms, its bonds, and the bonds of its rings between them. Asking for some Kekulé form,
// rather than the written one, gives every way of writing the same answer: benzene,
// 2-pyridone, tropone, coumarin, azulene and 2H-isoindole are aromatic, while
// cyclooctatetraene, s-indacene, fulvene, quinones and the single bonds of biphenylene
// are not. The Kekulé form is then changed, where it must be, so that aromatic atoms
// have their double bonds in aromatic bonds.

// maxCircuit is the number of atoms of the largest circuit that is looked at.
const maxCircuit = 24

// maxUnionRings bounds the rings of one molecule whose unions are looked at.
const maxUnionRings = 64

// circuitFinder holds what is needed to judge the circuits of one molecule.
type circuitFinder struct {
	m         *Molecule
	k         *matcher
	electrons []int8    // by atom, -1 for atoms that cannot take part
	rings     []circuit // of atoms that can take part only
}

// circuit is a cyclic list of atoms with its bonds, as in ringSet.
type circuit struct{ atoms, bonds []int }

// perceiveAromaticity marks the aromatic atoms and bonds.
func (m *Molecule) perceiveAromaticity() {
	for i := range m.Atoms {
		m.Atoms[i].Aromatic = false
	}
	for i := range m.Bonds {
		m.Bonds[i].Aromatic = false
	}
	rs := m.rings
	if len(rs.rings) == 0 {
		return
	}
	f := circuitFinder{m: m, k: borrowMatcher(m)}
	defer f.k.release()
	f.countElectrons()
	var open []circuit // rings that are no aromatic circuits
	some := false
	take := func(ring, bonds []int) {
		sum, ok := f.sum(ring)
		switch {
		case !ok || len(ring) > maxCircuit:
		case isHueckel(sum, len(ring)) && f.closes(ring):
			m.markAromatic(ring, bonds)
			some = true
		default:
			open = append(open, circuit{ring, bonds})
		}
	}
	f.findRings()
	for _, c := range f.rings {
		take(c.atoms, c.bonds)
	}
	if len(open) > 0 && f.unions(open) {
		some = true
	}
	if some {
		f.settleKekule()
	}
}

func (m *Molecule) markAromatic(atoms, bonds []int) {
	for _, a := range atoms {
		m.Atoms[a].Aromatic = true
	}
	for _, b := range bonds {
		m.Bonds[b].Aromatic = true
	}
}

// isHueckel is the rule of 4n + 2 electrons in a ring of a size.
func isHueckel(electrons, size int) bool {
	return electrons%4 == 2 && (electrons > 2 || size == 3)
}

// countElectrons fills electrons, and the matcher with the present double bonds of the
// atoms that bring one electron each.
func (f *circuitFinder) countElectrons() {
	m := f.m
	f.electrons = make([]int8, len(m.Atoms))
	for i := range m.Atoms {
		f.electrons[i] = m.ringElectrons(i)
	}
	for b := range m.Bonds {
		x := &m.Bonds[b]
		if !m.rings.bondIn[b] || x.Order != 2 {
			continue
		}
		if f.electrons[x.A] == 1 && f.electrons[x.B] == 1 {
			f.k.mate[x.A], f.k.mate[x.B] = int32(x.B), int32(x.A)
			continue
		}
		// A double bond to an atom that cannot take part.
		f.electrons[x.A], f.electrons[x.B] = -1, -1
	}
	for b := range m.Bonds {
		x := &m.Bonds[b]
		f.k.usable[b] = m.rings.bondIn[b] && x.Order <= 2 && f.electrons[x.A] == 1 && f.electrons[x.B] == 1
	}
}

// findRings lists the rings to look at: a smallest set of smallest rings of the graph of
// the atoms that can take part, and rings of no more atoms that could stand in their
// places. In most molecules these are the rings of the molecule that have no other atoms;
// in 1,6-methano[10]annulene it is the ring of ten that runs past the bridge.
func (f *circuitFinder) findRings() {
	m, rs := f.m, f.m.rings
	add := func(rings, bonds [][]int) {
		for r, ring := range rings {
			if _, ok := f.sum(ring); ok {
				f.rings = append(f.rings, circuit{ring, bonds[r]})
			}
		}
	}
	add(rs.rings, rs.bonds)
	basis := len(f.rings)
	whole := basis == len(rs.rings)
	add(rs.extra, rs.extraBonds)
	if !whole && f.cyclomatic() > basis {
		allowed := make([]bool, len(m.Bonds))
		for b := range m.Bonds {
			allowed[b] = rs.bondIn[b] && f.electrons[m.Bonds[b].A] >= 0 && f.electrons[m.Bonds[b].B] >= 0
		}
		part := &Molecule{Atoms: m.Atoms, Bonds: m.Bonds, Source: m.Source, adjacency: m.adjacency}
		part.rings = &ringSet{bondIn: part.ringBonds(allowed)}
		if part.perceiveRings() == nil {
			f.rings = f.rings[:0]
			add(part.rings.rings, part.rings.bonds)
			basis = len(f.rings)
			add(part.rings.extra, part.rings.extraBonds)
		}
	}
	// Two rings that share three atoms or more, as in a bicycle with bridges of equal
	// length, may be replaced by a third.
	if basis < 2 || len(f.rings) > maxUnionRings {
		return
	}
	for a := 1; a < len(f.rings); a++ {
		for b := range a {
			x, y := f.rings[a], f.rings[b]
			if common(x.bonds, y.bonds) < 2 {
				continue
			}
			atoms, ok := f.outline([]circuit{x, y})
			if !ok || len(atoms) > max(len(x.atoms), len(y.atoms)) || len(f.rings) >= maxUnionRings {
				continue
			}
			bonds := make([]int, len(atoms))
			for k, c := range atoms {
				bonds[k] = m.BondBetween(c, atoms[(k+1)%len(atoms)])
			}
			if !f.known(bonds) {
				f.rings = append(f.rings, circuit{atoms, bonds})
			}
		}
	}
}

// known tells whether a ring of these bonds is listed.
func (f *circuitFinder) known(bonds []int) bool {
	for _, c := range f.rings {
		if len(c.bonds) == len(bonds) && common(c.bonds, bonds) == len(bonds) {
			return true
		}
	}
	return false
}

// common counts the entries that two lists share.
func common(a, b []int) int {
	n := 0
	for _, x := range a {
		for _, y := range b {
			if x == y {
				n++
			}
		}
	}
	return n
}

// cyclomatic is the number of independent cycles of the atoms that can take part.
func (f *circuitFinder) cyclomatic() int {
	m := f.m
	uf := f.k.free
	for i := range m.Atoms {
		uf[i] = int32(i)
	}
	n := 0
	for b := range m.Bonds {
		x := &m.Bonds[b]
		if !m.rings.bondIn[b] || f.electrons[x.A] < 0 || f.electrons[x.B] < 0 {
			continue
		}
		p, q := find(uf, int32(x.A)), find(uf, int32(x.B))
		if p == q {
			n++
			continue
		}
		uf[max(p, q)] = min(p, q)
	}
	return n
}

// sum adds the electrons of a ring; ok is false when an atom cannot take part.
func (f *circuitFinder) sum(atoms []int) (sum int, ok bool) {
	for _, a := range atoms {
		if f.electrons[a] < 0 {
			return 0, false
		}
		sum += int(f.electrons[a])
	}
	return sum, true
}

// closes tells whether some Kekulé form pairs the one-electron atoms of a cyclic list
// along the list.
func (f *circuitFinder) closes(atoms []int) bool {
	k := f.k
	for _, a := range atoms {
		k.barred[a] = true
	}
	defer func() {
		for _, a := range atoms {
			k.barred[a] = false
		}
	}()
	inside := true
	for _, a := range atoms {
		if f.electrons[a] == 1 && !k.barred[k.mate[a]] {
			inside = false
		}
	}
	n := len(atoms)
	// Pairing along the list is decided by where the runs of one-electron atoms begin;
	// without any other atom there are two ways.
	start, runs := 0, false
	for i, a := range atoms {
		if f.electrons[a] != 1 {
			start, runs = i, true
			break
		}
	}
	run := 0
	for i := 1; i <= n; i++ {
		if f.electrons[atoms[(start+i)%n]] == 1 {
			run++
			continue
		}
		if run%2 == 1 {
			return false
		}
		run = 0
	}
	if !runs && n%2 == 1 {
		return false
	}
	if inside {
		return true
	}
	// The partners outside must find others, without the atoms of the list.
	k.saved = append(k.saved[:0], k.mate...)
	defer copy(k.mate, k.saved)
	for _, a := range atoms {
		if w := k.mate[a]; w >= 0 {
			k.mate[a] = -1
			k.mate[w] = -1
		}
	}
	for _, a := range atoms {
		if w := k.saved[a]; w >= 0 && !k.barred[w] && k.mate[w] < 0 && !k.augment(int(w)) {
			return false
		}
	}
	return true
}

// unions looks for aromatic circuits round two and three fused rings, of which at least
// one is not aromatic in itself.
func (f *circuitFinder) unions(open []circuit) (some bool) {
	m := f.m
	left := open[:0:0]
	for _, c := range open {
		for _, b := range c.bonds {
			if !m.Bonds[b].Aromatic {
				left = append(left, c)
				break
			}
		}
	}
	if len(left) == 0 {
		return false
	}
	var rings []circuit
	for _, c := range f.rings {
		if len(c.atoms) <= maxCircuit {
			rings = append(rings, c)
		}
	}
	if len(rings) > maxUnionRings {
		return false
	}
	// What is found is marked at the end, so that the order does not matter.
	var found [][]circuit
	try := func(parts ...circuit) bool {
		outer, ok := f.outline(parts)
		if !ok || len(outer) > maxCircuit {
			return false
		}
		sum, _ := f.sum(outer)
		if !isHueckel(sum, len(outer)) || !f.closes(outer) {
			return false
		}
		found = append(found, append([]circuit{{atoms: outer}}, parts...))
		return true
	}
	for _, a := range left {
		for _, b := range rings {
			if &a.atoms[0] == &b.atoms[0] || !share(a.bonds, b.bonds) {
				continue
			}
			try(a, b)
			for _, c := range rings {
				if &c.atoms[0] == &a.atoms[0] || &c.atoms[0] == &b.atoms[0] || !share(a.bonds, c.bonds) && !share(b.bonds, c.bonds) {
					continue
				}
				try(a, b, c)
			}
		}
	}
	for _, u := range found {
		on := make(map[int]bool, len(u[0].atoms))
		for _, a := range u[0].atoms {
			on[a] = true
			m.Atoms[a].Aromatic = true
		}
		for _, part := range u[1:] {
			for _, b := range part.bonds {
				if on[m.Bonds[b].A] && on[m.Bonds[b].B] {
					m.Bonds[b].Aromatic = true
				}
			}
		}
	}
	return len(found) > 0
}

// share tells whether two lists have an entry in common.
func share(a, b []int) bool {
	for _, x := range a {
		if slices.Contains(b, x) {
			return true
		}
	}
	return false
}

// outline gives the atoms, in turn, of the bonds that belong to an odd number of the
// rings; ok is false when these are not one simple cycle.
func (f *circuitFinder) outline(parts []circuit) (atoms []int, ok bool) {
	var bonds []int
	for _, p := range parts {
		for _, b := range p.bonds {
			at := -1
			for k, x := range bonds {
				if x == b {
					at = k
					break
				}
			}
			if at >= 0 {
				bonds[at] = bonds[len(bonds)-1]
				bonds = bonds[:len(bonds)-1]
				continue
			}
			bonds = append(bonds, b)
		}
	}
	if len(bonds) < 3 {
		return nil, false
	}
	m := f.m
	start := m.Bonds[bonds[0]].A
	at := start
	for len(bonds) > 0 {
		next := -1
		for k, b := range bonds {
			if m.Bonds[b].A == at || m.Bonds[b].B == at {
				next = k
				break
			}
		}
		if next < 0 {
			return nil, false
		}
		atoms = append(atoms, at)
		at = m.Other(bonds[next], at)
		bonds[next] = bonds[len(bonds)-1]
		bonds = bonds[:len(bonds)-1]
		if at == start && len(bonds) > 0 {
			return nil, false
		}
	}
	if at != start {
		return nil, false
	}
	// An atom met twice is where two cycles touch.
	for i, a := range atoms {
		for _, b := range atoms[:i] {
			if a == b {
				return nil, false
			}
		}
	}
	return atoms, true
}

// settleKekule changes the Kekulé form so that aromatic atoms have their double bonds
// in aromatic bonds, where that is possible; other double bonds stay.
func (f *circuitFinder) settleKekule() {
	m, k := f.m, f.k
	var single []int
	for i := range m.Atoms {
		w := k.mate[i]
		if w < 0 || !m.Atoms[i].Aromatic && !m.Atoms[w].Aromatic {
			continue
		}
		if m.Bonds[m.BondBetween(i, int(w))].Aromatic {
			continue
		}
		single = append(single, i)
	}
	if len(single) == 0 {
		return
	}
	k.saved = append(k.saved[:0], k.mate...)
	for b := range m.Bonds {
		x := &m.Bonds[b]
		if !x.Aromatic && (m.Atoms[x.A].Aromatic || m.Atoms[x.B].Aromatic) {
			k.usable[b] = false
		}
	}
	for _, i := range single {
		k.mate[i] = -1
	}
	for _, i := range single {
		if k.mate[i] < 0 && !k.augment(i) {
			copy(k.mate, k.saved)
			return
		}
	}
	for b := range m.Bonds {
		x := &m.Bonds[b]
		if m.rings.bondIn[b] && f.electrons[x.A] == 1 && f.electrons[x.B] == 1 && x.Order <= 2 {
			x.Order = 1
			if k.mate[x.A] == int32(x.B) {
				x.Order = 2
			}
		}
	}
}

// ringElectrons is the number of π electrons that atom i brings to a ring, -1 when it
// has no p orbital for it.
func (m *Molecule) ringElectrons(i int) int8 {
	if !m.InRing(i) {
		return -1
	}
	a := &m.Atoms[i]
	inRing, outside, polar := 0, 0, false
	for _, h := range m.adjacency[i] {
		switch m.Bonds[h.Bond].Order {
		case 1:
		case 2:
			if m.rings.bondIn[h.Bond] {
				inRing++
			} else {
				outside++
				switch m.Atoms[h.Atom].Element {
				case 7, 8, 16, 34, 52:
					polar = true
				}
			}
		default:
			return -1
		}
	}
	sigma := len(m.adjacency[i]) + a.Hydrogens
	switch a.Element {
	case 5:
		switch {
		case sigma > 3:
		case inRing == 1 && outside == 0:
			return 1
		case inRing+outside == 0 && a.Charge == 0 && sigma == 3:
			return 0
		}
	case 6:
		switch {
		case sigma > 3:
		case inRing == 1 && outside == 0:
			return 1
		case inRing == 0 && outside == 1 && polar:
			return 0
		case inRing+outside == 0 && a.Charge == -1 && sigma == 3:
			return 2
		case inRing+outside == 0 && a.Charge == 1 && sigma == 3:
			return 0
		}
	case 7, 15, 33:
		switch {
		case sigma > 3:
		case inRing == 1:
			return 1
		case inRing+outside == 0 && a.Charge <= 0 && a.Unpaired == 0:
			return 2
		}
	case 8, 16, 34, 52:
		switch {
		case sigma > 2:
		case inRing == 1 && outside == 0 && a.Charge == 1:
			return 1
		case inRing+outside == 0 && a.Charge == 0 && a.Unpaired == 0:
			return 2
		}
	}
	return -1
}
