package reactivity

import (
	"math"

	"gonum.org/v1/gonum/blas"
	"gonum.org/v1/gonum/blas/blas64"

	"lobecast/frontier"
	"lobecast/frontier/terms"
)

// parameterColumns maps parameters to the columns of a gradient; -1 for those held
// fixed.
type parameterColumns struct {
	column []int32
	n      int
}

// localColumns are the columns of the parameters that occur in the matrices of some
// solutions, numbered anew, so that gradients of one molecule stay short.
type localColumns struct {
	parameterColumns
	global []int32 // by local column: the column among all
}

func newLocalColumns(all *parameterColumns, solutions ...*frontier.Solution) *localColumns {
	c := &localColumns{parameterColumns: parameterColumns{column: make([]int32, len(all.column))}}
	for i := range c.column {
		c.column[i] = -1
	}
	see := func(list []frontier.Term) {
		for _, t := range list {
			if g := all.column[t.Parameter]; g >= 0 && c.column[t.Parameter] < 0 {
				c.column[t.Parameter] = int32(c.n)
				c.n++
				c.global = append(c.global, g)
			}
		}
	}
	for _, s := range solutions {
		for _, m := range s.Matrices {
			for _, list := range m.Diagonal {
				see(list)
			}
			for _, list := range m.LinkTerms {
				see(list)
			}
		}
	}
	return c
}

// contract adds the derivative by parameters to dst, given that by matrix elements in
// the layout of [Workspace.LocalizationGradient].
func (c *parameterColumns) contract(m *frontier.Matrix, byElement []float64, scale float64, dst []float64) {
	for i, list := range m.Diagonal {
		g := byElement[i] * scale
		for _, t := range list {
			if k := c.column[t.Parameter]; k >= 0 {
				dst[k] += t.Weight * g
			}
		}
	}
	for l, list := range m.LinkTerms {
		g := byElement[m.N+l] * scale
		for _, t := range list {
			if k := c.column[t.Parameter]; k >= 0 {
				dst[k] += t.Weight * g
			}
		}
	}
}

// physicalNames are the indices fitted chances may rest on, in the order of physical
// values. Each event uses the first physicalCount of them.
var physicalNames = [3]string{"localization", "smoothed_density", "charge"}

// physicalCount is the number of indices in the chances of an event. In cross-validation
// further indices beside the localization energy did not help electrophilic
// substitution; see docs/calibration.md.
func physicalCount(event terms.Event) int {
	if event == terms.NucleophilicSubstitution {
		return 3
	}
	return 1
}

// responder gives the physical indices of atoms of one solved species toward one kind
// of attack, and their derivatives by the parameters of the set.
type responder struct {
	solution *frontier.Solution
	toward   terms.Toward
	count    int // indices wanted
	columns  *parameterColumns
	space    func(system int) (*Workspace, error)

	w       *Workspace
	current int // system the workspace stands on, -1 for none
	level   float64
	sum     float64   // Σ of the smoothing weights over the molecule
	sumBy   []float64 // its derivative by parameters
	weight  [][]float64
	smooth  []float64 // divided differences of the smoothing weights
	occ     []float64 // and of the occupations
	t, y    []float64
	element []float64
}

// newResponder prepares the species; columns may be nil where no derivatives are wanted.
func newResponder(sol *frontier.Solution, toward terms.Toward, count int, columns *parameterColumns, space func(system int) (*Workspace, error)) *responder {
	r := &responder{solution: sol, toward: toward, count: count, columns: columns, space: space, current: -1}
	if count > 1 {
		r.smoothing()
	}
	return r
}

// smoothing prepares the weights of the smoothed frontier density over the molecule:
// w_j = exp(−λ|x_j − x_frontier|) times the share of the level that counts.
func (r *responder) smoothing() {
	electro := r.toward != terms.Nucleophile
	edge := math.Inf(1)
	if !electro {
		edge = math.Inf(-1)
	}
	for _, o := range r.solution.Systems {
		for j, x := range o.X {
			if electro && o.Occupation[j] > occupied {
				edge = math.Min(edge, x)
			}
			if !electro && o.Occupation[j] < 2-occupied {
				edge = math.Max(edge, x)
			}
		}
	}
	r.level = edge
	r.weight = make([][]float64, len(r.solution.Systems))
	if r.columns != nil {
		r.sumBy = make([]float64, r.columns.n)
	}
	for k, o := range r.solution.Systems {
		w := make([]float64, o.N)
		for j, x := range o.X {
			if electro {
				if o.Occupation[j] > occupied {
					w[j] = o.Occupation[j] / 2 * math.Exp(-SmoothingDecay*(x-edge))
				}
			} else if o.Occupation[j] < 2-occupied {
				w[j] = (1 - o.Occupation[j]/2) * math.Exp(-SmoothingDecay*(edge-x))
			}
			r.sum += w[j]
		}
		r.weight[k] = w
		if r.columns == nil {
			continue
		}
		// ∂Σw/∂H = C w′ Cᵀ
		m := r.solution.Matrices[k]
		r.element = grow(r.element, o.N+len(m.Links))
		slope := r.slope()
		for i := range o.N {
			r.element[i] = weightedProduct(o, i, i, w, slope)
		}
		for l, link := range m.Links {
			r.element[o.N+l] = 2 * weightedProduct(o, link.I, link.J, w, slope)
		}
		r.columns.contract(m, r.element, 1, r.sumBy)
	}
}

