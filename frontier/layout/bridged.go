package layout

import (
	"math"
	"math/rand/v2"
	"slices"

	"gonum.org/v1/gonum/optimize"

	"lobecast/frontier/molecule"
)

// embed places a block that regular polygons cannot make: bridged systems, cages,
// crowded helices. Several starting pictures (a chosen perimeter with the other atoms
// at the mean of their neighbours, and views of a spatial model) are relaxed under
// springs, and the most readable one is kept.
func (b *block) embed(m *molecule.Molecule, drawn bool) {
	n := len(b.atoms)
	b.leaves = nil
	for _, a := range b.atoms {
		for _, h := range m.Neighbours(a) {
			if _, inside := b.slot[h.Atom]; !inside {
				b.leaves = append(b.leaves, leaf{atom: a, out: h.Atom})
			}
		}
	}
	springs := b.springs(m)
	best := math.Inf(1)
	random := rand.New(rand.NewPCG(1952, uint64(n)))
	kept := make([]point, n+len(b.leaves))
	const good, fair = 0.9, 1.6 // ugliness at which looking further is not worth the time
	tries := 0
	try := func(start []point) {
		x := slices.Clone(start[:n])
		for i := range x { // leave saddle points
			x[i].X += 0.05 * (random.Float64() - 0.5)
			x[i].Y += 0.05 * (random.Float64() - 0.5)
		}
		middle := centre(x)
		for i, l := range b.leaves { // substituents start outward, a little apart
			p := x[b.slot[l.atom]]
			x = append(x, plus(p, turned(unit(minus(p, middle)), 0.4*float64(i%3-1))))
		}
		tries++
		springs.reach, springs.push, springs.bent = 1.05, 0.6, 0.25
		if tries%2 == 0 { // less room for every atom, more regular rings
			springs.reach, springs.push = 0.75, 1
		}
		if tries/2%2 == 0 { // corners of two-connected atoms stay sharp
			springs.bent = 2
		}
		springs.relax(x, 1, 60)
		springs.relax(x, 60, 120)
		if bad := springs.ugliness(x, n); bad < best-1e-6 {
			best = bad
			copy(kept, x)
		}
	}
	if drawn {
		try(b.at)
		try(b.at)
	}
	for _, perimeter := range b.perimeters(m) {
		start := b.inside(m, perimeter)
		for range 8 {
			try(start)
		}
		if n > 40 || best < good {
			break
		}
	}
	if n <= 40 && best > fair {
		for _, start := range b.views(m, random) {
			try(start)
		}
	}
	copy(b.at, kept[:n])
	for i := range b.leaves {
		b.leaves[i].at = kept[n+i]
	}
}

// perimeters proposes outer cycles: sums of rings that form one simple cycle, the
// longest first.
func (b *block) perimeters(m *molecule.Molecule) [][]int {
	r := len(b.rings)
	var cycles [][]int
	seen := map[string]bool{}
	consider := func(pick func(k int) bool) {
		edges := map[int]bool{}
		for k, ring := range b.rings {
			if !pick(k) {
				continue
			}
			for i, a := range ring {
				e := m.BondBetween(a, ring[(i+1)%len(ring)])
				if edges[e] {
					delete(edges, e)
				} else {
					edges[e] = true
				}
			}
		}
		cycle := simpleCycle(m, b.atoms, edges)
		if cycle == nil {
			return
		}
		key := slices.Clone(cycle)
		slices.Sort(key)
		text := ""
		for _, a := range key {
			text += string(rune(a + 32))
		}
		if !seen[text] {
			seen[text] = true
			cycles = append(cycles, cycle)
		}
	}
	if r <= 7 {
		for mask := 1; mask < 1<<r; mask++ {
			consider(func(k int) bool { return mask>>k&1 == 1 })
		}
	} else {
		consider(func(int) bool { return true })
		for leave := range b.rings {
			consider(func(k int) bool { return k != leave })
		}
		for only := range b.rings {
			consider(func(k int) bool { return k == only })
		}
	}
	slices.SortStableFunc(cycles, func(p, q []int) int { return len(q) - len(p) })
	return cycles[:min(len(cycles), 6)]
}

