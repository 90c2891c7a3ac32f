package molecule

import (
	"errors"
	"strings"
	"testing"
)

// brokenSMILES are strings that must be refused: the column of the caret, the reason and
// the remedy. The grammar is that of the OpenSMILES specification 1.0; wording and limits
// are our own.
var brokenSMILES = []struct {
	smiles         string
	column         int
	reason, remedy string
}{
	{"", 1, "there is no atom", "write a SMILES string, such as c1ccccc1"},
	{"   ", 4, "there is no atom", "write a SMILES string, such as c1ccccc1"},
	{"(C)C", 1, "the branch follows no atom", "write an atom before it"},
	{"C(", 2, "the branch is not closed", "close it with )"},
	{"C(C(C)", 2, "the branch is not closed", "close it with )"},
	{"CC)", 3, "there is no open branch to close", "remove the ), or open the branch with ("},
	{"C()C", 3, "the branch is empty", "write its atoms, or remove the parentheses"},
	{"C((C))C", 3, "a branch cannot begin with a branch", "remove one of the parentheses"},
	{"C(=)C", 3, "the bond leads to no atom", "write the atom it leads to, or remove the bond"},
	{"C=(O)C", 2, "the bond symbol stands before the branch", "write it inside, as in C(=O)"},
	{"C=", 2, "the bond leads to no atom", "write the atom it leads to, or remove the bond"},
	{"=C", 1, "the bond comes from no atom", "write an atom before it, or remove the bond"},
	{"C==C", 3, "two bond symbols follow each other", "write one"},
	{"C.=C", 3, "the bond comes from no atom", "write an atom before it, or remove the bond"},
	{"C..C", 3, "the dot follows no atom", "write a component before it, or remove the dot"},
	{".C", 1, "the dot follows no atom", "write a component before it, or remove the dot"},
	{"C.", 2, "nothing follows the dot", "remove it, or write the other component"},
	{"C1CC", 2, "ring closure 1 is never closed", "write the same number at the atom where the ring ends"},
	{"C%00CC%01", 2, "ring closure 0 is never closed", "write the same number at the atom where the ring ends"},
	{"1CC1", 1, "the ring closure follows no atom", "write it right behind the atom it belongs to"},
	{"C(1CC1)", 3, "the ring closure follows no atom", "write it right behind the atom it belongs to"},
	{"C(C)1CC1", 5, "the ring closure stands behind a branch", "write it right behind the atom, before its branches"},
	{"C%1CC", 2, "% must be followed by a ring closure number of two digits", "write %10 to %99, or one digit without %"},
	{"C11", 3, "ring closure 1 joins an atom to itself", "close it at another atom"},
	{"C1C1", 4, "this ring closure makes a second bond between two atoms that are bonded already", "write a double bond as =, or close the ring elsewhere"},
	{"C12CC12", 7, "this ring closure makes a second bond between two atoms that are bonded already", "write a double bond as =, or close the ring elsewhere"},
	{"C=1CCCC-1", 9, "ring closure 1 is a single bond (-) here, and a double bond where it was opened, at column 3", "write the bond symbol at one end only"},
	{"C=1CCCC#1", 9, "ring closure 1 is a triple bond here, and a double bond where it was opened, at column 3", "write the bond symbol at one end only"},
	{"C/1CCCC/1", 9, "ring closure 1 is a single bond (/) here, and a single bond (/) where it was opened, at column 3", "write the bond symbol at one end only"},
	{"CX", 2, "X is no chemical symbol", "check the spelling"},
	{"Cx", 1, "Cx is no chemical symbol", "check the spelling"},
	{"c1ccccc1q", 9, "q is not an aromatic atom; those are b c n o p s, and [se] [as] [te]", "write a capital for an atom that is not aromatic"},
	{"CHC", 2, "H is not an atom that can stand outside brackets", "write [H], or leave hydrogens out"},
	{"DC", 1, "D is not an atom that can stand outside brackets", "write [2H], or leave hydrogens out"},
	{"Si(C)C", 1, "Si can only stand in brackets", "write [Si]"},
	{"CC(=O)ONa", 8, "Na can only stand in brackets", "write [Na]"},
	{"CK", 2, "K can only stand in brackets", "write [K]"},
	{"c1ccse1", 5, "se can only stand in brackets", "write [se]"},
	{"[C", 1, "the bracket is not closed", "close it with ]"},
	{"[CH3+", 1, "the bracket is not closed", "close it with ]"},
	{"[C@", 1, "the bracket is not closed", "close it with ]"},
	{"[]", 2, "the bracket holds no chemical symbol", "write the symbol after the isotope, as in [13C]"},
	{"[13]", 4, "the bracket holds no chemical symbol", "write the symbol after the isotope, as in [13C]"},
	{"[Xx]C", 2, "no chemical symbol begins with 'X' here", "check the spelling of the element"},
	{"[fe]", 2, "no chemical symbol begins with 'f' here", "check the spelling of the element"},
	{"[C@TH3H](F)(Cl)Br", 3, "@TH takes a number from 1 to 2", "check the configuration"},
	{"[Pt@SP4](F)(Cl)(Br)I", 4, "@SP takes a number from 1 to 3", "check the configuration"},
	{"[Pt@OH31]", 4, "@OH takes a number from 1 to 30", "check the configuration"},
	{"[C@@@H](F)(Cl)Br", 5, "'@' does not belong here in a bracket", "the order is isotope, symbol, @, H count, charge, :map, as in [13C@@H2+:1]"},
	{"[C++3]C", 5, "'3' does not belong here in a bracket", "the order is isotope, symbol, @, H count, charge, :map, as in [13C@@H2+:1]"},
	{"[CH10]", 4, "the number of hydrogens is beyond the limit of 9", "check the number"},
	{"[C+16]", 4, "the charge is beyond the limit of 15", "check the number"},
	{"[1000C]", 2, "the mass number is beyond the limit of 999", "check the number"},
	{"[CH3:99999]", 6, "the atom map is beyond the limit of 9999", "check the number"},
	{"[CH3:]", 5, ": must be followed by the number of the atom map", "write a number, such as [CH3:1]"},
	{"[HH2]", 3, "hydrogen cannot carry hydrogens in one bracket", "write [H][H] for the molecule"},
	{"CC(C)(C)(C)C", 2, "carbon has 5 bonds, at most 4 are possible", "check for a surplus bond or a missing charge"},
	{"C=C(C)(C)C", 3, "carbon has 5 bonds, at most 4 are possible", "check for a surplus bond or a missing charge"},
	{"[CH5]", 1, "carbon has 5 bonds, at most 4 are possible", "check for a surplus bond, a surplus hydrogen or a missing charge"},
	{"[H]C([H])([H])([H])[H]", 4, "carbon has 5 bonds, at most 4 are possible", "check for a surplus bond or a missing charge"},
	{"[CH4+]", 1, "carbon (charge +1) has 4 bonds, at most 3 are possible", "check for a surplus bond, a surplus hydrogen or a missing charge"},
	{"CN(C)(C)C", 2, "nitrogen has 4 bonds and no charge", "write [N+] for an ammonium or iminium nitrogen, [n+] in an aromatic ring"},
	{"[NH5]", 1, "nitrogen has 5 single bonds, at most 4 are possible", "write an ammonium nitrogen as [N+]"},
	{"CO(C)C", 2, "oxygen has 3 bonds, at most 2 are possible", "write [O+] for an oxonium oxygen, [o+] in an aromatic ring"},
	{"F=C", 1, "fluorine has 2 bonds, at most one is possible", "check for a surplus bond or a missing charge"},
	{"CIC", 2, "iodine has 2 bonds and no charge", "write [I+] for a halonium, or check the bonds"},
	{"[O-]=C", 1, "oxygen (charge -1) has 2 bonds, at most one is possible", "check for a surplus bond, a surplus hydrogen or a missing charge"},
	{"B(C)(C)(C)C", 1, "boron has 4 bonds, at most 3 are possible", "check for a surplus bond or a missing charge"},
	{"c1cccc1", 1, "no alternating double bonds fit this aromatic system: 5 of its 5 atoms ask for one, an odd number", "write [nH], o or s for the atom that brings a lone pair, [cH-] or [cH+] for an ion, or capitals where the ring is not aromatic"},
	{"Cc1ccnc1", 6, "no alternating double bonds fit this aromatic system: 5 of its 5 atoms ask for one, an odd number", "write [nH] for the nitrogen that carries hydrogen, or [n+] or [n-] for a charged one"},
	{"c1cccp1", 6, "no alternating double bonds fit this aromatic system: 5 of its 5 atoms ask for one, an odd number", "write [pH] for the phosphorus that carries hydrogen"},
	{"c1cc(=O)ccc1", 1, "no alternating double bonds fit this aromatic system: 5 of its 6 atoms ask for one, an odd number", "write [nH], o or s for the atom that brings a lone pair, [cH-] or [cH+] for an ion, or capitals where the ring is not aromatic"},
	{"c1ccccc1c", 9, "aromatic carbon stands outside a ring", "write it with a capital, or close the ring"},
	{"C:1CCCC1", 8, "an aromatic bond leads here that is in no ring of aromatic atoms", "write the atoms of the ring in lower case, or the bond as -, = or #"},
	{"c1ccccc1:c1ccccc1", 10, "an aromatic bond leads here that is in no ring of aromatic atoms", "write the atoms of the ring in lower case, or the bond as -, = or #"},
	{"*C", 1, "* stands for no particular atom", "write the atom that is meant"},
	{"C[*]", 3, "* stands for no particular atom", "write the atom that is meant"},
	{"C[C@H2]C", 2, "an atom with 2 hydrogens has no configuration", "remove the @"},
	{"C[C@@]C", 2, "a tetrahedral centre has 4 ligands, this atom has 2", "check the neighbours, or remove the @"},
	{"C[C@AL1](F)C", 2, "@AL belongs to the middle atom of an even number of cumulated double bonds whose ends carry two different ligands each", "remove it, or check the double bonds"},
	{`F/C(\Cl)=C/F`, 3, "both substituents of the double bond are marked to lie on the same side", `turn one of the marks / and \`},
	{"C>>C", 2, "> belongs to a reaction, a single structure is expected here", "give one molecule"},
	{"Cé", 2, "'é' has no meaning in SMILES", "remove it"},
	{"C]", 2, "] without a [ before it", "remove it, or open the bracket"},
	{"C@H", 2, "@ can only stand in brackets", "write the atom with its charge and configuration in brackets, such as [N+] or [C@H]"},
	{"C\x00C", 2, `'\x00' has no meaning in SMILES`, "remove it"},
}

func TestBrokenSMILES(t *testing.T) {
	for _, c := range brokenSMILES {
		m, err := ParseSMILES(c.smiles)
		if err == nil {
			t.Errorf("%q is read as %s", c.smiles, m.SMILES())
			continue
		}
		var e *Error
		if !errors.As(err, &e) {
			t.Errorf("%q: error of type %T", c.smiles, err)
			continue
		}
		if e.Column != c.column || e.Reason != c.reason || e.Remedy != c.remedy {
			t.Errorf("%q: column %d, %q, %q; want column %d, %q, %q", c.smiles, e.Column, e.Reason, e.Remedy, c.column, c.reason, c.remedy)
		}
		if strings.TrimSpace(c.smiles) != "" && !strings.ContainsAny(c.smiles, "\x00é") {
			want := c.smiles + "\n" + strings.Repeat(" ", c.column-1) + "^\n"
			if got := e.Excerpt(); got != want {
				t.Errorf("%q: excerpt\n%s, want\n%s", c.smiles, got, want)
			}
		}
	}
}

// TestExcerptOfLongLine wants a long line cut round the caret.
func TestExcerptOfLongLine(t *testing.T) {
	s := strings.Repeat("C", 300) + "Q" + strings.Repeat("N", 300)
	_, err := ParseSMILES(s)
	var e *Error
	if !errors.As(err, &e) || e.Column != 301 {
		t.Fatalf("got %v", err)
	}
	lines := strings.Split(e.Excerpt(), "\n")
	if len(lines) != 3 || lines[2] != "" {
		t.Fatalf("excerpt of %d lines", len(lines))
	}
	line, caret := []rune(lines[0]), strings.Index(lines[1], "^")
	if len(line) > 80 || line[0] != '…' || line[len(line)-1] != '…' || line[caret] != 'Q' {
		t.Errorf("excerpt\n%s\n%s", lines[0], lines[1])
	}
}
