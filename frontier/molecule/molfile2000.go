package molecule

import (
	"bytes"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"
)

// field is columns from to to (from 1, both included) of the line, without blanks
// around it; column is where its text begins.
func field(line []byte, from, to int) (text []byte, column int) {
	if len(line) < from {
		return nil, from
	}
	f := line[from-1 : min(to, len(line))]
	trimmed := bytes.TrimLeft(f, " \t")
	column = from + len(f) - len(trimmed)
	return bytes.TrimRight(trimmed, " \t"), column
}

// intField reads columns from to to as a whole number; blank is 0.
func intField(lr *lineReader, from, to int, what string) (int, error) {
	f, column := field(lr.line, from, to)
	if len(f) == 0 {
		return 0, nil
	}
	n, ok := smallInt(f)
	if !ok {
		return 0, lr.refuse(column, fmt.Sprintf("%s is %q, not a whole number", what, lineText(f)),
			fmt.Sprintf("it stands in columns %d to %d", from, to))
	}
	return n, nil
}

// smallInt reads an optional sign and digits; what is beyond 10⁹ becomes 10⁹.
func smallInt(b []byte) (int, bool) {
	sign, digits := 1, b
	if len(b) > 0 && (b[0] == '-' || b[0] == '+') {
		if b[0] == '-' {
			sign = -1
		}
		digits = b[1:]
	}
	if len(digits) == 0 {
		return 0, false
	}
	n := 0
	for _, c := range digits {
		if c < '0' || c > '9' {
			return 0, false
		}
		n = min(10*n+int(c-'0'), 1e9)
	}
	return sign * n, true
}

// coordinate reads a number of plain decimal form, as coordinates have.
func coordinate(b []byte) (float64, bool) {
	if len(b) == 0 || len(b) > 40 {
		return 0, false
	}
	// Digits with a point are read by hand: the common case, without a string.
	negative, mantissa, decimals, point := false, int64(0), 0, false
	for i, c := range b {
		switch {
		case c == '-' && i == 0:
			negative = true
		case c == '.' && !point:
			point = true
		case c >= '0' && c <= '9' && mantissa < 1e14:
			mantissa = 10*mantissa + int64(c-'0')
			if point {
				decimals++
			}
		default:
			x, err := strconv.ParseFloat(string(b), 64)
			return x, err == nil && finite(x) && !strings.ContainsAny(string(b), "xXpP_nN")
		}
	}
	if point && len(b) == 1 || negative && len(b) == 1 {
		return 0, false
	}
	x := float64(mantissa) / math.Pow10(decimals)
	if negative {
		x = -x
	}
	return x, finite(x)
}

// oldCharges are the meanings of the charge column of a V2000 atom line; 4 is a
// doublet radical.
var oldCharges = [8]int{0, 3, 2, 1, 0, -1, -2, -3}

// readV2000 reads a table whose counts line has just been read. old is a table from
// before version stamps, which may lack the property block.
func (t *table) readV2000(lr *lineReader, old bool) error {
	var counts [4]int
	for i, what := range [4]string{"the number of atoms", "the number of bonds", "the number of atom lists", "the number of text lines"} {
		from := [4]int{1, 4, 7, 16}[i]
		n, err := intField(lr, from, from+2, what)
		if err != nil {
			return err
		}
		if f, column := field(lr.line, from, from+2); n < 0 || i < 2 && len(f) == 0 {
			if len(f) == 0 {
				return lr.refuse(column, what+" is missing", fmt.Sprintf("it stands in columns %d to %d of the counts line, which is the fourth line", from, from+2))
			}
			return lr.refuse(column, what+" is negative", "correct the counts line")
		}
		counts[i] = n
	}
	if counts[2] > 0 {
		return lr.refuse(7, "the table holds atom lists, as a search query does", "write one element per atom")
	}
	t.atoms = make([]tableAtom, 0, counts[0])
	t.bonds = make([]tableBond, 0, counts[1])
	for i := range counts[0] {
		if err := nextOf(lr, fmt.Sprintf("atom %d of %d", i+1, counts[0])); err != nil {
			return err
		}
		if err := t.readAtom2000(lr); err != nil {
			return err
		}
	}
	for i := range counts[1] {
		if err := nextOf(lr, fmt.Sprintf("bond %d of %d", i+1, counts[1])); err != nil {
			return err
		}
		if err := t.readBond2000(lr); err != nil {
			return err
		}
	}
	for range counts[3] * 2 {
		if err := nextOf(lr, "the end of its text lines"); err != nil {
			return err
		}
	}
	return t.readProperties(lr, old)
}

