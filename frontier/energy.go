package frontier

import (
	"fmt"

	"gonum.org/v1/gonum/blas"
	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/lapack"
	"gonum.org/v1/gonum/lapack/lapack64"
)

// PiEnergy is E_π of the Hückel matrix h of n centres (row-major, symmetric, in β
// relative to α) filled with the given number of electrons: what [Solve] gives as
// Energy, at a third of its cost, since no orbitals are computed. A degenerate shell
// that is only partly filled counts by its level. h is overwritten.
//
// Errors: n = 0, or a diagonalization that does not converge.
func PiEnergy(n int, h []float64, electrons float64) (float64, error) {
	if n <= 0 {
		return 0, fmt.Errorf("no centres to solve for")
	}
	ws := workspaces.Get().(*workspace)
	defer workspaces.Put(ws)
	if cap(ws.w) < n {
		ws.w = make([]float64, n)
	}
	ws.w = ws.w[:n]
	if need := 34*n + 8; cap(ws.work) < need {
		ws.work = make([]float64, need)
	}
	ws.work = ws.work[:cap(ws.work)]
	sym := blas64.Symmetric{Uplo: blas.Upper, N: n, Stride: n, Data: h}
	if ok := lapack64.Syev(lapack.EVNone, sym, ws.w, ws.work, len(ws.work)); !ok {
		return 0, fmt.Errorf("the diagonalization of %d centres did not converge", n)
	}
	e := 0.0
	for j := n - 1; j >= 0 && electrons > 0; j-- { // LAPACK gives ascending order
		take := min(2, electrons)
		e += take * ws.w[j]
		electrons -= take
	}
	return e, nil
}