// simpleCycle walks the given bonds; nil unless they form exactly one cycle.
func simpleCycle(m *molecule.Molecule, atoms []int, edges map[int]bool) []int {
	if len(edges) == 0 {
		return nil
	}
	start := -1
	for _, a := range atoms {
		degree := 0
		for _, h := range m.Neighbours(a) {
			if edges[h.Bond] {
				degree++
			}
		}
		if degree != 0 && degree != 2 {
			return nil
		}
		if degree == 2 && start < 0 {
			start = a
		}
	}
	cycle := []int{start}
	last, came := start, -1
	for {
		next := -1
		for _, h := range m.Neighbours(last) {
			if edges[h.Bond] && h.Bond != came {
				next, came = h.Atom, h.Bond
				break
			}
		}
		if next == start {
			break
		}
		cycle = append(cycle, next)
		last = next
	}
	if len(cycle) != len(edges) {
		return nil
	}
	return cycle
}

// inside puts the perimeter on a regular polygon and every other atom at the mean of
// its neighbours (Tutte's barycentric drawing).
func (b *block) inside(m *molecule.Molecule, perimeter []int) []point {
	at := make([]point, len(b.atoms))
	fixed := make([]bool, len(b.atoms))
	corners := polygonOn(len(perimeter), point{}, point{X: 1}, 1)
	centre := point{}
	for _, c := range corners {
		centre = plus(centre, times(c, 1/float64(len(corners))))
	}
	for i := range at {
		at[i] = centre
	}
	for i, a := range perimeter {
		at[b.slot[a]], fixed[b.slot[a]] = corners[i], true
	}
	for range 100 {
		for i, a := range b.atoms {
			if fixed[i] {
				continue
			}
			sum, k := point{}, 0.0
			for _, h := range m.Neighbours(a) {
				if s, ok := b.slot[h.Atom]; ok {
					sum, k = plus(sum, at[s]), k+1
				}
			}
			at[i] = times(sum, 1/k)
		}
	}
	return at
}

// views models the block in space from its graph distances and looks at it from
// several sides, the way cages are usually drawn.
func (b *block) views(m *molecule.Molecule, random *rand.Rand) [][]point {
	n := len(b.atoms)
	hops := b.hops(m)
	x := make([][3]float64, n)
	for i := range x {
		for k := range 3 {
			x[i][k] = random.Float64()*2 - 1
		}
	}
	// Stress majorization in three dimensions with weights 1/d² (SMACOF).
	for range 150 {
		next := make([][3]float64, n)
		for i := range x {
			weight := 0.0
			for j := range x {
				if i == j {
					continue
				}
				d := hops[i*n+j]
				target := math.Pow(d, 0.85)
				w := 1 / (d * d)
				r := math.Sqrt(sq(x[i][0]-x[j][0]) + sq(x[i][1]-x[j][1]) + sq(x[i][2]-x[j][2]))
				for k := range 3 {
					next[i][k] += w * (x[j][k] + target*(x[i][k]-x[j][k])/math.Max(r, 1e-6))
				}
				weight += w
			}
			for k := range 3 {
				next[i][k] /= weight
			}
		}
		x = next
	}
	var starts [][]point
	for _, tilt := range []float64{0.2, 0.5, 0.9, 1.3} {
		for _, turn := range []float64{0.2, 0.7, 1.2, 1.9, 2.6} {
			st, ct := math.Sincos(tilt)
			sn, cn := math.Sincos(turn)
			at := make([]point, n)
			for i := range x {
				u, v := x[i][0]*cn-x[i][1]*sn, x[i][0]*sn+x[i][1]*cn
				at[i] = point{X: u, Y: v*ct - x[i][2]*st}
			}
			starts = append(starts, at)
		}
	}
	return starts
}

func sq(x float64) float64 { return x * x }

// hops is the graph distance between the atoms of the block, row by row.
func (b *block) hops(m *molecule.Molecule) []float64 {
	n := len(b.atoms)
	d := make([]float64, n*n)
	for i := range n {
		row := d[i*n : (i+1)*n]
		for j := range row {
			row[j] = -1
		}
		row[i] = 0
		queue := []int{i}
		for len(queue) > 0 {
			k := queue[0]
			queue = queue[1:]
			for _, h := range m.Neighbours(b.atoms[k]) {
				if s, ok := b.slot[h.Atom]; ok && row[s] < 0 {
					row[s] = row[k] + 1
					queue = append(queue, s)
				}
			}
		}
	}
	return d
}

