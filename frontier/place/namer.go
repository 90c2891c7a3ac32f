package place

import (
	"fmt"
	"slices"

	"lobecast/frontier/molecule"
)

// Namer names the places of one molecule. It does its work on demand and is not safe
// for concurrent use.
type Namer struct {
	m       *molecule.Molecule
	system  []*ringSystem // of each ring atom
	at      []int         // position of each atom in the frame of its system
	names   []string
	all     []*ringSystem
	waiting [][]int // ring systems not named yet
	local   []int32 // scratch, zero between uses
}

// ringSystem is one named or unnamed set of fused rings.
type ringSystem struct {
	atoms   []int
	fit     *fit // nil where the system has no name in the table
	benzene bool
	ring    *sixRing // of a benzene ring, once needed
	title   string
}

// NewNamer prepares the naming of a molecule's places.
func NewNamer(m *molecule.Molecule) *Namer { return &Namer{m: m} }

// prepare finds the ring systems. They are named when one of their atoms is asked for.
func (n *Namer) prepare() {
	if n.system != nil {
		return
	}
	size := len(n.m.Atoms)
	n.system = make([]*ringSystem, size)
	n.at = make([]int, size)
	n.names = make([]string, size)
	n.local = make([]int32, size)
	n.waiting = n.m.RingSystems()
}

// of returns the ring system of an atom, nil for a chain atom.
func (n *Namer) of(a int) *ringSystem {
	if n.system[a] == nil && n.m.InRing(a) {
		for i, atoms := range n.waiting {
			if slices.Contains(atoms, a) {
				n.waiting[i] = nil
				n.addSystem(atoms)
			}
		}
	}
	return n.system[a]
}

// addSystem names a ring system as a whole, or else its aromatic parts one by one.
func (n *Namer) addSystem(atoms []int) {
	if isBenzene(n.m, atoms) {
		n.keep(&ringSystem{atoms: atoms, benzene: true})
		return
	}
	if f := lay(n.m, atoms, n.local); f != nil {
		n.keep(&ringSystem{atoms: atoms, fit: f})
		return
	}
	for _, part := range n.aromaticParts(atoms) {
		s := &ringSystem{atoms: part, benzene: isBenzene(n.m, part)}
		if !s.benzene {
			s.fit = lay(n.m, part, n.local)
		}
		n.keep(s)
	}
	var rest []int
	for _, a := range atoms {
		if n.system[a] == nil {
			rest = append(rest, a)
		}
	}
	if len(rest) > 0 {
		n.keep(&ringSystem{atoms: rest})
	}
}

func (n *Namer) keep(s *ringSystem) {
	n.all = append(n.all, s)
	for _, a := range s.atoms {
		if n.system[a] == nil {
			n.system[a] = s
		}
	}
	if s.fit == nil {
		return
	}
	s.title = n.title(s.fit)
	for k, a := range s.fit.at {
		if n.system[a] == s {
			n.at[a] = k
		}
	}
}

func isBenzene(m *molecule.Molecule, atoms []int) bool {
	if len(atoms) != 6 {
		return false
	}
	for _, a := range atoms {
		if m.Atoms[a].Element != 6 || !m.Atoms[a].Aromatic {
			return false
		}
	}
	return true
}

// aromaticParts splits a ring system into its sets of fused aromatic rings.
func (n *Namer) aromaticParts(atoms []int) [][]int {
	in := make(map[int]bool, len(atoms))
	aromatic := false
	for _, a := range atoms {
		in[a] = true
		aromatic = aromatic || n.m.Atoms[a].Aromatic
	}
	if !aromatic {
		return nil
	}
	var rings [][]int
	through := map[int][]int{} // bond → rings
	for _, r := range n.m.Rings() {
		whole := true
		for _, a := range r {
			whole = whole && in[a] && n.m.Atoms[a].Aromatic
		}
		if !whole {
			continue
		}
		for i, a := range r {
			b := n.m.BondBetween(a, r[(i+1)%len(r)])
			through[b] = append(through[b], len(rings))
		}
		rings = append(rings, r)
	}
	group := make([]int, len(rings))
	for i := range group {
		group[i] = -1
	}
	var parts [][]int
	for first := range rings {
		if group[first] >= 0 {
			continue
		}
		group[first] = len(parts)
		var part []int
		for queue := []int{first}; len(queue) > 0; queue = queue[1:] {
			r := rings[queue[0]]
			for i, a := range r {
				part = append(part, a)
				for _, next := range through[n.m.BondBetween(a, r[(i+1)%len(r)])] {
					if group[next] < 0 {
						group[next] = len(parts)
						queue = append(queue, next)
					}
				}
			}
		}
		slices.Sort(part)
		parts = append(parts, slices.Compact(part))
	}
	return parts
}

// Site names a set of equivalent atoms, by the one with the lowest locant. Where atoms
// that are not equivalent would get the same name, the atom number is added.
func (n *Namer) Site(atoms []int) string {
	if len(atoms) == 0 {
		return ""
	}
	n.prepare()
	best, rank := atoms[0], n.rank(atoms[0])
	for _, a := range atoms[1:] {
		if r := n.rank(a); r < rank {
			best, rank = a, r
		}
	}
	name := n.Atom(best)
	if n.ambiguous(name, best, atoms) {
		name = fmt.Sprintf("%s, atom %d", name, n.m.Atoms[best].Number)
	}
	return name
}

