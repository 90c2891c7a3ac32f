package molecule

import (
	"bytes"
	"fmt"
	"strconv"
	"strings"
)

// maxEntryBytes bounds one V3000 entry over all its continuation lines.
const maxEntryBytes = 1 << 20

// entry is one V3000 entry: the text after M  V30 of a line and its continuations.
type entry struct {
	text   []byte
	pieces []piece
	words  []word
}

// piece is the part of an entry that stands on one line.
type piece struct {
	offset int // of its first byte in entry.text
	number int // of the line
	skip   int // bytes of the line before it
	line   []byte
}

// word is a word of an entry. Parentheses and quotation marks keep blanks together.
type word struct {
	text   string
	offset int
}

// reader3000 reads the entries of one V3000 table.
type reader3000 struct {
	*lineReader
	entry
}

var prefix3000 = []byte("M  V30 ")

// nextEntry reads an entry, continuation lines included, and splits it.
func (r *reader3000) nextEntry(what string) error {
	r.text, r.pieces, r.words = r.text[:0], r.pieces[:0], r.words[:0]
	for {
		if err := nextOf(r.lineReader, what); err != nil {
			return err
		}
		line := bytes.TrimRight(r.line, " \t")
		if !bytes.HasPrefix(line, prefix3000) {
			if string(line) == "M  V30" {
				continue
			}
			if bytes.HasPrefix(line, []byte("M  END")) {
				return r.lineReader.refuse(1, "the table ends before "+what, "the table is cut short or its counts are too high")
			}
			return r.lineReader.refuse(1, "the line does not begin with M  V30", "every line of a V3000 table does")
		}
		rest := line[len(prefix3000):]
		more := len(rest) > 0 && rest[len(rest)-1] == '-'
		if more {
			rest = rest[:len(rest)-1]
		}
		r.pieces = append(r.pieces, piece{offset: len(r.text), number: r.number, skip: len(prefix3000), line: bytes.Clone(r.line)})
		r.text = append(r.text, rest...)
		if len(r.text) > maxEntryBytes {
			return r.lineReader.refuse(0, fmt.Sprintf("the entry is longer than %d bytes", maxEntryBytes), "a hyphen at the end of a line continues it")
		}
		if !more {
			break
		}
	}
	return r.split()
}

func (r *reader3000) split() error {
	text := r.text
	for i := 0; i < len(text); {
		if text[i] == ' ' || text[i] == '\t' {
			i++
			continue
		}
		start, depth, quoted := i, 0, false
		for ; i < len(text); i++ {
			c := text[i]
			if c == '"' {
				quoted = !quoted
			} else if quoted {
				continue
			} else if c == '(' {
				depth++
			} else if c == ')' {
				depth--
				if depth < 0 {
					return r.refuseAt(i, "a parenthesis closes that was not opened", "write lists as (count value …)")
				}
			} else if (c == ' ' || c == '\t') && depth == 0 {
				break
			}
		}
		if quoted || depth > 0 {
			return r.refuseAt(start, "a quotation mark or parenthesis is not closed", "close it, or end the line with a hyphen to continue it")
		}
		r.words = append(r.words, word{string(text[start:i]), start})
	}
	return nil
}

// refuseAt places a refusal on byte offset of the entry.
func (r *reader3000) refuseAt(offset int, reason, remedy string) *Error {
	k := len(r.pieces) - 1
	for k > 0 && r.pieces[k].offset > offset {
		k--
	}
	p := r.pieces[k]
	return refuseLine(r.file, p.number, p.line, p.skip+offset-p.offset+1, reason, remedy)
}

func (r *reader3000) refuseWord(k int, reason, remedy string) *Error {
	if k < len(r.words) {
		return r.refuseAt(r.words[k].offset, reason, remedy)
	}
	return r.refuseAt(len(r.text), reason, remedy)
}

// is reports whether the entry begins with the words given.
func (e *entry) is(words ...string) bool {
	if len(e.words) < len(words) {
		return false
	}
	for i, w := range words {
		if e.words[i].text != w {
			return false
		}
	}
	return true
}

