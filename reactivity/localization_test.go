package reactivity

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"lobecast/frontier"
)

// system is a π system given by its matrix, for tests that need no structure.
type system struct {
	name      string
	n         int
	h         []float64
	electrons float64
}

// graph builds the matrix of a hydrocarbon skeleton, h = 0 and k = 1, with one
// electron per centre.
func graph(name string, n int, edges [][2]int) system {
	s := system{name: name, n: n, h: make([]float64, n*n), electrons: float64(n)}
	for _, e := range edges {
		s.h[e[0]*n+e[1]], s.h[e[1]*n+e[0]] = 1, 1
	}
	return s
}

func ring(n int) system {
	var e [][2]int
	for i := range n {
		e = append(e, [2]int{i, (i + 1) % n})
	}
	return graph(fmt.Sprintf("ring of %d", n), n, e)
}

func path(n int) system {
	var e [][2]int
	for i := range n - 1 {
		e = append(e, [2]int{i, i + 1})
	}
	return graph(fmt.Sprintf("chain of %d", n), n, e)
}

func star(n int) system {
	var e [][2]int
	for i := 1; i < n; i++ {
		e = append(e, [2]int{0, i})
	}
	return graph(fmt.Sprintf("star of %d", n), n, e)
}

func complete(n int) system {
	var e [][2]int
	for i := range n {
		for j := range i {
			e = append(e, [2]int{j, i})
		}
	}
	return graph(fmt.Sprintf("complete graph of %d", n), n, e)
}

func hypercube(d int) system {
	var e [][2]int
	for i := range 1 << d {
		for b := range d {
			if j := i ^ 1<<b; j > i {
				e = append(e, [2]int{i, j})
			}
		}
	}
	return graph(fmt.Sprintf("hypercube of dimension %d", d), 1<<d, e)
}

func randomTree(rng *rand.Rand, n int) system {
	var e [][2]int
	for i := 1; i < n; i++ {
		e = append(e, [2]int{rng.IntN(i), i})
	}
	return graph(fmt.Sprintf("tree of %d", n), n, e)
}

// honeycomb cuts rows of fused six-rings, rows×columns of them, out of the lattice.
func honeycomb(rows, columns int) system {
	width := 2*columns + 2
	id := func(r, c int) int { return r*width + c }
	var e [][2]int
	for r := range rows + 1 {
		for c := range width - 1 {
			e = append(e, [2]int{id(r, c), id(r, c+1)})
		}
	}
	for r := range rows {
		for c := r % 2; c < width; c += 2 {
			e = append(e, [2]int{id(r, c), id(r+1, c)})
		}
	}
	return graph(fmt.Sprintf("honeycomb %d×%d", rows, columns), (rows+1)*width, e)
}

// randomMolecule is a connected graph of degree at most 3 with heteroatoms and alkyl-like
// donors: random h and k, and a random number of electrons near one per centre.
func randomMolecule(rng *rand.Rand, n int) system {
	s := randomTree(rng, n)
	s.name = fmt.Sprintf("random molecule of %d", n)
	for range n / 4 {
		i, j := rng.IntN(n), rng.IntN(n)
		if i != j {
			s.h[i*n+j], s.h[j*n+i] = 1, 1
		}
	}
	for i := range n {
		if rng.IntN(3) == 0 {
			s.h[i*n+i] = 2*rng.Float64() - 0.5
			s.electrons += float64(rng.IntN(2))
		}
		for j := range i {
			if s.h[i*n+j] != 0 {
				k := 0.4 + 0.8*rng.Float64()
				s.h[i*n+j], s.h[j*n+i] = k, k
			}
		}
	}
	s.electrons = math.Min(s.electrons+float64(rng.IntN(3)-1), float64(2*n))
	return s
}

// together puts systems side by side without a link.
func together(parts ...system) system {
	out := system{name: "together"}
	for _, p := range parts {
		out.n += p.n
		out.electrons += p.electrons
		out.name += ", " + p.name
	}
	out.h = make([]float64, out.n*out.n)
	at := 0
	for _, p := range parts {
		for i := range p.n {
			for j := range p.n {
				out.h[(at+i)*out.n+at+j] = p.h[i*p.n+j]
			}
		}
		at += p.n
	}
	return out
}

