package reading

import (
	"lobecast/frontier/terms"
	"lobecast/rules/agents"
)

// MediumOf is the medium a step runs in, and what decided: what is stated first, then
// the agents. A nitration whose agents show no strong acid beside the nitric acid is
// left unknown, since about half of the recorded ones run in strong acid all the same.
func MediumOf(event terms.Event, list []agents.Agent, stated terms.Medium) (terms.Medium, string) {
	if stated != "" {
		return stated, "stated"
	}
	nitrating := false
	for _, a := range list {
		if a.Roles&agents.Nitrating != 0 {
			nitrating = true
		}
		// Hydrogen halides recorded as structures stand mostly for a salt or a work-up;
		// written in words they are meant.
		if a.Roles&agents.StrongAcid != 0 && a.Roles&agents.Nitrating == 0 && (a.Roles&agents.Workup == 0 || !a.Recorded) || a.Name == "mixed acid" {
			return terms.Acidic, a.Name + " among the agents"
		}
	}
	if nitrating && event == terms.ElectrophilicSubstitution {
		return terms.UnknownMedium, "a nitration without another strong acid beside the nitric acid"
	}
	for _, a := range list {
		if a.Roles&(agents.Base|agents.StrongBase) != 0 {
			return terms.Neutral, a.Name + " among the agents"
		}
	}
	if len(list) == 0 {
		return terms.UnknownMedium, "no agents are given"
	}
	return terms.Neutral, "no strong acid among the agents"
}
