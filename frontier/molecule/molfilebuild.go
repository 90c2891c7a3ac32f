package molecule

import (
	"fmt"
	"slices"
)

// molecule turns the table into a finished molecule.
func (t *table) molecule() (*Molecule, error) {
	if len(t.atoms) == 0 {
		return nil, &Error{File: t.file, Line: t.line, Reason: "the table has no atoms", Remedy: "draw a structure"}
	}
	m := &Molecule{Name: t.name, Atoms: make([]Atom, len(t.atoms)), Bonds: make([]Bond, 0, len(t.bonds))}
	for i := range t.atoms {
		a := &t.atoms[i]
		m.Atoms[i] = Atom{Element: a.element, Isotope: a.isotope, Charge: a.charge, Map: a.mapped, Number: i + 1, Offset: -1}
	}
	bondOf := make([]int, len(t.bonds)) // index in m of each bond of the table
	aromatic := false
	for k := range t.bonds {
		b := &t.bonds[k]
		order := b.kind
		bondOf[k] = -1
		switch b.kind {
		case hydrogenBond:
			continue
		case aromaticBond:
			order, aromatic = 1, true
		case coordinationBond:
			order = 1
			m.Atoms[b.a].Charge++
			m.Atoms[b.b].Charge--
		}
		bondOf[k] = len(m.Bonds)
		m.Bonds = append(m.Bonds, Bond{A: b.a, B: b.b, Order: order})
	}
	d := newDrawing(t)
	if err := d.noDoubledBond(); err != nil {
		return nil, err
	}
	m.connect()
	if aromatic {
		if err := d.kekulize(m, bondOf); err != nil {
			return nil, err
		}
	}
	if err := t.addHydrogens(m); err != nil {
		return nil, err
	}
	if err := d.readConfigurations(m, bondOf); err != nil {
		return nil, err
	}
	m.foldHydrogens()
	if !d.blank || len(t.atoms) == 1 {
		m.Points = make([]Point, len(m.Atoms))
		for i := range m.Atoms {
			a := &t.atoms[m.Atoms[i].Number-1]
			m.Points[i] = Point{a.x, a.y}
		}
	}
	if err := m.finish(); err != nil {
		if e, ok := err.(*Error); ok && e.Line == 0 {
			e.File, e.Line = t.file, t.line
		}
		return nil, err
	}
	if aromatic {
		if err := d.checkAromatic(m); err != nil {
			return nil, err
		}
	}
	m.dropIdleConfigurations()
	return m, nil
}

// checkAromatic refuses a ring that was drawn with aromatic bonds, but reads as a
// quinone-like one because hydrogens on nitrogen are missing.
func (d *drawing) checkAromatic(m *Molecule) error {
	now := make([]int, len(d.atoms)) // index in m of each atom of the table
	for i := range m.Atoms {
		now[m.Atoms[i].Number-1] = i
	}
	for k := range d.bonds {
		b := &d.bonds[k]
		if b.kind != aromaticBond || m.Bonds[m.BondBetween(now[b.a], now[b.b])].Aromatic {
			continue
		}
		for _, i := range [2]int{b.a, b.b} {
			a := &m.Atoms[now[i]]
			if a.Element == 7 && a.Charge == 0 && a.Hydrogens == 0 && m.Degree(now[i]) == 2 && d.atoms[i].atLeast < 0 && len(d.around(i)) == 2 {
				return d.ambiguous(i)
			}
		}
	}
	return nil
}

// maxIdleTests and maxIdleAtoms bound the comparisons of dropIdleConfigurations; beyond
// them a configuration that tells nothing apart may stay, which does no harm.
const (
	maxIdleTests = 64
	maxIdleAtoms = 1000
)

