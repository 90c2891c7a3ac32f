package review

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/BurntSushi/toml"

	"lobecast/frontier"
	"lobecast/frontier/nesting"
	"lobecast/frontier/terms"
	"lobecast/reactivity/report"
)

// Route is a route file as it was written.
type Route struct {
	Title string
	Steps []RouteStep
	// Problems are faults of the file's head; faults of a step are with the step.
	Problems []report.Refused
}

// RouteStep is one [[step]] of a route file.
type RouteStep struct {
	Line       int // of its header
	Name       string
	Reaction   string
	Agents     string
	Medium     terms.Medium // "" where not stated
	Activation terms.Activation
	Note       string
	Kind       terms.Kind
	Substrate  string
	Diene      string // or dipole
	Partner    string
	Incoming   string
	LewisAcid  bool
	Shift      string // "3,3" of a sigmatropic shift
	Direction  string // "closure" or "opening" of an electrocyclic step
	Components string // "π4s+π2s"
	Product    string
	Twists     []frontier.Twist

	Problems []report.Refused
	pos      *positions
	index    int
	file     string
}

// stepKeys are the keys of a step; docs/route.md explains them.
var stepKeys = []string{
	"name", "reaction", "agents", "medium", "activation", "note", "kind", "substrate",
	"diene", "dipole", "partner", "incoming", "lewis_acid", "shift", "direction",
	"components", "product", "twist",
}

var headKeys = []string{"title", "step"}

// RouteLimit is the largest route file that is read, in bytes.
const RouteLimit = 4 << 20

// ParseRoute reads a route file. A fault within a step is listed with that step, and
// the other steps stand; where the file as a whole is no TOML, its steps are read one by
// one. A file of which no step can be read is an error.
func ParseRoute(text, file string) (*Route, error) {
	// The reader counts lines wrongly where a string ends at a carriage return.
	text = strings.ReplaceAll(strings.TrimPrefix(text, "\ufeff"), "\r\n", "\n")
	if line, err := nesting.Check(text); err != nil {
		return nil, fmt.Errorf("%s is not a route file: line %d: %w\n%s", file, line, err, excerpt(text, line))
	}
	var raw map[string]any
	if _, err := toml.Decode(text, &raw); err != nil {
		if route := parsePieces(text, file); route != nil {
			return route, nil
		}
		line, message := faultOf(err)
		if line == 0 {
			return nil, fmt.Errorf("%s is not a route file: %s", file, message)
		}
		return nil, fmt.Errorf("%s is not a route file: line %d: %s\n%s", file, line, message, excerpt(text, line))
	}
	if _, isReport := raw["program"]; isReport {
		return nil, fmt.Errorf("%s is a report, not a route file; give the route it was made from, or see it with `lobecast page`", file)
	}
	pos := findPositions(text)
	route := &Route{}
	route.readHead(raw, pos, file)
	list, problem := stepTables(raw["step"])
	if problem != "" {
		return nil, fmt.Errorf("%s: line %d: %s\n%s", file, pos.headLine("step"), problem, excerpt(text, pos.headLine("step")))
	}
	if len(list) == 0 {
		near := ""
		for _, p := range route.Problems {
			near += "\n" + p.Message
		}
		return nil, fmt.Errorf("%s has no steps; begin each with [[step]] (`lobecast review --template` prints a file to fill in)%s", file, near)
	}
	for i, m := range list {
		route.Steps = append(route.Steps, newRouteStep(m, i, pos, file))
	}
	return route, nil
}

// readHead reads what stands outside the steps.
func (r *Route) readHead(raw map[string]any, pos *positions, file string) {
	for _, key := range sortedKeys(raw) {
		switch key {
		case "title":
			title, ok := raw["title"].(string)
			if !ok {
				r.refuse(pos, file, "title", "title must be text in quotes")
			}
			r.Title = title
		case "step":
		default:
			message := unknownKey(key, headKeys)
			if slices.Contains(stepKeys, key) {
				message = fmt.Sprintf("%s stands outside the steps; move it below the [[step]] it belongs to", key)
			}
			r.refuse(pos, file, key, message)
		}
	}
}

