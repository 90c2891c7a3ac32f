// Package nesting looks at TOML before it is decoded and refuses what is nested deeper
// than any route, report or parameter set: the cost of decoding grows with the square of
// the depth, in time and in memory.
package nesting

import (
	"fmt"
	"strings"
)

// MaxDepth is how deep arrays and inline tables may be nested, and how many parts a
// dotted key may have.
const MaxDepth = 64

// Check refuses text whose brackets or keys are nested deeper than [MaxDepth]; line counts
// from 1 and is 0 where err is nil. Strings and comments are passed over. Text that is no
// TOML may pass: the decoder refuses it.
func Check(text string) (line int, err error) {
	line = 1
	depth, dots, afterEquals := 0, 0, false
	for i := 0; i < len(text); {
		switch c := text[i]; c {
		case '\n':
			line++
			i++
			if depth == 0 {
				dots, afterEquals = 0, false
			}
			continue
		case '#':
			for i < len(text) && text[i] != '\n' {
				i++
			}
			continue
		case '"', '\'':
			n, lines := quoted(text[i:])
			i += n
			line += lines
			continue
		case '[', '{':
			depth++
			if c == '{' {
				dots, afterEquals = 0, false
			}
		case ']', '}':
			depth = max(depth-1, 0)
		case '=':
			afterEquals = true
		case ',':
			dots, afterEquals = 0, false
		case '.':
			// A value holds one dot at most; a key one between two parts.
			if !afterEquals {
				dots++
			}
		}
		if depth > MaxDepth {
			return line, fmt.Errorf("brackets are nested more than %d deep", MaxDepth)
		}
		if dots > MaxDepth {
			return line, fmt.Errorf("a key has more than %d parts", MaxDepth)
		}
		i++
	}
	return 0, nil
}

// quoted is the length of the string that text begins with, and its line ends. A string of
// one line that is left open ends with its line.
func quoted(text string) (n, lines int) {
	q := text[:1]
	if triple := strings.Repeat(q, 3); strings.HasPrefix(text, triple) {
		n = 3
		for n < len(text) && !strings.HasPrefix(text[n:], triple) {
			switch {
			case text[n] == '\\' && q == `"` && n+1 < len(text) && text[n+1] != '\n':
				n++
			case text[n] == '\n':
				lines++
			}
			n++
		}
		return min(n+3, len(text)), lines
	}
	for n = 1; n < len(text) && text[n] != '\n'; n++ {
		if text[n] == '\\' && q == `"` && n+1 < len(text) && text[n+1] != '\n' {
			n++
			continue
		}
		if text[n] == q[0] {
			return n + 1, 0
		}
	}
	return n, 0
}
