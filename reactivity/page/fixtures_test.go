package page

import (
	"bytes"
	"testing"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/reactivity/report"
	"lobecast/rules/symmetry"
)

const program = "lobecast test"

func parse(t testing.TB, smiles string) *molecule.Molecule {
	t.Helper()
	m, err := molecule.ParseSMILES(smiles)
	if err != nil {
		t.Fatalf("%s: %v", smiles, err)
	}
	return m
}

func publishedSet(t testing.TB) *frontier.Set {
	t.Helper()
	set, err := frontier.Load("van-catledge-1980")
	if err != nil {
		t.Fatal(err)
	}
	return set
}

func sitesReport(t testing.TB, smiles ...string) *report.Report {
	t.Helper()
	set := publishedSet(t)
	b := report.NewBuilder(report.KindSites, program, set)
	cond := reactivity.Conditions{Set: set, Medium: terms.Neutral, NoLimits: true}
	for _, s := range smiles {
		b.AddSites(s, "", parse(t, s), cond, terms.Towards, nil)
	}
	return b.Report()
}

func orbitalsReport(t testing.TB, smiles ...string) *report.Report {
	t.Helper()
	set := publishedSet(t)
	b := report.NewBuilder(report.KindOrbitals, program, set)
	for _, s := range smiles {
		b.AddOrbitals(s, "", parse(t, s), set, false, nil)
	}
	return b.Report()
}

func pairReport(t testing.TB, pairs ...[2]string) *report.Report {
	t.Helper()
	set := publishedSet(t)
	b := report.NewBuilder(report.KindPair, program, set)
	for _, p := range pairs {
		var second *molecule.Molecule
		if p[1] != "" {
			second = parse(t, p[1])
		}
		b.AddPair(p[0], p[1], parse(t, p[0]), second, reactivity.PairConditions{Set: set})
	}
	return b.Report()
}

func symmetryReport(t testing.TB) *report.Report {
	t.Helper()
	b := report.NewBuilder(report.KindSymmetry, program, publishedSet(t))
	for _, s := range []string{`C/C=C/C=C\C=C\C`, "C=CC=C"} {
		a, err := symmetry.Closure(parse(t, s))
		if err != nil {
			t.Fatal(err)
		}
		b.AddAnswer(s, a)
	}
	a, err := symmetry.Shift(parse(t, "C=CCCC=C"), 3, 3)
	if err != nil {
		t.Fatal(err)
	}
	b.AddAnswer("C=CCCC=C", a)
	p, err := symmetry.FromComponents("pi4s+pi2s")
	if err != nil {
		t.Fatal(err)
	}
	b.AddProcess("pi4s+pi2s", p)
	return b.Report()
}

func ptr(x float64) *float64 { return &x }

