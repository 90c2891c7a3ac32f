package place

import (
	"strings"
	"testing"

	"lobecast/frontier/molecule"
)

// relations pairs a molecule, with the atom in question mapped 1, with the words of the
// trade for its place: common practice (no source).
var relations = []struct{ smiles, place string }{
	// benzene rings: the relation to each substituent
	{"COc1cc[cH:1]cc1", "para to OMe"},
	{"COc1ccc[cH:1]c1", "meta to OMe"},
	{"COc1cccc[cH:1]1", "ortho to OMe"},
	{"Oc1cc[cH:1]cc1", "para to OH"},
	{"Oc1c[cH:1]ccc1[N+](=O)[O-]", "meta to OH, para to NO2"},
	{"Cc1ccc([cH:1]c1)[N+](=O)[O-]", "ortho to NO2, meta to Me"},
	{"O=[N+]([O-])c1cc[c:1](F)cc1", "C–F, para to NO2"},
	{"O=[N+]([O-])c1cc[c:1](F)c(c1)[N+](=O)[O-]", "C–F, ortho to NO2, para to NO2"},
	{"Cc1c[cH:1]cc(C)c1", "meta to both Me"},
	{"Cc1cccc(C)[cH:1]1", "ortho to both Me"},
	{"COc1[cH:1]c(OC)cc(OC)c1", "ortho to both OMe, para to OMe"},
	{"[cH:1]1ccccc1", "C of the benzene ring"},
	{"Br[c:1]1ccccc1", "C–Br of the benzene ring"},
	{"CC(=O)Nc1cc[cH:1]cc1", "para to NHC(O)R"},
	{"CC(=O)Nc1c[cH:1]ccc1", "meta to NHC(O)R"},
	{"COC(=O)c1c[cH:1]ccc1N(C)C", "meta to CO2R, para to NMe2"},
	{"N#Cc1cc[cH:1]c(C(F)(F)F)c1", "ortho to CF3, para to CN"},
	{"c1ccc(cc1)-c1cc[cH:1]cc1", "para to aryl"},
	{"O=Cc1c[cH:1]ccc1OCc1ccccc1", "meta to CHO, para to OR"},
	{"CC(C)(C)c1cc[cH:1]cc1", "para to tBu"},
	{"OB(O)c1cc[cH:1]cc1", "para to boron group"},
	{"NS(=O)(=O)c1cc[cH:1]cc1", "para to SO2NR2"},
	// chains
	{"C[C:1](=O)C=C", "carbonyl carbon of the enone"},
	{"CC(=O)[CH:1]=C", "α-carbon of the enone"},
	{"CC(=O)C=[CH2:1]", "β-carbon of the enone"},
	{"CC=C[CH:1]=CC(=O)C", "β-carbon of the enone"},
	{"CC=[CH:1]C=CC(=O)C", "γ-carbon of the enone"},
	{"C[CH:1]=CC=CC(=O)C", "δ-carbon of the enone"},
	{"O=C/C=[CH:1]/c1ccccc1", "β-carbon of the enal"},
	{"COC(=O)C=[CH2:1]", "β-carbon of the α,β-unsaturated ester"},
	{"N#CC=[CH2:1]", "β-carbon of the α,β-unsaturated nitrile"},
	{"N#[C:1]C=C", "nitrile carbon"},
	{"[O-][N+](=O)C=[CH:1]c1ccccc1", "β-carbon of the nitroalkene"},
	{"CS(=O)(=O)C=[CH2:1]", "β-carbon of the vinyl sulfone"},
	{"C[CH:1]=O", "carbonyl carbon of the aldehyde"},
	{"C[C:1](C)=O", "carbonyl carbon of the ketone"},
	{"CO[C:1](C)=O", "carbonyl carbon of the ester"},
	{"C[C:1](=O)Cl", "carbonyl carbon of the acid halide"},
	{"CC(=O)O[C:1](C)=O", "carbonyl carbon of the anhydride"},
	{"C[C:1](=O)N(C)C", "carbonyl carbon of the amide"},
	{"C[CH:1]=NC", "imine carbon"},
	{"C[CH:1]=[N+](C)C", "iminium carbon"},
	{"CN(C)C=[CH2:1]", "β-carbon of the enamine"},
	{"CN(C)[CH:1]=C", "α-carbon of the enamine"},
	{"COC=[CH2:1]", "β-carbon of the enol ether"},
	{"C[Si](C)(C)OC(C)=[CH2:1]", "β-carbon of the silyl enol ether"},
	{"CC([O-])=[CH2:1]", "β-carbon of the enolate"},
	{"c1ccccc1C=[CH2:1]", "β-carbon of the styrene-type alkene"},
	{"c1ccccc1[CH:1]=C", "α-carbon of the styrene-type alkene"},
	{"C=CC=[CH2:1]", "outer carbon of the diene"},
	{"c1ccccc1[C+:1](C)C", "carbocation centre, atom 7"},
	{"[CH2-:1]C(C)C", "carbanion centre, atom 1"},
	{"C=C[CH:1]=C", "inner carbon of the diene"},
	{"[CH2:1]=CC=C[CH2+]", "outer carbon of the diene, atom 1"},
	{"C[CH:1]=C[CH2+]", "end of the allyl cation"},
	{"CC=[CH:1][CH2+]", "central carbon of the allyl cation"},
	{"CC=C[CH2+:1]", "carbocation centre, atom 4"},
	{"[CH2:1]=C[CH2-]", "end of the allyl anion"},
	{"C=[CH:1][CH2-]", "central carbon of the allyl anion"},
	{"[CH2:1]=C[CH2]", "end of the allyl radical"},
	{"C=[CH:1][CH2]", "central carbon of the allyl radical"},
	{"[CH:1]#C[CH2+]", "less substituted carbon of the alkyne"},
	{"CC(C)=[CH2:1]", "less substituted carbon of the alkene"},
	{"C[C:1](C)=C", "more substituted carbon of the alkene"},
	{"CC#[CH:1]", "less substituted carbon of the alkyne"},
	{"C=[C:1]=C", "central carbon of the allene"},
	{"O=C1C=[CH:1]CCC1", "β-carbon of the enone"},
}

