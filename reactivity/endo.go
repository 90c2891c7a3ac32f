package reactivity

import (
	"fmt"

	"lobecast/frontier/molecule"
)

// substituentWeight ranks what an atom of the partner carries for the naming of endo
// and exo: 4 a group with C=O, C≡N, NO2 and the like, 3 an aryl or vinyl group, 2 a
// heteroatom, 1 an alkyl group, 0 hydrogen. In the trade endo is said of the group
// that can overlap with the middle of the diene, the unsaturated one.
func substituentWeight(m *molecule.Molecule, l, from int) int {
	if l == molecule.ImplicitLigand || m.Atoms[l].Element == 1 {
		return 0
	}
	for _, h := range m.Neighbours(l) {
		if h.Atom == from {
			continue
		}
		if m.Bonds[h.Bond].Order > 1 && m.Atoms[h.Atom].Element != 6 && !m.Bonds[h.Bond].Aromatic {
			return 4
		}
	}
	for _, h := range m.Neighbours(l) {
		if h.Atom != from && (m.Bonds[h.Bond].Order > 1 || m.Bonds[h.Bond].Aromatic) {
			return 3
		}
	}
	if m.Atoms[l].Element != 6 {
		return 2
	}
	return 1
}

// endoWord names one way of laying the partner under the diene or dipole: "endo" when
// its weightiest substituent points under the middle of the chain. Of two equally
// weighty ones on opposite sides each is named.
func endoWord(m *molecule.Molecule, s *sides, left, right int, endo bool) string {
	if !s.ok[0] && !s.ok[1] {
		return ""
	}
	best := 0
	type group struct {
		at    int
		under bool
	}
	var groups []group
	for k, at := range [2]int{left, right} {
		if !s.ok[k] {
			continue
		}
		for side, l := range [2]int{s.upper[k], s.lower[k]} {
			w := substituentWeight(m, l, at)
			if w == 0 || w < best {
				continue
			}
			if w > best {
				best, groups = w, nil
			}
			groups = append(groups, group{at, (side == 0) == endo})
		}
	}
	if best == 0 {
		return ""
	}
	same := true
	for _, g := range groups {
		if g.under != groups[0].under {
			same = false
		}
	}
	word := func(under bool) string {
		if under {
			return "endo"
		}
		return "exo"
	}
	if same {
		return word(groups[0].under)
	}
	if len(groups) == 2 && groups[0].at != groups[1].at {
		return fmt.Sprintf("%s at atom %d, %s at atom %d", word(groups[0].under), m.Atoms[groups[0].at].Number,
			word(groups[1].under), m.Atoms[groups[1].at].Number)
	}
	if endo {
		return "first way"
	}
	return "second way"
}

// Secondary is the overlap behind the endo rule (R. Hoffmann, R. B. Woodward, J. Am.
// Chem. Soc. 1965, 87, 4388): that of the middle of the diene or dipole with the
// unsaturated group of the partner that lies under it in the endo transition state,
// in the frontier pair of smaller gap.
type Secondary struct {
	// Primary and Overlap are Σ k c c′ at the new bonds and Σ c c′ at the secondary
	// contacts, with the sign of the partner's orbital chosen so that Primary ≥ 0. An
	// Overlap above zero favours endo, one below zero exo.
	Primary, Overlap float64
	// Contacts are the pairs of atoms: [of the diene or dipole, of the partner].
	Contacts [][2]int
	// Text says so in words and numbers, with the caveat that belongs to it; empty
	// where there is no contact.
	Text string
}

// endoCaveat is what must be said with every statement on endo and exo.
const endoCaveat = "the endo rule is a tendency: simple dienophiles such as acrolein, methyl acrylate and acrylonitrile are near 1:1 with butadiene (Lording et al., Chem. Sci. 2020), and sterics, solvent and equilibration can turn it round"

// secondaryOverlap computes the secondary overlap of an orientation.
func secondaryOverlap(j *Joining, m [2]*molecule.Molecule, four, partner *reacting, left, right int) Secondary {
	var s Secondary
	of, op := four.orbitals(), partner.orbitals()
	shellF, shellP, names := of.HOMO, op.LUMO, [2]string{"HOMO", "LUMO"}
	if j.Gaps.inverseDominates() {
		shellF, shellP, names = of.LUMO, op.HOMO, [2]string{"LUMO", "HOMO"}
	}
	if shellF[1]-shellF[0] != 1 || shellP[1]-shellP[0] != 1 {
		return s
	}
	if sharesSystem(four, partner) {
		return s
	}
	n := len(four.centres)
	lp, lq := partner.first(), partner.last()
	if partner.end.First() != left {
		lp, lq = lq, lp
	}
	cf := func(l int) float64 { return of.Coefficient(l, shellF[0]) }
	cp := func(l int) float64 { return op.Coefficient(l, shellP[0]) }
	primary := formingK(four.element(four.centres[0]), partner.element(lp))*cf(four.centres[0])*cp(lp) +
		formingK(four.element(four.centres[n-1]), partner.element(lq))*cf(four.centres[n-1])*cp(lq)
	sign := 1.0
	if primary < 0 {
		sign = -1
	}
	s.Primary = sign * primary
	for k, at := range [2]int{left, right} {
		inner := 1
		if k == 1 {
			inner = n - 2
		}
		if four.centres[inner] < 0 || bondOrderBetween(m[1], left, right) != 2 {
			continue
		}
		for _, h := range m[1].Neighbours(at) {
			if h.Atom == left || h.Atom == right || substituentWeight(m[1], h.Atom, at) < 3 {
				continue
			}
			c := partner.side.pi.CentreOf[h.Atom]
			if c < 0 || partner.side.where[c][0] != partner.system {
				continue
			}
			s.Overlap += sign * cf(four.centres[inner]) * cp(partner.side.where[c][1])
			s.Contacts = append(s.Contacts, [2]int{four.end.Atoms[inner], h.Atom})
		}
	}
	if len(s.Contacts) == 0 {
		return s
	}
	const noticeable = 0.01 // of c c′; below, nothing can be said
	contact := ""
	for k, c := range s.Contacts {
		if k > 0 {
			contact += ", "
		}
		contact += fmt.Sprintf("%s%d with %s%d", molecule.Symbol(m[0].Atoms[c[0]].Element), m[0].Atoms[c[0]].Number,
			molecule.Symbol(m[1].Atoms[c[1]].Element), m[1].Atoms[c[1]].Number)
	}
	s.Text = fmt.Sprintf("secondary overlap of the %s's %s and the partner's %s at %s: %+.4f, beside %.4f at the new bonds",
		four.end.Role, names[0], names[1], contact, s.Overlap, s.Primary)
	switch {
	case s.Overlap > noticeable:
		s.Text += ", which favours endo"
	case s.Overlap < -noticeable:
		s.Text += ", which favours exo"
	default:
		s.Text += ", too small to favour either"
	}
	s.Text += "; " + endoCaveat
	return s
}

// sharesSystem says whether both reacting paths lie in one π system.
func sharesSystem(a, b *reacting) bool { return a.side == b.side && a.system == b.system }

// bondOrderBetween is the order of the bond between two atoms, 2 for an aromatic one.
func bondOrderBetween(m *molecule.Molecule, i, j int) int {
	b := m.BondBetween(i, j)
	if b < 0 {
		return 0
	}
	if m.Bonds[b].Aromatic {
		return 2
	}
	return m.Bonds[b].Order
}
