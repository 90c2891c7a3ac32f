package frontier

import (
	"errors"
	"fmt"
	"math"
	"sync"

	"gonum.org/v1/gonum/blas"
	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/lapack"
	"gonum.org/v1/gonum/lapack/lapack64"
)

// workspace holds the buffers of one diagonalization, kept for the next.
type workspace struct {
	a, w, work []float64

	levels []float64 // of several parts
	part   []int     // centres of one part
	seen   []bool
}

var workspaces = sync.Pool{New: func() any { return new(workspace) }}

// Solve diagonalizes the Hückel matrix h of n centres and fills its levels with the
// given number of electrons.
//
// h is row-major n×n and symmetric, in units of β relative to α; it is copied. Levels
// come out in descending x. A degenerate level is filled as a whole: electrons that
// do not fill it are spread evenly over it. The sign of each orbital is chosen so
// that its first coefficient that is not small is positive.
//
// Errors: n = 0, a wrong length of h, an entry that is not a finite number, an
// asymmetric h, or more electrons than 2n (or fewer than none). Cost: of order n³.
func Solve(n int, h []float64, electrons float64) (*Orbitals, error) {
	if n <= 0 {
		return nil, errors.New("no centres to solve for")
	}
	if len(h) != n*n {
		return nil, fmt.Errorf("matrix of %d entries does not fit %d centres", len(h), n)
	}
	if math.IsNaN(electrons) || electrons < -1e-9 || electrons > 2*float64(n)+1e-9 {
		return nil, fmt.Errorf("%g π electrons do not fit %d centres", electrons, n)
	}
	block := make([]float64, 2*n*n+2*n)
	o := &Orbitals{
		N: n, Electrons: electrons,
		H: block[: n*n : n*n], C: block[n*n : 2*n*n : 2*n*n],
		X: block[2*n*n : 2*n*n+n : 2*n*n+n], Occupation: block[2*n*n+n:],
	}
	for i := 0; i < n; i++ {
		for j := 0; j <= i; j++ {
			v := h[i*n+j]
			if math.IsNaN(v) || math.IsInf(v, 0) {
				return nil, fmt.Errorf("matrix entry %d, %d is not a finite number", i+1, j+1)
			}
			if math.Abs(v-h[j*n+i]) > 1e-12 {
				return nil, fmt.Errorf("matrix entries %d, %d and %d, %d differ; the matrix must be symmetric", i+1, j+1, j+1, i+1)
			}
		}
	}
	copy(o.H, h)
	ws := workspaces.Get().(*workspace)
	defer workspaces.Put(ws)
	ws.resize(n)
	copy(ws.a, h)
	sym := blas64.Symmetric{Uplo: blas.Upper, N: n, Stride: n, Data: ws.a}
	if ok := lapack64.Syev(lapack.EVCompute, sym, ws.w, ws.work, len(ws.work)); !ok {
		return nil, fmt.Errorf("the diagonalization of %d centres did not converge", n)
	}
	for j := 0; j < n; j++ {
		from := n - 1 - j // LAPACK gives ascending order
		o.X[j] = ws.w[from]
		sign := 1.0
		for r := 0; r < n; r++ {
			if c := ws.a[r*n+from]; math.Abs(c) > 1e-6 {
				if c < 0 {
					sign = -1
				}
				break
			}
		}
		for r := 0; r < n; r++ {
			o.C[r*n+j] = sign * ws.a[r*n+from]
		}
	}
	o.fill()
	return o, nil
}

// fill sets occupations, energy and frontier shells from X and Electrons.
func (o *Orbitals) fill() {
	left := o.Electrons
	o.HOMO, o.LUMO, o.Open, o.Energy = [2]int{0, 0}, [2]int{o.N, o.N}, false, 0
	for j := 0; j < o.N; {
		k := o.shellEnd(j)
		room := 2 * float64(k-j)
		take := math.Min(left, room)
		if take < 1e-9 {
			if o.LUMO[0] == o.N {
				o.LUMO = [2]int{j, k}
			}
			break
		}
		for l := j; l < k; l++ {
			o.Occupation[l] = take / float64(k-j)
			o.Energy += o.Occupation[l] * o.X[l]
		}
		left -= take
		o.HOMO = [2]int{j, k}
		if room-take > 1e-9 {
			o.Open, o.LUMO = true, [2]int{j, k}
		}
		j = k
	}
}

// shellEnd is one past the last level degenerate with level j, counted downward.
func (o *Orbitals) shellEnd(j int) int {
	k := j + 1
	for k < o.N && o.X[k-1]-o.X[k] <= Degenerate {
		k++
	}
	return k
}

// HOMOLevel is the energy x of the highest occupied shell, in β relative to α; false
// where no level is occupied.
func (o *Orbitals) HOMOLevel() (x float64, ok bool) {
	if o.HOMO[1] == o.HOMO[0] {
		return 0, false
	}
	return o.X[o.HOMO[0]], true
}

// LUMOLevel is the energy x of the lowest shell with room for electrons; false where
// every level is full.
func (o *Orbitals) LUMOLevel() (x float64, ok bool) {
	if o.LUMO[0] >= o.N {
		return 0, false
	}
	return o.X[o.LUMO[0]], true
}

// Gap is x_HOMO − x_LUMO in |β|, 0 for a partly filled shell; false where either is
// missing.
func (o *Orbitals) Gap() (gap float64, ok bool) {
	h, okH := o.HOMOLevel()
	l, okL := o.LUMOLevel()
	return h - l, okH && okL
}

// occupied is the number of leading levels that hold electrons.
func (o *Orbitals) occupied() int { return o.HOMO[1] }
