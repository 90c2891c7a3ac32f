package molecule

import (
	"fmt"
	"math"
	"slices"
)

// straight is the largest deviation from a line, in radians, at which a drawn bond
// still counts as running along the axis it is compared with (about 3°).
const straight = 0.05

// drawing is a connection table with its adjacency, while configurations are read
// from the coordinates.
type drawing struct {
	*table
	first []int // first[i] to first[i+1] bound the ends of atom i in ends
	ends  []Half
	flat  bool // no z coordinate differs from zero
	blank bool // all coordinates are zero: nothing is drawn
}

func (d *drawing) around(i int) []Half { return d.ends[d.first[i]:d.first[i+1]] }

// newDrawing builds the adjacency of a table; hydrogen bonds are no bonds in it.
func newDrawing(t *table) *drawing {
	d := &drawing{table: t, first: make([]int, len(t.atoms)+1), flat: true, blank: true}
	for _, b := range t.bonds {
		if b.kind != hydrogenBond {
			d.first[b.a+1]++
			d.first[b.b+1]++
		}
	}
	for i := range t.atoms {
		d.first[i+1] += d.first[i]
		a := &t.atoms[i]
		d.flat = d.flat && a.z == 0
		d.blank = d.blank && a.x == 0 && a.y == 0 && a.z == 0
	}
	d.ends = make([]Half, d.first[len(t.atoms)])
	fill := slices.Clone(d.first)
	for k, b := range t.bonds {
		if b.kind != hydrogenBond {
			d.ends[fill[b.a]] = Half{b.b, k}
			d.ends[fill[b.b]] = Half{b.a, k}
			fill[b.a]++
			fill[b.b]++
		}
	}
	return d
}

// vector runs from table atom i to table atom j.
func (d *drawing) vector(i, j int) [3]float64 {
	a, b := &d.atoms[i], &d.atoms[j]
	return [3]float64{b.x - a.x, b.y - a.y, b.z - a.z}
}

// readConfigurations sets the configurations that the drawing states. m has the atoms
// of the table, drawn hydrogens included, and its bonds in Kekulé form; bond k of the
// table is bondOf[k] of m, or -1.
func (d *drawing) readConfigurations(m *Molecule, bondOf []int) error {
	if d.blank {
		return nil
	}
	if !d.flat {
		for i := range d.atoms {
			if d.mayBeCentre(m, i, bondOf) && !d.marked(i, either) {
				d.spatialCentre(m, i)
			}
		}
	} else {
		for i := range d.atoms {
			if !d.marked(i, up) && !d.marked(i, down) || d.marked(i, either) || !d.mayBeCentre(m, i, bondOf) {
				continue
			}
			if err := d.wedgedCentre(m, i); err != nil {
				return err
			}
		}
	}
	for k := range d.bonds {
		b := &d.bonds[k]
		if b.kind == 2 && b.wedge == plain && bondOf[k] >= 0 {
			d.doubleBond(m, k, bondOf)
		}
	}
	for i := range d.atoms {
		if m.cumulated(i) {
			if err := d.cumulatedCentre(m, i, bondOf); err != nil {
				return err
			}
		}
	}
	return nil
}

// cumulated tells whether atom i stands between two double bonds.
func (m *Molecule) cumulated(i int) bool {
	adj := m.adjacency[i]
	return len(adj) == 2 && m.Bonds[adj[0].Bond].Order == 2 && m.Bonds[adj[1].Bond].Order == 2
}

// maxChain bounds the chains of cumulated double bonds whose configuration is read.
const maxChain = 64

// lastOfChain follows cumulated double bonds from atom from through atom at, and
// returns the last atom, the one before it, and the number of bonds on the way.
func (d *drawing) lastOfChain(m *Molecule, at, from int) (end, before, length int) {
	for m.cumulated(at) && length < maxChain {
		h := m.adjacency[at][0]
		if h.Atom == from {
			h = m.adjacency[at][1]
		}
		at, from = h.Atom, at
		length++
	}
	return at, from, length
}

// marked reports whether a bond of the kind given starts at atom i.
func (d *drawing) marked(i int, w wedge) bool {
	for _, h := range d.around(i) {
		if b := &d.bonds[h.Bond]; b.a == i && b.wedge == w {
			return true
		}
	}
	return false
}

