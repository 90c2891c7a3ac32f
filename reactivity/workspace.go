package reactivity

import (
	"fmt"
	"math"

	"lobecast/frontier"
)

// Workspace computes the indices of one π system after another without allocating
// anew for each: [Workspace.Reset] takes the solution, the other methods read it.
// Slices they return belong to the workspace and hold until the next Reset, unless a
// destination was given. A workspace serves one goroutine.
type Workspace struct {
	o *frontier.Orbitals
	n int

	square []float64 // c²: square[r*n+j]

	// The gap through which the line of integration runs: below level cut-1 and above
	// level cut (counting from 0), its middle, half its width, and the quadrature.
	cut     int
	middle  float64
	half    float64
	rule    *rule
	scratch []float64

	localization Localization
	located      bool

	residue residueSolver
	place   []int // index of a centre in the residue
	lined   bool

	// For gradients along the line, see localizationgradient.go.
	columned bool
	orbital  []float64 // that of the residue at λ*, then scratch
	inverse  []float64
	levels   []float64 // coefficients, level by level
	elements []element // of H off the diagonal, row by row
	from     []int32   // where the elements of a row begin
	onLine   []float64 // scratch, then a column of the Green function at every node
}

// Reset makes o the system the workspace works on. It refuses what cannot be a
// solution: no centres, slices of wrong length, levels that are not numbers.
func (w *Workspace) Reset(o *frontier.Orbitals) error {
	n := o.N
	if n < 1 {
		return fmt.Errorf("no π centres to compute indices for")
	}
	if len(o.X) != n || len(o.C) != n*n || len(o.H) != n*n || len(o.Occupation) != n {
		return fmt.Errorf("π system of %d centres with %d levels, %d coefficients and %d matrix elements", n, len(o.X), len(o.C), len(o.H))
	}
	for _, x := range o.X {
		if math.IsNaN(x) || math.IsInf(x, 0) {
			return fmt.Errorf("a level of the π system is not a number: check the parameters")
		}
	}
	w.o, w.n = o, n
	w.square = grow(w.square, n*n)
	for i, c := range o.C {
		w.square[i] = c * c
	}
	w.located, w.lined, w.columned = false, false, false
	w.chooseGap()
	return nil
}

// grow returns a slice of length n, reusing s where it is large enough.
func grow(s []float64, n int) []float64 {
	if cap(s) < n {
		return make([]float64, n)
	}
	return s[:n]
}

// pairs is the number of levels that the electrons fill completely, less those that
// an odd electron leaves half filled.
func pairs(electrons float64) int { return int(math.Floor(electrons/2 + 1e-9)) }

// chooseGap picks the gap between two neighbouring levels, at or near the highest
// occupied one, that costs least: a narrow gap needs more nodes, one farther off needs
// extra roots.
func (w *Workspace) chooseGap() {
	x, n := w.o.X, w.n
	w.cut, w.rule = 0, nil
	if n < 2 {
		return
	}
	m := min(max(pairs(w.o.Electrons), 1), n-1)
	best := math.Inf(-1)
	for p := 1; p < n; p++ {
		gap := x[p-1] - x[p]
		if gap < 1e-7 {
			continue
		}
		away := p - m
		if away < 0 {
			away = -away
		}
		if score := math.Log(gap) - 1.5*float64(away); score > best {
			best, w.cut = score, p
		}
	}
	if w.cut == 0 {
		return // all levels are one shell
	}
	top, bottom := x[w.cut-1], x[w.cut]
	w.middle, w.half = (top+bottom)/2, (top-bottom)/2
	reach := math.Max(x[0]-w.middle, w.middle-x[n-1])
	w.rule = ruleFor(reach / w.half)
}
