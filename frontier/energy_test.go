package frontier

import (
	"math"
	"math/rand/v2"
	"testing"
)

// PiEnergy must be the Energy that Solve gives, degenerate and open shells included.
func TestPiEnergyAgreesWithSolve(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 6))
	for n := 1; n < 24; n++ {
		for _, ring := range []bool{true, false} {
			h := make([]float64, n*n)
			for i := range n {
				if !ring {
					h[i*n+i] = rng.NormFloat64()
				}
				if j := (i + 1) % n; j != i && (ring || j > i) {
					h[i*n+j], h[j*n+i] = 1, 1
				}
			}
			for electrons := 0.0; electrons <= 2*float64(n); electrons++ {
				o, err := Solve(n, h, electrons)
				if err != nil {
					t.Fatal(err)
				}
				e, err := PiEnergy(n, append([]float64(nil), h...), electrons)
				if err != nil {
					t.Fatal(err)
				}
				if math.Abs(e-o.Energy) > 1e-9 {
					t.Fatalf("%d centres, %g electrons: %g, Solve gives %g", n, electrons, e, o.Energy)
				}
			}
		}
	}
}
