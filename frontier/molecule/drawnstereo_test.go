package molecule

import (
	"fmt"
	"math"
	"strings"
	"testing"
)

// sense is +1 or −1 for the configuration of the only stereo centre, with its ligands
// ordered by atomic number, hydrogen or lone pair first; 0 where there is none.
func sense(t testing.TB, m *Molecule) int {
	t.Helper()
	result := 0
	for i := range m.Atoms {
		s := m.Atoms[i].Stereo
		if s.Class == NoStereo {
			continue
		}
		if result != 0 {
			t.Fatal("two centres")
		}
		result = 3 - 2*s.Permutation
		var keys []int
		for _, l := range s.Ligands {
			z := 0
			if l >= 0 {
				z = m.Atoms[l].Element*1000 + m.Atoms[l].Isotope
			}
			keys = append(keys, z)
		}
		for a := range keys {
			for b := a + 1; b < len(keys); b++ {
				if keys[a] > keys[b] {
					result = -result
				}
			}
		}
		if len(keys) != 4 {
			t.Fatalf("%d ligands", len(keys))
		}
	}
	return result
}

// star draws a carbon with F, Cl, Br and I at the angles given (degrees), with the
// marks of a V2000 bond line.
func star(angles, marks []int) string {
	var b strings.Builder
	fmt.Fprintf(&b, "\n\n\n%3d%3d  0  0  0  0  0  0  0  0999 V2000\n", len(angles)+1, len(angles))
	fmt.Fprintf(&b, "%10.4f%10.4f%10.4f C   0\n", 0.0, 0.0, 0.0)
	for i, a := range angles {
		r := float64(a) * math.Pi / 180
		fmt.Fprintf(&b, "%10.4f%10.4f%10.4f %-3s 0\n", math.Cos(r), math.Sin(r), 0.0, []string{"F", "Cl", "Br", "I"}[i])
	}
	for i := range angles {
		fmt.Fprintf(&b, "%3d%3d%3d%3d\n", 1, i+2, 1, marks[i])
	}
	return b.String() + "M  END\n"
}

// Wedges in all arrangements of three and four bonds, re-entrant ones too, must mean
// what RDKit 2022.09.3 reads from the same molfile; where the marks contradict each
// other RDKit chooses, or drops the configuration, and here the drawing is refused.
func TestWedges(t *testing.T) {
	const one, other, none = "F[C@H](Cl)Br", "F[C@@H](Cl)Br", "refused"
	const four, otherFour = "F[C@](Cl)(Br)I", "F[C@@](Cl)(Br)I"
	wide, bent, tee, narrow := []int{90, 210, 330}, []int{90, 150, 30}, []int{90, 180, 0}, []int{90, 170, 10}
	nearly := []int{90, 190, 350}
	cross, squeezed, fan := []int{0, 90, 180, 270}, []int{90, 200, 270, 340}, []int{0, 30, 60, 90}
	for _, c := range []struct {
		angles, marks []int
		want          string
	}{
		{wide, []int{1, 0, 0}, one}, {wide, []int{0, 1, 0}, one}, {wide, []int{6, 0, 0}, other},
		{wide, []int{1, 1, 0}, one}, {wide, []int{1, 1, 1}, one}, {wide, []int{1, 6, 0}, none},
		{bent, []int{1, 0, 0}, other}, {bent, []int{0, 1, 0}, one}, {bent, []int{6, 0, 0}, one},
		{bent, []int{1, 6, 0}, other}, {bent, []int{1, 0, 6}, other}, {bent, []int{1, 6, 6}, other},
		{tee, []int{1, 0, 0}, other}, {tee, []int{0, 1, 0}, one}, {tee, []int{6, 0, 0}, one},
		{nearly, []int{1, 0, 0}, one}, {nearly, []int{0, 1, 0}, one},
		{narrow, []int{1, 0, 0}, other}, {narrow, []int{0, 1, 0}, one}, {narrow, []int{6, 0, 0}, one},
		{cross, []int{1, 0, 0, 0}, four}, {cross, []int{0, 1, 0, 0}, otherFour}, {cross, []int{6, 0, 0, 0}, otherFour},
		{cross, []int{1, 6, 0, 0}, four}, {cross, []int{1, 0, 1, 0}, four}, {cross, []int{1, 1, 1, 0}, four},
		{cross, []int{1, 1, 0, 0}, none}, {cross, []int{1, 0, 6, 0}, none},
		{squeezed, []int{1, 0, 0, 0}, four}, {squeezed, []int{0, 1, 0, 0}, otherFour},
		{fan, []int{1, 0, 0, 0}, four}, {fan, []int{0, 1, 0, 0}, otherFour}, {fan, []int{6, 0, 0, 0}, otherFour},
	} {
		m, err := readMolfile(strings.NewReader(star(c.angles, c.marks)), "")
		if err != nil {
			if c.want != none {
				t.Errorf("%v %v: %v", c.angles, c.marks, err)
			}
			continue
		}
		if c.want == none {
			t.Errorf("%v %v is not refused", c.angles, c.marks)
			continue
		}
		if got, want := sense(t, m), sense(t, mustParse(t, c.want)); got != want || got == 0 {
			t.Errorf("%v %v: sense %d, want %d (%s)", c.angles, c.marks, got, want, c.want)
		}
	}
	for _, c := range []struct {
		name          string
		angles, marks []int
	}{
		{"wavy", wide, []int{4, 0, 0}}, {"wavy beside a wedge", wide, []int{1, 4, 0}}, {"unmarked", wide, []int{0, 0, 0}},
		{"two ligands", []int{0, 120}, []int{1, 0}},
	} {
		m, err := readMolfile(strings.NewReader(star(c.angles, c.marks)), "")
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
		} else if sense(t, m) != 0 {
			t.Errorf("%s: a configuration is read", c.name)
		}
	}
}

