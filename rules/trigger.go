package rules

import (
	"fmt"
	"slices"
	"sync"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/rules/agents"
)

// patterns holds the compiled patterns by their text. Triggers name a fixed set, so
// the map stays small.
var patterns sync.Map

func pattern(smiles string) *molecule.Pattern {
	if p, ok := patterns.Load(smiles); ok {
		return p.(*molecule.Pattern)
	}
	p, err := molecule.NewPattern(smiles)
	if err != nil {
		panic(fmt.Sprintf("rules: pattern %s: %v", smiles, err))
	}
	patterns.Store(smiles, p)
	return p
}

// has tells whether any molecule of the situation holds one of the patterns.
func (s *Situation) has(smiles ...string) bool {
	for _, m := range s.Molecules {
		if holds(m, smiles...) {
			return true
		}
	}
	return false
}

// substrate tells whether the first molecule holds one of the patterns.
func (s *Situation) substrate(smiles ...string) bool {
	return len(s.Molecules) > 0 && holds(s.Molecules[0], smiles...)
}

// anywhere looks at the reactants and the product.
func (s *Situation) anywhere(smiles ...string) bool {
	return s.has(smiles...) || s.Product != nil && holds(s.Product, smiles...)
}

func holds(m *molecule.Molecule, smiles ...string) bool {
	for _, x := range smiles {
		if pattern(x).Has(m) {
			return true
		}
	}
	return false
}

// count adds up the matches of a pattern in the reactants and, separately, in the
// product, and returns the larger number.
func (s *Situation) count(smiles string) int {
	n := 0
	for _, m := range s.Molecules {
		n += len(pattern(smiles).Find(m))
	}
	if s.Product != nil {
		n = max(n, len(pattern(smiles).Find(s.Product)))
	}
	return n
}

func (s *Situation) agent(r agents.Role) bool { return agents.Any(s.Agents, r) }

func (s *Situation) event(list ...terms.Event) bool {
	for _, e := range list {
		if s.Event == e {
			return true
		}
	}
	return false
}

func (s *Situation) incoming(list ...string) bool {
	for _, x := range list {
		if s.Incoming == x {
			return true
		}
	}
	return false
}

func (s *Situation) electrophilic() bool {
	return s.event(terms.ElectrophilicSubstitution, terms.ElectrophilicAddition)
}

func (s *Situation) nucleophilic() bool {
	return s.event(terms.NucleophilicSubstitution, terms.NucleophilicAddition)
}

func (s *Situation) cycloaddition() bool {
	return s.Kind == terms.Cycloaddition || s.event(terms.CycloadditionOrientation, terms.CycloadditionJoining)
}

func (s *Situation) pericyclic() bool {
	switch s.Kind {
	case terms.Electrocyclic, terms.Sigmatropic, terms.Cheletropic, terms.Ene:
		return true
	}
	return false
}

func (s *Situation) halogenation() bool {
	return s.electrophilic() && s.incoming("chlorination", "bromination", "iodination", "fluorination")
}

// delivers tells whether an agent brings about one of these substitutions.
func (s *Situation) delivers(list ...string) bool {
	for _, a := range s.Agents {
		for _, x := range list {
			if a.Delivers == x {
				return true
			}
		}
	}
	return false
}

// baseBesideMetal tells whether an agent is a strong base and no organometallic
// reagent, which meets DMF in the cold and is used up by it.
func (s *Situation) baseBesideMetal() bool {
	for _, a := range s.Agents {
		if a.Roles&agents.StrongBase != 0 && a.Roles&agents.Organometal == 0 {
			return true
		}
	}
	return false
}

// strongAcid tells whether an agent is a strong acid other than nitric acid alone.
func (s *Situation) strongAcid() bool {
	for _, a := range s.Agents {
		if a.Roles&agents.StrongAcid != 0 && a.Roles&agents.Nitrating == 0 {
			return true
		}
	}
	return false
}

// siteHas tells whether an atom of the intended or first-ranked site satisfies f.
func (s *Situation) siteHas(f func(m *molecule.Molecule, a int) bool) bool {
	if len(s.Molecules) == 0 {
		return false
	}
	for _, a := range s.Site {
		if a >= 0 && a < len(s.Molecules[0].Atoms) && f(s.Molecules[0], a) {
			return true
		}
	}
	return false
}

// nitrating tells whether an agent nitrates; one that is there to oxidize does not
// count.
func (s *Situation) nitrating() bool {
	for _, a := range s.Agents {
		if a.Roles&agents.Nitrating != 0 && a.Roles&agents.Oxidant == 0 {
			return true
		}
	}
	return false
}

// dipole tells whether one of the molecules holds a 1,3-dipole.
func (s *Situation) dipole() bool {
	return s.has("[O-][N+]#C", "[N-]=[N+]=N", "N=[N+]=[N-]", "C=[N+]=[N-]", "[CH-][N+]#N", "C=[N+]([O-])", "O=[O+][O-]", "C=[N+][CH-]")
}

