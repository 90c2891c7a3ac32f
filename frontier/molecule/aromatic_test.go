package molecule

import (
	"math/rand/v2"
	"testing"
)

// TestAromaticity checks the definition at the head of aromatic.go on molecules for which
// textbooks agree (common practice, no source), each in several ways of writing: the
// number of aromatic atoms, and one canonical string for all.
func TestAromaticity(t *testing.T) {
	cases := []struct {
		name     string
		aromatic int
		written  []string
	}{
		{"benzene", 6, []string{"c1ccccc1", "C1=CC=CC=C1", "C=1C=CC=CC1"}},
		{"naphthalene", 10, []string{"c1ccc2ccccc2c1", "C1=CC=C2C=CC=CC2=C1", "C1=CC2=CC=CC=C2C=C1"}},
		{"azulene", 10, []string{"c1ccc2cccc2cc1", "C1=CC=CC2=CC=CC2=C1", "C1=CC=C2C=CC=C2C=C1"}},
		{"2-pyridone", 6, []string{"O=c1cccc[nH]1", "O=C1C=CC=CN1"}},
		{"tropone", 7, []string{"O=c1cccccc1", "O=C1C=CC=CC=C1"}},
		{"coumarin", 10, []string{"O=c1ccc2ccccc2o1", "O=C1C=CC2=CC=CC=C2O1", "O=C1OC2=C(C=CC=C2)C=C1"}},
		{"2H-isoindole", 9, []string{"c1ccc2c[nH]cc2c1", "C1=CC2=CNC=C2C=C1"}},
		{"indolizine", 9, []string{"c1ccn2cccc2c1", "C1=CC=CN2C1=CC=C2"}},
		{"caffeine", 9, []string{"Cn1cnc2c1c(=O)n(C)c(=O)n2C", "CN1C=NC2=C1C(=O)N(C)C(=O)N2C"}},
		{"biphenylene", 12, []string{"c1ccc2c(c1)c1ccccc12", "C1=CC=C2C(=C1)C1=CC=CC=C12", "C1=CC2=C3C=CC=CC3=C2C=C1"}},
		{"acenaphthylene", 10, []string{"C1=Cc2cccc3cccc1c23", "C1=CC2=CC=CC3=CC=CC1=C23"}},
		{"fluoranthene", 16, []string{"c1ccc2c(c1)c1cccc3cccc2c31", "C1=CC=C2C(=C1)C1=CC=CC3=CC=CC2=C13"}},
		{"pyrene", 16, []string{"c1cc2ccc3cccc4ccc(c1)c2c34", "C1=CC2=C3C(=C1)C=CC4=CC=CC(=C43)C=C2"}},
		{"cyclopentadienide", 5, []string{"[cH-]1cccc1", "[CH-]1C=CC=C1"}},
		{"tropylium", 7, []string{"[cH+]1cccccc1", "[CH+]1C=CC=CC=C1"}},
		{"cyclopropenylium", 3, []string{"[cH+]1cc1", "[CH+]1C=C1"}},
		{"pyrylium", 6, []string{"c1cc[o+]cc1", "C1=CC=[O+]C=C1"}},
		{"pyridine N-oxide", 6, []string{"[O-][n+]1ccccc1", "[O-][N+]1=CC=CC=C1"}},
		{"pyridine N-oxide with five bonds", 6, []string{"O=n1ccccc1", "O=N1=CC=CC=C1"}},
		{"thiazolium", 5, []string{"C[n+]1ccsc1", "C[N+]1=CSC=C1"}},
		{"phosphole", 5, []string{"c1ccc[pH]1", "P1C=CC=C1"}},
		{"[18]annulene", 18, []string{"c1ccccccccccccccccc1", "C1=CC=CC=CC=CC=CC=CC=CC=CC=C1"}},
		{"1,6-methano[10]annulene", 10, []string{"C1c2ccccc1cccc2", "C1C2=CC=CC=C1C=CC=C2", "C1C=2C=CC=CC1=CC=CC2"}},
		{"isocyanuric acid", 6, []string{"O=c1[nH]c(=O)[nH]c(=O)[nH]1", "O=C1NC(=O)NC(=O)N1"}},

		{"cyclobutadiene", 0, []string{"C1=CC=C1", "c1ccc1"}},
		{"cyclooctatetraene", 0, []string{"C1=CC=CC=CC=C1", "c1ccccccc1"}},
		{"pentalene", 0, []string{"C1=CC2=CC=CC2=C1", "c1cc2cccc2c1"}},
		{"s-indacene", 0, []string{"C1=CC2=CC3=CC=CC3=CC2=C1", "c1cc2cc3cccc3cc2c1"}},
		{"fulvene", 0, []string{"C=C1C=CC=C1"}},
		{"p-benzoquinone", 0, []string{"O=C1C=CC(=O)C=C1"}},
		{"maleic anhydride", 0, []string{"O=C1C=CC(=O)O1"}},
		{"cyclobutenedione", 0, []string{"O=C1C=CC1=O"}},
		{"thiophene dioxide", 0, []string{"O=S1(=O)C=CC=C1", "O=s1(=O)cccc1"}},
		{"a sulfonium", 0, []string{"C[S+]1C=CC=C1", "C[s+]1cccc1"}},
		{"borole", 0, []string{"B1C=CC=C1", "[bH]1cccc1"}},
		{"1,4-cyclohexadiene", 0, []string{"C1C=CCC=C1"}},
	}
	for _, c := range cases {
		first := ""
		for _, s := range c.written {
			m := mustParse(t, s)
			n := 0
			for i := range m.Atoms {
				if m.Atoms[i].Aromatic {
					n++
				}
			}
			if n != c.aromatic {
				t.Errorf("%s, %s: %d aromatic atoms, want %d", c.name, s, n, c.aromatic)
			}
			if first == "" {
				first = m.SMILES()
			} else if got := m.SMILES(); got != first {
				t.Errorf("%s: %s is written as %s, and %s as %s", c.name, c.written[0], first, s, got)
			}
		}
	}
}

