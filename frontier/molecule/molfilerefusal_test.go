package molecule

import (
	"errors"
	"fmt"
	"strings"
	"testing"
)

// vinylAmine is a V2000 molfile; the refusals below change single lines of it.
const vinylAmine = `vinylamine
  drawn by hand

  3  2  0  0  0  0  0  0  0  0999 V2000
   -1.2990    0.7500    0.0000 C   0  0  0  0  0  0  0  0  0  0  0  0
    0.0000    0.0000    0.0000 C   0  0  0  0  0  0  0  0  0  0  0  0
    1.2990    0.7500    0.0000 N   0  0  0  0  0  0  0  0  0  0  0  0
  1  2  2  0
  2  3  1  0
M  END
`

// vinylAmine3000 is the same as V3000.
const vinylAmine3000 = `vinylamine
  drawn by hand

  0  0  0     0  0            999 V3000
M  V30 BEGIN CTAB
M  V30 COUNTS 3 2 0 0 0
M  V30 BEGIN ATOM
M  V30 1 C -1.299 0.75 0 0
M  V30 2 C 0 0 0 0
M  V30 3 N 1.299 0.75 0 0
M  V30 END ATOM
M  V30 BEGIN BOND
M  V30 1 2 1 2
M  V30 2 1 2 3
M  V30 END BOND
M  V30 END CTAB
M  END
`

// change replaces line n (from 1) of a text; "" removes it, and a text with newlines
// puts several lines in its place.
func change(text string, n int, line string) string {
	lines := strings.Split(text, "\n")
	if line == "" {
		lines = append(lines[:n-1], lines[n:]...)
	} else {
		lines[n-1] = line
	}
	return strings.Join(lines, "\n")
}

const (
	atomN = "    1.2990    0.7500    0.0000 N   0  0  0  0  0  0  0  0  0  0  0  0"
	end   = "M  END"
)

// wedges has two wedges at one carbon that say opposite things.
const wedges = `

contradiction
  5  4  0  0  0  0  0  0  0  0999 V2000
    0.0000    0.0000    0.0000 C   0  0
    1.0000    0.0000    0.0000 F   0  0
    0.0000    1.0000    0.0000 Cl  0  0
   -1.0000    0.0000    0.0000 Br  0  0
    0.0000   -1.0000    0.0000 I   0  0
  1  2  1  1
  1  3  1  1
  1  4  1  0
  1  5  1  0
M  END
`

// methylImidazole is 4-methylimidazole with aromatic bonds; either nitrogen may carry
// the hydrogen.
var methylImidazole = change(change(aromaticRing("N", "N"), 4, "  6  6  0  0  0  0  0  0  0  0999 V2000"), 9,
	"    4.0000   16.0000    0.0000 N   0  0\n   -1.0000   -1.0000    0.0000 C   0  0\n  1  6  1  0")

// pyrazinedione is pyrazine-2,3-dione with aromatic bonds: without hydrogens on
// nitrogen it could be read, but not as aromatic.
var pyrazinedione = drawn("N 0 0 0;C 1 0 0;C 2 1 0;N 1 2 0;C 0 2 0;C -1 1 0;O -1 3 0;O -2 1 0",
	"1 2 4 0;2 3 4 0;3 4 4 0;4 5 4 0;5 6 4 0;6 1 4 0;5 7 2 0;6 8 2 0")

// aromaticRing is a five-membered ring of aromatic bonds, of C, C, the symbols given
// and C between them.
func aromaticRing(x, y string) string {
	s := "\n\n\n  5  5  0  0  0  0  0  0  0  0999 V2000\n"
	for i, symbol := range []string{"C", "C", x, "C", y} {
		s += fmt.Sprintf("%10.4f%10.4f%10.4f %-3s 0  0\n", float64(i), float64(i*i), 0.0, symbol)
	}
	return s + "  1  2  4\n  2  3  4\n  3  4  4\n  4  5  4\n  5  1  4\nM  END\n"
}

