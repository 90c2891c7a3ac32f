package review

import (
	"errors"
	"fmt"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/reactivity/reading"
	"lobecast/rules/agents"
)

// judgeSubstrate judges a step that states kind and substrate, the intended atoms
// mapped.
func judgeSubstrate(s *RouteStep, opt Options) judged {
	m, err := s.read("substrate", s.Substrate)
	if err != nil {
		return s.refused("substrate", s.Substrate, err)
	}
	parts, aside := molecule.SetAside(m)
	r := &reading.Reading{Kind: s.Kind, Event: terms.Event(s.Kind), Aside: aside, Agents: agents.ParseWords(s.Agents)}
	r.Medium, r.MediumFrom = reading.MediumOf(r.Event, r.Agents, s.Medium)
	for _, part := range parts {
		for i, a := range part.Atoms {
			if a.Map > 0 && (r.Substrate == nil || r.Substrate == part) {
				r.Substrate = part
				r.Sites = append(r.Sites, i)
			}
		}
	}
	if r.Substrate == nil {
		r.Substrate = parts[0]
	}
	for _, part := range parts {
		if part != r.Substrate {
			r.Others = append(r.Others, part)
		}
	}
	if s.Incoming != "" {
		in, err := reactivity.ParseIncoming(s.Incoming)
		if err != nil {
			return s.refused("incoming", s.Incoming, err)
		}
		r.Incoming = in
	} else {
		r.Incoming = reading.Delivered(r.Event, r.Agents)
	}
	return judgeSites(s, r, opt)
}

// read reads a SMILES of the route file; a refusal is placed at its line.
func (s *RouteStep) read(key, smiles string) (*molecule.Molecule, error) {
	m, err := molecule.ParseSMILES(smiles)
	var e *molecule.Error
	if errors.As(err, &e) {
		e.File, e.Line = s.file, s.pos.line(s.index, key)
	}
	return m, err
}

// refused is a step one of whose values cannot be read.
func (s *RouteStep) refused(key, input string, err error) judged {
	message := err.Error()
	var e *molecule.Error
	if errors.As(err, &e) {
		if e.File == "" {
			e.File, e.Line = s.file, s.pos.line(s.index, key)
		}
		message = fmt.Sprintf("%s\n%s", e.Error(), e.Excerpt())
		x := placed(s.pos, s.file, 0, input, message)
		x.Line, x.Column = e.Line, e.Column
		s.Problems = append(s.Problems, x)
	} else {
		s.Problems = append(s.Problems, placed(s.pos, s.file, s.pos.line(s.index, key), input, message))
	}
	return notJudged(s, fmt.Sprintf("%s cannot be read: see refused", key))
}
