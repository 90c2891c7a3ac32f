package reactivity

import (
	"slices"

	"lobecast/frontier"
)

// DefaultSet is the parameter set used where none is named: the calibrated one.
func DefaultSet() *frontier.Set {
	name := "van-catledge-1980"
	if slices.Contains(frontier.Sets(), "calibrated") {
		name = "calibrated"
	}
	set, err := frontier.Load(name)
	if err != nil {
		panic("reactivity: the embedded parameter set " + name + ": " + err.Error())
	}
	return set
}
