package frontier

import (
	"errors"
	"math"
	"math/rand/v2"
	"testing"

	"gonum.org/v1/gonum/mat"
)

// solverTolerance is far above the noise of the diagonalization (1e-13 at these sizes)
// and far below anything chemical.
const solverTolerance = 1e-9

func near(a, b float64) bool { return math.Abs(a-b) <= solverTolerance }

// Chains, rings and stars have closed forms: x_j = 2 cos(jπ/(n+1)), 2 cos(2πj/n),
// ±√(n−1) and zeros (Hückel 1931; Coulson 1938).
func TestAnalytic(t *testing.T) {
	for n := 2; n <= 60; n++ {
		chain := &graph{n: n, h: make([]float64, n*n)}
		for i := 1; i < n; i++ {
			chain.join(i-1, i, 1)
		}
		o, err := Solve(n, chain.h, float64(n))
		if err != nil {
			t.Fatal(err)
		}
		energy := 0.0
		for j := range o.X {
			if want := 2 * math.Cos(float64(j+1)*math.Pi/float64(n+1)); !near(o.X[j], want) {
				t.Errorf("chain of %d: level %d %.12f, want %.12f", n, j+1, o.X[j], want)
			}
			for r := 0; r < n; r++ {
				want := math.Sqrt(2/float64(n+1)) * math.Sin(float64((j+1)*(r+1))*math.Pi/float64(n+1))
				if !near(math.Abs(o.Coefficient(r, j)), math.Abs(want)) {
					t.Errorf("chain of %d: coefficient of centre %d in level %d", n, r+1, j+1)
				}
			}
		}
		// closed form of the total energy of even chains (Coulson 1939): 2/sin(π/(2n+2)) − 2
		if n%2 == 0 {
			energy = 2/math.Sin(math.Pi/float64(2*n+2)) - 2
			if !near(o.Energy, energy) {
				t.Errorf("chain of %d: energy %.12f, want %.12f", n, o.Energy, energy)
			}
		}
		if n > 2 {
			chain.join(0, n-1, 1)
			o, err = Solve(n, chain.h, float64(n))
			if err != nil {
				t.Fatal(err)
			}
			for j := range o.X {
				if want := 2 * math.Cos(2*math.Pi*float64((j+1)/2)/float64(n)); !near(o.X[j], want) {
					t.Errorf("ring of %d: level %d %.12f, want %.12f", n, j+1, o.X[j], want)
				}
			}
			for r, q := range o.Populations() {
				if !near(q, 1) {
					t.Errorf("ring of %d: population of %d is %.12f, want 1", n, r+1, q)
				}
			}
			if wantOpen := n%4 == 0 || n%2 == 1; o.Open != wantOpen {
				t.Errorf("ring of %d: open %t, want %t", n, o.Open, wantOpen)
			}
		}
		star := &graph{n: n, h: make([]float64, n*n)}
		for i := 1; i < n; i++ {
			star.join(0, i, 1)
		}
		if o, err = Solve(n, star.h, 2); err != nil {
			t.Fatal(err)
		}
		if !near(o.X[0], math.Sqrt(float64(n-1))) || !near(o.X[n-1], -math.Sqrt(float64(n-1))) || n > 2 && !near(o.X[1], 0) {
			t.Errorf("star of %d: levels %v", n, o.X)
		}
	}
	// Benzene's self-polarizability is 43/108 (Coulson and Longuet-Higgins 1947).
	ring := &graph{n: 6, h: make([]float64, 36)}
	for i := 0; i < 6; i++ {
		ring.join(i, (i+1)%6, 1)
	}
	o, _ := Solve(6, ring.h, 6)
	if pi, ok := o.SelfPolarizabilities(); !ok || !near(pi[0], 43.0/108) {
		t.Errorf("benzene π_rr %v, want 43/108", pi)
	}
}

