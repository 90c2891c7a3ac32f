package reading

import (
	"fmt"
	"sort"

	"lobecast/frontier/molecule"
	"lobecast/rules/agents"
)

// sort puts the molecules of the reaction into their roles: organic reactants, known
// reagents, agents, what is set aside, products.
func (r *reader) sort(rxn *molecule.Reaction, words string) error {
	if len(rxn.Reactants) == 0 && len(rxn.Agents) == 0 {
		return fmt.Errorf("the reaction has no reactant; write reactants>agents>products")
	}
	if len(rxn.Products) == 0 {
		return fmt.Errorf("the reaction has no product; write reactants>agents>products, or give kind and substrate instead")
	}
	r.products = mainMolecules(rxn.Products)
	productFormula := map[string]bool{}
	for _, p := range r.products {
		productFormula[p.Formula()] = true
	}
	for _, m := range rxn.Reactants {
		a, known := agents.FromMolecule(m)
		switch {
		case !known && complex(m):
			a.Written, a.Name, a.Roles = "metal complex", "metal complex", agents.MetalCatalyst|agents.TransitionMetal
			r.Agents = append(r.Agents, a)
		case !known:
			if name, _, companion := molecule.CompanionName(m); companion {
				r.Aside = append(r.Aside, molecule.Aside{Name: name, SMILES: m.SMILES()})
				continue
			}
			r.reactants = append(r.reactants, m)
		case a.Roles&agents.Ion != 0 && a.Roles&^(agents.Ion) == 0:
			r.Aside = append(r.Aside, molecule.Aside{Name: a.Name, SMILES: m.SMILES()})
		default:
			r.Agents = append(r.Agents, a)
			r.reagents = append(r.reagents, m)
		}
	}
	for _, m := range rxn.Agents {
		a, known := agents.FromMolecule(m)
		if !known && complex(m) {
			a.Written, a.Name, a.Roles = "metal complex", "metal complex", agents.MetalCatalyst|agents.TransitionMetal
			r.Agents = append(r.Agents, a)
			continue
		}
		if !known {
			if name, _, companion := molecule.CompanionName(m); companion {
				r.Aside = append(r.Aside, molecule.Aside{Name: name, SMILES: m.SMILES()})
				continue
			}
			a.SMILES = m.FlatSMILES()
			a.Written = a.SMILES
			r.Agents = append(r.Agents, a)
			r.reagents = append(r.reagents, m)
			continue
		}
		if a.Roles == agents.Ion {
			r.Aside = append(r.Aside, molecule.Aside{Name: a.Name, SMILES: m.SMILES()})
			continue
		}
		r.Agents = append(r.Agents, a)
		r.reagents = append(r.reagents, m)
	}
	if h, ok := hydrideOf(r.Agents, r.Aside); ok {
		r.Agents = append(r.Agents, h)
	}
	if words != "" {
		r.Agents = append(r.Agents, agents.ParseWords(words)...)
	}
	bySize(r.reactants)
	if len(r.reactants) == 0 {
		// All reactants are common chemicals: toluene, aniline, … The substrate is the
		// one that shares most carbon with the product; all of them are looked at.
		r.reactants = append(r.reactants, r.reagents...)
		bySize(r.reactants)
	}
	if len(r.reactants) == 0 {
		return fmt.Errorf("the reaction has no organic reactant; only %d ions and salts were found", len(r.Aside))
	}
	return nil
}

// mainMolecules are the products that are no salt, the largest first.
func mainMolecules(list []*molecule.Molecule) []*molecule.Molecule {
	var main []*molecule.Molecule
	for _, m := range list {
		if _, _, companion := molecule.CompanionName(m); companion && len(list) > 1 {
			continue
		}
		main = append(main, m)
	}
	if len(main) == 0 {
		main = append(main, list...)
	}
	bySize(main)
	return main
}

func bySize(list []*molecule.Molecule) {
	sort.SliceStable(list, func(i, j int) bool { return len(list[i].Atoms) > len(list[j].Atoms) })
}

// complex tells whether a molecule is a transition-metal complex.
func complex(m *molecule.Molecule) bool {
	for _, a := range m.Atoms {
		switch a.Element {
		case 26, 27, 28, 29, 44, 45, 46, 77, 78, 79:
			return true
		}
	}
	return false
}

// hydrideOf finds lithium aluminium hydride and its kin where a collection recorded
// them as bare ions.
func hydrideOf(list []agents.Agent, aside []molecule.Aside) (agents.Agent, bool) {
	hydride, aluminium := false, false
	for _, a := range list {
		hydride = hydride || a.Name == "hydride"
		aluminium = aluminium || a.Name == "aluminium ion"
	}
	for _, a := range aside {
		aluminium = aluminium || a.Name == "aluminium ion"
	}
	if !hydride || !aluminium {
		return agents.Agent{}, false
	}
	return agents.ParseWords("LiAlH4")[0], true
}
