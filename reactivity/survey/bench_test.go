package survey

import (
	"context"
	"encoding/csv"
	"flag"
	"fmt"
	"io"
	"math/rand/v2"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"gonum.org/v1/gonum/mat"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/reactivity/reading"
)

// outcomeReactions are the published outcomes as reaction SMILES, one a line; see
// testdata/outcomes/README.md for their sources.
func outcomeReactions(tb testing.TB) string {
	tb.Helper()
	var b strings.Builder
	for _, f := range []struct {
		file                      string
		reactants                 []string
		agents, product, reaction string
	}{
		{"electrophilic_substitution.csv", []string{"substrate_smiles"}, "reagents", "product_smiles", ""},
		{"nucleophilic_substitution.csv", []string{"substrate_smiles", "nucleophile_smiles"}, "reagents", "product_smiles", ""},
		{"diels_alder.csv", []string{"component1_smiles", "component2_smiles"}, "reagents", "product_smiles", ""},
		{"dipolar_and_other_cycloaddition.csv", []string{"component1_smiles", "component2_smiles"}, "reagents", "product_smiles", ""},
		{"other_steps.csv", nil, "", "", "reaction"},
	} {
		file, err := os.Open(filepath.Join("..", "..", "testdata", "outcomes", f.file))
		if err != nil {
			tb.Fatal(err)
		}
		rows, err := csv.NewReader(file).ReadAll()
		file.Close()
		if err != nil {
			tb.Fatal(err)
		}
		at := map[string]int{}
		for i, k := range rows[0] {
			at[k] = i
		}
		for _, r := range rows[1:] {
			if f.reaction != "" {
				fmt.Fprintf(&b, "%s %s\n", r[at[f.reaction]], r[0])
				continue
			}
			var parts []string
			for _, c := range f.reactants {
				parts = append(parts, r[at[c]])
			}
			fmt.Fprintf(&b, "%s>%s>%s %s\n", strings.Join(parts, "."), r[at[f.agents]], r[at[f.product]], r[0])
		}
	}
	return b.String()
}

// surveyLines is the number of lines that the benchmarks stream: the outcomes over and
// over, each line renumbered at random.
var surveyLines = flag.Int("lines", 4000, "lines of the survey benchmarks")

// stream hands out renumbered lines without keeping them, so that memory shows the
// survey's own.
type stream struct {
	lines []string
	left  int
	at    int
	rng   *rand.Rand
	buf   []byte
}

func newStream(tb testing.TB, n int) *stream {
	return &stream{
		lines: strings.Split(strings.TrimSpace(outcomeReactions(tb)), "\n"), left: n,
		rng: rand.New(rand.NewPCG(1, 1)),
	}
}

func (s *stream) Read(p []byte) (int, error) {
	for len(s.buf) == 0 {
		if s.left == 0 {
			return 0, io.EOF
		}
		s.left--
		line, err := renumberedReaction(s.lines[s.at%len(s.lines)], s.rng)
		s.at++
		if err != nil {
			return 0, err
		}
		s.buf = append(append(s.buf, line...), '\n')
	}
	n := copy(p, s.buf)
	s.buf = s.buf[n:]
	return n, nil
}

// prepared is a file of n renumbered lines, written before the clock starts.
func prepared(b *testing.B, n int) Input {
	b.Helper()
	name := filepath.Join(b.TempDir(), "in.rsmi")
	f, err := os.Create(name)
	if err != nil {
		b.Fatal(err)
	}
	if _, err := io.Copy(f, newStream(b, n)); err != nil {
		b.Fatal(err)
	}
	if err := f.Close(); err != nil {
		b.Fatal(err)
	}
	return Input{Name: "in.rsmi", Open: func() (io.ReadCloser, error) { return os.Open(name) }}
}

func benchmarkSurvey(b *testing.B, opt Options) {
	in := prepared(b, *surveyLines)
	opt.CSV, opt.Set = true, reactivity.DefaultSet()
	defer SetCollection()() // as the command does
	b.ReportAllocs()
	for b.Loop() {
		if _, err := Run(context.Background(), []Input{in}, io.Discard, Mark{}, true, opt, nil); err != nil {
			b.Fatal(err)
		}
	}
	b.ReportMetric(float64(*surveyLines)*float64(b.N)/b.Elapsed().Seconds(), "lines/s")
}

func BenchmarkSurvey(b *testing.B)         { benchmarkSurvey(b, Options{}) }
func BenchmarkSurveyOneCore(b *testing.B)  { benchmarkSurvey(b, Options{Workers: 1}) }
func BenchmarkSurveyNoLimits(b *testing.B) { benchmarkSurvey(b, Options{NoLimits: true}) }
func BenchmarkSurveyNoLimitsOneCore(b *testing.B) {
	benchmarkSurvey(b, Options{NoLimits: true, Workers: 1})
}

// BenchmarkEigenSym diagonalizes the matrices of the molecules that the survey judges,
// once each: the measure beside which docs/survey.md states the survey's rate.
func BenchmarkEigenSym(b *testing.B) {
	set := reactivity.DefaultSet()
	var matrices []*mat.SymDense
	lines := 0
	for _, line := range strings.Split(strings.TrimSpace(outcomeReactions(b)), "\n") {
		rxn, err := molecule.ParseReaction(line)
		if err != nil {
			b.Fatal(err)
		}
		x, err := reading.Read(rxn, "", reading.Stated{})
		if err != nil || x.Kind == terms.OtherStep {
			lines++
			continue
		}
		lines++
		for _, m := range []*molecule.Molecule{x.Substrate, x.Partner} {
			if m == nil || x.Kind != terms.Cycloaddition && m == x.Partner {
				continue
			}
			pi, err := frontier.Perceive(m, frontier.Options{})
			if err != nil {
				continue
			}
			sol, err := set.Solve(pi)
			if err != nil {
				continue
			}
			for _, o := range sol.Systems {
				matrices = append(matrices, mat.NewSymDense(o.N, append([]float64(nil), o.H...)))
			}
		}
	}
	b.ResetTimer()
	for b.Loop() {
		for _, h := range matrices {
			var es mat.EigenSym
			if !es.Factorize(h, true) {
				b.Fatal("no convergence")
			}
		}
	}
	b.ReportMetric(float64(lines)*float64(b.N)/b.Elapsed().Seconds(), "lines/s")
}
