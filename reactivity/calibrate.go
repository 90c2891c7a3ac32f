package reactivity

import (
	"errors"
	"fmt"
	"math"
	"runtime"
	"sync"

	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/optimize"

	"lobecast/frontier"
	"lobecast/frontier/terms"
)

// fitData is everything a fit rests on: the outcomes of all events, prepared once, and
// the prior on the parameters of the set.
type fitData struct {
	base    *frontier.Set
	prior   *parameterPrior
	sites   []*siteFit // electrophilic, nucleophilic substitution
	pairs   *pairFit
	workers int
	// held keeps the parameters of the set at their published values: the fit of the
	// weights alone, for comparison.
	held bool
}

// fitPoint is a point of the joint fit: the free parameters of the set, then the
// weights of each event.
type fitPoint struct {
	theta   []float64
	weights [][]float64 // by event, the pairs last
}

func (p *fitPoint) clone() *fitPoint {
	q := &fitPoint{theta: append([]float64(nil), p.theta...)}
	for _, w := range p.weights {
		q.weights = append(q.weights, append([]float64(nil), w...))
	}
	return q
}

// newFitData reads the outcomes of a folder and frees the parameters that matter to
// enough of them.
func newFitData(folder string, base *frontier.Set) (*fitData, error) {
	d := &fitData{base: base, workers: runtime.GOMAXPROCS(0)}
	e, err := readElectrophilic(folder)
	if err != nil {
		return nil, err
	}
	n, err := readNucleophilic(folder)
	if err != nil {
		return nil, err
	}
	p, err := readPairs(folder)
	if err != nil {
		return nil, err
	}
	return d, d.prepare(e, n, p)
}

func (d *fitData) prepare(e, n []siteOutcome, p []pairOutcome) error {
	for _, x := range []struct {
		event    terms.Event
		outcomes []siteOutcome
	}{{terms.ElectrophilicSubstitution, e}, {terms.NucleophilicSubstitution, n}} {
		f, err := newSiteFit(x.event, x.outcomes)
		if err != nil {
			return fmt.Errorf("%s: %w", x.event, err)
		}
		d.sites = append(d.sites, f)
	}
	var err error
	if d.pairs, err = newPairFit(p); err != nil {
		return fmt.Errorf("Diels–Alder orientation: %w", err)
	}
	d.prior = newParameterPrior(d.base, d.usedParameters())
	return nil
}

// leastUse is the number of substrates in which a parameter must occur to be fitted.
const leastUse = 8

// usedParameters lists the parameters that occur in the π systems of at least leastUse
// substrates. h of carbon and k of the aromatic C–C bond are the zero and the unit of
// the scale and stay.
func (d *fitData) usedParameters() []frontier.Parameter {
	use := make([]int, len(d.base.Values))
	count := func(pi *frontier.Pi) {
		seen := map[frontier.Parameter]bool{}
		for k := range pi.Systems {
			m, err := d.base.Matrix(pi, k)
			if err != nil {
				continue
			}
			for _, list := range append(append([][]frontier.Term(nil), m.Diagonal...), m.LinkTerms...) {
				for _, t := range list {
					seen[t.Parameter] = true
				}
			}
		}
		for p := range seen {
			use[p]++
		}
	}
	for _, f := range d.sites {
		for _, s := range f.subs {
			count(s.forms[0].pi[0])
			if len(s.forms) > 1 {
				// what occurs only in the protonated form counts half as much
				count(s.forms[1].pi[0])
			}
		}
	}
	done := map[*frontier.Pi]bool{}
	for i := range d.pairs.rows {
		for _, pi := range []*frontier.Pi{d.pairs.rows[i].piA, d.pairs.rows[i].piB} {
			if !done[pi] {
				done[pi] = true
				count(pi)
			}
		}
	}
	unit := map[string]bool{"h C": true, "k C C": true}
	var free []frontier.Parameter
	for i, n := range use {
		if p := frontier.Parameter(i); n >= leastUse && !unit[p.String()] {
			free = append(free, p)
		}
	}
	// A parent that occurs nowhere itself is freed with its children, so that what they
	// have in common is shared.
	children := map[frontier.Parameter]int{}
	isFree := map[frontier.Parameter]bool{}
	for _, p := range free {
		isFree[p] = true
		if q := p.Parent(); q != p {
			children[q]++
		}
	}
	out := free[:0:0]
	for i := range use {
		p := frontier.Parameter(i)
		if isFree[p] || children[p] >= 2 && !unit[p.String()] {
			out = append(out, p)
		}
	}
	return out
}

