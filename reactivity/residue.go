package reactivity

import (
	"math"

	"gonum.org/v1/gonum/blas"
	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/lapack"
	"gonum.org/v1/gonum/lapack/lapack64"

	"lobecast/frontier"
)

// residueSolver diagonalizes what is left of a π system when one or two of its
// centres are bound to a reagent, by deleting their rows and columns. Localization
// energies of one atom do not need it, see [Workspace.Localization]; bond and para
// localization, and derivatives where levels coincide, do.
type residueSolver struct {
	n          int   // centres left
	kept       []int // their indices in the parent
	matrix     []float64
	x          []float64 // levels, descending
	occupation []float64
	work       []float64
}

// solve deletes the centres r and s (s < 0 for none) from o. With orbits set,
// coefficient gives the orbitals too.
func (d *residueSolver) solve(o *frontier.Orbitals, r, s int, orbits bool) bool {
	d.kept = d.kept[:0]
	for i := range o.N {
		if i != r && i != s {
			d.kept = append(d.kept, i)
		}
	}
	n := len(d.kept)
	d.n = n
	d.x, d.occupation = grow(d.x, n), grow(d.occupation, n)
	if n == 0 {
		return true
	}
	d.matrix = grow(d.matrix, n*n)
	for a, i := range d.kept {
		for b, j := range d.kept {
			d.matrix[a*n+b] = -o.H[i*o.N+j] // −H, so that ascending levels are descending x
		}
	}
	job := lapack.EVNone
	if orbits {
		job = lapack.EVCompute
	}
	a := blas64.Symmetric{Uplo: blas.Upper, N: n, Stride: n, Data: d.matrix}
	var need [1]float64
	lapack64.Syev(job, a, d.x, need[:], -1)
	if len(d.work) < int(need[0]) {
		d.work = make([]float64, int(need[0]))
	}
	ok := lapack64.Syev(job, a, d.x, d.work, len(d.work))
	for i, x := range d.x {
		d.x[i] = -x
		if math.IsNaN(x) {
			ok = false
		}
	}
	return ok
}

// coefficient is that of the parent's centre kept[a] in level j of the residue.
func (d *residueSolver) coefficient(a, j int) float64 { return d.matrix[a*d.n+j] }

// energy fills the residue and returns its π energy, NaN where it cannot hold that
// many electrons.
func (d *residueSolver) energy(electrons float64) float64 {
	return fillLevels(d.x, electrons, nil)
}

// fillLevels puts electrons into levels sorted from the most bonding down, two in
// each, and returns Σ n_j x_j in |β|; a degenerate shell that cannot be filled
// completely shares what is left, by [frontier.Degenerate]. occupation, where not nil,
// receives n_j. NaN when the number is negative or more than the levels hold.
func fillLevels(x []float64, electrons float64, occupation []float64) float64 {
	const slack = 1e-9 // electrons, for sums of fractions
	if electrons < -slack || electrons > 2*float64(len(x))+slack {
		return math.NaN()
	}
	left, e := math.Max(electrons, 0), 0.0
	for i := 0; i < len(x); {
		j := i + 1
		for j < len(x) && x[j-1]-x[j] <= frontier.Degenerate {
			j++
		}
		each := math.Min(2, left/float64(j-i))
		for ; i < j; i++ {
			e += each * x[i]
			left -= each
			if occupation != nil {
				occupation[i] = each
			}
		}
		left = math.Max(left, 0)
	}
	return e
}
