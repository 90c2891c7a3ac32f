package reactivity

import (
	"strings"
	"testing"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
)

// orientationIndices are the indices by which an orientation can be chosen; larger is
// better.
var orientationIndices = []struct {
	name string
	of   func(p *PairJudgement, ad *Adduct) float64
}{
	{"ΔE of the first bond", func(_ *PairJudgement, a *Adduct) float64 { return -a.DeltaE }},
	{"ΔE, sum over both bonds", func(_ *PairJudgement, a *Adduct) float64 { return -a.FirstBonds[0] - a.FirstBonds[1] }},
	{"HOMO(diene, dipole)–LUMO(partner) product over gap", func(_ *PairJudgement, a *Adduct) float64 { return a.Normal }},
	{"HOMO(partner)–LUMO(diene, dipole) product over gap", func(_ *PairJudgement, a *Adduct) float64 { return a.Inverse }},
	{"product over gap, pair of smaller gap", func(p *PairJudgement, a *Adduct) float64 {
		if p.JoiningOf(a).Gaps.inverseDominates() {
			return a.Inverse
		}
		return a.Normal
	}},
	{"product over gap, both directions", func(_ *PairJudgement, a *Adduct) float64 { return a.Normal + a.Inverse }},
	{"charges at the new bonds", func(_ *PairJudgement, a *Adduct) float64 { return a.Charges }},
}

// outcomePair is a published cycloaddition with its recorded product.
type outcomePair struct {
	id, source string
	a, b       *molecule.Molecule
	product    *molecule.Molecule
}

func outcomePairs(t *testing.T, file string) []outcomePair {
	var list []outcomePair
	for _, r := range readTable(t, "../testdata/outcomes/"+file) {
		list = append(list, outcomePair{r["id"], r["source"], mustParse(t, r["component1_smiles"]), mustParse(t, r["component2_smiles"]), mustParse(t, r["product_smiles"])})
	}
	return list
}

// TestOutcomeOrientations asks of published cycloadditions (sources in the files:
// SynRXN, CC BY 4.0 and 3.0; DataSet-USPTO, MIT) whether the recorded product is among
// the adducts listed, and how often each index alone finds its orientation within the
// recorded joining, and the joining among all. A calibrated set was fitted to these
// rows, so that its lines are no test of it.
func TestOutcomeOrientations(t *testing.T) {
	for _, file := range []string{"diels_alder.csv", "dipolar_and_other_cycloaddition.csv"} {
		rows := outcomePairs(t, file)
		for _, name := range frontier.Sets() {
			set, err := frontier.Load(name)
			if err != nil {
				t.Fatal(err)
			}
			hits := make([]float64, len(orientationIndices))
			listed, choices, joined := 0, 0.0, 0.0
			for _, r := range rows {
				p, err := Pair(r.a, r.b, PairConditions{Set: set, NoProducts: true})
				if err != nil {
					t.Logf("%s: %v", r.id, err)
					continue
				}
				ad, ok := p.FindProduct(r.product)
				if !ok {
					t.Logf("%s: recorded product not listed (%s)", r.id, r.source)
					continue
				}
				listed++
				j := p.JoiningOf(ad)
				if j.Order == 1 {
					joined++
				}
				both := p.AdductsOf(j)
				if len(both) < 2 {
					continue
				}
				choices++
				other := both[0]
				if other == ad {
					other = both[1]
				}
				for k, index := range orientationIndices {
					d := index.of(p, ad) - index.of(p, other)
					switch {
					case d > 1e-9:
						hits[k]++
					case d > -1e-9:
						hits[k] += 0.5
					}
				}
			}
			share := float64(listed) / float64(len(rows))
			t.Logf("%s, %s: recorded product listed in %d of %d (%.4f); its joining first in %.0f (%.3f); %.0f with a choice of orientation", file, name, listed, len(rows), share, joined, joined/float64(listed), choices)
			if share < 0.97 {
				t.Errorf("%s: recorded product listed in %.4f of the rows, 0.97 wanted", file, share)
			}
			for k, index := range orientationIndices {
				low, high := wilson(hits[k], choices)
				t.Logf("  %s %6.1f of %.0f  %.3f  (%.3f–%.3f)", padded(index.name, 52), hits[k], choices, hits[k]/choices, low, high)
			}
			// The first bond was the strongest single index when the method was chosen
			// (82 % against 73 % for the HOMO–LUMO product, on open reaction data).
			if strings.HasPrefix(file, "diels") && hits[0]/choices < 0.78 {
				t.Errorf("%s: ΔE right in %.3f only", file, hits[0]/choices)
			}
		}
	}
}

func padded(s string, n int) string {
	if k := len([]rune(s)); k < n {
		s += strings.Repeat(" ", n-k)
	}
	return s
}