// drawn builds a V2000 molfile of atoms "symbol x y z" and bonds "a b type stereo".
func drawn(atoms, bonds string) string {
	as, bs := strings.Split(atoms, ";"), strings.Split(bonds, ";")
	var b strings.Builder
	fmt.Fprintf(&b, "\n\n\n%3d%3d  0  0  0  0  0  0  0  0999 V2000\n", len(as), len(bs))
	for _, a := range as {
		var symbol string
		var x, y, z float64
		fmt.Sscan(a, &symbol, &x, &y, &z)
		fmt.Fprintf(&b, "%10.4f%10.4f%10.4f %-3s 0\n", x, y, z, symbol)
	}
	for _, l := range bs {
		var p, q, kind, stereo int
		fmt.Sscan(l, &p, &q, &kind, &stereo)
		fmt.Fprintf(&b, "%3d%3d%3d%3d\n", p, q, kind, stereo)
	}
	return b.String() + "M  END\n"
}

// In OpenSMILES 1.0, section 3.8.5, an allene is looked at from the first ligand, and @
// means that the other three then run anticlockwise. Here fluorine is above the paper,
// chlorine below; seen from above, chlorine (left), carbon (lower right) and bromine
// (upper right) run anticlockwise.
func TestAlleneDrawings(t *testing.T) {
	const at, atat = "FC(Cl)=[C@]=C(C)Br", "FC(Cl)=[C@@]=C(C)Br"
	flat := "F -1.5 0.87 0;C -1 0 0;Cl -1.5 -0.87 0;C 0 0 0;C 1 0 0;C 1.5 -0.87 0;Br 1.5 0.87 0"
	solid := "F -1.5 0 0.9;C -1 0 0;Cl -1.5 0 -0.9;C 0 0 0;C 1 0 0;C 1.5 -0.87 0;Br 1.5 0.87 0"
	mirror := strings.ReplaceAll(strings.ReplaceAll(solid, "0 0.9", "0 X0.9"), "-0.9", "0.9")
	mirror = strings.ReplaceAll(mirror, "X0.9", "-0.9")
	bonds := func(f, cl, c, br int) string {
		return fmt.Sprintf("2 1 1 %d;2 3 1 %d;2 4 2 0;4 5 2 0;5 6 1 %d;5 7 1 %d", f, cl, c, br)
	}
	for _, c := range []struct{ atoms, bonds, want string }{
		{flat, bonds(1, 0, 0, 0), at},
		{flat, bonds(0, 6, 0, 0), at},
		{flat, bonds(1, 6, 0, 0), at},
		{flat, bonds(6, 0, 0, 0), atat},
		{flat, bonds(0, 1, 0, 0), atat},
		// Carbon in front, fluorine up, chlorine down: seen from carbon (in front of
		// the paper), bromine (right), fluorine (upper left), chlorine (lower left) run
		// anticlockwise; C, Br, F, Cl is an even permutation of F, Cl, C, Br.
		{flat, bonds(0, 0, 1, 0), at},
		{flat, bonds(0, 0, 0, 1), atat},
		{flat, bonds(0, 0, 0, 0), "FC(Cl)=C=C(C)Br"},
		{solid, bonds(0, 0, 0, 0), at},
		{mirror, bonds(0, 0, 0, 0), atat},
	} {
		m, err := readMolfile(strings.NewReader(drawn(c.atoms, c.bonds)), "")
		if err != nil {
			t.Errorf("%s: %v", c.bonds, err)
			continue
		}
		if got, want := sense(t, m), sense(t, mustParse(t, c.want)); got != want {
			t.Errorf("%s with %s: sense %d, want %d", c.atoms, c.bonds, got, want)
		}
	}
	for _, b := range []string{bonds(1, 1, 0, 0), bonds(1, 0, 1, 0)} {
		if _, err := readMolfile(strings.NewReader(drawn(flat, b)), ""); err == nil {
			t.Errorf("contradicting wedges %s are read", b)
		}
	}
}

