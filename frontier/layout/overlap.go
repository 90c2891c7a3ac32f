package layout

import (
	"math"
	"math/rand/v2"
	"slices"
)

// Two atoms nearer than contact look crowded; nearer than hard they are in conflict.
const (
	contact = 1.25
	hard    = 0.72
)

// untangle removes collisions: first branches are mirrored about their bond and
// neighbours of an atom exchanged, singly and in pairs, then branches are bent, and
// what still collides is relaxed with all bonds kept at their length.
func (s *sheet) untangle() {
	moves := s.movable()
	if len(moves) > 0 {
		w := newWorkspace(s)
		s.descend(w, moves, false)
		if s.conflicts() > 0 {
			s.pairs(w, moves)
		}
		if s.conflicts() > 0 {
			s.descend(w, moves, true)
		}
		if s.conflicts() > 0 {
			s.shake(w, moves)
		}
	}
	if s.conflicts() > 0 {
		s.loosen()
	}
}

// movable lists the joints whose branch holds nothing that must stay.
func (s *sheet) movable() []int {
	var list []int
	for i := range s.joints {
		free := true
		for _, a := range s.joints[i].branch {
			free = free && !s.held[a]
		}
		if free {
			list = append(list, i)
		}
	}
	return list
}

// workspace holds what the search needs again and again.
type workspace struct {
	in    []bool // atom belongs to the branch being moved
	saved []point
	rest  []int
	work  int // pairs of atoms looked at so far
}

// patience bounds the pairs of atoms looked at while untangling one molecule, so that
// very large ones end in good time with what has been reached.
const patience = 40_000_000

func newWorkspace(s *sheet) *workspace {
	return &workspace{in: make([]bool, len(s.at)), saved: make([]point, len(s.at))}
}

// between is the cost of the branch against the rest of the drawing.
func (s *sheet) between(w *workspace, branch []int) float64 {
	for i := range w.in {
		w.in[i] = false
	}
	for _, a := range branch {
		w.in[a] = true
	}
	w.rest = w.rest[:0]
	for a := range s.at {
		if !w.in[a] && s.placed[a] {
			w.rest = append(w.rest, a)
		}
	}
	w.work += len(branch)*len(w.rest) + len(s.m.Bonds)*(len(s.m.Bonds)+len(s.at))/8
	cost := 0.0
	for _, a := range branch {
		pa := s.at[a]
		for _, c := range w.rest {
			cost += pairCost(s.at[c].X-pa.X, s.at[c].Y-pa.Y)
		}
	}
	for i := range s.m.Bonds {
		p := &s.m.Bonds[i]
		if !w.in[p.A] && !w.in[p.B] {
			continue
		}
		a, b := s.at[p.A], s.at[p.B]
		loX, hiX := min(a.X, b.X)-nearLine, max(a.X, b.X)+nearLine
		loY, hiY := min(a.Y, b.Y)-nearLine, max(a.Y, b.Y)+nearLine
		for _, c := range w.rest {
			pc := s.at[c]
			if pc.X < loX || pc.X > hiX || pc.Y < loY || pc.Y > hiY || c == p.A || c == p.B {
				continue
			}
			cost += lineCost(fromSegment(pc, a, b))
		}
		for j := range s.m.Bonds {
			q := &s.m.Bonds[j]
			if w.in[q.A] || w.in[q.B] {
				continue
			}
			c, d := s.at[q.A], s.at[q.B]
			if c.X < loX && d.X < loX || c.X > hiX && d.X > hiX || c.Y < loY && d.Y < loY || c.Y > hiY && d.Y > hiY {
				continue
			}
			if p.A != q.A && p.A != q.B && p.B != q.A && p.B != q.B {
				if segmentsCross(a, b, c, d) {
					cost += 6
				}
				for _, x := range [2]int{p.A, p.B} {
					if w.in[x] {
						cost += lineCost(fromSegment(s.at[x], c, d))
					}
				}
			}
		}
	}
	return cost
}