func (s system) solve(t testing.TB) *frontier.Orbitals {
	t.Helper()
	o, err := frontier.Solve(s.n, s.h, s.electrons)
	if err != nil {
		t.Fatalf("%s: %v", s.name, err)
	}
	return o
}

// stress lists the systems whose levels coincide or whose coefficients vanish, with
// every number of electrons near one per centre, and random ones.
func stress() []system {
	rng := rand.New(rand.NewPCG(2, 11))
	var base []system
	for n := 1; n <= 14; n++ {
		base = append(base, path(n))
		if n >= 3 {
			base = append(base, ring(n), star(n))
		}
		if n >= 4 && n <= 9 {
			base = append(base, complete(n))
		}
	}
	for d := 2; d <= 5; d++ {
		base = append(base, hypercube(d))
	}
	for n := 5; n <= 40; n += 5 {
		base = append(base, randomTree(rng, n))
	}
	base = append(base, honeycomb(1, 3), honeycomb(2, 3), honeycomb(4, 4),
		together(ring(6), ring(6)), together(ring(6), path(4), path(2)), together(star(4), star(4), path(1)),
		graph("five lone centres", 5, nil))
	var out []system
	for _, s := range base {
		for d := -3; d <= 3; d++ {
			if e := s.electrons + float64(d); e >= 0 && e <= float64(2*s.n) {
				c := s
				c.electrons = e
				c.name = fmt.Sprintf("%s, %g electrons", s.name, e)
				out = append(out, c)
			}
		}
	}
	for range 150 {
		out = append(out, randomMolecule(rng, 2+rng.IntN(39)))
	}
	// Coefficients that are tiny but not zero, levels that nearly coincide.
	for i, eps := range []float64{1e-3, 1e-5, 1e-7, 1e-8, 3e-9, 1e-10, 1e-12, 1e-15} {
		s := together(ring(6), ring(6))
		s.h[0*12+6], s.h[6*12+0] = eps, eps
		s.name = fmt.Sprintf("two rings linked by %g", eps)
		out = append(out, s)
		p := together(path(5), path(4+i%2))
		p.h[0*p.n+7], p.h[7*p.n+0] = eps, eps
		p.name = fmt.Sprintf("two chains linked by %g", eps)
		out = append(out, p)
	}
	return out
}

// deletion is the outside check: the residue solved anew without row and column r.
func deletion(o *frontier.Orbitals, r int) (energyE, energyN, energyR float64, levels []float64) {
	var d residueSolver
	d.solve(o, r, -1, false)
	h := o.H[r*o.N+r]
	return o.Energy - d.energy(o.Electrons-2) - h, o.Energy - d.energy(o.Electrons) - h,
		o.Energy - d.energy(o.Electrons-1) - h, d.x
}

func same(a, b, tolerance float64) bool {
	return math.IsNaN(a) && math.IsNaN(b) || math.Abs(a-b) <= tolerance
}

// Wheland's definition is deletion of the attacked centre; the one-solve route must
// give the same within 1e-9 whatever coincides or vanishes.
func TestLocalizationAgreesWithDeletion(t *testing.T) {
	var w Workspace
	worst, where, count := 0.0, "", 0
	for _, s := range stress() {
		o := s.solve(t)
		if err := w.Reset(o); err != nil {
			t.Fatal(err)
		}
		l := w.Localization()
		for r := range o.N {
			e, n, rad, levels := deletion(o, r)
			count += 3
			for _, c := range []struct {
				what      string
				got, want float64
			}{{"L^E", l.Electrophile[r], e}, {"L^N", l.Nucleophile[r], n}, {"L^R", l.Radical[r], rad}} {
				if !same(c.got, c.want, 1e-9) {
					t.Errorf("%s, centre %d: %s = %.12f, by deletion %.12f", s.name, r, c.what, c.got, c.want)
				}
				if d := math.Abs(c.got - c.want); d > worst {
					worst, where = d, s.name
				}
			}
			for k := 1; k < o.N; k++ {
				if got := w.root(w.square[r*o.N:(r+1)*o.N], k); !same(got, levels[k-1], 1e-9) {
					t.Errorf("%s, centre %d: root %d at %.12f, level of the residue %.12f", s.name, r, k, got, levels[k-1])
				}
			}
		}
	}
	t.Logf("%d localization energies, largest difference from deletion: %.1e |β| (%s)", count, worst, where)
}
