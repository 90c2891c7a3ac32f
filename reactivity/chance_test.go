package reactivity

import (
	"fmt"
	"math"
	"math/rand/v2"
	"reflect"
	"slices"
	"strings"
	"testing"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

var judgedMolecules = []string{
	"c1ccc2ccccc2c1", "Nc1ccccc1", "COc1ccccc1C(C)=O", "c1ccc2[nH]ccc2c1", "c1ccc2ncccc2c1", "Cc1cc[nH]n1", "c1cn[nH]c1",
	"Clc1ccnc(Cl)n1", "Fc1ccc(Cl)nc1", "O=[N+]([O-])c1cc(F)c(F)cc1F", "c1cnccn1", "CN(C)c1ccc(N(C)C)cc1",
	"COc1cc2ncnc(Nc3ccc(F)c(Cl)c3)c2cc1OCCCN1CCOCC1", "C[N+](C)(C)c1ccccc1", "c1ccsc1", "FC(F)(F)c1ccccc1", "O=c1cc[nH]cc1",
	"Cc1ccc(S(=O)(=O)n2cccc2)cc1", "Cc1[nH]cnc1C", "Clc1nc(Cl)nc(Cl)n1",
}

func judgeOf(t *testing.T, m *molecule.Molecule, c Conditions) *Judgement {
	t.Helper()
	j, err := Judge(m, c, nil)
	if err != nil {
		t.Fatal(err)
	}
	return j
}

// TestChancesAreProbabilities checks that chances of an event add up to one, that limits
// enclose them, and that sites stand in their order.
func TestChancesAreProbabilities(t *testing.T) {
	for _, s := range judgedMolecules {
		for _, medium := range terms.Media {
			for _, a := range judgeOf(t, mustParse(t, s), Conditions{Medium: medium}).Attacks {
				if a.ChanceAbsent != "" {
					if a.Call != terms.Open {
						t.Errorf("%s, %s: call %s without chances", s, a.Event, a.Call)
					}
					continue
				}
				sum, last := 0.0, 2.0
				for _, x := range a.Sites {
					p := *x.Chance
					sum += p
					if p > last+rankTolerance {
						t.Errorf("%s, %s: sites out of order", s, a.Event)
					}
					last = p
					if l := *x.Limits; !(l[0] <= p && p <= l[1] && l[0] >= 0 && l[1] <= 1) {
						t.Errorf("%s, %s: chance %.4f outside its limits %v", s, a.Event, p, l)
					}
				}
				if math.Abs(sum-1) > 1e-9 {
					t.Errorf("%s, %s: chances add up to %.12f", s, a.Event, sum)
				}
			}
		}
	}
}

// TestJudgeInvariance renumbers molecules at random: every set of equivalent atoms keeps
// its chance, its limits and its indices.
func TestJudgeInvariance(t *testing.T) {
	random := rand.New(rand.NewPCG(4, 2))
	for _, s := range judgedMolecules {
		m := mustParse(t, s)
		want := judgeOf(t, m, Conditions{})
		for range 3 {
			perm := random.Perm(len(m.Atoms))
			r := m.Renumber(perm)
			at := renumbering(t, m, r, perm)
			got := judgeOf(t, r, Conditions{})
			if len(got.Attacks) != len(want.Attacks) {
				t.Fatalf("%s: %d events, renumbered %d", s, len(want.Attacks), len(got.Attacks))
			}
			for k, a := range want.Attacks {
				for _, x := range append(slices.Clone(a.Sites), a.Ipso...) {
					var atoms []int
					for _, i := range x.Atoms {
						atoms = append(atoms, at[i])
					}
					slices.Sort(atoms)
					found := false
					for _, y := range append(slices.Clone(got.Attacks[k].Sites), got.Attacks[k].Ipso...) {
						if slices.Equal(y.Atoms, atoms) {
							found = true
							compareSites(t, s, a.Event, &x, &y)
						}
					}
					if !found {
						t.Errorf("%s, %s: atoms %v are no set after renumbering", s, a.Event, x.Atoms)
					}
				}
			}
		}
	}
}

// renumbering maps atoms of m to those of its renumbered copy, whichever way the
// permutation is meant, by the numbers the atoms keep.
func renumbering(t *testing.T, m, r *molecule.Molecule, perm []int) []int {
	t.Helper()
	for _, forward := range []bool{true, false} {
		at := make([]int, len(perm))
		for i, p := range perm {
			if forward {
				at[i] = p
			} else {
				at[p] = i
			}
		}
		ok := true
		for _, b := range m.Bonds {
			ok = ok && r.BondBetween(at[b.A], at[b.B]) >= 0
		}
		for i := range m.Atoms {
			ok = ok && m.Atoms[i].Element == r.Atoms[at[i]].Element
		}
		if ok {
			return at
		}
	}
	t.Fatal("the renumbered molecule is another one")
	return nil
}

func compareSites(t *testing.T, s string, e terms.Event, x, y *Site) {
	t.Helper()
	if (x.Chance == nil) != (y.Chance == nil) || x.Chance != nil && math.Abs(*x.Chance-*y.Chance) > 1e-7 {
		t.Errorf("%s, %s, atoms %v: chances differ after renumbering", s, e, x.Atoms)
	}
	if x.Limits != nil && y.Limits != nil && math.Abs(x.Limits[0]-y.Limits[0]) > 1e-6 {
		t.Errorf("%s, %s, atoms %v: limits %v and %v", s, e, x.Atoms, *x.Limits, *y.Limits)
	}
	for _, name := range IndexNames {
		if a, b := x.Index[name], y.Index[name]; a.Absent != b.Absent || a.Absent == "" && math.Abs(a.X-b.X) > 1e-7 {
			t.Errorf("%s, %s, atoms %v: %s %v and %v", s, e, x.Atoms, name, a, b)
		}
	}
}

// TestJudgeDeterministic judges the same molecules many times at once.
func TestJudgeDeterministic(t *testing.T) {
	want := map[string]*Judgement{}
	for _, s := range judgedMolecules {
		want[s] = judgeOf(t, mustParse(t, s), Conditions{Incoming: "nitration"})
	}
	t.Run("group", func(t *testing.T) {
		for k := range 4 {
			t.Run(fmt.Sprint(k), func(t *testing.T) {
				t.Parallel()
				for _, s := range judgedMolecules {
					if got := judgeOf(t, mustParse(t, s), Conditions{Incoming: "nitration"}); !reflect.DeepEqual(got.Attacks, want[s].Attacks) {
						t.Errorf("%s: judged differently", s)
					}
				}
			})
		}
	})
}

// TestIndexLimits compares the limits of indices with those from central differences
// through whole new solutions, and checks that a plain aromatic hydrocarbon has none.
func TestIndexLimits(t *testing.T) {
	m := fitted()
	c := m.covariance()
	size := c.size[terms.ElectrophilicSubstitution]
	sigma := c.joint[terms.ElectrophilicSubstitution]
	for _, s := range []string{"COc1ccccc1C(C)=O", "Clc1ccnc(Cl)n1", "c1ccc2[nH]ccc2c1", "C=CC=O", "[O-]c1ccccc1", "C=Cc1ccccc1CC=CC=O", "C[n+]1ccccc1"} {
		mol := mustParse(t, s)
		j := judgeOf(t, mol, Conditions{Medium: terms.Neutral})
		used := map[frontier.Parameter]bool{}
		for _, mat := range j.Solution.Matrices {
			for _, list := range append(slices.Clone(mat.Diagonal), mat.LinkTerms...) {
				for _, x := range list {
					used[x.Parameter] = m.columns.column[x.Parameter] >= 0
				}
			}
		}
		const step = 1e-5
		type change struct {
			column   int32
			up, down *Judgement
		}
		var changes []change
		for p := range m.set.Values {
			if !used[frontier.Parameter(p)] {
				continue
			}
			x := change{column: m.columns.column[p]}
			for _, sign := range []float64{1, -1} {
				set := m.set.Clone()
				set.Values[p] += sign * step
				k := judgeOf(t, mol, Conditions{Set: set, Medium: terms.Neutral, NoLimits: true})
				if sign > 0 {
					x.up = k
				} else {
					x.down = k
				}
			}
			changes = append(changes, x)
		}
		find := func(j *Judgement, e terms.Event, atom int) *Site {
			for _, a := range j.Attacks {
				if a.Event != e {
					continue
				}
				for _, list := range [][]Site{a.Sites, a.Ipso} {
					for i := range list {
						if list[i].Atoms[0] == atom {
							return &list[i]
						}
					}
				}
			}
			t.Fatalf("%s: no site at atom %d", s, atom)
			return nil
		}
		for _, a := range j.Attacks {
			for _, site := range append(slices.Clone(a.Sites), a.Ipso...) {
				for _, at := range limitedIndices {
					name := IndexNames[at]
					v := site.Index[name]
					if v.Absent != "" {
						continue
					}
					d := make([]float64, len(changes))
					for i, x := range changes {
						d[i] = (find(x.up, a.Event, site.Atoms[0]).Index[name].X - find(x.down, a.Event, site.Atoms[0]).Index[name].X) / (2 * step)
					}
					variance := 0.0
					for i, x := range changes {
						for k, y := range changes {
							variance += d[i] * d[k] * sigma[int(x.column)*size+int(y.column)]
						}
					}
					want := z90 * math.Sqrt(math.Max(variance, 0))
					if v.Limits == nil {
						if want > 1e-6 {
							t.Errorf("%s, %s, atom %d, %s: no limits, expected ± %.5f", s, a.Event, site.Atoms[0], name, want)
						}
						continue
					}
					if got := v.Limits[1] - v.X; math.Abs(got-want) > 2e-3*want+1e-6 {
						t.Errorf("%s, %s, atom %d, %s: ± %.6f, by differences ± %.6f", s, a.Event, site.Atoms[0], name, got, want)
					}
				}
			}
		}
	}
	for _, a := range judgeOf(t, mustParse(t, "c1ccc2ccccc2c1"), Conditions{}).Attacks {
		for _, site := range a.Sites {
			for _, name := range IndexNames {
				if site.Index[name].Limits != nil {
					t.Errorf("naphthalene: %s has limits", name)
				}
			}
		}
	}
}

// TestChanceLimits compares the limits of chances with those from central differences in
// every fitted number.
func TestChanceLimits(t *testing.T) {
	m := fitted()
	for _, s := range []string{"COc1ccccc1C(C)=O", "Nc1ccc(C)cc1", "Clc1ccnc(Cl)n1"} {
		mol := mustParse(t, s)
		for _, e := range []terms.Event{terms.ElectrophilicSubstitution, terms.NucleophilicSubstitution} {
			c := Conditions{Only: e}
			var attack *Attack
			for _, a := range judgeOf(t, mol, c).Attacks {
				attack = &a
			}
			if attack == nil {
				continue
			}
			forms, _, _, err := speciesOf(mol, Conditions{Medium: terms.UnknownMedium}, m.set)
			if err != nil {
				t.Fatal(err)
			}
			if e == terms.NucleophilicSubstitution {
				forms = forms[:1]
			}
			var sites [][]int
			for _, x := range attack.Sites {
				sites = append(sites, x.Atoms)
			}
			// Chances with one fitted number displaced.
			chances := func(column int, step float64) []float64 {
				trial := *m
				trial.weights = map[terms.Event][]float64{e: slices.Clone(m.weights[e])}
				set := m.set
				if column < m.columns.n {
					set = m.set.Clone()
					for p, c := range m.columns.column {
						if int(c) == column {
							set.Values[p] += step // and those that follow it
						}
					}
				} else {
					trial.weights[e][column-m.columns.n] += step
				}
				moved := make([][]*species, len(forms))
				for k, list := range forms {
					for _, f := range list {
						sol, err := set.Solve(f.pi)
						if err != nil {
							t.Fatal(err)
						}
						moved[k] = append(moved[k], &species{v: f.v, pi: f.pi, solution: sol, protonated: f.protonated, site: f.site})
					}
				}
				j, err := trial.judge(e, moved, sites, "", terms.UnknownMedium, nil)
				if err != nil {
					t.Fatal(err)
				}
				return j.chances
			}
			cov := m.covariance()
			n := cov.size[e]
			const step = 1e-5
			by := make([][]float64, n)
			for i := range n {
				up, down := chances(i, step), chances(i, -step)
				by[i] = make([]float64, len(sites))
				for k := range sites {
					by[i][k] = (up[k] - down[k]) / (2 * step)
				}
			}
			for k, x := range attack.Sites {
				variance := 0.0
				for i := range n {
					if by[i][k] == 0 {
						continue
					}
					for l := range n {
						variance += by[i][k] * by[l][k] * cov.joint[e][i*n+l]
					}
				}
				p := *x.Chance
				want := logitLimits(p, math.Sqrt(variance)/(p*(1-p)))
				if math.Abs(want[0]-x.Limits[0]) > 1e-4 || math.Abs(want[1]-x.Limits[1]) > 1e-4 {
					t.Errorf("%s, %s, atoms %v: limits %v, by differences %v", s, e, x.Atoms, *x.Limits, want)
				}
			}
		}
	}
}

// TestCalls checks the thresholds of the call.
func TestCalls(t *testing.T) {
	for _, x := range []struct {
		chance, low float64
		want        terms.Call
	}{
		{0.85, 0.6, terms.Clear}, {0.80, 0.51, terms.Clear}, {0.85, 0.5, terms.Leaning}, {0.79, 0.7, terms.Leaning},
		{0.5, 0.3, terms.Leaning}, {0.49, 0.3, terms.Split},
	} {
		if got := callOf(x.chance, &[2]float64{x.low, 1}); got != x.want {
			t.Errorf("chance %.2f, lower limit %.2f: %s, expected %s", x.chance, x.low, got, x.want)
		}
	}
}

// TestOtherSetHasNoChances: chances belong to the calibrated set.
func TestOtherSetHasNoChances(t *testing.T) {
	set, err := frontier.Load("van-catledge-1980")
	if err != nil {
		t.Fatal(err)
	}
	for _, a := range judgeOf(t, mustParse(t, "COc1ccccc1"), Conditions{Set: set}).Attacks {
		if a.ChanceAbsent == "" || a.Call != terms.Open {
			t.Errorf("%s: %q, call %s", a.Event, a.ChanceAbsent, a.Call)
		}
	}
}

// TestTextbookFirst checks that the first site is the one every textbook gives (common
// practice (no source)).
func TestTextbookFirst(t *testing.T) {
	for _, x := range []struct {
		smiles, incoming string
		event            terms.Event
		first            int
	}{
		{"COc1ccccc1", "acylation", terms.ElectrophilicSubstitution, 5},
		{"O=[N+]([O-])c1ccccc1", "nitration", terms.ElectrophilicSubstitution, 5},
		{"c1ccc2ccccc2c1", "nitration", terms.ElectrophilicSubstitution, 2},
		{"c1ccc2[nH]ccc2c1", "acylation", terms.ElectrophilicSubstitution, 6},
		{"c1cc[nH]c1", "acylation", terms.ElectrophilicSubstitution, 2},
		{"c1ccsc1", "bromination", terms.ElectrophilicSubstitution, 2},
		{"Clc1ccnc(Cl)n1", "N", terms.NucleophilicSubstitution, 1},
		{"O=[N+]([O-])c1ccc(F)cc1F", "N", terms.NucleophilicSubstitution, 9},
	} {
		a := judgeOf(t, mustParse(t, x.smiles), Conditions{Incoming: x.incoming, Only: x.event}).Attacks[0]
		if !slices.Contains(a.Sites[0].Atoms, x.first) {
			t.Errorf("%s, %s: first %v, expected atom %d (of 0)", x.smiles, x.incoming, a.Sites[0].Atoms, x.first)
		}
	}
}

// TestOrientationChances checks sums, limits and exchange of the components, and the
// orientation of isoprene with methyl acrylate: para (70 : 30 uncatalysed; T. Inukai, T.
// Kojima, J. Org. Chem. 1966, 31, 1121, from memory).
func TestOrientationChances(t *testing.T) {
	diene, acrylate := mustParse(t, "CC(=C)C=C"), mustParse(t, "C=CC(=O)OC")
	p, err := Pair(diene, acrylate, PairConditions{})
	if err != nil {
		t.Fatal(err)
	}
	q, err := Pair(acrylate, diene, PairConditions{})
	if err != nil {
		t.Fatal(err)
	}
	ads := p.AdductsOf(&p.Joinings[0])
	if len(ads) != 2 || ads[0].Chance == nil {
		t.Fatalf("%d orientations; %s", len(ads), p.ChanceAbsent)
	}
	if sum := *ads[0].Chance + *ads[1].Chance; math.Abs(sum-1) > 1e-9 {
		t.Errorf("chances add up to %.12f", sum)
	}
	// para: the CH2 next to C(CH3) is atom 2, and bonds to the β carbon, atom 0.
	for _, b := range ads[0].Bonds {
		if b[0] == 2 && b[1] != 0 {
			t.Errorf("first orientation joins atom 2 of isoprene to atom %d of the acrylate", b[1])
		}
	}
	for k, a := range ads {
		if l := *a.Limits; !(l[0] < *a.Chance && *a.Chance < l[1]) {
			t.Errorf("chance %.4f outside %v", *a.Chance, l)
		}
		if b := q.AdductsOf(&q.Joinings[0])[k]; math.Abs(*a.Chance-*b.Chance) > 1e-9 {
			t.Errorf("chance %.6f, with the components exchanged %.6f", *a.Chance, *b.Chance)
		}
	}
}

// BenchmarkSites measures everything behind `sites` for drug-sized molecules, chances and
// limits included, reading and printing aside.
func BenchmarkSites(b *testing.B) {
	for _, x := range []struct{ name, smiles string }{
		{"21 π centres in one system", "COc1cc2ncnc(Nc3ccc(F)c(Cl)c3)c2cc1OCCCN1CCOCC1"},
		{"two systems", "CCOc1ccccc1CCNC(=O)c1ccc(Cl)nc1"},
	} {
		m, err := molecule.ParseSMILES(x.smiles)
		if err != nil {
			b.Fatal(err)
		}
		fitted().covariance()
		b.Run(x.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := Judge(m, Conditions{Medium: terms.Neutral}, nil); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

// TestBecauseWords checks the wording of reasons.
func TestBecauseWords(t *testing.T) {
	for _, x := range []struct {
		reason             string
		difference, amount float64
		want               string
	}{
		{"ortho to an F", 1, math.Log(3.4), "ortho to an F (×3.4)"},
		{"ortho to an F", -1, math.Log(2), "not ortho to an F (×2.0)"},
		{"groups on the neighbouring ring atoms", -1, math.Log(12), "one group on a neighbouring ring atom fewer (×12)"},
		{"groups on the neighbouring ring atoms", 1, math.Log(0.085), "one more group on a neighbouring ring atom (×0.085)"},
		{"σ-inductive field", -0.37, math.Log(0.4), "σ-inductive field 0.37 weaker (×0.4)"},
		{"para to a fused aromatic ring", 0.5, math.Log(1.2), "para to a fused aromatic ring, 0.5 times more (×1.2)"},
	} {
		if got := termReason(x.reason, x.difference, x.amount); got != x.want {
			t.Errorf("%q, expected %q", got, x.want)
		}
	}
	for reason := range countedReasons {
		found := false
		for _, x := range ringTermList() {
			found = found || x.Reason == reason
		}
		if !found {
			t.Errorf("no term gives the reason %q", reason)
		}
	}
	a := judgeOf(t, mustParse(t, "COc1ccccc1C(C)=O"), Conditions{Only: terms.ElectrophilicSubstitution}).Attacks[0]
	if !strings.HasPrefix(a.Sites[0].Because, "over atom 4: ") {
		t.Errorf("%q does not compare with the runner-up", a.Sites[0].Because)
	}
}
