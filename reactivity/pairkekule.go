package reactivity

import (
	"slices"

	"lobecast/frontier/molecule"
)

// kekuleWithout looks for a Kekulé form of the aromatic rings once the atoms of
// removed have left them: a pairing of all other atoms that are doubly bonded along
// aromatic bonds. It returns for every bond of the molecule the order it then has
// (bonds to removed atoms: 1), or false where no such form exists.
//
// It starts from the form at hand and repairs it by alternating paths, so that its
// cost follows the part that changes.
func kekuleWithout(m *molecule.Molecule, removed []int) (map[int]int, bool) {
	mate := make(map[int]int) // changes only: atom -> partner, -1 free
	gone := func(i int) bool { return slices.Contains(removed, i) }
	partner := func(i int) int {
		if p, ok := mate[i]; ok {
			return p
		}
		return aromaticMate(m, i)
	}
	var free []int
	for _, r := range removed {
		p := aromaticMate(m, r)
		if p >= 0 && !gone(p) {
			free = append(free, p)
			mate[p] = -1
		}
	}
	for len(free) > 0 {
		u := free[0]
		free = free[1:]
		if partner(u) >= 0 {
			continue
		}
		steps := 0
		path := alternatingPath(m, u, gone, partner, map[int]bool{u: true}, &steps)
		if path == nil {
			return nil, false
		}
		for k := 0; k+1 < len(path); k += 2 {
			mate[path[k]] = path[k+1]
			mate[path[k+1]] = path[k]
		}
	}
	orders := make(map[int]int)
	for _, r := range removed {
		for _, h := range m.Neighbours(r) {
			if m.Bonds[h.Bond].Aromatic {
				orders[h.Bond] = 1
			}
		}
	}
	for i := range mate {
		if gone(i) {
			continue
		}
		for _, h := range m.Neighbours(i) {
			if !m.Bonds[h.Bond].Aromatic || gone(h.Atom) {
				continue
			}
			if partner(i) == h.Atom {
				orders[h.Bond] = 2
			} else {
				orders[h.Bond] = 1
			}
		}
	}
	return orders, true
}

// aromaticMate is the atom to which i is doubly bonded along an aromatic bond, or -1.
func aromaticMate(m *molecule.Molecule, i int) int {
	for _, h := range m.Neighbours(i) {
		if b := m.Bonds[h.Bond]; b.Aromatic && b.Order == 2 {
			return h.Atom
		}
	}
	return -1
}

// mostSteps bounds the search for an alternating path; no drawn ring system comes
// near it, and a search cut short only means that an addition is not offered.
const mostSteps = 20000

// alternatingPath finds a path u–x=y–…–v from one unpaired atom to another, along
// aromatic bonds, single and double in turn.
func alternatingPath(m *molecule.Molecule, u int, gone func(int) bool, partner func(int) int, seen map[int]bool, steps *int) []int {
	for _, h := range m.Neighbours(u) {
		x := h.Atom
		if !m.Bonds[h.Bond].Aromatic || gone(x) || seen[x] || x == partner(u) {
			continue
		}
		if *steps++; *steps > mostSteps {
			return nil
		}
		y := partner(x)
		if y < 0 {
			if aromaticMate(m, x) < 0 { // a pyrrole-type atom: takes no double bond
				continue
			}
			return []int{u, x}
		}
		if gone(y) || seen[y] {
			continue
		}
		seen[x], seen[y] = true, true
		if rest := alternatingPath(m, y, gone, partner, seen, steps); rest != nil {
			return append([]int{u, x}, rest...)
		}
		delete(seen, x)
		delete(seen, y)
	}
	return nil
}
