package molecule

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
	electrons := make([]int8, len(m.Atoms))
	for i := range m.Atoms {
		electrons[i] = m.ringElectrons(i)
	}
	mark := func(atoms, bonds []int) {
		for _, a := range atoms {
			m.Atoms[a].Aromatic = true
		}
		for _, b := range bonds {
			m.Bonds[b].Aromatic = true
		}
	}
	sum := func(atoms []int) int {
		s := 0
		for _, a := range atoms {
			if electrons[a] < 0 {
				return -1
			}
			s += int(electrons[a])
		}
		return s
	}
	for r, ring := range rs.rings {
		if s := sum(ring); s >= 2 && s%4 == 2 {
			mark(ring, rs.bonds[r])
		}
	}
	for r, ring := range rs.rings {
		for q := r + 1; q < len(rs.rings); q++ {
			shared := 0
			for _, b := range rs.bonds[r] {
				for _, c := range rs.bonds[q] {
					if b == c {
						shared++
					}
				}
			}
			if shared != 1 {
				continue
			}
			a, b := sum(ring), sum(rs.rings[q])
			if a < 0 || b < 0 || a%4 == 2 && b%4 == 2 {
				continue
			}
			union := map[int]bool{}
			for _, x := range ring {
				union[x] = true
			}
			for _, x := range rs.rings[q] {
				union[x] = true
			}
			s := 0
			for x := range union {
				s += int(electrons[x])
			}
			if s%4 == 2 {
				mark(ring, rs.bonds[r])
				mark(rs.rings[q], rs.bonds[q])
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
	sigma := m.Degree(i) + a.Hydrogens
	switch a.Element {
	case 5:
		switch {
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
		case inRing+outside == 0 && a.Charge == -1:
			return 2
		case inRing+outside == 0 && a.Charge == 1:
			return 0
		}
	case 7, 15, 33:
		switch {
		case sigma > 3:
		case inRing == 1:
			return 1
		case inRing+outside == 0 && a.Charge <= 0:
			return 2
		}
	case 8, 16, 34, 52:
		switch {
		case sigma > 2:
		case inRing == 1 && a.Charge == 1:
			return 1
		case inRing+outside == 0 && a.Charge == 0:
			return 2
		}
	}
	return -1
}
