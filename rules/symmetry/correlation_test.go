package symmetry

import (
	"math"
	"testing"
)

// chainClosure is the ring of an electrocyclic closure of n orbitals with the given
// electrons, the last link of the given sign.
func chainClosure(n, electrons int, sign float64) *Cycle {
	o := make([]Orbital, n)
	left := electrons
	for i := range o {
		o[i].Electrons = min(left, 1)
		left -= o[i].Electrons
	}
	for i := 0; left > 0; i++ {
		o[i].Electrons++
		left--
	}
	c := newCycle(o)
	for i := 0; i < n-1; i++ {
		p := piStrength
		if i == 0 || i == n-2 {
			p = 0
		}
		c.set(i, piStrength, p)
	}
	c.set(n-1, 0, sigmaStrength)
	c.Links[n-1].Sign = sign
	return c
}

// Electrocyclic closures of three to fourteen orbitals, neutral and charged: thermal
// closure is conrotatory for 4r electrons and disrotatory for 4q + 2, and light turns
// it round (Woodward, Hoffmann, J. Am. Chem. Soc. 1965, 87, 395).
func TestCorrelationOfClosures(t *testing.T) {
	for n := 3; n <= 14; n++ {
		for e := n - 1; e <= n+1; e++ {
			if e%2 == 1 {
				continue
			}
			for _, sign := range []float64{1, -1} {
				c := chainClosure(n, e, sign)
				r, err := c.Correlate()
				if err != nil {
					t.Errorf("%d orbitals, %d electrons, sign %g: %v", n, e, sign, err)
					continue
				}
				disrotatory := sign > 0
				want := verdict((e%4 == 2) == disrotatory)
				light := verdict((e%4 == 2) != disrotatory)
				if r.Thermal != want || r.Photochemical != light {
					t.Errorf("%d orbitals, %d electrons, sign %g: %s, %s (crossings %d); want %s, %s", n, e, sign, r.Thermal, r.Photochemical, r.Crossings, want, light)
				}
				if r.Crossings > 1 {
					t.Errorf("%d orbitals, %d electrons, sign %g: %d crossings", n, e, sign, r.Crossings)
				}
			}
		}
	}
}

var _ = math.Abs
