package molecule

import (
	"fmt"
	"strings"
	"sync"
	"testing"
	"time"
)

func mustParse(t testing.TB, smiles string) *Molecule {
	t.Helper()
	m, err := ParseSMILES(smiles)
	if err != nil {
		t.Fatalf("%s: %v", smiles, err)
	}
	return m
}

// The counts follow from the rules in the documentation of Pattern; those marked RDKit
// agree with the number of unique matches of RDKit 2022.09.3 for the SMARTS beside.
func TestPatternFind(t *testing.T) {
	for _, c := range []struct {
		pattern, smiles string
		n               int
	}{
		{"c1ccccc1", "c1ccc2ccccc2c1", 2}, // RDKit c1ccccc1
		{"C1=CC=CC=C1", "c1ccc2ccccc2c1", 2},
		{"c1ccccc1", "C1CCCCC1", 0},
		{"C=C", "c1ccccc1", 0}, // RDKit C=C
		{"C=C", "C=CC=CC=C", 3},
		{"*=*", "C=CC=O", 2},
		{"C=CC=O", "CC(=O)C=CC", 1},
		{"C=CC=C", "C1=CC=CC1", 1},
		{"C=CC=C", "C=CC=CC=C", 2},
		{"*c1ccccc1", "c1ccc2ccccc2c1", 0},
		{"*c1ccccc1", "Cc1ccccc1C", 2},
		{"*c1ccccc1", "c1ccccc1-c1ccccc1", 2},
		{"c1ccccc1-c1ccccc1", "c1ccccc1-c1ccccc1", 1},
		{"O", "OCC[O-]", 1},
		{"[O-]", "OCC[O-]", 1},
		{"[OH]", "OCC(=O)OC", 1},
		{"[NH2]", "NCC(=O)NC", 1},
		{"N", "NCC(=O)NC", 2},
		{"[NH]", "c1cc[nH]c1", 0},
		{"[nH]1cccc1", "c1ccc2[nH]ccc2c1", 1},
		{"n1ccccc1", "c1ccc2[nH]ccc2c1", 0},
		{"[N+](=O)[O-]", "O=[N+]([O-])c1ccccc1[N+](=O)[O-]", 2},
		{"N=[N+]=[N-]", "CN=[N+]=[N-]", 1},
		{"OO", "CC(=O)OOC(C)=O", 1},
		{"C#N", "N#CC(C#N)=C", 2},
		{"C(F)(F)F", "FC(F)(F)C(F)F", 1},
		{"[13C]", "[13CH3]C", 1},
		{"C", "[13CH3]C", 2},
		{"Cl.Br", "ClCCBr", 1},
		{"C.C", "CC", 1},
		{"C.C", "C", 0},
		{"*", "CCO", 3},
		{"[*+]", "C[N+](C)(C)C", 1},
		{"*1*****1", "C1CCCCC1.c1ccncc1", 1}, // single bonds, as written
		{"c1cc*cc1", "c1ccncc1", 1},
		{"c1cc*cc1", "c1cc[o+]cc1", 1},
		{"c1cc*cc1", "C1CCNCC1", 0},
		{"cc", "c1ccccc1-c1ccccc1", 13},  // RDKit cc
		{"c:c", "c1ccccc1-c1ccccc1", 12}, // RDKit c:c
		{"c-c", "c1ccccc1-c1ccccc1", 1},  // RDKit c-c
		{"cC=O", "O=Cc1ccc(C=O)cc1", 2},  // RDKit cC=O
		{"c[N+](=O)[O-]", "C[N+](=O)[O-].[O-][N+](=O)c1ccccc1", 1},
		{"[nH]cn", "c1c[nH]cn1", 1}, // RDKit [nH]cn
		{"ccO", "Oc1ccccc1", 2},     // RDKit ccO
		{"*:n", "c1ccncc1", 2},      // RDKit *:n
		{"c1ccc1", "C1=CC=C1", 1},   // lower case, but not aromatic
		{"C1CC1", "C1CC1C1CC1", 2},
		{"C1CC1", "C1CCC1", 0},
		{"CCC", "CC(C)C", 3}, // RDKit CCC
		{"C(=O)O", "CC(=O)OC(C)=O", 2},
		{"S(=O)=O", "CS(=O)(=O)c1ccccc1", 1},
		{"[Mg]", "C[Mg]Br", 1},
		{"P", "CP(C)C", 1},
		{"[C@H](F)(Cl)Br", "F[C@@H](Cl)Br", 1},
		{"[CH3:1][OH:2]", "CO", 1},
	} {
		p, err := NewPattern(c.pattern)
		if err != nil {
			t.Errorf("%s: %v", c.pattern, err)
			continue
		}
		m := mustParse(t, c.smiles)
		found := p.Find(m)
		if len(found) != c.n {
			t.Errorf("%s in %s: found %v, want %d", c.pattern, c.smiles, found, c.n)
		}
		if p.Has(m) != (len(found) > 0) {
			t.Errorf("%s in %s: Has and Find disagree", c.pattern, c.smiles)
		}
	}
}

