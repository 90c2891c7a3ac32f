package molecule

import "sync"

// finish completes a molecule whose Atoms and Bonds (a Kekulé form) are set: it builds
// the neighbour lists, checks every valence and counts the unpaired electrons, and
// perceives rings and aromaticity. The error is a [*Error] placed at the atom.
func (m *Molecule) finish() error {
	m.connect()
	m.rings = nil
	return m.complete()
}

// complete is finish for a molecule whose neighbour lists are built; ring bonds that
// have been found are kept.
func (m *Molecule) complete() error {
	for i := range m.Atoms {
		if err := m.checkValence(i); err != nil {
			return err
		}
	}
	if err := m.perceiveRings(); err != nil {
		return err
	}
	m.perceiveAromaticity()
	m.dropForcedGeometry()
	m.derived = new(derived)
	return nil
}

// counters holds scratch lists of one number for each atom.
var counters = sync.Pool{New: func() any { return new([]int32) }}

// connect builds the neighbour lists from the bonds.
func (m *Molecule) connect() {
	n := len(m.Atoms)
	m.adjacency = make([][]Half, n)
	halves := make([]Half, 2*len(m.Bonds))
	scratch := counters.Get().(*[]int32)
	defer counters.Put(scratch)
	counts := sized(*scratch, n)
	*scratch = counts
	clear(counts)
	for i := range m.Bonds {
		counts[m.Bonds[i].A]++
		counts[m.Bonds[i].B]++
	}
	at := 0
	for i := range m.adjacency {
		c := int(counts[i])
		m.adjacency[i] = halves[at : at : at+c]
		at += c
	}
	for i := range m.Bonds {
		b := &m.Bonds[i]
		m.adjacency[b.A] = append(m.adjacency[b.A], Half{b.B, i})
		m.adjacency[b.B] = append(m.adjacency[b.B], Half{b.A, i})
	}
}

// smallestTransRing is the size of the smallest ring in which a double bond can be E;
// in smaller rings the configuration is forced and is not kept.
const smallestTransRing = 8

// dropForcedGeometry removes the configuration of double bonds that have no choice:
// aromatic ones, and those in a small ring.
func (m *Molecule) dropForcedGeometry() {
	for i := range m.Bonds {
		b := &m.Bonds[i]
		if b.Geometry == NoGeometry {
			continue
		}
		if b.Aromatic || m.smallestRing(i) > 0 && m.smallestRing(i) < smallestTransRing {
			b.Geometry, b.RefA, b.RefB = NoGeometry, 0, 0
		}
	}
}
