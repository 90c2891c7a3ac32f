package symmetry

import (
	"fmt"
	"slices"

	"lobecast/frontier/molecule"
)

// frame is the joined reactants in a Kekulé form that suits the process: the double
// bonds of the reacting chains are where the electron shift needs them.
type frame struct {
	m      *molecule.Molecule
	order  []int                   // bond orders of the Kekulé form in use
	charge []int                   // formal charges, after polarizing C=O and the like
	made   []int                   // hydrogens made nodes for this process
	stereo map[int]molecule.Stereo // configurations implied by small rings
}

func newFrame(m *molecule.Molecule) *frame {
	f := &frame{m: m, order: make([]int, len(m.Bonds)), charge: make([]int, len(m.Atoms))}
	for i := range m.Bonds {
		f.order[i] = m.Bonds[i].Order
	}
	for i := range m.Atoms {
		f.charge[i] = m.Atoms[i].Charge
	}
	return f
}

// join makes one graph of several molecules.
func join(ms ...*molecule.Molecule) (*molecule.Molecule, error) {
	if len(ms) == 1 {
		return ms[0], nil
	}
	e := ms[0].Edit()
	for _, m := range ms[1:] {
		e.Merge(m)
	}
	return e.Done()
}

// nodeMap marks a hydrogen that must stay a node while the process is worked out; a
// plain one would be folded into the count of its neighbour.
const nodeMap = 999

// withHydrogen makes one implicit hydrogen of an atom a node and returns its index.
func withHydrogen(m *molecule.Molecule, atom int) (*molecule.Molecule, int, error) {
	e := m.Edit()
	h := e.AddAtom(molecule.Atom{Element: 1, Map: nodeMap})
	e.ReplaceLigand(atom, molecule.ImplicitLigand, h)
	n, err := e.Done()
	return n, h, err
}

// hydrogenated remembers the molecules made by withHydrogen.
type hydrogenated struct {
	m    *molecule.Molecule
	made map[int]*molecule.Molecule
}

// with is withHydrogen; the hydrogen is the last atom.
func (x *hydrogenated) with(atom int) (*molecule.Molecule, int, error) {
	if n := x.made[atom]; n != nil {
		return n, len(n.Atoms) - 1, nil
	}
	n, h, err := withHydrogen(x.m, atom)
	if err == nil {
		if x.made == nil {
			x.made = map[int]*molecule.Molecule{}
		}
		x.made[atom] = n
	}
	return n, h, err
}

// label names an atom for a chemist.
func label(m *molecule.Molecule, i int) string {
	a := &m.Atoms[i]
	if a.Element == 1 && a.Isotope == 0 && m.Degree(i) == 1 {
		if j := m.Neighbours(i)[0].Atom; m.Atoms[j].Element != 1 {
			return "H on " + label(m, j)
		}
	}
	return fmt.Sprintf("%s%d", molecule.Symbol(a.Element), a.Number)
}

// refuse places an error at an atom of the molecule read.
func refuse(m *molecule.Molecule, atom int, reason, remedy string) error {
	e := &molecule.Error{Text: m.Source, Reason: reason, Remedy: remedy}
	if atom >= 0 && atom < len(m.Atoms) {
		if o := m.Atoms[atom].Offset; o >= 0 && o < len(m.Source) {
			e.Column = len([]rune(m.Source[:o])) + 1
		}
	}
	return e
}

// partner is the atom that shares a π bond with atom i in the Kekulé form in use, −1
// for none; of two (allene, alkyne) the first that is not among skip.
func (f *frame) partner(i int, skip ...int) int {
	for _, h := range f.m.Neighbours(i) {
		if f.order[h.Bond] >= 2 && !slices.Contains(skip, h.Atom) {
			return h.Atom
		}
	}
	return -1
}

// electronegative elements take the electron pair of a double bond to an atom of a
// reacting chain that has no partner in the chain.
func electronegative(z int) bool { return z == 7 || z == 8 || z == 16 || z == 34 }

