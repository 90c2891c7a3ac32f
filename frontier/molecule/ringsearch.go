package molecule

import (
	"fmt"
	"math/bits"
	"slices"
	"sync"
)

// Limits of one ring system: its number of rings, the size up to which rings are always
// found by a search that looks no farther, and the work (branching atoms times bonds)
// that a search without that bound may cost. Rings that could stand in the set in place of
// others are kept up to the size of the largest aromatic circuit; where there are more than
// maxFarExtra that are larger than sureExtraRing, none of these.
const (
	maxSystemRings = 1024
	nearRing       = 11
	maxRingWork    = 1 << 19
	sureExtraRing  = 8
	maxExtraRing   = maxCircuit
	maxFarExtra    = 64
)

// ringSearch finds the rings of one ring system at a time.
type ringSearch struct {
	m     *Molecule
	atoms []int32 // of the system, ascending
	local []int32 // index in atoms, by atom of the molecule
	start []int32 // neighbours along ring bonds
	nbr   []int32
	bond  []int32 // local bond index of each
	bonds []int32 // bond of the molecule, by local index

	dist, up, upBond []int32
	queue            []int32
	arena            []int32 // bonds of the candidates, one after another
	found            []ringCandidate

	words  int
	rows   []uint64 // reduced rows of the rings kept, words each
	sizes  []int32  // size of the ring of each row
	pivot  []int32  // one more than the row with that leading bond
	row    []uint64
	keys   map[uint64]bool // hashes of the candidates found
	system []bool          // by atom: its system has been dealt with
}

// ringCandidate is a cycle: a stretch of the arena.
type ringCandidate struct{ from, size int32 }

var ringSearches = sync.Pool{New: func() any { return &ringSearch{keys: map[uint64]bool{}} }}

// perceiveRings finds a smallest set of smallest rings: in each ring system, the
// shortest linearly independent cycles (a minimum cycle basis). Candidates are the
// cycles that breadth-first trees from the branching atoms close (Horton, SIAM J.
// Comput. 16, 358 (1987)); they are taken by size and kept when independent over GF(2).
func (m *Molecule) perceiveRings() error {
	if m.rings == nil {
		m.findRingBonds()
	}
	rs := m.rings
	if len(m.Bonds) < len(m.Atoms) && !slices.Contains(rs.bondIn, true) {
		return nil
	}
	s := ringSearches.Get().(*ringSearch)
	defer func() {
		s.m = nil
		if cap(s.local) <= 4096 && cap(s.arena) <= 1<<16 {
			ringSearches.Put(s)
		}
	}()
	n := len(m.Atoms)
	s.m = m
	s.local = sized(s.local, n)
	s.system = sized(s.system, n)
	clear(s.system)
	for i := range m.Atoms {
		if s.system[i] {
			continue
		}
		for _, h := range m.adjacency[i] {
			if rs.bondIn[h.Bond] {
				if err := s.perceive(i); err != nil {
					return err
				}
				break
			}
		}
	}
	rs.index(m)
	return nil
}

// index lists the rings by atom and the smallest ring by bond.
func (rs *ringSet) index(m *Molecule) {
	if len(rs.rings) == 0 {
		return
	}
	n := 0
	scratch := counters.Get().(*[]int32)
	defer counters.Put(scratch)
	counts := sized(*scratch, len(m.Atoms))
	*scratch = counts
	clear(counts)
	for _, ring := range rs.rings {
		n += len(ring)
		for _, a := range ring {
			counts[a]++
		}
	}
	all := make([]int, n)
	rs.ofAtom = make([][]int, len(m.Atoms))
	rs.smallest = make([]int32, len(m.Bonds))
	at := 0
	for a, c := range counts {
		if c > 0 {
			rs.ofAtom[a] = all[at : at : at+int(c)]
			at += int(c)
		}
	}
	for r, ring := range rs.rings {
		for k, a := range ring {
			rs.ofAtom[a] = append(rs.ofAtom[a], r)
			b := rs.bonds[r][k]
			if rs.smallest[b] == 0 || int32(len(ring)) < rs.smallest[b] {
				rs.smallest[b] = int32(len(ring))
			}
		}
	}
}

