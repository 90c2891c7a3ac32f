package reactivity

import (
	"math"

	"gonum.org/v1/gonum/floats"

	"lobecast/frontier"
	"lobecast/frontier/terms"
)

// limitedIndices are the indices that carry 90 % limits from the covariance of h and k,
// as places in [IndexNames].
var limitedIndices = [4]int{0, 2, 3, 4} // localization, smoothed density, superdelocalizability, charge

// The functions of the matrix whose derivatives a sensitivity holds.
const (
	densityE = iota
	densityN
	superE
	superN
	population
	spectralFunctions
)

// sensitivity gives the derivatives of indices of one species by the fitted parameters.
// For an index that is a function of the matrix, A_r = [g(H)]_rr,
//
//	∂A_r/∂θ = Σ_ij c_ri c_rj D_ij V_ij,  D_ij = (g_i − g_j)/(x_i − x_j),  V = Cᵀ (∂H/∂θ) C,
//
// by first-order perturbation of the orbitals (C. A. Coulson, H. C. Longuet-Higgins, Proc.
// R. Soc. A 1947, 191, 39). D_ij is the slope of g where two levels of equal occupation
// coincide, so that degenerate levels need no care. V is made once per parameter, so that
// each centre costs n² per parameter that occurs in its system.
type sensitivity struct {
	s       *species
	columns *localColumns
	systems []systemSensitivity
	// By kind of attack (electrophile, nucleophile): Σ of the smoothing weights over the
	// molecule and its derivative.
	sum   [2]float64
	sumBy [2][]float64
	at    map[int]*centreSensitivity
	pair  []float64
	by    []float64
}

type systemSensitivity struct {
	active  []int32   // columns of the parameters that occur
	v       []float64 // by active column: the lower triangle of V
	divided []float64 // by function: the lower triangle of D, twice off the diagonal
	weights [2][]float64
	slopes  [2][]float64 // of the superdelocalizability terms, by level
	moved   bool         // its reference level lies at the middle of the gap
	shift   []float64    // derivative of the reference level, by active column
}

// centreSensitivity holds the derivatives for one centre, dense over the columns.
type centreSensitivity struct {
	localization, density, super [2][]float64
	charge                       []float64
}

func newSensitivity(s *species, columns *localColumns) *sensitivity {
	x := &sensitivity{s: s, columns: columns, systems: make([]systemSensitivity, len(s.solution.Systems)), at: map[int]*centreSensitivity{}}
	for side, toward := range [2]terms.Toward{terms.Electrophile, terms.Nucleophile} {
		weights, sum := smoothingWeights(s.solution.Systems, SmoothingDecay, toward)
		x.sum[side] = sum
		x.sumBy[side] = make([]float64, columns.n)
		for k := range x.systems {
			x.systems[k].weights[side] = weights[k]
		}
	}
	for k := range x.systems {
		x.prepare(k)
	}
	return x
}

