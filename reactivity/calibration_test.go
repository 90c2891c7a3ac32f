package reactivity

import (
	"math"
	"os"
	"slices"
	"strconv"
	"strings"
	"testing"

	"lobecast/frontier"
	"lobecast/frontier/terms"
)

const outcomeFolder = "../testdata/outcomes"

// smallFit prepares a fit on a few outcomes of each event.
func smallFit(t *testing.T, n int) *fitData {
	t.Helper()
	base, err := frontier.Load(publishedBase)
	if err != nil {
		t.Fatal(err)
	}
	e, err := readElectrophilic(outcomeFolder)
	if err != nil {
		t.Fatal(err)
	}
	s, err := readNucleophilic(outcomeFolder)
	if err != nil {
		t.Fatal(err)
	}
	p, err := readPairs(outcomeFolder)
	if err != nil {
		t.Fatal(err)
	}
	d := &fitData{base: base, workers: 2}
	if err := d.prepare(e[:n], s[:n], p[:n]); err != nil {
		t.Fatal(err)
	}
	return d
}

// TestObjectiveGradient compares the gradient of the linearized posterior with central
// differences.
func TestObjectiveGradient(t *testing.T) {
	d := smallFit(t, 40)
	p := d.start()
	if err := d.linearize(p); err != nil {
		t.Fatal(err)
	}
	m := d.everything()
	x := d.flatten(p, nil)
	for i := range x {
		x[i] += 0.02 * math.Sin(float64(i))
	}
	g, scratch := make([]float64, len(x)), make([]float64, len(x))
	d.objective(x, p, m, g)
	for i := 0; i < len(x); i += 3 {
		const step = 1e-5
		y := append([]float64(nil), x...)
		y[i] += step
		up := d.objective(y, p, m, scratch)
		y[i] -= 2 * step
		down := d.objective(y, p, m, scratch)
		if numeric := (up - down) / (2 * step); math.Abs(numeric-g[i]) > 1e-5*(1+math.Abs(numeric)) {
			t.Errorf("coordinate %d: gradient %.8f, central difference %.8f", i, g[i], numeric)
		}
	}
}

// TestIndexDerivatives compares the derivatives of the fitted indices and of the energies
// of half-formed pairs by the parameters of the set with central differences through
// whole new solutions.
func TestIndexDerivatives(t *testing.T) {
	d := smallFit(t, 25)
	p := d.start()
	const step = 1e-5
	values := func(q *fitPoint) (z []float64) {
		if err := d.linearize(q); err != nil {
			t.Fatal(err)
		}
		for _, f := range d.sites {
			for _, s := range f.subs {
				for _, form := range s.forms {
					z = append(z, form.z...)
				}
			}
		}
		for i := range d.pairs.rows {
			z = append(z, d.pairs.rows[i].z[:]...)
		}
		return z
	}
	last := len(d.sites)
	for col := 0; col <= d.prior.columns.n; col += 5 {
		up, down := p.clone(), p.clone()
		if col < d.prior.columns.n {
			up.theta[col] += step
			down.theta[col] -= step
		} else {
			up.weights[last][1] += step
			down.weights[last][1] -= step
		}
		a, b := values(up), values(down)
		values(p)
		k := 0
		check := func(derivative float64) {
			numeric := (a[k] - b[k]) / (2 * step)
			if math.Abs(numeric-derivative) > 2e-4*(1+math.Abs(numeric)) {
				t.Errorf("column %d, index %d: derivative %.6f, central difference %.6f", col, k, derivative, numeric)
			}
			k++
		}
		at := func(active []int32, by []float64) float64 {
			for i, c := range active {
				if int(c) == col {
					return by[i]
				}
			}
			return 0
		}
		for _, f := range d.sites {
			for _, s := range f.subs {
				for _, form := range s.forms {
					n := len(form.active)
					for i := range form.z {
						check(at(form.active, form.by[i*n:(i+1)*n]))
					}
				}
			}
		}
		for i := range d.pairs.rows {
			r := &d.pairs.rows[i]
			for ch := range r.z {
				check(at(r.active, r.by[ch]))
			}
		}
	}
}

