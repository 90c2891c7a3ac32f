package molecule

import (
	"sort"
	"strconv"
)

// smilesStyle says what a written SMILES string holds.
type smilesStyle struct{ stereo, maps bool }

// SMILES writes the canonical SMILES string: the same for every way of writing the
// same molecule, with configuration and isotopes, without atom maps.
func (m *Molecule) SMILES() string { return m.write(smilesStyle{stereo: true}) }

// FlatSMILES writes the canonical SMILES string of the constitution: isotopes kept,
// configuration and atom maps left out.
func (m *Molecule) FlatSMILES() string { return m.write(smilesStyle{}) }

// MappedSMILES writes the canonical SMILES string with its atom maps; the maps do not
// influence the order of the atoms.
func (m *Molecule) MappedSMILES() string { return m.write(smilesStyle{stereo: true, maps: true}) }

type smilesWriter struct {
	m        *Molecule
	style    smilesStyle
	rank     []int
	out      []byte
	visited  []bool
	ringBond []bool
	children [][]Half
	closures [][]Half
	number   map[int]int
	used     [1000]bool
}

func (m *Molecule) write(style smilesStyle) string {
	w := &smilesWriter{m: m, style: style, rank: m.CanonicalOrder()}
	n := len(m.Atoms)
	w.visited = make([]bool, n)
	w.ringBond = make([]bool, len(m.Bonds))
	w.children = make([][]Half, n)
	w.closures = make([][]Half, n)
	w.number = map[int]int{}
	order := make([]int, n)
	for i, r := range w.rank {
		order[r] = i
	}
	var parts []string
	for _, i := range order {
		if w.visited[i] {
			continue
		}
		w.plan(i)
		w.out = w.out[:0]
		w.emit(i)
		parts = append(parts, string(w.out))
	}
	sort.Strings(parts)
	s := ""
	for i, p := range parts {
		if i > 0 {
			s += "."
		}
		s += p
	}
	return s
}

// plan chooses the tree and the ring closures by depth-first search.
func (w *smilesWriter) plan(root int) {
	type frame struct {
		atom, up int
		next     []Half
	}
	sorted := func(i int) []Half {
		hs := append([]Half(nil), w.m.adjacency[i]...)
		sort.Slice(hs, func(a, b int) bool { return w.rank[hs[a].Atom] < w.rank[hs[b].Atom] })
		return hs
	}
	w.visited[root] = true
	stack := []frame{{root, -1, sorted(root)}}
	for len(stack) > 0 {
		f := &stack[len(stack)-1]
		if len(f.next) == 0 {
			stack = stack[:len(stack)-1]
			continue
		}
		h := f.next[0]
		f.next = f.next[1:]
		if h.Bond == f.up || w.ringBond[h.Bond] {
			continue
		}
		if w.visited[h.Atom] {
			w.ringBond[h.Bond] = true
			w.closures[f.atom] = append(w.closures[f.atom], h)
			w.closures[h.Atom] = append(w.closures[h.Atom], Half{f.atom, h.Bond})
			continue
		}
		w.visited[h.Atom] = true
		w.children[f.atom] = append(w.children[f.atom], h)
		stack = append(stack, frame{h.Atom, h.Bond, sorted(h.Atom)})
	}
}

func (w *smilesWriter) emit(root int) {
	type step struct {
		atom, bond int
		text       byte
	}
	todo := []step{{atom: root, bond: -1}}
	for len(todo) > 0 {
		s := todo[len(todo)-1]
		todo = todo[:len(todo)-1]
		if s.text != 0 {
			w.out = append(w.out, s.text)
			continue
		}
		if s.bond >= 0 {
			w.bond(s.bond)
		}
		w.atom(s.atom)
		for _, h := range w.closures[s.atom] {
			if n, ok := w.number[h.Bond]; ok {
				w.closure(n)
				w.used[n] = false
				continue
			}
			n := 1
			for w.used[n] {
				n++
			}
			w.used[n] = true
			w.number[h.Bond] = n
			w.bond(h.Bond)
			w.closure(n)
		}
		c := w.children[s.atom]
		for k := len(c) - 1; k >= 0; k-- {
			if k < len(c)-1 {
				todo = append(todo, step{text: ')'})
			}
			todo = append(todo, step{atom: c[k].Atom, bond: c[k].Bond})
			if k < len(c)-1 {
				todo = append(todo, step{text: '('})
			}
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
	case bond.Aromatic:
	case bond.Order == 1:
		if both {
			w.out = append(w.out, '-')
		}
	case bond.Order == 2:
		w.out = append(w.out, '=')
	case bond.Order == 3:
		w.out = append(w.out, '#')
	case bond.Order == 4:
		w.out = append(w.out, '$')
	}
}

func (w *smilesWriter) atom(i int) {
	m := w.m
	a := &m.Atoms[i]
	symbol := Symbol(a.Element)
	if a.Aromatic {
		symbol = string(symbol[0]+'a'-'A') + symbol[1:]
	}
	plain := a.Isotope == 0 && a.Charge == 0 && (a.Map == 0 || !w.style.maps)
	if plain {
		switch a.Element {
		case 5, 6, 7, 8, 9, 15, 16, 17, 35, 53:
			sum := m.Valence(i) - a.Hydrogens
			plain = implicitHydrogens(a.Element, sum) == a.Hydrogens
			if a.Aromatic && a.Element != 6 && a.Hydrogens > 0 {
				plain = false
			}
		case 0:
		default:
			plain = false
		}
	}
	if plain {
		w.out = append(w.out, symbol...)
		return
	}
	w.out = append(w.out, '[')
	if a.Isotope > 0 {
		w.out = strconv.AppendInt(w.out, int64(a.Isotope), 10)
	}
	w.out = append(w.out, symbol...)
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
