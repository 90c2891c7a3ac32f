package reading

import (
	"fmt"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/rules/agents"
	"lobecast/rules/symmetry"
)

// shifts are the sigmatropic orders tried, the common ones first.
var shifts = [][2]int{{3, 3}, {2, 3}, {1, 5}, {1, 3}, {1, 7}}

// pericyclic tries to explain p as an isomer of a reactant by one electrocyclic or
// sigmatropic step, as a cheletropic addition or extrusion, as an ene product, as a
// cycloaddition that only orbital symmetry judges, or as the pieces of a retro-Diels–Alder
// reaction.
func (r *reader) pericyclic(p *molecule.Molecule) bool {
	want := compositionOf(p)
	for _, m := range r.reactants {
		if len(m.Atoms) > 80 || agents.Any(r.Agents, agents.MetalCatalyst) {
			continue
		}
		// A hydride is a base in an isomerization, as in the anionic oxy-Cope reaction.
		if compositionOf(m) == want && hydrogens(m) == hydrogens(p) && !m.SameConstitution(p) && r.isomer(m, p) {
			return true
		}
		if agents.Any(r.Agents, agents.Hydride) {
			continue
		}
		if len(m.Atoms) > len(p.Atoms) && r.extrusion(m, p) {
			return true
		}
	}
	if !agents.Any(r.Agents, agents.Hydride|agents.MetalCatalyst) && r.retro(p) {
		return true
	}
	all := append(append([]*molecule.Molecule(nil), r.reactants...), r.unlisted()...)
	for i, a := range all {
		for k, b := range all {
			if i == k || sum(a, b) != want || hydrogens(a)+hydrogens(b) != hydrogens(p) {
				continue
			}
			if r.joined(a, b, p) || i < k && r.otherCycloaddition(a, b, p) {
				return true
			}
		}
	}
	return false
}

func (r *reader) isomer(m, p *molecule.Molecule) bool {
	d := ringCount(p) - ringCount(m)
	set := func(kind terms.Kind) bool {
		r.Kind, r.Event = kind, ""
		r.Substrate = m
		for _, x := range r.reactants {
			if x != m {
				r.Others = append(r.Others, x)
			}
		}
		return true
	}
	if d == 2 && r.otherCycloaddition(m, nil, p) {
		return true
	}
	switch d {
	case 1:
		if a, err := symmetry.ClosureGiving(m, p); err == nil && finds(a, p) {
			return set(terms.Electrocyclic)
		}
	case -1:
		if a, err := symmetry.OpeningGiving(m, p); err == nil && finds(a, p) {
			return set(terms.Electrocyclic)
		}
	}
	for _, s := range shifts {
		if s != [2]int{3, 3} && s != [2]int{2, 3} && agents.Any(r.Agents, agents.Acid|agents.StrongAcid|agents.LewisAcid|agents.Base|agents.StrongBase|agents.TransitionMetal) {
			continue // acids, bases and metals move hydrogens and groups in steps
		}
		if a, err := symmetry.ShiftGiving(m, s[0], s[1], p); err == nil && finds(a, p) {
			r.Shift = fmt.Sprintf("%d,%d", s[0], s[1])
			return set(terms.Sigmatropic)
		}
	}
	return false
}

func finds(a *symmetry.Answer, p *molecule.Molecule) bool {
	for i := range a.Processes {
		if a.Processes[i].Makes(p) {
			return true
		}
	}
	return false
}

// Alkenes that carry a donor, and those that carry an acceptor.
var (
	donorAlkenes = []*molecule.Pattern{
		molecule.MustPattern("CN(C)C=C"), molecule.MustPattern("[nH]1cccc1"), molecule.MustPattern("[OH]C=C"),
		molecule.MustPattern("C[Si](C)(C)OC=C"), molecule.MustPattern("[O-]C=C"), molecule.MustPattern("C[NH]C=C"),
	}
	acceptorAlkenes = []*molecule.Pattern{
		molecule.MustPattern("C=CC=O"), molecule.MustPattern("C=CC#N"), molecule.MustPattern("C=C[N+](=O)[O-]"),
		molecule.MustPattern("C=CS(=O)(=O)C"), molecule.MustPattern("C#CC=O"),
	}
)

func polar(m *molecule.Molecule) bool { return holdsAny(m, donorAlkenes) }

func acceptor(m *molecule.Molecule) bool { return holdsAny(m, acceptorAlkenes) }

func holdsAny(m *molecule.Molecule, list []*molecule.Pattern) bool {
	for _, p := range list {
		if p.Has(m) {
			return true
		}
	}
	return false
}

func (r *reader) extrusion(m, p *molecule.Molecule) bool {
	a, err := symmetry.Extrusion(m)
	if err != nil || !finds(a, p) {
		return false
	}
	r.Kind, r.Event, r.Substrate = terms.Cheletropic, "", m
	return true
}

func (r *reader) joined(a, b, p *molecule.Molecule) bool {
	if x, err := symmetry.Cheletropic(a, b); err == nil && finds(x, p) {
		r.Kind, r.Event, r.Substrate, r.Partner = terms.Cheletropic, "", a, b
		return true
	}
	if polar(a) && acceptor(b) || polar(b) && acceptor(a) {
		return false // an enamine or enol adds to an acceptor in steps
	}
	if agents.Any(r.Agents, agents.Acid|agents.StrongAcid) {
		return false // through a cation
	}
	if x, err := symmetry.EneGiving(a, b, p); err == nil && finds(x, p) {
		r.Kind, r.Event, r.Substrate, r.Partner = terms.Ene, "", a, b
		return true
	}
	return false
}
