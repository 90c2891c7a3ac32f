package frontier

import (
	"errors"
	"flag"
	"fmt"
	"math"
	"os"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "rewrite the tables of docs/worked-orbitals.md")

// The tables of docs/worked-orbitals.md are the output of this file: each fenced block
// after a line "<!-- table: NAME -->" has to be what worked()[NAME] computes now.
func TestWorkedOrbitals(t *testing.T) {
	const path = "../docs/worked-orbitals.md"
	text, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	doc := string(text)
	for name, table := range worked(t) {
		marker := "<!-- table: " + name + " -->\n```\n"
		at := strings.Index(doc, marker)
		if at < 0 {
			t.Errorf("%s has no table %q", path, name)
			continue
		}
		at += len(marker)
		end := strings.Index(doc[at:], "```")
		if end < 0 {
			t.Fatalf("table %q does not end", name)
		}
		if doc[at:at+end] == table {
			continue
		}
		if *update {
			doc = doc[:at] + table + doc[at+end:]
			continue
		}
		t.Errorf("%s, table %q\n has:\n%s\nwant:\n%s", path, name, doc[at:at+end], table)
	}
	if *update && doc != string(text) {
		if err := os.WriteFile(path, []byte(doc), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}

func worked(t *testing.T) map[string]string {
	return map[string]string{
		"ethene and butadiene": workedChains(t),
		"benzene":              workedBenzene(t),
		"saturated":            workedSaturated(t),
		"polyenes":             workedPolyenes(t),
		"alternation":          workedAlternation(t),
		"thermal":              workedThermal(),
	}
}

func tidy(x float64) float64 { return math.Round(x*1e4)/1e4 + 0 }

// Textbook facts asserted beside the tables: a polyene level j has j−1 nodes, and
// butadiene lies 0.472 |β| below two ethenes (common to all textbooks).
func workedChains(t *testing.T) string {
	set := mustLoad(t, DefaultSet)
	var b strings.Builder
	energies := map[string]float64{}
	for _, m := range []struct{ name, smiles string }{{"ethene", "C=C"}, {"buta-1,3-diene", "C=CC=C"}} {
		o := mustSolve(t, set, m.smiles).Systems[0]
		energies[m.name] = o.Energy
		fmt.Fprintf(&b, "%s (%s)\n level        x  electrons  nodes  coefficients\n", m.name, m.smiles)
		path := make([]int, o.N)
		for i := range path {
			path[i] = i
		}
		for j := range o.X {
			nodes := nodesAlong(o, j, path)
			if nodes != j {
				t.Errorf("%s: level %d has %d nodes, want %d", m.name, j+1, nodes, j)
			}
			fmt.Fprintf(&b, " %5d  %7.4f  %9g  %5d ", j+1, tidy(o.X[j]), o.Occupation[j], nodes)
			for r := 0; r < o.N; r++ {
				fmt.Fprintf(&b, " %7.4f", tidy(o.Coefficient(r, j)))
			}
			b.WriteString("\n")
		}
		fmt.Fprintf(&b, " E_π = %gα + %.4fβ\n", o.Electrons, o.Energy)
	}
	extra := energies["buta-1,3-diene"] - 2*energies["ethene"]
	if math.Abs(extra-0.472) > 0.0005 {
		t.Errorf("butadiene lies %.4f below two ethenes, textbooks have 0.472", extra)
	}
	fmt.Fprintf(&b, "butadiene against two ethenes: %.4f |β| lower\n", extra)
	return b.String()
}

// nodesAlong counts the sign changes of level j along the given path of centres: the
// nodes of a polyene orbital. Coefficients below 1e-9 count as lying on a node of their
// own, between a sign and the next.
func nodesAlong(o *Orbitals, j int, path []int) int {
	nodes, last := 0, 0.0
	for _, r := range path {
		c := o.Coefficient(r, j)
		if math.Abs(c) < 1e-9 {
			continue
		}
		if last*c < 0 {
			nodes++
		}
		last = c
	}
	return nodes
}

func workedBenzene(t *testing.T) string {
	set := mustLoad(t, DefaultSet)
	sol := mustSolve(t, set, "c1ccccc1")
	o := sol.Systems[0]
	var b strings.Builder
	b.WriteString(" shell  levels        x  electrons\n")
	for j, k := 0, 1; j < o.N; k++ {
		to := o.shellEnd(j)
		fmt.Fprintf(&b, " %5d  %6d  %7.4f  %9g\n", k, to-j, tidy(o.X[j]), o.Occupation[j]*float64(to-j))
		j = to
	}
	// Bond order 2/3, free valence √3 − 4/3, delocalization 2 |β|: closed forms.
	p, f := o.BondOrder(0, 1), o.FreeValences(sol.Matrices[0].Links)[0]
	if !near(p, 2.0/3) || !near(f, math.Sqrt(3)-4.0/3) || !near(o.Energy, 8) {
		t.Errorf("benzene: bond order %g, free valence %g, energy %g", p, f, o.Energy)
	}
	self, ok := o.SelfPolarizabilities()
	if !ok {
		t.Fatal("benzene is a closed shell")
	}
	fmt.Fprintf(&b, "E_π = 6α + %.4fβ, %.4f |β| below three ethenes\n", o.Energy, o.Energy-6)
	fmt.Fprintf(&b, "population %.4f, bond order %.4f, free valence %.4f, self-polarizability %.4f / |β|\n",
		o.Populations()[0], p, f, self[0])
	return b.String()
}

func workedSaturated(t *testing.T) string {
	_, err := Perceive(mustParse(t, "CCCCCC"), Options{})
	if !errors.Is(err, ErrNoPi) {
		t.Errorf("hexane: %v", err)
	}
	return fmt.Sprintf("CCCCCC: %v\n", err)
}

// Absorption maxima in nm of all-trans polyenes, first strong band in hydrocarbon
// solvent or vapour: textbook values, from memory, ±5 nm.
var polyenes = []struct {
	name, smiles string
	atoms        int
	nm           float64
}{
	{"ethene", "C=C", 2, 165},
	{"butadiene", "C=CC=C", 4, 217},
	{"hexatriene", "C=CC=CC=C", 6, 258},
	{"octatetraene", "C=CC=CC=CC=C", 8, 304},
	{"decapentaene", "C=CC=CC=CC=CC=C", 10, 334},
	{"lycopene", "CC(C)=CCCC(C)=CC=CC(C)=CC=CC(C)=CC=CC=C(C)C=CC=C(C)C=CC=C(C)CCC=C(C)C", 22, 472},
	{"β-carotene", "CC1=C(C=CC(C)=CC=CC(C)=CC=CC=C(C)C=CC=C(C)C=CC2=C(C)CCCC2(C)C)C(C)(C)CCC1", 22, 450},
}

// electronvoltNanometre is hc, in eV nm (CODATA).
const electronvoltNanometre = 1239.842

// spectroscopicBeta is |β| in eV from p bands of benzenoid hydrocarbons against their
// Hückel gap (regression over 13 of them, r = 0.987; values from memory).
const spectroscopicBeta = 2.37

func workedPolyenes(t *testing.T) string {
	set := mustLoad(t, DefaultSet)
	var b strings.Builder
	b.WriteString(" molecule      conjugated  equal-β gap  with alkyl  2.37 eV × gap  measured   measured\n")
	b.WriteString("                    atoms          |β|         |β|           (eV)      (nm)       (eV)\n")
	for _, m := range polyenes {
		sol := mustSolve(t, set, m.smiles)
		// the longest system, and the bare chain of its real centres
		best := 0
		count := func(s int) int {
			n := 0
			for _, c := range sol.Pi.Systems[s] {
				if !sol.Pi.Centres[c].Alkyl {
					n++
				}
			}
			return n
		}
		for s := range sol.Systems {
			if count(s) > count(best) {
				best = s
			}
		}
		n := count(best)
		if n != m.atoms {
			t.Errorf("%s: %d conjugated atoms, want %d", m.name, n, m.atoms)
		}
		h := make([]float64, 0, n*n)
		mx := sol.Matrices[best]
		for i := 0; i < mx.N; i++ {
			for j := 0; j < mx.N; j++ {
				if !sol.Pi.Centres[mx.Centres[i]].Alkyl && !sol.Pi.Centres[mx.Centres[j]].Alkyl {
					h = append(h, mx.H[i*mx.N+j])
				}
			}
		}
		bare, err := Solve(n, h, float64(n))
		if err != nil {
			t.Fatal(err)
		}
		gap, _ := bare.Gap()
		if want := 4 * math.Sin(math.Pi/float64(2*n+2)); !near(gap, want) {
			t.Errorf("%s: gap %g, a chain of %d atoms has %g", m.name, gap, n, want)
		}
		alkyl, _ := sol.Systems[best].Gap()
		measured := electronvoltNanometre / m.nm
		if n == 22 {
			if math.Abs(gap-0.27) > 0.005 {
				t.Errorf("%s: equal-β gap %.4f, want 0.27", m.name, gap)
			}
			if spectroscopicBeta*gap > measured/3 {
				t.Errorf("%s: the equal-β gap no longer lies far below the measured absorption", m.name)
			}
		}
		fmt.Fprintf(&b, " %s%s  %10d  %11.4f  %10.4f  %13.2f  %8.0f  %9.2f\n", m.name, strings.Repeat(" ", 12-len([]rune(m.name))),
			n, gap, alkyl, spectroscopicBeta*gap, m.nm, measured)
	}
	return b.String()
}

// alternating is the gap of a chain of n atoms with k = 1 on double and k = r on single
// bonds.
func alternating(t *testing.T, n int, r float64) float64 {
	h := make([]float64, n*n)
	for i := 1; i < n; i++ {
		k := 1.0
		if i%2 == 0 {
			k = r
		}
		h[(i-1)*n+i], h[i*n+i-1] = k, k
	}
	o, err := Solve(n, h, float64(n))
	if err != nil {
		t.Fatal(err)
	}
	gap, _ := o.Gap()
	return gap
}

// workedAlternation fits |β| of double bonds and the ratio of single to double to the
// measured bands, against equal β for all bonds.
func workedAlternation(t *testing.T) string {
	fit := func(r float64) (beta, rms float64) {
		var eg, gg float64
		gaps := make([]float64, len(polyenes))
		for i, m := range polyenes {
			gaps[i] = alternating(t, m.atoms, r)
			eg += electronvoltNanometre / m.nm * gaps[i]
			gg += gaps[i] * gaps[i]
		}
		beta = eg / gg
		for i, m := range polyenes {
			d := electronvoltNanometre/m.nm - beta*gaps[i]
			rms += d * d
		}
		return beta, math.Sqrt(rms / float64(len(polyenes)))
	}
	best, bestRMS := 1.0, math.Inf(1)
	for i := 0; i <= 120; i++ {
		r := 0.40 + 0.005*float64(i)
		if _, rms := fit(r); rms < bestRMS-1e-12 {
			best, bestRMS = r, rms
		}
	}
	beta, rms := fit(best)
	equalBeta, equalRMS := fit(1)
	if best > 0.85 || rms > equalRMS/2 {
		t.Errorf("alternation r = %.3f lowers the deviation from %.2f to %.2f eV only", best, equalRMS, rms)
	}
	var b strings.Builder
	fmt.Fprintf(&b, "equal β:      |β| = %.2f eV, root mean square deviation %.2f eV, limit of a long chain 0 eV\n", equalBeta, equalRMS)
	fmt.Fprintf(&b, "alternating:  |β| = %.2f eV on double bonds, %.3f of it on single bonds,\n", beta, best)
	fmt.Fprintf(&b, "              root mean square deviation %.2f eV, limit of a long chain 2|β|(1 − %.3f) = %.2f eV\n", rms, best, 2*beta*(1-best))
	for _, n := range []int{22, 100, 400} {
		fmt.Fprintf(&b, "gap of %4d atoms: equal β %.4f eV, alternating %.2f eV\n", n, equalBeta*4*math.Sin(math.Pi/float64(2*n+2)), beta*alternating(t, n, best))
	}
	return b.String()
}

// workedThermal finds the equal-β chain whose gap is kT: 4|β| sin(π/(2N+2)) = kT.
func workedThermal() string {
	const boltzmann = 8.617333262e-5 // eV/K (CODATA)
	var b strings.Builder
	for _, kelvin := range []float64{298.15, 77} {
		kT := boltzmann * kelvin
		n := 2
		for spectroscopicBeta*4*math.Sin(math.Pi/float64(2*n+2)) > kT {
			n += 2
		}
		fmt.Fprintf(&b, "T = %6.2f K: kT = %.4f eV = %.5f |β|; the gap falls below it at %d atoms (2π|β|/kT = %.0f)\n",
			kelvin, kT, kT/spectroscopicBeta, n, 2*math.Pi*spectroscopicBeta/kT)
	}
	return b.String()
}
