package reactivity

import (
	"fmt"
	"slices"

	"lobecast/frontier/molecule"
)

// AdductProduct is one diastereomer of an adduct.
type AdductProduct struct {
	Molecule *molecule.Molecule
	SMILES   string // canonical, with configuration
	// Configuration says which diastereomer it is: "endo", "exo", …; empty where there
	// is only one and nothing to name.
	Configuration string
	// Racemic is set where the enantiomer forms in equal amount and is not written.
	Racemic bool
}

// BuildAdduct makes the constitution of the adduct: two new bonds, the π bonds of the
// diene or dipole and of the partner shifted, charges of a dipole cancelled. a and b
// are not touched; b nil means intramolecular. Atoms keep their indices, those of b
// following those of a.
func BuildAdduct(a, b *molecule.Molecule, c *Combination, o Orientation) (*molecule.Molecule, error) {
	return joinAdduct(a, b, c, o).Done()
}

// joinAdduct does the bonding of [BuildAdduct] and leaves the editor open.
func joinAdduct(a, b *molecule.Molecule, c *Combination, o Orientation) *molecule.Editor {
	e := a.Edit()
	offset := 0
	if b == nil {
		shiftBonds(e, a, 0, &c.A, &c.B)
	} else {
		offset = e.Merge(b)
		shiftBonds(e, a, 0, &c.A)
		shiftBonds(e, b, offset, &c.B)
	}
	for _, bond := range o.Bonds {
		e.AddBond(bond[0], bond[1]+offset, 1)
	}
	return e
}

// shiftBonds rewrites the bond orders and charges of the reacting π systems of one
// molecule whose atoms begin at offset in the editor.
func shiftBonds(e *molecule.Editor, m *molecule.Molecule, offset int, ends ...*End) {
	var removed []int
	for _, end := range ends {
		if end.Aromatic {
			for _, i := range end.Atoms {
				if aromaticMate(m, i) >= 0 {
					removed = append(removed, i)
				}
			}
		}
	}
	if len(removed) > 0 {
		orders, _ := kekuleWithout(m, removed)
		bonds := make([]int, 0, len(orders))
		for k := range orders {
			bonds = append(bonds, k)
		}
		slices.Sort(bonds)
		for _, k := range bonds {
			e.SetOrder(m.Bonds[k].A+offset, m.Bonds[k].B+offset, orders[k])
		}
	}
	for _, end := range ends {
		p := make([]int, len(end.Atoms))
		for k, i := range end.Atoms {
			p[k] = i + offset
		}
		switch end.Role {
		case RoleDiene:
			e.SetOrder(p[0], p[1], 1)
			e.SetOrder(p[1], p[2], 2)
			e.SetOrder(p[2], p[3], 1)
		case RoleDipole:
			first, second := 1, 1
			if end.Linear {
				if end.Keeps == 0 {
					first = 2
				} else {
					second = 2
				}
			}
			e.SetOrder(p[0], p[1], first)
			e.SetOrder(p[1], p[2], second)
			total := 0
			for _, i := range p {
				total += e.Atom(i).Charge
				e.Atom(i).Charge = 0
			}
			if total != 0 { // an azide ion keeps its charge on the first nitrogen
				e.Atom(p[0]).Charge = total
			}
		case RolePartner:
			k := m.BondBetween(end.Atoms[0], end.Atoms[1])
			order := m.Bonds[k].Order - 1
			if end.Aromatic {
				order = 1
			}
			e.SetOrder(p[0], p[1], order)
		}
	}
}

// vector is a direction at a reacting atom in the transition state: the diene or
// dipole lies in the plane z = 0 with its ends at the left (x < 0) and right and the
// middle of its chain at y > 0; the partner lies below.
type vector [3]float64

// centre is an atom that becomes tetrahedral, with its four ligands and where they
// point.
type newCentre struct {
	atom      int // index in the product
	ligands   [4]int
	direction [4]vector
}

// permutation is the tetrahedral permutation number of the centre: 1 when, seen from
// the first ligand, the others run anticlockwise.
func (c *newCentre) permutation() int {
	var d [3]vector
	for k := range 3 {
		for x := range 3 {
			d[k][x] = c.direction[k+1][x] - c.direction[0][x]
		}
	}
	det := d[0][0]*(d[1][1]*d[2][2]-d[1][2]*d[2][1]) -
		d[0][1]*(d[1][0]*d[2][2]-d[1][2]*d[2][0]) +
		d[0][2]*(d[1][0]*d[2][1]-d[1][1]*d[2][0])
	if det < 0 {
		return 1
	}
	return 2
}

