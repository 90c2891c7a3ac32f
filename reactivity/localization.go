package reactivity

import (
	"math"

	"lobecast/frontier"
)

// Localization holds the three atom localization energies of every centre of one π
// system, in |β| (G. W. Wheland, J. Am. Chem. Soc. 1942, 64, 900):
//
//	L = E_π − E_π(residue without r; N−2, N, N−1 electrons) − h_r
//
// for attack by an electrophile, a nucleophile and a radical. The residue is the π
// system once centre r holds the reagent by a σ bond. The term −h_r, zero on a plain
// carbon, leaves with r one electron's worth of the new bond; without it an inductive
// shift of the attacked carbon alone would decide the ranking. A value is NaN where
// the residue cannot hold that many electrons.
type Localization struct {
	Electrophile []float64 // L^E, residue with N−2 electrons
	Nucleophile  []float64 // L^N, residue with N electrons
	Radical      []float64 // L^R, residue with N−1 electrons
	// Level is λ*, in |β|: the level of the residue that an electrophile leaves empty
	// and a nucleophile fills, L^E − L^N = 2λ* and L^R = (L^E + L^N)/2 in a closed shell.
	Level []float64
}

// LocalizationEnergies computes the localization energies of all centres of o. For
// many systems in a row use a [Workspace].
func LocalizationEnergies(o *frontier.Orbitals) (*Localization, error) {
	var w Workspace
	if err := w.Reset(o); err != nil {
		return nil, err
	}
	l := *w.Localization()
	return &l, nil
}

// Localization computes all three localization energies of all centres from the one
// eigen-decomposition in o. The result belongs to the workspace.
//
// The levels μ of the residue without r are the zeros of the Green function
//
//	G_rr(z) = Σ_j c²_jr / (z − x_j),
//
// interlaced with its poles x_j. Rather than finding every zero, the sum of those
// above a gap of the parent is had from an integral along the line through that gap
// (C. A. Coulson, Proc. Camb. Phil. Soc. 1940, 36, 201; C. A. Coulson, H. C.
// Longuet-Higgins, Proc. R. Soc. A 1947, 191, 39): with p levels above the gap, μ_p the one zero that
// may lie in it, and F(z) = G_rr(z) (z−x_p)(z−x_p+1)/(z−μ_p),
//
//	Σ_{j<p} x_j − Σ_{k<p} μ_k = (h_r − x_p − x_p+1 + μ_p)/2 − (1/π) ∫₀^∞ ln|F(x₀+iy)| dy.
//
// F has no zero or pole near the line, whatever coefficients vanish and whatever levels
// coincide. All centres together cost a product of the N×N matrix of c² with one of
// N × (10 to 20) nodes; μ_p, and its neighbours in an open shell, are found one by one.
func (w *Workspace) Localization() *Localization {
	l := &w.localization
	if w.located {
		return l
	}
	w.located = true
	n, o := w.n, w.o
	for _, s := range []*[]float64{&l.Electrophile, &l.Nucleophile, &l.Radical, &l.Level} {
		*s = grow(*s, n)
	}
	m := pairs(o.Electrons)
	above := 0.0 // Σ of the parent's levels j < cut-1
	for j := range w.cut - 1 {
		above += o.X[j]
	}
	trace := 0.0
	for j := range n {
		trace += o.X[j]
	}
	w.prepareLine()

	var near [2]float64 // μ_m and μ_m+1, counted from 1
	for r := range n {
		row := w.square[r*n : r*n+n]
		h := o.H[r*n+r]
		// Sum of the highest m−1 levels of the residue.
		sum := 0.0
		switch {
		case m <= 1:
		case m >= n:
			sum = trace - h
			if m > n {
				sum = math.NaN()
			}
		case w.cut == 0: // one shell: every level of the residue lies in it
			for k := range m - 1 {
				sum += o.X[k]
			}
		default:
			edge := w.root(row, w.cut)
			sum = above - w.lineIntegral(row, h, edge)
			for k := w.cut; k < m; k++ {
				sum += w.root(row, k)
			}
			for k := m; k < w.cut; k++ {
				sum -= w.root(row, k)
			}
			if w.cut == m {
				near[0] = edge
			}
		}
		if m < 1 || m > n-1 {
			near[0] = math.NaN()
		} else if w.cut != m || m <= 1 {
			near[0] = w.root(row, m)
		}
		odd := o.Electrons - 2*float64(m)
		near[1] = math.NaN()
		if odd > 1e-9 && m+1 <= n-1 {
			near[1] = w.root(row, m+1)
		}
		l.Level[r] = near[0]
		base := o.Energy - h
		l.Electrophile[r] = base - residueEnergy(sum, near, m, o.Electrons-2, n-1)
		l.Nucleophile[r] = base - residueEnergy(sum, near, m, o.Electrons, n-1)
		l.Radical[r] = base - residueEnergy(sum, near, m, o.Electrons-1, n-1)
	}
	return l
}

// residueEnergy fills a residue of n levels of which the sum of the highest m−1 and
// the next two levels are known.
func residueEnergy(sum float64, near [2]float64, m int, electrons float64, n int) float64 {
	if electrons < -1e-9 || electrons > 2*float64(n)+1e-9 {
		return math.NaN()
	}
	left := electrons - 2*float64(max(m-1, 0))
	e := 0.0
	if m >= 1 {
		e = 2 * sum
		if left > 1e-9 {
			take := math.Min(left, 2)
			e += take * near[0]
			left -= take
		}
	}
	if left > 1e-9 {
		e += left * near[1]
	}
	return e
}

