package page

import (
	"fmt"
	"strings"

	"lobecast/reactivity/report"
)

// kindTitles head the page of a report without a title.
var kindTitles = map[string]string{
	report.KindSites:    "Sites of attack",
	report.KindPair:     "Cycloaddition",
	report.KindSymmetry: "Orbital symmetry",
	report.KindOrbitals: "Hückel orbitals",
	report.KindReview:   "Review of a route",
}

// Render makes the page of a report: one HTML document in XML syntax that loads
// nothing. It fails on a kind of report it does not know.
func Render(r *report.Report) ([]byte, error) {
	title, ok := kindTitles[r.Kind]
	if !ok {
		return nil, fmt.Errorf("a report of kind %q has no page: it must be sites, pair, symmetry, orbitals or review", r.Kind)
	}
	if r.Title != "" {
		title = r.Title
	}
	w := &writer{r: r, set: knownSet(r.Parameters)}
	w.f("<!DOCTYPE html>\n<html xmlns=\"http://www.w3.org/1999/xhtml\" lang=\"en\">\n<head>\n<meta charset=\"utf-8\"/>\n")
	w.f("<meta name=\"viewport\" content=\"width=device-width, initial-scale=1\"/>\n<meta name=\"color-scheme\" content=\"light dark\"/>\n")
	w.f("<meta http-equiv=\"Content-Security-Policy\" content=\"default-src &#39;none&#39;; style-src &#39;unsafe-inline&#39;\"/>\n")
	w.f("<title>%s</title>\n<style>\n%s%s%s</style>\n</head>\n<body>\n", text(title), coloursCSS, figureCSS, pageCSS)
	w.f("<a class=\"skip\" href=\"#content\">Skip to the content</a>\n")
	w.f("<header class=\"masthead\">\n<h1>%s</h1>\n<p class=\"soft small\">%s</p>\n", text(title), text(w.underTitle()))
	w.para("small", r.Safety)
	w.f("</header>\n<main id=\"content\">\n")
	switch r.Kind {
	case report.KindReview:
		w.review()
	case report.KindSites:
		for i := range r.Structure {
			w.structure(&r.Structure[i])
		}
	case report.KindOrbitals:
		for i := range r.Structure {
			w.orbitals(&r.Structure[i])
		}
	case report.KindPair:
		for i := range r.Pair {
			w.f("<section class=\"card\">\n")
			w.pairHeading(&r.Pair[i])
			w.pair(&r.Pair[i], nil)
			w.f("</section>\n")
		}
	case report.KindSymmetry:
		w.processes(r.Process)
	}
	w.reportRemarks()
	w.key()
	w.f("</main>\n<footer class=\"colophon\">\n<p>Made by %s from a report of format %d, kind %s, parameter set %s.</p>\n",
		text(r.Program), r.Format, text(r.Kind), text(r.Parameters))
	if len(r.Borrowed) > 0 {
		w.f("<p>Parameters borrowed from other sources: %s.</p>\n", text(strings.Join(r.Borrowed, "; ")))
	}
	w.f("</footer>\n</body>\n</html>\n")
	return []byte(w.String()), nil
}

// underTitle says in one line what the page is.
func (w *writer) underTitle() string {
	r := w.r
	what := ""
	switch r.Kind {
	case report.KindReview:
		what = plural(len(r.Step), "step") + ", judged by frontier orbitals"
	case report.KindSites:
		what = plural(len(r.Structure), "structure") + ", sites ranked by Hückel indices"
	case report.KindOrbitals:
		what = plural(len(r.Structure), "structure") + ", energies x in E = α + xβ, β < 0"
	case report.KindPair:
		what = "orientation of a cycloaddition by frontier orbitals and first-bond energies"
	case report.KindSymmetry:
		what = "verdict of the Woodward–Hoffmann rules"
	}
	return what + "; parameters " + r.Parameters
}

func plural(n int, word string) string {
	if n == 1 {
		return "1 " + word
	}
	return fmt.Sprintf("%d %ss", n, word)
}