// start is the point at the published set, all weights at their prior means but those
// of the energies.
func (d *fitData) start() *fitPoint {
	p := &fitPoint{theta: append([]float64(nil), d.prior.published...)}
	for _, f := range d.sites {
		w := append([]float64(nil), f.mean...)
		w[0] = -1
		p.weights = append(p.weights, w)
	}
	w := append([]float64(nil), d.pairs.mean...)
	w[0] = -0.7
	p.weights = append(p.weights, w)
	return p
}

// each runs work(i) for i below n on the workers.
func (d *fitData) each(n int, work func(i int, w *Workspace) error) error {
	var wg sync.WaitGroup
	errs := make([]error, n)
	next := make(chan int)
	for range d.workers {
		wg.Add(1)
		go func() {
			defer wg.Done()
			var w Workspace
			for i := range next {
				errs[i] = work(i, &w)
			}
		}()
	}
	for i := range n {
		next <- i
	}
	close(next)
	wg.Wait()
	return errors.Join(errs...)
}

// linearize computes indices and their derivatives for all outcomes at a point.
func (d *fitData) linearize(p *fitPoint) error {
	set := d.prior.setWith(d.base, p.theta)
	var all []func(*Workspace) error
	for _, f := range d.sites {
		for _, s := range f.subs {
			for _, form := range s.forms {
				all = append(all, func(w *Workspace) error {
					return form.linearize(f.event, f.count, set, &d.prior.columns, w)
				})
			}
		}
	}
	tau := p.weights[len(d.sites)][1]
	for i := range d.pairs.rows {
		all = append(all, func(*Workspace) error {
			return d.pairs.rows[i].linearize(set.Solve, tau, &d.prior.columns)
		})
	}
	return d.each(len(all), func(i int, w *Workspace) error { return all[i](w) })
}

// mask gives the weight of each outcome in a fit: by event and row.
type mask [][]float64

// everything is the mask that leaves nothing out.
func (d *fitData) everything() mask {
	return d.maskOf(func(int) bool { return true }, func(r *siteRow) int { return 0 }, func(r *pairRow) int { return 0 })
}

// maskOf keeps the outcomes whose part passes keep.
func (d *fitData) maskOf(keep func(part int) bool, site func(*siteRow) int, pair func(*pairRow) int) mask {
	var m mask
	for _, f := range d.sites {
		w := make([]float64, len(f.rows))
		for i := range f.rows {
			if keep(site(&f.rows[i])) {
				w[i] = f.rows[i].weight
			}
		}
		m = append(m, w)
	}
	w := make([]float64, len(d.pairs.rows))
	for i := range d.pairs.rows {
		if keep(pair(&d.pairs.rows[i])) {
			w[i] = d.pairs.rows[i].weight
		}
	}
	return append(m, w)
}

// chunks is the number of parts the outcomes are dealt to for summation; fixed, so that
// sums do not depend on the number of cores.
const chunks = 8

// dimension is the length of the joint vector.
func (d *fitData) dimension() int {
	n := d.prior.columns.n + d.pairs.weights
	for _, f := range d.sites {
		n += f.weights
	}
	return n
}

func (d *fitData) flatten(p *fitPoint, x []float64) []float64 {
	x = append(x[:0], p.theta...)
	for _, w := range p.weights {
		x = append(x, w...)
	}
	return x
}

func (d *fitData) unflatten(x []float64) *fitPoint {
	n := d.prior.columns.n
	p := &fitPoint{theta: x[:n:n]}
	x = x[n:]
	for _, f := range d.sites {
		p.weights = append(p.weights, x[:f.weights:f.weights])
		x = x[f.weights:]
	}
	p.weights = append(p.weights, x)
	return p
}

