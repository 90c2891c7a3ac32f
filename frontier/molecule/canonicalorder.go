package molecule

import (
	"slices"
	"strings"
	"sync"
)

// derived holds what is worked out when first asked for: the molecule in its canonical
// numbering, as a constitution and with its configuration.
type derived struct {
	hashOnce, flatOnce, textOnce, wholeOnce, orderOnce sync.Once

	hash        uint64
	flat, whole canonicalForm
	order       []int
}

// canonicalForm is a molecule in its canonical numbering.
type canonicalForm struct {
	parts   []canonicalPart
	text    string // of the constitution of one component written when asked for
	classes []int  // of the constitution only
}

// canonical returns the canonical form, with the configuration or without. It is worked
// out once; a molecule without configuration has but one.
func (m *Molecule) canonical(stereo bool) *canonicalForm {
	d := m.derived
	if stereo && m.hasStereo() {
		d.wholeOnce.Do(func() { d.whole = m.canonicalize(smilesStyle{stereo: true}, nil) })
		return &d.whole
	}
	d.flatOnce.Do(func() { d.flat = m.canonicalize(smilesStyle{}, make([]int, len(m.Atoms))) })
	return &d.flat
}

// flatText writes the constitution, once.
func (m *Molecule) flatText() string {
	form := m.canonical(false)
	m.derived.textOnce.Do(func() {
		if form.text != "" || len(form.parts) == 0 {
			return
		}
		w := writers.Get().(*smilesWriter)
		w.begin(m, smilesStyle{})
		for p, a := range form.parts[0].atoms {
			w.rank[a] = int32(p)
		}
		w.keep(nil)
		form.text = w.component(int(form.parts[0].atoms[0]))
		if cap(w.rank) <= 4096 {
			writers.Put(w)
		}
	})
	return form.text
}

// canonicalize numbers and writes the molecule; where classes is not nil it receives
// the classes of equivalent atoms.
func (m *Molecule) canonicalize(style smilesStyle, classes []int) canonicalForm {
	parts := m.canonicalParts(style, classes)
	if classes != nil && len(parts) > 1 {
		uniteEqualParts(parts, classes)
	}
	return canonicalForm{parts: parts, text: joinParts(parts), classes: classes}
}

// uniteEqualParts gives the atoms of equal components one class.
func uniteEqualParts(parts []canonicalPart, classes []int) {
	for c := 1; c < len(parts); c++ {
		if parts[c].text != parts[c-1].text {
			continue
		}
		// Equal components follow each other by their first atom.
		for p, a := range parts[c].atoms {
			classes[a] = classes[parts[c-1].atoms[p]]
		}
	}
	smallest := make(map[int]int, len(classes))
	for i, c := range classes {
		if _, ok := smallest[c]; !ok {
			smallest[c] = i
		}
		classes[i] = smallest[c]
	}
}

func joinParts(parts []canonicalPart) string {
	if len(parts) == 1 {
		return parts[0].text
	}
	texts := make([]string, len(parts))
	for i := range parts {
		texts[i] = parts[i].text
	}
	return strings.Join(texts, ".")
}

// canonicalPart is one component in its canonical numbering.
type canonicalPart struct {
	atoms []int32 // in canonical order
	text  string
}

// canonicalParts numbers and writes the components and sorts them by their text, equal
// ones by their first atom. Where classes is not nil it receives the orbits within each
// component; the text of an only component is then left to [Molecule.flatText].
func (m *Molecule) canonicalParts(style smilesStyle, classes []int) []canonicalPart {
	l := labellings.Get().(*labelling)
	w := writers.Get().(*smilesWriter)
	defer func() {
		if cap(l.elem) <= 4096 {
			labellings.Put(l)
			writers.Put(w)
		}
	}()
	stereo := style.stereo && m.hasStereo()
	components := m.atomsByComponent()
	written := classes == nil || len(components) > 1
	if written {
		w.begin(m, style)
	}
	parts := make([]canonicalPart, len(components))
	ordered := make([]int32, len(m.Atoms))
	for c, own := range components {
		l.load(m, own, stereo)
		l.run()
		part := ordered[:len(own):len(own)]
		ordered = ordered[len(own):]
		for p, v := range l.best.elem {
			part[p] = own[v]
		}
		if classes != nil {
			for i, a := range own {
				classes[a] = int(own[find(l.orbit, int32(i))])
			}
		}
		parts[c].atoms = part
		if written {
			for p, a := range part {
				w.rank[a] = int32(p)
			}
			w.keep(l.elements)
			parts[c].text = w.component(int(part[0]))
		}
	}
	slices.SortStableFunc(parts, func(a, b canonicalPart) int { return strings.Compare(a.text, b.text) })
	return parts
}

// atomsByComponent lists the atoms of each component, ascending.
func (m *Molecule) atomsByComponent() [][]int32 {
	n := len(m.Atoms)
	label, count := m.labelComponents()
	atoms := make([]int32, n)
	if count == 1 {
		for i := range atoms {
			atoms[i] = int32(i)
		}
		return [][]int32{atoms}
	}
	at := make([]int32, count+1)
	for _, c := range label {
		at[c+1]++
	}
	for c := 1; c <= count; c++ {
		at[c] += at[c-1]
	}
	list := make([][]int32, count)
	for c := range list {
		list[c] = atoms[at[c]:at[c]:at[c+1]]
	}
	for i, c := range label {
		list[c] = append(list[c], int32(i))
	}
	return list
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
func (m *Molecule) Classes() []int { return m.canonical(false).classes }

// CanonicalOrder gives the place of each atom in the canonical numbering, from 0: the
// same molecule, however written, gets the same numbering, up to its symmetry.
// Configuration takes part, atom maps do not. Components follow each other in the order
// in which [Molecule.SMILES] writes them. The slice is the molecule's own: do not
// change it.
func (m *Molecule) CanonicalOrder() []int {
	m.derived.orderOnce.Do(func() {
		order := make([]int, len(m.Atoms))
		k := 0
		for _, part := range m.canonical(true).parts {
			for _, a := range part.atoms {
				order[a] = k
				k++
			}
		}
		m.derived.order = order
	})
	return m.derived.order
}

// ClassesWith is [Molecule.Classes] with the charges of some atoms left aside and some
// bonds taken for alike, as where resonance shares a charge: one entry for each atom and
// each bond.
func (m *Molecule) ClassesWith(uncharged, alike []bool) []int {
	q := *m
	q.Atoms, q.Bonds = slices.Clone(m.Atoms), slices.Clone(m.Bonds)
	for i := range q.Atoms {
		if uncharged[i] {
			q.Atoms[i].Charge = 0
		}
	}
	for k := range q.Bonds {
		if alike[k] {
			q.Bonds[k].Aromatic = true
		}
	}
	q.derived = new(derived)
	return q.Classes()
}
