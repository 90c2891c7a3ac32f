package rules

// catalogue is all entries: overrides, limits of the model, cautions.
var catalogue = concat(overrides, limits, cautions)

func concat(lists ...[]Entry) []Entry {
	var all []Entry
	for _, l := range lists {
		all = append(all, l...)
	}
	return all
}

const common = "common practice"
