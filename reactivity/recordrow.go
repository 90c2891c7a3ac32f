package reactivity

import (
	"fmt"
	"io"
	"strings"

	"lobecast/frontier/terms"
)

// RecordRow says how often the calls of one event were right on published outcomes.
// The figures are cross-validated over a hash split by substrate; each substrate
// weighs 1.
type RecordRow struct {
	Event       terms.Event
	Outcomes    int        // recorded reactions
	Substrates  int        // distinct substrates
	Top1        float64    // share of substrates whose first site is the recorded one
	Top1Limits  [2]float64 // Wilson, 95 %
	Top2        float64    // first or second
	LogLoss     float64    // natural logarithm
	Calibration float64    // expected calibration error, first chance against its hit
	ChanceLevel float64    // top-1 of choosing at random
	ClearShare  float64    // share of calls marked clear
	ClearRight  float64    // of those, right
	GroupTop1   float64    // top-1 cross-validated over groups; 0 where not computed
}

// String is the row as one sentence.
func (r RecordRow) String() string {
	return fmt.Sprintf("first site right for %.0f %% of %d substrates (95 %% limits %.0f–%.0f %%), first or second for %.0f %%; calls marked clear (%.0f %% of all) right in %.0f %%; chance level %.0f %%",
		100*r.Top1, r.Substrates, 100*r.Top1Limits[0], 100*r.Top1Limits[1], 100*r.Top2, 100*r.ClearShare, 100*r.ClearRight, 100*r.ChanceLevel)
}

// RecordFor is the record of an event; false where no chances are fitted for it.
func RecordFor(e terms.Event) (RecordRow, bool) {
	for _, r := range recordRows() {
		if r.Event == e {
			return r, true
		}
	}
	return RecordRow{}, false
}

// WriteRecord prints the record as a table of at most 100 columns. An empty event
// means all.
func WriteRecord(w io.Writer, event string) error {
	known := false
	for _, e := range terms.Events {
		known = known || string(e) == event
	}
	if event != "" && !known {
		var names []string
		for _, e := range terms.Events {
			names = append(names, string(e))
		}
		return fmt.Errorf("there is no event %q; the events are: %s", event, strings.Join(names, ", "))
	}
	var b strings.Builder
	fmt.Fprintf(&b, "%-28s %8s %6s %19s %6s %9s %6s %7s\n", "event", "outcomes", "substr", "first right (95 %)", "top 2", "log-loss", "clear", "right")
	for _, e := range terms.Events {
		if event != "" && string(e) != event {
			continue
		}
		r, ok := RecordFor(e)
		if !ok {
			fmt.Fprintf(&b, "%-28s ranked only: too few published outcomes for a fit\n", e)
			continue
		}
		fmt.Fprintf(&b, "%-28s %8d %6d %6.3f (%.3f–%.3f) %6.3f %9.3f %6.3f %7.3f\n",
			e, r.Outcomes, r.Substrates, r.Top1, r.Top1Limits[0], r.Top1Limits[1], r.Top2, r.LogLoss, r.ClearShare, r.ClearRight)
	}
	b.WriteString("Cross-validated over a hash split by substrate, each substrate weighing 1. A chance is the\nprobability that a site is the recorded main product; it is not a yield and not an isomer ratio.\n")
	_, err := io.WriteString(w, b.String())
	return err
}
