package page

import (
	"math"
	"strings"

	"lobecast/reactivity/report"
)

// phasePicture draws the reacting orbitals of a pericyclic process side by side, in
// their order round the ring: each as its two lobes, above and below the plane, the
// filled one positive, of area proportional to c² in the highest occupied level.
func phasePicture(p *report.Process) (svg, caption string) {
	n := len(p.Orbital)
	if n < 2 {
		return "", ""
	}
	const step, scale = 46.0, 27.0
	c := newCanvas()
	at := func(i int) point { return point{X: float64(i) * step} }
	c.line(layerBonds, "level", point{X: -14}, point{X: float64(n-1)*step + 14})
	for i, o := range p.Orbital {
		v := 0.0
		if o.HOMO != nil {
			v = *o.HOMO
		}
		r := scale * math.Abs(v)
		up, down := "lobe plus", "lobe minus"
		if v < 0 {
			up, down = down, up
		}
		if r >= 1.5 {
			c.ellipse(up, point{X: at(i).X, Y: -r*1.25 - 1}, r*0.8, r*1.25)
			c.ellipse(down, point{X: at(i).X, Y: r*1.25 + 1}, r*0.8, r*1.25)
		} else {
			c.circle(layerMarks, "electron part", at(i), 2)
		}
		c.write(layerLabels, "value", "middle", 10.5, point{X: at(i).X, Y: scale*2.1 + 8}, short(o.Label, 8))
		c.write(layerLabels, "value", "middle", 9.5, point{X: at(i).X, Y: scale*2.1 + 22}, signed(v))
	}
	caption = "highest occupied level of the reactant, orbital by orbital: filled and open lobes have opposite signs, areas go with c²"
	return c.svg("figure phases", "phases of the reacting orbitals: "+caption, 6), caption
}

// meeting says how the ends of the highest occupied level meet when the ends of an
// electrocyclic system turn in the mode of p; empty for other processes.
func meeting(p *report.Process) string {
	n := len(p.Orbital)
	if n < 2 {
		return ""
	}
	first, last := p.Orbital[0].HOMO, p.Orbital[n-1].HOMO
	turning := 0.0
	switch {
	case strings.Contains(p.Mode, "disrotatory"):
		turning = 1
	case strings.Contains(p.Mode, "conrotatory"):
		turning = -1
	}
	if turning == 0 || first == nil || last == nil || math.Abs(*first**last) < 1e-6 {
		return ""
	}
	if *first**last*turning > 0 {
		return "Turned in this mode, the ends of the highest occupied level meet in phase."
	}
	return "Turned in this mode, the ends of the highest occupied level meet out of phase."
}

func (c *canvas) ellipse(class string, at point, rx, ry float64) {
	c.reach(point{X: at.X - rx, Y: at.Y - ry}, 1)
	c.reach(point{X: at.X + rx, Y: at.Y + ry}, 1)
	c.add(layerLobes, `<ellipse class="%s" cx="%s" cy="%s" rx="%s" ry="%s"/>`, class, px(at.X), px(at.Y), px(rx), px(ry))
}

// short cuts a label to n characters.
func short(s string, n int) string {
	r := []rune(s)
	if len(r) <= n {
		return s
	}
	return string(r[:n-1]) + "…"
}
