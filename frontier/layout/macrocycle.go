package layout

import (
	"math"
	"math/bits"
	"slices"
	"sync"

	"lobecast/frontier/molecule"
)

// walkLimit is the largest ring drawn as a walk on the honeycomb; larger rings are
// drawn round.
const walkLimit = 22

// walks holds, for each even ring size, the closed walks on the honeycomb that do not
// touch themselves, as bit patterns of their turns: bit i set when corner i is convex.
var walks [walkLimit + 1]struct {
	once sync.Once
	list []uint32
}

// walksOf finds the walks of n steps; n even.
func walksOf(n int) []uint32 {
	w := &walks[n]
	w.once.Do(func() {
		convex := n/2 + 3 // convex minus concave turns is six for a closed walk
		seen := make([]point, n)
		var step func(i int, at point, heading int, left, right int, turns uint32)
		step = func(i int, at point, heading int, left, right int, turns uint32) {
			// at is corner i; the next edge leaves in direction heading.
			seen[i] = at
			for k := range i {
				d := distance(seen[k], at)
				if d < 0.5 || d < 1.2 && k != i-1 && !(k == 0 && i == n-1) {
					return
				}
			}
			if i == n-1 {
				next := plus(at, polar(float64(heading)*math.Pi/3))
				if length(next) > 0.01 {
					return
				}
				// corner 0 takes the last turn
				turn := (6 - heading) % 6
				switch {
				case turn == 1 && left == 1 && right == 0:
					turns |= 1
				case turn == 5 && left == 0 && right == 1:
				default:
					return
				}
				// keep one of each set of rotations; the caller tries all of them
				for r := 1; r < n; r++ {
					if rotate(turns, r, n) > turns {
						return
					}
				}
				w.list = append(w.list, turns)
				return
			}
			if length(at) > float64(n-i)+0.01 {
				return
			}
			next := plus(at, polar(float64(heading)*math.Pi/3))
			if left > 0 {
				step(i+1, next, (heading+1)%6, left-1, right, turns|1<<(i+1))
			}
			if right > 0 {
				step(i+1, next, (heading+5)%6, left, right-1, turns)
			}
		}
		step(0, point{}, 0, convex, n-convex, 0)
		slices.Sort(w.list)
		w.list = slices.Compact(w.list)
	})
	return w.list
}

func rotate(turns uint32, r, n int) uint32 {
	return (turns>>r | turns<<(n-r)) & (1<<n - 1)
}

// macrocycle draws one large ring: the walk on the honeycomb that keeps substituents
// and fused rings on convex corners and gives the double bonds their geometry.
func macrocycle(m *molecule.Molecule, ring []int, b *block) []point {
	n := len(ring)
	even := n + n%2
	if even > walkLimit {
		return polygonOn(n, point{}, point{X: 1}, 1)
	}
	in := make(map[int]int, n)
	for i, a := range ring {
		in[a] = i
	}
	// What each corner and each edge asks for.
	outside := make([]int, n)  // bonds leaving the ring at each corner
	bridged := make([]bool, n) // corner belongs to another ring of the block
	for i, a := range ring {
		for _, h := range m.Neighbours(a) {
			if _, ok := in[h.Atom]; ok {
				continue
			}
			outside[i]++
			if _, ok := b.slot[h.Atom]; ok {
				bridged[i] = true
			}
		}
	}
	geometry := make([]molecule.Geometry, n) // of the ring itself across edge i, i+1
	for i, a := range ring {
		c := ring[(i+1)%n]
		bond := &m.Bonds[m.BondBetween(a, c)]
		if bond.Order != 2 || bond.Geometry == molecule.NoGeometry {
			continue
		}
		g := bond.Geometry
		flip := 0
		for _, ref := range []int{bond.RefA, bond.RefB} {
			if _, ok := in[ref]; !ok {
				flip++
			}
		}
		if flip == 1 {
			g = molecule.Together + molecule.Opposite - g
		}
		geometry[i] = g
	}
	best, bestTurns, bestDrop := math.Inf(1), uint32(0), 0
	for _, base := range walksOf(even) {
		for _, mirror := range []bool{false, true} {
			turnsOf := base
			if mirror {
				turnsOf = bits.Reverse32(base) >> (32 - even)
			}
			for r := range even {
				turns := rotate(turnsOf, r, even)
				convex := func(i int) bool { return turns>>((i+even)%even)&1 == 1 }
				// An odd ring leaves out its last corner, which must be convex.
				if even != n && !convex(even-1) {
					continue
				}
				bad := 0.0
				for i := range n {
					if !convex(i) {
						bad += 0.05 + float64(outside[i])*float64(outside[i])
						if bridged[i] {
							bad += 20
						}
					}
					together := convex(i) == convex((i+1)%n)
					switch geometry[i] {
					case molecule.Together:
						if !together {
							bad += 8
						}
					case molecule.Opposite:
						if together {
							bad += 8
						}
					}
				}
				if bad < best-1e-9 {
					best, bestTurns, bestDrop = bad, turns, even-n
				}
			}
		}
	}
	if math.IsInf(best, 1) {
		return polygonOn(n, point{}, point{X: 1}, 1)
	}
	corners := make([]point, even)
	heading := 0.0
	at := point{}
	for i := range even {
		corners[i] = at
		if bestTurns>>((i+1)%even)&1 == 1 {
			at, heading = plus(at, polar(heading)), heading+math.Pi/3
		} else {
			at, heading = plus(at, polar(heading)), heading-math.Pi/3
		}
	}
	if bestDrop == 0 {
		return corners
	}
	// Close the gap of the left-out corner evenly.
	corners = corners[:n]
	s := &springs{reach: 1.2, push: 1}
	for i := range n {
		s.list = append(s.list, spring{i, (i + 1) % n, 1, 1, bond},
			spring{i, (i + 2) % n, distance(corners[i], corners[(i+2)%n]), 0.3, chord})
		for k := range i {
			if i-k > 2 && i-k < n-2 {
				s.apart = append(s.apart, [2]int{k, i})
			}
		}
	}
	for i := range s.list { // chords across the gap take the usual angle
		if k := &s.list[i]; k.kind == chord && (k.i >= n-2) {
			k.rest = math.Sqrt(3)
		}
	}
	s.relax(corners, 60, 200)
	return corners
}
