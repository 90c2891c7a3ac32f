package molecule

import (
	"fmt"
	"strings"
	"testing"
)

// edited applies steps to a molecule and compares the result with the SMILES expected.
func TestEditor(t *testing.T) {
	for _, c := range []struct {
		name, smiles string
		steps        func(e *Editor)
		want         string
	}{
		{"bromination of benzene", "c1ccccc1", func(e *Editor) {
			br := e.AddAtom(Atom{Element: 35})
			e.ReplaceLigand(0, ImplicitLigand, br)
		}, "Brc1ccccc1"},
		{"the same by hand", "c1ccccc1", func(e *Editor) {
			e.SetHydrogens(2, 0)
			e.AddBond(2, e.AddAtom(Atom{Element: 35}), 1)
		}, "Brc1ccccc1"},
		{"addition of two molecules", "C=CC=C", func(e *Editor) {
			at := e.Merge(&Molecule{})
			if at != 4 {
				panic("offset")
			}
			ethene, _ := ParseSMILES("C=C")
			at = e.Merge(ethene)
			e.AddBond(0, at, 1)
			e.AddBond(3, at+1, 1)
			e.SetOrder(0, 1, 1)
			e.SetOrder(1, 2, 2)
			e.SetOrder(2, 3, 1)
			e.SetOrder(at, at+1, 1)
		}, "C1CC=CCC1"},
		{"loss of a leaving group", "Clc1ccc([N+](=O)[O-])cc1", func(e *Editor) {
			e.RemoveAtom(0)
			n := e.AddAtom(Atom{Element: 7, Hydrogens: 2})
			e.AddBond(1, n, 1)
		}, "Nc1ccc([N+](=O)[O-])cc1"},
		{"protonation", "c1ccncc1", func(e *Editor) {
			e.Atom(3).Charge = 1
			e.SetHydrogens(3, 1)
		}, "c1cc[nH+]cc1"},
		{"radical", "CC", func(e *Editor) { e.SetHydrogens(0, 2) }, "[CH2]C"},
		{"dearomatization", "Oc1ccccc1", func(e *Editor) {
			// phenol to cyclohexa-2,4-dienone
			for _, h := range []int{1, 2, 3, 4, 5, 6} {
				next := h + 1
				if h == 6 {
					next = 1
				}
				e.SetOrder(h, next, 1)
			}
			e.SetOrder(0, 1, 2)
			e.SetHydrogens(0, 0)
			e.SetHydrogens(2, 2)
			e.SetOrder(3, 4, 2)
			e.SetOrder(5, 6, 2)
		}, "O=C1CC=CC=C1"},
		{"hydrogen as an atom", "C[C@](F)(Cl)O", func(e *Editor) {
			e.ReplaceLigand(1, 2, e.AddAtom(Atom{Element: 1}))
			e.RemoveAtom(2)
		}, "C[C@H](Cl)O"},
		{"breaking in two", "CCOCC", func(e *Editor) {
			e.RemoveBond(2, 3)
			e.SetHydrogens(2, 1)
			e.SetHydrogens(3, 3)
		}, "CCO.CC"},

		// Configurations.
		{"untouched centre", "C[C@H](N)c1ccccc1", func(e *Editor) {
			e.ReplaceLigand(6, ImplicitLigand, e.AddAtom(Atom{Element: 35}))
		}, "C[C@H](N)c1ccc(Br)cc1"},
		{"ligand in place", "C[C@H](Cl)O", func(e *Editor) {
			e.ReplaceLigand(1, 2, e.AddAtom(Atom{Element: 35}))
			e.RemoveAtom(2)
		}, "C[C@H](Br)O"},
		{"hydrogen in place", "C[C@H](Cl)O", func(e *Editor) {
			e.ReplaceLigand(1, ImplicitLigand, e.AddAtom(Atom{Element: 9}))
		}, "C[C@](F)(Cl)O"},
		{"ligand by hydrogen", "C[C@](F)(Cl)O", func(e *Editor) {
			e.ReplaceLigand(1, 2, ImplicitLigand)
			e.RemoveAtom(2)
		}, "C[C@H](Cl)O"},
		{"two ligands swapped", "C[C@H](Cl)O", func(e *Editor) {
			br := e.AddAtom(Atom{Element: 35})
			e.ReplaceLigand(1, 2, br) // Cl by Br
			e.ReplaceLigand(1, 3, 2)  // O by Cl
			e.ReplaceLigand(1, br, 3) // Br by O
			e.RemoveAtom(br)
		}, "C[C@@H](Cl)O"},
		{"way unknown", "C[C@H](Cl)O", func(e *Editor) {
			e.RemoveBond(1, 2)
			e.RemoveAtom(2)
			e.AddBond(1, e.AddAtom(Atom{Element: 35}), 1)
		}, "CC(Br)O"},
		{"oxidation to the ketone", "C[C@H](O)CC", func(e *Editor) {
			e.SetOrder(1, 2, 2)
			e.SetHydrogens(1, 0)
			e.SetHydrogens(2, 0)
		}, "CC(=O)CC"},
		{"carbocation", "C[C@H](Cl)CC", func(e *Editor) {
			e.RemoveAtom(2)
			e.Atom(1).Charge = 1
		}, "C[CH+]CC"},
		{"deprotonation", "C[C@H](F)Cl", func(e *Editor) {
			e.SetHydrogens(1, 0)
			e.Atom(1).Charge = -1
		}, "C[C-](F)Cl"},
		{"bond and back", "C[C@H](F)Cl", func(e *Editor) {
			e.RemoveBond(1, 2)
			e.AddBond(1, 2, 1)
		}, "C[C@H](F)Cl"},
		{"sulfoxide to sulfone", "C[S@](=O)CC", func(e *Editor) {
			e.AddBond(1, e.AddAtom(Atom{Element: 8}), 2)
		}, "CS(=O)(=O)CC"},
		{"renumbering by a removed atom", "CC.C[C@H](F)Cl", func(e *Editor) {
			e.RemoveAtom(0)
			e.RemoveAtom(1)
		}, "C[C@H](F)Cl"},
		{"merged centre", "CC", func(e *Editor) {
			m, _ := ParseSMILES("C[C@H](F)Cl")
			at := e.Merge(m)
			e.ReplaceLigand(at, ImplicitLigand, 0)
			e.SetHydrogens(0, 2)
		}, "CCC[C@H](F)Cl"},

		// Double bonds.
		{"vinyl substituent in place", "F/C=C/Cl", func(e *Editor) {
			e.ReplaceLigand(2, 3, e.AddAtom(Atom{Element: 35}))
			e.RemoveAtom(3)
		}, "F/C=C/Br"},
		{"vinyl hydrogen", "F/C=C/Cl", func(e *Editor) {
			e.ReplaceLigand(2, ImplicitLigand, e.AddAtom(Atom{Element: 35}))
		}, "F/C=C(\\Br)Cl"},
		{"vinyl substituent exchanged by hand", "F/C=C/Cl", func(e *Editor) {
			e.RemoveAtom(3)
			e.AddBond(2, e.AddAtom(Atom{Element: 35}), 1)
		}, "F/C=C/Br"},
		{"the other substituent tells", "F/C=C(\\C)Cl", func(e *Editor) {
			for _, old := range []int{3, 4} {
				if e.Order(2, old) == 1 && e.Atom(old).Element == 17 {
					e.RemoveAtom(old)
				}
			}
			e.AddBond(2, e.AddAtom(Atom{Element: 35}), 1)
		}, "F/C=C(\\C)Br"},
		{"substituent lost", "F/C=C/Cl", func(e *Editor) {
			e.RemoveAtom(3)
			e.SetHydrogens(2, 2)
		}, "FC=C"},
		{"to the single bond and back", "F/C=C/Cl", func(e *Editor) {
			e.SetOrder(1, 2, 1)
			e.SetOrder(1, 2, 2)
		}, "FC=CCl"},
		{"hydrogenation", "F/C=C/Cl", func(e *Editor) {
			e.SetOrder(1, 2, 1)
			e.SetHydrogens(1, 2)
			e.SetHydrogens(2, 2)
		}, "FCCCl"},
		{"far away", "C/C=C/CO", func(e *Editor) {
			e.ReplaceLigand(4, ImplicitLigand, e.AddAtom(Atom{Element: 6, Hydrogens: 3}))
		}, "C/C=C/COC"},
		{"cumulated chain", "F/C=C=C=C/Cl", func(e *Editor) {
			e.ReplaceLigand(4, 5, e.AddAtom(Atom{Element: 35}))
			e.RemoveAtom(5)
		}, "F/C=C=C=C/Br"},
		{"allene, ligand in place", "FC=[C@]=CCl", func(e *Editor) {
			e.ReplaceLigand(3, 4, e.AddAtom(Atom{Element: 35}))
			e.RemoveAtom(4)
		}, "FC=[C@]=CBr"},
		{"allene, way unknown", "FC=[C@]=CCl", func(e *Editor) {
			e.RemoveAtom(4)
			e.AddBond(3, e.AddAtom(Atom{Element: 35}), 1)
		}, "FC=C=CBr"},
		{"allene to alkene", "FC=[C@]=CCl", func(e *Editor) {
			e.SetOrder(2, 3, 1)
			e.SetHydrogens(2, 1)
			e.SetHydrogens(3, 2)
		}, "FC=CCCl"},
	} {
		m := mustParse(t, c.smiles)
		before := m.SMILES()
		e := m.Edit()
		c.steps(e)
		got, err := e.Done()
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if want := mustParse(t, c.want); got.SMILES() != want.SMILES() {
			t.Errorf("%s: got %s, want %s", c.name, got.SMILES(), want.SMILES())
		}
		if m.SMILES() != before || !sameStereo(m, mustParse(t, c.smiles)) {
			t.Errorf("%s: the original is changed to %s", c.name, m.SMILES())
		}
		checkConsistent(t, c.name, got)
	}
}

