package report_test

import (
	"testing"

	"lobecast/frontier/molecule"
	"lobecast/reactivity"
	"lobecast/reactivity/report"
)

// With a Lewis acid a report also gives the gaps without it: those of the same pair judged
// without one, under the names of the arguments in whichever order they are given.
func TestGapsWithoutLewisAcid(t *testing.T) {
	judged := func(a, b string, acid bool) *report.Gaps {
		var m [2]*molecule.Molecule
		for k, s := range []string{a, b} {
			var err error
			if m[k], err = molecule.ParseSMILES(s); err != nil {
				t.Fatal(err)
			}
		}
		j, err := reactivity.Pair(m[0], m[1], reactivity.PairConditions{LewisAcid: acid})
		if err != nil {
			t.Fatal(err)
		}
		if (j.Lewis != nil) != acid {
			t.Fatalf("%s + %s: Lewis acid %v, but its effect is %v", a, b, acid, j.Lewis)
		}
		return report.NewPair(j).Gaps
	}
	const diene, partner = "CC(=C)C=C", "C=CC(=O)OC"
	for _, given := range [][2]string{{diene, partner}, {partner, diene}} {
		with, without := judged(given[0], given[1], true), judged(given[0], given[1], false)
		if without.WithoutHOMOaLUMOb != nil || without.WithoutHOMObLUMOa != nil {
			t.Errorf("%v without a Lewis acid: gaps without it are given a second time", given)
		}
		for _, g := range []struct {
			name              string
			now, then, before *float64
			lower             bool // the acid lowers the LUMO of the partner
		}{
			{"homo_a_lumo_b", with.HOMOaLUMOb, with.WithoutHOMOaLUMOb, without.HOMOaLUMOb, given[0] == diene},
			{"homo_b_lumo_a", with.HOMObLUMOa, with.WithoutHOMObLUMOa, without.HOMObLUMOa, given[0] != diene},
		} {
			switch {
			case g.now == nil || g.then == nil || g.before == nil:
				t.Errorf("%v: a gap %s is missing", given, g.name)
			case *g.then != *g.before:
				t.Errorf("%v: %s without the Lewis acid %.4f |β|, judged without it %.4f", given, g.name, *g.then, *g.before)
			case *g.now < *g.then != g.lower:
				t.Errorf("%v: %s goes from %.4f to %.4f |β| with the Lewis acid", given, g.name, *g.then, *g.now)
			}
		}
	}
}
