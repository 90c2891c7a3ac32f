package reactivity

import (
	"fmt"
	"math"
	"slices"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// indexScale brings indices to a common scale in the logarithm of a chance: weights are
// per 0.1 |β| of localization energy, per 0.1 of smoothed density, per 0.1 e of charge.
const indexScale = 10

// priorIndex is the standard deviation of the prior on the weight of an index, priorMedium
// that on the logit of a share of the protonated form, and the prior on the logit of the
// lapse: a share of records that follow no rule, put at 1 to 3 % by those who collected
// them.
const (
	priorIndex  = 4.0
	priorMedium = 1.5
	lapseLogit  = -4.2 // 1.5 %
	priorLapse  = 0.7
)

// mediumNames are the contributions to the logit of the share of the protonated form
// among what reacts, where both forms exist.
var mediumNames = []string{
	"protonated: acidic medium", "protonated: unknown medium, nitration", "protonated: unknown medium, other",
	"protonated: on an amine of a ring", "protonated: on an alkylamine",
}

// mediumCentre is the prior mean of each.
var mediumCentre = []float64{1, -1, -3, 0, 0}

// mediumFeatures gives the contributions that apply.
func mediumFeatures(medium terms.Medium, nitration bool, m *molecule.Molecule, site int) (x [5]float64) {
	switch {
	case medium == terms.Acidic:
		x[0] = 1
	case nitration:
		x[1] = 1
	default:
		x[2] = 1
	}
	if site < 0 || m.Atoms[site].Aromatic {
		return x
	}
	for _, h := range m.Neighbours(site) {
		if m.Bonds[h.Bond].Order > 1 {
			return x
		}
	}
	for _, h := range m.Neighbours(site) {
		if m.Atoms[h.Atom].Aromatic {
			x[3] = 1
			return x
		}
	}
	x[4] = 1
	return x
}

// formData is one protonation state of a substrate, prepared for the fit.
type formData struct {
	pi       []*frontier.Pi // of the fast tautomers
	centre   [][][]int      // by tautomer and candidate: the centres of its atoms
	features [][]feature    // by candidate, plain terms, averaged
	site     int            // atom that took the proton, -1 for none

	// At the point of the last linearization:
	z      []float64 // by candidate and index
	active []int32   // columns of parameters that matter here
	by     []float64 // by candidate, index and active column
	full   []float64 // the same over all columns, while it is being filled
}

// substrateData is a substrate with its candidates.
type substrateData struct {
	m     *molecule.Molecule
	key   string // canonical SMILES
	sites [][]int
	logG  []float64
	forms []*formData
}

// siteRow is one outcome.
type siteRow struct {
	id       string
	sub      *substrateData
	truth    int
	class    int
	medium   [5]float64
	weight   float64
	fold     int
	group    uint64
	same     bool
	features [][][]feature // by form and candidate, with crossed terms
}

// siteFit is the data and layout of the fit of one event.
type siteFit struct {
	event   terms.Event
	count   int // indices
	terms   []term
	share   []float64 // of the classes of what comes in among the outcomes
	subs    []*substrateData
	rows    []siteRow
	weights int // length of the weight vector
	mean    []float64
	prior   []float64 // standard deviations, aligned with the weight vector
}

// The weight vector: indices, static terms, medium, lapse.
func (f *siteFit) at(block string) int {
	switch block {
	case "terms":
		return f.count
	case "medium":
		return f.count + len(f.terms)
	case "lapse":
		return f.weights - 1
	}
	return 0
}

// weightNames names the entries of the weight vector.
func weightNames(event terms.Event) []string {
	var names []string
	for _, n := range physicalNames[:physicalCount(event)] {
		names = append(names, n)
	}
	for _, t := range siteTermList(event) {
		names = append(names, t.Name)
	}
	if event == terms.ElectrophilicSubstitution {
		names = append(names, mediumNames...)
	}
	return append(names, "lapse")
}

// newSiteFit prepares outcomes of an event. Every outcome must be read and its site be
// among the candidates; the error names the first that is not.
func newSiteFit(event terms.Event, outcomes []siteOutcome) (*siteFit, error) {
	f := &siteFit{event: event, count: physicalCount(event), terms: siteTermList(event)}
	names := weightNames(event)
	f.weights = len(names)
	f.mean, f.prior = make([]float64, f.weights), make([]float64, f.weights)
	for i := range f.prior {
		switch {
		case i < f.count:
			f.prior[i] = priorIndex
		case i < f.count+len(f.terms):
			f.prior[i] = f.terms[i-f.count].Prior
		case i == f.weights-1:
			f.mean[i], f.prior[i] = lapseLogit, priorLapse
		default:
			f.mean[i], f.prior[i] = mediumCentre[i-f.count-len(f.terms)], priorMedium
		}
	}
	byKey := map[string]*substrateData{}
	count := map[*substrateData]int{}
	f.share = make([]float64, len(attackerClasses[event]))
	for _, o := range outcomes {
		m, err := molecule.ParseSMILES(o.SMILES)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", o.ID, err)
		}
		sub := byKey[o.SMILES]
		if sub == nil {
			if sub, err = newSubstrate(event, m, o.Halogens); err != nil {
				return nil, fmt.Errorf("%s: %w", o.ID, err)
			}
			byKey[o.SMILES] = sub
			f.subs = append(f.subs, sub)
		}
		r := siteRow{id: o.ID, sub: sub, truth: -1, class: attackerClassOf(event, o.Incoming), same: o.SameChoice, fold: foldOf(sub.key)}
		for k, s := range sub.sites {
			if slices.Contains(s, o.Site[0]) {
				r.truth = k
			}
		}
		if r.truth < 0 {
			return nil, fmt.Errorf("%s: the site of the outcome is not among the candidates", o.ID)
		}
		r.group = environmentKey(m, sub.sites[r.truth])
		if r.class >= 0 {
			f.share[r.class]++
		}
		medium := terms.UnknownMedium
		if o.Acidic {
			medium = terms.Acidic
		}
		if len(sub.forms) > 1 {
			r.medium = mediumFeatures(medium, o.Incoming == "nitration", sub.m, sub.forms[1].site)
		}
		count[sub]++
		f.rows = append(f.rows, r)
	}
	for k := range f.share {
		f.share[k] /= float64(len(f.rows))
	}
	base0 := plainTerms(event)
	for i := range f.rows {
		r := &f.rows[i]
		r.weight = 1 / float64(count[r.sub])
		for _, form := range r.sub.forms {
			list := make([][]feature, len(form.features))
			for c, x := range form.features {
				list[c] = crossFeatures(event, r.class, f.share, base0, append([]feature(nil), x...))
			}
			r.features = append(r.features, list)
		}
	}
	return f, nil
}