// reviewReport is a route with one step of each sort. Its chances are invented: the
// page is tested here, not the ranking.
func reviewReport(t testing.TB) *report.Report {
	t.Helper()
	structure := sitesReport(t, "COc1ccc2[nH]ccc2c1").Structure[0]
	structure.Attack = structure.Attack[:1]
	attack := &structure.Attack[0]
	for i := range attack.Site {
		c := 0.6 / float64((1+i)*(1+i))
		attack.Site[i].Chance, attack.Site[i].Limits = ptr(c), &[2]float64{c * 0.7, c * 1.3}
	}
	attack.Site[0].Because = "smoothed density 0.61 against 0.32"
	pair := pairReport(t, [2]string{"COC=CC=C", "C=CC=O"}).Pair[0]
	limits := &[2]float64{0.8, 0.95}
	substitution := report.Step{
		Number: 1, Name: "Bromination", Kind: "electrophilic substitution", Event: "electrophilic substitution",
		Standing: "supported", Call: "clear", Reason: "the planned site is first and the call is clear",
		Reaction: "COc1ccc2[nH]ccc2c1.O=C1CCC(=O)N1Br>CC#N>COc1ccc2[nH]cc(Br)c2c1", Agents: "NBS, MeCN, 0 °C", Medium: "neutral",
		Product: "COc1ccc2[nH]cc(Br)c2c1", Again: "less ready", WhatIf: []string{"acidic medium: no change"}, Read: []string{"NBS: a brominating agent"},
		Structure: []report.Structure{structure},
		Planned:   &report.Planned{Atoms: attack.Site[0].Atoms, Place: "C-3 of the indole", Rank: 1, Chance: ptr(0.9), Limits: limits},
		Candidate: []report.Candidate{
			{Rank: 1, Place: "C-3 of the indole", Chance: ptr(0.9), Limits: limits, Product: "COc1ccc2[nH]cc(Br)c2c1", Planned: true},
			{Rank: 2, Place: "C-7 of the indole", Chance: ptr(0.04)},
		},
		Caution: []report.Remark{{Code: "halogenation", Text: "can be exothermic"}},
		Outside: []report.Remark{{Code: "solvent", Text: "not part of the model"}},
		Record:  []report.Record{{Event: "electrophilic substitution", Text: "right first time in most cases"}},
	}
	r := report.NewBuilder(report.KindReview, program, publishedSet(t)).Report()
	r.Title = "An invented route"
	r.Step = []report.Step{
		substitution,
		{Number: 2, Name: "Coupling", Kind: "other", Standing: "not judged", Reading: "looks like a cross-coupling",
			Reaction: "COc1ccc2[nH]cc(Br)c2c1.OB(O)c1ccccc1>[Pd]>COc1ccc2[nH]cc(-c3ccccc3)c2c1"},
		{Number: 3, Name: "Cycloaddition", Kind: "cycloaddition", Event: "cycloaddition, orientation", Standing: "contested", Call: "leaning",
			Pair: []report.Pair{pair}, Planned: &report.Planned{Bonds: pair.Adduct[0].Bonds, Place: "ortho adduct", Rank: 1, Chance: ptr(0.9), Limits: limits}},
		{Number: 4, Name: "Closure", Kind: "electrocyclic", Standing: "forbidden", Process: symmetryReport(t).Process[:2]},
		{Number: 5, Name: "Refused", Kind: "other", Standing: "not judged", Refused: []report.Refused{{Input: "C(", Line: 3, Message: "column 2: open bracket\nC(\n ^"}}},
	}
	r.Risk = []report.Risk{{Order: 1, Step: 4, Line: "step 4, closure: forbidden"}, {Order: 2, Step: 3, Line: "step 3: contested"}}
	return r
}

// everyReport is one report of each kind.
func everyReport(t testing.TB) map[string]*report.Report {
	return map[string]*report.Report{
		report.KindSites:    sitesReport(t, "c1ccc2ccccc2c1", "Clc1ccnc(Cl)n1", "CC(=O)C=C"),
		report.KindOrbitals: orbitalsReport(t, "C=CC=C", "c1ccccc1", "CC#CC=O", "C1=CC=C1", "C[n+]1ccccc1"),
		report.KindPair:     pairReport(t, [2]string{"COC=CC=C", "C=CC=O"}, [2]string{"CN=[N+]=[N-]", "C#CC(=O)OC"}, [2]string{"C=CC=CCCCC=CC=O", ""}),
		report.KindSymmetry: symmetryReport(t),
		report.KindReview:   reviewReport(t),
	}
}

func render(t testing.TB, r *report.Report) []byte {
	t.Helper()
	out, err := Render(r)
	if err != nil {
		t.Fatal(err)
	}
	return out
}

// throughTOML writes and reads a report.
func throughTOML(t testing.TB, r *report.Report) *report.Report {
	t.Helper()
	var b bytes.Buffer
	if err := r.Write(&b); err != nil {
		t.Fatal(err)
	}
	back, err := report.Read(b.Bytes())
	if err != nil {
		t.Fatal(err)
	}
	return back
}
