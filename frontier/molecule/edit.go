package molecule

import (
	"fmt"
	"slices"
	"sync"
)

// Editor builds a molecule from another by making and breaking bonds. It works on
// the Kekulé form; the molecule it came from is not touched. Atom indices stay those
// of the molecule, with added atoms behind them, until [Editor.Done] closes the gaps
// left by removed ones.
//
// Hydrogens that are no nodes do not follow the bonds by themselves: where a bond
// takes the place of a hydrogen, say so with SetHydrogens, or use ReplaceLigand.
//
// An impossible step (a bond that exists already, an atom that does not) leaves the
// editor as it is, and Done returns the first such error.
type Editor struct {
	atoms    []Atom
	bonds    []Bond // Order 0: removed
	parts    []part
	added    []int // indices of bonds made here
	removed  []bool
	gone     int // atoms removed
	name     string
	source   string
	points   []Point
	allenal  bool
	touched  bool // some bond or hydrogen count was changed
	highest  int  // highest Atom.Number, 0 when not yet sought
	firstErr error

	space      *editorSpace // where atoms and bonds come from
	firstParts [2]part
}

// part is a molecule whose atoms and bonds the editor took over.
type part struct {
	m          *Molecule
	atom, bond int // where its atoms and bonds begin
}

// editorSpace is room for the atoms and bonds of an editor, used again when the
// molecule it made has room of its own.
type editorSpace struct {
	atoms []Atom
	bonds []Bond
}

// maxEditorSpace is the number of atoms up to which room is kept.
const maxEditorSpace = 4096

var editorSpaces = sync.Pool{New: func() any { return new(editorSpace) }}

// Edit starts an editor on a copy of the molecule.
func (m *Molecule) Edit() *Editor {
	space := editorSpaces.Get().(*editorSpace)
	e := &Editor{
		atoms:  append(space.atoms[:0], m.Atoms...),
		bonds:  append(space.bonds[:0], m.Bonds...),
		space:  space,
		name:   m.Name,
		source: m.Source,
		points: m.Points,
	}
	e.parts = append(e.firstParts[:0], part{m: m})
	for i := range e.atoms {
		if e.atoms[i].Stereo.Class == Allenal {
			e.allenal = true
		}
	}
	return e
}

func (e *Editor) fail(format string, args ...any) {
	if e.firstErr == nil {
		e.firstErr = fmt.Errorf(format, args...)
	}
}

// has reports whether atom i is there, and records an error where it is not.
func (e *Editor) has(i int) bool {
	if i < 0 || i >= len(e.atoms) || e.removed != nil && i < len(e.removed) && e.removed[i] {
		e.fail("the molecule has no atom of index %d to edit", i)
		return false
	}
	return true
}

// label names atom i for a chemist: its symbol and number.
func (e *Editor) label(i int) string {
	return fmt.Sprintf("%s-%d", Symbol(e.atoms[i].Element), e.atoms[i].Number)
}

// find returns the index of the bond between atoms a and b, or -1.
func (e *Editor) find(a, b int) int {
	for p := len(e.parts) - 1; p >= 0; p-- {
		s := &e.parts[p]
		if a < s.atom {
			continue
		}
		if a-s.atom < len(s.m.Atoms) {
			for _, h := range s.m.adjacency[a-s.atom] {
				if h.Atom+s.atom == b && e.bonds[h.Bond+s.bond].Order > 0 {
					return h.Bond + s.bond
				}
			}
		}
		break
	}
	for _, k := range e.added {
		if bond := &e.bonds[k]; bond.Order > 0 && (bond.A == a && bond.B == b || bond.A == b && bond.B == a) {
			return k
		}
	}
	return -1
}

// Order is the order of the bond between atoms a and b, 0 when there is none.
func (e *Editor) Order(a, b int) int {
	if k := e.find(a, b); k >= 0 {
		return e.bonds[k].Order
	}
	return 0
}

// AddAtom adds an atom and returns its index. Without a Number it gets the next one
// after the highest in use, and no place in the source.
func (e *Editor) AddAtom(a Atom) int {
	if a.Number == 0 {
		a.Number, a.Offset = e.nextNumber(), -1
	}
	e.highest = max(e.highest, a.Number)
	a.Stereo = Stereo{}
	e.atoms = append(e.atoms, a)
	e.points, e.touched = nil, true
	return len(e.atoms) - 1
}

