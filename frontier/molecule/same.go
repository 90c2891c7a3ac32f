package molecule

// SameConstitution tells whether two molecules are the same but for configuration, atom
// maps and the order of their atoms: whether [Molecule.FlatSMILES] writes them alike.
// Different ones are mostly told apart without writing them.
func (m *Molecule) SameConstitution(o *Molecule) bool {
	if m == o {
		return true
	}
	return len(m.Atoms) == len(o.Atoms) && len(m.Bonds) == len(o.Bonds) &&
		m.constitutionHash() == o.constitutionHash() && m.sameNumbered(o)
}

// sameNumbered compares two molecules of as many atoms and bonds in their canonical
// numberings.
func (m *Molecule) sameNumbered(o *Molecule) bool {
	a, b := m.canonical(false).parts, o.canonical(false).parts
	if len(a) != 1 || len(b) != 1 {
		return m.FlatSMILES() == o.FlatSMILES()
	}
	scratch := counters.Get().(*[]int32)
	defer counters.Put(scratch)
	to := sized(*scratch, len(m.Atoms))
	*scratch = to
	for k, i := range a[0].atoms {
		j := b[0].atoms[k]
		to[i] = j
		if atomKey(&m.Atoms[i], len(m.adjacency[i])) != atomKey(&o.Atoms[j], len(o.adjacency[j])) {
			return false
		}
	}
	for k := range m.Bonds {
		x := &m.Bonds[k]
		y := o.BondBetween(int(to[x.A]), int(to[x.B]))
		if y < 0 || x.label() != o.Bonds[y].label() {
			return false
		}
	}
	return true
}

// hashRounds is how many bonds far an atom's surroundings enter the hash.
const hashRounds = 6

// constitutionHash is the same for molecules of the same constitution, however numbered:
// each atom's own properties, mixed in rounds with those of its neighbours (Morgan, J.
// Chem. Doc. 5, 107 (1965), with hashes in the place of sums).
func (m *Molecule) constitutionHash() uint64 {
	m.derived.hashOnce.Do(func() {
		n := len(m.Atoms)
		var few [128]uint64
		values := few[:]
		if 2*n > len(few) {
			values = make([]uint64, 2*n)
		}
		now, next := values[:n], values[n:2*n]
		for i := range now {
			now[i] = mix(0, atomKey(&m.Atoms[i], len(m.adjacency[i])))
		}
		for range min(n, hashRounds) {
			for i := range now {
				sum := uint64(0)
				for _, h := range m.adjacency[i] {
					sum += mix(uint64(m.Bonds[h.Bond].label()), now[h.Atom])
				}
				next[i] = mix(now[i], sum)
			}
			now, next = next, now
		}
		sum := uint64(0)
		for _, v := range now {
			sum += mix(1, v)
		}
		m.derived.hash = sum
	})
	return m.derived.hash
}
