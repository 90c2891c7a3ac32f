package layout

import (
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"
	"time"

	"lobecast/frontier/molecule"
)

func read(t testing.TB, smiles string) *molecule.Molecule {
	t.Helper()
	m, err := molecule.ParseSMILES(smiles)
	if err != nil {
		t.Fatalf("%s: %v", smiles, err)
	}
	return m
}

// angle is the angle at b of a–b–c in degrees.
func angle(d *Drawing, a, b, c int) float64 {
	u, v := unit(minus(d.At[a], d.At[b])), unit(minus(d.At[c], d.At[b]))
	return math.Acos(math.Max(-1, math.Min(1, dot(u, v)))) * 180 / math.Pi
}

func TestRingsAreRegular(t *testing.T) {
	for _, smiles := range []string{
		"c1ccccc1", "C1CC1", "C1CCC1", "c1ccoc1", "C1CCCCCC1",
		"c1ccc2ccccc2c1", "c1ccc2[nH]ccc2c1", "c1ccc2cc3ccccc3cc2c1", "c1cc2ccc3cccc4ccc(c1)c2c34",
		"c1ccc2c(c1)ccc1ccccc12", "C1CCC2(CC1)OCCO2", "c1ccc(-c2ccncc2)cc1",
		"c1cc2ccc3ccc4ccc5ccc6ccc1c1c2c3c4c5c61",
	} {
		m := read(t, smiles)
		d := Compute(m)
		for _, ring := range m.Rings() {
			n := len(ring)
			want := 180 * float64(n-2) / float64(n)
			for i := range ring {
				got := angle(d, ring[i], ring[(i+1)%n], ring[(i+2)%n])
				if math.Abs(got-want) > 0.5 {
					t.Errorf("%s: angle %.2f° in a ring of %d, want %.2f°", smiles, got, n, want)
				}
			}
		}
		if q := d.quality(); q.Stretch > 1.001 || q.Crossings > 0 {
			t.Errorf("%s: %+v", smiles, q)
		}
	}
}

func TestChainsZigzag(t *testing.T) {
	d := Compute(read(t, "CCCCCCCC"))
	for i := 1; i < 7; i++ {
		if got := angle(d, i-1, i, i+1); math.Abs(got-120) > 0.01 {
			t.Errorf("angle at carbon %d is %.2f°, want 120°", i+1, got)
		}
	}
	if got := distance(d.At[0], d.At[7]); math.Abs(got-math.Hypot(7*math.Sqrt(3)/2, 0.5)) > 0.01 {
		t.Errorf("octane is %.3f bonds long, want the stretched zigzag", got)
	}
	for _, linear := range []string{"CC#CC", "C=C=C", "N#CC", "[N-]=[N+]=NC", "O=C=NC"} {
		m := read(t, linear)
		d := Compute(m)
		for i := range m.Atoms {
			near := m.Neighbours(i)
			if len(near) != 2 || m.Bonds[near[0].Bond].Order+m.Bonds[near[1].Bond].Order != 4 {
				continue
			}
			if got := angle(d, near[0].Atom, i, near[1].Atom); math.Abs(got-180) > 0.01 {
				t.Errorf("%s: angle %.1f° at atom %d, want 180°", linear, got, i+1)
			}
		}
	}
}

func TestSubstituentsPointOutward(t *testing.T) {
	for _, smiles := range []string{"Cc1ccccc1", "CC1CCCC1", "Cc1cccc2ccccc12", "Cn1cccc1", "CC12CCCCC1CCCC2", "CC1(C)CCCCC1"} {
		m := read(t, smiles)
		d := Compute(m)
		for _, ring := range m.Rings() {
			corners := make([]point, len(ring))
			for i, a := range ring {
				corners[i] = d.At[a]
			}
			for i := range m.Atoms {
				if !slices.Contains(ring, i) && contains(corners, d.At[i]) {
					t.Errorf("%s: atom %d stands inside a ring", smiles, i+1)
				}
			}
		}
	}
}

