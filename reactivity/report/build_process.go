package report

import (
	"strings"

	"lobecast/frontier/terms"
	"lobecast/rules/symmetry"
)

// AddProcess adds the verdict on components alone.
func (b *Builder) AddProcess(input string, p *symmetry.Process) {
	b.report.Process = append(b.report.Process, NewProcess(input, "", p, nil))
}

// AddAnswer adds every mode of a process that starts from a structure.
func (b *Builder) AddAnswer(input string, a *symmetry.Answer) {
	b.report.Process = append(b.report.Process, NewProcesses(input, a)...)
}

// NewProcesses makes one table for each mode of an answer.
func NewProcesses(input string, a *symmetry.Answer) []Process {
	var list []Process
	for i := range a.Processes {
		list = append(list, NewProcess(input, a.Name, &a.Processes[i], a))
	}
	return list
}

// orbitalKinds are the letters of the kinds of orbital.
var orbitalKinds = map[symmetry.Kind]string{symmetry.Pi: "π", symmetry.Sigma: "σ", symmetry.Omega: "ω"}

// NewProcess makes the table of one process; a is nil where it came from components.
func NewProcess(input, name string, p *symmetry.Process, a *symmetry.Answer) Process {
	x := Process{
		Input: input, Name: name, Components: p.Components, Electrons: p.Electrons,
		Thermal: string(p.Thermal), Photochemical: string(p.Photochemical),
		Mode: p.Mode, Derivations: p.Derivations, Agreement: p.Agreement,
		Feasible: p.FeasibleNote, Notes: append([]string(nil), p.Notes...),
	}
	var products []string
	for _, q := range p.Products {
		s := q.SMILES
		if q.Configuration != "" {
			s += " (" + q.Configuration + ")"
		}
		products = append(products, s)
	}
	if len(p.Products) > 0 {
		x.Product = p.Products[0].SMILES
		if len(products) > 1 {
			x.Notes = append(x.Notes, "products: "+strings.Join(products, ", "))
		} else if p.Products[0].Configuration != "" {
			x.Notes = append(x.Notes, "product: "+p.Products[0].Configuration)
		}
	}
	for _, o := range p.Orbitals {
		x.Orbital = append(x.Orbital, Reacting{Label: o.Label, Atom: o.Atom, Kind: orbitalKinds[o.Kind], HOMO: Num(o.HOMO), LUMO: Num(o.LUMO)})
	}
	if a != nil {
		x.Notes = append(x.Notes, a.Notes...)
		x.Forms, x.Breaks = a.Bonds, a.Broken
		var reactants []string
		for _, m := range a.Reactants {
			reactants = append(reactants, m.SMILES())
			numbers, _ := written(m)
			x.Numbers = append(x.Numbers, numbers...)
		}
		x.Reactant = strings.Join(reactants, ".")
		if a.Before != nil && a.After != nil {
			x.GapBefore, x.GapAfter = Num(a.Before.Gap), Num(a.After.Gap)
			x.PiBefore, x.PiAfter = a.Before.String(), a.After.String()
		}
	}
	return x
}

// Allowed reads a verdict under an activation.
func (p *Process) Allowed(a terms.Activation) string {
	if a == terms.Photochemical {
		return p.Photochemical
	}
	return p.Thermal
}
