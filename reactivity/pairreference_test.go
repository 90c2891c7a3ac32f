package reactivity

import (
	"encoding/csv"
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"strconv"
	"strings"
	"testing"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
)

// reference is a row of testdata/cycloadditions.csv: published orientations of
// cycloadditions, each with its source in the file.
type reference struct {
	class, name    string
	a, b           *molecule.Molecule
	major          [2][2]int
	ratio          string
	share          float64 // of the major isomer, NaN where the source gives words only
	lewis          bool
	status, source string
}

func references(t *testing.T) []reference {
	t.Helper()
	rows := readTable(t, "../testdata/cycloadditions.csv")
	var list []reference
	for _, r := range rows {
		a, b := mustParse(t, r["component_A_mapped"]), mustParse(t, r["component_B_mapped"])
		x := reference{class: r["class"], name: r["name"], a: a, b: b, ratio: r["ratio_major_minor"], status: r["source_status"], source: r["source"], share: math.NaN()}
		for k, p := range strings.Split(r["bonds_major"], ";") {
			i, j, _ := strings.Cut(p, "-")
			ni, _ := strconv.Atoi(i)
			nj, _ := strconv.Atoi(j)
			x.major[k] = [2]int{a.AtomByMap(ni), b.AtomByMap(nj)}
		}
		var p, q float64
		if n, _ := fmt.Sscanf(strings.TrimPrefix(strings.TrimPrefix(x.ratio, "about "), "> "), "%f:%f", &p, &q); n == 2 {
			x.share = p / (p + q)
		}
		text := r["name"] + " " + r["conditions"]
		for _, acid := range []string{"AlCl3", "SnCl4", "ZnCl2"} {
			x.lewis = x.lewis || strings.Contains(text, acid)
		}
		list = append(list, x)
	}
	return list
}

func readTable(t *testing.T, file string) []map[string]string {
	t.Helper()
	f, err := os.Open(file)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var list []map[string]string
	for _, r := range rows[1:] {
		m := map[string]string{}
		for k, h := range rows[0] {
			m[h] = r[k]
		}
		list = append(list, m)
	}
	return list
}

func mustParse(t *testing.T, smiles string) *molecule.Molecule {
	t.Helper()
	m, err := molecule.ParseSMILES(smiles)
	if err != nil {
		t.Fatalf("%s: %v", smiles, err)
	}
	return m
}

// nearEven is the share of the major isomer below which a row is no test of
// orientation: it is near 50:50.
const nearEven = 0.56

// orientationScore is 1 where the recorded orientation has the lower ΔE, ½ in a tie
// within 1e-9, 0 otherwise.
func orientationScore(p *PairJudgement, major [2][2]int) (score, margin float64, ok bool) {
	ad, ok := p.Find(major)
	if !ok {
		return 0, 0, false
	}
	for k := range p.Adducts {
		x := &p.Adducts[k]
		if x.Joining == ad.Joining && x.Bonds != ad.Bonds {
			d := x.DeltaE - ad.DeltaE
			switch {
			case d > 1e-9:
				return 1, d, true
			case d > -1e-9:
				return 0.5, d, true
			}
			return 0, d, true
		}
	}
	return 0.5, 0, true
}

// TestReferenceOrientations asks of the published cycloadditions whether the first
// bond of least ΔE gives the recorded orientation. The sources of the rows stand in
// the file; the thresholds are the project's own.
func TestReferenceOrientations(t *testing.T) {
	for _, set := range frontier.Sets() {
		s, err := frontier.Load(set)
		if err != nil {
			t.Fatal(err)
		}
		hits, n, first := map[string]float64{}, map[string]float64{}, map[string]float64{}
		for _, r := range references(t) {
			if !math.IsNaN(r.share) && r.share < nearEven || r.class == "[2+2]" {
				continue
			}
			p, err := Pair(r.a, r.b, PairConditions{Set: s, NoProducts: true, LewisAcid: r.lewis})
			if err != nil {
				t.Errorf("%s: %v", r.name, err)
				continue
			}
			score, margin, ok := orientationScore(p, r.major)
			if !ok {
				t.Errorf("%s: the recorded adduct is not among those listed", r.name)
				continue
			}
			class := "dipolar"
			if r.class != "1,3-dipolar" {
				class = "Diels–Alder"
			}
			hits[class] += score
			n[class]++
			if ad, ok := p.Find(r.major); ok && ad.Rank == 1 {
				first[class]++
			}
			if score < 1 {
				t.Logf("%s: %.1f %s (%s) %s margin %.4f", set, score, r.name, r.ratio, r.class, margin)
			}
		}
		for class, least := range map[string]float64{"Diels–Alder": 0.85, "dipolar": 0.75} {
			rate := hits[class] / n[class]
			low, high := wilson(hits[class], n[class])
			t.Logf("%s, %s: %.1f of %.0f, %.3f, 95 %% limits %.3f to %.3f; %.0f first in rank", set, class, hits[class], n[class], rate, low, high, first[class])
			if rate < least {
				t.Errorf("%s: %.1f of %.0f right, %.2f wanted", class, hits[class], n[class], least)
			}
		}
	}
}

// wilson gives the 95 % score interval of a proportion (E. B. Wilson, J. Am. Stat.
// Assoc. 1927, 22, 209).
func wilson(hits, n float64) (low, high float64) {
	const z = 1.959964
	p := hits / n
	middle := p + z*z/(2*n)
	half := z * math.Sqrt(p*(1-p)/n+z*z/(4*n*n))
	return (middle - half) / (1 + z*z/n), (middle + half) / (1 + z*z/n)
}

// shuffled renumbers a molecule at random and says where each atom went.
func shuffled(m *molecule.Molecule, r *rand.Rand) (*molecule.Molecule, []int) {
	perm := r.Perm(len(m.Atoms))
	return m.Renumber(perm), perm
}
