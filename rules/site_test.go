package rules

import (
	"testing"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/rules/agents"
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
		{"Cl[c:1]1ccc2ncccc2c1", "unactivated-halide", terms.NucleophilicSubstitution, "", true},
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
		if fires(s, row.code) != row.fires {
			t.Errorf("%s on %s: fires %v, want %v", row.code, row.smiles, !row.fires, row.fires)
		}
	}
}

// A halide is activated by an azine nitrogen or an acceptor ortho or para to it, and by
// the nitrogen of a 2-halo azole; common practice, the halides of the benzo ring of
// quinolines after Joule & Mills, Heterocyclic Chemistry (from memory).
func TestActivatedHalides(t *testing.T) {
	for _, row := range []struct {
		smiles    string // the attacked carbon is mapped 1
		activated bool
	}{
		{"Cl[c:1]1ccccn1", true},
		{"Br[c:1]1cccnc1", false},
		{"Cl[c:1]1ccncc1", true},
		{"Cl[c:1]1cncnc1", false},
		{"Cl[c:1]1ccncn1", true},
		{"Cl[c:1]1cccnn1", true},
		{"Cl[c:1]1ccnnc1", true},
		{"Cl[c:1]1cnccn1", true},
		{"Cl[c:1]1cccc[n+]1[O-]", true},
		{"Cl[c:1]1ccc[n+](C)c1", false},
		{"Cl[c:1]1nccc2ccccc12", true},
		{"Cl[c:1]1cc2ccccc2cn1", true},
		{"Cl[c:1]1ccnc2ccccc12", true},
		{"Cl[c:1]1ccc2ccccc2n1", true},
		{"Cl[c:1]1cnc2ccccc2c1", false},
		{"Cl[c:1]1ccc2ncccc2c1", false},
		{"Cl[c:1]1ccc2cccnc2c1", false},
		{"Cl[c:1]1ncnc2ccccc12", true},
		{"Cl[c:1]1ccc2ncncc2c1", false},
		{"F[c:1]1ccc2cncnc2c1", true},
		{"F[c:1]1ccc2ncncc2c1", false},
		{"F[c:1]1cccc2ncncc12", true},
		{"Cl[c:1]1cccc2nonc12", true},
		{"Cl[c:1]1cccc2[nH]cnc12", false},
		{"Cl[c:1]1ncnc2[nH]cnc12", true},
		{"Cl[c:1]1ncc2[nH]cnc2n1", true},
		{"Cl[c:1]1nc2cncnc2[nH]1", true},
		{"Cl[c:1]1ccnc2[nH]ccc12", true},
		{"Cl[c:1]1ccnc2sccc12", true},
		{"Cl[c:1]1ccnc2ccnn12", true},
		{"Cl[c:1]1ccc2nccn2n1", true},
		{"Cl[c:1]1ccc2nccn2c1", false},
		{"Br[c:1]1ccc2[nH]ccc2c1", false},
		{"Cl[c:1]1nc2ccccc2[nH]1", true},
		{"Cl[c:1]1nc2ccccc2o1", true},
		{"Br[c:1]1nccs1", true},
		{"Br[c:1]1cscn1", false},
		{"Br[c:1]1cnc[nH]1", false},
		{"Br[c:1]1c[nH]cn1", false},
		{"Br[c:1]1cn(C)cn1", false},
		{"Br[c:1]1ncc[nH]1", true},
		{"Br[c:1]1cn[nH]c1", false},
		{"Br[c:1]1cc[nH]n1", false},
		{"Br[c:1]1ccnn1C", false},
		{"Cl[c:1]1n[nH]c2ccccc12", false},
		{"Cl[c:1]1nsc2ccccc12", true},
		{"Br[c:1]1nnc[nH]1", true},
		{"Br[c:1]1ncn(C)n1", true},
		{"Br[c:1]1nnn(C)n1", true},
		{"Br[c:1]1ccsc1", false},
		{"Br[c:1]1ccc(s1)[N+](=O)[O-]", true},
		{"Br[c:1]1csc(c1)[N+](=O)[O-]", false},
		{"Cl[c:1]1n(C)ncc1C=O", true},
		{"Cl[c:1]1c[nH]c2ccccc12", false},
		{"Br[c:1]1ccc2[nH]cc(C=O)c2c1", false},
		{"Cl[c:1]1cccc2c1cccc2[N+](=O)[O-]", true},
		{"F[c:1]1ccc2c(=O)cc[nH]c2c1", true},
		{"F[c:1]1ccc2[nH]ccc(=O)c2c1", false},
		{"Cl[c:1]1cc(=O)[nH]c(=O)[nH]1", true},
		{"Cl[c:1]1c[nH]c(=O)[nH]c1=O", false},
		{"F[c:1]1ccc(cc1)S(C)(=O)=O", true},
		{"F[c:1]1cccc(c1)S(C)(=O)=O", false},
		{"Cl[c:1]1ccccc1", false},
		{"F[c:1]1ccc(cc1)-c1ccccn1", false},
		{"F[c:1]1ccc(cc1)-c1ncccc1", false},
		{"F[c:1]1ccc(cc1)-c1ncccn1", true},
		{"F[c:1]1ccc(cc1)-c1nc2ccccc2o1", true},
	} {
		m, err := molecule.ParseSMILES(row.smiles)
		if err != nil {
			t.Fatal(err)
		}
		for _, site := range [][]int{{m.AtomByMap(1)}, nil} {
			s := &Situation{Molecules: []*molecule.Molecule{m}, Event: terms.NucleophilicSubstitution, Site: site}
			if fires(s, "unactivated-halide") == row.activated {
				t.Errorf("%s, site %v: activated %v, want %v", row.smiles, site, !row.activated, row.activated)
			}
		}
	}
}

