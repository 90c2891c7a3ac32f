package molecule

import (
	"encoding/binary"
	"fmt"
	"slices"
	"strings"
	"sync"
)

// Pattern is a structural fragment to be found in molecules. It is written as SMILES:
//
//   - An atom matches atoms of its element and charge; lower case (or an atom that is
//     aromatic in a ring written out in the pattern) only aromatic ones, a capital only
//     others. The star * matches any atom, whatever its charge.
//   - The number of hydrogens matters only for an atom in brackets that states hydrogens
//     or a charge, and must then be the same: [OH] is a hydroxyl, [NH2] a primary amine,
//     [O-] carries none, while N and [N] match any neutral nitrogen that is not aromatic.
//     The isotope matters where it is stated.
//   - A bond matches one of the same order; aromatic bonds match aromatic bonds only,
//     and a single or double bond matches no aromatic one, so that *c1ccccc1 finds the
//     substituent of a benzene ring and not the ring fusion of naphthalene.
//   - Atoms of the molecule may have more neighbours than those of the pattern.
//     Configurations and atom maps do not matter. Fragments separated by a dot may
//     match anywhere, without sharing atoms.
//
// In a ring that holds stars, lower-case atoms count as aromatic as written, and the
// ring bonds from them as aromatic bonds. Lower-case atoms may stand outside a ring,
// too: cC=O is an aldehyde or ketone on an aromatic carbon. An unwritten bond between
// two of them matches a single or an aromatic bond; write - or : to have one of these.
//
// A Pattern may be used by several goroutines at once.
type Pattern struct {
	source   string
	atoms    []patternAtom
	steps    []patternStep
	elements []elementCount
	bonds    int
}

type patternAtom struct {
	element   int8
	any       bool
	aromatic  bool
	charged   bool // the charge matters
	charge    int
	isotope   int // 0: any
	hydrogens int // -1: any
	degree    int
}

// patternStep places one atom of the pattern: at a neighbour of one that stands
// already, or, for the first of a fragment, anywhere.
type patternStep struct {
	atom   int
	anchor int // pattern atom placed before, -1 for none
	bond   patternBond
	closes []patternClosure
}

type patternBond struct {
	order    int
	aromatic bool
	either   bool // single or aromatic
}

// patternClosure is a bond to an atom placed before.
type patternClosure struct {
	atom int
	bond patternBond
}

type elementCount struct{ element, n int }

const (
	maxPatternAtoms = 200
	// maxPatternTests bounds the atoms tried in one search, so that a hostile
	// structure cannot hold it up; structures of 1000 atoms and patterns of a
	// functional group stay far below.
	maxPatternTests = 1 << 22
)

// NewPattern compiles a pattern. The error is that of [ParseSMILES].
func NewPattern(smiles string) (*Pattern, error) {
	m, err := ParseSMILES(smiles, AllowWildcard, allowFragment)
	if err != nil {
		return nil, err
	}
	if len(m.Atoms) > maxPatternAtoms {
		return nil, &Error{Text: m.Source, Column: 1, Reason: fmt.Sprintf("the pattern has more than %d atoms", maxPatternAtoms), Remedy: "write a smaller fragment"}
	}
	p := &Pattern{source: m.Source, atoms: make([]patternAtom, len(m.Atoms)), bonds: len(m.Bonds)}
	lower := make([]bool, len(m.Atoms)) // aromatic as written, where perception cannot tell
	open := make([]bool, len(m.Atoms))  // shares a ring system with a star
	for _, system := range m.RingSystems() {
		star := slices.ContainsFunc(system, func(i int) bool { return m.Atoms[i].Element == 0 })
		for _, i := range system {
			open[i] = open[i] || star
		}
	}
	var counts [128]int
	for i := range m.Atoms {
		a := &m.Atoms[i]
		text := m.Source[a.Offset:]
		bracket := strings.HasPrefix(text, "[")
		if bracket {
			text = text[1:strings.IndexByte(text, ']')]
			text = strings.TrimLeft(text, "0123456789")
		}
		lower[i] = small(text[0]) && !a.Aromatic && (open[i] || !m.InRing(i))
		q := patternAtom{
			element: int8(a.Element), any: a.Element == 0, aromatic: a.Aromatic || lower[i],
			charged: a.Element != 0 || a.Charge != 0, charge: a.Charge, isotope: a.Isotope, hydrogens: -1,
			degree: m.Degree(i),
		}
		if text = strings.TrimLeft(text[1:], "abcdefghijklmnopqrstuvwxyz"); bracket {
			text, _, _ = strings.Cut(text, ":")
			if strings.ContainsAny(text, "+-") || strings.Contains(strings.TrimPrefix(strings.TrimPrefix(text, "@TH"), "@OH"), "H") {
				q.hydrogens = a.Hydrogens
			}
		}
		p.atoms[i] = q
		if !q.any {
			counts[a.Element]++
		}
	}
	for z, n := range counts {
		if n > 0 {
			p.elements = append(p.elements, elementCount{z, n})
		}
	}
	p.plan(m, lower)
	return p, nil
}