// The equations every solution has to satisfy, on random graphs: H c = x c, orthonormal
// orbitals, traces, Σ q = N, P² = 2P for closed shells, E = Σ q h + 2 Σ p k.
func TestSolutionEquations(t *testing.T) {
	r := rand.New(rand.NewPCG(11, 3))
	for trial := 0; trial < 400; trial++ {
		n := 2 + r.IntN(24)
		g := randomGraph(r, n, trial%2 == 0, trial%3 > 0)
		electrons := float64(r.IntN(2*n + 1))
		o, err := Solve(n, g.h, electrons)
		if err != nil {
			t.Fatal(err)
		}
		trace, square, sum, sumSquare := 0.0, 0.0, 0.0, 0.0
		for i := 0; i < n; i++ {
			trace += g.h[i*n+i]
			sum += o.X[i]
			sumSquare += o.X[i] * o.X[i]
			for j := 0; j < n; j++ {
				square += g.h[i*n+j] * g.h[i*n+j]
				left, dot := 0.0, 0.0
				for k := 0; k < n; k++ {
					left += g.h[i*n+k] * o.Coefficient(k, j)
					dot += o.Coefficient(k, i) * o.Coefficient(k, j)
				}
				if !near(left, o.X[j]*o.Coefficient(i, j)) {
					t.Fatalf("H c = x c fails at centre %d, level %d", i, j)
				}
				if want := map[bool]float64{true: 1}[i == j]; !near(dot, want) {
					t.Fatalf("levels %d and %d: overlap %g", i, j, dot)
				}
			}
		}
		if !near(trace, sum) || math.Abs(square-sumSquare) > 1e-8 {
			t.Errorf("trace %g against Σx %g; Σh² %g against Σx² %g", trace, sum, square, sumSquare)
		}
		q, p := o.Populations(), o.Density()
		total, energy := 0.0, 0.0
		for i := 0; i < n; i++ {
			total += q[i]
			if !near(q[i], p[i*n+i]) {
				t.Errorf("population %d differs from the diagonal of P", i)
			}
			for j := 0; j < n; j++ {
				energy += p[i*n+j] * g.h[i*n+j]
				if !near(p[i*n+j], p[j*n+i]) || !near(p[i*n+j], o.BondOrder(i, j)) {
					t.Errorf("P is not symmetric, or not the bond order, at %d, %d", i, j)
				}
			}
		}
		if !near(total, electrons) || math.Abs(energy-o.Energy) > 1e-8 {
			t.Errorf("Σq %g for %g electrons; Tr PH %g against E %g", total, electrons, energy, o.Energy)
		}
		closed := true
		for _, occ := range o.Occupation {
			closed = closed && (near(occ, 0) || near(occ, 2))
		}
		if closed == o.Open {
			t.Errorf("occupations %v, Open %t", o.Occupation, o.Open)
		}
		if closed {
			d := mat.NewDense(n, n, p)
			var pp mat.Dense
			pp.Mul(d, d)
			for i := 0; i < n; i++ {
				for j := 0; j < n; j++ {
					if !near(pp.At(i, j), 2*p[i*n+j]) {
						t.Fatalf("P² = 2P fails at %d, %d", i, j)
					}
				}
			}
		}
		// A uniform shift of α moves every level by it and nothing else.
		shifted := append([]float64(nil), g.h...)
		for i := 0; i < n; i++ {
			shifted[i*n+i] += 0.73
		}
		s, err := Solve(n, shifted, electrons)
		if err != nil {
			t.Fatal(err)
		}
		if math.Abs(s.Energy-o.Energy-0.73*electrons) > 1e-8 {
			t.Errorf("shift of α: energy moved by %g for %g electrons", s.Energy-o.Energy, electrons)
		}
		for i, v := range s.Populations() {
			if math.Abs(v-q[i]) > 1e-7 {
				t.Errorf("shift of α: population of %d moved by %g", i, v-q[i])
			}
		}
		// Interlacing (Cauchy): the levels without one centre lie between those with it.
		if n > 2 {
			out := r.IntN(n)
			less := make([]float64, 0, (n-1)*(n-1))
			for i := 0; i < n; i++ {
				for j := 0; j < n; j++ {
					if i != out && j != out {
						less = append(less, g.h[i*n+j])
					}
				}
			}
			d, err := Solve(n-1, less, 0)
			if err != nil {
				t.Fatal(err)
			}
			for j := range d.X {
				if d.X[j] > o.X[j]+solverTolerance || d.X[j] < o.X[j+1]-solverTolerance {
					t.Errorf("level %d of the residue at %g, not between %g and %g", j, d.X[j], o.X[j+1], o.X[j])
				}
			}
		}
	}
}

// Pairing theorem (Coulson and Rushbrooke 1940): levels of an alternant hydrocarbon
// are symmetric about zero, and every population of the neutral molecule is one.
func TestPairing(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 8))
	for trial := 0; trial < 200; trial++ {
		n := 2 + r.IntN(26)
		g := randomGraph(r, n, true, false)
		o, err := Solve(n, g.h, float64(n))
		if err != nil {
			t.Fatal(err)
		}
		for j := range o.X {
			if !near(o.X[j], -o.X[n-1-j]) {
				t.Errorf("level %d at %g has no partner", j, o.X[j])
			}
		}
		for i, q := range o.Populations() {
			if !near(q, 1) {
				t.Errorf("population of centre %d is %g in an alternant hydrocarbon", i, q)
			}
		}
	}
}