// Groups other than halogens leave from activated carbons too; common practice (no source).
func TestLeavingSulfoneOrNitro(t *testing.T) {
	for _, row := range []struct {
		smiles string // the halide that ranks first is mapped 1
		fires  bool
	}{
		{"CS(=O)(=O)c1ncc[c:1](Cl)n1", true},
		{"CS(=O)c1ncc[c:1](Cl)n1", true},
		{"CSc1ncc[c:1](Cl)n1", false},
		{"O=[N+]([O-])c1c(C(=O)OCC)nc(Cl)n[c:1]1Cl", false},
		{"CNC(=O)c1ccc(cc1)S(=O)(=O)c1cc[c:1](F)cc1", false},
		{"O=[N+]([O-])c1ccn[c:1](Cl)c1", true},
		{"O=[N+]([O-])c1cc[c:1](Cl)nc1", false},
		{"O=[N+]([O-])c1cc[c:1](Cl)cc1", false},
		{"O=[N+]([O-])c1cc[c:1](Cl)c([N+](=O)[O-])c1", false},
		{"O=[N+]([O-])c1cc[c:1](Cl)cc1[N+](=O)[O-]", true},
		{"CS(=O)(=O)c1cc[c:1](F)cc1", false},
		{"NS(=O)(=O)c1ncc[c:1](Cl)n1", false},
		{"C[S:1](=O)(=O)c1ncccn1", true},
	} {
		m, err := molecule.ParseSMILES(row.smiles)
		if err != nil {
			t.Fatal(err)
		}
		s := &Situation{Molecules: []*molecule.Molecule{m}, Event: terms.NucleophilicSubstitution, Site: []int{m.AtomByMap(1)}}
		if fires(s, "leaving-sulfone-or-nitro") != row.fires {
			t.Errorf("%s: fires %v, want %v", row.smiles, !row.fires, row.fires)
		}
	}
}

