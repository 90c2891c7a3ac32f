package molecule

import (
	"errors"
	"fmt"
	"slices"
	"strings"
	"testing"
)

func TestParseReaction(t *testing.T) {
	const text = "  [CH2:1]=[CH2:2].[H]C(=O)C.[Na+].[Cl-]>C1CC2.O12>[CH3:1][CH3:2]  a test step"
	r, err := ParseReaction(text)
	if err != nil {
		t.Fatal(err)
	}
	if len(r.Reactants) != 4 || len(r.Agents) != 1 || len(r.Products) != 1 {
		t.Fatalf("%d reactants, %d agents, %d products", len(r.Reactants), len(r.Agents), len(r.Products))
	}
	if r.Name != "a test step" || r.Source != text {
		t.Errorf("name %q, source %q", r.Name, r.Source)
	}
	// The ring closure across the dot makes oxetane of the agents.
	if got := r.Agents[0].Formula(); got != "C3H6O" {
		t.Errorf("the agent is %s", got)
	}
	// Numbers run on as written, the folded hydrogen keeping its own.
	want := [][]int{{1, 2}, {4, 5, 6}, {7}, {8}, {9, 10, 11, 12}, {13, 14}}
	for i, m := range allMolecules(r) {
		var got []int
		for _, a := range m.Atoms {
			got = append(got, a.Number)
			if m.Source != text {
				t.Errorf("molecule %d has the source %q", i, m.Source)
			}
			symbol := strings.TrimLeft(text[a.Offset:], "[")
			if !strings.HasPrefix(symbol, Symbol(a.Element)) {
				t.Errorf("atom %d of molecule %d: the text at its offset is %q", a.Number, i, symbol)
			}
		}
		if fmt.Sprint(got) != fmt.Sprint(want[i]) {
			t.Errorf("molecule %d has the numbers %v, want %v", i, got, want[i])
		}
	}
	if i := r.Products[0].AtomByMap(2); i != 1 {
		t.Errorf("map 2 is at %d", i)
	}
}

func TestReactionParts(t *testing.T) {
	for _, c := range []struct {
		text                        string
		reactants, agents, products int
	}{
		{"C>>C", 1, 0, 1}, {"C=C.C=CC=C>>C1CCCC=C1", 2, 0, 1}, {">O>", 0, 1, 0}, {">>C", 0, 0, 1},
		{"C>>", 1, 0, 0}, {"C>[Na+].[OH-].O>C", 1, 3, 1}, {"C(.N)O>>C", 2, 0, 1}, {"C%10.C%10>>CC", 1, 0, 1},
		{"[2H]C>>[Cl-].[13CH4]", 1, 0, 2},
	} {
		r, err := ParseReaction(c.text)
		if err != nil {
			t.Errorf("%s: %v", c.text, err)
			continue
		}
		if len(r.Reactants) != c.reactants || len(r.Agents) != c.agents || len(r.Products) != c.products {
			t.Errorf("%s: %d, %d, %d molecules", c.text, len(r.Reactants), len(r.Agents), len(r.Products))
		}
	}
}

var reactionRefusals = []struct{ text, want string }{
	{"", "column 1: this is no reaction, the two > are missing; write reactants>agents>products; parts may be empty"},
	{"CCO", "column 4: this is no reaction, the two > are missing; write reactants>agents>products; parts may be empty"},
	{"CCO>CC", "column 7: the second > is missing; write reactants>agents>products; parts may be empty"},
	{"C>C>C>C", "column 6: there is a third >; give several steps one by one, each as reactants>agents>products"},
	{">>", "column 1: the reaction holds no molecule; write reactants>agents>products; parts may be empty"},
	{"  >>  name", "column 3: the reaction holds no molecule; write reactants>agents>products; parts may be empty"},
	{"C.>>C", "column 2: a molecule is missing beside the dot; remove the dot, or write the molecule"},
	{".C>>C", "column 1: a molecule is missing beside the dot; remove the dot, or write the molecule"},
	{"C..C>>C", "column 2: a molecule is missing beside the dot; remove the dot, or write the molecule"},
	{"C>.>C", "column 3: a molecule is missing beside the dot; remove the dot, or write the molecule"},
	{"C>>.C", "column 4: a molecule is missing beside the dot; remove the dot, or write the molecule"},
	{"C>>C.", "column 5: a molecule is missing beside the dot; remove the dot, or write the molecule"},
	{"C.CX>>C", "column 4: X is no chemical symbol; check the spelling"},
	{"C.C(C>>C", "column 4: the branch is not closed; close it with )"},
	{"CC>C1CC>CC", "column 5: ring closure 1 is never closed; write the same number at the atom where the ring ends"},
	{"C1CC.CC>>C1", "column 2: ring closure 1 is never closed; write the same number at the atom where the ring ends"},
	{"CC>CC>C)C", "column 8: there is no open branch to close; remove the ), or open the branch with ("},
	{"CC>>[C", "column 5: the bracket is not closed; close it with ]"},
	{"C[>]C", "column 6: the second > is missing; write reactants>agents>products; parts may be empty"},
	{"CC>>*Br", "column 5: * stands for no particular atom; write the atom that is meant"},
	{"CC>>C(C)(C)(C)(C)C", "column 5: carbon has 5 bonds, at most 4 are possible; check for a surplus bond or a missing charge"},
	{"CC>>c1cccc1", "column 5: no alternating double bonds fit this aromatic system: 5 of its 5 atoms ask for one, an odd number; write [nH], o or s for the atom that brings a lone pair, [cH-] or [cH+] for an ion, or capitals where the ring is not aromatic"},
	{"CC->C>C", "column 3: the bond leads to no atom; write the atom it leads to, or remove the bond"},
	{"CC >> CC", "column 3: the reaction breaks off at this blank, a > follows behind it; remove the blanks; only a name stands behind one"},
	{"CC> CC>C", "column 4: the reaction breaks off at this blank, a > follows behind it; remove the blanks; only a name stands behind one"},
	{"é>>C", "column 1: 'é' has no meaning in SMILES; remove it"},
	{"C[C@](F)>>C", "column 2: a tetrahedral centre has 4 ligands, this atom has 2; check the neighbours, or remove the @"},
}

