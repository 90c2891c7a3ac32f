package molecule

import (
	"fmt"
	"math/rand"
	"runtime"
	"strings"
	"testing"
	"time"
)

// hostileInputs are strings built to make a reader stall or run out of memory.
func hostileInputs() map[string]string {
	r := rand.New(rand.NewSource(5))
	lattice := func(layers, width int, atom string) string {
		// Each layer is bonded to the one before through ring closures left open.
		var b strings.Builder
		for l := 0; l < layers; l++ {
			for w := 0; w < width; w++ {
				b.WriteString(atom)
				fmt.Fprintf(&b, "%%%d", 10+w)
				if l > 0 && l < layers-1 {
					fmt.Fprintf(&b, "%%%d", 10+w)
				}
			}
		}
		return b.String()
	}
	ladder := func(n int, atom string) string {
		var b strings.Builder
		b.WriteString(atom + "1" + atom + "2")
		for i := 0; i < n; i++ {
			d := 1 + i%2
			fmt.Fprintf(&b, "%s%d%s%d", atom, d, atom, 3-d)
		}
		return b.String()
	}
	complete := func(n int) string {
		var b strings.Builder
		for i := 0; i < n; i++ {
			b.WriteString("[U]")
			for j := 0; j < i; j++ {
				fmt.Fprintf(&b, "%%%02d", (j*7+i)%100)
			}
		}
		return b.String()
	}
	cubic := func(n int) string {
		// A random graph of three bonds at each atom, by a ring with chords.
		var b strings.Builder
		var free []int
		open := map[int]int{}
		for d := 99; d >= 10; d-- {
			free = append(free, d)
		}
		b.WriteString("C1")
		var waiting []int
		for i := 1; i < n; i++ {
			b.WriteString("C")
			if len(waiting) > 0 && (len(free) == 0 || r.Intn(2) == 0) {
				k := r.Intn(len(waiting))
				d := waiting[k]
				waiting[k] = waiting[len(waiting)-1]
				waiting = waiting[:len(waiting)-1]
				fmt.Fprintf(&b, "%%%d", d)
				free = append(free, d)
				continue
			}
			d := free[len(free)-1]
			free = free[:len(free)-1]
			open[d] = i
			waiting = append(waiting, d)
			fmt.Fprintf(&b, "%%%d", d)
		}
		b.WriteString("C1")
		for _, d := range waiting {
			fmt.Fprintf(&b, "C%%%d", d)
		}
		return b.String()
	}
	fused := func(n int, unit string) string {
		return strings.Repeat(unit, n)
	}
	return map[string]string{
		"chain of 100000":            strings.Repeat("C", 100000),
		"chain of 19999":             strings.Repeat("C", 19999),
		"ring of 19999":              "C1" + strings.Repeat("C", 19997) + "C1",
		"polyene of 19998":           strings.Repeat("C=C", 9999),
		"polyene with marks":         "C" + strings.Repeat("/C=C/", 4000) + "C",
		"brackets 100000 deep":       strings.Repeat("C(", 100000),
		"branches 19000 deep":        strings.Repeat("C(", 19000) + "C" + strings.Repeat(")", 19000),
		"empty brackets":             strings.Repeat("[", 500000),
		"parentheses":                strings.Repeat("(", 500000),
		"19999 dots":                 strings.Repeat("C.", 19998) + "C",
		"6000 salts":                 strings.Repeat("[Na+].[Cl-].", 6000) + "O",
		"3000 benzenes":              strings.Repeat("c1ccccc1.", 3000) + "C",
		"100000 ring closures":       strings.Repeat("C1CC1", 50000),
		"6000 cyclopropanes":         strings.Repeat("C1CC1", 6000),
		"3000 phenyls":               strings.Repeat("C(c1ccccc1)", 2800),
		"2000 biphenyls in a ring":   "c1cc2ccc1" + strings.Repeat("c1ccc(cc1)", 1500) + "2",
		"star of 19998":              "[U]" + strings.Repeat("(C)", 19998),
		"tert-butyls":                strings.Repeat("C(C(C)(C)C)", 3900),
		"polyspiro":                  strings.Repeat("C12(CCC1)", 1) + strings.Repeat("C", 10),
		"ladder of 2000":             ladder(1000, "C"),
		"ladder of 19000":            ladder(9000, "C"),
		"aromatic ladder of 1800":    ladder(900, "c"),
		"aromatic ladder of 19000":   ladder(9000, "c"),
		"lattice 10 by 90":           lattice(10, 90, "C"),
		"lattice 200 by 90":          lattice(200, 90, "C"),
		"lattice of uranium":         lattice(22, 90, "[U]"),
		"complete graph":             complete(40),
		"random cubic of 300":        cubic(300),
		"random cubic of 1900":       cubic(1900),
		"random cubic of 19000":      cubic(18000),
		"marks on a chain":           strings.Repeat("[C@@H](C)", 9900) + "C",
		"marks without meaning":      strings.Repeat("[C@@H](C(C)C)(C(C)C)", 1) + strings.Repeat("[C@](C(C)C)(C(C)C)", 2500),
		"cyclohexanediyls":           strings.Repeat("[C@@H]1CC[C@H](CC1)", 2400) + "C",
		"cyclohexanediyls, few":      strings.Repeat("[C@@H]1CC[C@H](CC1)", 40) + "C",
		"naphthalenes":               fused(1900, "c1cc2cc(ccc2cc1)"),
		"odd aromatic chain":         strings.Repeat("c1cccc1", 2800),
		"one aromatic ring of 19999": "c1" + strings.Repeat("c", 19997) + "c1",
		"one aromatic ring of 19998": "c1" + strings.Repeat("c", 19996) + "c1",
		"azulenes":                   strings.Repeat("c1cc2ccc(ccc2c1)", 1900),
		"fused five-membered rings":  ladder(60, "c"),
		"isotopes":                   strings.Repeat("[999C]", 19999),
		"digits":                     "[" + strings.Repeat("9", 500000) + "C]",
		"charge signs":               "[Fe" + strings.Repeat("+", 500000) + "]",
		"percent signs":              "C" + strings.Repeat("%10", 100000),
		"bonds":                      "C" + strings.Repeat("=", 500000),
		"name":                       "C " + strings.Repeat("x", 900000),
		"two megabytes":              strings.Repeat("C", 2<<20),
		"bytes":                      strings.Repeat("\xff", 500000),
	}
}