// A biaryl bond that a small ring holds, or whose angle is stated, gives no remark.
func TestTwistedBiaryl(t *testing.T) {
	for _, row := range []struct {
		smiles string
		twists []frontier.Twist
		fires  bool
	}{
		{"Cc1ccccc1-c1ccccc1", nil, true},
		{"Cc1ccccc1-c1ccccc1", []frontier.Twist{{A: 7, B: 8, Degrees: 60}}, false},
		{"Cc1ccccc1-c1ccccc1", []frontier.Twist{{A: 8, B: 7, Degrees: 60}}, false},
		{"Cc1ccccc1-c1ccccc1-c1ccccc1C", []frontier.Twist{{A: 7, B: 8, Degrees: 60}}, true},
		{"Cc1cccc(C)c1-c1ccccn1", nil, true},
		{"c1ccc2c(c1)cccc2-c1cccc2ccccc12", nil, true},
		{"c1ccc(cc1)-c1ccccc1", nil, false},
		{"Cc1ccc(cc1)-c1ccccc1", nil, false},
		{"COc1ccccc1-c1ccccc1", nil, false},
		{"N#Cc1ccccc1-c1ccccc1", nil, false},
		{"c1ccc2c(c1)Cc1ccccc12", nil, false},
		{"Cc1cccc2c1Cc1ccccc12", nil, false},
		{"c1ccc2c(c1)CCc1ccccc12", nil, false},
		{"c1ccc2c(c1)CCCc1ccccc12", nil, true},
		{"Cc1ccccc1Cc1ccc(cc1)-c1ccccc1", nil, false},
	} {
		m, err := molecule.ParseSMILES(row.smiles)
		if err != nil {
			t.Fatal(err)
		}
		s := &Situation{Molecules: []*molecule.Molecule{m}, Event: terms.ElectrophilicSubstitution, Twists: [][]frontier.Twist{row.twists}}
		if fires(s, "twisted-biaryl") != row.fires {
			t.Errorf("%s with %v: fires %v, want %v", row.smiles, row.twists, !row.fires, row.fires)
		}
	}
}

