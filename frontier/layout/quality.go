package layout

import (
	"math"

	"lobecast/frontier/molecule"
)

// Quality measures how well a drawing reads.
type Quality struct {
	// Stretch is the longest bond divided by the shortest.
	Stretch float64
	// Nearest is the smallest distance of two atoms of one component that are not
	// bonded, in mean bond lengths.
	Nearest float64
	// Crossings counts pairs of bonds that cut each other.
	Crossings int
	// Wrong counts double bonds drawn against their stated geometry.
	Wrong int
}

// Quality measures the drawing.
func (d *Drawing) Quality() Quality {
	m := d.Molecule
	q := Quality{Stretch: 1, Nearest: math.Inf(1)}
	short, long, sum := math.Inf(1), 0.0, 0.0
	for i := range m.Bonds {
		l := distance(d.At[m.Bonds[i].A], d.At[m.Bonds[i].B])
		short, long, sum = math.Min(short, l), math.Max(long, l), sum+l
	}
	if len(m.Bonds) > 0 {
		q.Stretch = long / short
		mean := sum / float64(len(m.Bonds))
		for a := range d.At {
			for c := range a {
				if m.BondBetween(a, c) < 0 {
					q.Nearest = math.Min(q.Nearest, distance(d.At[a], d.At[c])/mean)
				}
			}
		}
	}
	for i := range m.Bonds {
		p := &m.Bonds[i]
		for j := range i {
			r := &m.Bonds[j]
			if p.A != r.A && p.A != r.B && p.B != r.A && p.B != r.B &&
				segmentsCross(d.At[p.A], d.At[p.B], d.At[r.A], d.At[r.B]) {
				q.Crossings++
			}
		}
		if p.Order == 2 && p.Geometry != molecule.NoGeometry &&
			sameSide(d.At, p.A, p.B, p.RefA, p.RefB) != (p.Geometry == molecule.Together) {
			q.Wrong++
		}
	}
	return q
}
