package place

import (
	"fmt"
	"slices"
	"sync"

	"lobecast/frontier/molecule"
)

// frame is a skeleton read as a graph. The ring atoms stand in an order in which each
// but the first has an earlier neighbour.
type frame struct {
	name   string
	number []string // locant of each ring atom
	rank   []int    // the locant as a number that sorts
	atom   []int    // element
	charge []int
	parent []int    // an earlier neighbour, as a position
	before []uint32 // all earlier neighbours, as bits
	full   []bool   // only single bonds: sp3 carbon, pyrrole-type nitrogen
	oxo    []int    // element of the =O or =S that belongs to the name, or 0
}

// largest is the number of ring atoms beyond which no frame is looked for; none of the
// skeletons has more.
const largest = 24

// frames groups the skeletons by the outline of their ring atoms.
var frames = sync.OnceValue(func() map[string][]*frame {
	byOutline := map[string][]*frame{}
	for i := range skeletons {
		f, key := newFrame(&skeletons[i])
		byOutline[key] = append(byOutline[key], f)
	}
	return byOutline
})

func newFrame(s *skeleton) (f *frame, key string) {
	m, err := molecule.ParseSMILES(s.smiles)
	if err != nil {
		panic(fmt.Sprintf("place: skeleton %s: %v", s.name, err))
	}
	number := s.numbers()
	if len(number) != len(m.Atoms) {
		panic(fmt.Sprintf("place: skeleton %s has %d atoms and %d locants", s.name, len(m.Atoms), len(number)))
	}
	var ring []int
	in := make([]bool, len(m.Atoms))
	for a := range m.Atoms {
		if number[a] != exocyclic {
			ring = append(ring, a)
			in[a] = true
		}
	}
	f = &frame{name: s.name}
	order := []int{rarest(m, ring)}
	position := map[int]int{order[0]: 0}
	for k := 0; k < len(order); k++ {
		for _, h := range m.Neighbours(order[k]) {
			if _, seen := position[h.Atom]; !seen && in[h.Atom] {
				position[h.Atom] = len(order)
				order = append(order, h.Atom)
			}
		}
	}
	for k, a := range order {
		parent, before := -1, uint32(0)
		for _, h := range m.Neighbours(a) {
			if p, ok := position[h.Atom]; ok && p < k {
				before |= 1 << p
				if parent < 0 || p < parent {
					parent = p
				}
			}
		}
		f.number = append(f.number, number[a])
		f.rank = append(f.rank, rankOf(number[a]))
		f.atom = append(f.atom, m.Atoms[a].Element)
		f.charge = append(f.charge, m.Atoms[a].Charge)
		f.parent = append(f.parent, parent)
		f.before = append(f.before, before)
		f.full = append(f.full, full(m, a))
		f.oxo = append(f.oxo, oxo(m, a))
	}
	var r ringGraph
	r.load(m, ring, make([]int32, len(m.Atoms)))
	return f, string(r.outline())
}

// rarest picks a ring atom of the least frequent element, to begin the search with.
func rarest(m *molecule.Molecule, ring []int) int {
	best, fewest := ring[0], len(ring)+1
	for _, a := range ring {
		n := 0
		for _, b := range ring {
			if m.Atoms[b].Element == m.Atoms[a].Element {
				n++
			}
		}
		if n < fewest {
			best, fewest = a, n
		}
	}
	return best
}

// ringGraph is a ring system of at most [largest] atoms with its bonds as bits.
type ringGraph struct {
	m    *molecule.Molecule
	ring []int
	bond [largest]uint32
	key  [2 * largest]byte
}

// load fills the graph; local must have an entry for each atom of m and be zero at all
// of them, and is left so.
func (r *ringGraph) load(m *molecule.Molecule, ring []int, local []int32) {
	r.m, r.ring = m, ring
	for i, a := range ring {
		local[a] = int32(i + 1)
	}
	for i, a := range ring {
		r.bond[i] = 0
		for _, h := range m.Neighbours(a) {
			if j := local[h.Atom]; j > 0 {
				r.bond[i] |= 1 << (j - 1)
			}
		}
	}
	for _, a := range ring {
		local[a] = 0
	}
}

// outline is a key that ring systems with the same elements and numbers of ring bonds
// share.
func (r *ringGraph) outline() []byte {
	var marks [largest]uint16
	for i, a := range r.ring {
		marks[i] = uint16(r.m.Atoms[a].Element)<<5 | uint16(bits(r.bond[i]))
	}
	list := marks[:len(r.ring)]
	slices.Sort(list)
	key := r.key[:0]
	for _, x := range list {
		key = append(key, byte(x>>8), byte(x))
	}
	return key
}

