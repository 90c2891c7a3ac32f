package survey

import (
	"fmt"
	"strings"
	"unicode/utf8"
)

// BriefHeader is the first line of the table for reading, at most 100 columns wide.
var BriefHeader = briefLine("line", "name", "rank", "chance [90 %]", "first site", "chance", "call")

func briefLine(line, name, rank, chance, place, first, call string) string {
	return strings.TrimRight(fmt.Sprintf("%7s  %s  %4s  %s  %s  %6s  %s", line, fitted(name, 18), rank, fitted(chance, 16), fitted(place, 26), first, call), " ") + "\n"
}

// fitted cuts or fills a text to a width.
func fitted(s string, width int) string {
	if n := utf8.RuneCountInString(s); n <= width {
		return s + strings.Repeat(" ", width-n)
	}
	return string([]rune(s)[:width-1]) + "…"
}

// appendBrief appends the record as one line of a table for reading.
func (r *Result) appendBrief(b []byte) []byte {
	name := onOneLine(r.Name)
	if name == "" {
		name = onOneLine(r.Input)
	}
	if r.Status != Judged {
		return append(b, fmt.Sprintf("%7d  %s  %s\n", r.Line, fitted(name, 18), strings.TrimRight(fitted(string(r.Status)+": "+onOneLine(r.Message), 71), " "))...)
	}
	number := func(p *float64) string {
		if p == nil {
			return "–"
		}
		return fmt.Sprintf("%.2f", *p)
	}
	rank, chance := "", ""
	if r.PlannedRank > 0 {
		rank, chance = fmt.Sprint(r.PlannedRank), number(r.PlannedChance)
		if l := r.PlannedLimits; l != nil {
			chance += fmt.Sprintf(" [%.2f–%.2f]", l[0], l[1])
		}
	}
	place := r.FirstPlace
	if place == "" {
		place = r.FirstAtoms
	}
	return append(b, briefLine(fmt.Sprint(r.Line), name, rank, chance, place, number(r.FirstChance), r.Call)...)
}