func (e *Editor) nextNumber() int {
	if e.highest == 0 {
		for i := range e.atoms {
			e.highest = max(e.highest, e.atoms[i].Number)
		}
	}
	return e.highest + 1
}

// Atom gives access to atom i, to change what it holds: element, charge, isotope, map,
// hydrogens, configuration. The pointer is good until the next AddAtom, Merge or Done;
// an index out of range gives a scratch atom.
func (e *Editor) Atom(i int) *Atom {
	if !e.has(i) {
		return new(Atom)
	}
	return &e.atoms[i]
}

// SetHydrogens sets the number of hydrogens of atom a that are no nodes.
func (e *Editor) SetHydrogens(a, n int) {
	if !e.has(a) {
		return
	}
	if n < 0 {
		e.fail("%s cannot have %d hydrogens", e.label(a), n)
		return
	}
	e.atoms[a].Hydrogens = n
	e.touched = true
}

// AddBond makes a bond of order 1 to 4 between two atoms that have none.
func (e *Editor) AddBond(a, b, order int) {
	if !e.has(a) || !e.has(b) {
		return
	}
	switch {
	case a == b:
		e.fail("%s cannot be bonded to itself", e.label(a))
	case order < 1 || order > 4:
		e.fail("a bond of order %d between %s and %s is impossible", order, e.label(a), e.label(b))
	case e.find(a, b) >= 0:
		e.fail("%s and %s are bonded already", e.label(a), e.label(b))
	default:
		e.added = append(e.added, len(e.bonds))
		e.bonds = append(e.bonds, Bond{A: a, B: b, Order: order})
		e.touched = true
	}
}

// SetOrder changes the order of a bond. A double bond that becomes another loses its
// geometry.
func (e *Editor) SetOrder(a, b, order int) {
	if !e.has(a) || !e.has(b) {
		return
	}
	k := e.find(a, b)
	switch {
	case k < 0:
		e.fail("%s and %s are not bonded", e.label(a), e.label(b))
	case order < 1 || order > 4:
		e.fail("a bond of order %d between %s and %s is impossible", order, e.label(a), e.label(b))
	case e.bonds[k].Order != order:
		e.bonds[k].Order = order
		e.bonds[k].Geometry, e.bonds[k].RefA, e.bonds[k].RefB = NoGeometry, 0, 0
		e.touched = true
	}
}

// RemoveBond breaks the bond between two atoms.
func (e *Editor) RemoveBond(a, b int) {
	if !e.has(a) || !e.has(b) {
		return
	}
	k := e.find(a, b)
	if k < 0 {
		e.fail("%s and %s are not bonded", e.label(a), e.label(b))
		return
	}
	e.bonds[k].Order = 0
	e.touched = true
}

// RemoveAtom removes an atom with its bonds.
func (e *Editor) RemoveAtom(a int) {
	if !e.has(a) {
		return
	}
	e.eachBond(a, func(k, _ int) { e.bonds[k].Order = 0 })
	if len(e.removed) < len(e.atoms) {
		e.removed = append(e.removed, make([]bool, len(e.atoms)-len(e.removed))...)
	}
	e.removed[a] = true
	e.gone++
	e.touched = true
}

// ReplaceLigand puts atom next in the place of ligand old at atom a, with a bond of
// the same order, so that a keeps its configuration and double bonds at a theirs.
// Either may be [ImplicitLigand], which stands for one hydrogen of a that is no node:
// its count is changed accordingly, and the new bond is single.
func (e *Editor) ReplaceLigand(a, old, next int) {
	if !e.has(a) || old != ImplicitLigand && !e.has(old) || next != ImplicitLigand && !e.has(next) {
		return
	}
	if old == next {
		return
	}
	order := 1
	k := -1
	if old == ImplicitLigand {
		if e.atoms[a].Hydrogens == 0 {
			e.fail("%s has no hydrogen to replace", e.label(a))
			return
		}
	} else {
		if k = e.find(a, old); k < 0 {
			e.fail("%s and %s are not bonded", e.label(a), e.label(old))
			return
		}
		order = e.bonds[k].Order
	}
	if next == a || next != ImplicitLigand && e.find(a, next) >= 0 {
		e.fail("%s and %s are bonded already", e.label(a), e.label(next))
		return
	}
	if next == ImplicitLigand && order > 1 {
		e.fail("a hydrogen cannot take the place of a ligand with a bond of order %d", order)
		return
	}
	if k >= 0 {
		e.bonds[k].Order = 0
	} else {
		e.atoms[a].Hydrogens--
	}
	if next >= 0 {
		e.added = append(e.added, len(e.bonds))
		e.bonds = append(e.bonds, Bond{A: a, B: next, Order: order})
	} else {
		e.atoms[a].Hydrogens++
	}
	e.touched = true
	if s := &e.atoms[a].Stereo; s.Class != NoStereo && s.Class != Allenal {
		e.exchange(s, old, next)
	}
	if old >= 0 && next >= 0 {
		for i := range e.bonds {
			b := &e.bonds[i]
			if b.Geometry == NoGeometry {
				continue
			}
			// The references of a cumulated chain are ligands of its last atoms.
			if b.RefA == old && e.chainFrom(b.A, b.B) == a {
				b.RefA = next
			} else if b.RefB == old && e.chainFrom(b.B, b.A) == a {
				b.RefB = next
			}
		}
	}
	if e.allenal {
		for i := range e.atoms {
			if s := &e.atoms[i].Stereo; s.Class == Allenal {
				e.exchangeAllenal(i, a, old, next)
			}
		}
	}
}

