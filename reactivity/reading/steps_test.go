package reading

import (
	"testing"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Steps as a chemist writes them, and what each is; common practice (no source).
func TestWrittenSteps(t *testing.T) {
	for _, row := range []struct {
		reaction, agents string
		kind             terms.Kind
		nearest          string
	}{
		{"Clc1ccc2ncccc2c1.C1CCNCC1>>C1CCN(CC1)c1ccc2ncccc2c1", "Pd2(dba)3, XPhos, NaOtBu, PhMe", terms.OtherStep, "metal-catalysed amination"},
		{"C1OC1c1ccccc1.NC(C)C>>CC(C)NCC(O)c1ccccc1", "EtOH, reflux", terms.OtherStep, "epoxide opening"},
		{"C1CCC(=CC1)N1CCCC1.C=CC(=O)OC>>COC(=O)CCC1CCCC=C1N1CCCC1", "dioxane", terms.OtherStep, "conjugate addition of a carbon nucleophile"},
		{"Nc1ccc(C)cc1>>Brc1ccc(C)cc1", "NaNO2, HBr, CuBr", terms.OtherStep, "diazotization and replacement of N2"},
		{"C=CCc1ccccc1>>OCCCc1ccccc1", "BH3·THF; H2O2, NaOH", terms.OtherStep, "hydroboration and oxidation"},
		{"C=Cc1ccccc1>>OC(CBr)c1ccccc1", "NBS, H2O, DMSO", terms.OtherStep, "halohydrin formation"},
		{"Oc1ccccc1>>Oc1c(Br)cc(Br)cc1Br", "Br2, H2O", terms.OtherStep, "substitution at several positions"},
		{"O=Cc1ccccc1.CC(C)=O>>CC(=O)/C=C/c1ccccc1", "NaOH, EtOH", terms.OtherStep, "aldol-type condensation"},
		{"NCCc1c[nH]c2ccccc12.O=Cc1ccccc1>>C1(c2ccccc2)NCCc2c1[nH]c1ccccc12", "TFA, DCM", terms.OtherStep, "ring closure by condensation"},
		{"C=CCOc1ccccc1>>C=CCc1ccccc1O", "neat, 200 °C", terms.Sigmatropic, ""},
		{"C=CC#N.C1COCCN1>>N#CCCN1CCOCC1", "neat, rt", terms.Kind(terms.NucleophilicAddition), ""},
		{"Cn1cccc1.CN(C)C=O>>Cn1cccc1C=O", "POCl3, DMF, 0 °C", terms.Kind(terms.ElectrophilicSubstitution), ""},
		{"c1ccc2[nH]ccc2c1.C=O.CNC>>CN(C)Cc1c[nH]c2ccccc12", "AcOH", terms.Kind(terms.ElectrophilicSubstitution), ""},
		{"Clc1ccnc(Cl)n1.Nc1ccccc1>>Clc1nccc(Nc2ccccc2)n1", "DIPEA, iPrOH, 80 °C", terms.Kind(terms.NucleophilicSubstitution), ""},
		{"C=CCN(CC=C)C(C)=O>>C1=CCN(C1)C(C)=O", "Grubbs II, DCM", terms.OtherStep, "ring-closing metathesis"},
		{"C=CCOC(C)=O>>C=CCCC(=O)O", "LDA, TMSCl, THF", terms.OtherStep, "rearrangement"},
		{"C=CC(O)(C)CC=C>>CC(=O)CCCC=C", "KH, THF", terms.Sigmatropic, ""},
		{"O=C1C=CCCC1.C=C>>O=C1CCCC2CCC12", "MeCN", terms.Cycloaddition, ""},
		{"C1=CCCCC1>>C=CC=C.C=C", "", terms.Cycloaddition, ""},
		{"C=CCC(C)=O>>CC=CC(C)=O", "DBU, THF", terms.OtherStep, "rearrangement"},
		{"CC(=O)Oc1ccccc1>>CC(=O)c1ccccc1O", "AlCl3", terms.OtherStep, "rearrangement"},
		{"O=S1(=O)CC=CC1>>C=CC=C", "PhMe", terms.Cheletropic, ""},
		{"CC(C)=CC>>CC(C)(Br)CC", "HBr, AcOH", terms.Kind(terms.ElectrophilicAddition), ""},
	} {
		rxn, err := molecule.ParseReaction(row.reaction)
		if err != nil {
			t.Fatal(err)
		}
		r, err := Read(rxn, row.agents, Stated{})
		if err != nil {
			t.Fatal(err)
		}
		if r.Kind != row.kind || r.Nearest != row.nearest {
			t.Errorf("%s (%s): %s %q, want %s %q", row.reaction, row.agents, r.Kind, r.Nearest, row.kind, row.nearest)
		}
	}
}