// MustPattern is NewPattern for patterns of the program itself; it panics on an error.
func MustPattern(smiles string) *Pattern {
	p, err := NewPattern(smiles)
	if err != nil {
		panic("molecule: pattern " + smiles + ": " + err.Error())
	}
	return p
}

// String is the pattern as written.
func (p *Pattern) String() string { return p.source }

// Atoms is the number of atoms of the pattern, in the order in which it was written.
func (p *Pattern) Atoms() int { return len(p.atoms) }

// plan chooses the order in which the atoms are placed: each fragment starts with its
// rarest kind of atom and grows along bonds, atoms that close rings first.
func (p *Pattern) plan(m *Molecule, lower []bool) {
	placed := make([]bool, len(p.atoms))
	rarity := func(i int) int {
		q := &p.atoms[i]
		r := q.degree
		switch {
		case q.any:
		case q.element == 6:
			r += 8
		case q.element == 7 || q.element == 8:
			r += 16
		default:
			r += 24
		}
		if q.charge != 0 || q.hydrogens >= 0 || q.isotope != 0 {
			r += 12
		}
		return r
	}
	bond := func(k int) patternBond {
		b := &m.Bonds[k]
		pb := patternBond{order: b.Order, aromatic: b.Aromatic}
		if m.BondInRing(k) && (lower[b.A] || lower[b.B]) && !b.Aromatic &&
			(p.atoms[b.A].aromatic || p.atoms[b.A].any) && (p.atoms[b.B].aromatic || p.atoms[b.B].any) {
			pb.aromatic = true
		}
		if !m.BondInRing(k) && (p.atoms[b.A].aromatic || p.atoms[b.A].any) && (p.atoms[b.B].aromatic || p.atoms[b.B].any) {
			// A bond of a chain is written right before its later atom.
			switch at := max(m.Atoms[b.A].Offset, m.Atoms[b.B].Offset); m.Source[at-1] {
			case ':':
				pb.aromatic = true
			case '-':
			default:
				pb.either = (lower[b.A] || lower[b.B]) && p.atoms[b.A].aromatic && p.atoms[b.B].aromatic
			}
		}
		return pb
	}
	for range p.atoms {
		best, bestScore, bestLinks := -1, -1, 0
		for i := range p.atoms {
			if placed[i] {
				continue
			}
			links := 0
			for _, h := range m.Neighbours(i) {
				if placed[h.Atom] {
					links++
				}
			}
			if score := 1000*links + rarity(i); score > bestScore {
				best, bestScore, bestLinks = i, score, links
			}
		}
		s := patternStep{atom: best, anchor: -1}
		if bestLinks > 0 {
			for _, h := range m.Neighbours(best) {
				if !placed[h.Atom] {
					continue
				}
				if s.anchor < 0 {
					s.anchor, s.bond = h.Atom, bond(h.Bond)
				} else {
					s.closes = append(s.closes, patternClosure{h.Atom, bond(h.Bond)})
				}
			}
		}
		placed[best] = true
		p.steps = append(p.steps, s)
	}
}

// search is the state of one search.
type search struct {
	p     *Pattern
	m     *Molecule
	at    []int  // molecule atom of each pattern atom
	used  []bool // molecule atoms that are taken
	tests int
	hit   func(at []int) (stop bool)
}