// dropIdleConfigurations removes the configurations that tell nothing apart, such as
// those of a CF3 group in three dimensions, and of C=C(CH3)2 in a drawing: those of
// atoms or double bonds with equivalent ligands, without which the canonical SMILES
// string stays as it is.
func (m *Molecule) dropIdleConfigurations() {
	if len(m.Atoms) > maxIdleAtoms {
		return
	}
	var classes []int
	equal := func(a, b int) (equivalent, plain bool) {
		if a < 0 || b < 0 {
			return a == b, a == b
		}
		if classes == nil {
			classes = m.Classes()
		}
		equivalent = classes[a] == classes[b]
		return equivalent, equivalent && m.Degree(a) == 1 && m.Degree(b) == 1
	}
	tests, smiles := 0, ""
	idle := func(change func(c *Molecule)) bool {
		if tests++; tests > maxIdleTests {
			return false
		}
		if smiles == "" {
			smiles = m.SMILES()
		}
		c := &Molecule{Atoms: slices.Clone(m.Atoms), Bonds: slices.Clone(m.Bonds)}
		change(c)
		return c.finish() == nil && c.SMILES() == smiles
	}
	for i := range m.Atoms {
		s := &m.Atoms[i].Stereo
		if s.Class == NoStereo {
			continue
		}
		doubtful, drop := false, false
		for a, l := range s.Ligands {
			for b := range a {
				if s.Class == Allenal && a/2 != b/2 {
					continue
				}
				e, plain := equal(l, s.Ligands[b])
				doubtful = doubtful || e
				drop = drop || plain
			}
		}
		if drop || doubtful && idle(func(c *Molecule) { c.Atoms[i].Stereo = Stereo{} }) {
			*s = Stereo{}
		}
	}
	for k := range m.Bonds {
		b := &m.Bonds[k]
		if b.Geometry == NoGeometry {
			continue
		}
		doubtful, drop := false, false
		for e, ref := range [2]int{b.RefA, b.RefB} {
			at, from := b.A, b.B
			if e == 1 {
				at, from = from, at
			}
			end, before := m.chainEnd(k, at, from)
			for _, h := range m.adjacency[end] {
				if h.Atom != before && h.Atom != ref {
					same, plain := equal(ref, h.Atom)
					doubtful = doubtful || same
					drop = drop || plain
				}
			}
		}
		if drop || doubtful && idle(func(c *Molecule) { c.Bonds[k].Geometry = NoGeometry }) {
			b.Geometry, b.RefA, b.RefB = NoGeometry, 0, 0
		}
	}
}

// noDoubledBond refuses two bonds between the same two atoms.
func (d *drawing) noDoubledBond() error {
	last := make([]int, len(d.atoms)) // 1 + the atom that last named this one as neighbour
	for i := range d.atoms {
		for _, h := range d.around(i) {
			if last[h.Atom] == i+1 {
				return d.refuseBond(h.Bond, fmt.Sprintf("atoms %d and %d are bonded twice", d.atoms[i].index, d.atoms[h.Atom].index), "write one bond of higher order")
			}
			last[h.Atom] = i + 1
		}
	}
	return nil
}

// addHydrogens gives every atom the hydrogens that are not drawn: up to the stated
// valence, else up to the next ordinary valence of a nonmetal, less its unpaired
// electrons. Metals, and hydrogen itself, get none.
func (t *table) addHydrogens(m *Molecule) error {
	for i := range t.atoms {
		a := &t.atoms[i]
		atom := &m.Atoms[i]
		sum := m.Valence(i)
		switch {
		case a.valence >= 0:
			if a.valence < sum {
				return t.refuseAtom(i, fmt.Sprintf("the stated valence of atom %d is %d, but its bonds add up to %d", a.index, a.valence, sum), "correct the valence or the bonds")
			}
			atom.Hydrogens = a.valence - sum
		case a.element != 1 && mainGroupElectrons(a.element) >= 0:
			unpaired := 0
			if a.radical > 0 {
				unpaired = 2
				if a.radical == 2 {
					unpaired = 1
				}
			}
			h := hydrogensBeside(a.element, atom.Charge, sum+unpaired)
			if h < 0 {
				return t.tooManyBonds(m, i, sum)
			}
			atom.Hydrogens = h
		}
		if a.atLeast > atom.Hydrogens {
			return t.refuseAtom(i, fmt.Sprintf("atom %d is to carry at least %s, but there is room for %d", a.index, count(a.atLeast, "hydrogen"), atom.Hydrogens), "clear the hydrogen count, which belongs to search queries")
		}
		if err := m.checkValence(i); err != nil {
			reason, remedy := err.Error(), ""
			if e, ok := err.(*Error); ok {
				reason, remedy = e.Reason, e.Remedy
			}
			return t.refuseAtom(i, reason, remedy)
		}
	}
	return nil
}

