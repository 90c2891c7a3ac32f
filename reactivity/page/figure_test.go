package page

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"lobecast/frontier/layout"
	"lobecast/frontier/molecule"
)

func drawn(t testing.TB, smiles string) (*canvas, *formula) {
	t.Helper()
	c := newCanvas()
	return c, newFormula(c, layout.Compute(parse(t, smiles)))
}

func count(t testing.TB, svg, class string) int {
	t.Helper()
	n := 0
	tree(t, "drawing", []byte(svg)).walk(func(x *node) {
		if x.attr["class"] == class {
			n++
		}
	})
	return n
}

func TestBondsInKekuleForm(t *testing.T) {
	for smiles, want := range map[string]int{
		"c1ccccc1":         6 + 3,
		"c1ccncc1":         6 + 3,
		"c1ccc2ccccc2c1":   11 + 5,
		"CC#N":             2 + 2,
		"C=C":              2,
		"CC(=O)O":          3 + 1,
		"O=[N+]([O-])C":    3 + 1,
		"C1CCCCC1":         6,
		"c1cc[nH]c1":       5 + 2,
		"c1ccsc1":          5 + 2,
		"[O-][n+]1ccccc1":  7 + 3,
		"C[C@H](N)C(=O)O":  4 + 1, // the wedge is no line
		"C=C=C":            4,
		"N#N":              3,
		"CS(=O)(=O)C":      4 + 2,
		"O=C1C=CC(=O)C=C1": 8 + 4,
	} {
		c, _ := drawn(t, smiles)
		if got := count(t, c.svg("figure", "x", 4), "bond"); got != want {
			t.Errorf("%s: %d lines, want %d", smiles, got, want)
		}
	}
}

func TestLabels(t *testing.T) {
	for smiles, want := range map[string]string{
		"CO": "OH", "CN": "NH2", "NC": "H2N", "C[NH3+]": "NH3+", "C[O-]": "O−", "O": "H2O", "N": "NH3", "Cl": "HCl",
		"C": "CH4", "[13CH4]": "13CH4", "CBr": "Br", "C[Si](C)(C)C": "Si", "CC": "", "[CH3]": "CH3•", "[Fe+2]": "Fe2+",
		"*C": "R", "C[2H]": "2H",
	} {
		m, err := molecule.ParseSMILES(smiles, molecule.AllowWildcard)
		if err != nil {
			t.Fatal(err)
		}
		c := newCanvas()
		newFormula(c, layout.Compute(m))
		got := ""
		tree(t, smiles, []byte(c.svg("figure", "x", 4))).walk(func(n *node) {
			if n.attr["class"] == "atom" {
				got += n.text
			}
		})
		// Which side the hydrogens stand on depends on the drawing.
		if got != want && sorted(got) != sorted(want) {
			t.Errorf("%s: labelled %q, want %q", smiles, got, want)
		}
	}
}

func sorted(s string) string {
	r := []rune(s)
	for i := range r {
		for k := range i {
			if r[k] > r[i] {
				r[k], r[i] = r[i], r[k]
			}
		}
	}
	return string(r)
}

// The area of a lobe is proportional to the square of its coefficient.
func TestLobeAreas(t *testing.T) {
	c, f := drawn(t, "CCCC")
	coefficients := []float64{0.6, -0.3, 0.45, -0.15}
	for i, v := range coefficients {
		f.lobe(i, v)
	}
	var radius []float64
	var class []string
	tree(t, "lobes", []byte(c.svg("figure", "x", 4))).walk(func(n *node) {
		if strings.HasPrefix(n.attr["class"], "lobe") {
			r, err := strconv.ParseFloat(n.attr["r"], 64)
			if err != nil {
				t.Fatal(err)
			}
			radius, class = append(radius, r), append(class, n.attr["class"])
		}
	})
	if len(radius) != 4 {
		t.Fatalf("%d lobes, want 4", len(radius))
	}
	for i, v := range coefficients {
		want := v * v / (coefficients[0] * coefficients[0])
		if got := radius[i] * radius[i] / (radius[0] * radius[0]); math.Abs(got-want) > 0.01 {
			t.Errorf("lobe %d has %.3f of the first area, want %.3f", i, got, want)
		}
		if plus := class[i] == "lobe plus"; plus != (v > 0) {
			t.Errorf("lobe of %+.2f drawn as %q", v, class[i])
		}
	}
}

