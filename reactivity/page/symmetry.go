package page

import (
	"fmt"
	"slices"

	"lobecast/frontier/layout"
	"lobecast/reactivity/report"
)

// processes writes the verdicts of orbital symmetry, the modes of one process beside
// each other.
func (w *writer) processes(list []report.Process) {
	for i := 0; i < len(list); {
		k := i + 1
		for k < len(list) && list[k].Input == list[i].Input && list[k].Name == list[i].Name && list[i].Name != "" {
			k++
		}
		group := list[i:k]
		i = k
		name := group[0].Name
		if name == "" {
			name = group[0].Components
		}
		w.f("<section class=\"card\">\n<div class=\"heading\"><h2>%s</h2></div>\n", text(sentence(name)))
		w.f("<p class=\"small soft smiles\">%s</p>\n", text(group[0].Input))
		w.modes(group)
		w.f("</section>\n")
	}
}

// modes writes the modes of one process side by side.
func (w *writer) modes(group []report.Process) {
	reactant := foldedReactant(&group[0])
	w.f("<div class=\"pictures\">\n")
	if reactant != nil {
		w.figure(processPicture(reactant, &group[0]), formingWords(&group[0]))
	}
	w.figure(phasePicture(&group[0]))
	w.f("</div>\n")
	if p := &group[0]; p.GapBefore != nil && p.GapAfter != nil {
		w.f("<p class=\"small\">Gap %s |β| before", text(trimmed(*p.GapBefore, 3)))
		if p.PiBefore != "" {
			w.f(" (%s)", text(p.PiBefore))
		}
		w.f(", %s |β| after", text(trimmed(*p.GapAfter, 3)))
		if p.PiAfter != "" {
			w.f(" (%s)", text(p.PiAfter))
		}
		w.f(".</p>\n")
	}
	w.f("<div class=\"beside\">\n")
	shown := map[string]bool{}
	for i := range group {
		p := &group[i]
		w.f("<div>\n")
		if p.Mode != "" {
			w.f("<h3>%s</h3>\n", text(sentence(p.Mode)))
		}
		w.f("<dl class=\"verdicts\">\n")
		for _, v := range [][2]string{{"thermal", p.Thermal}, {"photochemical", p.Photochemical}} {
			verdict := v[1]
			if verdict == "" {
				verdict = "no verdict"
			}
			w.f("<div><dt>%s</dt><dd>%s</dd></div>\n", v[0], verdictTag(verdict))
		}
		w.f("</dl>\n<p class=\"small\">%s, %d electrons. %s</p>\n", text(p.Components), p.Electrons, text(sentence(p.Agreement)))
		w.para("small", p.Feasible)
		w.para("small", meeting(p))
		if shown[p.Product] {
			w.f("<p class=\"small\">The product would be the same: <span class=\"smiles\">%s</span></p>\n", text(p.Product))
		} else if x := newDrawable(p.Product, nil, nil).draw(reactant); x != nil {
			shown[p.Product] = true
			w.figure(plainPicture(x, "product"), "product of this mode")
			w.f("<p class=\"smiles soft\">%s</p>\n", text(p.Product))
		}
		for _, n := range p.Notes {
			w.para("small", sentence(n))
		}
		w.f("</div>\n")
	}
	w.f("</div>\n")
}

// foldedReactant draws the reactant of a process, its reacting chain curled so that the
// ends that meet lie near each other.
func foldedReactant(p *report.Process) *drawable {
	x := newDrawable(p.Reactant, p.Numbers, nil)
	if x == nil || len(p.Forms) == 0 || !connected(x.m) {
		return x.draw(nil)
	}
	var ring []int
	for _, o := range p.Orbital {
		if i, ok := x.indexOf[o.Atom]; ok && !slices.Contains(ring, i) {
			ring = append(ring, i)
		}
	}
	// The chain begins and ends at the bond that forms.
	from, ok1 := x.indexOf[p.Forms[0][0]]
	to, ok2 := x.indexOf[p.Forms[0][1]]
	k := slices.Index(ring, from)
	if !ok1 || !ok2 || k < 0 || len(ring) < 3 {
		return x.draw(nil)
	}
	chain := append(slices.Clone(ring[k:]), ring[:k]...)
	if chain[len(chain)-1] != to {
		slices.Reverse(chain[1:])
	}
	if chain[len(chain)-1] != to {
		return x.draw(nil)
	}
	x.d = layout.Facing(x.m, chain)
	return x
}

// verdictTag writes a verdict as sign and word.
func verdictTag(verdict string) string {
	switch verdict {
	case "allowed":
		return `<span class="standing supported"><svg class="sign" viewBox="0 0 16 16" aria-hidden="true"><circle class="full" cx="8" cy="8" r="6"/></svg>allowed</span>`
	case "forbidden":
		return standingTag("forbidden")
	}
	return text(verdict)
}

// processPicture draws the reactants with the bonds that form (dashed) and the bonds
// that break (struck).
func processPicture(x *drawable, p *report.Process) string {
	c := newCanvas()
	f := newFormula(c, x.d)
	ends := func(b [2]int) (i, k int, ok bool) {
		i, ok1 := x.indexOf[b[0]]
		k, ok2 := x.indexOf[b[1]]
		return i, k, ok1 && ok2
	}
	for _, b := range p.Forms {
		if i, k, ok := ends(b); ok {
			dir := unit(minus(f.at(k), f.at(i)))
			c.line(layerGuides, "forming", plus(f.at(i), times(dir, 5)), minus(f.at(k), times(dir, 5)))
		}
	}
	for _, b := range p.Breaks {
		if i, k, ok := ends(b); ok {
			mid := times(plus(f.at(i), f.at(k)), 0.5)
			dir := unit(minus(f.at(k), f.at(i)))
			across := point{X: -dir.Y, Y: dir.X}
			for _, off := range []float64{-2, 2} {
				at := plus(mid, times(dir, off))
				c.line(layerMarks, "breaking", plus(at, times(plus(across, times(dir, 0.5)), 7)), minus(at, times(plus(across, times(dir, 0.5)), 7)))
			}
		}
	}
	return c.svg("figure structure", "reactant of the process", 6)
}

func formingWords(p *report.Process) string {
	s := "reactant"
	if len(p.Forms) > 0 {
		s += fmt.Sprintf("; dashed: %s forms", bondList(p.Forms))
	}
	if len(p.Breaks) > 0 {
		s += fmt.Sprintf("; struck through: %s breaks", bondList(p.Breaks))
	}
	return s
}
