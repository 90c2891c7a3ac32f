package symmetry

import (
	"fmt"
	"strconv"
	"strings"
	"unicode/utf8"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Kind of the orbitals a component consists of.
type Kind uint8

// The kinds of component.
const (
	Pi    Kind = iota // π system
	Sigma             // σ bond
	Omega             // single orbital: lone pair (2 electrons) or vacancy (0)
)

// letters are the symbols of the kinds in print.
var letters = [...]string{Pi: "π", Sigma: "σ", Omega: "ω"}

// Component is one electronic component of a pericyclic process: for example π4s, a
// π system of four electrons used on one face.
type Component struct {
	Kind      Kind
	Electrons int
	// Antara: the component is used antarafacially: a π system at opposite faces, a σ
	// bond with retention at one end and inversion at the other, a single orbital with
	// both lobes.
	Antara bool
}

// String writes the component as in print: π4s, σ2a, ω0s.
func (c Component) String() string {
	face := "s"
	if c.Antara {
		face = "a"
	}
	return letters[c.Kind] + strconv.Itoa(c.Electrons) + face
}

// Components are all components of one process.
type Components []Component

// String writes the components as in print: π4s+π2s.
func (cs Components) String() string {
	parts := make([]string, len(cs))
	for i, c := range cs {
		parts[i] = c.String()
	}
	return strings.Join(parts, "+")
}

// Electrons is the number of electrons of all components together.
func (cs Components) Electrons() int {
	n := 0
	for _, c := range cs {
		n += c.Electrons
	}
	return n
}

// Verdict is what orbital symmetry says of a process. The empty verdict means that
// none is given.
type Verdict string

// The verdicts.
const (
	NoVerdict Verdict = ""
	Allowed   Verdict = "allowed"
	Forbidden Verdict = "forbidden"
)

// verdict turns a yes or no into a word.
func verdict(allowed bool) Verdict {
	if allowed {
		return Allowed
	}
	return Forbidden
}

// Thermal is the verdict of the general rule for a ground-state process: allowed when
// the number of (4q+2)s and (4r)a components is odd (Woodward, Hoffmann 1969).
func (cs Components) Thermal() Verdict {
	if len(cs) == 0 {
		return NoVerdict
	}
	odd := false
	for _, c := range cs {
		if (c.Electrons%4 == 2) != c.Antara {
			odd = !odd
		}
	}
	return verdict(odd)
}

// Photochemical is the verdict for a process from the first excited state: allowed
// when the number of (4q+2)s and (4r)a components is even (Woodward, Hoffmann 1969).
func (cs Components) Photochemical() Verdict {
	switch cs.Thermal() {
	case Allowed:
		return Forbidden
	case Forbidden:
		return Allowed
	}
	return NoVerdict
}

// Verdict is the verdict under an activation.
func (cs Components) Verdict(a terms.Activation) Verdict {
	if a == terms.Photochemical {
		return cs.Photochemical()
	}
	return cs.Thermal()
}

// Limits of a component string: longer ones are no pericyclic process.
const (
	maxComponents = 12
	maxElectrons  = 98 // of one component
)

// prefixes are the accepted spellings of a kind, longer ones first. The single
// letters p, s and w are read as kinds only where a component begins, so that the s
// of "s2s" is σ first and suprafacial last.
var prefixes = []struct {
	text string
	kind Kind
}{
	{"sigma", Sigma}, {"omega", Omega}, {"pi", Pi},
	{"π", Pi}, {"σ", Sigma}, {"ς", Sigma}, {"ω", Omega},
	{"p", Pi}, {"s", Sigma}, {"w", Omega},
}

const notationHelp = "write components as π4s+π2s, pi4s+pi2s or p4s+p2s; σ (sigma, s) and ω (omega, w) likewise, each with an even number of electrons and s or a"

// notation reads a component string, keeping its place.
type notation struct {
	text string
	pos  int // byte offset
}

// refuse places an error at byte offset at.
func (n *notation) refuse(at int, remedy, format string, args ...any) error {
	return &molecule.Error{
		Column: utf8.RuneCountInString(n.text[:at]) + 1,
		Text:   n.text,
		Reason: fmt.Sprintf(format, args...),
		Remedy: remedy,
	}
}

// space skips white space.
func (n *notation) space() {
	for n.pos < len(n.text) {
		switch r, size := utf8.DecodeRuneInString(n.text[n.pos:]); r {
		case ' ', '\t', '\n', '\r', '\u00a0', '\u2009', '\u202f':
			n.pos += size
		default:
			return
		}
	}
}

// found says what stands at the present place, for a message.
func (n *notation) found() string {
	if n.pos >= len(n.text) {
		return "the end"
	}
	r, size := utf8.DecodeRuneInString(n.text[n.pos:])
	if r == utf8.RuneError && size == 1 {
		return fmt.Sprintf("byte 0x%02x", n.text[n.pos])
	}
	return strconv.Quote(string(r))
}

// number reads ASCII or subscript digits; ok is false where none stands.
func (n *notation) number() (value, digits int) {
	for n.pos < len(n.text) {
		r, size := utf8.DecodeRuneInString(n.text[n.pos:])
		switch {
		case r >= '0' && r <= '9':
			r -= '0'
		case r >= '₀' && r <= '₉':
			r -= '₀'
		default:
			return value, digits
		}
		if value <= maxElectrons {
			value = 10*value + int(r)
		}
		digits++
		n.pos += size
	}
	return value, digits
}

// component reads one component.
func (n *notation) component() (Component, error) {
	start := n.pos
	var c Component
	known := false
	for _, p := range prefixes {
		if len(n.text)-n.pos >= len(p.text) && strings.EqualFold(n.text[n.pos:n.pos+len(p.text)], p.text) {
			c.Kind, known = p.kind, true
			n.pos += len(p.text)
			break
		}
	}
	if !known {
		return c, n.refuse(n.pos, notationHelp, "expected the kind of a component (π, σ or ω), found %s", n.found())
	}
	kind := letters[c.Kind]
	n.space()
	at := n.pos
	value, digits := n.number()
	if digits == 0 {
		return c, n.refuse(at, "give the number of electrons after the kind, as in "+kind+"2s", "expected the number of electrons of the %s component, found %s", kind, n.found())
	}
	c.Electrons = value
	switch {
	case value > maxElectrons:
		return c, n.refuse(at, "check the count", "a component of more than %d electrons is no component of a pericyclic process", maxElectrons)
	case value%2 == 1:
		return c, n.refuse(at, "count electrons, not atoms: an allyl cation is π2, an allyl anion π4, a carbanion ω2", "%s%d: a component holds an even number of electrons, not %d", kind, value, value)
	case c.Kind == Pi && value == 0:
		return c, n.refuse(at, "write an empty orbital as ω0", "π0: a π component holds at least two electrons")
	case c.Kind == Sigma && value != 2:
		return c, n.refuse(at, "give each σ bond as a component of its own: σ2s or σ2a", "σ%d: a σ component is one bond and holds two electrons", value)
	case c.Kind == Omega && value > 2:
		return c, n.refuse(at, "a lone pair is ω2, a vacancy ω0; a conjugated system is π", "ω%d: a single orbital holds no or two electrons", value)
	}
	n.space()
	r, size := utf8.DecodeRuneInString(n.text[n.pos:])
	switch r {
	case 's', 'S', 'ₛ':
	case 'a', 'A', 'ₐ':
		c.Antara = true
	default:
		return c, n.refuse(n.pos, "end each component with s (suprafacial) or a (antarafacial), as in "+kind+strconv.Itoa(value)+"s", "expected s or a after %s, found %s", strings.TrimSpace(n.text[start:n.pos]), n.found())
	}
	n.pos += size
	return c, nil
}

// ParseComponents reads component notation: π4s+π2s, pi4s+pi2s or p4s+p2s; σ
// (sigma2a, s2a) and ω (omega0s, w0s) likewise. Square or round brackets round the
// whole, white space, subscript digits and subscript s and a are accepted.
//
// A single letter p, s or w is the kind of a component only where a component
// begins; after the electrons, s and a are the faces: "s2s" is σ2s. Errors are
// [*molecule.Error] with the column of what is wrong: an unknown kind or face, an
// odd number of electrons, a σ component that is not one bond, an ω component of more
// than two electrons, a lone σ or ω, empty text.
func ParseComponents(s string) (Components, error) {
	n := &notation{text: s}
	n.space()
	if n.pos == len(s) {
		return nil, n.refuse(n.pos, notationHelp, "empty component string")
	}
	closing := ""
	open := n.pos
	switch s[n.pos] {
	case '[':
		closing = "]"
	case '(':
		closing = ")"
	}
	if closing != "" {
		n.pos++
		n.space()
	}
	var cs Components
	for {
		if n.pos < len(s) && s[n.pos] == '+' {
			return nil, n.refuse(n.pos, "put one + between two components", "expected a component, found \"+\"")
		}
		at := n.pos
		c, err := n.component()
		if err != nil {
			return nil, err
		}
		if len(cs) == maxComponents {
			return nil, n.refuse(at, "check the count", "more than %d components are no pericyclic process", maxComponents)
		}
		cs = append(cs, c)
		n.space()
		if n.pos < len(s) && s[n.pos] == '+' {
			n.pos++
			n.space()
			continue
		}
		break
	}
	if closing != "" {
		if !strings.HasPrefix(s[n.pos:], closing) {
			if n.pos == len(s) {
				return nil, n.refuse(open, "close it, or leave it out", "the bracket is not closed")
			}
			return nil, n.refuse(n.pos, "join components by +", "expected + or %q, found %s", closing, n.found())
		}
		n.pos++
		n.space()
	}
	if n.pos < len(s) {
		return nil, n.refuse(n.pos, "join components by +", "expected + or the end, found %s", n.found())
	}
	if len(cs) == 1 && cs[0].Kind != Pi {
		return nil, n.refuse(open, "name the other components that take part", "%s alone is no pericyclic process", cs[0])
	}
	if cs.Electrons() == 0 {
		return nil, n.refuse(open, "name the components that bring electrons", "%s: no component brings an electron", cs)
	}
	return cs, nil
}