// exchange replaces one ligand in the list of a centre; the list is shared with the
// molecule, so it is copied. Twice the same ligand is no configuration.
func (e *Editor) exchange(s *Stereo, old, next int) {
	at := slices.Index(s.Ligands, old)
	if at < 0 || slices.Index(s.Ligands, next) >= 0 {
		*s = Stereo{}
		return
	}
	s.Ligands = slices.Clone(s.Ligands)
	s.Ligands[at] = next
}

// chainFrom follows double bonds from atom "from" through atom "at" to the end of the
// cumulated chain.
func (e *Editor) chainFrom(at, from int) int {
	for range len(e.atoms) {
		next := -1
		e.eachBond(at, func(k, other int) {
			if other != from && e.bonds[k].Order == 2 {
				next = other
			}
		})
		if next < 0 {
			return at
		}
		at, from = next, at
	}
	return at
}

// eachBond calls f for the bonds of atom i that are there.
func (e *Editor) eachBond(i int, f func(bond, other int)) {
	for p := len(e.parts) - 1; p >= 0; p-- {
		s := &e.parts[p]
		if i < s.atom {
			continue
		}
		if i-s.atom < len(s.m.Atoms) {
			for _, h := range s.m.adjacency[i-s.atom] {
				if e.bonds[h.Bond+s.bond].Order > 0 {
					f(h.Bond+s.bond, h.Atom+s.atom)
				}
			}
		}
		break
	}
	for _, k := range e.added {
		if b := &e.bonds[k]; b.Order > 0 {
			if b.A == i {
				f(k, b.B)
			} else if b.B == i {
				f(k, b.A)
			}
		}
	}
}

// exchangeAllenal replaces a ligand at end a of the cumulated chain through centre i.
func (e *Editor) exchangeAllenal(i, a, old, next int) {
	s := &e.atoms[i].Stereo
	if len(s.Ligands) != 4 {
		return
	}
	var ends [2]int
	n := 0
	e.eachBond(i, func(k, other int) {
		if e.bonds[k].Order == 2 && n < 2 {
			ends[n] = e.chainFrom(other, i)
			n++
		}
	})
	if n < 2 || ends[0] != a && ends[1] != a {
		return
	}
	// Ligands 0 and 1 are at one end, 2 and 3 at the other: the pair that holds a
	// neighbour of a, or the old one, is that of a.
	for p := 0; p < 4; p += 2 {
		pair := s.Ligands[p : p+2]
		if old >= 0 && slices.Contains(pair, old) ||
			old < 0 && slices.Contains(pair, old) && (pair[0] >= 0 && e.find(a, pair[0]) >= 0 || pair[1] >= 0 && e.find(a, pair[1]) >= 0) {
			if slices.Contains(pair, next) {
				*s = Stereo{}
				return
			}
			s.Ligands = slices.Clone(s.Ligands)
			s.Ligands[p+slices.Index(s.Ligands[p:p+2], old)] = next
			return
		}
	}
}

