package main

import (
	"lobecast/reactivity/report"
)

type orbitalsCommand struct {
	Structure  []string `arg:"" help:"SMILES string, file ending in .mol, .sdf or .smi, or - for standard input."`
	Medium     string   `enum:"neutral,acidic" default:"neutral" help:"neutral, or acidic: the most basic nitrogen protonated (default ${default})."`
	Twist      []string `sep:"none" placeholder:"ATOM-ATOM=DEGREES" help:"Twist about a bond between π atoms; may be repeated."`
	Parameters string   `placeholder:"NAME|FILE" help:"Parameter set by name, or a TOML file (default: calibrated)."`
	outputOptions
}

func (o *orbitalsCommand) Help() string {
	return `Prints everything needed to rebuild the Hückel matrix and check every number: h and electrons of each centre, k and bond order of each link, and each level with its coefficients.

  lobecast orbitals C=CC=C --brief
  lobecast orbitals c1ccccc1 --parameters streitwieser-1961`
}

func (o *orbitalsCommand) Run(c *command) error {
	set, err := loadSet(o.Parameters)
	if err != nil {
		return err
	}
	twists, err := judgingOptions{Twist: o.Twist}.twists()
	if err != nil {
		return err
	}
	inputs, err := readStructures(c, o.Structure)
	if err != nil {
		return err
	}
	b := report.NewBuilder(report.KindOrbitals, programName(), set)
	for _, in := range inputs {
		if c.ctx.Err() != nil {
			break
		}
		if in.Err != nil {
			b.Refuse(in.Input, in.Err)
			continue
		}
		b.AddOrbitals(in.Input, in.Name, in.Molecule, set, o.Medium == "acidic", twists)
	}
	return o.write(c, b.Report())
}
