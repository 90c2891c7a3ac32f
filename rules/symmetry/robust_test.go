package symmetry

import (
	"encoding/csv"
	"errors"
	"os"
	"strings"
	"testing"
	"time"

	"lobecast/frontier/molecule"
)

// Every twentieth substrate of the recorded reactions (testdata/outcomes, sources there):
// whatever is asked of it, the answer is a refusal with a reason or products whose
// formulas add up and whose two derivations agree, and none takes long.
func TestRecordedSubstratesAnswerOrRefuse(t *testing.T) {
	var list []string
	for _, name := range []string{"diels_alder.csv", "electrophilic_substitution.csv", "other_steps.csv"} {
		f, err := os.Open("../../testdata/outcomes/" + name)
		if err != nil {
			t.Fatal(err)
		}
		records, err := csv.NewReader(f).ReadAll()
		f.Close()
		if err != nil {
			t.Fatal(err)
		}
		for k, head := range records[0] {
			if !strings.Contains(head, "smiles") {
				continue
			}
			for i := 1; i < len(records); i += 20 {
				for _, s := range strings.FieldsFunc(records[i][k], func(r rune) bool { return r == '.' || r == '>' || r == ' ' }) {
					list = append(list, s)
				}
			}
		}
	}
	if len(list) < 150 {
		t.Fatalf("only %d structures", len(list))
	}
	answered := 0
	slowest, slow := time.Duration(0), ""
	for _, s := range list {
		m, err := molecule.ParseSMILES(s)
		if err != nil {
			continue
		}
		for name, ask := range map[string]func() (*Answer, error){
			"closure": func() (*Answer, error) { return Closure(m) },
			"opening": func() (*Answer, error) { return Opening(m) },
			"[3,3]":   func() (*Answer, error) { return Shift(m, 3, 3) },
			"[1,5]":   func() (*Answer, error) { return Shift(m, 1, 5) },
			"loss":    func() (*Answer, error) { return Extrusion(m) },
			"ene":     func() (*Answer, error) { return RetroEne(m) },
		} {
			start := time.Now()
			a, err := ask()
			if d := time.Since(start); d > slowest {
				slowest, slow = d, name+" of "+s
			}
			if err != nil {
				var e *molecule.Error
				if !errors.As(err, &e) || e.Reason == "" || e.Remedy == "" {
					t.Errorf("%s of %s: a refusal without reason and remedy: %v", name, s, err)
				}
				continue
			}
			answered++
			for _, p := range a.Processes {
				if !p.Agree {
					t.Errorf("%s of %s, %s: %s", name, s, p.Mode, p.Agreement)
				}
				for _, q := range p.Products {
					if q.Molecule.Formula() != m.Formula() {
						t.Errorf("%s of %s: product %s is %s", name, s, q.SMILES, q.Molecule.Formula())
					}
				}
			}
		}
	}
	if answered < 50 {
		t.Errorf("only %d questions were answered", answered)
	}
	t.Logf("%d structures, %d answers; slowest %v: %s", len(list), answered, slowest.Round(time.Millisecond), slow)
}
