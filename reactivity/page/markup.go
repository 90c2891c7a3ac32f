package page

import (
	"bytes"
	_ "embed"
	"fmt"
	"strings"

	"lobecast/frontier"
	"lobecast/reactivity/report"
)

//go:embed colours.css
var coloursCSS string

//go:embed figure.css
var figureCSS string

//go:embed page.css
var pageCSS string

// writer builds the page of one report.
type writer struct {
	bytes.Buffer
	r   *report.Report
	set *frontier.Set
}

// f writes markup; every %s must hold markup or text that went through [text].
func (w *writer) f(format string, args ...any) { fmt.Fprintf(w, format, args...) }

// para writes a paragraph of text, nothing for an empty one.
func (w *writer) para(class, s string) {
	if s == "" {
		return
	}
	if class != "" {
		w.f("<p class=\"%s\">%s</p>\n", class, text(s))
		return
	}
	w.f("<p>%s</p>\n", text(s))
}

// labelled writes "Label: text" as a paragraph, nothing for an empty text.
func (w *writer) labelled(label, s string) {
	if s != "" {
		w.f("<p><b>%s</b> %s</p>\n", text(label), text(s))
	}
}

// list writes the lines as a list, with a heading, nothing for none.
func (w *writer) list(heading string, lines []string) {
	if len(lines) == 0 {
		return
	}
	w.f("<h3>%s</h3>\n<ul>\n", text(heading))
	for _, l := range lines {
		w.f("<li>%s</li>\n", text(l))
	}
	w.f("</ul>\n")
}

// figure writes a drawing with its caption.
func (w *writer) figure(svg, caption string) {
	if svg == "" {
		return
	}
	w.f("<figure>%s", svg)
	if caption != "" {
		w.f("<figcaption>%s</figcaption>", text(caption))
	}
	w.f("</figure>\n")
}

// chance writes a chance as bar and numbers, or a dash.
func chance(p *float64, limits *[2]float64) string {
	if p == nil {
		return "–"
	}
	s := chanceBar(*p, limits) + fmt.Sprintf(" <span class=\"chance\">%.2f", *p)
	if limits != nil {
		s += fmt.Sprintf(" <span class=\"soft\">[%.2f–%.2f]</span>", limits[0], limits[1])
	}
	return s + "</span>"
}

func number(p *float64, decimals int) string {
	if p == nil {
		return "–"
	}
	return trimmedFixed(*p, decimals)
}

// trimmedFixed writes a number with fixed decimals and a true minus sign.
func trimmedFixed(x float64, decimals int) string {
	s := fmt.Sprintf("%.*f", decimals, x)
	if strings.Trim(s, "-0.") == "" {
		s = strings.TrimPrefix(s, "-")
	}
	if s[0] == '-' {
		s = "−" + s[1:]
	}
	return s
}

// withLimits writes an index with three decimals and, where it has them, its limits.
func withLimits(p *float64, limits *[2]float64) string {
	s := number(p, 3)
	if p != nil && limits != nil {
		s += " [" + trimmedFixed(limits[0], 3) + " … " + trimmedFixed(limits[1], 3) + "]"
	}
	return s
}

func numberList(list []int) string {
	s := make([]string, len(list))
	for i, n := range list {
		s[i] = fmt.Sprint(n)
	}
	return strings.Join(s, ", ")
}

// standingTag writes a standing as a sign, different in shape for each, and its word.
func standingTag(standing string) string {
	class := strings.ReplaceAll(standing, " ", "-")
	sign := ""
	switch standing {
	case "supported":
		sign = `<circle class="full" cx="8" cy="8" r="6"/>`
	case "contested":
		sign = `<circle cx="8" cy="8" r="6"/><path class="full" d="M8 2A6 6 0 0 1 8 14Z"/>`
	case "opposed":
		sign = `<circle cx="8" cy="8" r="6"/><path d="M4 8H12"/>`
	case "forbidden":
		sign = `<path d="M3 3L13 13M13 3L3 13"/>`
	default:
		class, sign = "not-judged", `<circle cx="8" cy="8" r="6" stroke-dasharray="2 2.6"/>`
	}
	return fmt.Sprintf(`<span class="standing %s"><svg class="sign" viewBox="0 0 16 16" aria-hidden="true">%s</svg>%s</span>`,
		text(class), sign, text(standing))
}

const reactionArrow = `<svg width="86" height="14" viewBox="0 0 86 14" class="figure" role="img" aria-label="gives"><title>gives</title><path class="arrow" d="M2 7H80"/><path class="arrow-head" d="M84 7L74 2.5L76 7L74 11.5Z"/></svg>`