var searches = sync.Pool{New: func() any { return new(search) }}

// run calls hit for every way of laying the pattern on the molecule, until it returns
// true.
func (p *Pattern) run(m *Molecule, hit func([]int) bool) {
	if len(p.atoms) > len(m.Atoms) || p.bonds > len(m.Bonds) || !p.mayFit(m) {
		return
	}
	s := searches.Get().(*search)
	s.p, s.m, s.hit, s.tests = p, m, hit, 0
	s.at = slices.Grow(s.at[:0], len(p.atoms))[:len(p.atoms)]
	s.used = slices.Grow(s.used[:0], len(m.Atoms))[:len(m.Atoms)]
	clear(s.used)
	s.place(0)
	s.p, s.m, s.hit = nil, nil, nil
	if cap(s.used) <= 4096 {
		searches.Put(s)
	}
}

// mayFit compares the numbers of atoms of each element.
func (p *Pattern) mayFit(m *Molecule) bool {
	var counts [128]int32
	for i := range m.Atoms {
		counts[m.Atoms[i].Element&127]++
	}
	for _, e := range p.elements {
		if int(counts[e.element]) < e.n {
			return false
		}
	}
	return true
}

// place puts the atom of step k and those after it; it reports whether to stop.
func (s *search) place(k int) bool {
	if k == len(s.p.steps) {
		return s.hit(s.at)
	}
	step := &s.p.steps[k]
	if step.anchor < 0 {
		for i := range s.m.Atoms {
			if s.try(k, step, i) {
				return true
			}
		}
		return false
	}
	for _, h := range s.m.adjacency[s.at[step.anchor]] {
		if step.bond.matches(&s.m.Bonds[h.Bond]) && s.try(k, step, h.Atom) {
			return true
		}
	}
	return false
}

func (s *search) try(k int, step *patternStep, i int) bool {
	s.tests++
	if s.tests > maxPatternTests {
		return true
	}
	if s.used[i] || !s.p.atoms[step.atom].matches(s.m, i) {
		return false
	}
	for _, c := range step.closes {
		b := s.m.BondBetween(i, s.at[c.atom])
		if b < 0 || !c.bond.matches(&s.m.Bonds[b]) {
			return false
		}
	}
	s.used[i] = true
	s.at[step.atom] = i
	stop := s.place(k + 1)
	s.used[i] = false
	return stop
}

func (q *patternAtom) matches(m *Molecule, i int) bool {
	a := &m.Atoms[i]
	if !q.any && (int(q.element) != a.Element || q.aromatic != a.Aromatic) {
		return false
	}
	return (!q.charged || q.charge == a.Charge) &&
		(q.isotope == 0 || q.isotope == a.Isotope) &&
		(q.hydrogens < 0 || q.hydrogens == a.Hydrogens) &&
		q.degree <= len(m.adjacency[i])
}

func (q patternBond) matches(b *Bond) bool {
	if q.either {
		return b.Aromatic || b.Order == 1
	}
	if q.aromatic || b.Aromatic {
		return q.aromatic && b.Aromatic
	}
	return q.order == b.Order
}

// Has tells whether the molecule holds the pattern.
func (p *Pattern) Has(m *Molecule) bool {
	found := false
	p.run(m, func([]int) bool {
		found = true
		return true
	})
	return found
}

// Find lists where the molecule holds the pattern: for each set of atoms once, the
// indices in the molecule of the pattern's atoms, in the order of the pattern. The
// list is sorted. It is cut short where the search takes more than some four million
// steps, which takes a pattern and a structure of hundreds of like atoms each.
func (p *Pattern) Find(m *Molecule) [][]int {
	var found [][]int
	var seen map[string]bool
	var sorted []int
	var key []byte
	p.run(m, func(at []int) bool {
		sorted = append(sorted[:0], at...)
		slices.Sort(sorted)
		key = key[:0]
		for _, i := range sorted {
			key = binary.AppendUvarint(key, uint64(i))
		}
		if seen[string(key)] {
			return false
		}
		if seen == nil {
			seen = make(map[string]bool)
		}
		seen[string(key)] = true
		found = append(found, slices.Clone(at))
		return false
	})
	slices.SortFunc(found, slices.Compare)
	return found
}