func (n *Namer) rank(a int) int {
	if s := n.of(a); s != nil && s.fit != nil {
		return s.fit.frame.rank[n.at[a]]
	}
	return 1 << 20
}

// ambiguous tells whether an atom of another orbit has the same name.
func (n *Namer) ambiguous(name string, a int, set []int) bool {
	own := n.of(a)
	differs := func(b int) bool {
		if b == a || n.m.Atoms[b].Element != n.m.Atoms[a].Element || slices.Contains(set, b) || n.Atom(b) != name {
			return false
		}
		classes := n.m.Classes()
		return classes[a] != classes[b]
	}
	if own != nil && own.fit != nil {
		for i, atoms := range n.waiting {
			if len(atoms) >= len(own.atoms) {
				n.waiting[i] = nil
				n.addSystem(atoms)
			}
		}
		for _, s := range n.all {
			if s != own && s.fit != nil && s.title == own.title &&
				slices.ContainsFunc(s.atoms, func(b int) bool { return n.at[b] == n.at[a] && differs(b) }) {
				return true
			}
		}
		return false
	}
	for b := range n.m.Atoms {
		if n.m.Atoms[b].Element != n.m.Atoms[a].Element || own == nil && n.m.InRing(b) && n.m.Atoms[b].Aromatic {
			continue
		}
		if own != nil && own.benzene {
			if !n.m.Atoms[b].Aromatic || n.m.Atoms[b].Hydrogens != n.m.Atoms[a].Hydrogens {
				continue
			}
			if s := n.of(b); s == nil || !s.benzene {
				continue
			}
		}
		if differs(b) {
			return true
		}
	}
	return false
}

// Atom names one atom.
func (n *Namer) Atom(a int) string {
	n.prepare()
	if n.names[a] == "" {
		n.names[a] = n.name(a)
	}
	return n.names[a]
}

func (n *Namer) name(a int) string {
	symbol := molecule.Symbol(n.m.Atoms[a].Element)
	s := n.of(a)
	switch {
	case s != nil && s.fit != nil:
		text := symbol + "-" + s.fit.frame.number[n.at[a]] + " of the " + s.title
		if !n.m.Atoms[a].Aromatic && !full(n.m, a) {
			if c := n.chain(a); c != "" {
				return text + ", " + c
			}
		}
		return text
	case s != nil && s.benzene:
		return n.benzene(a, s)
	}
	if c := n.chain(a); c != "" {
		return c
	}
	if c := &n.m.Atoms[a]; c.Element == 6 && !c.Aromatic {
		switch {
		case c.Charge > 0:
			return fmt.Sprintf("carbocation centre, atom %d", c.Number)
		case c.Charge < 0:
			return fmt.Sprintf("carbanion centre, atom %d", c.Number)
		}
	}
	if s != nil {
		return fmt.Sprintf("%s atom %d in the %d-atom ring system", symbol, n.m.Atoms[a].Number, len(s.atoms))
	}
	return fmt.Sprintf("%s atom %d", symbol, n.m.Atoms[a].Number)
}

// sixRing is a benzene ring with the names of its substituents.
type sixRing struct {
	cycle [6]int // atoms in the order of the ring
	word  [6]string
}

// walkRing orders the ring and names what it carries.
func (n *Namer) walkRing(atoms []int) *sixRing {
	r := &sixRing{}
	at, last := atoms[0], -1
	for k := range r.cycle {
		r.cycle[k] = at
		next := -1
		for _, h := range n.m.Neighbours(at) {
			switch {
			case !slices.Contains(atoms, h.Atom):
				r.word[k] = group(n.m, at, h.Atom)
			case h.Atom != last && next < 0:
				next = h.Atom
			}
		}
		at, last = next, at
	}
	return r
}

// benzene gives the relation of a ring carbon to each substituent of its ring.
func (n *Namer) benzene(a int, s *ringSystem) string {
	if s.ring == nil {
		s.ring = n.walkRing(s.atoms)
	}
	r := s.ring
	at := slices.Index(r.cycle[:], a)
	text := ""
	for d, word := range [...]string{1: "ortho", 2: "meta", 3: "para"} {
		if d == 0 {
			continue
		}
		one, other := r.word[(at+d)%6], r.word[(at+6-d)%6]
		if d == 3 {
			other = ""
		}
		if other != "" && (one == "" || other < one) {
			one, other = other, one
		}
		if one == "" {
			continue
		}
		if text != "" {
			text += ", "
		}
		switch other {
		case "":
			text += word + " to " + one
		case one:
			text += word + " to both " + one
		default:
			text += word + " to " + one + " and " + other
		}
	}
	own := r.word[at]
	switch {
	case own != "" && text != "":
		return "C–" + own + ", " + text
	case own != "":
		return "C–" + own + " of the benzene ring"
	case text == "":
		return "C of the benzene ring"
	}
	return text
}