// TestBiphenyleneBonds wants the bonds between the benzene rings of biphenylene single and
// not aromatic even where they were written double.
func TestBiphenyleneBonds(t *testing.T) {
	m := mustParse(t, "C1=CC2=C3C=CC=CC3=C2C=C1")
	aromatic, double := 0, 0
	for _, b := range m.Bonds {
		if b.Aromatic {
			aromatic++
			if b.Order == 2 {
				double++
			}
		} else if b.Order != 1 {
			t.Errorf("bond %d-%d has order %d outside the aromatic rings", b.A+1, b.B+1, b.Order)
		}
	}
	if aromatic != 12 || double != 6 {
		t.Errorf("%d aromatic bonds, %d of them double; want 12 and 6", aromatic, double)
	}
}

// TestFullerene wants C60 read from a string without a Kekulé form: 60 aromatic atoms, one
// class, 31 rings of five or six (one face of the 32 depends on the others), and all of
// its hexagons' bonds aromatic whatever the numbering.
func TestFullerene(t *testing.T) {
	m := mustParse(t, "c12c3c4c5c1c1c6c7c2c2c8c3c3c9c4c4c%10c5c5c1c1c6c6c%11c7c2c2c7c8c3c3c8c9c4c4c9c%10c5c5c1c1c6c6c%11c2c2c7c3c3c8c4c4c9c5c1c1c6c2c3c41")
	if n := len(m.Rings()); n != 31 {
		t.Errorf("%d rings, want 31", n)
	}
	for i, c := range m.Classes() {
		if c != 0 || !m.Atoms[i].Aromatic {
			t.Errorf("atom %d is of class %d, aromatic %v", i, c, m.Atoms[i].Aromatic)
		}
	}
	perm := make([]int, 60)
	for i := range perm {
		perm[i] = i * 7 % 60
	}
	q := m.Renumber(perm)
	for b := range m.Bonds {
		if !m.Bonds[b].Aromatic || !q.Bonds[b].Aromatic {
			t.Fatalf("bond %d is not aromatic", b)
		}
	}
	if a, b := m.SMILES(), q.SMILES(); a != b {
		t.Errorf("written as %s and, renumbered, as %s", a, b)
	}
}

// TestAromaticityOfACage wants bonds of a cage of boron rings to be aromatic whatever its
// numbering: one ring of thirteen of its smallest set could be another (found by fuzzing).
func TestAromaticityOfACage(t *testing.T) {
	m := mustParse(t, "c12bc3bbc(bc4bc(bc5c(bc3b2)[nH]5)B4)[BH]1")
	want := m.SMILES()
	random := rand.New(rand.NewPCG(3, 4))
	for range 50 {
		if got := m.Renumber(random.Perm(len(m.Atoms))).SMILES(); got != want {
			t.Fatalf("written as %s and, renumbered, as %s", want, got)
		}
	}
}
