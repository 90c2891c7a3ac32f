package molecule

import (
	"slices"
	"strconv"
	"sync"
)

// smilesStyle says what a written SMILES string holds.
type smilesStyle struct{ stereo, maps bool }

// SMILES writes the canonical SMILES string: the same for every way of writing the
// same molecule, with configuration and isotopes, without atom maps. Configurations
// that say nothing (at an atom with two equal ligands) are left out.
func (m *Molecule) SMILES() string {
	if m.hasStereo() {
		return m.canonical(true).text
	}
	return m.flatText()
}

// FlatSMILES writes the canonical SMILES string of the constitution: isotopes kept,
// configuration and atom maps left out.
func (m *Molecule) FlatSMILES() string { return m.flatText() }

// MappedSMILES writes the canonical SMILES string with its atom maps; the maps do not
// influence the order of the atoms.
func (m *Molecule) MappedSMILES() string {
	return joinParts(m.canonicalParts(smilesStyle{stereo: true, maps: true}, nil))
}

// smilesWriter writes components in a given numbering.
type smilesWriter struct {
	m     *Molecule
	style smilesStyle
	rank  []int32 // place of each atom in its component
	out   []byte

	up      []int32 // bond that leads to each atom from its parent, -1 at the root, -2 before the visit
	weight  []int32 // atoms in the subtree
	turn    []int32 // place in the order of writing
	number  []int32 // number of each open ring closure, by bond; 0 when not open
	used    []bool  // ring closure numbers in use
	stack   []writeStep
	visit   []int32
	around  []Half // scratch
	rings   []Half // scratch
	written []int

	centres  []stereoElement // of the component
	centreAt []int32         // one more than the index in centres, by atom; 0 for none
	direct   []int8          // by bond: +1 for /, -1 for \, in the order of writing
	endOf    []int32         // one more than the index in centres of the double bond that ends at an atom
}

// writeStep is one thing still to be written: an atom with the bond to it, or text.
type writeStep struct {
	atom, bond int32
	text       byte
}

var writers = sync.Pool{New: func() any { return new(smilesWriter) }}

func (w *smilesWriter) begin(m *Molecule, style smilesStyle) {
	n := len(m.Atoms)
	w.m, w.style = m, style
	w.rank = sized(w.rank, n)
	w.up = sized(w.up, n)
	w.weight = sized(w.weight, n)
	w.turn = sized(w.turn, n)
	w.centreAt = sized(w.centreAt, n)
	w.endOf = sized(w.endOf, n)
	w.number = sized(w.number, len(m.Bonds))
	w.direct = sized(w.direct, len(m.Bonds))
	for i := range w.up {
		w.up[i] = -2
	}
	clear(w.centreAt)
	clear(w.endOf)
	clear(w.number)
	clear(w.direct)
	w.used = w.used[:0]
}

// keep takes over the configurations that are to be written in the next component.
func (w *smilesWriter) keep(elements []stereoElement) {
	w.centres = append(w.centres[:0], elements...)
	for k := range w.centres {
		if e := &w.centres[k]; e.class != bondGeometry {
			w.centreAt[e.source] = int32(k + 1)
		}
	}
}

// component writes the component of atom root, beginning there.
func (w *smilesWriter) component(root int) string {
	w.plan(root)
	w.out = w.out[:0]
	for k := range w.centres {
		if w.centres[k].class == bondGeometry {
			w.chooseDirections()
			break
		}
	}
	w.stack = append(w.stack[:0], writeStep{atom: int32(root), bond: -1})
	for len(w.stack) > 0 {
		s := w.stack[len(w.stack)-1]
		w.stack = w.stack[:len(w.stack)-1]
		if s.text != 0 {
			w.out = append(w.out, s.text)
			continue
		}
		if s.bond >= 0 {
			w.bond(int(s.bond))
		}
		w.atom(int(s.atom))
		c := w.children(int(s.atom))
		for k := len(c) - 1; k >= 0; k-- {
			last := k == len(c)-1
			if !last {
				w.stack = append(w.stack, writeStep{text: ')'})
			}
			w.stack = append(w.stack, writeStep{atom: int32(c[k].Atom), bond: int32(c[k].Bond)})
			if !last {
				w.stack = append(w.stack, writeStep{text: '('})
			}
		}
	}
	return string(w.out)
}

