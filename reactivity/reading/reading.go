package reading

import (
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/rules/agents"
)

// Reading is what a reaction was taken for.
type Reading struct {
	Kind      terms.Kind
	Event     terms.Event          // of a site event
	Substrate *molecule.Molecule   // the molecule attacked; component A of a cycloaddition
	Sites     []int                // intended atoms of Substrate, all equivalent ones
	Incoming  *reactivity.Incoming // what comes in
	Partner   *molecule.Molecule   // component B; the reagent molecule of a substitution
	Bonds     [][2]int             // cycloaddition: [atom of Substrate, atom of Partner or Substrate]
	Meeting   *reactivity.Meeting  // cycloaddition: what can join, for the judgement
	// Components are the atoms, end to end, of the two π systems of a cycloaddition that is
	// judged by orbital symmetry only: in Substrate, and in Partner or Substrate; the first
	// atoms become bonded to each other.
	Components [2][]int
	Retro      bool   // cycloaddition: Substrate falls into a diene and a partner
	Shift      string // sigmatropic: its order, "3,3"
	Product    *molecule.Molecule
	Others     []*molecule.Molecule // other reactants that could be attacked
	Aside      []molecule.Aside
	Agents     []agents.Agent

	Medium     terms.Medium
	MediumFrom string // what decided the medium
	Activation terms.Activation

	Nearest    string // of kind other: the trade's name of the nearest reading
	Outside    string // why the model cannot judge it
	MapNote    string // an atom map that contradicts the product
	Notes      []string
	Impossible string // why the product cannot come from the reactants
}

// Stated is what the chemist has stated beside the reaction.
type Stated struct {
	Medium     terms.Medium
	Activation terms.Activation
}

// reader holds a reaction while it is being read.
type reader struct {
	Reading
	reactants []*molecule.Molecule // organic reactants, the largest first
	reagents  []*molecule.Molecule // reactants that the vocabulary knows
	products  []*molecule.Molecule
}

// Read reads a reaction and the agents written beside it. The error is a refusal of
// input: a reaction without reactant or product.
func Read(rxn *molecule.Reaction, words string, stated Stated) (*Reading, error) {
	r := &reader{}
	if err := r.sort(rxn, words); err != nil {
		return nil, err
	}
	r.Activation = stated.Activation
	if r.Activation == "" && agents.Any(r.Agents, agents.Light) {
		r.Activation = terms.Photochemical
		if r.oxygen(rxn) {
			r.Activation = terms.Thermal
			r.Notes = append(r.Notes, "light with oxygen is taken to make singlet oxygen, which adds to a partner in its ground state: judged as a thermal addition")
		}
	}
	r.interpret()
	r.dropReactants()
	r.Medium, r.MediumFrom = MediumOf(r.Event, r.Agents, stated.Medium)
	return &r.Reading, nil
}

// dropReactants takes what turned out to be the substrate or its partner off the list
// of agents: toluene that is nitrated is no solvent.
func (r *reader) dropReactants() {
	var kept []agents.Agent
	for _, a := range r.Agents {
		is := func(m *molecule.Molecule) bool {
			return m != nil && a.Recorded && a.SMILES != "" && m.FlatSMILES() == a.SMILES
		}
		if r.Kind == terms.OtherStep || !is(r.Substrate) && !(r.Kind == terms.Cycloaddition && is(r.Partner)) {
			kept = append(kept, a)
		}
	}
	r.Agents = kept
}

// interpret tries the events of the model one after the other, those with the fewest
// ways of being mistaken first.
func (r *reader) interpret() {
	if r.unchanged() {
		r.other("", "the product is among the reactants: nothing changes in this step")
		return
	}
	metal := agents.Any(r.Agents, agents.MetalCatalyst)
	for _, p := range r.products {
		// Nothing is lost in an addition, a hydrogen or a leaving group in a
		// substitution: where all atoms are kept, additions are asked for first.
		r.Product = p
		if r.conserved(p) && r.cycloaddition(p) {
			return
		}
	}
	for _, p := range r.products {
		r.Product = p
		if r.electrophilicSubstitution(p) || !metal && r.nucleophilicSubstitution(p) {
			r.compareMaps()
			return
		}
	}
	for _, p := range r.products {
		r.Product = p
		if r.cycloaddition(p) || r.pericyclic(p) {
			return
		}
	}
	for _, p := range r.products {
		r.Product = p
		if !metal && (r.electrophilicAddition(p) || r.nucleophilicAddition(p)) {
			return
		}
	}
	r.Product = r.products[0]
	r.nearest()
}

// other makes the reading one that the model cannot judge.
func (r *reader) other(nearest, why string) {
	r.Kind, r.Event = terms.OtherStep, ""
	r.Nearest, r.Outside = nearest, why
	if r.Product == nil {
		r.Product = r.products[0]
	}
	if r.Substrate == nil && len(r.reactants) > 0 {
		r.Substrate = r.reactants[0]
		r.Others = r.reactants[1:]
	}
}

// oxygen tells whether O2 is among the reactants.
func (r *reader) oxygen(rxn *molecule.Reaction) bool {
	for _, m := range rxn.Reactants {
		if len(m.Atoms) == 2 && m.FlatSMILES() == "O=O" {
			return true
		}
	}
	return false
}

// conserved tells whether two of the reactants together have just the atoms of p.
func (r *reader) conserved(p *molecule.Molecule) bool {
	type atoms struct {
		heavy     composition
		hydrogens int
	}
	seen := make(map[atoms]bool, len(r.reactants))
	for _, m := range r.reactants {
		own := atoms{compositionOf(m), hydrogens(m)}
		other := atoms{compositionOf(p), hydrogens(p) - own.hydrogens}
		for i, n := range own.heavy {
			other.heavy[i] -= n
		}
		if seen[other] {
			return true
		}
		seen[own] = true
	}
	return false
}

func (r *reader) unchanged() bool {
	for _, p := range r.products {
		for _, m := range r.reactants {
			if p.SameConstitution(m) && p.SMILES() == m.SMILES() {
				return true
			}
		}
	}
	return false
}
