package review

import (
	"strings"
	"unicode/utf8"
)

// nearest returns the word of the list that is closest to what was written, or ""
// where none is close enough to be meant.
func nearest(written string, words []string) string {
	written = strings.ToLower(strings.TrimSpace(written))
	best, least := "", 1+max(2, utf8.RuneCountInString(written)/3)
	for _, w := range words {
		if d := distance(written, strings.ToLower(w)); d < least {
			best, least = w, d
		}
	}
	if best == "" && len(written) >= 3 {
		for _, w := range words {
			if strings.HasPrefix(strings.ToLower(w), written) || strings.Contains(strings.ToLower(w), written) {
				return w
			}
		}
	}
	return best
}

// distance counts the insertions, deletions, replacements and swaps of neighbours
// that turn a into b.
func distance(a, b string) int {
	x, y := []rune(a), []rune(b)
	if len(x) > 64 || len(y) > 64 {
		return 64
	}
	before, last, row := make([]int, len(y)+1), make([]int, len(y)+1), make([]int, len(y)+1)
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(x); i++ {
		row[0] = i
		for j := 1; j <= len(y); j++ {
			cost := 1
			if x[i-1] == y[j-1] {
				cost = 0
			}
			row[j] = min(last[j]+1, row[j-1]+1, last[j-1]+cost)
			if i > 1 && j > 1 && x[i-1] == y[j-2] && x[i-2] == y[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
		}
		before, last, row = last, row, before
	}
	return last[len(y)]
}