// Merge adds the atoms and bonds of another molecule and returns the index its first
// atom got.
func (e *Editor) Merge(other *Molecule) (offset int) {
	offset = len(e.atoms)
	bonds := len(e.bonds)
	e.parts = append(e.parts, part{m: other, atom: offset, bond: bonds})
	e.atoms = append(e.atoms, other.Atoms...)
	e.bonds = append(e.bonds, other.Bonds...)
	for i := offset; i < len(e.atoms); i++ {
		a := &e.atoms[i]
		if other.Source != e.source {
			a.Offset = -1
		}
		e.highest = max(e.highest, a.Number)
		if a.Stereo.Class == NoStereo {
			continue
		}
		e.allenal = e.allenal || a.Stereo.Class == Allenal
		a.Stereo.Ligands = slices.Clone(a.Stereo.Ligands)
		for j, l := range a.Stereo.Ligands {
			if l >= 0 {
				a.Stereo.Ligands[j] = l + offset
			}
		}
	}
	for k := bonds; k < len(e.bonds); k++ {
		b := &e.bonds[k]
		b.A += offset
		b.B += offset
		if b.Geometry != NoGeometry {
			b.RefA += offset
			b.RefB += offset
		}
	}
	e.points, e.touched = nil, true
	return offset
}

// Done finishes the molecule: rings, aromaticity and unpaired electrons are found
// anew, valences are checked, and plain hydrogen atoms become counts of their
// neighbours. The editor cannot be used afterwards.
//
// A configuration survives where all ligands are still there, or were replaced by
// ReplaceLigand. An atom that is no longer tetrahedral, or lost and gained ligands by
// other ways, has none. A double bond also keeps its geometry when the substituent it
// referred to is exchanged while it stays a double bond: the other substituent, or
// the hydrogen, has not moved.
func (e *Editor) Done() (*Molecule, error) {
	if e.firstErr != nil {
		return nil, e.firstErr
	}
	m := &Molecule{Name: e.name, Source: e.source}
	var index []int
	used := len(e.atoms)
	if e.gone > 0 {
		index = make([]int, len(e.atoms))
		kept := 0
		for i := range e.atoms {
			if i < len(e.removed) && e.removed[i] {
				index[i] = -2
				continue
			}
			index[i] = kept
			e.atoms[kept] = e.atoms[i]
			kept++
		}
		e.atoms = e.atoms[:kept]
		if e.points != nil {
			points := make([]Point, kept)
			for i, k := range index {
				if k >= 0 {
					points[k] = e.points[i]
				}
			}
			e.points = points
		}
		for i := range e.atoms {
			if s := &e.atoms[i].Stereo; s.Class != NoStereo {
				s.Ligands = slices.Clone(s.Ligands)
				for j, l := range s.Ligands {
					if l >= 0 {
						s.Ligands[j] = index[l]
					}
				}
			}
		}
	}
	m.Atoms, m.Points = slices.Clone(e.atoms), e.points
	var fresh []int // the bonds that were made here, by their index in m
	stereo := false
	next := 0
	m.Bonds = make([]Bond, 0, e.bondsLeft())
	for k := range e.bonds {
		b := e.bonds[k]
		made := next < len(e.added) && e.added[next] == k
		if made {
			next++
		}
		if b.Order == 0 {
			continue
		}
		if index != nil {
			b.A, b.B = index[b.A], index[b.B]
			if b.Geometry != NoGeometry {
				b.RefA, b.RefB = index[b.RefA], index[b.RefB]
			}
		}
		if made {
			fresh = append(fresh, len(m.Bonds))
		}
		stereo = stereo || b.Geometry != NoGeometry
		m.Bonds = append(m.Bonds, b)
	}
	e.giveBack(used)
	hydrogen := false
	for i := range m.Atoms {
		a := &m.Atoms[i]
		stereo = stereo || a.Stereo.Class != NoStereo
		if a.Element == 1 {
			hydrogen = true
			if a.Hydrogens > 0 {
				return nil, fmt.Errorf("hydrogen %d cannot carry hydrogens that are no nodes", a.Number)
			}
		}
	}
	if e.touched && (stereo || hydrogen) {
		m.connect()
		for k := range m.Bonds {
			if m.Bonds[k].Geometry != NoGeometry {
				m.reviewGeometry(k, fresh)
			}
		}
		for i := range m.Atoms {
			if m.Atoms[i].Stereo.Class != NoStereo {
				m.reviewCentre(i)
			}
		}
		if hydrogen {
			m.foldHydrogens()
			if len(m.Points) != len(m.Atoms) {
				m.Points = nil
			}
		}
	}
	if m.adjacency == nil {
		m.connect()
	}
	if err := m.complete(); err != nil {
		return nil, err
	}
	return m, nil
}

// bondsLeft counts the bonds that are there.
func (e *Editor) bondsLeft() int {
	n := 0
	for k := range e.bonds {
		if e.bonds[k].Order > 0 {
			n++
		}
	}
	return n
}