// lonePair reports whether atom i brings a lone pair to a chain.
func (f *frame) lonePair(i int) bool {
	a := &f.m.Atoms[i]
	if f.partner(i) >= 0 {
		// The outer nitrogen of an azide or diazo group written N=N(+)=N(−).
		return a.Element == 7 && f.charge[i] == -1 && f.m.Degree(i) == 1
	}
	switch {
	case f.charge[i] < 0:
		return true
	case f.charge[i] > 0:
		return false
	case a.Element == 7 || a.Element == 15:
		return f.m.Valence(i) == 3
	case a.Element == 8 || a.Element == 16 || a.Element == 34:
		return f.m.Valence(i) == 2
	}
	return false
}

// vacancy reports whether atom i brings an empty orbital: a carbocation or trivalent
// boron.
func (f *frame) vacancy(i int) bool {
	a := &f.m.Atoms[i]
	return f.partner(i) < 0 && (a.Element == 6 && f.charge[i] == 1 || a.Element == 5 && f.charge[i] == 0 && f.m.Valence(i) == 3)
}

// chain is a reacting π system in the chosen Kekulé form.
type chain struct {
	atoms []int
	hole  int // position without a π partner in the chain, −1 for an even chain
	lone  int // electrons at the hole
	polar int // atom outside that took the pair of a double bond to the hole, −1 for none
}

// electrons is the number of π electrons of the chain.
func (c *chain) electrons() int {
	if c.hole < 0 {
		return len(c.atoms)
	}
	return len(c.atoms) - 1 + c.lone
}

// at is the number of electrons position i brings.
func (c *chain) at(i int) int {
	if i == c.hole {
		return c.lone
	}
	return 1
}

// pairs lists the double bonds of a chain of n atoms with the given hole, as
// positions counted from first.
func pairs(n, hole, first int) [][2]int {
	var list [][2]int
	for i := 0; i+1 < n; {
		if i == hole {
			i++
			continue
		}
		list = append(list, [2]int{first + i, first + i + 1})
		i += 2
	}
	return list
}

// pattern puts the double bonds of a chain where the process needs them: between
// positions 0–1, 2–3, …, with one unpaired position of even number in a chain of odd
// length. It fails where no Kekulé form does so. The frame is left as it was on
// failure.
func (f *frame) pattern(atoms []int) (*chain, bool) {
	n := len(atoms)
	if n%2 == 0 {
		c := &chain{atoms: atoms, hole: -1, polar: -1}
		return c, f.require(atoms, -1)
	}
	for _, polarized := range []bool{false, true} {
		for h := 0; h < n; h += 2 {
			c := &chain{atoms: atoms, hole: h, polar: -1}
			i := atoms[h]
			order, charge := slices.Clone(f.order), slices.Clone(f.charge)
			switch {
			case polarized:
				p := f.partner(i, atoms...)
				if p < 0 {
					continue
				}
				b := f.m.BondBetween(i, p)
				zi, zp := f.m.Atoms[i].Element, f.m.Atoms[p].Element
				switch {
				case zi == 6 && electronegative(zp) && f.order[b] == 2:
					f.charge[i]++
					f.charge[p]--
				case zi == 8 && (zp == 16 || zp == 34 || zp == 15) && f.order[b] == 2:
					f.charge[i]--
					f.charge[p]++
					c.lone = 2
				default:
					continue
				}
				f.order[b]--
				c.polar = p
			case f.vacancy(i):
			case f.lonePair(i):
				c.lone = 2
			default:
				continue
			}
			if f.require(atoms, h) {
				return c, true
			}
			f.order, f.charge = order, charge
		}
	}
	return nil, false
}

