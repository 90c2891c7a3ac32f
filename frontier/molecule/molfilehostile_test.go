package molecule

import (
	"fmt"
	"strings"
	"testing"
	"time"
)

// big3000 builds a V3000 table of n atoms; place gives symbol and coordinates, bonds
// the type and ends of each bond.
func big3000(n int, place func(i int) string, bonds [][3]int) string {
	var b strings.Builder
	fmt.Fprintf(&b, "\n\n\n  0  0  0     0  0            999 V3000\nM  V30 BEGIN CTAB\nM  V30 COUNTS %d %d 0 0 0\nM  V30 BEGIN ATOM\n", n, len(bonds))
	for i := range n {
		fmt.Fprintf(&b, "M  V30 %d %s 0\n", i+1, place(i))
	}
	b.WriteString("M  V30 END ATOM\nM  V30 BEGIN BOND\n")
	for k, l := range bonds {
		fmt.Fprintf(&b, "M  V30 %d %d %d %d\n", k+1, l[0], l[1]+1, l[2]+1)
	}
	b.WriteString("M  V30 END BOND\nM  V30 END CTAB\nM  END\n")
	return b.String()
}

// The largest tables, built to be as awkward as possible, are read or refused in
// seconds.
func TestHostileMolfiles(t *testing.T) {
	const n = maxTableAtoms
	chain := func(kind int) (bonds [][3]int) {
		for i := range n - 1 {
			bonds = append(bonds, [3]int{kind, i, i + 1})
		}
		return bonds
	}
	closed := func(kind int) [][3]int { return append(chain(kind), [3]int{kind, n - 1, 0}) }
	zigzag := func(symbol string) func(int) string {
		return func(i int) string { return fmt.Sprintf("%s %d %d %d", symbol, i, i%2, i%3) }
	}
	var star, ladder [][3]int
	for i := 1; i < n; i++ {
		star = append(star, [3]int{1, 0, i})
	}
	ladder = chain(4)
	ladder[n-3][0], ladder[n-2][0] = 1, 1
	for i := 0; i+5 < n; i += 4 {
		ladder = append(ladder, [3]int{4, i, i + 5})
	}
	var bundle [][3]int // isobutane-like branching, every carbon with equal ligands
	for i := 1; i < n; i++ {
		bundle = append(bundle, [3]int{1, (i - 1) / 3, i})
	}
	for _, c := range []struct {
		name string
		text string
	}{
		{"chain in space", big3000(n, zigzag("C"), chain(1))},
		{"ring of double bonds", big3000(n, zigzag("C"), closed(2))},
		{"aromatic ring", big3000(n, zigzag("C"), closed(4))},
		{"aromatic ring of nitrogen", big3000(n-1, zigzag("N"), append(chain(4)[:n-2], [3]int{4, n - 2, 0}))},
		{"aromatic ladder", big3000(n, zigzag("C"), ladder)},
		{"star", big3000(n, zigzag("Pd"), star)},
		{"tree", big3000(n, zigzag("Si"), bundle)},
		{"no bonds", big3000(n, zigzag("O"), nil)},
		{"nitrogen chain in space", big3000(n, zigzag("N"), closed(1))},
		{"continued without end", "\n\n\n  0  0  0     0  0            999 V3000\n" + strings.Repeat("M  V30 -\n", 200000)},
		{"property lines without end", strings.TrimSuffix(vinylAmine, "M  END\n") + strings.Repeat("M  CHG  1   1   0\n", 200000)},
	} {
		start := time.Now()
		_, err := readMolfile(strings.NewReader(c.text), "")
		t.Logf("%s: %v (%v)", c.name, time.Since(start).Round(time.Millisecond), err)
		if d := time.Since(start); d > 10*time.Second {
			t.Errorf("%s took %v", c.name, d)
		}
	}
}