func (t *table) readAtom2000(lr *lineReader) error {
	a := tableAtom{line: lr.number, index: len(t.atoms) + 1, valence: -1, atLeast: -1}
	if bytes.HasPrefix(lr.line, []byte("M  ")) {
		return lr.refuse(1, "the atom block ends early", "the counts line promises more atoms")
	}
	if len(lr.line) <= 21 && !bytes.ContainsRune(lr.line, '.') {
		return lr.refuse(1, fmt.Sprintf("the line is too short for atom %d of %d", a.index, cap(t.atoms)), "does the counts line promise too many atoms?")
	}
	for i, xyz := range [3]*float64{&a.x, &a.y, &a.z} {
		f, column := field(lr.line, 10*i+1, 10*i+10)
		x, ok := coordinate(f)
		if !ok {
			return lr.refuse(column, fmt.Sprintf("the %c coordinate of atom %d is %q, not a number", "xyz"[i], a.index, lineText(f)),
				fmt.Sprintf("it stands in columns %d to %d", 10*i+1, 10*i+10))
		}
		*xyz = x
	}
	symbol, column := field(lr.line, 32, 34)
	if len(symbol) == 0 && len(lr.line) > 30 {
		symbol, column = field(lr.line, 31, 34)
	}
	if reason, remedy := a.setSymbol(string(symbol)); reason != "" {
		return lr.refuse(column, reason, remedy)
	}
	a.column = column
	var values [7]int
	for i, f := range [7]struct {
		from, to int
		what     string
	}{
		{35, 36, "the mass difference"}, {37, 39, "the charge code"}, {43, 45, "the hydrogen count"},
		{49, 51, "the valence"}, {61, 63, "the atom map"}, {46, 48, "the stereo care box"}, {40, 42, "the stereo parity"},
	} {
		if len(lr.line) < f.from {
			continue
		}
		n, err := intField(lr, f.from, f.to, f.what)
		if err != nil {
			return err
		}
		values[i] = n
	}
	if d := values[0]; d != 0 {
		if d < -99 || d > 99 {
			d = 0
		}
		a.isotope = commonMass(a.element) + d
	}
	switch c := values[1]; {
	case c < 0 || c > 7:
		return lr.refuse(37, fmt.Sprintf("there is no charge code %d", c), "codes run from 0 to 7; write other charges as M  CHG")
	case c == 4:
		a.radical = 2
	default:
		a.charge = oldCharges[c]
	}
	if h := values[2]; h > 0 {
		a.atLeast = h - 1
	}
	switch v := values[3]; {
	case v < 0 || v > 15:
		return lr.refuse(49, fmt.Sprintf("a valence of %d is impossible", v), "write 1 to 14, 15 for none, 0 for the usual one")
	case v == 15:
		a.valence = 0
	case v > 0:
		a.valence = v
	}
	if values[4] < 0 {
		return lr.refuse(61, "the atom map is negative", "number maps from 1")
	}
	a.mapped = values[4]
	if reason, remedy := a.check(); reason != "" {
		return lr.refuse(32, reason, remedy)
	}
	a.text = lineText(lr.line)
	t.atoms = append(t.atoms, a)
	return nil
}