// require moves double bonds so that the chain is paired as pattern says.
func (f *frame) require(atoms []int, hole int) bool {
	locked := make(map[int]bool, len(atoms))
	for _, i := range atoms {
		locked[i] = true
	}
	order := slices.Clone(f.order)
	fail := func() bool {
		f.order = order
		return false
	}
	f.order = slices.Clone(order)
	var exposed []int
	wanted := pairs(len(atoms), hole, 0)
	var missing []int // bonds to become double
	for _, p := range wanted {
		u, v := atoms[p[0]], atoms[p[1]]
		b := f.m.BondBetween(u, v)
		if b < 0 || f.partner(u) < 0 || f.partner(v) < 0 {
			return fail()
		}
		if f.order[b] < 2 {
			missing = append(missing, b)
		}
	}
	for _, b := range missing {
		for _, x := range []int{f.m.Bonds[b].A, f.m.Bonds[b].B} {
			w := f.partner(x)
			if w < 0 {
				continue // lost with the pair before
			}
			wb := f.m.BondBetween(x, w)
			if f.order[wb] != 2 || hole >= 0 && w == atoms[hole] {
				return fail()
			}
			f.order[wb] = 1
			if !locked[w] {
				exposed = append(exposed, w)
			}
		}
	}
	for _, b := range missing {
		f.order[b] = 2
	}
	for _, p := range wanted {
		if f.order[f.m.BondBetween(atoms[p[0]], atoms[p[1]])] < 2 {
			return fail() // its partner was taken by another pair
		}
	}
	for len(exposed) > 0 {
		x := exposed[0]
		exposed = exposed[1:]
		if f.partner(x) >= 0 {
			continue
		}
		seen := make(map[int]bool, 16)
		end := f.rematch(x, locked, exposed, seen)
		if end < 0 {
			return fail()
		}
		exposed = slices.DeleteFunc(exposed, func(y int) bool { return y == end })
	}
	return true
}

// rematch finds an alternating path from exposed atom x to another exposed one,
// outside the locked atoms, and moves the double bonds along it.
func (f *frame) rematch(x int, locked map[int]bool, exposed []int, seen map[int]bool) int {
	seen[x] = true
	for _, h := range f.m.Neighbours(x) {
		y := h.Atom
		if locked[y] || seen[y] || f.order[h.Bond] != 1 {
			continue
		}
		if slices.Contains(exposed, y) && f.partner(y) < 0 {
			f.order[h.Bond] = 2
			return y
		}
		z := f.partner(y)
		if z < 0 || locked[z] || seen[z] || f.order[f.m.BondBetween(y, z)] != 2 {
			continue
		}
		seen[y] = true
		yz := f.m.BondBetween(y, z)
		f.order[h.Bond], f.order[yz] = 2, 1
		if end := f.rematch(z, locked, exposed, seen); end >= 0 {
			return end
		}
		f.order[h.Bond], f.order[yz] = 1, 2
	}
	return -1
}

// shift is one cyclic shift of electrons: the ring of orbitals, the pairs of ring
// positions bonded in reactant and product, and the electrons of each position in
// the product.
type shift struct {
	f             *frame
	cycle         *Cycle
	before, after [][2]int
	electrons     []int // in the product
}

// centre is a configuration that a process sets: seen from ligand 0 the others run
// anticlockwise for permutation 1.
type centre struct {
	atom    int
	ligands [4]int
	perm    int
}

// geometry is a double-bond configuration that a process sets.
type geometry struct {
	a, b, refA, refB int // refs may be ImplicitLigand
	g                molecule.Geometry
	inner            bool // of a bond inside a chain: left to the ring where it lies in a small one
}

