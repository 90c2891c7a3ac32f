package place

import (
	"fmt"
	"strings"
	"testing"
	"time"

	"lobecast/frontier/molecule"
)

// BenchmarkSite is what a survey pays for each line: one namer, one name.
func BenchmarkSite(b *testing.B) {
	for _, smiles := range []string{
		"COc1ccc(C(C)=O)cc1",
		"COc1ccc2[nH]cc(CCNC(C)=O)c2c1",
		"COc1cc2ncnc(Nc3ccc(F)c(Cl)c3)c2cc1OCCCN1CCOCC1",
		"c1ccc2ccc3cccc4ccc1c2c34",
	} {
		b.Run(smiles, func(b *testing.B) {
			m, err := molecule.ParseSMILES(smiles)
			if err != nil {
				b.Fatal(err)
			}
			m.Classes()
			b.ReportAllocs()
			for b.Loop() {
				NewNamer(m).Site([]int{4})
			}
		})
	}
}

// Ring systems drawn to be hard are answered in bounded time.
func TestHostileRings(t *testing.T) {
	for _, smiles := range []string{
		"C12C3C4C1C5C2C3C45",                     // cubane
		"c1cc2ccc3ccc4ccc5ccc6ccc1c1c2c3c4c5c61", // coronene
		"N12N3N4N1N5N2N3N45",                     // cubane of nitrogen
		strings.Repeat("c1ccccc1-", 200) + "c1ccccc1",
		ladder(11), ladder(75),
	} {
		m, err := molecule.ParseSMILES(smiles)
		if err != nil {
			t.Fatalf("%s: %v", smiles, err)
		}
		began := time.Now()
		n := NewNamer(m)
		for a := range m.Atoms {
			if n.Site([]int{a}) == "" {
				t.Errorf("%s: atom %d has no name", smiles, a+1)
			}
		}
		if d := time.Since(began); d > time.Second {
			t.Errorf("%s: took %v", smiles, d)
		}
	}
}

// ladder is n + 1 squares in a row, each sharing a side with the next.
func ladder(n int) string {
	var b strings.Builder
	b.WriteString("C1C2")
	for k := 2; k <= n; k++ {
		fmt.Fprintf(&b, "C%%%d", 10+k%80)
	}
	b.WriteString("CC")
	for k := n; k >= 2; k-- {
		fmt.Fprintf(&b, "C%%%d", 10+k%80)
	}
	b.WriteString("C2C1")
	return b.String()
}