var molfileRefusals = []struct{ text, want string }{
	// The frame of the file.
	{"a\nb\n",
		"bad.mol: line 2: the record ends before its counts line; a molfile has three header lines, then the counts line"},
	{"$RXN\n\n\n\n",
		"bad.mol: line 1, column 1: this is a reaction file, not a molfile; give a molfile, an SD file or a reaction SMILES"},
	{change(vinylAmine, 4, "  3  2  0  0  0  0  0  0  0  0999 V4000"),
		"bad.mol: line 4, column 34: the counts line states version \"V4000\"; columns 34 to 39 hold V2000 or V3000, or are blank"},
	{change(vinylAmine, 4, " three 2"),
		"bad.mol: line 4, column 2: the number of atoms is \"th\", not a whole number; it stands in columns 1 to 3"},
	{change(vinylAmine, 4, "   "),
		"bad.mol: line 4, column 4: the number of atoms is missing; it stands in columns 1 to 3 of the counts line, which is the fourth line"},
	{change(vinylAmine, 4, " -3  2  0  0  0  0  0  0  0  0999 V2000"),
		"bad.mol: line 4, column 2: the number of atoms is negative; correct the counts line"},
	{change(vinylAmine, 4, "  0  0  0  0  0  0  0  0  0  0999 V2000"),
		"bad.mol: line 4: the table has no atoms; draw a structure"},
	{change(vinylAmine, 4, "999999  0  0  0  0  0  0  0  0999 V2000"),
		"bad.mol: line 8, column 1: the line is too short for atom 4 of 999; does the counts line promise too many atoms?"},
	{change(vinylAmine, 4, "  3  2  1  0  0  0  0  0  0  0999 V2000"),
		"bad.mol: line 4, column 7: the table holds atom lists, as a search query does; write one element per atom"},
	{change(vinylAmine, 4, "  4  2  0  0  0  0  0  0  0  0999 V2000"),
		"bad.mol: line 8, column 1: the line is too short for atom 4 of 4; does the counts line promise too many atoms?"},
	{change(vinylAmine, 4, "  3  3  0  0  0  0  0  0  0  0999 V2000"),
		"bad.mol: line 10, column 1: the bond block ends early; the counts line promises more bonds"},
	{vinylAmine[:200],
		"bad.mol: line 6: the file ends before atom 3 of 3; the file is cut short or its counts line is too high"},
	{change(vinylAmine, 10, ""),
		"bad.mol: line 9: the file ends before M  END; the file is cut short; charges may be missing"},
	{change(vinylAmine, 10, "$$$$"),
		"bad.mol: line 10, column 1: the record ends before M  END; the record is cut short; charges may be missing"},
	{strings.Repeat("x", 70000),
		"bad.mol: line 1: the title line is longer than 65536 bytes; is this a molfile?"},
	{change(vinylAmine, 6, strings.Repeat("x", 70000)),
		"bad.mol: line 6: the line is longer than 65536 bytes; lines of a connection table have at most 80 characters"},

	// Atoms.
	{change(vinylAmine, 5, "   -1.2990    0.75x0    0.0000 C   0  0"),
		"bad.mol: line 5, column 15: the y coordinate of atom 1 is \"0.75x0\", not a number; it stands in columns 11 to 20"},
	{change(vinylAmine, 5, "       NaN    0.7500    0.0000 C   0  0"),
		"bad.mol: line 5, column 8: the x coordinate of atom 1 is \"NaN\", not a number; it stands in columns 1 to 10"},
	{change(vinylAmine, 5, "-1.299 0.75 0.0 C"),
		"bad.mol: line 5, column 1: the x coordinate of atom 1 is \"-1.299 0.7\", not a number; it stands in columns 1 to 10"},
	{change(vinylAmine, 5, "   -1.2990    0.7500    0.0000"),
		"bad.mol: line 5, column 31: the element symbol is missing; every atom needs a symbol"},
	{change(vinylAmine, 7, strings.Replace(atomN, "N  ", "Nx ", 1)),
		"bad.mol: line 7, column 32: \"Nx\" is not an element symbol; abbreviated groups must be drawn out"},
	{change(vinylAmine, 7, strings.Replace(atomN, "N  ", "CL ", 1)),
		"bad.mol: line 7, column 32: \"CL\" is not an element symbol; write Cl"},
	{change(vinylAmine, 7, strings.Replace(atomN, "N  ", "Q  ", 1)),
		"bad.mol: line 7, column 32: \"Q\" is not an element but a placeholder of a search query; write the element"},
	{change(vinylAmine, 7, strings.Replace(atomN, "N  ", "R# ", 1)),
		"bad.mol: line 7, column 32: \"R#\" is an open group, not an element; draw the group out"},
	{change(vinylAmine, 7, strings.Replace(atomN, "N  ", "L  ", 1)),
		"bad.mol: line 7, column 32: \"L\" is not an element but a placeholder of a search query; write the element"},
	{change(vinylAmine, 7, strings.Replace(atomN, "N   0  0", "N   0  9", 1)),
		"bad.mol: line 7, column 37: there is no charge code 9; codes run from 0 to 7; write other charges as M  CHG"},
	{change(vinylAmine, 7, strings.Replace(atomN, "N   0  0", "N   x  0", 1)),
		"bad.mol: line 7, column 36: the mass difference is \"x\", not a whole number; it stands in columns 35 to 36"},
	{change(vinylAmine, 7, strings.Replace(atomN, "N   0  0  0  0  0  0", "N   0  0  0  0  0 16", 1)),
		"bad.mol: line 7, column 49: a valence of 16 is impossible; write 1 to 14, 15 for none, 0 for the usual one"},
	{change(vinylAmine, 7, strings.Replace(atomN, "N   0  0  0  0  0  0", "N   0  0  0  0  0  1", 1)+"\n"),
		"bad.mol: line 8, column 1: the first atom of the bond is missing; it stands in columns 1 to 3"},
	{change(vinylAmine, 6, "    0.0000    0.0000    0.0000 C   0  0  0  0  0  2"),
		"bad.mol: line 6, column 32: the stated valence of atom 2 is 2, but its bonds add up to 3; correct the valence or the bonds"},
	{change(vinylAmine, 6, "    0.0000    0.0000    0.0000 C   0  0  0  3  0  0"),
		"bad.mol: line 6, column 32: atom 2 is to carry at least 2 hydrogens, but there is room for 1; clear the hydrogen count, which belongs to search queries"},
	{change(vinylAmine, 6, "    0.0000    0.0000    0.0000 O   0  0"),
		"bad.mol: line 6, column 32: atom 2: oxygen has bonds that add up to 3 and no charge; give it the charge +1"},

	// Bonds.
	{change(vinylAmine, 8, "  1  4  2  0"),
		"bad.mol: line 8, column 6: the bond names atom 4, but the table has 3 atoms; correct the number of the atom"},
	{change(vinylAmine, 8, "  0  2  2  0"),
		"bad.mol: line 8, column 3: the bond names atom 0, but the table has 3 atoms; correct the number of the atom"},
	{change(vinylAmine, 8, "  2  2  2  0"),
		"bad.mol: line 8, column 6: atom 2 is bonded to itself; a bond joins two different atoms"},
	{change(vinylAmine, 8, "  2  3  2  0"),
		"bad.mol: line 9, column 3: atoms 2 and 3 are bonded twice; write one bond of higher order"},
	{change(vinylAmine, 8, "  1  2  8  0"),
		"bad.mol: line 8, column 9: bond type 8 (any) is that of a search query; state the bond order: 1, 2, 3 or 4 (aromatic)"},
	{change(vinylAmine, 8, "  1  2  0  0"),
		"bad.mol: line 8, column 9: there is no bond type 0; state the bond order: 1, 2, 3 or 4 (aromatic)"},
	{change(vinylAmine, 8, "  1  2  5  0"),
		"bad.mol: line 8, column 9: bond type 5 (single or double) is that of a search query; state the bond order: 1, 2, 3 or 4 (aromatic)"},
	{change(vinylAmine, 8, "  1  2  2  1"),
		"bad.mol: line 8, column 12: bond stereo 1 does not exist on a bond of type 2; single bonds have 0, 1 (up), 4 (either) or 6 (down), double bonds 0 or 3"},
	{change(vinylAmine, 8, "  1  2  1  3"),
		"bad.mol: line 8, column 12: bond stereo 3 does not exist on a bond of type 1; single bonds have 0, 1 (up), 4 (either) or 6 (down), double bonds 0 or 3"},
	{change(vinylAmine, 8, "  1  b  2  0"),
		"bad.mol: line 8, column 6: the second atom of the bond is \"b\", not a whole number; it stands in columns 4 to 6"},
	{change(vinylAmine, 8, "  1  2"),
		"bad.mol: line 8, column 7: the bond type is missing; it stands in columns 7 to 9"},
	{change(vinylAmine, 9, "  2  3  3  0"),
		"bad.mol: line 6, column 32: atom 2: carbon has bonds that add up to 5 and no charge; check for a surplus bond or a missing charge"},
	{change(vinylAmine, 9, "  2  3  4  0"),
		"bad.mol: line 9, column 3: the aromatic bond between atoms 2 and 3 is in no ring; write a single or double bond"},

	// Properties.
	{change(vinylAmine, 10, "M  CHG  1   4   1\n"+end),
		"bad.mol: line 10, column 13: the line names atom 4, but the table has 3 atoms; correct the number of the atom"},
	{change(vinylAmine, 10, "M  CHG  2   3   1\n"+end),
		"bad.mol: line 10, column 18: entry 2 of 2 is missing; the line is cut short or its count is too high"},
	{change(vinylAmine, 10, "M  CHG  1   3\n"+end),
		"bad.mol: line 10, column 14: the value of atom 3 is missing; the line is cut short or its count is too high"},
	{change(vinylAmine, 10, "M  CHG  1   3  99\n"+end),
		"bad.mol: line 10, column 16: a charge of +99 is outside -15 to +15; correct the charge"},
	{change(vinylAmine, 10, "M  CHG  9\n"+end),
		"bad.mol: line 10, column 7: the line promises 9 entries; it may hold 1 to 8"},
	{change(vinylAmine, 10, "M  CHG  x\n"+end),
		"bad.mol: line 10, column 9: the number of entries is \"x\", not a whole number; it stands in columns 7 to 9"},
	{change(vinylAmine, 10, "M  CHG  1   2   2\n"+end),
		"bad.mol: line 6, column 32: atom 2: carbon has bonds that add up to 3 at charge +2; check for a surplus bond or a missing charge"},
	{change(vinylAmine, 10, "M  RAD  1   3   4\n"+end),
		"bad.mol: line 10, column 17: 4 is not a radical state; 1 is a singlet, 2 a doublet, 3 a triplet"},
	{change(vinylAmine, 10, "M  ISO  1   3 999\n"+end),
		"bad.mol: line 10, column 15: a mass number of 999 is impossible; correct the isotope"},
	{change(vinylAmine, 10, "M  ALS   1  2 F C   N   \n"+end),
		"bad.mol: line 10, column 1: the line holds an atom list, as a search query does; give one complete structure"},
	{change(vinylAmine, 10, "M  RGP  1   3   1\n"+end),
		"bad.mol: line 10, column 1: the line places an R group; give one complete structure"},
	{change(vinylAmine, 10, "M  STY  1   1 SRU\n"+end),
		"bad.mol: line 10, column 15: the group of type SRU is a part of a polymer; draw one complete molecule"},
	{change(vinylAmine, 10, "A    3\nBoc\n"+end),
		"bad.mol: line 11, column 1: atom 3 is labelled \"Boc\", which may hide atoms; draw the group out"},
	{change(vinylAmine, 10, "A    9\nNH2\n"+end),
		"bad.mol: line 11: the label belongs to atom 9, but the table has 3 atoms; correct the number of the atom on the line before"},
	{change(vinylAmine, 10, "S  SKP 99\n"+end),
		"bad.mol: line 11: the file ends before the end of its skipped lines; the file is cut short or its counts line is too high"},

	// Whole structures.
	{wedges,
		"bad.mol: line 11, column 3: the wedges of atom 1 contradict each other; leave one of them, or draw a wavy bond where the configuration is unknown"},
	{methylImidazole,
		"bad.mol: line 9, column 32: the aromatic bonds leave open which nitrogen carries hydrogen; draw the hydrogen, or the ring with single and double bonds"},
	{pyrazinedione,
		"bad.mol: line 5, column 32: the aromatic bonds leave open which nitrogen carries hydrogen; draw the hydrogen, or the ring with single and double bonds"},
	{aromaticRing("C", "C"),
		"bad.mol: line 9, column 32: no alternating double bonds fit the aromatic bonds round atom 5; draw the ring with single and double bonds, charges and hydrogens on nitrogen"},

	// V3000.
	{change(vinylAmine3000, 5, "M  V30 BEGIN ATOM"),
		"bad.mol: line 5, column 8: the table does not start with BEGIN CTAB; write M  V30 BEGIN CTAB"},
	{change(vinylAmine3000, 5, "BEGIN CTAB"),
		"bad.mol: line 5, column 1: the line does not begin with M  V30; every line of a V3000 table does"},
	{change(vinylAmine3000, 6, "M  V30 COUNTS 3"),
		"bad.mol: line 6, column 16: the number of bonds is missing; the entry is cut short"},
	{change(vinylAmine3000, 6, "M  V30 COUNTS 1000000000 2 0 0 0"),
		"bad.mol: line 6, column 15: the table promises 1000000000 atoms and 2 bonds, more than the 20000 and 40000 that are read; split the structure, or correct the counts"},
	{change(vinylAmine3000, 6, "M  V30 COUNTS 4 2 0 0 0"),
		"bad.mol: line 11, column 8: the atom block ends after 3 atoms; the counts promise 4"},
	{change(vinylAmine3000, 6, "M  V30 COUNTS 2 2 0 0 0"),
		"bad.mol: line 10, column 8: the atom block goes on after 2 atoms; correct the counts"},
	{change(vinylAmine3000, 8, "M  V30 1 C -1.299 0.75"),
		"bad.mol: line 8, column 23: the z coordinate of atom 1 is missing; an entry is: number, symbol, x, y, z, map"},
	{change(vinylAmine3000, 8, "M  V30 1 [C,N] -1.299 0.75 0 0"),
		"bad.mol: line 8, column 10: the atom is a list of elements, as in a search query; write one element"},
	{change(vinylAmine3000, 9, "M  V30 1 C 0 0 0 0"),
		"bad.mol: line 9, column 8: there are two atoms 1; number the atoms without repeats"},
	{change(vinylAmine3000, 10, "M  V30 3 N 1.299 0.75 0 0 CHG=a"),
		"bad.mol: line 10, column 31: the value of CHG is \"a\", not a whole number; correct the entry"},
	{change(vinylAmine3000, 10, "M  V30 3 N 1.299 0.75 0 0 CHG"),
		"bad.mol: line 10, column 27: \"CHG\" is not of the form KEY=VALUE; correct the entry"},
	{change(vinylAmine3000, 10, "M  V30 3 N 1.299 0.75 0 0 -\nM  V30 RAD=7"),
		"bad.mol: line 11, column 8: 7 is not a radical state; 1 is a singlet, 2 a doublet, 3 a triplet"},
	{change(vinylAmine3000, 10, "M  V30 3 N 1.299 0.75 0 0 RGROUPS=(1 1"),
		"bad.mol: line 10, column 27: a quotation mark or parenthesis is not closed; close it, or end the line with a hyphen to continue it"},
	{change(vinylAmine3000, 10, "M  V30 3 R# 1.299 0.75 0 0 RGROUPS=(1 1)"),
		"bad.mol: line 10, column 10: \"R#\" is an open group, not an element; draw the group out"},
	{change(vinylAmine3000, 10, "M  V30 3 N 1.299 0.75 0 0 ATTCHPT=1"),
		"bad.mol: line 10, column 27: the atom is marked as an attachment point; give one complete structure"},
	{change(vinylAmine3000, 14, "M  V30 2 1 2 7"),
		"bad.mol: line 14, column 14: the bond names atom 7, which the table does not have; correct the number of the atom; the atom block stands before the bond block"},
	{change(vinylAmine3000, 14, "M  V30 2 1 2 3 CFG=4"),
		"bad.mol: line 14, column 16: CFG=4 does not exist on a bond of type 1; single bonds have 0, 1 (up), 2 (either) or 3 (down), double bonds 0 or 2"},
	{change(vinylAmine3000, 14, "M  V30 2 6 2 3"),
		"bad.mol: line 14, column 10: bond type 6 (single or aromatic) is that of a search query; state the bond order: 1, 2, 3 or 4 (aromatic)"},
	{change(vinylAmine3000, 14, "M  V30 2 1 2 3 ENDPTS=(2 1 2) ATTACH=ANY"),
		"bad.mol: line 14, column 16: the bond goes to several atoms at once; draw a π complex as separate bonds, or leave the metal out"},
	{change(vinylAmine3000, 15, "M  V30 LINKNODE 1 4 2 2 1 2 3"),
		"bad.mol: line 15, column 8: the bond block goes on after 2 bonds; correct the counts"},
	{change(vinylAmine3000, 16, "M  V30 BEGIN RGROUP 1"),
		"bad.mol: line 16, column 8: \"BEGIN RGROUP\" does not belong in a table of one structure; expected BEGIN ATOM, BEGIN BOND, BEGIN SGROUP, BEGIN COLLECTION or END CTAB"},
	{change(vinylAmine3000, 16, ""),
		"bad.mol: line 16, column 1: the table ends before END CTAB; the table is cut short or its counts are too high"},
	{change(vinylAmine3000, 17, ""),
		"bad.mol: line 16: the file ends before M  END; the file is cut short or its counts line is too high"},
}

func TestMolfileRefusals(t *testing.T) {
	for i, c := range molfileRefusals {
		m, err := readMolfile(strings.NewReader(c.text), "bad.mol")
		if err == nil {
			t.Errorf("case %d: %s is read from\n%s", i, m.SMILES(), c.text)
			continue
		}
		var e *Error
		if !errors.As(err, &e) {
			t.Errorf("case %d: %v is no *Error", i, err)
			continue
		}
		if got := err.Error(); got != c.want {
			t.Errorf("case %d:\n got %s\nwant %s\n%s", i, got, c.want, e.Excerpt())
		}
		e.Excerpt()
	}
}
