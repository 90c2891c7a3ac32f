package reactivity

import (
	"errors"

	"gonum.org/v1/gonum/mat"

	"lobecast/frontier/terms"
)

var errNotPositive = errors.New("the covariance of the fit is not positive definite")

// coverage tells how often a drawn chance lay inside the 90 % limits of the refit.
type coverage struct {
	event  terms.Event
	inside float64
	cases  int
}

// simulations is the number of times outcomes are simulated and refitted.
const simulations = 3

// simulate draws parameters and weights from the posterior, draws outcomes for the same
// substrates from the chances they give, refits, and counts how often the drawn chance
// of the site that the refit puts first lies inside the refit's 90 % limits.
func (r *Refitting) simulate() error {
	d := r.data
	var root mat.Cholesky
	if !root.Factorize(r.covariance) {
		return errNotPositive
	}
	var lower mat.TriDense
	root.LTo(&lower)
	random := newRandom(1)
	inside := make([]float64, len(fittedEvents))
	cases := make([]int, len(fittedEvents))
	truths := d.truths()
	defer d.setTruths(truths)
	n := d.dimension()
	delta := make([]float64, d.prior.columns.n+1)
	for range simulations {
		e := mat.NewVecDense(n, nil)
		for i := range n {
			e.SetVec(i, random.NormFloat64())
		}
		var step mat.VecDense
		step.MulVec(&lower, e)
		x := d.flatten(r.point, nil)
		for i := range x {
			x[i] += step.AtVec(i)
		}
		drawn := d.unflatten(x)
		last := len(d.sites)
		drawn.weights[last][1] = max(drawn.weights[last][1], 0)
		if err := d.linearize(drawn); err != nil {
			return err
		}
		// The drawn chances, and outcomes drawn from them.
		var s fitScratch
		chances := make([][][]float64, last+1)
		drawnTruth := make([][]int, last+1)
		for k, f := range d.sites {
			for i := range f.rows {
				p := f.chances(&f.rows[i], delta, drawn.weights[k], &s)
				chances[k] = append(chances[k], p)
				u, c := random.Float64(), 0
				for c < len(p)-1 && u > p[c] {
					u -= p[c]
					c++
				}
				drawnTruth[k] = append(drawnTruth[k], c)
			}
		}
		for i := range d.pairs.rows {
			p := d.pairs.chance(&d.pairs.rows[i], delta, drawn.weights[last])
			chances[last] = append(chances[last], []float64{p, 1 - p})
			c := 0
			if random.Float64() > p {
				c = 1
			}
			drawnTruth[last] = append(drawnTruth[last], c)
		}
		d.setTruths(drawnTruth)
		m := d.everything()
		q, _, err := d.maximize(r.point.clone(), m, nil)
		if err != nil {
			return err
		}
		if err := d.linearize(q); err != nil {
			return err
		}
		u, err := d.newUncertainty(q, m)
		if err != nil {
			return err
		}
		for k, f := range d.sites {
			for i := range f.rows {
				row := &f.rows[i]
				p := prediction{chances: f.chances(row, delta, q.weights[k], &s)}
				c := p.best()
				l := d.siteLimits(u, q, k, row, c, p.chances[c], &s)
				cases[k]++
				if t := chances[k][i][c]; t >= l[0] && t <= l[1] {
					inside[k]++
				}
			}
		}
		for i := range d.pairs.rows {
			row := &d.pairs.rows[i]
			p := d.pairs.chance(row, delta, q.weights[last])
			l := d.pairLimits(u, q, row, p)
			cases[last]++
			t := chances[last][i][0]
			if row.exchanged { // rows were turned round to what was drawn
				t = chances[last][i][1]
			}
			if t >= l[0] && t <= l[1] {
				inside[last]++
			}
		}
		d.setTruths(truths)
	}
	r.coverage = nil
	for k, e := range fittedEvents {
		r.coverage = append(r.coverage, coverage{e, inside[k] / float64(cases[k]), cases[k]})
	}
	return nil
}

// truths are the recorded outcomes: by event and row, the candidate.
func (d *fitData) truths() [][]int {
	var out [][]int
	for _, f := range d.sites {
		var t []int
		for i := range f.rows {
			t = append(t, f.rows[i].truth)
		}
		out = append(out, t)
	}
	return append(out, make([]int, len(d.pairs.rows)))
}

// setTruths puts outcomes in place of the recorded ones. In a pair the orientation asked
// about is turned to the one that occurred.
func (d *fitData) setTruths(truths [][]int) {
	for k, f := range d.sites {
		for i := range f.rows {
			f.rows[i].truth = truths[k][i]
		}
	}
	last := len(d.sites)
	for i := range d.pairs.rows {
		r := &d.pairs.rows[i]
		if r.exchanged != (truths[last][i] == 1) {
			r.exchange()
		}
	}
}

// exchange makes the other orientation the one that is asked about: the partner's ends
// change places.
func (r *pairRow) exchange() {
	r.exchanged = !r.exchanged
	r.ends[2], r.ends[3] = r.ends[3], r.ends[2]
	r.facts[2], r.facts[3] = r.facts[3], r.facts[2]
	r.x = channelTerms(&r.facts)
	r.z = [4]float64{r.z[2], r.z[3], r.z[0], r.z[1]}
	r.by = [4][]float64{r.by[2], r.by[3], r.by[0], r.by[1]}
}
