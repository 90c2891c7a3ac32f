package reactivity

import (
	"fmt"
	"math"
)

// BondLocalization is the localization energy of two centres r and s at once, in |β|:
//
//	L_rs = E_π − E_π(residue without r and s, N−2 electrons) − h_r − h_s.
//
// For neighbours it is the ortho- (bond) localization energy, the cost of adding a
// reagent across the bond r–s; for 1,4-related centres of a ring or diene it is the
// para-localization energy, the cost of adding a dienophile (R. D. Brown, J. Chem. Soc.
// 1950, 691 and 2730). Published tables agree, h being zero on carbon. An error names a
// centre that does not exist.
func (w *Workspace) BondLocalization(r, s int) (float64, error) {
	if err := w.twoCentres(r, s); err != nil {
		return math.NaN(), err
	}
	if !w.residue.solve(w.o, r, s, false) {
		return math.NaN(), fmt.Errorf("the levels of the residue without centres %d and %d cannot be computed: check the parameters", r+1, s+1)
	}
	return w.o.Energy - w.residue.energy(w.o.Electrons-2) - w.o.H[r*w.n+r] - w.o.H[s*w.n+s], nil
}

func (w *Workspace) twoCentres(r, s int) error {
	if r < 0 || s < 0 || r >= w.n || s >= w.n || r == s {
		return fmt.Errorf("centres %d and %d are not two of the %d of this π system", r+1, s+1, w.n)
	}
	return nil
}