func sameStereo(a, b *Molecule) bool {
	for i := range a.Atoms {
		if fmt.Sprint(a.Atoms[i].Stereo) != fmt.Sprint(b.Atoms[i].Stereo) {
			return false
		}
	}
	for i := range a.Bonds {
		if a.Bonds[i] != b.Bonds[i] {
			return false
		}
	}
	return true
}

// checkConsistent looks for references to atoms that are not there, and for
// configurations without ligands.
func checkConsistent(t testing.TB, name string, m *Molecule) {
	t.Helper()
	for i := range m.Bonds {
		b := &m.Bonds[i]
		if b.Order < 1 || b.A < 0 || b.B < 0 || b.A >= len(m.Atoms) || b.B >= len(m.Atoms) || b.A == b.B {
			t.Errorf("%s: bond %+v", name, *b)
		}
		if b.Geometry != NoGeometry {
			for _, r := range []int{b.RefA, b.RefB} {
				if r < 0 || r >= len(m.Atoms) {
					t.Errorf("%s: bond %+v", name, *b)
				}
			}
		}
	}
	for i := range m.Atoms {
		s := m.Atoms[i].Stereo
		for _, l := range s.Ligands {
			if l < ImplicitLigand || l >= len(m.Atoms) || s.Class == Tetrahedral && l >= 0 && m.BondBetween(i, l) < 0 {
				t.Errorf("%s: atom %d has %+v", name, i, s)
			}
		}
	}
	if m.Points != nil && len(m.Points) != len(m.Atoms) {
		t.Errorf("%s: %d points for %d atoms", name, len(m.Points), len(m.Atoms))
	}
}

