package molecule

import (
	"bytes"
	"fmt"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"
)

// maxTableAtoms and maxTableBonds bound what one connection table may hold. A V2000
// table cannot exceed 999 of each by its format; the counts line itself is never
// trusted for memory.
const (
	maxTableAtoms = maxAtoms
	maxTableBonds = 2 * maxAtoms
)

// tableAtom is one line of an atom block.
type tableAtom struct {
	line, column     int // place of the symbol in the file
	text             string
	index            int // number of the atom in the table
	element, isotope int
	charge           int
	radical          int // 0 none, 1 singlet, 2 doublet, 3 triplet
	mapped           int
	valence          int // stated total valence, -1 when not stated
	atLeast          int // hydrogens that must be there beside drawn ones, -1 when not stated
	x, y, z          float64
}

// wedge is the drawn configuration of a bond, seen from its first atom.
type wedge uint8

const (
	plain   wedge = iota
	up            // solid wedge
	down          // hashed wedge
	either        // wavy single bond
	crossed       // double bond of unstated geometry
)

// Bond types of a connection table beyond the plain orders 1 to 3.
const (
	aromaticBond     = 4
	coordinationBond = 9
	hydrogenBond     = 10
)

// tableBond is one line of a bond block; a and b index the atoms from 0.
type tableBond struct {
	line, column int
	text         string
	a, b         int
	kind         int // 1 to 4, 9, 10
	wedge        wedge
}

// table is a connection table as read, before chemistry.
type table struct {
	file  string
	name  string
	line  int // number of the counts line
	atoms []tableAtom
	bonds []tableBond
}

func (t *table) refuseAtom(i int, reason, remedy string) *Error {
	a := &t.atoms[i]
	return &Error{File: t.file, Line: a.line, Column: a.column, Text: a.text, Reason: reason, Remedy: remedy}
}

func (t *table) refuseBond(i int, reason, remedy string) *Error {
	b := &t.bonds[i]
	return &Error{File: t.file, Line: b.line, Column: b.column, Text: b.text, Reason: reason, Remedy: remedy}
}

// readRecord reads header, connection table and its end. It returns io.EOF where
// nothing but blank lines is left. After an error lr.delimiter tells whether the
// record's delimiter has been passed.
func readRecord(lr *lineReader) (*Molecule, error) {
	t := &table{file: lr.file}
	blank := true
	for i := range 4 {
		if err := lr.next(); err != nil {
			if err != io.EOF {
				return nil, err
			}
			if blank {
				return nil, io.EOF
			}
			return nil, lr.refuse(0, "the record ends before its counts line", "a molfile has three header lines, then the counts line")
		}
		if lr.delimiter {
			reason := "the record ends before its counts line"
			if blank {
				reason = "the record is empty"
			}
			return nil, lr.refuse(1, reason, "a molfile has three header lines, then the counts line")
		}
		if blank {
			blank = len(bytes.TrimSpace(lr.line)) == 0
		}
		switch {
		case i == 0:
			if lr.cut {
				return nil, lr.refuse(0, fmt.Sprintf("the title line is longer than %d bytes", maxLineBytes), "is this a molfile?")
			}
			t.name = strings.TrimSpace(lineText(lr.line))
			if first, _, _ := strings.Cut(t.name, " "); first == "$RXN" || first == "$RDFILE" || first == "$MDL" {
				return nil, lr.refuse(1, "this is a "+map[string]string{"$RXN": "reaction file", "$RDFILE": "reaction data file", "$MDL": "R-group file"}[first]+", not a molfile",
					"give a molfile, an SD file or a reaction SMILES")
			}
		case i == 3 && blank:
			// Blank lines up to the end of the file are no record.
			at, line := lr.number, slices.Clone(lr.line)
			for err := lr.next(); len(bytes.TrimSpace(lr.line)) == 0; err = lr.next() {
				if err != nil {
					return nil, err
				}
			}
			return nil, refuseLine(lr.file, at, line, 0, "the counts line is blank", "it is the fourth line and states the numbers of atoms and bonds")
		case i == 3:
			t.line = lr.number
			if err := t.readCounts(lr); err != nil {
				return nil, err
			}
		}
	}
	return t.molecule()
}

// readCounts reads the counts line and, by the version it states, the table.
func (t *table) readCounts(lr *lineReader) error {
	if lr.cut {
		return lr.refuse(0, fmt.Sprintf("the counts line is longer than %d bytes", maxLineBytes), "is this a molfile?")
	}
	version := ""
	if len(lr.line) > 33 {
		version = strings.TrimSpace(string(lr.line[33:min(39, len(lr.line))]))
	}
	switch {
	case version == "V2000" || version == "":
		return t.readV2000(lr, version == "")
	case version == "V3000":
		return t.readV3000(lr)
	}
	return lr.refuse(34, "the counts line states version "+strconv.Quote(lineText([]byte(version))), "columns 34 to 39 hold V2000 or V3000, or are blank")
}

