package layout

import (
	"cmp"
	"math"
	"slices"

	"lobecast/frontier/molecule"
)

// sheet is one connected molecule being drawn. Its atoms are in canonical order, so
// that every choice made by index is made alike however the molecule was written.
type sheet struct {
	m       *molecule.Molecule
	at      []point
	placed  []bool
	held    []bool // position given from outside; not to be moved
	blocks  []*block
	blockOf [][]int // blocks an atom belongs to (two for a spiro atom)
	joints  []joint
	leaf    map[[2]int]point // where an irregular block wants an atom's neighbour
}

// joint is a place where part of the drawing can turn against the rest: the branch
// that hangs on hub through bond hub–first (or the spiro block sharing atom hub).
type joint struct {
	hub, first int   // first is -1 for a spiro block
	branch     []int // all atoms that move
	rigid      bool  // a double bond with stated geometry: must not be mirrored
	bend       float64
}

func newSheet(m *molecule.Molecule) *sheet {
	n := len(m.Atoms)
	s := &sheet{
		m: m, at: make([]point, n), placed: make([]bool, n), held: make([]bool, n),
		blocks: findBlocks(m), blockOf: make([][]int, n),
		leaf: map[[2]int]point{},
	}
	for i, b := range s.blocks {
		for _, a := range b.atoms {
			s.blockOf[a] = append(s.blockOf[a], i)
		}
	}
	return s
}

// sameBlock returns the block that atoms a and c share, or nil.
func (s *sheet) sameBlock(a, c int) *block {
	for _, i := range s.blockOf[a] {
		if slices.Contains(s.blockOf[c], i) {
			return s.blocks[i]
		}
	}
	return nil
}

// start draws the first piece: the largest ring block, or the longest chain.
func (s *sheet) start() {
	largest := -1
	for i, b := range s.blocks {
		if largest < 0 || len(b.atoms) > len(s.blocks[largest].atoms) {
			largest = i
		}
	}
	if largest >= 0 {
		b := s.blocks[largest]
		b.place(s.m)
		for i, a := range b.atoms {
			s.at[a], s.placed[a] = b.at[i], true
		}
		for _, l := range b.leaves {
			s.leaf[[2]int{l.atom, l.out}] = l.at
		}
		s.grow(b.atoms)
		return
	}
	chain := s.longestChain()
	// The zigzag starts at one end; growing continues along the largest branch.
	s.at[chain[0]], s.placed[chain[0]] = point{}, true
	if len(chain) > 1 {
		s.at[chain[1]], s.placed[chain[1]] = polar(math.Pi/6), true
		s.joints = append(s.joints, joint{hub: chain[0], first: chain[1], branch: s.m.Branch(chain[0], chain[1]),
			rigid: s.rigid(chain[0], chain[1])})
	}
	s.grow(chain[:min(2, len(chain))])
}

// longestChain is a longest path of an acyclic molecule.
func (s *sheet) longestChain() []int {
	far := func(from int) []int {
		came := make([]int, len(s.at))
		for i := range came {
			came[i] = -2
		}
		came[from] = -1
		queue := []int{from}
		for k := 0; k < len(queue); k++ {
			for _, h := range s.m.Neighbours(queue[k]) {
				if came[h.Atom] == -2 {
					came[h.Atom] = queue[k]
					queue = append(queue, h.Atom)
				}
			}
		}
		var path []int
		for a := queue[len(queue)-1]; a >= 0; a = came[a] {
			path = append(path, a)
		}
		return path
	}
	end := far(0)[0]
	return far(end)
}

// grow attaches all that hangs on the given placed atoms, breadth first.
func (s *sheet) grow(from []int) {
	queue := slices.Clone(from)
	for k := 0; k < len(queue); k++ {
		a := queue[k]
		for _, i := range s.blockOf[a] {
			if b := s.blocks[i]; !s.blockPlaced(b) {
				queue = append(queue, s.placeSpiro(a, b)...)
			}
		}
		queue = append(queue, s.placeNeighbours(a)...)
	}
}

func (s *sheet) blockPlaced(b *block) bool {
	for _, a := range b.atoms {
		if !s.placed[a] {
			return false
		}
	}
	return true
}

