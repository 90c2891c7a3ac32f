package review

import (
	"errors"
	"fmt"
	"strings"

	"github.com/BurntSushi/toml"

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

	Problems []report.Refused
	pos      *positions
	index    int
	file     string
}

// stepKeys are the keys of a step; docs/route.md explains them.
var stepKeys = []string{
	"name", "reaction", "agents", "medium", "activation", "note", "kind", "substrate",
	"diene", "dipole", "partner", "incoming", "lewis_acid", "shift", "direction",
	"components", "product",
}

var headKeys = []string{"title", "step"}

// RouteLimit is the largest route file that is read, in bytes.
const RouteLimit = 4 << 20

// ParseRoute reads a route file. A file that is no TOML is an error; a fault within a
// step is listed with that step, and the other steps stand.
func ParseRoute(text, file string) (*Route, error) {
	var raw map[string]any
	if _, err := toml.Decode(text, &raw); err != nil {
		var pe toml.ParseError
		if errors.As(err, &pe) {
			return nil, fmt.Errorf("%s is not a route file: line %d: %s\n%s", file, pe.Position.Line, pe.Message, excerpt(text, pe.Position.Line))
		}
		return nil, fmt.Errorf("%s is not a route file: %w", file, err)
	}
	pos := findPositions(text)
	route := &Route{}
	for _, key := range sortedKeys(raw) {
		if key == "title" {
			title, ok := raw["title"].(string)
			if !ok {
				route.refuse(pos, file, "title", "title must be text in quotes")
			}
			route.Title = title
			continue
		}
		if key != "step" {
			route.refuse(pos, file, key, unknownKey(key, headKeys))
		}
	}
	list, ok := raw["step"].([]map[string]any)
	if !ok {
		return nil, fmt.Errorf("%s has no steps; begin each with [[step]] (`lobecast review --template` prints a file to fill in)", file)
	}
	for i, m := range list {
		route.Steps = append(route.Steps, newRouteStep(m, i, pos, file))
	}
	return route, nil
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
		if !contains(stepKeys, key) {
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
	if given == "" || contains(words, given) {
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
