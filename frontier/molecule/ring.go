package molecule

import "sort"

// ringSet holds what is known about the rings of a finished molecule.
type ringSet struct {
	rings    [][]int // cyclic atom lists
	bonds    [][]int // bonds[r][k] joins rings[r][k] and rings[r][k+1]
	ofAtom   [][]int // rings of each atom, nil for a molecule without rings
	bondIn   []bool  // bond lies in some ring
	smallest []int32 // size of the smallest ring of the set each bond lies in

	// extra holds rings that could stand in the set in place of others of their
	// size, as the sixth face of a cube, so that what is perceived from rings does not
	// depend on the choice.
	extra, extraBonds [][]int
}

// findRingBonds marks the bonds that are no bridges, by depth-first search with low
// points (Tarjan, Inform. Process. Lett. 2, 160 (1974)), without recursion.
func (m *Molecule) findRingBonds() {
	m.rings = &ringSet{}
	if len(m.Bonds) > 0 {
		m.rings.bondIn = m.ringBonds(nil)
	}
}

// ringBonds does so in the graph of the bonds allowed, or of all.
func (m *Molecule) ringBonds(allowed []bool) []bool {
	n := len(m.Atoms)
	bondIn := make([]bool, len(m.Bonds))
	scratch := counters.Get().(*[]int32)
	defer counters.Put(scratch)
	depth := sized(*scratch, 5*n) // depth, low point, bond to parent, next neighbour, stack
	*scratch = depth
	clear(depth)
	stack := depth[4*n : 4*n]
	low := depth[n : 2*n]
	up := depth[2*n : 3*n]
	next := depth[3*n : 4*n]
	depth = depth[:n]
	for root := range m.Atoms {
		if depth[root] != 0 {
			continue
		}
		depth[root], low[root], up[root] = 1, 1, -1
		stack = append(stack[:0], int32(root))
		for len(stack) > 0 {
			v := stack[len(stack)-1]
			if int(next[v]) < len(m.adjacency[v]) {
				h := m.adjacency[v][next[v]]
				next[v]++
				if int32(h.Bond) == up[v] || allowed != nil && !allowed[h.Bond] {
					continue
				}
				if depth[h.Atom] != 0 {
					bondIn[h.Bond] = true
					low[v] = min(low[v], depth[h.Atom])
					continue
				}
				depth[h.Atom] = depth[v] + 1
				low[h.Atom] = depth[h.Atom]
				up[h.Atom] = int32(h.Bond)
				stack = append(stack, int32(h.Atom))
				continue
			}
			stack = stack[:len(stack)-1]
			if up[v] >= 0 {
				parent := m.Other(int(up[v]), int(v))
				low[parent] = min(low[parent], low[v])
				if low[v] <= depth[parent] {
					bondIn[up[v]] = true
				}
			}
		}
	}
	return bondIn
}

// Rings returns a smallest set of smallest rings, each as a cyclic list of atoms that
// begins with its lowest index; ordered by ring system, size, then atoms. The slices
// are the molecule's own: do not change them.
func (m *Molecule) Rings() [][]int { return m.rings.rings }

// InRing tells whether the atom lies in a ring.
func (m *Molecule) InRing(atom int) bool {
	return m.rings.ofAtom != nil && len(m.rings.ofAtom[atom]) > 0
}

// BondInRing tells whether the bond lies in a ring.
func (m *Molecule) BondInRing(b int) bool { return len(m.rings.bondIn) > 0 && m.rings.bondIn[b] }

// RingsOf lists the indices in [Molecule.Rings] of the rings that hold the atom.
func (m *Molecule) RingsOf(atom int) []int {
	if m.rings.ofAtom == nil {
		return nil
	}
	return m.rings.ofAtom[atom]
}

// RingSizes lists the sizes of the rings of the set that hold the atom, ascending.
func (m *Molecule) RingSizes(atom int) []int {
	sizes := make([]int, 0, len(m.RingsOf(atom)))
	for _, r := range m.RingsOf(atom) {
		sizes = append(sizes, len(m.rings.rings[r]))
	}
	return sizes
}

// smallestRing is the size of the smallest ring of the set that holds bond b, or 0.
func (m *Molecule) smallestRing(b int) int {
	if m.rings.smallest == nil {
		return 0
	}
	return int(m.rings.smallest[b])
}

// RingSystems lists the ring systems: sets of ring atoms joined by ring bonds, so that
// fused, bridged and spiro rings fall together; each ascending, ordered by first atom.
func (m *Molecule) RingSystems() [][]int {
	var systems [][]int
	if len(m.rings.rings) == 0 {
		return nil
	}
	seen := make([]bool, len(m.Atoms))
	for i := range m.Atoms {
		if seen[i] || !m.InRing(i) {
			continue
		}
		seen[i] = true
		system := []int{i}
		for k := 0; k < len(system); k++ {
			for _, h := range m.adjacency[system[k]] {
				if m.rings.bondIn[h.Bond] && !seen[h.Atom] {
					seen[h.Atom] = true
					system = append(system, h.Atom)
				}
			}
		}
		sort.Ints(system)
		systems = append(systems, system)
	}
	return systems
}
