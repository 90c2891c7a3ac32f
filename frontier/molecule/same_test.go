package molecule

import "testing"

// Two ways of writing one constitution are the same; neighbours in structure are not.
func TestSameConstitution(t *testing.T) {
	for _, c := range []struct {
		a, b string
		same bool
	}{
		{"c1ccccc1O", "OC1=CC=CC=C1", true},
		{"C[C@H](N)O", "C[C@@H](N)O", true},
		{"F/C=C/F", `F/C=C\F`, true},
		{"[CH3:1]O", "C[OH:2]", true},
		{"CC.O", "O.CC", true},
		{"Cc1ccc(Br)cc1", "Cc1cccc(Br)c1", false},
		{"CCCCCCCCCCCCC(Br)CCCCCCCCCCCCC", "CCCCCCCCCCCC(Br)CCCCCCCCCCCCCC", false},
		{"C1CC1.C1CC1", "C1CCCCC1", false},
		{"[13CH4]", "C", false},
		{"[CH3]", "C", false},
		{"[O-]C", "[OH]C", false},
		{"C=CCC", "CC=CC", false},
		{"CC(=O)O", "COC=O", false},
	} {
		a, b := mustParse(t, c.a), mustParse(t, c.b)
		if got := a.SameConstitution(b); got != c.same || b.SameConstitution(a) != c.same {
			t.Errorf("%s and %s: same %v, want %v", c.a, c.b, got, c.same)
		}
		if equal := a.constitutionHash() == b.constitutionHash(); c.same && !equal {
			t.Errorf("%s and %s: one constitution with two hashes", c.a, c.b)
		}
	}
}
