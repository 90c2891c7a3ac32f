package page

import (
	"fmt"
	"slices"
	"strings"

	"lobecast/reactivity/report"
)

func (w *writer) pairHeading(p *report.Pair) {
	name := "Cycloaddition"
	if p.B == "" {
		name = "Intramolecular cycloaddition"
	}
	w.f("<div class=\"heading\"><h2>%s: %s</h2></div>\n", name, text(callWords(p.Call)))
	w.f("<p class=\"small soft\">A <span class=\"smiles\">%s</span>", text(p.A))
	if p.B != "" {
		w.f("<br/>B <span class=\"smiles\">%s</span>", text(p.B))
	}
	w.f("</p>\n")
}

// pair writes the orientations of a cycloaddition side by side. planned holds the new
// bonds that are intended.
func (w *writer) pair(p *report.Pair, planned *report.Planned) {
	w.f("<dl class=\"verdicts\">\n")
	fact := func(name, value string) {
		if value != "" {
			w.f("<div><dt>%s</dt><dd>%s</dd></div>\n", text(name), text(value))
		}
	}
	fact("electron demand", p.Demand)
	if p.Gaps != nil {
		if p.Gaps.HOMOaLUMOb != nil {
			fact("HOMO of A to LUMO of B", trimmed(*p.Gaps.HOMOaLUMOb, 3)+" |β|")
		}
		if p.Gaps.HOMObLUMOa != nil {
			fact("HOMO of B to LUMO of A", trimmed(*p.Gaps.HOMObLUMOa, 3)+" |β|")
		}
	}
	fact("thermal", p.Thermal)
	fact("photochemical", p.Photochemical)
	w.f("</dl>\n")
	w.labelled("Lewis acid:", p.LewisAcid)
	if p.ChanceAbsent != "" {
		w.para("small soft", "No chances: "+p.ChanceAbsent)
	}
	joining := 1
	if planned != nil {
		for i := range p.Adduct {
			if sameBonds(p.Adduct[i].Bonds, planned.Bonds) {
				joining = p.Adduct[i].Joining
			}
		}
	}
	w.orientations(p, joining, planned)
	w.joinings(p)
	for i, n := range p.Notes {
		if !slices.Contains(p.Notes[:i], n) {
			w.labelled("Note:", n)
		}
	}
}

// orientations writes the adducts of one joining beside each other.
func (w *writer) orientations(p *report.Pair, joining int, planned *report.Planned) {
	var j *report.Joining
	for i := range p.Joining {
		if p.Joining[i].Order == joining {
			j = &p.Joining[i]
		}
	}
	if j == nil {
		return
	}
	w.f("<div class=\"beside\">\n")
	var first *drawable
	shown := 0
	for i := range p.Adduct {
		a := &p.Adduct[i]
		if a.Joining != joining || shown == 4 {
			continue
		}
		shown++
		w.f("<div>\n<h3>%d. %s", a.Rank, text(adductName(p, a)))
		if planned != nil && sameBonds(a.Bonds, planned.Bonds) {
			w.f(" (planned)")
		}
		w.f("</h3>\n")
		if a.Chance != nil {
			w.f("<p>%s</p>\n", chance(a.Chance, a.Limits))
		}
		svg, caption := w.pairPicture(p, j, a)
		if svg == "" {
			svg, caption = innerPicture(p, a)
		}
		w.f("<div class=\"pictures\">\n")
		w.figure(svg, caption)
		product := newDrawable(a.Product, nil, nil).draw(first)
		if product != nil {
			if first == nil {
				first = product
			}
			w.figure(plainPicture(product, "product "+adductName(p, a)), "product"+configuration(a))
		}
		w.f("</div>\n")
		w.f("<p class=\"small\">New bonds %s", text(bondList(a.Bonds)))
		if a.FirstBond != nil {
			w.f("; %d–%d forms first", a.FirstBond[0], a.FirstBond[1])
		}
		if a.DeltaE != nil {
			w.f("; ΔE %s |β|", text(trimmed(*a.DeltaE, 3)))
		}
		if a.Asynchronous != nil {
			w.f("; asynchronicity %s |β|", text(trimmed(*a.Asynchronous, 3)))
		}
		w.f(".</p>\n")
		w.labelled("Why:", a.Because)
		w.para("small", a.EndoNote)
		w.f("<p class=\"smiles soft\">%s</p>\n", text(a.Product))
		w.f("</div>\n")
	}
	w.f("</div>\n")
}

// adductName names an orientation: by the relation of its substituents, by its new
// bonds where that says nothing, or as the only one.
func adductName(p *report.Pair, a *report.Adduct) string {
	if a.Relation != "" {
		return strings.TrimSuffix(a.Relation, "-") + " adduct"
	}
	for i := range p.Adduct {
		if b := &p.Adduct[i]; b.Joining == a.Joining && b.Rank != a.Rank {
			return "adduct with bonds " + bondList(a.Bonds)
		}
	}
	return "only orientation"
}

func configuration(a *report.Adduct) string {
	if a.Configuration == "" {
		return ""
	}
	return ", " + a.Configuration
}

func bondList(bonds [][2]int) string {
	var s []string
	for _, b := range bonds {
		s = append(s, fmt.Sprintf("%d–%d", b[0], b[1]))
	}
	return strings.Join(s, " and ")
}

func sameBonds(p, q [][2]int) bool {
	if len(p) != len(q) || len(p) == 0 {
		return false
	}
	for _, b := range p {
		found := false
		for _, c := range q {
			found = found || b == c
		}
		if !found {
			return false
		}
	}
	return true
}

// innerPicture draws an intramolecular cycloaddition: the molecule with dashed lines
// between the atoms that become bonded.
func innerPicture(p *report.Pair, a *report.Adduct) (svg, caption string) {
	x := newDrawable(p.A, p.NumbersA, nil).draw(nil)
	if x == nil || p.B != "" {
		return "", ""
	}
	c := newCanvas()
	f := newFormula(c, x.d)
	for _, b := range a.Bonds {
		i, ok1 := x.indexOf[b[0]]
		k, ok2 := x.indexOf[b[1]]
		if !ok1 || !ok2 {
			return "", ""
		}
		dir := unit(minus(f.at(k), f.at(i)))
		c.line(layerGuides, "forming", plus(f.at(i), times(dir, 5)), minus(f.at(k), times(dir, 5)))
	}
	caption = "dashed lines are the bonds that form"
	return c.svg("figure structure", caption, 4), caption
}

// joinings writes which π systems could join, where there is a choice.
func (w *writer) joinings(p *report.Pair) {
	if len(p.Joining) < 2 {
		return
	}
	w.f("<details>\n<summary>Which π systems join</summary>\n<table class=\"stack\">\n<thead><tr><th scope=\"col\">Order</th><th scope=\"col\">A</th><th scope=\"col\">B</th><th scope=\"col\" class=\"n\">ΔE, |β|</th></tr></thead>\n<tbody>\n")
	for i := range p.Joining {
		j := &p.Joining[i]
		w.f("<tr><td data-label=\"order\">%d</td><td data-label=\"A\">%s, atoms %s</td><td data-label=\"B\">%s, atoms %s</td><td class=\"n\" data-label=\"ΔE\">%s</td></tr>\n",
			j.Order, text(j.RoleA), text(numberList(j.AAtoms)), text(j.RoleB), text(numberList(j.BAtoms)), text(number(j.DeltaE, 3)))
	}
	w.f("</tbody>\n</table>\n</details>\n")
}
