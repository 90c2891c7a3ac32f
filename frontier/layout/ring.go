package layout

import (
	"math"
	"slices"

	"lobecast/frontier/molecule"
)

// block is a set of rings joined through shared bonds; it is drawn as one rigid piece.
// Rings that meet in a single (spiro) atom belong to different blocks.
type block struct {
	rings [][]int
	atoms []int   // ascending
	at    []point // position of atoms[i] in the block's own frame
	slot  map[int]int
	// leaves are the bonds that leave an irregular block, with the position that its
	// shape leaves free for their far atom; nil for blocks of regular polygons.
	leaves []leaf
}

// leaf is a bond from atom of a block to a neighbour outside it.
type leaf struct {
	atom, out int
	at        point
}

// macro is the ring size from which a ring is drawn as a walk on the honeycomb
// instead of a regular polygon.
const macro = 10

// findBlocks groups the rings of m by shared bonds.
func findBlocks(m *molecule.Molecule) []*block {
	rings := m.Rings()
	group := make([]int, len(rings))
	owner := make([]int, len(m.Bonds))
	for i := range owner {
		owner[i] = -1
	}
	for i := range group {
		group[i] = i
	}
	var root func(i int) int
	root = func(i int) int {
		for group[i] != i {
			group[i] = group[group[i]]
			i = group[i]
		}
		return i
	}
	for r, ring := range rings {
		for i, a := range ring {
			b := m.BondBetween(a, ring[(i+1)%len(ring)])
			if owner[b] < 0 {
				owner[b] = r
			} else {
				x, y := root(owner[b]), root(r)
				group[max(x, y)] = min(x, y)
			}
		}
	}
	var blocks []*block
	where := make([]int, len(rings))
	for r, ring := range rings {
		g := root(r)
		if g == r {
			where[r] = len(blocks)
			blocks = append(blocks, &block{slot: map[int]int{}})
		}
		b := blocks[where[g]]
		b.rings = append(b.rings, ring)
		b.atoms = append(b.atoms, ring...)
	}
	for _, b := range blocks {
		slices.Sort(b.atoms)
		b.atoms = slices.Compact(b.atoms)
		b.at = make([]point, len(b.atoms))
		for i, a := range b.atoms {
			b.slot[a] = i
		}
	}
	return blocks
}

// place gives the block's atoms their positions.
func (b *block) place(m *molecule.Molecule) {
	regular := b.fuse(m)
	if regular && !b.bridged(m) {
		return
	}
	b.embed(m, regular)
}

// bridged reports whether two rings of the block share more than one bond.
func (b *block) bridged(m *molecule.Molecule) bool {
	has := make([]map[int]bool, len(b.rings))
	for r, ring := range b.rings {
		has[r] = make(map[int]bool, len(ring))
		for i, a := range ring {
			has[r][m.BondBetween(a, ring[(i+1)%len(ring)])] = true
		}
		for _, other := range has[:r] {
			shared := 0
			for bond := range other {
				if has[r][bond] {
					shared++
				}
			}
			if shared > 1 {
				return true
			}
		}
	}
	return false
}

// fuse builds the block from regular polygons, ring on ring. A ring that shares more
// than one bond with what is drawn takes its remaining atoms along an arc. It gives
// up, returning false, when atoms would fall on each other.
func (b *block) fuse(m *molecule.Molecule) bool {
	shared := make([]int, len(b.rings)) // bonds each ring shares with others
	count := map[int]int{}
	for _, ring := range b.rings {
		for i, a := range ring {
			count[m.BondBetween(a, ring[(i+1)%len(ring)])]++
		}
	}
	first := 0
	for r, ring := range b.rings {
		for i, a := range ring {
			if count[m.BondBetween(a, ring[(i+1)%len(ring)])] > 1 {
				shared[r]++
			}
		}
		big, was := len(ring) >= macro, len(b.rings[first]) >= macro
		if big && !was || big == was && (shared[r] > shared[first] ||
			shared[r] == shared[first] && len(ring) == 6 && len(b.rings[first]) != 6) {
			first = r
		}
	}
	drawn := make([]bool, len(b.atoms))
	done := make([]bool, len(b.rings))
	set := func(a int, p point) {
		b.at[b.slot[a]], drawn[b.slot[a]] = p, true
	}
	ring := b.rings[first]
	var corners []point
	if len(ring) >= macro {
		corners = macrocycle(m, ring, b)
	} else {
		corners = polygonOn(len(ring), point{}, point{X: 1}, 1)
	}
	for i, a := range ring {
		set(a, corners[i])
	}
	done[first] = true
	for left := len(b.rings) - 1; left > 0; left-- {
		// Next: the ring with the most bonds already drawn, regular ones first.
		best, bestShare := -1, 0
		for r, ring := range b.rings {
			if done[r] {
				continue
			}
			share := 0
			for i, a := range ring {
				if drawn[b.slot[a]] && drawn[b.slot[ring[(i+1)%len(ring)]]] {
					share++
				}
			}
			if share > 0 && (best < 0 || share > bestShare) {
				best, bestShare = r, share
			}
		}
		if best < 0 || !b.attach(b.rings[best], drawn, done, set) {
			return false
		}
		done[best] = true
	}
	for i, a := range b.atoms {
		for j, c := range b.atoms[:i] {
			d := distance(b.at[i], b.at[j])
			if m.BondBetween(a, c) >= 0 {
				if math.Abs(d-1) > 0.04 {
					return false
				}
			} else if d < 0.55 {
				return false
			}
		}
	}
	return b.crossings(m) == 0
}

