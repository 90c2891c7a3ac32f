package molecule

import "testing"

// A mirror image is the enantiomer; of an achiral molecule it is the molecule, and twice
// the mirror image is the molecule again.
func TestMirrored(t *testing.T) {
	for _, c := range []struct{ a, b string }{
		{"C[C@H](N)C(=O)O", "C[C@@H](N)C(=O)O"},
		{"CC=[C@]=CC", "CC=[C@@]=CC"},
		{"C[C@H]1CC[C@@H](C)CC1", "C[C@H]1CC[C@@H](C)CC1"},
		{"F/C=C/F", "F/C=C/F"},
		{"CC(N)C(=O)O", "CC(N)C(=O)O"},
	} {
		a, b := mustParse(t, c.a), mustParse(t, c.b)
		if got := a.Mirrored().SMILES(); got != b.SMILES() {
			t.Errorf("%s: mirror image %s, want %s", c.a, got, b.SMILES())
		}
		if again := a.Mirrored().Mirrored().SMILES(); again != a.SMILES() {
			t.Errorf("%s: twice the mirror image %s", c.a, again)
		}
	}
}
