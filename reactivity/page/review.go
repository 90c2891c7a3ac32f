package page

import (
	"fmt"
	"strings"

	"lobecast/reactivity/report"
)

// review writes the overview of a route and a card for each step.
func (w *writer) review() {
	r := w.r
	w.f("<section class=\"overview\">\n<h2>The route</h2>\n")
	w.f("<table class=\"stack\">\n<thead><tr><th scope=\"col\">Step</th><th scope=\"col\">Standing</th><th scope=\"col\">Planned</th><th scope=\"col\">Chance [90 %% limits]</th><th scope=\"col\">Competes</th></tr></thead>\n<tbody>\n")
	for i := range r.Step {
		s := &r.Step[i]
		planned, value, valueClass := "–", "–", ` class="empty"`
		if p := s.Planned; p != nil {
			planned = p.Place
			if planned == "" {
				planned = "atom" + s_(len(p.Atoms)) + " " + numberList(p.Atoms)
			}
			if p.Rank > 1 {
				planned += fmt.Sprintf(", rank %d", p.Rank)
			}
			if p.Chance != nil {
				value, valueClass = chance(p.Chance, p.Limits), ""
			}
		}
		other, otherClass := rival(s), ""
		if other == "" {
			otherClass = ` class="empty"`
		}
		plannedClass := ""
		if planned == "–" {
			plannedClass = ` class="empty"`
		}
		w.f("<tr><td><a href=\"#step-%d\"><b>%d</b> %s</a></td><td>%s</td><td data-label=\"planned\"%s>%s</td><td data-label=\"chance\"%s>%s</td><td data-label=\"competes\"%s>%s</td></tr>\n",
			s.Number, s.Number, text(s.Name), standingTag(s.Standing), plannedClass, text(planned), valueClass, value, otherClass, other)
	}
	w.f("</tbody>\n</table>\n")
	if len(r.Risk) > 0 {
		w.f("<h3>In order of risk</h3>\n<ol>\n")
		for _, x := range r.Risk {
			link, rest := x.Line, ""
			if name := fmt.Sprintf("step %d", x.Step); strings.HasPrefix(x.Line, name) {
				link, rest = name, x.Line[len(name):]
			}
			w.f("<li><a href=\"#step-%d\">%s</a>%s</li>\n", x.Step, text(link), text(rest))
		}
		w.f("</ol>\n")
	}
	w.f("</section>\n")
	for i := range r.Step {
		w.step(&r.Step[i])
	}
}

// rival is the best candidate that is not planned, with its chance.
func rival(s *report.Step) string {
	for i := range s.Candidate {
		c := &s.Candidate[i]
		if c.Planned {
			continue
		}
		out := text(c.Place)
		if c.Chance != nil {
			out += " " + trimmedFixed(*c.Chance, 2)
		}
		return out
	}
	return ""
}

// step writes the card of one step.
func (w *writer) step(s *report.Step) {
	w.f("<section class=\"step\" id=\"step-%d\">\n<div class=\"heading\"><span class=\"no\">%d</span><h2>%s</h2>%s</div>\n",
		s.Number, s.Number, text(s.Name), standingTag(s.Standing))
	what := s.Kind
	if s.Event != "" && s.Event != s.Kind {
		what = s.Event
	}
	if s.Call != "" {
		what += ", call: " + s.Call
	}
	w.para("small soft", sentence(what))
	if s.Reason != "" {
		w.para("", sentence(s.Reason)+".")
	}
	w.labelled("Nearest reading:", s.Reading)
	substrate := w.scheme(s)
	var planned []int
	if s.Planned != nil {
		planned = s.Planned.Atoms
	}
	for i := range s.Structure {
		for k := range s.Structure[i].Attack {
			a := &s.Structure[i].Attack[k]
			w.f("<div class=\"columns\">\n<div>\n")
			w.sites(a, planned)
			w.f("</div>\n<div>\n<div class=\"pictures\">\n")
			if substrate != nil {
				w.frontierFigure(substrate, a.Toward)
			}
			w.f("</div>\n</div>\n</div>\n")
		}
	}
	for i := range s.Pair {
		w.pair(&s.Pair[i], s.Planned)
	}
	if len(s.Process) > 0 {
		w.modes(s.Process)
	}
	// Words of the ranking on the left, what lies beside it on the right; a side with
	// nothing to say leaves its room to the other.
	w.f("<div class=\"columns words\">\n")
	w.side(func() {
		w.stepWords(s, planned)
	})
	w.side(func() {
		w.record(s.Record)
		w.remarks("Outside the model", "outside", s.Outside, false)
		w.remarks("Cautions", "caution", s.Caution, false)
	})
	w.f("</div>\n")
	for i := range s.Structure {
		for k := range s.Structure[i].Attack {
			w.indices(&s.Structure[i].Attack[k])
		}
	}
	if len(s.Refused) > 0 {
		w.f("<h3>Refused</h3>\n")
		w.refusals(s.Refused)
	}
	w.f("</section>\n")
}

