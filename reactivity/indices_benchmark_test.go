package reactivity

import (
	"testing"

	"gonum.org/v1/gonum/mat"

	"lobecast/frontier"
)

// symmetric is the system's matrix for mat.EigenSym, the yardstick of the benchmarks.
func (s system) symmetric() *mat.SymDense {
	return mat.NewSymDense(s.n, append([]float64(nil), s.h...))
}

func benchmarkEigenSym(b *testing.B, s system) {
	m := s.symmetric()
	b.ReportAllocs()
	for b.Loop() {
		var e mat.EigenSym
		if !e.Factorize(m, true) {
			b.Fatal("no convergence")
		}
	}
}

func benchmarkLocalization(b *testing.B, s system) {
	o := s.solve(b)
	var w Workspace
	b.ReportAllocs()
	for b.Loop() {
		if err := w.Reset(o); err != nil {
			b.Fatal(err)
		}
		w.Localization()
	}
}

// A honeycomb cut of 20 centres (five linearly fused six-rings would have 22), and of 200.
var (
	twenty     = honeycomb(1, 4)
	twoHundred = honeycomb(9, 9)
)

func BenchmarkEigenSym20(b *testing.B)      { benchmarkEigenSym(b, twenty) }
func BenchmarkEigenSym200(b *testing.B)     { benchmarkEigenSym(b, twoHundred) }
func BenchmarkLocalization20(b *testing.B)  { benchmarkLocalization(b, twenty) }
func BenchmarkLocalization200(b *testing.B) { benchmarkLocalization(b, twoHundred) }

// BenchmarkSites20 is everything behind the ranking of sites but reading, perception
// and printing: the solution, densities, all indices of all centres.
func BenchmarkSites20(b *testing.B) {
	s := twenty
	var w Workspace
	b.ReportAllocs()
	for b.Loop() {
		o, err := frontier.Solve(s.n, s.h, s.electrons)
		if err != nil {
			b.Fatal(err)
		}
		if err := w.Reset(o); err != nil {
			b.Fatal(err)
		}
		w.Localization()
		o.Density()
		FrontierDensities(o)
		SmoothedDensities([]*frontier.Orbitals{o}, 2)
		Superdelocalizabilities(o)
		ReactivityNumbers(o)
	}
}