// Found atoms come in the order of the pattern, whatever the numbering of the
// molecule, and the list is sorted.
func TestPatternOrder(t *testing.T) {
	p := MustPattern("C=CC=O")
	if p.String() != "C=CC=O" || p.Atoms() != 4 {
		t.Errorf("pattern %s of %d atoms", p, p.Atoms())
	}
	m := mustParse(t, "O=C(C=C)CCC(=O)C=C")
	if got := fmt.Sprint(p.Find(m)); got != "[[3 2 1 0] [9 8 6 7]]" {
		t.Errorf("found %s", got)
	}
	perm := []int{9, 3, 5, 0, 1, 2, 8, 7, 6, 4}
	for _, f := range p.Find(m.Renumber(perm)) {
		back := fmt.Sprint(f)
		if back != fmt.Sprint([]int{perm[3], perm[2], perm[1], perm[0]}) && back != fmt.Sprint([]int{perm[9], perm[8], perm[6], perm[7]}) {
			t.Errorf("found %s in the renumbered molecule", back)
		}
	}
}

// A lower-case atom may stand outside a ring: any aromatic carbon that bears CHO.
func TestPatternLoneAromaticAtom(t *testing.T) {
	p := MustPattern("cC=O")
	if !p.Has(mustParse(t, "O=Cc1ccccc1")) || p.Has(mustParse(t, "O=CC1CCCCC1")) {
		t.Error("cC=O must find benzaldehyde and not cyclohexanecarbaldehyde")
	}
}

func TestPatternRefusals(t *testing.T) {
	for _, s := range []string{"", "C(", "c1cccc1", "C~C", "[#6]", "[!C]", "[C,N]", strings.Repeat("C", 300), "C$$C", "*=*="} {
		if p, err := NewPattern(s); err == nil {
			t.Errorf("%q is taken as %s", s, p)
		}
	}
	defer func() {
		if recover() == nil {
			t.Error("MustPattern does not panic")
		}
	}()
	MustPattern("C(")
}

// A symmetric structure without end does not hold up the search, nor do searches in
// parallel disturb one another.
func TestPatternHostile(t *testing.T) {
	m := mustParse(t, "C"+strings.Repeat("C(C)(C)", 300))
	p := MustPattern("*" + strings.Repeat("*", 100) + "F.O")
	long := MustPattern(strings.Repeat("*", 60))
	start := time.Now()
	if p.Has(m) {
		t.Error("fluorine found in an alkane")
	}
	var wg sync.WaitGroup
	for range 2 {
		wg.Go(func() {
			if !long.Has(m) {
				t.Error("no chain of 60 in a chain of 300")
			}
			long.Find(m)
		})
	}
	wg.Wait()
	if d := time.Since(start); d > 60*time.Second {
		t.Errorf("took %v", d)
	}
}

func ExamplePattern_Find() {
	enone := MustPattern("C=CC=O")
	m, _ := ParseSMILES("CC(=O)C=Cc1ccccc1")
	for _, atoms := range enone.Find(m) {
		fmt.Println("the β-carbon is atom", m.Atoms[atoms[0]].Number)
	}
	// Output: the β-carbon is atom 5
}

func BenchmarkPatternHas(b *testing.B) {
	m, err := ParseSMILES("CC(=O)Oc1ccccc1C(=O)NCCc1c[nH]c2ccc(OC)cc12")
	if err != nil {
		b.Fatal(err)
	}
	for _, s := range []string{"[N+](=O)[O-]", "OO", "C=CC=O", "c1ccccc1", "C(=O)O*"} {
		p := MustPattern(s)
		b.Run(s, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				p.Has(m)
			}
		})
	}
}
