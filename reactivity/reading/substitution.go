package reading

import (
	"fmt"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/rules/agents"
)

// electrophilicSubstitution tries to explain p as a reactant in which a C–H of the π
// system was replaced: each bond from such a carbon to a group is cut in the product,
// a hydrogen put back, and the result compared with the reactants.
func (r *reader) electrophilicSubstitution(p *molecule.Molecule) bool {
	if agents.Any(r.Agents, agents.Hydride) {
		return false
	}
	for _, m := range r.candidates() {
		if len(p.Atoms) <= len(m.Atoms) {
			continue
		}
		want := compositionOf(m)
		tried := map[int]bool{}
		for a := range p.Atoms {
			if !attackable(p, a) {
				continue
			}
			for _, h := range p.Neighbours(a) {
				if p.Bonds[h.Bond].Order != 1 || p.BondInRing(h.Bond) {
					continue
				}
				gone := side(p, a, h.Atom)
				if len(p.Atoms)-len(gone) != len(m.Atoms) || tried[h.Bond] || !rest(p, gone, want) ||
					hydrogens(p)-hydrogensOf(p, gone)+1 != hydrogens(m) {
					continue
				}
				tried[h.Bond] = true
				if r.substituted(p, m, a, h.Atom, gone) {
					return true
				}
			}
		}
	}
	return false
}

// candidates are the molecules that could be the substrate: the organic reactants, and
// where the reaction names a common chemical as reactant, that too.
func (r *reader) candidates() []*molecule.Molecule {
	list := append([]*molecule.Molecule(nil), r.reactants...)
	for _, m := range r.reagents {
		known := false
		for _, x := range list {
			known = known || x == m
		}
		if !known && len(m.Atoms) >= 4 {
			list = append(list, m)
		}
	}
	return list
}

// solvent tells whether a molecule is among the agents as a solvent, beside other
// reactants.
func (r *reader) solvent(m *molecule.Molecule) bool {
	if len(r.reactants) > 0 && r.reactants[0] == m {
		return false
	}
	a, ok := agents.FromMolecule(m)
	return ok && a.Roles&agents.Solvent != 0
}

// attackable tells whether a is a carbon of an aromatic ring or of a C=C.
func attackable(m *molecule.Molecule, a int) bool {
	if m.Atoms[a].Element != 6 {
		return false
	}
	if m.Atoms[a].Aromatic {
		return true
	}
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Order == 2 && m.Atoms[h.Atom].Element == 6 {
			return true
		}
	}
	return false
}

// rest tells whether m less the atoms has the composition wanted.
func rest(m *molecule.Molecule, gone []int, want composition) bool {
	c := compositionOf(m)
	for _, i := range gone {
		c[m.Atoms[i].Element&127]--
	}
	return c == want
}

// less is a composition without some atoms of m.
func less(c composition, m *molecule.Molecule, atoms []int) composition {
	for _, i := range atoms {
		c[m.Atoms[i].Element&127]--
	}
	return c
}

// hydrogensOf counts the hydrogens on some atoms of m.
func hydrogensOf(m *molecule.Molecule, atoms []int) int {
	n := 0
	for _, i := range atoms {
		n += m.Atoms[i].Hydrogens
	}
	return n
}

// substituted checks one cut of a substitution of hydrogen.
func (r *reader) substituted(p, m *molecule.Molecule, a, b int, gone []int) bool {
	before, at := without(p, gone, a, func(e *molecule.Editor) { e.SetHydrogens(a, p.Atoms[a].Hydrogens+1) })
	if before == nil || !before.SameConstitution(m) {
		return false
	}
	in := group(p, a, gone, b)
	if in == nil {
		return false
	}
	event, ok := r.replacement(p, in, a)
	if !ok {
		return false
	}
	if r.solvent(m) && (in.Class == "alkylation" || in.Class == "aminomethylation" || in.Class == "") && !agents.Any(r.Agents, agents.LewisAcid) {
		return false // an arene that only stands there as the solvent
	}
	to := correspond(before, m)
	if to == nil {
		return false
	}
	r.Kind, r.Event = terms.Kind(event), event
	r.Substrate, r.Sites, r.Incoming = m, orbit(m, to[at]), in
	r.rest(m, in)
	if event == terms.ElectrophilicSubstitution && in.Class != "" && len(r.Agents) > 0 && !r.delivered(in) {
		r.Notes = append(r.Notes, fmt.Sprintf("no agent that is written delivers the group that comes in (%s): check the agents", in))
	}
	r.mapped(p, a, m, to[at])
	return true
}