// pairCost is what two atoms cost that are not bonded: a weak push that keeps chains
// stretched, and a strong one at contact.
func pairCost(dx, dy float64) float64 {
	d2 := dx*dx + dy*dy
	cost := 0.02 / (d2 + 0.1)
	if d2 < contact*contact {
		off := (contact - math.Sqrt(d2)) / 0.6
		cost += off * off
		if d2 < hard*hard {
			cost += 3
		}
	}
	return cost
}

// nearLine is the distance from a bond within which an atom crowds it.
const nearLine = 0.4

// lineCost is what an atom costs at distance d from a bond that is not its own.
func lineCost(d float64) float64 {
	if d >= nearLine {
		return 0
	}
	off := (nearLine - d) / nearLine
	return 2 * off * off
}

// conflicts counts what a reader would stumble over: atoms nearer than hard, and
// bonds that cross, outside the rigid blocks.
func (s *sheet) conflicts() int {
	n := 0
	for a := range s.at {
		for c := range a {
			dx, dy := s.at[a].X-s.at[c].X, s.at[a].Y-s.at[c].Y
			if dx*dx+dy*dy < hard*hard && s.sameBlock(a, c) == nil && s.m.BondBetween(a, c) < 0 {
				n++
			}
		}
	}
	for i := range s.m.Bonds {
		p := &s.m.Bonds[i]
		for j := range i {
			q := &s.m.Bonds[j]
			if p.A == q.A || p.A == q.B || p.B == q.A || p.B == q.B {
				continue
			}
			if segmentsCross(s.at[p.A], s.at[p.B], s.at[q.A], s.at[q.B]) &&
				(s.sameBlock(p.A, q.A) == nil || s.sameBlock(p.B, q.B) == nil || s.sameBlock(p.A, p.B) == nil) {
				n++
			}
		}
	}
	return n
}

// flip mirrors the branch of a joint about its bond (or, for a spiro block, about the
// line that halves it).
func (s *sheet) flip(j *joint) {
	o := s.at[j.hub]
	var axis point
	if j.first >= 0 {
		axis = unit(minus(s.at[j.first], o))
	} else {
		sum := point{}
		for _, h := range s.m.Neighbours(j.hub) {
			if slices.Contains(j.branch, h.Atom) {
				sum = plus(sum, minus(s.at[h.Atom], o))
			}
		}
		axis = unit(sum)
	}
	for _, a := range j.branch {
		s.at[a] = mirrored(s.at[a], o, axis)
	}
}

func (s *sheet) turn(j *joint, angle float64) {
	o := s.at[j.hub]
	for _, a := range j.branch {
		s.at[a] = plus(o, turned(minus(s.at[a], o), angle))
	}
}

// stiffHub reports whether the neighbours of atom a may not trade places because a
// double bond with stated geometry ends there.
func (s *sheet) stiffHub(a int) bool {
	for _, h := range s.m.Neighbours(a) {
		if s.rigid(a, h.Atom) {
			return true
		}
	}
	return false
}

// descend makes the best single move over and over until none helps.
func (s *sheet) descend(w *workspace, moves []int, bends bool) {
	for range 60 {
		best, gain := func() {}, 1e-4
		for k, i := range moves {
			if w.work > patience {
				return
			}
			j := &s.joints[i]
			before := s.between(w, j.branch)
			s.keep(w, j.branch)
			if !j.rigid && len(j.branch) > 1 {
				s.flip(j)
				if g := before - s.between(w, j.branch); g > gain+1e-6 {
					gain, best = g, func() { s.flip(j) }
				}
				s.restore(w, j.branch)
			}
			if bends {
				for _, step := range []float64{15, -15, 30, -30, 45, -45} {
					if math.Abs(j.bend+step) > 46 {
						continue
					}
					s.turn(j, step*math.Pi/180)
					price := 0.6 * (sq((j.bend+step)/30) - sq(j.bend/30))
					if g := before - s.between(w, j.branch) - price; g > gain+1e-6 {
						gain, best = g, func() { s.turn(j, step*math.Pi/180); j.bend += step }
					}
					s.restore(w, j.branch)
				}
			}
			if j.first < 0 || s.stiffHub(j.hub) {
				continue
			}
			for _, i2 := range moves[:k] {
				j2 := &s.joints[i2]
				if j2.hub != j.hub || j2.first < 0 || j.bend != 0 || j2.bend != 0 {
					continue
				}
				both := slices.Concat(j.branch, j2.branch)
				before := s.between(w, both) + s.mutual(j.branch, j2.branch)
				s.keep(w, both)
				s.swap(j, j2)
				if g := before - s.between(w, both) - s.mutual(j.branch, j2.branch); g > gain+1e-6 {
					gain, best = g, func() { s.swap(j, j2) }
				}
				s.restore(w, both)
			}
		}
		if gain <= 1e-4 {
			return
		}
		best()
	}
}