// spring holds two positions at a rest length.
type spring struct {
	i, j         int
	rest, weight float64
	kind         springKind
}

// springKind says what a spring stands for.
type springKind uint8

const (
	bond   springKind = iota // within the piece
	away                     // a bond that leaves the block
	chord                    // a 1,3 distance
	corner                   // a 1,3 distance across a two-connected atom of a block
)

// springs is the energy that shapes a piece: bonds of unit length, the 1,3 distances
// of regular rings or of the given angles, and repulsion between all other pairs
// nearer than reach.
type springs struct {
	list  []spring
	apart [][2]int
	reach float64
	push  float64
	bent  float64 // weight of corner springs
	// corners are the two-connected atoms, between their neighbours.
	corners [][3]int
	rings   [][]int // small rings, as slots
}

// springs of a block and its leaves: bonds, and chords of the small rings.
func (b *block) springs(m *molecule.Molecule) *springs {
	k := len(b.atoms)
	n := k + len(b.leaves)
	s := &springs{reach: 1.05, push: 0.6}
	tied := make([]bool, n*n)
	tie := func(p, q int, kind springKind) {
		s.list = append(s.list, spring{p, q, 1, 1, kind})
		tied[p*n+q], tied[q*n+p] = true, true
	}
	for _, e := range b.bonds(m) {
		tie(e[0], e[1], bond)
	}
	for i, l := range b.leaves {
		tie(b.slot[l.atom], k+i, away)
	}
	for i, a := range b.atoms {
		near := m.Neighbours(a)
		if len(near) == 2 {
			p, okP := b.slot[near[0].Atom]
			q, okQ := b.slot[near[1].Atom]
			if okP && okQ && m.Bonds[near[0].Bond].Order+m.Bonds[near[1].Bond].Order < 4 {
				s.corners = append(s.corners, [3]int{p, i, q})
			}
		}
	}
	sum, count := make([]float64, n*n), make([]float64, n*n)
	for _, ring := range b.rings {
		k := len(ring)
		if k < 4 || k >= macro {
			continue
		}
		slots := make([]int, k)
		for i, a := range ring {
			slots[i] = b.slot[a]
		}
		s.rings = append(s.rings, slots)
		across := 2 * math.Cos(math.Pi/float64(k))
		for i := range ring {
			p, q := b.slot[ring[i]], b.slot[ring[(i+2)%k]]
			if k == 4 && i > 1 {
				continue
			}
			p, q = min(p, q), max(p, q)
			sum[p*n+q] += across
			count[p*n+q]++
		}
	}
	for p := range n {
		for q := p + 1; q < n; q++ {
			if tied[p*n+q] {
				continue
			}
			if count[p*n+q] > 0 {
				kind := chord
				for _, c := range s.corners {
					if min(c[0], c[2]) == p && max(c[0], c[2]) == q {
						kind = corner
					}
				}
				s.list = append(s.list, spring{p, q, sum[p*n+q] / count[p*n+q], 0.25, kind})
			}
			s.apart = append(s.apart, [2]int{p, q})
		}
	}
	return s
}

// energy is the energy of the springs at x (laid out x0, y0, x1, …); it adds the
// gradient to g.
func (s *springs) energy(x, g []float64, stiff float64) float64 {
	e := 0.0
	for _, k := range s.list {
		w := k.weight
		switch k.kind {
		case bond, away:
			w *= stiff
		case corner:
			w = s.bent
		}
		dx, dy := x[2*k.i]-x[2*k.j], x[2*k.i+1]-x[2*k.j+1]
		d := math.Max(math.Sqrt(dx*dx+dy*dy), 1e-9)
		off := d - k.rest
		e += w * off * off
		f := 2 * w * off / d
		g[2*k.i] += f * dx
		g[2*k.i+1] += f * dy
		g[2*k.j] -= f * dx
		g[2*k.j+1] -= f * dy
	}
	for _, p := range s.apart {
		dx, dy := x[2*p[0]]-x[2*p[1]], x[2*p[0]+1]-x[2*p[1]+1]
		d := dx*dx + dy*dy
		if d >= s.reach*s.reach {
			continue
		}
		d = math.Max(math.Sqrt(d), 1e-9)
		off := s.reach - d
		e += s.push * off * off
		f := -2 * s.push * off / d
		g[2*p[0]] += f * dx
		g[2*p[0]+1] += f * dy
		g[2*p[1]] -= f * dx
		g[2*p[1]+1] -= f * dy
	}
	return e
}

