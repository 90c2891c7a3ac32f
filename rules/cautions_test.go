package rules

import (
	"testing"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/rules/agents"
)

// The usual caution of an agent by its name, and no text of another; common practice
// (no source).
func TestCautionsOfAgents(t *testing.T) {
	for _, row := range []struct {
		words, code string
		fires       bool
	}{
		{"HF, H2O", "hydrofluoric-acid", true},
		{"HF-pyridine, THF", "hydrofluoric-acid", true},
		{"HF·pyridine", "hydrofluoric-acid", true},
		{"HF•pyridine", "hydrofluoric-acid", true},
		{"HF, pyridine", "hydrofluoric-acid", true},
		{"HF/pyridine", "hydrofluoric-acid", true},
		{"HCl", "hydrofluoric-acid", false},
		{"BBr3, DCM", "fuming-halide", true},
		{"TiCl4, DCM", "fuming-halide", true},
		{"InCl3, DCM", "fuming-halide", false},
		{"DIBAL, toluene", "metal-alkyl", true},
		{"DIBAL, toluene", "hydride", true},
		{"Et2Zn (1 M in hexane)", "metal-alkyl", true},
		{"Me3Al", "metal-alkyl", true},
		{"Me3Al", "organolithium", false},
		{"allylMgBr", "organolithium", true},
		{"DAST", "sulfur-fluoride", true},
		{"Deoxo-Fluor", "sulfur-fluoride", true},
		{"DEAD, PPh3", "azodicarboxylate", true},
		{"DIAD, PPh3", "azodicarboxylate", true},
		{"EDC, HOBt", "dry-hydroxybenzotriazole", true},
		{"IBX", "iodine-v-oxidant", true},
		{"DMP, DCM", "iodine-v-oxidant", true},
		{"Pb(OAc)4", "toxic-metal-oxidant", true},
		{"SeO2, dioxane", "toxic-metal-oxidant", true},
		{"OsO4, NMO", "toxic-metal-oxidant", true},
		{"K2Cr2O7, H2SO4", "toxic-metal-oxidant", true},
		{"K2Cr2O7, H2SO4", "oxidant", true},
		{"LiClO4 (5 M), Et2O", "oxidant", true},
		{"AlCl3, CS2", "carbon-disulfide", true},
		{"AlCl3, DCM", "carbon-disulfide", false},
		{"Bu3SnH, AIBN, PhMe", "organotin", true},
		{"HN3, PhMe", "organic-azide", true},
		{"Na, NH3", "alkali-metal", true},
		{"Li, liq. NH3", "alkali-metal", true},
		{"NaH, LiCl", "alkali-metal", false},
		{"MeNO2, NaOMe", "nitroalkane-base", true},
		{"MeNO2, AlCl3", "nitroalkane-base", false},
		{"NBS, CCl4", "toxic-solvent", true},
		{"HMPA, THF", "toxic-solvent", true},
		{"O3, DCM", "ozonide", true},
		{"H2O2 30%", "peroxide", true},
		{"HCN", "cyanide", true},
		{"BrCN", "cyanide", true},
		{"TsN3", "organic-azide", true},
		{"Bu3SnN3", "organic-azide", true},
		{"diphosgene", "phosgene-type", true},
		{"triphosgene", "phosgene-type", true},
		{"COCl2", "phosgene-type", true},
		{"ClCH2OMe", "strong-alkylator", true},
	} {
		s := &Situation{Agents: agents.ParseWords(row.words)}
		if fires(s, row.code) != row.fires {
			t.Errorf("%s with %s: fires %v, want %v", row.code, row.words, !row.fires, row.fires)
		}
	}
}

// Lewis acids and hydrogen halides do not get the text of other reagents; common
// practice (no source).
func TestPreciseCautions(t *testing.T) {
	for _, row := range []struct {
		substrate, partner, class, words, code string
		event                                  terms.Event
		fires                                  bool
	}{
		{"COc1ccccc1", "", "acylation", "AcCl, AlCl3", "friedel-crafts", terms.ElectrophilicSubstitution, true},
		{"c1ccccc1", "CCCl", "alkylation", "AlCl3", "friedel-crafts", terms.ElectrophilicSubstitution, true},
		{"COc1ccccc1", "", "acylation", "Ac2O, BF3·OEt2", "friedel-crafts", terms.ElectrophilicSubstitution, false},
		{"COc1ccccc1", "", "acylation", "Ac2O, InCl3", "friedel-crafts", terms.ElectrophilicSubstitution, false},
		{"COc1ccccc1", "", "acylation", "AcCl, InCl3", "friedel-crafts", terms.ElectrophilicSubstitution, true},
		{"COc1ccccc1", "O=C(Cl)c1ccccc1", "acylation", "InCl3", "friedel-crafts", terms.ElectrophilicSubstitution, true},
		{"C=CCC", "", "bromination", "HBr, AcOH", "halogenation", terms.ElectrophilicAddition, false},
		{"C=CCC", "", "bromination", "Br2, AcOH", "halogenation", terms.ElectrophilicAddition, true},
		{"C=CCC", "", "bromination", "NBS, HBr", "halogenation", terms.ElectrophilicAddition, true},
		{"COc1ccccc1", "", "bromination", "HBr, H2O2", "halogenation", terms.ElectrophilicSubstitution, true},
		{"C=CC=C", "CCOC(=O)N=NC(=O)OCC", "", "toluene", "azodicarboxylate", terms.CycloadditionOrientation, true},
		{"C=CC=C", "O=[O+][O-]", "", "DCM", "ozonide", terms.CycloadditionOrientation, true},
		{"c1ccccc1", "N#CBr", "", "AlCl3", "cyanide", terms.ElectrophilicSubstitution, true},
		{"c1ccccc1", "C#N", "", "AlCl3, HCl", "cyanide", terms.ElectrophilicSubstitution, true},
		{"c1ccccc1", "CC#N", "", "AlCl3, HCl", "cyanide", terms.ElectrophilicSubstitution, false},
		{"Cc1ccccc1", "", "alkylation", "Et2Zn", "directed-metalation", terms.ElectrophilicSubstitution, false},
		{"Cc1ccccc1", "", "alkylation", "nBuLi", "directed-metalation", terms.ElectrophilicSubstitution, true},
	} {
		s := &Situation{Event: row.event, Incoming: row.class, Agents: agents.ParseWords(row.words)}
		for _, x := range []string{row.substrate, row.partner} {
			if x == "" {
				continue
			}
			m, err := molecule.ParseSMILES(x)
			if err != nil {
				t.Fatal(err)
			}
			s.Molecules = append(s.Molecules, m)
		}
		if fires(s, row.code) != row.fires {
			t.Errorf("%s on %s with %s: fires %v, want %v", row.code, row.substrate, row.words, !row.fires, row.fires)
		}
	}
}