// prepare makes V and its products for system k.
func (x *sensitivity) prepare(k int) {
	t := &x.systems[k]
	o, m := x.s.solution.Systems[k], x.s.solution.Matrices[k]
	n := o.N
	slot := make([]int, x.columns.n) // 1 + place among the active, 0 for none
	find := func(list []frontier.Term) {
		for _, term := range list {
			if c := x.columns.column[term.Parameter]; c >= 0 && slot[c] == 0 {
				t.active = append(t.active, c)
				slot[c] = len(t.active)
			}
		}
	}
	for _, list := range m.Diagonal {
		find(list)
	}
	for _, list := range m.LinkTerms {
		find(list)
	}
	if len(t.active) == 0 {
		return
	}
	triangle := n * (n + 1) / 2
	t.v = make([]float64, (len(t.active)+spectralFunctions)*triangle)
	v := t.v[:len(t.active)*triangle]
	t.v, t.divided = v, t.v[len(v):]
	outer := func(dst []float64, a, b []float64, w float64) {
		at := 0
		for i := range n {
			ai, bi := a[i]*w, b[i]*w
			for j := range i + 1 {
				dst[at] += ai*b[j] + bi*a[j]
				at++
			}
		}
	}
	for i, list := range m.Diagonal {
		for _, term := range list {
			if c := x.columns.column[term.Parameter]; c >= 0 {
				row := o.C[i*n : (i+1)*n]
				outer(v[(slot[c]-1)*triangle:slot[c]*triangle], row, row, term.Weight/2)
			}
		}
	}
	for l, list := range m.LinkTerms {
		for _, term := range list {
			if c := x.columns.column[term.Parameter]; c >= 0 {
				a, b := m.Links[l].I, m.Links[l].J
				outer(v[(slot[c]-1)*triangle:slot[c]*triangle], o.C[a*n:(a+1)*n], o.C[b*n:(b+1)*n], term.Weight)
			}
		}
	}
	// Values and slopes of the functions, level by level.
	var g, slope [spectralFunctions][]float64
	block := make([]float64, 2*spectralFunctions*n)
	for f := range spectralFunctions {
		g[f], slope[f] = block[2*f*n:(2*f+1)*n], block[(2*f+1)*n:(2*f+2)*n]
	}
	reference, moved, _ := referenceLevel(o)
	t.moved = moved
	for j, level := range o.X {
		g[densityE][j], g[densityN][j] = t.weights[0][j], t.weights[1][j]
		slope[densityE][j], slope[densityN][j] = -SmoothingDecay*t.weights[0][j], SmoothingDecay*t.weights[1][j]
		e, nu := superdelocalizabilityTerms(level-reference, o.Occupation[j])
		g[superE][j], g[superN][j] = e, nu
		if e != 0 {
			slope[superE][j] = -e / (level - reference)
		}
		if nu != 0 {
			slope[superN][j] = -nu / (level - reference)
		}
		g[population][j] = o.Occupation[j]
	}
	t.slopes = [2][]float64{slope[superE], slope[superN]}
	for f := range spectralFunctions {
		divided := t.divided[f*triangle : (f+1)*triangle]
		at := 0
		for i := range n {
			for j := range i {
				d := o.X[i] - o.X[j]
				switch {
				case math.Abs(d) > 1e-5 || math.Abs(o.Occupation[i]-o.Occupation[j]) >= occupied && d != 0:
					divided[at] = 2 * (g[f][i] - g[f][j]) / d
				default:
					divided[at] = slope[f][i] + slope[f][j]
				}
				at++
			}
			divided[at] = slope[f][i]
			at++
		}
	}
	// Derivatives of the sums of the smoothing weights, and of the reference level.
	for a, c := range t.active {
		src := v[a*triangle : (a+1)*triangle]
		at := 0
		for j := range n {
			at += j // place of (j, j) in the triangle
			x.sumBy[0][c] += slope[densityE][j] * src[at]
			x.sumBy[1][c] += slope[densityN][j] * src[at]
			at++
		}
	}
	if moved {
		h, l := shellLevel(o, o.HOMO), shellLevel(o, o.LUMO)
		share := 0.5
		if math.IsNaN(h) || math.IsNaN(l) {
			share = 1
		}
		t.shift = make([]float64, len(t.active))
		for a := range t.active {
			src := v[a*triangle : (a+1)*triangle]
			for _, shell := range [2][2]int{o.HOMO, o.LUMO} {
				for j := shell[0]; j < shell[1] && shell[1] <= n; j++ {
					t.shift[a] += share / float64(shell[1]-shell[0]) * src[j*(j+1)/2+j]
				}
			}
		}
	}
}