// perceive adds the rings of the ring system of atom first.
func (s *ringSearch) perceive(first int) error {
	m, rs := s.m, s.m.rings
	s.atoms = append(s.atoms[:0], int32(first))
	s.system[first] = true
	ends := 0
	for k := 0; k < len(s.atoms); k++ {
		for _, h := range m.adjacency[s.atoms[k]] {
			if !rs.bondIn[h.Bond] {
				continue
			}
			ends++
			if !s.system[h.Atom] {
				s.system[h.Atom] = true
				s.atoms = append(s.atoms, int32(h.Atom))
			}
		}
	}
	edges := ends / 2
	rank := edges - len(s.atoms) + 1
	if rank == 1 {
		s.walk(first)
		return nil
	}
	if rank > maxSystemRings {
		return m.refuseAtom(first, fmt.Sprintf("the ring system that begins here has %d rings, at most %d are handled", rank, maxSystemRings), "give smaller structures")
	}
	s.load(ends)
	rings, extra := len(rs.rings), len(rs.extra)
	if !s.collect(rank, nearRing) {
		roots := 0
		for v := range s.atoms {
			if s.start[v+1]-s.start[v] > 2 {
				roots++
			}
		}
		if roots*edges > maxRingWork {
			return m.refuseAtom(first, "the ring system that begins here has rings too large and too interwoven to be found", "give smaller structures")
		}
		rs.rings, rs.bonds = rs.rings[:rings], rs.bonds[:rings]
		rs.extra, rs.extraBonds = rs.extra[:extra], rs.extraBonds[:extra]
		s.collect(rank, edges)
	}
	order := make([]int, len(rs.rings)-rings)
	for k := range order {
		order[k] = rings + k
	}
	slices.SortFunc(order, func(a, b int) int {
		if c := len(rs.rings[a]) - len(rs.rings[b]); c != 0 {
			return c
		}
		return slices.Compare(rs.rings[a], rs.rings[b])
	})
	for k, r := range order {
		order[k] = r - rings
	}
	permute(rs.rings[rings:], order)
	permute(rs.bonds[rings:], order)
	return nil
}

// permute puts the entry at order[k] to place k.
func permute(lists [][]int, order []int) {
	old := slices.Clone(lists)
	for k, o := range order {
		lists[k] = old[o]
	}
}

// walk adds the only ring of a system that is one ring.
func (s *ringSearch) walk(first int) {
	m, rs := s.m, s.m.rings
	n := len(s.atoms)
	buffer := make([]int, 2*n)
	atoms, bonds := buffer[:0:n], buffer[n:n:2*n]
	at, from := first, -1
	for range n {
		atoms = append(atoms, at)
		// From the lowest atom, which the system begins with, to its lower neighbour.
		best := Half{-1, -1}
		for _, h := range m.adjacency[at] {
			if rs.bondIn[h.Bond] && h.Bond != from && (best.Atom < 0 || h.Atom < best.Atom) {
				best = h
			}
		}
		bonds = append(bonds, best.Bond)
		at, from = best.Atom, best.Bond
	}
	rs.rings = append(rs.rings, atoms)
	rs.bonds = append(rs.bonds, bonds)
}

// load builds the local graph of the system.
func (s *ringSearch) load(ends int) {
	m, rs := s.m, s.m.rings
	slices.Sort(s.atoms)
	n := len(s.atoms)
	for i, a := range s.atoms {
		s.local[a] = int32(i)
	}
	s.start = sized(s.start, n+1)
	s.nbr = sized(s.nbr, ends)
	s.bond = sized(s.bond, ends)
	s.bonds = s.bonds[:0]
	at := int32(0)
	for i, a := range s.atoms {
		s.start[i] = at
		for _, h := range m.adjacency[a] {
			if !rs.bondIn[h.Bond] {
				continue
			}
			w := s.local[h.Atom]
			s.nbr[at] = w
			if int(w) > i {
				s.bond[at] = int32(len(s.bonds))
				s.bonds = append(s.bonds, int32(h.Bond))
			} else {
				for e := s.start[w]; e < s.start[w+1]; e++ {
					if s.nbr[e] == int32(i) {
						s.bond[at] = s.bond[e]
						break
					}
				}
			}
			at++
		}
	}
	s.start[n] = at
	s.dist = sized(s.dist, n)
	s.up = sized(s.up, n)
	s.upBond = sized(s.upBond, n)
	for i := range s.dist {
		s.dist[i] = -1
	}
}

// collect finds the rings of the system among the cycles of at most limit atoms; false
// when these do not suffice.
func (s *ringSearch) collect(rank, limit int) bool {
	s.arena, s.found = s.arena[:0], s.found[:0]
	clear(s.keys)
	for root := range s.atoms {
		if s.start[root+1]-s.start[root] > 2 {
			s.tree(int32(root), limit)
		}
	}
	slices.SortStableFunc(s.found, func(a, b ringCandidate) int { return int(a.size - b.size) })
	s.words = (len(s.bonds) + 63) / 64
	s.rows, s.sizes = s.rows[:0], s.sizes[:0]
	s.pivot = sized(s.pivot, len(s.bonds))
	clear(s.pivot)
	s.row = sized(s.row, s.words)
	kept := 0
	rs := s.m.rings
	near, far := len(rs.extra), 0
	for _, c := range s.found {
		if kept == rank && c.size > maxExtraRing {
			break
		}
		independent, relevant := s.reduce(c)
		switch {
		case independent && kept < rank:
			kept++
			s.keep(c, &rs.rings, &rs.bonds)
		case relevant && c.size <= sureExtraRing:
			s.keep(c, &rs.extra, &rs.extraBonds)
			near = len(rs.extra)
		case relevant && c.size <= maxExtraRing:
			if far++; far <= maxFarExtra {
				s.keep(c, &rs.extra, &rs.extraBonds)
			}
		}
	}
	if far > maxFarExtra {
		rs.extra, rs.extraBonds = rs.extra[:near], rs.extraBonds[:near]
	}
	return kept == rank
}

