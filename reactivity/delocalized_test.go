package reactivity

import (
	"slices"
	"testing"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Where nucleophiles add to carbocations and pyrylium ions, as textbooks agree (common
// practice, no source): the ends of allyl, all of tropylium alike, the centre of trityl,
// C-2 of pyrylium.
func TestNucleophilesAtCations(t *testing.T) {
	in, err := ParseIncoming("*NC")
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		smiles  string
		first   []int  // numbers of the first site
		product string // where there is one
	}{
		{"[CH2+]C=C", []int{1, 3}, "C=CCNC"},
		{"CC=C[CH2+]", []int{4}, "CC=CCNC"},
		{"[CH+]1C=CC=CC=C1", []int{1, 2, 3, 4, 5, 6, 7}, "CNC1C=CC=CC=C1"},
		{"c1ccc(cc1)[C+](c1ccccc1)c1ccccc1", []int{7}, "CNC(c1ccccc1)(c1ccccc1)c1ccccc1"},
		{"c1cc[o+]cc1", []int{3, 5}, ""},
	} {
		m, err := molecule.ParseSMILES(c.smiles)
		if err != nil {
			t.Fatal(err)
		}
		j, err := Judge(m, Conditions{Nucleophile: "N"}, []terms.Toward{terms.Nucleophile})
		if err != nil {
			t.Fatal(err)
		}
		if len(j.Attacks) == 0 || j.Attacks[len(j.Attacks)-1].Event != terms.NucleophilicAddition {
			t.Errorf("%s: no nucleophilic addition", c.smiles)
			continue
		}
		site := j.Attacks[len(j.Attacks)-1].Sites[0]
		var numbers []int
		for _, a := range site.Atoms {
			numbers = append(numbers, m.Atoms[a].Number)
		}
		if !slices.Equal(numbers, c.first) {
			t.Errorf("%s: first %v, want %v", c.smiles, numbers, c.first)
		}
		if c.product == "" {
			continue
		}
		for _, a := range site.Atoms {
			p, err := Product(m, terms.NucleophilicAddition, a, in)
			if err != nil {
				t.Fatal(err)
			}
			want, _ := molecule.ParseSMILES(c.product)
			if !p.SameConstitution(want) {
				t.Errorf("%s: product %s at atom %d, want %s", c.smiles, p.FlatSMILES(), m.Atoms[a].Number, c.product)
			}
		}
	}
}

// Carbons that share a charge by resonance are one site, however the charge is written.
func TestResonanceClasses(t *testing.T) {
	for _, c := range []struct {
		smiles  string
		classes int
	}{
		{"c1cc[cH-]c1", 1}, {"[CH-]1C=CC=C1", 1}, {"C[C-]1C=CC=C1", 4}, {"[CH+]1C=CC=CC=C1", 1}, {"[CH2-]C=C", 2}, {"[CH2+]C=CC=C", 3}, {"[CH2+]c1ccccc1", 5}, {"C=CC=C", 2},
	} {
		m, err := molecule.ParseSMILES(c.smiles)
		if err != nil {
			t.Fatal(err)
		}
		classes := slices.Clone(resonanceClasses(m))
		slices.Sort(classes)
		if n := len(slices.Compact(classes)); n != c.classes {
			t.Errorf("%s: %d classes, want %d", c.smiles, n, c.classes)
		}
	}
}
