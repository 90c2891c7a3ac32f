package reactivity

import (
	"errors"
	"fmt"
	"io"
	"math"
	"sort"

	"gonum.org/v1/gonum/mat"
)

// prediction is what a fit says of one outcome it has not seen.
type prediction struct {
	chances []float64 // by candidate
	truth   int
	weight  float64 // 1 over the number of outcomes of its substrate
	key     int     // substrate, for resampling
	same    bool
	low     float64 // lower 90 % limit of the first chance
}

// place is the rank of the true candidate: 0 for first. Ties go to the lower candidate.
func (p *prediction) place() int {
	n := 0
	for c, x := range p.chances {
		d := x - p.chances[p.truth]
		if d > rankTolerance || c < p.truth && d >= -rankTolerance {
			n++
		}
	}
	return n
}

// first is the highest chance.
func (p *prediction) first() float64 {
	best := 0.0
	for _, x := range p.chances {
		best = math.Max(best, x)
	}
	return best
}

// best is the candidate of the highest chance, the first of equals.
func (p *prediction) best() int {
	best := 0
	for c, x := range p.chances {
		if x > p.chances[best]+rankTolerance {
			best = c
		}
	}
	return best
}

// score are the figures of a set of predictions, each substrate weighing 1.
type score struct {
	n                int // outcomes
	substrates       float64
	top1, top2       float64 // fractions
	logLoss          float64 // mean of −ln p
	calibration      float64 // expected calibration error, 10 bins of equal count
	blind            float64 // chance level
	errTop1, errLoss float64 // standard errors over substrates
	clear, clearHit  float64 // share of calls marked clear, and how often they are right
	bins             []bin
}

// bin is one part of the reliability diagram: first chances against how often the first
// site was the recorded one.
type bin struct {
	said, seen, weight float64
	low, high          float64 // 95 % of bootstrap samples by substrate of seen
}

const reliabilityBins = 10

// scoreOf computes the figures of predictions.
func scoreOf(list []prediction) score {
	s := score{n: len(list)}
	var sum1, sum2, sumL, sumB float64
	for i := range list {
		p := &list[i]
		s.substrates += p.weight
		at := p.place()
		if at == 0 {
			sum1 += p.weight
		}
		if at <= 1 {
			sum2 += p.weight
		}
		sumL -= p.weight * math.Log(p.chances[p.truth])
		sumB += p.weight / float64(len(p.chances))
		if p.first() >= 0.8 && p.low > 0.5 {
			s.clear += p.weight
			if at == 0 {
				s.clearHit += p.weight
			}
		}
	}
	w := s.substrates
	s.top1, s.top2, s.logLoss, s.blind = sum1/w, sum2/w, sumL/w, sumB/w
	if s.clear > 0 {
		s.clearHit /= s.clear
	}
	s.clear /= w
	var v1, vL float64
	perKey := map[int][3]float64{}
	var keys []int
	for i := range list {
		p := &list[i]
		t, ok := perKey[p.key]
		if !ok {
			keys = append(keys, p.key)
		}
		hit := boolFloat(p.place() == 0)
		t[0] += p.weight * (hit - s.top1)
		t[1] += p.weight * (-math.Log(p.chances[p.truth]) - s.logLoss)
		perKey[p.key] = t
	}
	for _, k := range keys {
		v1 += perKey[k][0] * perKey[k][0]
		vL += perKey[k][1] * perKey[k][1]
	}
	s.errTop1, s.errLoss = math.Sqrt(v1)/w, math.Sqrt(vL)/w
	s.bins = reliability(list)
	for _, b := range s.bins {
		s.calibration += b.weight * math.Abs(b.said-b.seen)
	}
	s.calibration /= w
	return s
}

// reliability sorts predictions by their first chance and deals them to bins of equal
// weight.
func reliability(list []prediction) []bin {
	order := make([]int, len(list))
	total := 0.0
	for i := range order {
		order[i] = i
		total += list[i].weight
	}
	sort.SliceStable(order, func(a, b int) bool { return list[order[a]].first() < list[order[b]].first() })
	bins := make([]bin, reliabilityBins)
	members := make([][]int, reliabilityBins)
	run := 0.0
	for _, i := range order {
		p := &list[i]
		b := min(int((run+p.weight/2)/total*reliabilityBins), reliabilityBins-1)
		run += p.weight
		bins[b].weight += p.weight
		bins[b].said += p.weight * p.first()
		bins[b].seen += p.weight * boolFloat(p.place() == 0)
		members[b] = append(members[b], i)
	}
	for b := range bins {
		if bins[b].weight == 0 {
			continue
		}
		bins[b].said /= bins[b].weight
		bins[b].seen /= bins[b].weight
		bins[b].low, bins[b].high = bootstrap(list, members[b])
	}
	return bins
}

// bootstrapSamples is the number of resamplings by substrate.
const bootstrapSamples = 2000

// bootstrap is the 95 % interval of how often the first site was the recorded one, over
// resamplings of the substrates (B. Efron, Ann. Stat. 1979, 7, 1).
func bootstrap(list []prediction, members []int) (low, high float64) {
	type one struct{ hit, weight float64 }
	var units []one
	at := map[int]int{}
	for _, i := range members {
		p := &list[i]
		k, ok := at[p.key]
		if !ok {
			k = len(units)
			at[p.key] = k
			units = append(units, one{})
		}
		units[k].weight += p.weight
		units[k].hit += p.weight * boolFloat(p.place() == 0)
	}
	random := newRandom(uint64(len(members)))
	values := make([]float64, bootstrapSamples)
	for s := range values {
		var hit, weight float64
		for range units {
			u := units[random.IntN(len(units))]
			hit += u.hit
			weight += u.weight
		}
		values[s] = hit / weight
	}
	sort.Float64s(values)
	if values[0] == values[len(values)-1] {
		// Without a miss (or a hit) resampling knows no spread: Wilson's interval stands.
		n := 0.0
		for _, u := range units {
			n += u.weight
		}
		return wilsonLimits(values[0], n)
	}
	return values[int(0.025*bootstrapSamples)], values[int(0.975*bootstrapSamples)-1]
}

