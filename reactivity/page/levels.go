package page

import (
	"fmt"
	"math"
	"strconv"
)

// rung is one set of degenerate levels of the diagram.
type rung struct {
	x         float64 // level energy in β relative to α
	count     int     // degeneracy
	electrons float64 // in the whole set
}

// rungs gathers levels (in descending x) into degenerate sets. x within 2e-4 counts as
// equal, because reports carry four decimals.
func rungs(x, occupation []float64) []rung {
	var list []rung
	for j := range x {
		if n := len(list); n > 0 && math.Abs(list[n-1].x-x[j]) < 2e-4 {
			list[n-1].count++
			list[n-1].electrons += occupation[j]
			continue
		}
		list = append(list, rung{x[j], 1, occupation[j]})
	}
	return list
}

// frontierRungs are the indices of the highest set with electrons and of the lowest
// with room; equal where a set is partly filled; -1 where there is none.
func frontierRungs(list []rung) (homo, lumo int) {
	homo, lumo = -1, -1
	for k, r := range list {
		if r.electrons > 1e-6 {
			homo = k
		}
		if lumo < 0 && r.electrons < 2*float64(r.count)-1e-6 {
			lumo = k
		}
	}
	return homo, lumo
}

// levelDiagram draws levels as rungs, bonding below, with their electrons and the gap.
func levelDiagram(x, occupation []float64, name string) string {
	list := rungs(x, occupation)
	c := newCanvas()
	if len(list) == 0 {
		return c.svg("figure levels", name, 6)
	}
	homo, lumo := frontierRungs(list)
	top, bottom := list[len(list)-1].x, list[0].x // antibonding (smallest x) on top
	span := math.Max(bottom-top, 0.5)
	height := math.Min(300, math.Max(130, 26*float64(len(list))))
	y := func(x float64) float64 { return (x - top) / span * height }
	const half, step = 13.0, 32.0
	widest := 1
	for _, r := range list {
		widest = max(widest, r.count)
	}
	right := float64(min(widest, 6))*step/2 + 8
	// Labels: the frontier rungs first, then the others where there is room.
	taken := []float64{}
	room := func(at float64) bool {
		for _, t := range taken {
			if math.Abs(t-at) < 13 {
				return false
			}
		}
		return true
	}
	labelAt := make([]bool, len(list))
	claim := func(k int) {
		if k >= 0 && !labelAt[k] && room(y(list[k].x)) {
			labelAt[k] = true
			taken = append(taken, y(list[k].x))
		}
	}
	claim(homo)
	claim(lumo)
	for k := range list {
		claim(k)
	}
	for k, r := range list {
		yy := y(r.x)
		class := "level"
		if k == homo || k == lumo {
			class = "level frontier"
		}
		n := min(r.count, 6)
		for i := range n {
			cx := (float64(i) - float64(n-1)/2) * step
			c.line(layerBonds, class, point{X: cx - half, Y: yy}, point{X: cx + half, Y: yy})
			each := r.electrons / float64(r.count)
			c.electrons(point{X: cx, Y: yy}, each)
		}
		if labelAt[k] {
			s := signed(r.x)
			if r.count > 1 {
				s += " ×" + strconv.Itoa(r.count)
			}
			if each := r.electrons / float64(r.count); each > 1e-6 && math.Abs(each-1) > 1e-6 && math.Abs(each-2) > 1e-6 {
				s += fmt.Sprintf(" (%s e each)", trimmed(each, 2))
			}
			c.write(layerLabels, "value", "start", 10.5, point{X: right, Y: yy}, s)
		}
	}
	// The line of α, and the gap.
	left := -right
	if top < 0 && bottom > 0 {
		c.line(layerGuides, "alpha", point{X: left, Y: y(0)}, point{X: right - 4, Y: y(0)})
		c.write(layerLabels, "value", "end", 10.5, point{X: left - 3, Y: y(0)}, "α")
	}
	if homo >= 0 && lumo >= 0 && homo != lumo {
		a, b := y(list[lumo].x), y(list[homo].x)
		gx := left - 16
		c.line(layerGuides, "gap", point{X: gx, Y: a}, point{X: gx, Y: b})
		c.line(layerGuides, "gap", point{X: gx - 4, Y: a}, point{X: gx + 4, Y: a})
		c.line(layerGuides, "gap", point{X: gx - 4, Y: b}, point{X: gx + 4, Y: b})
		mid := (a + b) / 2
		if y(0) > a && y(0) < b && math.Abs(mid-y(0)) < 13 {
			gx -= 6
		}
		c.write(layerLabels, "value strong", "end", 11, point{X: gx - 7, Y: mid},
			"gap "+trimmed(list[homo].x-list[lumo].x, 3)+" |β|")
	}
	return c.svg("figure levels", name, 6)
}

// electrons draws the electrons of one level as arrows: two, one, or a part.
func (c *canvas) electrons(at point, n float64) {
	arrow := func(x float64, up bool) {
		a, b := point{X: x, Y: at.Y + 7}, point{X: x, Y: at.Y - 7}
		if !up {
			a, b = b, a
		}
		c.line(layerMarks, "electron", a, b)
		d := 3.0
		if up {
			d = -3
		}
		c.line(layerMarks, "electron", b, point{X: x - 2.6, Y: b.Y - d*1.1})
		c.line(layerMarks, "electron", b, point{X: x + 2.6, Y: b.Y - d*1.1})
	}
	switch {
	case n > 2-1e-6:
		arrow(at.X-4, true)
		arrow(at.X+4, false)
	case math.Abs(n-1) < 1e-6:
		arrow(at.X, true)
	case n > 1e-6: // a part of a shell, filled as a whole
		c.circle(layerMarks, "electron part", at, 3.5)
	}
}

// trimmed writes a number with at most the given decimals.
func trimmed(x float64, decimals int) string {
	x = math.Round(x*1e9) / 1e9
	s := strconv.FormatFloat(x, 'f', decimals, 64)
	for len(s) > 1 && s[len(s)-1] == '0' {
		s = s[:len(s)-1]
	}
	if s[len(s)-1] == '.' {
		s = s[:len(s)-1]
	}
	if s == "-0" {
		s = "0"
	}
	if s[0] == '-' {
		s = "−" + s[1:]
	}
	return s
}

// signed writes x of a level with three decimals and its sign.
func signed(x float64) string {
	s := strconv.FormatFloat(math.Abs(math.Round(x*1e9)/1e9), 'f', 3, 64)
	switch {
	case s == "0.000":
		return s
	case x < 0:
		return "−" + s
	}
	return "+" + s
}