func TestReactionRefusals(t *testing.T) {
	for i, c := range reactionRefusals {
		_, err := ParseReaction(c.text)
		if err == nil {
			t.Errorf("case %d: %q is read", i, c.text)
			continue
		}
		var e *Error
		if !errors.As(err, &e) {
			t.Errorf("%q: %v is no *Error", c.text, err)
			continue
		}
		if e.Text != c.text {
			t.Errorf("%q: the refusal shows %q", c.text, e.Text)
		}
		if got := err.Error(); got != c.want {
			t.Errorf("%q:\n got %s\nwant %s\n%s", c.text, got, c.want, e.Excerpt())
		}
	}
}

func ExampleParseReaction() {
	r, err := ParseReaction("C=CC=C.C=CC=O>ClCCl>O=CC1CCC=CC1 made up for this example")
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, m := range r.Reactants {
		fmt.Println(m.Formula(), "from atom", m.Atoms[0].Number)
	}
	fmt.Println(r.Products[0].Formula(), "from atom", r.Products[0].Atoms[0].Number)
	// Output:
	// C4H6 from atom 1
	// C3H4O from atom 5
	// C7H10O from atom 12
}

func ExampleError_Excerpt() {
	_, err := ParseReaction("C=CC=C.C=CC=O>>O=CC1CCC=CC")
	e := err.(*Error)
	fmt.Println(e)
	fmt.Print(e.Excerpt())
	// Output:
	// column 20: ring closure 1 is never closed; write the same number at the atom where the ring ends
	// C=CC=C.C=CC=O>>O=CC1CCC=CC
	//                    ^
}

// mappedReaction has 60 atoms, all mapped.
var mappedReaction = func() string {
	var b strings.Builder
	number := 0
	mapped := func(symbols ...string) {
		for _, s := range symbols {
			number++
			fmt.Fprintf(&b, s, number)
		}
	}
	for side := range 2 {
		number = 0
		if side == 1 {
			b.WriteString(">>")
		}
		mapped("[cH:%d]1", "[cH:%d]", "[cH:%d]", "[cH:%d]", "[cH:%d]", "[c:%d]1", "[CH2:%d]", "[CH2:%d]", "[C:%d](=[O:9])")
		number++
		mapped("[NH:%d]", "[CH2:%d]", "[CH2:%d]", "[CH2:%d]", "[CH2:%d]", "[O:%d]", "[CH2:%d]", "[CH2:%d]", "[CH:%d]=", "[CH:%d]", "[C:%d](=[O:22])")
		number++
		mapped("[O:%d]", "[CH2:%d]", "[CH2:%d]", "[N:%d]1", "[CH2:%d]", "[CH2:%d]", "[CH2:%d]", "[CH2:%d]1")
	}
	return b.String()
}()

func BenchmarkParseReaction(b *testing.B) {
	r, err := ParseReaction(mappedReaction)
	if err != nil {
		b.Fatal(err)
	}
	n := 0
	for _, m := range allMolecules(r) {
		n += len(m.Atoms)
	}
	b.ReportAllocs()
	for b.Loop() {
		if _, err := ParseReaction(mappedReaction); err != nil {
			b.Fatal(err)
		}
	}
	b.ReportMetric(float64(n), "atoms")
}

// allMolecules lists reactants, agents and products, in this order.
func allMolecules(r *Reaction) []*Molecule { return slices.Concat(r.Reactants, r.Agents, r.Products) }