func TestEditorNumbers(t *testing.T) {
	m := mustParse(t, "CCO")
	e := m.Edit()
	e.RemoveAtom(0)
	n := e.AddAtom(Atom{Element: 7, Hydrogens: 2})
	e.AddBond(1, n, 1)
	e.AddAtom(Atom{Element: 8, Number: 17, Hydrogens: 2})
	e.AddAtom(Atom{Element: 8, Hydrogens: 2})
	got, err := e.Done()
	if err != nil {
		t.Fatal(err)
	}
	var numbers []string
	for _, a := range got.Atoms {
		numbers = append(numbers, fmt.Sprintf("%s%d@%d", Symbol(a.Element), a.Number, a.Offset))
	}
	if s := strings.Join(numbers, " "); s != "C2@1 O3@2 N4@-1 O17@0 O18@-1" {
		t.Errorf("atoms %s", s)
	}
}

func TestEditorRefusals(t *testing.T) {
	for _, c := range []struct {
		name  string
		steps func(e *Editor)
		want  string
	}{
		{"no atom", func(e *Editor) { e.AddBond(0, 9, 1) }, "the molecule has no atom of index 9 to edit"},
		{"negative", func(e *Editor) { e.RemoveAtom(-1) }, "the molecule has no atom of index -1 to edit"},
		{"removed", func(e *Editor) { e.RemoveAtom(0); e.SetHydrogens(0, 1) }, "the molecule has no atom of index 0 to edit"},
		{"twice", func(e *Editor) { e.AddBond(0, 1, 1) }, "C-1 and C-2 are bonded already"},
		{"self", func(e *Editor) { e.AddBond(0, 0, 1) }, "C-1 cannot be bonded to itself"},
		{"order", func(e *Editor) { e.AddBond(0, 2, 5) }, "a bond of order 5 between C-1 and O-3 is impossible"},
		{"set order", func(e *Editor) { e.SetOrder(0, 1, 0) }, "a bond of order 0 between C-1 and C-2 is impossible"},
		{"no bond", func(e *Editor) { e.RemoveBond(0, 2) }, "C-1 and O-3 are not bonded"},
		{"no bond to change", func(e *Editor) { e.SetOrder(0, 2, 2) }, "C-1 and O-3 are not bonded"},
		{"hydrogens", func(e *Editor) { e.SetHydrogens(0, -1) }, "C-1 cannot have -1 hydrogens"},
		{"nothing to replace", func(e *Editor) { e.SetHydrogens(0, 0); e.ReplaceLigand(0, ImplicitLigand, 2) }, "C-1 has no hydrogen to replace"},
		{"no ligand", func(e *Editor) { e.ReplaceLigand(0, 2, 1) }, "C-1 and O-3 are not bonded"},
		{"ligand there", func(e *Editor) { e.ReplaceLigand(1, 0, 2) }, "C-2 and O-3 are bonded already"},
		{"hydrogen for a double bond", func(e *Editor) { e.SetOrder(0, 1, 2); e.ReplaceLigand(0, 1, ImplicitLigand) }, "a hydrogen cannot take the place of a ligand with a bond of order 2"},
		{"valence", func(e *Editor) { e.SetOrder(0, 1, 3) }, "column 1: carbon has 6 bonds, at most 4 are possible; check for a surplus bond, a surplus hydrogen or a missing charge"},
		{"hydrogen", func(e *Editor) { e.AddAtom(Atom{Element: 1, Hydrogens: 1}) }, "hydrogen 4 cannot carry hydrogens that are no nodes"},
		{"scratch atom", func(e *Editor) { e.Atom(7).Charge = 3 }, "the molecule has no atom of index 7 to edit"},
	} {
		e := mustParse(t, "CCO").Edit()
		c.steps(e)
		m, err := e.Done()
		if err == nil {
			t.Errorf("%s: gives %s", c.name, m.SMILES())
		} else if err.Error() != c.want {
			t.Errorf("%s: got %q, want %q", c.name, err, c.want)
		}
	}
}