// widestGap finds the largest angle free of placed neighbours at atom a that is not the
// inside of a ring: where it begins (anticlockwise) and how wide it is. Only where all
// gaps lie inside rings is the widest of those taken.
func (s *sheet) widestGap(a int) (begin, width float64) {
	type spoke struct {
		atom  int
		angle float64
	}
	var taken []spoke
	for _, h := range s.m.Neighbours(a) {
		if s.placed[h.Atom] {
			taken = append(taken, spoke{h.Atom, direction(s.at[a], s.at[h.Atom])})
		}
	}
	switch len(taken) {
	case 0:
		return 0, 2 * math.Pi
	case 1:
		return taken[0].angle, 2 * math.Pi
	}
	slices.SortFunc(taken, func(p, q spoke) int { return cmp.Compare(p.angle, q.angle) })
	width = -1
	best := -1.0
	for i, t := range taken {
		next := taken[(i+1)%len(taken)]
		w := turnBetween(t.angle, next.angle)
		value := w
		if s.insideRing(a, t.atom, next.atom, t.angle, w) {
			value -= 2 * math.Pi
		}
		if width < 0 || value > best+1e-7 {
			begin, width, best = t.angle, w, value
		}
	}
	return begin, width
}

// insideRing reports whether the gap at atom a that begins at angle and is w wide,
// between its neighbours p and q, is the inside of a ring through p, a and q.
func (s *sheet) insideRing(a, p, q int, angle, w float64) bool {
	for _, i := range s.blockOf[a] {
		for _, ring := range s.blocks[i].rings {
			k := slices.Index(ring, a)
			if k < 0 {
				continue
			}
			n := len(ring)
			before, after := ring[(k+n-1)%n], ring[(k+1)%n]
			if !(before == p && after == q || before == q && after == p) {
				continue
			}
			corners := make([]point, n)
			for c, x := range ring {
				corners[c] = s.at[x]
			}
			// A short step into the gap is inside the polygon or not.
			if contains(corners, plus(s.at[a], times(polar(angle+w/2), 0.1))) {
				return true
			}
		}
	}
	return false
}

// placeSpiro draws block b at its atom a, which is placed, into the widest gap.
func (s *sheet) placeSpiro(a int, b *block) []int {
	b.place(s.m)
	begin, width := s.widestGap(a)
	into := begin + width/2
	sum, wanted := point{}, 0
	for _, h := range s.m.Neighbours(a) {
		if p, ok := s.leaf[[2]int{a, h.Atom}]; ok {
			sum = plus(sum, unit(minus(p, s.at[a])))
			wanted++
		}
	}
	if wanted == 2 && length(sum) > 0.1 {
		into = math.Atan2(sum.Y, sum.X)
	}
	s.setBlock(b, a, -1, into+math.Pi)
	branch := s.blockBranch(a, b)
	s.joints = append(s.joints, joint{hub: a, first: -1, branch: branch})
	var fresh []int
	for _, c := range b.atoms {
		if c != a {
			s.placed[c] = true
			fresh = append(fresh, c)
		}
	}
	return fresh
}

// setBlock puts block b so that its atom a keeps its position and the block's free
// side at a, or the place it keeps there for the neighbour out, looks in the given
// direction.
func (s *sheet) setBlock(b *block, a, out int, facing float64) {
	corner := b.at[b.slot[a]]
	turn := facing - b.freeSide(s.m, a, out)
	for i, c := range b.atoms {
		if c != a {
			s.at[c] = plus(s.at[a], turned(minus(b.at[i], corner), turn))
		}
	}
	for _, l := range b.leaves {
		s.leaf[[2]int{l.atom, l.out}] = plus(s.at[a], turned(minus(l.at, corner), turn))
	}
}

// freeSide is the direction, in the block's own frame, of the place kept at atom a for
// its neighbour out; where the block keeps none, the direction that bisects the widest
// gap between the block's bonds.
func (b *block) freeSide(m *molecule.Molecule, a, out int) float64 {
	sum, found := point{}, 0
	for _, l := range b.leaves {
		if l.atom == a && (l.out == out || out < 0) {
			sum = plus(sum, unit(minus(l.at, b.at[b.slot[a]])))
			found++
		}
	}
	if found > 0 && length(sum) > 0.1 {
		return math.Atan2(sum.Y, sum.X)
	}
	begin, width := b.gap(m, a)
	return begin + width/2
}

