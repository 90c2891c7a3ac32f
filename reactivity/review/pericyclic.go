package review

import (
	"fmt"
	"slices"
	"strings"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity/reading"
	"lobecast/reactivity/report"
	"lobecast/rules/agents"
	"lobecast/rules/symmetry"
)

// judgePericyclic judges an electrocyclic, sigmatropic, cheletropic or ene step given
// by kind: from components, or from the structures with their ends mapped.
func judgePericyclic(s *RouteStep, opt Options) judged {
	r := &reading.Reading{Kind: s.Kind, Agents: agents.ParseWords(s.Agents), Activation: s.Activation}
	if s.Components != "" {
		return judgeComponents(s, r)
	}
	key, smiles := "substrate", s.Substrate
	if smiles == "" {
		key, smiles = "diene", s.Diene
	}
	m, err := s.read(key, smiles)
	if err != nil {
		return s.refused(key, smiles, err)
	}
	r.Substrate = m
	if s.Partner != "" {
		if r.Partner, err = s.read("partner", s.Partner); err != nil {
			return s.refused("partner", s.Partner, err)
		}
	}
	if s.Product != "" {
		if r.Product, err = s.read("product", s.Product); err != nil {
			return s.refused("product", s.Product, err)
		}
	}
	return judgePericyclicReading(s, r, opt)
}

// judgeComponents judges a process given in component notation.
func judgeComponents(s *RouteStep, r *reading.Reading) judged {
	p, err := symmetry.FromComponents(s.Components)
	if err != nil {
		return s.refused("components", s.Components, err)
	}
	x := describeReading(s, r)
	x.Process = []report.Process{report.NewProcess(s.Components, "", p, nil)}
	pericyclicStanding(&x, &x.Process[0], activation(r))
	addRemarks(&x, situationOf(r))
	return judged{step: x}
}

func activation(r *reading.Reading) terms.Activation {
	if r.Activation == "" {
		return terms.Thermal
	}
	return r.Activation
}

// judgePericyclicReading judges a pericyclic step from its structures. With a
// product, the mode that makes it decides; without one, the step stands if any
// feasible mode is allowed.
func judgePericyclicReading(s *RouteStep, r *reading.Reading, opt Options) judged {
	r.Activation = activation(r)
	answer, err := processOf(s, r)
	if err != nil {
		return s.refused("kind", s.Substrate+s.Reaction, err)
	}
	x := describeReading(s, r)
	x.Process = report.NewProcesses(answer.Reactants[0].SMILES(), answer)
	out := judged{reactant: reactants(r), product: r.Product}
	if len(x.Process) == 0 {
		x.Standing, x.Reason = string(terms.NotJudged), "no such process was found in the structure"
		out.step = x
		return out
	}
	if r.Product != nil {
		if p, ok := findAllowed(answer, r.Product, r.Activation); ok {
			chosen := report.NewProcess(answer.Reactants[0].SMILES(), answer.Name, p, answer)
			pericyclicStanding(&x, &chosen, r.Activation)
		} else {
			x.Standing, x.Reason = string(terms.NotJudged), "no mode of this process leads to the product that is written"
		}
	} else {
		best := -1
		for i := range x.Process {
			if x.Process[i].Allowed(r.Activation) == string(symmetry.Allowed) && answer.Processes[i].Feasible {
				best = i
				break
			}
		}
		if best < 0 {
			x.Standing = string(terms.Forbidden)
			x.Reason = fmt.Sprintf("no feasible mode is allowed under the %s activation", r.Activation)
		} else {
			pericyclicStanding(&x, &x.Process[best], r.Activation)
		}
	}
	addRemarks(&x, situationOf(r))
	if r.Components[0] != nil && len(r.Components[0])+len(r.Components[1]) == 4 {
		x.Outside = slices.DeleteFunc(x.Outside, func(n report.Remark) bool { return n.Code == "endo-caveat" })
		if r.Activation == terms.Thermal {
			x.Warnings = append(x.Warnings, "stepwise [2+2] additions through diradicals, zwitterions, radical cations or a metal are not in the rule: fluoroalkenes, allenes, enamines with acceptors and strained alkenes do add under heat; which way round an addition goes is not judged here")
		}
	}
	if len(x.Outside) > 0 {
		out.outside = x.Outside[0].Text
	}
	out.step = x
	return out
}

// findAllowed is the mode of a process that makes the product: of several, as where the
// product leaves its configuration open, a feasible one that is allowed, else a feasible
// one.
func findAllowed(a *symmetry.Answer, product *molecule.Molecule, activation terms.Activation) (*symmetry.Process, bool) {
	var feasible *symmetry.Process
	for i := range a.Processes {
		p := &a.Processes[i]
		if !p.Feasible || !p.Makes(product) {
			continue
		}
		if x := report.NewProcess("", a.Name, p, a); x.Allowed(activation) == string(symmetry.Allowed) {
			return p, true
		}
		if feasible == nil {
			feasible = p
		}
	}
	exact, ok := a.Find(product)
	if feasible != nil && (exact == nil || !exact.Feasible) {
		return feasible, true
	}
	return exact, ok
}

