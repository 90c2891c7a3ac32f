package molecule

import "fmt"

// tokenKind is a kind of word of the SMILES grammar.
type tokenKind uint8

const (
	endToken     tokenKind = iota
	atomToken              // an atom of the organic subset, aromatic or not, or *
	bracketToken           // an atom in brackets
	bondToken              // - = # $ : / \
	closureToken           // a ring closure digit, or %nn
	openToken              // (
	closeToken             // )
	dotToken               // .
)

// smilesToken is one word of a SMILES string, with the bytes it spans.
type smilesToken struct {
	kind       tokenKind
	start, end int
	bond       byte // of a bondToken: its symbol
	number     int  // of a closureToken
	atom       atomSpec
}

// atomSpec is an atom as written.
type atomSpec struct {
	element, isotope, charge, hydrogens, mapNumber int
	aromatic                                       bool
	class                                          StereoClass
	permutation                                    int
	short                                          bool // @ or @@, whose class depends on the neighbours
}

// Limits of the numbers in brackets, and of the whole.
const (
	maxSMILESBytes = 1 << 20
	maxAtoms       = 20000
	maxIsotope     = 999
	maxCharge      = 15
	maxHydrogens   = 9
	maxMap         = 9999
)

// smilesLexer cuts a SMILES string into tokens.
type smilesLexer struct {
	s        string
	pos      int
	wildcard bool
}

// next returns the next token; white space ends the SMILES.
func (l *smilesLexer) next(t *smilesToken) error {
	t.start = l.pos
	if l.pos >= len(l.s) {
		t.kind, t.end = endToken, l.pos
		return nil
	}
	c := l.s[l.pos]
	l.pos++
	switch c {
	case '(':
		t.kind = openToken
	case ')':
		t.kind = closeToken
	case '.':
		t.kind = dotToken
	case '-', '=', '#', '$', ':', '/', '\\':
		t.kind, t.bond = bondToken, c
	case '0', '1', '2', '3', '4', '5', '6', '7', '8', '9':
		t.kind, t.number = closureToken, int(c-'0')
	case '%':
		if l.pos+2 > len(l.s) || !digit(l.s[l.pos]) || !digit(l.s[l.pos+1]) {
			return refuse(l.s, t.start, "% must be followed by a ring closure number of two digits", "write %10 to %99, or one digit without %")
		}
		t.kind, t.number = closureToken, int(l.s[l.pos]-'0')*10+int(l.s[l.pos+1]-'0')
		l.pos += 2
	case '[':
		t.kind = bracketToken
		if err := l.bracket(t); err != nil {
			return err
		}
	case ' ', '\t', '\n', '\r':
		t.kind, l.pos = endToken, t.start
	default:
		t.kind = atomToken
		if err := l.organic(t, c); err != nil {
			return err
		}
	}
	t.end = l.pos
	return nil
}

func digit(c byte) bool { return c >= '0' && c <= '9' }
func small(c byte) bool { return c >= 'a' && c <= 'z' }
func large(c byte) bool { return c >= 'A' && c <= 'Z' }

// organic reads an atom outside brackets whose first byte is c.
func (l *smilesLexer) organic(t *smilesToken, c byte) error {
	t.atom = atomSpec{}
	a := &t.atom
	follows := byte(0)
	if l.pos < len(l.s) {
		follows = l.s[l.pos]
	}
	if large(c) && small(follows) && !aromaticLetter(follows) && !(c == 'B' && follows == 'r') && !(c == 'C' && follows == 'l') {
		return l.strange(t.start, c, follows)
	}
	switch c {
	case 'B':
		a.element = 5
		if follows == 'r' {
			a.element = 35
			l.pos++
		}
	case 'C':
		a.element = 6
		if follows == 'l' {
			a.element = 17
			l.pos++
		}
	case 'N':
		a.element = 7
	case 'O':
		a.element = 8
	case 'F':
		a.element = 9
	case 'P':
		a.element = 15
	case 'S':
		a.element = 16
	case 'I':
		a.element = 53
	case 'b':
		a.element, a.aromatic = 5, true
	case 'c':
		a.element, a.aromatic = 6, true
	case 'n':
		a.element, a.aromatic = 7, true
	case 'o':
		a.element, a.aromatic = 8, true
	case 'p':
		a.element, a.aromatic = 15, true
	case 's':
		if follows == 'e' {
			return l.strange(t.start, c, follows)
		}
		a.element, a.aromatic = 16, true
	case '*':
		if !l.wildcard {
			return refuse(l.s, t.start, "* stands for no particular atom", "write the atom that is meant")
		}
	default:
		return l.strange(t.start, c, follows)
	}
	return nil
}

