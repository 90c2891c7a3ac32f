package reactivity

import (
	"fmt"
	"math"
	"sort"
	"strings"

	"lobecast/frontier/terms"
)

// fillOrientations gives the two orientations of each Diels–Alder joining their chances,
// and the judgement its call, that of the first joining, or says why there are none.
func (p *PairJudgement) fillOrientations(c PairConditions) {
	m := fitted()
	switch {
	case !m.calibrated(p.Set):
		p.ChanceAbsent = "chances are fitted with the calibrated parameter set, and another is used here"
		return
	case p.B == nil:
		p.ChanceAbsent = "the outcomes behind the chances are all between two molecules; this addition is within one"
		return
	case p.Lewis != nil:
		p.ChanceAbsent = "the outcomes behind the chances do not say whether a Lewis acid was there; judge without one to see chances"
		return
	case open(p.SolutionA) || open(p.SolutionB):
		p.ChanceAbsent = "a shell of levels is only partly filled: no call"
		return
	}
	systemA, localA := places(p.SolutionA)
	systemB, localB := places(p.SolutionB)
	// Joinings keep their Order; adducts lie together by joining.
	for from := 0; from < len(p.Adducts); {
		to := from
		for to < len(p.Adducts) && p.Adducts[to].Joining == p.Adducts[from].Joining {
			to++
		}
		list := p.Adducts[from:to]
		var j *Joining
		for k := range p.Joinings {
			if p.Joinings[k].Order == list[0].Joining {
				j = &p.Joinings[k]
			}
		}
		first := from == 0
		from = to
		reason := orientationFitted(j, list)
		if reason != "" {
			if first {
				p.ChanceAbsent = reason
			}
			continue
		}
		row, ok := pairRowOf(p, j, &list[0])
		if !ok {
			if first {
				p.ChanceAbsent = "the ends of this pair are not those of a diene beside a π bond, as in the outcomes behind the chances"
			}
			continue
		}
		var columns *parameterColumns
		if !c.NoLimits {
			columns = &m.columns
		}
		if err := row.energies(p.SolutionA, p.SolutionB, systemA, localA, systemB, localB, m.weightsOfPairs()[1], columns); err != nil {
			if first {
				p.ChanceAbsent = "the energies of the half-formed bonds cannot be computed"
			}
			continue
		}
		m.orient(row, list, !c.NoLimits, !c.NoWords)
		if first {
			p.ChanceAbsent = ""
			best := &list[0]
			if *list[1].Chance > *best.Chance+rankTolerance {
				best = &list[1]
			}
			p.Call = callOf(*best.Chance, best.Limits)
		}
	}
}

func (m *model) weightsOfPairs() []float64 { return m.weights[terms.CycloadditionOrientation] }

// orientationFitted tells why a joining has no chances; empty where it has.
func orientationFitted(j *Joining, list []Adduct) string {
	switch {
	case len(list) != 2:
		return "both orientations give the same adduct"
	case j.A.Role == RoleDipole || j.B.Role == RoleDipole:
		return "fewer than 200 published outcomes of dipolar cycloadditions stand behind this event: it is ranked by the first-bond energy only, which put the recorded orientation first in 25 of 31 published cases (docs/cycloadditions.md)"
	}
	return ""
}

// pairRowOf makes the row of the fit of a joining: the diene as its first component,
// the bonds of the given adduct as the orientation asked about. turned tells that the
// diene lies in the second molecule.
func pairRowOf(p *PairJudgement, j *Joining, x *Adduct) (*pairRow, bool) {
	a, b, c, d := x.Bonds[0][0], x.Bonds[0][1], x.Bonds[1][0], x.Bonds[1][1]
	r := &pairRow{a: p.A, b: p.B, piA: p.PiA, piB: p.PiB}
	if j.B.Role == RoleDiene {
		r.a, r.b, r.piA, r.piB, r.turned = p.B, p.A, p.PiB, p.PiA, true
		a, b, c, d = b, a, d, c
	}
	facts, ok := pairFacts(r.a, r.piA, r.b, r.piB, a, b, c, d)
	if !ok {
		return nil, false
	}
	r.facts = facts
	r.ends = [4]int{centreOf(r.piA, a), centreOf(r.piA, c), centreOf(r.piB, b), centreOf(r.piB, d)}
	r.x = channelTerms(&r.facts)
	return r, true
}

// orient puts chances into the two adducts of a joining, the first of which is the one
// the row asks about.
func (m *model) orient(r *pairRow, list []Adduct, limits, words bool) {
	f := m.pairs
	w := m.weightsOfPairs()
	delta := make([]float64, m.columns.n+1)
	p := f.chance(r, delta, w)
	q := 1 - p
	list[0].Chance, list[1].Chance = &p, &q
	if limits {
		n := m.columns.n
		g := make([]float64, n+f.weights)
		theta := make([]float64, n+1)
		f.loss(r, 1, delta, w, theta, g[n:])
		copy(g[:n], theta[:n])
		var index []int32
		for i, x := range g {
			if x != 0 {
				index = append(index, int32(i))
			}
		}
		var quad quadratic
		quad.set(m.covariance(), terms.CycloadditionOrientation)
		quad.gather(index, index)
		l := logitLimits(p, math.Sqrt(quad.of(g))/(1-p))
		list[0].Limits = &l
		list[1].Limits = &[2]float64{1 - l[1], 1 - l[0]}
	}
	if words {
		first, second := 0, 1
		if q > p {
			first, second = 1, 0
		}
		text := f.because(r, w, first)
		if text != "" {
			list[first].chanceReason = "chance decided by " + text
		}
		if text != "" {
			list[second].chanceReason = "the other way round goes first by " + text
		}
	}
}

// because says which terms favour an orientation (0 the one of the row, 1 the other), at
// the first bond that counts most in each.
func (f *pairFit) because(r *pairRow, w []float64, orientation int) string {
	e, z := f.channelWeights(r, nil, w)
	best := func(a, b int) int {
		if e[b] > e[a] {
			return b
		}
		return a
	}
	a, b := best(0, 1), best(2, 3)
	if orientation == 1 {
		a, b = b, a
	}
	type reason struct {
		amount float64
		text   string
	}
	var list []reason
	d := (z[a] - z[b]) / indexScale
	amount := w[0] * (z[a] - z[b])
	how := "lower"
	if d > 0 {
		how = "higher"
	}
	list = append(list, reason{amount, fmt.Sprintf("first bond with the second under way %.3f |β| %s (%s)", math.Abs(d), how, factor(amount))})
	for t := range pairTerms {
		d := r.x[a][t] - r.x[b][t]
		if d == 0 {
			continue
		}
		amount := w[2+t] * d
		text := pairTerms[t].Reason
		if d < 0 {
			text = "less of: " + text
		}
		list = append(list, reason{amount, text + " (" + factor(amount) + ")"})
	}
	sort.SliceStable(list, func(x, y int) bool { return list[x].amount > list[y].amount })
	var parts []string
	for _, c := range list {
		if c.amount < 0.1 || len(parts) == mostReasons {
			break
		}
		parts = append(parts, c.text)
	}
	return strings.Join(parts, "; ")
}