// of gives the derivatives for a centre, made when first asked for.
func (x *sensitivity) of(centre int) (*centreSensitivity, error) {
	if c := x.at[centre]; c != nil {
		return c, nil
	}
	k, local := x.s.values.system[centre], x.s.values.local[centre]
	o, m := x.s.solution.Systems[k], x.s.solution.Matrices[k]
	n := x.columns.n
	block := make([]float64, 7*n)
	take := func() []float64 {
		b := block[:n:n]
		block = block[n:]
		return b
	}
	c := &centreSensitivity{charge: take()}
	for side := range 2 {
		c.localization[side], c.density[side], c.super[side] = take(), take(), take()
	}
	x.at[centre] = c
	w, err := x.s.space(k)
	if err != nil {
		return nil, err
	}
	t := &x.systems[k]
	if len(t.active) > 0 {
		if err := x.localizations(w, local, m, c); err != nil {
			return nil, err
		}
		size := o.N
		triangle := size * (size + 1) / 2
		x.pair = grow(x.pair, spectralFunctions*triangle)
		row := o.C[local*size : (local+1)*size]
		at := 0
		for i := range size {
			for j := range i + 1 {
				p := row[i] * row[j]
				for f := 0; f < spectralFunctions; f++ {
					x.pair[f*triangle+at] = p * t.divided[f*triangle+at]
				}
				at++
			}
		}
		for a, col := range t.active {
			v := t.v[a*triangle : (a+1)*triangle]
			var sums [spectralFunctions]float64
			for f := range spectralFunctions {
				p := x.pair[f*triangle : (f+1)*triangle][:len(v)]
				sums[f] = floats.Dot(v, p)
			}
			c.density[0][col] = 2 * sums[densityE] / x.sum[0]
			c.density[1][col] = 2 * sums[densityN] / x.sum[1]
			c.super[0][col], c.super[1][col] = sums[superE], sums[superN]
			c.charge[col] = -sums[population]
		}
		if t.moved {
			for side := range 2 {
				by := 0.0
				for j, s := range t.slopes[side] {
					by -= s * row[j] * row[j]
				}
				for a, col := range t.active {
					c.super[side][col] += by * t.shift[a]
				}
			}
		}
	}
	for side := range 2 {
		f := x.s.values.smoothedDensity[side][centre]
		for col, g := range x.sumBy[side] {
			if g != 0 {
				c.density[side][col] -= f / x.sum[side] * g
			}
		}
	}
	return c, nil
}

// addTo adds share times the derivatives of the first count physical indices.
func (c *centreSensitivity) addTo(toward terms.Toward, count int, share float64, by []float64) {
	side := side(toward)
	rows := [3][]float64{c.localization[side], c.density[side], c.charge}
	for k, row := range rows[:count] {
		dst := by[k*len(row) : (k+1)*len(row)]
		for i, v := range row {
			dst[i] += share * v
		}
	}
}

// localizations adds the derivatives of both localization energies. In a closed shell they
// differ by twice the density of the orbital at λ*: ∂L^E − ∂L^N = 2 v vᵀ.
func (x *sensitivity) localizations(w *Workspace, local int, m *frontier.Matrix, c *centreSensitivity) error {
	x.by = grow(x.by, GradientLength(m.N, len(m.Links)))
	if v, ok := w.lineGradient(local, 1, m.Links, x.by); ok {
		x.columns.contract(m, x.by, 1, c.localization[0])
		for s := range m.N {
			x.by[s] -= 2 * v[s] * v[s]
		}
		for l, link := range m.Links {
			x.by[m.N+l] -= 4 * v[link.I] * v[link.J]
		}
		x.columns.contract(m, x.by, 1, c.localization[1])
		return nil
	}
	for side, toward := range [2]terms.Toward{terms.Electrophile, terms.Nucleophile} {
		var err error
		if x.by, err = w.LocalizationGradient(local, toward, m.Links, x.by); err != nil {
			return err
		}
		x.columns.contract(m, x.by, 1, c.localization[side])
	}
	return nil
}

// rows are the derivatives of the limited indices toward one kind of attack, each with
// the factor of the mean.
func (c *centreSensitivity) rows(toward terms.Toward) (rows [4][2][]float64, factor float64) {
	switch toward {
	case terms.Electrophile:
		return [4][2][]float64{{c.localization[0]}, {c.density[0]}, {c.super[0]}, {c.charge}}, 1
	case terms.Nucleophile:
		return [4][2][]float64{{c.localization[1]}, {c.density[1]}, {c.super[1]}, {c.charge}}, 1
	}
	return [4][2][]float64{
		{c.localization[0], c.localization[1]}, {c.density[0], c.density[1]},
		{c.super[0], c.super[1]}, {c.charge, c.charge},
	}, 0.5
}

// maxLimitsWork bounds the limits of the indices: sites of attack times the cube of the
// number of centres of their π system, which is what the derivatives of all localization
// energies cost. 100 sites of a system of 100 centres are within it. Where there is hardly
// a gap each site costs a solution of its own, about five times as much, and the bound is
// a fifth.
const (
	maxLimitsWork       = 200_000_000
	maxNarrowLimitsWork = maxLimitsWork / 5
)

