package reactivity

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/blas"
	"gonum.org/v1/gonum/blas/blas64"

	"lobecast/frontier"
	"lobecast/frontier/terms"
)

// GradientLength is the number of entries of a gradient with respect to the matrix of a π
// system. The layout is the same throughout: first ∂/∂h_s for every centre, then ∂/∂k of
// every link in the order given, where k stands in both H_st and H_ts.
func GradientLength(centres, links int) int { return centres + links }

// LocalizationGradient writes into dst (made where it is too short) the derivatives of
// the localization energy of centre r toward one kind of attack, and returns it. By the
// theorem of Hellmann and Feynman
//
//	∂L/∂h_s = q_s − q_s(residue) − δ_rs,  ∂L/∂k_st = 2 p_st − 2 p_st(residue),
//
// dimensionless. In a closed shell the density matrix of the residue is integrated
// along the line of [Workspace.Localization], at a fraction of the cost of solving it:
//
//	J = (2/π) ∫₀^∞ Re[g gᵀ/G_rr + v vᵀ/(iy − μ_p + x₀)] dy,
//	∂L^E/∂H = v vᵀ − J,  ∂L^N/∂H = −v vᵀ − J,  ∂L^R/∂H = −J,
//
// g the column r of the Green function and v the orbital of the residue at λ* = μ_p. In
// open shells, and where levels coincide, the residue is solved.
func (w *Workspace) LocalizationGradient(r int, toward terms.Toward, links []frontier.Link, dst []float64) ([]float64, error) {
	if r < 0 || r >= w.n {
		return nil, fmt.Errorf("centre %d is not one of the %d of this π system", r+1, w.n)
	}
	var change float64 // electrons of the residue less those of the parent
	switch toward {
	case terms.Electrophile:
		change = -2
	case terms.Nucleophile:
		change = 0
	case terms.Radical:
		change = -1
	default:
		return nil, fmt.Errorf("attack by %q: expected one of %q", toward, terms.Towards)
	}
	dst = grow(dst, GradientLength(w.n, len(links)))
	if electrons := w.o.Electrons + change; electrons < -1e-9 || electrons > 2*float64(w.n-1)+1e-9 {
		for i := range dst {
			dst[i] = math.NaN()
		}
		return dst, nil
	}
	if _, ok := w.lineGradient(r, -1-change, links, dst); ok {
		return dst, nil
	}
	return dst, w.deletionGradient(r, change, links, dst)
}

// deletionGradient solves the residue and fills it with change electrons more than the
// parent has.
func (w *Workspace) deletionGradient(r int, change float64, links []frontier.Link, dst []float64) error {
	d := &w.residue
	if !d.solve(w.o, r, -1, true) {
		return fmt.Errorf("the orbitals of the residue without centre %d cannot be computed: check the parameters", r+1)
	}
	fillLevels(d.x, w.o.Electrons+change, d.occupation)
	w.residueGradient(r, links, dst)
	return nil
}

// residueGradient takes the density matrix of the residue, solved and filled, from that
// of the parent.
func (w *Workspace) residueGradient(r int, links []frontier.Link, dst []float64) {
	d := &w.residue
	w.place = growInts(w.place, w.n)
	for i := range w.place {
		w.place[i] = -1
	}
	for a, i := range d.kept {
		w.place[i] = a
	}
	residue := func(i, j int) float64 {
		a, b := w.place[i], w.place[j]
		if a < 0 || b < 0 {
			return 0
		}
		p := 0.0
		for k, n := range d.occupation {
			p += n * d.coefficient(a, k) * d.coefficient(b, k)
		}
		return p
	}
	for i := range w.n {
		dst[i] = w.density(i, i) - residue(i, i)
		if i == r {
			dst[i]--
		}
	}
	for l, link := range links {
		dst[w.n+l] = 2 * (w.density(link.I, link.J) - residue(link.I, link.J))
	}
}

// density is the bond order p_ij of the parent, its population where i = j.
func (w *Workspace) density(i, j int) float64 {
	a, b := w.o.C[i*w.n:(i+1)*w.n], w.o.C[j*w.n:(j+1)*w.n]
	p := 0.0
	for k, n := range w.o.Occupation {
		if n == 0 {
			break
		}
		p += n * a[k] * b[k]
	}
	return p
}

