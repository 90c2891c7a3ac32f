package symmetry

import (
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"gonum.org/v1/gonum/mat"

	"lobecast/frontier"
)

// chainClosure is the ring of an electrocyclic closure of n orbitals with the given
// electrons, the last link of the given sign.
func chainClosure(n, electrons int, sign float64) *Cycle {
	o := make([]Orbital, n)
	left := electrons
	for i := range o {
		o[i].Electrons = min(left, 1)
		left -= o[i].Electrons
	}
	for i := 0; left > 0; i++ {
		o[i].Electrons++
		left--
	}
	c := newCycle(o)
	for i := 0; i < n-1; i++ {
		p := piStrength
		if i == 0 || i == n-2 {
			p = 0
		}
		c.set(i, piStrength, p)
	}
	c.set(n-1, 0, sigmaStrength)
	c.Links[n-1].Sign = sign
	return c
}

// Electrocyclic closures of three to fourteen orbitals, neutral and charged: thermal
// closure is conrotatory for 4r electrons and disrotatory for 4q + 2, and light turns
// it round (Woodward, Hoffmann, J. Am. Chem. Soc. 1965, 87, 395).
func TestCorrelationOfClosures(t *testing.T) {
	for n := 3; n <= 14; n++ {
		for e := n - 1; e <= n+1; e++ {
			if e%2 == 1 {
				continue
			}
			for _, sign := range []float64{1, -1} {
				c := chainClosure(n, e, sign)
				r, err := c.Correlate()
				if err != nil {
					t.Errorf("%d orbitals, %d electrons, sign %g: %v", n, e, sign, err)
					continue
				}
				disrotatory := sign > 0
				want := verdict((e%4 == 2) == disrotatory)
				light := verdict((e%4 == 2) != disrotatory)
				if r.Thermal != want || r.Photochemical != light {
					t.Errorf("%d orbitals, %d electrons, sign %g: %s, %s (crossings %d); want %s, %s", n, e, sign, r.Thermal, r.Photochemical, r.Crossings, want, light)
				}
				if r.Crossings > 1 {
					t.Errorf("%d orbitals, %d electrons, sign %g: %d crossings", n, e, sign, r.Crossings)
				}
			}
		}
	}
}

// drawnCycles lists the rings of orbitals of all published cases that are drawn.
func drawnCycles(t *testing.T, each func(name string, p *Process, c *Cycle)) {
	for i, r := range publishedRows(t) {
		if r["process"] == "" {
			continue
		}
		a, err := run(t, r["process"], readAll(t, r["smiles"]))
		if err != nil {
			t.Fatalf("row %d: %v", i+1, err)
		}
		for k := range a.Processes {
			p := &a.Processes[k]
			each(r["name"]+", "+p.Mode, p, p.cycle)
		}
	}
}

// The numerical derivation is no restatement of the count: whatever single component
// the count is given wrong, the two disagree, and no verdict is given.
func TestWrongComponentMakesDisagreement(t *testing.T) {
	wrong := 0
	drawnCycles(t, func(name string, p *Process, c *Cycle) {
		if !p.Agree || p.Thermal == NoVerdict {
			t.Errorf("%s: %s", name, p.Agreement)
		}
		for k := range p.Parts {
			for _, change := range []func(*Component){
				func(x *Component) { x.Antara = !x.Antara },
				func(x *Component) { x.Electrons += 2 },
				func(x *Component) { x.Electrons += 4 },
			} {
				bad := &Process{Parts: slices.Clone(p.Parts)}
				change(&bad.Parts[k])
				bad.judge(p.Correlation)
				if bad.Agree || bad.Thermal != NoVerdict || bad.Photochemical != NoVerdict || !strings.Contains(bad.Agreement, "disagree") {
					t.Errorf("%s: the count fed %s is not contradicted: %s, %s, %q", name, bad.Parts, bad.Thermal, bad.Photochemical, bad.Agreement)
				}
				wrong++
			}
		}
		// The other way about: the matrices fed the wrong sign.
		r, err := c.withSign(-c.Links[len(c.Links)-1].Sign).Correlate()
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		bad := &Process{Parts: p.Parts}
		bad.judge(r)
		if bad.Agree || bad.Thermal != NoVerdict {
			t.Errorf("%s: matrices of the opposite mode are not contradicted", name)
		}
	})
	if wrong < 500 {
		t.Errorf("only %d wrong components were tried", wrong)
	}
}

