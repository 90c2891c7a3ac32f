package molecule

import (
	"math/bits"
	"sort"
)

// ringSet holds what is known about the rings of a finished molecule.
type ringSet struct {
	rings    [][]int // cyclic atom lists
	bonds    [][]int // bonds[r][k] joins rings[r][k] and rings[r][k+1]
	ofAtom   [][]int // rings of each atom, nil for a molecule without rings
	bondIn   []bool  // bond lies in some ring
	smallest []int   // size of the smallest ring of the set each bond lies in
}

// findRingBonds marks the bonds that are no bridges, by depth-first search with low
// points (Tarjan, Inform. Process. Lett. 2, 160 (1974)), without recursion.
func (m *Molecule) findRingBonds() {
	m.rings = &ringSet{}
	n := len(m.Atoms)
	if len(m.Bonds) == 0 {
		return
	}
	m.rings.bondIn = make([]bool, len(m.Bonds))
	depth := make([]int32, 4*n) // depth, low point, bond to parent, next neighbour
	low := depth[n : 2*n]
	up := depth[2*n : 3*n]
	next := depth[3*n:]
	depth = depth[:n]
	stack := make([]int32, 0, n)
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
				if int32(h.Bond) == up[v] {
					continue
				}
				if depth[h.Atom] != 0 {
					m.rings.bondIn[h.Bond] = true
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
					m.rings.bondIn[up[v]] = true
				}
			}
		}
	}
}

// perceiveRings finds a smallest set of smallest rings: in each ring system, the
// shortest linearly independent cycles (a minimum cycle basis). Candidates are the
// cycles that a breadth-first tree from each branching atom closes (Horton, SIAM J.
// Comput. 16, 358 (1987)); they are taken by size, then by their atoms, and kept when
// independent over GF(2).
func (m *Molecule) perceiveRings() error {
	m.findRingBonds()
	rs := m.rings
	n := len(m.Atoms)
	var system []int32 // ring system of each atom, by ring bonds
	for i := range m.Atoms {
		for _, h := range m.adjacency[i] {
			if rs.bondIn[h.Bond] {
				if system == nil {
					system = make([]int32, n)
				}
				if system[i] == 0 {
					m.ringsOfSystem(i, system)
				}
				break
			}
		}
	}
	if len(rs.rings) == 0 {
		return nil
	}
	rs.ofAtom = make([][]int, n)
	rs.smallest = make([]int, len(m.Bonds))
	for r, ring := range rs.rings {
		for k, a := range ring {
			rs.ofAtom[a] = append(rs.ofAtom[a], r)
			b := rs.bonds[r][k]
			if rs.smallest[b] == 0 || len(ring) < rs.smallest[b] {
				rs.smallest[b] = len(ring)
			}
		}
	}
	return nil
}