// side writes a column, or nothing where write writes nothing.
func (w *writer) side(write func()) {
	before := w.Len()
	w.f("<div>\n")
	start := w.Len()
	write()
	if w.Len() == start {
		w.Truncate(before)
		return
	}
	w.f("</div>\n")
}

// stepWords says in words what decided, and what could change it.
func (w *writer) stepWords(s *report.Step, planned []int) {
	for i := range s.Structure {
		for k := range s.Structure[i].Attack {
			w.why(&s.Structure[i].Attack[k], planned)
		}
	}
	w.labelled("A second time:", s.Again)
	w.list("What would move it", s.WhatIf)
	w.list("Competing", s.Competing)
	w.labelled("Note of the chemist:", s.Note)
	for _, x := range s.Warnings {
		w.labelled("Note:", x)
	}
	for _, a := range s.Aside {
		w.f("<p class=\"small\">Set aside: %s <span class=\"smiles\">%s</span></p>\n", text(a.Name), text(a.SMILES))
	}
}

// scheme draws substrate, conditions and product, and returns the substrate for
// further pictures. Cycloadditions are drawn face to face instead.
func (w *writer) scheme(s *report.Step) *drawable {
	var substrate *drawable
	var attack *report.Attack
	if len(s.Structure) > 0 {
		x := &s.Structure[0]
		substrate = newDrawable(x.SMILES, x.Numbers, x.Points)
		if len(x.Attack) > 0 {
			attack = &x.Attack[0]
		}
	}
	if substrate == nil {
		smiles := s.Substrate
		if smiles == "" {
			smiles = left(s.Reaction)
		}
		substrate = newDrawable(smiles, nil, nil)
	}
	productSMILES := s.Product
	if productSMILES == "" {
		for i := range s.Candidate {
			if s.Candidate[i].Planned {
				productSMILES = s.Candidate[i].Product
			}
		}
	}
	if productSMILES == "" && len(s.Structure) == 0 {
		productSMILES = right(s.Reaction)
	}
	over := strings.Join(nonEmpty(s.Agents, mediumWords(s), s.Activation), "; ")
	if over == "" {
		over = middle(s.Reaction)
	}
	if len(s.Pair) > 0 || len(s.Process) > 0 {
		w.para("small", over)
		return nil
	}
	if substrate == nil {
		w.para("small", over)
		return nil
	}
	substrate.draw(nil)
	product := newDrawable(productSMILES, nil, nil).draw(substrate)
	w.f("<div class=\"scheme\">\n")
	var planned []int
	if s.Planned != nil {
		planned = s.Planned.Atoms
	}
	w.figure(sitesPicture(substrate, attack, planned), "")
	if product != nil {
		w.f("<div class=\"over\"><span>%s</span>%s</div>\n", text(over), reactionArrow)
		w.figure(plainPicture(product, "product"), "")
	} else {
		w.para("small", over)
	}
	w.f("</div>\n")
	if len(s.Read) > 0 {
		w.para("small soft", "Read as: "+strings.Join(s.Read, "; "))
	}
	return substrate
}

func mediumWords(s *report.Step) string {
	if s.Medium == "" {
		return ""
	}
	m := s.Medium + " medium"
	if s.MediumFrom != "" {
		m += " (" + s.MediumFrom + ")"
	}
	return m
}

func nonEmpty(list ...string) []string {
	var out []string
	for _, s := range list {
		if s != "" {
			out = append(out, s)
		}
	}
	return out
}

// left, middle and right are the parts of a reaction SMILES.
func left(reaction string) string { return part(reaction, 0) }

func middle(reaction string) string { return part(reaction, 1) }

func right(reaction string) string { return part(reaction, 2) }

func part(reaction string, k int) string {
	parts := strings.Split(reaction, ">")
	if len(parts) != 3 {
		return ""
	}
	return parts[k]
}