// stepTables returns the tables of the steps, or what is wrong with the way they are
// written.
func stepTables(v any) ([]map[string]any, string) {
	switch x := v.(type) {
	case nil:
		return nil, ""
	case []map[string]any:
		return x, ""
	case map[string]any:
		return nil, "a step begins with [[step]], in double brackets"
	case []any:
		var list []map[string]any
		for _, e := range x {
			m, ok := e.(map[string]any)
			if !ok {
				return nil, "step must be a list of tables; begin each step with [[step]]"
			}
			list = append(list, m)
		}
		return list, ""
	}
	return nil, "step is a table of its own; begin each step with [[step]]"
}

// parsePieces reads a file that is no TOML as a whole in pieces, each of which begins at
// a line [[step]]. It returns nil where no step can be read.
func parsePieces(text, file string) *Route {
	pos := &positions{lines: strings.Split(text, "\n"), keys: []map[string]int{{}}}
	for n, line := range pos.lines {
		if stepHeader.MatchString(line) {
			pos.steps = append(pos.steps, n+1)
		}
	}
	if len(pos.steps) == 0 {
		return nil
	}
	piece := func(from, to int) string { return strings.Join(pos.lines[from:to], "\n") }
	route := &Route{}
	head := piece(0, pos.steps[0]-1)
	pos.keys[0] = findPositions(head).keys[0]
	var raw map[string]any
	if _, err := toml.Decode(head, &raw); err != nil {
		line, message := faultOf(err)
		route.Problems = append(route.Problems, placed(pos, file, line, "", message))
	} else {
		route.readHead(raw, pos, file)
	}
	readable := 0
	for i, line := range pos.steps {
		begin, end := line-1, len(pos.lines)
		if i+1 < len(pos.steps) {
			end = pos.steps[i+1] - 1
		}
		moved := map[string]int{}
		for key, at := range findPositions(piece(begin, end)).keys[1] {
			moved[key] = begin + at
		}
		pos.keys = append(pos.keys, moved)
		var raw map[string]any
		_, err := toml.Decode(piece(begin, end), &raw)
		list, _ := stepTables(raw["step"])
		if err != nil || len(list) != 1 {
			s := RouteStep{Line: line, Name: fmt.Sprintf("step %d", i+1), pos: pos, index: i, file: file}
			at, message := 1, "not a step"
			if err != nil {
				at, message = faultOf(err)
			}
			s.Problems = append(s.Problems, placed(pos, file, begin+max(at, 1), "", message))
			route.Steps = append(route.Steps, s)
			continue
		}
		route.readHead(raw, pos, file)
		route.Steps = append(route.Steps, newRouteStep(list[0], i, pos, file))
		readable++
	}
	if readable == 0 {
		return nil
	}
	return route
}

// faultOf is the line and the message of what the TOML reader refuses.
func faultOf(err error) (line int, message string) {
	var pe toml.ParseError
	if errors.As(err, &pe) {
		return pe.Position.Line, pe.Message
	}
	return 0, err.Error()
}

func (r *Route) refuse(pos *positions, file, key, message string) {
	line := pos.headLine(key)
	r.Problems = append(r.Problems, placed(pos, file, line, key, message))
}

func placed(pos *positions, file string, line int, input, message string) report.Refused {
	x := report.Refused{Input: input, File: file, Line: line, Message: message}
	if line > 0 {
		x.Message = fmt.Sprintf("%s: line %d: %s\n%s", file, line, message, pos.text(line))
	}
	return x
}

// refuse notes a fault of the step at one of its keys.
func (s *RouteStep) refuse(key, message string) {
	s.Problems = append(s.Problems, placed(s.pos, s.file, s.pos.line(s.index, key), key, message))
}

func newRouteStep(m map[string]any, i int, pos *positions, file string) RouteStep {
	s := RouteStep{pos: pos, index: i, file: file, Line: pos.line(i, "")}
	text := func(key string) string {
		v, ok := m[key]
		if !ok {
			return ""
		}
		t, ok := v.(string)
		if !ok {
			s.refuse(key, key+" must be text in quotes")
			return ""
		}
		return strings.TrimSpace(t)
	}
	for _, key := range sortedKeys(m) {
		if !slices.Contains(stepKeys, key) {
			s.refuse(key, unknownKey(key, stepKeys))
		}
	}
	s.Name, s.Reaction, s.Agents, s.Note = text("name"), text("reaction"), text("agents"), text("note")
	s.Substrate, s.Partner, s.Incoming = text("substrate"), text("partner"), text("incoming")
	s.Shift, s.Components, s.Product = text("shift"), text("components"), text("product")
	s.Diene = text("diene")
	if dipole := text("dipole"); dipole != "" {
		if s.Diene != "" {
			s.refuse("dipole", "give either a diene or a dipole, not both")
		}
		s.Diene = dipole
	}
	if v, ok := m["lewis_acid"]; ok {
		if s.LewisAcid, ok = v.(bool); !ok {
			s.refuse("lewis_acid", "lewis_acid must be true or false, without quotes")
		}
	}
	s.readTwists(m)
	s.Kind = terms.Kind(word(&s, "kind", text("kind"), kinds()))
	s.Medium = terms.Medium(word(&s, "medium", text("medium"), media()))
	s.Activation = terms.Activation(word(&s, "activation", text("activation"), []string{string(terms.Thermal), string(terms.Photochemical)}))
	s.Direction = word(&s, "direction", text("direction"), []string{"closure", "opening"})
	if s.Name == "" {
		s.Name = fmt.Sprintf("step %d", i+1)
	}
	s.checkShape(m)
	return s
}

