package layout

import (
	"math"
	"slices"
)

// orient turns the picture to its lasting position: bonds on the compass of thirty
// degrees, the long side across the page, the heteroatoms to the right and then
// upward.
func (s *sheet) orient() {
	n := len(s.at)
	if n < 2 {
		return
	}
	sumS, sumC := 0.0, 0.0
	for i := range s.m.Bonds {
		b := &s.m.Bonds[i]
		a := 12 * direction(s.at[b.A], s.at[b.B])
		w := 0.1 // hexagons set the compass, then other rings, then chains
		if s.sameBlock(b.A, b.B) != nil {
			w = 0.2
			if slices.Contains(s.m.RingSizes(b.A), 6) && slices.Contains(s.m.RingSizes(b.B), 6) {
				w = 1
			}
		}
		sumS += w * math.Sin(a)
		sumC += w * math.Cos(a)
	}
	grid := math.Atan2(sumS, sumC) / 12
	middle := centre(s.at)
	best, bestTurn := math.Inf(-1), 0.0
	for k := range 12 {
		turn := -grid + float64(k)*math.Pi/6
		wide, tall, hetero, order, upright := 0.0, 0.0, 0.0, 0.0, 0.0
		up := 0.0
		for i, p := range s.at {
			q := turned(minus(p, middle), turn)
			wide += q.X * q.X
			tall += q.Y * q.Y
			order += float64(i) * (q.X + 0.1*q.Y)
			if e := s.m.Atoms[i].Element; e != 6 {
				hetero += q.X
				up += q.Y
			}
		}
		for i := range s.m.Bonds {
			b := &s.m.Bonds[i]
			d := turned(minus(s.at[b.B], s.at[b.A]), turn)
			if s.sameBlock(b.A, b.B) != nil && math.Abs(d.X) < 0.05 {
				upright++
			}
		}
		score := (wide-tall)/float64(n) + 0.04*upright/math.Sqrt(float64(n)) +
			1e-2*hetero/float64(n) + 5e-3*up/float64(n) + 1e-6*order/float64(n*n)
		if score > best+1e-9 {
			best, bestTurn = score, turn
		}
	}
	for i, p := range s.at {
		s.at[i] = turned(minus(p, middle), bestTurn)
	}
}

func centre(at []point) point {
	c := point{}
	for _, p := range at {
		c = plus(c, times(p, 1/float64(len(at))))
	}
	return c
}