// product carries the shift out and sets the configurations given.
func (s *shift) product(centres []centre, geometries []geometry) (*Product, error) {
	f := s.f
	m := f.m
	e := m.Edit()
	final := slices.Clone(f.order)
	var fresh [][2]int
	atom := func(p int) int { return s.cycle.Orbitals[p].Atom }
	for _, p := range s.before {
		if a, b := atom(p[0]), atom(p[1]); a != b {
			final[m.BondBetween(a, b)]--
		}
	}
	for _, p := range s.after {
		a, b := atom(p[0]), atom(p[1])
		if a == b {
			continue
		}
		if k := m.BondBetween(a, b); k >= 0 {
			final[k]++
		} else {
			fresh = append(fresh, [2]int{a, b})
		}
	}
	charge := slices.Clone(f.charge)
	for p, o := range s.cycle.Orbitals {
		charge[o.Atom] += o.Electrons - s.electrons[p]
	}
	for k, o := range final {
		b := &m.Bonds[k]
		if u, v := b.A, b.B; o == 1 && charge[u]*charge[v] == -1 {
			// A carbocation beside its negative partner is a double bond: oxyallyl
			// adducts are ketones.
			if charge[u] < 0 {
				u, v = v, u
			}
			if m.Atoms[u].Element == 6 && electronegative(m.Atoms[v].Element) {
				final[k], o = 2, 2
				charge[u], charge[v] = 0, 0
			}
		}
		switch {
		case o <= 0:
			e.RemoveBond(b.A, b.B)
		case o != b.Order:
			e.SetOrder(b.A, b.B, o)
		}
	}
	for _, b := range fresh {
		e.AddBond(b[0], b[1], 1)
	}
	for i, c := range charge {
		e.Atom(i).Charge = c
	}
	// Hydrogens that are plain nodes go back into the count of their neighbour.
	index := make([]int, len(m.Atoms))
	gone := make([]bool, len(m.Atoms))
	for i := range m.Atoms {
		a := &m.Atoms[i]
		if a.Element != 1 || a.Isotope != 0 || charge[i] != 0 || (a.Map != 0 && !slices.Contains(f.made, i) && !s.takesPart(i)) {
			continue
		}
		for j := range m.Atoms {
			if j != i && e.Order(i, j) == 1 && m.Atoms[j].Element != 1 {
				e.ReplaceLigand(j, i, molecule.ImplicitLigand)
				e.RemoveAtom(i)
				gone[i] = true
				break
			}
		}
	}
	next := 0
	for i := range index {
		if gone[i] {
			index[i] = -1
			continue
		}
		index[i] = next
		next++
	}
	out, err := e.Done()
	if err != nil {
		return nil, fmt.Errorf("the product cannot be written: %w", err)
	}
	setStereo(out, index, centres, geometries)
	return &Product{Molecule: out, Atoms: index}, nil
}

// takesPart reports whether an atom is in the ring of orbitals.
func (s *shift) takesPart(i int) bool {
	return slices.ContainsFunc(s.cycle.Orbitals, func(o Orbital) bool { return o.Atom == i })
}