func (t *table) readBond2000(lr *lineReader) error {
	if bytes.HasPrefix(lr.line, []byte("M  ")) {
		return lr.refuse(1, "the bond block ends early", "the counts line promises more bonds")
	}
	var v [4]int
	var columns [4]int
	for i, what := range [4]string{"the first atom of the bond", "the second atom of the bond", "the bond type", "the bond stereo"} {
		n, err := intField(lr, 3*i+1, 3*i+3, what)
		if err != nil {
			return err
		}
		f, column := field(lr.line, 3*i+1, 3*i+3)
		if len(f) == 0 && i < 3 {
			return lr.refuse(column, what+" is missing", fmt.Sprintf("it stands in columns %d to %d", 3*i+1, 3*i+3))
		}
		v[i], columns[i] = n, column
	}
	b := tableBond{a: v[0] - 1, b: v[1] - 1, kind: v[2]}
	switch b.kind {
	case 1, 2, 3, aromaticBond, coordinationBond, hydrogenBond:
	default:
		reason, remedy := queryBond(b.kind)
		return lr.refuse(columns[2], reason, remedy)
	}
	switch s := v[3]; {
	case s == 0:
	case b.kind == 2 && s == 3:
		b.wedge = crossed
	case b.kind != 2 && s == 1:
		b.wedge = up
	case b.kind != 2 && s == 6:
		b.wedge = down
	case b.kind != 2 && s == 4:
		b.wedge = either
	default:
		return lr.refuse(columns[3], fmt.Sprintf("bond stereo %d does not exist on a bond of type %d", s, b.kind),
			"single bonds have 0, 1 (up), 4 (either) or 6 (down), double bonds 0 or 3")
	}
	return t.addBond(lr, b, columns[0], columns[1])
}

// readProperties reads the property block up to M  END.
func (t *table) readProperties(lr *lineReader, old bool) error {
	chargesReset, isotopesReset := false, false
	for {
		if err := lr.next(); err != nil {
			if err == io.EOF && old {
				return nil
			}
			if err == io.EOF {
				return &Error{File: lr.file, Line: lr.number, Reason: "the file ends before M  END", Remedy: "the file is cut short; charges may be missing"}
			}
			return err
		}
		line := lr.line
		switch {
		case lr.delimiter:
			if old {
				return nil
			}
			return lr.refuse(1, "the record ends before M  END", "the record is cut short; charges may be missing")
		case lr.cut:
			return lr.refuse(0, fmt.Sprintf("the line is longer than %d bytes", maxLineBytes), "lines of a connection table have at most 80 characters")
		case bytes.HasPrefix(line, []byte("M  END")):
			return nil
		case bytes.HasPrefix(line, []byte("M  CHG")), bytes.HasPrefix(line, []byte("M  RAD")):
			// Either line replaces all charges and radicals of the atom block.
			if !chargesReset {
				chargesReset = true
				for i := range t.atoms {
					t.atoms[i].charge, t.atoms[i].radical = 0, 0
				}
			}
			radical := line[3] == 'R'
			if err := t.readPairs(lr, func(a *tableAtom, v int) {
				if radical {
					a.radical = v
				} else {
					a.charge = v
				}
			}); err != nil {
				return err
			}
		case bytes.HasPrefix(line, []byte("M  ISO")):
			if !isotopesReset {
				isotopesReset = true
				for i := range t.atoms {
					if f := strings.TrimSpace(t.atoms[i].text[min(31, len(t.atoms[i].text)):min(34, len(t.atoms[i].text))]); f != "D" && f != "T" {
						t.atoms[i].isotope = 0
					}
				}
			}
			if err := t.readPairs(lr, func(a *tableAtom, v int) { a.isotope = v }); err != nil {
				return err
			}
		case bytes.HasPrefix(line, []byte("M  STY")):
			if err := refusePolymer(lr); err != nil {
				return err
			}
		case bytes.HasPrefix(line, []byte("S  SKP")):
			n, err := intField(lr, 7, 9, "the number of lines to skip")
			if err != nil {
				return err
			}
			for range max(n, 0) {
				if err := nextOf(lr, "the end of its skipped lines"); err != nil {
					return err
				}
			}
		case bytes.HasPrefix(line, []byte("A  ")):
			if err := t.readAlias(lr); err != nil {
				return err
			}
		case bytes.HasPrefix(line, []byte("G  ")):
			// The name of an abbreviated group, all of whose atoms are drawn.
			if err := nextOf(lr, "M  END"); err != nil {
				return err
			}
		default:
			if len(line) >= 6 {
				if what, ok := queryProperties[string(line[:6])]; ok {
					return lr.refuse(1, "the line "+what, "give one complete structure")
				}
			}
		}
	}
}

