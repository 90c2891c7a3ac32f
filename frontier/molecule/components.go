package molecule

// Components lists the connected components, each as ascending atom indices, ordered
// by their first atom.
func (m *Molecule) Components() [][]int {
	label, count := m.labelComponents()
	sizes := make([]int, count)
	for _, c := range label {
		sizes[c]++
	}
	all := make([]int, len(m.Atoms))
	lists := make([][]int, count)
	at := 0
	for c, n := range sizes {
		lists[c] = all[at : at : at+n]
		at += n
	}
	for i, c := range label {
		lists[c] = append(lists[c], i)
	}
	return lists
}

// labelComponents numbers the components by their first atom.
func (m *Molecule) labelComponents() (label []int32, count int) {
	n := len(m.Atoms)
	label = make([]int32, n)
	for i := range label {
		label[i] = -1
	}
	stack := make([]int32, 0, n)
	for i := range label {
		if label[i] >= 0 {
			continue
		}
		label[i] = int32(count)
		stack = append(stack[:0], int32(i))
		for len(stack) > 0 {
			v := stack[len(stack)-1]
			stack = stack[:len(stack)-1]
			for _, h := range m.adjacency[v] {
				if label[h.Atom] < 0 {
					label[h.Atom] = int32(count)
					stack = append(stack, int32(h.Atom))
				}
			}
		}
		count++
	}
	return label, count
}

// Split returns each component as a molecule of its own, in the order of
// [Molecule.Components]. Number, Offset, Source and Points are kept.
func (m *Molecule) Split() []*Molecule {
	label, count := m.labelComponents()
	if count == 1 {
		return []*Molecule{m}
	}
	index := make([]int, len(m.Atoms))
	parts := make([]*Molecule, count)
	for c := range parts {
		parts[c] = &Molecule{Name: m.Name, Source: m.Source}
	}
	for i, c := range label {
		p := parts[c]
		index[i] = len(p.Atoms)
		p.Atoms = append(p.Atoms, m.Atoms[i])
		if m.Points != nil {
			p.Points = append(p.Points, m.Points[i])
		}
	}
	for _, b := range m.Bonds {
		p := parts[label[b.A]]
		p.Bonds = append(p.Bonds, renumberedBond(b, index))
	}
	for _, p := range parts {
		for i := range p.Atoms {
			p.Atoms[i].Stereo = renumberedStereo(p.Atoms[i].Stereo, index)
		}
		if err := p.finish(); err != nil {
			panic("molecule: a component of a finished molecule does not finish: " + err.Error())
		}
	}
	return parts
}

// renumberedBond is bond b with its atoms a replaced by index[a].
func renumberedBond(b Bond, index []int) Bond {
	b.A, b.B = index[b.A], index[b.B]
	if b.Geometry != NoGeometry {
		b.RefA, b.RefB = index[b.RefA], index[b.RefB]
	}
	return b
}

// renumberedStereo is a copy of configuration s with its atoms a replaced by index[a].
func renumberedStereo(s Stereo, index []int) Stereo {
	if s.Class == NoStereo {
		return Stereo{}
	}
	ligands := make([]int, len(s.Ligands))
	for i, l := range s.Ligands {
		ligands[i] = ImplicitLigand
		if l >= 0 {
			ligands[i] = index[l]
		}
	}
	s.Ligands = ligands
	return s
}

// Renumber returns the same molecule with atom i at index perm[i]; Number and Offset
// go with the atoms, the order of the bonds is kept. It panics when perm is no
// permutation.
func (m *Molecule) Renumber(perm []int) *Molecule {
	n := len(m.Atoms)
	if len(perm) != n {
		panic("molecule: Renumber needs one index for each atom")
	}
	seen := make([]bool, n)
	for _, p := range perm {
		if p < 0 || p >= n || seen[p] {
			panic("molecule: Renumber needs a permutation")
		}
		seen[p] = true
	}
	r := &Molecule{Name: m.Name, Source: m.Source, Atoms: make([]Atom, n), Bonds: make([]Bond, len(m.Bonds))}
	if m.Points != nil {
		r.Points = make([]Point, n)
	}
	for i := range m.Atoms {
		a := m.Atoms[i]
		a.Stereo = renumberedStereo(a.Stereo, perm)
		r.Atoms[perm[i]] = a
		if m.Points != nil {
			r.Points[perm[i]] = m.Points[i]
		}
	}
	for i, b := range m.Bonds {
		r.Bonds[i] = renumberedBond(b, perm)
	}
	if err := r.finish(); err != nil {
		panic("molecule: a renumbered molecule does not finish: " + err.Error())
	}
	return r
}
