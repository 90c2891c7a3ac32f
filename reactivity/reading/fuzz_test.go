package reading

import (
	"testing"
	"time"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// FuzzRead: every reaction that can be parsed is read or refused, in bounded time; what is
// read names atoms of its molecules, and a reaction that is none of the kinds says why.
func FuzzRead(f *testing.F) {
	for _, r := range []string{
		"Cc1ccccc1>>Cc1ccc(Br)cc1", "c1ccncc1.O=[N+]([O-])O>OS(=O)(=O)O>O=[N+]([O-])c1cccnc1",
		"Fc1ccc([N+](=O)[O-])cc1.NCC>>CCNc1ccc([N+](=O)[O-])cc1", "C=CC=C.C=CC=O>>O=CC1CCC=CC1",
		"C=CCOc1ccccc1>>C=CCc1ccccc1O", "C=CC(=O)C.CN>>CNCCC(=O)C", "C/C=C/C=C\\C>>C/C=C/C=C\\C",
		"[cH:1]1[cH:2]cccc1>>Br[c:1]1[cH:2]cccc1", "CC(=O)C>[Na+].[BH4-]>CC(O)C", "C=CC=CC=C>>C1=CC=CCC1",
		"[N-]=[N+]=NC.C#CC>>Cn1cc(C)nn1", "O=C1C=CC(=O)C=C1.C1=CCC=C1>>O=C1C=CC(=O)C2C3C=CC(C3)C12",
		"Brc1ccccc1.OB(O)c1ccccc1>[Pd]>c1ccc(-c2ccccc2)cc1", ">>", "C>>C", "CC=C>>CC(Br)C",
	} {
		f.Add(r, "NBS, MeCN, 0 °C")
	}
	f.Fuzz(func(t *testing.T, text, words string) {
		if len(text) > 200 || len(words) > 200 {
			return
		}
		rxn, err := molecule.ParseReaction(text)
		if err != nil {
			return
		}
		began := time.Now()
		x, err := Read(rxn, words, Stated{})
		if d := time.Since(began); d > 4*time.Second {
			t.Fatalf("%q took %v", text, d)
		}
		if err != nil {
			if err.Error() == "" {
				t.Errorf("%q: a refusal without a word", text)
			}
			return
		}
		if x.Kind == "" {
			t.Errorf("%q: no kind", text)
		}
		if x.Event != "" && x.Impossible == "" && x.Substrate == nil {
			t.Errorf("%q: %s of no substrate", text, x.Event)
		}
		for _, a := range x.Sites {
			if x.Substrate == nil || a < 0 || a >= len(x.Substrate.Atoms) {
				t.Errorf("%q: site %d is no atom of the substrate", text, a)
			}
		}
		if x.Kind == terms.Cycloaddition && x.Impossible == "" {
			second := x.Partner
			if second == nil {
				second = x.Substrate
			}
			if len(x.Bonds) != 2 {
				t.Fatalf("%q: cycloaddition with %d new bonds", text, len(x.Bonds))
			}
			for _, b := range x.Bonds {
				if b[0] < 0 || b[0] >= len(x.Substrate.Atoms) || b[1] < 0 || b[1] >= len(second.Atoms) {
					t.Errorf("%q: new bond %v joins no atoms", text, b)
				}
			}
		}
	})
}