// unactivated tells whether a ring carbon with a halogen has neither a nitrogen in its
// ring system, nor an acceptor ortho or para to it, nor three more halogens beside it.
func unactivated(m *molecule.Molecule, a int) bool {
	if !m.Atoms[a].Aromatic || m.Atoms[a].Element != 6 {
		return false
	}
	distance := map[int]int{a: 0}
	halogens := 0
	for queue := []int{a}; len(queue) > 0; queue = queue[1:] {
		x := queue[0]
		for _, h := range m.Neighbours(x) {
			n := m.Atoms[h.Atom]
			if n.Aromatic && m.BondInRing(h.Bond) {
				if n.Element == 7 || n.Charge > 0 {
					return false
				}
				if _, seen := distance[h.Atom]; !seen {
					distance[h.Atom] = distance[x] + 1
					queue = append(queue, h.Atom)
				}
				continue
			}
			switch n.Element {
			case 9, 17, 35, 53:
				halogens++
			}
			if distance[x]%2 == 1 && accepts(m, h.Atom, x) {
				return false
			}
		}
	}
	return halogens <= 3
}

// accepts tells whether atom g, bound to ring atom at, begins an acceptor: C=O, C=N,
// C≡N, NO2, N=O, N2+, S=O, P=O, CF3, an onium group.
func accepts(m *molecule.Molecule, g, at int) bool {
	if m.Atoms[g].Charge > 0 {
		return true
	}
	fluorines := 0
	for _, h := range m.Neighbours(g) {
		if h.Atom == at {
			continue
		}
		switch e := m.Atoms[h.Atom].Element; {
		case m.Bonds[h.Bond].Order >= 2 && (e == 7 || e == 8 || e == 16):
			return true
		case e == 9:
			fluorines++
		}
	}
	return fluorines >= 2
}

// ringsOf are the aromatic rings that hold an atom.
func ringsOf(m *molecule.Molecule, a int) [][]int {
	var list [][]int
	for _, ring := range m.Rings() {
		if m.Atoms[a].Aromatic && slices.Contains(ring, a) {
			list = append(list, ring)
		}
	}
	return list
}

// basicRing tells whether a ring of the site holds a pyridine-type nitrogen or carries
// a free amine.
func basicRing(m *molecule.Molecule, a int) bool {
	for _, ring := range ringsOf(m, a) {
		for _, x := range ring {
			if n := m.Atoms[x]; n.Element == 7 && n.Hydrogens == 0 && n.Charge == 0 && m.Degree(x) == 2 {
				return true
			}
			for _, h := range m.Neighbours(x) {
				if m.Atoms[h.Atom].Element == 7 && !m.BondInRing(h.Bond) && m.Atoms[h.Atom].Charge == 0 && amine(m, h.Atom) {
					return true
				}
			}
		}
	}
	return false
}

// amine tells whether a nitrogen has no acyl, sulfonyl or multiple bond beside it.
func amine(m *molecule.Molecule, n int) bool {
	for _, h := range m.Neighbours(n) {
		if m.Bonds[h.Bond].Order != 1 || m.Atoms[h.Atom].Element != 6 || !m.Atoms[h.Atom].Aromatic && accepts(m, h.Atom, n) {
			return false
		}
	}
	return true
}

// poorRing tells whether the site is on a benzene ring that carries an acceptor and no
// oxygen or nitrogen donor.
func poorRing(m *molecule.Molecule, a int) bool {
	for _, ring := range ringsOf(m, a) {
		if len(ring) != 6 {
			continue
		}
		acceptor, donor := false, false
		for _, x := range ring {
			for _, h := range m.Neighbours(x) {
				if slices.Contains(ring, h.Atom) {
					continue
				}
				switch e := m.Atoms[h.Atom].Element; {
				case accepts(m, h.Atom, x):
					acceptor = true
				case e == 7 || e == 8:
					donor = true
				}
			}
		}
		if acceptor && !donor {
			return true
		}
	}
	return false
}

// mixedHalides tells whether a ring of the site carries fluorine and another halogen.
func mixedHalides(m *molecule.Molecule, a int) bool {
	fluorine, other := false, false
	for _, ring := range ringsOf(m, a) {
		for _, x := range ring {
			for _, h := range m.Neighbours(x) {
				switch m.Atoms[h.Atom].Element {
				case 9:
					fluorine = true
				case 17, 35, 53:
					other = true
				}
			}
		}
	}
	return fluorine && other
}

// bulkyBeside tells whether a neighbour of the site carries a quaternary group.
func bulkyBeside(m *molecule.Molecule, a int) bool {
	for _, h := range m.Neighbours(a) {
		for _, g := range m.Neighbours(h.Atom) {
			if g.Atom == a || m.BondInRing(g.Bond) {
				continue
			}
			if e := m.Atoms[g.Atom].Element; (e == 6 || e == 14) && m.Degree(g.Atom) == 4 && !fluorinated(m, g.Atom) {
				return true
			}
		}
	}
	return false
}

func fluorinated(m *molecule.Molecule, a int) bool {
	for _, h := range m.Neighbours(a) {
		if m.Atoms[h.Atom].Element == 9 {
			return true
		}
	}
	return false
}

// betweenTwo tells whether both ring neighbours of the site carry a substituent.
func betweenTwo(m *molecule.Molecule, a int) bool {
	n := 0
	for _, h := range m.Neighbours(a) {
		if !m.BondInRing(h.Bond) {
			continue
		}
		for _, g := range m.Neighbours(h.Atom) {
			if g.Atom != a && !m.BondInRing(g.Bond) {
				n++
				break
			}
		}
	}
	return n >= 2
}