// relax moves the points downhill; stiff multiplies the weight of bonds.
func (s *springs) relax(at []point, stiff float64, steps int) {
	x := make([]float64, 2*len(at))
	for i, p := range at {
		x[2*i], x[2*i+1] = p.X, p.Y
	}
	// The minimizer asks for value and gradient at the same place, one after the other.
	last, slope, value := make([]float64, len(x)), make([]float64, len(x)), 0.0
	known := false
	compute := func(x []float64) {
		if known && slices.Equal(x, last) {
			return
		}
		known = true
		copy(last, x)
		clear(slope)
		value = s.energy(x, slope, stiff)
	}
	problem := optimize.Problem{
		Func: func(x []float64) float64 { compute(x); return value },
		Grad: func(g, x []float64) { compute(x); copy(g, slope) },
	}
	settings := &optimize.Settings{MajorIterations: steps, GradientThreshold: 1e-4}
	result, _ := optimize.Minimize(problem, x, settings, &optimize.LBFGS{Store: 8})
	if result == nil { // never started: the points stay as they are
		return
	}
	for i := range at {
		p := point{X: result.X[2*i], Y: result.X[2*i+1]}
		if math.IsNaN(p.X) || math.IsNaN(p.Y) {
			return
		}
	}
	for i := range at {
		at[i] = point{X: result.X[2*i], Y: result.X[2*i+1]}
	}
}

// ugliness weighs what a reader minds in a block of n atoms with its leaves: unequal
// bonds, crossings, atoms close together or on foreign bonds, irregular rings. That
// two bonds of a cage cross is usual in perspective; that a substituent does is not.
func (s *springs) ugliness(at []point, n int) float64 {
	bad := 0.0
	var bonds []spring
	for _, k := range s.list {
		off := math.Abs(distance(at[k.i], at[k.j]) - k.rest)
		if k.kind <= away {
			bad += 40 * math.Max(0, off-0.03)
			bonds = append(bonds, k)
		} else {
			bad += 0.5 * off * off
		}
	}
	for _, p := range s.apart {
		if d := distance(at[p[0]], at[p[1]]); d < 0.8 {
			bad += 4 * (0.8 - d)
			if d < 0.52 {
				bad += 3
			}
		}
	}
	for _, c := range s.corners {
		u, v := unit(minus(at[c[0]], at[c[1]])), unit(minus(at[c[2]], at[c[1]]))
		if straight := -dot(u, v); straight > 0.9 { // an atom in a straight line cannot be seen
			bad += 8 * (straight - 0.9) / 0.1
		}
	}
	for _, p := range bonds {
		if p.kind != away {
			continue
		}
		for _, ring := range s.rings { // a substituent does not stand inside its own ring
			if !slices.Contains(ring, p.i) {
				continue
			}
			corners := make([]point, len(ring))
			for k, c := range ring {
				corners[k] = at[c]
			}
			if contains(corners, at[p.j]) {
				bad += 1.5
			}
		}
	}
	for i, p := range bonds {
		for k := range at {
			if k != p.i && k != p.j {
				if d := fromSegment(at[k], at[p.i], at[p.j]); d < 0.3 {
					bad += 2 * (0.3 - d) / 0.3
				}
			}
		}
		for _, q := range bonds[:i] {
			if p.i != q.i && p.i != q.j && p.j != q.i && p.j != q.j &&
				segmentsCross(at[p.i], at[p.j], at[q.i], at[q.j]) {
				bad += 1.5
				if p.kind == away || q.kind == away {
					bad += 2
				}
			}
		}
	}
	return bad
}