// The verdict does not hang on the size of the resonance integrals: those of reactant
// and product are drawn at random between 0.5 and 2 times the ones in use.
func TestCorrelationDoesNotHangOnStrengths(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 2))
	drawnCycles(t, func(name string, p *Process, c *Cycle) {
		for range 3 {
			d := c.withSign(c.Links[len(c.Links)-1].Sign)
			d.solved = nil
			for i := range d.Links {
				d.Links[i].Reactant *= 0.5 + 1.5*random.Float64()
				d.Links[i].Product *= 0.5 + 1.5*random.Float64()
			}
			r, err := d.Correlate()
			if err != nil {
				t.Errorf("%s: %v", name, err)
				continue
			}
			if r.Thermal != p.Numerical[0] || r.Photochemical != p.Numerical[1] {
				t.Errorf("%s: %s, %s with other strengths, %s, %s with the ones in use", name, r.Thermal, r.Photochemical, p.Numerical[0], p.Numerical[1])
			}
		}
	})
}

// A third way for rings of even length: they are alternant, so that occupied and
// empty levels can only meet at x = 0, and the number of such crossings on any path
// is odd exactly where the determinant of the block that joins starred with unstarred
// orbitals changes sign between reactant and product (pairing theorem, Coulson,
// Rushbrooke, Proc. Camb. Phil. Soc. 1940, 36, 193). No path is followed.
func TestCrossingsByDeterminant(t *testing.T) {
	tried := 0
	drawnCycles(t, func(name string, p *Process, c *Cycle) {
		n := len(c.Orbitals)
		if n%2 == 1 || c.electrons() != n {
			return
		}
		sign := func(size func(Link) float64) float64 {
			b := mat.NewDense(n/2, n/2, nil)
			for _, l := range c.Links {
				i, j := l.I, l.J
				if i%2 == 1 {
					i, j = j, i
				}
				b.Set(i/2, j/2, b.At(i/2, j/2)+l.Sign*size(l))
			}
			return mat.Det(b)
		}
		before := sign(func(l Link) float64 { return l.Reactant })
		after := sign(func(l Link) float64 { return l.Product })
		if math.Abs(before) < 1e-9 || math.Abs(after) < 1e-9 {
			t.Fatalf("%s: reactant or product is no closed shell", name)
		}
		tried++
		if crossing := before*after < 0; crossing != (p.Correlation.Crossings%2 == 1) {
			t.Errorf("%s: the determinant says crossing %v, %d were followed", name, crossing, p.Correlation.Crossings)
		}
	})
	if tried < 100 {
		t.Errorf("only %d rings were tried", tried)
	}
}

// For charged chains, whose rings are odd: the axis or mirror plane that a closure
// keeps sorts the levels, and each kind can be filled at both ends of the path
// (Longuet-Higgins, Abrahamson 1965). Exchanging the orbitals of the chain end for end
// leaves the matrices of either mode as they are; the closure is allowed where
// reactant and product hold as many electrons in each kind of level.
func TestChargedClosuresBySymmetryBlocks(t *testing.T) {
	for n := 3; n <= 11; n += 2 {
		for _, e := range []int{n - 1, n + 1} {
			for _, sign := range []float64{1, -1} {
				c := chainClosure(n, e, sign)
				count := func(product bool) (even int) {
					h := make([]float64, n*n)
					for _, l := range c.Links {
						v := l.Sign * l.Reactant
						if product {
							v = l.Sign * l.Product
						}
						h[l.I*n+l.J], h[l.J*n+l.I] = v, v
					}
					// A small even perturbation parts degenerate levels of different kind.
					h[(n/2)*n+n/2] = 1e-3
					o, err := frontier.Solve(n, h, float64(e))
					if err != nil {
						t.Fatal(err)
					}
					for j := 0; j < e/2; j++ {
						character := 0.0
						for r := 0; r < n; r++ {
							character += o.Coefficient(r, j) * o.Coefficient(n-1-r, j)
						}
						if math.Abs(math.Abs(character)-1) > 1e-6 {
							t.Fatalf("level %d of %d orbitals has no symmetry: %g", j, n, character)
						}
						if character > 0 {
							even++
						}
					}
					return even
				}
				r, err := c.Correlate()
				if err != nil {
					t.Fatal(err)
				}
				if allowed := count(false) == count(true); allowed != (r.Thermal == Allowed) {
					t.Errorf("%d orbitals, %d electrons, sign %g: symmetry blocks say allowed %v, the path %s", n, e, sign, allowed, r.Thermal)
				}
			}
		}
	}
}
