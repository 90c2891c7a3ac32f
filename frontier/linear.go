package frontier

// orbital is the p orbital of atom i in plane 0 or 1.
func (p *perception) orbital(i, plane int) int32 {
	if plane == 0 {
		return int32(i)
	}
	return int32(p.n + i)
}

func (p *perception) link(a, b int32, bonded bool) {
	p.pairs = append(p.pairs, [2]int32{a, b})
	if bonded {
		p.mate[a], p.mate[b] = b, a
	}
}

// linkOrbitals joins p orbitals across σ bonds. Between atoms with one p orbital each
// there is one link. A linear atom has two, in two planes at right angles: both join
// to those of a linear neighbour; a bent neighbour joins to plane 0 beside a triple
// bond, and along a cumulene to the plane of its double bond, which alternates from
// bond to bond.
func (p *perception) linkOrbitals() {
	m := p.m
	for b := range m.Bonds {
		i, j := m.Bonds[b].A, m.Bonds[b].B
		if !p.has[i] || !p.has[j] {
			continue
		}
		order := p.order[b]
		switch {
		case !p.linear[i] && !p.linear[j]:
			p.link(int32(i), int32(j), order >= 2)
		case p.linear[i] && p.linear[j]:
			if order == 2 && (p.double[i] > 1 || p.double[j] > 1) {
				continue // inner bond of a cumulene, below
			}
			p.link(int32(i), int32(j), order >= 2)
			p.link(int32(p.n+i), int32(p.n+j), order >= 3)
		case order == 1:
			p.link(int32(i), int32(j), false)
			bent, straight := i, j
			if p.linear[i] {
				bent, straight = j, i
			}
			if p.sigma[bent] == 1 && p.charge[bent] < 0 && p.e[bent] == 2 {
				// O−, S−, N2− at the end of a linear chain: a lone pair in each plane
				p.secondPair(bent)
				p.link(int32(p.n+bent), int32(p.n+straight), false)
			}
		}
	}
	for i := range m.Atoms {
		if p.linear[i] && p.double[i] > 1 {
			p.cumulene(i)
		}
	}
}

// secondPair gives atom i a lone pair in a second p orbital.
func (p *perception) secondPair(i int) {
	o := p.n + i
	p.has[o], p.e[o], p.base[o] = true, 2, 2
}

// cumulene walks the chain of double bonds through linear atom i, from its end with
// the lower index, and links it; it does nothing unless i is next to that end.
func (p *perception) cumulene(i int) {
	m := p.m
	for _, h := range m.Neighbours(i) {
		if p.order[h.Bond] != 2 || p.linear[h.Atom] && p.double[h.Atom] > 1 {
			continue
		}
		start := h.Atom
		before, at, bonds := start, i, 1
		for p.linear[at] && p.double[at] > 1 { // find the other end
			next := -1
			for _, g := range m.Neighbours(at) {
				if p.order[g.Bond] == 2 && g.Atom != before {
					next = g.Atom
				}
			}
			if next < 0 || bonds > p.n {
				return
			}
			before, at = at, next
			bonds++
		}
		end := at
		if end < start || end == start {
			continue
		}
		before, at = start, i
		plane := 0
		p.link(p.endOrbital(start), p.orbital(i, 0), true)
		p.endPair(start, end, i, 1)
		for p.linear[at] && p.double[at] > 1 {
			next := -1
			for _, g := range m.Neighbours(at) {
				if p.order[g.Bond] == 2 && g.Atom != before {
					next = g.Atom
				}
			}
			plane = 1 - plane
			if next == end {
				p.link(p.orbital(at, plane), p.endOrbital(end), true)
				p.endPair(end, start, at, 1-plane)
			} else {
				p.link(p.orbital(at, plane), p.orbital(next, plane), true)
				p.link(p.orbital(at, 1-plane), p.orbital(next, 1-plane), false)
			}
			before, at = at, next
		}
		return
	}
}

func (p *perception) endOrbital(end int) int32 { return int32(end) }

// endPair lets the lone pair of a cumulene's end take part in the plane across its
// double bond: O or S of a ketene, isocyanate, carbon dioxide; N of a ketenimine or
// carbodiimide, but not N of an isocyanate, whose O holds that place.
func (p *perception) endPair(end, other, inner, plane int) {
	z, zo := p.m.Atoms[end].Element, p.m.Atoms[other].Element
	chalcogen := func(z int) bool { return z == 8 || z == 16 || z == 34 || z == 52 }
	switch {
	case chalcogen(z) && p.sigma[end] == 1:
	case z == 7 && p.sigma[end] == 2 && p.charge[end] == 0 && !chalcogen(zo):
	default:
		return
	}
	p.secondPair(end)
	p.link(int32(p.n+end), p.orbital(inner, plane), false)
}