// ringsOfSystem adds the rings of the ring system that atom start belongs to.
func (m *Molecule) ringsOfSystem(start int, system []int32) {
	rs := m.rings
	atoms := []int{start}
	system[start] = 1
	edges := 0
	for k := 0; k < len(atoms); k++ {
		for _, h := range m.adjacency[atoms[k]] {
			if !rs.bondIn[h.Bond] {
				continue
			}
			edges++
			if system[h.Atom] == 0 {
				system[h.Atom] = 1
				atoms = append(atoms, h.Atom)
			}
		}
	}
	edges /= 2
	rank := edges - len(atoms) + 1
	sort.Ints(atoms)
	ringDegree := func(a int) int {
		d := 0
		for _, h := range m.adjacency[a] {
			if rs.bondIn[h.Bond] {
				d++
			}
		}
		return d
	}
	type candidate struct {
		atoms, bonds []int
	}
	var found []candidate
	dist := make(map[int]int)
	up := make(map[int]Half)
	for _, root := range atoms {
		if rank > 1 && ringDegree(root) < 3 {
			continue
		}
		clear(dist)
		queue := []int{root}
		dist[root] = 0
		up[root] = Half{-1, -1}
		for k := 0; k < len(queue); k++ {
			v := queue[k]
			for _, h := range m.adjacency[v] {
				if !rs.bondIn[h.Bond] {
					continue
				}
				if _, ok := dist[h.Atom]; !ok {
					dist[h.Atom] = dist[v] + 1
					up[h.Atom] = Half{v, h.Bond}
					queue = append(queue, h.Atom)
				}
			}
		}
		for _, v := range queue {
			for _, h := range m.adjacency[v] {
				w := h.Atom
				if !rs.bondIn[h.Bond] || v > w || up[v].Bond == h.Bond || up[w].Bond == h.Bond {
					continue
				}
				c := candidate{}
				for x := v; x != root; x = up[x].Atom {
					c.atoms = append(c.atoms, x)
					c.bonds = append(c.bonds, up[x].Bond)
				}
				simple := true
				var other []int
				var otherBonds []int
				for x := w; x != root; x = up[x].Atom {
					other = append(other, x)
					otherBonds = append(otherBonds, up[x].Bond)
					for _, y := range c.atoms {
						if x == y {
							simple = false
						}
					}
				}
				if !simple {
					continue
				}
				c.atoms = append(c.atoms, root)
				for k := len(other) - 1; k >= 0; k-- {
					c.atoms = append(c.atoms, other[k])
					c.bonds = append(c.bonds, otherBonds[k])
				}
				c.bonds = append(c.bonds, h.Bond)
				found = append(found, c)
			}
		}
		if rank == 1 {
			break
		}
	}
	for i := range found {
		found[i].atoms, found[i].bonds = normalRing(found[i].atoms, found[i].bonds)
	}
	sort.SliceStable(found, func(i, j int) bool {
		a, b := found[i].atoms, found[j].atoms
		if len(a) != len(b) {
			return len(a) < len(b)
		}
		for k := range a {
			if a[k] != b[k] {
				return a[k] < b[k]
			}
		}
		return false
	})
	index := map[int]int{}
	for _, a := range atoms {
		for _, h := range m.adjacency[a] {
			if rs.bondIn[h.Bond] {
				if _, ok := index[h.Bond]; !ok {
					index[h.Bond] = len(index)
				}
			}
		}
	}
	words := (len(index) + 63) / 64
	pivots := map[int][]uint64{}
	kept := 0
	for _, c := range found {
		row := make([]uint64, words)
		for _, b := range c.bonds {
			row[index[b]/64] ^= 1 << (index[b] % 64)
		}
		pivot := -1
		for w := 0; w < words; {
			if row[w] == 0 {
				w++
				continue
			}
			bit := w*64 + bits.TrailingZeros64(row[w])
			p, ok := pivots[bit]
			if !ok {
				pivot = bit
				break
			}
			for k := w; k < words; k++ {
				row[k] ^= p[k]
			}
		}
		if pivot < 0 {
			continue
		}
		pivots[pivot] = row
		rs.rings = append(rs.rings, c.atoms)
		rs.bonds = append(rs.bonds, c.bonds)
		kept++
		if kept == rank {
			break
		}
	}
}

// normalRing turns a ring so that it begins with its smallest atom and goes on to the
// smaller of that atom's neighbours.
func normalRing(atoms, bonds []int) ([]int, []int) {
	n := len(atoms)
	at := 0
	for i := range atoms {
		if atoms[i] < atoms[at] {
			at = i
		}
	}
	forward := atoms[(at+1)%n] < atoms[(at+n-1)%n]
	a, b := make([]int, n), make([]int, n)
	for k := range a {
		if forward {
			a[k], b[k] = atoms[(at+k)%n], bonds[(at+k)%n]
		} else {
			a[k], b[k] = atoms[(at-k+n)%n], bonds[(at-k-1+2*n)%n]
		}
	}
	return a, b
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
	var sizes []int
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
	return m.rings.smallest[b]
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
