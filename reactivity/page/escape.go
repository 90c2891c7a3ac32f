package page

import (
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"
)

// text makes a string safe inside elements and attributes of XML and HTML. What a
// report holds is shown as it is: markup as characters, control characters as their
// pictures, and marks that would turn or hide the text around them by their code point.
func text(s string) string {
	var b strings.Builder
	b.Grow(len(s) + 8)
	for i := 0; i < len(s); {
		r, size := utf8.DecodeRuneInString(s[i:])
		if r == utf8.RuneError && size == 1 {
			fmt.Fprintf(&b, "[byte %02X]", s[i])
			i++
			continue
		}
		i += size
		switch {
		case r == '&':
			b.WriteString("&amp;")
		case r == '<':
			b.WriteString("&lt;")
		case r == '>':
			b.WriteString("&gt;")
		case r == '"':
			b.WriteString("&#34;")
		case r == '\'':
			b.WriteString("&#39;")
		case r == '\n' || r == '\t':
			b.WriteRune(r)
		case r < 0x20:
			b.WriteRune(0x2400 + r) // control pictures
		case r == 0x7f:
			b.WriteRune(0x2421)
		case r < 0xa0 && r > 0x7f, unicode.Is(unicode.Cf, r), r == 0x2028, r == 0x2029,
			r&0xfffe == 0xfffe, r >= 0xfdd0 && r <= 0xfdef, unicode.Is(unicode.Co, r), r == 0x3164, r == 0x115f, r == 0x1160:
			fmt.Fprintf(&b, "[U+%04X]", r)
		default:
			b.WriteRune(r)
		}
	}
	return b.String()
}

// px formats a coordinate in pixels: two decimals at most, no negative zero.
func px(x float64) string {
	s := fmt.Sprintf("%.2f", x)
	s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	if s == "-0" || s == "" {
		return "0"
	}
	return s
}