// gap is the widest angle between the block's bonds at atom a.
func (b *block) gap(m *molecule.Molecule, a int) (begin, width float64) {
	var taken []float64
	for _, h := range m.Neighbours(a) {
		if k, ok := b.slot[h.Atom]; ok {
			taken = append(taken, direction(b.at[b.slot[a]], b.at[k]))
		}
	}
	slices.Sort(taken)
	width = -1
	for i, t := range taken {
		w := turnBetween(t, taken[(i+1)%len(taken)])
		if w > width+1e-7 {
			begin, width = t, w
		}
	}
	return begin, width
}

// blockBranch lists the atoms that hang on spiro atom a by way of block b.
func (s *sheet) blockBranch(a int, b *block) []int {
	seen := make([]bool, len(s.at))
	seen[a] = true
	var list []int
	for _, c := range b.atoms {
		if c != a {
			seen[c] = true
			list = append(list, c)
		}
	}
	for k := 0; k < len(list); k++ {
		for _, h := range s.m.Neighbours(list[k]) {
			if !seen[h.Atom] {
				seen[h.Atom] = true
				list = append(list, h.Atom)
			}
		}
	}
	return list
}

// linear reports whether the two bonds of a two-connected atom are drawn in line.
func (s *sheet) linear(a int) bool {
	near := s.m.Neighbours(a)
	if len(near) != 2 {
		return false
	}
	doubles := 0
	for _, h := range near {
		switch s.m.Bonds[h.Bond].Order {
		case 3:
			return true
		case 2:
			doubles++
		}
	}
	return doubles == 2
}

func (s *sheet) rigid(a, c int) bool {
	b := s.m.BondBetween(a, c)
	return s.m.Bonds[b].Order == 2 && s.m.Bonds[b].Geometry != molecule.NoGeometry
}

// placeNeighbours gives the unplaced neighbours of a, which is placed, their
// positions, whole blocks included, and returns the atoms placed.
func (s *sheet) placeNeighbours(a int) []int {
	var next, before []int
	for _, h := range s.m.Neighbours(a) {
		if s.placed[h.Atom] {
			before = append(before, h.Atom)
		} else {
			next = append(next, h.Atom)
		}
	}
	if len(next) == 0 {
		return nil
	}
	slices.Sort(next)
	weight := map[int]int{}
	for _, c := range next {
		weight[c] = len(s.m.Branch(a, c))
	}
	// The largest branch continues the chain.
	slices.SortStableFunc(next, func(p, q int) int { return weight[q] - weight[p] })
	angles := make([]float64, len(next))
	if len(before) == 1 {
		s.chainAngles(a, before[0], next, weight, angles)
	} else {
		begin, width := s.widestGap(a)
		for i := range next {
			angles[i] = begin + width*float64(i+1)/float64(len(next)+1)
		}
		if len(before) == 0 {
			for i := range next {
				angles[i] = math.Pi/6 + 2*math.Pi*float64(i)/float64(len(next))
			}
		}
	}
	var fresh []int
	for i, c := range next {
		if p, ok := s.leaf[[2]int{a, c}]; ok {
			angles[i] = direction(s.at[a], p)
		}
		s.at[c], s.placed[c] = plus(s.at[a], polar(angles[i])), true
	}
	for i, c := range next {
		fresh = append(fresh, c)
		s.joints = append(s.joints, joint{hub: a, first: c, branch: s.m.Branch(a, c), rigid: s.rigid(a, c)})
		if len(s.blockOf[c]) > 0 {
			fresh = append(fresh, s.hangBlock(a, c, angles[i])...)
		}
	}
	return fresh
}

// chainAngles decides where the neighbours next of a go when only before is placed:
// straight on at linear atoms, zigzag otherwise, with the stated geometry of a double
// bond before=a.
func (s *sheet) chainAngles(a, before int, next []int, weight map[int]int, angles []float64) {
	back := direction(s.at[a], s.at[before])
	if s.linear(a) {
		angles[0] = back + math.Pi
		return
	}
	side := s.zigzagSide(a, before, next[0])
	switch len(next) {
	case 1:
		angles[0] = back + side*2*math.Pi/3
	case 2:
		angles[0] = back + side*2*math.Pi/3
		angles[1] = back - side*2*math.Pi/3
	case 3:
		if weight[next[0]] > 1 && len(s.m.Neighbours(before)) > 1 {
			angles[0] = back + side*2*math.Pi/3
			angles[1] = back - side*4*math.Pi/9
			angles[2] = back - side*8*math.Pi/9
		} else {
			angles[0] = back + math.Pi
			angles[1] = back + side*math.Pi/2
			angles[2] = back - side*math.Pi/2
		}
	default:
		for i := range next {
			angles[i] = back + side*2*math.Pi*float64(i+1)/float64(len(next)+1)
		}
	}
}