// TestSmallRefit fits a few outcomes twice: the posterior rises, and the numbers are the
// same to the last bit on one worker and on two.
func TestSmallRefit(t *testing.T) {
	var first []float64
	for _, workers := range []int{1, 2} {
		d := smallFit(t, 60)
		d.workers = workers
		p := d.start()
		if err := d.linearize(p); err != nil {
			t.Fatal(err)
		}
		g := make([]float64, d.dimension())
		before := d.objective(d.flatten(p, nil), p, d.everything(), g)
		q, after, err := d.maximize(p, d.everything(), nil)
		if err != nil {
			t.Fatal(err)
		}
		if !(after < before-5) {
			t.Errorf("objective %.3f after the fit, %.3f before it", after, before)
		}
		x := d.flatten(q, nil)
		if first == nil {
			first = x
		} else if !equalFloats(first, x) {
			t.Error("the fit differs with the number of workers")
		}
	}
}

// TestCalibrationBelongsToCode checks that the embedded numbers were written for the
// terms of this program, and that they agree with one another.
func TestCalibrationBelongsToCode(t *testing.T) {
	m, err := loadModel()
	if err != nil {
		t.Fatal(err)
	}
	c, err := loadCovariance(m.columns.n)
	if err != nil {
		t.Fatal(err)
	}
	for _, e := range fittedEvents {
		n := c.size[e]
		deviation := map[int]float64{}
		err := calibrationTable("weights.csv", 4, func(rec []string) error {
			if rec[0] == string(e) {
				v, err := strconv.ParseFloat(rec[3], 64)
				deviation[m.columns.n+len(deviation)] = v
				return err
			}
			return nil
		})
		if err != nil {
			t.Fatal(err)
		}
		for i, s := range deviation {
			if v := c.joint[e][i*n+i]; math.Abs(math.Sqrt(v)-s) > 1e-3*s+1e-6 {
				t.Errorf("%s, weight %d: error %.6f, root of the variance %.6f", e, i-m.columns.n, s, math.Sqrt(v))
			}
		}
	}
	if DefaultSet().Name != calibratedName {
		t.Errorf("the default set is %s", DefaultSet().Name)
	}
}

// TestPriorFollowsParent checks that a class split off is drawn to its parent's value,
// not to the published one: moving both together costs what the parent's move costs.
func TestPriorFollowsParent(t *testing.T) {
	d := smallFit(t, 60)
	pr := d.prior
	child := -1
	for c, q := range pr.parent {
		if q >= 0 && pr.parent[q] < 0 {
			child = c
		}
	}
	if child < 0 {
		t.Fatal("no class with a free parent among the outcomes")
	}
	cost := func(moved ...int) float64 {
		theta := append([]float64(nil), pr.published...)
		for _, c := range moved {
			theta[c] += 0.1
		}
		return pr.add(theta, make([]float64, len(theta)))
	}
	family := []int{pr.parent[child]}
	for c, q := range pr.parent {
		if q == pr.parent[child] {
			family = append(family, c)
		}
	}
	own := 0.5 * 0.01 / (pr.spread[pr.parent[child]] * pr.spread[pr.parent[child]])
	if got := cost(family...); math.Abs(got-own) > 1e-9 {
		t.Errorf("moving a family by 0.1 costs %.6f, its root alone %.6f", got, own)
	}
	if apart := cost(child); math.Abs(apart-0.5*0.01/(splitSpread*splitSpread)) > 1e-9 {
		t.Errorf("moving %s from its parent by 0.1 costs %.6f", pr.names[child], apart)
	}
}