// objective is the negative logarithm of the posterior at x, up to a constant, with
// the indices linearized about origin, and its gradient.
func (d *fitData) objective(x []float64, origin *fitPoint, m mask, gradient []float64) float64 {
	p := d.unflatten(x)
	n := d.prior.columns.n
	delta := make([]float64, n+1)
	for i := range n {
		delta[i] = p.theta[i] - origin.theta[i]
	}
	last := len(d.sites)
	delta[n] = p.weights[last][1] - origin.weights[last][1]

	type part struct {
		loss float64
		g    []float64
		tau  []float64
	}
	parts := make([]part, chunks)
	var wg sync.WaitGroup
	gate := make(chan struct{}, d.workers)
	for c := range parts {
		wg.Add(1)
		gate <- struct{}{}
		go func() {
			defer func() { <-gate; wg.Done() }()
			t := &parts[c]
			t.g = make([]float64, len(x))
			g := d.unflatten(t.g)
			var s fitScratch
			for k, f := range d.sites {
				for i := c; i < len(f.rows); i += chunks {
					if m[k][i] > 0 {
						t.loss += f.loss(&f.rows[i], m[k][i], delta, p.weights[k], g.theta, g.weights[k], &s)
					}
				}
			}
			t.tau = make([]float64, n+1)
			for i := c; i < len(d.pairs.rows); i += chunks {
				if m[last][i] > 0 {
					t.loss += d.pairs.loss(&d.pairs.rows[i], m[last][i], delta, p.weights[last], t.tau, g.weights[last])
				}
			}
			for i := range n {
				g.theta[i] += t.tau[i]
			}
		}()
	}
	wg.Wait()
	loss := 0.0
	clear(gradient)
	for c := range parts {
		loss += parts[c].loss
		for i, v := range parts[c].g {
			gradient[i] += v
		}
	}
	g := d.unflatten(gradient)
	loss += d.prior.add(p.theta, g.theta)
	for k := range p.weights {
		mean, prior := d.weightPrior(k)
		for i, w := range p.weights[k] {
			z := (w - mean[i]) / prior[i]
			loss += z * z / 2
			g.weights[k][i] += z / prior[i]
		}
	}
	return loss
}

func (d *fitData) weightPrior(k int) (mean, prior []float64) {
	if k < len(d.sites) {
		return d.sites[k].mean, d.sites[k].prior
	}
	return d.pairs.mean, d.pairs.prior
}

// scales are the lengths by which the coordinates of the joint vector are measured in
// the search: the widths of the priors.
func (d *fitData) scales() []float64 {
	s := append([]float64(nil), d.prior.spread...)
	for k := range len(d.sites) + 1 {
		_, prior := d.weightPrior(k)
		for _, p := range prior {
			s = append(s, math.Min(p, 1))
		}
	}
	return s
}

// Settings of the search for the maximum of the posterior.
const (
	mostRounds   = 12   // linearizations
	roundEnough  = 0.03 // gain in the objective below which the search ends
	stepsInRound = 250
)