// zigzagSide says on which side (+1 left, -1 right of the direction a→before, that is
// anticlockwise or clockwise from it) the main continuation first goes.
func (s *sheet) zigzagSide(a, before, first int) float64 {
	bond := &s.m.Bonds[s.m.BondBetween(a, before)]
	axis := minus(s.at[before], s.at[a])
	if bond.Order == 2 && bond.Geometry != molecule.NoGeometry {
		refBefore, refHere := bond.RefA, bond.RefB
		if bond.A == a {
			refBefore, refHere = bond.RefB, bond.RefA
		}
		if refBefore >= 0 && refBefore < len(s.at) && s.placed[refBefore] {
			side := sign(cross(axis, minus(s.at[refBefore], s.at[a])))
			if bond.Geometry == molecule.Opposite {
				side = -side
			}
			if refHere != first {
				side = -side
			}
			return side
		}
	}
	// Away from the heaviest neighbour on the other side of before; where that is
	// even, away from the middle of what is drawn.
	balance, others := 0.0, 0
	for _, h := range s.m.Neighbours(before) {
		if h.Atom != a && s.placed[h.Atom] {
			c := cross(axis, minus(s.at[h.Atom], s.at[a]))
			if math.Abs(c) > 1e-3 {
				balance += sign(c) * (1 + 0.01*float64(s.m.Degree(h.Atom)))
				others++
			}
		}
	}
	if others == 1 || math.Abs(balance) > 0.5 {
		return -sign(balance)
	}
	middle, n := point{}, 0.0
	for i, p := range s.at {
		if s.placed[i] {
			middle, n = plus(middle, p), n+1
		}
	}
	middle = times(middle, 1/n)
	if c := cross(axis, minus(middle, s.at[a])); math.Abs(c) > 1e-3 {
		return -sign(c)
	}
	return 1
}

func sign(x float64) float64 {
	if x < 0 {
		return -1
	}
	return 1
}

// hangBlock draws the block of atom c, which hangs on a in the given direction.
func (s *sheet) hangBlock(a, c int, angle float64) []int {
	var fresh []int
	for _, i := range s.blockOf[c] {
		b := s.blocks[i]
		if s.blockPlaced(b) {
			continue
		}
		b.place(s.m)
		// Two bonds leaving the block at c share its free side.
		leaving := 0
		for _, h := range s.m.Neighbours(c) {
			if _, inside := b.slot[h.Atom]; !inside {
				leaving++
			}
		}
		out := angle + math.Pi
		if leaving > 1 && b.leaves == nil {
			_, gap := b.gap(s.m, c)
			out -= gap * (1/float64(leaving+1) - 0.5)
		}
		s.setBlock(b, c, a, out)
		s.faceBlock(b, a, c)
		for _, x := range b.atoms {
			if x != c {
				s.placed[x] = true
				fresh = append(fresh, x)
			}
		}
		break // a second block at c is a spiro block and is placed from c
	}
	return fresh
}

// faceBlock mirrors block b about the bond a–c by which it hangs, where that is a
// double bond whose stated geometry asks for it.
func (s *sheet) faceBlock(b *block, a, c int) {
	bond := &s.m.Bonds[s.m.BondBetween(a, c)]
	if !s.rigid(a, c) {
		return
	}
	inside, outside := bond.RefA, bond.RefB
	if bond.A == a {
		inside, outside = bond.RefB, bond.RefA
	}
	if _, ok := b.slot[inside]; !ok || !s.placed[outside] {
		return
	}
	if sameSide(s.at, a, c, inside, outside) == (bond.Geometry == molecule.Together) {
		return
	}
	o, axis := s.at[a], unit(minus(s.at[c], s.at[a]))
	for _, x := range b.atoms {
		s.at[x] = mirrored(s.at[x], o, axis)
	}
	for _, l := range b.leaves {
		k := [2]int{l.atom, l.out}
		s.leaf[k] = mirrored(s.leaf[k], o, axis)
	}
}
