package rules

import (
	"testing"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/rules/agents"
)

func TestCatalogueIsComplete(t *testing.T) {
	seen := map[string]bool{}
	for _, e := range Catalogue() {
		if seen[e.Code] {
			t.Errorf("code %s stands twice", e.Code)
		}
		seen[e.Code] = true
		if e.Text == "" || e.Reason == "" || e.Example == "" || e.Source == "" {
			t.Errorf("%s lacks a text, reason, example or source", e.Code)
		}
	}
	if len(seen) < 40 {
		t.Errorf("%d entries, want at least 40", len(seen))
	}
}

// Every trigger must be computable on any molecule: the patterns compile and no
// trigger panics on an empty situation.
func TestTriggersHoldOnAnything(t *testing.T) {
	for _, smiles := range []string{"", "C", "c1ccccc1", "[Na+]", "O=[N+]([O-])c1ccc(Cl)cc1", "CN(C)c1ccc(C=O)cc1"} {
		s := &Situation{}
		if smiles != "" {
			m, err := molecule.ParseSMILES(smiles)
			if err != nil {
				t.Fatal(err)
			}
			s.Molecules = []*molecule.Molecule{m}
			s.Site = []int{0, 99, -1}
		}
		for _, event := range append([]terms.Event{""}, terms.Events...) {
			for _, incoming := range []string{"", "nitration", "bromination", "acylation", "sulfonation"} {
				s.Event, s.Incoming = event, incoming
				s.Agents = agents.ParseWords("NaH, DMF, AlCl3, Pd/C, nBuLi, NaNH2, H2SO4, hν, AIBN")
				for _, k := range terms.Kinds {
					s.Kind = k
					Outside(s)
					Cautions(s)
				}
			}
		}
	}
}

