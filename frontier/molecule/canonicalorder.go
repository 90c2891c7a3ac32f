package molecule

import (
	"slices"
	"sync"
)

// derived holds what is worked out when first asked for.
type derived struct {
	classesOnce, orderOnce sync.Once
	classes, order         []int
}

// canonicalPart is one component in its canonical numbering.
type canonicalPart struct {
	atoms []int32 // in canonical order
	text  string
}

// canonicalParts numbers and writes the components and sorts them by their text, equal
// ones by their first atom. Where classes is not nil it receives the orbits within each
// component.
func (m *Molecule) canonicalParts(style smilesStyle, classes []int) []canonicalPart {
	n := len(m.Atoms)
	l := labellings.Get().(*labelling)
	w := writers.Get().(*smilesWriter)
	defer func() {
		if cap(l.elem) <= 4096 {
			labellings.Put(l)
			writers.Put(w)
		}
	}()
	stereo := style.stereo && m.hasStereo()
	w.begin(m, style)
	label, count := m.labelComponents()
	atoms := make([]int32, n)
	parts := make([]canonicalPart, count)
	at := make([]int32, count+1)
	for _, c := range label {
		at[c+1]++
	}
	for c := 1; c <= count; c++ {
		at[c] += at[c-1]
	}
	next := slices.Clone(at)
	for i, c := range label {
		atoms[next[c]] = int32(i)
		next[c]++
	}
	ordered := make([]int32, n)
	for c := range parts {
		own := atoms[at[c]:at[c+1]]
		l.load(m, own, stereo)
		l.run()
		part := ordered[at[c]:at[c+1]]
		for p, v := range l.best.elem {
			part[p] = own[v]
			w.rank[own[v]] = int32(p)
		}
		if classes != nil {
			for i, a := range own {
				classes[a] = int(own[find(l.orbit, int32(i))])
			}
		}
		w.keep(l.elements)
		parts[c] = canonicalPart{part, w.component(int(part[0]))}
	}
	slices.SortStableFunc(parts, func(a, b canonicalPart) int {
		switch {
		case a.text < b.text:
			return -1
		case a.text > b.text:
			return 1
		}
		return 0
	})
	return parts
}

func (m *Molecule) hasStereo() bool {
	for i := range m.Atoms {
		if m.Atoms[i].Stereo.Class != NoStereo {
			return true
		}
	}
	for i := range m.Bonds {
		if m.Bonds[i].Geometry != NoGeometry {
			return true
		}
	}
	return false
}

// Classes gives for each atom the smallest index among the atoms that an automorphism
// of the constitution maps it onto: two atoms with one value are equivalent. Elements,
// isotopes, charges, hydrogens, bond orders (aromatic ones alike) and unpaired electrons
// count, configuration and atom maps do not. Equivalent atoms of equal components have
// one class. The slice is the molecule's own: do not change it.
func (m *Molecule) Classes() []int {
	m.derived.classesOnce.Do(func() {
		classes := make([]int, len(m.Atoms))
		parts := m.canonicalParts(smilesStyle{}, classes)
		for c := 1; c < len(parts); c++ {
			if parts[c].text != parts[c-1].text {
				continue
			}
			// Equal components follow each other by their first atom.
			for p, a := range parts[c].atoms {
				classes[a] = classes[parts[c-1].atoms[p]]
			}
		}
		if len(parts) > 1 {
			smallest := make(map[int]int, len(classes))
			for i, c := range classes {
				if _, ok := smallest[c]; !ok {
					smallest[c] = i
				}
				classes[i] = smallest[c]
			}
		}
		m.derived.classes = classes
	})
	return m.derived.classes
}

// CanonicalOrder gives the place of each atom in the canonical numbering, from 0: the
// same molecule, however written, gets the same numbering, up to its symmetry.
// Configuration takes part, atom maps do not. Components follow each other in the order
// in which [Molecule.SMILES] writes them. The slice is the molecule's own: do not
// change it.
func (m *Molecule) CanonicalOrder() []int {
	m.derived.orderOnce.Do(func() {
		order := make([]int, len(m.Atoms))
		k := 0
		for _, part := range m.canonicalParts(smilesStyle{stereo: true}, nil) {
			for _, a := range part.atoms {
				order[a] = k
				k++
			}
		}
		m.derived.order = order
	})
	return m.derived.order
}
