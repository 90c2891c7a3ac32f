package reactivity

import (
	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Conditions say how a molecule is attacked, as far as the chemist has stated it.
type Conditions struct {
	Set    *frontier.Set // parameter set; nil means the default set
	Medium terms.Medium  // "" is unknown
	// Incoming is what comes in, where it is known: the class of an electrophile
	// ("nitration", "chlorination", "bromination", "iodination", "acylation",
	// "formylation", "sulfonation", "other"), or the atom of a nucleophile that binds
	// ("N", "O", "S"). Empty means unknown.
	Incoming string
	// Nucleophile is the symbol of the nucleophilic atom where it is known: "N", "O",
	// "S", "C". Empty means unknown.
	Nucleophile string
	Twists      []frontier.Twist
	// NoLimits leaves out the limits on chances and indices, which cost about a third of
	// the time.
	NoLimits bool
	// Only restricts the judgement to one event; empty means all that apply.
	Only terms.Event
	// Terse leaves out what a survey does not print: all indices but the localization
	// energy, the limits on indices, and the words of Because and Disagree.
	Terse bool
}

// Value is an index with its 90 % limits from the covariance of the parameters.
// Limits is nil where there are none (a plain hydrocarbon, a set without covariance).
type Value struct {
	X      float64
	Limits *[2]float64
	Absent string // why there is no value; X is then meaningless
	Note   string // why the value is unreliable
}

// Site is a set of equivalent atoms that one event may hit, with its rank.
type Site struct {
	Rank  int
	Atoms []int // atom indices in the molecule given, ascending
	// Chance is the probability that this set is the recorded main product; it is
	// not a yield and not an isomer ratio. Nil where the event has no fitted chances.
	Chance *float64
	Limits *[2]float64
	// Because names the terms that decided against the runner-up (for the first site)
	// or against this site (for the others), in words and numbers.
	Because string
	// Named indices in the order of reports: see IndexNames.
	Index map[string]Value
	// Ipso marks a substituted carbon, listed apart and not in the sum of chances.
	Ipso bool
	// Leaving is the leaving group of a nucleophilic substitution ("Cl", "SO2Me", …).
	Leaving string
}

// Attack is the ranking of the sites of one molecule for one event.
type Attack struct {
	Event        terms.Event
	Sites        []Site // by rank
	Ipso         []Site // substituted carbons, ranked apart
	Call         terms.Call
	ChanceAbsent string   // why no chance is printed
	Disagree     string   // which indices would put another site first
	Species      []string // canonical SMILES of the species computed, with their weights where two were mixed
	Notes        []string
}

// Judgement holds everything said of one molecule.
type Judgement struct {
	Molecule *molecule.Molecule
	Pi       *frontier.Pi
	Solution *frontier.Solution
	Attacks  []Attack
	Warnings []string
	Borrowed []string
}