// Polarizabilities against central differences of populations and bond orders.
func TestPolarizabilities(t *testing.T) {
	r := rand.New(rand.NewPCG(21, 4))
	const step, tolerance = 1e-4, 1e-5
	tested := 0
	for trial := 0; trial < 120; trial++ {
		n := 2 + 2*r.IntN(5)
		g := randomGraph(r, n, false, true)
		o, err := Solve(n, g.h, float64(n))
		if err != nil {
			t.Fatal(err)
		}
		pi, ok := o.AtomPolarizabilities()
		if ok == o.Open {
			t.Fatalf("polarizability given %t for open shell %t", ok, o.Open)
		}
		self, _ := o.SelfPolarizabilities()
		if gap, _ := o.Gap(); o.Open || gap < 0.05 {
			continue
		}
		tested++
		a, b := r.IntN(n), r.IntN(n)
		l := g.links[r.IntN(len(g.links))]
		move := func(i, j int, by float64) *Orbitals {
			h := append([]float64(nil), g.h...)
			h[i*n+j] += by
			if i != j {
				h[j*n+i] += by
			}
			s, err := Solve(n, h, float64(n))
			if err != nil {
				t.Fatal(err)
			}
			return s
		}
		slope := func(i, j, x, y int) float64 {
			return (move(i, j, step).BondOrder(x, y) - move(i, j, -step).BondOrder(x, y)) / (2 * step)
		}
		scale := 1.0
		for _, v := range self {
			scale = math.Max(scale, v*v*v)
		}
		if d := slope(b, b, a, a) - pi[a*n+b]; math.Abs(d) > tolerance*scale {
			t.Errorf("π_%d,%d off by %g", a, b, d)
		}
		if !near(self[a], pi[a*n+a]) {
			t.Errorf("self-polarizability %g, π_rr %g", self[a], pi[a*n+a])
		}
		ab, _ := o.AtomBondPolarizability(a, l.I, l.J)
		if d := slope(l.I, l.J, a, a) - ab; math.Abs(d) > tolerance*scale {
			t.Errorf("π_%d,(%d %d) off by %g", a, l.I, l.J, d)
		}
		if d := 2*slope(a, a, l.I, l.J) - ab; math.Abs(d) > tolerance*scale {
			t.Errorf("2 ∂p/∂h differs from ∂q/∂k by %g", d)
		}
		m := g.links[r.IntN(len(g.links))]
		bb, _ := o.BondPolarizability(l.I, l.J, m.I, m.J)
		if d := slope(m.I, m.J, l.I, l.J) - bb; math.Abs(d) > tolerance*scale {
			t.Errorf("π_(%d %d),(%d %d) off by %g", l.I, l.J, m.I, m.J, d)
		}
		row := 0.0
		for s := 0; s < n; s++ {
			row += pi[a*n+s]
		}
		if math.Abs(row) > 1e-8*scale {
			t.Errorf("row %d of π sums to %g", a, row)
		}
	}
	if tested < 40 {
		t.Errorf("only %d closed shells were tested", tested)
	}
}

// Derivatives of the energy by the parameters are the populations and twice the bond
// orders, through the terms of the matrix (Coulson and Longuet-Higgins 1947).
func TestTermsAreDerivatives(t *testing.T) {
	set := mustLoad(t, DefaultSet)
	const step = 1e-5
	for _, smiles := range []string{"Nc1ccc(cc1)[N+](=O)[O-]", "Cc1c[nH]c2ccc(OC)cc12", "FC(F)(F)c1ccnc(Cl)c1", "CS(=O)(=O)C=CC(=O)OC"} {
		pi := mustPerceive(t, smiles)
		base, err := set.Solve(pi)
		if err != nil {
			t.Fatal(err)
		}
		want := map[Parameter]float64{}
		for s, m := range base.Matrices {
			q := base.Systems[s].Populations()
			for i, terms := range m.Diagonal {
				for _, term := range terms {
					want[term.Parameter] += q[i] * term.Weight
				}
			}
			for l, terms := range m.LinkTerms {
				for _, term := range terms {
					want[term.Parameter] += 2 * base.Systems[s].BondOrder(m.Links[l].I, m.Links[l].J) * term.Weight
				}
			}
		}
		for p := range set.Values {
			energy := func(by float64) float64 {
				moved := set.Clone()
				moved.Values[p] += by
				sol, err := moved.Solve(pi)
				if err != nil {
					t.Fatal(err)
				}
				e := 0.0
				for _, o := range sol.Systems {
					e += o.Energy
				}
				return e
			}
			slope := (energy(step) - energy(-step)) / (2 * step)
			if math.Abs(slope-want[Parameter(p)]) > 1e-6 {
				t.Errorf("%s: ∂E/∂(%s) is %g, the terms give %g", smiles, Parameter(p), slope, want[Parameter(p)])
			}
		}
	}
}

