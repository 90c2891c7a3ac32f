// Package terms holds the words that the rules and the ranking share: kinds of
// step, events, media and what a molecule is attacked by. It imports nothing of
// the project.
package terms

// Toward says what attacks: an electrophile, a nucleophile or a radical.
type Toward string

// What a site can be attacked by.
const (
	Electrophile Toward = "electrophile"
	Nucleophile  Toward = "nucleophile"
	Radical      Toward = "radical"
)

// Towards lists the three in the order of reports.
var Towards = []Toward{Electrophile, Nucleophile, Radical}

// Event is one kind of attack, with its own candidate sites and its own fit.
type Event string

// The events a site or a pair of sites can undergo.
const (
	ElectrophilicSubstitution Event = "electrophilic substitution"
	ElectrophilicAddition     Event = "electrophilic addition"
	NucleophilicSubstitution  Event = "nucleophilic substitution"
	NucleophilicAddition      Event = "nucleophilic addition"
	RadicalSubstitution       Event = "radical substitution"
	RadicalAddition           Event = "radical addition"
	CycloadditionOrientation  Event = "cycloaddition, orientation"
	CycloadditionJoining      Event = "cycloaddition, which π systems"
)

// Events lists all events in the order of reports.
var Events = []Event{
	ElectrophilicSubstitution, ElectrophilicAddition,
	NucleophilicSubstitution, NucleophilicAddition,
	RadicalSubstitution, RadicalAddition,
	CycloadditionOrientation, CycloadditionJoining,
}

// Toward is what attacks in an event; empty for cycloadditions.
func (e Event) Toward() Toward {
	switch e {
	case ElectrophilicSubstitution, ElectrophilicAddition:
		return Electrophile
	case NucleophilicSubstitution, NucleophilicAddition:
		return Nucleophile
	case RadicalSubstitution, RadicalAddition:
		return Radical
	}
	return ""
}

// Kind is a kind of step in a route file: one of the six site events by name, or
// one of the pericyclic kinds, or other.
type Kind string

// The kinds of step beyond the site events.
const (
	Cycloaddition Kind = "cycloaddition"
	Electrocyclic Kind = "electrocyclic"
	Sigmatropic   Kind = "sigmatropic"
	Cheletropic   Kind = "cheletropic"
	Ene           Kind = "ene"
	OtherStep     Kind = "other"
)

// Kinds lists every word a route file may give as kind.
var Kinds = []Kind{
	Kind(ElectrophilicSubstitution), Kind(ElectrophilicAddition),
	Kind(NucleophilicSubstitution), Kind(NucleophilicAddition),
	Kind(RadicalSubstitution), Kind(RadicalAddition),
	Cycloaddition, Electrocyclic, Sigmatropic, Cheletropic, Ene, OtherStep,
}

// Medium is the acidity a substrate reacts in.
type Medium string

// The media.
const (
	Neutral       Medium = "neutral"
	Acidic        Medium = "acidic"
	UnknownMedium Medium = "unknown"
)

// Media lists the words a user may give.
var Media = []Medium{Neutral, Acidic, UnknownMedium}

// Activation is what drives a pericyclic step.
type Activation string

// The activations.
const (
	Thermal       Activation = "thermal"
	Photochemical Activation = "photochemical"
)

// Call is how far a ranking can be relied on (design: clear, leaning, split, open).
type Call string

// The calls.
const (
	Clear   Call = "clear"   // first chance ≥ 0.80 and its lower limit > 0.50
	Leaning Call = "leaning" // first chance ≥ 0.50 otherwise
	Split   Call = "split"   // first chance < 0.50
	Open    Call = "open"    // no chance is printed
)

// Standing is how an intended site fares in its ranking.
type Standing string

// The standings of a step.
const (
	Supported Standing = "supported"
	Contested Standing = "contested"
	Opposed   Standing = "opposed"
	Forbidden Standing = "forbidden"
	NotJudged Standing = "not judged"
)