// plan finds a spanning tree by depth-first search, lower ranks first, counts the atoms
// of its subtrees, and from these the order of writing.
func (w *smilesWriter) plan(root int) {
	w.visit = w.visit[:0]
	w.stack = append(w.stack[:0], writeStep{atom: int32(root), bond: -1})
	for len(w.stack) > 0 {
		s := w.stack[len(w.stack)-1]
		w.stack = w.stack[:len(w.stack)-1]
		v := s.atom
		if w.up[v] != -2 {
			continue
		}
		w.up[v], w.weight[v] = s.bond, 1
		w.visit = append(w.visit, v)
		w.around = append(w.around[:0], w.m.adjacency[v]...)
		w.byRank(w.around)
		// Multiple bonds first, so that rings are closed by single ones.
		at := 0
		for k, h := range w.around {
			if b := &w.m.Bonds[h.Bond]; b.Order > 1 && !b.Aromatic {
				copy(w.around[at+1:k+1], w.around[at:k])
				w.around[at] = h
				at++
			}
		}
		for k := len(w.around) - 1; k >= 0; k-- {
			if h := w.around[k]; w.up[h.Atom] == -2 {
				w.stack = append(w.stack, writeStep{atom: int32(h.Atom), bond: int32(h.Bond)})
			}
		}
	}
	for k := len(w.visit) - 1; k > 0; k-- {
		v := w.visit[k]
		w.weight[w.m.Other(int(w.up[v]), int(v))] += w.weight[v]
	}
	w.visit = w.visit[:0]
	w.stack = append(w.stack[:0], writeStep{atom: int32(root)})
	for len(w.stack) > 0 {
		v := w.stack[len(w.stack)-1].atom
		w.stack = w.stack[:len(w.stack)-1]
		w.turn[v] = int32(len(w.visit))
		w.visit = append(w.visit, v)
		c := w.children(int(v))
		for k := len(c) - 1; k >= 0; k-- {
			w.stack = append(w.stack, writeStep{atom: int32(c[k].Atom)})
		}
	}
}

func (w *smilesWriter) byRank(hs []Half) {
	if len(hs) > 8 {
		slices.SortFunc(hs, func(a, b Half) int { return int(w.rank[a.Atom] - w.rank[b.Atom]) })
		return
	}
	for i := 1; i < len(hs); i++ {
		for j := i; j > 0 && w.rank[hs[j].Atom] < w.rank[hs[j-1].Atom]; j-- {
			hs[j], hs[j-1] = hs[j-1], hs[j]
		}
	}
}

// children lists the tree neighbours after atom i, small branches first. The slice is
// valid until the next call.
func (w *smilesWriter) children(i int) []Half {
	w.around = w.around[:0]
	for _, h := range w.m.adjacency[i] {
		if w.up[h.Atom] == int32(h.Bond) {
			w.around = append(w.around, h)
		}
	}
	less := func(a, b Half) bool {
		if x, y := w.weight[a.Atom], w.weight[b.Atom]; x != y {
			return x < y
		}
		return w.rank[a.Atom] < w.rank[b.Atom]
	}
	if len(w.around) > 8 {
		slices.SortFunc(w.around, func(a, b Half) int {
			if less(a, b) {
				return -1
			}
			return 1
		})
		return w.around
	}
	for k := 1; k < len(w.around); k++ {
		for j := k; j > 0 && less(w.around[j], w.around[j-1]); j-- {
			w.around[j], w.around[j-1] = w.around[j-1], w.around[j]
		}
	}
	return w.around
}

// closing lists the ring closures of atom i, those to close before those to open, each
// in the order of rank. The slice is valid until the next call.
func (w *smilesWriter) closing(i int) []Half {
	w.rings = w.rings[:0]
	for _, h := range w.m.adjacency[i] {
		if w.up[i] != int32(h.Bond) && w.up[h.Atom] != int32(h.Bond) {
			w.rings = append(w.rings, h)
		}
	}
	if len(w.rings) > 1 {
		slices.SortFunc(w.rings, func(a, b Half) int { return w.compareClosures(i, a.Atom, b.Atom) })
	}
	return w.rings
}

// compareClosures compares two atoms that ring closures lead to from atom i.
func (w *smilesWriter) compareClosures(i, a, b int) int {
	oa, ob := w.turn[a] > w.turn[i], w.turn[b] > w.turn[i]
	switch {
	case oa == ob:
		return int(w.rank[a] - w.rank[b])
	case ob:
		return -1
	}
	return 1
}

// atom writes atom i and its ring closures.
func (w *smilesWriter) atom(i int) {
	closures := w.closing(i)
	var mark *stereoElement
	permutation := 0
	if k := w.centreAt[i]; k > 0 {
		mark = &w.centres[k-1]
		permutation = w.permutation(i, mark, closures)
	}
	w.symbol(i, mark, permutation)
	for _, h := range closures {
		if n := w.number[h.Bond]; n > 0 {
			w.closure(int(n))
			continue
		}
		n := 0
		for n < len(w.used) && w.used[n] {
			n++
		}
		if n == len(w.used) {
			w.used = append(w.used, false)
		}
		w.used[n] = true
		w.number[h.Bond] = int32(n + 1)
		w.bond(h.Bond)
		w.closure(n + 1)
	}
	for _, h := range closures {
		if w.turn[h.Atom] < w.turn[i] {
			w.used[w.number[h.Bond]-1] = false
		}
	}
}

