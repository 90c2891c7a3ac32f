package rules

import (
	"fmt"
	"slices"
	"sync"

	"lobecast/frontier"
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

// friedelCraftsAlkylation tells whether an alkyl group comes to an arene under a Lewis
// acid or a strong acid.
func (s *Situation) friedelCraftsAlkylation() bool {
	return s.event(terms.ElectrophilicSubstitution) && s.incoming("alkylation") && (s.agent(agents.LewisAcid) || s.strongAcid())
}

// partnerHas tells whether a reactant behind the first, or an agent with a structure,
// satisfies f.
func (s *Situation) partnerHas(f func(*molecule.Molecule) bool) bool {
	for i, m := range s.Molecules {
		if i > 0 && f(m) {
			return true
		}
	}
	for _, a := range s.Agents {
		if a.SMILES == "" || a.Roles&agents.Solvent != 0 {
			continue
		}
		if m, err := molecule.ParseSMILES(a.SMILES); err == nil && f(m) {
			return true
		}
	}
	return false
}

// reimerTiemann tells whether a phenol meets chloroform and hydroxide.
func (s *Situation) reimerTiemann() bool {
	return s.electrophilic() && s.incoming("formylation") && agentNamed(s, "chloroform") && s.agent(agents.StrongBase) && s.substrate("[OH]c1ccccc1", "[O-]c1ccccc1")
}

// rearranges tells whether a molecule is an alkyl halide or alcohol whose carbocation
// turns into another: a primary one with two more carbons behind it, or a secondary one
// in an open chain of at least five carbons.
func rearranges(m *molecule.Molecule) bool {
	for _, x := range []string{"F", "Cl", "Br", "I", "[OH]"} {
		for _, alkyl := range []string{"[CH2][CH2]C", "[CH2][CH](C)C", "[CH2]C(C)(C)C", "[CH](C)[CH2]C[*]", "[CH]([CH2]C)[CH2]C", "[CH](C)[CH](C)C"} {
			for _, found := range pattern(x + alkyl).Find(m) {
				if !m.InRing(found[1]) {
					return true
				}
			}
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

// unactivated tells whether a ring carbon with a leaving group has no activation for
// addition of a nucleophile and no three more halogens on its ring system.
func unactivated(m *molecule.Molecule, a int) bool {
	if !m.Atoms[a].Aromatic || m.Atoms[a].Element != 6 || diazonium(m, a) {
		return false
	}
	return !activated(m, a, accepts) && halogensOfSystem(m, a) <= 3
}

// diazonium tells whether an atom bears N2+, which leaves by itself.
func diazonium(m *molecule.Molecule, a int) bool {
	for _, h := range m.Neighbours(a) {
		if n := &m.Atoms[h.Atom]; n.Element == 7 && !n.Aromatic {
			for _, g := range m.Neighbours(h.Atom) {
				if m.Atoms[g.Atom].Element == 7 && m.Bonds[g.Bond].Order == 3 {
					return true
				}
			}
		}
	}
	return false
}

// unactivatedHalides tells whether a molecule has halogens on aromatic carbons, none of
// them activated.
func unactivatedHalides(m *molecule.Molecule) bool {
	found := false
	for i := range m.Atoms {
		if !m.Atoms[i].Aromatic || m.Atoms[i].Element != 6 {
			continue
		}
		for _, h := range m.Neighbours(i) {
			if halogen(m.Atoms[h.Atom].Element) {
				if !unactivated(m, i) {
					return false
				}
				found = true
			}
		}
	}
	return found
}

func halogen(element int) bool {
	return element == 9 || element == 17 || element == 35 || element == 53
}

// activated tells whether the negative charge that a nucleophile leaves in the ring,
// when it adds to aromatic carbon a, comes to a place that holds it. The charge starts
// at the atom across the double bond of a and moves by curly arrows, from each atom over
// a single bond and the double bond behind it. It is held by an azine nitrogen (see
// [azineHolds]), by a cationic ring atom, by an acceptor on an atom that it comes to,
// and by the oxygen of a carbonyl group in the ring; acceptor tells what is one.
func activated(m *molecule.Molecule, a int, acceptor func(m *molecule.Molecule, g, at int) bool) bool {
	start, ok := acrossDouble(m, a)
	if !ok {
		return false
	}
	seen := map[int]bool{start: true}
	for queue := []int{start}; len(queue) > 0; queue = queue[1:] {
		p := queue[0]
		if m.Atoms[p].Charge > 0 || m.Atoms[p].Element == 7 && azineHolds(m, a, p) {
			return true
		}
		for _, h := range m.Neighbours(p) {
			q := h.Atom
			switch {
			case q == a || m.Bonds[h.Bond].Order != 1:
				continue
			case !m.Bonds[h.Bond].Aromatic:
				if acceptor(m, q, p) {
					return true
				}
				continue
			}
			next, ok := acrossDouble(m, q)
			switch {
			case !ok && m.Atoms[q].Charge > 0:
				return true
			case !ok || next == a || seen[next]:
			case m.Atoms[next].Aromatic:
				seen[next] = true
				queue = append(queue, next)
			case acceptor(m, q, p):
				return true
			}
		}
	}
	return false
}

// acrossDouble is the atom at the other end of the double bond that an atom has in the
// Kekulé form; the second result is false where it has none.
func acrossDouble(m *molecule.Molecule, a int) (int, bool) {
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Order == 2 {
			return h.Atom, true
		}
	}
	return 0, false
}

// azineHolds tells whether nitrogen n of a double bond holds enough of the charge of an
// addition at ring carbon a. In the same ring it does, ortho or para to a; but in a
// five-membered ring one that is bonded to a nitrogen of pyrrole type does not suffice
// (halopyrazoles are inert), unless a lies between two heteroatoms. In the other ring of a
// fused pair it helps fluoride only (7-fluoroquinazoline reacts with amines, and
// 7-chloroquinoline hardly), unless it is bonded to oxygen or sulfur, as in benzofurazan.
// Common practice (no source).
func azineHolds(m *molecule.Molecule, a, n int) bool {
	for _, ring := range ringsOf(m, a) {
		if !slices.Contains(ring, n) {
			continue
		}
		if len(ring) != 5 {
			return true
		}
		beside := 0
		for _, h := range m.Neighbours(a) {
			if slices.Contains(ring, h.Atom) && m.Atoms[h.Atom].Element != 6 {
				beside++
			}
		}
		donor := false
		for _, h := range m.Neighbours(n) {
			_, double := acrossDouble(m, h.Atom)
			donor = donor || m.Atoms[h.Atom].Element == 7 && !double
		}
		return beside >= 2 || !donor
	}
	for _, h := range m.Neighbours(n) {
		if e := m.Atoms[h.Atom].Element; e == 8 || e == 16 {
			return true
		}
	}
	return fluorinated(m, a)
}

// halogensOfSystem counts the halogens on the aromatic ring system of an atom.
func halogensOfSystem(m *molecule.Molecule, a int) int {
	n := 0
	seen := map[int]bool{a: true}
	for queue := []int{a}; len(queue) > 0; queue = queue[1:] {
		for _, h := range m.Neighbours(queue[0]) {
			switch {
			case m.Bonds[h.Bond].Aromatic:
				if !seen[h.Atom] {
					seen[h.Atom] = true
					queue = append(queue, h.Atom)
				}
			case halogen(m.Atoms[h.Atom].Element):
				n++
			}
		}
	}
	return n
}

// leavesBeside tells whether a sulfonyl, sulfinyl or nitro group stands on an aromatic
// carbon that is activated by more than an ester or amide and is not among the sites:
// there it leaves about as readily as a halide.
func leavesBeside(m *molecule.Molecule, sites []int) bool {
	for i := range m.Atoms {
		if !m.Atoms[i].Aromatic || m.Atoms[i].Element != 6 || slices.Contains(sites, i) {
			continue
		}
		for _, h := range m.Neighbours(i) {
			if !m.BondInRing(h.Bond) && (nitro(m, h.Atom) || sulfone(m, h.Atom)) && activated(m, i, acceptsStrongly) {
				return true
			}
		}
	}
	return false
}

// nitro tells whether an atom is the nitrogen of a nitro group.
func nitro(m *molecule.Molecule, a int) bool {
	oxygens := 0
	for _, h := range m.Neighbours(a) {
		if m.Atoms[h.Atom].Element == 8 && m.Degree(h.Atom) == 1 {
			oxygens++
		}
	}
	return m.Atoms[a].Element == 7 && oxygens == 2
}

// sulfone tells whether an atom is the sulfur of a sulfone or sulfoxide: it carries two
// carbons and oxygen, and is a member of no aromatic ring.
func sulfone(m *molecule.Molecule, a int) bool {
	carbons, oxygens := 0, 0
	for _, h := range m.Neighbours(a) {
		switch e := m.Atoms[h.Atom].Element; {
		case e == 6:
			carbons++
		case e == 8 && m.Degree(h.Atom) == 1:
			oxygens++
		}
	}
	return m.Atoms[a].Element == 16 && !m.Atoms[a].Aromatic && carbons == 2 && oxygens > 0
}

// accepts tells whether atom g, bound to ring atom at, begins an acceptor: C=O, C=N,
// C≡N, NO2, N=O, N2+, S=O, P=O, CF3, an onium group, an azole or pyrimidine ring bonded
// between its nitrogens or beside one; but not a pyridine ring, whose double bonds lie
// either way.
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
			if !m.Bonds[h.Bond].Aromatic || !besideOneNitrogen(m, g) {
				return true
			}
		case e == 9:
			fluorines++
		}
	}
	return fluorines >= 2
}