// newSubstrate perceives the forms and candidates of one substrate. only, where given,
// keeps the candidates that hold one of these atoms.
func newSubstrate(event terms.Event, m *molecule.Molecule, only []int) (*substrateData, error) {
	medium := terms.UnknownMedium
	if event != terms.ElectrophilicSubstitution {
		medium = terms.Neutral
	}
	forms, err := formsOf(m, medium, nil)
	if err != nil {
		return nil, err
	}
	s := &substrateData{m: m, key: m.FlatSMILES()}
	for _, c := range candidates(forms[0][0].v, forms[0][0].pi, event) {
		if c.Ipso || only != nil && !slices.Contains(only, c.Atoms[0]) {
			continue
		}
		s.sites = append(s.sites, c.Atoms)
		s.logG = append(s.logG, math.Log(float64(len(c.Atoms))))
	}
	for _, list := range forms {
		s.forms = append(s.forms, newForm(event, list, s.sites))
	}
	return s, nil
}

// newForm collects the static features of the candidates in one form.
func newForm(event terms.Event, list []*species, sites [][]int) *formData {
	f := &formData{site: list[0].site, features: make([][]feature, len(sites))}
	for _, sp := range list {
		f.pi = append(f.pi, sp.pi)
		var centres [][]int
		for _, atoms := range sites {
			var c []int
			for _, a := range atoms {
				c = append(c, centreOf(sp.pi, a))
			}
			centres = append(centres, c)
		}
		f.centre = append(f.centre, centres)
	}
	for k, atoms := range sites {
		f.features[k] = averagedFeatures(event, list, atoms)
	}
	return f
}

