package reactivity

import (
	"fmt"
	"math"
	"sync"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// z90 is the two-sided 90 % point of the normal distribution.
const z90 = 1.6448536269514722

// judged is one event of one molecule as the fitted model sees it.
type judged struct {
	fit     *siteFit
	weights []float64
	row     siteRow
	chances []float64
	limits  [][2]float64 // nil where not asked for
	columns *localColumns
	mixture float64      // share of the protonated form
	byForm  [2][]float64 // chances in each form alone
}

// chanceSpace is scratch of [model.judge], one per goroutine.
type chanceSpace struct {
	scratch fitScratch
	g       []float64
	seen    []bool
	index   []int32
	whole   []int32
	all     []float64
	q       quadratic
}

var chanceSpaces = sync.Pool{New: func() any { return new(chanceSpace) }}

// judge computes the chances of the sites of an event, and their limits where local, the
// parameters that occur, is given. forms are the neutral form and, where it counts, the protonated one, all solved
// with the calibrated set.
func (m *model) judge(event terms.Event, forms [][]*species, sites [][]int, incoming string, medium terms.Medium, local *localColumns) (*judged, error) {
	f := m.sites[event]
	j := &judged{fit: f, weights: m.weights[event]}
	sub := &substrateData{m: forms[0][0].v.m, sites: sites}
	for _, s := range sites {
		sub.logG = append(sub.logG, math.Log(float64(len(s))))
	}
	var columns *parameterColumns
	if local != nil {
		j.columns, columns = local, &local.parameterColumns
	}
	class := attackerClassOf(event, incoming)
	j.row = siteRow{sub: sub, class: class}
	for _, list := range forms {
		form := newForm(event, list, sites)
		for k := range form.pi {
			if err := form.fill(event, f.count, k, list[k].solution, columns, list[k].space, list[k].sensitivity); err != nil {
				return nil, err
			}
		}
		form.compact(f.count, columns)
		sub.forms = append(sub.forms, form)
		features := make([][]feature, len(sites))
		for c, x := range form.features {
			features[c] = crossFeatures(event, class, f.share, plainTerms(event), x)
		}
		j.row.features = append(j.row.features, features)
	}
	if len(forms) > 1 {
		j.row.medium = mediumFeatures(medium, incoming == "nitration", sub.m, sub.forms[1].site)
	}
	space := chanceSpaces.Get().(*chanceSpace)
	defer chanceSpaces.Put(space)
	n := 0
	if local != nil {
		n = local.n
	}
	delta := grow(space.g, n+1)
	clear(delta)
	space.g = delta
	j.chances = f.chances(&j.row, delta, j.weights, &space.scratch)
	j.mixture = f.mixture(&j.row, j.weights)
	for k := range sub.forms {
		j.byForm[k] = append([]float64(nil), space.scratch.p[k]...)
	}
	if local != nil {
		j.limits = m.chanceLimits(j, delta, space)
	}
	return j, nil
}

// chanceLimits are the 90 % limits of chances from the covariance of parameters and
// weights: the logit of a chance is taken as normal, with the variance that first
// derivatives give.
func (m *model) chanceLimits(j *judged, delta []float64, space *chanceSpace) [][2]float64 {
	f := j.fit
	n := j.columns.n
	size := n + f.weights
	sites := len(j.chances)
	space.all = grow(space.all, sites*size)
	all := space.all
	clear(all)
	space.seen = growBools(space.seen, size)
	space.index = space.index[:0]
	r := j.row
	for c := range sites {
		g := all[c*size : (c+1)*size]
		r.truth = c
		f.loss(&r, 1, delta, j.weights, g[:n], g[n:], &space.scratch)
		for i, x := range g {
			if x != 0 && !space.seen[i] {
				space.seen[i] = true
				space.index = append(space.index, int32(i))
			}
		}
	}
	space.whole = space.whole[:0]
	for _, i := range space.index {
		if int(i) < n {
			space.whole = append(space.whole, j.columns.global[i])
		} else {
			space.whole = append(space.whole, i-int32(n)+int32(m.columns.n))
		}
	}
	q := &space.q
	q.set(m.covariance(), f.event)
	q.gather(space.index, space.whole)
	out := make([][2]float64, sites)
	for c, p := range j.chances {
		// g is the derivative of −ln P; that of logit P is −g/(1−P).
		out[c] = logitLimits(p, math.Sqrt(q.of(all[c*size:(c+1)*size]))/(1-p))
	}
	return out
}

// logitLimits are the 90 % limits of a chance whose logit has the given deviation.
func logitLimits(p, deviation float64) [2]float64 {
	if p >= 1-1e-12 {
		return [2]float64{1, 1}
	}
	x := math.Log(p / (1 - p))
	return [2]float64{logistic(x - z90*deviation), logistic(x + z90*deviation)}
}

func growBools(s []bool, n int) []bool {
	if cap(s) < n {
		return make([]bool, n)
	}
	s = s[:n]
	clear(s)
	return s
}

// callOf is the call that chances and limits allow: clear at a first chance of 0.80 or
// more with a lower limit above 0.50, leaning at 0.50 or more, split below.
func callOf(chance float64, limits *[2]float64) terms.Call {
	switch {
	case chance >= 0.8 && (limits == nil || limits[0] > 0.5):
		return terms.Clear
	case chance >= 0.5:
		return terms.Leaning
	}
	return terms.Split
}

// speciesWords lists the species behind a ranking with their shares.
func (j *judged) speciesWords(forms [][]*species) []string {
	if len(forms) < 2 {
		return []string{forms[0][0].v.m.SMILES()}
	}
	m := j.mixture
	return []string{
		fmt.Sprintf("%s (%.2f)", forms[0][0].v.m.SMILES(), 1-m),
		fmt.Sprintf("%s (%.2f)", forms[1][0].v.m.SMILES(), m),
	}
}

// fittedSites tells whether the outcomes behind the chances of an event hold sites of
// this kind; otherwise the reason.
func fittedSites(event terms.Event, m *molecule.Molecule, sites []Candidate) (reason string) {
	switch event {
	case terms.ElectrophilicSubstitution:
		if !m.Atoms[sites[0].Atoms[0]].Aromatic {
			return "the outcomes behind the chances are substitutions of aromatic C–H; this one is of an alkene"
		}
	case terms.NucleophilicSubstitution:
		for _, s := range sites {
			if !m.Atoms[s.Atoms[0]].Aromatic {
				return "the outcomes behind the chances are displacements on aromatic rings; here one is vinylic"
			}
			switch s.Leaving {
			case "F", "Cl", "Br", "I":
			default:
				return "the outcomes behind the chances are displacements of halogen; here " + s.Leaving + " may leave"
			}
		}
	}
	return ""
}