// Geometry is read from coordinates alone; the drawings speak for themselves.
func TestDoubleBondDrawings(t *testing.T) {
	const bonds = "1 2 1 0;2 3 2 0;3 4 1 0"
	for _, c := range []struct {
		name, atoms, bonds string
		want               Geometry
	}{
		{"zigzag", "F -1 1 0;C 0 0.5 0;C 1 1 0;Cl 2 0.5 0", bonds, Opposite},
		{"bay", "F -1 1 0;C 0 0.5 0;C 1 0.5 0;Cl 2 1 0", bonds, Together},
		{"twisted out of the plane", "F -1 1 0.5;C 0 0 0;C 1 0 0;Cl 2 -1 -0.5", bonds, Opposite},
		{"at right angles", "F -1 1 0;C 0 0 0;C 1 0 0;Cl 2 0 1", bonds, NoGeometry},
		{"straight at one end", "F -1 0 0;C 0 0 0;C 1 0 0;Cl 2 1 0", bonds, NoGeometry},
		{"crossed", "F -1 1 0;C 0 0.5 0;C 1 1 0;Cl 2 0.5 0", "1 2 1 0;2 3 2 3;3 4 1 0", NoGeometry},
		{"wavy bond", "F -1 1 0;C 0 0.5 0;C 1 1 0;Cl 2 0.5 0", "1 2 1 4;2 3 2 0;3 4 1 0", NoGeometry},
		{"no coordinates", "F 0 0 0;C 0 0 0;C 0 0 0;Cl 0 0 0", bonds, NoGeometry},
		{"drawn hydrogen", "F -1 1 0;C 0 0.5 0;C 1 1 0;H 2 0.5 0;Cl 1 2 0", bonds + ";3 5 1 0", Together},
		{"drawn backwards", "Cl -1 1 0;C 0 0.5 0;C 1 1 0;F 2 0.5 0", "2 1 1 0;3 2 2 0;3 4 1 0", Opposite},
		{"both on one side", "F -1 1 0;C 0 0 0;C 1 0 0;Cl 2 1 0;Br 1.5 1 0", bonds + ";3 5 1 0", NoGeometry},
		{"butatriene", "F -1 1 0;C 0 0 0;C 1 0 0;C 2 0 0;C 3 0 0;Cl 4 -1 0", "1 2 1 0;2 3 2 0;3 4 2 0;4 5 2 0;5 6 1 0", Opposite},
		{"allene", "F -1 1 0;C 0 0 0;C 1 0 0;C 2 0 0;Cl 3 -1 0", "1 2 1 0;2 3 2 0;3 4 2 0;4 5 1 0", NoGeometry},
	} {
		m, err := readMolfile(strings.NewReader(drawn(c.atoms, c.bonds)), "")
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		got := NoGeometry
		for _, b := range m.Bonds {
			if b.Geometry == NoGeometry {
				continue
			}
			got = b.Geometry
			if z := m.Atoms[b.RefA].Element + m.Atoms[b.RefB].Element; z != 26 {
				t.Errorf("%s: references to %s and %s", c.name, Symbol(m.Atoms[b.RefA].Element), Symbol(m.Atoms[b.RefB].Element))
			}
		}
		if got != c.want {
			t.Errorf("%s: geometry %d, want %d", c.name, got, c.want)
		}
	}
}

// What is drawn but tells nothing apart is not kept; what depends on other centres is.
func TestIdleConfigurations(t *testing.T) {
	const methyls = "F -1 1 0;C 0 0.5 0;C 1 1 0;C 2 0.5 0;C 1 2 0"
	m, err := readMolfile(strings.NewReader(drawn(methyls, "1 2 1 0;2 3 2 0;3 4 1 0;3 5 1 0")), "")
	if err != nil {
		t.Fatal(err)
	}
	for _, b := range m.Bonds {
		if b.Geometry != NoGeometry {
			t.Error("FC=C(C)C has a geometry")
		}
	}
	if m, err = readMolfile(strings.NewReader(strings.NewReplacer("Br ", "F  ", "Cl ", "F  ").Replace(star([]int{90, 210, 330}, []int{1, 0, 0}))), ""); err != nil || sense(t, m) != 0 {
		t.Errorf("CHF3 has a configuration (error %v)", err)
	}
	for _, r := range readWitness(t, "rdkit_3d_v2000.sdf") {
		want := mustParse(t, r.smiles)
		if centres, expected := countConfigurations(r.m), countConfigurations(want); centres != expected {
			t.Errorf("%s: %d configurations are kept, %d expected", r.smiles, centres, expected)
		}
	}
	// cis- and trans-4-methylcyclohexanol: ring ligands are equivalent, and yet.
	for _, s := range []string{"C[C@H]1CC[C@@H](O)CC1", "C[C@H]1CC[C@H](O)CC1"} {
		m := mustParse(t, s)
		m.dropIdleConfigurations()
		if countConfigurations(m) != 2 {
			t.Errorf("%s keeps %d configurations", s, countConfigurations(m))
		}
	}
}

func countConfigurations(m *Molecule) int {
	n := 0
	for i := range m.Atoms {
		if m.Atoms[i].Stereo.Class != NoStereo {
			n++
		}
	}
	for i := range m.Bonds {
		if m.Bonds[i].Geometry != NoGeometry {
			n++
		}
	}
	return n
}
