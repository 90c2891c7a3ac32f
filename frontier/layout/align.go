package layout

import (
	"math"
	"slices"

	"lobecast/frontier/molecule"
)

// holding draws m with the corresponding atoms at their places in ref. It returns nil
// where too little can be held: rings are held whole or not at all, and what is held
// must hang together.
func holding(m *molecule.Molecule, ref *Drawing, pairs [][2]int) *sheet {
	s := newSheet(m)
	for _, p := range pairs {
		s.at[p[0]], s.placed[p[0]] = ref.At[p[1]], true
	}
	good := func(a, c int) bool {
		d := distance(s.at[a], s.at[c])
		return d > 0.8 && d < 1.2
	}
	// A ring block is held only when all its atoms are and all its bonds look right.
	for changed := true; changed; {
		changed = false
		for _, b := range s.blocks {
			whole, any := true, false
			for _, a := range b.atoms {
				whole = whole && s.placed[a]
				any = any || s.placed[a]
			}
			if whole {
				for _, e := range b.bonds(m) {
					whole = whole && good(b.atoms[e[0]], b.atoms[e[1]])
				}
			}
			if any && !whole {
				for _, a := range b.atoms {
					if s.placed[a] {
						s.placed[a] = false
						changed = true
					}
				}
			}
		}
	}
	// Keep the largest connected part.
	part := make([]int, len(s.at))
	for i := range part {
		part[i] = -1
	}
	var sizes []int
	for a := range s.at {
		if !s.placed[a] || part[a] >= 0 {
			continue
		}
		k := len(sizes)
		part[a] = k
		queue := []int{a}
		for i := 0; i < len(queue); i++ {
			for _, h := range m.Neighbours(queue[i]) {
				if s.placed[h.Atom] && part[h.Atom] < 0 && good(queue[i], h.Atom) {
					part[h.Atom] = k
					queue = append(queue, h.Atom)
				}
			}
		}
		sizes = append(sizes, len(queue))
	}
	if len(sizes) == 0 {
		return nil
	}
	largest := 0
	for k := range sizes {
		if sizes[k] > sizes[largest] {
			largest = k
		}
	}
	if sizes[largest] < 2 || 2*sizes[largest] < len(pairs) {
		return nil // turning the whole picture keeps more in its place
	}
	var from []int
	for a := range s.at {
		s.placed[a] = part[a] == largest && s.placed[a]
		s.held[a] = s.placed[a]
		if s.placed[a] {
			from = append(from, a)
		}
	}
	// Two held atoms that are bonded must be at bonding distance.
	for i := range m.Bonds {
		b := &m.Bonds[i]
		if s.held[b.A] && s.held[b.B] && !good(b.A, b.B) {
			return nil
		}
		if s.held[b.A] && s.held[b.B] && s.rigid(b.A, b.B) && s.held[b.RefA] && s.held[b.RefB] &&
			sameSide(s.at, b.A, b.B, b.RefA, b.RefB) != (b.Geometry == molecule.Together) {
			return nil
		}
	}
	s.grow(from)
	// What hangs between held parts would have to be stretched.
	for i := range m.Bonds {
		if !good(m.Bonds[i].A, m.Bonds[i].B) {
			return nil
		}
	}
	return s
}

// layOver turns, and where that fits better mirrors, the picture onto the
// corresponding atoms of ref (least squares).
func (s *sheet) layOver(ref *Drawing, pairs [][2]int) {
	from, to := point{}, point{}
	n := float64(len(pairs))
	for _, p := range pairs {
		from = plus(from, times(s.at[p[0]], 1/n))
		to = plus(to, times(ref.At[p[1]], 1/n))
	}
	// Turning angle for the picture as it is and for its mirror image.
	fit := func(mirror bool) (angle, gain float64) {
		c, k := 0.0, 0.0
		for _, p := range pairs {
			u, v := minus(s.at[p[0]], from), minus(ref.At[p[1]], to)
			if mirror {
				u.Y = -u.Y
			}
			c += dot(u, v)
			k += cross(u, v)
		}
		return math.Atan2(k, c), math.Hypot(c, k)
	}
	angle, gain := fit(false)
	angleM, gainM := fit(true)
	mirror := gainM > gain*(1+1e-6)+1e-9
	if mirror {
		angle = angleM
	}
	// Keep bonds on the compass where the fit leaves a choice.
	if snapped := math.Round(angle/(math.Pi/6)) * math.Pi / 6; math.Abs(snapped-angle) < 0.14 {
		angle = snapped
	}
	for i, p := range s.at {
		u := minus(p, from)
		if mirror {
			u.Y = -u.Y
		}
		s.at[i] = plus(to, turned(u, angle))
	}
}

