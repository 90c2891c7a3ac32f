package page

import (
	"fmt"
	"math"
	"strings"

	"lobecast/frontier/molecule"
)

type point = molecule.Point

// The measures of a drawing, in pixels.
const (
	bondLength = 34.0
	labelSize  = 13.0
	smallSize  = 9.5
	lineGap    = 5.0 // between the lines of a double bond
	wedgeWidth = 4.0 // half the broad end of a wedge
)

// layers of a drawing, the lowest first.
const (
	layerLobes = iota
	layerGuides
	layerBonds
	layerLabels
	layerMarks
	layers
)

// canvas gathers the elements of one SVG drawing and keeps track of its extent.
// Coordinates are pixels, y downward.
type canvas struct {
	layer     [layers]strings.Builder
	low, high point
	// boxes are areas taken by text and marks.
	boxes []box
	// lobesAt are areas taken by lobes, which numbers keep clear of.
	lobesAt []box
	// segments are drawn bonds.
	segments [][2]point
}

// box is an upright rectangle.
type box struct{ low, high point }

func (b box) contains(p point, margin float64) bool {
	return p.X > b.low.X-margin && p.X < b.high.X+margin && p.Y > b.low.Y-margin && p.Y < b.high.Y+margin
}

// overlap is how deep a circle reaches into the box; 0 when it does not.
func (b box) overlap(c point, r float64) float64 {
	dx := math.Max(math.Max(b.low.X-c.X, c.X-b.high.X), 0)
	dy := math.Max(math.Max(b.low.Y-c.Y, c.Y-b.high.Y), 0)
	return math.Max(0, r-math.Hypot(dx, dy))
}

func newCanvas() *canvas {
	return &canvas{
		low:  point{X: math.Inf(1), Y: math.Inf(1)},
		high: point{X: math.Inf(-1), Y: math.Inf(-1)},
	}
}

func (c *canvas) reach(p point, r float64) {
	c.low.X, c.low.Y = math.Min(c.low.X, p.X-r), math.Min(c.low.Y, p.Y-r)
	c.high.X, c.high.Y = math.Max(c.high.X, p.X+r), math.Max(c.high.Y, p.Y+r)
}

func (c *canvas) add(layer int, format string, args ...any) {
	fmt.Fprintf(&c.layer[layer], format, args...)
}

func (c *canvas) line(layer int, class string, a, b point) {
	c.reach(a, 1)
	c.reach(b, 1)
	c.add(layer, `<line class="%s" x1="%s" y1="%s" x2="%s" y2="%s"/>`, class, px(a.X), px(a.Y), px(b.X), px(b.Y))
}

func (c *canvas) circle(layer int, class string, at point, r float64) {
	c.reach(at, r+1)
	c.add(layer, `<circle class="%s" cx="%s" cy="%s" r="%s"/>`, class, px(at.X), px(at.Y), px(r))
}

// write puts one line of text; anchor is start, middle or end. The baseline is placed
// so that capitals stand centred on at.
func (c *canvas) write(layer int, class, anchor string, size float64, at point, s string) {
	w := textWidth(s, size)
	left := at.X
	switch anchor {
	case "middle":
		left -= w / 2
	case "end":
		left -= w
	}
	b := box{point{X: left, Y: at.Y - size*0.55}, point{X: left + w, Y: at.Y + size*0.55}}
	c.boxes = append(c.boxes, b)
	c.reach(b.low, 1)
	c.reach(b.high, 1)
	c.add(layer, `<text class="%s" x="%s" y="%s" font-size="%s" text-anchor="%s">%s</text>`,
		class, px(at.X), px(at.Y+size*0.36), px(size), anchor, text(s))
}

// svg closes the drawing. name is what a screen reader says of it.
func (c *canvas) svg(class, name string, margin float64) string {
	if math.IsInf(c.low.X, 1) {
		c.reach(point{}, 10)
	}
	w, h := c.high.X-c.low.X+2*margin, c.high.Y-c.low.Y+2*margin
	var b strings.Builder
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" class="%s" role="img" aria-label="%s" width="%s" height="%s" viewBox="%s %s %s %s"><title>%s</title>`,
		class, text(name), px(math.Ceil(w)), px(math.Ceil(h)), px(c.low.X-margin), px(c.low.Y-margin), px(w), px(h), text(name))
	for i := range c.layer {
		b.WriteString(c.layer[i].String())
	}
	b.WriteString("</svg>")
	return b.String()
}

// textWidth estimates the width of a line set in a sans-serif face; a little wide, so
// that what is placed beside it keeps clear whatever face the reader's machine has.
func textWidth(s string, size float64) float64 {
	w := 0.0
	for _, r := range s {
		switch {
		case strings.ContainsRune("iljtfrI|.,:;'!()[]·′", r):
			w += 0.38
		case strings.ContainsRune("mwMW@%—", r):
			w += 0.95
		case r >= 'A' && r <= 'Z':
			w += 0.74
		case r == ' ':
			w += 0.33
		default:
			w += 0.62
		}
	}
	return w * size
}

func plus(a, b point) point          { return point{X: a.X + b.X, Y: a.Y + b.Y} }
func minus(a, b point) point         { return point{X: a.X - b.X, Y: a.Y - b.Y} }
func times(a point, f float64) point { return point{X: a.X * f, Y: a.Y * f} }
func dot(a, b point) float64         { return a.X*b.X + a.Y*b.Y }
func cross(a, b point) float64       { return a.X*b.Y - a.Y*b.X }
func length(a point) float64         { return math.Hypot(a.X, a.Y) }

func unit(a point) point {
	l := length(a)
	if l < 1e-12 {
		return point{X: 1}
	}
	return times(a, 1/l)
}

func fromSegment(p, a, b point) float64 {
	ab := minus(b, a)
	l := dot(ab, ab)
	if l < 1e-12 {
		return length(minus(p, a))
	}
	t := math.Max(0, math.Min(1, dot(minus(p, a), ab)/l))
	return length(minus(p, plus(a, times(ab, t))))
}
