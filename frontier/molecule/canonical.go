package molecule

import (
	"slices"
	"sync"
)

// labelling finds the canonical numbering and the automorphisms of one component by
// individualization and refinement: a search tree whose nodes are ordered partitions,
// with branches left out that an automorphism found before maps onto others (McKay,
// Congr. Numer. 30, 45 (1981)). The leaf with the smallest adjacency list, and then
// the smallest list of configurations, is the canonical numbering.
type labelling struct {
	partition
	atoms    []int32 // the atoms of the component, in the molecule
	local    []int32 // their indices here, by index in the molecule
	elements []stereoElement
	orbit    []int32 // union-find over all automorphisms found

	path        []int32
	first, best leaf
	traces      []uint64
	nodes       []*searchNode
	spare       []*searchNode
	scratch     []uint32
	swap        []int32
	budget      int
	hint        int32   // cells before this place have one atom, or are siblings
	allPairs    bool    // no cell but siblings has more than two atoms
	rigid       []bool  // by atom: round it, even equal ligands have their places
	elementAt   []int32 // one more than the index in elements of the one centred there
	united      bool    // the cells have been recorded as equivalent
	certified   bool    // keep the certificate even of an only leaf
}

// leaf is a complete numbering.
type leaf struct {
	set         bool
	elem        []int32
	certificate []uint32
	path        []int32
	traces      []uint64
}

// searchNode keeps what a node of the search tree needs to try its next branch.
type searchNode struct {
	elem, pos, cell, size []int32
	free                  int
	hint                  int32
	depth                 int
	trace                 uint64
	members               []int32
	orbit                 []int32
}

// searchBudget bounds the work of one search, in atoms visited. It is met by no known
// molecule; beyond it atoms that refinement cannot tell apart are taken for equivalent.
const searchBudget = 1 << 20

var labellings = sync.Pool{New: func() any { return new(labelling) }}

// load takes in one component. With stereo the configurations take part.
func (l *labelling) load(m *Molecule, atoms []int32, stereo bool) {
	n := len(atoms)
	l.atoms = atoms
	l.local = sized(l.local, len(m.Atoms))
	ends := 0
	for i, a := range atoms {
		l.local[a] = int32(i)
		ends += len(m.adjacency[a])
	}
	l.resize(n, ends)
	at := int32(0)
	for i, a := range atoms {
		l.start[i] = at
		for _, h := range m.adjacency[a] {
			b := &m.Bonds[h.Bond]
			l.nbr[at] = l.local[h.Atom]
			l.label[at] = b.label()
			at++
		}
	}
	l.start[n] = at
	l.orbit = sized(l.orbit, n)
	l.elements = l.elements[:0]
	if stereo {
		l.loadElements(m)
	}
	l.reset(m)
	if len(l.elements) > 0 {
		l.dropMeaningless(m)
	}
}

// loadElements takes in the configurations of the component.
func (l *labelling) loadElements(m *Molecule) {
	for i, a := range l.atoms {
		if s := &m.Atoms[a].Stereo; s.Class != NoStereo && len(s.Ligands) == ligandCount[s.Class] {
			e := stereoElement{class: s.Class, permutation: uint8(s.Permutation), count: uint8(len(s.Ligands)), centre: int32(i), other: -1, source: a}
			for k, x := range s.Ligands {
				e.ligands[k] = -1
				if x >= 0 {
					e.ligands[k] = l.local[x]
				}
			}
			l.elements = append(l.elements, e)
		}
		for _, h := range m.adjacency[a] {
			b := &m.Bonds[h.Bond]
			if b.Geometry == NoGeometry || b.A != int(a) {
				continue
			}
			e := stereoElement{class: bondGeometry, permutation: uint8(b.Geometry), count: 4, centre: int32(i), other: l.local[b.B], source: int32(h.Bond)}
			a0, a1 := m.endLigands(h.Bond, b.A, b.B, b.RefA)
			b0, b1 := m.endLigands(h.Bond, b.B, b.A, b.RefB)
			for k, x := range [4]int{a0, a1, b0, b1} {
				e.ligands[k] = -1
				if x >= 0 {
					e.ligands[k] = l.local[x]
				}
			}
			l.elements = append(l.elements, e)
		}
	}
}

