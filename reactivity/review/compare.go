package review

import (
	"fmt"
	"math"
	"strings"

	"lobecast/reactivity/report"
)

// changed is the smallest change of a chance that is worth a line.
const changed = 0.005

// Compare tells what changed between two reviews of a route, step by step, in lines
// of text. Steps are matched by name, and where names repeat by order.
func Compare(before, after *report.Report) (string, error) {
	for _, r := range []*report.Report{before, after} {
		if r.Kind != report.KindReview {
			return "", fmt.Errorf("compare takes two reports of review; one of these is a %s report", r.Kind)
		}
	}
	var b strings.Builder
	line := func(format string, a ...any) { fmt.Fprintf(&b, format+"\n", a...) }
	if before.Parameters != after.Parameters {
		line("parameters: %s, now %s", before.Parameters, after.Parameters)
	}
	if before.Program != after.Program {
		line("program: %s, now %s", before.Program, after.Program)
	}
	old := map[string][]*report.Step{}
	for i := range before.Step {
		s := &before.Step[i]
		old[s.Name] = append(old[s.Name], s)
	}
	same := 0
	for i := range after.Step {
		s := &after.Step[i]
		list := old[s.Name]
		if len(list) == 0 {
			line("step %d, %s: new, %s", s.Number, s.Name, s.Standing)
			continue
		}
		old[s.Name] = list[1:]
		changes := compareStep(list[0], s)
		if len(changes) == 0 {
			same++
			continue
		}
		line("step %d, %s", s.Number, s.Name)
		for _, c := range changes {
			line("  %s", c)
		}
	}
	for i := range before.Step {
		s := &before.Step[i]
		for _, left := range old[s.Name] {
			if left == s {
				line("step %d of the old review, %s: gone", s.Number, s.Name)
			}
		}
	}
	line("%d of %d steps unchanged", same, len(after.Step))
	return b.String(), nil
}

func compareStep(a, b *report.Step) []string {
	var list []string
	text := func(what, x, y string) {
		if x != y {
			list = append(list, fmt.Sprintf("%s: %s, now %s", what, orNothing(x), orNothing(y)))
		}
	}
	if a.Number != b.Number {
		list = append(list, fmt.Sprintf("place in the route: %d, now %d", a.Number, b.Number))
	}
	text("reaction", a.Reaction, b.Reaction)
	text("agents", a.Agents, b.Agents)
	text("medium", a.Medium, b.Medium)
	text("activation", a.Activation, b.Activation)
	text("kind", a.Kind, b.Kind)
	text("standing", a.Standing, b.Standing)
	text("call", a.Call, b.Call)
	pa, pb := a.Planned, b.Planned
	if pa != nil && pb != nil {
		text("planned", pa.Place, pb.Place)
		if pa.Rank != pb.Rank {
			list = append(list, fmt.Sprintf("rank of the planned choice: %d, now %d", pa.Rank, pb.Rank))
		}
		if pa.Chance != nil && pb.Chance != nil {
			if math.Abs(*pa.Chance-*pb.Chance) >= changed {
				list = append(list, fmt.Sprintf("chance of the planned choice: %s, now %s", chanceText(pa.Chance, pa.Limits), chanceText(pb.Chance, pb.Limits)))
			}
		} else if (pa.Chance == nil) != (pb.Chance == nil) {
			list = append(list, fmt.Sprintf("chance of the planned choice: %s, now %s", chanceText(pa.Chance, pa.Limits), chanceText(pb.Chance, pb.Limits)))
		}
	}
	fa, fb := firstCandidate(a), firstCandidate(b)
	text("first-ranked", fa, fb)
	codes := func(s *report.Step) map[string]bool {
		m := map[string]bool{}
		for _, r := range s.Outside {
			m[r.Code] = true
		}
		for _, r := range s.Caution {
			m[r.Code] = true
		}
		return m
	}
	ca, cb := codes(a), codes(b)
	for _, k := range sortedKeys(cb) {
		if !ca[k] {
			list = append(list, "new remark: "+k)
		}
	}
	for _, k := range sortedKeys(ca) {
		if !cb[k] {
			list = append(list, "remark gone: "+k)
		}
	}
	return list
}

func firstCandidate(s *report.Step) string {
	if len(s.Candidate) == 0 {
		return ""
	}
	return s.Candidate[0].Place
}

func orNothing(s string) string {
	if s == "" {
		return "nothing"
	}
	return s
}
