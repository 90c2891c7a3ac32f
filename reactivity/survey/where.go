package survey

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"lobecast/frontier/terms"
)

// Filter keeps the records that satisfy conditions on the columns.
type Filter struct{ any [][]condition } // an or of ands

type condition struct {
	column, op string
	text       string
	number     float64
	numeric    bool
}

// columns are the names that a condition may use, and whether they are numbers.
var columns = map[string]bool{
	"line": true, "name": false, "kind": false, "input": false, "status": false, "planned_rank": true,
	"planned_chance": true, "planned_low": true, "planned_high": true, "first_atoms": false,
	"first_place": false, "first_chance": true, "call": false, "message": false,
}

// vocabulary lists what stands in the columns of few words.
var vocabulary = map[string][]string{
	"status": {string(Judged), string(NotJudged), string(Refused)},
	"call":   {string(terms.Clear), string(terms.Leaning), string(terms.Split), string(terms.Open), ""},
}

// ColumnNames lists the columns in their order.
var ColumnNames = strings.Split(strings.TrimSuffix(Header, "\n"), ",")

// ParseFilter reads conditions such as "planned_chance < 0.3 and call = split or
// status = refused". Operators: < <= > >= = != and ~ (contains). and binds more
// closely than or; text with spaces stands in quotes.
func ParseFilter(s string) (*Filter, error) {
	words, err := words(s)
	if err != nil {
		return nil, err
	}
	f := &Filter{}
	var and []condition
	for i := 0; ; {
		if i+3 > len(words) {
			return nil, fmt.Errorf("--where %q breaks off; write column, operator, value, for instance planned_chance < 0.3", s)
		}
		c := condition{column: words[i], op: words[i+1], text: words[i+2]}
		numeric, known := columns[c.column]
		if !known {
			return nil, fmt.Errorf("--where: there is no column %q; the columns are %s", c.column, strings.Join(ColumnNames, ", "))
		}
		switch c.op {
		case "<", "<=", ">", ">=", "=", "!=", "~":
		default:
			return nil, fmt.Errorf("--where: %q is no operator; use < <= > >= = != or ~ (contains)", c.op)
		}
		if numeric {
			if c.number, err = strconv.ParseFloat(c.text, 64); err != nil || c.op == "~" {
				return nil, fmt.Errorf("--where: %s is a number: compare it with a number by < <= > >= = or !=", c.column)
			}
			if math.IsNaN(c.number) {
				return nil, fmt.Errorf("--where: %s cannot be compared with NaN: give a number", c.column)
			}
			c.numeric = true
		} else if strings.ContainsAny(c.op, "<>") {
			return nil, fmt.Errorf("--where: %s is text: compare it by = != or ~ (contains)", c.column)
		}
		if words := vocabulary[c.column]; words != nil && c.op != "~" && !slices.Contains(words, c.text) {
			return nil, fmt.Errorf("--where: %s is never %q; it is one of %s", c.column, c.text, strings.Join(words, ", "))
		}
		and = append(and, c)
		i += 3
		if i == len(words) {
			break
		}
		switch strings.ToLower(words[i]) {
		case "and":
		case "or":
			f.any = append(f.any, and)
			and = nil
		default:
			return nil, fmt.Errorf("--where: %q stands where and or or is expected", words[i])
		}
		i++
	}
	f.any = append(f.any, and)
	return f, nil
}

// words splits at spaces and around operators; quotes keep text together.
func words(s string) ([]string, error) {
	var list []string
	for i := 0; i < len(s); {
		switch c := s[i]; {
		case c == ' ' || c == '\t':
			i++
		case c == '"' || c == '\'':
			end := strings.IndexByte(s[i+1:], c)
			if end < 0 {
				return nil, fmt.Errorf("--where %q: a quote is not closed", s)
			}
			list = append(list, s[i+1:i+1+end])
			i += end + 2
		case strings.IndexByte("<>=!~", c) >= 0:
			n := 1
			if i+1 < len(s) && s[i+1] == '=' {
				n = 2
			}
			list = append(list, s[i:i+n])
			i += n
		default:
			n := strings.IndexAny(s[i:], " \t<>=!~\"'")
			if n < 0 {
				n = len(s) - i
			}
			list = append(list, s[i:i+n])
			i += n
		}
	}
	return list, nil
}

// Keeps tells whether a record satisfies the conditions. A number that the record
// lacks satisfies none.
func (f *Filter) Keeps(r *Result) bool {
	if f == nil {
		return true
	}
	for _, and := range f.any {
		all := true
		for _, c := range and {
			if !c.holds(r) {
				all = false
				break
			}
		}
		if all {
			return true
		}
	}
	return false
}

func (c *condition) holds(r *Result) bool {
	if c.numeric {
		x, ok := r.number(c.column)
		if !ok {
			return false
		}
		switch c.op {
		case "<":
			return x < c.number
		case "<=":
			return x <= c.number
		case ">":
			return x > c.number
		case ">=":
			return x >= c.number
		case "=":
			return x == c.number
		}
		return x != c.number
	}
	s := r.text(c.column)
	switch c.op {
	case "=":
		return s == c.text
	case "!=":
		return s != c.text
	}
	return strings.Contains(s, c.text)
}

func (r *Result) number(column string) (float64, bool) {
	get := func(p *float64) (float64, bool) {
		if p == nil {
			return 0, false
		}
		return *p, true
	}
	switch column {
	case "line":
		return float64(r.Line), true
	case "planned_rank":
		return float64(r.PlannedRank), r.PlannedRank > 0
	case "planned_chance":
		return get(r.PlannedChance)
	case "first_chance":
		return get(r.FirstChance)
	}
	if r.PlannedLimits == nil {
		return 0, false
	}
	if column == "planned_low" {
		return r.PlannedLimits[0], true
	}
	return r.PlannedLimits[1], true
}

func (r *Result) text(column string) string {
	switch column {
	case "name":
		return r.Name
	case "kind":
		return r.Kind
	case "input":
		return r.Input
	case "status":
		return string(r.Status)
	case "first_atoms":
		return r.FirstAtoms
	case "first_place":
		return r.FirstPlace
	case "call":
		return r.Call
	}
	return r.Message
}