func TestRelations(t *testing.T) {
	for _, row := range relations {
		m, orbit := read(t, row.smiles)
		if got := NewNamer(m).Site(orbit); got != row.place {
			t.Errorf("%s: got %q, want %q", row.smiles, got, row.place)
		}
	}
}

// Two ring systems of one kind, or two places of one description, are told apart by
// the atom number; equivalent atoms are not.
func TestAmbiguous(t *testing.T) {
	for _, row := range []struct {
		smiles, place string
	}{
		{"COc1ccc(cc1)CC(F)c1c[cH:1]c(OC)cc1", "ortho to OMe, meta to alkyl, atom 14"},
		{"[cH:1]1cccn1CCc1ccc[nH]1", "C-2 of the pyrrole, atom 1"},
		{"c1c[nH]c2cc[cH:1]cc12", "C-5 of the indole"},
		{"c1cc[cH:1]n1CCn1cccc1", "C-2 of the pyrrole"},
		{"Cc1ccc(CCc2[cH:1]cc(C)cc2)cc1", "ortho to alkyl, meta to Me"},
	} {
		mapped, err := molecule.ParseSMILES(row.smiles)
		if err != nil {
			t.Fatal(err)
		}
		if got := NewNamer(mapped).Site([]int{mapped.AtomByMap(1)}); got != row.place && strings.Contains(row.place, "atom") {
			t.Errorf("%s: got %q, want %q", row.smiles, got, row.place)
		}
		m, orbit := read(t, row.smiles)
		if got := NewNamer(m).Site(orbit); got != row.place {
			t.Errorf("%s: got %q, want %q", row.smiles, got, row.place)
		}
	}
}

// Symmetric sets get the lowest locant of the set.
func TestSymmetricSets(t *testing.T) {
	for _, row := range []struct{ smiles, place string }{
		{"c1ccc2[cH:1]cccc2c1", "C-1 of the naphthalene"},
		{"c1c[cH:1]c2ccccc2c1", "C-1 of the naphthalene"},
		{"[cH:1]1ccc2ccccc2c1", "C-2 of the naphthalene"},
		{"c1ccc2cc3[cH:1]cccc3cc2c1", "C-1 of the anthracene"},
		{"c1ccc2[cH:1]c3ccccc3cc2c1", "C-9 of the anthracene"},
		{"c1ccc2c(c1)[cH:1]cc1ccccc12", "C-9 of the phenanthrene"},
		{"c1ccc2nc3ccc[cH:1]c3nc2c1", "C-1 of the phenazine"},
		{"c1c[cH:1]ncc1", "C-2 of the pyridine"},
		{"c1cc[cH:1][nH]1", "C-2 of the pyrrole"},
		{"c1cn[cH:1]cn1", "C-2 of the pyrazine"},
	} {
		m, orbit := read(t, row.smiles)
		if got := NewNamer(m).Site(orbit); got != row.place {
			t.Errorf("%s: got %q, want %q", row.smiles, got, row.place)
		}
	}
}