// Match finds which atoms of a correspond to which of b: a large common part of the
// two constitutions, grown from the atoms with the most alike surroundings. Bond
// orders may differ, elements may not. Pairs are in ascending order of a's atoms.
func Match(a, b *molecule.Molecule) [][2]int {
	const radius = 8
	codesA, codesB := surroundings(a, radius), surroundings(b, radius)
	alike := func(i, j int) int { // largest radius at which the surroundings agree
		for r := radius; r >= 0; r-- {
			if codesA[r][i] == codesB[r][j] {
				return r
			}
		}
		return -1
	}
	n, k := len(a.Atoms), len(b.Atoms)
	if n == 0 || k == 0 || n*k > 250000 {
		return nil
	}
	score := make([]int, n*k)
	type seed struct{ i, j, alike int }
	var seeds []seed
	for i := range n {
		for j := range k {
			score[i*k+j] = alike(i, j)
			if score[i*k+j] >= 1 {
				seeds = append(seeds, seed{i, j, score[i*k+j]})
			}
		}
	}
	slices.SortStableFunc(seeds, func(p, q seed) int { return q.alike - p.alike })
	grow := func(to, from []int, i, j int) {
		to[i], from[j] = j, i
		queue := []int{i}
		for q := 0; q < len(queue); q++ {
			x := queue[q]
			y := to[x]
			for {
				bi, bj, best := -1, -1, -1
				for _, h := range a.Neighbours(x) {
					if to[h.Atom] >= 0 {
						continue
					}
					for _, g := range b.Neighbours(y) {
						if from[g.Atom] >= 0 || score[h.Atom*k+g.Atom] < 0 {
							continue
						}
						v := 4 * score[h.Atom*k+g.Atom]
						if a.Bonds[h.Bond].Order == b.Bonds[g.Bond].Order {
							v++
						}
						// Prefer neighbours that close a ring both molecules have.
						for _, hh := range a.Neighbours(h.Atom) {
							if t := to[hh.Atom]; hh.Atom != x && t >= 0 && b.BondBetween(t, g.Atom) >= 0 {
								v += 40
							}
						}
						if v > best {
							bi, bj, best = h.Atom, g.Atom, v
						}
					}
				}
				if bi < 0 {
					break
				}
				to[bi], from[bj] = bj, bi
				queue = append(queue, bi)
			}
		}
	}
	var best []int
	bestScore := -1
	tried := 0
	usedI := make([]int, n)
	for _, sd := range seeds {
		if tried >= 24 {
			break
		}
		if usedI[sd.i] >= 3 {
			continue
		}
		usedI[sd.i]++
		tried++
		to, from := filled(n), filled(k)
		grow(to, from, sd.i, sd.j)
		for _, more := range seeds {
			if more.alike >= 2 && to[more.i] < 0 && from[more.j] < 0 {
				grow(to, from, more.i, more.j)
			}
		}
		total := 0
		for i := range to {
			if to[i] >= 0 {
				total++
			}
		}
		for e := range a.Bonds {
			x, y := to[a.Bonds[e].A], to[a.Bonds[e].B]
			if x >= 0 && y >= 0 {
				if f := b.BondBetween(x, y); f >= 0 {
					total += 3
				}
			}
		}
		if total > bestScore {
			best, bestScore = to, total
		}
	}
	var pairs [][2]int
	for i, j := range best {
		if j >= 0 {
			pairs = append(pairs, [2]int{i, j})
		}
	}
	return pairs
}

func filled(n int) []int {
	list := make([]int, n)
	for i := range list {
		list[i] = -1
	}
	return list
}

// surroundings hashes what each atom sees within 0, 1, 2, … bonds: elements and
// connections, not bond orders or charges.
func surroundings(m *molecule.Molecule, radius int) [][]uint64 {
	n := len(m.Atoms)
	codes := make([][]uint64, radius+1)
	codes[0] = make([]uint64, n)
	for i := range n {
		codes[0][i] = mix(uint64(m.Atoms[i].Element) + 77)
	}
	var near []uint64
	for r := 1; r <= radius; r++ {
		codes[r] = make([]uint64, n)
		for i := range n {
			near = near[:0]
			for _, h := range m.Neighbours(i) {
				near = append(near, codes[r-1][h.Atom])
			}
			slices.Sort(near)
			code := mix(codes[r-1][i])
			for _, c := range near {
				code = mix(code ^ c)
			}
			codes[r][i] = code
		}
	}
	return codes
}

// mix spreads the bits of a number (the finalizer of splitmix64).
func mix(x uint64) uint64 {
	x += 0x9e3779b97f4a7c15
	x = (x ^ x>>30) * 0xbf58476d1ce4e5b9
	x = (x ^ x>>27) * 0x94d049bb133111eb
	return x ^ x>>31
}
