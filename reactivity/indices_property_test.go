package reactivity

import (
	"math"
	"math/rand/v2"
	"testing"

	"lobecast/frontier"
)

// lawTolerance is |β|; the laws below are exact, so that it covers rounding only.
const lawTolerance = 1e-9

func localization(t *testing.T, o *frontier.Orbitals) *Localization {
	t.Helper()
	l, err := LocalizationEnergies(o)
	if err != nil {
		t.Fatal(err)
	}
	return l
}

// In a closed shell L^E − L^N = 2λ* and L^R = (L^E + L^N)/2, λ* lying between the
// frontier levels of the parent (interlacing, Cauchy).
func TestLocalizationIdentity(t *testing.T) {
	checked := 0
	for _, s := range stress() {
		o := s.solve(t)
		if o.Open || math.Mod(o.Electrons, 2) != 0 || o.N < 2 || o.Electrons == 0 || o.Electrons == 2*float64(o.N) {
			continue
		}
		l := localization(t, o)
		m := pairs(o.Electrons)
		for r := range o.N {
			e, n, rad, level := l.Electrophile[r], l.Nucleophile[r], l.Radical[r], l.Level[r]
			if !same(e-n, 2*level, lawTolerance) || !same(rad, (e+n)/2, lawTolerance) {
				t.Errorf("%s, centre %d: L^E %.12f, L^N %.12f, L^R %.12f, λ* %.12f", s.name, r, e, n, rad, level)
			}
			if level > o.X[m-1]+lawTolerance || level < o.X[m]-lawTolerance {
				t.Errorf("%s, centre %d: λ* %.12f not between %.12f and %.12f", s.name, r, level, o.X[m-1], o.X[m])
			}
			checked++
		}
	}
	if checked < 1000 {
		t.Errorf("only %d centres of closed shells checked", checked)
	}
}

// Every level of every residue lies between two neighbours of the parent, and their sum
// is the trace.
func TestResidueLevelsInterlace(t *testing.T) {
	var w Workspace
	for _, s := range stress() {
		o := s.solve(t)
		if err := w.Reset(o); err != nil {
			t.Fatal(err)
		}
		for r := range o.N {
			want, sum := -o.H[r*o.N+r], 0.0
			for i := range o.N {
				want += o.H[i*o.N+i]
			}
			for k := 1; k < o.N; k++ {
				x := w.root(w.square[r*o.N:(r+1)*o.N], k)
				if x > o.X[k-1] || x < o.X[k] {
					t.Errorf("%s, centre %d: level %d of the residue at %v, outside %v … %v", s.name, r, k, x, o.X[k], o.X[k-1])
				}
				sum += x
			}
			if !same(sum, want, 1e-8) {
				t.Errorf("%s, centre %d: levels of the residue sum to %.10f, trace %.10f", s.name, r, sum, want)
			}
		}
	}
}

// A shift d of every α moves L^E by N d − (N−2) d − d = +d, L^N by −d, and leaves L^R,
// the frontier densities and smoothed densities alone.
func TestUniformShiftOfAlpha(t *testing.T) {
	const d = 0.37
	for _, s := range stress() {
		shifted := s
		shifted.h = append([]float64(nil), s.h...)
		for i := range s.n {
			shifted.h[i*s.n+i] += d
		}
		o, p := s.solve(t), shifted.solve(t)
		a, b := localization(t, o), localization(t, p)
		f, g := FrontierDensities(o), FrontierDensities(p)
		u, v := SmoothedDensities([]*frontier.Orbitals{o}, 2)[0], SmoothedDensities([]*frontier.Orbitals{p}, 2)[0]
		for r := range s.n {
			if !same(b.Electrophile[r], a.Electrophile[r]+d, 1e-8) || !same(b.Nucleophile[r], a.Nucleophile[r]-d, 1e-8) ||
				!same(b.Radical[r], a.Radical[r], 1e-8) {
				t.Errorf("%s, centre %d: L^E %v→%v, L^N %v→%v, L^R %v→%v", s.name, r,
					a.Electrophile[r], b.Electrophile[r], a.Nucleophile[r], b.Nucleophile[r], a.Radical[r], b.Radical[r])
			}
			if nearlyDegenerate(o) {
				continue // which levels make one shell may then change with rounding
			}
			if !same(f.Electrophile[r], g.Electrophile[r], 1e-6) || !same(f.Nucleophile[r], g.Nucleophile[r], 1e-6) ||
				!same(u.Electrophile[r], v.Electrophile[r], 1e-8) || !same(u.Nucleophile[r], v.Nucleophile[r], 1e-8) {
				t.Errorf("%s, centre %d: densities change with α", s.name, r)
			}
		}
	}
}

