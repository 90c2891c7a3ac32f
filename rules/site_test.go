package rules

import (
	"testing"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Rules that ask the ring of the site fire there and stay quiet where the group in
// question is on another ring, or does no harm; common practice (no source).
func TestRulesAskTheSite(t *testing.T) {
	for _, row := range []struct {
		smiles string // the site is mapped 1
		code   string
		event  terms.Event
		class  string
		fires  bool
	}{
		{"Cl[c:1]1ccccc1", "unactivated-halide", terms.NucleophilicSubstitution, "", true},
		{"Cl[c:1]1cccc(C=O)c1", "unactivated-halide", terms.NucleophilicSubstitution, "", true},
		{"Cl[c:1]1ccccc1-c1ccncc1", "unactivated-halide", terms.NucleophilicSubstitution, "", true},
		{"Br[c:1]1ccsc1", "unactivated-halide", terms.NucleophilicSubstitution, "", true},
		{"Cl[c:1]1ccc(cc1)[N+](=O)[O-]", "unactivated-halide", terms.NucleophilicSubstitution, "", false},
		{"F[c:1]1ccccc1C#N", "unactivated-halide", terms.NucleophilicSubstitution, "", false},
		{"Cl[c:1]1ccncc1", "unactivated-halide", terms.NucleophilicSubstitution, "", false},
		{"Cl[c:1]1ccc2ncccc2c1", "unactivated-halide", terms.NucleophilicSubstitution, "", false},
		{"F[c:1]1c(F)c(F)c(F)c(F)c1F", "unactivated-halide", terms.NucleophilicSubstitution, "", false},
		{"Cl[c:1]1ccc(cc1)C(F)(F)F", "unactivated-halide", terms.NucleophilicSubstitution, "", false},
		{"O=[N+]([O-])c1c[cH:1]ccc1", "friedel-crafts-deactivated", terms.ElectrophilicSubstitution, "acylation", true},
		{"CS(=O)(=O)c1ccc(cc1)-c1cc[cH:1]o1", "friedel-crafts-deactivated", terms.ElectrophilicSubstitution, "acylation", false},
		{"O=S(=O)(c1ccccc1)N1CCc2c[cH:1]ccc12", "friedel-crafts-deactivated", terms.ElectrophilicSubstitution, "acylation", false},
		{"c1c[cH:1]cnc1", "friedel-crafts-basic-nitrogen", terms.ElectrophilicSubstitution, "acylation", true},
		{"Nc1cc[cH:1]cc1", "friedel-crafts-basic-nitrogen", terms.ElectrophilicSubstitution, "acylation", true},
		{"CC(=O)Nc1cc[cH:1]cc1", "friedel-crafts-basic-nitrogen", terms.ElectrophilicSubstitution, "acylation", false},
		{"[cH:1]1c[nH]c2ccncc12", "friedel-crafts-basic-nitrogen", terms.ElectrophilicSubstitution, "acylation", false},
		{"c1ccn2cc[cH:1]c2c1", "friedel-crafts-basic-nitrogen", terms.ElectrophilicSubstitution, "acylation", false},
		{"F[c:1]1ccc(C=O)cc1Cl", "which-halide-fluoride", terms.NucleophilicSubstitution, "", true},
		{"Cl[c:1]1ccnc(n1)-c1ccc(F)cc1", "which-halide-fluoride", terms.NucleophilicSubstitution, "", false},
	} {
		m, err := molecule.ParseSMILES(row.smiles)
		if err != nil {
			t.Fatal(err)
		}
		s := &Situation{Molecules: []*molecule.Molecule{m}, Event: row.event, Incoming: row.class, Site: []int{m.AtomByMap(1)}}
		fires := false
		for _, r := range Outside(s) {
			fires = fires || r.Code == row.code
		}
		if fires != row.fires {
			t.Errorf("%s on %s: fires %v, want %v", row.code, row.smiles, fires, row.fires)
		}
	}
}