// tree grows a breadth-first tree from root and adds the cycles that it closes through
// root.
func (s *ringSearch) tree(root int32, limit int) {
	depth := int32(limit / 2)
	s.queue = append(s.queue[:0], root)
	s.dist[root], s.up[root], s.upBond[root] = 0, -1, -1
	for head := 0; head < len(s.queue); head++ {
		v := s.queue[head]
		for e := s.start[v]; e < s.start[v+1]; e++ {
			w := s.nbr[e]
			if s.dist[w] < 0 {
				if s.dist[v] < depth {
					s.dist[w], s.up[w], s.upBond[w] = s.dist[v]+1, v, s.bond[e]
					s.queue = append(s.queue, w)
				}
				continue
			}
			if s.bond[e] == s.upBond[v] || s.bond[e] == s.upBond[w] || s.dist[w] > s.dist[v] || s.dist[w] == s.dist[v] && w > v {
				continue
			}
			if size := s.dist[v] + s.dist[w] + 1; int(size) <= limit {
				s.close(v, w, s.bond[e], size)
			}
		}
	}
	for _, v := range s.queue {
		s.dist[v] = -1
	}
}

// close adds the cycle of the tree paths to v and w and the bond between them, when the
// paths meet at the root only.
func (s *ringSearch) close(v, w, bond, size int32) {
	x, y := v, w
	for s.dist[x] > s.dist[y] {
		x = s.up[x]
	}
	for x != y {
		x, y = s.up[x], s.up[y]
	}
	if s.dist[x] > 0 {
		return
	}
	key := mix(1, uint64(bond))
	for _, x := range [2]int32{v, w} {
		for ; s.up[x] >= 0; x = s.up[x] {
			key += mix(1, uint64(s.upBond[x])) // the order does not matter
		}
	}
	if s.keys[key] {
		return // found from another of its atoms
	}
	s.keys[key] = true
	s.found = append(s.found, ringCandidate{from: int32(len(s.arena)), size: size})
	s.arena = append(s.arena, bond)
	for _, x := range [2]int32{v, w} {
		for ; s.up[x] >= 0; x = s.up[x] {
			s.arena = append(s.arena, s.upBond[x])
		}
	}
}

// reduce subtracts the rows of the rings kept so far from a candidate. It is independent
// when something is left, which becomes a row, and relevant when something was left
// before rings of its own size were subtracted.
func (s *ringSearch) reduce(c ringCandidate) (independent, relevant bool) {
	clear(s.row)
	for _, b := range s.arena[c.from : c.from+c.size] {
		s.row[b/64] |= 1 << (b % 64)
	}
	for w := 0; w < s.words; {
		if s.row[w] == 0 {
			w++
			continue
		}
		b := w*64 + bits.TrailingZeros64(s.row[w])
		p := s.pivot[b]
		if p == 0 {
			s.pivot[b] = int32(len(s.sizes) + 1)
			s.rows = append(s.rows, s.row...)
			s.sizes = append(s.sizes, c.size)
			return true, true
		}
		if s.sizes[p-1] == c.size {
			relevant = true
		}
		r := s.rows[int(p-1)*s.words : int(p)*s.words]
		for k := w; k < s.words; k++ {
			s.row[k] ^= r[k]
		}
	}
	return false, relevant
}

// keep adds a candidate to a list of rings, turned so as to begin with its lowest atom
// and to go on to the lower of that atom's neighbours.
func (s *ringSearch) keep(c ringCandidate, rings, ringBonds *[][]int) {
	m := s.m
	n := int(c.size)
	buffer := make([]int, 2*n)
	atoms, bonds := buffer[:0:n], buffer[n:n:2*n]
	left := s.queue[:0]
	for _, b := range s.arena[c.from : c.from+c.size] {
		left = append(left, s.bonds[b])
	}
	s.queue = left
	lowest := len(m.Atoms)
	for _, b := range left {
		lowest = min(lowest, m.Bonds[b].A, m.Bonds[b].B)
	}
	// The candidate's bonds lie in two paths, so the next bond is found by looking; for
	// long rings by a table.
	var next map[int][2]int32
	if n > 32 {
		next = make(map[int][2]int32, n)
		for _, b := range left {
			for _, a := range [2]int{m.Bonds[b].A, m.Bonds[b].B} {
				p := next[a]
				next[a] = [2]int32{b + 1, p[0]}
			}
		}
	}
	at, from := lowest, int32(-1)
	for range n {
		best := Half{-1, -1}
		look := func(b int32) {
			if b == from {
				return
			}
			x := &m.Bonds[b]
			if x.A != at && x.B != at {
				return
			}
			if o := x.A + x.B - at; best.Atom < 0 || o < best.Atom {
				best = Half{o, int(b)}
			}
		}
		if next != nil {
			p := next[at]
			look(p[0] - 1)
			look(p[1] - 1)
		} else {
			for _, b := range left {
				look(b)
			}
		}
		atoms = append(atoms, at)
		bonds = append(bonds, best.Bond)
		at, from = best.Atom, int32(best.Bond)
	}
	*rings = append(*rings, atoms)
	*ringBonds = append(*ringBonds, bonds)
}