// int reads token k as a whole number.
func (r *reader3000) int(k int, what string) (int, error) {
	if k >= len(r.words) {
		return 0, r.refuseWord(k, what+" is missing", "the entry is cut short")
	}
	n, ok := smallInt([]byte(r.words[k].text))
	if !ok {
		return 0, r.refuseWord(k, fmt.Sprintf("%s is %q, not a whole number", what, lineText([]byte(r.words[k].text))), "correct the entry")
	}
	return n, nil
}

// option splits token k at its equals sign and reads the value as a whole number
// where the key is among those that carry one.
func (r *reader3000) option(k int) (key string, value int, err error) {
	key, text, ok := strings.Cut(r.words[k].text, "=")
	if !ok {
		return "", 0, r.refuseWord(k, fmt.Sprintf("%q is not of the form KEY=VALUE", lineText([]byte(r.words[k].text))), "correct the entry")
	}
	switch key {
	case "CHG", "RAD", "CFG", "MASS", "VAL", "HCOUNT", "SUBST", "UNSAT", "RBCNT", "ATTCHPT":
		n, ok := smallInt([]byte(text))
		if !ok {
			return "", 0, r.refuseAt(r.words[k].offset+len(key)+1, fmt.Sprintf("the value of %s is %q, not a whole number", key, lineText([]byte(text))), "correct the entry")
		}
		return key, n, nil
	}
	return key, 0, nil
}

// readV3000 reads a table whose counts line has just been read.
func (t *table) readV3000(lr *lineReader) error {
	r := &reader3000{lineReader: lr}
	const begin = "BEGIN CTAB"
	if err := r.nextEntry(begin); err != nil {
		return err
	}
	if !r.is("BEGIN", "CTAB") {
		return r.refuseWord(0, "the table does not start with BEGIN CTAB", "write M  V30 BEGIN CTAB")
	}
	if err := r.nextEntry("its counts"); err != nil {
		return err
	}
	if !r.is("COUNTS") {
		return r.refuseWord(0, "the counts of the table are missing", "write M  V30 COUNTS with the numbers of atoms and bonds")
	}
	atoms, err := r.int(1, "the number of atoms")
	if err != nil {
		return err
	}
	bonds, err := r.int(2, "the number of bonds")
	if err != nil {
		return err
	}
	if atoms < 0 || bonds < 0 {
		return r.refuseWord(1, "a count is negative", "correct the counts")
	}
	if atoms > maxTableAtoms || bonds > maxTableBonds {
		return r.refuseWord(1, fmt.Sprintf("the table promises %d atoms and %d bonds, more than the %d and %d that are read", atoms, bonds, maxTableAtoms, maxTableBonds), "split the structure, or correct the counts")
	}
	at := map[int]int{} // index in the file to index in t.atoms
	seenAtoms, seenBonds := false, false
	for {
		if err := r.nextEntry("END CTAB"); err != nil {
			return err
		}
		switch {
		case r.is("END", "CTAB"):
			if !seenAtoms && atoms > 0 {
				return r.refuseWord(0, "the table has no atom block", fmt.Sprintf("its counts promise %s", count(atoms, "atom")))
			}
			if !seenBonds && bonds > 0 {
				return r.refuseWord(0, "the table has no bond block", fmt.Sprintf("its counts promise %s", count(bonds, "bond")))
			}
			return t.endV3000(r)
		case r.is("BEGIN", "ATOM"):
			if seenAtoms {
				return r.refuseWord(1, "the table has two atom blocks", "keep one")
			}
			seenAtoms = true
			if err := t.readBlock(r, "ATOM", "atom", atoms, func() error { return t.readAtom3000(r, at) }); err != nil {
				return err
			}
		case r.is("BEGIN", "BOND"):
			if seenBonds {
				return r.refuseWord(1, "the table has two bond blocks", "keep one")
			}
			seenBonds = true
			if err := t.readBlock(r, "BOND", "bond", bonds, func() error { return t.readBond3000(r, at) }); err != nil {
				return err
			}
		case r.is("BEGIN", "SGROUP"):
			if err := r.skipBlock("SGROUP", func() error {
				if len(r.words) > 1 && polymers[r.words[1].text] {
					return r.refuseWord(1, fmt.Sprintf("the group of type %s is a part of a polymer", r.words[1].text), "draw one complete molecule")
				}
				return nil
			}); err != nil {
				return err
			}
		case r.is("BEGIN", "COLLECTION"), r.is("BEGIN", "OBJ3D"):
			if err := r.skipBlock(r.words[1].text, func() error { return nil }); err != nil {
				return err
			}
		case r.is("LINKNODE"):
			return r.refuseWord(0, "the entry marks a link atom, as a search query does", "give one complete structure")
		default:
			what := lineText(r.text)
			if len(r.words) > 0 {
				what = lineText([]byte(r.words[0].text))
				if what == "BEGIN" && len(r.words) > 1 {
					what += " " + lineText([]byte(r.words[1].text))
				}
			}
			return r.refuseWord(0, fmt.Sprintf("%q does not belong in a table of one structure", what), "expected BEGIN ATOM, BEGIN BOND, BEGIN SGROUP, BEGIN COLLECTION or END CTAB")
		}
	}
}

