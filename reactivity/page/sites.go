package page

import (
	"fmt"
	"strings"

	"lobecast/reactivity/report"
)

// structure writes the card of one structure of a sites report.
func (w *writer) structure(s *report.Structure) {
	w.f("<section class=\"card\">\n<div class=\"heading\"><h2>%s</h2></div>\n", text(structureName(s)))
	w.structureLine(s)
	x := newDrawable(s.SMILES, s.Numbers, s.Points).draw(nil)
	for i := range s.Attack {
		a := &s.Attack[i]
		w.f("<section>\n<h3>%s: %s</h3>\n", text(sentence(a.Event)), text(callWords(a.Call)))
		w.f("<div class=\"columns\">\n<div>\n")
		if x != nil {
			w.f("<div class=\"pictures\">\n")
			w.figure(sitesPicture(x, a, nil), "")
			w.frontierFigure(x, a.Toward)
			w.f("</div>\n")
		}
		w.f("</div>\n<div>\n")
		w.sites(a, nil)
		w.f("</div>\n</div>\n")
		w.why(a, nil)
		w.indices(a)
		w.f("</section>\n")
	}
	if x != nil && x.solve(w.set) {
		w.f("<details>\n<summary>Levels</summary>\n<div class=\"pictures\">\n")
		for k, o := range x.sol.Systems {
			if x.sol.Pi.Local[k] || o.N < 2 {
				continue
			}
			w.figure(levelDiagram(o.X, o.Occupation, fmt.Sprintf("levels of a π system of %d centres", o.N)), fmt.Sprintf("π system of %d centres and %s electrons", o.N, trimmed(o.Electrons, 2)))
		}
		w.f("</div>\n</details>\n")
	}
	w.f("</section>\n")
}

func structureName(s *report.Structure) string {
	if s.Name != "" {
		return s.Name
	}
	return s.Formula
}

// structureLine says which structure the card is about.
func (w *writer) structureLine(s *report.Structure) {
	electrons := "–"
	if s.PiElectrons != nil {
		electrons = trimmed(*s.PiElectrons, 2)
	}
	line := fmt.Sprintf("%s, %d π atoms, %s π electrons", s.Formula, s.PiAtoms, electrons)
	if s.Medium != "" {
		line += ", medium " + s.Medium
	}
	w.f("<p class=\"small soft\">%s<br/><span class=\"smiles\">%s</span></p>\n", text(line), text(s.SMILES))
	for _, a := range s.Aside {
		w.f("<p class=\"small\">Set aside: %s <span class=\"smiles\">%s</span></p>\n", text(a.Name), text(a.SMILES))
	}
	for _, x := range s.Warnings {
		w.para("small", "Note: "+x)
	}
}

// frontierFigure draws the orbital that decides an attack.
func (w *writer) frontierFigure(x *drawable, toward string) {
	if !x.solve(w.set) {
		return
	}
	homo := towardHOMO(toward)
	if o := x.frontierOf(homo, -1); o != nil {
		w.figure(orbitalPicture(x, o), o.caption())
	}
	if toward == "radical" {
		if o := x.frontierOf(false, -1); o != nil {
			w.figure(orbitalPicture(x, o), o.caption())
		}
	}
}

// sites writes the table of ranked sites. Numbers in planned mark the intended site.
func (w *writer) sites(a *report.Attack, planned []int) {
	if len(a.Site) == 0 {
		w.para("", "No candidate site.")
		return
	}
	withChance := false
	for i := range a.Site {
		withChance = withChance || a.Site[i].Chance != nil
	}
	head := "chance [90 % limits]"
	if !withChance {
		head = localizationHead
	}
	w.f("<table class=\"stack\">\n<thead><tr><th scope=\"col\">Rank</th><th scope=\"col\">Place</th><th scope=\"col\">%s</th></tr></thead>\n<tbody>\n", text(head))
	row := func(s *report.Site, rank string) {
		class, note := "", ""
		if anyOf(s.Atoms, planned) {
			class, note = ` class="planned"`, ` <b>planned</b>`
		}
		place := text(s.Place)
		if s.Leaving != "" {
			place += " (" + text(s.Leaving) + " leaves)"
		}
		value := chance(s.Chance, s.Limits)
		if !withChance {
			value = "–"
			if s.Index != nil {
				value = text(withLimits(s.Index.Localization, s.Index.LocalizationLimits))
			}
		}
		label := "chance"
		if !withChance {
			label = "L"
		}
		w.f("<tr%s><td data-label=\"rank\" class=\"mark\">%s</td><td>%s%s <span class=\"soft small\">(atom%s %s)</span></td><td data-label=\"%s\">%s</td></tr>\n",
			class, text(rank), place, note, s_(len(s.Atoms)), text(numberList(s.Atoms)), label, value)
	}
	for i := range a.Site {
		row(&a.Site[i], fmt.Sprint(a.Site[i].Rank))
	}
	for i := range a.Ipso {
		row(&a.Ipso[i], "ipso")
	}
	w.f("</tbody>\n</table>\n")
	if !withChance && a.ChanceAbsent != "" {
		w.para("small soft", "No chances: "+a.ChanceAbsent)
	}
}

