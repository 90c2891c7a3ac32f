package reactivity

import (
	"fmt"
	"math"

	"lobecast/frontier"
)

// Approach is two π systems, A and B, between which bonds are about to form, or two
// places of one system where both workspaces are the same. Both workspaces must stay
// reset to their systems while the Approach is in use; one goroutine may use it.
type Approach struct {
	a, b *Workspace
	// settled is set where both systems are closed shells and neither would take
	// electrons from the other as they stand: the residues then share electrons in one of
	// two ways, and no level but the two λ* needs to be known.
	settled bool

	levels      []float64 // of both residues, sorted
	occupations []float64
}

// FormingBond is a σ bond about to form between centre A of the first system and
// centre B of the second. K is its resonance integral in units of β: 1 between carbons.
type FormingBond struct {
	A, B int
	K    float64
}

// NewApproach pairs two workspaces, both reset; give the same one twice for an
// intramolecular reaction within one π system.
func NewApproach(a, b *Workspace) *Approach {
	p := &Approach{a: a, b: b}
	frontierOf := func(w *Workspace) (homo, lumo float64, ok bool) {
		o := w.o
		m := pairs(o.Electrons)
		if o.Open || m < 1 || m > w.n-1 || math.Abs(o.Electrons-2*float64(m)) > 1e-9 {
			return 0, 0, false
		}
		return o.X[m-1], o.X[m], true
	}
	ha, la, oka := frontierOf(a)
	hb, lb, okb := frontierOf(b)
	p.settled = oka && okb && ha >= lb && hb >= la
	return p
}

// FirstBond is what it costs, in |β|, to form the bond r–s before any other:
//
//	ΔE = E_A + E_B − E_π(residues A∖r and B∖s, filled together with N_A + N_B − 2 electrons) − h_r − h_s.
//
// Electrons go to the most bonding levels of both residues, so that the polarity of the bond
// chooses itself: ΔE is the least of L^E_r + L^N_s, L^N_r + L^E_s and L^R_r + L^R_s
// unless one system would ionize the other beforehand. The localization energies being
// known for all centres from one solution each, all pairs cost nothing further. Within
// one system it is the bond localization energy. A gain of the forming bond over a C–C
// bond is not part of it. Cost and definition follow Wheland's (1942) localization
// energy; see docs/method.md.
func (p *Approach) FirstBond(r, s int) (float64, error) {
	if p.a == p.b {
		return p.a.BondLocalization(r, s)
	}
	if err := p.check(r, s); err != nil {
		return math.NaN(), err
	}
	if p.settled {
		la, lb := p.a.Localization(), p.b.Localization()
		return math.Min(la.Electrophile[r]+lb.Nucleophile[s], la.Nucleophile[r]+lb.Electrophile[s]), nil
	}
	residues, err := p.fillTogether(r, s, false)
	if err != nil {
		return math.NaN(), err
	}
	a, b := p.a.o, p.b.o
	return a.Energy + b.Energy - residues - a.H[r*a.N+r] - b.H[s*b.N+s], nil
}

// Orientation is the energy of an orientation that forms both bonds, in |β|: that of
// the better of its two possible first bonds.
func (p *Approach) Orientation(bonds [2]FormingBond) (float64, error) {
	best := math.Inf(1)
	for _, bond := range bonds {
		e, err := p.FirstBond(bond.A, bond.B)
		if err != nil {
			return math.NaN(), err
		}
		best = math.Min(best, e)
	}
	return best, nil
}

func (p *Approach) check(r, s int) error {
	if err := p.a.centre(r); err != nil {
		return fmt.Errorf("first π system: %w", err)
	}
	if err := p.b.centre(s); err != nil {
		return fmt.Errorf("second π system: %w", err)
	}
	return nil
}

// fillTogether solves both residues, shares N_A + N_B − 2 electrons out among the
// levels of both and returns their π energy; occupations are left in the residues.
func (p *Approach) fillTogether(r, s int, orbits bool) (float64, error) {
	da, db := &p.a.residue, &p.b.residue
	if !da.solve(p.a.o, r, -1, orbits) || !db.solve(p.b.o, s, -1, orbits) {
		return math.NaN(), fmt.Errorf("the levels of the residues cannot be computed: check the parameters")
	}
	n := da.n + db.n
	p.levels, p.occupations = grow(p.levels, n), grow(p.occupations, n)
	i, j := 0, 0
	for k := range n {
		if j == db.n || i < da.n && da.x[i] >= db.x[j] {
			p.levels[k] = da.x[i]
			i++
		} else {
			p.levels[k] = db.x[j]
			j++
		}
	}
	e := fillLevels(p.levels, p.a.o.Electrons+p.b.o.Electrons-2, p.occupations)
	if math.IsNaN(e) {
		return e, fmt.Errorf("%g π electrons do not fit the residues of the two π systems", p.a.o.Electrons+p.b.o.Electrons-2)
	}
	i, j = 0, 0
	for k := range n {
		if j == db.n || i < da.n && da.x[i] >= db.x[j] {
			da.occupation[i] = p.occupations[k]
			i++
		} else {
			db.occupation[j] = p.occupations[k]
			j++
		}
	}
	return e, nil
}