func bits(x uint32) int {
	n := 0
	for ; x != 0; x &= x - 1 {
		n++
	}
	return n
}

// fit is one way of laying a frame over a ring system.
type fit struct {
	frame *frame
	at    []int // atom of the molecule at each position of the frame
	score int   // agreement: what belongs to the name, then the places of sp3 atoms
}

// maxTries bounds the search for one ring system. Chemical ring systems need a few
// hundred; graphs drawn to be hard stop here and stay without a name.
const maxTries = 20000

// search lays frames over one ring system.
type search struct {
	ringGraph
	at    [largest]int // local index of the ring atom at each position
	used  uint32
	tries int
	best  fit
	view  *surroundings
}

// lay finds the best way of laying any frame over the ring atoms of m, or nil.
func lay(m *molecule.Molecule, ring []int, local []int32) *fit {
	if len(ring) > largest {
		return nil
	}
	s := &search{}
	s.load(m, ring, local)
	for _, f := range frames()[string(s.outline())] {
		s.used = 0
		s.place(f, 0)
	}
	if s.best.frame == nil || s.tries > maxTries {
		return nil
	}
	best := s.best
	return &best
}

func (s *search) place(f *frame, k int) {
	if k == len(f.number) {
		s.judge(f)
		return
	}
	choices := ^s.used & (1<<len(s.ring) - 1)
	if k > 0 {
		choices &= s.bond[s.at[f.parent[k]]]
	}
	for i := 0; choices != 0; i, choices = i+1, choices>>1 {
		if choices&1 == 0 || s.m.Atoms[s.ring[i]].Element != f.atom[k] {
			continue
		}
		if s.tries++; s.tries > maxTries {
			return
		}
		joined := true
		for p, want := 0, f.before[k]; want != 0 && joined; p, want = p+1, want>>1 {
			joined = want&1 == 0 || s.bond[i]>>s.at[p]&1 == 1
		}
		if !joined {
			continue
		}
		s.at[k] = i
		s.used |= 1 << i
		s.place(f, k+1)
		s.used &^= 1 << i
	}
}

// Weights of agreement.
const (
	weightOxo     = 6 // a C=O that belongs to the name
	weightMissing = 4 // sp3 in the name, unsaturated in the molecule
	weightAdded   = 2 // unsaturated in the name, sp3 in the molecule
)

// judge weighs one way of laying the frame, and keeps it if it is better than the best
// so far.
func (s *search) judge(f *frame) {
	score := 0
	for k, i := range s.at[:len(f.number)] {
		a := s.ring[i]
		if c := s.m.Atoms[a].Charge; c != f.charge[k] {
			if f.atom[k] != 7 {
				return
			}
			score--
		}
		x := 0
		if f.atom[k] == 6 {
			x = oxo(s.m, a)
		}
		if f.oxo[k] != 0 {
			if x != f.oxo[k] {
				return
			}
			score += weightOxo
			continue
		}
		switch full := full(s.m, a); {
		case full && !f.full[k]:
			score -= weightAdded
		case !full && f.full[k] && x == 0:
			score -= weightMissing
		}
	}
	if s.best.frame != nil {
		if score < s.best.score || score == s.best.score && (s.best.frame != f || !s.lower(f)) {
			return
		}
	}
	s.best.frame, s.best.score = f, score
	s.best.at = s.best.at[:0]
	for _, i := range s.at[:len(f.number)] {
		s.best.at = append(s.best.at, s.ring[i])
	}
}

// oxo is the element of the =O or =S on an atom outside the ring, or 0.
func oxo(m *molecule.Molecule, a int) int {
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Order == 2 && m.Degree(h.Atom) == 1 && !m.BondInRing(h.Bond) {
			if e := m.Atoms[h.Atom].Element; e == 8 || e == 16 {
				return e
			}
		}
	}
	return 0
}

// hasOxo tells whether an atom carries =O or =S outside the ring.
func hasOxo(m *molecule.Molecule, a int) bool { return oxo(m, a) != 0 }

// full tells whether a ring atom has only single bonds.
func full(m *molecule.Molecule, a int) bool {
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Order != 1 {
			return false
		}
	}
	return m.Atoms[a].Unpaired == 0
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
