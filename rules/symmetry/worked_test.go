package symmetry

import (
	"errors"
	"slices"
	"strings"
	"testing"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// mode finds a mode of an answer.
func mode(t *testing.T, a *Answer, name string) *Process {
	t.Helper()
	for i := range a.Processes {
		if a.Processes[i].Mode == name {
			return &a.Processes[i]
		}
	}
	t.Fatalf("%s has no mode %q", a.Name, name)
	return nil
}

// products lists the SMILES of a mode, sorted.
func products(p *Process) []string {
	var list []string
	for _, q := range p.Products {
		list = append(list, q.SMILES)
	}
	slices.Sort(list)
	return list
}

func mustAnswer(t *testing.T) func(*Answer, error) *Answer {
	return func(a *Answer, err error) *Answer {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return a
	}
}

// same compares products with expected SMILES, read and written canonically.
func same(t *testing.T, what string, p *Process, want ...string) {
	t.Helper()
	var list []string
	for _, s := range want {
		list = append(list, mustRead(t, s).SMILES())
	}
	slices.Sort(list)
	if got := products(p); !slices.Equal(got, list) {
		t.Errorf("%s: products %q, want %q", what, got, list)
	}
}

// The chair of the Cope rearrangement: meso-3,4-dimethylhexa-1,5-diene gives
// (2E,6Z)-octa-2,6-diene, the racemic one the E,E and Z,Z isomers (Doering, Roth,
// Tetrahedron 1962, 18, 67; from memory).
func TestCopeChair(t *testing.T) {
	meso := mustAnswer(t)(Shift(mustRead(t, "C=C[C@H](C)[C@H](C)C=C"), 3, 3))
	same(t, "meso", mode(t, meso, "suprafacial on both chains"), `C/C=C/CC/C=C\C`)
	racemic := mustAnswer(t)(Shift(mustRead(t, "C=C[C@H](C)[C@@H](C)C=C"), 3, 3))
	same(t, "racemic", mode(t, racemic, "suprafacial on both chains"), `C/C=C/CC/C=C/C`, `C/C=C\CC/C=C\C`)
	if words := meso.Mode(terms.Thermal); words[0] != "suprafacial on both chains" {
		t.Errorf("first thermal mode is %q", words[0])
	}
	for _, p := range meso.Processes {
		if strings.Contains(p.Mode, "antarafacial") && (p.Feasible || !strings.Contains(p.FeasibleNote, "not feasible")) {
			t.Errorf("%s: an antarafacial allyl component in a six-membered ring is not feasible (%q)", p.Mode, p.FeasibleNote)
		}
	}
}

// Migration with inversion: the deuterium trans to the acetoxy group ends cis to it,
// and the acetoxy group exo (Berson, Nelson, J. Am. Chem. Soc. 1967, 89, 5503; from
// memory). The SMILES were told apart by geometries embedded with RDKit 2022.09.3:
// D–C–C–O −100° before and 24° after.
func TestInversionAtMigratingCarbon(t *testing.T) {
	a := mustAnswer(t)(Shift(mustRead(t, "[2H][C@H:3]1[C@H](OC(C)=O)[C@@H]2CC=C[C@H:4]12"), 1, 3))
	inversion := mode(t, a, "suprafacial, inversion")
	same(t, "inversion", inversion, "[2H][C@@H]1[C@H](OC(C)=O)[C@H]2C=C[C@@H]1C2")
	retention := mode(t, a, "suprafacial, retention")
	same(t, "retention", retention, "[2H][C@H]1[C@H](OC(C)=O)[C@H]2C=C[C@@H]1C2")
	if inversion.Thermal != Allowed || retention.Thermal != Forbidden {
		t.Errorf("inversion %s, retention %s", inversion.Thermal, retention.Thermal)
	}
}

// Aziridines open conrotatory in the dark and disrotatory under light: the trans
// diester gives the ylide with both groups on one side (W or U), the cis diester the
// sickle; light the other way about (Huisgen, Scheer, Huber, J. Am. Chem. Soc. 1967,
// 89, 1753; from memory).
func TestAziridineOpening(t *testing.T) {
	for _, c := range []struct{ smiles, dark, light string }{
		{"COC(=O)[C@H]1N(c2ccc(OC)cc2)[C@@H]1C(=O)OC", "both ends", "sickle"},
		{"COC(=O)[C@H]1N(c2ccc(OC)cc2)[C@H]1C(=O)OC", "sickle", "both ends"},
	} {
		a := mustAnswer(t)(Opening(mustRead(t, c.smiles)))
		for _, p := range a.Processes {
			want := c.light
			if p.Thermal == Allowed {
				want = c.dark
			}
			if (p.Mode == "conrotatory") != (p.Thermal == Allowed) {
				t.Errorf("%s, %s is %s in the dark", c.smiles, p.Mode, p.Thermal)
			}
			for _, q := range p.Products {
				if !strings.Contains(q.Configuration, want) {
					t.Errorf("%s, %s: %q, want %q", c.smiles, p.Mode, q.Configuration, want)
				}
			}
		}
	}
	// An epoxide does the same, to the carbonyl ylide.
	a := mustAnswer(t)(Opening(mustRead(t, "O1[C@@H](c2ccccc2)[C@H]1c1ccccc1")))
	if p := mode(t, a, "conrotatory"); p.Thermal != Allowed || p.Products[0].Molecule.FlatSMILES() != mustRead(t, "[CH-](c1ccccc1)[O+]=Cc1ccccc1").FlatSMILES() {
		t.Errorf("epoxide: %s, %q", p.Thermal, products(p))
	}
}

// Photochromic compounds: a 1,2-diarylethene closes conrotatory under light only, to
// the trans isomer, and its gap shrinks (Irie, Chem. Rev. 2000, 100, 1685; from
// memory); a spiropyran and a chromene open to the merocyanine (o-quinone allide),
// whose gap is smaller (Bertelson in Brown, Photochromism, 1971; from memory).
func TestPhotochromes(t *testing.T) {
	a := mustAnswer(t)(Closure(mustRead(t, "Cc1sc(C)cc1C1=C(c2cc(C)sc2C)C(F)(F)C(F)(F)C1(F)F")))
	con := mode(t, a, "conrotatory")
	if con.Thermal != Forbidden || con.Photochemical != Allowed || !con.Agree || con.Electrons != 6 {
		t.Errorf("diarylethene: %+v", con)
	}
	if len(con.Products) != 1 || !strings.Contains(con.Products[0].Configuration, "trans") || !con.Products[0].Racemic {
		t.Errorf("diarylethene: %+v", con.Products)
	}
	if a.Before == nil || a.After == nil || a.After.Gap >= a.Before.Gap {
		t.Errorf("diarylethene: the gap goes from %v to %v", a.Before, a.After)
	}
	for smiles, merocyanine := range map[string]string{
		"CN1c2ccccc2C(C)(C)C12Oc1ccccc1C=C2": "CC1(C)C(N(C)c2ccccc21)=CC=C1C=CC=CC1=O",
		"CC1(C)C=Cc2ccccc2O1":                "CC(C)=CC=C1C=CC=CC1=O",
	} {
		a := mustAnswer(t)(Opening(mustRead(t, smiles)))
		p := mode(t, a, "disrotatory")
		if p.Thermal != Allowed || p.Electrons != 6 {
			t.Errorf("%s: %s, %d electrons", smiles, p.Thermal, p.Electrons)
		}
		if got, want := p.Products[0].Molecule.FlatSMILES(), mustRead(t, merocyanine).FlatSMILES(); got != want {
			t.Errorf("%s opens to %s, want %s", smiles, got, want)
		}
		if a.Before == nil || a.After == nil || a.After.Gap >= a.Before.Gap {
			t.Errorf("%s: the gap goes from %v to %v", smiles, a.Before, a.After)
		}
	}
}

// What goes over to another product at once is found by that product as well: the
// phenol of the Claisen rearrangement, the ketone of the Nazarov closure (textbook
// facts; common practice, no source).
func TestProductsThatGoOver(t *testing.T) {
	for _, c := range []struct {
		ask     func() (*Answer, error)
		product string
		mode    string
	}{
		{func() (*Answer, error) { return Shift(mustRead(t, "C=CCOc1ccccc1"), 3, 3) }, "C=CCc1ccccc1O", "suprafacial on both chains"},
		{func() (*Answer, error) { return Closure(mustRead(t, "CC=CC(=O)C=CC")) }, "O=C1C=C(C)C(C)C1", "conrotatory"},
		{func() (*Answer, error) { return Closure(mustRead(t, "C=C(C)C(=O)C(C)=C")) }, "CC1=CCC(C)C1=O", "conrotatory"},
	} {
		a := mustAnswer(t)(c.ask())
		p, ok := a.Find(mustRead(t, c.product))
		if !ok || p.Mode != c.mode {
			t.Errorf("%s: %s is not found as a product", a.Name, c.product)
		}
	}
	if _, ok := mustAnswer(t)(Shift(mustRead(t, "C=CCOc1ccccc1"), 3, 3)).Find(mustRead(t, "C=CCc1cccc(O)c1")); ok {
		t.Error("the meta phenol is no product of a Claisen rearrangement")
	}
}

// Where several processes are possible a known product chooses among them.
func TestProductChooses(t *testing.T) {
	m := mustRead(t, "CC=CC=CC=CC=CC=CC") // several chains can close
	p := mustRead(t, "CC=CC=CC1C=CC=CC1C")
	a, err := ClosureGiving(m, p)
	if err != nil {
		t.Fatal(err)
	}
	if x, ok := a.Find(p); !ok || x.Mode != "disrotatory" || x.Electrons != 6 {
		t.Errorf("%s: %v", a.Name, ok)
	}
	if _, err := ClosureGiving(m, mustRead(t, "CCCCCC")); err == nil {
		t.Error("an impossible product is accepted")
	}
	b, err := ShiftGiving(mustRead(t, "CC1(C)C=CC=C1"), 1, 5, mustRead(t, "CC1=C(C)CC=C1"))
	if err == nil {
		t.Errorf("a methyl shift needs more than one step to reach that isomer, got %s", b.Name)
	}
	if b, err = ShiftGiving(mustRead(t, "CC1(C)C=CC=C1"), 1, 5, mustRead(t, "CC1=CC=CC1C")); err != nil {
		t.Error(err)
	} else if b.Processes[0].Mode != "suprafacial, retention" {
		t.Errorf("methyl shift: %s", b.Processes[0].Mode)
	}
}

// Geometry the trade rules out, whatever symmetry says (Woodward, Hoffmann 1970).
func TestFeasibility(t *testing.T) {
	check := func(a *Answer, name string, feasible bool) {
		t.Helper()
		p := mode(t, a, name)
		if p.Feasible != feasible || !feasible && !strings.Contains(p.FeasibleNote, "not feasible: ") {
			t.Errorf("%s, %s: feasible %v (%s)", a.Name, name, p.Feasible, p.FeasibleNote)
		}
	}
	must := mustAnswer(t)
	check(must(Shift(mustRead(t, "CC=C"), 1, 3)), "antarafacial", false)
	check(must(Shift(mustRead(t, "C1C=CC=C1"), 1, 5)), "antarafacial", false)
	check(must(Shift(mustRead(t, "C1C=CC=CC=C1"), 1, 7)), "antarafacial", false)
	check(must(Shift(mustRead(t, `C/C=C\C=C/C=C`), 1, 7)), "antarafacial", true)
	check(must(Shift(mustRead(t, `C/C=C/C=C`), 1, 5)), "suprafacial", false)
	check(must(Opening(mustRead(t, "C1=CC2CCCC12"))), "conrotatory", false)
	check(must(Opening(mustRead(t, "C1=CC2CCCC12"))), "disrotatory", true)
	check(must(Closure(mustRead(t, "[CH2:1]=C/C=C/C=[CH2:2]"))), "disrotatory", false)
	check(must(CycloadditionBetween(mustRead(t, "C=CC=C"), mustRead(t, "C=C"))), "antarafacial + suprafacial", false)
	check(must(CycloadditionBetween(mustRead(t, "[CH2:1]=[C:2]=O"), mustRead(t, "C=C"))), "antarafacial + suprafacial", true)
	check(must(CycloadditionBetween(mustRead(t, "[CH2:1]=C1CCC[CH:2]=C1"), mustRead(t, "[CH2:3]=[CH2:4]"))), "suprafacial + suprafacial", false) // s-trans
}

// Endo and exo, relative to an outside geometry: SMILES told apart with RDKit
// 2022.09.3 by the distance from the carbonyl carbons to the double bond (2.7–3.0 Å
// endo, 3.7–4.1 Å exo).
func TestEndoAndExo(t *testing.T) {
	a := mustAnswer(t)(CycloadditionBetween(mustRead(t, "C1C=CC=C1"), mustRead(t, "O=C1OC(=O)C=C1")))
	for _, q := range mode(t, a, "suprafacial + suprafacial").Products {
		want := map[string]string{
			mustRead(t, "O=C1OC(=O)[C@@H]2[C@H]1[C@@H]1C=C[C@H]2C1").SMILES(): "endo",
			mustRead(t, "O=C1OC(=O)[C@@H]2[C@H]1[C@H]1C=C[C@@H]2C1").SMILES(): "exo",
		}[q.SMILES]
		if want == "" || q.Configuration != want {
			t.Errorf("%s is called %q, want %q", q.SMILES, q.Configuration, want)
		}
	}
}

// Refusals say what is wrong and what to do.
func TestRefusals(t *testing.T) {
	for _, c := range []struct {
		name   string
		ask    func() (*Answer, error)
		reason string
	}{
		{"saturated", func() (*Answer, error) { return Closure(mustRead(t, "CCCC")) }, "no conjugated chain"},
		{"one end", func() (*Answer, error) { return Closure(mustRead(t, "[CH2:1]=CC=C")) }, "only one end"},
		{"unconnected ends", func() (*Answer, error) { return Closure(mustRead(t, "[CH2:1]=CCC=[CH2:2]")) }, "no conjugated chain runs"},
		{"s-trans", func() (*Answer, error) {
			return CycloadditionBetween(mustRead(t, "C=C1CCCC=C1"), mustRead(t, "C=C"))
		}, "held s-trans"},
		{"several", func() (*Answer, error) { return Closure(mustRead(t, "CC=CC=CC=CC=CC=C")) }, "different processes are possible"},
		{"no ring", func() (*Answer, error) { return Opening(mustRead(t, "CCCC")) }, "no ring"},
		{"no bond", func() (*Answer, error) { return Opening(mustRead(t, "[CH2:1]1CC=C[CH2:2]1")) }, "no conjugated chain"},
		{"no diene", func() (*Answer, error) { return CycloadditionBetween(mustRead(t, "CC"), mustRead(t, "C=C")) }, "no π component"},
		{"saturated partner", func() (*Answer, error) { return CycloadditionBetween(mustRead(t, "C=CC=C"), mustRead(t, "CC")) }, "no π component"},
		{"radical", func() (*Answer, error) { return Closure(mustRead(t, "[CH2:1]C=[CH2:2]")) }, "no conjugated chain"},
		{"order", func() (*Answer, error) { return Shift(mustRead(t, "CC=C"), 1, 1) }, "no order"},
		{"order", func() (*Answer, error) { return Shift(mustRead(t, "CC=C"), -3, 40) }, "no order"},
		{"both even", func() (*Answer, error) { return Shift(mustRead(t, "CC=C"), 2, 2) }, "ion at both chains"},
		{"no shift", func() (*Answer, error) { return Shift(mustRead(t, "CCCCCC"), 3, 3) }, "no σ bond"},
		{"no single atom", func() (*Answer, error) { return Cheletropic(mustRead(t, "C=CC=C"), mustRead(t, "O")) }, "two σ bonds"},
		{"no SO2", func() (*Answer, error) { return Extrusion(mustRead(t, "C1CC=CC1")) }, "lose SO2 or CO"},
		{"no ene", func() (*Answer, error) { return Ene(mustRead(t, "CC"), mustRead(t, "C=C")) }, "no ene"},
		{"no path", func() (*Answer, error) {
			m := mustRead(t, "C=CC=C")
			return Cycloaddition(m, mustRead(t, "C=C"), []int{0, 2, 1, 3}, []int{0, 1})
		}, "no path"},
		{"atoms out of range", func() (*Answer, error) {
			m := mustRead(t, "C=CC=C")
			return Cycloaddition(m, mustRead(t, "C=C"), []int{0, 1, 2, 9}, []int{0, 1})
		}, "no path"},
	} {
		_, err := c.ask()
		var e *molecule.Error
		if !errors.As(err, &e) || !strings.Contains(e.Reason, c.reason) || e.Remedy == "" {
			t.Errorf("%s: %v", c.name, err)
		}
	}
	_, err := Closure(mustRead(t, "C=CC=[CH2:1]"))
	var e *molecule.Error
	if !errors.As(err, &e) || e.Column != 6 || !strings.Contains(e.Excerpt(), "^") {
		t.Errorf("the mapped atom is not pointed at: %v", err)
	}
}
