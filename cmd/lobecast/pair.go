package main

import (
	"fmt"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/reactivity/report"
)

type pairCommand struct {
	A          string   `arg:"" help:"First molecule: SMILES or file; diene or dipole and partner may come in either order."`
	B          string   `arg:"" optional:"" help:"Second molecule; without it the addition is intramolecular."`
	LewisAcid  bool     `help:"A Lewis acid sits on the carbonyl oxygen: its effect on gaps and orientation is computed."`
	Medium     string   `enum:"neutral,acidic,unknown" default:"unknown" help:"Acidity of the medium (default ${default})."`
	Twist      []string `sep:"none" placeholder:"ATOM-ATOM=DEGREES" help:"Twist about a bond of the first molecule; may be repeated."`
	Parameters string   `placeholder:"NAME|FILE" help:"Parameter set by name, or a TOML file (default: calibrated)."`
	NoLimits   bool     `help:"Leave out the limits on chances; calls then rest on the chances alone."`
	outputOptions
}

func (p *pairCommand) Help() string {
	return `Finds the dienes, 1,3-dipoles and π bonds of both molecules, ranks which of them join, then which way round, and gives the products.

  lobecast pair 'CO/C=C/C=C' 'C=CC=O' --brief
  lobecast pair '[N-]=[N+]=Nc1ccccc1' 'C=CC(=O)OC'
  lobecast pair 'C=CC(C)=C' 'C=CC(=O)OC' --lewis-acid`
}

func (p *pairCommand) Run(c *command) error {
	set, err := loadSet(p.Parameters)
	if err != nil {
		return err
	}
	twists, err := judgingOptions{Twist: p.Twist}.twists()
	if err != nil {
		return err
	}
	b := report.NewBuilder(report.KindPair, programName(), set)
	a, err := oneStructure(c, b, p.A)
	if err != nil {
		return err
	}
	var second *molecule.Molecule
	if p.B != "" {
		if second, err = oneStructure(c, b, p.B); err != nil {
			return err
		}
	}
	if a != nil && (second != nil || p.B == "") {
		b.AddPair(p.A, p.B, a, second, reactivity.PairConditions{
			Set: set, Medium: terms.Medium(p.Medium), Twists: twists, LewisAcid: p.LewisAcid, NoLimits: p.NoLimits,
		})
	}
	return p.write(c, b.Report())
}

// oneStructure reads an argument that must be one structure, salts set aside. A
// structure that cannot be read is refused in the report, and nil is returned.
func oneStructure(c *command, b *report.Builder, arg string) (*molecule.Molecule, error) {
	list, err := readStructure(c, arg)
	if err != nil {
		return nil, err
	}
	if len(list) != 1 {
		return nil, usageError{fmt.Sprintf("%s holds %d structures; give one", arg, len(list))}
	}
	if list[0].Err != nil {
		b.Refuse(list[0].Input, list[0].Err)
		return nil, nil
	}
	parts, _ := molecule.SetAside(list[0].Molecule)
	if len(parts) != 1 {
		b.Refuse(arg, fmt.Errorf("%s holds %d molecules; give each as an argument of its own", arg, len(parts)))
		return nil, nil
	}
	return parts[0], nil
}
