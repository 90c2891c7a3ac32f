package rules

import (
	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/rules/agents"
)

// Situation is what the triggers look at. Every field may be empty.
type Situation struct {
	Molecules   []*molecule.Molecule // reactants; the first is the substrate
	Product     *molecule.Molecule
	Event       terms.Event
	Kind        terms.Kind
	Agents      []agents.Agent
	Incoming    string // class of the electrophile: "nitration", "acylation", …
	Nucleophile string // symbol of the nucleophilic atom
	Medium      terms.Medium
	Activation  terms.Activation
	Site        []int              // atom indices in Molecules[0]: the intended or first-ranked site
	Twists      [][]frontier.Twist // angles that are stated, for each molecule
}

// Group is the kind of an entry.
type Group string

// The groups.
const (
	OutsideGroup  Group = "outside"
	OverrideGroup Group = "override"
	CautionGroup  Group = "caution"
)

// Entry is one rule.
type Entry struct {
	Code    string // stable: reports and comparisons refer to it
	Group   Group
	Text    string // what the report says
	Reason  string
	Example string
	Source  string // a citation, or "common practice"
	applies func(*Situation) bool
}

// Remark is what the report prints of an entry.
type Remark struct{ Code, Text string }

// Outside lists the limits of the model that a situation meets, the overrides first.
func Outside(s *Situation) []Remark {
	list := matching(s, OverrideGroup)
	return append(list, matching(s, OutsideGroup)...)
}

// Cautions lists the usual cautions of a situation.
func Cautions(s *Situation) []Remark { return matching(s, CautionGroup) }

func matching(s *Situation, g Group) []Remark {
	var list []Remark
	for i := range catalogue {
		e := &catalogue[i]
		if e.Group == g && e.applies(s) {
			list = append(list, Remark{Code: e.Code, Text: e.Text})
		}
	}
	return list
}

// Catalogue lists all entries in the order of the documentation.
func Catalogue() []Entry { return append([]Entry(nil), catalogue...) }
