package molecule

import (
	"strings"
	"unicode/utf8"
)

// excerptWidth is the number of characters of a line that an excerpt shows at most.
const excerptWidth = 76

// refuse is a refusal at a byte offset of a text of one line.
func refuse(text string, offset int, reason, remedy string) *Error {
	if offset > len(text) {
		offset = len(text)
	}
	return &Error{
		Column: utf8.RuneCountInString(text[:offset]) + 1,
		Text:   text,
		Reason: reason,
		Remedy: remedy,
	}
}

// Excerpt shows the offending line and, under it, a caret at the column, each ended
// by a newline. A line longer than 76 characters is cut round the caret, with "…"
// at the cuts; characters that a terminal cannot show are replaced by "?". Without a
// column only the line is shown, and the result is empty when there is no text.
func (e *Error) Excerpt() string {
	if e.Text == "" {
		return ""
	}
	// Only the part of a long text round the caret is looked at.
	first, caret := 0, e.Column-1
	if caret > excerptWidth/2 {
		first = caret - excerptWidth/2
	}
	var line []rune
	n := 0
	more := false
	for _, r := range e.Text {
		if n >= first {
			if len(line) == excerptWidth {
				more = true
				break
			}
			if r < ' ' || r == 0x7f || r == utf8.RuneError {
				r = '?'
			}
			line = append(line, r)
		}
		n++
	}
	caret -= first
	if first > 0 && len(line) > 0 {
		line[0] = '…'
	}
	if more {
		line[len(line)-1] = '…'
	}
	var b strings.Builder
	b.WriteString(string(line))
	b.WriteByte('\n')
	if e.Column > 0 {
		b.WriteString(strings.Repeat(" ", caret))
		b.WriteString("^\n")
	}
	return b.String()
}
