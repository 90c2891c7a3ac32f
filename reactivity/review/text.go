package review

import (
	"sort"
	"strings"

	"lobecast/frontier/molecule"
)

func sortedKeys[V any](m map[string]V) []string {
	keys := make([]string, 0, len(m))
	for k := range m {
		keys = append(keys, k)
	}
	sort.Strings(keys)
	return keys
}

// longLine is the length in bytes above which an excerpt shows only the beginning of a line.
const longLine = 400

// excerpt shows a line of a file.
func excerpt(text string, line int) string {
	lines := strings.Split(text, "\n")
	if line < 1 || line > len(lines) {
		return ""
	}
	s := strings.TrimRight(lines[line-1], "\r")
	if len(s) > longLine {
		// The line of a file that is no text may be all of it.
		s = strings.TrimRight((&molecule.Error{Text: s}).Excerpt(), "\n")
	}
	return "  " + s
}
