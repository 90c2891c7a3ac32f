package place

import (
	"fmt"
	"sort"
	"strings"

	"lobecast/frontier/molecule"
)

// Namer names the places of one molecule. It does its work on demand and is not safe
// for concurrent use.
type Namer struct {
	m      *molecule.Molecule
	system map[int]*ringSystem // of each ring atom
	all    []*ringSystem
	names  map[int]string
	shared map[string]bool // names that atoms of different orbits share
	ready  bool
}

// ringSystem is one named or unnamed set of fused rings.
type ringSystem struct {
	atoms []int
	fit   *fit // nil where the system has no name in the table
}

// NewNamer prepares the naming of a molecule's places.
func NewNamer(m *molecule.Molecule) *Namer { return &Namer{m: m, names: map[int]string{}} }

// prepare finds the ring systems and lays the frames.
func (n *Namer) prepare() {
	if n.ready {
		return
	}
	n.ready = true
	n.system = map[int]*ringSystem{}
	for _, atoms := range n.m.RingSystems() {
		n.addSystem(atoms)
	}
}

// addSystem names a ring system as a whole, or else its aromatic parts one by one.
func (n *Namer) addSystem(atoms []int) {
	if isBenzene(n.m, atoms) {
		n.keep(&ringSystem{atoms: atoms})
		return
	}
	if f := lay(n.m, atoms); f != nil {
		n.keep(&ringSystem{atoms: atoms, fit: f})
		return
	}
	parts := aromaticParts(n.m, atoms)
	for _, part := range parts {
		s := &ringSystem{atoms: part}
		if !isBenzene(n.m, part) {
			s.fit = lay(n.m, part)
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
		s := &ringSystem{atoms: rest}
		n.all = append(n.all, s)
		for _, a := range rest {
			n.system[a] = s
		}
	}
}

func (n *Namer) keep(s *ringSystem) {
	n.all = append(n.all, s)
	for _, a := range s.atoms {
		if n.system[a] == nil {
			n.system[a] = s
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
func aromaticParts(m *molecule.Molecule, atoms []int) [][]int {
	in := map[int]bool{}
	for _, a := range atoms {
		in[a] = true
	}
	var rings [][]int
	for _, r := range m.Rings() {
		whole := true
		for _, a := range r {
			whole = whole && in[a] && m.Atoms[a].Aromatic
		}
		if whole {
			rings = append(rings, r)
		}
	}
	group := make([]int, len(rings))
	for i := range group {
		group[i] = i
	}
	for i := range rings {
		for j := 0; j < i; j++ {
			if sharedAtoms(rings[i], rings[j]) >= 2 {
				from, to := group[i], group[j]
				for k := range group {
					if group[k] == from {
						group[k] = to
					}
				}
			}
		}
	}
	var parts [][]int
	for g := range rings {
		var part []int
		have := map[int]bool{}
		for i, r := range rings {
			if group[i] != g {
				continue
			}
			for _, a := range r {
				if !have[a] {
					have[a] = true
					part = append(part, a)
				}
			}
		}
		if len(part) > 0 {
			sort.Ints(part)
			parts = append(parts, part)
		}
	}
	return parts
}

func sharedAtoms(a, b []int) int {
	n := 0
	for _, x := range a {
		for _, y := range b {
			if x == y {
				n++
			}
		}
	}
	return n
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
	if n.ambiguous(name, best) {
		name = fmt.Sprintf("%s, atom %d", name, n.m.Atoms[best].Number)
	}
	return name
}

func (n *Namer) rank(a int) int {
	if s := n.system[a]; s != nil && s.fit != nil {
		return rankOf(s.fit.locant[a])
	}
	return 1 << 20
}

// ambiguous tells whether an atom of another orbit has the same name.
func (n *Namer) ambiguous(name string, a int) bool {
	if n.shared == nil {
		n.shared = map[string]bool{}
		orbit := map[string]int{}
		classes := n.m.Classes()
		for i := range n.m.Atoms {
			x := n.Atom(i)
			if c, seen := orbit[x]; seen && c != classes[i] {
				n.shared[x] = true
			}
			orbit[x] = classes[i]
		}
	}
	return n.shared[name]
}

// Atom names one atom.
func (n *Namer) Atom(a int) string {
	if name, ok := n.names[a]; ok {
		return name
	}
	n.prepare()
	name := n.name(a)
	n.names[a] = name
	return name
}

func (n *Namer) name(a int) string {
	symbol := molecule.Symbol(n.m.Atoms[a].Element)
	s := n.system[a]
	switch {
	case s != nil && s.fit != nil:
		return fmt.Sprintf("%s-%s of the %s", symbol, s.fit.locant[a], s.fit.frame.name)
	case s != nil && isBenzene(n.m, s.atoms):
		return n.benzene(a, s)
	}
	if c := n.chain(a); c != "" {
		return c
	}
	if s != nil {
		return fmt.Sprintf("%s%d of the %d-atom ring system", symbol, n.m.Atoms[a].Number, len(s.atoms))
	}
	return fmt.Sprintf("%s%d", symbol, n.m.Atoms[a].Number)
}

// benzene gives the relation of a ring carbon to each substituent of its ring.
func (n *Namer) benzene(a int, s *ringSystem) string {
	var own string
	by := map[string][]string{}
	for _, b := range s.atoms {
		for _, h := range n.m.Neighbours(b) {
			if n.system[h.Atom] == s {
				continue
			}
			g := group(n.m, b, h.Atom)
			if b == a {
				own = g
				continue
			}
			word := relation(n.m, s.atoms, a, b)
			by[word] = append(by[word], g)
		}
	}
	var parts []string
	for _, word := range []string{"ortho", "meta", "para"} {
		list := by[word]
		if len(list) == 0 {
			continue
		}
		sort.Strings(list)
		list = unique(list)
		parts = append(parts, word+" to "+join(list))
	}
	text := strings.Join(parts, ", ")
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

// unique joins repeats into one word with a count: "2 Me".
func unique(sorted []string) []string {
	var list []string
	for i := 0; i < len(sorted); {
		j := i
		for j < len(sorted) && sorted[j] == sorted[i] {
			j++
		}
		if j-i > 1 {
			list = append(list, fmt.Sprintf("both %s", sorted[i]))
		} else {
			list = append(list, sorted[i])
		}
		i = j
	}
	return list
}

func join(list []string) string {
	if len(list) < 2 {
		return strings.Join(list, "")
	}
	return strings.Join(list[:len(list)-1], ", ") + " and " + list[len(list)-1]
}

// relation is the word for the distance of two atoms of a six-membered ring.
func relation(m *molecule.Molecule, ring []int, a, b int) string {
	in := map[int]bool{}
	for _, x := range ring {
		in[x] = true
	}
	seen := map[int]int{a: 0}
	for queue := []int{a}; len(queue) > 0; queue = queue[1:] {
		for _, h := range m.Neighbours(queue[0]) {
			if _, ok := seen[h.Atom]; in[h.Atom] && !ok {
				seen[h.Atom] = seen[queue[0]] + 1
				queue = append(queue, h.Atom)
			}
		}
	}
	return [...]string{"ipso", "ortho", "meta", "para"}[seen[b]]
}