// outerLigands finds the two ligands of the end of a diene or dipole beside inner, and
// which of them points inward (cis to next across the bond end=inner). ok is false
// where the end becomes no stereocentre, known where the geometry is stated or forced.
func outerLigands(m *molecule.Molecule, end, inner, next int) (in, out int, ok, known bool) {
	ligands, ok := twoLigands(m, end, inner)
	if !ok {
		return 0, 0, false, false
	}
	in, out = ligands[0], ligands[1]
	// a ring through end, inner and next holds its member at the end inward; a ring
	// through end and inner only holds it outward
	outward := -1
	for _, ring := range m.Rings() {
		if len(ring) > largestLockingRing || !slices.Contains(ring, end) || !slices.Contains(ring, inner) || !adjacentInRing(ring, end, inner) {
			continue
		}
		member := ringNeighbour(ring, end, inner)
		if slices.Contains(ring, next) && ringNeighbour(ring, inner, end) == next {
			return member, other(ligands, member), true, true
		}
		outward = member
	}
	if outward >= 0 {
		return other(ligands, outward), outward, true, true
	}
	b := &m.Bonds[m.BondBetween(end, inner)]
	if b.Order != 2 || b.Geometry == molecule.NoGeometry {
		return in, out, true, false
	}
	refEnd, refInner := b.RefA, b.RefB
	if b.A != end {
		refEnd, refInner = refInner, refEnd
	}
	cis := b.Geometry == molecule.Together
	if refInner != next {
		cis = !cis
	}
	if !slices.Contains(ligands[:], refEnd) {
		return in, out, true, false
	}
	if cis {
		return refEnd, other(ligands, refEnd), true, true
	}
	return other(ligands, refEnd), refEnd, true, true
}

// twoLigands lists the two ligands of an atom beside one neighbour, a hydrogen that is
// no node as [molecule.ImplicitLigand]; false where they are not two, are two
// hydrogens, or where the atom is no carbon or keeps a double bond elsewhere.
func twoLigands(m *molecule.Molecule, at, but int) ([2]int, bool) {
	var l [2]int
	n := 0
	if m.Atoms[at].Element != 6 {
		return l, false
	}
	for _, h := range m.Neighbours(at) {
		if h.Atom == but {
			continue
		}
		if n == 2 || m.Bonds[h.Bond].Order > 1 && !m.Bonds[h.Bond].Aromatic {
			return l, false
		}
		l[n] = h.Atom
		n++
	}
	if n == 0 {
		return l, false
	}
	for range m.Atoms[at].Hydrogens {
		if n == 2 {
			return l, false
		}
		l[n] = molecule.ImplicitLigand
		n++
	}
	return l, n == 2
}

func other(l [2]int, x int) int {
	if l[0] == x {
		return l[1]
	}
	return l[0]
}

// sides are the ligands of a partner p=q: upper[0] at p and upper[1] at q are cis.
type sides struct {
	upper, lower [2]int
	ok           [2]bool // p, q becomes a stereocentre
	known        bool    // the geometry is stated or forced, or does not matter
}

// partnerSides finds the ligands of a partner and which are cis to each other.
func partnerSides(m *molecule.Molecule, p, q int) sides {
	var s sides
	k := m.BondBetween(p, q)
	if m.Bonds[k].Order == 3 {
		return s
	}
	lp, okP := twoLigands(m, p, q)
	lq, okQ := twoLigands(m, q, p)
	s.ok = [2]bool{okP, okQ}
	s.upper[0], s.lower[0] = lp[0], lp[1]
	s.upper[1], s.lower[1] = lq[0], lq[1]
	if !okP || !okQ {
		s.known = true
		return s
	}
	for _, ring := range m.Rings() {
		if len(ring) <= largestLockingRing && slices.Contains(ring, p) && slices.Contains(ring, q) && adjacentInRing(ring, p, q) {
			u, w := ringNeighbour(ring, p, q), ringNeighbour(ring, q, p)
			s.upper = [2]int{u, w}
			s.lower = [2]int{other(lp, u), other(lq, w)}
			s.known = true
			return s
		}
	}
	b := &m.Bonds[k]
	if b.Geometry == molecule.NoGeometry {
		return s
	}
	refP, refQ := b.RefA, b.RefB
	if b.A != p {
		refP, refQ = refQ, refP
	}
	if !slices.Contains(lp[:], refP) || !slices.Contains(lq[:], refQ) {
		return s
	}
	s.known = true
	s.upper[0], s.lower[0] = refP, other(lp, refP)
	s.upper[1], s.lower[1] = refQ, other(lq, refQ)
	if b.Geometry == molecule.Opposite {
		s.upper[1], s.lower[1] = s.lower[1], s.upper[1]
	}
	return s
}