func TestGeometryIsDrawnAsStated(t *testing.T) {
	for _, smiles := range []string{
		`C/C=C/C`, `C/C=C\C`, `F/C(Cl)=C(/Br)I`, `F/C(Cl)=C(\Br)I`, `C/C=C/C=C\C`, `C/C=C\C=C/C=C\C`,
		`OC(=O)/C=C/C(=O)O`, `OC(=O)/C=C\C(=O)O`, `C/C=C1/CCCC(C)C1`, `C/C=C1\CCCC(C)C1`,
		`CC/C(=C(/CC)c1ccccc1)c1ccccc1`, `O=C1CCCCCCC/C=C/CCCCCCO1`, `O=C1CCCCCCC/C=C\CCCCCCO1`,
		`c1ccccc1/N=N/c1ccccc1`, `c1ccccc1/N=N\c1ccccc1`, `CC(=N/O)\c1ccccc1`, `Cn1ccs/c1=N\C(=O)c1ccc2ccccc2c1`, `Cn1ccs/c1=N/C(=O)c1ccc2ccccc2c1`,
		`c1ccc2c(c1)CCC/C2=C1/CCCc2ccccc12`,
	} {
		if q := Compute(read(t, smiles)).quality(); q.Wrong > 0 || q.Crossings > 0 {
			t.Errorf("%s: %d double bonds wrong, %d crossings", smiles, q.Wrong, q.Crossings)
		}
	}
}

// molblock writes a drawing as a V2000 molfile (CTfile format), so that the molfile
// reader, which derives configuration from coordinates and wedges, can judge it.
func molblock(d *Drawing) string {
	m := d.Molecule
	type line struct {
		a, b, order, stereo int
	}
	at := slices.Clone(d.At)
	symbols := make([]string, len(m.Atoms))
	for i := range m.Atoms {
		symbols[i] = molecule.Symbol(m.Atoms[i].Element)
	}
	wedges := map[int]Wedge{}
	var lines []line
	for _, w := range d.Wedges {
		if w.To >= 0 {
			wedges[m.BondBetween(w.From, w.To)] = w
			continue
		}
		at = append(at, w.Hydrogen)
		symbols = append(symbols, "H")
		lines = append(lines, line{w.From, len(at) - 1, 1, map[bool]int{true: 1, false: 6}[w.Up]})
	}
	for i := range m.Bonds {
		b := &m.Bonds[i]
		if w, ok := wedges[i]; ok {
			lines = append(lines, line{w.From, w.To, b.Order, map[bool]int{true: 1, false: 6}[w.Up]})
			continue
		}
		lines = append(lines, line{b.A, b.B, b.Order, 0})
	}
	var s strings.Builder
	fmt.Fprintf(&s, "\n  test\n\n%3d%3d  0  0  1  0            999 V2000\n", len(at), len(lines))
	for i, p := range at {
		fmt.Fprintf(&s, "%10.4f%10.4f%10.4f %-3s 0  0  0  0  0  0  0  0  0  0  0  0\n", p.X, p.Y, 0.0, symbols[i])
	}
	for _, l := range lines {
		fmt.Fprintf(&s, "%3d%3d%3d%3d\n", l.a+1, l.b+1, l.order, l.stereo)
	}
	for i := range m.Atoms {
		if c := m.Atoms[i].Charge; c != 0 {
			fmt.Fprintf(&s, "M  CHG  1%4d%4d\n", i+1, c)
		}
	}
	s.WriteString("M  END\n")
	return s.String()
}

