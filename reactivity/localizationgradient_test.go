package reactivity

import (
	"math"
	"math/rand/v2"
	"testing"

	"lobecast/frontier"
	"lobecast/frontier/terms"
)

// links lists the links of a system, from its matrix.
func (s system) links() []frontier.Link {
	var out []frontier.Link
	for i := range s.n {
		for j := i + 1; j < s.n; j++ {
			if s.h[i*s.n+j] != 0 {
				out = append(out, frontier.Link{I: i, J: j, Cos: 1})
			}
		}
	}
	return out
}

// displaced changes one variable of the gradient layout by d.
func (s system) displaced(links []frontier.Link, variable int, d float64) system {
	c := s
	c.h = append([]float64(nil), s.h...)
	if variable < s.n {
		c.h[variable*s.n+variable] += d
		return c
	}
	l := links[variable-s.n]
	c.h[l.I*s.n+l.J] += d
	c.h[l.J*s.n+l.I] += d
	return c
}

// checkGradient compares a gradient with central differences of step d, whose own error
// is of the order d².
func checkGradient(t *testing.T, what string, s system, gradient []float64, value func(*frontier.Orbitals) float64) {
	t.Helper()
	const tolerance = 2e-5 // relative and absolute
	const d = 1e-4
	links := s.links()
	if len(gradient) != GradientLength(s.n, len(links)) {
		t.Fatalf("%s, %s: %d derivatives", s.name, what, len(gradient))
	}
	for i, got := range gradient {
		up := value(s.displaced(links, i, d).solve(t))
		down := value(s.displaced(links, i, -d).solve(t))
		want := (up - down) / (2 * d)
		if math.IsNaN(got) || math.Abs(got-want) > tolerance*(1+math.Abs(want)) {
			t.Errorf("%s, %s, variable %d: derivative %.8f, by displacement %.8f", s.name, what, i, got, want)
		}
	}
}

// benzeneLike systems whose shells, being full or nearly so, have derivatives.
func differentiable() []system {
	rng := rand.New(rand.NewPCG(7, 5))
	out := []system{path(4), path(6), path(7), ring(6), honeycomb(1, 2), honeycomb(2, 2), path(2)}
	for len(out) < 40 {
		s := randomMolecule(rng, 3+rng.IntN(14))
		out = append(out, s)
	}
	return out
}

// gaps is the smallest distance between a frontier level of o, or of a residue near the
// number of electrons it may hold, and the next level: where it is small a displacement
// crosses levels and differences say nothing.
func gaps(o *frontier.Orbitals, r int, electrons float64) float64 {
	var d residueSolver
	d.solve(o, r, -1, false)
	smallest := math.Inf(1)
	look := func(x []float64, electrons float64) {
		occupation := make([]float64, len(x))
		fillLevels(x, electrons, occupation)
		for j := 1; j < len(x); j++ {
			if math.Abs(occupation[j-1]-occupation[j]) > 1e-9 {
				smallest = math.Min(smallest, x[j-1]-x[j])
			} else if occupation[j] > 1e-9 && occupation[j] < 2-1e-9 {
				smallest = 0
			}
		}
	}
	look(o.X, o.Electrons)
	look(d.x, electrons)
	return smallest
}

func TestLocalizationGradientAgainstDisplacement(t *testing.T) {
	var w Workspace
	line, checked := 0, 0
	for _, s := range differentiable() {
		o := s.solve(t)
		links := s.links()
		for r := range s.n {
			for i, toward := range terms.Towards {
				change := []float64{-2, 0, -1}[i]
				if e := o.Electrons + change; e < 0 || e > 2*float64(s.n-1) || gaps(o, r, e) < 0.02 {
					continue
				}
				if err := w.Reset(o); err != nil {
					t.Fatal(err)
				}
				g, err := w.LocalizationGradient(r, toward, links, nil)
				if err != nil {
					t.Fatal(err)
				}
				g = append([]float64(nil), g...)
				checkGradient(t, string(toward), s, g, func(o *frontier.Orbitals) float64 {
					l, err := LocalizationEnergies(o)
					if err != nil {
						t.Fatal(err)
					}
					return [][]float64{l.Electrophile, l.Nucleophile, l.Radical}[i][r]
				})
				checked++
				// Both routes to the residue's density matrix must agree.
				other := make([]float64, len(g))
				if _, ok := w.lineGradient(r, -1-change, links, other); ok {
					line++
					if err := w.deletionGradient(r, change, links, other); err != nil {
						t.Fatal(err)
					}
					for k := range g {
						if math.Abs(g[k]-other[k]) > 1e-9 {
							t.Errorf("%s, centre %d, %s, variable %d: integral %.12f, solved residue %.12f", s.name, r, toward, k, g[k], other[k])
						}
					}
				}
			}
		}
	}
	if line < 100 || checked < 200 {
		t.Errorf("only %d gradients checked, %d of them by the integral", checked, line)
	}
}
