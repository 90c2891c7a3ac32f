package molecule

import (
	"slices"
	"testing"
)

// TestParseSMILES checks what is read from each construction of the grammar (OpenSMILES
// specification 1.0). Formulas and hydrogen counts follow from the valence model of the
// specification; unpaired electrons from the ordinary valences.
func TestParseSMILES(t *testing.T) {
	cases := []struct {
		smiles, formula string
		atoms, bonds    int
		rings           int
		unpaired        int
		canonical       string
	}{
		{"C", "CH4", 1, 0, 0, 0, "C"},
		{"[CH4]", "CH4", 1, 0, 0, 0, "C"},
		{"[H]C([H])([H])[H]", "CH4", 1, 0, 0, 0, "C"},
		{"[H][H]", "H2", 2, 1, 0, 0, "[H][H]"},
		{"[H+]", "H+", 1, 0, 0, 0, "[H+]"},
		{"[2H]O[2H]", "H2O", 3, 2, 0, 0, "[2H]O[2H]"},
		{"CC", "C2H6", 2, 1, 0, 0, "CC"},
		{"C-C", "C2H6", 2, 1, 0, 0, "CC"},
		{"C=C", "C2H4", 2, 1, 0, 0, "C=C"},
		{"C#N", "CHN", 2, 1, 0, 0, "C#N"},
		{"[Ga-]$[As+]", "AsGa", 2, 1, 0, 0, "[Ga-]$[As+]"},
		{"CC(C)(C)O", "C4H10O", 5, 4, 0, 0, "CC(C)(C)O"},
		{"OC(=O)C(Br)(Cl)N", "C2H3BrClNO2", 7, 6, 0, 0, "NC(Cl)(Br)C(=O)O"},
		{"C1CCCCC1", "C6H12", 6, 6, 1, 0, "C1CCCCC1"},
		{"C%12CCCCC%12", "C6H12", 6, 6, 1, 0, "C1CCCCC1"},
		{"C0CCCCC%00", "C6H12", 6, 6, 1, 0, "C1CCCCC1"},
		{"C=1CCCCC1", "C6H10", 6, 6, 1, 0, "C1=CCCCC1"},
		{"C1CCCCC=1", "C6H10", 6, 6, 1, 0, "C1=CCCCC1"},
		{"C=1CCCCC=1", "C6H10", 6, 6, 1, 0, "C1=CCCCC1"},
		{"C1CC1C1CC1", "C6H10", 6, 7, 2, 0, "C1CC1C1CC1"},
		{"c1ccccc1", "C6H6", 6, 6, 1, 0, "c1ccccc1"},
		{"C1=CC=CC=C1", "C6H6", 6, 6, 1, 0, "c1ccccc1"},
		{"c:1:c:c:c:c:c1", "C6H6", 6, 6, 1, 0, "c1ccccc1"},
		{"c1ccccc1c1ccccc1", "C12H10", 12, 13, 2, 0, "c1ccccc1-c1ccccc1"},
		{"c1ccccc1-c1ccccc1", "C12H10", 12, 13, 2, 0, "c1ccccc1-c1ccccc1"},
		{"n1ccccc1", "C5H5N", 6, 6, 1, 0, "c1ccccn1"},
		{"[nH]1cccc1", "C4H5N", 5, 5, 1, 0, "c1ccc[nH]1"},
		{"Cn1cccc1", "C5H7N", 6, 6, 1, 0, "Cn1cccc1"},
		{"o1cccc1", "C4H4O", 5, 5, 1, 0, "c1ccco1"},
		{"s1cccc1", "C4H4S", 5, 5, 1, 0, "c1cccs1"},
		{"[se]1cccc1", "C4H4Se", 5, 5, 1, 0, "c1ccc[se]1"},
		{"[te]1cccc1", "C4H4Te", 5, 5, 1, 0, "c1ccc[te]1"},
		{"c1cc[as]cc1", "C5H5As", 6, 6, 1, 0, "c1cccc[as]1"},
		{"p1ccccc1", "C5H5P", 6, 6, 1, 0, "c1ccccp1"},
		{"b1ccccc1", "C5H5B", 6, 6, 1, 0, "b1ccccc1"},
		{"[cH-]1cccc1", "C5H5-", 5, 5, 1, 0, "c1ccc[cH-]1"},
		{"[cH+]1cccccc1", "C7H7+", 7, 7, 1, 0, "c1ccccc[cH+]1"},
		{"[O-][n+]1ccccc1", "C5H5NO", 7, 7, 1, 0, "[O-][n+]1ccccc1"},
		{"O=n1ccccc1", "C5H5NO", 7, 7, 1, 0, "O=n1ccccc1"},
		{"C[N+](=O)[O-]", "CH3NO2", 4, 3, 0, 0, "C[N+](=O)[O-]"},
		{"CN(=O)=O", "CH3NO2", 4, 3, 0, 0, "CN(=O)=O"},
		{"[NH4+].[Cl-]", "ClH4N", 2, 0, 0, 0, "[Cl-].[NH4+]"},
		{"[Fe+++]", "Fe3+", 1, 0, 0, 0, "[Fe+3]"},
		{"[Fe+3]", "Fe3+", 1, 0, 0, 0, "[Fe+3]"},
		{"[O--]", "O2-", 1, 0, 0, 0, "[O-2]"},
		{"[Ca+2].[Cl-].[Cl-]", "CaCl2", 3, 0, 0, 0, "[Ca+2].[Cl-].[Cl-]"},
		{"[13CH4]", "CH4", 1, 0, 0, 0, "[13CH4]"},
		{"[CH3]", "CH3", 1, 0, 0, 1, "[CH3]"},
		{"[CH2]", "CH2", 1, 0, 0, 2, "[CH2]"},
		{"C[N]C", "C2H6N", 3, 2, 0, 1, "C[N]C"},
		{"CC(C)(C)N([O])C(C)(C)C", "C8H18NO", 10, 9, 0, 1, "CC(C)(C)N([O])C(C)(C)C"},
		{"[CH3+]", "CH3+", 1, 0, 0, 0, "[CH3+]"},
		{"[CH3-]", "CH3-", 1, 0, 0, 0, "[CH3-]"},
		{"[CH3:7]O", "CH4O", 2, 1, 0, 0, "CO"},
		{"CS(=O)(=O)C", "C2H6O2S", 5, 4, 0, 0, "CS(C)(=O)=O"},
		{"OS(O)(=O)=O", "H2O4S", 5, 4, 0, 0, "O=S(=O)(O)O"},
		{"OP(O)(O)=O", "H3O4P", 5, 4, 0, 0, "O=P(O)(O)O"},
		{"P(Cl)(Cl)(Cl)(Cl)Cl", "Cl5P", 6, 5, 0, 0, "ClP(Cl)(Cl)(Cl)Cl"},
		{"FS(F)(F)(F)(F)F", "F6S", 7, 6, 0, 0, "FS(F)(F)(F)(F)F"},
		{"F[P-](F)(F)(F)(F)F", "F6P-", 7, 6, 0, 0, "F[P-](F)(F)(F)(F)F"},
		{"O=Cl(=O)(=O)O", "ClHO4", 5, 4, 0, 0, "O=Cl(=O)(=O)O"},
		{"O=I(=O)c1ccccc1", "C6H5IO2", 9, 9, 1, 0, "O=I(=O)c1ccccc1"},
		{"c1ccccc1[I+]c1ccccc1", "C12H10I+", 13, 14, 2, 0, "[I+](c1ccccc1)c1ccccc1"},
		{"F[B-](F)(F)F", "BF4-", 5, 4, 0, 0, "F[B-](F)(F)F"},
		{"C(.Cl)C", "C2H7Cl", 3, 1, 0, 0, "CC.Cl"},
		{"C1.C1", "C2H6", 2, 1, 0, 0, "CC"},
		{" CCO  ethanol ", "C2H6O", 3, 2, 0, 0, "CCO"},
		{"[U](F)(F)(F)(F)(F)F", "F6U", 7, 6, 0, 0, "F[U](F)(F)(F)(F)F"},
		{"[Og]", "Og", 1, 0, 0, 0, "[Og]"},
		{"C12C3C4C1C5C2C3C45", "C8H8", 8, 12, 5, 0, ""},
	}
	for _, c := range cases {
		m, err := ParseSMILES(c.smiles)
		if err != nil {
			t.Errorf("%s: %v", c.smiles, err)
			continue
		}
		unpaired := 0
		for i := range m.Atoms {
			unpaired += m.Atoms[i].Unpaired
		}
		if got := m.Formula(); got != c.formula {
			t.Errorf("%s: formula %s, want %s", c.smiles, got, c.formula)
		}
		if len(m.Atoms) != c.atoms || len(m.Bonds) != c.bonds || len(m.Rings()) != c.rings || unpaired != c.unpaired {
			t.Errorf("%s: %d atoms, %d bonds, %d rings, %d unpaired electrons; want %d, %d, %d, %d", c.smiles,
				len(m.Atoms), len(m.Bonds), len(m.Rings()), unpaired, c.atoms, c.bonds, c.rings, c.unpaired)
		}
		if got := m.SMILES(); c.canonical != "" && got != c.canonical {
			t.Errorf("%s: written as %s, want %s", c.smiles, got, c.canonical)
		}
	}
}

