package symmetry

import (
	"errors"
	"fmt"
	"math"

	"lobecast/frontier"
)

// Correlation is the numerical derivation: what becomes of the levels of the reacting
// ring on the way from reactant to product.
//
// All energies are x in |β| relative to α, larger is more bonding.
type Correlation struct {
	Electrons     int
	Before, After []float64 // levels of reactant and product, descending
	// To[j] is the level of the product that level j of the reactant becomes when it
	// is followed along the path through real crossings.
	To []int
	// Crossings counts occupied levels of the reactant that become empty levels of
	// the product.
	Crossings int
	// Halfway is the gap x_HOMO − x_LUMO half-way, 0 at a crossing; HalfwayOpposite
	// that of the opposite mode.
	Halfway, HalfwayOpposite float64
	// Excited is the energy half-way of the configuration with one electron raised
	// from HOMO to LUMO, ExcitedOpposite that of the opposite mode.
	Excited, ExcitedOpposite float64
	Thermal, Photochemical   Verdict

	// Real is the path with the h and k of a parameter set and all conjugated
	// substituents; nil where it could not be built.
	Real *RealPath
}

// crossingText is the result in words.
func (c *Correlation) crossingText() string {
	s := "no occupied level crosses an empty one"
	switch {
	case c.Crossings == 1:
		s = "an occupied level crosses an empty one"
	case c.Crossings > 1:
		s = fmt.Sprintf("%d occupied levels cross empty ones", c.Crossings)
	}
	return fmt.Sprintf("%s; gap half-way %.2f |β|, %.2f in the opposite mode", s, c.Halfway, c.HalfwayOpposite)
}

// Numerical settings of the level following.
const (
	pathEnds    = 1e-4 // the path is followed from here to 1 minus here, off exact degeneracies of its ends
	pathSteps   = 37   // an odd number, so that no grid point is half-way
	finestStep  = 1e-7 // an exchange of levels within this step is a real crossing
	sameLevel   = 0.9  // least overlap of a level with itself over one accepted step
	closedShell = 1e-6 // least HOMO–LUMO gap of reactant and product, |β|
	split       = 0.381966
)

// matrix is the Hückel-type matrix of the ring at t, row-major, into h.
//
// Each link runs from its size in the reactant to that in the product and through
// ringStrength half-way, where all links are alike. Diagonal elements are zero: the
// ring is idealised as one of like atoms, so that crossings required by the topology
// are real ones and not avoided by accidents of substitution.
func (c *Cycle) matrix(t float64, h []float64) {
	n := len(c.Orbitals)
	for i := range h {
		h[i] = 0
	}
	for i, l := range c.Links {
		// Slightly different strengths (below 4 %) keep accidental degeneracies of
		// reactant and product, as in three like double bonds, from the path.
		f := 1 + 0.04*float64((7*i)%11)/11
		r, p := f*l.Reactant, f*l.Product
		v := (1-t)*r + t*p + 4*t*(1-t)*(ringStrength-(r+p)/2)
		v *= l.Sign
		h[l.I*n+l.J] = v
		h[l.J*n+l.I] = v
	}
}

// at solves the ring at t.
func (c *Cycle) at(t float64, h []float64) (*frontier.Orbitals, error) {
	c.matrix(t, h)
	return frontier.Solve(len(c.Orbitals), h, float64(c.electrons()))
}

