package reactivity

import (
	"math"
	"math/rand/v2"
	"sort"
	"testing"

	"lobecast/frontier"
)

// approach resets two fresh workspaces to two systems.
func approach(t testing.TB, a, b *frontier.Orbitals) *Approach {
	t.Helper()
	var v, w Workspace
	if err := v.Reset(a); err != nil {
		t.Fatal(err)
	}
	if err := w.Reset(b); err != nil {
		t.Fatal(err)
	}
	return NewApproach(&v, &w)
}

// firstBondByDefinition deletes both ends, throws all levels into one list and fills it.
func firstBondByDefinition(a, b *frontier.Orbitals, r, s int) float64 {
	var da, db residueSolver
	da.solve(a, r, -1, false)
	db.solve(b, s, -1, false)
	x := append(append([]float64(nil), da.x...), db.x...)
	sort.Sort(sort.Reverse(sort.Float64Slice(x)))
	return a.Energy + b.Energy - fillLevels(x, a.Electrons+b.Electrons-2, nil) - a.H[r*a.N+r] - b.H[s*b.N+s]
}

func TestFirstBondByFillingTogether(t *testing.T) {
	rng := rand.New(rand.NewPCG(4, 2))
	settled, other := 0, 0
	for range 150 {
		sa, sb := randomMolecule(rng, 2+rng.IntN(14)), randomMolecule(rng, 2+rng.IntN(14))
		a, b := sa.solve(t), sb.solve(t)
		p := approach(t, a, b)
		if p.settled {
			settled++
		} else {
			other++
		}
		for r := range a.N {
			for s := range b.N {
				want := firstBondByDefinition(a, b, r, s)
				got, err := p.FirstBond(r, s)
				if math.IsNaN(want) && err != nil {
					continue
				}
				if err != nil || !same(got, want, 1e-9) {
					t.Errorf("%s and %s, bond %d–%d: ΔE %.12f, filled together %.12f (%v)", sa.name, sb.name, r, s, got, want, err)
				}
			}
		}
	}
	if settled < 20 || other < 20 {
		t.Errorf("%d pairs of closed shells, %d others: both routes should be tried", settled, other)
	}
}

// Exchanging the two systems changes nothing but the order of the answers.
func TestApproachIsSymmetric(t *testing.T) {
	rng := rand.New(rand.NewPCG(8, 2))
	for range 40 {
		a, b := randomMolecule(rng, 3+rng.IntN(8)).solve(t), randomMolecule(rng, 3+rng.IntN(8)).solve(t)
		p, q := approach(t, a, b), approach(t, b, a)
		bonds, turned := []FormingBond{{0, 1, 1}, {2, 0, 0.8}}, []FormingBond{{1, 0, 1}, {0, 2, 0.8}}
		g1, h1 := p.FrontierGaps()
		h2, g2 := q.FrontierGaps()
		s1, u1, err1 := p.FrontierStabilization(bonds)
		u2, s2, err2 := q.FrontierStabilization(turned)
		v1, w1, _ := p.OrbitalStabilization(bonds)
		w2, v2, _ := q.OrbitalStabilization(turned)
		e1, _ := p.FirstBond(0, 1)
		e2, _ := q.FirstBond(1, 0)
		if err1 != nil || err2 != nil {
			t.Fatal(err1, err2)
		}
		for _, c := range [][2]float64{{g1, g2}, {h1, h2}, {s1, s2}, {u1, u2}, {v1, v2}, {w1, w2}, {e1, e2}} {
			if !same(c[0], c[1], 1e-9*(1+math.Abs(c[0]))) {
				t.Errorf("%v one way round, %v the other", c[0], c[1])
			}
		}
	}
}

// Butadiene with ethene: gaps 1.618 both ways, coefficients 0.6015 and 0.7071, so that
// each direction gains 2 (2 × 0.6015 × 0.7071)² / 1.618 = 0.8944 (worked by hand from
// the levels and coefficients of Streitwieser 1961).
func TestFrontierStabilizationByHand(t *testing.T) {
	p := approach(t, path(4).solve(t), path(2).solve(t))
	a, b := p.FrontierGaps()
	if !same(a, 1.618034, 1e-6) || !same(b, 1.618034, 1e-6) {
		t.Errorf("gaps %.6f and %.6f", a, b)
	}
	a, b, err := p.FrontierStabilization([]FormingBond{{0, 0, 1}, {3, 1, 1}})
	if err != nil || !same(a, 0.894427, 1e-6) || !same(b, 0.894427, 1e-6) {
		t.Errorf("stabilization %.6f and %.6f (%v)", a, b, err)
	}
	// Forbidden by symmetry: ethene with ethene gains nothing at its frontier.
	p = approach(t, path(2).solve(t), path(2).solve(t))
	if a, b, _ = p.FrontierStabilization([]FormingBond{{0, 0, 1}, {1, 1, 1}}); a > 1e-20 || b > 1e-20 {
		t.Errorf("two ethenes gain %g and %g", a, b)
	}
}

