package report

import (
	"fmt"
	"strings"
	"unicode/utf8"
)

// BriefWidth is the widest line of a brief table, in columns.
const BriefWidth = 100

// table is an aligned text table. The widest column that may be cut is shortened
// until a row fits BriefWidth.
type table struct {
	head  []string
	right []bool // columns set flush right
	cut   int    // the column that gives way, -1 for none
	rows  [][]string
}

func (t *table) add(cells ...string) { t.rows = append(t.rows, cells) }

func (t *table) write(b *strings.Builder) {
	width := make([]int, len(t.head))
	for _, row := range append([][]string{t.head}, t.rows...) {
		for i, c := range row {
			width[i] = max(width[i], utf8.RuneCountInString(c))
		}
	}
	total := 2 * (len(width) - 1)
	for _, w := range width {
		total += w
	}
	if over := total - BriefWidth; over > 0 && t.cut >= 0 {
		width[t.cut] = max(8, width[t.cut]-over)
	}
	line := func(row []string) {
		var s strings.Builder
		for i, c := range row {
			c = shorten(c, width[i])
			pad := strings.Repeat(" ", width[i]-utf8.RuneCountInString(c))
			if i > 0 {
				s.WriteString("  ")
			}
			if i < len(t.right) && t.right[i] {
				s.WriteString(pad + c)
			} else {
				s.WriteString(c + pad)
			}
		}
		b.WriteString(strings.TrimRight(s.String(), " ") + "\n")
	}
	line(t.head)
	for _, row := range t.rows {
		line(row)
	}
}

// shorten cuts text to n runes, the cut marked by an ellipsis.
func shorten(s string, n int) string {
	if utf8.RuneCountInString(s) <= n {
		return s
	}
	r := []rune(s)
	if n < 1 {
		return ""
	}
	return string(r[:n-1]) + "…"
}

// wrap breaks text at spaces into lines of at most BriefWidth columns; following
// lines are indented by hang.
func wrap(b *strings.Builder, text, indent, hang string) {
	line, width := indent, utf8.RuneCountInString(indent)
	empty := true
	for _, word := range unbroken(strings.Fields(text)) {
		w := utf8.RuneCountInString(word)
		if !empty && width+1+w > BriefWidth {
			b.WriteString(line + "\n")
			line, width, empty = hang, utf8.RuneCountInString(hang), true
		}
		for width+w > BriefWidth { // a SMILES longer than the line
			room := BriefWidth - width
			r := []rune(word)
			b.WriteString(line + string(r[:room]) + "\n")
			word = string(r[room:])
			w = utf8.RuneCountInString(word)
			line, width = hang, utf8.RuneCountInString(hang)
		}
		if !empty {
			line += " "
			width++
		}
		line += word
		width += w
		empty = false
	}
	if !empty {
		b.WriteString(line + "\n")
	}
}

// unbroken keeps a unit on the line of its number.
func unbroken(words []string) []string {
	list := words[:0]
	for _, w := range words {
		if k := len(list) - 1; k >= 0 && (strings.HasPrefix(w, "%") || strings.HasPrefix(w, "|β|")) && strings.ContainsAny(list[k], "0123456789") {
			list[k] += " " + w
			continue
		}
		list = append(list, w)
	}
	return list
}

func number(p *float64, digits int) string {
	if p == nil {
		return "–"
	}
	return fmt.Sprintf("%.*f", digits, *p)
}

// chance shows a chance with its limits, "0.93 [0.84–0.97]".
func chance(p *float64, lim *[2]float64) string {
	switch {
	case p == nil:
		return "–"
	case lim == nil:
		return fmt.Sprintf("%.2f", *p)
	}
	return fmt.Sprintf("%.2f [%.2f–%.2f]", *p, lim[0], lim[1])
}

func numbers(list []int) string {
	s := make([]string, len(list))
	for i, n := range list {
		s[i] = fmt.Sprint(n)
	}
	return strings.Join(s, " ")
}
