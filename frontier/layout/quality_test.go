package layout

import (
	"encoding/csv"
	"fmt"
	"hash/fnv"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"time"

	"lobecast/frontier/molecule"
)

// outcomes is the folder of published reactions, whose molecules measure the drawings.
const outcomes = "../../testdata/outcomes"

// sample takes n different molecules from the outcome files, chosen by a hash of
// their SMILES.
func sample(t testing.TB, n int) []string {
	t.Helper()
	files, err := filepath.Glob(outcomes + "/*.csv")
	if err != nil || len(files) == 0 {
		t.Fatalf("no outcome files in %s (%v)", outcomes, err)
	}
	slices.Sort(files)
	seen := map[string]bool{}
	var all []string
	add := func(s string) {
		if s != "" && !seen[s] && !strings.Contains(s, ".") {
			seen[s] = true
			all = append(all, s)
		}
	}
	for _, name := range files {
		f, err := os.Open(name)
		if err != nil {
			t.Fatal(err)
		}
		rows, err := csv.NewReader(f).ReadAll()
		f.Close()
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		for column, head := range rows[0] {
			for _, row := range rows[1:] {
				switch {
				case strings.HasSuffix(head, "_smiles"):
					add(row[column])
				case head == "reaction":
					roles := strings.Split(row[column], ">")
					for _, s := range strings.Split(roles[0], ".") {
						add(s)
					}
					add(roles[len(roles)-1])
				}
			}
		}
	}
	hash := func(s string) uint64 {
		h := fnv.New64a()
		h.Write([]byte(s))
		return h.Sum64()
	}
	slices.SortFunc(all, func(a, b string) int {
		if x, y := hash(a), hash(b); x != y {
			if x < y {
				return -1
			}
			return 1
		}
		return strings.Compare(a, b)
	})
	if len(all) < n {
		t.Fatalf("%d molecules in %s, want %d", len(all), outcomes, n)
	}
	return all[:n]
}

// hasBridge reports whether two rings of m share more than one bond, so that the
// usual drawing needs bonds that cross.
func hasBridge(m *molecule.Molecule) bool {
	for _, b := range findBlocks(m) {
		if b.bridged(m) {
			return true
		}
	}
	return false
}

// quality measures how well a drawing reads.
type quality struct {
	// Stretch is the longest bond divided by the shortest.
	Stretch float64
	// Nearest is the smallest distance of two atoms of one component that are not
	// bonded, in mean bond lengths.
	Nearest float64
	// Crossings counts pairs of bonds that cut each other.
	Crossings int
	// Wrong counts double bonds drawn against their stated geometry.
	Wrong int
}

// quality measures the drawing.
func (d *Drawing) quality() quality {
	m := d.Molecule
	q := quality{Stretch: 1, Nearest: math.Inf(1)}
	short, long, sum := math.Inf(1), 0.0, 0.0
	for i := range m.Bonds {
		l := distance(d.At[m.Bonds[i].A], d.At[m.Bonds[i].B])
		short, long, sum = math.Min(short, l), math.Max(long, l), sum+l
	}
	if len(m.Bonds) > 0 {
		q.Stretch = long / short
		mean := sum / float64(len(m.Bonds))
		for a := range d.At {
			for c := range a {
				if m.BondBetween(a, c) < 0 {
					q.Nearest = math.Min(q.Nearest, distance(d.At[a], d.At[c])/mean)
				}
			}
		}
	}
	for i := range m.Bonds {
		p := &m.Bonds[i]
		for j := range i {
			r := &m.Bonds[j]
			if p.A != r.A && p.A != r.B && p.B != r.A && p.B != r.B &&
				segmentsCross(d.At[p.A], d.At[p.B], d.At[r.A], d.At[r.B]) {
				q.Crossings++
			}
		}
		if p.Order == 2 && p.Geometry != molecule.NoGeometry &&
			sameSide(d.At, p.A, p.B, p.RefA, p.RefB) != (p.Geometry == molecule.Together) {
			q.Wrong++
		}
	}
	return q
}

// The figures this prints (go test ./frontier/layout -run Quality -v) are those of
// docs: how many of 1000 molecules from the outcome files are drawn well.
func TestQualityOverThousandMolecules(t *testing.T) {
	const (
		n           = 1000
		share       = 0.97 // wanted of each figure
		stretch     = 1.10 // longest bond over shortest
		nearest     = 0.5  // of a bond
		medianLimit = 5 * time.Millisecond
	)
	var even, apart, plain, unbridged, wrong int
	var times []time.Duration
	type poor struct {
		bad    float64
		smiles string
		q      quality
	}
	var worst []poor
	for _, smiles := range sample(t, n) {
		m := read(t, smiles)
		start := time.Now()
		d := Compute(m)
		times = append(times, time.Since(start))
		q := d.quality()
		if q.Stretch <= stretch {
			even++
		}
		if q.Nearest >= nearest {
			apart++
		}
		if !hasBridge(m) {
			unbridged++
			if q.Crossings == 0 {
				plain++
			}
		}
		wrong += q.Wrong
		worst = append(worst, poor{5*max(0, q.Stretch-stretch) + 5*max(0, 0.8-q.Nearest) + float64(q.Crossings), smiles, q})
	}
	slices.Sort(times)
	fraction := func(k, of int) float64 { return float64(k) / float64(of) }
	t.Logf("bonds within 10 %% of each other: %.1f %%", 100*fraction(even, n))
	t.Logf("no two atoms nearer than half a bond: %.1f %%", 100*fraction(apart, n))
	t.Logf("no crossing bonds: %.1f %% of %d without bridged rings", 100*fraction(plain, unbridged), unbridged)
	t.Logf("time a molecule: median %v, 99th of a hundred %v, longest %v", times[n/2], times[n*99/100], times[n-1])
	slices.SortStableFunc(worst, func(a, b poor) int {
		if a.bad > b.bad {
			return -1
		} else if a.bad < b.bad {
			return 1
		}
		return 0
	})
	for _, w := range worst[:20] {
		t.Log(fmt.Sprintf("stretch %.2f nearest %.2f crossings %d  %s", w.q.Stretch, w.q.Nearest, w.q.Crossings, w.smiles))
	}
	if fraction(even, n) < share || fraction(apart, n) < share || fraction(plain, unbridged) < share {
		t.Errorf("fewer than %.0f %% drawn well", 100*share)
	}
	if wrong > 0 {
		t.Errorf("%d double bonds drawn against their stated geometry", wrong)
	}
	if times[n/2] > medianLimit {
		t.Errorf("median time %v, want under %v", times[n/2], medianLimit)
	}
}