// besideOneNitrogen tells whether an atom of a six-membered aromatic ring has a single
// ring neighbour that is no carbon.
func besideOneNitrogen(m *molecule.Molecule, a int) bool {
	n := 0
	for _, h := range m.Neighbours(a) {
		if m.Bonds[h.Bond].Aromatic && m.Atoms[h.Atom].Element != 6 {
			n++
		}
	}
	return n == 1 && inSixRing(m, a)
}

// acceptsStrongly tells whether atom g, bound to ring atom at, begins an acceptor other
// than a trifluoromethyl group or a carbonyl group that a nitrogen or oxygen feeds (ester,
// amide, carbonyl group of a pyridone).
func acceptsStrongly(m *molecule.Molecule, g, at int) bool {
	if !accepts(m, g, at) || m.Atoms[g].Aromatic || fluorinated(m, g) {
		return false
	}
	for _, h := range m.Neighbours(g) {
		if e := m.Atoms[h.Atom].Element; m.Atoms[g].Element == 6 && h.Atom != at && m.Bonds[h.Bond].Order == 1 && (e == 7 || e == 8) {
			return false
		}
	}
	return true
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

// bareAzine tells whether the site is a carbon of a six-membered ring with an azine
// nitrogen and neither an oxygen, nitrogen or sulfur donor nor two carbon groups on it.
func bareAzine(m *molecule.Molecule, a int) bool {
	for _, ring := range ringsOf(m, a) {
		azine, donor, carbons := false, false, 0
		for _, x := range ring {
			_, double := acrossDouble(m, x)
			azine = azine || m.Atoms[x].Element == 7 && double && m.Atoms[x].Charge == 0
			donor = donor || m.Atoms[x].Charge != 0 || m.Atoms[x].Element == 7 && !double
			for _, h := range m.Neighbours(x) {
				if slices.Contains(ring, h.Atom) || accepts(m, h.Atom, x) {
					continue
				}
				switch e := m.Atoms[h.Atom].Element; {
				case e == 7 || e == 8 || e == 16:
					donor = true
				case e == 6 && !m.Bonds[h.Bond].Aromatic:
					carbons++
				}
			}
		}
		if len(ring) == 6 && azine && !donor && carbons < 2 {
			return true
		}
	}
	return false
}

// onlyAzines tells whether every aromatic carbon of a molecule is in a bare azine ring.
func onlyAzines(m *molecule.Molecule) bool {
	for i := range m.Atoms {
		if m.Atoms[i].Aromatic && m.Atoms[i].Element == 6 && !bareAzine(m, i) {
			return false
		}
	}
	return true
}

// pyroneRing tells whether an atom is a carbon of a six-membered ring with an oxygen
// atom and a carbonyl group, fused to a benzene ring: coumarins and chromones. One with a
// donor on that ring is none: 4-hydroxycoumarin is an enol and reacts at C-3.
func pyroneRing(m *molecule.Molecule, a int) bool {
	for _, x := range []string{"O=c1ccc2ccccc2o1", "O=c1ccoc2ccccc12", "O=C1C=COc2ccccc12", "O=C1C=Cc2ccccc2O1"} {
		for _, found := range pattern(x).Find(m) {
			i := slices.Index(found, a)
			if i < 0 {
				continue
			}
			for _, r := range m.RingsOf(a) {
				ring := m.Rings()[r]
				if len(ring) == 6 && slices.ContainsFunc(ring, func(y int) bool { return m.Atoms[y].Element == 8 }) && !carriesDonor(m, ring) {
					return true
				}
			}
		}
	}
	return false
}

// carriesDonor tells whether a ring carries a nitrogen, oxygen or sulfur by a single bond,
// other than one that begins an acceptor.
func carriesDonor(m *molecule.Molecule, ring []int) bool {
	for _, x := range ring {
		for _, h := range m.Neighbours(x) {
			e := m.Atoms[h.Atom].Element
			if !slices.Contains(ring, h.Atom) && m.Bonds[h.Bond].Order == 1 && (e == 7 || e == 8 || e == 16) && !accepts(m, h.Atom, x) {
				return true
			}
		}
	}
	return false
}

// besideAmine tells whether the site is ortho or para to an amino group on its benzene
// ring.
func besideAmine(m *molecule.Molecule, a int) bool {
	for _, ring := range ringsOf(m, a) {
		for k, x := range ring {
			d := k - slices.Index(ring, a)
			if len(ring) != 6 || d%2 == 0 {
				continue
			}
			for _, h := range m.Neighbours(x) {
				if m.Atoms[h.Atom].Element == 7 && !slices.Contains(ring, h.Atom) && amine(m, h.Atom) {
					return true
				}
			}
		}
	}
	return false
}

// twistedBiaryl tells whether a molecule has a bond between two six-membered aromatic
// rings that a group ortho to it, or the peri hydrogen of a fused ring, keeps from
// planarity. A bond in a ring of at most six atoms is held planar, as in fluorene, and
// one whose angle is stated is no matter of doubt.
func twistedBiaryl(m *molecule.Molecule, stated []frontier.Twist) bool {
	for k := range m.Bonds {
		b := &m.Bonds[k]
		if b.Aromatic || b.Order != 1 || !inSixRing(m, b.A) || !inSixRing(m, b.B) || sharesRing(m, b.A, b.B, 6) {
			continue
		}
		if slices.ContainsFunc(stated, func(t frontier.Twist) bool {
			x, y := m.Atoms[b.A].Number, m.Atoms[b.B].Number
			return t.A == x && t.B == y || t.A == y && t.B == x
		}) {
			continue
		}
		if orthoGroup(m, b.A, b.B) || orthoGroup(m, b.B, b.A) {
			return true
		}
	}
	return false
}

// inSixRing tells whether a carbon is a member of a six-membered aromatic ring.
func inSixRing(m *molecule.Molecule, a int) bool {
	return m.Atoms[a].Element == 6 && slices.ContainsFunc(ringsOf(m, a), func(r []int) bool { return len(r) == 6 })
}

// sharesRing tells whether two atoms lie in one ring of at most size atoms.
func sharesRing(m *molecule.Molecule, a, b, size int) bool {
	for _, r := range m.RingsOf(a) {
		if ring := m.Rings()[r]; len(ring) <= size && slices.Contains(ring, b) {
			return true
		}
	}
	return false
}

// orthoGroup tells whether ring atom a, bonded to other, has beside it an atom with a
// group larger than oxygen or fluorine, or with a second six-membered ring fused to it.
func orthoGroup(m *molecule.Molecule, a, other int) bool {
	for _, h := range m.Neighbours(a) {
		if h.Atom == other || !m.Bonds[h.Bond].Aromatic {
			continue
		}
		for _, g := range m.Neighbours(h.Atom) {
			if g.Atom == a {
				continue
			}
			if m.Bonds[g.Bond].Aromatic {
				if sharesRing(m, h.Atom, g.Atom, 6) && !sharesRing(m, a, g.Atom, 6) && inSixRing(m, g.Atom) {
					return true
				}
				continue
			}
			linear := false
			for _, x := range m.Neighbours(g.Atom) {
				linear = linear || m.Bonds[x.Bond].Order == 3
			}
			switch m.Atoms[g.Atom].Element {
			case 6, 14, 15, 16, 17, 35, 50, 53:
				if !linear {
					return true
				}
			}
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