// aromaticLetter tells whether a small letter is an atom of its own.
func aromaticLetter(c byte) bool {
	switch c {
	case 'b', 'c', 'n', 'o', 'p', 's':
		return true
	}
	return false
}

// strange refuses a byte that begins no token.
func (l *smilesLexer) strange(at int, c, follows byte) error {
	switch {
	case (c == 'H' || c == 'D' || c == 'T') && (!small(follows) || aromaticLetter(follows)):
		iso := map[byte]string{'H': "[H]", 'D': "[2H]", 'T': "[3H]"}[c]
		return refuse(l.s, at, fmt.Sprintf("%c is not an atom that can stand outside brackets", c), "write "+iso+", or leave hydrogens out")
	case large(c):
		if small(follows) {
			if _, ok := Number(string([]byte{c, follows})); ok {
				return refuse(l.s, at, fmt.Sprintf("%c%c can only stand in brackets", c, follows), fmt.Sprintf("write [%c%c]", c, follows))
			}
			return refuse(l.s, at, fmt.Sprintf("%c%c is no chemical symbol", c, follows), "check the spelling")
		}
		if _, ok := Number(string(rune(c))); ok {
			return refuse(l.s, at, fmt.Sprintf("%c can only stand in brackets", c), fmt.Sprintf("write [%c]", c))
		}
		return refuse(l.s, at, fmt.Sprintf("%c is no chemical symbol", c), "check the spelling")
	case small(c):
		switch string([]byte{c, follows}) {
		case "se", "as", "te":
			return refuse(l.s, at, fmt.Sprintf("%c%c can only stand in brackets", c, follows), fmt.Sprintf("write [%c%c]", c, follows))
		}
		return refuse(l.s, at, fmt.Sprintf("%c is not an aromatic atom; those are b c n o p s, and [se] [as] [te]", c), "write a capital for an atom that is not aromatic")
	case c == ']':
		return refuse(l.s, at, "] without a [ before it", "remove it, or open the bracket")
	case c == '@' || c == '+':
		return refuse(l.s, at, fmt.Sprintf("%c can only stand in brackets", c), "write the atom with its charge and configuration in brackets, such as [N+] or [C@H]")
	case c == '>':
		return refuse(l.s, at, "> belongs to a reaction, a single structure is expected here", "give one molecule")
	}
	for _, r := range l.s[at:] {
		return refuse(l.s, at, fmt.Sprintf("%q has no meaning in SMILES", r), "remove it")
	}
	return nil
}

// number reads digits up to a limit; n is -1 when there are none.
func (l *smilesLexer) digits(limit int, what string) (n int, err error) {
	start := l.pos
	n = -1
	for l.pos < len(l.s) && digit(l.s[l.pos]) {
		if n < 0 {
			n = 0
		}
		n = n*10 + int(l.s[l.pos]-'0')
		l.pos++
		if n > limit {
			return n, refuse(l.s, start, fmt.Sprintf("%s is beyond the limit of %d", what, limit), "check the number")
		}
	}
	return n, nil
}

// bracket reads [isotope symbol chirality hydrogens charge :map] after the [.
func (l *smilesLexer) bracket(t *smilesToken) error {
	t.atom = atomSpec{}
	a := &t.atom
	n, err := l.digits(maxIsotope, "the mass number")
	if err != nil {
		return err
	}
	if n > 0 {
		a.isotope = n
	}
	if l.pos >= len(l.s) {
		return l.unclosed(t.start)
	}
	if err := l.symbol(a); err != nil {
		return err
	}
	if l.peek() == '@' {
		if err := l.chirality(a); err != nil {
			return err
		}
	}
	if l.peek() == 'H' {
		at := l.pos
		l.pos++
		n, err := l.digits(maxHydrogens, "the number of hydrogens")
		if err != nil {
			return err
		}
		if n < 0 {
			n = 1
		}
		a.hydrogens = n
		if a.element == 1 && n > 0 {
			return refuse(l.s, at, "hydrogen cannot carry hydrogens in one bracket", "write [H][H] for the molecule")
		}
	}
	if c := l.peek(); c == '+' || c == '-' {
		if err := l.charge(a, c); err != nil {
			return err
		}
	}
	if l.peek() == ':' {
		at := l.pos
		l.pos++
		n, err := l.digits(maxMap, "the atom map")
		if err != nil {
			return err
		}
		if n < 0 {
			return refuse(l.s, at, ": must be followed by the number of the atom map", "write a number, such as [CH3:1]")
		}
		a.mapNumber = n
	}
	switch c := l.peek(); {
	case c == ']':
		l.pos++
		return nil
	case l.pos >= len(l.s):
		return l.unclosed(t.start)
	default:
		for _, r := range l.s[l.pos:] {
			return refuse(l.s, l.pos, fmt.Sprintf("%q does not belong here in a bracket", r),
				"the order is isotope, symbol, @, H count, charge, :map, as in [13C@@H2+:1]")
		}
	}
	return nil
}

