package frontier

import (
	"math"
	"testing"
	"time"

	"lobecast/frontier/molecule"
)

// FuzzPerceive: every structure that can be read has a π system or a refusal, in bounded
// time; the electrons of the system are those of its levels, the charges sum to what is
// left, and the matrix is symmetric and finite.
func FuzzPerceive(f *testing.F) {
	for _, s := range []string{
		"c1ccc2ccccc2c1", "COc1ccc2[nH]ccc2c1", "O=[N+]([O-])c1ccccc1", "CC(=O)Nc1ccc(O)cc1",
		"C=C=C=C", "C#CC=C=O", "[N-]=[N+]=CC(=O)OC", "C1=CC=C[CH-]1.[Na+]", "[CH2]C=C", "[CH2+]C=C[O-]",
		"c1cc[n+]([O-])cc1", "OB(O)c1ccsc1", "CS(=O)(=O)c1cc[o+]cc1", "C[N+](C)(C)c1c[nH]nn1",
		"[O-][O+]=O", "C1=CC2=CC=CC2=C1", "c1ccc2c(c1)[nH]c1ccccc12", "N#CC(C#N)=C(C#N)C#N", "[B-](F)(F)(F)c1ccccc1",
	} {
		f.Add(s)
	}
	set, err := Load(DefaultSet)
	if err != nil {
		f.Fatal(err)
	}
	f.Fuzz(func(t *testing.T, text string) {
		if len(text) > 300 {
			return
		}
		m, err := molecule.ParseSMILES(text)
		if err != nil {
			return
		}
		began := time.Now()
		pi, err := Perceive(m, Options{})
		if d := time.Since(began); d > 2*time.Second {
			t.Fatalf("%q took %v", text, d)
		}
		if err != nil {
			if err.Error() == "" {
				t.Errorf("%q: a refusal without a word", text)
			}
			return
		}
		sol, err := set.Solve(pi)
		if err != nil {
			return
		}
		for k, o := range sol.Systems {
			electrons, charge := 0.0, 0.0
			for _, n := range o.Occupation {
				electrons += n
			}
			if len(o.X) != o.N || math.Abs(electrons-o.Electrons) > 1e-6 {
				t.Errorf("%q: system %d of %d centres has %d levels with %g of %g electrons", text, k, o.N, len(o.X), electrons, o.Electrons)
			}
			for r := range o.N {
				charge += o.H[r*o.N+r]
				for s := range r {
					if h := o.H[r*o.N+s]; h != o.H[s*o.N+r] || math.IsNaN(h) || math.IsInf(h, 0) {
						t.Errorf("%q: matrix element %d, %d is %g and %g", text, r, s, h, o.H[s*o.N+r])
					}
				}
			}
			trace := 0.0
			for _, x := range o.X {
				trace += x
			}
			if math.Abs(trace-charge) > 1e-6*float64(1+o.N) {
				t.Errorf("%q: levels sum to %g, the diagonal to %g", text, trace, charge)
			}
		}
	})
}
