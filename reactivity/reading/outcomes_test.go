package reading

import (
	"encoding/csv"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// rows reads one of the outcome files; see testdata/outcomes/README.md for sources.
func rows(t testing.TB, name string) []map[string]string {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "..", "testdata", "outcomes", name))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	all, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var list []map[string]string
	for _, rec := range all[1:] {
		m := map[string]string{}
		for i, k := range all[0] {
			m[k] = rec[i]
		}
		list = append(list, m)
	}
	return list
}

func read(t testing.TB, smiles string) *Reading {
	t.Helper()
	rxn, err := molecule.ParseReaction(smiles)
	if err != nil {
		t.Fatalf("%s: %v", smiles, err)
	}
	r, err := Read(rxn, "", Stated{})
	if err != nil {
		t.Errorf("%s: refused: %v", smiles, err)
		return nil
	}
	return r
}

// share is the least share of rows whose kind and intended site must be found.
const share = 0.98

func TestElectrophilicOutcomes(t *testing.T) {
	siteRows(t, "electrophilic_substitution.csv", terms.ElectrophilicSubstitution, func(r map[string]string) string {
		return r["substrate_smiles"] + ">" + r["reagents"] + ">" + r["product_smiles"]
	})
}

func TestNucleophilicOutcomes(t *testing.T) {
	siteRows(t, "nucleophilic_substitution.csv", terms.NucleophilicSubstitution, func(r map[string]string) string {
		return r["substrate_smiles"] + "." + r["nucleophile_smiles"] + ">" + r["reagents"] + ">" + r["product_smiles"]
	})
}

func siteRows(t *testing.T, file string, event terms.Event, reaction func(map[string]string) string) {
	all := rows(t, file)
	right := 0
	for _, row := range all {
		r := read(t, reaction(row))
		if r == nil {
			continue
		}
		ok := r.Event == event && r.Substrate != nil
		if ok {
			want := map[int]bool{}
			for _, s := range strings.Fields(row["equivalent_site_indices"]) {
				i, _ := strconv.Atoi(s)
				want[i] = true
			}
			ok = false
			for _, s := range r.Sites {
				ok = ok || want[s]
			}
		}
		if ok {
			right++
		} else {
			t.Logf("%s: read as %s %s (%s) sites %v, want %s: %s", row["id"], r.Kind, r.Event, r.Nearest, r.Sites, row["equivalent_site_indices"], reaction(row))
		}
	}
	t.Logf("%s: %d of %d rows, %.4f", file, right, len(all), float64(right)/float64(len(all)))
	if float64(right) < share*float64(len(all)) {
		t.Errorf("%s: kind and site right in %d of %d rows, want %.2f", file, right, len(all), share)
	}
}

func TestCycloadditionOutcomes(t *testing.T) {
	for _, file := range []string{"diels_alder.csv", "dipolar_and_other_cycloaddition.csv"} {
		all := rows(t, file)
		right := 0
		for _, row := range all {
			s := row["component1_smiles"] + "." + row["component2_smiles"] + ">" + row["reagents"] + ">" + row["product_smiles"]
			r := read(t, s)
			if r != nil && r.Kind == terms.Cycloaddition {
				right++
			} else if r != nil {
				t.Logf("%s: read as %s (%s): %s", row["id"], r.Kind, r.Nearest, s)
			}
		}
		t.Logf("%s: %d of %d rows, %.4f", file, right, len(all), float64(right)/float64(len(all)))
		if float64(right) < share*float64(len(all)) {
			t.Errorf("%s: %d of %d rows read as cycloaddition, want %.2f", file, right, len(all), share)
		}
	}
}

// Steps of other kinds: at most 2 % judged as if the model covered them, at most 2 %
// refused, and at least 80 % given the right name.
func TestOtherSteps(t *testing.T) {
	all := rows(t, "other_steps.csv")
	judged, named := 0, 0
	wrong := map[string]int{}
	for _, row := range all {
		r := read(t, row["reaction"])
		if r == nil {
			continue
		}
		if r.Kind != terms.OtherStep {
			judged++
			t.Logf("%s %s: judged as %s: %s", row["id"], row["step"], r.Kind, row["reaction"])
			continue
		}
		if r.Nearest == row["step"] {
			named++
		} else {
			wrong[row["step"]]++
			t.Logf("%s %s: named %q: %s", row["id"], row["step"], r.Nearest, row["reaction"])
		}
	}
	n := float64(len(all))
	t.Logf("judged as covered %d, named right %d of %d (%.3f); wrong %v", judged, named, len(all), float64(named)/n, wrong)
	if float64(judged) > 0.02*n {
		t.Errorf("%d of %d steps of other kinds are judged as if the model covered them", judged, len(all))
	}
	if float64(named) < 0.80*n {
		t.Errorf("%d of %d steps of other kinds are named right, want 0.80", named, len(all))
	}
}
