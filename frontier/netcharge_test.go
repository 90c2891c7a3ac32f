package frontier

import (
	"math"
	"testing"

	"lobecast/frontier/molecule"
)

// Charges of hydrocarbon ions: the squared coefficients of the nonbonding orbital, with the
// sign of the charge (H. C. Longuet-Higgins, J. Chem. Phys. 1950, 18, 265: ±1/2 at the ends
// of allyl, ±1/3 at positions 1, 3, 5 of pentadienyl, +4/7 and +1/7 in the benzyl cation),
// and by symmetry 1/7 in tropylium, −1/5 in cyclopentadienide.
func TestChargesOfIons(t *testing.T) {
	set, err := Load("van-catledge-1980")
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		smiles string
		want   []float64 // by atom
	}{
		{"[CH2+]C=C", []float64{0.5, 0, 0.5}},
		{"[CH2-]C=C", []float64{-0.5, 0, -0.5}},
		{"C=CC=C[CH2-]", []float64{-1. / 3, 0, -1. / 3, 0, -1. / 3}},
		{"[CH2+]c1ccccc1", []float64{4. / 7, 0, 1. / 7, 0, 1. / 7, 0, 1. / 7}},
		{"[CH+]1C=CC=CC=C1", []float64{1. / 7, 1. / 7, 1. / 7, 1. / 7, 1. / 7, 1. / 7, 1. / 7}},
		{"c1cc[cH-]c1", []float64{-0.2, -0.2, -0.2, -0.2, -0.2}},
	} {
		m, err := molecule.ParseSMILES(c.smiles)
		if err != nil {
			t.Fatal(err)
		}
		pi, err := Perceive(m, Options{})
		if err != nil {
			t.Fatal(err)
		}
		solution, err := set.Solve(pi)
		if err != nil {
			t.Fatal(err)
		}
		for i, want := range c.want {
			s, l, ok := solution.Find(i)
			if !ok {
				t.Fatalf("%s: atom %d is no π centre", c.smiles, i+1)
			}
			if got := pi.Charge(pi.CentreOf[i], solution.Systems[s].Populations()[l]); math.Abs(got-want) > 1e-9 {
				t.Errorf("%s: charge %.4f at atom %d, want %.4f", c.smiles, got, i+1, want)
			}
		}
	}
}