// setStereo writes configurations into a finished molecule, leaving out those of
// atoms and bonds with two like ligands.
func setStereo(m *molecule.Molecule, index []int, centres []centre, geometries []geometry) {
	if len(centres) == 0 && len(geometries) == 0 {
		return
	}
	classes := m.Classes()
	at := func(i int) int {
		if i < 0 || index[i] < 0 {
			return molecule.ImplicitLigand
		}
		return index[i]
	}
	for _, c := range centres {
		i := at(c.atom)
		if i < 0 || m.Atoms[i].Element != 6 || m.Atoms[i].Hydrogens > 1 || m.Degree(i)+m.Atoms[i].Hydrogens != 4 || m.Valence(i) != 4 {
			continue
		}
		ligands := make([]int, 4)
		implicit := 0
		ok := true
		for k, l := range c.ligands {
			ligands[k] = at(l)
			if ligands[k] < 0 {
				implicit++
			} else if m.BondBetween(i, ligands[k]) < 0 {
				ok = false
			}
		}
		if !ok || implicit != m.Atoms[i].Hydrogens || alike(m, classes, i, ligands) {
			continue
		}
		m.Atoms[i].Stereo = molecule.Stereo{Class: molecule.Tetrahedral, Permutation: c.perm, Ligands: ligands}
	}
	for _, g := range geometries {
		a, b := at(g.a), at(g.b)
		if a < 0 || b < 0 {
			continue
		}
		k := m.BondBetween(a, b)
		if k < 0 || m.Bonds[k].Order != 2 || m.Bonds[k].Aromatic {
			continue
		}
		if g.inner && inSmallRing(m, k) {
			continue
		}
		refA, refB, geo := at(g.refA), at(g.refB), g.g
		other := func(i, j, ref int) (int, bool) {
			for _, h := range m.Neighbours(i) {
				if h.Atom != j && h.Atom != ref {
					return h.Atom, true
				}
			}
			return -1, false
		}
		oa, hasA := other(a, b, refA)
		ob, hasB := other(b, a, refB)
		if refA < 0 {
			if !hasA {
				continue
			}
			refA, hasA, geo = oa, false, flipped(geo)
		}
		if refB < 0 {
			if !hasB {
				continue
			}
			refB, hasB, geo = ob, false, flipped(geo)
		}
		if hasA && classes[refA] == classes[oa] && !m.BondInRing(m.BondBetween(a, refA)) ||
			hasB && classes[refB] == classes[ob] && !m.BondInRing(m.BondBetween(b, refB)) {
			continue
		}
		if cumulatedAt(m, a, k) || cumulatedAt(m, b, k) || refA == b || refB == a || m.BondBetween(a, refA) < 0 || m.BondBetween(b, refB) < 0 {
			continue
		}
		bond := &m.Bonds[k]
		if impliedBy(m, a, b, refA, refB) == geo {
			continue // what the ring says anyway
		}
		if bond.A == a {
			bond.RefA, bond.RefB = refA, refB
		} else {
			bond.RefA, bond.RefB = refB, refA
		}
		bond.Geometry = geo
	}
}

// cumulatedAt reports whether an atom has a double bond besides bond k.
func cumulatedAt(m *molecule.Molecule, i, k int) bool {
	for _, h := range m.Neighbours(i) {
		if h.Bond != k && m.Bonds[h.Bond].Order > 1 {
			return true
		}
	}
	return false
}

// inSmallRing reports whether a bond lies in a ring that cannot hold it trans.
func inSmallRing(m *molecule.Molecule, k int) bool {
	b := &m.Bonds[k]
	for _, ring := range m.Rings() {
		if len(ring) <= smallRing && slices.Contains(ring, b.A) && slices.Contains(ring, b.B) {
			return true
		}
	}
	return false
}

// flipped is the geometry with respect to the other ligand of one end.
func flipped(g molecule.Geometry) molecule.Geometry {
	switch g {
	case molecule.Together:
		return molecule.Opposite
	case molecule.Opposite:
		return molecule.Together
	}
	return g
}

// alike reports whether two ligands of an atom cannot be told apart and are in no
// ring, so that the atom is no stereocentre.
func alike(m *molecule.Molecule, classes []int, i int, ligands []int) bool {
	for a, l := range ligands {
		for _, k := range ligands[a+1:] {
			if l < 0 && k < 0 {
				return true
			}
			if l >= 0 && k >= 0 && classes[l] == classes[k] && !m.BondInRing(m.BondBetween(i, l)) && !m.BondInRing(m.BondBetween(i, k)) {
				return true
			}
		}
	}
	return false
}

// collect adds a stereoisomer to a list, unless it or (from an achiral reactant) its
// mirror image is there.
func collect(list []Product, p *Product, achiral bool) []Product {
	p.SMILES = p.Molecule.SMILES()
	mirror := p.Molecule.Mirrored().SMILES()
	for i := range list {
		if list[i].SMILES == p.SMILES || achiral && list[i].SMILES == mirror {
			return list
		}
	}
	if achiral && mirror != p.SMILES {
		p.Racemic = true
		if mirror < p.SMILES { // the same enantiomer however the reactant is drawn
			p.Molecule, p.SMILES = p.Molecule.Mirrored(), mirror
		}
	}
	return append(list, *p)
}