// Common practice (no source): what an experienced chemist would say at once.
func TestEntriesFire(t *testing.T) {
	for _, c := range []struct {
		code, substrate, agents, incoming string
		event                             terms.Event
		kind                              terms.Kind
		partner                           string
		site                              []int
	}{
		{code: "directed-metalation", substrate: "CCN(CC)C(=O)c1ccccc1", agents: "sBuLi, TMEDA, THF, -78 °C", event: terms.ElectrophilicSubstitution},
		{code: "metal-catalysis", substrate: "Clc1ccc(Br)cn1", agents: "Pd(PPh3)4, K2CO3", event: terms.NucleophilicSubstitution},
		{code: "radical-halogenation", substrate: "Cc1ccccc1", agents: "NBS, AIBN, CCl4", incoming: "bromination", event: terms.ElectrophilicSubstitution},
		{code: "free-aniline-amide-first", substrate: "Nc1ccccc1", agents: "AcCl", incoming: "acylation", event: terms.ElectrophilicSubstitution},
		{code: "friedel-crafts-deactivated", substrate: "O=[N+]([O-])c1ccccc1", agents: "AcCl, AlCl3", incoming: "acylation", event: terms.ElectrophilicSubstitution},
		{code: "ipso-labile", substrate: "C[Si](C)(C)c1ccccc1", agents: "Br2", incoming: "bromination", event: terms.ElectrophilicSubstitution},
		{code: "carbonyl-before-ring", substrate: "O=Cc1cccnc1Cl", agents: "EtOH", event: terms.NucleophilicSubstitution},
		{code: "which-halide-fluoride", substrate: "Fc1ccc([N+](=O)[O-])cc1Cl", agents: "DMSO", event: terms.NucleophilicSubstitution},
		{code: "unactivated-halide", substrate: "Brc1ccccc1", agents: "DMF", event: terms.NucleophilicSubstitution},
		{code: "aryne", substrate: "Clc1ccccc1", agents: "NaNH2, NH3", event: terms.NucleophilicSubstitution},
		{code: "azole-nitrogen-first", substrate: "c1ccc2[nH]ccc2c1", agents: "NaH, MeI, DMF", incoming: "alkylation", event: terms.ElectrophilicSubstitution},
		{code: "acid-labile-ring", substrate: "c1ccoc1", agents: "HNO3, H2SO4", incoming: "nitration", event: terms.ElectrophilicSubstitution},
		{code: "nitration-anilinium", substrate: "Nc1ccccc1", agents: "HNO3, H2SO4", incoming: "nitration", event: terms.ElectrophilicSubstitution},
		{code: "sulfonation-reversible", substrate: "c1ccc2ccccc2c1", agents: "oleum", incoming: "sulfonation", event: terms.ElectrophilicSubstitution},
		{code: "addition-not-substitution", substrate: "c1ccc2cc3ccccc3cc2c1", agents: "Br2", incoming: "bromination", event: terms.ElectrophilicSubstitution},
		{code: "hetero-ring-halogenation", substrate: "c1ccc2ncccc2c1", agents: "Br2", incoming: "bromination", event: terms.ElectrophilicSubstitution},
		{code: "one-two-or-one-four", substrate: "O=C1C=CCCC1", agents: "MeLi", event: terms.NucleophilicAddition},
		{code: "blocked-site", substrate: "CC(C)(C)c1ccccc1", incoming: "nitration", event: terms.ElectrophilicSubstitution, site: []int{5}},
		{code: "between-two-groups", substrate: "COc1cccc(OC)c1", incoming: "bromination", event: terms.ElectrophilicSubstitution, site: []int{9}},
		{code: "sigma-acceptors", substrate: "FC(F)(F)c1ccccc1", incoming: "nitration", event: terms.ElectrophilicSubstitution},
		{code: "soft-sulfur", substrate: "Clc1ccc([N+](=O)[O-])cc1", event: terms.NucleophilicSubstitution},
		{code: "tautomers", substrate: "Oc1ccccn1", incoming: "nitration", event: terms.ElectrophilicSubstitution},
		{code: "endo-caveat", substrate: "C=CC=C", partner: "C=CC=O", kind: terms.Cycloaddition},
		{code: "azide-alkyne-copper", substrate: "[N-]=[N+]=Nc1ccccc1", partner: "C#Cc1ccccc1", agents: "CuSO4, sodium ascorbate", kind: terms.Cycloaddition},
		{code: "allowed-not-fast", substrate: "C=CC=CC=C", kind: terms.Electrocyclic},
		{code: "nitration-exotherm", substrate: "Cc1ccccc1", agents: "HNO3", incoming: "nitration", event: terms.ElectrophilicSubstitution},
		{code: "polynitro", substrate: "O=[N+]([O-])c1ccc(Cl)c([N+](=O)[O-])c1", event: terms.NucleophilicSubstitution},
		{code: "organic-azide", substrate: "[N-]=[N+]=Nc1ccccc1", partner: "C=CC=O", kind: terms.Cycloaddition},
		{code: "organolithium", substrate: "Brc1ccccc1", agents: "nBuLi"},
		{code: "hydride", substrate: "c1ccc2[nH]ccc2c1", agents: "NaH, DMF"},
		{code: "snar-dmso-base", substrate: "Fc1ccccc1", agents: "NaH, DMF", event: terms.NucleophilicSubstitution},
		{code: "phosgene-type", substrate: "OC(=O)c1ccccc1", agents: "SOCl2"},
	} {
		s := &Situation{Event: c.event, Kind: c.kind, Incoming: c.incoming, Agents: agents.ParseWords(c.agents), Site: c.site}
		if c.code == "soft-sulfur" {
			s.Nucleophile = "S"
		}
		for _, x := range []string{c.substrate, c.partner} {
			if x == "" {
				continue
			}
			m, err := molecule.ParseSMILES(x)
			if err != nil {
				t.Fatal(err)
			}
			s.Molecules = append(s.Molecules, m)
		}
		found := false
		for _, r := range append(Outside(s), Cautions(s)...) {
			found = found || r.Code == c.code
		}
		if !found {
			t.Errorf("%s does not fire on %s with %q", c.code, c.substrate, c.agents)
		}
	}
}

// A quiet case must stay quiet: no override on an ordinary bromination.
func TestQuietCase(t *testing.T) {
	m, _ := molecule.ParseSMILES("CC(=O)Nc1ccc(OC)cc1")
	s := &Situation{Molecules: []*molecule.Molecule{m}, Event: terms.ElectrophilicSubstitution, Incoming: "bromination", Agents: agents.ParseWords("NBS, MeCN"), Medium: terms.Neutral}
	for _, r := range Outside(s) {
		t.Errorf("unexpected remark %s", r.Code)
	}
}
