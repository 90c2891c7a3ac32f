package page

import (
	"fmt"
	"slices"
	"strings"

	"lobecast/reactivity/report"
)

// Choice says which drawing of a report is wanted.
type Choice struct {
	// Show is one of [Shows]; empty means what the kind of report is about: sites, levels,
	// pair or phases, and for a step of a review whichever it has.
	Show string
	// Of is the number of the structure, pair, process or step, from 1; 0 means the first
	// that has such a drawing.
	Of int
	// Rank is the orientation of a cycloaddition that is drawn, from 1; 0 means the first.
	Rank int
}

// Shows are the words of [Choice.Show].
var Shows = []string{"structure", "sites", "homo", "lumo", "levels", "charges", "orders", "pair", "phases"}

// Picture makes one drawing of a report as an SVG document of its own. It fails where
// the report has no such drawing, saying which it has not.
func Picture(r *report.Report, c Choice) ([]byte, error) {
	if c.Show != "" && !slices.Contains(Shows, c.Show) {
		return nil, fmt.Errorf("there is no drawing called %q: the drawings are %s", c.Show, strings.Join(Shows, ", "))
	}
	w := &writer{r: r, set: knownSet(r.Parameters)}
	n := max(len(r.Structure), len(r.Pair), len(r.Process))
	if r.Kind == report.KindReview {
		n = len(r.Step)
	}
	from, to := 1, n
	if c.Of > 0 {
		from, to = c.Of, c.Of
	}
	for k := from; k <= to && k <= n; k++ {
		svg := ""
		if r.Kind == report.KindReview {
			s := &r.Step[k-1]
			svg = w.pictureOf(c, first(s.Structure, 0), first(s.Pair, 0), first(s.Process, 0), s.Planned)
		} else {
			svg = w.pictureOf(c, first(r.Structure, k-1), first(r.Pair, k-1), first(r.Process, k-1), nil)
		}
		if svg != "" {
			return []byte(standalone(svg)), nil
		}
	}
	what := "drawing"
	if c.Show != "" {
		what = "drawing of " + c.Show
	}
	if c.Of > 0 {
		return nil, fmt.Errorf("the report has no %s under number %d of its %d", what, c.Of, n)
	}
	return nil, fmt.Errorf("the report has no %s", what)
}

func first[T any](list []T, k int) *T {
	if k < 0 || k >= len(list) {
		return nil
	}
	return &list[k]
}

// pictureOf makes the chosen drawing of a structure, a pair or a process; empty where
// there is none.
func (w *writer) pictureOf(c Choice, s *report.Structure, p *report.Pair, process *report.Process, planned *report.Planned) string {
	if p != nil && (c.Show == "" || c.Show == "pair") {
		joining, rank := 1, max(1, c.Rank)
		for i := range p.Adduct {
			if a := &p.Adduct[i]; c.Rank == 0 && planned != nil && sameBonds(a.Bonds, planned.Bonds) {
				joining, rank = a.Joining, a.Rank
			}
		}
		for i := range p.Adduct {
			a := &p.Adduct[i]
			if a.Joining != joining || a.Rank != rank {
				continue
			}
			for k := range p.Joining {
				if p.Joining[k].Order == joining {
					if svg, _ := w.pairPicture(p, &p.Joining[k], a); svg != "" {
						return svg
					}
				}
			}
			svg, _ := innerPicture(p, a)
			return svg
		}
		return ""
	}
	if process != nil && (c.Show == "" || c.Show == "phases") {
		svg, _ := phasePicture(process)
		return svg
	}
	if process != nil && c.Show == "structure" {
		if x := foldedReactant(process); x != nil {
			return processPicture(x, process)
		}
	}
	if s == nil {
		return ""
	}
	return w.structurePicture(c.Show, s, planned)
}

func (w *writer) structurePicture(show string, s *report.Structure, planned *report.Planned) string {
	x := newDrawable(s.SMILES, s.Numbers, s.Points).draw(nil)
	if x == nil {
		return ""
	}
	hasLevels, hasSites := len(s.Level) > 0, len(s.Attack) > 0 && len(s.Attack[0].Site) > 0
	if show == "" {
		switch {
		case hasSites:
			show = "sites"
		case hasLevels:
			show = "levels"
		default:
			show = "structure"
		}
	}
	switch show {
	case "structure":
		return plainPicture(x, "structure of "+s.Formula)
	case "sites":
		if !hasSites {
			return ""
		}
		var atoms []int
		if planned != nil {
			atoms = planned.Atoms
		}
		return sitesPicture(x, &s.Attack[0], atoms)
	case "charges":
		if hasLevels {
			return chargePicture(x, s)
		}
	case "orders":
		if hasLevels {
			return orderPicture(x, s)
		}
	case "levels", "homo", "lumo":
		return w.orbitalChoice(show, x, s)
	}
	return ""
}

// orbitalChoice draws levels, HOMO or LUMO: those of the report where it lists them,
// otherwise computed from the structure.
func (w *writer) orbitalChoice(show string, x *drawable, s *report.Structure) string {
	if y := systemOf(s, 1); len(y.level) > 0 {
		homo, lumo := frontierRungs(rungs(y.x, y.occupation))
		switch {
		case show == "levels":
			return levelDiagram(y.x, y.occupation, "levels of "+s.Formula)
		case show == "homo" && homo >= 0:
			return orbitalPicture(x, y.orbital(x, homo, "HOMO"))
		case show == "lumo" && lumo >= 0:
			return orbitalPicture(x, y.orbital(x, lumo, "LUMO"))
		}
		return ""
	}
	if !x.solve(w.set) {
		return ""
	}
	if show == "levels" {
		for k, o := range x.sol.Systems {
			if !x.sol.Pi.Local[k] && o.N > 1 {
				return levelDiagram(o.X, o.Occupation, "levels of "+s.Formula)
			}
		}
		return ""
	}
	if o := x.frontierOf(show == "homo", -1); o != nil {
		return orbitalPicture(x, o)
	}
	return ""
}

// standalone makes a drawing a document of its own, with its colours and its ground.
func standalone(svg string) string {
	head, body, _ := strings.Cut(svg, ">")
	box := ""
	if _, after, ok := strings.Cut(head, `viewBox="`); ok {
		v, _, _ := strings.Cut(after, `"`)
		if p := strings.Fields(v); len(p) == 4 {
			box = fmt.Sprintf(`<rect class="ground" x="%s" y="%s" width="%s" height="%s"/>`, p[0], p[1], p[2], p[3])
		}
	}
	title, rest, ok := strings.Cut(body, "</title>")
	if !ok {
		title, rest = "", body
	} else {
		title += "</title>"
	}
	return "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n" + head + ">" + title +
		"<style>\n" + coloursCSS + figureCSS + ".ground { fill: var(--paper); }\n</style>" + box + rest + "\n"
}