func (w *smilesWriter) closure(n int) {
	if n > 9 {
		w.out = append(w.out, '%')
	}
	w.out = strconv.AppendInt(w.out, int64(n), 10)
}

func (w *smilesWriter) bond(b int) {
	bond := &w.m.Bonds[b]
	both := w.m.Atoms[bond.A].Aromatic && w.m.Atoms[bond.B].Aromatic
	switch {
	case w.direct[b] > 0:
		w.out = append(w.out, '/')
	case w.direct[b] < 0:
		w.out = append(w.out, '\\')
	case bond.Aromatic:
	case bond.Order == 1:
		if both {
			w.out = append(w.out, '-')
		}
	default:
		w.out = append(w.out, "=#$"[bond.Order-2])
	}
}

// symbol writes the symbol of atom i, in brackets where it needs them.
func (w *smilesWriter) symbol(i int, mark *stereoElement, permutation int) {
	m := w.m
	a := &m.Atoms[i]
	if mark == nil && a.Isotope == 0 && a.Charge == 0 && (a.Map == 0 || !w.style.maps) && m.isOrganic(i) {
		w.elementSymbol(a)
		return
	}
	w.out = append(w.out, '[')
	if a.Isotope > 0 {
		w.out = strconv.AppendInt(w.out, int64(a.Isotope), 10)
	}
	w.elementSymbol(a)
	if mark != nil {
		w.out = append(w.out, '@')
		switch mark.class {
		case Tetrahedral, Allenal:
			if permutation == 2 {
				w.out = append(w.out, '@')
			}
		default:
			w.out = append(w.out, map[StereoClass]string{SquarePlanar: "SP", TrigonalBipyramidal: "TB", Octahedral: "OH"}[mark.class]...)
			w.out = strconv.AppendInt(w.out, int64(permutation), 10)
		}
	}
	if a.Hydrogens > 0 {
		w.out = append(w.out, 'H')
		if a.Hydrogens > 1 {
			w.out = strconv.AppendInt(w.out, int64(a.Hydrogens), 10)
		}
	}
	switch {
	case a.Charge > 0:
		w.out = append(w.out, '+')
	case a.Charge < 0:
		w.out = append(w.out, '-')
	}
	if c := abs(a.Charge); c > 1 {
		w.out = strconv.AppendInt(w.out, int64(c), 10)
	}
	if a.Map > 0 && w.style.maps {
		w.out = append(w.out, ':')
		w.out = strconv.AppendInt(w.out, int64(a.Map), 10)
	}
	w.out = append(w.out, ']')
}

func (w *smilesWriter) elementSymbol(a *Atom) {
	s := Symbol(a.Element)
	if a.Aromatic {
		w.out = append(w.out, s[0]+'a'-'A')
		s = s[1:]
	}
	w.out = append(w.out, s...)
}

// isOrganic tells whether the hydrogens of atom i are those it would be given when
// written without brackets.
func (m *Molecule) isOrganic(i int) bool {
	a := &m.Atoms[i]
	switch a.Element {
	case 0:
		return a.Hydrogens == 0
	case 5, 6, 7, 8, 9, 15, 16, 17, 35, 53:
	default:
		return false
	}
	if a.Aromatic && a.Element != 6 && a.Hydrogens > 0 {
		return false
	}
	return implicitHydrogens(a.Element, m.Valence(i)-a.Hydrogens) == a.Hydrogens
}

// permutation is the permutation number of a centre for its ligands in the order in
// which they are written.
func (w *smilesWriter) permutation(i int, e *stereoElement, closures []Half) int {
	s := &w.m.Atoms[i].Stereo
	w.written = w.written[:0]
	if e.class == Allenal {
		return w.allenalPermutation(i, s)
	}
	if w.up[i] >= 0 {
		w.written = append(w.written, w.m.Other(int(w.up[i]), i))
	}
	implicit := slices.Contains(s.Ligands, ImplicitLigand)
	if implicit && w.m.Atoms[i].Hydrogens > 0 {
		w.written = append(w.written, ImplicitLigand)
	}
	for _, h := range closures {
		w.written = append(w.written, h.Atom)
	}
	for _, h := range w.children(i) {
		w.written = append(w.written, h.Atom)
	}
	if implicit && w.m.Atoms[i].Hydrogens == 0 {
		w.written = append(w.written, ImplicitLigand)
	}
	var from [6]int8
	for k, l := range w.written {
		from[k] = int8(slices.Index(s.Ligands, l))
	}
	return reorder(e.class, s.Permutation, from[:len(s.Ligands)])
}
