package frontier

import (
	"encoding/csv"
	"fmt"
	"math"
	"os"
	"strconv"
	"strings"
	"testing"

	"lobecast/frontier/molecule"
)

// printTolerance is what a value printed to three digits, copied from memory, may be
// off by. Rows that differ by more than half a unit of their own last digit are listed
// below.
const printTolerance = 0.002

// publishedBonds says which atoms (from 1, in the order of the row's SMILES) a bond's
// published locants mean, read off the numbering rules of each ring system.
var publishedBonds = map[string][2]int{
	"allyl radical 1-2": {1, 2}, "butadiene 1-2": {1, 2}, "butadiene 2-3": {2, 3},
	"hexatriene 1-2": {1, 2}, "hexatriene 2-3": {2, 3}, "hexatriene 3-4": {3, 4},
	"benzene 1-2":        {1, 2},
	"styrene alpha-beta": {1, 2}, "styrene alpha-ipso": {2, 3},
	"fulvene 5-6": {1, 2}, "fulvene 1-5": {2, 3}, "fulvene 1-2": {3, 4}, "fulvene 2-3": {4, 5},
	"azulene 1-2": {5, 6}, "azulene 1-8a": {4, 5}, "azulene 3a-4": {3, 4}, "azulene 4-5": {2, 3},
	"azulene 5-6": {1, 2}, "azulene 3a-8a": {4, 8},
	"naphthalene 1-2": {2, 3}, "naphthalene 2-3": {1, 2}, "naphthalene 1-8a": {3, 4}, "naphthalene 4a-8a": {4, 9},
	"anthracene 1-2": {2, 3}, "anthracene 2-3": {1, 2}, "anthracene 1-9a": {3, 4},
	"anthracene 9-9a": {4, 5}, "anthracene 4a-9a": {4, 13},
	"phenanthrene 9-10": {7, 8}, "biphenyl 1-1'": {4, 7},
}

// lastDigit lists the rows whose published value differs from the computed one by more
// than half a unit of its last digit: copies from memory, or rounding in print. A
// difference not listed here fails the test, and so does a listed one that is none.
var lastDigit = map[string]bool{
	"butadiene free_valence 2": true, "fulvene q 6": true, "naphthalene free_valence 1": true,
	"anthracene bond_order 1-2": true, "anthracene free_valence 2": true,
	"fluoranthene E_pi ": true, "fluoranthene DE ": true,
}