// What practice says of electrophiles on pyrones, anilines in acid, azines, phenols with
// chloroform, and of alkyl cations; common practice (no source).
func TestElectrophilesInPractice(t *testing.T) {
	for _, row := range []struct {
		code, smiles, partner, class, words string // the first-ranked site is mapped 1
		medium                              terms.Medium
		fires                               bool
	}{
		{"pyrone-benzo-ring", "O=c1[cH:1]cc2ccccc2o1", "", "nitration", "HNO3, H2SO4", terms.Acidic, true},
		{"pyrone-benzo-ring", "O=c1ccc2c[cH:1]ccc2o1", "", "nitration", "HNO3, H2SO4", terms.Acidic, false},
		{"pyrone-benzo-ring", "O=c1[cH:1]coc2ccccc12", "", "nitration", "HNO3, H2SO4", terms.Acidic, true},
		{"pyrone-benzo-ring", "O=c1[cH:1]c(-c2ccccc2)oc2ccccc12", "", "nitration", "HNO3, H2SO4", terms.Acidic, true},
		{"pyrone-benzo-ring", "O=c1[cH:1]c(O)c2ccccc2o1", "", "nitration", "HNO3, H2SO4", terms.Acidic, false},
		{"pyrone-benzo-ring", "O=c1[cH:1]cc2ccccc2o1", "", "bromination", "NBS, MeCN", terms.Neutral, false},
		{"free-base-coupling", "CN(C)c1c[cH:1]ccc1", "", "nitrosation", "NaNO2, HCl", terms.Acidic, true},
		{"free-base-coupling", "CN(C)c1cc[cH:1]cc1", "", "nitrosation", "NaNO2, HCl", terms.Acidic, false},
		{"free-base-coupling", "CN(C)c1[cH:1]cccc1", "", "nitrosation", "NaNO2, HCl", terms.Acidic, false},
		{"free-base-coupling", "Nc1c[cH:1]ccc1", "N#[N+]c1ccccc1", "azo coupling", "AcOH", terms.Neutral, true},
		{"free-base-coupling", "Nc1c[cH:1]ccc1", "", "nitration", "HNO3, H2SO4", terms.Acidic, false},
		{"free-base-coupling", "CC(=O)Nc1c[cH:1]ccc1", "", "nitrosation", "NaNO2, HCl", terms.Acidic, false},
		{"azine-hardly-attacked", "c1c[cH:1]cnc1", "", "nitration", "KNO3, H2SO4", terms.Acidic, true},
		{"azine-hardly-attacked", "n1c[cH:1]cnc1", "", "nitration", "KNO3, H2SO4", terms.Acidic, true},
		{"azine-hardly-attacked", "Nc1cc[cH:1]cn1", "", "nitration", "KNO3, H2SO4", terms.Acidic, false},
		{"azine-hardly-attacked", "Cc1cc(C)[cH:1]c(C)n1", "", "nitration", "KNO3, H2SO4", terms.Acidic, false},
		{"azine-hardly-attacked", "[O-][n+]1cc[cH:1]cc1", "", "nitration", "HNO3, H2SO4", terms.Acidic, false},
		{"azine-hardly-attacked", "c1ccc2ncccc2[cH:1]1", "", "nitration", "HNO3, H2SO4", terms.Acidic, false},
		{"azine-hardly-attacked", "c1cnccc1-c1cc[cH:1]cc1", "", "nitration", "HNO3, H2SO4", terms.Acidic, false},
		{"azine-hardly-attacked", "[cH:1]1c[nH]c2ncccc12", "", "nitration", "HNO3, H2SO4", terms.Acidic, false},
		{"azine-hardly-attacked", "O=c1[nH]ccc[cH:1]1", "", "nitration", "HNO3, H2SO4", terms.Acidic, false},
		{"friedel-crafts-rearrangement", "c1c[cH:1]ccc1", "CCCCl", "alkylation", "AlCl3", terms.Neutral, true},
		{"friedel-crafts-rearrangement", "c1c[cH:1]ccc1", "CC(C)CBr", "alkylation", "AlCl3", terms.Neutral, true},
		{"friedel-crafts-rearrangement", "c1c[cH:1]ccc1", "CCCC(C)Cl", "alkylation", "AlCl3", terms.Neutral, true},
		{"friedel-crafts-rearrangement", "c1c[cH:1]ccc1", "CCCO", "alkylation", "H2SO4", terms.Neutral, true},
		{"friedel-crafts-rearrangement", "c1c[cH:1]ccc1", "CCCl", "alkylation", "AlCl3", terms.Neutral, false},
		{"friedel-crafts-rearrangement", "c1c[cH:1]ccc1", "CC(C)Cl", "alkylation", "AlCl3", terms.Neutral, false},
		{"friedel-crafts-rearrangement", "c1c[cH:1]ccc1", "CC(C)(C)Cl", "alkylation", "AlCl3", terms.Neutral, false},
		{"friedel-crafts-rearrangement", "c1c[cH:1]ccc1", "ClC1CCCCC1", "alkylation", "AlCl3", terms.Neutral, false},
		{"friedel-crafts-rearrangement", "c1c[cH:1]ccc1", "ClCc1ccccc1", "alkylation", "AlCl3", terms.Neutral, false},
		{"over-alkylation", "c1c[cH:1]ccc1", "CCCl", "alkylation", "AlCl3", terms.Neutral, true},
		{"over-alkylation", "c1c[cH:1]ccc1", "CC(=O)Cl", "acylation", "AlCl3", terms.Neutral, false},
		{"reimer-tiemann", "Oc1cc[cH:1]cc1", "", "formylation", "CHCl3, NaOH", terms.Neutral, true},
		{"reimer-tiemann", "Oc1cc[cH:1]cc1", "", "formylation", "POCl3, DMF", terms.Neutral, false},
		{"free-aniline-amide-first", "Oc1cc[cH:1]cc1", "", "formylation", "CHCl3, NaOH", terms.Neutral, false},
	} {
		s := &Situation{Event: terms.ElectrophilicSubstitution, Incoming: row.class, Agents: agents.ParseWords(row.words), Medium: row.medium}
		for _, x := range []string{row.smiles, row.partner} {
			if x == "" {
				continue
			}
			m, err := molecule.ParseSMILES(x)
			if err != nil {
				t.Fatal(err)
			}
			s.Molecules = append(s.Molecules, m)
		}
		s.Site = []int{s.Molecules[0].AtomByMap(1)}
		if fires(s, row.code) != row.fires {
			t.Errorf("%s on %s with %s: fires %v, want %v", row.code, row.smiles, row.words, !row.fires, row.fires)
		}
	}
}

// fires tells whether a situation gives the remark or caution of a code.
func fires(s *Situation, code string) bool {
	for _, r := range append(Outside(s), Cautions(s)...) {
		if r.Code == code {
			return true
		}
	}
	return false
}
