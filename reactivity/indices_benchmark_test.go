package reactivity

import (
	"slices"
	"testing"
	"time"

	"gonum.org/v1/gonum/mat"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// eigen is the yardstick of the benchmarks: one mat.EigenSym with vectors.
func eigen(b *testing.B, n int, h []float64) func() {
	m := mat.NewSymDense(n, append([]float64(nil), h...))
	return func() {
		var e mat.EigenSym
		if !e.Factorize(m, true) {
			b.Fatal("no convergence")
		}
	}
}

// ratio times work and the yardstick in turn, so that both meet the same load, and
// reports the medians' ratio beside the usual figures, which cover both.
func ratio(b *testing.B, yardstick, work func()) {
	var y, w []time.Duration
	yardstick()
	work()
	for b.Loop() {
		t := time.Now()
		yardstick()
		u := time.Now()
		work()
		y, w = append(y, u.Sub(t)), append(w, time.Since(u))
	}
	slices.Sort(y)
	slices.Sort(w)
	median := func(d []time.Duration) float64 { return float64(d[len(d)/2]) }
	b.ReportMetric(median(w)/median(y), "×EigenSym")
	b.ReportMetric(median(w)/1e3, "µs/work")
}

// benzopyrene is benzo[a]pyrene, 20 π centres.
const benzopyrene = "c1ccc2c(c1)cc1ccc3cccc4ccc2c1c34"

// BenchmarkLocalization200: all three localization energies of all centres of a cut of
// the honeycomb lattice with 200 centres, its solution given.
func BenchmarkLocalization200(b *testing.B) {
	s := honeycomb(9, 9)
	o := s.solve(b)
	var w Workspace
	ratio(b, eigen(b, s.n, s.h), func() {
		if err := w.Reset(o); err != nil {
			b.Fatal(err)
		}
		w.Localization()
	})
}

// BenchmarkLocalization20 is the like for 20 centres.
func BenchmarkLocalization20(b *testing.B) {
	_, sol := solved(b, benzopyrene)
	o := sol.Systems[0]
	var w Workspace
	ratio(b, eigen(b, o.N, o.H), func() {
		if err := w.Reset(o); err != nil {
			b.Fatal(err)
		}
		w.Localization()
	})
}

// BenchmarkSites20 is the whole computation behind the indices of one molecule of 20 π
// atoms once it is read and perceived: matrix, orbitals, every index of every atom.
func BenchmarkSites20(b *testing.B) {
	_, sol := solved(b, benzopyrene)
	o, set, pi := sol.Systems[0], sol.Set, sol.Pi
	var w Workspace
	ratio(b, eigen(b, o.N, o.H), func() {
		sol, err := set.Solve(pi)
		if err != nil {
			b.Fatal(err)
		}
		if _, err := evaluate(sol, SmoothingDecay, &w); err != nil {
			b.Fatal(err)
		}
	})
}

// BenchmarkJudge20 adds perception, candidates, chances and the ranking for every event,
// without limits.
func BenchmarkJudge20(b *testing.B) {
	m, err := molecule.ParseSMILES(benzopyrene)
	if err != nil {
		b.Fatal(err)
	}
	_, sol := solved(b, benzopyrene)
	o := sol.Systems[0]
	ratio(b, eigen(b, o.N, o.H), func() {
		if _, err := Judge(m, Conditions{NoLimits: true}, terms.Towards); err != nil {
			b.Fatal(err)
		}
	})
}

// BenchmarkFirstBonds: ΔE of all 400 pairs of centres of two molecules of 20 π atoms.
func BenchmarkFirstBonds(b *testing.B) {
	m, sol := solved(b, benzopyrene)
	o := sol.Systems[0]
	ratio(b, eigen(b, o.N, o.H), func() {
		four := reacting{side: pairSideOf(m, sol.Pi, sol)}
		partner := reacting{side: pairSideOf(m, sol.Pi, sol)}
		for r := range o.N {
			for s := range o.N {
				if _, err := firstBond(&four, r, &partner, s); err != nil {
					b.Fatal(err)
				}
			}
		}
	})
}

// BenchmarkLocalizationGradient20: the derivatives of one localization energy.
func BenchmarkLocalizationGradient20(b *testing.B) {
	_, sol := solved(b, benzopyrene)
	o, links := sol.Systems[0], sol.Matrices[0].Links
	var w Workspace
	if err := w.Reset(o); err != nil {
		b.Fatal(err)
	}
	var dst []float64
	var err error
	ratio(b, eigen(b, o.N, o.H), func() {
		if dst, err = w.LocalizationGradient(6, terms.Electrophile, links, dst); err != nil {
			b.Fatal(err)
		}
	})
}