const localizationHead = "localization energy L, |β|"

func s_(n int) string {
	if n == 1 {
		return ""
	}
	return "s"
}

func anyOf(list, of []int) bool {
	for _, n := range list {
		for _, p := range of {
			if n == p {
				return true
			}
		}
	}
	return false
}

// why writes the reasons behind a ranking.
func (w *writer) why(a *report.Attack, planned []int) {
	for i := range a.Site {
		s := &a.Site[i]
		if s.Because == "" {
			continue
		}
		if i == 0 {
			w.labelled("Why "+s.Place+" first:", s.Because)
		} else if anyOf(s.Atoms, planned) {
			w.labelled("Why "+s.Place+" is rank "+fmt.Sprint(s.Rank)+":", s.Because)
		}
	}
	w.labelled("Indices:", a.Disagree)
	if len(a.Species) > 1 {
		w.labelled("Species computed:", strings.Join(a.Species, "; "))
	}
	for _, n := range a.Notes {
		w.labelled("Note:", n)
	}
}

// indices writes the indices of all sites, to be opened on demand.
func (w *writer) indices(a *report.Attack) {
	any := false
	for i := range a.Site {
		any = any || a.Site[i].Index != nil
	}
	if !any {
		return
	}
	w.f("<details>\n<summary>Indices of attack</summary>\n<table class=\"stack\">\n<caption>Localization energy L in |β|, frontier density f and smoothed density, superdelocalizability S in 1/|β|, π charge in e; 90 %% limits in brackets.</caption>\n")
	w.f("<thead><tr><th scope=\"col\">Rank</th><th scope=\"col\">Place</th><th scope=\"col\" class=\"n\">L</th><th scope=\"col\" class=\"n\">f</th><th scope=\"col\" class=\"n\">smoothed</th><th scope=\"col\" class=\"n\">S</th><th scope=\"col\" class=\"n\">charge</th></tr></thead>\n<tbody>\n")
	for i := range a.Site {
		s := &a.Site[i]
		x := s.Index
		if x == nil {
			continue
		}
		w.f("<tr><td data-label=\"rank\">%d</td><td>%s</td><td class=\"n\" data-label=\"L\">%s</td><td class=\"n\" data-label=\"f\">%s</td><td class=\"n\" data-label=\"smoothed\">%s</td><td class=\"n\" data-label=\"S\">%s</td><td class=\"n\" data-label=\"charge\">%s</td></tr>\n",
			s.Rank, text(s.Place), text(withLimits(x.Localization, x.LocalizationLimits)), text(number(x.FrontierDensity, 3)),
			text(withLimits(x.SmoothedDensity, x.SmoothedDensityLimits)), text(withLimits(x.Superdelocalizability, x.SuperdelocalizabilityLimits)),
			text(withLimits(x.Charge, x.ChargeLimits)))
	}
	w.f("</tbody>\n</table>\n")
	notes := map[string]bool{}
	for i := range a.Site {
		if x := a.Site[i].Index; x != nil {
			for _, n := range []string{x.LocalizationAbsent, x.FrontierDensityAbsent,
				x.SmoothedDensityAbsent, x.SuperdelocalizabilityAbsent, x.SuperdelocalizabilityNote, x.ChargeAbsent} {
				if n != "" && !notes[n] {
					notes[n] = true
					w.para("small soft", n)
				}
			}
		}
	}
	var products []string
	for i := range a.Site {
		if s := &a.Site[i]; s.Product != "" {
			products = append(products, fmt.Sprintf("<li value=\"%d\"><span class=\"smiles\">%s</span></li>", s.Rank, text(s.Product)))
		}
	}
	if len(products) > 0 {
		w.f("<p class=\"small\">Products by rank:</p>\n<ol>\n%s\n</ol>\n", strings.Join(products, "\n"))
	}
	w.f("</details>\n")
}

// callWords says what a call means.
func callWords(call string) string {
	switch call {
	case "clear":
		return "clear, one site leads by far"
	case "leaning":
		return "leaning, one site leads"
	case "split":
		return "split, no site leads"
	case "open":
		return "ranked only, no chances"
	}
	return call
}

// sentence writes a phrase with a capital first letter.
func sentence(s string) string {
	if s == "" {
		return s
	}
	if s[0] < 'a' || s[0] > 'z' {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}