// replacement tells which event replaces a hydrogen by the group, if any does.
func (r *reader) replacement(p *molecule.Molecule, in *reactivity.Incoming, a int) (terms.Event, bool) {
	if agents.Any(r.Agents, agents.Organometal) {
		return "", false // directed metalation: see nearest
	}
	if agents.Any(r.Agents, agents.MetalCatalyst) && in.Class != "bromination" && in.Class != "chlorination" && in.Class != "iodination" && in.Class != "nitration" {
		return "", false
	}
	e := in.Group.Atoms[in.Binds].Element
	radical := agents.Any(r.Agents, agents.RadicalStarter) && (e == 6 || e == 9)
	switch {
	case in.Class == "alkylation" || in.Class == "acylation":
		if radical && azine(p, a) {
			return terms.RadicalSubstitution, true
		}
		return terms.ElectrophilicSubstitution, true
	case in.Class == "sulfonylation" || in.Class != "":
		return terms.ElectrophilicSubstitution, true
	case e == 6 && radical:
		return terms.RadicalSubstitution, true
	case e == 6 && in.Group.Atoms[in.Binds].Aromatic:
		return "", false // biaryl by C–H activation
	case e == 6:
		return terms.ElectrophilicSubstitution, true
	case e == 16, e == 34, e == 35, e == 1, e == 80:
		return terms.ElectrophilicSubstitution, true
	case e == 7 && !in.Group.Atoms[in.Binds].Aromatic && in.Group.Atoms[in.Binds].Hydrogens == 0 && len(in.Group.Atoms) > 2 && hasNN(in.Group, in.Binds):
		return terms.ElectrophilicSubstitution, true // azo coupling, hydrazination
	}
	return "", false
}

func hasNN(m *molecule.Molecule, a int) bool {
	for _, h := range m.Neighbours(a) {
		if m.Atoms[h.Atom].Element == 7 {
			return true
		}
	}
	return false
}

// azine tells whether a belongs to a six-membered ring with a pyridine-type nitrogen.
func azine(m *molecule.Molecule, a int) bool {
	for _, ring := range m.Rings() {
		in, n := false, false
		for _, x := range ring {
			in = in || x == a
			n = n || m.Atoms[x].Element == 7 && m.Atoms[x].Aromatic
		}
		if len(ring) == 6 && in && n {
			return true
		}
	}
	return false
}

// delivered tells whether an agent or a reactant brings the incoming group.
func (r *reader) delivered(in *reactivity.Incoming) bool {
	for _, a := range r.Agents {
		if a.Name == "" && a.SMILES == "" || a.Delivers == in.Class || a.Delivers == "acylation" && in.Class == "formylation" {
			return true
		}
	}
	switch in.Class {
	case "bromination", "chlorination", "iodination", "fluorination":
		for _, m := range append(r.reactants, r.reagents...) {
			if m == r.Substrate {
				continue
			}
			for _, a := range m.Atoms {
				if a.Element == in.Group.Atoms[in.Binds].Element {
					return true
				}
			}
		}
		for _, x := range r.Aside {
			if x.Name == "bromide" && in.Class == "bromination" || x.Name == "iodide" && in.Class == "iodination" || x.Name == "chloride" && in.Class == "chlorination" {
				return true
			}
		}
		return false
	case "nitration", "sulfonation", "chlorosulfonation":
		return agents.Any(r.Agents, agents.Nitrating|agents.Sulfonating|agents.StrongAcid|agents.Diazotizing)
	}
	return true
}

// rest lists the other reactants: the one that brings the group is the partner, the
// others may be attacked too.
func (r *reader) rest(substrate *molecule.Molecule, in *reactivity.Incoming) {
	want := compositionOf(in.Group)
	want[0] = 0
	r.Others, r.Partner = nil, nil
	for _, m := range r.reactants {
		if m == substrate {
			continue
		}
		if r.Partner == nil && in.Group != nil && len(in.Group.Atoms) > 2 && covers(compositionOf(m), want) {
			r.Partner = m
		}
		r.Others = append(r.Others, m)
	}
}

func covers(have, want composition) bool {
	for i := range want {
		if have[i] < want[i] {
			return false
		}
	}
	return true
}

