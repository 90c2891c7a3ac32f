package molecule

import "slices"

// allenalPermutation is the permutation number of the middle atom of an allene for its
// four ligands in the order in which they are written.
func (w *smilesWriter) allenalPermutation(i int, s *Stereo) int {
	// The end of the chain that is written first holds the first two ligands.
	var ends [2]int
	var before [2]int
	for k, h := range w.m.adjacency[i] {
		ends[k], before[k] = w.m.chainEnd(-1, h.Atom, i)
	}
	first := 0
	if w.up[i] < 0 || w.m.Other(int(w.up[i]), i) != w.m.adjacency[i][0].Atom {
		first = 1
	}
	if w.up[i] < 0 {
		// The middle atom itself stands first: the smaller branch follows it.
		c := w.children(i)
		first = 0
		if len(c) > 0 && c[0].Atom != w.m.adjacency[i][0].Atom {
			first = 1
		}
	}
	var from [4]int8
	k := 0
	for _, side := range [2]int{first, 1 - first} {
		end := ends[side]
		half := 0 // place in the ligand list of the pair at this end
		for p, l := range s.Ligands {
			if l >= 0 && w.m.BondBetween(end, l) >= 0 && l != before[side] {
				half = p / 2 * 2
			}
		}
		a, b := s.Ligands[half], s.Ligands[half+1]
		if w.placeAt(end, a) > w.placeAt(end, b) {
			from[k], from[k+1] = int8(half+1), int8(half)
		} else {
			from[k], from[k+1] = int8(half), int8(half+1)
		}
		k += 2
	}
	return reorder(Allenal, s.Permutation, from[:])
}

// placeAt is the place of ligand l in the text at atom end: the parent first, then the
// hydrogen, the ring closures, and the children.
func (w *smilesWriter) placeAt(end, l int) int {
	if l == ImplicitLigand {
		return 1
	}
	b := w.m.BondBetween(end, l)
	switch {
	case w.up[end] == int32(b):
		return 0
	case w.up[l] != int32(b):
		return 2 + slices.IndexFunc(w.closing(end), func(h Half) bool { return h.Atom == l })
	}
	return 2 + len(w.m.adjacency[end]) + slices.IndexFunc(w.children(end), func(h Half) bool { return h.Atom == l })
}

// chooseDirections decides which single bonds carry / and \, so that every double bond
// to be written with its configuration has one at each end. It goes from each double
// bond to those that share a marked bond with it, so that marks are shared where they
// must be. In a ring of alternating double bonds without other substituents the last
// one may find its neighbours marked the wrong way round; SMILES cannot write that
// without explicit hydrogens, and it is left without configuration.
func (w *smilesWriter) chooseDirections() {
	m := w.m
	type place struct{ turn, index int32 }
	var order []place
	for k := range w.centres {
		e := &w.centres[k]
		if e.class != bondGeometry {
			continue
		}
		b := &m.Bonds[e.source]
		for _, x := range [2][2]int{{b.A, b.B}, {b.B, b.A}} {
			end, _ := m.chainEnd(int(e.source), x[0], x[1])
			w.endOf[end] = int32(k + 1)
		}
		order = append(order, place{min(w.turn[b.A], w.turn[b.B]), int32(k)})
	}
	slices.SortFunc(order, func(a, b place) int { return int(a.turn - b.turn) })
	done := make([]bool, len(w.centres))
	var queue []int32
	for _, p := range order {
		queue = append(queue[:0], p.index)
		for head := 0; head < len(queue); head++ {
			if k := queue[head]; !done[k] {
				done[k] = true
				queue = w.direction(&w.centres[k], queue)
			}
		}
	}
}

// direction marks the bonds at both ends of double bond e, and appends the double bonds
// that share a newly marked bond.
func (w *smilesWriter) direction(e *stereoElement, queue []int32) []int32 {
	m := w.m
	b := &m.Bonds[e.source]
	var ends, subs, via [2]int
	var up, known [2]bool
	turned := b.Geometry == Opposite
	sides := [2][3]int{{b.A, b.B, b.RefA}, {b.B, b.A, b.RefB}}
	if w.turn[b.A] > w.turn[b.B] {
		sides[0], sides[1] = sides[1], sides[0]
	}
	for k, x := range sides {
		end, before := m.chainEnd(int(e.source), x[0], x[1])
		ends[k] = end
		best := -1
		score := 0
		for _, h := range m.adjacency[end] {
			if h.Atom == before {
				continue
			}
			s := w.preference(end, h)
			if best < 0 || s < score || s == score && w.turn[h.Atom] < w.turn[best] {
				best, score = h.Atom, s
				via[k] = h.Bond
			}
		}
		subs[k] = best
		if best != x[2] {
			turned = !turned
		}
		if d := w.direct[via[k]]; d != 0 {
			known[k] = true
			up[k] = (d > 0) == w.leads(via[k], end)
		}
	}
	switch {
	case known[0] && known[1]:
		return queue
	case known[0]:
		up[1] = up[0] != turned
	case known[1]:
		up[0] = up[1] != turned
	default:
		up[0] = w.leads(via[0], ends[0]) // the first mark is /
		up[1] = up[0] != turned
	}
	for k := range ends {
		if known[k] {
			continue
		}
		w.direct[via[k]] = -1
		if up[k] == w.leads(via[k], ends[k]) {
			w.direct[via[k]] = 1
		}
		if f := w.endOf[subs[k]]; f > 0 {
			queue = append(queue, f-1)
		}
		// A second substituent may be the shared bond of a neighbour too.
		if f := w.endOf[ends[k]]; f > 0 {
			queue = append(queue, f-1)
		}
	}
	return queue
}

// leads tells whether bond b is written away from atom end.
func (w *smilesWriter) leads(b, end int) bool {
	return w.turn[end] < w.turn[w.m.Other(b, end)]
}

// preference is low for the bond that carries the mark at atom end best: one that is
// marked already, then one that does not touch a double bond without configuration,
// then a bond of the tree, then one that serves two double bonds, then the bond to the
// parent.
func (w *smilesWriter) preference(end int, h Half) int {
	if w.direct[h.Bond] != 0 {
		return -1
	}
	score := 0
	if w.endOf[h.Atom] == 0 {
		for _, g := range w.m.adjacency[h.Atom] {
			if w.m.Bonds[g.Bond].Order == 2 && !w.m.Bonds[g.Bond].Aromatic {
				score = 8
			}
		}
	}
	if w.up[end] != int32(h.Bond) && w.up[h.Atom] != int32(h.Bond) {
		score += 4
	}
	if w.endOf[h.Atom] == 0 {
		score += 2
	}
	if w.turn[h.Atom] > w.turn[end] {
		score++
	}
	return score
}