// TestNumbers wants atoms numbered as in the input, folded hydrogens included, and their
// offsets to point at them.
func TestNumbers(t *testing.T) {
	m := mustParse(t, "[H]OC([H])([H])[13CH3] name of it")
	var numbers []int
	for i, a := range m.Atoms {
		numbers = append(numbers, a.Number)
		if c := m.Source[a.Offset]; c != "OC["[i] {
			t.Errorf("atom %d lies at %q", a.Number, c)
		}
	}
	if want := []int{2, 3, 6}; !slices.Equal(numbers, want) {
		t.Errorf("numbers %v, want %v", numbers, want)
	}
	if m.Name != "name of it" {
		t.Errorf("name %q", m.Name)
	}
	if m.Atoms[1].Hydrogens != 2 || m.Atoms[0].Hydrogens != 1 {
		t.Errorf("hydrogens %d and %d", m.Atoms[1].Hydrogens, m.Atoms[0].Hydrogens)
	}
}

func TestMaps(t *testing.T) {
	m := mustParse(t, "[CH3:2][OH:1]")
	if got, want := m.MappedSMILES(), "[CH3:2][OH:1]"; got != want {
		t.Errorf("mapped %s, want %s", got, want)
	}
	if got := m.AtomByMap(1); got != 1 {
		t.Errorf("map 1 is at atom %d", got)
	}
	if got, want := m.SMILES(), "CO"; got != want {
		t.Errorf("unmapped %s, want %s", got, want)
	}
}

