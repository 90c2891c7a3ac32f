package review

import (
	"fmt"
	"sort"
	"strings"

	"lobecast/frontier/terms"
	"lobecast/reactivity/report"
)

// severity orders the standings by risk: what the symmetry forbids, what the ranking
// speaks against, what was refused, what it cannot decide, what it cannot see.
var severity = map[terms.Standing]int{
	terms.Forbidden: 0, terms.Opposed: 1, terms.Contested: 3, terms.NotJudged: 4, terms.Supported: 5,
}

// riskOrder lists the steps by risk, the most doubtful first; within a standing, the
// lower planned chance first.
func riskOrder(steps []judged) []report.Risk {
	order := make([]int, len(steps))
	for i := range order {
		order[i] = i
	}
	rank := func(i int) int {
		s := &steps[i].step
		if len(s.Refused) > 0 {
			return 2
		}
		return severity[terms.Standing(s.Standing)]
	}
	chance := func(i int) float64 {
		if p := steps[i].step.Planned; p != nil && p.Chance != nil {
			return *p.Chance
		}
		return 1
	}
	sort.SliceStable(order, func(a, b int) bool {
		i, j := order[a], order[b]
		if rank(i) != rank(j) {
			return rank(i) < rank(j)
		}
		if chance(i) != chance(j) {
			return chance(i) < chance(j)
		}
		return i < j
	})
	list := make([]report.Risk, len(order))
	for n, i := range order {
		list[n] = report.Risk{Order: n + 1, Step: i + 1, Line: riskLine(&steps[i])}
	}
	return list
}

// riskLine is the one line a group meeting needs for a step.
func riskLine(j *judged) string {
	s := &j.step
	var b strings.Builder
	fmt.Fprintf(&b, "step %d", s.Number)
	if s.Name != b.String() { // a step without a name is called by its number
		b.WriteString(", " + s.Name)
	}
	fmt.Fprintf(&b, ": %s", s.Standing)
	switch {
	case len(s.Refused) > 0:
		fmt.Fprintf(&b, ": refused as written, mend the file (line %d)", s.Refused[0].Line)
		return b.String()
	case s.Standing == string(terms.NotJudged):
		fmt.Fprintf(&b, ": %s", s.Reason)
	case s.Standing == string(terms.Forbidden):
		fmt.Fprintf(&b, ": %s", s.Reason)
	default:
		if p := s.Planned; p != nil {
			fmt.Fprintf(&b, "; %s %s", planOf(s), chanceText(p.Chance, p.Limits))
		}
		for k := range s.Candidate {
			c := &s.Candidate[k]
			if !c.Planned {
				fmt.Fprintf(&b, ", %s %s", c.Place, chanceText(c.Chance, nil))
				break
			}
		}
		switch s.Standing {
		case string(terms.Contested):
			if s.Call == string(terms.Clear) && s.Planned != nil && s.Planned.Rank == 1 {
				b.WriteString(": the position is clear, but the step may not go")
			} else {
				b.WriteString(": the model cannot decide")
			}
		case string(terms.Opposed):
			b.WriteString(": the model speaks against the plan")
		}
	}
	if j.outside != "" {
		b.WriteString("; not modelled: " + firstClause(j.outside))
	}
	return b.String()
}

func chanceText(p *float64, lim *[2]float64) string {
	switch {
	case p == nil:
		return "(no chance)"
	case lim == nil:
		return fmt.Sprintf("%.2f", *p)
	}
	return fmt.Sprintf("%.2f [%.2f–%.2f]", *p, lim[0], lim[1])
}

// firstClause is a remark up to its first semicolon or full stop.
func firstClause(s string) string {
	if i := strings.IndexAny(s, ";"); i > 0 {
		s = s[:i]
	}
	if i := strings.Index(s, ". "); i > 0 {
		s = s[:i]
	}
	return strings.TrimSuffix(s, ".")
}