// maximize finds the most probable point, beginning at p: the indices are linearized,
// the posterior is maximized in that model by a limited-memory quasi-Newton search with
// a penalty on how far the parameters move, and the step is kept if the posterior has
// really risen (K. Levenberg, Q. Appl. Math. 1944, 2, 164, for the penalty).
func (d *fitData) maximize(p *fitPoint, m mask, progress func(round int, objective float64)) (*fitPoint, float64, error) {
	scale := d.scales()
	n := d.prior.columns.n
	last := len(d.sites)
	tauAt := len(d.flatten(p, nil)) - d.pairs.weights + 1
	if err := d.linearize(p); err != nil {
		return nil, 0, err
	}
	gradient := make([]float64, d.dimension())
	best := d.objective(d.flatten(p, nil), p, m, gradient)
	damping := 1.0
	for round := range mostRounds {
		origin := p.clone()
		x0 := d.flatten(p, nil)
		moved := func(i int) bool { return i < n || i == tauAt }
		x := make([]float64, len(x0))
		g := make([]float64, len(x0))
		lastY := []float64(nil)
		value := 0.0
		evaluate := func(y []float64) {
			if lastY != nil && equalFloats(lastY, y) {
				return
			}
			for i := range x {
				x[i] = x0[i] + scale[i]*y[i]
			}
			value = d.objective(x, origin, m, g)
			for i := range g {
				g[i] *= scale[i]
				if d.held && i < n {
					g[i] = 0
				}
				if moved(i) {
					value += damping * y[i] * y[i] / 2
					g[i] += damping * y[i]
				}
			}
			lastY = append(lastY[:0], y...)
		}
		problem := optimize.Problem{
			Func: func(y []float64) float64 { evaluate(y); return value },
			Grad: func(dst, y []float64) { evaluate(y); copy(dst, g) },
		}
		settings := &optimize.Settings{
			MajorIterations: stepsInRound, GradientThreshold: 1e-5,
			Converger: &optimize.FunctionConverge{Absolute: 1e-5, Iterations: 20},
		}
		res, err := optimize.Minimize(problem, make([]float64, len(x0)), settings, &optimize.LBFGS{Store: 20})
		if res == nil {
			return nil, 0, err
		}
		// A failed line search still hands back the best point found; whether it is one
		// is judged below.
		y := make([]float64, len(x0))
		for i := range y {
			y[i] = x0[i] + scale[i]*res.X[i]
		}
		q := d.unflatten(y)
		q.weights[last][1] = math.Max(q.weights[last][1], 0)
		if err := d.linearize(q); err != nil {
			return nil, 0, err
		}
		now := d.objective(y, q, m, gradient)
		if progress != nil {
			progress(round, now)
		}
		if now < best {
			gain := best - now
			p, best = q.clone(), now
			damping /= 5
			if gain < roundEnough {
				return p, best, nil
			}
			continue
		}
		damping = math.Max(damping*8, 0.3)
		if damping > 1e6 {
			break
		}
		if err := d.linearize(p); err != nil {
			return nil, 0, err
		}
	}
	return p, best, d.linearize(p)
}

func equalFloats(a, b []float64) bool {
	for i := range a {
		if a[i] != b[i] {
			return false
		}
	}
	return true
}

// information is the expected information matrix of the posterior at p, about which
// the data are linearized: Σ_outcomes Σ_candidates ∂P ∂Pᵀ/P plus the precision of the
// priors.
func (d *fitData) information(p *fitPoint, m mask) *mat.SymDense {
	n := d.dimension()
	h := mat.NewSymDense(n, nil)
	for i, row := range d.prior.precision {
		for j := i; j < len(row); j++ {
			h.SetSym(i, j, row[j])
		}
	}
	offset := make([]int, len(p.weights))
	at := len(p.theta)
	for k, w := range p.weights {
		offset[k] = at
		_, prior := d.weightPrior(k)
		for i := range w {
			h.SetSym(at+i, at+i, 1/(prior[i]*prior[i]))
		}
		at += len(w)
	}
	raw := h.RawSymmetric()
	add := func(weight, chance float64, g []float64) {
		var index []int
		for i, v := range g {
			if v != 0 {
				index = append(index, i)
			}
		}
		for a, i := range index {
			gi := g[i] * weight / chance
			for _, j := range index[a:] {
				raw.Data[i*raw.Stride+j] += gi * g[j]
			}
		}
	}
	delta := make([]float64, d.prior.columns.n+1)
	g := make([]float64, n)
	u := d.unflatten(g)
	var s fitScratch
	for k, f := range d.sites {
		for i := range f.rows {
			r := f.rows[i]
			if m[k][i] == 0 {
				continue
			}
			chances := f.chances(&r, delta, p.weights[k], &s)
			for c, pc := range chances {
				r.truth = c
				clear(g)
				// The derivative of P is −P times that of −ln P.
				f.loss(&r, 1, delta, p.weights[k], u.theta, u.weights[k], &s)
				for j := range g {
					g[j] *= -pc
				}
				add(m[k][i], pc, g)
			}
		}
	}
	last := len(d.sites)
	tau := make([]float64, d.prior.columns.n+1)
	for i := range d.pairs.rows {
		r := &d.pairs.rows[i]
		if m[last][i] == 0 {
			continue
		}
		pc := d.pairs.chance(r, delta, p.weights[last])
		clear(g)
		clear(tau)
		d.pairs.loss(r, 1, delta, p.weights[last], tau, u.weights[last])
		for j := range d.prior.columns.n {
			u.theta[j] += tau[j]
		}
		for j := range g {
			g[j] *= -pc
		}
		add(m[last][i], pc, g)
		add(m[last][i], 1-pc, g) // the other orientation has the opposite derivative
	}
	return h
}
