package frontier

import "lobecast/frontier/molecule"

// Tautomers gives the fast NH tautomers of a molecule with NH-azole rings, itself
// first: the proton of a pyrrole-type N–H moved to each pyridine-type N of the same
// five-membered ring (pyrazole, imidazole, triazoles, tetrazole, benzimidazole, purine
// and the like), one ring at a time, all combinations of several rings up to 32
// structures. Positions that would leave a fused benzene ring quinoid (2H-indazole) are
// left out: they lie too high to count. Atom indices are the same in all of them.
// Indices are averaged over the list.
func Tautomers(m *molecule.Molecule) []*molecule.Molecule {
	list := []*molecule.Molecule{m}
	seen := map[string]bool{}
	for at := 0; at < len(list) && len(list) < 32; at++ {
		for _, next := range shiftedNH(list[at]) {
			key := protonKey(next)
			if at == 0 && len(seen) == 0 {
				seen[protonKey(m)] = true
			}
			if !seen[key] && len(list) < 32 {
				seen[key] = true
				list = append(list, next)
			}
		}
	}
	return list
}

// protonKey tells apart structures with the same atoms by their hydrogen counts.
func protonKey(m *molecule.Molecule) string {
	b := make([]byte, len(m.Atoms))
	for i := range m.Atoms {
		b[i] = byte(m.Atoms[i].Hydrogens)
	}
	return string(b)
}

// shiftedNH lists the molecules that differ from m by one proton moved within a ring.
func shiftedNH(m *molecule.Molecule) []*molecule.Molecule {
	candidate := false
	for i := range m.Atoms {
		if m.Atoms[i].Element == 7 && m.Atoms[i].Hydrogens == 1 && m.Atoms[i].Charge == 0 && m.InRing(i) {
			candidate = true
		}
	}
	if !candidate {
		return nil
	}
	p := perceptions.Get().(*perception)
	defer perceptions.Put(p)
	prepare := func() {
		p.reset(m)
		p.unifyNotation()
		p.assignOrbitals()
		p.linkOrbitals()
		p.findConjugatedRings()
	}
	prepare()
	type move struct{ from, to int }
	var moves []move
	for _, ring := range m.Rings() {
		if len(ring) != 5 {
			continue
		}
		for _, a := range ring {
			if m.Atoms[a].Element != 7 || m.Atoms[a].Hydrogens != 1 || m.Atoms[a].Charge != 0 || !p.ring5[a] || m.Degree(a) != 2 {
				continue
			}
			for _, b := range ring {
				if m.Atoms[b].Element == 7 && m.Atoms[b].Hydrogens == 0 && m.Atoms[b].Charge == 0 &&
					p.sigma[b] == 2 && p.e[b] == 1 && keepsFusedRings(m, ring, b) {
					moves = append(moves, move{a, b})
				}
			}
		}
	}
	var list []*molecule.Molecule
	for _, mv := range moves {
		prepare()
		before := append([]int32(nil), p.mate[:p.n]...)
		p.charges.reset(2 * p.n)
		for _, l := range p.pairs {
			p.charges.edge(l[0], l[1])
			p.charges.edge(l[1], l[0])
		}
		reached := false
		for _, o := range p.reach(int32(mv.from)) {
			reached = reached || int(o) == mv.to
		}
		if !reached {
			continue
		}
		p.shift(int32(mv.from), int32(mv.to))
		e := m.Edit()
		for b := range m.Bonds {
			i, j := m.Bonds[b].A, m.Bonds[b].B
			was, is := before[i] == int32(j), p.mate[i] == int32(j)
			if was != is && !p.linear[i] && !p.linear[j] {
				if is {
					e.SetOrder(i, j, 2)
				} else {
					e.SetOrder(i, j, 1)
				}
			}
		}
		e.SetHydrogens(mv.from, 0)
		e.SetHydrogens(mv.to, m.Atoms[mv.to].Hydrogens+1)
		if t, err := e.Done(); err == nil {
			list = append(list, t)
		}
	}
	return list
}

// keepsFusedRings says whether, with the proton on atom b, the ring's atoms outside its
// fusion bonds pair up among themselves, so that fused rings keep their sextet.
func keepsFusedRings(m *molecule.Molecule, ring []int, b int) bool {
	n := len(ring)
	free := make([]bool, n)
	for x, a := range ring {
		free[x] = a != b
		if len(m.RingsOf(a)) > 1 {
			free[x] = false
		}
	}
	// runs of free atoms around the ring must be of even length
	start := -1
	for x := range ring {
		if !free[x] {
			start = x
			break
		}
	}
	if start < 0 {
		return true
	}
	run := 0
	for s := 1; s <= n; s++ {
		if free[(start+s)%n] {
			run++
			continue
		}
		if run%2 != 0 {
			return false
		}
		run = 0
	}
	return true
}
