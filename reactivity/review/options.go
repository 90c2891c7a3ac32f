package review

import (
	"lobecast/frontier"
	"lobecast/frontier/terms"
)

// Options of a review.
type Options struct {
	Set      *frontier.Set
	Program  string       // name and version for the report
	Medium   terms.Medium // for steps that state none and whose agents do not decide; "" is unknown
	NoLimits bool
}
