package review

import (
	"regexp"
	"strings"
)

// positions finds the lines of a route file's keys. The TOML decoder knows positions
// by key path only, and all array tables share one path, so that a fault in the
// second of five steps would be placed in the last.
type positions struct {
	lines []string
	steps []int            // line of each [[step]], from 1
	keys  []map[string]int // per step, line of each key; index 0 is the head of the file
}

var (
	stepHeader  = regexp.MustCompile(`^\s*\[\[\s*("?)step("?)\s*\]\]`)
	otherHeader = regexp.MustCompile(`^\s*\[+\s*([^\]]+?)\s*\]+`)
	keyLine     = regexp.MustCompile(`^\s*("?)([A-Za-z0-9_-]+)("?)\s*=`)
)

// findPositions scans the text line by line, passing over multi-line strings.
func findPositions(text string) *positions {
	p := &positions{lines: strings.Split(text, "\n"), keys: []map[string]int{{}}}
	inside := "" // the delimiter of an open multi-line string
	for n, line := range p.lines {
		if inside != "" {
			if i := strings.Index(line, inside); i >= 0 {
				inside = opened(line[i+3:])
			}
			continue
		}
		switch {
		case stepHeader.MatchString(line):
			p.steps = append(p.steps, n+1)
			p.keys = append(p.keys, map[string]int{})
		case keyLine.MatchString(line):
			key := keyLine.FindStringSubmatch(line)[2]
			here := p.keys[len(p.keys)-1]
			if _, known := here[key]; !known {
				here[key] = n + 1
			}
			inside = opened(line)
		}
	}
	return p
}

// opened returns the delimiter of a multi-line string that line opens and does not
// close, or "".
func opened(line string) string {
	for {
		d, at := "", len(line)
		for _, q := range []string{`"""`, `'''`} {
			if i := strings.Index(line, q); i >= 0 && i < at {
				d, at = q, i
			}
		}
		if d == "" {
			return ""
		}
		rest := line[at+3:]
		end := strings.Index(rest, d)
		if end < 0 {
			return d
		}
		line = rest[end+3:]
	}
}

// line is the line of a key in step n (from 0), or of the step's header.
func (p *positions) line(n int, key string) int {
	if n+1 < len(p.keys) {
		if l, ok := p.keys[n+1][key]; ok {
			return l
		}
	}
	if n >= 0 && n < len(p.steps) {
		return p.steps[n]
	}
	return 0
}

// headLine is the line of a key before the first step.
func (p *positions) headLine(key string) int { return p.keys[0][key] }

// text is the line itself, for the message.
func (p *positions) text(line int) string {
	if line < 1 || line > len(p.lines) {
		return ""
	}
	return strings.TrimRight(p.lines[line-1], "\r")
}