// endLigands lists the substituents at the end of double bond i that lies beyond atom
// at: ref and the other one, or ImplicitLigand.
func (m *Molecule) endLigands(i, at, from, ref int) (first, second int) {
	end, before := m.chainEnd(i, at, from)
	second = ImplicitLigand
	for _, h := range m.adjacency[end] {
		if h.Atom != before && h.Atom != ref {
			second = h.Atom
		}
	}
	return ref, second
}

// atomKey packs what tells atoms apart before their neighbours are looked at; atoms of
// few neighbours come first, so that written strings begin at an end, and neutral ones
// before charged ones.
func atomKey(a *Atom, degree int) uint64 {
	k := uint64(min(degree, 255))
	k = k<<1 | b2u(a.Aromatic)
	k = k<<7 | uint64(a.Element)
	k = k<<10 | uint64(a.Isotope)
	k = k<<7 | b2u(a.Charge != 0)<<6 | uint64(a.Charge+32)
	k = k<<8 | uint64(min(a.Hydrogens, 255))
	return k<<4 | uint64(a.Unpaired)
}

// label tells bonds apart: the order, or 5 for an aromatic bond.
func (b *Bond) label() uint8 {
	if b.Aromatic {
		return 5
	}
	return uint8(b.Order)
}

func b2u(b bool) uint64 {
	if b {
		return 1
	}
	return 0
}

// run searches; afterwards best.elem lists the atoms in canonical order and orbit holds
// the classes of equivalent atoms.
func (l *labelling) run() {
	l.explore(0, 0, true)
	if !l.certified {
		return
	}
	if len(l.best.certificate) == 0 {
		l.best.certificate = append(l.best.certificate, l.certify()...)
	}
}

// dropMeaningless removes the configurations that say nothing: those whose inversion
// gives the same molecule back, as at an atom with two equal ligands. Configurations
// whose ligands refinement tells apart are kept unseen. The partition must be settled;
// it is settled afterwards.
func (l *labelling) dropMeaningless(m *Molecule) {
	if !slices.ContainsFunc(l.elements, func(e stereoElement) bool { return e.tied(l.cell) }) {
		return
	}
	kept := l.elements[:0]
	for _, e := range l.elements {
		if !l.tiedLeaves(&e) {
			kept = append(kept, e)
		}
	}
	l.elements = kept
	l.reset(m)
	var tied []int
	for i := range l.elements {
		e := &l.elements[i]
		if e.tied(l.cell) && (e.class == Tetrahedral || e.class == Allenal || e.class == bondGeometry) {
			tied = append(tied, i)
		}
	}
	if len(tied) == 0 || len(tied)*l.n > maxTiedWork {
		return
	}
	l.certified = true
	defer func() { l.certified = false }()
	l.run()
	whole := slices.Clone(l.best.certificate)
	drop := make([]bool, len(l.elements))
	some := false
	for _, i := range tied {
		e := &l.elements[i]
		e.permutation = 3 - e.permutation
		l.reset(m)
		l.run()
		e.permutation = 3 - e.permutation
		if slices.Equal(whole, l.best.certificate) {
			drop[i], some = true, true
		}
	}
	if some {
		kept := l.elements[:0]
		for i, e := range l.elements {
			if !drop[i] {
				kept = append(kept, e)
			}
		}
		l.elements = kept
	}
	l.reset(m)
}

// maxTiedWork bounds the inversions that dropMeaningless tries, times atoms.
const maxTiedWork = 1 << 14

// tiedLeaves tells whether two ligands in one cell are atoms without other neighbours.
func (l *labelling) tiedLeaves(e *stereoElement) bool {
	if e.class != Tetrahedral && e.class != Allenal && e.class != bondGeometry {
		return false
	}
	for i := 0; i < int(e.count); i++ {
		for j := 0; j < i; j++ {
			a, b := e.ligands[i], e.ligands[j]
			if e.class != Tetrahedral && i/2 != j/2 {
				continue
			}
			if a < 0 && b < 0 || a >= 0 && b >= 0 && l.cell[a] == l.cell[b] && l.start[a+1]-l.start[a] == 1 {
				return true
			}
		}
	}
	return false
}