// TestRecordAgrees compares the embedded record with docs/record.md, and with the fit to
// all outcomes: what the embedded numbers say of outcomes they were fitted to must not
// be worse than what the folds said of outcomes they had not seen.
func TestRecordAgrees(t *testing.T) {
	text, err := os.ReadFile("../docs/record.md")
	if err != nil {
		t.Fatal(err)
	}
	for _, e := range fittedEvents {
		r, ok := RecordFor(e)
		if !ok {
			t.Fatalf("no record of %s", e)
		}
		line := "| " + eventTitle(e) + " | " + strconv.Itoa(r.Outcomes) + " | " + strconv.Itoa(r.Substrates) + " | " + strconv.FormatFloat(r.Top1, 'f', 3, 64)
		if !strings.Contains(string(text), line) {
			t.Errorf("docs/record.md does not begin a line with %q", line)
		}
		if !(r.Top1Limits[0] < r.Top1 && r.Top1 < r.Top1Limits[1] && r.Top2 >= r.Top1 && r.ChanceLevel < r.Top1) {
			t.Errorf("%s: figures out of order: %+v", e, r)
		}
		// What the project set out to show (each within one standard error, about 0.011 and
		// 0.02 here), so that a refit that loses it is noticed.
		goal := targets[e]
		if r.Top1 < goal.top1-0.012 || r.LogLoss > goal.loss+0.02 || r.Calibration > goal.calibration {
			t.Errorf("%s: first right %.3f, log-loss %.3f, calibration %.3f", e, r.Top1, r.LogLoss, r.Calibration)
		}
	}
	if _, ok := RecordFor(terms.RadicalSubstitution); ok {
		t.Error("an event without outcomes has a record")
	}

	e, err := readElectrophilic(outcomeFolder)
	if err != nil {
		t.Fatal(err)
	}
	e = e[:150]
	loss := 0.0
	for _, o := range e {
		medium := terms.UnknownMedium
		if o.Acidic {
			medium = terms.Acidic
		}
		j, err := Judge(mustParse(t, o.SMILES), Conditions{Incoming: o.Incoming, Medium: medium, NoLimits: true, Terse: true, Only: terms.ElectrophilicSubstitution}, nil)
		if err != nil {
			t.Fatalf("%s: %v", o.ID, err)
		}
		found := false
		for _, s := range j.Attacks[0].Sites {
			if slices.Contains(s.Atoms, o.Site[0]) {
				found = true
				loss -= math.Log(*s.Chance)
			}
		}
		if !found {
			t.Fatalf("%s: the recorded site is not listed", o.ID)
		}
	}
	r, _ := RecordFor(terms.ElectrophilicSubstitution)
	if mean := loss / float64(len(e)); mean > r.LogLoss {
		t.Errorf("log-loss %.3f on outcomes that were fitted, %.3f on those that were not", mean, r.LogLoss)
	}
}

// TestFoldsAreEven checks that outcomes fall evenly to the parts of the cross-validation,
// and that the rows of one substrate stay together.
func TestFoldsAreEven(t *testing.T) {
	e, err := readElectrophilic(outcomeFolder)
	if err != nil {
		t.Fatal(err)
	}
	count := make([]int, folds)
	for _, o := range e {
		count[foldOf(mustParse(t, o.SMILES).FlatSMILES())]++
	}
	for _, n := range count {
		// 1051/5 = 210, standard deviation 13
		if n < 160 || n > 260 {
			t.Errorf("parts of %v outcomes", count)
			break
		}
	}
}

// TestWilson compares with the 95 % interval of 8 in 10, 0.490 to 0.943 (L. D. Brown, T. T. Cai,
// A. DasGupta, Stat. Sci. 2001, 16, 101, formula 4, evaluated by hand).
func TestWilson(t *testing.T) {
	low, high := wilsonLimits(0.8, 10)
	if math.Abs(low-0.4902) > 1e-4 || math.Abs(high-0.9433) > 1e-4 {
		t.Errorf("%.4f to %.4f", low, high)
	}
}
