package report

import (
	"strings"
	"testing"
)

// A unit stays on the line of its number.
func TestWrapKeepsUnits(t *testing.T) {
	var b strings.Builder
	text := strings.Repeat("x", BriefWidth-6) + " 84–88 % of 0.3 |β|"
	wrap(&b, text, "", "  ")
	want := strings.Repeat("x", BriefWidth-6) + "\n  84–88 % of 0.3 |β|\n"
	if b.String() != want {
		t.Errorf("wrapped as %q, want %q", b.String(), want)
	}
}
