package survey

import (
	"strconv"
	"strings"
	"unicode/utf8"

	"lobecast/reactivity/report"
)

// Status of a record.
const (
	Judged    = "judged"
	NotJudged = "not judged"
	Refused   = "refused"
)

var statuses = []Status{Judged, NotJudged, Refused}

// Result is one record: what was found for one line of the input.
type Result struct {
	Line  int    // from 1, over all files of the run; of an SD file, the record
	Name  string // text after the SMILES, or the title of the record
	Kind  string // sites, or the kind of step of a reaction
	Input string
	Status

	PlannedRank   int // 0 where there is none
	PlannedChance *float64
	PlannedLimits *[2]float64
	FirstAtoms    string // numbers separated by spaces, pairs as a-b
	FirstPlace    string
	FirstChance   *float64
	Call          string
	Message       string
}

// Status says whether a line was judged.
type Status string

// Header is the first line of CSV output.
const Header = "line,name,kind,input,status,planned_rank,planned_chance,planned_low,planned_high,first_atoms,first_place,first_chance,call,message\n"

// appendCSV appends the record as one CSV line (RFC 4180, without line breaks inside
// fields, so that a record is a line).
func (r *Result) appendCSV(b []byte) []byte {
	b = strconv.AppendInt(b, int64(r.Line), 10)
	for _, s := range [...]string{r.Name, r.Kind, r.Input, string(r.Status)} {
		b = append(b, ',')
		b = appendField(b, s)
	}
	b = append(b, ',')
	if r.PlannedRank > 0 {
		b = strconv.AppendInt(b, int64(r.PlannedRank), 10)
	}
	b = appendNumber(b, r.PlannedChance)
	var low, high *float64
	if r.PlannedLimits != nil {
		low, high = &r.PlannedLimits[0], &r.PlannedLimits[1]
	}
	b = appendNumber(b, low)
	b = appendNumber(b, high)
	b = append(b, ',')
	b = appendField(b, r.FirstAtoms)
	b = append(b, ',')
	b = appendField(b, r.FirstPlace)
	b = appendNumber(b, r.FirstChance)
	b = append(b, ',')
	b = appendField(b, r.Call)
	b = append(b, ',')
	b = appendField(b, r.Message)
	return append(b, '\n')
}

func appendNumber(b []byte, p *float64) []byte {
	b = append(b, ',')
	if p == nil {
		return b
	}
	return strconv.AppendFloat(b, report.Round(*p), 'f', -1, 64)
}

// appendField quotes a field where it has to be; line breaks and other control
// characters become spaces, invalid UTF-8 the replacement character.
func appendField(b []byte, s string) []byte {
	plain := true
	for i := 0; i < len(s); i++ {
		if c := s[i]; c == ',' || c == '"' || c < ' ' || c >= utf8.RuneSelf || c == 0x7f {
			plain = false
			break
		}
	}
	if plain && (s == "" || s[0] != ' ' && s[len(s)-1] != ' ') {
		return append(b, s...)
	}
	b = append(b, '"')
	for _, r := range s {
		switch {
		case r == '"':
			b = append(b, '"', '"')
		case r < ' ' || r == 0x7f:
			b = append(b, ' ')
		default:
			b = utf8.AppendRune(b, r)
		}
	}
	return append(b, '"')
}

// onOneLine is a text as a record holds it.
func onOneLine(s string) string {
	return strings.Map(func(r rune) rune {
		if r < ' ' || r == 0x7f {
			return ' '
		}
		return r
	}, s)
}

// tomlEnd closes a TOML record: whatever stands before the last one is whole.
const tomlEnd = "\n\n"

// appendTOML appends the record as a [[result]] table.
func (r *Result) appendTOML(b []byte) []byte {
	b = append(b, "[[result]]\nformat = "...)
	b = strconv.AppendInt(b, report.Format, 10)
	b = append(b, "\nline = "...)
	b = strconv.AppendInt(b, int64(r.Line), 10)
	text := func(key, s string) {
		if s == "" {
			return
		}
		b = append(b, '\n')
		b = append(b, key...)
		b = append(b, " = "...)
		b = appendTOMLString(b, s)
	}
	float := func(key string, p *float64) {
		if p == nil {
			return
		}
		b = append(b, '\n')
		b = append(b, key...)
		b = append(b, " = "...)
		b = appendTOMLFloat(b, *p)
	}
	text("name", r.Name)
	text("kind", r.Kind)
	text("input", r.Input)
	text("status", string(r.Status))
	if r.PlannedRank > 0 {
		b = append(b, "\nplanned_rank = "...)
		b = strconv.AppendInt(b, int64(r.PlannedRank), 10)
	}
	float("planned_chance", r.PlannedChance)
	if r.PlannedLimits != nil {
		float("planned_low", &r.PlannedLimits[0])
		float("planned_high", &r.PlannedLimits[1])
	}
	text("first_atoms", r.FirstAtoms)
	text("first_place", r.FirstPlace)
	float("first_chance", r.FirstChance)
	text("call", r.Call)
	text("message", r.Message)
	return append(b, tomlEnd...)
}

func appendTOMLFloat(b []byte, x float64) []byte {
	s := strconv.FormatFloat(report.Round(x), 'f', -1, 64)
	if !strings.Contains(s, ".") {
		s += ".0"
	}
	return append(b, s...)
}

// appendTOMLString writes a basic string on one line.
func appendTOMLString(b []byte, s string) []byte {
	b = append(b, '"')
	for _, r := range s {
		switch {
		case r == '"' || r == '\\':
			b = append(b, '\\', byte(r))
		case r == '\t':
			b = append(b, '\\', 't')
		case r < ' ' || r == 0x7f:
			b = append(b, ' ')
		default:
			b = utf8.AppendRune(b, r)
		}
	}
	return append(b, '"')
}
