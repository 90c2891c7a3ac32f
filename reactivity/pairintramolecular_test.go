package reactivity

import (
	"strings"
	"testing"
)

// TestIntramolecularAdductsCanBeBuilt: whatever a molecule of the outcome files can do
// within itself, every adduct listed has a product of the same formula; the others are
// refused, none fails half-way.
func TestIntramolecularAdductsCanBeBuilt(t *testing.T) {
	judged := 0
	for _, file := range []string{"diels_alder.csv", "dipolar_and_other_cycloaddition.csv"} {
		for k, r := range outcomePairs(t, file) {
			if k%4 != 0 {
				continue
			}
			m := r.a
			if k%8 == 0 {
				m = r.b
			}
			p, err := Pair(m, nil, PairConditions{})
			if err != nil {
				if strings.HasPrefix(err.Error(), "adduct of") {
					t.Errorf("%s: %v", m.SMILES(), err)
				}
				continue
			}
			judged++
			for k := range p.Adducts {
				if len(p.Adducts[k].Products) == 0 {
					t.Errorf("%s: no product", m.SMILES())
				}
				for _, q := range p.Adducts[k].Products {
					if q.Molecule.Formula() != m.Formula() {
						t.Errorf("%s: product %s has another formula", m.SMILES(), q.SMILES)
					}
				}
			}
		}
	}
	if judged < 10 {
		t.Errorf("only %d molecules can add within themselves", judged)
	}
	t.Logf("%d molecules judged", judged)
}
