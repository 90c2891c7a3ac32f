package symmetry

import (
	"fmt"
	"math/rand/v2"
	"slices"
	"sort"
	"strings"
	"testing"

	"lobecast/frontier/molecule"
)

// digest writes the verdicts, modes and products of an answer, products in sorted
// order, mirror images of chiral reactants' products exchanged where asked.
func digest(a *Answer, mirror bool) string {
	var lines []string
	for _, p := range a.Processes {
		var products []string
		for _, q := range p.Products {
			s := q.SMILES
			if m := q.Molecule.Mirrored().SMILES(); mirror && !q.Racemic {
				s = m
			} else if q.Racemic && m < s {
				s = m
			}
			products = append(products, s+" "+q.Configuration)
		}
		sort.Strings(products)
		parts := strings.Split(p.Components, "+")
		sort.Strings(parts)
		words := strings.Split(p.Mode, " + ")
		sort.Strings(words)
		lines = append(lines, fmt.Sprint(strings.Join(words, " + "), parts, p.Electrons, p.Thermal, p.Photochemical, p.Agree, p.Feasible, products))
	}
	sort.Strings(lines)
	return strings.Join(lines, "\n")
}

// eachDrawn runs the published cases that are drawn.
func eachDrawn(t *testing.T, f func(r row, ms []*molecule.Molecule, a *Answer)) {
	for _, r := range publishedRows(t) {
		if r["process"] == "" {
			continue
		}
		ms := readAll(t, r["smiles"])
		a, err := run(t, r["process"], ms)
		if err != nil {
			t.Fatalf("%s: %v", r["name"], err)
		}
		f(r, ms, a)
	}
}

func TestRenumberingChangesNothing(t *testing.T) {
	random := rand.New(rand.NewPCG(3, 4))
	eachDrawn(t, func(r row, ms []*molecule.Molecule, a *Answer) {
		for range 3 {
			var other []*molecule.Molecule
			for _, m := range ms {
				other = append(other, m.Renumber(random.Perm(len(m.Atoms))))
			}
			b, err := run(t, r["process"], other)
			if err != nil {
				t.Errorf("%s renumbered: %v", r["name"], err)
				continue
			}
			if digest(a, false) != digest(b, false) {
				t.Errorf("%s: renumbered gives\n%s\nand not\n%s", r["name"], digest(b, false), digest(a, false))
			}
		}
	})
}

func TestMirrorDrawingChangesNothing(t *testing.T) {
	eachDrawn(t, func(r row, ms []*molecule.Molecule, a *Answer) {
		var other []*molecule.Molecule
		for _, m := range ms {
			other = append(other, m.Mirrored())
		}
		b, err := run(t, r["process"], other)
		if err != nil {
			t.Errorf("%s mirrored: %v", r["name"], err)
			return
		}
		if digest(a, true) != digest(b, false) {
			t.Errorf("%s: the mirror image gives\n%s\nand not\n%s", r["name"], digest(b, false), digest(a, true))
		}
	})
}

// Exchanging the partners of an addition exchanges the words of the mode and nothing
// else; the maps go with the molecules.
func TestSwappingPartnersChangesNothing(t *testing.T) {
	tried := 0
	eachDrawn(t, func(r row, ms []*molecule.Molecule, a *Answer) {
		if r["process"] != "cycloaddition" || len(ms) != 2 || !strings.Contains(r["smiles"], ":1]") || !strings.Contains(r["smiles"], ":3]") {
			return
		}
		tried++
		swap := strings.NewReplacer(":1]", ":3]", ":2]", ":4]", ":3]", ":1]", ":4]", ":2]")
		halves := strings.Split(r["smiles"], " + ")
		b, err := CycloadditionBetween(mustRead(t, swap.Replace(halves[1])), mustRead(t, swap.Replace(halves[0])))
		if err != nil {
			t.Errorf("%s swapped: %v", r["name"], err)
			return
		}
		strip := strings.NewReplacer(" endo", " ", " exo", " ") // named after the longer component
		if x, y := strip.Replace(digest(a, false)), strip.Replace(digest(b, false)); x != y {
			t.Errorf("%s: swapped gives\n%s\nand not\n%s", r["name"], y, x)
		}
	})
	if tried < 5 {
		t.Errorf("only %d pairs were swapped", tried)
	}
}

func TestProductFormulasAddUp(t *testing.T) {
	eachDrawn(t, func(r row, ms []*molecule.Molecule, a *Answer) {
		joined, err := join(ms...)
		if err != nil {
			t.Fatal(err)
		}
		for _, p := range a.Processes {
			if len(p.Products) == 0 {
				t.Errorf("%s, %s: no product", r["name"], p.Mode)
			}
			for _, q := range slices.Concat(p.Products, p.Later) {
				want := joined.Formula()
				if len(p.Later) > 0 && strings.HasSuffix(want, "+") && !strings.HasSuffix(q.Molecule.Formula(), "+") {
					continue // a proton was lost
				}
				if got := q.Molecule.Formula(); got != want {
					t.Errorf("%s, %s: product %s is %s, the reactants %s", r["name"], p.Mode, q.SMILES, got, want)
				}
			}
		}
	})
}