// giveBack leaves the editor's room, of which it used so many atoms, for others.
func (e *Editor) giveBack(used int) {
	if cap(e.atoms) <= maxEditorSpace {
		// Ligand lists that molecules hold must not be kept alive from here.
		clear(e.atoms[:used])
		e.space.atoms, e.space.bonds = e.atoms, e.bonds
		editorSpaces.Put(e.space)
	}
	e.atoms, e.bonds, e.space = nil, nil, nil
}

// reviewCentre drops the configuration of atom i where its ligands are not the ones
// it refers to.
func (m *Molecule) reviewCentre(i int) {
	a := &m.Atoms[i]
	s := &a.Stereo
	if s.Class == Allenal {
		if !m.allenalHolds(i) {
			*s = Stereo{}
		}
		return
	}
	adj := m.adjacency[i]
	implicit, ok := 0, a.Hydrogens <= 1
	for _, l := range s.Ligands {
		if l == ImplicitLigand {
			implicit++
		} else if l < 0 || m.BondBetween(i, l) < 0 {
			ok = false
		}
	}
	if len(s.Ligands)-implicit != len(adj) || implicit < a.Hydrogens {
		ok = false
	}
	if s.Class == Tetrahedral {
		if implicit > 1 {
			ok = false
		}
		switch a.Element {
		case 5, 6, 14, 32:
			for _, h := range adj {
				if m.Bonds[h.Bond].Order > 1 {
					ok = false
				}
			}
			if implicit != a.Hydrogens {
				ok = false // a radical or an ion in the place of the hydrogen
			}
		case 7:
			for _, h := range adj {
				if m.Bonds[h.Bond].Order > 1 {
					ok = false
				}
			}
		}
	}
	if !ok {
		*s = Stereo{}
	}
}

// allenalHolds checks the four ligands at the ends of the cumulated chain through i.
func (m *Molecule) allenalHolds(i int) bool {
	adj := m.adjacency[i]
	ligands := m.Atoms[i].Stereo.Ligands
	if len(adj) != 2 || len(ligands) != 4 || m.Bonds[adj[0].Bond].Order != 2 || m.Bonds[adj[1].Bond].Order != 2 {
		return false
	}
	var ends, before [2]int
	for j, h := range adj {
		ends[j], before[j] = m.chainEnd(h.Bond, h.Atom, i)
	}
	holds := func(end, before int, pair []int) bool {
		n := 0
		for _, l := range pair {
			if l == ImplicitLigand {
				continue
			}
			if l < 0 || l == before || m.BondBetween(end, l) < 0 {
				return false
			}
			n++
		}
		h := m.Atoms[end].Hydrogens
		second := n+h == 2 || n == 1 && h == 0 && keepsLonePair(m.Atoms[end].Element)
		return n == len(m.adjacency[end])-1 && n >= 1 && second
	}
	return holds(ends[0], before[0], ligands[:2]) && holds(ends[1], before[1], ligands[2:]) ||
		holds(ends[1], before[1], ligands[:2]) && holds(ends[0], before[0], ligands[2:])
}

// reviewGeometry sets the references of a double bond right after an edit, or drops
// its geometry. fresh lists the bonds that the edit made.
func (m *Molecule) reviewGeometry(k int, fresh []int) {
	b := &m.Bonds[k]
	for e, ref := range [2]*int{&b.RefA, &b.RefB} {
		at, from := b.A, b.B
		if e == 1 {
			at, from = from, at
		}
		end, before := m.chainEnd(k, at, from)
		stays, other, n := false, -1, 0
		isFresh := false
		for _, h := range m.adjacency[end] {
			if h.Atom == before {
				continue
			}
			n++
			if m.Bonds[h.Bond].Order != 1 {
				n = 3
			}
			if h.Atom == *ref {
				stays = true
			} else if other < 0 || isFresh {
				other, isFresh = h.Atom, slices.Contains(fresh, h.Bond)
			}
		}
		ok := n >= 1 && n <= 2 && n+m.Atoms[end].Hydrogens <= 2
		switch {
		case !ok:
		case stays:
			continue
		case !isFresh:
			*ref = other
			b.Geometry = Together + Opposite - b.Geometry
			continue
		case n == 1 && m.Atoms[end].Hydrogens == 1:
			*ref = other
			continue
		}
		b.Geometry, b.RefA, b.RefB = NoGeometry, 0, 0
		return
	}
}