// hydrogensBeside is the number of hydrogens an atom takes on beside bonds and
// unpaired electrons that together need sum, or a negative number where that is no
// valence of the element.
func hydrogensBeside(z, charge, sum int) int {
	if charge == 0 {
		return implicitHydrogens(z, sum)
	}
	v := nextValence(z, charge, sum)
	if v < 0 {
		return -1
	}
	return v - sum
}

// tooManyBonds refuses an atom whose bonds are no valence of its element.
func (t *table) tooManyBonds(m *Molecule, i, sum int) error {
	a := &m.Atoms[i]
	reason := fmt.Sprintf("atom %d: %s has bonds that add up to %d", t.atoms[i].index, elementName(a.Element), sum)
	remedy := "check for a surplus bond or a missing charge"
	if a.Charge == 0 {
		reason += " and no charge"
		if a.Element == 7 && sum == 4 || a.Element == 8 && sum == 3 {
			remedy = "give it the charge +1"
		}
	} else {
		reason += fmt.Sprintf(" at charge %+d", a.Charge)
	}
	if t.atoms[i].radical > 0 {
		reason += ", and unpaired electrons"
	}
	return t.refuseAtom(i, reason, remedy)
}

// maxTautomers bounds the places for hydrogens on aromatic nitrogen that are tried.
const maxTautomers = 32

// kekulize gives the aromatic bonds of the table alternating orders. Carbon of an
// aromatic bond counts as having three σ bonds; a neutral nitrogen with two aromatic
// bonds and no hydrogen stated is of the pyridine kind where that works out, and
// otherwise of the pyrrole kind at the one place, up to symmetry, where it does.
func (d *drawing) kekulize(m *Molecule, bondOf []int) error {
	n := len(m.Atoms)
	aromatic := make([]bool, len(m.Bonds))
	member := make([]bool, n)
	for k := range d.bonds {
		if b := &d.bonds[k]; b.kind == aromaticBond {
			aromatic[bondOf[k]] = true
			member[b.a], member[b.b] = true, true
		}
	}
	m.findRingBonds()
	for k := range d.bonds {
		if b := &d.bonds[k]; b.kind == aromaticBond && !m.rings.bondIn[bondOf[k]] {
			return d.refuseBond(k, fmt.Sprintf("the aromatic bond between atoms %d and %d is in no ring", d.atoms[b.a].index, d.atoms[b.b].index), "write a single or double bond")
		}
	}
	needs := make([]bool, n)
	for i := range m.Atoms {
		if !member[i] {
			continue
		}
		sum := m.Valence(i) + max(d.atoms[i].atLeast, 0)
		if z := m.Atoms[i].Element; z == 6 || z == 14 {
			missing := 3 - len(m.adjacency[i])
			if d.atoms[i].radical == 2 {
				missing--
			}
			if sum < 3 {
				sum += max(missing-max(d.atoms[i].atLeast, 0), 0)
			}
		}
		needs[i] = nextValence(m.Atoms[i].Element, m.Atoms[i].Charge, sum) > sum
	}
	k := d.match(m, aromatic, needs)
	single := func(i int) bool { return needs[i] && k.mate[i] < 0 }
	seen := make([]bool, n)
	for i := range m.Atoms {
		if !single(i) || seen[i] {
			continue
		}
		system := []int{i}
		seen[i] = true
		for at := 0; at < len(system); at++ {
			for _, h := range m.adjacency[system[at]] {
				if aromatic[h.Bond] && !seen[h.Atom] {
					seen[h.Atom] = true
					system = append(system, h.Atom)
				}
			}
		}
		slices.Sort(system)
		exempt, err := d.placeHydrogens(m, aromatic, needs, system, single)
		if err != nil {
			return err
		}
		for _, a := range exempt {
			needs[a] = false
		}
	}
	if slices.Contains(seen, true) {
		k = d.match(m, aromatic, needs)
	}
	for b := range m.Bonds {
		if aromatic[b] && k.mate[m.Bonds[b].A] == int32(m.Bonds[b].B) {
			m.Bonds[b].Order = 2
		}
	}
	return nil
}