// adductProducts builds the diastereomers of an adduct by suprafacial addition to both
// components: what pointed inward at the ends of the diene or dipole ends on one side,
// what points outward on the other; the partner keeps its cis and trans. The two ways
// of laying the partner below the diene give the endo and the exo adduct.
func adductProducts(a, b *molecule.Molecule, c *Combination, o Orientation) ([]AdductProduct, error) {
	mb, offset := a, 0
	if b != nil {
		mb, offset = b, len(a.Atoms)
	}
	// four: the diene or dipole; the new bonds seen from it
	four, fm, pm, fo, po := &c.A, a, mb, 0, offset
	bonds := o.Bonds
	if c.A.Role == RolePartner {
		four, fm, pm, fo, po = &c.B, mb, a, offset, 0
		bonds = [2][2]int{{o.Bonds[0][1], o.Bonds[0][0]}, {o.Bonds[1][1], o.Bonds[1][0]}}
	}
	if bonds[0][0] != four.First() {
		bonds[0], bonds[1] = bonds[1], bonds[0]
	}
	left, right := bonds[0][1], bonds[1][1] // partner atoms under the first and last end

	flat, err := BuildAdduct(a, b, c, o)
	if err != nil {
		return nil, err
	}
	tell := refine(flat, nil)

	place := func(i, by int) int {
		if i == molecule.ImplicitLigand {
			return i
		}
		return i + by
	}
	n := len(four.Atoms)
	type outer struct {
		end, inner, in, out int
		side                float64
		below               int
	}
	var outers []outer
	open := ""
	for k, side := range [2]float64{-1, 1} {
		end, inner, next, below := four.Atoms[0], four.Atoms[1], four.Atoms[2], left
		if k == 1 {
			end, inner, next, below = four.Atoms[n-1], four.Atoms[n-2], four.Atoms[n-3], right
		}
		in, out, ok, known := outerLigands(fm, end, inner, next)
		if !ok {
			continue
		}
		if !known {
			if distinctLigands(tell, flat, place(end, fo)) {
				open = fmt.Sprintf("geometry at atom %d not stated, its configuration is left open", fm.Atoms[end].Number)
			}
			continue
		}
		outers = append(outers, outer{place(end, fo), place(inner, fo), place(in, fo), place(out, fo), side, place(below, po)})
	}
	s := partnerSides(pm, left, right)
	if !s.known && (s.ok[0] || s.ok[1]) {
		l, r := distinctLigands(tell, flat, place(left, po)), distinctLigands(tell, flat, place(right, po))
		switch {
		case l && r:
			open = fmt.Sprintf("geometry of the double bond %s not stated, its configuration is left open", numbersOf(pm, []int{left, right}))
			s.ok = [2]bool{}
		case l:
			s.ok[1] = false
		default:
			s.ok[0] = false
		}
	}

	chiral := hasStereo(a) || b != nil && hasStereo(b)
	var list []AdductProduct
	for _, endo := range [2]bool{true, false} {
		var faces [2]string
		var built [2]*molecule.Molecule
		for f, face := range [2]float64{1, -1} {
			e := joinAdduct(a, b, c, o)
			var centres []newCentre
			for _, x := range outers {
				centres = append(centres, newCentre{
					atom:    x.end,
					ligands: [4]int{x.inner, x.in, x.out, x.below},
					direction: [4]vector{
						{-0.6 * x.side, 0.8, 0.3 * face}, {-0.2 * x.side, -1, 0.3 * face},
						{x.side, 0.1, 0.3 * face}, {0, 0, -face}},
				})
			}
			for k, side := range [2]float64{-1, 1} {
				if !s.ok[k] {
					continue
				}
				at, to, end := left, right, four.First()
				if k == 1 {
					at, to, end = right, left, four.Last()
				}
				up, low := s.upper[k], s.lower[k]
				if !endo {
					up, low = low, up
				}
				centres = append(centres, newCentre{
					atom:    place(at, po),
					ligands: [4]int{place(to, po), place(end, fo), place(up, po), place(low, po)},
					direction: [4]vector{
						{-side, 0, -0.3 * face}, {0, 0, face},
						{0.5 * side, 0.9, -0.4 * face}, {0.5 * side, -0.9, -0.4 * face}},
				})
			}
			centres = slices.DeleteFunc(centres, func(x newCentre) bool { return !stereogenic(tell, flat, &x) })
			if open != "" && len(centres) == 1 && !chiral {
				centres = nil // one centre alone, beside open ones, says nothing
			}
			for k := range centres {
				x := &centres[k]
				at := e.Atom(x.atom)
				at.Stereo = molecule.Stereo{Class: molecule.Tetrahedral, Permutation: x.permutation(), Ligands: x.ligands[:]}
			}
			m, err := e.Done()
			if err != nil {
				return nil, err
			}
			built[f], faces[f] = m, m.SMILES()
		}
		word := ""
		if open == "" {
			word = endoWord(pm, &s, left, right, endo)
		} else {
			word = open
		}
		switch {
		case faces[0] == faces[1]:
			list = append(list, AdductProduct{built[0], faces[0], word, false})
		case !chiral:
			if faces[1] < faces[0] {
				built[0], faces[0] = built[1], faces[1]
			}
			list = append(list, AdductProduct{built[0], faces[0], word, true})
		default:
			list = append(list,
				AdductProduct{built[0], faces[0], joinWords(word, "one face"), false},
				AdductProduct{built[1], faces[1], joinWords(word, "other face"), false})
		}
	}
	return mergeProducts(list), nil
}

