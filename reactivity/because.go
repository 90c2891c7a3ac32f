package reactivity

import (
	"fmt"
	"math"
	"sort"
	"strings"

	"lobecast/frontier/molecule"
)

// contribution is what one term adds to the logarithm of the ratio of two chances: the
// difference in the term and the amount. kind is the number of an index, or −1 for
// equivalent positions, or −2−t for the static term t.
type contribution struct {
	amount, difference float64
	kind               int
}

const (
	kindPositions = -1
	kindTerm      = -2
)

// mostReasons is the number of terms a reason names.
const mostReasons = 3

// because says which terms put candidate a above candidate b, in words and numbers: the
// two or three largest, as the factor by which each changes the ratio of the chances.
//
// reported is the form of the molecule whose indices the report prints (0 as written, 1
// protonated); where another form carries the chance, the reason says so.
func (j *judged) because(a, b int, m *molecule.Molecule, atomsB []int, reported int) string {
	list := j.contributions(a, b)
	sort.SliceStable(list, func(x, y int) bool { return list[x].amount > list[y].amount })
	var text strings.Builder
	for k, c := range list {
		if c.amount < 0.1 || k == mostReasons {
			break
		}
		if k == 0 {
			if form := j.mainForm(a); form != reported {
				text.WriteString([...]string{"in the form as written, ", "in the protonated form, "}[form])
			}
			text.WriteString("over atom ")
			text.WriteString(listNumbers(m, atomsB))
			text.WriteString(": ")
		} else {
			text.WriteString("; ")
		}
		text.WriteString(j.word(a, b, c))
	}
	if text.Len() == 0 {
		return ""
	}
	if last := list[len(list)-1]; last.amount < -0.5 {
		text.WriteString("; against it: ")
		text.WriteString(j.word(a, b, last))
	}
	return text.String()
}

// word puts a contribution into words.
func (j *judged) word(a, b int, c contribution) string {
	switch {
	case c.kind >= 0:
		return indexReason(c.kind, c.difference, c.amount)
	case c.kind == kindPositions:
		sites := j.row.sub.sites
		return fmt.Sprintf("%d equivalent positions against %d (%s)", len(sites[a]), len(sites[b]), factor(c.amount))
	}
	return termReason(j.fit.terms[kindTerm-c.kind].Reason, c.difference, c.amount)
}

// contributions compares the terms of two candidates in the form of the molecule that
// carries most of the chance of the first.
func (j *judged) contributions(a, b int) []contribution {
	f := j.fit
	k := j.mainForm(a)
	form := j.row.sub.forms[k]
	plain := plainTerms(f.event)
	list := make([]contribution, 0, 16)
	for i := range f.count {
		d := form.z[a*f.count+i] - form.z[b*f.count+i]
		list = append(list, contribution{j.weights[i] * d, d / indexScale, i})
	}
	if d := j.row.sub.logG[a] - j.row.sub.logG[b]; d != 0 {
		list = append(list, contribution{d, d, kindPositions})
	}
	first := len(list)
	add := func(features []feature, sign float64) {
		for _, x := range features {
			t := int(x.term)
			w := j.weights[f.count+t] * x.value * sign
			difference := x.value * sign
			if t >= plain { // a crossed term is told with the plain one
				t = crossedTerms[f.event][(t-plain)%len(crossedTerms[f.event])]
				difference = 0
			}
			at := -1
			for n := first; n < len(list); n++ {
				if list[n].kind == kindTerm-t {
					at = n
				}
			}
			if at < 0 {
				at = len(list)
				list = append(list, contribution{kind: kindTerm - t})
			}
			list[at].amount += w
			list[at].difference += difference
		}
	}
	add(j.row.features[k][a], 1)
	add(j.row.features[k][b], -1)
	kept := list[:first]
	for _, c := range list[first:] {
		if math.Abs(c.difference) > 1e-9 {
			kept = append(kept, c)
		}
	}
	return kept
}