// nucleophilicSubstitution tries to explain p as a reactant whose leaving group on an
// unsaturated carbon was displaced: each bond from such a carbon is cut in the
// product, each leaving group of the reactant put back, and the result compared.
func (r *reader) nucleophilicSubstitution(p *molecule.Molecule) bool {
	for _, m := range r.candidates() {
		sites := reactivity.LeavingSites(m)
		if len(sites) == 0 {
			continue
		}
		want := compositionOf(m)
		for a := range p.Atoms {
			if !attackable(p, a) {
				continue
			}
			for _, h := range p.Neighbours(a) {
				x := &p.Atoms[h.Atom]
				if p.Bonds[h.Bond].Order != 1 || p.BondInRing(h.Bond) || !nucleophilic(x.Element) {
					continue
				}
				gone := side(p, a, h.Atom)
				kept := len(p.Atoms) - len(gone)
				done := map[string]bool{}
				for _, s := range sites {
					key := s.Name
					if done[key] || kept+len(s.Group) != len(m.Atoms) {
						continue
					}
					done[key] = true
					if hydrogens(p)-hydrogensOf(p, gone)+hydrogensOf(m, s.Group) != hydrogens(m) || !rest(p, gone, less(want, m, s.Group)) {
						continue
					}
					if r.displaced(p, m, a, h.Atom, gone, s) {
						return true
					}
				}
			}
		}
	}
	return false
}

// nucleophilic lists the elements that displace a leaving group.
func nucleophilic(e int) bool {
	switch e {
	case 6, 7, 8, 9, 15, 16, 34:
		return true
	}
	return false
}

func (r *reader) displaced(p, m *molecule.Molecule, a, b int, gone []int, s reactivity.LeavingSite) bool {
	before, at := without(p, gone, a, func(e *molecule.Editor) { s.Attach(e, m, a) })
	if before == nil || !before.SameConstitution(m) {
		return false
	}
	in := group(p, a, gone, b)
	if in == nil || !r.displaces(in, m, s) {
		return false
	}
	to := correspond(before, m)
	if to == nil {
		return false
	}
	site := to[at]
	if m.Atoms[site].Element != 6 {
		return false
	}
	r.Kind, r.Event = terms.Kind(terms.NucleophilicSubstitution), terms.NucleophilicSubstitution
	r.Substrate, r.Sites, r.Incoming = m, orbit(m, site), in
	r.rest(m, in)
	r.mapped(p, a, m, site)
	return true
}

// displaces tells whether the group can have come in as a nucleophile in the place of
// the leaving group: it must be there among the reactants or agents, or be an N, O or
// S nucleophile of the common kind; a nitro group that became an amine was reduced.
func (r *reader) displaces(in *reactivity.Incoming, m *molecule.Molecule, s reactivity.LeavingSite) bool {
	x := in.Group.Atoms[in.Binds]
	small := len(in.Group.Atoms) == 2 // the wildcard and one atom
	first := m.Atoms[s.Group[0]].Element
	if first == x.Element && (first == 7 || first == 16 || first == 8) {
		// NO2 → NH2, SOR → SO2R, OTf → OH: a change within the group unless the
		// nucleophile stands among the reactants.
		return !small && x.Element == 7 && !agents.Any(r.Agents, agents.Reductant|agents.Hydrogen) && r.brings(in)
	}
	switch x.Element {
	case 6:
		if x.Aromatic {
			return false
		}
		if in.String() == "*C#N" || in.String() == "C(#N)*" || isCyano(in) {
			return !agents.Any(r.Agents, agents.MetalCatalyst|agents.TransitionMetal)
		}
		return r.brings(in) && acidicCarbon(in)
	case 7:
		if small && x.Hydrogens == 2 {
			return true // ammonia, or its equivalent
		}
		return x.Charge == 0 || r.brings(in) || len(in.Group.Atoms) <= 4
	case 9:
		return small
	}
	return true
}

func isCyano(in *reactivity.Incoming) bool {
	for _, h := range in.Group.Neighbours(in.Binds) {
		if in.Group.Atoms[h.Atom].Element == 7 && in.Group.Bonds[h.Bond].Order == 3 {
			return true
		}
	}
	return false
}

// acidicCarbon tells whether the carbon that binds carries acceptors, as the anion of
// a malonate or nitrile does.
func acidicCarbon(in *reactivity.Incoming) bool {
	n := 0
	for _, h := range in.Group.Neighbours(in.Binds) {
		g := h.Atom
		for _, k := range in.Group.Neighbours(g) {
			if in.Group.Bonds[k.Bond].Order >= 2 && (in.Group.Atoms[k.Atom].Element == 7 || in.Group.Atoms[k.Atom].Element == 8) {
				n++
				break
			}
		}
	}
	return n >= 1
}

// brings tells whether a reactant is the incoming group with a hydrogen.
func (r *reader) brings(in *reactivity.Incoming) bool {
	e := in.Group.Edit()
	e.SetHydrogens(in.Binds, in.Group.Atoms[in.Binds].Hydrogens+1)
	e.RemoveAtom(in.Open)
	x, err := e.Done()
	if err != nil {
		return false
	}
	for _, m := range append(append([]*molecule.Molecule(nil), r.reactants...), r.reagents...) {
		if m.SameConstitution(x) {
			return true
		}
	}
	return false
}