// mayBeCentre tells whether the atom has four ligands, counting one hydrogen or lone
// pair that is not drawn, and holds its configuration.
func (d *drawing) mayBeCentre(m *Molecule, i int, bondOf []int) bool {
	a := &m.Atoms[i]
	drawn := len(d.around(i))
	if a.Hydrogens > 1 || drawn < 3 || drawn > 4 || a.Hydrogens+d.drawnHydrogens(i) > 1 {
		return false
	}
	raised := false
	for _, h := range d.around(i) {
		if k := bondOf[h.Bond]; k >= 0 && m.Bonds[k].Order > 1 {
			raised = true
		}
	}
	switch a.Element {
	case 5, 6, 14, 32, 50:
		return !raised && drawn+a.Hydrogens == 4
	case 7:
		if raised {
			return false
		}
		if drawn+a.Hydrogens == 4 {
			return a.Charge == 1
		}
		return drawn == 3 && a.Charge == 0 && d.heldNitrogen(i)
	case 15, 16, 33, 34, 51, 52:
		return drawn == 4 && a.Hydrogens == 0 || drawn == 3
	}
	return false
}

func (d *drawing) drawnHydrogens(i int) int {
	n := 0
	for _, h := range d.around(i) {
		if a := &d.atoms[h.Atom]; a.element == 1 && a.isotope == 0 && a.charge == 0 {
			n++
		}
	}
	return n
}

// heldNitrogen tells whether a nitrogen with three bonds is kept from inverting: in
// a three-membered ring, or with all three bonds in rings of at most twelve atoms.
func (d *drawing) heldNitrogen(i int) bool {
	rings := 0
	for _, h := range d.around(i) {
		size := d.smallestRing(h.Bond, 12)
		if size == 3 {
			return true
		}
		if size > 0 {
			rings++
		}
	}
	return rings == 3
}

// smallestRing is the size of the smallest ring that holds bond k, 0 when there is
// none of at most limit atoms.
func (d *drawing) smallestRing(k, limit int) int {
	from, to := d.bonds[k].a, d.bonds[k].b
	depth := map[int]int{from: 1}
	queue := []int{from}
	for len(queue) > 0 {
		i := queue[0]
		queue = queue[1:]
		if depth[i] >= limit {
			return 0
		}
		for _, h := range d.around(i) {
			if h.Bond == k {
				continue
			}
			if h.Atom == to {
				return depth[i] + 1
			}
			if depth[h.Atom] == 0 {
				depth[h.Atom] = depth[i] + 1
				queue = append(queue, h.Atom)
			}
		}
	}
	return 0
}

// drawnLigand is a ligand on the drawing plane: its direction, and on which side of
// the plane a wedge puts it.
type drawnLigand struct {
	ligand int
	angle  float64
	side   int // 1 in front, -1 behind
}

// wedgedCentre reads the configuration of an atom from its wedges. Four ligands
// alternate front and back round the atom, so that one mark settles all. With three,
// the one that is not drawn lies behind when the marks are in front; but where all
// three point into one half of the plane it lies opposite them in the plane, and
// takes its place among four (IUPAC 2006, Graphical representation of
// stereochemical configuration, on re-entrant arrangements).
func (d *drawing) wedgedCentre(m *Molecule, i int) error {
	var store [5]drawnLigand
	ligands := store[:0]
	marked := -1
	for _, h := range d.around(i) {
		v := d.vector(i, h.Atom)
		if v[0] == 0 && v[1] == 0 {
			return d.refuseBond(h.Bond, fmt.Sprintf("atoms %d and %d lie on one spot, so that the wedges of atom %d have no meaning", d.atoms[i].index, d.atoms[h.Atom].index, d.atoms[i].index), "draw them apart")
		}
		l := drawnLigand{ligand: h.Atom, angle: math.Atan2(v[1], v[0])}
		if b := &d.bonds[h.Bond]; b.a == i {
			switch b.wedge {
			case up:
				l.side, marked = 1, h.Bond
			case down:
				l.side, marked = -1, h.Bond
			}
		}
		ligands = append(ligands, l)
	}
	byAngle := func(a, b drawnLigand) int {
		if a.angle < b.angle {
			return -1
		}
		if a.angle > b.angle {
			return 1
		}
		return 0
	}
	slices.SortStableFunc(ligands, byAngle)
	gap := func(k int) float64 { // from ligand k to the next, anticlockwise
		if k == len(ligands)-1 {
			return ligands[0].angle + 2*math.Pi - ligands[k].angle
		}
		return ligands[k+1].angle - ligands[k].angle
	}
	widest := 0
	for k := range ligands {
		if gap(k) < 0.01 {
			return d.refuseBond(marked, fmt.Sprintf("two bonds of atom %d lie on top of each other, so that its wedges have no meaning", d.atoms[i].index), "draw them apart")
		}
		if gap(k) > gap(widest) {
			widest = k
		}
	}
	sum, permutation := 0, 0
	if len(ligands) == 3 && gap(widest) < math.Pi-1e-3 {
		// The fourth ligand is hidden under the atom, or above it.
		front, back := false, false
		for _, l := range ligands {
			front = front || l.side > 0
			back = back || l.side < 0
		}
		if front != back {
			permutation = 1
			if front {
				permutation = 2
			}
		}
		ligands = slices.Insert(ligands, 0, drawnLigand{ligand: ImplicitLigand})
	} else {
		if len(ligands) == 3 {
			middle := drawnLigand{ligand: ImplicitLigand, angle: ligands[widest].angle + gap(widest)/2}
			ligands = slices.Insert(ligands, widest+1, middle)
		}
		for k, l := range ligands {
			sum += l.side * (1 - 2*(k&1))
		}
		if sum > 0 {
			permutation = 1
		} else if sum < 0 {
			permutation = 2
		}
	}
	if permutation == 0 {
		return d.refuseBond(marked, fmt.Sprintf("the wedges of atom %d contradict each other", d.atoms[i].index), "leave one of them, or draw a wavy bond where the configuration is unknown")
	}
	s := Stereo{Class: Tetrahedral, Permutation: permutation, Ligands: make([]int, 4)}
	for k, l := range ligands {
		s.Ligands[k] = l.ligand
	}
	m.Atoms[i].Stereo = s
	return nil
}

