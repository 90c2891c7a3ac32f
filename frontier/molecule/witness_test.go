package molecule

import (
	"encoding/csv"
	"fmt"
	"math/rand"
	"os"
	"runtime"
	"slices"
	"strings"
	"sync"
	"testing"
)

const witnesses = "../../testdata/witness/"

// readTable reads a file of tab-separated lines.
func readTable(t *testing.T, file string) [][]string {
	t.Helper()
	b, err := os.ReadFile(witnesses + file)
	if err != nil {
		t.Fatal(err)
	}
	var rows [][]string
	for line := range strings.Lines(string(b)) {
		rows = append(rows, strings.Split(strings.TrimSuffix(line, "\n"), "\t"))
	}
	return rows
}

// TestOutcomeStructures reads every SMILES of testdata/outcomes: the formula must hold
// the atoms and the charge that RDKit 2022.09.3 finds (testdata/witness/molecule.md), and
// the canonical string must survive ten random renumberings.
func TestOutcomeStructures(t *testing.T) {
	f, err := os.Open(witnesses + "outcome_formulas.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	rows = rows[1:]
	if len(rows) < 10000 {
		t.Fatalf("only %d structures", len(rows))
	}
	var wait sync.WaitGroup
	workers := runtime.GOMAXPROCS(0)
	for w := range workers {
		wait.Add(1)
		go func() {
			defer wait.Done()
			r := rand.New(rand.NewSource(int64(w)))
			for k := w; k < len(rows); k += workers {
				m, err := ParseSMILES(rows[k][0])
				if err != nil {
					t.Errorf("%s: %v", rows[k][0], err)
					continue
				}
				if got, want := m.Formula(), hill(rows[k][1]); got != want {
					t.Errorf("%s: formula %s, RDKit has %s", rows[k][0], got, rows[k][1])
				}
				s := m.SMILES()
				for range 10 {
					if got := m.Renumber(r.Perm(len(m.Atoms))).SMILES(); got != s {
						t.Errorf("%s: written as %s and, renumbered, as %s", rows[k][0], s, got)
						break
					}
				}
				back, err := ParseSMILES(s)
				if err != nil || back.SMILES() != s {
					t.Errorf("%s: written as %s, which is read as %v, %v", rows[k][0], s, back, err)
				}
			}
		}()
	}
	wait.Wait()
}

// hill brings a formula as RDKit writes it, with the charge as +2, and hydrogen in the
// second place even without carbon, into the order of [Molecule.Formula].
func hill(formula string) string {
	charge := ""
	if k := strings.IndexAny(formula, "+-"); k >= 0 {
		charge = formula[k+1:] + formula[k:k+1]
		formula = formula[:k]
	}
	var parts []string
	for i := 0; i < len(formula); {
		j := i + 1
		for j < len(formula) && !large(formula[j]) {
			j++
		}
		parts = append(parts, formula[i:j])
		i = j
	}
	element := func(part string) string { return strings.TrimRight(part, "0123456789") }
	carbon := slices.ContainsFunc(parts, func(p string) bool { return element(p) == "C" })
	key := func(part string) string {
		switch e := element(part); {
		case carbon && e == "C":
			return ""
		case carbon && e == "H":
			return " "
		default:
			return e
		}
	}
	slices.SortFunc(parts, func(a, b string) int { return strings.Compare(key(a), key(b)) })
	return strings.Join(parts, "") + charge
}

// TestVariants wants one canonical string from all ways of writing one molecule: random
// SMILES and random Kekulé forms made by RDKit 2022.09.3, which takes each of them for
// the same molecule.
func TestVariants(t *testing.T) {
	for _, file := range []string{"smiles_variants.tsv", "stereo_variants.tsv"} {
		seen := map[string]string{}
		rows := readTable(t, file)
		if len(rows) < 200 {
			t.Fatalf("%s: only %d molecules", file, len(rows))
		}
		for _, row := range rows {
			first := mustParse(t, row[0]).SMILES()
			for _, s := range row[1:] {
				if got := mustParse(t, s).SMILES(); got != first {
					t.Errorf("%s is written as %s, and %s as %s", row[0], first, s, got)
				}
			}
			// The rows are different molecules.
			if other, ok := seen[first]; ok {
				t.Errorf("%s and %s are both written as %s", other, row[0], first)
			}
			seen[first] = row[0]
			if got := mustParse(t, first).SMILES(); got != first {
				t.Errorf("%s is written as %s, and that as %s", row[0], first, got)
			}
		}
	}
}

// TestRingsAndClasses compares the sizes of the smallest set of smallest rings and the
// classes of equivalent atoms with RDKit 2022.09.3 (canonical ranks without breaking of
// ties).
func TestRingsAndClasses(t *testing.T) {
	for _, row := range readTable(t, "rings_classes.tsv") {
		m := mustParse(t, row[0])
		var sizes []int
		for _, r := range m.Rings() {
			sizes = append(sizes, len(r))
		}
		slices.Sort(sizes)
		if got := strings.Trim(fmt.Sprint(sizes), "[]"); got != row[1] {
			t.Errorf("%s: rings of %s, RDKit has %s", row[0], got, row[1])
		}
		if got := strings.Trim(fmt.Sprint(m.Classes()), "[]"); got != row[2] {
			t.Errorf("%s: classes %s, RDKit has %s", row[0], got, row[2])
		}
	}
}
