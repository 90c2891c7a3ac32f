package frontier

import (
	"fmt"
	"math"
	"slices"

	"gonum.org/v1/gonum/blas"
	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/lapack"
	"gonum.org/v1/gonum/lapack/lapack64"
)

// PiEnergy is E_π of the Hückel matrix h of n centres (row-major, symmetric, in β
// relative to α) filled with the given number of electrons: what [Solve] gives as
// Energy, at a third of its cost, since no orbitals are computed, and less where h falls
// into parts that are not linked. A degenerate shell that is only partly filled counts
// by its level. h is left as it is.
//
// Errors: n = 0, or a diagonalization that does not converge.
func PiEnergy(n int, h []float64, electrons float64) (float64, error) {
	if n <= 0 {
		return 0, fmt.Errorf("no centres to solve for")
	}
	ws := workspaces.Get().(*workspace)
	defer workspaces.Put(ws)
	ws.levels = ws.levels[:0]
	ws.seen = append(ws.seen[:0], make([]bool, n)...)
	for first := range n {
		if ws.seen[first] {
			continue
		}
		ws.gather(n, h, first)
		if err := ws.addLevels(n, h); err != nil {
			return 0, err
		}
	}
	slices.Sort(ws.levels)
	e := 0.0
	for j := n - 1; j >= 0 && electrons > 0; j-- {
		take := min(2, electrons)
		e += take * ws.levels[j]
		electrons -= take
	}
	return e, nil
}

// gather lists the centres linked with the first, by however many steps.
func (ws *workspace) gather(n int, h []float64, first int) {
	ws.part = append(ws.part[:0], first)
	ws.seen[first] = true
	for k := 0; k < len(ws.part); k++ {
		row := h[ws.part[k]*n : (ws.part[k]+1)*n]
		for j, v := range row {
			if v != 0 && !ws.seen[j] {
				ws.seen[j] = true
				ws.part = append(ws.part, j)
			}
		}
	}
}

// addLevels adds the levels of the centres gathered.
func (ws *workspace) addLevels(n int, h []float64) error {
	p := ws.part
	switch len(p) {
	case 1:
		ws.levels = append(ws.levels, h[p[0]*n+p[0]])
		return nil
	case 2:
		a, b, k := h[p[0]*n+p[0]], h[p[1]*n+p[1]], h[p[0]*n+p[1]]
		mean, root := (a+b)/2, math.Hypot((a-b)/2, k)
		ws.levels = append(ws.levels, mean-root, mean+root)
		return nil
	}
	slices.Sort(p)
	m := len(p)
	ws.resize(m)
	for i, r := range p {
		for j, s := range p {
			ws.a[i*m+j] = h[r*n+s]
		}
	}
	sym := blas64.Symmetric{Uplo: blas.Upper, N: m, Stride: m, Data: ws.a}
	if ok := lapack64.Syev(lapack.EVNone, sym, ws.w, ws.work, len(ws.work)); !ok {
		return fmt.Errorf("the diagonalization of %d centres did not converge", m)
	}
	ws.levels = append(ws.levels, ws.w...)
	return nil
}

// resize readies the workspace for the diagonalization of n centres.
func (ws *workspace) resize(n int) {
	if cap(ws.a) < n*n {
		ws.a = make([]float64, n*n)
	}
	if cap(ws.w) < n {
		ws.w = make([]float64, n)
	}
	if need := 34*n + 8; cap(ws.work) < need {
		ws.work = make([]float64, need)
	}
	ws.a, ws.w, ws.work = ws.a[:n*n], ws.w[:n], ws.work[:cap(ws.work)]
}