// mainForm is the form that carries most of the chance of candidate a.
func (j *judged) mainForm(a int) int {
	if len(j.row.sub.forms) < 2 {
		return 0
	}
	if m := j.mixture; m*j.byForm[1][a] > (1-m)*j.byForm[0][a] {
		return 1
	}
	return 0
}

// factor writes exp(x) as the factor on the ratio of two chances.
func factor(x float64) string {
	f := math.Exp(x)
	switch {
	case f > 1000:
		return "more than ×1000" // further digits would be false precision
	case f >= 9.95:
		return fmt.Sprintf("×%.0f", f)
	case f >= 0.0995:
		return fmt.Sprintf("×%.1f", f)
	}
	if f < 0.001 {
		return "less than ×0.001"
	}
	return fmt.Sprintf("×%.2g", f)
}

func indexReason(i int, difference, amount float64) string {
	how := "lower"
	if difference > 0 {
		how = "higher"
	}
	d := math.Abs(difference)
	switch physicalNames[i] {
	case "localization":
		return fmt.Sprintf("localization energy %.3f |β| %s (%s)", d, how, factor(amount))
	case "smoothed_density":
		return fmt.Sprintf("smoothed frontier density %.3f %s (%s)", d, how, factor(amount))
	}
	return fmt.Sprintf("charge %.3f %s (%s)", d, map[string]string{"lower": "more negative", "higher": "more positive"}[how], factor(amount))
}

// countedReasons are the terms whose reason is a thing counted, not a place.
var countedReasons = map[string]string{
	"groups on the neighbouring ring atoms": "group on a neighbouring ring atom",
	"pyridine-type N in the ring":           "pyridine-type N in the ring",
	"acceptor groups on the ring":           "acceptor group on the ring",
	"donor groups on the ring":              "donor group on the ring",
	"aromatic rings fused to the ring":      "aromatic ring fused to the ring",
	"groups across the five-membered ring":  "group across the five-membered ring",
}

// termReason words a difference in a static term: what the first site has or is spared.
func termReason(reason string, difference, amount float64) string {
	f := factor(amount)
	size := math.Abs(difference)
	whole := math.Abs(size-1) < 1e-9
	if thing, ok := countedReasons[reason]; ok {
		switch {
		case whole && difference > 0:
			return fmt.Sprintf("one more %s (%s)", thing, f)
		case whole:
			return fmt.Sprintf("one %s fewer (%s)", thing, f)
		case difference > 0:
			return fmt.Sprintf("%s: %.2g more (%s)", reason, size, f)
		}
		return fmt.Sprintf("%s: %.2g fewer (%s)", reason, size, f)
	}
	switch reason {
	case "σ-inductive field":
		return fmt.Sprintf("σ-inductive field %.2g %s (%s)", size, map[bool]string{true: "stronger", false: "weaker"}[difference > 0], f)
	case "formal charge by distance":
		return fmt.Sprintf("formal charge by distance %.2g %s (%s)", size, map[bool]string{true: "more positive", false: "more negative"}[difference > 0], f)
	}
	switch {
	case whole && difference > 0:
		return fmt.Sprintf("%s (%s)", reason, f)
	case whole:
		return fmt.Sprintf("not %s (%s)", reason, f)
	case difference > 0:
		return fmt.Sprintf("%s, %.2g times more (%s)", reason, size, f)
	}
	return fmt.Sprintf("%s, %.2g times less (%s)", reason, size, f)
}

// becauseByIndex is the reason where only the localization energy ranks.
func becauseByIndex(sites []Site, k int, m *molecule.Molecule) string {
	if len(sites) < 2 {
		return ""
	}
	other := 0
	if k == 0 {
		other = 1
	}
	x, y := sites[k].Index["localization"], sites[other].Index["localization"]
	if x.Absent != "" || y.Absent != "" {
		return ""
	}
	d := x.X - y.X
	if k == 0 {
		return fmt.Sprintf("localization energy %.3f |β| lower than at atom %s", -d, listNumbers(m, sites[other].Atoms))
	}
	return fmt.Sprintf("localization energy %.3f |β| higher than at atom %s", d, listNumbers(m, sites[other].Atoms))
}