// lineGradient reports false where the integral does not serve. sign is that of v vᵀ:
// 1, −1 or 0 for attack by an electrophile, a nucleophile or a radical. v, by centre,
// belongs to the workspace and holds until the next gradient.
func (w *Workspace) lineGradient(r int, sign float64, links []frontier.Link, dst []float64) (v []float64, ok bool) {
	n, o := w.n, w.o
	m := pairs(o.Electrons)
	const (
		narrow = 1e-3 // |β|; a gap in which rounding would tell
		atEnd  = 1e-5 // |β| between λ* and the parent's levels, where v is a quotient of small numbers
	)
	if o.Open || w.rule == nil || w.cut != m || w.half < narrow || math.Abs(o.Electrons-2*float64(m)) > 1e-9 {
		return nil, false
	}
	w.Localization()
	level := w.localization.Level[r]
	if o.X[m-1]-level < atEnd || level-o.X[m] < atEnd {
		return nil, false
	}
	w.prepareColumns()

	// v, the column of the Green function at λ*, normalized; v_r is zero by definition.
	w.orbital = grow(w.orbital, 2*n)
	v, t := w.orbital[:n], w.orbital[n:]
	row := o.C[r*n : (r+1)*n]
	norm := 0.0
	for j, c := range row {
		t[j] = c / (level - o.X[j])
		norm += t[j] * t[j]
	}
	norm = 1 / math.Sqrt(norm)
	for s := range n {
		sum := 0.0
		for j, c := range o.C[s*n : (s+1)*n] {
			sum += c * t[j]
		}
		v[s] = sum * norm
	}
	v[r] = 0

	delta := level - w.middle
	pole := 0.0 // ∫ Re 1/(iy − δ) dy
	clear(dst)
	w.greenColumn(row)
	for a, node := range w.rule.node {
		y := node * w.half
		weight := w.rule.weight[a] * w.half
		pole -= weight * delta / (delta*delta + y*y)
		re, im := w.greenAt(a)
		// Re[g_s g_t / G_rr] is Re[g_s g_t G*_rr] / |G_rr|².
		gr, gi := re[r], im[r]
		scale := weight / (gr*gr + gi*gi)
		gr, gi = scale*gr, scale*gi
		for s, x := range re {
			z := im[s]
			dst[s] += (x*x-z*z)*gr + 2*x*z*gi
		}
		for l, link := range links {
			s, t := link.I, link.J
			dst[n+l] += (re[s]*re[t]-im[s]*im[t])*gr + (re[s]*im[t]+im[s]*re[t])*gi
		}
	}
	for s := range n {
		dst[s] = sign*v[s]*v[s] - 2/math.Pi*(dst[s]+v[s]*v[s]*pole)
	}
	for l, link := range links {
		vv := v[link.I] * v[link.J]
		dst[n+l] = 2 * (sign*vv - 2/math.Pi*(dst[n+l]+vv*pole))
	}
	return v, true
}

// greenColumn computes the elements of the Green function G = (z − H)⁻¹ between all
// centres and the one whose coefficients are row, at the nodes z = μ + iy of the line.
// Both parts come from one product over the levels, B = ((μ − H)² + y²)⁻¹: Im G = −yB and
// Re G = (μ − H)B, where H has few elements.
func (w *Workspace) greenColumn(row []float64) {
	n, q := w.n, len(w.rule.node)
	w.onLine = grow(w.onLine, 3*n*q)
	t, b := w.onLine[:n*q], w.onLine[n*q:2*n*q]
	for a := range q {
		inverse := w.inverse[a*n : (a+1)*n]
		for j, c := range row {
			t[a*n+j] = c * inverse[j]
		}
	}
	blas64.Gemm(blas.NoTrans, blas.NoTrans, 1,
		blas64.General{Rows: q, Cols: n, Stride: n, Data: t},
		blas64.General{Rows: n, Cols: n, Stride: n, Data: w.levels},
		0, blas64.General{Rows: q, Cols: n, Stride: n, Data: b})
	for a, node := range w.rule.node {
		re, im := w.greenAt(a)
		for s, x := range im {
			u := (w.middle - w.o.H[s*n+s]) * x
			for _, e := range w.elements[w.from[s]:w.from[s+1]] {
				u -= e.value * im[e.column]
			}
			re[s] = u
		}
		y := node * w.half
		for s := range im {
			im[s] *= -y
		}
	}
}

// greenAt is what greenColumn computed at one node.
func (w *Workspace) greenAt(a int) (re, im []float64) {
	n, size := w.n, w.n*len(w.rule.node)
	return w.onLine[2*size+a*n : 2*size+(a+1)*n], w.onLine[size+a*n : size+(a+1)*n]
}

// prepareColumns lays out what greenColumn needs: 1/((μ − x_j)² + y²) node by node, the
// orbitals as rows, and the elements of H off the diagonal.
func (w *Workspace) prepareColumns() {
	if w.columned {
		return
	}
	w.columned = true
	n := w.n
	w.inverse = grow(w.inverse, n*len(w.rule.node))
	for a, node := range w.rule.node {
		y := node * w.half
		for j, x := range w.o.X {
			d := w.middle - x
			w.inverse[a*n+j] = 1 / (d*d + y*y)
		}
	}
	w.levels = grow(w.levels, n*n)
	for s := range n {
		for j, c := range w.o.C[s*n : (s+1)*n] {
			w.levels[j*n+s] = c
		}
	}
	w.elements, w.from = w.elements[:0], w.from[:0]
	for s := range n {
		w.from = append(w.from, int32(len(w.elements)))
		for t, h := range w.o.H[s*n : (s+1)*n] {
			if h != 0 && t != s {
				w.elements = append(w.elements, element{int32(t), h})
			}
		}
	}
	w.from = append(w.from, int32(len(w.elements)))
}

// element is one entry of a row of H.
type element struct {
	column int32
	value  float64
}

func growInts(s []int, n int) []int {
	if cap(s) < n {
		return make([]int, n)
	}
	return s[:n]
}