func TestWedgesReadBack(t *testing.T) {
	for _, smiles := range []string{
		"C[C@H](N)C(=O)O", "C[C@@H](N)C(=O)O", "C[C@](F)(Cl)Br", "C[C@@](F)(Cl)Br",
		"O[C@H]1CCCC[C@@H]1O", "O[C@H]1CCCC[C@H]1O", "[H][C@]12CCCC[C@@]1([H])CCCC2",
		"C1CC[C@H]2CCCC[C@@H]2C1", "C1CC[C@@H]2CCCC[C@@H]2C1",
		"C[C@]12CC[C@H]3[C@@H](CCc4cc(O)ccc34)[C@@H]1CC[C@@H]2O",                            // estradiol
		"C[C@H](CCCC(C)C)[C@H]1CC[C@@H]2[C@@]1(CC[C@H]3[C@H]2CC=C4[C@@]3(CC[C@@H](C4)O)C)C", // cholesterol
		"OC[C@H]1O[C@@H](O)[C@H](O)[C@@H](O)[C@@H]1O",                                       // glucose
		"C[S@](=O)c1ccccc1", "N[C@@H](Cc1ccccc1)C(=O)N[C@@H](C)C(=O)O",
		"O=C1OC(=O)[C@@H]2[C@H]1[C@H]1C=C[C@@H]2C1",
		"C[C@@H](O)[C@H](F)[C@@H](Cl)[C@H](C)Br", "C1C[C@]2(CCO1)CCOC[C@H]2C",
	} {
		m := read(t, smiles)
		d := Compute(m)
		back, err := molecule.NewSDFScanner(strings.NewReader(molblock(d)), "drawing.mol").Next()
		if err != nil {
			t.Errorf("%s: %v", smiles, err)
			continue
		}
		if got, want := back.SMILES(), m.SMILES(); got != want {
			t.Errorf("%s drawn reads back as %s, want %s", smiles, got, want)
		}
	}
}

func TestSameDrawingHoweverWritten(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 2))
	for _, smiles := range []string{
		"CC(C)Cc1ccc(cc1)C(C)C(=O)O", "C1=CC2CCC1C2", "c1ccc2[nH]ccc2c1", `C/C=C/C(=O)Nc1ccc(Br)cn1`,
		"C[C@H](N)C(=O)O", "COc1ccc2nccc(C(O)C3CC4CCN3CC4C=C)c2c1", "OCCn1ccnc1[N+](=O)[O-]",
	} {
		m := read(t, smiles)
		want := sortedPoints(Compute(m).At)
		for range 5 {
			perm := random.Perm(len(m.Atoms))
			got := sortedPoints(Compute(m.Renumber(perm)).At)
			for i := range want {
				if distance(got[i], want[i]) > 1e-6 {
					t.Errorf("%s: the drawing depends on the order of the atoms", smiles)
					break
				}
			}
		}
	}
}

func TestSameDrawingOfEverySpelling(t *testing.T) {
	for _, spellings := range [][]string{
		{"C1CC2CC1C=C2", "C1=CC2CCC1C2", "C1C2CCC1C=C2"},
		{"c1ccc2[nH]ccc2c1", "C1=CC=C2C(=C1)C=CN2", "c12ccccc1[nH]cc2"},
		{"OC(=O)c1ccccc1OC(C)=O", "CC(=O)Oc1ccccc1C(=O)O"},
		{"C[C@H](N)C(=O)O", "N[C@@H](C)C(O)=O", "[C@@H](C)(C(=O)O)N"},
	} {
		want := sortedPoints(Compute(read(t, spellings[0])).At)
		for _, s := range spellings[1:] {
			got := sortedPoints(Compute(read(t, s)).At)
			for i := range want {
				if distance(got[i], want[i]) > 1e-6 {
					t.Errorf("%s and %s are drawn differently", spellings[0], s)
					break
				}
			}
		}
	}
}

func sortedPoints(at []point) []point {
	list := slices.Clone(at)
	slices.SortFunc(list, func(p, q point) int {
		if math.Abs(p.X-q.X) > 1e-6 {
			return int(math.Copysign(1, p.X-q.X))
		}
		if math.Abs(p.Y-q.Y) > 1e-6 {
			return int(math.Copysign(1, p.Y-q.Y))
		}
		return 0
	})
	return list
}