// reset goes back to the settled partition before any search.
func (l *labelling) reset(m *Molecule) {
	n := l.n
	for i, a := range l.atoms {
		l.key[i] = atomKey(&m.Atoms[a], len(m.adjacency[a]))
	}
	for i := 0; i < n; i++ {
		l.orbit[i] = int32(i)
	}
	l.first.set, l.best.set = false, false
	l.best.certificate = l.best.certificate[:0]
	l.path, l.traces, l.nodes = l.path[:0], l.traces[:0], l.nodes[:0]
	l.budget = searchBudget
	l.hint, l.allPairs, l.united = 0, false, false
	l.rigid = sized(l.rigid, n)
	clear(l.rigid)
	l.elementAt = sized(l.elementAt, n)
	clear(l.elementAt)
	for i := range l.elements {
		e := &l.elements[i]
		l.rigid[e.centre] = l.rigid[e.centre] || e.other < 0 && e.class != Tetrahedral
		l.elementAt[e.centre] = int32(i + 1)
		if e.other >= 0 {
			l.elementAt[e.other] = int32(i + 1)
		}
	}
	l.trace = 0
	l.begin()
	l.settle()
}

// settle refines, and lets configurations that the cells decide split cells further.
func (l *labelling) settle() {
	l.refine()
	if len(l.elements) == 0 || l.budget < 0 {
		return
	}
	for {
		l.budget -= len(l.elements)
		free := l.free
		sum := uint64(0)
		for i := range l.elements {
			e := &l.elements[i]
			if e.tied(l.cell) {
				continue
			}
			v := uint64(e.valueUnder(l.cell))
			if e.class == bondGeometry {
				v <<= 8
			}
			sum += mix(uint64(l.cell[e.centre])+1, v)
			l.touch(e.centre, v)
			if e.other >= 0 {
				l.touch(e.other, v)
			}
		}
		l.splitHit()
		l.refine()
		l.trace = mix(l.trace, sum)
		if l.free == free {
			return
		}
	}
}

// target picks the cell to branch on: the first with several atoms that are not mere
// siblings (atoms without further neighbours on one atom, which are interchangeable);
// -1 when only siblings are left. Afterwards allPairs tells whether all such cells have
// two atoms. Cells only ever split, so the search goes on where it ended before.
func (l *labelling) target() (cell int32) {
	n := int32(l.n)
	i := l.hint
	for i < n && (l.size[i] == 1 || l.areSiblings(i)) {
		i += l.size[i]
	}
	l.hint = i
	if i == n {
		return -1
	}
	if !l.allPairs && l.budget >= 0 {
		k := i
		for k < n && (l.size[k] <= 2 || l.areSiblings(k)) {
			k += l.size[k]
		}
		l.allPairs = k == n
	}
	return i
}

func (l *labelling) areSiblings(c int32) bool {
	v := l.elem[c]
	if l.start[v+1]-l.start[v] != 1 {
		return false
	}
	parent := l.nbr[l.start[v]]
	if l.rigid[parent] {
		return false
	}
	for _, u := range l.elem[c+1 : c+l.size[c]] {
		if l.nbr[l.start[u]] != parent {
			return false
		}
	}
	return true
}

// splitSiblings numbers siblings, which nothing else depends on, in any order.
func (l *labelling) splitSiblings() {
	for i := int32(0); i < int32(l.n); {
		size := l.size[i]
		for k := i; k < i+size; k++ {
			l.size[k] = 1
			l.cell[l.elem[k]] = k
		}
		i += size
	}
	l.free = l.n
}

// swapHolds tells whether exchanging the two atoms of every pair at once, which keeps
// the constitution, keeps the configurations too.
func (l *labelling) swapHolds() bool {
	if len(l.elements) == 0 {
		return true
	}
	l.budget -= l.n
	l.swap = sized(l.swap, 2*l.n)
	image, rank := l.swap[:l.n], l.swap[l.n:]
	for v := range image {
		image[v] = int32(v)
	}
	for i := int32(0); i < int32(l.n); i += l.size[i] {
		if l.size[i] == 2 && !l.areSiblings(i) {
			a, b := l.elem[i], l.elem[i+1]
			image[a], image[b] = b, a
		}
	}
	for v := range rank {
		rank[v] = int32(v)
	}
	for i := range l.elements {
		e := &l.elements[i]
		if e.tied(rank) {
			return false
		}
		at := l.elementAt[image[e.centre]]
		if at == 0 {
			return false
		}
		f := &l.elements[at-1]
		if f.class != e.class || e.other >= 0 && f.centre+f.other != image[e.centre]+image[e.other] ||
			f.valueUnder(rank) != e.valueUnder(image) {
			return false
		}
	}
	return true
}

