package molecule

import (
	"fmt"
	"strings"
	"testing"
)

// oneAtom is a V2000 molfile of one atom; line is its atom line from the symbol on.
func oneAtom(line, properties string) string {
	return "\n\n\n  1  0  0  0  0  0  0  0  0  0999 V2000\n    0.0000    0.0000    0.0000 " + line + "\n" + properties + "M  END\n"
}

// What each column and property means follows the CTfile formats document (V2000 and
// V3000 connection tables, property block).
func TestMolfileContent(t *testing.T) {
	in3000 := func(atom string) string {
		return "\n\n\n  0  0  0     0  0            999 V3000\nM  V30 BEGIN CTAB\nM  V30 COUNTS 1 0 0 0 0\nM  V30 BEGIN ATOM\n" +
			atom + "\nM  V30 END ATOM\nM  V30 END CTAB\nM  END\n"
	}
	for _, c := range []struct{ name, text, want string }{
		// Charge codes of the atom block.
		{"code 1", oneAtom("Al  0  1", ""), "[Al+3]"},
		{"code 2", oneAtom("Ca  0  2", ""), "[Ca+2]"},
		{"code 3", oneAtom("Na  0  3", ""), "[Na+]"},
		{"code 4", oneAtom("C   0  4", ""), "[CH3]"},
		{"code 5", oneAtom("Cl  0  5", ""), "[Cl-]"},
		{"code 6", oneAtom("O   0  6", ""), "[O-2]"},
		{"code 7", oneAtom("N   0  7", ""), "[N-3]"},
		{"charge of the property block wins", oneAtom("Cl  0  3", "M  CHG  1   1  -1\n"), "[Cl-]"},
		{"a radical line resets charges", oneAtom("O   0  5", "M  RAD  1   1   2\n"), "[OH]"},

		// Isotopes.
		{"mass difference", oneAtom("C   1  0", ""), "[13CH4]"},
		{"negative mass difference", oneAtom("C  -1  0", ""), "[11CH4]"},
		{"isotope of the property block wins", oneAtom("C   1  0", "M  ISO  1   1  14\n"), "[14CH4]"},
		{"D", oneAtom("D   0  0", ""), "[2H]"},
		{"T", oneAtom("T   0  0", "M  CHG  1   1   1\n"), "[3H+]"},
		{"D and an isotope line", change(drawn("D 0 0 0;C 1 0 0", "1 2 1 0"), 8, "M  ISO  1   2  13\nM  END"), "[2H][13CH3]"},

		// Radicals and valences.
		{"singlet", oneAtom("C   0  0", "M  RAD  1   1   1\n"), "[CH2]"},
		{"triplet", oneAtom("C   0  0", "M  RAD  1   1   3\n"), "[CH2]"},
		{"valence 2", oneAtom("C   0  0  0  0  0  2", ""), "[CH2]"},
		{"no valence", oneAtom("C   0  0  0  0  0 15", ""), "[C]"},
		{"hydrogen count that fits", oneAtom("C   0  0  0  5  0  0", ""), "C"},
		{"ammonium", oneAtom("N   0  3", ""), "[NH4+]"},
		{"borohydride", oneAtom("B   0  5", ""), "[BH4-]"},
		{"sulfane", oneAtom("S   0  0", ""), "S"},
		{"hydrogen chloride", oneAtom("Cl  0  0", ""), "Cl"},
		{"metal", oneAtom("Pd  0  0", ""), "[Pd]"},
		{"noble gas", oneAtom("Xe  0  0", ""), "[Xe]"},
		{"hydrogen atom", oneAtom("H   0  0", ""), "[H]"},
		{"silane", oneAtom("Si  0  0", ""), "[SiH4]"},

		// Bonds and hydrogens.
		{"drawn hydrogens", drawn("C 0 0 0;H 1 0 0;H 0 1 0;O -1 0 0", "1 2 1 0;1 3 1 0;1 4 2 0"), "C=O"},
		{"dihydrogen", drawn("H 0 0 0;H 1 0 0", "1 2 1 0"), "[H][H]"},
		{"coordination", drawn("N 0 0 0;B 1 0 0", "1 2 9 0"), "[NH3+][BH3-]"},
		{"hydrogen bond", drawn("N 0 0 0;O 3 0 0", "1 2 10 0"), "N.O"},
		{"triple bond", drawn("C 0 0 0;N 1 0 0", "1 2 3 0"), "C#N"},
		{"pentavalent nitro", drawn("C 0 0 0;N 1 0 0;O 2 0 0;O 1 1 0", "1 2 1 0;2 3 2 0;2 4 2 0"), "CN(=O)=O"},

		// Things beside the structure.
		{"label that spells the atom", oneAtom("N   0  0", "A    1\nNH3\n"), "N"},
		{"atom value", oneAtom("N   0  0", "V    1 anything\n"), "N"},
		{"group abbreviation", oneAtom("N   0  0", "G    1  1\nM  CHG  1   1   1\n"), "N"},
		{"skipped lines", oneAtom("N   0  0", "S  SKP  1\nM  CHG  1   1   1\n"), "N"},
		{"superatom", oneAtom("N   0  0", "M  STY  1   1 SUP\nM  SAL   1  1   1\nM  SMT   1 Am\n"), "N"},
		{"unknown property", oneAtom("N   0  0", "M  XYZ  1   1   1\n"), "N"},
		{"short lines", "\n\n\n  1  0\n    0.0000    0.0000    0.0000 N\n", "N"},
		{"symbol one column early", "\n\n\n  1  0\n    0.0000    0.0000    0.0000N\nM  END\n", "N"},
		{"exponents", "\n\n\n  1  0\n    1.0e-3    1.5E+2   -0.0000 N\nM  END\n", "N"},

		// V3000.
		{"V3000 charge", in3000("M  V30 1 N 0 0 0 0 CHG=1"), "[NH4+]"},
		{"V3000 radical", in3000("M  V30 1 C 0 0 0 0 RAD=2"), "[CH3]"},
		{"V3000 isotope", in3000("M  V30 1 C 0 0 0 0 MASS=13"), "[13CH4]"},
		{"V3000 valence", in3000("M  V30 1 C 0 0 0 0 VAL=2"), "[CH2]"},
		{"V3000 no valence", in3000("M  V30 1 C 0 0 0 0 VAL=-1"), "[C]"},
		{"V3000 continued", in3000("M  V30 1 N 0 0 0 0 -\nM  V30 CHG=-\nM  V30 1"), "[NH4+]"},
		{"V3000 quoted", in3000(`M  V30 1 "N" 0 0 0 0 CLASS="A B"`), "N"},
		{"V3000 free numbering", in3000("M  V30 4711 N 0 0 0 0"), "N"},
		{"V3000 groups and collections", strings.Replace(vinylAmine3000, "M  V30 END CTAB",
			"M  V30 BEGIN SGROUP\nM  V30 1 SUP 1 ATOMS=(1 3) LABEL=\"a - b\"\nM  V30 END SGROUP\nM  V30 BEGIN COLLECTION\nM  V30 MDLV30/STERAC1 ATOMS=(1 2)\nM  V30 END COLLECTION\nM  V30 END CTAB", 1), "C=CN"},
	} {
		m, err := readMolfile(strings.NewReader(c.text), "")
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if want := mustParse(t, c.want); m.SMILES() != want.SMILES() {
			t.Errorf("%s: %s, want %s", c.name, m.SMILES(), want.SMILES())
		}
		checkConsistent(t, c.name, m)
	}
}

