package symmetry

import "testing"

// One question from structure to verdict: search, both derivations, products of both
// modes, real path and π systems before and after.
func BenchmarkClosure(b *testing.B) {
	m := mustRead(b, `C/C=C/C=C\C=C\C`)
	b.ReportAllocs()
	for b.Loop() {
		if _, err := Closure(m); err != nil {
			b.Fatal(err)
		}
	}
}
