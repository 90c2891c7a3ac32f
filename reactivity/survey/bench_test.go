package survey

import (
	"bytes"
	"context"
	"encoding/csv"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"lobecast/reactivity"
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

func benchmarkSurvey(b *testing.B, opt Options) {
	in := outcomeReactions(b)
	opt.CSV, opt.Set = true, reactivity.DefaultSet()
	lines := strings.Count(in, "\n")
	b.ReportAllocs()
	for b.Loop() {
		var out bytes.Buffer
		if _, err := Run(context.Background(), []Input{text("in.rsmi", in)}, &out, 0, true, opt, nil); err != nil {
			b.Fatal(err)
		}
	}
	b.ReportMetric(float64(lines)*float64(b.N)/b.Elapsed().Seconds(), "lines/s")
}

func BenchmarkSurvey(b *testing.B)         { benchmarkSurvey(b, Options{}) }
func BenchmarkSurveyNoLimits(b *testing.B) { benchmarkSurvey(b, Options{NoLimits: true}) }
func BenchmarkSurveyOneCore(b *testing.B)  { benchmarkSurvey(b, Options{Workers: 1}) }
