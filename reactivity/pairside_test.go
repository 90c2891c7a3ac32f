package reactivity

import (
	"math"
	"math/rand/v2"
	"sort"
	"testing"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
)

// carbonEnd makes a bare system, taken to be all carbon, one end of a joining; path are
// its centres.
func carbonEnd(o *frontier.Orbitals, role Role, path ...int) reacting {
	m, pi := &molecule.Molecule{}, &frontier.Pi{Systems: [][]int{nil}}
	for r := range o.N {
		m.Atoms = append(m.Atoms, molecule.Atom{Element: 6})
		pi.Centres = append(pi.Centres, frontier.Centre{Atom: r, Electrons: 1})
		pi.Systems[0] = append(pi.Systems[0], r)
	}
	side := pairSideOf(m, pi, &frontier.Solution{Pi: pi, Systems: []*frontier.Orbitals{o}})
	return reacting{side: side, end: &End{Role: role, Atoms: path}, centres: path}
}

func joinEnds(a, b reacting) *Joining { return &Joining{A: *a.end, B: *b.end, a: a, b: b} }

// firstBondByDefinition deletes both ends, throws all levels into one list and fills it.
func firstBondByDefinition(a, b *frontier.Orbitals, r, s int) float64 {
	var da, db residueSolver
	da.solve(a, r, -1, false)
	db.solve(b, s, -1, false)
	x := append(append([]float64(nil), da.x...), db.x...)
	sort.Sort(sort.Reverse(sort.Float64Slice(x)))
	return a.Energy + b.Energy - fillLevels(x, a.Electrons+b.Electrons-2, nil) - a.H[r*a.N+r] - b.H[s*b.N+s]
}

// settled reports two closed shells neither of which would take electrons from the other
// as they stand.
func settled(a, b *frontier.Orbitals) bool {
	for _, o := range [2]*frontier.Orbitals{a, b} {
		m := pairs(o.Electrons)
		if o.Open || m < 1 || m > o.N-1 || math.Abs(o.Electrons-2*float64(m)) > 1e-9 {
			return false
		}
	}
	ma, mb := pairs(a.Electrons), pairs(b.Electrons)
	return a.X[ma-1] >= b.X[mb] && b.X[mb-1] >= a.X[ma]
}

// The best of three ways of sharing the electrons is what filling the residues together
// gives, and never better than that where one system would ionize the other.
func TestFirstBondByFillingTogether(t *testing.T) {
	rng := rand.New(rand.NewPCG(4, 2))
	closed, other := 0, 0
	for range 150 {
		sa, sb := randomMolecule(rng, 2+rng.IntN(14)), randomMolecule(rng, 2+rng.IntN(14))
		a, b := sa.solve(t), sb.solve(t)
		exact := settled(a, b)
		if exact {
			closed++
		} else {
			other++
		}
		ra, rb := carbonEnd(a, RoleDiene), carbonEnd(b, RolePartner)
		for r := range a.N {
			for s := range b.N {
				want := firstBondByDefinition(a, b, r, s)
				got, err := firstBond(&ra, r, &rb, s)
				if math.IsNaN(want) && err != nil {
					continue
				}
				if err != nil || got < want-1e-9 || exact && !same(got, want, 1e-9) {
					t.Errorf("%s and %s, bond %d–%d: ΔE %.12f, filled together %.12f (%v)", sa.name, sb.name, r, s, got, want, err)
				}
			}
		}
	}
	if closed < 20 || other < 20 {
		t.Errorf("%d pairs of closed shells, %d others: both should be tried", closed, other)
	}
}

// Exchanging the two systems changes nothing.
func TestOrientIsSymmetric(t *testing.T) {
	rng := rand.New(rand.NewPCG(8, 2))
	for range 40 {
		a, b := randomMolecule(rng, 3+rng.IntN(8)).solve(t), randomMolecule(rng, 3+rng.IntN(8)).solve(t)
		four, partner := carbonEnd(a, RoleDiene, 0, 2), carbonEnd(b, RolePartner, 1, 0)
		p, q := joinEnds(four, partner), joinEnds(partner, four)
		x, err1 := orient(p, Orientation{Bonds: [2][2]int{{0, 1}, {2, 0}}})
		y, err2 := orient(q, Orientation{Bonds: [2][2]int{{1, 0}, {0, 2}}})
		if err1 != nil || err2 != nil {
			t.Fatal(err1, err2)
		}
		g, h := p.gapsOf(), q.gapsOf()
		for _, c := range [][2]float64{
			{g.Normal, h.Normal}, {g.Inverse, h.Inverse}, {x.Normal, y.Normal}, {x.Inverse, y.Inverse}, {x.Overlap, y.Overlap},
			{x.Charges, y.Charges}, {x.FirstBonds[0], y.FirstBonds[0]}, {x.FirstBonds[1], y.FirstBonds[1]}, {x.DeltaE, y.DeltaE},
		} {
			if c[0] != c[1] && !same(c[0], c[1], 1e-9*(1+math.Abs(c[0]))) {
				t.Errorf("%v one way round, %v the other", c[0], c[1])
			}
		}
	}
}