// nearlyDegenerate reports levels apart by about the tolerance of degeneracy.
func nearlyDegenerate(o *frontier.Orbitals) bool {
	for j := 1; j < o.N; j++ {
		if d := o.X[j-1] - o.X[j]; d > 1e-12 && d < 1e-6 {
			return true
		}
	}
	return false
}

// Centres that a symmetry of the graph carries into each other have equal indices:
// all of a ring, a complete graph or a hypercube, the ends of a star.
func TestEquivalentCentresEqual(t *testing.T) {
	check := func(s system, from int) {
		o := s.solve(t)
		l, f, sd := localization(t, o), FrontierDensities(o), Superdelocalizabilities(o)
		sm, nr := SmoothedDensities([]*frontier.Orbitals{o}, 2)[0], ReactivityNumbers(o)
		for r := from; r < s.n; r++ {
			for _, x := range [][]float64{l.Electrophile, l.Nucleophile, l.Radical, f.Electrophile, f.Nucleophile,
				sd.Electrophile, sd.Nucleophile, sm.Electrophile, sm.Nucleophile, nr} {
				if !same(x[r], x[from], lawTolerance) {
					t.Errorf("%s: %v at centre %d, %v at its equivalent %d", s.name, x[r], r, x[from], from)
				}
			}
		}
	}
	for n := 3; n <= 12; n++ {
		for d := -2.0; d <= 2; d++ {
			for _, s := range []system{ring(n), complete(n)} {
				s.electrons += d
				check(s, 0)
			}
			s := star(n)
			s.electrons += d
			check(s, 1)
		}
	}
	check(hypercube(3), 0)
	check(hypercube(4), 0)
}

// Renumbering the centres renumbers the indices and changes nothing else.
func TestIndicesUnderRenumbering(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 3))
	for range 60 {
		s := randomMolecule(rng, 2+rng.IntN(20))
		p := rng.Perm(s.n)
		q := s
		q.h = make([]float64, s.n*s.n)
		for i := range s.n {
			for j := range s.n {
				q.h[p[i]*s.n+p[j]] = s.h[i*s.n+j]
			}
		}
		o, u := s.solve(t), q.solve(t)
		a, b := localization(t, o), localization(t, u)
		x, y := Superdelocalizabilities(o), Superdelocalizabilities(u)
		for r := range s.n {
			if !same(a.Electrophile[r], b.Electrophile[p[r]], lawTolerance) || !same(a.Nucleophile[r], b.Nucleophile[p[r]], lawTolerance) ||
				!same(x.Electrophile[r], y.Electrophile[p[r]], 1e-7) {
				t.Errorf("%s: centre %d differs from itself as %d", s.name, r, p[r])
			}
		}
	}
}

// What is not conjugated with a centre does not touch its localization energies: two
// closed shells side by side give those of each alone.
func TestSeparateSystemsIndependent(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 1))
	checked := 0
	for range 200 {
		a, b := randomMolecule(rng, 2+rng.IntN(12)), randomMolecule(rng, 2+rng.IntN(12))
		oa, ob := a.solve(t), b.solve(t)
		both := together(a, b).solve(t)
		// Side by side, electrons go to the lowest levels of both: only where neither
		// could lower its energy at the other's cost are they the same two molecules.
		if oa.Open || ob.Open || both.Open || math.Abs(both.Energy-oa.Energy-ob.Energy) > 1e-10 {
			continue
		}
		la, l := localization(t, oa), localization(t, both)
		var d residueSolver
		for r := range a.n {
			d.solve(oa, r, -1, false)
			m := pairs(oa.Electrons)
			// λ* of the residue must likewise stay the frontier of the two together.
			if m < 1 || m > a.n-1 || d.x[m-1] > ob.X[max(pairs(ob.Electrons)-1, 0)] || pairs(ob.Electrons) < b.n && d.x[m-1] < ob.X[pairs(ob.Electrons)] {
				continue
			}
			checked++
			if !same(la.Electrophile[r], l.Electrophile[r], lawTolerance) || !same(la.Nucleophile[r], l.Nucleophile[r], lawTolerance) {
				t.Errorf("%s beside %s, centre %d: L^E %v and %v alone, L^N %v and %v alone", a.name, b.name, r,
					l.Electrophile[r], la.Electrophile[r], l.Nucleophile[r], la.Nucleophile[r])
			}
		}
	}
	if checked < 100 {
		t.Errorf("only %d centres compared", checked)
	}
}

