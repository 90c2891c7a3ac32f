package review

import (
	"strings"
	"testing"

	"lobecast/frontier/terms"
	"lobecast/reactivity/report"
)

// The standings of section "Route file and review" of docs/route.md, with chances made
// up for the purpose.
func TestStanding(t *testing.T) {
	lim := func(low, high float64) *[2]float64 { return &[2]float64{low, high} }
	for _, row := range []struct {
		k              int
		call           terms.Call
		planned, first *[2]float64
		want           terms.Standing
	}{
		{0, terms.Clear, lim(0.7, 0.95), lim(0.7, 0.95), terms.Supported},
		{0, terms.Leaning, lim(0.4, 0.8), lim(0.4, 0.8), terms.Contested},
		{0, terms.Split, lim(0.3, 0.6), lim(0.3, 0.6), terms.Contested},
		{0, terms.Clear, nil, nil, terms.Supported},
		{1, terms.Split, lim(0.2, 0.45), lim(0.4, 0.6), terms.Contested},
		{1, terms.Split, lim(0.2, 0.40), lim(0.4, 0.6), terms.Contested},
		{1, terms.Split, lim(0.2, 0.39), lim(0.4, 0.6), terms.Opposed},
		{1, terms.Clear, lim(0.05, 0.2), lim(0.7, 0.95), terms.Opposed},
		{1, terms.Split, nil, nil, terms.Opposed},
		{2, terms.Split, lim(0.2, 0.6), lim(0.3, 0.6), terms.Opposed},
	} {
		got, reason := stand(row.k, row.call, row.planned, row.first)
		if got != string(row.want) || reason == "" {
			t.Errorf("rank %d, %s, planned %v, first %v: %s (%s), want %s", row.k+1, row.call, row.planned, row.first, got, reason, row.want)
		}
	}
}

// Forbidden before opposed, refused, contested, not judged and supported; within a
// standing the lower planned chance first, then the order of the route.
func TestRiskOrder(t *testing.T) {
	step := func(standing terms.Standing, chance float64, refused bool) judged {
		x := report.Step{Standing: string(standing), Name: "x"}
		if chance > 0 {
			x.Planned = &report.Planned{Place: "C-2", Chance: &chance}
		}
		if refused {
			x.Refused = []report.Refused{{Line: 3, Message: "x"}}
		}
		return judged{step: x}
	}
	steps := []judged{
		step(terms.Supported, 0.95, false), step(terms.Supported, 0.85, false), // 1 2
		step(terms.NotJudged, 0, false), step(terms.Contested, 0.6, false), // 3 4
		step(terms.Contested, 0.4, false), step(terms.NotJudged, 0, true), // 5 6
		step(terms.Opposed, 0.2, false), step(terms.Forbidden, 0, false), // 7 8
		step(terms.Opposed, 0.1, false), step(terms.NotJudged, 0, false), // 9 10
	}
	want := []int{8, 9, 7, 6, 5, 4, 3, 10, 2, 1}
	for i, r := range riskOrder(steps) {
		if r.Step != want[i] || r.Order != i+1 {
			t.Errorf("place %d is step %d, want %d", i+1, r.Step, want[i])
		}
		if !strings.Contains(r.Line, steps[r.Step-1].step.Standing) {
			t.Errorf("line %q does not give the standing", r.Line)
		}
	}
}

// A product that is not the next substrate is a break; a by-product, salt or mapping
// makes none.
func TestBreakBetweenSteps(t *testing.T) {
	for _, row := range []struct{ first, second, says string }{
		{"COc1ccccc1>>COc1ccc(Br)cc1", "COc1ccc(Br)cc1.OB(O)c1ccccc1>>COc1ccc(cc1)-c1ccccc1", ""},
		{"COc1ccccc1>>COc1ccc(Br)cc1", "Brc1ccc(OC)cc1.OB(O)c1ccccc1>>COc1ccc(cc1)-c1ccccc1", ""},
		{"COc1ccccc1>>COc1ccc(Br)cc1", "COc1ccccc1Br.OB(O)c1ccccc1>>COc1ccccc1-c1ccccc1", "isomer (C7H7BrO)"},
		{"COc1ccccc1>>COc1ccc(Br)cc1", "COc1ccc(I)cc1.OB(O)c1ccccc1>>COc1ccc(cc1)-c1ccccc1", "C7H7BrO"},
		{"C=CC(C)=O.C1=CCC=C1>>CC(=O)[C@H]1C[C@@H]2C=C[C@H]1C2", "CC(=O)C1CC2C=CC1C2>>CC(O)C1CC2C=CC1C2", "configuration only"},
		{"Nc1ccccc1.CC(=O)Cl>>CC(=O)Nc1ccccc1.Cl", "CC(=O)Nc1ccccc1>>CC(=O)Nc1ccc(Br)cc1", ""},
		{"Nc1ccccc1.CC(=O)Cl>>CC(=O)Nc1ccccc1", "[CH3:1]C(=O)Nc1ccccc1>>[CH3:1]C(=O)Nc1ccc(Br)cc1", ""},
	} {
		r := reviewed(t, "[[step]]\nreaction = '"+row.first+"'\n[[step]]\nreaction = '"+row.second+"'\n")
		text := strings.Join(r.Step[1].Warnings, "; ")
		if broken := strings.Contains(text, "break in the route"); broken != (row.says != "") || !strings.Contains(text, row.says) {
			t.Errorf("%s then %s: %q, want %q", row.first, row.second, text, row.says)
		}
		if strings.Contains(strings.Join(r.Step[0].Warnings, ""), "break in the route") {
			t.Errorf("a break before the first step")
		}
	}
}

