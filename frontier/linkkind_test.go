package frontier

import (
	"testing"

	"lobecast/frontier/molecule"
)

// TestLinkKinds checks which links between carbons are told apart: none within rings of
// π atoms nor where a charge may move, so that the drawn bond order decides nothing that
// another drawing would change.
func TestLinkKinds(t *testing.T) {
	for _, x := range []struct {
		smiles string
		a, b   int
		want   LinkKind
	}{
		{"C=CC=C", 0, 1, DoubleLink},
		{"C=CC=C", 1, 2, SingleLink},
		{"C=CC=O", 1, 2, AcylLink},
		{"C=CC#N", 1, 2, AcylLink},
		{"C=Cc1ccccc1", 1, 2, ArylLink},
		{"c1ccccc1-c1ccccc1", 5, 6, ArylLink},
		{"c1ccccc1", 0, 1, AnyLink},
		{"O=C1C=CC(=O)C=C1", 2, 3, AnyLink},
		{"C1=CCC=C1", 0, 1, DoubleLink},
		{"CN(C)C=CC=[N+](C)C", 3, 4, AnyLink},
		{"[CH2+]C=C", 0, 1, AnyLink},
		{"O=[N+]([O-])C=C", 3, 4, DoubleLink},
	} {
		m, err := molecule.ParseSMILES(x.smiles)
		if err != nil {
			t.Fatal(err)
		}
		pi, err := Perceive(m, Options{})
		if err != nil {
			t.Fatal(err)
		}
		found := false
		for _, l := range pi.Links {
			if i, j := pi.Centres[l.I].Atom, pi.Centres[l.J].Atom; i == x.a && j == x.b || i == x.b && j == x.a {
				found = true
				if l.Kind != x.want {
					t.Errorf("%s, atoms %d and %d: kind %d, expected %d", x.smiles, x.a, x.b, l.Kind, x.want)
				}
			}
		}
		if !found {
			t.Errorf("%s: no link between atoms %d and %d", x.smiles, x.a, x.b)
		}
	}
	for _, name := range []string{"van-catledge-1980", "streitwieser-1961"} {
		s, err := Load(name)
		if err != nil {
			t.Fatal(err)
		}
		for _, p := range linkKindNames {
			if v, _ := s.Value(p); v != 1 {
				t.Errorf("%s: %s is %v; the published sets have one k for all C–C links", name, p, v)
			}
		}
	}
}
