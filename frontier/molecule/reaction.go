package molecule

import (
	"fmt"
	"strings"
	"unicode/utf8"
)

// Reaction is a reaction SMILES, reactants>agents>products, each part cut into its
// molecules. Atom.Number runs on over all molecules as written, Atom.Offset and
// Molecule.Source refer to the whole text.
type Reaction struct {
	Reactants []*Molecule
	Agents    []*Molecule
	Products  []*Molecule

	// Name is the text after the SMILES, Source all of it.
	Name   string
	Source string
}

// ParseReaction reads a reaction SMILES. Parts may be empty, though not all three;
// atom maps are kept as they are, and not checked. Components that the text joins by a
// ring closure across a dot are one molecule. The error is an [*Error] with the
// column in the whole text.
func ParseReaction(s string, opt ...Option) (*Reaction, error) {
	if len(s) > maxSMILESBytes {
		return nil, &Error{Text: s[:200], Reason: fmt.Sprintf("the reaction SMILES has more than %d characters", maxSMILESBytes), Remedy: "give smaller structures"}
	}
	from := len(s) - len(strings.TrimLeft(s, " \t\r\n"))
	to := len(s)
	if i := strings.IndexAny(s[from:], " \t\r\n"); i >= 0 {
		to = from + i
	}
	r := &Reaction{Source: s, Name: strings.TrimSpace(s[to:])}
	const form = "write reactants>agents>products; parts may be empty"
	first := strings.IndexByte(s[from:to], '>')
	if strings.Count(s[from:to], ">") < 2 && strings.IndexByte(s[to:], '>') >= 0 {
		return nil, refuse(s, to, "the reaction breaks off at this blank, a > follows behind it", "remove the blanks; only a name stands behind one")
	}
	if first < 0 {
		return nil, refuse(s, to, "this is no reaction, the two > are missing", form)
	}
	first += from
	second := strings.IndexByte(s[first+1:to], '>')
	if second < 0 {
		return nil, refuse(s, to, "the second > is missing", form)
	}
	second += first + 1
	if third := strings.IndexByte(s[second+1:to], '>'); third >= 0 {
		return nil, refuse(s, second+1+third, "there is a third >", "give several steps one by one, each as reactants>agents>products")
	}
	p := reactionReader{s: s, opt: opt}
	var err error
	if r.Reactants, err = p.part(from, first); err != nil {
		return nil, err
	}
	if r.Agents, err = p.part(first+1, second); err != nil {
		return nil, err
	}
	if r.Products, err = p.part(second+1, to); err != nil {
		return nil, err
	}
	if len(r.Reactants)+len(r.Agents)+len(r.Products) == 0 {
		return nil, refuse(s, from, "the reaction holds no molecule", form)
	}
	return r, nil
}

// reactionReader reads the molecules of a text piece by piece.
type reactionReader struct {
	s       string
	opt     []Option
	written int // atoms written so far
}

// part reads s[from:to], which is cut at the dots that end a molecule: outside
// branches and with no ring closure open.
func (p *reactionReader) part(from, to int) ([]*Molecule, error) {
	if from == to {
		return nil, nil
	}
	out := make([]*Molecule, 0, 1+strings.Count(p.s[from:to], "."))
	var ring [100]bool
	start, atoms, depth, open, dots := from, 0, 0, 0, 0
	bracket := false
	closure := func(n int) {
		ring[n] = !ring[n]
		if ring[n] {
			open++
		} else {
			open--
		}
	}
	for i := from; i < to; i++ {
		c := p.s[i]
		if bracket {
			bracket = c != ']'
			continue
		}
		switch {
		case large(c), c == '*', c == 'b', c == 'c', c == 'n', c == 'o', c == 'p', c == 's':
			atoms++
		case c == '[':
			atoms++
			bracket = true
		case digit(c):
			closure(int(c - '0'))
		case c == '%' && i+2 < to && digit(p.s[i+1]) && digit(p.s[i+2]):
			closure(int(p.s[i+1]-'0')*10 + int(p.s[i+2]-'0'))
			i += 2
		case c == '(':
			depth++
		case c == ')':
			depth--
		case c == '.':
			if depth != 0 || open != 0 {
				dots++
				continue
			}
			var err error
			if out, err = p.molecule(out, start, i, atoms, dots > 0); err != nil {
				return nil, err
			}
			start, atoms, dots = i+1, 0, 0
		}
	}
	return p.molecule(out, start, to, atoms, dots > 0)
}

// molecule reads s[from:to], which holds the number of atoms given, and several
// molecules where dotted.
func (p *reactionReader) molecule(out []*Molecule, from, to, atoms int, dotted bool) ([]*Molecule, error) {
	if from == to {
		at := from
		if at > 0 && p.s[at-1] == '.' {
			at--
		}
		return nil, refuse(p.s, at, "a molecule is missing beside the dot", "remove the dot, or write the molecule")
	}
	m, err := ParseSMILES(p.s[from:to], p.opt...)
	if err != nil {
		if e, ok := err.(*Error); ok {
			if e.Column > 0 {
				e.Column += utf8.RuneCountInString(p.s[:from])
			}
			e.Text = p.s
		}
		return nil, err
	}
	parts := []*Molecule{m}
	if dotted {
		parts = m.Split()
	}
	for _, m := range parts {
		m.Source = p.s
		for i := range m.Atoms {
			m.Atoms[i].Number += p.written
			m.Atoms[i].Offset += from
		}
	}
	p.written += atoms
	return append(out, parts...), nil
}
