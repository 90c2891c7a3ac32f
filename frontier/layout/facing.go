package layout

import (
	"math"

	"lobecast/frontier/molecule"
)

// Facing draws a connected molecule for a reaction at the two ends of a chain of its
// atoms (a diene, a dipole, the two atoms of an alkene): the ends lie on a level line,
// the first left, the last right, with the chain above it, bent to the s-cis form where
// single bonds outside rings allow it. Coordinates of a molfile are not used.
func Facing(m *molecule.Molecule, chain []int) *Drawing {
	c, rank := canonical(m)
	s := newSheet(c)
	s.start()
	path := make([]int, len(chain))
	for i, x := range chain {
		path[i] = rank[x]
	}
	s.fold(path)
	moves := s.movable()
	if s.conflicts() > 0 && len(moves) > 0 {
		// Only joints off the path may still move.
		on := map[int]bool{}
		for _, x := range path {
			on[x] = true
		}
		var free []int
		for _, i := range moves {
			j := &s.joints[i]
			keep := true
			for _, x := range j.branch {
				keep = keep && !on[x]
			}
			if keep {
				free = append(free, i)
			}
		}
		s.descend(newWorkspace(s), free, false)
		if s.conflicts() > 0 {
			s.descend(newWorkspace(s), free, true)
		}
	}
	s.level(path)
	d := &Drawing{Molecule: m, At: make([]point, len(m.Atoms))}
	for i := range d.At {
		d.At[i] = s.at[rank[i]]
	}
	d.wedge()
	return d
}

// fold mirrors what lies beyond each single bond of the path, outside rings, so that
// the path curls to one side.
func (s *sheet) fold(path []int) {
	for i := 1; i+2 < len(path); i++ {
		p, q := path[i], path[i+1]
		if s.sameBlock(p, q) != nil || s.rigid(p, q) || s.m.BondBetween(p, q) < 0 {
			continue
		}
		if sameSide(s.at, p, q, path[i-1], path[i+2]) {
			continue
		}
		o, axis := s.at[p], unit(minus(s.at[q], s.at[p]))
		for _, x := range s.m.Branch(p, q) {
			s.at[x] = mirrored(s.at[x], o, axis)
		}
	}
}

// level turns the picture so that the ends of the path lie on one line, the path above.
func (s *sheet) level(path []int) {
	if len(path) < 2 {
		return
	}
	a, b := path[0], path[len(path)-1]
	o := s.at[a]
	turn := -direction(s.at[a], s.at[b])
	above := 0.0
	for i, p := range s.at {
		q := turned(minus(p, o), turn)
		s.at[i] = q
		above += q.Y
	}
	inner := 0.0
	for _, x := range path[1 : len(path)-1] {
		inner += s.at[x].Y
	}
	// The chain between the ends decides; where it is straight, the substituents do.
	if inner < -1e-6 || math.Abs(inner) <= 1e-6 && above < 0 {
		for i := range s.at {
			s.at[i].Y = -s.at[i].Y
		}
	}
}

// Mirrored is the drawing turned upside down by reflection; wedges change sides with
// it, so that the configuration stays.
func (d *Drawing) Mirrored() *Drawing {
	e := &Drawing{Molecule: d.Molecule, At: make([]point, len(d.At))}
	for i, p := range d.At {
		e.At[i] = point{X: p.X, Y: -p.Y}
	}
	e.wedge()
	return e
}

// Moved is the drawing shifted by the given amounts.
func (d *Drawing) Moved(dx, dy float64) *Drawing {
	by := point{X: dx, Y: dy}
	e := &Drawing{Molecule: d.Molecule, At: make([]point, len(d.At)), Wedges: make([]Wedge, len(d.Wedges))}
	for i, p := range d.At {
		e.At[i] = plus(p, by)
	}
	for i, w := range d.Wedges {
		w.Hydrogen = plus(w.Hydrogen, by)
		e.Wedges[i] = w
	}
	return e
}