// readBlock reads the n entries of a block and its END.
func (t *table) readBlock(r *reader3000, name, noun string, n int, read func() error) error {
	for i := range n {
		if err := r.nextEntry(fmt.Sprintf("%s %d of %d", noun, i+1, n)); err != nil {
			return err
		}
		if r.is("END", name) {
			return r.refuseWord(0, fmt.Sprintf("the %s block ends after %s", noun, count(i, noun)), fmt.Sprintf("the counts promise %d", n))
		}
		if err := read(); err != nil {
			return err
		}
	}
	if err := r.nextEntry("END " + name); err != nil {
		return err
	}
	if !r.is("END", name) {
		return r.refuseWord(0, fmt.Sprintf("the %s block goes on after %s", noun, count(n, noun)), "correct the counts")
	}
	return nil
}

// skipBlock reads over a block that does not change the structure.
func (r *reader3000) skipBlock(name string, check func() error) error {
	for {
		if err := r.nextEntry("END " + name); err != nil {
			return err
		}
		if r.is("END", name) {
			return nil
		}
		if err := check(); err != nil {
			return err
		}
	}
}

func (t *table) readAtom3000(r *reader3000, at map[int]int) error {
	index, err := r.int(0, "the number of the atom")
	if err != nil {
		return err
	}
	if _, twice := at[index]; twice {
		return r.refuseWord(0, fmt.Sprintf("there are two atoms %d", index), "number the atoms without repeats")
	}
	a := tableAtom{index: index, valence: -1, atLeast: -1}
	if len(r.words) < 2 {
		return r.refuseWord(1, "the element symbol is missing", "an entry is: number, symbol, x, y, z, map")
	}
	symbol := strings.Trim(r.words[1].text, `"`)
	if strings.HasPrefix(symbol, "[") || symbol == "NOT" || strings.HasPrefix(symbol, "NOT[") {
		return r.refuseWord(1, "the atom is a list of elements, as in a search query", "write one element")
	}
	if reason, remedy := a.setSymbol(symbol); reason != "" {
		return r.refuseWord(1, reason, remedy)
	}
	for i, xyz := range [3]*float64{&a.x, &a.y, &a.z} {
		if len(r.words) < 3+i {
			return r.refuseWord(2+i, fmt.Sprintf("the %c coordinate of atom %d is missing", "xyz"[i], index), "an entry is: number, symbol, x, y, z, map")
		}
		x, ok := coordinate([]byte(r.words[min(2+i, len(r.words)-1)].text))
		if !ok || len(r.words) <= 2+i {
			return r.refuseWord(2+i, fmt.Sprintf("the %c coordinate of atom %d is not a number", "xyz"[i], index), "an entry is: number, symbol, x, y, z, map")
		}
		*xyz = x
	}
	if a.mapped, err = r.int(5, "the atom map"); err != nil {
		return err
	}
	if a.mapped < 0 {
		return r.refuseWord(5, "the atom map is negative", "number maps from 1, or write 0")
	}
	for k := 6; k < len(r.words); k++ {
		key, v, err := r.option(k)
		if err != nil {
			return err
		}
		switch key {
		case "CHG":
			a.charge = v
		case "RAD":
			a.radical = v
		case "MASS":
			a.isotope = v
		case "VAL":
			switch {
			case v == -1:
				a.valence = 0
			case v > 0:
				a.valence = v
			case v < -1:
				return r.refuseWord(k, fmt.Sprintf("a valence of %d is impossible", v), "write 1 to 14, -1 for none, 0 for the usual one")
			}
		case "HCOUNT":
			if v > 0 {
				a.atLeast = v
			} else if v == -1 {
				a.atLeast = 0
			}
		case "SUBST", "UNSAT", "RBCNT":
			if v != 0 {
				return r.refuseWord(k, key+" restricts a search query", "give one complete structure")
			}
		case "ATTCHPT":
			if v != 0 {
				return r.refuseWord(k, "the atom is marked as an attachment point", "give one complete structure")
			}
		case "RGROUPS":
			return r.refuseWord(k, "the atom is an R group", "draw the group out")
		}
		if reason, remedy := a.check(); reason != "" {
			return r.refuseWord(k, reason, remedy)
		}
	}
	place := r.refuseWord(1, "", "") // the symbol
	a.line, a.column, a.text = place.Line, place.Column, place.Text
	at[index] = len(t.atoms)
	t.atoms = append(t.atoms, a)
	return nil
}