// readTwists reads twist = "4-7=40", or a list of such.
func (s *RouteStep) readTwists(m map[string]any) {
	var texts []any
	switch v := m["twist"].(type) {
	case nil:
		return
	case []any:
		texts = v
	default:
		texts = []any{v}
	}
	for _, t := range texts {
		text, ok := t.(string)
		if !ok {
			s.refuse("twist", "twist must be text in quotes, for instance twist = \"4-7=40\", or a list of such")
			continue
		}
		x, err := frontier.ParseTwist(text)
		if err != nil {
			s.refuse("twist", err.Error())
			continue
		}
		s.Twists = append(s.Twists, x)
	}
}

// checkShape sees to it that a step gives what its kind needs.
func (s *RouteStep) checkShape(m map[string]any) {
	if _, tried := m["kind"]; tried && s.Kind == "" {
		return // the wrong word is reported already
	}
	if s.Reaction != "" {
		for _, x := range [][2]string{{"substrate", s.Substrate}, {"partner", s.Partner}, {"diene", s.Diene}, {"components", s.Components}} {
			if x[1] != "" {
				s.refuse(x[0], "a step with a reaction needs no "+x[0]+": the reaction says what reacts; leave one of them out")
			}
		}
		return
	}
	switch s.Kind {
	case "":
		s.refuse("", "the step has neither a reaction nor a kind; give reaction = \"reactants>agents>products\", or kind and substrate")
	case terms.Cycloaddition:
		switch {
		case s.Components != "" && s.Diene == "" && s.Substrate == "":
		case s.Diene == "" && s.Substrate == "":
			s.refuse("kind", "a cycloaddition needs diene (or dipole) and partner; for an intramolecular one give substrate")
		case s.Diene != "" && s.Partner == "":
			s.refuse("diene", "the partner is missing: add partner = \"…\", the SMILES of what adds to the diene or dipole")
		}
	case terms.Electrocyclic, terms.Sigmatropic, terms.Cheletropic, terms.Ene:
		if s.Substrate == "" && s.Components == "" && s.Diene == "" {
			s.refuse("kind", fmt.Sprintf("a step of kind %s needs substrate (with the ends mapped :1 :2 where not unique) or components", s.Kind))
		}
	case terms.OtherStep:
	default:
		if s.Substrate == "" {
			s.refuse("kind", fmt.Sprintf("a step of kind %s needs substrate, with the intended atom mapped, for instance [cH:1]", s.Kind))
		}
	}
}

func word(s *RouteStep, key, given string, words []string) string {
	if given == "" || slices.Contains(words, given) {
		return given
	}
	message := fmt.Sprintf("%s = %q is not known; use one of: %s", key, given, strings.Join(words, ", "))
	if near := nearest(given, words); near != "" {
		message = fmt.Sprintf("%s = %q is not known; did you mean %q? (one of: %s)", key, given, near, strings.Join(words, ", "))
	}
	s.refuse(key, message)
	return ""
}

func unknownKey(key string, known []string) string {
	if near := nearest(key, known); near != "" {
		return fmt.Sprintf("unknown key %q; did you mean %q?", key, near)
	}
	return fmt.Sprintf("unknown key %q; known are: %s", key, strings.Join(known, ", "))
}

func kinds() []string {
	var list []string
	for _, k := range terms.Kinds {
		list = append(list, string(k))
	}
	return list
}

func media() []string {
	var list []string
	for _, m := range terms.Media {
		list = append(list, string(m))
	}
	return list
}
