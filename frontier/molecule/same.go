package molecule

// SameConstitution tells whether two molecules are the same but for configuration, atom
// maps and the order of their atoms: whether [Molecule.FlatSMILES] writes them alike.
// Different ones are mostly told apart without writing them.
func (m *Molecule) SameConstitution(o *Molecule) bool {
	if m == o {
		return true
	}
	return len(m.Atoms) == len(o.Atoms) && len(m.Bonds) == len(o.Bonds) &&
		m.constitutionHash() == o.constitutionHash() && m.FlatSMILES() == o.FlatSMILES()
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
