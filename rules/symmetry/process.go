package symmetry

import (
	"fmt"
	"slices"
	"strings"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Process is one pericyclic process in one mode: the components, what either
// derivation says of them, and what forms.
type Process struct {
	Kind       terms.Kind // electrocyclic, sigmatropic, …; empty from components alone
	Mode       string     // "conrotatory", "suprafacial, retention", …; empty from components alone
	Components string     // Parts as in print
	Parts      Components
	Electrons  int

	// Thermal and Photochemical are the verdicts given. They are empty where the two
	// derivations disagree.
	Thermal, Photochemical Verdict
	// Count is the verdict of the general rule over Parts, Numerical that of the
	// correlation of levels (empty where there is no structure), each thermal first.
	Count, Numerical [2]Verdict
	Derivations      int    // 1 from components, 2 from a structure
	Agree            bool   // both derivations say the same, or there is only one
	Agreement        string // the same in words

	// Feasible is false where the trade states that the geometry cannot be reached,
	// whatever symmetry says; FeasibleNote gives the reason, or a restriction.
	Feasible     bool
	FeasibleNote string

	Products []Product
	// Later lists what the products are known to go over to at once, by proton transfer:
	// the phenol of a cyclohexadienone, the cyclopentenones of an oxyallyl.
	Later       []Product
	Correlation *Correlation // nil from components alone
	Orbitals    []Phase      // the reacting orbitals, round the ring, for a drawing
	Notes       []string

	cycle *Cycle // the ring whose levels were followed
}

// Product is one stereoisomer that a process gives.
type Product struct {
	Molecule      *molecule.Molecule
	SMILES        string // canonical; one enantiomer where Racemic
	Configuration string // in words: "trans at the new bond", "E,Z", …; empty where nothing can be said
	Racemic       bool   // the mirror image forms as well, in equal amount
	Atoms         []int  // Atoms[i] is the atom of Molecule that was atom i of the joined reactants, -1 where it left
}

// Phase is one orbital of the reacting ring and its coefficients in the highest
// occupied and lowest empty level of the reactant and of the ring half-way.
type Phase struct {
	Atom    int    // number of the atom in the input, 0 for a hydrogen that is no node
	Label   string // "C3", "H on C5"
	Kind    Kind   // Pi, Sigma (hybrid or 1s of a breaking bond) or Omega
	Before  float64
	HOMO    float64 // coefficient in the highest occupied level of the reactant
	LUMO    float64 // coefficient in the lowest empty level of the reactant
	Halfway float64 // coefficient in the highest occupied level of the ring half-way
}

// Answer holds every mode of one process that starts from a structure, the modes
// allowed in the dark first.
type Answer struct {
	Reactants     []*molecule.Molecule
	Joined        *molecule.Molecule // all reactants as one graph; Product.Atoms refers to it
	Kind          terms.Kind
	Name          string   // "electrocyclic closure of 6 atoms", "[3,3] shift", …
	Bonds         [][2]int // σ bonds that form, atom numbers of the input
	Broken        [][2]int // σ bonds that break
	Processes     []Process
	Before, After *PiSummary // the conjugated system that reacts; After of the first product
	Notes         []string

	polar []int // atoms that hold the pair of a double bond to a reacting chain
}

// Mode lists the modes allowed under an activation, the feasible ones first.
func (a *Answer) Mode(act terms.Activation) []string {
	var list []string
	for _, feasible := range []bool{true, false} {
		for i := range a.Processes {
			p := &a.Processes[i]
			if p.Feasible == feasible && p.Verdict(act) == Allowed {
				list = append(list, p.Mode)
			}
		}
	}
	return list
}

// Verdict is the verdict given under an activation.
func (p *Process) Verdict(act terms.Activation) Verdict {
	if act == terms.Photochemical {
		return p.Photochemical
	}
	return p.Thermal
}

// Find returns the process that makes the given product: with its configuration
// first, then by constitution alone where the product states none, then by what the
// products go over to at once.
func (a *Answer) Find(product *molecule.Molecule) (*Process, bool) {
	want, mirror := product.SMILES(), product.Mirrored().SMILES()
	for i := range a.Processes {
		for _, q := range a.Processes[i].Products {
			if q.SMILES == want || q.Racemic && q.SMILES == mirror {
				return &a.Processes[i], true
			}
		}
	}
	flat := product.FlatSMILES()
	for i := range a.Processes {
		for _, q := range a.Processes[i].Products {
			if q.Molecule.FlatSMILES() == flat && (flat == want || q.SMILES == flat) {
				return &a.Processes[i], true
			}
		}
	}
	for i := range a.Processes {
		for _, q := range a.Processes[i].Later {
			if q.Molecule.FlatSMILES() == flat {
				return &a.Processes[i], true
			}
		}
	}
	return nil, false
}

// Makes tells whether a process gives the product: with its configuration, by constitution
// alone where the product states none, or as what its products go over to at once. Of what
// falls into pieces the product may be one.
func (p *Process) Makes(product *molecule.Molecule) bool {
	want, mirror, flat := product.SMILES(), product.Mirrored().SMILES(), product.FlatSMILES()
	holds := func(whole, piece string) bool {
		return whole == piece || slices.Contains(strings.Split(whole, "."), piece)
	}
	for _, q := range p.Products {
		if holds(q.SMILES, want) || q.Racemic && holds(q.SMILES, mirror) ||
			(flat == want || holds(q.SMILES, flat)) && holds(q.Molecule.FlatSMILES(), flat) {
			return true
		}
	}
	for _, q := range p.Later {
		if q.Molecule.FlatSMILES() == flat {
			return true
		}
	}
	return false
}

// FromComponents judges a component string. There is no structure, so the verdict
// rests on the general rule alone, and the process says so.
func FromComponents(s string) (*Process, error) {
	cs, err := ParseComponents(s)
	if err != nil {
		return nil, err
	}
	p := &Process{Parts: cs, Components: cs.String(), Electrons: cs.Electrons(), Feasible: true}
	p.judge(nil)
	p.FeasibleNote = componentFeasibility(cs)
	return p, nil
}

// judge sets the verdicts from the count and, where there is one, the correlation.
func (p *Process) judge(c *Correlation) {
	p.Count = [2]Verdict{p.Parts.Thermal(), p.Parts.Photochemical()}
	p.Correlation = c
	if c == nil {
		p.Derivations, p.Agree = 1, true
		p.Thermal, p.Photochemical = p.Count[0], p.Count[1]
		p.Agreement = "one derivation: the general rule over the components; no structure to correlate levels of"
		return
	}
	p.Derivations = 2
	p.Numerical = [2]Verdict{c.Thermal, c.Photochemical}
	switch {
	case c.Electrons != p.Parts.Electrons():
		p.Agreement = fmt.Sprintf("the two derivations disagree: the components hold %d electrons, the orbitals of the structure %d; no verdict", p.Parts.Electrons(), c.Electrons)
	case p.Count != p.Numerical:
		p.Agreement = fmt.Sprintf("the two derivations disagree: the count says %s in the dark and %s under light, the correlation of levels %s and %s; no verdict",
			p.Count[0], p.Count[1], orNone(p.Numerical[0]), orNone(p.Numerical[1]))
	default:
		p.Agree = true
		p.Thermal, p.Photochemical = p.Count[0], p.Count[1]
		p.Agreement = "the count over components and the correlation of levels agree: " + c.crossingText()
	}
}

// orNone puts a missing verdict into words.
func orNone(v Verdict) string {
	if v == NoVerdict {
		return "nothing"
	}
	return string(v)
}