func TestLikeKeepsSharedAtoms(t *testing.T) {
	for _, step := range []struct {
		substrate, product string
		shared             int
	}{
		{"COc1ccc2[nH]ccc2c1", "COc1ccc2[nH]cc(Br)c2c1", 11},
		{"Cc1ccccc1", "Cc1ccc([N+](=O)[O-])cc1", 7},
		{"Clc1ccnc(Cl)n1", "COc1ccnc(Cl)n1", 7},
		{"CC(=O)Nc1ccccc1", "CC(=O)Nc1ccc(S(N)(=O)=O)cc1", 10},
	} {
		a, b := read(t, step.substrate), read(t, step.product)
		ref := Compute(a)
		pairs := Match(b, a)
		if len(pairs) < step.shared {
			t.Errorf("%s and %s: %d shared atoms found, want %d", step.substrate, step.product, len(pairs), step.shared)
		}
		d := Like(b, ref, pairs)
		for _, p := range pairs {
			if distance(d.At[p[0]], ref.At[p[1]]) > 1e-9 {
				t.Errorf("%s: atom %d of the product does not lie on atom %d of the substrate", step.product, p[0]+1, p[1]+1)
			}
		}
		if q := d.quality(); q.Crossings > 0 || q.Nearest < 0.7 || q.Stretch > 1.01 {
			t.Errorf("%s: %+v", step.product, q)
		}
	}
}

// Where a ring is closed onto a kept one, the kept ring stays in its place.
func TestLikeWithNewRing(t *testing.T) {
	substrate, product := read(t, "COC(=O)c1cc(OC)c(OC)cc1N"), read(t, "COc1cc2nc[nH]c(=O)c2cc1OC")
	ref := Compute(substrate)
	pairs := Match(product, substrate)
	d := Like(product, ref, pairs)
	for _, p := range pairs {
		if substrate.Atoms[p[1]].Aromatic && distance(d.At[p[0]], ref.At[p[1]]) > 0.3 {
			t.Errorf("ring atom %d of the product lies %.2f bonds from its place", p[0]+1, distance(d.At[p[0]], ref.At[p[1]]))
		}
	}
}

// A product whose rings changed is turned onto its precursor instead.
func TestLikeTurnsWhereRingsChange(t *testing.T) {
	diene, adduct := read(t, "COC=CC=C"), read(t, "COC1C=CCCC1C=O")
	ref := Compute(diene)
	pairs := Match(adduct, diene)
	if len(pairs) < 5 {
		t.Fatalf("%d shared atoms, want at least 5", len(pairs))
	}
	turned, plain := Like(adduct, ref, pairs), Compute(adduct)
	off := func(d *Drawing) float64 {
		sum := 0.0
		for _, p := range pairs {
			sum += sq(distance(d.At[p[0]], ref.At[p[1]]))
		}
		return sum
	}
	if off(turned) >= off(plain) {
		t.Errorf("laid over: squared distance %.2f, not less than %.2f without", off(turned), off(plain))
	}
	if q := turned.quality(); q.Stretch > 1.01 {
		t.Errorf("the picture was stretched: %+v", q)
	}
}

func TestFacing(t *testing.T) {
	for _, c := range []struct {
		smiles string
		chain  []int
	}{
		{"C=CC=C", []int{0, 1, 2, 3}}, {"C=CC(C)=C", []int{4, 2, 1, 0}}, {`CO/C=C/C=C`, []int{2, 3, 4, 5}},
		{"C1=CC=CC1", []int{0, 1, 2, 3}}, {"c1ccoc1", []int{2, 1, 0, 4}}, {"C=CC=O", []int{0, 1, 2, 3}},
		{`C=C/C=C\C=C`, []int{0, 1, 2, 3, 4, 5}}, {"C=C", []int{0, 1}}, {"CN=[N+]=[N-]", []int{1, 2, 3}},
		{"C=C(C)C(=C)O[Si](C)(C)C", []int{0, 1, 3, 4}},
	} {
		m := read(t, c.smiles)
		d := Facing(m, c.chain)
		a, b := d.At[c.chain[0]], d.At[c.chain[len(c.chain)-1]]
		if math.Abs(a.Y-b.Y) > 1e-6 || a.X >= b.X {
			t.Errorf("%s: ends at %v and %v, want level and in order", c.smiles, a, b)
		}
		for _, x := range c.chain {
			if d.At[x].Y < a.Y-1e-6 {
				t.Errorf("%s: atom %d of the chain lies below the ends", c.smiles, x+1)
			}
		}
		if q := d.quality(); q.Stretch > 1.01 || q.Crossings > 0 || q.Wrong > 0 {
			t.Errorf("%s: %+v", c.smiles, q)
		}
	}
	// An s-cis butadiene has its ends two bonds apart, an s-trans one √7.
	m := read(t, "C=CC=C")
	if d := Facing(m, []int{0, 1, 2, 3}); math.Abs(distance(d.At[0], d.At[3])-2) > 1e-6 {
		t.Errorf("ends of butadiene %.3f apart, want 2 (s-cis)", distance(d.At[0], d.At[3]))
	}
}

