package symmetry

import (
	"encoding/csv"
	"os"
	"slices"
	"sort"
	"strconv"
	"strings"
	"testing"

	"lobecast/frontier/molecule"
)

// row is one entry of testdata/pericyclic.csv; sources stand in its columns.
type row map[string]string

func publishedRows(t *testing.T) []row {
	t.Helper()
	f, err := os.Open("../../testdata/pericyclic.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	records, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var rows []row
	for _, r := range records[1:] {
		x := row{}
		for i, k := range records[0] {
			x[k] = r[i]
		}
		rows = append(rows, x)
	}
	return rows
}

// Every published verdict with components, by the count.
func TestPublishedVerdictsByCount(t *testing.T) {
	n := 0
	for i, r := range publishedRows(t) {
		if r["components"] == "" {
			continue
		}
		n++
		p, err := FromComponents(r["components"])
		if err != nil {
			t.Errorf("row %d %s: %v", i+1, r["name"], err)
			continue
		}
		if string(p.Thermal) != r["thermal"] || string(p.Photochemical) != r["photochemical"] {
			t.Errorf("row %d %s: %s gives %s, %s; published %s, %s", i+1, r["name"], p.Components, p.Thermal, p.Photochemical, r["thermal"], r["photochemical"])
		}
		if strconv.Itoa(p.Electrons) != r["electrons"] {
			t.Errorf("row %d %s: %d electrons, published %s", i+1, r["name"], p.Electrons, r["electrons"])
		}
		if p.Derivations != 1 || !strings.Contains(p.Agreement, "one derivation") {
			t.Errorf("row %d: a component string must say that there is one derivation: %q", i+1, p.Agreement)
		}
	}
	if n < 60 {
		t.Errorf("only %d rows state components", n)
	}
}

func mustRead(t testing.TB, s string) *molecule.Molecule {
	t.Helper()
	m, err := molecule.ParseSMILES(s)
	if err != nil {
		t.Fatalf("%s: %v", s, err)
	}
	return m
}

// readAll reads the molecules of a row, joined by " + ".
func readAll(t testing.TB, s string) (ms []*molecule.Molecule) {
	for _, x := range strings.Split(s, " + ") {
		ms = append(ms, mustRead(t, x))
	}
	return ms
}

// run performs the process named in a row.
func run(t testing.TB, process string, ms []*molecule.Molecule) (*Answer, error) {
	t.Helper()
	second := func() *molecule.Molecule {
		if len(ms) > 1 {
			return ms[1]
		}
		return nil
	}
	switch {
	case process == "closure":
		return Closure(ms[0])
	case process == "opening":
		return Opening(ms[0])
	case process == "cycloaddition":
		return CycloadditionBetween(ms[0], second())
	case process == "cheletropic":
		return Cheletropic(ms[0], second())
	case process == "extrusion":
		return Extrusion(ms[0])
	case process == "ene":
		return Ene(ms[0], second())
	case process == "retro-ene":
		return RetroEne(ms[0])
	case process == "transfer":
		return Transfer(ms[0], second())
	case process == "components":
		m, err := join(ms...)
		if err != nil {
			return nil, err
		}
		// Map 203 is the third atom of the second component.
		byComponent := map[int][][2]int{}
		most := 0
		for i := range m.Atoms {
			if k := m.Atoms[i].Map; k >= 100 {
				byComponent[k/100] = append(byComponent[k/100], [2]int{k % 100, i})
				most = max(most, k/100)
			}
		}
		var list [][]int
		for k := 1; k <= most; k++ {
			slices.SortFunc(byComponent[k], func(a, b [2]int) int { return a[0] - b[0] })
			var atoms []int
			for _, x := range byComponent[k] {
				atoms = append(atoms, x[1])
			}
			list = append(list, atoms)
		}
		sigma := false
		for _, c := range list {
			if len(c) == 2 && m.Bonds[m.BondBetween(c[0], c[1])].Order == 1 {
				sigma = true
			}
		}
		if len(list) == 2 && !sigma {
			return Cycloaddition(m, m, list[0], list[1])
		}
		return Termolecular(m, list)
	case strings.HasPrefix(process, "shift "):
		a, b, _ := strings.Cut(strings.TrimPrefix(process, "shift "), ",")
		i, _ := strconv.Atoi(a)
		j, _ := strconv.Atoi(b)
		return Shift(ms[0], i, j)
	}
	t.Fatalf("unknown process %q", process)
	return nil, nil
}

// inOrder sorts the components of a string.
func inOrder(t testing.TB, s string) string {
	cs, err := ParseComponents(s)
	if err != nil {
		t.Fatal(err)
	}
	var parts []string
	for _, c := range cs {
		parts = append(parts, c.String())
	}
	sort.Strings(parts)
	return strings.Join(parts, "+")
}

// Every published case whose structures can be drawn: the components found in the
// structure, both derivations, and the product where it is named. Rows without
// structures carry the reason in the column exempt. The SMILES are this project's
// drawings of the named structures (checked with RDKit 2022.09.3: configurations by
// its CIP labels, relative configurations by an embedded geometry).
func TestPublishedCasesFromStructures(t *testing.T) {
	drawn := 0
	for i, r := range publishedRows(t) {
		if r["process"] == "" {
			if r["exempt"] == "" {
				t.Errorf("row %d %s: neither structures nor a reason for their absence", i+1, r["name"])
			}
			continue
		}
		drawn++
		a, err := run(t, r["process"], readAll(t, r["smiles"]))
		if err != nil {
			t.Errorf("row %d %s: %v", i+1, r["name"], err)
			continue
		}
		k := slices.IndexFunc(a.Processes, func(p Process) bool { return p.Mode == r["mode"] })
		if k < 0 {
			var modes []string
			for _, p := range a.Processes {
				modes = append(modes, p.Mode)
			}
			t.Errorf("row %d %s: no mode %q among %q", i+1, r["name"], r["mode"], modes)
			continue
		}
		p := &a.Processes[k]
		if got, want := inOrder(t, p.Components), inOrder(t, r["components"]); got != want {
			t.Errorf("row %d %s: components %s, published %s", i+1, r["name"], p.Components, r["components"])
		}
		if p.Derivations != 2 || !p.Agree {
			t.Errorf("row %d %s: %s", i+1, r["name"], p.Agreement)
		}
		if string(p.Numerical[0]) != r["thermal"] || string(p.Numerical[1]) != r["photochemical"] {
			t.Errorf("row %d %s: the correlation says %s, %s; published %s, %s", i+1, r["name"], p.Numerical[0], p.Numerical[1], r["thermal"], r["photochemical"])
		}
		if string(p.Thermal) != r["thermal"] || string(p.Photochemical) != r["photochemical"] {
			t.Errorf("row %d %s: verdict %s, %s; published %s, %s", i+1, r["name"], p.Thermal, p.Photochemical, r["thermal"], r["photochemical"])
		}
		if r["product_smiles"] == "" {
			continue
		}
		for _, s := range strings.Split(r["product_smiles"], ";") {
			want := mustRead(t, s)
			if !hasProduct(p, want) {
				var got []string
				for _, q := range p.Products {
					got = append(got, q.SMILES)
				}
				t.Errorf("row %d %s: product %s is not among %q", i+1, r["name"], want.SMILES(), got)
			}
		}
	}
	if drawn < 58 {
		t.Errorf("only %d rows are drawn", drawn)
	}
}

// hasProduct compares with configuration where the wanted product states one.
func hasProduct(p *Process, want *molecule.Molecule) bool {
	smiles, flat := want.SMILES(), want.FlatSMILES()
	for _, q := range p.Products {
		if q.SMILES == smiles || q.Racemic && q.Molecule.Mirrored().SMILES() == smiles || smiles == flat && q.Molecule.FlatSMILES() == flat {
			return true
		}
	}
	return false
}