// queryProperties are property lines that make the table something else than one
// complete structure.
var queryProperties = map[string]string{
	"M  ALS": "holds an atom list, as a search query does",
	"M  SUB": "restricts the substitution, as a search query does",
	"M  UNS": "restricts the unsaturation, as a search query does",
	"M  RBC": "restricts the ring bonds, as a search query does",
	"M  LIN": "marks a link atom, as a search query does",
	"M  RGP": "places an R group",
	"M  LOG": "states the logic of R groups",
	"M  APO": "marks an attachment point",
	"M  AAL": "orders the attachments of an R group",
}

// polymers are group types of which only a part is drawn.
var polymers = map[string]bool{"SRU": true, "MON": true, "MER": true, "COP": true, "CRO": true, "MOD": true, "GRA": true, "ANY": true}

func refusePolymer(lr *lineReader) error {
	fields := bytes.Fields(lr.line[6:])
	for i := 2; i < len(fields); i += 2 {
		if polymers[string(fields[i])] {
			return lr.refuse(1+bytes.Index(lr.line, fields[i]), fmt.Sprintf("the group of type %s is a part of a polymer", fields[i]), "draw one complete molecule")
		}
	}
	return nil
}

// readPairs reads the count and the pairs of atom and value of M  CHG and its like.
// set takes the value after the atom has been found.
func (t *table) readPairs(lr *lineReader, set func(*tableAtom, int)) error {
	n, err := intField(lr, 7, 9, "the number of entries")
	if err != nil {
		return err
	}
	if n < 0 || n > 8 {
		return lr.refuse(7, fmt.Sprintf("the line promises %d entries", n), "it may hold 1 to 8")
	}
	for k := range n {
		from := 10 + 8*k
		if f, column := field(lr.line, from, from+3); len(f) == 0 {
			return lr.refuse(column, fmt.Sprintf("entry %d of %d is missing", k+1, n), "the line is cut short or its count is too high")
		}
		atom, err := intField(lr, from, from+3, "the number of the atom")
		if err != nil {
			return err
		}
		_, column := field(lr.line, from, from+3)
		if atom < 1 || atom > len(t.atoms) {
			return lr.refuse(column, fmt.Sprintf("the line names atom %d, but the table has %s", atom, count(len(t.atoms), "atom")), "correct the number of the atom")
		}
		f, column := field(lr.line, from+4, from+7)
		if len(f) == 0 {
			return lr.refuse(column, fmt.Sprintf("the value of atom %d is missing", atom), "the line is cut short or its count is too high")
		}
		v, err := intField(lr, from+4, from+7, "the value")
		if err != nil {
			return err
		}
		a := &t.atoms[atom-1]
		set(a, v)
		if reason, remedy := a.check(); reason != "" {
			return lr.refuse(column, reason, remedy)
		}
	}
	return nil
}

// readAlias reads the label that replaces an atom in a drawing. A label that only
// spells out the atom (OH, NH2) is harmless; any other hides atoms.
func (t *table) readAlias(lr *lineReader) error {
	n, err := intField(lr, 4, 6, "the number of the atom")
	if err != nil {
		return err
	}
	if err := nextOf(lr, "the label of an atom"); err != nil {
		return err
	}
	label := strings.TrimSpace(string(lr.line))
	if n < 1 || n > len(t.atoms) {
		return lr.refuse(0, fmt.Sprintf("the label belongs to atom %d, but the table has %s", n, count(len(t.atoms), "atom")), "correct the number of the atom on the line before")
	}
	symbol := Symbol(t.atoms[n-1].element)
	rest := strings.ReplaceAll(label, symbol, "")
	if strings.Count(label, symbol) == 1 && strings.Trim(rest, "H0123456789+-") == "" || strings.Trim(label, "0123456789*'() ") == "" {
		return nil
	}
	return lr.refuse(1, fmt.Sprintf("atom %d is labelled %q, which may hide atoms", n, lineText([]byte(label))), "draw the group out")
}