func find(uf []int32, v int32) int32 {
	for uf[v] != v {
		uf[v] = uf[uf[v]]
		v = uf[v]
	}
	return v
}

func union(uf []int32, a, b int32) {
	a, b = find(uf, a), find(uf, b)
	if a < b {
		uf[b] = a
	} else {
		uf[a] = b
	}
}

// explore searches the subtree of the present partition. versus is the comparison of
// the traces so far with those of the best leaf; onFirst tells that they equal those
// of the first. It returns the depth to go back to.
func (l *labelling) explore(depth, versus int, onFirst bool) int {
	for l.free < l.n {
		cell := l.target()
		if cell < 0 {
			if !l.first.set {
				l.uniteCells()
			}
			l.splitSiblings()
			break
		}
		if l.budget < 0 || l.allPairs && l.swapHolds() {
			if !l.first.set && !l.united {
				l.uniteCells()
				l.united = true // splitting does not add to this
			}
			// One branch stands for all, but it is a level of the tree like others.
			var lost bool
			if versus, onFirst, lost = l.descend(l.elem[cell], depth, versus, onFirst); lost {
				return depth
			}
			depth++
			continue
		}
		return l.branch(cell, depth, versus, onFirst)
	}
	return l.leaf(versus, onFirst, depth)
}

// uniteCells records that the atoms of each cell are equivalent: pairs that exchange,
// siblings, and whatever is left when the budget is spent.
func (l *labelling) uniteCells() {
	for i := int32(0); i < int32(l.n); i += l.size[i] {
		for k := i + 1; k < i+l.size[i]; k++ {
			union(l.orbit, l.elem[i], l.elem[k])
			for _, node := range l.nodes {
				union(node.orbit, l.elem[i], l.elem[k])
			}
		}
	}
}

func (l *labelling) branch(cell int32, depth, versus int, onFirst bool) int {
	l.budget -= l.n
	node := l.save(cell)
	node.depth = depth
	defer func() {
		l.nodes = l.nodes[:len(l.nodes)-1]
		l.spare = append(l.spare, node)
	}()
	for k, v := range node.members {
		if k > 0 {
			if l.budget < 0 {
				break
			}
			known := false
			r := find(node.orbit, v)
			for _, u := range node.members[:k] {
				if find(node.orbit, u) == r {
					known = true
					break
				}
			}
			if known {
				continue
			}
			l.restore(node)
		}
		c, f, lost := l.descend(v, depth, versus, onFirst)
		if lost {
			continue
		}
		if back := l.explore(depth+1, c, f); back < depth {
			return back
		}
		// A new best leaf below shares the path to here.
		if c < 0 {
			versus = l.compareTraces(depth)
		}
	}
	return depth - 1
}

// descend goes to the child that gives atom v a cell of its own. It returns how the traces
// then compare with those of the best leaf, whether they equal those of the first, and
// whether the child can hold neither a better leaf nor one equal to the first.
func (l *labelling) descend(v int32, depth, versus int, onFirst bool) (c int, f, lost bool) {
	l.path = append(l.path[:depth], v)
	l.individualize(v)
	l.settle()
	l.traces = append(l.traces[:depth], l.trace)
	if !l.first.set {
		// The first leaf becomes the best, so there is nothing to compare with before.
		return versus, onFirst, false
	}
	c = versus
	f = onFirst && depth < len(l.first.traces) && l.first.traces[depth] == l.trace
	if c == 0 {
		switch t := l.best.traces; {
		case depth >= len(t) || l.trace > t[depth]:
			c = 1
		case l.trace < t[depth]:
			c = -1
		}
	}
	return c, f, c > 0 && !f
}

