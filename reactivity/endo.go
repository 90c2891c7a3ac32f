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
func endoWord(m *molecule.Molecule, four *End, s *sides, left, right int, endo bool) string {
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