func joinWords(a, b string) string {
	if a == "" {
		return b
	}
	return a + ", " + b
}

// mergeProducts drops repeats; where endo and exo are one compound no name is left.
func mergeProducts(list []AdductProduct) []AdductProduct {
	var out []AdductProduct
	for _, p := range list {
		at := -1
		for k := range out {
			if out[k].SMILES == p.SMILES {
				at = k
			}
		}
		if at < 0 {
			out = append(out, p)
			continue
		}
		if out[at].Configuration != p.Configuration {
			out[at].Configuration = ""
		}
	}
	return out
}

// hasStereo says whether a tetrahedral or allenal configuration is stated.
func hasStereo(m *molecule.Molecule) bool {
	for i := range m.Atoms {
		if m.Atoms[i].Stereo.Class != molecule.NoStereo {
			return true
		}
	}
	return false
}

// distinctLigands says whether all ligands of an atom of the adduct differ in
// constitution.
func distinctLigands(colour []uint64, m *molecule.Molecule, i int) bool {
	if m.Atoms[i].Hydrogens > 1 {
		return false
	}
	near := m.Neighbours(i)
	for k := range near {
		for l := range k {
			if colour[near[k].Atom] == colour[near[l].Atom] {
				return false
			}
		}
	}
	return len(near)+m.Atoms[i].Hydrogens == 4
}

// stereogenic says whether a centre needs its configuration written: its ligands
// differ, or only the two along the new ring are alike while the other two differ (as
// in 3,6-dimethylcyclohexa-1,4-diene, where cis and trans exist).
func stereogenic(colour []uint64, m *molecule.Molecule, x *newCentre) bool {
	if distinctLigands(colour, m, x.atom) {
		return true
	}
	tint := func(l int) uint64 {
		if l == molecule.ImplicitLigand {
			return 1
		}
		return colour[l]
	}
	alike := 0
	ring := false
	for k := range x.ligands {
		for l := range k {
			if tint(x.ligands[k]) == tint(x.ligands[l]) {
				alike++
				// ligands 0 and 3 of an end of the diene, 0 and 1 of a partner atom,
				// lie in the new ring
				ring = l == 0 && (k == 3 || k == 1)
			}
		}
	}
	return alike == 1 && ring
}
