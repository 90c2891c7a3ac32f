package reactivity

import (
	"flag"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"sort"
	"strings"
	"testing"
	"time"

	"gonum.org/v1/gonum/mat"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

var writeScaling = flag.Bool("write-scaling", false, "write docs/scaling.md and docs/pictures/scaling.svg")

// flake is a parallelogram of rows by rows fused hexagons: 2(rows+1)² − 2 atoms.
func flake(rows int) string {
	type point struct{ x, y int }
	number := map[point]int{}
	var points []point
	bonds := map[[2]point]bool{}
	for i := range rows {
		for j := range rows {
			var ring [6]point
			for k := range ring {
				angle := math.Pi * float64(2*k+1) / 6
				ring[k] = point{
					int(math.Round(1000 * (math.Sqrt(3)*(float64(i)+float64(j)/2) + math.Cos(angle)))),
					int(math.Round(1000 * (1.5*float64(j) + math.Sin(angle)))),
				}
				// Rounding may differ by one between neighbours.
				for dx := -2; dx <= 2; dx++ {
					for dy := -2; dy <= 2; dy++ {
						if _, ok := number[point{ring[k].x + dx, ring[k].y + dy}]; ok {
							ring[k].x, ring[k].y = ring[k].x+dx, ring[k].y+dy
							dx, dy = 3, 3
						}
					}
				}
				if _, ok := number[ring[k]]; !ok {
					number[ring[k]] = len(points)
					points = append(points, ring[k])
				}
			}
			for k, p := range ring {
				q := ring[(k+1)%6]
				if p.y > q.y || p.y == q.y && p.x > q.x {
					p, q = q, p
				}
				bonds[[2]point{p, q}] = true
			}
		}
	}
	sort.Slice(points, func(a, b int) bool {
		p, q := points[a], points[b]
		return p.y < q.y || p.y == q.y && p.x < q.x
	})
	var free []int
	for d := 99; d >= 10; d-- {
		free = append(free, d)
	}
	open := map[[2]point]int{}
	var text []string
	for _, p := range points {
		s := "c"
		for _, q := range points {
			if b := [2]point{q, p}; bonds[b] {
				s += fmt.Sprintf("%%%d", open[b])
				free = append(free, open[b])
			}
		}
		for _, q := range points {
			if b := [2]point{p, q}; bonds[b] {
				open[b] = free[len(free)-1]
				free = free[:len(free)-1]
				s += fmt.Sprintf("%%%d", open[b])
			}
		}
		text = append(text, s)
	}
	return strings.Join(text, ".")
}

// aceneSMILES is n linearly fused benzene rings: 4n + 2 atoms. It is written rung by rung,
// so that two ring closures are open at a time, however long it is.
func aceneSMILES(n int) string {
	var b strings.Builder
	b.WriteString("c1c")
	for k, d := 0, 1; k < n; k, d = k+1, 3-d {
		if k == n-1 {
			fmt.Fprintf(&b, "cccc%d", d)
		} else {
			fmt.Fprintf(&b, "cc%dc(c%d)", 3-d, d)
		}
	}
	return b.String()
}

type scalingFamily struct {
	name    string
	smiles  func(size int) string
	sizes   []int
	centres func(size int) int
}

var scalingFamilies = []scalingFamily{
	{"polyenes", func(n int) string { return strings.Repeat("C=C", n) }, []int{5, 10, 20, 40, 80, 160, 320, 500}, func(n int) int { return 2 * n }},
	{"acenes", aceneSMILES, []int{2, 5, 10, 20, 40, 80, 160, 249}, func(n int) int { return 4*n + 2 }},
	{"graphene flakes", flake, []int{2, 3, 5, 8, 12, 16, 21}, func(n int) int { return 2*(n+1)*(n+1) - 2 }},
}

func TestScalingMoleculesAreWhatTheySay(t *testing.T) {
	for _, f := range scalingFamilies {
		for _, size := range f.sizes[:4] {
			m, err := molecule.ParseSMILES(f.smiles(size))
			if err != nil {
				t.Fatalf("%s of %d: %v", f.name, size, err)
			}
			if len(m.Atoms) != f.centres(size) || len(m.Components()) != 1 {
				t.Errorf("%s of %d: %d atoms in %d parts, want %d in one", f.name, size, len(m.Atoms), len(m.Components()), f.centres(size))
			}
		}
	}
}

type scalingPoint struct {
	centres        int
	judge, eigen   float64 // seconds
	reading, ratio float64
}

// shortest is the shortest of some calls, in seconds; a long one is made once.
func shortest(work func()) float64 {
	best, all := math.Inf(1), 0.0
	for k := 0; k == 0 || k < 20 && all < 0.2; k++ {
		start := time.Now()
		work()
		d := time.Since(start).Seconds()
		best, all = math.Min(best, d), all+d
	}
	return best
}

// exponent is the slope of log time against log centres by least squares, from 60
// centres on.
func exponent(points []scalingPoint, value func(scalingPoint) float64) float64 {
	var n, sx, sy, sxx, sxy float64
	for _, p := range points {
		if p.centres < 60 {
			continue
		}
		x, y := math.Log(float64(p.centres)), math.Log(value(p))
		n, sx, sy, sxx, sxy = n+1, sx+x, sy+y, sxx+x*x, sxy+x*y
	}
	return (n*sxy - sx*sy) / (n*sxx - sx*sx)
}

// BenchmarkScaling measures the time of a whole judgement (perception, orbitals, every
// index of every atom, ranking for all events) against the number of π centres, beside one
// mat.EigenSym of the same matrix. It fails where the time grows faster than n³·⁵.
func BenchmarkScaling(b *testing.B) {
	for b.Loop() {
		all := map[string][]scalingPoint{}
		for _, f := range scalingFamilies {
			for _, size := range f.sizes {
				text := f.smiles(size)
				m, err := molecule.ParseSMILES(text)
				if err != nil {
					b.Fatal(err)
				}
				p := scalingPoint{centres: f.centres(size)}
				var j *Judgement
				p.judge = shortest(func() {
					if j, err = Judge(m, Conditions{Medium: terms.Neutral}, nil); err != nil {
						b.Fatal(err)
					}
				})
				h := mat.NewSymDense(p.centres, append([]float64(nil), j.Solution.Systems[0].H...))
				p.eigen = shortest(func() {
					var es mat.EigenSym
					if !es.Factorize(h, true) {
						b.Fatal("no convergence")
					}
				})
				p.reading = shortest(func() { molecule.ParseSMILES(text) })
				p.ratio = p.judge / p.eigen
				all[f.name] = append(all[f.name], p)
				b.Logf("%-16s %4d centres: read %8.2f ms, judged %9.2f ms, EigenSym %9.2f ms, ratio %.2f", f.name, p.centres, 1e3*p.reading, 1e3*p.judge, 1e3*p.eigen, p.ratio)
			}
			e := exponent(all[f.name], func(p scalingPoint) float64 { return p.judge })
			b.ReportMetric(e, "exponent-"+strings.ReplaceAll(f.name, " ", "-"))
			if e > 3.5 {
				b.Errorf("%s: the time grows with the power %.2f of the centres", f.name, e)
			}
		}
		if *writeScaling {
			writeScalingPages(b, all)
		}
	}
}

func writeScalingPages(b *testing.B, all map[string][]scalingPoint) {
	var page strings.Builder
	page.WriteString(`# Time against size

    go test ./reactivity -run XXX -bench Scaling -benchtime 1x -timeout 20m -write-scaling

judges molecules of 10 to 1000 π centres (perception, orbitals, every index of every atom, ranking for
all events), and takes one ` + "`mat.EigenSym`" + ` with vectors of the same matrix in the same run; it writes this page
and the picture. The exponent is the slope of log time against log centres from 60 centres on, by least
squares. Milliseconds are of the machine of that run, which others used at the same time; ratios are
comparable. Larger structures are refused (1000 centres). From about 120 centres on the limits of the
indices are left out with a note, from about 240 those of the chances, both from about 80 in systems with
hardly a gap, where each would cost a solution for every site (an acene of 998 centres then took 159 s
instead of about 2).

![time of a judgement against π centres](pictures/scaling.svg)
`)
	for _, f := range scalingFamilies {
		points := all[f.name]
		fmt.Fprintf(&page, "\n## %s%s\n\nFitted exponent of a judgement: **%.2f** (of `EigenSym`: %.2f; of reading the SMILES: %.2f).\n\n", strings.ToUpper(f.name[:1]), f.name[1:],
			exponent(points, func(p scalingPoint) float64 { return p.judge }), exponent(points, func(p scalingPoint) float64 { return p.eigen }), exponent(points, func(p scalingPoint) float64 { return p.reading }))
		page.WriteString("| π centres | reading, ms | judgement, ms | one `EigenSym`, ms | judgement / `EigenSym` |\n|---|---|---|---|---|\n")
		for _, p := range points {
			fmt.Fprintf(&page, "| %d | %.2f | %.2f | %.2f | %.1f |\n", p.centres, 1e3*p.reading, 1e3*p.judge, 1e3*p.eigen, p.ratio)
		}
	}
	docs := filepath.Join("..", "docs")
	if err := os.WriteFile(filepath.Join(docs, "scaling.md"), []byte(page.String()), 0o644); err != nil {
		b.Fatal(err)
	}
	if err := os.WriteFile(filepath.Join(docs, "pictures", "scaling.svg"), []byte(scalingPicture(all)), 0o644); err != nil {
		b.Fatal(err)
	}
}

// scalingPicture draws time against centres, both on logarithmic axes, with a line of
// slope three for the eye.
func scalingPicture(all map[string][]scalingPoint) string {
	const width, height, left, top = 560.0, 380.0, 70.0, 20.0
	x := func(n float64) float64 { return left + math.Log10(n/8)/math.Log10(1250.0/8)*(width-left-20) }
	y := func(s float64) float64 { return top + (1-math.Log10(s/1e-5)/6.5)*(height-top-50) }
	var b strings.Builder
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 %g %g" font-family="sans-serif" font-size="12"><rect width="100%%" height="100%%" fill="#fff"/>`+"\n", width, height)
	for _, n := range []float64{10, 30, 100, 300, 1000} {
		fmt.Fprintf(&b, `<path d="M%.1f %.1fV%.1f" stroke="#ddd"/><text x="%.1f" y="%.1f" text-anchor="middle">%g</text>`+"\n", x(n), top, height-50, x(n), height-32, n)
	}
	for k, label := range []string{"10 µs", "0.1 ms", "1 ms", "10 ms", "0.1 s", "1 s", "10 s"} {
		v := y(1e-5 * math.Pow(10, float64(k)))
		fmt.Fprintf(&b, `<path d="M%.1f %.1fH%.1f" stroke="#ddd"/><text x="%.1f" y="%.1f" text-anchor="end">%s</text>`+"\n", left, v, width-20, left-6, v+4, label)
	}
	fmt.Fprintf(&b, `<text x="%.1f" y="%.1f" text-anchor="middle">π centres</text>`+"\n", (left+width-20)/2, height-12)
	fmt.Fprintf(&b, `<path d="M%.1f %.1fL%.1f %.1f" stroke="#888" stroke-dasharray="5 4"/><text x="%.1f" y="%.1f" fill="#666">slope 3</text>`+"\n", x(100), y(2e-3), x(1000), y(2), x(640)+8, y(0.5)+22)
	shapes := map[string]string{"polyenes": "#0072b2", "acenes": "#d55e00", "graphene flakes": "#009e73"}
	for k, f := range scalingFamilies {
		var line []string
		colour := shapes[f.name]
		for _, p := range all[f.name] {
			px, py := x(float64(p.centres)), y(p.judge)
			line = append(line, fmt.Sprintf("%.1f,%.1f", px, py))
			switch k {
			case 0:
				fmt.Fprintf(&b, `<circle cx="%.1f" cy="%.1f" r="4" fill="%s"/>`+"\n", px, py, colour)
			case 1:
				fmt.Fprintf(&b, `<rect x="%.1f" y="%.1f" width="8" height="8" fill="%s"/>`+"\n", px-4, py-4, colour)
			default:
				fmt.Fprintf(&b, `<path d="M%.1f %.1fl5 9h-10z" fill="%s"/>`+"\n", px, py-5, colour)
			}
		}
		fmt.Fprintf(&b, `<polyline points="%s" fill="none" stroke="%s"/>`+"\n", strings.Join(line, " "), colour)
		fmt.Fprintf(&b, `<text x="%.1f" y="%.1f" fill="%s">%s %s</text>`+"\n", left+14, top+18+16*float64(k), colour, []string{"●", "■", "▲"}[k], f.name)
	}
	b.WriteString("</svg>\n")
	return b.String()
}

// An acene written for any length is the acene: n rings of six, and the canonical string of
// naphthalene and pentacene.
func TestAceneSMILES(t *testing.T) {
	for n, want := range map[int]string{1: "c1ccccc1", 2: "c1ccc2ccccc2c1", 5: "c1ccc2cc3cc4cc5ccccc5cc4cc3cc2c1"} {
		m, err := molecule.ParseSMILES(aceneSMILES(n))
		if err != nil {
			t.Fatal(err)
		}
		known, err := molecule.ParseSMILES(want)
		if err != nil {
			t.Fatal(err)
		}
		if !m.SameConstitution(known) {
			t.Errorf("%d rings: %s", n, m.FlatSMILES())
		}
	}
	m, err := molecule.ParseSMILES(aceneSMILES(249))
	if err != nil {
		t.Fatal(err)
	}
	if len(m.Atoms) != 998 || len(m.Rings()) != 249 {
		t.Errorf("%d atoms, %d rings", len(m.Atoms), len(m.Rings()))
	}
}