// nextOf reads a line that the connection table still needs.
func nextOf(lr *lineReader, what string) error {
	if err := lr.next(); err != nil {
		if err == io.EOF {
			return &Error{File: lr.file, Line: lr.number, Reason: "the file ends before " + what, Remedy: "the file is cut short or its counts line is too high"}
		}
		return err
	}
	if lr.delimiter {
		return lr.refuse(1, "the record ends before "+what, "the record is cut short or its counts line is too high")
	}
	if lr.cut {
		return lr.refuse(0, fmt.Sprintf("the line is longer than %d bytes", maxLineBytes), "lines of a connection table have at most 80 characters")
	}
	return nil
}

// setSymbol sets the element of an atom from its symbol in the file. reason is
// empty when that succeeds.
func (a *tableAtom) setSymbol(symbol string) (reason, remedy string) {
	switch symbol {
	case "D":
		a.element, a.isotope = 1, 2
		return "", ""
	case "T":
		a.element, a.isotope = 1, 3
		return "", ""
	case "":
		return "the element symbol is missing", "every atom needs a symbol"
	case "A", "Q", "X", "M", "AH", "QH", "XH", "MH", "*", "L", "LP", "Du":
		return fmt.Sprintf("%q is not an element but a placeholder of a search query", symbol), "write the element"
	case "R", "R#", "Pol", "Mod", "R1", "R2", "R3", "R4", "R5", "R6", "R7", "R8", "R9":
		return fmt.Sprintf("%q is an open group, not an element", symbol), "draw the group out"
	}
	z, ok := Number(symbol)
	if !ok || z == 0 {
		if proper := properSymbol(symbol); proper != symbol {
			if _, ok := Number(proper); ok {
				return fmt.Sprintf("%q is not an element symbol", symbol), "write " + proper
			}
		}
		return fmt.Sprintf("%q is not an element symbol", symbol), "abbreviated groups must be drawn out"
	}
	a.element = z
	return "", ""
}

func properSymbol(s string) string {
	if s == "" || len(s) > 2 {
		return s
	}
	return strings.ToUpper(s[:1]) + strings.ToLower(s[1:])
}

// addBond appends a bond after checking its ends. columns are those of the ends.
func (t *table) addBond(lr *lineReader, b tableBond, columnA, columnB int) error {
	for i, end := range [2]int{b.a, b.b} {
		if end < 0 || end >= len(t.atoms) {
			return lr.refuse([2]int{columnA, columnB}[i], fmt.Sprintf("the bond names atom %d, but the table has %s", end+1, count(len(t.atoms), "atom")), "correct the number of the atom")
		}
	}
	if b.a == b.b {
		return lr.refuse(columnB, fmt.Sprintf("atom %d is bonded to itself", t.atoms[b.a].index), "a bond joins two different atoms")
	}
	b.line, b.column, b.text = lr.number, columnA, lineText(lr.line)
	t.bonds = append(t.bonds, b)
	return nil
}

func count(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return strconv.Itoa(n) + " " + noun + "s"
}

// queryBond explains the bond types that only a search has.
func queryBond(kind int) (reason, remedy string) {
	names := map[int]string{5: "single or double", 6: "single or aromatic", 7: "double or aromatic", 8: "any"}
	if n, ok := names[kind]; ok {
		return fmt.Sprintf("bond type %d (%s) is that of a search query", kind, n), "state the bond order: 1, 2, 3 or 4 (aromatic)"
	}
	return fmt.Sprintf("there is no bond type %d", kind), "state the bond order: 1, 2, 3 or 4 (aromatic)"
}

// check refuses values no atom can have, so that later arithmetic is safe.
func (a *tableAtom) check() (reason, remedy string) {
	switch {
	case a.charge < -15 || a.charge > 15:
		return fmt.Sprintf("a charge of %+d is outside -15 to +15", a.charge), "correct the charge"
	case a.isotope < 0 || a.isotope > 400:
		return fmt.Sprintf("a mass number of %d is impossible", a.isotope), "correct the isotope"
	case a.radical < 0 || a.radical > 3:
		return fmt.Sprintf("%d is not a radical state", a.radical), "1 is a singlet, 2 a doublet, 3 a triplet"
	case a.valence < -1 || a.valence > 14:
		return fmt.Sprintf("a valence of %d is impossible", a.valence), "correct the valence or leave it out"
	}
	return "", ""
}

func finite(x float64) bool { return !math.IsNaN(x) && math.Abs(x) < 1e9 }