// match pairs as many of the atoms that need a double bond as possible.
func (d *drawing) match(m *Molecule, aromatic, needs []bool) *matcher {
	k := newMatcher(m, func(b int) bool {
		return aromatic[b] && needs[m.Bonds[b].A] && needs[m.Bonds[b].B]
	})
	k.greedy(needs)
	for i := range needs {
		if needs[i] && k.mate[i] < 0 {
			k.augment(i)
		}
	}
	return k
}

// placeHydrogens finds the nitrogens of an aromatic system that must be of the
// pyrrole kind for the rest to be paired.
func (d *drawing) placeHydrogens(m *Molecule, aromatic, needs []bool, system []int, single func(int) bool) ([]int, error) {
	first, missing := -1, 0
	var candidates []int
	for _, i := range system {
		if single(i) {
			missing++
			if first < 0 {
				first = i
			}
		}
		a := &m.Atoms[i]
		if needs[i] && (a.Element == 7 || a.Element == 15) && a.Charge == 0 && len(m.adjacency[i]) == 2 && d.atoms[i].atLeast < 0 && d.atoms[i].radical == 0 {
			candidates = append(candidates, i)
		}
	}
	none := d.refuseAtom(first, fmt.Sprintf("no alternating double bonds fit the aromatic bonds round atom %d", d.atoms[first].index), "draw the ring with single and double bonds, charges and hydrogens on nitrogen")
	if missing > len(candidates) {
		return nil, none
	}
	// The choices of as many nitrogens as are left over, in lexical order.
	choice := make([]int, missing)
	for j := range choice {
		choice[j] = j
	}
	var found []int
	var form string
	for tried := 0; ; tried++ {
		if tried == maxTautomers || len(m.Atoms) > 1000 && tried > 0 {
			return nil, d.ambiguous(first)
		}
		now := make([]bool, len(needs))
		for _, i := range system {
			now[i] = needs[i]
		}
		exempt := make([]int, missing)
		for j, c := range choice {
			exempt[j] = candidates[c]
			now[candidates[c]] = false
		}
		k := d.match(m, aromatic, now)
		perfect := true
		for i := range now {
			perfect = perfect && (!now[i] || k.mate[i] >= 0)
		}
		if perfect {
			s := d.tautomer(m, aromatic, k)
			if found == nil {
				found, form = exempt, s
			} else if s != form {
				return nil, d.ambiguous(exempt[0])
			}
		}
		j := missing - 1
		for j >= 0 && choice[j] == len(candidates)-missing+j {
			j--
		}
		if j < 0 {
			break
		}
		choice[j]++
		for ; j+1 < missing; j++ {
			choice[j+1] = choice[j] + 1
		}
	}
	if found == nil {
		return nil, none
	}
	return found, nil
}

func (d *drawing) ambiguous(i int) error {
	return d.refuseAtom(i, "the aromatic bonds leave open which nitrogen carries hydrogen", "draw the hydrogen, or the ring with single and double bonds")
}

// tautomer is the canonical form of the structure under one pairing.
func (d *drawing) tautomer(m *Molecule, aromatic []bool, k *matcher) string {
	c := &Molecule{Atoms: slices.Clone(m.Atoms), Bonds: slices.Clone(m.Bonds)}
	for b := range c.Bonds {
		if aromatic[b] && k.mate[c.Bonds[b].A] == int32(c.Bonds[b].B) {
			c.Bonds[b].Order = 2
		}
	}
	c.connect()
	if d.addHydrogens(c) != nil {
		return ""
	}
	c.foldHydrogens()
	if c.finish() != nil {
		return ""
	}
	return c.FlatSMILES()
}