// maxColumnsWork bounds the limits of the chances where there is a gap: sites times the
// square of the number of centres, the size of the columns of the Green function that they
// are computed from. 200 sites of a system of 240 centres are within it.
const maxColumnsWork = 12_000_000

// limitsAffordable tells whether the limits of the indices of sites are computed, and
// notes it with the attack where they are not.
func (x *judging) limitsAffordable(a *Attack, sites []Site) bool {
	work := 0.0
	for _, s := range x.forms[x.primary] {
		largest := 0
		for _, o := range s.solution.Systems {
			largest = max(largest, o.N)
		}
		n := float64(largest)
		work += float64(len(sites)) * n * n * n
	}
	if work <= maxLimitsWork && narrowWork(x.forms[x.primary], len(sites)) <= maxNarrowLimitsWork {
		return true
	}
	a.Notes = append(a.Notes, "the π system is too large for limits on the indices: they are left out")
	return false
}

// narrowGap is the gap in |β| from which on the derivatives of a localization energy come
// from the levels of the molecule; below it the residue of every site is solved.
const narrowGap = 2.5e-3

// chanceLimitsAffordable tells whether the limits of the chances of some sites are
// computed, and notes it with the attack where they are not: in a large system with hardly
// a gap they would cost a solution for every site, in a very large one their columns of the
// Green function cost more than all the rest.
func (x *judging) chanceLimitsAffordable(a *Attack, forms [][]*species, sites int) bool {
	narrow, columns := 0.0, 0.0
	for _, list := range forms {
		narrow += narrowWork(list, sites)
		columns = max(columns, columnsWork(list, sites))
	}
	switch {
	case narrow > maxNarrowLimitsWork:
		a.Notes = append(a.Notes, "the π system is large and has hardly a gap: limits on the chances are left out")
	case columns > maxColumnsWork:
		a.Notes = append(a.Notes, "the π system is too large for limits on the chances: they are left out")
	default:
		return true
	}
	return false
}

// narrowWork is sites times the cube of the centres, over the systems with hardly a gap.
func narrowWork(list []*species, sites int) float64 {
	work := 0.0
	for _, s := range list {
		for _, o := range s.solution.Systems {
			if gap, ok := o.Gap(); ok && gap < narrowGap {
				n := float64(o.N)
				work += float64(sites) * n * n * n
			}
		}
	}
	return work
}

// columnsWork is sites times the square of the centres of the largest system.
func columnsWork(list []*species, sites int) float64 {
	work := 0.0
	for _, s := range list {
		for _, o := range s.solution.Systems {
			work = max(work, float64(sites)*float64(o.N)*float64(o.N))
		}
	}
	return work
}

// indexLimits fills in the limits of the indices of sites. list are the species of the
// reported form.
func (m *model) indexLimits(list []*sensitivity, sites []Site, toward terms.Toward) error {
	columns := list[0].columns
	n := columns.n
	all := make([]float64, len(sites)*4*n)
	for _, x := range list {
		for c := range sites {
			atoms := sites[c].Atoms
			if len(list) == 1 && !x.s.protonated {
				atoms = atoms[:1]
			}
			share := 1 / float64(len(list)*len(atoms))
			for _, a := range atoms {
				centre := centreOf(x.s.pi, a)
				if centre < 0 {
					continue
				}
				d, err := x.of(centre)
				if err != nil {
					return err
				}
				rows, factor := d.rows(toward)
				for k, pair := range rows {
					dst := all[(c*4+k)*n : (c*4+k+1)*n]
					for _, row := range pair {
						for i, v := range row {
							dst[i] += v * factor * share
						}
					}
				}
			}
		}
	}
	index := make([]int32, n)
	for i := range index {
		index[i] = int32(i)
	}
	var q quadratic
	q.set(m.covariance(), terms.ElectrophilicSubstitution)
	q.gather(index, columns.global)
	for c := range sites {
		for k, at := range limitedIndices {
			name := IndexNames[at]
			v := sites[c].Index[name]
			if v.Absent != "" {
				continue
			}
			deviation := math.Sqrt(q.of(all[(c*4+k)*n : (c*4+k+1)*n]))
			if deviation < 1e-12 || math.IsNaN(deviation) {
				continue
			}
			v.Limits = &[2]float64{v.X - z90*deviation, v.X + z90*deviation}
			sites[c].Index[name] = v
		}
	}
	return nil
}
