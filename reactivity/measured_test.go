package reactivity

import (
	"flag"
	"fmt"
	"math"
	"os"
	"slices"
	"sort"
	"strconv"
	"strings"
	"testing"

	"gonum.org/v1/gonum/stat"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// writeChecks makes the tests rewrite their tables in docs/published-checks.md:
//
//	go test ./reactivity -run 'Measured|Textbook' -write-checks
var writeChecks = flag.Bool("write-checks", false, "rewrite the tables of docs/published-checks.md")

const checksFile = "../docs/published-checks.md"

// document compares a table with the one between its marks in docs/published-checks.md,
// so that what is printed there is what the code gives.
func document(t *testing.T, mark, text string) {
	t.Helper()
	t.Log("\n" + text)
	data, err := os.ReadFile(checksFile)
	if err != nil {
		t.Fatal(err)
	}
	begin, end := "<!-- "+mark+" -->\n", "<!-- end of "+mark+" -->"
	head, rest, ok := strings.Cut(string(data), begin)
	old, tail, ok2 := strings.Cut(rest, end)
	if !ok || !ok2 {
		t.Fatalf("%s has no place marked %q", checksFile, mark)
	}
	if old == text {
		return
	}
	if !*writeChecks {
		t.Errorf("%s does not hold the table computed now: run go test ./reactivity -run 'Measured|Textbook' -write-checks", checksFile)
		return
	}
	if err := os.WriteFile(checksFile, []byte(head+begin+text+end+tail), 0o644); err != nil {
		t.Fatal(err)
	}
}

// compared are the indices put to the test, and the sign that makes larger mean more
// readily attacked.
func compared(toward terms.Toward) map[string]float64 {
	sign := map[string]float64{
		"localization": -1, "frontier_density": 1, "smoothed_density": 1, "superdelocalizability": 1,
		"charge": -1, "free_valence": 1, "self_polarizability": 1, "reactivity_number": -1,
	}
	switch toward {
	case terms.Nucleophile:
		sign["charge"] = 1
	case terms.Radical:
		sign["charge"] = math.NaN() // says nothing of attack by a radical: not compared
	}
	return sign
}

// measuredSite is one row of rate_factors.csv that can be compared: a value per site.
type measuredSite struct {
	group    string // rows of one group were measured together
	reaction string
	value    float64 // logarithm of the rate of one position
	absolute bool    // a partial rate factor, comparable between substrates
	index    [8]float64
}

// measuredValue reads "3-5", "~1" or a plain number.
func measuredValue(s string) (float64, bool) {
	s = strings.TrimPrefix(s, "~")
	if x, err := strconv.ParseFloat(s, 64); err == nil {
		return x, true
	}
	a, b, ok := strings.Cut(s, "-")
	x, err1 := strconv.ParseFloat(a, 64)
	y, err2 := strconv.ParseFloat(b, 64)
	return (x + y) / 2, ok && err1 == nil && err2 == nil
}

// readMeasured turns the rows into sites and lists those left out, with the reason.
func readMeasured(t *testing.T) (sites []measuredSite, left []string) {
	for _, row := range publishedRows(t, "rate_factors.csv") {
		name := row["reaction"] + ", " + row["substrate"] + " " + row["position"]
		unit := row["unit"]
		perSite := strings.HasPrefix(unit, "partial rate factor") || strings.HasPrefix(unit, "ratio (para")
		share := unit == "% of product"
		if !perSite && !share {
			continue // overall rates, reaction constants, ranks: not values of one site
		}
		value, ok := measuredValue(row["value"])
		if !ok {
			left = append(left, name+" ("+row["value"]+")")
			continue
		}
		m, sol := solved(t, row["smiles_site_mapped"])
		atom := m.AtomByMap(1)
		if atom < 0 {
			left = append(left, name+" (site not mapped)")
			continue
		}
		toward := terms.Electrophile
		if strings.HasPrefix(row["reaction"], "homolytic") || strings.HasPrefix(row["reaction"], "OH radical") {
			toward = terms.Radical
		}
		if share {
			// A percentage is of all equivalent positions together.
			classes, like := m.Classes(), 0
			for i := range classes {
				if m.Atoms[i].Element == 6 && classes[i] == classes[atom] {
					like++
				}
			}
			value = math.Max(value, 0.05) / float64(like) // "0" means none was seen
		}
		var w Workspace
		e, err := allIndices(sol, &w)
		if err != nil {
			t.Fatal(err)
		}
		index := e.values(sol.Pi.CentreOf[atom], toward)
		sign := compared(toward)
		for i, n := range IndexNames {
			index[i] *= sign[n]
		}
		sites = append(sites, measuredSite{
			group:    row["reaction"] + "|" + row["substrate"] + "|" + row["conditions"] + "|" + row["source"],
			reaction: row["reaction"], value: math.Log10(value), absolute: strings.HasPrefix(unit, "partial"), index: index,
		})
	}
	return sites, left
}

// TestMeasuredRates orders the sites within one molecule by each index and compares with
// measured partial rate factors and isomer percentages (rate_factors.csv, sources there
// row by row). Nothing is fitted here.
func TestMeasuredRates(t *testing.T) {
	sites, left := readMeasured(t)
	type tally struct{ right, tied, pairs int }
	reactions := []string{}
	byReaction := map[string]*[8]tally{}
	var all [8]tally
	for i, a := range sites {
		if byReaction[a.reaction] == nil {
			byReaction[a.reaction] = new([8]tally)
			reactions = append(reactions, a.reaction)
		}
		for _, b := range sites[i+1:] {
			if a.group != b.group || math.Abs(a.value-b.value) < 1e-9 {
				continue
			}
			for k := range a.index {
				d := (a.index[k] - b.index[k]) * math.Copysign(1, a.value-b.value)
				if math.IsNaN(d) {
					continue
				}
				for _, c := range []*tally{&byReaction[a.reaction][k], &all[k]} {
					c.pairs++
					switch {
					case math.Abs(d) < 1e-9:
						c.tied++
					case d > 0:
						c.right++
					}
				}
			}
		}
	}
	share := func(c tally) string {
		if c.pairs == 0 {
			return "–"
		}
		s := fmt.Sprintf("%d/%d", c.right, c.pairs)
		if c.tied > 0 {
			s += fmt.Sprintf(" (%d tied)", c.tied)
		}
		return s
	}
	var out strings.Builder
	header := func(first string) {
		out.WriteString("| " + first)
		for _, n := range IndexNames {
			out.WriteString(" | " + strings.ReplaceAll(n, "_", " "))
		}
		out.WriteString(" |\n|---" + strings.Repeat("|---", len(IndexNames)) + "|\n")
	}
	out.WriteString("Pairs of sites within one molecule ordered as measured:\n\n")
	header("reaction")
	for _, r := range reactions {
		if byReaction[r][0].pairs == 0 {
			continue
		}
		out.WriteString("| " + r)
		for _, c := range byReaction[r] {
			out.WriteString(" | " + share(c))
		}
		out.WriteString(" |\n")
	}
	out.WriteString("| **all**")
	for _, c := range all {
		out.WriteString(" | **" + share(c) + "**")
	}
	out.WriteString(" |\n\nCorrelation r of each index (signed so that larger means more readily attacked) with log f, all substrates of a reaction with at least five partial rate factors; benzene (log f = 0) included:\n\n")
	header("reaction (n)")
	benzene := benzeneIndices(t)
	for _, r := range reactions {
		n := 0
		for _, s := range sites {
			if s.reaction == r && s.absolute {
				n++
			}
		}
		if n < 5 {
			continue
		}
		fmt.Fprintf(&out, "| %s (%d)", r, n+1)
		for k := range IndexNames {
			x, y := []float64{benzene[k]}, []float64{0}
			for _, s := range sites {
				if s.reaction == r && s.absolute && !math.IsNaN(s.index[k]) {
					x, y = append(x, s.index[k]), append(y, s.value)
				}
			}
			c := stat.Correlation(x, y, nil)
			if len(x) < 5 || math.IsNaN(c) {
				out.WriteString(" | –")
				continue
			}
			fmt.Fprintf(&out, " | %.2f", c)
			if len(x) != n+1 {
				fmt.Fprintf(&out, " (n %d)", len(x))
			}
		}
		out.WriteString(" |\n")
	}
	fmt.Fprintf(&out, "\nRows left out: %s.\n", strings.Join(left, "; "))
	document(t, "measured rates", out.String())

	// Below three pairs in five an index would not be worth printing; a lost sign or a
	// site misread falls below it.
	for _, k := range []int{0, 1, 2, 3} {
		if c := all[k]; 5*c.right < 3*c.pairs {
			t.Errorf("%s orders only %d of %d pairs as measured", IndexNames[k], c.right, c.pairs)
		}
	}
}

// benzeneIndices gives the indices of a position of benzene toward an electrophile.
func benzeneIndices(t *testing.T) [8]float64 {
	_, sol := solved(t, "c1ccccc1")
	var w Workspace
	e, err := allIndices(sol, &w)
	if err != nil {
		t.Fatal(err)
	}
	x := e.values(0, terms.Electrophile)
	sign := compared(terms.Electrophile)
	for i, n := range IndexNames {
		x[i] *= sign[n]
	}
	return x
}

// TestTextbookPositions compares the first site of each index with the position of
// textbooks and reviews (regiochem.csv; species as stated there).
func TestTextbookPositions(t *testing.T) {
	type count struct{ hit, n int }
	events := []string{}
	hits := map[string]*[8]count{}
	misses := map[string][8][]string{}
	var outside []string
	for _, row := range publishedRows(t, "regiochem.csv") {
		m, sol := solved(t, row["mapped_smiles"])
		event := textbookEvent(row["class"], m.Atoms[max(m.AtomByMap(1), 0)].Aromatic)
		name := row["substrate"]
		var list []Candidate
		known := false
		for _, c := range candidates(newView(m), sol.Pi, event) {
			if !c.Ipso {
				list = append(list, c)
				known = known || isMain(m, c.Atoms)
			}
		}
		if !known || len(list) < 2 {
			outside = append(outside, fmt.Sprintf("%s (%s)", name, event))
			continue
		}
		var w Workspace
		e, err := allIndices(sol, &w)
		if err != nil {
			t.Fatal(err)
		}
		sign := compared(event.Toward())
		key := string(event)
		if hits[key] == nil {
			hits[key] = new([8]count)
			events = append(events, key)
		}
		for k, n := range IndexNames {
			best, main := math.Inf(-1), math.Inf(-1)
			absent := false
			for _, c := range list {
				x := e.values(sol.Pi.CentreOf[c.Atoms[0]], event.Toward())[k] * sign[n]
				if math.IsNaN(x) {
					absent = true
				}
				if isMain(m, c.Atoms) {
					main = math.Max(main, x)
				} else {
					best = math.Max(best, x)
				}
			}
			if absent {
				continue
			}
			h := &hits[key][k]
			h.n++
			if main > best+1e-9 {
				h.hit++
			} else {
				l, missed := misses[key], name
				if math.Abs(best-main) <= 1e-9 {
					missed += " (tie)"
				}
				l[k] = append(l[k], missed)
				misses[key] = l
			}
		}
	}
	var out strings.Builder
	out.WriteString("| event")
	for _, n := range IndexNames {
		out.WriteString(" | " + strings.ReplaceAll(n, "_", " "))
	}
	out.WriteString(" |\n|---" + strings.Repeat("|---", len(IndexNames)) + "|\n")
	sort.Strings(events)
	for _, ev := range events {
		out.WriteString("| " + ev)
		for _, c := range hits[ev] {
			if c.n == 0 {
				out.WriteString(" | –")
			} else {
				fmt.Fprintf(&out, " | %d/%d", c.hit, c.n)
			}
		}
		out.WriteString(" |\n")
	}
	out.WriteString("\nMisses of the indices that rank or are fitted (a tie counts as a miss):\n\n")
	for _, ev := range events {
		for _, k := range []int{0, 1, 2, 3} {
			if l := misses[ev][k]; len(l) > 0 {
				fmt.Fprintf(&out, "- %s, %s (%d): %s.\n", ev, strings.ReplaceAll(IndexNames[k], "_", " "), len(l), strings.Join(l, "; "))
			}
		}
	}
	fmt.Fprintf(&out, "\nNot compared, the stated position not being a candidate of the event, or the only one (%d): %s.\n", len(outside), strings.Join(outside, "; "))
	document(t, "textbook positions", out.String())
	for _, ev := range []terms.Event{terms.ElectrophilicSubstitution, terms.NucleophilicSubstitution} {
		h := hits[string(ev)]
		if h == nil || 2*h[0].hit < h[0].n {
			t.Errorf("%s: localization energy finds the textbook position in less than half of the cases", ev)
		}
	}
}

// textbookEvent is the event of a class of regiochem.csv.
func textbookEvent(class string, aromatic bool) terms.Event {
	switch {
	case class == "EAS":
		return terms.ElectrophilicSubstitution
	case strings.HasPrefix(class, "SNAr"):
		return terms.NucleophilicSubstitution
	case class == "radical" && aromatic:
		return terms.RadicalSubstitution
	case class == "radical":
		return terms.RadicalAddition
	}
	return terms.NucleophilicAddition
}

// isMain reports whether an atom of the set carries map number 1.
func isMain(m *molecule.Molecule, atoms []int) bool {
	return slices.ContainsFunc(atoms, func(a int) bool { return m.Atoms[a].Map == 1 })
}