// Number is the place in the file, also behind hydrogens that became counts; maps,
// points and the title are kept.
func TestMolfileKeeps(t *testing.T) {
	text := change(drawn("C 0 0 0;H 1 0 0;O 0 1.5 0", "1 2 1 0;1 3 1 0"), 1, "  a title  ")
	text = change(text, 7, "    0.0000    1.5000    0.0000 O   0  0  0  0  0  0  0  0  0 12  0  0")
	m, err := readMolfile(strings.NewReader(text), "")
	if err != nil {
		t.Fatal(err)
	}
	if m.Name != "a title" || m.Source != "" || len(m.Atoms) != 2 || m.Atoms[1].Number != 3 || m.Atoms[1].Offset != -1 ||
		m.Atoms[1].Map != 12 || m.Atoms[0].Hydrogens != 3 || m.Points[1] != (Point{0, 1.5}) {
		t.Errorf("%+v", m)
	}
}

func ExampleSDFScanner_Next() {
	// The wedge runs from the carbon that carries fluorine, chlorine and bromine.
	const file = `
  drawn by hand

  4  3  0  0  0  0  0  0  0  0999 V2000
    0.0000    0.0000    0.0000 C   0  0
    0.0000    1.5000    0.0000 F   0  0
   -1.3000   -0.7500    0.0000 Cl  0  0
    1.3000   -0.7500    0.0000 Br  0  0
  1  2  1  1
  1  3  1  0
  1  4  1  0
M  END
`
	m, err := NewSDFScanner(strings.NewReader(file), "centre.mol").Next()
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(m.Formula(), m.Atoms[0].Stereo.Class == Tetrahedral)
	// Output: CHBrClF true
}
