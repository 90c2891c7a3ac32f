package symmetry

import (
	"slices"

	"lobecast/frontier/molecule"
)

// How configuration is carried through a process. A chain of p orbitals is laid into
// a plane and looked at from above. Its atoms follow the arc of a circle,
// anticlockwise (turn +1) or clockwise (turn −1), so that its ends can meet. At each
// end atom the third and fourth ligand point inward (toward the other end; cis to the
// chain) or outward. A σ bond is made or broken from the upper or the lower face.
// Which ligands are inward, the turn and the face fix the configuration at the end
// atom, and the other way about: it is a matter of the one atom alone, however far
// the ends turn on the way.

// ends holds the inward and outward ligand of an end atom; ImplicitLigand for a
// hydrogen that is no node.
type end struct {
	in, out int
	known   bool // which is which is known
	alike   bool // both are hydrogens
	open    bool // not an sp2 carbon with two further ligands
}

// ligandsBut lists the ligands of an atom but for some, implicit hydrogens included.
func ligandsBut(m *molecule.Molecule, i int, but ...int) []int {
	var list []int
	for _, h := range m.Neighbours(i) {
		if !slices.Contains(but, h.Atom) {
			list = append(list, h.Atom)
		}
	}
	for range m.Atoms[i].Hydrogens {
		list = append(list, molecule.ImplicitLigand)
	}
	return list
}

// Sizes of rings that fix configurations by themselves.
const (
	smallRing  = 7 // largest ring that cannot hold a trans double bond, and whose fusion is taken to be cis
	impliedCis = 8 // largest ring whose double bonds are taken to be cis where nothing is stated
)

// relation is the geometry of ligands x of u and y of v about the bond u–v: as
// stated, or implied by a small ring; NoGeometry where it is open.
func (f *frame) relation(u, v, x, y int) molecule.Geometry {
	m := f.m
	k := m.BondBetween(u, v)
	if k < 0 {
		return molecule.NoGeometry
	}
	b := &m.Bonds[k]
	if b.Geometry != molecule.NoGeometry && b.Order == 2 {
		ru, rv := b.RefA, b.RefB
		if b.A != u {
			ru, rv = rv, ru
		}
		g := b.Geometry
		if x != ru {
			g = flipped(g)
		}
		if y != rv {
			g = flipped(g)
		}
		return g
	}
	if b.Order != 2 {
		return impliedWithin(m, u, v, x, y, smallRing)
	}
	return impliedWithin(m, u, v, x, y, impliedCis)
}

// impliedBy is the geometry that a small ring gives a double bond.
func impliedBy(m *molecule.Molecule, u, v, x, y int) molecule.Geometry {
	return impliedWithin(m, u, v, x, y, smallRing)
}

// impliedWithin is the geometry of ligands x of u and y of v about a bond in a ring of
// at most the given size: ring neighbours are cis.
func impliedWithin(m *molecule.Molecule, u, v, x, y, most int) molecule.Geometry {
	for _, ring := range m.Rings() {
		n := len(ring)
		if n > most {
			continue
		}
		i := slices.Index(ring, u)
		if i < 0 {
			continue
		}
		var ru, rv int
		switch v {
		case ring[(i+1)%n]:
			ru, rv = ring[(i+n-1)%n], ring[(i+2)%n]
		case ring[(i+n-1)%n]:
			ru, rv = ring[(i+1)%n], ring[(i+n-2)%n]
		default:
			continue
		}
		if n == 3 {
			continue
		}
		g := molecule.Together
		if x != ru {
			g = flipped(g)
		}
		if y != rv {
			g = flipped(g)
		}
		return g
	}
	return molecule.NoGeometry
}

// end describes the first (or last) atom of a chain of sp2 atoms; leaving is a ligand
// to leave out of the description, −2 for none.
func (f *frame) end(atoms []int, last bool) end {
	n := len(atoms)
	a, next, ref := atoms[0], atoms[1], -2
	if n > 2 {
		ref = atoms[2]
	}
	if last {
		a, next = atoms[n-1], atoms[n-2]
		if n > 2 {
			ref = atoms[n-3]
		}
	}
	ligands := ligandsBut(f.m, a, next)
	if len(ligands) != 2 || f.m.Atoms[a].Element != 6 {
		return end{open: true}
	}
	e := end{in: ligands[0], out: ligands[1]}
	if ligands[0] < 0 && ligands[1] < 0 {
		e.known, e.alike = true, true
		return e
	}
	if ref == -2 {
		return e
	}
	switch f.relation(a, next, ligands[0], ref) {
	case molecule.Together:
		e.known = true
	case molecule.Opposite:
		e.in, e.out, e.known = ligands[1], ligands[0], true
	}
	return e
}

// alkeneEnds describes the two ends of a two-atom component. Inward is the side left
// of the direction from first to last for turn +1; swap exchanges the sides.
func (f *frame) alkeneEnds(a, b int, swap bool) (first, last end) {
	first, last = f.end([]int{a, b}, false), f.end([]int{a, b}, true)
	if first.open || last.open {
		return first, last
	}
	if swap {
		first.in, first.out = first.out, first.in
	}
	switch f.relation(a, b, first.in, last.in) {
	case molecule.Together:
		first.known, last.known = true, true
	case molecule.Opposite:
		last.in, last.out = last.out, last.in
		first.known, last.known = true, true
	}
	return first, last
}

