package molecule

import (
	"errors"
	"fmt"
	"testing"
	"time"
)

// FuzzParseSMILES reads any text; what is accepted must be written as a canonical string
// that is read back as the same molecule, also without configuration and after a change
// of the numbering, and what is refused must be refused with a place and an excerpt.
func FuzzParseSMILES(f *testing.F) {
	for _, s := range []string{
		"CCO", "c1ccccc1", "C[C@H](N)C(=O)O", "F/C=C/F", "C1CC2CCC1C2", "[13CH3-].[Na+]", "O=c1cccc[nH]1", "C%12CC%12", "CC=[C@]=CC",
		"C[Pt@SP2](F)(Cl)Br", "S[As@TB15](F)(Cl)(Br)N", "C[Co@OH12](F)(Cl)(Br)(I)S", "C/C=C=C=C/C", "*C", "[CH3:1]", "C1=CC=CC=CC=C1",
		"c1ccc2cccc2cc1", "O=n1ccccc1", "C\\C(=N/O)C", "[H][H]", "[H]/C(F)=C/F", "C$C", "c1ccccc1c1ccccc1", "C[C@@H]1CC[C@H](C)CC1",
	} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		if len(s) > 2000 {
			return
		}
		watch := time.AfterFunc(10*time.Second, func() { panic(fmt.Sprintf("%q takes too long", s)) })
		defer watch.Stop()
		m, err := ParseSMILES(s, AllowWildcard)
		if err != nil {
			var e *Error
			if !errors.As(err, &e) || e.Reason == "" || e.Column < 1 {
				t.Fatalf("%q: refused with %#v", s, err)
			}
			_ = e.Excerpt()
			return
		}
		written := m.SMILES()
		back, err := ParseSMILES(written, AllowWildcard)
		if err != nil {
			t.Fatalf("%q: written as %q, which is refused: %v", s, written, err)
		}
		if got := back.SMILES(); got != written {
			t.Fatalf("%q: written as %q, and that as %q", s, written, got)
		}
		if a, b := m.Formula(), back.Formula(); a != b {
			t.Fatalf("%q: %s, but written as %q: %s", s, a, written, b)
		}
		flat := m.FlatSMILES()
		if got := back.FlatSMILES(); got != flat {
			t.Fatalf("%q: written flat as %q, and after the way round as %q", s, flat, got)
		}
		perm := make([]int, len(m.Atoms))
		for i := range perm {
			perm[i] = len(perm) - 1 - i
		}
		if got := m.Renumber(perm).SMILES(); got != written {
			t.Fatalf("%q: written as %q and, renumbered, as %q", s, written, got)
		}
	})
}
