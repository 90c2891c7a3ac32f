package main

import (
	"lobecast/reactivity/report"
)

type sitesCommand struct {
	Structure []string `arg:"" help:"SMILES string, file ending in .mol, .sdf or .smi, or - for standard input."`
	judgingOptions
	NoLimits bool `help:"Leave out the limits on chances and indices (faster); calls then rest on the chances alone."`
	outputOptions
}

func (s *sitesCommand) Help() string {
	return `Ranks the sites that an electrophile, a nucleophile or a radical attacks.

  lobecast sites 'COc1ccc2[nH]ccc2c1' --toward electrophile --brief
  lobecast sites 'Clc1ccnc(Cl)n1' --toward nucleophile
  lobecast sites 'Oc1ccccc1' --incoming '*[N+](=O)[O-]' --medium acidic

Options go before or after all structures, not between them.`
}

func (s *sitesCommand) Run(c *command) error {
	cond, incoming, err := s.conditions()
	if err != nil {
		return err
	}
	cond.NoLimits = s.NoLimits
	inputs, err := readStructures(c, s.Structure)
	if err != nil {
		return err
	}
	b := report.NewBuilder(report.KindSites, programName(), cond.Set)
	for _, in := range inputs {
		if c.ctx.Err() != nil {
			break // what was done is written below
		}
		if in.Err != nil {
			b.Refuse(in.Input, in.Err)
			continue
		}
		b.AddSites(in.Input, in.Name, in.Molecule, cond, s.towards(incoming), incoming)
	}
	return s.write(c, b.Report())
}