func (t *table) readBond3000(r *reader3000, at map[int]int) error {
	if _, err := r.int(0, "the number of the bond"); err != nil {
		return err
	}
	kind, err := r.int(1, "the bond type")
	if err != nil {
		return err
	}
	b := tableBond{kind: kind}
	switch kind {
	case 1, 2, 3, aromaticBond, coordinationBond, hydrogenBond:
	default:
		reason, remedy := queryBond(kind)
		return r.refuseWord(1, reason, remedy)
	}
	for i, end := range [2]*int{&b.a, &b.b} {
		n, err := r.int(2+i, "the "+[2]string{"first", "second"}[i]+" atom of the bond")
		if err != nil {
			return err
		}
		k, ok := at[n]
		if !ok {
			return r.refuseWord(2+i, fmt.Sprintf("the bond names atom %d, which the table does not have", n), "correct the number of the atom; the atom block stands before the bond block")
		}
		*end = k
	}
	for k := 4; k < len(r.words); k++ {
		key, v, err := r.option(k)
		if err != nil {
			return err
		}
		switch key {
		case "CFG":
			switch {
			case v == 0:
			case v == 2 && kind == 2:
				b.wedge = crossed
			case v == 1 && kind != 2:
				b.wedge = up
			case v == 3 && kind != 2:
				b.wedge = down
			case v == 2:
				b.wedge = either
			default:
				return r.refuseWord(k, fmt.Sprintf("CFG=%d does not exist on a bond of type %d", v, kind), "single bonds have 0, 1 (up), 2 (either) or 3 (down), double bonds 0 or 2")
			}
		case "ENDPTS":
			return r.refuseWord(k, "the bond goes to several atoms at once", "draw a π complex as separate bonds, or leave the metal out")
		}
	}
	if b.a == b.b {
		return r.refuseWord(3, "atom "+strconv.Itoa(t.atoms[b.a].index)+" is bonded to itself", "a bond joins two different atoms")
	}
	place := r.refuseWord(2, "", "") // the first atom
	b.line, b.column, b.text = place.Line, place.Column, place.Text
	t.bonds = append(t.bonds, b)
	return nil
}

// endV3000 reads from END CTAB to M  END.
func (t *table) endV3000(r *reader3000) error {
	for {
		if err := nextOf(r.lineReader, "M  END"); err != nil {
			return err
		}
		if bytes.HasPrefix(r.line, []byte("M  END")) {
			return nil
		}
		if bytes.HasPrefix(r.line, prefix3000) && !bytes.HasPrefix(r.line, []byte("M  V30 BEGIN RGROUP")) && !bytes.HasPrefix(r.line, []byte("M  V30 BEGIN TEMPLATE")) {
			continue
		}
		return r.lineReader.refuse(1, "the line does not belong in a table of one structure", "M  END is expected here")
	}
}