func (s *sheet) keep(w *workspace, branch []int) {
	for _, a := range branch {
		w.saved[a] = s.at[a]
	}
}

func (s *sheet) restore(w *workspace, branch []int) {
	for _, a := range branch {
		s.at[a] = w.saved[a]
	}
}

// mutual is the cost between two branches.
func (s *sheet) mutual(p, q []int) float64 {
	cost := 0.0
	for _, a := range p {
		for _, c := range q {
			cost += pairCost(s.at[a].X-s.at[c].X, s.at[a].Y-s.at[c].Y)
		}
	}
	return cost
}

// swap exchanges the directions of two branches of one atom.
func (s *sheet) swap(p, q *joint) {
	o := s.at[p.hub]
	angle := direction(o, s.at[q.first]) - direction(o, s.at[p.first])
	s.turn(p, angle)
	s.turn(q, -angle)
}

// pairs tries every two flips at once, for knots that no single flip undoes.
func (s *sheet) pairs(w *workspace, moves []int) {
	var flips []*joint
	for _, i := range moves {
		if j := &s.joints[i]; !j.rigid && len(j.branch) > 1 {
			flips = append(flips, j)
		}
	}
	if len(flips) > 24 {
		flips = flips[:24]
	}
	for range 4 {
		now := s.total()
		best, gain := [2]*joint{}, 1e-4
		for k, p := range flips {
			for _, q := range flips[:k] {
				w.work += len(s.at)*len(s.at) + len(s.m.Bonds)*(len(s.m.Bonds)+len(s.at))
				if w.work > patience {
					return
				}
				saved := slices.Clone(s.at)
				s.flip(p)
				s.flip(q)
				if g := now - s.total(); g > gain+1e-6 {
					gain, best = g, [2]*joint{p, q}
				}
				copy(s.at, saved)
			}
		}
		if best[0] == nil {
			return
		}
		s.flip(best[0])
		s.flip(best[1])
		s.descend(w, moves, false)
		if s.conflicts() == 0 {
			return
		}
	}
}

// total is the cost of the whole drawing.
func (s *sheet) total() float64 {
	cost := 0.0
	for a := range s.at {
		for c := range a {
			cost += pairCost(s.at[a].X-s.at[c].X, s.at[a].Y-s.at[c].Y)
		}
	}
	for i := range s.m.Bonds {
		p := &s.m.Bonds[i]
		cost -= pairCost(s.at[p.A].X-s.at[p.B].X, s.at[p.A].Y-s.at[p.B].Y) // bonded
		a, b := s.at[p.A], s.at[p.B]
		for j := range i {
			q := &s.m.Bonds[j]
			if p.A == q.A || p.A == q.B || p.B == q.A || p.B == q.B {
				continue
			}
			if segmentsCross(a, b, s.at[q.A], s.at[q.B]) {
				cost += 6
			}
		}
		loX, hiX := min(a.X, b.X)-nearLine, max(a.X, b.X)+nearLine
		loY, hiY := min(a.Y, b.Y)-nearLine, max(a.Y, b.Y)+nearLine
		for c, pc := range s.at {
			if pc.X < loX || pc.X > hiX || pc.Y < loY || pc.Y > hiY || c == p.A || c == p.B {
				continue
			}
			cost += lineCost(fromSegment(pc, a, b))
		}
	}
	for i := range s.joints {
		cost += 0.6 * sq(s.joints[i].bend/30)
	}
	return cost
}