// A first-order check by energy: for a weak link the second-order sum is the gain found
// by solving the two systems linked.
func TestOrbitalStabilizationAgainstLinkedSystems(t *testing.T) {
	rng := rand.New(rand.NewPCG(6, 6))
	checked := 0
	for range 200 {
		sa, sb := randomMolecule(rng, 2+rng.IntN(8)), randomMolecule(rng, 2+rng.IntN(8))
		a, b := sa.solve(t), sb.solve(t)
		p := approach(t, a, b)
		g, h := p.FrontierGaps()
		if !p.settled || g < 0.2 || h < 0.2 {
			continue
		}
		const k = 1e-3
		i, j := rng.IntN(a.N), rng.IntN(b.N)
		both := together(sa, sb)
		both.h[i*both.n+a.N+j], both.h[(a.N+j)*both.n+i] = k, k
		gain := both.solve(t).Energy - a.Energy - b.Energy
		x, y, err := p.OrbitalStabilization([]FormingBond{{i, j, k}})
		if err != nil {
			t.Fatal(err)
		}
		if math.Abs(x+y-gain) > 1e-3*math.Abs(gain)+1e-12 {
			t.Errorf("%s and %s: second order %.6e, linked %.6e", sa.name, sb.name, x+y, gain)
		}
		checked++
	}
	if checked < 20 {
		t.Errorf("only %d pairs checked", checked)
	}
}

func TestFirstBondGradientAgainstDisplacement(t *testing.T) {
	rng := rand.New(rand.NewPCG(9, 2))
	settled, other := 0, 0
	for range 120 {
		sa, sb := randomMolecule(rng, 3+rng.IntN(7)), randomMolecule(rng, 3+rng.IntN(7))
		a, b := sa.solve(t), sb.solve(t)
		p := approach(t, a, b)
		r, s := rng.IntN(a.N), rng.IntN(b.N)
		if !clearOccupations(a, b, r, s) {
			continue
		}
		ga, gb, err := p.FirstBondGradient(r, s, sa.links(), sb.links(), nil, nil)
		if err != nil {
			t.Fatal(err)
		}
		if p.settled {
			settled++
		} else {
			other++
		}
		checkGradient(t, "first bond, first system", sa, ga, func(o *frontier.Orbitals) float64 { return firstBondByDefinition(o, b, r, s) })
		checkGradient(t, "first bond, second system", sb, gb, func(o *frontier.Orbitals) float64 { return firstBondByDefinition(a, o, r, s) })
	}
	if settled < 10 || other < 10 {
		t.Errorf("%d gradients of closed shells, %d others", settled, other)
	}
	// Within one system.
	s := honeycomb(1, 2)
	o := s.solve(t)
	var w Workspace
	if err := w.Reset(o); err != nil {
		t.Fatal(err)
	}
	g, _, err := NewApproach(&w, &w).FirstBondGradient(1, 4, s.links(), nil, nil, nil)
	if err != nil {
		t.Fatal(err)
	}
	checkGradient(t, "bond localization", s, g, func(o *frontier.Orbitals) float64 {
		var w Workspace
		if err := w.Reset(o); err != nil {
			t.Fatal(err)
		}
		e, err := w.BondLocalization(1, 4)
		if err != nil {
			t.Fatal(err)
		}
		return e
	})
}

// clearOccupations reports that no displacement of 1e-4 changes which levels are filled.
func clearOccupations(a, b *frontier.Orbitals, r, s int) bool {
	var da, db residueSolver
	da.solve(a, r, -1, false)
	db.solve(b, s, -1, false)
	x := append(append([]float64(nil), da.x...), db.x...)
	sort.Sort(sort.Reverse(sort.Float64Slice(x)))
	clear := func(x []float64, electrons float64) bool {
		n := make([]float64, len(x))
		if math.IsNaN(fillLevels(x, electrons, n)) {
			return false
		}
		for j := 1; j < len(x); j++ {
			if (n[j] != n[j-1] || n[j] != 0 && n[j] != 2) && x[j-1]-x[j] < 0.01 {
				return false
			}
		}
		return true
	}
	return clear(a.X, a.Electrons) && clear(b.X, b.Electrons) && clear(x, a.Electrons+b.Electrons-2)
}