func (l *smilesLexer) peek() byte {
	if l.pos < len(l.s) {
		return l.s[l.pos]
	}
	return 0
}

func (l *smilesLexer) unclosed(at int) error {
	return refuse(l.s, at, "the bracket is not closed", "close it with ]")
}

// symbol reads the element of a bracket atom.
func (l *smilesLexer) symbol(a *atomSpec) error {
	c := l.s[l.pos]
	follows := byte(0)
	if l.pos+1 < len(l.s) {
		follows = l.s[l.pos+1]
	}
	switch {
	case large(c):
		if small(follows) {
			if z := numbers[int(c-'A')*27+int(follows-'a')+1]; z > 0 {
				a.element = int(z)
				l.pos += 2
				return nil
			}
		}
		if z := numbers[int(c-'A')*27]; z > 0 {
			a.element = int(z)
			l.pos++
			return nil
		}
	case small(c):
		a.aromatic = true
		switch {
		case c == 's' && follows == 'e':
			a.element = 34
		case c == 'a' && follows == 's':
			a.element = 33
		case c == 't' && follows == 'e':
			a.element = 52
		}
		if a.element > 0 {
			l.pos += 2
			return nil
		}
		switch c {
		case 'b':
			a.element = 5
		case 'c':
			a.element = 6
		case 'n':
			a.element = 7
		case 'o':
			a.element = 8
		case 'p':
			a.element = 15
		case 's':
			a.element = 16
		}
		if a.element > 0 {
			l.pos++
			return nil
		}
	case c == '*':
		if !l.wildcard {
			return refuse(l.s, l.pos, "* stands for no particular atom", "write the atom that is meant")
		}
		l.pos++
		return nil
	case c == ']':
		return refuse(l.s, l.pos, "the bracket holds no chemical symbol", "write the symbol after the isotope, as in [13C]")
	}
	for _, r := range l.s[l.pos:] {
		return refuse(l.s, l.pos, fmt.Sprintf("no chemical symbol begins with %q here", r), "check the spelling of the element")
	}
	return nil
}

// chirality reads @, @@, @TH1 … @OH30.
func (l *smilesLexer) chirality(a *atomSpec) error {
	at := l.pos
	l.pos++
	if l.peek() == '@' {
		l.pos++
		a.class, a.permutation, a.short = Tetrahedral, 2, true
		return nil
	}
	limit := 0
	if l.pos+1 < len(l.s) {
		switch l.s[l.pos : l.pos+2] {
		case "TH":
			a.class, limit = Tetrahedral, 2
		case "AL":
			a.class, limit = Allenal, 2
		case "SP":
			a.class, limit = SquarePlanar, 3
		case "TB":
			a.class, limit = TrigonalBipyramidal, 20
		case "OH":
			a.class, limit = Octahedral, 30
		}
	}
	if limit == 0 {
		a.class, a.permutation, a.short = Tetrahedral, 1, true
		return nil
	}
	name := l.s[l.pos : l.pos+2]
	l.pos += 2
	start := l.pos
	for l.pos < len(l.s) && digit(l.s[l.pos]) && l.pos-start < 2 {
		a.permutation = a.permutation*10 + int(l.s[l.pos]-'0')
		l.pos++
	}
	if a.permutation < 1 || a.permutation > limit {
		return refuse(l.s, at, fmt.Sprintf("@%s takes a number from 1 to %d", name, limit), "check the configuration")
	}
	return nil
}

// charge reads +, ++, +2, and the like with -; c is the sign that stands next.
func (l *smilesLexer) charge(a *atomSpec, c byte) error {
	at := l.pos
	n := 0
	for l.peek() == c && n <= maxCharge {
		l.pos++
		n++
	}
	if n == 1 && l.pos < len(l.s) && digit(l.s[l.pos]) {
		d, err := l.digits(maxCharge, "the charge")
		if err != nil {
			return err
		}
		n = d
	}
	if n > maxCharge {
		return refuse(l.s, at, fmt.Sprintf("the charge is beyond the limit of %d", maxCharge), "check the number")
	}
	if c == '-' {
		n = -n
	}
	a.charge = n
	return nil
}
