package review

import (
	"strings"
	"testing"
)

// Which adduct of cyclopentadiene and of furan with maleic anhydride is drawn, in either
// enantiomer. Cyclopentadiene gives endo, furan at equilibrium exo: O. Diels, K. Alder,
// Ber. Dtsch. Chem. Ges. 1929, 62, 554; R. B. Woodward, H. Baer, J. Am. Chem. Soc. 1948, 70,
// 1161 (citations from memory).
func TestEndoOrExoIsSaid(t *testing.T) {
	for _, c := range []struct{ reaction, says string }{
		{"C1=CC=CC1.O=C1C=CC(=O)O1>>O=C1OC(=O)[C@@H]2[C@H]1[C@@H]1C=C[C@H]2C1", "drawn is the endo adduct, which"},
		{"C1=CC=CC1.O=C1C=CC(=O)O1>>O=C1OC(=O)[C@H]2[C@@H]1[C@H]1C=C[C@@H]2C1", "drawn is the endo adduct, which"},
		{"C1=CC=CC1.O=C1C=CC(=O)O1>>O=C1OC(=O)[C@@H]2[C@H]1[C@H]1C=C[C@@H]2C1", "drawn is the exo adduct, and"},
		{"c1ccoc1.O=C1C=CC(=O)O1>>O=C1OC(=O)[C@@H]2[C@H]1[C@H]1C=C[C@@H]2O1", "drawn is the exo adduct, and"},
		{"C1=CC=CC1.O=C1C=CC(=O)O1>>O=C1OC(=O)C2C1C1C=CC2C1", ""},
	} {
		r := reviewed(t, "[[step]]\nreaction = '"+c.reaction+"'\n")
		reason := r.Step[0].Reason
		if !strings.Contains(reason, c.says) || c.says == "" && strings.Contains(reason, "drawn is") {
			t.Errorf("%s: %s", c.reaction, reason)
		}
	}
}