// judgeRetro judges a retro-Diels–Alder reaction by the verdict on the addition that it
// undoes.
func judgeRetro(s *RouteStep, r *reading.Reading) judged {
	r.Activation = activation(r)
	const components = "π4s+π2s"
	p, err := symmetry.FromComponents(components)
	if err != nil {
		return s.refused("reaction", s.Reaction, err)
	}
	x := describeReading(s, r)
	x.Process = []report.Process{report.NewProcess(r.Substrate.SMILES(), "retro-Diels–Alder reaction", p, nil)}
	pericyclicStanding(&x, &x.Process[0], r.Activation)
	x.Warnings = append(x.Warnings, "a retro-Diels–Alder reaction goes by the path of the addition backwards, so that the verdict is the same; whether it goes is a matter of energy: often above 150 °C, lower where an aromatic ring, N2 or CO2 forms")
	addRemarks(&x, situationOf(r))
	return judged{step: x, reactant: reactants(r), product: r.Product}
}

// processOf asks for the verdict the kind of step stands for.
func processOf(s *RouteStep, r *reading.Reading) (*symmetry.Answer, error) {
	switch r.Kind {
	case terms.Electrocyclic:
		opens := s.Direction == "opening" || s.Direction == "" && r.Product != nil && ringBonds(r.Product) < ringBonds(r.Substrate)
		switch {
		case opens && r.Product != nil:
			return symmetry.OpeningGiving(r.Substrate, r.Product)
		case opens:
			return symmetry.Opening(r.Substrate)
		case r.Product != nil:
			return symmetry.ClosureGiving(r.Substrate, r.Product)
		}
		return symmetry.Closure(r.Substrate)
	case terms.Sigmatropic:
		i, j, err := shiftOrder(s, r)
		if err != nil {
			return nil, err
		}
		if r.Product != nil {
			return symmetry.ShiftGiving(r.Substrate, i, j, r.Product)
		}
		return symmetry.Shift(r.Substrate, i, j)
	case terms.Cycloaddition:
		second := r.Partner
		if second == nil {
			second = r.Substrate
		}
		return symmetry.Cycloaddition(r.Substrate, second, r.Components[0], r.Components[1])
	case terms.Cheletropic:
		if r.Partner == nil {
			return symmetry.Extrusion(r.Substrate)
		}
		return symmetry.Cheletropic(r.Substrate, r.Partner)
	}
	if r.Partner == nil {
		return nil, fmt.Errorf("an ene step needs substrate (the ene) and partner (the enophile)")
	}
	if r.Product != nil {
		return symmetry.EneGiving(r.Substrate, r.Partner, r.Product)
	}
	return symmetry.Ene(r.Substrate, r.Partner)
}

func ringBonds(m *molecule.Molecule) int { return len(m.Bonds) - len(m.Atoms) + len(m.Components()) }

// shiftOrder is [i,j] of a sigmatropic step, as stated or the one the reading found.
func shiftOrder(s *RouteStep, r *reading.Reading) (int, int, error) {
	text := s.Shift
	if text == "" {
		text = r.Shift
	}
	if text == "" {
		return 0, 0, fmt.Errorf("a sigmatropic step needs its order, for instance shift = \"3,3\"")
	}
	i, j, err := symmetry.ParseOrder(text)
	if err != nil {
		return 0, 0, fmt.Errorf("shift = %w", err)
	}
	return i, j, nil
}

// pericyclicStanding turns a verdict into a standing.
func pericyclicStanding(x *report.Step, p *report.Process, a terms.Activation) {
	x.Planned = &report.Planned{Place: strings.TrimPrefix(strings.Replace(modeOf(p), " mode [", " [", 1), "the "), Absent: "orbital symmetry allows or forbids; it gives no chance"}
	switch p.Allowed(a) {
	case string(symmetry.Allowed):
		if p.Feasible != "" && strings.Contains(p.Feasible, "not feasible") {
			x.Standing = string(terms.Opposed)
			x.Reason = fmt.Sprintf("%s is allowed under the %s activation but %s", modeOf(p), a, p.Feasible)
			return
		}
		x.Standing = string(terms.Supported)
		x.Reason = fmt.Sprintf("%s is allowed under the %s activation (%s)", modeOf(p), a, p.Agreement)
	case string(symmetry.Forbidden):
		x.Standing = string(terms.Forbidden)
		x.Reason = fmt.Sprintf("%s is forbidden under the %s activation (%s)", modeOf(p), a, p.Agreement)
	default:
		x.Standing = string(terms.NotJudged)
		x.Reason = "no verdict: " + p.Agreement
	}
}

func modeOf(p *report.Process) string {
	if p.Mode != "" {
		return fmt.Sprintf("the %s mode [%s]", p.Mode, p.Components)
	}
	return "[" + p.Components + "]"
}
