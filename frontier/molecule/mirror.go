package molecule

// Mirrored is the mirror image: every tetrahedral and allenal configuration turned over.
func (m *Molecule) Mirrored() *Molecule {
	e := m.Edit()
	for i := range m.Atoms {
		if s := &m.Atoms[i].Stereo; (s.Class == Tetrahedral || s.Class == Allenal) && (s.Permutation == 1 || s.Permutation == 2) {
			e.Atom(i).Stereo.Permutation = 3 - s.Permutation
		}
	}
	out, err := e.Done()
	if err != nil {
		return m
	}
	return out
}