// prepareLine lays out, node by node, 1/(z_q − x_j) along the line of integration.
// Real and imaginary parts stand in scratch, levels within nodes.
func (w *Workspace) prepareLine() {
	if w.rule == nil || w.lined {
		return
	}
	w.lined = true
	n, q := w.n, len(w.rule.node)
	w.scratch = grow(w.scratch, 2*n*q)
	for a, node := range w.rule.node {
		y := node * w.half
		re, im := w.scratch[2*a*n:(2*a+1)*n], w.scratch[(2*a+1)*n:(2*a+2)*n]
		for j, x := range w.o.X {
			d := w.middle - x
			s := 1 / (d*d + y*y)
			re[j], im[j] = d*s, -y*s
		}
	}
}

// lineIntegral is the right-hand side of the formula in [Workspace.Localization].
func (w *Workspace) lineIntegral(row []float64, h, edge float64) float64 {
	n := w.n
	sum := 0.0
	g2, d := w.half*w.half, edge-w.middle
	for a, node := range w.rule.node {
		y := node * w.half
		re := w.scratch[2*a*n : (2*a+1)*n][:len(row)]
		im := w.scratch[(2*a+1)*n : (2*a+2)*n][:len(row)]
		var u, v float64
		for j, c := range row {
			u += c * re[j]
			v += c * im[j]
		}
		y2 := y * y
		f2 := (u*u + v*v) * (g2 + y2) * (g2 + y2) / (d*d + y2)
		sum += w.rule.weight[a] * math.Log(f2)
	}
	sum *= w.half / 2
	return (h-w.o.X[w.cut-1]-w.o.X[w.cut]+edge)/2 - sum/math.Pi
}

// root is the k-th level from the top (from 1) of the residue whose parent has squared
// coefficients row: the zero of G(λ) = Σ_j c²_j/(λ − x_j) between x_k and x_k+1. Where
// a coefficient vanishes, the zero lies at, or is held at, the end of that interval, as
// interlacing demands.
//
// Each step replaces the poles above by one at x_k and a constant, those below by one
// at x_k+1 and a constant, with the value and slope of what they stand for, and solves
// exactly (the fixed-weight iteration of J. R. Bunch, C. P. Nielsen, D. C. Sorensen,
// Numer. Math. 1978, 31, 31), kept within a shrinking bracket.
func (w *Workspace) root(row []float64, k int) float64 {
	x := w.o.X
	a, b := x[k-1], x[k]
	size := math.Abs(a) + math.Abs(b) + 1
	if a-b <= 1e-14*size {
		return (a + b) / 2
	}
	const vanishing = 1e-20 // c² that no eigenvector gives with any digit right
	if row[k-1] < vanishing {
		if end := a - math.Min(1e-13*size, (a-b)/4); w.green(row, end) > 0 {
			return a
		}
	}
	if row[k] < vanishing {
		if end := b + math.Min(1e-13*size, (a-b)/4); w.green(row, end) < 0 {
			return b
		}
	}
	hi, lo := a, b
	at := (a + b) / 2
	for range 100 {
		var up, upSlope, down, downSlope float64 // sums over the poles above and below
		for j, c := range row[:k-1] {
			f := 1 / (at - x[j])
			up += c * f
			upSlope += c * f * f
		}
		for j := k + 1; j < len(row); j++ {
			f := 1 / (at - x[j])
			down += row[j] * f
			downSlope += row[j] * f * f
		}
		da, db := at-a, at-b
		g := row[k-1]/da + row[k]/db + up + down
		if g == 0 {
			return at
		}
		if g < 0 {
			hi = at
		} else {
			lo = at
		}
		if hi-lo <= 4e-16*size {
			break
		}
		weightA, weightB := upSlope*da*da, downSlope*db*db
		rest := up + down - weightA/da - weightB/db
		next := quadraticRoot(a, b, row[k-1]+weightA, row[k]+weightB, rest)
		if math.Abs(next-at) <= 2e-16*size {
			return math.Min(math.Max(next, lo), hi)
		}
		if !(next > lo && next < hi) {
			next = (lo + hi) / 2
		}
		at = next
	}
	return at
}

// green is Σ_j c²_j/(λ − x_j).
func (w *Workspace) green(row []float64, at float64) float64 {
	g := 0.0
	for j, c := range row {
		if d := at - w.o.X[j]; d != 0 {
			g += c / d
		}
	}
	return g
}

// quadraticRoot solves A/(λ−a) + B/(λ−b) + s = 0 for the λ between b and a.
func quadraticRoot(a, b, A, B, s float64) float64 {
	// With t = λ − b, d = a − b: s t² + (A + B − s d) t − B d = 0.
	d := a - b
	p := A + B - s*d
	root := math.Sqrt(math.Max(p*p+4*s*B*d, 0))
	if p > 0 {
		if p+root == 0 {
			return b
		}
		return b + 2*B*d/(p+root)
	}
	if s == 0 {
		return (a + b) / 2
	}
	return b + (root-p)/(2*s)
}