// Whether a substitution stops at one: nitration and acylation deactivate, alkylation
// activates, halogens deactivate a little except where the ring is very rich; common
// practice (no source).
func TestSecondTime(t *testing.T) {
	for _, row := range []struct{ reaction, agents, says string }{
		{"Cc1ccccc1>>Cc1ccc(cc1)[N+](=O)[O-]", "HNO3, H2SO4", "should stop at one"},
		{"Cc1ccccc1.CC(=O)Cl>>Cc1ccc(cc1)C(C)=O", "AlCl3, CH2Cl2", "should stop at one"},
		{"COc1ccccc1>>COc1ccc(Br)cc1", "NBS, MeCN", "with one equivalent it should stop at one"},
		{"Nc1ccccc1>>Nc1ccc(Br)cc1", "Br2, AcOH", "second halogenation is likely"},
		{"Oc1ccccc1>>Oc1ccc(Br)cc1", "Br2, CS2", "second halogenation is likely"},
		{"c1ccccc1.CC(C)Cl>>CC(C)c1ccccc1", "AlCl3", "over-reaction is likely"},
		{"Clc1nc(Cl)nc(Cl)n1.CNC>>CN(C)c1nc(Cl)nc(Cl)n1", "DIPEA, THF", "less ready: it should stop at one"},
	} {
		r := reviewed(t, "[[step]]\nreaction = '"+row.reaction+"'\nagents = '"+row.agents+"'\n")
		if s := r.Step[0]; !strings.Contains(s.Again, row.says) {
			t.Errorf("%s (%s, %s): %q, want %q", row.reaction, s.Event, s.Incoming, s.Again, row.says)
		}
	}
}

// What would move it: the medium for an aniline, acetylation for an aminophenol; and
// each line names the change, the place that comes first, and how sure that is.
func TestWhatWouldMoveIt(t *testing.T) {
	r := reviewed(t, "[[step]]\nreaction = 'Nc1ccccc1>>Nc1ccc(cc1)[N+](=O)[O-]'\nagents = 'HNO3, AcOH'\nmedium = 'neutral'\n")
	text := strings.Join(r.Step[0].WhatIf, "\n")
	if !strings.Contains(text, "in acidic medium") {
		t.Errorf("aniline: %q", text)
	}
	for _, line := range r.Step[0].WhatIf {
		if !strings.HasPrefix(line, "in ") && !strings.HasPrefix(line, "with the ") {
			t.Errorf("%q does not say what is changed", line)
		}
	}
	r = reviewed(t, "[[step]]\nreaction = 'Cc1ccccc1>>Cc1ccc(Br)cc1'\nagents = 'Br2, FeBr3'\n")
	if text := strings.Join(r.Step[0].WhatIf, "\n"); strings.Contains(text, "acetylated") {
		t.Errorf("toluene has nothing to acetylate: %q", text)
	}
}

// Where a rule says that a step hardly goes, a clear position is contested all the same,
// and a chance without rivals is said to say nothing; common practice (no source).
func TestHardlyGoes(t *testing.T) {
	for _, row := range []struct{ reaction, agents, standing, says string }{
		{"Clc1ccccc1.C1CCNCC1>>c1ccccc1N1CCCCC1", "K2CO3, DMF, 100 °C", "contested", "does not occur"},
		{"Brc1ccc2[nH]ccc2c1.C1COCCN1>>c1cc2[nH]ccc2cc1N1CCOCC1", "K2CO3, DMF", "contested", "does not occur"},
		{"CS(=O)(=O)c1nccc(Cl)n1.NCc1ccccc1>>CS(=O)(=O)c1nccc(NCc2ccccc2)n1", "DIPEA, THF", "contested", "leaves about as readily as a halide"},
		{"O=c1ccc2ccccc2o1>>O=c1oc2ccccc2cc1[N+](=O)[O-]", "HNO3, H2SO4", "contested", "on the benzo ring"},
		{"c1ccncc1>>O=[N+]([O-])c1cccnc1", "HNO3, H2SO4", "contested", "hardly takes electrophiles"},
		{"O=[N+]([O-])c1ccc(F)cc1.C1CCNCC1>>O=[N+]([O-])c1ccc(cc1)N1CCCCC1", "K2CO3, DMSO", "supported", "only candidate"},
	} {
		r := reviewed(t, "[[step]]\nreaction = '"+row.reaction+"'\nagents = '"+row.agents+"'\n")
		s := r.Step[0]
		if s.Standing != row.standing || !strings.Contains(s.Reason, row.says) {
			t.Errorf("%s: %s: %s", row.reaction, s.Standing, s.Reason)
		}
		if row.standing == "contested" && !strings.Contains(r.Risk[0].Line, "the position is clear, but the step may not go") {
			t.Errorf("risk line %q", r.Risk[0].Line)
		}
	}
}

// The remark on a twisted biaryl asks for an angle, and goes once the angle is stated.
func TestStatedTwist(t *testing.T) {
	for _, row := range []struct {
		twist string
		want  bool
	}{{"", true}, {"twist = '7-8=60'\n", false}} {
		r := reviewed(t, "[[step]]\nreaction = 'Cc1ccccc1-c1ccccc1>>Cc1ccccc1-c1ccc([N+](=O)[O-])cc1'\nagents = 'HNO3, AcOH'\n"+row.twist)
		got := false
		for _, x := range r.Step[0].Outside {
			got = got || x.Code == "twisted-biaryl"
		}
		if got != row.want {
			t.Errorf("%q: remark %v, want %v", row.twist, got, row.want)
		}
	}
}