// Closed forms: of a ring of n = 4k+2 carbons every residue is the chain of n−1, whose
// levels are 2cos(πk/n); of ethene nothing but p orbitals is left (Hückel 1931).
func TestLocalizationClosedForms(t *testing.T) {
	for n := 6; n <= 30; n += 4 {
		l := localization(t, ring(n).solve(t))
		parent, residue := 0.0, 0.0
		for k := -n / 4; k <= n/4; k++ {
			parent += 2 * 2 * math.Cos(2*math.Pi*float64(k)/float64(n))
		}
		for k := 1; k < n/2; k++ {
			residue += 2 * 2 * math.Cos(math.Pi*float64(k)/float64(n))
		}
		if want := parent - residue; !same(l.Electrophile[0], want, 1e-12*float64(n)) || !same(l.Level[0], 0, 1e-12) {
			t.Errorf("ring of %d: L^E %.14f, in closed form %.14f, λ* %g", n, l.Electrophile[0], want, l.Level[0])
		}
	}
	l := localization(t, path(2).solve(t))
	if !same(l.Electrophile[0], 2, 1e-14) || !same(l.Nucleophile[1], 2, 1e-14) {
		t.Errorf("ethene: L^E %v, L^N %v", l.Electrophile[0], l.Nucleophile[1])
	}
}

// Dewar's number from the non-bonding orbital of the residue, found by elimination: the
// longhand method of his paper, against the closed form used.
func TestReactivityNumberByElimination(t *testing.T) {
	for _, s := range []system{ring(6), path(4), path(8), honeycomb(1, 2), honeycomb(1, 4), honeycomb(2, 2), honeycomb(3, 3), ring(10)} {
		o := s.solve(t)
		got := ReactivityNumbers(o)
		for r := range s.n {
			var d residueSolver
			d.solve(o, r, -1, true)
			which, count := -1, 0
			for j, x := range d.x {
				if math.Abs(x) < 1e-8 {
					which, count = j, count+1
				}
			}
			want := math.NaN()
			if count == 1 {
				sum := 0.0
				for a, i := range d.kept {
					sum += s.h[r*s.n+i] * d.coefficient(a, which)
				}
				want = 2 * math.Abs(sum)
			}
			if !same(got[r], want, 1e-8) {
				t.Errorf("%s, centre %d: N %v, from the residue's non-bonding orbital %v", s.name, r, got[r], want)
			}
		}
	}
	// Signs matter: the residue of cyclobutadiene is the allyl radical, whose two ends cancel.
	if n := ReactivityNumbers(ring(4).solve(t))[0]; !same(n, 0, 1e-12) {
		t.Errorf("cyclobutadiene: N %v, its two neighbours cancel", n)
	}
	for _, s := range []system{ring(5), path(3), star(4), ring(7)} {
		for r, n := range ReactivityNumbers(s.solve(t)) {
			if s.name == "chain of 3" || s.name == "star of 4" {
				if r == 0 && s.name == "chain of 3" && !math.IsNaN(n) {
					t.Errorf("end of allyl leaves ethene, without a non-bonding level, and yet N = %v", n)
				}
				continue
			}
			if !math.IsNaN(n) {
				t.Errorf("%s is not alternant and yet has N = %v", s.name, n)
			}
		}
	}
}

// A level at x = 0 must not make a superdelocalizability diverge, but be said.
func TestSuperdelocalizabilityAtReference(t *testing.T) {
	for _, s := range []system{ring(4), path(3), ring(8), star(5)} {
		d := Superdelocalizabilities(s.solve(t))
		if !d.Unreliable || d.Note == "" {
			t.Errorf("%s has a level at x = 0 and no note", s.name)
		}
		for r := range s.n {
			if x := math.Abs(d.Electrophile[r]) + math.Abs(d.Nucleophile[r]); !(x < 10) {
				t.Errorf("%s, centre %d: S diverges (%v)", s.name, r, x)
			}
		}
	}
	if d := Superdelocalizabilities(ring(6).solve(t)); d.Unreliable || d.Reference != 0 {
		t.Errorf("benzene marked unreliable: %s", d.Note)
	}
}
