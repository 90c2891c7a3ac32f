package page

import (
	"fmt"
	"math"
)

// chanceBar draws a chance between 0 and 1 with its 90 % limits: a filled bar to the
// chance, and a line with caps over the limits.
func chanceBar(chance float64, limits *[2]float64) string {
	const w, h = 150.0, 16.0
	name := fmt.Sprintf("chance %.2f", chance)
	if limits != nil {
		name += fmt.Sprintf(", 90 %% limits %.2f to %.2f", limits[0], limits[1])
	}
	clamp := func(x float64) float64 { return math.Max(0, math.Min(1, x)) * w }
	c := newCanvas()
	for _, t := range []float64{0, 0.5, 1} {
		c.line(layerGuides, "tick", point{X: t * w, Y: -h / 2}, point{X: t * w, Y: h / 2})
	}
	c.add(layerLobes, `<rect class="bar" x="0" y="%s" width="%s" height="%s"/>`, px(-h/2+4), px(clamp(chance)), px(h-8))
	if limits != nil {
		a, b := clamp(limits[0]), clamp(limits[1])
		c.line(layerMarks, "limit", point{X: a, Y: 0}, point{X: b, Y: 0})
		c.line(layerMarks, "limit", point{X: a, Y: -5}, point{X: a, Y: 5})
		c.line(layerMarks, "limit", point{X: b, Y: -5}, point{X: b, Y: 5})
	}
	return c.svg("figure bar-of-chance", name, 2)
}
