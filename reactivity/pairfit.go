package reactivity

import (
	"errors"
	"fmt"
	"math"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
)

// pairRow is one outcome of Diels–Alder orientation. Channels are the four possible
// first bonds: (a,b) and (c,d) of the observed orientation, (a,d) and (c,b) of the other.
type pairRow struct {
	turned    bool // of a pair being judged: the diene is the second molecule
	exchanged bool // the orientation asked about is not the recorded one (simulations)
	id        string
	weight    float64
	fold      int
	group     uint64
	a, b      *molecule.Molecule
	piA       *frontier.Pi
	piB       *frontier.Pi
	ends      [4]int // centres: a and c in A, b and d in B
	facts     [4]endFacts
	x         [4][]float64 // values of the terms in each channel
	z         [4]float64
	active    []int32
	by        [4][]float64
}

// pairFit is the data and layout of the fit of Diels–Alder orientation. The weight
// vector: ΔE, τ, the terms, lapse.
type pairFit struct {
	rows        []pairRow
	weights     int
	mean, prior []float64
	skipped     []string // outcomes that the model refuses, with the reason
}

// Prior on τ, the resonance integral of the second bond while the first is formed.
const (
	tauMean  = 0.3
	tauPrior = 0.1
)

// refused tells whether an error says that the model does not cover a structure.
func refused(err error) bool {
	var r *frontier.Refusal
	return errors.As(err, &r)
}

func pairWeightNames() []string {
	names := []string{"first bond", "second bond under way"}
	for _, t := range pairTerms {
		names = append(names, t.Name)
	}
	return append(names, "lapse")
}

func newPairFit(outcomes []pairOutcome) (*pairFit, error) {
	f := &pairFit{weights: len(pairWeightNames())}
	f.mean, f.prior = make([]float64, f.weights), make([]float64, f.weights)
	f.prior[0] = priorIndex
	f.mean[1], f.prior[1] = tauMean, tauPrior
	for k, t := range pairTerms {
		f.prior[2+k] = t.Prior
	}
	f.mean[f.weights-1], f.prior[f.weights-1] = lapseLogit, priorLapse
	type side struct {
		m  *molecule.Molecule
		pi *frontier.Pi
	}
	seen := map[string]side{}
	read := func(s string) (side, error) {
		if x, ok := seen[s]; ok {
			return x, nil
		}
		m, err := molecule.ParseSMILES(s)
		if err != nil {
			return side{}, err
		}
		pi, err := frontier.Perceive(m, frontier.Options{})
		if err != nil {
			return side{}, err
		}
		seen[s] = side{m, pi}
		return seen[s], nil
	}
	count := map[string]int{}
	var keys []string
	for _, o := range outcomes {
		A, err := read(o.A)
		if err != nil {
			if refused(err) {
				f.skipped = append(f.skipped, o.ID+": "+err.Error())
				continue
			}
			return nil, fmt.Errorf("%s: %w", o.ID, err)
		}
		B, err := read(o.B)
		if err != nil {
			if refused(err) {
				f.skipped = append(f.skipped, o.ID+": "+err.Error())
				continue
			}
			return nil, fmt.Errorf("%s: %w", o.ID, err)
		}
		key := A.m.FlatSMILES() + "." + B.m.FlatSMILES()
		r := pairRow{id: o.ID, fold: foldOf(key)}
		a, b, c, d := o.Bonds[0][0], o.Bonds[0][1], o.Bonds[1][0], o.Bonds[1][1]
		facts, ok := pairFacts(A.m, A.pi, B.m, B.pi, a, b, c, d)
		if !ok {
			A, B = B, A
			a, b, c, d = b, a, d, c
			if facts, ok = pairFacts(A.m, A.pi, B.m, B.pi, a, b, c, d); !ok {
				f.skipped = append(f.skipped, o.ID+": no diene with its ends at the new bonds, beside a π bond, is found")
				continue
			}
		}
		r.a, r.b, r.piA, r.piB, r.facts = A.m, B.m, A.pi, B.pi, facts
		r.ends = [4]int{centreOf(A.pi, a), centreOf(A.pi, c), centreOf(B.pi, b), centreOf(B.pi, d)}
		r.x = channelTerms(&r.facts)
		r.group = environmentKey(A.m, []int{a, c})*31 + environmentKey(B.m, []int{b, d})
		count[key]++
		keys = append(keys, key)
		f.rows = append(f.rows, r)
	}
	for i := range f.rows {
		f.rows[i].weight = 1 / float64(count[keys[i]])
	}
	return f, nil
}

// pairFacts describes the ends a and c of the diene A, b and d of the partner B, in the
// order a, c, b, d; false where A is no diene with these ends, or B no π bond.
func pairFacts(A *molecule.Molecule, piA *frontier.Pi, B *molecule.Molecule, piB *frontier.Pi, a, b, c, d int) (facts [4]endFacts, ok bool) {
	if centreOf(piA, a) < 0 || centreOf(piA, c) < 0 || centreOf(piB, b) < 0 || centreOf(piB, d) < 0 || B.BondBetween(b, d) < 0 {
		return facts, false
	}
	path := dienePath(A, func(i int) bool { return centreOf(piA, i) >= 0 }, a, c)
	if path == nil {
		return facts, false
	}
	v, w := &view{m: A}, &view{m: B}
	return [4]endFacts{
		v.endOf(a, path[1], path[2]), v.endOf(c, path[2], path[1]),
		w.endOf(b, d, -1), w.endOf(d, b, -1),
	}, true
}

