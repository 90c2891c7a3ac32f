package reactivity

import (
	"testing"

	"lobecast/frontier/terms"
)

// The nucleophile that is stated must reach the fitted terms that weigh differently with
// it, as in the outcomes they were fitted to: fluoride leaves less well before sulfur, next
// to chloride, than before nitrogen or oxygen (common practice, no source).
func TestNucleophileReachesTheChances(t *testing.T) {
	m := mustParse(t, "Fc1ncc(Cl)nc1")
	chance := func(nucleophile string) float64 {
		j, err := Judge(m, Conditions{Nucleophile: nucleophile, Only: terms.NucleophilicSubstitution, NoLimits: true}, []terms.Toward{terms.Nucleophile})
		if err != nil {
			t.Fatal(err)
		}
		for _, s := range j.Attacks[0].Sites {
			if s.Atoms[0] == 1 {
				return *s.Chance
			}
		}
		t.Fatal("no chance at the carbon that bears fluorine")
		return 0
	}
	n, s, unknown := chance("N"), chance("S"), chance("")
	if s >= n {
		t.Errorf("fluoride displaced with %.3f by S, %.3f by N", s, n)
	}
	if unknown <= min(s, n) || unknown >= max(s, n, chance("O")) {
		t.Errorf("unknown nucleophile: %.3f lies outside N %.3f, S %.3f, O %.3f", unknown, n, s, chance("O"))
	}
}
