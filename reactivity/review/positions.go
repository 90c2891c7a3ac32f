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
	stepHeader  = regexp.MustCompile(`^\s*\[\[\s*(?:step|"step"|'step')\s*\]\]`)
	otherHeader = regexp.MustCompile(`^\s*\[+\s*["']?([^\]."']+)["']?\s*(?:\.\s*["']?([^\]"']+)["']?\s*)?\]`)
	keyLine     = regexp.MustCompile(`^\s*(?:"([^"]*)"|'([^']*)'|([A-Za-z0-9_-]+))\s*[.=]`)
)

// findPositions scans the text line by line, passing over strings, comments and arrays
// of several lines.
func findPositions(text string) *positions {
	p := &positions{lines: strings.Split(text, "\n"), keys: []map[string]int{{}}}
	here := p.keys[0]
	note := func(where map[string]int, key string, line int) {
		if _, known := where[key]; !known {
			where[key] = line
		}
	}
	var v value
	for n, line := range p.lines {
		if v.open() {
			v.scan(line)
			continue
		}
		if stepHeader.MatchString(line) {
			p.steps = append(p.steps, n+1)
			here = map[string]int{}
			p.keys = append(p.keys, here)
			continue
		}
		if h := otherHeader.FindStringSubmatch(line); h != nil {
			if strings.TrimSpace(h[1]) == "step" && h[2] != "" {
				note(p.keys[len(p.keys)-1], strings.TrimSpace(h[2]), n+1)
			} else {
				note(p.keys[0], strings.TrimSpace(h[1]), n+1)
			}
			here = map[string]int{} // keys of a table that is no step
			continue
		}
		if k := keyLine.FindStringSubmatchIndex(line); k != nil {
			m := keyLine.FindStringSubmatch(line)
			note(here, m[1]+m[2]+m[3], n+1)
			v.scan(line[k[1]-1:])
		}
	}
	return p
}

// value follows a TOML value over its lines.
type value struct {
	quote string // delimiter of the string of several lines that is open, or ""
	depth int    // open brackets and braces
}

func (v *value) open() bool { return v.quote != "" || v.depth > 0 }

func (v *value) scan(line string) {
	for i := 0; i < len(line); i++ {
		rest := line[i:]
		if v.quote != "" {
			switch {
			case line[i] == '\\' && v.quote == `"""`:
				i++
			case strings.HasPrefix(rest, v.quote):
				i += 2
				v.quote = ""
			}
			continue
		}
		switch c := line[i]; {
		case c == '#':
			return
		case strings.HasPrefix(rest, `"""`), strings.HasPrefix(rest, `'''`):
			v.quote = rest[:3]
			i += 2
		case c == '"', c == '\'':
			for i++; i < len(line) && line[i] != c; i++ {
				if line[i] == '\\' && c == '"' {
					i++
				}
			}
		case c == '[', c == '{':
			v.depth++
		case c == ']', c == '}':
			v.depth--
		}
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
	return p.keys[0]["step"] // steps written as one array
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