// Butadiene with ethene: gaps 1.618 both ways, coefficients 0.6015 and 0.7071, so that
// each direction gains 2 (2 × 0.6015 × 0.7071)² / 1.618 = 0.8944 (worked by hand from
// the levels and coefficients of Streitwieser 1961).
func TestFrontierInteractionByHand(t *testing.T) {
	ethene := path(2).solve(t)
	j := joinEnds(carbonEnd(path(4).solve(t), RoleDiene, 0, 1, 2, 3), carbonEnd(ethene, RolePartner, 0, 1))
	if g := j.gapsOf(); !same(g.Normal, 1.618034, 1e-6) || !same(g.Inverse, 1.618034, 1e-6) {
		t.Errorf("gaps %.6f and %.6f", g.Normal, g.Inverse)
	}
	ad, err := orient(j, Orientation{Bonds: [2][2]int{{0, 0}, {3, 1}}})
	if err != nil || !same(ad.Normal, 0.894427, 1e-6) || !same(ad.Inverse, 0.894427, 1e-6) {
		t.Errorf("interactions %.6f and %.6f (%v)", ad.Normal, ad.Inverse, err)
	}
	// Forbidden by symmetry: ethene with ethene gains nothing at its frontier.
	j = joinEnds(carbonEnd(ethene, RoleDiene, 0, 1), carbonEnd(ethene, RolePartner, 0, 1))
	if ad, err = orient(j, Orientation{Bonds: [2][2]int{{0, 0}, {1, 1}}}); err != nil || ad.Normal > 1e-20 || ad.Inverse > 1e-20 {
		t.Errorf("two ethenes gain %g and %g (%v)", ad.Normal, ad.Inverse, err)
	}
}

// Butadiene and acrolein: the first bond joins the diene's end to the β-carbon, and the
// diene gives the electrons.
func TestFirstBondOfAcrolein(t *testing.T) {
	// C=C–C=O with h = 1, k = 1 for O (A. Streitwieser, Molecular Orbital Theory for
	// Organic Chemists, Wiley 1961).
	acrolein := path(4)
	acrolein.h[15] = 1
	j := joinEnds(carbonEnd(path(4).solve(t), RoleDiene, 0, 1, 2, 3), carbonEnd(acrolein.solve(t), RolePartner, 0, 1))
	for s, want := range []float64{2.9085, 4.1664} {
		if e, err := firstBond(&j.a, 0, &j.b, s); err != nil || !same(e, want, 5e-5) {
			t.Errorf("first bond to C-%d: ΔE %.4f, expected %.4f (%v)", 3-s, e, want, err)
		}
	}
	if g := j.gapsOf(); !same(g.Normal, 0.9653, 5e-5) || !same(g.Inverse, 1.6180, 5e-5) {
		t.Errorf("gaps %.4f and %.4f", g.Normal, g.Inverse)
	}
}

// For one weak link the interactions of all occupied levels with all empty ones add up to
// the gain found by solving the two systems linked (the sum of L. Salem, J. Am. Chem. Soc.
// 1968, 90, 543, without its charge term).
func TestShellInteractionAgainstLinkedSystems(t *testing.T) {
	rng := rand.New(rand.NewPCG(6, 6))
	checked := 0
	for range 200 {
		sa, sb := randomMolecule(rng, 2+rng.IntN(8)), randomMolecule(rng, 2+rng.IntN(8))
		a, b := sa.solve(t), sb.solve(t)
		four, partner := carbonEnd(a, RoleDiene, 0, 1), carbonEnd(b, RolePartner, 0, 1)
		g := joinEnds(four, partner).gapsOf()
		if !settled(a, b) || g.Normal < 0.2 || g.Inverse < 0.2 {
			continue
		}
		const k = 1e-3
		i, j := rng.IntN(a.N), rng.IntN(b.N)
		both := together(sa, sb)
		both.h[i*both.n+a.N+j], both.h[(a.N+j)*both.n+i] = k, k
		gain := both.solve(t).Energy - a.Energy - b.Energy
		sum := 0.0
		for x := range a.N {
			for y := range b.N {
				if a.Occupation[x] != b.Occupation[y] {
					sum += shellInteraction(a, [2]int{x, x + 1}, b, [2]int{y, y + 1}, [2]int{i, i}, [2]int{j, j}, [2]float64{k, 0})
				}
			}
		}
		if math.Abs(sum-gain) > 1e-3*math.Abs(gain)+1e-12 {
			t.Errorf("%s and %s: second order %.6e, linked %.6e", sa.name, sb.name, sum, gain)
		}
		checked++
	}
	if checked < 20 {
		t.Errorf("only %d pairs checked", checked)
	}
}
