package frontier

import (
	"encoding/csv"
	"os"
	"testing"

	"lobecast/frontier/molecule"
)

// Resonance structures enumerated by another program (named in the file, with its
// version) all have to give the matrix of the first of their group.
func TestResonanceStructures(t *testing.T) {
	f, err := os.Open("../testdata/resonance.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	set := scrambled(t)
	group, first, want, groups := "", "", "", 0
	var firstPi *Pi
	for _, row := range rows[1:] {
		m, err := molecule.ParseSMILES(row[1])
		if err != nil {
			t.Errorf("%s: %v", row[1], err)
			continue
		}
		pi, err := Perceive(m, Options{})
		if err != nil {
			t.Errorf("%s: %v", row[1], err)
			continue
		}
		got := fingerprint(t, set, pi)
		if row[0] != group {
			group, first, want, firstPi = row[0], row[1], got, pi
			groups++
			continue
		}
		if got != want {
			t.Errorf("%s and %s give different matrices\n%s\n%s", first, row[1], describe(firstPi), describe(pi))
		}
	}
	if len(rows) < 100 {
		t.Errorf("only %d resonance structures", len(rows)-1)
	}
	t.Logf("%d structures in %d groups", len(rows)-1, groups)
}
