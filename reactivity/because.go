package reactivity

import (
	"fmt"
	"math"
	"sort"
	"strings"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// contribution is what one term adds to the logarithm of the ratio of two chances.
type contribution struct {
	amount float64
	text   string
}

// most is the number of terms a reason names.
const mostReasons = 3

// because says which terms put candidate a above candidate b, in words and numbers: the
// two or three largest, as the factor by which each changes the ratio of the chances.
func (j *judged) because(a, b int, m *molecule.Molecule, atomsB []int) string {
	list := j.contributions(a, b)
	sort.SliceStable(list, func(x, y int) bool { return list[x].amount > list[y].amount })
	var parts []string
	for _, c := range list {
		if c.amount < 0.1 || len(parts) == mostReasons {
			break
		}
		parts = append(parts, c.text)
	}
	if len(parts) == 0 {
		return ""
	}
	text := "over atom " + listNumbers(m, atomsB) + ": " + strings.Join(parts, "; ")
	sort.SliceStable(list, func(x, y int) bool { return list[x].amount < list[y].amount })
	if len(list) > 0 && list[0].amount < -0.5 {
		text += "; against it: " + list[0].text
	}
	return text
}

// contributions compares the terms of two candidates in the form of the molecule that
// carries most of the chance of the first.
func (j *judged) contributions(a, b int) []contribution {
	f := j.fit
	k := 0
	if len(j.row.sub.forms) > 1 {
		var s fitScratch
		s.size(len(j.chances), f.count)
		delta := make([]float64, 0)
		for i, form := range j.row.sub.forms {
			saved := form.active
			form.active = nil
			f.formChances(form, j.row.sub.logG, j.row.features[i], delta, j.weights, s.p[i], s.index[i])
			form.active = saved
		}
		if m := f.mixture(&j.row, j.weights); m*s.p[1][a] > (1-m)*s.p[0][a] {
			k = 1
		}
	}
	form := j.row.sub.forms[k]
	var list []contribution
	for i := range f.count {
		za, zb := form.z[a*f.count+i], form.z[b*f.count+i]
		amount := j.weights[i] * (za - zb)
		list = append(list, contribution{amount, indexReason(i, (za-zb)/indexScale, amount)})
	}
	if d := j.row.sub.logG[a] - j.row.sub.logG[b]; d != 0 {
		na, nb := len(j.row.sub.sites[a]), len(j.row.sub.sites[b])
		list = append(list, contribution{d, fmt.Sprintf("%d equivalent positions against %d (%s)", na, nb, factor(d))})
	}
	sum := map[int32]float64{}
	var order []int32
	add := func(features []feature, sign float64) {
		for _, x := range features {
			if _, ok := sum[x.term]; !ok {
				order = append(order, x.term)
			}
			sum[x.term] += sign * x.value
		}
	}
	add(j.row.features[k][a], 1)
	add(j.row.features[k][b], -1)
	sort.Slice(order, func(x, y int) bool { return order[x] < order[y] })
	// Terms with one reason are told together: a kind and its crossed share.
	merged := map[string]int{}
	plain := map[string]float64{}
	for _, t := range order {
		d := sum[t]
		if math.Abs(d) < 1e-9 {
			continue
		}
		amount := j.weights[f.count+int(t)] * d
		reason := f.terms[t].Reason
		if at, ok := merged[reason]; ok {
			list[at].amount += amount
			list[at].text = termReason(reason, plain[reason], list[at].amount)
			continue
		}
		merged[reason], plain[reason] = len(list), d
		list = append(list, contribution{amount, termReason(reason, d, amount)})
	}
	return list
}

// factor writes exp(x) as the factor on the ratio of two chances.
func factor(x float64) string {
	f := math.Exp(x)
	switch {
	case f >= 100:
		return fmt.Sprintf("×%.0f", f)
	case f >= 9.95:
		return fmt.Sprintf("×%.0f", f)
	case f >= 0.0995:
		return fmt.Sprintf("×%.1f", f)
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

// termReason words a difference in a static term: what the first site has or is spared.
func termReason(reason string, difference, amount float64) string {
	switch {
	case math.Abs(math.Abs(difference)-1) > 1e-9:
		how := "more of"
		if difference < 0 {
			how = "less of"
		}
		return fmt.Sprintf("%s: %s by %.2g (%s)", reason, how, math.Abs(difference), factor(amount))
	case difference > 0:
		return fmt.Sprintf("%s (%s)", reason, factor(amount))
	}
	return fmt.Sprintf("not %s (%s)", reason, factor(amount))
}

// becauseByIndex is the reason where only the localization energy ranks.
func becauseByIndex(sites []Site, k int, m *molecule.Molecule, event terms.Event) string {
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