// Pins keep clear of letters, of bonds and of each other on everyday substrates.
func TestPinsFindRoom(t *testing.T) {
	for _, smiles := range []string{
		"c1ccc2ccccc2c1", "COc1ccc2[nH]ccc2c1", "Oc1cccc(O)c1", "Cc1ccc(N)cc1", "O=C(Nc1ccccc1)c1ccncc1", "c1ccoc1", "c1cc[nH]c1", "Cn1cnc2c1cccc2",
	} {
		c, f := drawn(t, smiles)
		letters := append([]box(nil), c.boxes...)
		bonds := append([][2]point(nil), c.segments...)
		m := f.d.Molecule
		rank := 0
		for i := range m.Atoms {
			if m.Atoms[i].Element == 6 && m.Atoms[i].Aromatic && m.Atoms[i].Hydrogens == 1 {
				rank++
				chance := 0.5
				f.pin(i, rank, &chance, rank == 2)
			}
		}
		pins := c.boxes[len(letters):]
		if len(pins) != rank || rank == 0 {
			t.Fatalf("%s: %d pins, want %d", smiles, len(pins), rank)
		}
		for i, p := range pins {
			centre := times(plus(p.low, p.high), 0.5)
			r := (p.high.X - p.low.X) / 2
			for _, b := range letters {
				if b.overlap(centre, r) > 0.5 {
					t.Errorf("%s: pin %d covers a label", smiles, i+1)
				}
			}
			for _, s := range bonds {
				if fromSegment(centre, s[0], s[1]) < r-0.5 {
					t.Errorf("%s: pin %d covers a bond", smiles, i+1)
				}
			}
			for _, q := range pins[:i] {
				other := times(plus(q.low, q.high), 0.5)
				if length(minus(centre, other)) < r+(q.high.X-q.low.X)/2-0.5 {
					t.Errorf("%s: pins cover each other", smiles)
				}
			}
		}
	}
}

// Levels of benzene (α + 2β, twice α + β, twice α − β, α − 2β): a rung each, six
// electrons, a gap of 2 |β|.
func TestLevelDiagramOfBenzene(t *testing.T) {
	svg := levelDiagram([]float64{2, 1, 1, -1, -1, -2}, []float64{2, 2, 2, 0, 0, 0}, "benzene")
	if got := count(t, svg, "level") + count(t, svg, "level frontier"); got != 6 {
		t.Errorf("%d rungs, want 6", got)
	}
	if got := count(t, svg, "level frontier"); got != 4 {
		t.Errorf("%d frontier rungs, want 4", got)
	}
	if got := count(t, svg, "electron"); got != 3*6 {
		t.Errorf("%d strokes of arrows, want 3 for each of 6 electrons", got)
	}
	for _, want := range []string{"gap 2 |β|", "+1.000 ×2", "−1.000 ×2", "+2.000", "−2.000"} {
		if !strings.Contains(svg, ">"+want+"<") {
			t.Errorf("no label %q", want)
		}
	}
}

// Square cyclobutadiene has a half-filled pair of levels at α: no gap is drawn, and
// each level carries one electron.
func TestLevelDiagramOfOpenShell(t *testing.T) {
	svg := levelDiagram([]float64{2, 0, 0, -2}, []float64{2, 1, 1, 0}, "cyclobutadiene")
	if strings.Contains(svg, "gap") && count(t, svg, "gap") > 0 {
		t.Error("a gap is drawn inside a partly filled shell")
	}
	if got := count(t, svg, "electron"); got != 3*4 {
		t.Errorf("%d strokes of arrows, want 3 for each of 4 electrons", got)
	}
}

func TestChanceBar(t *testing.T) {
	limits := [2]float64{0.25, 0.75}
	svg := chanceBar(0.5, &limits)
	width := -1.0
	tree(t, "bar", []byte(svg)).walk(func(n *node) {
		if n.attr["class"] == "bar" {
			width, _ = strconv.ParseFloat(n.attr["width"], 64)
		}
	})
	if math.Abs(width-75) > 0.01 {
		t.Errorf("the bar of 0.5 is %.1f of 150 px", width)
	}
	if !strings.Contains(svg, "chance 0.50, 90 % limits 0.25 to 0.75") {
		t.Error("the bar does not say its chance in words")
	}
}

// The facing picture of an orientation dashes exactly two bonds, one for each pair of
// ends, and both molecules are drawn whole.
func TestPairPictureOfBothOrientations(t *testing.T) {
	r := pairReport(t, [2]string{"COC=CC=C", "C=CC=O"})
	w := &writer{r: r, set: publishedSet(t)}
	p := &r.Pair[0]
	seen := 0
	for i := range p.Adduct {
		a := &p.Adduct[i]
		if a.Joining != 1 {
			continue
		}
		seen++
		svg, caption := w.pairPicture(p, &p.Joining[0], a)
		if got := count(t, svg, "forming"); got != 2 {
			t.Errorf("%s: %d forming bonds, want 2", a.Relation, got)
		}
		if !strings.Contains(caption, "HOMO of A") || !strings.Contains(caption, "LUMO of B") {
			t.Errorf("normal demand, but the caption says %q", caption)
		}
	}
	if seen != 2 {
		t.Errorf("%d orientations, want 2", seen)
	}
}
