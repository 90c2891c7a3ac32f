package agents

import (
	"testing"

	"lobecast/frontier/molecule"
)

func TestVocabularySize(t *testing.T) {
	if n := len(table); n < 250 {
		t.Errorf("the vocabulary holds %d agents, want at least 250", n)
	}
}

// Common practice (no source): abbreviations as they stand in notebooks.
func TestParseWords(t *testing.T) {
	for _, c := range []struct {
		text  string
		names []string
		roles Role
	}{
		{"NBS, MeCN, 0 °C", []string{"N-bromosuccinimide", "acetonitrile"}, Brominating},
		{"KNO3, conc. H2SO4, 0 °C to rt, 2 h", []string{"potassium nitrate", "sulfuric acid"}, StrongAcid | Nitrating},
		{"Cs2CO3 (2 equiv), DMF, 80 °C, 16 h", []string{"cesium carbonate", "N,N-dimethylformamide"}, Base},
		{"Pd(PPh3)4 (5 mol%), K2CO3, dioxane/H2O", []string{"tetrakis(triphenylphosphine)palladium", "potassium carbonate", "1,4-dioxane", "water"}, MetalCatalyst},
		{"n-BuLi, THF, -78 °C; then DMF", []string{"n-butyllithium", "tetrahydrofuran", "N,N-dimethylformamide"}, Organometal},
		{"AIBN, NBS in CCl4, reflux", []string{"azobisisobutyronitrile", "N-bromosuccinimide", "carbon tetrachloride"}, RadicalStarter},
		{"hν, benzene", []string{"light", "benzene"}, Light},
		{"350 nm, benzene", []string{"light", "benzene"}, Light},
		{"benzene, medium-pressure Hg lamp", []string{"light", "benzene"}, Light},
		{"sunlight, benzene", []string{"light", "benzene"}, Light},
		{"BF3·OEt2, DCM", []string{"boron trifluoride etherate", "dichloromethane"}, LewisAcid},
		{"H₂SO₄", []string{"sulfuric acid"}, StrongAcid},
		{"2 M HCl, MeOH", []string{"hydrochloric acid", "methanol"}, StrongAcid},
	} {
		got := ParseWords(c.text)
		if len(got) != len(c.names) {
			t.Errorf("%q: read as %v", c.text, got)
			continue
		}
		for i, n := range c.names {
			if got[i].Name != n {
				t.Errorf("%q: agent %d is %q, want %q", c.text, i+1, got[i].Name, n)
			}
		}
		if !Any(got, c.roles) {
			t.Errorf("%q: no agent is %v", c.text, c.roles)
		}
	}
}

func TestUnknownAgentIsPassedOver(t *testing.T) {
	got := ParseWords("frobnicol, MeCN")
	if len(got) != 2 || got[0].Name != "" || got[0].Roles != 0 || got[0].Written != "frobnicol" {
		t.Errorf("read as %+v", got)
	}
}

func TestFromMolecule(t *testing.T) {
	m, err := molecule.ParseSMILES("BrN1C(=O)CCC1=O")
	if err != nil {
		t.Fatal(err)
	}
	a, ok := FromMolecule(m)
	if !ok || a.Delivers != "bromination" {
		t.Errorf("NBS by structure: %+v, %v", a, ok)
	}
}