// TestHostileInputs wants every hostile string to be refused or read, and then written
// and classified, in bounded time and memory. The bound asserted is ten times the aim
// of 200 ms, since tests share their machine; the log gives what was measured.
func TestHostileInputs(t *testing.T) {
	const aim, bound, memory = 200 * time.Millisecond, 2 * time.Second, 64 << 20
	for name, s := range hostileInputs() {
		var before, after runtime.MemStats
		runtime.GC()
		runtime.ReadMemStats(&before)
		start := time.Now()
		m, err := ParseSMILES(s)
		read := time.Since(start)
		if err == nil {
			m.SMILES()
		} else if e, ok := err.(*Error); !ok {
			t.Errorf("%s: error of type %T", name, err)
		} else if x := e.Excerpt(); len(x) > 1000 {
			t.Errorf("%s: excerpt of %d bytes", name, len(x))
		}
		written := time.Since(start)
		if err == nil {
			m.Classes()
		}
		took := time.Since(start)
		runtime.ReadMemStats(&after)
		bytes := after.TotalAlloc - before.TotalAlloc
		if took > aim || bytes > memory {
			t.Logf("%s: read %v, written %v, all %v, %d KiB, error %.80v", name, read, written, took, bytes>>10, err)
		}
		if took > bound {
			t.Errorf("%s took %v", name, took)
		}
		if bytes > 3*memory {
			t.Errorf("%s allocated %d MiB", name, bytes>>20)
		}
	}
}
