package molecule

import "testing"

// TestSameConfiguration groups ways of writing one stereoisomer; the groups of one list
// are different stereoisomers. That they are follows from the rules of the OpenSMILES
// specification and the definitions of enantiomer, diastereomer and meso form.
func TestSameConfiguration(t *testing.T) {
	lists := []struct {
		name   string
		groups [][]string
	}{
		{"alanine", [][]string{
			{"C[C@H](N)C(=O)O", "N[C@@H](C)C(=O)O", "OC(=O)[C@H](C)N", "[H][C@](C)(C(=O)O)N", "[C@H](N)(C)C(=O)O", "C[C@TH1H](N)C(O)=O"},
			{"C[C@@H](N)C(=O)O", "N[C@H](C)C(=O)O"},
			{"CC(N)C(=O)O"},
		}},
		{"but-2-ene", [][]string{
			{"C/C=C/C", `C\C=C\C`, `C(\C)=C/C`, `[H]/C(C)=C(\C)[H]`},
			{`C/C=C\C`, `C\C=C/C`, "C(/C)=C/C", `[H]/C(C)=C([H])/C`, "[H]/C(C)=C(/C)[H]"},
			{"CC=CC"},
		}},
		{"tartaric acid", [][]string{
			{"OC(=O)[C@H](O)[C@@H](O)C(=O)O", "O[C@@H](C(=O)O)[C@@H](O)C(=O)O"},
			{"OC(=O)[C@@H](O)[C@H](O)C(=O)O", "O[C@H](C(=O)O)[C@H](O)C(=O)O"},
			{"OC(=O)[C@@H](O)[C@@H](O)C(=O)O", "OC(=O)[C@H](O)[C@H](O)C(=O)O", "O[C@@H](C(=O)O)[C@H](O)C(=O)O"},
		}},
		{"1,4-dimethylcyclohexane", [][]string{
			{"C[C@H]1CC[C@@H](C)CC1", "C[C@@H]1CC[C@H](C)CC1"},
			{"C[C@H]1CC[C@H](C)CC1", "C[C@@H]1CC[C@@H](C)CC1"},
			{"CC1CCC(C)CC1", "C[C@H]1CCC(C)CC1"},
		}},
		{"1-methylcyclohexane", [][]string{{"C[C@H]1CCCCC1", "C[C@@H]1CCCCC1", "CC1CCCCC1"}}},
		{"2-methylpropane with marks", [][]string{{"C[C@H](C)O", "C[C@@H](C)O", "CC(C)O"}}},
		{"isobutene with marks", [][]string{{"C/C=C(/C)C", `C/C=C(\C)C`, "CC=C(C)C"}}},
		{"cyclohexene with marks", [][]string{{`C1CC/C=C\C1`, "C1CCC=CC1"}}},
		{"cyclooctene", [][]string{{`C1CCC/C=C\CC1`}, {"C1CCC/C=C/CC1"}, {"C1CCCC=CCC1"}}},
		{"pentane-2,3,4-triol", [][]string{
			// The middle carbon of the chiral isomers has two equal arms; that of the two
			// meso forms has not.
			{"C[C@H](O)[C@@H](O)[C@@H](O)C", "C[C@H](O)[C@H](O)[C@@H](O)C", "C[C@H](O)C(O)[C@@H](O)C"},
			{"C[C@H](O)[C@@H](O)[C@H](O)C"}, {"C[C@H](O)[C@H](O)[C@H](O)C"}, {"C[C@H](O)C(O)[C@H](O)C"},
		}},
		{"penta-2,3-diene", [][]string{
			{"CC=[C@]=CC", "CC=[C@AL1]=CC", "C(C)=[C@@]=CC", "[H]C(C)=[C@@]=CC"},
			{"CC=[C@@]=CC", "CC=[C@AL2]=CC", "C(C)=[C@]=CC", "CC([H])=[C@@]=CC"},
			{"CC=C=CC"},
		}},
		{"hexa-2,3,4-triene", [][]string{{"C/C=C=C=C/C", `C\C=C=C=C\C`}, {`C/C=C=C=C\C`}, {"CC=C=C=CC"}}},
		{"sulfoxide", [][]string{{"C[S@](=O)c1ccccc1", "c1ccccc1[S@](C)=O", "O=[S@](c1ccccc1)C"}, {"C[S@@](=O)c1ccccc1"}, {"CS(=O)c1ccccc1"}}},
		{"cisplatin", [][]string{
			{"N[Pt@SP1](N)(Cl)Cl", "Cl[Pt@SP1](Cl)(N)N", "N[Pt@SP1](Cl)(Cl)N", "N[Pt@SP2](Cl)(N)Cl"},
			{"N[Pt@SP2](N)(Cl)Cl", "N[Pt@SP1](Cl)(N)Cl"},
			{"N[Pt](N)(Cl)Cl"},
		}},
		{"octahedral, facial and meridional", [][]string{
			{"N[Co@OH1](N)(N)(Cl)(Cl)Cl", "Cl[Co@OH1](Cl)(Cl)(N)(N)N"}, {"N[Co@OH1](N)(Cl)(Cl)(Cl)N", "N[Co@OH1](Cl)(N)(Cl)(Cl)N"}, {"N[Co](N)(N)(Cl)(Cl)Cl"},
		}},
		{"two rings", [][]string{
			{"OC1CCC(CC1)C1CCC(O)CC1"},
			{"O[C@H]1CC[C@@H](CC1)[C@H]1CC[C@@H](O)CC1", "O[C@@H]1CC[C@H](CC1)[C@@H]1CC[C@H](O)CC1"},
			{"O[C@H]1CC[C@@H](CC1)[C@H]1CC[C@H](O)CC1"},
			{"O[C@H]1CC[C@H](CC1)[C@@H]1CC[C@H](O)CC1"},
		}},
		{"cis and trans arms", [][]string{
			{"C[C@](O)([C@H]1CC[C@@H](C)CC1)[C@H]1CC[C@H](C)CC1"}, {"C[C@@](O)([C@H]1CC[C@@H](C)CC1)[C@H]1CC[C@H](C)CC1"},
		}},
	}
	for _, l := range lists {
		seen := map[string]string{}
		for _, g := range l.groups {
			first := mustParse(t, g[0]).SMILES()
			for _, s := range g[1:] {
				if got := mustParse(t, s).SMILES(); got != first {
					t.Errorf("%s: %s is written as %s, and %s as %s", l.name, g[0], first, s, got)
				}
			}
			if other, ok := seen[first]; ok {
				t.Errorf("%s: %s and %s are both written as %s", l.name, other, g[0], first)
			}
			seen[first] = g[0]
			if got := mustParse(t, first).SMILES(); got != first {
				t.Errorf("%s: %s is written as %s, and that as %s", l.name, g[0], first, got)
			}
		}
	}
}
