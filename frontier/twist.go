package frontier

import (
	"fmt"
	"math"
	"slices"

	"lobecast/frontier/molecule"
)

// Twist is a torsion angle about the bond between two π atoms, stated by a user.
type Twist struct {
	A, B    int     // atom numbers, from 1 (Atom.Number)
	Degrees float64 // 0 is planar
}

// twist multiplies the links of stated twists by cos θ (k = k₀ cos θ; Streitwieser,
// Molecular Orbital Theory for Organic Chemists, 1961, ch. 4, from memory). The sign
// of cos θ is kept out: beyond 90° the overlap counts by its size.
func (pi *Pi) twist(twists []Twist) error {
	m := pi.Molecule
	for _, t := range twists {
		if math.IsNaN(t.Degrees) || math.IsInf(t.Degrees, 0) {
			return fmt.Errorf("twist %d-%d: the angle must be a number of degrees", t.A, t.B)
		}
		a, b := -1, -1
		for i := range m.Atoms {
			switch m.Atoms[i].Number {
			case t.A:
				a = i
			case t.B:
				b = i
			}
		}
		if a < 0 || b < 0 {
			missing := t.A
			if a >= 0 {
				missing = t.B
			}
			return fmt.Errorf("twist %d-%d: the structure has no atom %d", t.A, t.B, missing)
		}
		found := false
		for l := range pi.Links {
			i, j := pi.Links[l].I, pi.Links[l].J
			if pi.Centres[i].Alkyl || pi.Centres[j].Alkyl {
				continue
			}
			x, y := pi.Centres[i].Atom, pi.Centres[j].Atom
			if x == a && y == b || x == b && y == a {
				found = true
				c := math.Abs(math.Cos(t.Degrees * math.Pi / 180))
				if c < 1e-15 {
					c = 0
				}
				pi.Links[l].Cos = c
				pi.Warnings = slices.DeleteFunc(pi.Warnings, func(w string) bool {
					return w == twistWarning(t.A, t.B) || w == twistWarning(t.B, t.A)
				})
			}
		}
		if !found {
			return fmt.Errorf("twist %d-%d: these atoms are not bonded π atoms; give two neighbours of the π system", t.A, t.B)
		}
	}
	return nil
}

// warnTwists names single bonds between π atoms that bulky neighbours keep from
// planarity: biaryls and styrenes with ortho groups. A flank of the bond is blocked
// where the atom beside the bond carries a group other than hydrogen. Three blocked
// flanks, or two on one end facing the hydrogens of a six-membered ring or a
// substituted end on the other, twist the bond (common practice, no source).
func (pi *Pi) warnTwists(ringPi []bool) {
	m := pi.Molecule
	for _, l := range pi.Links {
		ca, cb := &pi.Centres[l.I], &pi.Centres[l.J]
		if ca.Alkyl || cb.Alkyl || l.Cos != 1 {
			continue
		}
		a, b := ca.Atom, cb.Atom
		bond := m.BondBetween(a, b)
		if m.Bonds[bond].Order != 1 || m.BondInRing(bond) || !ringPi[a] && !ringPi[b] {
			continue
		}
		if m.Atoms[a].Element != 6 || m.Atoms[b].Element != 6 {
			continue
		}
		fa, ha := pi.flanks(a, b)
		fb, hb := pi.flanks(b, a)
		if fa+fb >= 3 || fa == 2 && hb >= 2 || fb == 2 && ha >= 2 {
			pi.Warnings = append(pi.Warnings, twistWarning(m.Atoms[a].Number, m.Atoms[b].Number))
		}
	}
}

func twistWarning(a, b int) string {
	return fmt.Sprintf("the groups beside the bond %d-%d keep its ends from lying in one plane; state the angle with a twist if it is known", a, b)
}

// flanks counts, at end a of bond a–b, the flanking atoms that carry a further group
// (blocked) and those that point at least a hydrogen at the other end.
func (pi *Pi) flanks(a, b int) (blocked, pointing int) {
	m := pi.Molecule
	for _, h := range m.Neighbours(a) {
		f := h.Atom
		if f == b || m.Atoms[f].Element == 1 {
			continue
		}
		heavy, hydrogens := 0, m.Atoms[f].Hydrogens
		for _, g := range m.Neighbours(f) {
			switch {
			case g.Atom == a:
			case m.Atoms[g.Atom].Element == 1:
				hydrogens++
			case m.BondInRing(h.Bond) && m.BondInRing(g.Bond) && sameRing(m, a, f, g.Atom):
			default:
				heavy++
			}
		}
		switch {
		case !m.BondInRing(h.Bond) && pi.CentreOf[f] < 0:
			blocked++ // an sp3 group on the end itself
		case !m.BondInRing(h.Bond):
			if hydrogens > 0 || heavy > 0 {
				pointing++
			}
		case heavy > 0:
			blocked++
		case hydrogens > 0:
			pointing++
		}
	}
	return blocked, pointing + blocked
}

// sameRing says whether three atoms lie in one ring of the set.
func sameRing(m *molecule.Molecule, a, b, c int) bool {
	for _, r := range m.RingsOf(a) {
		hit := 0
		for _, x := range m.Rings()[r] {
			if x == b || x == c {
				hit++
			}
		}
		if hit == 2 {
			return true
		}
	}
	return false
}