func TestMolfileCoordinatesAreUsed(t *testing.T) {
	const file = `
  test

  3  2  0  0  0  0            999 V2000
    0.0000    0.0000    0.0000 C   0  0
    3.0000    0.0000    0.0000 C   0  0
    3.0000    3.0000    0.0000 O   0  0
  1  2  1  0
  2  3  1  0
M  END
`
	m, err := molecule.NewSDFScanner(strings.NewReader(file), "right-angle.mol").Next()
	if err != nil {
		t.Fatal(err)
	}
	d := Compute(m)
	if got := angle(d, 0, 1, 2); math.Abs(got-90) > 1e-6 {
		t.Errorf("angle %.1f°, want the 90° of the file", got)
	}
	if got := distance(d.At[0], d.At[1]); math.Abs(got-1) > 1e-6 {
		t.Errorf("bond of length %.3f, want it scaled to 1", got)
	}
}

func TestLargeMoleculesEnd(t *testing.T) {
	for name, smiles := range map[string]string{
		"chain of 1000":     strings.Repeat("C", 1000),
		"crowded star":      "C" + strings.Repeat("(C(C)(C)C)", 3) + "C(C)(C)C",
		"peptide of 60":     strings.Repeat("NC(Cc1ccccc1)C(=O)", 60) + "O",
		"dendrimer":         dendrimer(7),
		"ring of 300":       "C1" + strings.Repeat("C", 298) + "C1",
		"buckminsterfuller": "c12c3c4c5c1c1c6c7c2c2c8c3c3c9c4c4c%10c5c5c1c1c6c6c%11c7c2c2c7c8c3c3c8c9c4c4c9c%10c5c5c1c1c6c6c%11c2c2c7c3c3c8c4c4c9c5c1c1c6c2c3c41",
	} {
		m := read(t, smiles)
		start := time.Now()
		d := Compute(m)
		if took := time.Since(start); took > 20*time.Second {
			t.Errorf("%s: %v", name, took)
		}
		for i, p := range d.At {
			if math.IsNaN(p.X+p.Y) || math.IsInf(p.X+p.Y, 0) {
				t.Fatalf("%s: atom %d has no position", name, i+1)
			}
		}
	}
}

// dendrimer is a carbon tree branching in three at every level.
func dendrimer(levels int) string {
	if levels == 0 {
		return "C"
	}
	inner := dendrimer(levels - 1)
	return "C(" + inner + ")" + inner
}

func TestComponentsStandApart(t *testing.T) {
	m := read(t, "CCN(CC)CC.Cl.c1ccccc1.[Na+].[Cl-]")
	d := Compute(m)
	part := make([]int, len(m.Atoms))
	for k, atoms := range m.Components() {
		for _, a := range atoms {
			part[a] = k
		}
	}
	for a := range d.At {
		for c := range a {
			if part[a] != part[c] && distance(d.At[a], d.At[c]) < 1.2 {
				t.Errorf("atoms %d and %d of different components are %.2f apart", a+1, c+1, distance(d.At[a], d.At[c]))
			}
		}
	}
}

func BenchmarkCompute(b *testing.B) {
	m := read(b, "CC(C)Oc1ccc(-c2nc(-c3cccc4c3CCC4NCCO)no2)cc1C#N")
	for b.Loop() {
		Compute(m)
	}
}