func TestWildcard(t *testing.T) {
	for _, c := range [][2]string{
		{"*Br", "*Br"}, {"*[N+](=O)[O-]", "*[N+](=O)[O-]"}, {"[*]C(C)=O", "*C(C)=O"}, {"[*:1]C", "*C"}, {"c1cc*cc1", "*1C=CC=CC1"},
	} {
		m, err := ParseSMILES(c[0], AllowWildcard)
		if c[0] == "c1cc*cc1" {
			// Five carbons and a wildcard that takes the sixth place of the ring.
			if err != nil || len(m.Atoms) != 6 {
				t.Errorf("%s: %v", c[0], err)
			}
			continue
		}
		if err != nil {
			t.Errorf("%s: %v", c[0], err)
			continue
		}
		if got := m.SMILES(); got != c[1] {
			t.Errorf("%s: written as %s, want %s", c[0], got, c[1])
		}
	}
}

func TestComponents(t *testing.T) {
	m := mustParse(t, "CC(=O)[O-].[Na+].O")
	want := [][]int{{0, 1, 2, 3}, {4}, {5}}
	got := m.Components()
	if len(got) != len(want) {
		t.Fatalf("components %v", got)
	}
	for i := range want {
		if !slices.Equal(got[i], want[i]) {
			t.Errorf("component %d is %v, want %v", i, got[i], want[i])
		}
	}
	parts := m.Split()
	for i, s := range []string{"CC(=O)[O-]", "[Na+]", "O"} {
		if parts[i].SMILES() != s {
			t.Errorf("part %d is %s, want %s", i, parts[i].SMILES(), s)
		}
	}
	if parts[1].Atoms[0].Number != 5 || parts[1].Source != m.Source {
		t.Errorf("part 1 has number %d", parts[1].Atoms[0].Number)
	}
}

func TestElements(t *testing.T) {
	for z := 1; z <= 118; z++ {
		if got, ok := Number(Symbol(z)); !ok || got != z {
			t.Errorf("element %d, symbol %s, is read back as %d", z, Symbol(z), got)
		}
	}
	// Atomic numbers from the IUPAC periodic table.
	for s, z := range map[string]int{"*": 0, "H": 1, "C": 6, "Cl": 17, "Fe": 26, "Br": 35, "Pd": 46, "I": 53, "La": 57, "Lu": 71, "Pt": 78, "U": 92, "Lr": 103, "Og": 118} {
		if got, ok := Number(s); !ok || got != z {
			t.Errorf("%s is %d, want %d", s, got, z)
		}
	}
	for _, s := range []string{"", "Q", "X", "cl", "CL", "Hx", "Cll", "é"} {
		if z, ok := Number(s); ok {
			t.Errorf("%q is taken for element %d", s, z)
		}
	}
	for s, metal := range map[string]bool{"Li": true, "Mg": true, "Al": true, "Zn": true, "Sn": true, "Pd": true, "U": true, "B": false, "Si": false, "C": false, "P": false, "I": false, "H": false, "Xe": false} {
		z, _ := Number(s)
		if IsMetal(z) != metal {
			t.Errorf("%s is a metal: %v", s, !metal)
		}
	}
}

// TestFormula checks Hill order: carbon, hydrogen, then by alphabet; without carbon all
// by alphabet (Hill, J. Am. Chem. Soc. 22, 478 (1900)).
func TestFormula(t *testing.T) {
	for s, want := range map[string]string{
		"OCC": "C2H6O", "BrC(Cl)I": "CHBrClI", "O=S(=O)(O)Cl": "ClHO3S", "[Na+].[OH-]": "HNaO", "Br": "BrH",
		"[C-]#N": "CN-", "[NH3+]CC[NH3+]": "C2H10N22+", "[O-]C(=O)C([O-])=O": "C2O42-", "ClC(Cl)(Cl)Cl": "CCl4",
	} {
		if got := mustParse(t, s).Formula(); got != want {
			t.Errorf("%s: formula %s, want %s", s, got, want)
		}
	}
}