// Coordinates stay with the atoms that are left, and go where atoms are added.
func TestEditorPoints(t *testing.T) {
	m, err := readMolfile(strings.NewReader(vinylAmine), "")
	if err != nil {
		t.Fatal(err)
	}
	e := m.Edit()
	e.RemoveAtom(0)
	e.SetHydrogens(1, 3)
	got, err := e.Done()
	if err != nil {
		t.Fatal(err)
	}
	if got.SMILES() != "CN" && got.SMILES() != "NC" || len(got.Points) != 2 || got.Points[1] != (Point{1.299, 0.75}) {
		t.Errorf("%s with %v", got.SMILES(), got.Points)
	}
	e = m.Edit()
	e.AddAtom(Atom{Element: 8, Hydrogens: 2})
	if got, err = e.Done(); err != nil || got.Points != nil {
		t.Errorf("points %v, error %v", got.Points, err)
	}
}

func ExampleMolecule_Edit() {
	m, _ := ParseSMILES("c1ccc2ccccc2c1")
	e := m.Edit()
	e.ReplaceLigand(4, ImplicitLigand, e.AddAtom(Atom{Element: 35}))
	product, err := e.Done()
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(product.Formula())
	// Output: C10H7Br
}

func BenchmarkEditor(b *testing.B) {
	m, err := ParseSMILES("COc1ccc2[nH]cc(CCNC(C)=O)c2c1")
	if err != nil {
		b.Fatal(err)
	}
	b.Run("substitution", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			e := m.Edit()
			e.ReplaceLigand(3, ImplicitLigand, e.AddAtom(Atom{Element: 35}))
			if _, err := e.Done(); err != nil {
				b.Fatal(err)
			}
		}
	})
	// What finishing alone costs.
	b.Run("finish", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			c := &Molecule{Atoms: append([]Atom(nil), m.Atoms...), Bonds: append([]Bond(nil), m.Bonds...)}
			if err := c.finish(); err != nil {
				b.Fatal(err)
			}
		}
	})
}