// FirstBondGradient writes the derivatives of [Approach.FirstBond] by the matrices of
// the two systems into dstA and dstB, in the layout of [Workspace.LocalizationGradient]:
// populations and bond orders of each system less those of its residue. Where both ways
// of sharing the electrons cost the same, it is the mean of the two. Within one system
// dstB is left alone.
func (p *Approach) FirstBondGradient(r, s int, linksA, linksB []frontier.Link, dstA, dstB []float64) (a, b []float64, err error) {
	if p.a == p.b {
		a, err = p.a.BondLocalizationGradient(r, s, linksA, dstA)
		return a, dstB, err
	}
	if err := p.check(r, s); err != nil {
		return nil, nil, err
	}
	dstA = grow(dstA, GradientLength(p.a.n, len(linksA)))
	dstB = grow(dstB, GradientLength(p.b.n, len(linksB)))
	if p.settled {
		// v vᵀ of the end that gives the two electrons up is added, of the other taken off.
		d := p.a.Localization().Level[r] - p.b.Localization().Level[s]
		sign := 0.0
		if d < -frontier.Degenerate {
			sign = 1
		} else if d > frontier.Degenerate {
			sign = -1
		}
		if p.a.siteGradient(r, sign, linksA, dstA) == nil && p.b.siteGradient(s, -sign, linksB, dstB) == nil {
			return dstA, dstB, nil
		}
	}
	if _, err := p.fillTogether(r, s, true); err != nil {
		return nil, nil, err
	}
	p.a.residueGradient(r, -1, linksA, dstA)
	p.b.residueGradient(s, -1, linksB, dstB)
	return dstA, dstB, nil
}

// siteGradient is the gradient of the localization energy toward an electrophile
// (sign 1), a nucleophile (−1) or a radical (0), by whichever route serves.
func (w *Workspace) siteGradient(r int, sign float64, links []frontier.Link, dst []float64) error {
	if w.lineGradient(r, sign, links, dst) {
		return nil
	}
	return w.deletionGradient(r, -1, -1-sign, links, dst)
}

// FrontierGaps are x_HOMO(A) − x_LUMO(B) and x_HOMO(B) − x_LUMO(A), in |β|: the
// smaller one says which system gives electrons to the other (normal or inverse
// demand; J. Sauer, Angew. Chem. Int. Ed. 1967, 6, 16). NaN where a system has no such
// level.
func (p *Approach) FrontierGaps() (aGives, bGives float64) {
	a, b := p.a.o, p.b.o
	return shellLevel(a, a.HOMO) - shellLevel(b, b.LUMO), shellLevel(b, b.HOMO) - shellLevel(a, a.LUMO)
}

// FrontierStabilization is what the frontier orbitals alone gain when the bonds begin
// to form, in |β| per square of the overlap reached (K. Fukui 1952–1971; K. N. Houk,
// J. Am. Chem. Soc. 1973, 95, 4092):
//
//	2 (Σ_bonds k c_A c_B)² / (x_HOMO − x_LUMO)
//
// for A giving to B and for B giving to A, the larger the better; degenerate shells
// summed, partly filled ones by their occupation. NaN where the gap is closed: the
// second order then says nothing. Within one system only aGives has a meaning.
func (p *Approach) FrontierStabilization(bonds []FormingBond) (aGives, bGives float64, err error) {
	for _, bond := range bonds {
		if err := p.check(bond.A, bond.B); err != nil {
			return math.NaN(), math.NaN(), err
		}
	}
	a, b := p.a.o, p.b.o
	return p.stabilization(bonds, a.HOMO, b.LUMO, true), p.stabilization(bonds, b.HOMO, a.LUMO, false), nil
}

// OrbitalStabilization is the like over all levels, every occupied one of each system
// with every empty one of the other (G. Klopman, J. Am. Chem. Soc. 1968, 90, 223;
// L. Salem, J. Am. Chem. Soc. 1968, 90, 543 and 553), without their charge term.
func (p *Approach) OrbitalStabilization(bonds []FormingBond) (aGives, bGives float64, err error) {
	for _, bond := range bonds {
		if err := p.check(bond.A, bond.B); err != nil {
			return math.NaN(), math.NaN(), err
		}
	}
	allA, allB := [2]int{0, p.a.n}, [2]int{0, p.b.n}
	return p.stabilization(bonds, allA, allB, true), p.stabilization(bonds, allB, allA, false), nil
}

// stabilization sums over the donor's and the acceptor's range of levels.
func (p *Approach) stabilization(bonds []FormingBond, donor, acceptor [2]int, aGives bool) float64 {
	d, e := p.a.o, p.b.o
	if !aGives {
		d, e = e, d
	}
	if donor[1] <= donor[0] || acceptor[1] <= acceptor[0] {
		return math.NaN()
	}
	sum := 0.0
	for i := donor[0]; i < donor[1]; i++ {
		for j := acceptor[0]; j < acceptor[1]; j++ {
			n := d.Occupation[i] * (2 - e.Occupation[j]) / 2
			if n <= occupied {
				continue
			}
			gap := d.X[i] - e.X[j]
			if gap < atReference {
				return math.NaN()
			}
			v := 0.0
			for _, bond := range bonds {
				r, s := bond.A, bond.B
				if !aGives {
					r, s = s, r
				}
				v += bond.K * d.C[r*d.N+i] * e.C[s*e.N+j]
				if d == e { // one system: both ends belong to both orbitals
					v += bond.K * d.C[s*d.N+i] * e.C[r*e.N+j]
				}
			}
			sum += n * v * v / gap
		}
	}
	return sum
}
