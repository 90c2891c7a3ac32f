package molecule

import (
	"fmt"
	"sort"
	"strings"
	"sync"
)

// Option changes what [ParseSMILES] accepts.
type Option func(*options)

type options struct{ wildcard, fragment bool }

// AllowWildcard accepts the wildcard atom *, outside brackets or in them.
func AllowWildcard(o *options) { o.wildcard = true }

// allowFragment leaves aromatic atoms outside rings as they are written, for patterns.
func allowFragment(o *options) { o.fragment = true }

var parsers = sync.Pool{New: func() any { return new(smilesParser) }}

// ParseSMILES reads one SMILES string of the OpenSMILES grammar (specification 1.0,
// 2016) into a finished molecule. Text after white space becomes the Name.
//
// Lower-case atoms are given alternating double bonds; hydrogens of atoms outside
// brackets are added up to the valence; plain [H] atoms are folded into the hydrogen
// count of their neighbour, the other atoms keeping their place in Number. Refusals
// are of type [*Error] and carry the column. Limits: 1 MiB, 20 000 atoms.
func ParseSMILES(s string, opt ...Option) (*Molecule, error) {
	var o options
	for _, f := range opt {
		f(&o)
	}
	if len(s) > maxSMILESBytes {
		return nil, &Error{Text: s[:200], Reason: fmt.Sprintf("the SMILES string has more than %d characters", maxSMILESBytes), Remedy: "give smaller structures"}
	}
	lead := len(s) - len(strings.TrimLeft(s, " \t\r\n"))
	s = strings.TrimRight(s[lead:], " \t\r\n")
	p := parsers.Get().(*smilesParser)
	defer func() {
		if cap(p.atoms) > 4096 {
			p.atoms, p.bonds, p.branches = nil, nil, nil
		}
		p.s = ""
		parsers.Put(p)
	}()
	p.atoms, p.bonds, p.branches = p.atoms[:0], p.bonds[:0], p.branches[:0]
	p.closures = [100]closure{}
	p.stereo, p.aromatic, p.hydrogen, p.fragment = false, false, false, o.fragment
	rest, err := p.parse(s, o.wildcard)
	if err == nil {
		var m *Molecule
		m, err = p.interpret()
		if err == nil {
			m.Name = strings.TrimSpace(rest)
			return m, nil
		}
	}
	if e, ok := err.(*Error); ok && lead > 0 {
		e.Column += lead
		e.Text = strings.Repeat(" ", lead) + e.Text
	}
	return nil, err
}

// interpret turns the raw graph into a finished molecule.
func (p *smilesParser) interpret() (*Molecule, error) {
	n := len(p.atoms)
	m := &Molecule{Source: p.s, Atoms: make([]Atom, n), Bonds: make([]Bond, len(p.bonds))}
	for i := range p.atoms {
		r := &p.atoms[i]
		m.Atoms[i] = Atom{
			Element: r.element, Isotope: r.isotope, Charge: r.charge, Hydrogens: r.hydrogens,
			Map: r.mapNumber, Number: i + 1, Offset: r.start,
		}
	}
	for i := range p.bonds {
		r := &p.bonds[i]
		order := 1
		switch r.symbol {
		case '=':
			order = 2
		case '#':
			order = 3
		case '$':
			order = 4
		}
		m.Bonds[i] = Bond{A: int(r.a), B: int(r.b), Order: order}
	}
	m.connect()
	if err := p.noDoubledBond(m); err != nil {
		return nil, err
	}
	if p.aromatic {
		m.findRingBonds()
		if err := p.kekulize(m); err != nil {
			return nil, err
		}
	}
	for i := range p.atoms {
		if p.atoms[i].bracket || p.atoms[i].element == 0 {
			continue
		}
		a := &m.Atoms[i]
		sum := m.Valence(i)
		h := implicitHydrogens(a.Element, sum)
		if h < 0 {
			return nil, p.tooManyBonds(m, i, sum)
		}
		a.Hydrogens = h
	}
	if p.stereo {
		if err := p.readStereo(m); err != nil {
			return nil, err
		}
	}
	if p.hydrogen {
		m.foldHydrogens()
	}
	if err := m.complete(); err != nil {
		return nil, err
	}
	return m, nil
}

// tooManyBonds refuses an atom of the organic subset.
func (p *smilesParser) tooManyBonds(m *Molecule, i, sum int) error {
	a := &m.Atoms[i]
	_, most, _ := valences(a.Element, 0)
	reason := tooMany(elementName(a.Element), sum, most)
	remedy := "check for a surplus bond or a missing charge"
	switch a.Element {
	case 7:
		reason = fmt.Sprintf("nitrogen has %d bonds and no charge", sum)
		if sum <= 4 {
			remedy = "write [N+] for an ammonium or iminium nitrogen, [n+] in an aromatic ring"
		}
	case 8:
		if sum == 3 {
			remedy = "write [O+] for an oxonium oxygen, [o+] in an aromatic ring"
		}
	case 17, 35, 53:
		if sum <= most {
			reason = fmt.Sprintf("%s has %d bonds and no charge", elementName(a.Element), sum)
			remedy = fmt.Sprintf("write [%s+] for a halonium, or check the bonds", Symbol(a.Element))
		}
	}
	return refuse(p.s, p.atoms[i].start, reason, remedy)
}