// spatialCentre reads the configuration of an atom from three-dimensional
// coordinates; a flat arrangement states none.
func (d *drawing) spatialCentre(m *Molecule, i int) {
	var p [4][3]float64
	s := Stereo{Class: Tetrahedral, Ligands: make([]int, 0, 4)}
	var sum [3]float64
	for k, h := range d.around(i) {
		v, ok := unit(d.vector(i, h.Atom))
		if !ok {
			return
		}
		p[k] = v
		for c := range v {
			sum[c] -= v[c]
		}
		s.Ligands = append(s.Ligands, h.Atom)
	}
	if len(s.Ligands) == 3 {
		v, ok := unit(sum)
		if !ok {
			return
		}
		p[3] = v
		s.Ligands = append(s.Ligands, ImplicitLigand)
	}
	volume := dot(minus(p[1], p[0]), cross(minus(p[2], p[0]), minus(p[3], p[0])))
	// A regular tetrahedron of unit vectors has 16/(3√3) ≈ 3.1.
	switch {
	case volume < -0.3:
		s.Permutation = 1
	case volume > 0.3:
		s.Permutation = 2
	default:
		return
	}
	m.Atoms[i].Stereo = s
}

// doubleBond reads the geometry of double bond k from the coordinates. In a chain of
// an odd number of cumulated double bonds the middle one carries it.
func (d *drawing) doubleBond(m *Molecule, k int, bondOf []int) {
	b := &d.bonds[k]
	endA, beforeA, lengthA := d.lastOfChain(m, b.a, b.b)
	endB, beforeB, lengthB := d.lastOfChain(m, b.b, b.a)
	if lengthA != lengthB {
		return
	}
	axis, ok := unit(d.vector(endA, endB))
	if !ok {
		return
	}
	sideA, okA := d.side(m, endA, beforeA, axis, bondOf)
	sideB, okB := d.side(m, endB, beforeB, axis, bondOf)
	if !okA || !okB || sideA.reference < 0 || sideB.reference < 0 || d.smallestRing(k, smallestTransRing-1) > 0 {
		return
	}
	c := dot(sideA.direction, sideB.direction)
	if math.Abs(c) < straight {
		return
	}
	bond := &m.Bonds[bondOf[k]]
	bond.Geometry = Opposite
	if c > 0 {
		bond.Geometry = Together
	}
	bond.RefA, bond.RefB = sideA.reference, sideB.reference
	if bond.A != b.a {
		bond.RefA, bond.RefB = bond.RefB, bond.RefA
	}
}