// averagedFeatures are the plain terms of a candidate, averaged over its atoms and over
// the tautomers, in the order of terms.
func averagedFeatures(event terms.Event, list []*species, atoms []int) []feature {
	if len(list) == 1 && !list[0].protonated {
		// Equivalent atoms of one form have equal surroundings.
		return list[0].v.siteFeatures(event, atoms[0], nil)
	}
	n := plainTerms(event)
	sum := make([]float64, n)
	share := 1 / float64(len(list)*len(atoms))
	for _, sp := range list {
		for _, a := range atoms {
			for _, x := range sp.v.siteFeatures(event, a, nil) {
				sum[x.term] += x.value * share
			}
		}
	}
	var out []feature
	for t, x := range sum {
		if x != 0 {
			out = append(out, feature{int32(t), x})
		}
	}
	return out
}

// linearize computes indices and derivatives of a form at a set.
func (f *formData) linearize(event terms.Event, count int, set *frontier.Set, columns *parameterColumns, w *Workspace) error {
	for t, pi := range f.pi {
		sol, err := set.Solve(pi)
		if err != nil {
			return err
		}
		space := func(k int) (*Workspace, error) { return w, w.Reset(sol.Systems[k]) }
		if err := f.fill(event, count, t, sol, columns, space, nil); err != nil {
			return err
		}
	}
	f.compact(count, columns)
	return nil
}

// fill adds the share of tautomer t, solved, to indices and derivatives; columns may be
// nil where no derivatives are wanted, known where they are at hand.
func (f *formData) fill(event terms.Event, count, t int, sol *frontier.Solution, columns *parameterColumns, space func(system int) (*Workspace, error), known *sensitivity) error {
	n := len(f.centre[0])
	if t == 0 {
		f.z = make([]float64, n*count)
		f.full = nil
		if columns != nil {
			f.full = make([]float64, n*count*columns.n)
		}
	}
	system, local := places(sol)
	derived := columns
	if known != nil {
		derived = nil
	}
	r := newResponder(sol, event.Toward(), count, derived, space)
	for c, centres := range f.centre[t] {
		share := 1 / float64(len(f.pi)*len(centres))
		if len(f.pi) == 1 && f.site < 0 { // equivalent atoms; a proton may make them differ
			centres, share = centres[:1], 1
		}
		for _, centre := range centres {
			var by []float64
			if columns != nil {
				by = f.full[c*count*columns.n : (c+1)*count*columns.n]
			}
			if err := r.at(centre, system[centre], local[centre], share*indexScale, f.z[c*count:(c+1)*count], by); err != nil {
				return err
			}
			if known != nil && columns != nil {
				d, err := known.of(centre)
				if err != nil {
					return err
				}
				d.addTo(event.Toward(), count, share*indexScale, by)
			}
		}
	}
	return nil
}

// compact keeps the columns of the derivatives that are not all zero.
func (f *formData) compact(count int, columns *parameterColumns) {
	f.active, f.by = f.active[:0], f.by[:0]
	if columns == nil {
		return
	}
	n := len(f.centre[0])
	for col := range columns.n {
		for k := range n * count {
			if math.Abs(f.full[k*columns.n+col]) > 1e-12 {
				f.active = append(f.active, int32(col))
				break
			}
		}
	}
	a := len(f.active)
	f.by = make([]float64, n*count*a)
	for k := range n * count {
		for i, col := range f.active {
			f.by[k*a+i] = f.full[k*columns.n+int(col)]
		}
	}
	f.full = nil
}

// places gives the system and local index of every centre.
func places(sol *frontier.Solution) (system, local []int) {
	n := len(sol.Pi.Centres)
	both := make([]int, 2*n)
	system, local = both[:n], both[n:]
	for k, list := range sol.Pi.Systems {
		for i, c := range list {
			system[c], local[c] = k, i
		}
	}
	return system, local
}

