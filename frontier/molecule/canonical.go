package molecule

import "sort"

// ranks refines the invariants of the atoms by those of their neighbours.
func (m *Molecule) ranks() []int {
	n := len(m.Atoms)
	rank := make([]int, n)
	order := make([]int, n)
	keys := make([][]int, n)
	for i := range order {
		order[i] = i
		a := &m.Atoms[i]
		keys[i] = []int{a.Element, a.Isotope, a.Charge, a.Hydrogens, len(m.adjacency[i]), a.Unpaired}
	}
	count := assignRanks(order, keys, rank)
	for {
		m.neighbourKeys(rank, keys)
		c := assignRanks(order, keys, rank)
		if c == count {
			return rank
		}
		count = c
	}
}

func (m *Molecule) neighbourKeys(rank []int, keys [][]int) {
	for i := range keys {
		k := keys[i][:0]
		for _, h := range m.adjacency[i] {
			l := m.Bonds[h.Bond].Order
			if m.Bonds[h.Bond].Aromatic {
				l = 5
			}
			k = append(k, rank[h.Atom]*8+l)
		}
		sort.Ints(k)
		keys[i] = append([]int{rank[i]}, k...)
	}
}

func assignRanks(order []int, keys [][]int, rank []int) int {
	less := func(a, b []int) int {
		for k := 0; k < len(a) && k < len(b); k++ {
			if a[k] != b[k] {
				return a[k] - b[k]
			}
		}
		return len(a) - len(b)
	}
	sort.SliceStable(order, func(i, j int) bool { return less(keys[order[i]], keys[order[j]]) < 0 })
	count := 0
	for k, i := range order {
		if k == 0 || less(keys[order[k-1]], keys[i]) != 0 {
			count = k
		}
		rank[i] = count
	}
	distinct := 0
	for k := range order {
		if k == 0 || rank[order[k]] != rank[order[k-1]] {
			distinct++
		}
	}
	return distinct
}

// Classes gives for each atom the smallest index of an atom equivalent to it.
func (m *Molecule) Classes() []int {
	rank := m.ranks()
	first := map[int]int{}
	out := make([]int, len(rank))
	for i, r := range rank {
		if _, ok := first[r]; !ok {
			first[r] = i
		}
		out[i] = first[r]
	}
	return out
}

// CanonicalOrder gives the place of each atom in the canonical numbering, from 0.
func (m *Molecule) CanonicalOrder() []int {
	rank := m.ranks()
	n := len(rank)
	order := make([]int, n)
	keys := make([][]int, n)
	for i := range order {
		order[i] = i
	}
	sort.SliceStable(order, func(i, j int) bool { return rank[order[i]] < rank[order[j]] })
	for {
		tie := -1
		for k := 1; k < n; k++ {
			if rank[order[k]] == rank[order[k-1]] {
				tie = k
				break
			}
		}
		if tie < 0 {
			return rank
		}
		for k := tie; k < n && rank[order[k]] == tie-1; k++ {
			rank[order[k]] = tie
		}
		count := -1
		for {
			m.neighbourKeys(rank, keys)
			c := assignRanks(order, keys, rank)
			if c == count {
				break
			}
			count = c
		}
	}
}