// channelTerms are the values of the terms in the four channels, given the facts of the
// diene ends a, c and the partner ends b, d.
func channelTerms(f *[4]endFacts) (x [4][]float64) {
	const a, c, b, d = 0, 1, 2, 3
	channels := [4][4]int{{a, b, c, d}, {c, d, a, b}, {a, d, c, b}, {c, b, a, d}}
	for k, ch := range channels {
		x[k] = make([]float64, len(pairTerms))
		for t := range pairTerms {
			p := &pairTerms[t]
			v := p.value(&f[ch[0]], &f[ch[1]])
			if !p.first {
				v += p.value(&f[ch[2]], &f[ch[3]])
			}
			x[k][t] = v
		}
	}
	return x
}

// linearize computes ΔE of the four channels and its derivatives.
func (r *pairRow) linearize(solve func(*frontier.Pi) (*frontier.Solution, error), tau float64, columns *parameterColumns) error {
	solA, err := solve(r.piA)
	if err != nil {
		return err
	}
	solB, err := solve(r.piB)
	if err != nil {
		return err
	}
	systemA, localA := places(solA)
	systemB, localB := places(solB)
	return r.energies(solA, solB, systemA, localA, systemB, localB, tau, columns)
}

// energies is linearize for solved components, given in the order of a pair judgement
// (where r.turned, the diene is the second); columns may be nil.
func (r *pairRow) energies(solA, solB *frontier.Solution, systemA, localA, systemB, localB []int, tau float64, columns *parameterColumns) error {
	if r.turned {
		solA, solB, systemA, localA, systemB, localB = solB, solA, systemB, localB, systemA, localA
	}
	kA, kB := systemA[r.ends[0]], systemB[r.ends[2]]
	if systemA[r.ends[1]] != kA || systemB[r.ends[3]] != kB {
		return errors.New("the ends lie in different π systems")
	}
	x := newHalfBonds(solA, kA, solB, kB, columns)
	offset := solA.Matrices[kA].N
	a, c := localA[r.ends[0]], localA[r.ends[1]]
	b, d := localB[r.ends[2]]+offset, localB[r.ends[3]]+offset
	n := 0
	if columns != nil {
		n = columns.n + 1
	}
	full := make([]float64, 4*n)
	for k, ch := range [4][4]int{{a, b, c, d}, {c, d, a, b}, {a, d, c, b}, {c, b, a, d}} {
		var by []float64
		if columns != nil {
			by = full[k*n : (k+1)*n]
		}
		e, err := x.at(ch[0], ch[1], ch[2], ch[3], tau, by)
		if err != nil {
			return err
		}
		r.z[k] = e * indexScale
	}
	r.active = r.active[:0]
	for col := range n {
		for k := range 4 {
			if math.Abs(full[k*n+col]) > 1e-12 {
				r.active = append(r.active, int32(col))
				break
			}
		}
	}
	for k := range 4 {
		r.by[k] = make([]float64, len(r.active))
		for i, col := range r.active {
			r.by[k][i] = full[k*n+int(col)] * indexScale
		}
	}
	return nil
}

// channelWeights are the Boltzmann-like weights exp(u) of the four channels, relative
// to the largest, and the linearized ΔE.
func (f *pairFit) channelWeights(r *pairRow, delta, w []float64) (e, z [4]float64) {
	top := math.Inf(-1)
	for k := range 4 {
		z[k] = r.z[k]
		for i, col := range r.active {
			if delta != nil {
				z[k] += r.by[k][i] * delta[col]
			}
		}
		u := w[0] * z[k]
		for t, x := range r.x[k] {
			u += w[2+t] * x
		}
		e[k] = u
		top = math.Max(top, u)
	}
	for k := range 4 {
		e[k] = math.Exp(e[k] - top)
	}
	return e, z
}

// chance is that of the observed orientation.
func (f *pairFit) chance(r *pairRow, delta, w []float64) float64 {
	e, _ := f.channelWeights(r, delta, w)
	lapse := logistic(w[f.weights-1])
	return (1-lapse)*(e[0]+e[1])/(e[0]+e[1]+e[2]+e[3]) + lapse/2
}

// loss adds the loss of an outcome and its derivatives. delta and gTheta have one more
// entry than there are parameters: τ, whose weight is w[1].
func (f *pairFit) loss(r *pairRow, weight float64, delta, w, gTheta, gW []float64) float64 {
	e, z := f.channelWeights(r, delta, w)
	lapse := logistic(w[f.weights-1])
	sum := e[0] + e[1] + e[2] + e[3]
	plain := (e[0] + e[1]) / sum
	p := (1-lapse)*plain + lapse/2
	d := -weight / p
	gW[f.weights-1] += d * (0.5 - plain) * lapse * (1 - lapse)
	last := len(gTheta) - 1
	for k := range 4 {
		g := -plain * e[k] / sum
		if k < 2 {
			g += e[k] / sum
		}
		g *= d * (1 - lapse)
		gW[0] += g * z[k]
		for i, col := range r.active {
			gTheta[col] += g * w[0] * r.by[k][i]
		}
		for t, x := range r.x[k] {
			gW[2+t] += g * x
		}
	}
	gW[1] += gTheta[last]
	gTheta[last] = 0
	return -weight * math.Log(p)
}