// chances of one form: softmax over the candidates of u = ln g + w·z + v·x at θ₀ + delta.
func (f *siteFit) formChances(form *formData, logG []float64, features [][]feature, delta, w []float64, u, index []float64) {
	n := len(logG)
	a := len(form.active)
	top := math.Inf(-1)
	for c := range n {
		s := logG[c]
		for k := range f.count {
			z := form.z[c*f.count+k]
			by := form.by[(c*f.count+k)*a : (c*f.count+k+1)*a]
			for i, col := range form.active {
				z += by[i] * delta[col]
			}
			index[c*f.count+k] = z
			s += w[k] * z
		}
		for _, x := range features[c] {
			s += w[f.count+int(x.term)] * x.value
		}
		u[c] = s
		top = math.Max(top, s)
	}
	sum := 0.0
	for c := range n {
		u[c] = math.Exp(u[c] - top)
		sum += u[c]
	}
	for c := range n {
		u[c] /= sum
	}
}

// scratch of one goroutine.
type fitScratch struct {
	p     [2][]float64
	index [2][]float64
}

func (s *fitScratch) size(n, count int) {
	for k := range s.p {
		s.p[k] = grow(s.p[k], n)
		s.index[k] = grow(s.index[k], n*count)
	}
}

func logistic(x float64) float64 { return 1 / (1 + math.Exp(-x)) }

// mixture is the share of the protonated form.
func (f *siteFit) mixture(r *siteRow, w []float64) float64 {
	if len(r.sub.forms) < 2 {
		return 0
	}
	at := f.at("medium")
	x := 0.0
	for k, v := range r.medium {
		x += v * w[at+k]
	}
	return logistic(x)
}

// parts puts the chances of the candidates of an outcome, form by form, into s. m is the
// share of the protonated form, lapse that of a blind choice among the total positions.
func (f *siteFit) parts(r *siteRow, delta, w []float64, s *fitScratch) (m, lapse, total float64) {
	s.size(len(r.sub.sites), f.count)
	for k, form := range r.sub.forms {
		f.formChances(form, r.sub.logG, r.features[k], delta, w, s.p[k], s.index[k])
	}
	for _, g := range r.sub.logG {
		total += math.Exp(g)
	}
	return f.mixture(r, w), logistic(w[f.weights-1]), total
}

// chances of all candidates of an outcome.
func (f *siteFit) chances(r *siteRow, delta, w []float64, s *fitScratch) []float64 {
	n := len(r.sub.sites)
	m, lapse, total := f.parts(r, delta, w, s)
	out := make([]float64, n)
	for c := range n {
		p := s.p[0][c]
		if len(r.sub.forms) > 1 {
			p = (1-m)*p + m*s.p[1][c]
		}
		out[c] = (1-lapse)*p + lapse*math.Exp(r.sub.logG[c])/total
	}
	return out
}

// loss adds the loss of one outcome, −weight·ln p, and its derivatives by parameters
// and weights.
func (f *siteFit) loss(r *siteRow, weight float64, delta, w, gTheta, gW []float64, s *fitScratch) float64 {
	n := len(r.sub.sites)
	m, lapse, total := f.parts(r, delta, w, s)
	blind := math.Exp(r.sub.logG[r.truth]) / total
	p0 := s.p[0][r.truth]
	mixed := p0
	if len(r.sub.forms) > 1 {
		mixed = (1-m)*p0 + m*s.p[1][r.truth]
	}
	p := (1-lapse)*mixed + lapse*blind
	d := -weight / p // dL/dp
	gW[f.weights-1] += d * (blind - mixed) * lapse * (1 - lapse)
	if len(r.sub.forms) > 1 {
		g := d * (1 - lapse) * (s.p[1][r.truth] - p0) * m * (1 - m)
		at := f.at("medium")
		for k, v := range r.medium {
			gW[at+k] += g * v
		}
	}
	for k, form := range r.sub.forms {
		share := 1 - m
		if k == 1 {
			share = m
		}
		scale := d * (1 - lapse) * share * s.p[k][r.truth]
		a := len(form.active)
		for c := range n {
			g := -scale * s.p[k][c]
			if c == r.truth {
				g += scale
			}
			if g == 0 {
				continue
			}
			for i := range f.count {
				gW[i] += g * s.index[k][c*f.count+i]
				by := form.by[(c*f.count+i)*a : (c*f.count+i+1)*a]
				gi := g * w[i]
				for j, col := range form.active {
					gTheta[col] += gi * by[j]
				}
			}
			for _, x := range r.features[k][c] {
				gW[f.count+int(x.term)] += g * x.value
			}
		}
	}
	return -weight * math.Log(p)
}