// around orders the two further ligands so that, seen from above, ligand x, the
// neighbour in the chain and ligand y run anticlockwise.
func around(e end, last bool, turn int) (x, y int) {
	if last == (turn < 0) {
		return e.out, e.in
	}
	return e.in, e.out
}

// attach is the configuration of end atom a when ligand fresh comes from the given
// face; ok is false where it stays open.
func attach(a, next, fresh int, e end, last bool, turn int, top bool) (c centre, ok bool) {
	if e.open || e.alike || !e.known {
		return c, false
	}
	x, y := around(e, last, turn)
	c = centre{atom: a, ligands: [4]int{fresh, x, next, y}, perm: 1}
	if !top {
		c.perm = 2
	}
	return c, true
}

// permutation is that of the configuration with its ligands in another order, 0 where
// the ligands are not the same.
func permutation(s molecule.Stereo, ligands [4]int) int {
	if s.Class != molecule.Tetrahedral || len(s.Ligands) != 4 {
		return 0
	}
	var at [4]int
	for i, l := range ligands {
		at[i] = slices.Index(s.Ligands, l)
		if at[i] < 0 || slices.Contains(at[:i], at[i]) {
			return 0
		}
	}
	odd := false
	for i := range at {
		for j := i + 1; j < 4; j++ {
			if at[i] > at[j] {
				odd = !odd
			}
		}
	}
	if odd {
		return 3 - s.Permutation
	}
	return s.Permutation
}

// configuration is the stated or implied configuration of an atom.
func (f *frame) configuration(a int) molecule.Stereo {
	if s, ok := f.stereo[a]; ok && f.m.Atoms[a].Stereo.Class == molecule.NoStereo {
		return s
	}
	return f.m.Atoms[a].Stereo
}

// detach tells which ligand of end atom a turns inward and which outward when ligand
// leaving departs from the given face.
func (f *frame) detach(a, next, leaving int, last bool, turn int, top bool) end {
	ligands := ligandsBut(f.m, a, next, leaving)
	if len(ligands) != 2 || f.m.Atoms[a].Element != 6 {
		return end{open: true}
	}
	e := end{in: ligands[0], out: ligands[1]}
	if ligands[0] < 0 && ligands[1] < 0 {
		e.known, e.alike = true, true
		return e
	}
	x, y := around(e, last, turn)
	want := 1
	if !top {
		want = 2
	}
	switch permutation(f.configuration(a), [4]int{leaving, x, next, y}) {
	case want:
		e.known = true
	case 3 - want:
		e.in, e.out, e.known = e.out, e.in, true
	}
	return e
}

// endGeometry is the configuration of the double bond from end atom a to its
// neighbour next, with respect to the atom ref beyond.
func endGeometry(a, next, ref int, e end) (geometry, bool) {
	if e.open || e.alike || !e.known || ref < 0 {
		return geometry{}, false
	}
	return geometry{a: a, b: next, refA: e.out, refB: ref, g: molecule.Opposite}, true
}

// implyFusion gives the ends of a σ bond in two small rings the cis configuration
// that such rings impose, where none is stated. atoms is the chain whose ends the
// bond joins.
func (f *frame) implyFusion(atoms []int) {
	n := len(atoms)
	a, b := atoms[0], atoms[n-1]
	if f.m.Atoms[a].Stereo.Class != molecule.NoStereo || f.m.Atoms[b].Stereo.Class != molecule.NoStereo {
		return
	}
	for _, ring := range f.m.Rings() {
		if len(ring) > smallRing {
			continue
		}
		i := slices.Index(ring, a)
		if i < 0 {
			continue
		}
		k := len(ring)
		var ra, rb int
		switch b {
		case ring[(i+1)%k]:
			ra, rb = ring[(i+k-1)%k], ring[(i+2)%k]
		case ring[(i+k-1)%k]:
			ra, rb = ring[(i+1)%k], ring[(i+k-2)%k]
		default:
			continue
		}
		if slices.Contains(atoms[1:n-1], ra) || slices.Contains(atoms[1:n-1], rb) || k == 3 && n == 3 {
			continue
		}
		la, lb := ligandsBut(f.m, a, atoms[1], b), ligandsBut(f.m, b, atoms[n-2], a)
		if len(la) != 2 || len(lb) != 2 {
			continue
		}
		other := func(list []int, r int) int {
			if list[0] == r {
				return list[1]
			}
			return list[0]
		}
		ea, eb := end{in: ra, out: other(la, ra), known: true}, end{in: rb, out: other(lb, rb), known: true}
		if f.stereo == nil {
			f.stereo = map[int]molecule.Stereo{}
		}
		state := func(c centre, ok bool) {
			if ok {
				f.stereo[c.atom] = molecule.Stereo{Class: molecule.Tetrahedral, Permutation: c.perm, Ligands: slices.Clone(c.ligands[:])}
			}
		}
		state(attach(a, atoms[1], b, ea, false, 1, true))
		state(attach(b, atoms[n-2], a, eb, true, 1, true))
		return
	}
}