// attach draws one more ring onto the atoms already drawn.
func (b *block) attach(ring []int, drawn, done []bool, set func(int, point)) bool {
	n := len(ring)
	on := func(i int) bool { return drawn[b.slot[ring[(i+n)%n]]] }
	pos := func(i int) point { return b.at[b.slot[ring[(i+n)%n]]] }
	// The drawn atoms must be one run of the ring.
	start, runs := -1, 0
	for i := range ring {
		if on(i) && !on(i-1) {
			start = i
			runs++
		}
	}
	if start < 0 { // all atoms drawn: only acceptable when all its bonds are right
		return true
	}
	if runs != 1 {
		return false
	}
	run := 1
	for on(start + run) {
		run++
	}
	if run < 2 {
		return false
	}
	// The free side of the first shared bond lies opposite to the ring that has it.
	side := 0.0
	for r, other := range b.rings {
		if !done[r] {
			continue
		}
		for i, a := range other {
			c := other[(i+1)%len(other)]
			if a == ring[start%n] && c == ring[(start+1)%n] || c == ring[start%n] && a == ring[(start+1)%n] {
				corners := make([]point, len(other))
				for k, x := range other {
					corners[k] = b.at[b.slot[x]]
				}
				inside := 1.0 // left of the walk when anticlockwise
				if area(corners) < 0 {
					inside = -1
				}
				if a != ring[start%n] {
					inside = -inside
				}
				if side != 0 && side != -inside {
					return false // rings on both sides already
				}
				side = -inside
			}
		}
	}
	if side == 0 {
		return false
	}
	if n < macro {
		corners := polygonOn(n, pos(start), pos(start+1), side)
		fits := true
		for i := 2; i < run; i++ {
			fits = fits && distance(corners[i], pos(start+i)) < 0.05
		}
		if fits {
			for i := run; i < n; i++ {
				set(ring[(start+i)%n], corners[i])
			}
			return true
		}
	}
	// Otherwise the rest of the ring bows out in an arc of unit chords.
	from, to := pos(start+run-1), pos(start)
	rest := n - run
	arc, ok := arcBetween(from, to, rest, side)
	if !ok {
		return false
	}
	for i, p := range arc {
		set(ring[(start+run+i)%n], p)
	}
	return true
}

// arcBetween places k points on a circular arc from a to b so that all k+1 chords
// have unit length; with side +1 the arc turns left on its way.
func arcBetween(a, b point, k int, side float64) ([]point, bool) {
	d := distance(a, b)
	steps := float64(k + 1)
	if d > steps-1e-6 || d < 1e-6 {
		return nil, false
	}
	low, high := 0.0, 2*math.Pi/steps
	for range 60 { // chord of k+1 unit steps that turn by φ each: sin((k+1)φ/2)/sin(φ/2)
		mid := (low + high) / 2
		if math.Sin(steps*mid/2)/math.Sin(mid/2) > d {
			low = mid
		} else {
			high = mid
		}
	}
	phi := (low + high) / 2
	angle := direction(a, b) - side*float64(k)*phi/2
	points := make([]point, k)
	p := a
	for i := range points {
		p = plus(p, polar(angle))
		points[i] = p
		angle += side * phi
	}
	return points, true
}

// crossings counts pairs of the block's bonds that cut each other.
func (b *block) crossings(m *molecule.Molecule) int {
	bonds := b.bonds(m)
	n := 0
	for i, p := range bonds {
		for _, q := range bonds[:i] {
			if p[0] != q[0] && p[0] != q[1] && p[1] != q[0] && p[1] != q[1] &&
				segmentsCross(b.at[p[0]], b.at[p[1]], b.at[q[0]], b.at[q[1]]) {
				n++
			}
		}
	}
	return n
}

// bonds lists the bonds within the block, as pairs of slots.
func (b *block) bonds(m *molecule.Molecule) [][2]int {
	var list [][2]int
	for i, a := range b.atoms {
		for j, c := range b.atoms[:i] {
			if m.BondBetween(a, c) >= 0 {
				list = append(list, [2]int{j, i})
			}
		}
	}
	return list
}
