package reading

import (
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/rules/agents"
)

// electrophilicAddition tries to explain p as HX or H–OH added to a C=C of a
// reactant: the bond C–X is cut and the double bond put back.
func (r *reader) electrophilicAddition(p *molecule.Molecule) bool {
	if agents.Any(r.Agents, agents.Hydride|agents.Hydrogen) {
		return false
	}
	for _, m := range r.candidates() {
		if len(p.Atoms) != len(m.Atoms)+1 || hydrogens(p) < hydrogens(m) {
			continue
		}
		for x := range p.Atoms {
			switch p.Atoms[x].Element {
			case 8, 9, 17, 35, 53:
			default:
				continue
			}
			if p.Degree(x) != 1 || p.Bonds[p.Neighbours(x)[0].Bond].Order != 1 {
				continue
			}
			c := p.Neighbours(x)[0].Atom
			if p.Atoms[c].Element != 6 || p.Atoms[c].Aromatic {
				continue
			}
			for _, h := range p.Neighbours(c) {
				n := h.Atom
				if n == x || p.Bonds[h.Bond].Order != 1 || p.Atoms[n].Element != 6 || p.Atoms[n].Hydrogens == 0 {
					continue
				}
				before, at := without(p, []int{x}, c, func(e *molecule.Editor) {
					e.SetHydrogens(n, p.Atoms[n].Hydrogens-1)
					e.SetOrder(c, n, 2)
				})
				if before == nil || !before.SameConstitution(m) {
					continue
				}
				to := correspond(before, m)
				if to == nil {
					continue
				}
				in := group(p, c, []int{x}, x)
				if in == nil {
					return false
				}
				// The electrophile is the proton: it goes to the neighbour, the halide
				// or water to the carbon that carries the charge.
				event, site := terms.ElectrophilicAddition, n
				if agents.Any(r.Agents, agents.RadicalStarter|agents.Light) {
					event, site = terms.RadicalAddition, c
				}
				number := p.Atoms[site].Number
				for i := range before.Atoms {
					if before.Atoms[i].Number == number {
						at = i
					}
				}
				r.Kind, r.Event = terms.Kind(event), event
				r.Substrate, r.Sites, r.Incoming = m, orbit(m, to[at]), in
				r.rest(m, in)
				return true
			}
		}
	}
	return false
}

// nucleophilicAddition tries to explain p as an amine, alcohol, thiol, cyanide or
// organometallic carbon added to an acceptor carbon of a reactant.
func (r *reader) nucleophilicAddition(p *molecule.Molecule) bool {
	for _, m := range r.candidates() {
		sites := acceptors(m)
		if len(sites) == 0 || len(p.Atoms) <= len(m.Atoms) {
			continue
		}
		extra := len(p.Atoms) - len(m.Atoms)
		for _, in := range r.nucleophiles(m, extra) {
			for _, s := range sites {
				x, err := reactivity.Product(m, terms.NucleophilicAddition, s, in)
				if err != nil || !x.SameConstitution(p) {
					continue
				}
				r.Kind, r.Event = terms.Kind(terms.NucleophilicAddition), terms.NucleophilicAddition
				r.Substrate, r.Sites, r.Incoming = m, orbit(m, s), in
				r.rest(m, in)
				return true
			}
		}
	}
	return false
}

// acceptors are the carbons of C=O, C=N, C≡N outside acid derivatives, and the far
// carbons of C=C in conjugation with an acceptor.
func acceptors(m *molecule.Molecule) []int {
	var list []int
	for i := range m.Atoms {
		if m.Atoms[i].Element != 6 || m.Atoms[i].Aromatic {
			continue
		}
		for _, h := range m.Neighbours(i) {
			if m.Bonds[h.Bond].Order < 2 || m.Bonds[h.Bond].Aromatic {
				continue
			}
			switch m.Atoms[h.Atom].Element {
			case 8:
				if !derivative(m, i) && neighbours(m, i, 7, 2) == 0 {
					list = append(list, i)
				}
			case 7:
				if neighbours(m, i, 8, 2) == 0 && neighbours(m, i, 7, 1) == 0 {
					list = append(list, i)
				}
			case 6:
				if acceptorOn(m, h.Atom, i) {
					list = append(list, i)
				}
			}
		}
	}
	return list
}

// derivative tells whether a carbonyl carbon carries O, N or halogen.
func derivative(m *molecule.Molecule, c int) bool {
	n := 0
	for _, h := range m.Neighbours(c) {
		switch m.Atoms[h.Atom].Element {
		case 7, 8, 9, 16, 17, 35:
			n++
		}
	}
	return n > 1
}

// acceptorOn tells whether carbon c carries C=O, C≡N, NO2 or SO2, seen from its other
// neighbour.
func acceptorOn(m *molecule.Molecule, c, from int) bool {
	for _, h := range m.Neighbours(c) {
		if h.Atom == from {
			continue
		}
		x := m.Atoms[h.Atom]
		if x.Element == 7 && x.Charge > 0 {
			return true
		}
		for _, g := range m.Neighbours(h.Atom) {
			if g.Atom == c || m.Bonds[g.Bond].Order < 2 || m.Bonds[g.Bond].Aromatic {
				continue
			}
			if e := m.Atoms[g.Atom].Element; e == 8 || e == 7 && m.Bonds[g.Bond].Order == 3 {
				return true
			}
		}
	}
	return false
}

