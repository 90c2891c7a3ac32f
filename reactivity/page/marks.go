package page

import (
	"fmt"
	"math"
	"slices"
)

// pin marks atom i with a numbered disc on a thin stalk, set where there is room. The
// disc grows with the chance; the first rank is a filled disc, the others are open,
// and a planned site has a second ring, so that nothing hangs on colour.
func (f *formula) pin(i, rank int, chance *float64, planned bool) {
	r := 9.0
	if chance != nil {
		r = 7.5 + 7*math.Sqrt(math.Max(0, math.Min(1, *chance)))
	}
	outer := r
	if planned {
		outer += 3
	}
	at := f.at(i)
	best, bestCost := point{}, math.Inf(1)
	away := point{}
	for _, h := range f.d.Molecule.Neighbours(i) {
		away = minus(away, unit(minus(f.at(h.Atom), at)))
	}
	for _, reach := range []float64{outer + 8, outer + 15, outer + 24, outer + 36, outer + 50} {
		for k := range 48 {
			dir := point{X: math.Cos(float64(k) * math.Pi / 24), Y: math.Sin(float64(k) * math.Pi / 24)}
			c := plus(at, times(dir, reach))
			cost := 0.08 * (reach - outer)
			if length(away) > 0.2 {
				cost -= 1.5 * dot(dir, unit(away))
			}
			for _, b := range f.boxes {
				if o := b.overlap(c, outer+2); o > 0 {
					cost += 6 + 3*o
				}
				if b.overlap(plus(at, times(dir, reach-outer)), 1) > 0 {
					cost += 3
				}
			}
			for _, s := range f.segments {
				if o := outer + 2.5 - fromSegment(c, s[0], s[1]); o > 0 {
					cost += 3 + 2*o
				}
				if crosses(plus(at, times(dir, 4)), c, s[0], s[1]) {
					cost += 4
				}
			}
			for a := range f.d.At {
				if o := outer + 3 - length(minus(f.at(a), c)); o > 0 && a != i {
					cost += 2 + o
				}
			}
			if cost < bestCost-1e-9 {
				best, bestCost = c, cost
			}
		}
	}
	dir := unit(minus(best, at))
	from := plus(at, times(dir, 3))
	if f.labels[i] != nil {
		from = f.clip(best, at, i)
	}
	f.line(layerGuides, "stalk", from, minus(best, times(dir, outer)))
	class := ""
	if rank == 1 {
		class = " first"
	}
	if planned {
		f.circle(layerMarks, "ring", best, outer)
	}
	f.circle(layerMarks, "pin"+class, best, r)
	f.write(layerMarks, "number"+class, "middle", 11.5, best, fmt.Sprint(rank))
	// The disc as a whole is taken, not only its number.
	f.boxes[len(f.boxes)-1] = box{point{X: best.X - outer, Y: best.Y - outer}, point{X: best.X + outer, Y: best.Y + outer}}
}

func crosses(a, b, c, d point) bool {
	ab, cd := minus(b, a), minus(d, c)
	return cross(ab, minus(c, a))*cross(ab, minus(d, a)) < 0 && cross(cd, minus(a, c))*cross(cd, minus(b, c)) < 0
}

// lobeRadius is the radius of a lobe with coefficient 1, in pixels: the area of a lobe
// is proportional to c².
const lobeRadius = 25.0

// lobe draws one p orbital seen from above: a filled circle for a positive, an open
// one for a negative coefficient, of area proportional to c².
func (f *formula) lobe(i int, c float64) {
	r := lobeRadius * math.Abs(c)
	if r < 1.2 {
		return
	}
	class := "lobe plus"
	if c < 0 {
		class = "lobe minus"
	}
	f.circle(layerLobes, class, f.at(i), r)
	f.lobesAt = append(f.lobesAt, box{minus(f.at(i), point{X: 0.8 * r, Y: 0.8 * r}), plus(f.at(i), point{X: 0.8 * r, Y: 0.8 * r})})
}

// share draws the mean c² of a degenerate level, where signs have no meaning: a dotted
// circle of that area.
func (f *formula) share(i int, c2 float64) {
	if r := lobeRadius * math.Sqrt(math.Max(0, c2)); r >= 1.2 {
		f.circle(layerLobes, "lobe mean", f.at(i), r)
	}
}

// beside writes a short text next to atom i where there is room.
func (f *formula) beside(i int, class string, size float64, s string) {
	w := textWidth(s, size)/2 + 1
	at := f.at(i)
	f.spot(at, w, size*0.6, []float64{11, 15, 20, 27}, func(c point) { f.write(layerMarks, class, "middle", size, c, s) })
}

// besideBond writes a short text next to the middle of bond b.
func (f *formula) besideBond(i, j int, class string, size float64, s string) {
	w := textWidth(s, size)/2 + 1
	at := times(plus(f.at(i), f.at(j)), 0.5)
	f.spot(at, w, size*0.6, []float64{9, 12, 16, 22}, func(c point) { f.write(layerMarks, class, "middle", size, c, s) })
}

// spot finds room for a rectangle of half-width w and half-height h near at.
func (f *formula) spot(at point, w, h float64, reaches []float64, put func(point)) {
	best, bestCost := at, math.Inf(1)
	for _, reach := range reaches {
		for k := range 32 {
			dir := point{X: math.Cos(float64(k) * math.Pi / 16), Y: math.Sin(float64(k) * math.Pi / 16)}
			c := plus(at, point{X: dir.X * (reach + w*math.Abs(dir.X)*0.8), Y: dir.Y * reach})
			mine := box{point{X: c.X - w, Y: c.Y - h}, point{X: c.X + w, Y: c.Y + h}}
			cost := 0.1 * reach
			for _, b := range slices.Concat(f.boxes, f.lobesAt) {
				dx := math.Min(b.high.X, mine.high.X) - math.Max(b.low.X, mine.low.X)
				dy := math.Min(b.high.Y, mine.high.Y) - math.Max(b.low.Y, mine.low.Y)
				if dx > -2 && dy > -1 {
					cost += 20
				}
			}
			for _, s := range f.segments {
				for t := 0.0; t <= 1.001; t += 0.125 {
					if mine.contains(plus(s[0], times(minus(s[1], s[0]), t)), 1) {
						cost += 1.5
					}
				}
			}
			if cost < bestCost-1e-9 {
				best, bestCost = c, cost
			}
		}
	}
	put(best)
}
