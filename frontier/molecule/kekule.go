package molecule

import "fmt"

// kekulize gives the aromatic atoms of the input alternating double bonds. An atom
// needs one when its written bonds and hydrogens fall short of its valence; the
// question is then one of a perfect matching in the graph of these atoms and of the
// ring bonds between them that were left open or written with a colon.
func (p *smilesParser) kekulize(m *Molecule) error {
	n := len(m.Atoms)
	k := borrowMatcher(m)
	defer k.release()
	needs := k.needs
	var optional []bool // wildcards, which may take part
	for i := range p.atoms {
		r := &p.atoms[i]
		if !r.aromatic {
			if r.element == 0 {
				if optional == nil {
					optional = make([]bool, n)
				}
				optional[i] = true
			}
			continue
		}
		ring := false
		for _, h := range m.adjacency[i] {
			if m.rings.bondIn[h.Bond] {
				ring = true
			}
		}
		if !ring && p.fragment {
			continue
		}
		if !ring {
			return refuse(p.s, r.start, fmt.Sprintf("aromatic %s stands outside a ring", elementName(r.element)), "write it with a capital, or close the ring")
		}
		sum := m.Valence(i)
		v := nextValence(r.element, r.charge, sum)
		if v < 0 {
			return p.tooManyBonds(m, i, sum)
		}
		if v > sum {
			needs[i] = true
		}
	}
	k.optional = optional
	inGraph := func(i int32) bool { return needs[i] || optional != nil && optional[i] }
	aromatic := func(i int32) bool { return p.atoms[i].aromatic || p.atoms[i].element == 0 }
	for b := range p.bonds {
		r := &p.bonds[b]
		switch r.symbol {
		case ':':
			if !p.fragment && (!m.rings.bondIn[b] || !aromatic(r.a) || !aromatic(r.b)) {
				return p.strangeColon(b)
			}
			k.usable[b] = m.rings.bondIn[b] && inGraph(r.a) && inGraph(r.b)
		case 0, '/', '\\':
			k.usable[b] = m.rings.bondIn[b] && inGraph(r.a) && inGraph(r.b)
		}
	}
	k.greedy(needs)
	for i := range needs {
		if needs[i] && k.mate[i] < 0 && !k.augment(i) {
			return p.noKekule(m, i, needs)
		}
	}
	for i := range m.Bonds {
		b := &m.Bonds[i]
		if k.mate[b.A] == int32(b.B) {
			b.Order = 2
		}
	}
	return nil
}

// strangeColon refuses the aromatic bond b between atoms that are not aromatic.
func (p *smilesParser) strangeColon(b int) error {
	r := &p.bonds[b]
	at := p.atoms[r.b].start
	if r.keyB >= 0 {
		at = int(r.keyB)
	}
	return refuse(p.s, at, "an aromatic bond leads here that is in no ring of aromatic atoms", "write the atoms of the ring in lower case, or the bond as -, = or #")
}

// greedy matches atoms with one free neighbour first, so that chains and trees come
// out right at once and few augmenting paths are left to find.
func (k *matcher) greedy(needs []bool) {
	free, ends := k.free, k.ends[:0]
	for i := range needs {
		free[i] = 0
		if !needs[i] {
			continue
		}
		for _, h := range k.m.adjacency[i] {
			if needs[h.Atom] && k.usable[h.Bond] {
				free[i]++
			}
		}
		if free[i] == 1 {
			ends = append(ends, int32(i))
		}
	}
	match := func(v, w int32) {
		k.mate[v], k.mate[w] = w, v
		for _, x := range [2]int32{v, w} {
			for _, h := range k.m.adjacency[x] {
				if needs[h.Atom] && k.mate[h.Atom] < 0 && k.usable[h.Bond] {
					free[h.Atom]--
					if free[h.Atom] == 1 {
						ends = append(ends, int32(h.Atom))
					}
				}
			}
		}
	}
	partner := func(v int32) int32 {
		for _, h := range k.m.adjacency[v] {
			if needs[h.Atom] && k.mate[h.Atom] < 0 && k.usable[h.Bond] {
				return int32(h.Atom)
			}
		}
		return -1
	}
	for i := range needs {
		for len(ends) > 0 {
			v := ends[len(ends)-1]
			ends = ends[:len(ends)-1]
			if k.mate[v] < 0 {
				if w := partner(v); w >= 0 {
					match(v, w)
				}
			}
		}
		if needs[i] && k.mate[i] < 0 {
			if w := partner(int32(i)); w >= 0 {
				match(int32(i), w)
			}
		}
	}
	k.ends = ends
}

// noKekule refuses an aromatic system without a perfect matching. It is placed at the
// nitrogen that most likely lacks its hydrogen, else at the first atom of the system.
func (p *smilesParser) noKekule(m *Molecule, i int, needs []bool) error {
	seen := make([]bool, len(m.Atoms))
	system := []int{i}
	seen[i] = true
	for k := 0; k < len(system); k++ {
		for _, h := range m.adjacency[system[k]] {
			if !seen[h.Atom] && p.atoms[h.Atom].aromatic && m.rings.bondIn[h.Bond] {
				seen[h.Atom] = true
				system = append(system, h.Atom)
			}
		}
	}
	first, nitrogen, count := i, -1, 0
	for _, a := range system {
		first = min(first, a)
		if needs[a] {
			count++
		}
		if r := &p.atoms[a]; (r.element == 7 || r.element == 15) && !r.bracket && len(m.adjacency[a]) == 2 && (nitrogen < 0 || a < nitrogen) {
			nitrogen = a
		}
	}
	how := "they cannot be paired"
	if count%2 == 1 {
		how = "an odd number"
	}
	reason := fmt.Sprintf("no alternating double bonds fit this aromatic system: %d of its %d atoms ask for one, %s", count, len(system), how)
	if nitrogen >= 0 {
		if p.atoms[nitrogen].element == 15 {
			return refuse(p.s, p.atoms[nitrogen].start, reason, "write [pH] for the phosphorus that carries hydrogen")
		}
		return refuse(p.s, p.atoms[nitrogen].start, reason, "write [nH] for the nitrogen that carries hydrogen, or [n+] or [n-] for a charged one")
	}
	return refuse(p.s, p.atoms[first].start, reason, "write [nH], o or s for the atom that brings a lone pair, [cH-] or [cH+] for an ion, or capitals where the ring is not aromatic")
}