// Correlate follows the levels of the ring from reactant to product, for the mode
// the signs of its links state.
//
// Method. The orbitals of all components and of the breaking and forming σ bonds are
// one basis; the matrix is carried from that of the reactant to that of the product
// (Longuet-Higgins, Abrahamson 1965). Levels are followed by their overlap from step
// to step; where two exchange order the step is made smaller until it is below
// 1e-7: levels that only avoid each other then turn smoothly into each other and keep
// their order, levels that cross exchange it. An occupied level of the reactant that
// ends as an empty one of the product is a crossing, and the ground state of the
// reactant correlates with a doubly excited configuration: forbidden in the dark.
// Under light the question is whether the configuration with one electron raised
// finds a way down where the levels meet (van der Lugt, Oosterhoff, J. Am. Chem. Soc.
// 1969, 91, 6042): its energy half-way is compared with that of the same ring in the
// opposite mode.
//
// No step of this uses components or electron counts modulo four.
func (c *Cycle) Correlate() (*Correlation, error) {
	if err := c.check(); err != nil {
		return nil, err
	}
	n := len(c.Orbitals)
	k := c.electrons() / 2
	h := make([]float64, n*n)
	first, err := c.at(pathEnds, h)
	if err != nil {
		return nil, err
	}
	last, err := c.at(1-pathEnds, h)
	if err != nil {
		return nil, err
	}
	r := &Correlation{Electrons: c.electrons(), Before: first.X, After: last.X}
	if first.X[k-1]-first.X[k] < closedShell || last.X[k-1]-last.X[k] < closedShell {
		return nil, errors.New("reactant or product has no closed shell in the idealised ring, so its levels cannot be correlated")
	}
	f := follower{c: c, h: h}
	to := make([]int, n)
	for j := range to {
		to[j] = j
	}
	from, t := first, pathEnds
	for i := 1; i <= pathSteps; i++ {
		u := pathEnds + (1-2*pathEnds)*float64(i)/pathSteps
		next, err := c.at(u, h)
		if err != nil {
			return nil, err
		}
		if err := f.follow(t, from, u, next, to); err != nil {
			return nil, err
		}
		from, t = next, u
	}
	r.To = to
	for j := 0; j < k; j++ {
		if to[j] >= k {
			r.Crossings++
		}
	}
	r.Thermal = verdict(r.Crossings == 0)
	half, err := c.at(0.5, h)
	if err != nil {
		return nil, err
	}
	r.Halfway, r.Excited = half.X[k-1]-half.X[k], excited(half, k)
	opposite := c.withSign(-c.Links[n-1].Sign)
	if half, err = opposite.at(0.5, h); err != nil {
		return nil, err
	}
	r.HalfwayOpposite, r.ExcitedOpposite = half.X[k-1]-half.X[k], excited(half, k)
	if r.Halfway < closedShell {
		r.Halfway = 0
	}
	if r.HalfwayOpposite < closedShell {
		r.HalfwayOpposite = 0
	}
	if math.Abs(r.Excited-r.ExcitedOpposite) > closedShell {
		r.Photochemical = verdict(r.Excited > r.ExcitedOpposite)
	}
	return r, nil
}

// excited is the energy of the configuration with one electron raised from level k−1
// to level k.
func excited(o *frontier.Orbitals, k int) float64 {
	e := o.X[k-1] + o.X[k]
	for j := 0; j < k-1; j++ {
		e += 2 * o.X[j]
	}
	return e
}

// follower carries the identity of levels along a path.
type follower struct {
	c *Cycle
	h []float64
}

// follow updates to, the present place of each level, over the step from t to u.
func (f *follower) follow(t float64, from *frontier.Orbitals, u float64, next *frontier.Orbitals, to []int) error {
	move, ok := sameLevels(from, next)
	if ok {
		kept := true
		for j, m := range move {
			kept = kept && j == m
		}
		if !kept && u-t > finestStep {
			ok = false
		}
	}
	if ok {
		for j := range to {
			to[j] = move[to[j]]
		}
		return nil
	}
	if u-t <= finestStep {
		return fmt.Errorf("the levels could not be followed through t = %.4f of the path", t)
	}
	v := t + split*(u-t)
	mid, err := f.c.at(v, f.h)
	if err != nil {
		return err
	}
	if err := f.follow(t, from, v, mid, to); err != nil {
		return err
	}
	return f.follow(v, mid, u, next, to)
}

// sameLevels finds for each level of a the level of b that overlaps with it by at
// least sameLevel; ok is false where some level has none.
func sameLevels(a, b *frontier.Orbitals) (move []int, ok bool) {
	n := a.N
	move = make([]int, n)
	taken := make([]bool, n)
	for j := 0; j < n; j++ {
		best, at := 0.0, -1
		for k := 0; k < n; k++ {
			s := 0.0
			for r := 0; r < n; r++ {
				s += a.C[r*n+j] * b.C[r*n+k]
			}
			if s = math.Abs(s); s > best {
				best, at = s, k
			}
		}
		if best < sameLevel || taken[at] {
			return nil, false
		}
		taken[at] = true
		move[j] = at
	}
	return move, true
}