// uncertainty is the posterior covariance of a fit, to give its predictions limits.
type uncertainty struct {
	covariance *mat.SymDense
	g          []float64
}

func (d *fitData) newUncertainty(p *fitPoint, m mask) (*uncertainty, error) {
	var chol mat.Cholesky
	if !chol.Factorize(d.information(p, m)) {
		return nil, errors.New("the information matrix of the fit is not positive definite")
	}
	u := &uncertainty{covariance: new(mat.SymDense), g: make([]float64, d.dimension())}
	return u, chol.InverseTo(u.covariance)
}

// along is the standard deviation in the direction of u.g.
func (u *uncertainty) along() float64 {
	var index []int
	for i, x := range u.g {
		if x != 0 {
			index = append(index, i)
		}
	}
	sum := 0.0
	for _, i := range index {
		s := 0.0
		for _, j := range index {
			s += u.covariance.At(i, j) * u.g[j]
		}
		sum += u.g[i] * s
	}
	return math.Sqrt(math.Max(sum, 0))
}

// siteLimits are the 90 % limits of the chance of candidate c of an outcome.
func (d *fitData) siteLimits(u *uncertainty, p *fitPoint, k int, r *siteRow, c int, chance float64, s *fitScratch) [2]float64 {
	clear(u.g)
	g := d.unflatten(u.g)
	row := *r
	row.truth = c
	delta := make([]float64, d.prior.columns.n+1)
	d.sites[k].loss(&row, 1, delta, p.weights[k], g.theta, g.weights[k], s)
	return logitLimits(chance, u.along()/(1-chance))
}

// pairLimits are those of the observed orientation.
func (d *fitData) pairLimits(u *uncertainty, p *fitPoint, r *pairRow, chance float64) [2]float64 {
	clear(u.g)
	g := d.unflatten(u.g)
	n := d.prior.columns.n
	delta := make([]float64, n+1)
	tau := make([]float64, n+1)
	last := len(d.sites)
	d.pairs.loss(r, 1, delta, p.weights[last], tau, g.weights[last])
	copy(g.theta, tau[:n])
	return logitLimits(chance, u.along()/(1-chance))
}

// predict gives what the point says of the outcomes that pass want, in the order of rows.
// The data must be linearized at the point.
func (d *fitData) predict(p *fitPoint, u *uncertainty, wantSite func(*siteRow) bool, wantPair func(*pairRow) bool) [][]prediction {
	delta := make([]float64, d.prior.columns.n+1)
	var out [][]prediction
	var s fitScratch
	for k, f := range d.sites {
		var list []prediction
		key := map[*substrateData]int{}
		for i := range f.rows {
			r := &f.rows[i]
			if _, ok := key[r.sub]; !ok {
				key[r.sub] = len(key)
			}
			if wantSite(r) {
				x := prediction{chances: f.chances(r, delta, p.weights[k], &s), truth: r.truth, weight: r.weight, key: key[r.sub], same: r.same, low: 1}
				if c := x.best(); u != nil {
					x.low = d.siteLimits(u, p, k, r, c, x.chances[c], &s)[0]
				}
				list = append(list, x)
			} else {
				list = append(list, prediction{})
			}
		}
		out = append(out, list)
	}
	var list []prediction
	last := len(d.sites)
	for i := range d.pairs.rows {
		r := &d.pairs.rows[i]
		if !wantPair(r) {
			list = append(list, prediction{})
			continue
		}
		c := d.pairs.chance(r, delta, p.weights[last])
		x := prediction{chances: []float64{c, 1 - c}, weight: r.weight, key: i, low: 1}
		if u != nil {
			l := d.pairLimits(u, p, r, c)
			x.low = l[0]
			if c < 0.5 {
				x.low = 1 - l[1]
			}
		}
		list = append(list, x)
	}
	return append(out, list)
}

// crossValidate fits the data folds times, each time without one part, and gives what
// each fit says of the part it has not seen; by event, in the order of rows. Every fit
// starts from the published set.
func (d *fitData) crossValidate(site func(*siteRow) int, pair func(*pairRow) int, log io.Writer) ([][]prediction, error) {
	var out [][]prediction
	for part := range folds {
		m := d.maskOf(func(k int) bool { return k != part }, site, pair)
		p, objective, err := d.maximize(d.start(), m, nil)
		if err != nil {
			return nil, err
		}
		if log != nil {
			fmt.Fprintf(log, "part %d of %d: objective %.4f\n", part+1, folds, objective)
		}
		u, err := d.newUncertainty(p, m)
		if err != nil {
			return nil, err
		}
		seen := d.predict(p, u, func(r *siteRow) bool { return site(r) == part }, func(r *pairRow) bool { return pair(r) == part })
		if out == nil {
			out = seen
			continue
		}
		for k := range seen {
			for i := range seen[k] {
				if seen[k][i].chances != nil {
					out[k][i] = seen[k][i]
				}
			}
		}
	}
	return out, nil
}
