package layout

import (
	"math"

	"lobecast/frontier/molecule"
)

// point is a position or a direction on the plane.
type point = molecule.Point

func plus(a, b point) point            { return point{X: a.X + b.X, Y: a.Y + b.Y} }
func minus(a, b point) point           { return point{X: a.X - b.X, Y: a.Y - b.Y} }
func times(a point, f float64) point   { return point{X: a.X * f, Y: a.Y * f} }
func dot(a, b point) float64           { return a.X*b.X + a.Y*b.Y }
func cross(a, b point) float64         { return a.X*b.Y - a.Y*b.X }
func length(a point) float64           { return math.Hypot(a.X, a.Y) }
func distance(a, b point) float64      { return math.Hypot(a.X-b.X, a.Y-b.Y) }
func polar(angle float64) point        { return point{X: math.Cos(angle), Y: math.Sin(angle)} }
func direction(from, to point) float64 { return math.Atan2(to.Y-from.Y, to.X-from.X) }

// turned rotates a about the origin, anticlockwise, by angle in radians.
func turned(a point, angle float64) point {
	s, c := math.Sincos(angle)
	return point{X: a.X*c - a.Y*s, Y: a.X*s + a.Y*c}
}

// mirrored reflects a in the line through origin o along the unit direction d.
func mirrored(a, o, d point) point {
	r := minus(a, o)
	along := dot(r, d)
	foot := times(d, along)
	return plus(o, minus(times(foot, 2), r))
}

func unit(a point) point {
	l := length(a)
	if l < 1e-12 {
		return point{X: 1}
	}
	return times(a, 1/l)
}

// turnBetween is the anticlockwise angle from direction a to direction b, in [0, 2π).
func turnBetween(a, b float64) float64 {
	d := math.Mod(b-a, 2*math.Pi)
	if d < 0 {
		d += 2 * math.Pi
	}
	return d
}

// polygonOn gives the corners of a regular n-gon with unit edges whose first edge
// runs from a to b; side +1 puts its inside to the left of that edge, -1 to the right.
func polygonOn(n int, a, b point, side float64) []point {
	corners := make([]point, n)
	corners[0], corners[1] = a, b
	edge := minus(b, a)
	for i := 2; i < n; i++ {
		edge = turned(edge, side*2*math.Pi/float64(n))
		corners[i] = plus(corners[i-1], edge)
	}
	return corners
}

// area is the signed area of a polygon, positive when it runs anticlockwise.
func area(corners []point) float64 {
	sum := 0.0
	for i := range corners {
		sum += cross(corners[i], corners[(i+1)%len(corners)])
	}
	return sum / 2
}

// segmentsCross reports whether the open segments ab and cd cut each other.
func segmentsCross(a, b, c, d point) bool {
	const edge = 1e-9
	if max(a.X, b.X) < min(c.X, d.X) || max(c.X, d.X) < min(a.X, b.X) ||
		max(a.Y, b.Y) < min(c.Y, d.Y) || max(c.Y, d.Y) < min(a.Y, b.Y) {
		return false
	}
	ab, cd := minus(b, a), minus(d, c)
	s1, s2 := cross(ab, minus(c, a)), cross(ab, minus(d, a))
	s3, s4 := cross(cd, minus(a, c)), cross(cd, minus(b, c))
	return s1*s2 < -edge && s3*s4 < -edge
}

// fromSegment is the distance of p from the segment ab.
func fromSegment(p, a, b point) float64 {
	ab := minus(b, a)
	l := dot(ab, ab)
	if l < 1e-12 {
		return distance(p, a)
	}
	t := dot(minus(p, a), ab) / l
	t = max(0, min(1, t))
	return distance(p, plus(a, times(ab, t)))
}

// contains reports whether p lies inside the polygon.
func contains(corners []point, p point) bool {
	in := false
	for i, a := range corners {
		b := corners[(i+1)%len(corners)]
		if (a.Y > p.Y) != (b.Y > p.Y) && p.X < a.X+(p.Y-a.Y)/(b.Y-a.Y)*(b.X-a.X) {
			in = !in
		}
	}
	return in
}