func mustLoad(t testing.TB, name string) *Set {
	t.Helper()
	s, err := Load(name)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func mustParse(t testing.TB, smiles string) *molecule.Molecule {
	t.Helper()
	m, err := molecule.ParseSMILES(smiles)
	if err != nil {
		t.Fatalf("%s: %v", smiles, err)
	}
	return m
}

func mustPerceive(t testing.TB, smiles string) *Pi {
	t.Helper()
	pi, err := Perceive(mustParse(t, smiles), Options{})
	if err != nil {
		t.Fatalf("%s: %v", smiles, err)
	}
	return pi
}

func mustSolve(t testing.TB, set *Set, smiles string) *Solution {
	t.Helper()
	sol, err := set.Solve(mustPerceive(t, smiles))
	if err != nil {
		t.Fatalf("%s: %v", smiles, err)
	}
	return sol
}

// Every published value of testdata/hmo_values.csv that orbitals alone decide: levels,
// total and delocalization energies, bond orders, free valences, populations. Source
// and status stand in each row; nearly all are from memory. Localization energies and
// frontier indices of the same file are tested where they are computed.
func TestPublishedValues(t *testing.T) {
	f, err := os.Open("../testdata/hmo_values.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	column := map[string]int{}
	for i, h := range rows[0] {
		column[h] = i
	}
	set := mustLoad(t, "streitwieser-1961") // h_N 0.5, k_CN 1 for the pyridine rows
	solved := map[string]*Solution{}
	checked, seen, fromMemory, offDigit := 0, 0, 0, map[string]bool{}
	for _, row := range rows[1:] {
		get := func(k string) string { return row[column[k]] }
		name, quantity, site := get("molecule"), get("quantity"), get("site")
		want, err := strconv.ParseFloat(get("published"), 64)
		if err != nil {
			t.Fatalf("%v: %v", row, err)
		}
		sol := solved[get("smiles")]
		if sol == nil {
			sol = mustSolve(t, set, get("smiles"))
			solved[get("smiles")] = sol
		}
		o := sol.Systems[0]
		local := func(atom int) int {
			_, l, ok := sol.Find(atom)
			if !ok {
				t.Fatalf("%s: atom %d has no centre", name, atom+1)
			}
			return l
		}
		noted := func() int {
			rest, ok := strings.CutPrefix(get("note"), "SMILES atom index ")
			if !ok {
				t.Fatalf("%s %s: the row names no atom", name, site)
			}
			n, err := strconv.Atoi(strings.SplitN(rest, ";", 2)[0])
			if err != nil {
				t.Fatal(err)
			}
			return local(n)
		}
		var got float64
		switch {
		case quantity == "E_pi":
			got = o.Energy
		case quantity == "DE":
			got = o.Energy - 2*math.Floor(float64(o.N)/2)
		case quantity == "x_HOMO":
			got, _ = o.HOMOLevel()
		case quantity == "x_LUMO":
			got, _ = o.LUMOLevel()
		case strings.HasPrefix(quantity, "x_MO"):
			k, err := strconv.Atoi(quantity[4:])
			if err != nil {
				t.Fatal(err)
			}
			got = o.X[k-1]
		case quantity == "q":
			got = o.Populations()[noted()]
		case quantity == "free_valence":
			got = o.FreeValences(sol.Matrices[0].Links)[noted()]
		case quantity == "bond_order":
			b, ok := publishedBonds[name+" "+site]
			if !ok {
				t.Errorf("%s: bond %s is not in the table of bonds", name, site)
				continue
			}
			got = o.BondOrder(local(b[0]-1), local(b[1]-1))
		default:
			seen++ // an index of attack
			continue
		}
		checked++
		if get("source_status") == "memory" {
			fromMemory++
		}
		key := fmt.Sprintf("%s %s %s", name, quantity, site)
		if math.Abs(got-want) > printTolerance {
			t.Errorf("%s: %.4f, published %s (%s, %s)", key, got, get("published"), get("source"), get("source_status"))
		}
		digits := 0
		if i := strings.IndexByte(get("published"), '.'); i >= 0 {
			digits = max(3, len(get("published"))-i-1) // trailing zeros were lost in the file
		}
		if math.Abs(got-want) > 0.5*math.Pow10(-digits)+5e-5 {
			offDigit[key] = true
			t.Logf("outside its own rounding: %s: %.4f, published %s (recalled: %t)", key, got, get("published"), get("source_status") == "memory")
		}
	}
	for k := range offDigit {
		if !lastDigit[k] {
			t.Errorf("%s lies outside its own rounding and is not listed", k)
		}
	}
	for k := range lastDigit {
		if !offDigit[k] {
			t.Errorf("%s is listed as outside its own rounding, but is not", k)
		}
	}
	if checked < 170 {
		t.Errorf("only %d published values were checked", checked)
	}
	t.Logf("%d published values checked, %d of them recalled from memory; %d indices of attack left to their own test", checked, fromMemory, seen)
}

// Textbook figures of butadiene: levels ±1.618, ±0.618, total 4α + 4.472β,
// delocalization energy 0.472 |β| (common to all textbooks).
func TestButadieneTextbook(t *testing.T) {
	o := mustSolve(t, mustLoad(t, DefaultSet), "C=CC=C").Systems[0]
	for j, x := range []float64{1.618, 0.618, -0.618, -1.618} {
		if math.Abs(o.X[j]-x) > 0.0005 {
			t.Errorf("level %d at %.4f, textbooks have %.3f", j+1, o.X[j], x)
		}
	}
	if math.Abs(o.Energy-4.472) > 0.0005 || math.Abs(o.Energy-4-0.472) > 0.0005 {
		t.Errorf("energy %.4f, delocalization %.4f", o.Energy, o.Energy-4)
	}
}
