package review

import (
	"fmt"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity/reading"
	"lobecast/reactivity/report"
)

// judgeReaction judges a step given as reaction SMILES: its kind and its intended
// site are found from the structures.
func judgeReaction(s *RouteStep, opt Options) judged {
	rxn, err := molecule.ParseReaction(s.Reaction)
	if err != nil {
		return s.refused("reaction", s.Reaction, err)
	}
	r, err := reading.Read(rxn, s.Agents, reading.Stated{Medium: s.Medium, Activation: s.Activation})
	if err != nil {
		return s.refused("reaction", s.Reaction, err)
	}
	return judgeReading(s, r, opt)
}

// judgeReading judges a reaction that has been read.
func judgeReading(s *RouteStep, r *reading.Reading, opt Options) judged {
	if r.Impossible != "" {
		s.refuse("reaction", r.Impossible)
		out := notJudged(s, "the product cannot come from the reactants: "+r.Impossible)
		out.reactant, out.product = reactants(r), r.Product
		return out
	}
	if s.Kind != "" && r.Kind != s.Kind && r.Kind != terms.OtherStep {
		r.Notes = append(r.Notes, fmt.Sprintf("the file says kind = %q, the structures say %s: judged as %s", s.Kind, r.Kind, r.Kind))
	}
	switch r.Kind {
	case terms.OtherStep:
		return judgeOther(s, r)
	case terms.Cycloaddition:
		switch {
		case r.Retro:
			return judgeRetro(s, r)
		case r.Components[0] != nil:
			return judgePericyclicReading(s, r, opt)
		}
		return judgePairReading(s, r, opt)
	case terms.Electrocyclic, terms.Sigmatropic, terms.Cheletropic, terms.Ene:
		return judgePericyclicReading(s, r, opt)
	}
	return judgeSites(s, r, opt)
}

// judgeOther lists a step the model cannot judge, with the nearest reading.
func judgeOther(s *RouteStep, r *reading.Reading) judged {
	x := describeReading(s, r)
	x.Standing = string(terms.NotJudged)
	x.Reading = r.Nearest
	switch {
	case r.Nearest != "" && r.Outside != "":
		x.Reason = fmt.Sprintf("looks like %s: outside the model (%s)", withArticle(r.Nearest), r.Outside)
	case r.Nearest != "":
		x.Reason = fmt.Sprintf("looks like %s: outside the model", withArticle(r.Nearest))
	case r.Outside != "":
		x.Reason = r.Outside
	default:
		x.Reason = "no event the model covers leads from these reactants to this product"
	}
	out := judged{reactant: reactants(r), product: r.Product}
	addRemarks(&x, situationOf(r))
	out.step = x
	return out
}

// withArticle puts the indefinite article before a name.
func withArticle(name string) string {
	switch name[0] {
	case 'a', 'e', 'i', 'o', 'A', 'E', 'I', 'O':
		return "an " + name
	case 'N', 'S':
		if len(name) > 1 && name[1] == '-' { // N-alkylation
			return "an " + name
		}
	}
	return "a " + name
}

// followSteps compares the product of each step with the reactants of the next and
// reports a break in the route.
func followSteps(steps []judged) {
	for i := 0; i+1 < len(steps); i++ {
		p, next := steps[i].product, &steps[i+1]
		if p == nil || len(next.reactant) == 0 {
			continue
		}
		if w := breakBetween(p, next.reactant, i+1); w != "" {
			next.step.Warnings = append(next.step.Warnings, w)
		}
	}
}

// breakBetween says how the product of step n differs from every reactant of the
// next step, or "".
func breakBetween(p *molecule.Molecule, reactant []*molecule.Molecule, n int) string {
	flat, formula := p.FlatSMILES(), p.Formula()
	sameFormula, sameFlat := false, false
	for _, r := range reactant {
		if r.SMILES() == p.SMILES() {
			return ""
		}
		if r.FlatSMILES() == flat {
			sameFlat = true
		}
		if r.Formula() == formula {
			sameFormula = true
		}
	}
	switch {
	case sameFlat:
		return fmt.Sprintf("break in the route: the product of step %d differs from the substrate here in stated configuration only", n)
	case sameFormula:
		return fmt.Sprintf("break in the route: the product of step %d is an isomer (%s) of the substrate here, not the same compound", n, formula)
	}
	return fmt.Sprintf("break in the route: the product of step %d (%s) is no reactant here (%s)", n, formula, formulas(reactant))
}

func formulas(list []*molecule.Molecule) string {
	s := ""
	for i, m := range list {
		if i > 0 {
			s += ", "
		}
		s += m.Formula()
	}
	return s
}

// planOf is the planned choice of a step in words, for the risk line.
func planOf(x *report.Step) string {
	if x.Planned == nil {
		return ""
	}
	return x.Planned.Place
}