// noDoubledBond refuses two bonds between the same two atoms.
func (p *smilesParser) noDoubledBond(m *Molecule) error {
	for i := range m.Atoms {
		adj := m.adjacency[i]
		if len(adj) <= 8 {
			for x := range adj {
				for y := x + 1; y < len(adj); y++ {
					if adj[x].Atom == adj[y].Atom {
						return p.doubled(adj[y].Bond)
					}
				}
			}
			continue
		}
		seen := make(map[int]bool, len(adj))
		for _, h := range adj {
			if seen[h.Atom] {
				return p.doubled(h.Bond)
			}
			seen[h.Atom] = true
		}
	}
	return nil
}

func (p *smilesParser) doubled(bond int) error {
	at := int(p.bonds[bond].keyB)
	if at < 0 {
		at = int(p.bonds[bond].keyA)
	}
	return refuse(p.s, at, "this ring closure makes a second bond between two atoms that are bonded already", "write a double bond as =, or close the ring elsewhere")
}

// foldHydrogens removes the plain hydrogen atoms that hang on another atom, and adds
// them to its count.
func (m *Molecule) foldHydrogens() {
	fold := make([]bool, len(m.Atoms))
	some := false
	for i := range m.Atoms {
		a := &m.Atoms[i]
		if a.Element != 1 || a.Isotope != 0 || a.Charge != 0 || a.Map != 0 || a.Hydrogens != 0 || len(m.adjacency[i]) != 1 {
			continue
		}
		h := m.adjacency[i][0]
		if z := m.Atoms[h.Atom].Element; z <= 1 || m.Bonds[h.Bond].Order != 1 {
			continue
		}
		fold[i], some = true, true
	}
	if !some {
		return
	}
	index := make([]int, len(m.Atoms))
	kept := 0
	for i := range m.Atoms {
		if fold[i] {
			index[i] = ImplicitLigand
			m.Atoms[m.adjacency[i][0].Atom].Hydrogens++
			continue
		}
		index[i] = kept
		kept++
	}
	atoms := m.Atoms[:0]
	for i := range m.Atoms {
		if fold[i] {
			continue
		}
		a := m.Atoms[i]
		for j, l := range a.Stereo.Ligands {
			if l >= 0 {
				a.Stereo.Ligands[j] = index[l]
			}
		}
		atoms = append(atoms, a)
	}
	bonds := m.Bonds[:0]
	for _, b := range m.Bonds {
		if fold[b.A] || fold[b.B] {
			continue
		}
		b.A, b.B = index[b.A], index[b.B]
		if b.Geometry != NoGeometry {
			b.RefA, b.RefB = index[b.RefA], index[b.RefB]
		}
		bonds = append(bonds, b)
	}
	m.Atoms, m.Bonds = atoms, bonds
	m.rings = nil
	m.connect()
	for i := range m.Bonds {
		m.repairReferences(i)
	}
}

// repairReferences replaces a reference that was a hydrogen by the other substituent
// at its end, on the other side; without one the bond has no configuration.
func (m *Molecule) repairReferences(i int) {
	b := &m.Bonds[i]
	if b.Geometry == NoGeometry {
		return
	}
	ends := [2]int{b.A, b.B}
	refs := [2]*int{&b.RefA, &b.RefB}
	for e := range ends {
		if *refs[e] != ImplicitLigand {
			continue
		}
		from, at := ends[1-e], ends[e]
		at, from = m.chainEnd(i, at, from)
		other := ImplicitLigand
		for _, h := range m.adjacency[at] {
			if h.Atom != from {
				other = h.Atom
			}
		}
		if other == ImplicitLigand {
			b.Geometry, b.RefA, b.RefB = NoGeometry, 0, 0
			return
		}
		*refs[e] = other
		b.Geometry = Together + Opposite - b.Geometry
	}
}

// chainEnd follows cumulated double bonds from bond i through its end at, and returns
// the last atom and the one before it.
func (m *Molecule) chainEnd(i, at, from int) (end, before int) {
	for len(m.adjacency[at]) == 2 {
		h := m.adjacency[at][0]
		if h.Atom == from {
			h = m.adjacency[at][1]
		}
		if m.Bonds[h.Bond].Order != 2 || h.Bond == i {
			break
		}
		at, from = h.Atom, at
	}
	return at, from
}

// orderedNeighbours lists the neighbours of atom i in the order of the text.
func (p *smilesParser) orderedNeighbours(m *Molecule, i int) (atoms []int, from bool) {
	adj := m.adjacency[i]
	keys := make([]int32, len(adj))
	atoms = make([]int, len(adj))
	for j, h := range adj {
		r := &p.bonds[h.Bond]
		keys[j] = r.keyA
		if int(r.b) == i {
			keys[j] = r.keyB
		}
		if keys[j] < 0 {
			from = true
		}
		atoms[j] = h.Atom
	}
	sort.Sort(&byKey{keys, atoms})
	return atoms, from
}

type byKey struct {
	keys  []int32
	atoms []int
}

func (b *byKey) Len() int           { return len(b.keys) }
func (b *byKey) Less(i, j int) bool { return b.keys[i] < b.keys[j] }
func (b *byKey) Swap(i, j int) {
	b.keys[i], b.keys[j] = b.keys[j], b.keys[i]
	b.atoms[i], b.atoms[j] = b.atoms[j], b.atoms[i]
}