// nucleophiles are the groups of n atoms that the other reactants can add with: X–H of
// N, O, S, acidic C–H, C–metal, cyanide.
func (r *reader) nucleophiles(not *molecule.Molecule, n int) []*reactivity.Incoming {
	var list []*reactivity.Incoming
	for _, m := range append(append([]*molecule.Molecule(nil), r.reactants...), r.unlisted()...) {
		if m == not {
			continue
		}
		seen := map[int]bool{}
		classes := m.Classes()
		for i, a := range m.Atoms {
			if seen[classes[i]] {
				continue
			}
			seen[classes[i]] = true
			if len(m.Atoms) == n {
				switch {
				case (a.Element == 7 || a.Element == 8 || a.Element == 16) && a.Hydrogens > 0 && a.Charge == 0,
					a.Element == 6 && a.Hydrogens > 0 && acceptorOn(m, i, -1) && a.Charge == 0:
					if in := open(m, i, -1); in != nil {
						list = append(list, in)
					}
				case a.Charge < 0 && (a.Element == 6 || a.Element == 7 || a.Element == 8 || a.Element == 16):
					if in := open(m, i, -1); in != nil {
						list = append(list, in)
					}
				}
			}
			if a.Element == 6 {
				for _, h := range m.Neighbours(i) {
					if x := m.Atoms[h.Atom].Element; x == 3 || x == 12 || x == 30 {
						gone := side(m, i, h.Atom)
						if len(m.Atoms)-len(gone) == n {
							if in := open(m, i, h.Atom); in != nil {
								list = append(list, in)
							}
						}
					}
				}
			}
		}
	}
	return list
}

// open makes an incoming group of m that binds through atom a, in the place of a
// hydrogen, a negative charge, or the metal.
func open(m *molecule.Molecule, a, metal int) *reactivity.Incoming {
	e := m.Edit()
	switch {
	case metal >= 0:
		e.RemoveBond(a, metal)
	case m.Atoms[a].Charge < 0:
		e.Atom(a).Charge++
	default:
		e.SetHydrogens(a, m.Atoms[a].Hydrogens-1)
	}
	w := e.AddAtom(molecule.Atom{Element: 0, Offset: -1})
	e.AddBond(a, w, 1)
	if metal >= 0 {
		gone := side(m, a, metal)
		for i := len(m.Atoms) - 1; i >= 0; i-- {
			for _, g := range gone {
				if g == i {
					e.RemoveAtom(i)
				}
			}
		}
	}
	x, err := e.Done()
	if err != nil {
		return nil
	}
	x.Source = x.SMILES()
	in, err := reactivity.NewIncoming(x)
	if err != nil {
		return nil
	}
	return in
}

// Delivered is the group that the agents deliver in an event, or nil where they do not
// say.
func Delivered(event terms.Event, list []agents.Agent) *reactivity.Incoming {
	if event != terms.ElectrophilicSubstitution {
		return nil
	}
	var class string
	chloride := false
	for _, a := range list {
		if a.Name == "phosphorus oxychloride" {
			chloride = true
		}
		if a.Name == "N,N-dimethylformamide" && chloride {
			class = "formylation"
		}
	}
	var acyl string
	for _, a := range list {
		if class == "" && a.Delivers != "" && a.Roles&agents.StrongAcid == 0 {
			class = a.Delivers
			acyl = a.SMILES
		}
	}
	for _, a := range list {
		if class == "" && a.Delivers != "" {
			class = a.Delivers
		}
	}
	smiles := map[string]string{
		"nitration": "*[N+](=O)[O-]", "bromination": "*Br", "chlorination": "*Cl", "iodination": "*I",
		"fluorination": "*F", "formylation": "*C=O", "sulfonation": "*S(=O)(=O)O",
		"chlorosulfonation": "*S(=O)(=O)Cl", "nitrosation": "*N=O",
	}[class]
	if class == "acylation" && acyl != "" {
		if m, err := molecule.ParseSMILES(acyl); err == nil {
			if in := acylOf(m); in != nil {
				return in
			}
		}
	}
	if smiles == "" {
		return nil
	}
	in, err := reactivity.ParseIncoming(smiles)
	if err != nil {
		return nil
	}
	return in
}

// acylOf is the acyl group of an acid chloride or anhydride.
func acylOf(m *molecule.Molecule) *reactivity.Incoming {
	for i := range m.Atoms {
		if m.Atoms[i].Element != 6 || !derivative(m, i) {
			continue
		}
		for _, h := range m.Neighbours(i) {
			x := m.Atoms[h.Atom]
			if m.Bonds[h.Bond].Order != 1 || x.Element != 17 && x.Element != 8 || m.BondInRing(h.Bond) {
				continue
			}
			return group(m, h.Atom, side(m, h.Atom, i), i)
		}
	}
	return nil
}