// reportRemarks closes the page of a single-kind report: notes, cautions, record and
// refusals of the report as a whole.
func (w *writer) reportRemarks() {
	r := w.r
	if len(r.Outside)+len(r.Caution)+len(r.Record) > 0 {
		w.f("<section>\n<h2>Beside the ranking</h2>\n")
		w.record(r.Record)
		w.remarks("Outside the model", "outside", r.Outside, true)
		w.remarks("Cautions", "caution", r.Caution, true)
		w.f("</section>\n")
	}
	if len(r.Refused) > 0 {
		w.f("<section>\n<h2>Refused</h2>\n")
		w.refusals(r.Refused)
		w.f("</section>\n")
	}
}

func (w *writer) refusals(list []report.Refused) {
	for _, x := range list {
		w.f("<p class=\"smiles\">%s</p>\n<pre>%s</pre>\n", text(x.Input), text(x.Message))
	}
}

// remarks writes coded notes. The same note on several structures is written once.
func (w *writer) remarks(heading, class string, list []report.Remark, where bool) {
	if len(list) == 0 {
		return
	}
	w.f("<h3>%s</h3>\n<ul class=\"remarks %s\">\n", text(heading), class)
	seen := map[[2]string]bool{}
	for i, x := range list {
		k := [2]string{x.Code, x.Text}
		if seen[k] {
			continue
		}
		seen[k] = true
		var to []string
		for _, y := range list[i:] {
			if y.Code == x.Code && y.Text == x.Text && y.AppliesTo != "" {
				to = append(to, y.AppliesTo)
			}
		}
		w.f("<li>%s <span class=\"code\">%s</span>", text(x.Text), text(x.Code))
		if where && len(to) > 0 && len(w.r.Structure)+len(w.r.Pair)+len(w.r.Process) > 1 {
			w.f("<br/><span class=\"smiles soft\">%s</span>", text(strings.Join(to, ", ")))
		}
		w.f("</li>\n")
	}
	w.f("</ul>\n")
}

// record quotes how often such calls were right.
func (w *writer) record(list []report.Record) {
	if len(list) == 0 {
		return
	}
	w.f("<h3>Record on published outcomes</h3>\n")
	for _, x := range list {
		w.f("<p class=\"small\"><b>%s</b> %s</p>\n", text(x.Event), text(x.Text))
	}
}

// key explains the signs used on the page.
func (w *writer) key() {
	var parts []string
	small := func(draw func(c *canvas)) string {
		c := newCanvas()
		draw(c)
		return strings.Replace(c.svg("figure", "sign", 1), ` role="img" aria-label="sign"`, ` aria-hidden="true"`, 1)
	}
	pins, lobes, bars := false, false, false
	for _, class := range []string{`class="pin`, `class="lobe`, `class="bar"`} {
		found := strings.Contains(w.String(), class)
		switch class {
		case `class="pin`:
			pins = found
		case `class="lobe`:
			lobes = found
		default:
			bars = found
		}
	}
	if pins {
		parts = append(parts, small(func(c *canvas) { c.circle(layerMarks, "pin first", point{}, 6) })+
			" site of first rank, "+small(func(c *canvas) { c.circle(layerMarks, "pin", point{}, 6) })+
			" other sites, the disc the larger the higher the chance; "+
			small(func(c *canvas) {
				c.circle(layerMarks, "ring", point{}, 8)
				c.circle(layerMarks, "pin", point{}, 5)
			})+" planned site")
	}
	if lobes {
		parts = append(parts, small(func(c *canvas) { c.circle(layerLobes, "lobe plus", point{}, 7) })+" and "+
			small(func(c *canvas) { c.circle(layerLobes, "lobe minus", point{}, 7) })+
			" orbital coefficients of opposite sign, area proportional to c²")
	}
	if bars {
		l := [2]float64{0.3, 0.8}
		parts = append(parts, strings.Replace(chanceBar(0.6, &l), ` role="img" aria-label="chance 0.60, 90 % limits 0.30 to 0.80"`, ` aria-hidden="true"`, 1)+
			" chance from 0 to 1 with its 90 % limits: "+report.ChanceMeaning)
	}
	if len(parts) == 0 {
		return
	}
	w.f("<div class=\"key\">\n<h2 class=\"small\">Signs</h2>\n")
	for _, p := range parts {
		w.f("<p>%s.</p>\n", p)
	}
	w.f("</div>\n")
}
