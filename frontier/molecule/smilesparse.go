package molecule

import "fmt"

// rawAtom is an atom as parsed, before its hydrogens are known.
type rawAtom struct {
	atomSpec
	bracket    bool
	start, end int
}

// rawBond is a bond as parsed, from atom a to atom b in the order of writing. keyA and
// keyB are the byte offsets at which the bond leaves a and b, by which the ligands of
// a stereo centre are ordered; -1 at the later atom of a chain bond.
type rawBond struct {
	a, b       int32
	keyA, keyB int32
	symbol     byte // 0 when nothing was written
}

// smilesParser builds the raw graph of one SMILES string.
type smilesParser struct {
	s        string
	atoms    []rawAtom
	bonds    []rawBond
	branches []branch
	closures [100]closure
	stereo   bool // some @, / or \ was written
	aromatic bool // some aromatic atom or bond was written
	hydrogen bool // some [H] was written
	fragment bool // aromatic atoms may stand outside rings
}

// branch remembers the atom that an open parenthesis leaves.
type branch struct{ atom, at int }

// closure is an open ring closure; atom is one more than the index, 0 when closed.
type closure struct {
	atom   int
	at     int
	symbol byte
}

// parse reads the whole string; the rest after white space is returned.
func (p *smilesParser) parse(s string, wildcard bool) (rest string, err error) {
	p.s = s
	l := smilesLexer{s: s, wildcard: wildcard}
	prev := -1              // the atom that the next one is bonded to
	var symbol byte         // pending bond symbol
	symbolAt := 0           // its offset
	opened, dotted := 0, -1 // atoms before the last (, offset of the last .
	open := 0               // number of open ring closures
	var t smilesToken
	last := endToken
	for {
		if err := l.next(&t); err != nil {
			return "", err
		}
		switch t.kind {
		case endToken:
			switch {
			case symbol != 0:
				return "", refuse(s, symbolAt, "the bond leads to no atom", "write the atom it leads to, or remove the bond")
			case len(p.branches) > 0:
				return "", refuse(s, p.branches[len(p.branches)-1].at, "the branch is not closed", "close it with )")
			case dotted >= 0:
				return "", refuse(s, dotted, "nothing follows the dot", "remove it, or write the other component")
			case len(p.atoms) == 0:
				return "", refuse(s, 0, "there is no atom", "write a SMILES string, such as c1ccccc1")
			case open > 0:
				return "", p.unclosedRing()
			}
			return s[t.end:], nil
		case atomToken, bracketToken:
			if len(p.atoms) == maxAtoms {
				return "", refuse(s, t.start, fmt.Sprintf("there are more than %d atoms", maxAtoms), "give smaller structures")
			}
			n := len(p.atoms)
			p.atoms = append(p.atoms, rawAtom{atomSpec: t.atom, bracket: t.kind == bracketToken, start: t.start, end: t.end})
			if t.atom.aromatic {
				p.aromatic = true
			}
			if t.atom.class != NoStereo {
				p.stereo = true
			}
			if t.atom.element == 1 {
				p.hydrogen = true
			}
			if prev >= 0 {
				p.bonds = append(p.bonds, rawBond{a: int32(prev), b: int32(n), keyA: int32(t.start), keyB: -1, symbol: symbol})
			} else if symbol != 0 {
				return "", refuse(s, symbolAt, "the bond comes from no atom", "write an atom before it, or remove the bond")
			}
			prev, symbol, dotted = n, 0, -1
		case bondToken:
			if symbol != 0 {
				return "", refuse(s, t.start, "two bond symbols follow each other", "write one")
			}
			if prev < 0 {
				return "", refuse(s, t.start, "the bond comes from no atom", "write an atom before it, or remove the bond")
			}
			switch t.bond {
			case '/', '\\':
				p.stereo = true
			case ':':
				p.aromatic = true
			}
			symbol, symbolAt = t.bond, t.start
		case closureToken:
			if prev < 0 || last == openToken {
				return "", refuse(s, t.start, "the ring closure follows no atom", "write it right behind the atom it belongs to")
			}
			if last == closeToken {
				return "", refuse(s, t.start, "the ring closure stands behind a branch", "write it right behind the atom, before its branches")
			}
			c := &p.closures[t.number]
			at := t.start
			if c.atom == 0 {
				*c = closure{atom: prev + 1, at: at, symbol: symbol}
				open++
				symbol = 0
				break
			}
			open--
			other := c.atom - 1
			if other == prev {
				return "", refuse(s, at, fmt.Sprintf("ring closure %d joins an atom to itself", t.number), "close it at another atom")
			}
			joined, ok := joinSymbols(c.symbol, symbol)
			if !ok {
				return "", refuse(s, at, fmt.Sprintf("ring closure %d is %s here, and %s where it was opened, at column %d",
					t.number, bondWord(symbol), bondWord(c.symbol), c.at+1), "write the bond symbol at one end only")
			}
			p.bonds = append(p.bonds, rawBond{a: int32(other), b: int32(prev), keyA: int32(c.at), keyB: int32(at), symbol: joined})
			*c = closure{}
			symbol = 0
		case openToken:
			if prev < 0 {
				return "", refuse(s, t.start, "the branch follows no atom", "write an atom before it")
			}
			if symbol != 0 {
				return "", refuse(s, symbolAt, "the bond symbol stands before the branch", "write it inside, as in C(=O)")
			}
			if last == openToken {
				return "", refuse(s, t.start, "a branch cannot begin with a branch", "remove one of the parentheses")
			}
			p.branches = append(p.branches, branch{atom: prev, at: t.start})
			opened = len(p.atoms)
		case closeToken:
			switch {
			case len(p.branches) == 0:
				return "", refuse(s, t.start, "there is no open branch to close", "remove the ), or open the branch with (")
			case symbol != 0:
				return "", refuse(s, symbolAt, "the bond leads to no atom", "write the atom it leads to, or remove the bond")
			case last == openToken || opened == len(p.atoms) && last != closeToken:
				return "", refuse(s, t.start, "the branch is empty", "write its atoms, or remove the parentheses")
			case dotted >= 0:
				return "", refuse(s, dotted, "nothing follows the dot", "remove it, or write the other component")
			}
			prev = p.branches[len(p.branches)-1].atom
			p.branches = p.branches[:len(p.branches)-1]
		case dotToken:
			switch {
			case symbol != 0:
				return "", refuse(s, symbolAt, "the bond leads to no atom", "write the atom it leads to, or remove the bond")
			case prev < 0 || dotted >= 0:
				return "", refuse(s, t.start, "the dot follows no atom", "write a component before it, or remove the dot")
			case last == openToken:
				// C(.Cl) is legal: the dot opens a new component inside a branch.
			}
			prev, dotted = -1, t.start
		}
		last = t.kind
	}
}

// unclosedRing refuses the first ring closure in the text that was left open.
func (p *smilesParser) unclosedRing() error {
	number, first := -1, closure{}
	for i, c := range p.closures {
		if c.atom > 0 && (number < 0 || c.at < first.at) {
			number, first = i, c
		}
	}
	return refuse(p.s, first.at, fmt.Sprintf("ring closure %d is never closed", number), "write the same number at the atom where the ring ends")
}

// joinSymbols unites the bond symbols at the two ends of a ring closure, the second
// seen from the end where it closes; a direction is turned so as to run from the
// opening to the closing atom.
func joinSymbols(opening, closing byte) (byte, bool) {
	turned := closing
	switch closing {
	case '/':
		turned = '\\'
	case '\\':
		turned = '/'
	}
	switch {
	case closing == 0 || opening == turned:
		return opening, true
	case opening == 0:
		return turned, true
	}
	return 0, false
}

func bondWord(symbol byte) string {
	switch symbol {
	case '=':
		return "a double bond"
	case '#':
		return "a triple bond"
	case '$':
		return "a quadruple bond"
	case ':':
		return "an aromatic bond"
	}
	return "a single bond (" + string(rune(symbol)) + ")"
}