// cumulatedCentre reads the configuration of the middle atom of an even number of
// cumulated double bonds: from three-dimensional coordinates, or from wedges at one end
// of the chain, whose two ligands then lie in front of and behind the plane that holds
// those of the other end.
func (d *drawing) cumulatedCentre(m *Molecule, i int, bondOf []int) error {
	adj := m.adjacency[i]
	var ends [2]chainSide
	var at [2]int
	var length [2]int
	var before [2]int
	for e, h := range adj {
		at[e], before[e], length[e] = d.lastOfChain(m, h.Atom, i)
	}
	axis, ok := unit(d.vector(at[0], at[1]))
	if !ok || length[0] != length[1] || at[0] == at[1] {
		return nil
	}
	marked := [2]bool{}
	for e := range ends {
		if ends[e], ok = d.side(m, at[e], before[e], axis, bondOf); !ok || ends[e].first < 0 || m.Atoms[at[e]].Hydrogens > 1 {
			return nil
		}
		if m.Atoms[at[e]].Hydrogens == 1 && ends[e].second >= 0 || d.drawnHydrogens(at[e])+m.Atoms[at[e]].Hydrogens > 1 {
			return nil
		}
		marked[e] = d.flat && (d.marked(at[e], up) || d.marked(at[e], down))
	}
	if d.flat {
		if marked[0] == marked[1] {
			if marked[0] {
				return d.refuseAtom(i, fmt.Sprintf("both ends of the cumulated double bonds at atom %d have wedges", d.atoms[i].index), "draw wedges at one end only")
			}
			return nil
		}
		e := 0
		if marked[1] {
			e = 1
		}
		front := 0
		for _, h := range d.around(at[e]) {
			b := &d.bonds[h.Bond]
			if b.a != at[e] || b.wedge != up && b.wedge != down {
				continue
			}
			s := 1
			if (b.wedge == down) != (h.Atom == ends[e].second) {
				s = -1
			}
			if front == -s {
				return d.refuseBond(h.Bond, fmt.Sprintf("the wedges of atom %d contradict each other", d.atoms[at[e]].index), "leave one of them")
			}
			front = s
		}
		ends[e].direction = [3]float64{0, 0, float64(front)}
	}
	// The four ligands as the corners of a tetrahedron drawn out along the axis.
	var p [4][3]float64
	s := Stereo{Class: Allenal, Ligands: make([]int, 4)}
	for e, side := range ends {
		out := float64(2*e - 1)
		for c := range axis {
			p[2*e][c] = out*axis[c] + side.direction[c]
			p[2*e+1][c] = out*axis[c] - side.direction[c]
		}
		s.Ligands[2*e], s.Ligands[2*e+1] = side.first, side.second
	}
	switch volume := dot(minus(p[1], p[0]), cross(minus(p[2], p[0]), minus(p[3], p[0]))); {
	case volume < -0.3:
		s.Permutation = 1
	case volume > 0.3:
		s.Permutation = 2
	default:
		return nil
	}
	m.Atoms[i].Stereo = s
	return nil
}

// chainSide describes the ligands at one end of a double bond or cumulated chain.
type chainSide struct {
	reference int        // an atom whose place the geometry can refer to, -1 for none
	first     int        // the ligand that lies in the direction
	second    int        // the other one, ImplicitLigand where it is not drawn
	direction [3]float64 // of length one, square to the axis
}

// side finds the ligands at one end of a double bond, beside the atom before it in the
// chain, and the direction, square to the axis, in which they lie. It fails where the
// drawing leaves it open: a wavy bond, a bond along the axis, both on one side.
func (d *drawing) side(m *Molecule, end, before int, axis [3]float64, bondOf []int) (s chainSide, ok bool) {
	s = chainSide{reference: -1, first: -1, second: ImplicitLigand}
	switch m.Atoms[end].Element {
	case 6, 7, 14, 32:
	default:
		return s, false
	}
	n := 0
	for _, h := range d.around(end) {
		if h.Atom == before {
			continue
		}
		if k := bondOf[h.Bond]; m.Bonds[k].Order > 1 || d.bonds[h.Bond].wedge == either || n == 2 {
			return s, false
		}
		v := d.vector(end, h.Atom)
		long := math.Sqrt(dot(v, v))
		along := dot(v, axis)
		for c := range v {
			v[c] -= along * axis[c]
		}
		if math.Sqrt(dot(v, v)) <= straight*long {
			return s, false
		}
		v, _ = unit(v)
		if n == 0 {
			s.reference, s.first, s.direction = h.Atom, h.Atom, v
		} else {
			if dot(v, s.direction) > -straight {
				return s, false
			}
			s.second = h.Atom
		}
		n++
	}
	return s, n > 0
}

func dot(a, b [3]float64) float64 { return a[0]*b[0] + a[1]*b[1] + a[2]*b[2] }

func cross(a, b [3]float64) [3]float64 {
	return [3]float64{a[1]*b[2] - a[2]*b[1], a[2]*b[0] - a[0]*b[2], a[0]*b[1] - a[1]*b[0]}
}

func minus(a, b [3]float64) [3]float64 { return [3]float64{a[0] - b[0], a[1] - b[1], a[2] - b[2]} }

// unit is the vector at length one; ok is false for the zero vector.
func unit(a [3]float64) ([3]float64, bool) {
	n := math.Sqrt(dot(a, a))
	if n < 1e-9 {
		return a, false
	}
	return [3]float64{a[0] / n, a[1] / n, a[2] / n}, true
}
