package main

import (
	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/reactivity/report"
	"lobecast/rules/symmetry"
)

type symmetryCommand struct {
	Process  []string `arg:"" optional:"" help:"Components, for instance π4s+π2s, pi4s+pi2s or p4s+p2s; with --shift the SMILES."`
	Closure  string   `placeholder:"SMILES" xor:"from" help:"Electrocyclic ring closure of a structure, ends mapped :1 :2 where not unique."`
	Opening  string   `placeholder:"SMILES" xor:"from" help:"Electrocyclic ring opening; the bond that breaks mapped :1 :2 where not unique."`
	Shift    string   `placeholder:"i,j" xor:"from" help:"Sigmatropic [i,j] shift of the SMILES that follows; new ends mapped :1 :2, migrating bond :3 :4 where not unique."`
	Addition string   `placeholder:"SMILES" xor:"from" help:"[m+n] cycloaddition with the SMILES that follows, or within the molecule; ends mapped :1 :2 and :3 :4 where not unique."`
	Ene      string   `placeholder:"SMILES" xor:"from" help:"Ene reaction of this molecule with the enophile that follows."`
	outputOptions
}

func (s *symmetryCommand) Help() string {
	return `From components there is one derivation, the general Woodward–Hoffmann rule. From a structure the verdict is reached a second time, numerically; where the two disagree there is no verdict.

  lobecast symmetry π4s+π2s
  lobecast symmetry --closure 'C/C=C/C=C\C=C\C' --brief
  lobecast symmetry --shift 3,3 'C=CCOC=C'
  lobecast symmetry --addition 'C=C' 'C=C' --brief`
}

func (s *symmetryCommand) Run(c *command) error {
	set, err := frontier.Load(symmetry.SetName)
	if err != nil {
		return err
	}
	b := report.NewBuilder(report.KindSymmetry, programName(), set)
	input := "" // as given, where more than one SMILES was
	answer := func(smiles string, ask func(*molecule.Molecule) (*symmetry.Answer, error)) {
		m, err := molecule.ParseSMILES(smiles)
		if err != nil {
			b.Refuse(smiles, err)
			return
		}
		a, err := ask(m)
		if err != nil {
			b.Refuse(smiles, err)
			return
		}
		if input == "" {
			input = smiles
		}
		b.AddAnswer(input, a)
	}
	switch {
	case s.Closure != "" || s.Opening != "":
		if len(s.Process) > 0 {
			return usageError{"give either components or a structure, not both"}
		}
		if s.Closure != "" {
			answer(s.Closure, symmetry.Closure)
		} else {
			answer(s.Opening, symmetry.Opening)
		}
	case s.Shift != "":
		i, j, err := symmetry.ParseOrder(s.Shift)
		if err != nil {
			return usageError{"--shift: " + err.Error()}
		}
		if len(s.Process) != 1 {
			return usageError{"--shift needs one SMILES after it, for instance --shift 3,3 'C=CCOC=C'"}
		}
		answer(s.Process[0], func(m *molecule.Molecule) (*symmetry.Answer, error) { return symmetry.Shift(m, i, j) })
	case s.Addition != "" || s.Ene != "":
		if len(s.Process) > 1 || s.Ene != "" && len(s.Process) == 0 {
			return usageError{"--addition and --ene need the SMILES of the partner after them, for instance --addition 'C=C' 'C=C'"}
		}
		first, ask := s.Addition, symmetry.CycloadditionBetween
		if s.Ene != "" {
			first, ask = s.Ene, symmetry.Ene
		}
		var partner *molecule.Molecule
		if len(s.Process) == 1 {
			if partner, err = molecule.ParseSMILES(s.Process[0]); err != nil {
				b.Refuse(s.Process[0], err)
				break
			}
			input = first + " + " + s.Process[0]
		}
		answer(first, func(m *molecule.Molecule) (*symmetry.Answer, error) { return ask(m, partner) })
	case len(s.Process) == 0:
		return usageError{"give components (π4s+π2s), or --closure, --opening, --shift, --addition or --ene with a SMILES"}
	default:
		for _, text := range s.Process {
			p, err := symmetry.FromComponents(text)
			if err != nil {
				b.Refuse(text, err)
				continue
			}
			b.AddProcess(text, p)
		}
	}
	return s.write(c, b.Report())
}