// slope is d ln w / dx of the smoothing weights.
func (r *responder) slope() float64 {
	if r.toward == terms.Nucleophile {
		return SmoothingDecay
	}
	return -SmoothingDecay
}

func weightedProduct(o *frontier.Orbitals, i, j int, w []float64, scale float64) float64 {
	a, b := o.C[i*o.N:(i+1)*o.N], o.C[j*o.N:(j+1)*o.N]
	s := 0.0
	for k, x := range w {
		s += a[k] * b[k] * x
	}
	return s * scale
}

// at gives the indices of a centre in z and, where columns were given, their
// derivatives in by, one row of columns.n per index; both are added to with the given
// weight.
func (r *responder) at(centre int, system, local int, weight float64, z, by []float64) error {
	o, m := r.solution.Systems[system], r.solution.Matrices[system]
	if r.current != system {
		w, err := r.space(system)
		if err != nil {
			return err
		}
		r.w, r.current = w, system
		if r.count > 1 && r.columns != nil {
			r.divide(o, r.weight[system])
		}
	}
	l := r.w.Localization()
	switch r.toward {
	case terms.Electrophile:
		z[0] += weight * l.Electrophile[local]
	case terms.Nucleophile:
		z[0] += weight * l.Nucleophile[local]
	default:
		z[0] += weight * l.Radical[local]
	}
	var n int
	if r.columns != nil {
		n = r.columns.n
		var err error
		if r.element, err = r.w.LocalizationGradient(local, r.toward, m.Links, r.element); err != nil {
			return err
		}
		r.columns.contract(m, r.element, weight, by[:n])
	}
	if r.count == 1 {
		return nil
	}
	row := o.C[local*o.N : (local+1)*o.N]
	density, population := 0.0, 0.0
	for j, c := range row {
		density += c * c * r.weight[system][j]
		population += c * c * o.Occupation[j]
	}
	density *= 2 / r.sum
	z[1] += weight * density
	z[2] += weight * r.solution.Pi.Charge(centre, population)
	if r.columns == nil {
		return nil
	}
	r.element = grow(r.element, o.N+len(m.Links))
	r.secondOrder(o, m, row, r.smooth)
	r.columns.contract(m, r.element, 2*weight/r.sum, by[n:2*n])
	for k, g := range r.sumBy {
		by[n+k] -= weight * density / r.sum * g
	}
	r.secondOrder(o, m, row, r.occ)
	r.columns.contract(m, r.element, -weight, by[2*n:3*n])
	return nil
}

// divide lays out the divided differences (f_i − f_j)/(x_i − x_j) of the smoothing
// weights and of the occupations; within a degenerate set the derivative stands.
func (r *responder) divide(o *frontier.Orbitals, w []float64) {
	n := o.N
	r.smooth, r.occ = grow(r.smooth, n*n), grow(r.occ, n*n)
	slope := r.slope()
	for i := range n {
		for j := 0; j <= i; j++ {
			var a, b float64
			if d := o.X[i] - o.X[j]; math.Abs(d) > 1e-7 {
				a, b = (w[i]-w[j])/d, (o.Occupation[i]-o.Occupation[j])/d
			} else {
				a = slope * (w[i] + w[j]) / 2
			}
			r.smooth[i*n+j], r.smooth[j*n+i] = a, a
			r.occ[i*n+j], r.occ[j*n+i] = b, b
		}
	}
}

// secondOrder writes into element the derivatives by matrix elements of f(H)_rr, f
// given by its divided differences: ∂f_rr/∂H_st = Σ_ij c_ri c_si f[x_i, x_j] c_tj c_rj.
func (r *responder) secondOrder(o *frontier.Orbitals, m *frontier.Matrix, row, divided []float64) {
	n := o.N
	r.t, r.y = grow(r.t, n*n), grow(r.y, n*n)
	for s := range n {
		t, c := r.t[s*n:(s+1)*n], o.C[s*n:(s+1)*n]
		for j, x := range row {
			t[j] = c[j] * x
		}
	}
	blas64.Gemm(blas.NoTrans, blas.NoTrans, 1,
		blas64.General{Rows: n, Cols: n, Stride: n, Data: r.t},
		blas64.General{Rows: n, Cols: n, Stride: n, Data: divided},
		0, blas64.General{Rows: n, Cols: n, Stride: n, Data: r.y})
	dot := func(s, u int) float64 {
		a, b := r.y[s*n:(s+1)*n], r.t[u*n:(u+1)*n]
		sum := 0.0
		for j, x := range a {
			sum += x * b[j]
		}
		return sum
	}
	for s := range n {
		r.element[s] = dot(s, s)
	}
	for l, link := range m.Links {
		r.element[n+l] = 2 * dot(link.I, link.J)
	}
}