// shake walks at random from the best picture found so far, going uphill less and
// less often (simulated annealing with a fixed seed), and keeps the best.
func (s *sheet) shake(w *workspace, moves []int) {
	random := rand.New(rand.NewPCG(1964, uint64(len(s.at))))
	best, bestCost := slices.Clone(s.at), s.total()
	bestBend := s.bends()
	cost := bestCost
	steps := min(1500, 60*len(moves))
	for step := range steps {
		if w.work > patience {
			break
		}
		heat := 1.5 * (1 - float64(step)/float64(steps))
		j := &s.joints[moves[random.IntN(len(moves))]]
		before := s.between(w, j.branch) + 0.6*sq(j.bend/30)
		s.keep(w, j.branch)
		bend := j.bend
		if kind := random.IntN(3); kind == 0 && !j.rigid && len(j.branch) > 1 {
			s.flip(j)
		} else {
			angle := []float64{15, -15, 30, -30}[random.IntN(4)]
			if math.Abs(bend+angle) > 46 {
				continue
			}
			s.turn(j, angle*math.Pi/180)
			j.bend += angle
		}
		change := s.between(w, j.branch) + 0.6*sq(j.bend/30) - before
		if change > 0 && random.Float64() >= math.Exp(-change/math.Max(heat, 1e-3)) {
			s.restore(w, j.branch)
			j.bend = bend
			continue
		}
		cost += change
		if cost < bestCost-1e-6 {
			bestCost = cost
			copy(best, s.at)
			bestBend = s.bends()
		}
	}
	copy(s.at, best)
	for i := range s.joints {
		s.joints[i].bend = bestBend[i]
	}
	s.descend(w, moves, true)
}

func (s *sheet) bends() []float64 {
	list := make([]float64, len(s.joints))
	for i := range s.joints {
		list[i] = s.joints[i].bend
	}
	return list
}

// loosen relaxes the whole picture: bonds keep their length, angles give way a
// little, and atoms that collide are pushed apart. It is kept only where it helps.
func (s *sheet) loosen() {
	for i := range s.held {
		if s.held[i] {
			return
		}
	}
	n := len(s.at)
	k := &springs{reach: 0.95, push: 3}
	tied := make(map[[2]int]bool)
	add := func(i, j int, weight float64, kind springKind) {
		i, j = min(i, j), max(i, j)
		if tied[[2]int{i, j}] {
			return
		}
		tied[[2]int{i, j}] = true
		k.list = append(k.list, spring{i, j, distance(s.at[i], s.at[j]), weight, kind})
	}
	for i := range s.m.Bonds {
		b := &s.m.Bonds[i]
		add(b.A, b.B, 1, bond)
	}
	for _, b := range s.blocks {
		for i, a := range b.atoms {
			for _, c := range b.atoms[:i] {
				add(c, a, 2/distance(s.at[c], s.at[a]), chord)
			}
		}
	}
	for a := range n {
		near := s.m.Neighbours(a)
		for i := range near {
			for j := range i {
				add(near[i].Atom, near[j].Atom, 0.3, chord)
			}
		}
	}
	for i := range n {
		for j := range i {
			if !tied[[2]int{j, i}] {
				k.apart = append(k.apart, [2]int{j, i})
			}
		}
	}
	was, before := s.conflicts(), slices.Clone(s.at)
	k.relax(s.at, 40, 200)
	if s.conflicts() >= was || !s.geometryKept(before) {
		copy(s.at, before)
	}
}

// geometryKept reports whether every double bond still has the sides it had.
func (s *sheet) geometryKept(before []point) bool {
	for i := range s.m.Bonds {
		b := &s.m.Bonds[i]
		if !s.rigid(b.A, b.B) {
			continue
		}
		if sameSide(s.at, b.A, b.B, b.RefA, b.RefB) != sameSide(before, b.A, b.B, b.RefA, b.RefB) {
			return false
		}
	}
	return true
}

// sameSide reports whether atoms p and q lie on one side of the line a–b.
func sameSide(at []point, a, b, p, q int) bool {
	axis := minus(at[b], at[a])
	return cross(axis, minus(at[p], at[a]))*cross(axis, minus(at[q], at[a])) > 0
}