// Random legal structures: whatever their numbering they give one matrix, automorphic
// atoms get equal values, electrons are whole, separate systems do not touch.
func TestPerceptionProperties(t *testing.T) {
	set := scrambled(t)
	r := rand.New(rand.NewPCG(77, 1))
	solved, refused := 0, 0
	for trial := 0; trial < 1500; trial++ {
		smiles, m := randomSMILES(r)
		if m == nil {
			continue
		}
		pi, err := Perceive(m, Options{})
		if err != nil {
			var refusal *Refusal
			if !errors.As(err, &refusal) {
				t.Errorf("%s: %v", smiles, err)
			}
			refused++
			continue
		}
		solved++
		if e := pi.Electrons(); math.Abs(e-math.Round(e)) > 1e-9 {
			t.Errorf("%s: %v π electrons", smiles, e)
		}
		sol, err := set.Solve(pi)
		if err != nil {
			t.Errorf("%s: %v", smiles, err)
			continue
		}
		of := make([]int, len(pi.Centres))
		for s, members := range pi.Systems {
			for _, c := range members {
				of[c] = s
			}
		}
		for _, l := range pi.Links {
			if of[l.I] != of[l.J] {
				t.Errorf("%s: a link joins two systems", smiles)
			}
		}
		perm := r.Perm(len(m.Atoms))
		other, err := Perceive(m.Renumber(perm), Options{})
		if err != nil {
			t.Errorf("%s, renumbered: %v", smiles, err)
			continue
		}
		if a, b := fingerprint(t, set, pi), fingerprint(t, set, other); a != b {
			t.Errorf("%s: the matrix depends on the numbering\n%s\n%s", smiles, describe(pi), describe(other))
		}
		again, err := Perceive(mustParse(t, m.SMILES()), Options{})
		if err != nil {
			t.Errorf("%s, as canonical SMILES: %v", smiles, err)
			continue
		}
		if a, b := fingerprint(t, set, pi), fingerprint(t, set, again); a != b {
			t.Errorf("%s: its canonical SMILES %s gives another matrix\n%s\n%s", smiles, m.SMILES(), describe(pi), describe(again))
		}
		classes := m.Classes()
		for a := range m.Atoms {
			s, i, ok := sol.Find(a)
			s2, i2, ok2 := sol.Find(classes[a])
			if ok != ok2 {
				t.Errorf("%s: automorphic atoms %d and %d differ in having a centre", smiles, a+1, classes[a]+1)
			}
			if ok && ok2 && math.Abs(sol.Systems[s].BondOrder(i, i)-sol.Systems[s2].BondOrder(i2, i2)) > 1e-7 {
				t.Errorf("%s: automorphic atoms %d and %d have different populations", smiles, a+1, classes[a]+1)
			}
		}
	}
	if solved < 500 {
		t.Errorf("only %d structures were solved (%d refused)", solved, refused)
	}
	t.Logf("%d structures solved, %d refused", solved, refused)
}

// Two molecules in one input are what each is alone.
func TestSeparateSystems(t *testing.T) {
	set := mustLoad(t, DefaultSet)
	a, b := mustSolve(t, set, "Nc1ccccc1"), mustSolve(t, set, "C=CC=O")
	both := mustSolve(t, set, "Nc1ccccc1.C=CC=O")
	if len(both.Systems) != 2 {
		t.Fatalf("%d systems", len(both.Systems))
	}
	for s, alone := range []*Solution{a, b} {
		for j, x := range alone.Systems[0].X {
			if !near(x, both.Systems[s].X[j]) {
				t.Errorf("system %d level %d: %g beside another molecule, %g alone", s, j, both.Systems[s].X[j], x)
			}
		}
	}
	// Rings held apart by a CH2 are separate systems too.
	if pi := mustPerceive(t, "C(c1ccccc1)c1ccccc1"); len(pi.Systems) != 2 {
		t.Errorf("diphenylmethane has %d systems", len(pi.Systems))
	}
}

func TestSolveRefusals(t *testing.T) {
	for name, call := range map[string]func() error{
		"no centres":      func() error { _, err := Solve(0, nil, 0); return err },
		"wrong length":    func() error { _, err := Solve(2, make([]float64, 3), 2); return err },
		"not a number":    func() error { _, err := Solve(2, []float64{0, math.NaN(), math.NaN(), 0}, 2); return err },
		"infinite":        func() error { _, err := Solve(1, []float64{math.Inf(1)}, 1); return err },
		"asymmetric":      func() error { _, err := Solve(2, []float64{0, 1, 2, 0}, 2); return err },
		"too many":        func() error { _, err := Solve(1, []float64{0}, 3); return err },
		"negative number": func() error { _, err := Solve(1, []float64{0}, -1); return err },
	} {
		if call() == nil {
			t.Errorf("%s: no error", name)
		}
	}
}