// compareTraces compares the traces of the present path with those of the best leaf.
func (l *labelling) compareTraces(depth int) int {
	for i := 0; i < depth; i++ {
		switch {
		case i >= len(l.best.traces) || l.traces[i] > l.best.traces[i]:
			return 1
		case l.traces[i] < l.best.traces[i]:
			return -1
		}
	}
	return 0
}

func (l *labelling) save(cell int32) *searchNode {
	var node *searchNode
	if k := len(l.spare); k > 0 {
		node, l.spare = l.spare[k-1], l.spare[:k-1]
	} else {
		node = new(searchNode)
	}
	node.elem = append(node.elem[:0], l.elem...)
	node.pos = append(node.pos[:0], l.pos...)
	node.cell = append(node.cell[:0], l.cell...)
	node.size = append(node.size[:0], l.size...)
	node.free, node.trace, node.hint = l.free, l.trace, l.hint
	node.members = append(node.members[:0], l.elem[cell:cell+l.size[cell]]...)
	node.orbit = sized(node.orbit, l.n)
	for i := range node.orbit {
		node.orbit[i] = int32(i)
	}
	l.nodes = append(l.nodes, node)
	return node
}

func (l *labelling) restore(node *searchNode) {
	copy(l.elem, node.elem)
	copy(l.pos, node.pos)
	copy(l.cell, node.cell)
	copy(l.size, node.size)
	l.free, l.trace, l.hint = node.free, node.trace, node.hint
	l.allPairs = false
}

// leaf compares a complete numbering with the first and the best.
func (l *labelling) leaf(versus int, onFirst bool, depth int) int {
	if len(l.nodes) == 0 {
		// No branch: the only leaf.
		l.best.set = true
		l.best.elem = append(l.best.elem[:0], l.elem...)
		return depth - 1
	}
	certificate := l.certify()
	switch {
	case !l.first.set:
		l.keep(&l.first, certificate)
		l.keep(&l.best, certificate)
		return depth - 1
	case onFirst && slices.Equal(certificate, l.first.certificate):
		return l.automorphism(&l.first)
	}
	c := versus
	if c == 0 {
		c = slices.Compare(certificate, l.best.certificate)
		if c == 0 {
			return l.automorphism(&l.best)
		}
	}
	if c < 0 {
		l.keep(&l.best, certificate)
	}
	return depth - 1
}

func (l *labelling) keep(f *leaf, certificate []uint32) {
	f.set = true
	f.elem = append(f.elem[:0], l.elem...)
	f.certificate = append(f.certificate[:0], certificate...)
	f.path = append(f.path[:0], l.path...)
	f.traces = append(f.traces[:0], l.traces...)
}

// automorphism records the map of leaf f onto the present one, and returns the depth
// at which their paths part: the subtree there is known now.
func (l *labelling) automorphism(f *leaf) int {
	part := 0
	for part < len(f.path) && part < len(l.path) && f.path[part] == l.path[part] {
		part++
	}
	for p, v := range f.elem {
		union(l.orbit, v, l.elem[p])
		for _, node := range l.nodes {
			if node.depth <= part {
				union(node.orbit, v, l.elem[p])
			}
		}
	}
	return part
}

// certify lists the bonds of the component in the numbering of the present leaf, then
// its configurations.
func (l *labelling) certify() []uint32 {
	out := l.scratch[:0]
	for p, v := range l.elem {
		from := len(out)
		for e := l.start[v]; e < l.start[v+1]; e++ {
			if q := l.pos[l.nbr[e]]; q < int32(p) {
				out = append(out, uint32(q)<<3|uint32(l.label[e]))
			}
		}
		slices.Sort(out[from:])
		out = append(out, 1<<31)
	}
	from := len(out)
	for i := range l.elements {
		e := &l.elements[i]
		at := l.pos[e.centre]
		kind := uint32(0)
		if e.other >= 0 {
			at = min(at, l.pos[e.other])
			kind = 1
		}
		value := uint32(0)
		if !e.tied(l.pos) {
			value = uint32(e.valueUnder(l.pos))
		}
		out = append(out, uint32(at)<<8|kind<<7|value)
	}
	slices.Sort(out[from:])
	l.scratch = out
	return out
}
