package place

import (
	"fmt"
	"sort"
	"sync"

	"lobecast/frontier/molecule"
)

// frame is a skeleton read as a graph.
type frame struct {
	name   string
	m      *molecule.Molecule
	number []string // locant of each atom, exocyclic for atoms outside the rings
	order  []int    // ring atoms in an order in which each but the first has an earlier neighbour
	parent []int    // that neighbour, as a position in order
}

// frames groups the skeletons by the outline of their ring atoms.
var frames = sync.OnceValue(func() map[string][]*frame {
	byOutline := map[string][]*frame{}
	for i := range skeletons {
		s := &skeletons[i]
		m, err := molecule.ParseSMILES(s.smiles)
		if err != nil {
			panic(fmt.Sprintf("place: skeleton %s: %v", s.name, err))
		}
		f := &frame{name: s.name, m: m, number: s.numbers()}
		if len(f.number) != len(m.Atoms) {
			panic(fmt.Sprintf("place: skeleton %s has %d atoms and %d locants", s.name, len(m.Atoms), len(f.number)))
		}
		var ring []int
		for a := range m.Atoms {
			if f.number[a] != exocyclic {
				ring = append(ring, a)
			}
		}
		f.walk(ring)
		key := outline(m, ring)
		byOutline[key] = append(byOutline[key], f)
	}
	return byOutline
})

// walk puts the ring atoms into breadth-first order.
func (f *frame) walk(ring []int) {
	position := map[int]int{ring[0]: 0}
	f.order, f.parent = []int{ring[0]}, []int{-1}
	for k := 0; k < len(f.order); k++ {
		for _, h := range f.m.Neighbours(f.order[k]) {
			if _, seen := position[h.Atom]; seen || f.number[h.Atom] == exocyclic {
				continue
			}
			position[h.Atom] = len(f.order)
			f.order = append(f.order, h.Atom)
			f.parent = append(f.parent, k)
		}
	}
}

// outline is a key that two ring systems with the same elements and bonds share.
func outline(m *molecule.Molecule, ring []int) string {
	in := make(map[int]bool, len(ring))
	for _, a := range ring {
		in[a] = true
	}
	var marks []int
	for _, a := range ring {
		degree := 0
		for _, h := range m.Neighbours(a) {
			if in[h.Atom] {
				degree++
			}
		}
		marks = append(marks, m.Atoms[a].Element*10+degree)
	}
	sort.Ints(marks)
	return fmt.Sprint(marks)
}

// fit is one way of laying a frame over a ring system.
type fit struct {
	frame  *frame
	locant map[int]string // atom of the molecule → locant
	score  int            // agreement in aromaticity and in the kind of each atom
	low    []int          // ranks of the locants that carry substituents, ascending
}

// better tells whether f describes the molecule better than g: more agreement first,
// then the lower substituent locants.
func (f *fit) better(g *fit) bool {
	if g == nil {
		return true
	}
	if f.score != g.score {
		return f.score > g.score
	}
	for i := range f.low {
		if i >= len(g.low) || f.low[i] != g.low[i] {
			return i < len(g.low) && f.low[i] < g.low[i]
		}
	}
	return false
}

// lay finds the best way of laying any frame over the ring atoms of m, or nil. It may
// stop at a bound on the number of ways tried, which only symmetric frames reach.
func lay(m *molecule.Molecule, ring []int) *fit {
	if len(ring) > 24 {
		return nil
	}
	var best *fit
	in := make(map[int]bool, len(ring))
	for _, a := range ring {
		in[a] = true
	}
	for _, f := range frames()[outline(m, ring)] {
		at := make([]int, len(f.order))
		used := map[int]bool{}
		var place func(k int)
		place = func(k int) {
			if k == len(f.order) {
				if x := f.judge(m, in, at); x != nil && x.better(best) {
					best = x
				}
				return
			}
			var choices []int
			if k == 0 {
				choices = ring
			} else {
				for _, h := range m.Neighbours(at[f.parent[k]]) {
					if in[h.Atom] {
						choices = append(choices, h.Atom)
					}
				}
			}
		next:
			for _, a := range choices {
				if used[a] || m.Atoms[a].Element != f.m.Atoms[f.order[k]].Element {
					continue
				}
				for j := 0; j < k; j++ {
					if (f.m.BondBetween(f.order[j], f.order[k]) >= 0) != (m.BondBetween(at[j], a) >= 0) {
						continue next
					}
				}
				at[k], used[a] = a, true
				place(k + 1)
				delete(used, a)
			}
		}
		place(0)
	}
	return best
}

// Weights of agreement: what belongs to the name must be there; then aromaticity,
// then which nitrogen carries the hydrogen or substituent.
const (
	weightAromatic = 4
	weightExtra    = 6
	weightKind     = 1
)

// judge weighs one way of laying the frame, or refuses it where an atom that belongs
// to the name is missing.
func (f *frame) judge(m *molecule.Molecule, in map[int]bool, at []int) *fit {
	x := &fit{frame: f, locant: make(map[int]string, len(at))}
	for k, a := range at {
		p := f.order[k]
		x.locant[a] = f.number[p]
		if m.Atoms[a].Aromatic == f.m.Atoms[p].Aromatic {
			x.score += weightAromatic
		}
		if hasOxo(f.m, p) {
			if !hasOxo(m, a) {
				return nil
			}
			x.score += weightExtra
		}
		if f.m.Atoms[p].Charge != m.Atoms[a].Charge {
			x.score -= weightKind
		}
		if e := m.Atoms[a].Element; e == 7 || e == 15 {
			if donor(m, a) == donor(f.m, p) {
				x.score += weightKind
			}
		}
		for _, h := range m.Neighbours(a) {
			if !in[h.Atom] {
				x.low = append(x.low, rankOf(f.number[p]))
			}
		}
	}
	sort.Ints(x.low)
	return x
}

// hasOxo tells whether an atom carries =O or =S outside the ring.
func hasOxo(m *molecule.Molecule, a int) bool {
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Order == 2 && !m.BondInRing(h.Bond) && m.Degree(h.Atom) == 1 {
			if e := m.Atoms[h.Atom].Element; e == 8 || e == 16 {
				return true
			}
		}
	}
	return false
}

// donor tells whether a ring nitrogen has three single bonds (pyrrole-type).
func donor(m *molecule.Molecule, a int) bool {
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Order != 1 {
			return false
		}
	}
	return true
}

// rankOf orders locants: 1, 2, 3, 3a, 4, …
func rankOf(locant string) int {
	n := 0
	i := 0
	for ; i < len(locant) && locant[i] >= '0' && locant[i] <= '9'; i++ {
		n = n*10 + int(locant[i]-'0')
	}
	n *= 100
	if i < len(locant) {
		n += int(locant[i]-'a') + 1
	}
	return n
}
