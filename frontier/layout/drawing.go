package layout

import (
	"cmp"
	"math"
	"slices"

	"lobecast/frontier/molecule"
)

// Drawing is a molecule on the plane.
type Drawing struct {
	Molecule *molecule.Molecule
	// At holds the position of each atom, in bond lengths, y upward.
	At []molecule.Point
	// Wedges show the stated configuration of tetrahedral centres.
	Wedges []Wedge
}

// Wedge is a bond that leaves the plane at a stereocentre: its narrow end is at From.
type Wedge struct {
	From int
	To   int  // neighbour, or -1 where a hydrogen is drawn for the purpose
	Up   bool // toward the reader (solid); otherwise away (hatched)
	// Hydrogen is the position of the hydrogen drawn where To is -1.
	Hydrogen molecule.Point
}

// Compute draws a molecule. Coordinates that came with a molfile are used as they
// are, scaled to bonds of unit length. Components stand in a row, the largest first.
func Compute(m *molecule.Molecule) *Drawing {
	return Like(m, nil, nil)
}

// Like draws m so that it lines up with the drawing ref of a related molecule. Each
// pair is an atom of m and the atom of ref it corresponds to (see [Match]). Where the
// shared part can keep its place, it does, and only the rest is drawn anew; otherwise
// the whole picture is turned, and mirrored if need be, to fit best.
func Like(m *molecule.Molecule, ref *Drawing, pairs [][2]int) *Drawing {
	d := &Drawing{Molecule: m, At: make([]point, len(m.Atoms))}
	if given := scaledPoints(m); given != nil {
		d.At = given
		d.wedge()
		return d
	}
	components := m.Components()
	parts := m.Split()
	type piece struct {
		atoms  []int
		at     []point
		smiles string
		fixed  bool
	}
	pieces := make([]piece, len(parts))
	for k, part := range parts {
		pieces[k].atoms = components[k]
		if len(parts) > 1 {
			pieces[k].smiles = part.SMILES()
		}
		local := make(map[int]int, len(components[k]))
		for i, a := range components[k] {
			local[a] = i
		}
		var own [][2]int
		if ref != nil {
			for _, p := range pairs {
				if i, ok := local[p[0]]; ok {
					own = append(own, [2]int{i, p[1]})
				}
			}
		}
		pieces[k].at, pieces[k].fixed = component(part, ref, own)
	}
	slices.SortStableFunc(pieces, func(p, q piece) int {
		return cmp.Or(len(q.atoms)-len(p.atoms), cmp.Compare(p.smiles, q.smiles))
	})
	// Fixed pieces keep their place unless they would run into each other.
	right, first := math.Inf(-1), true
	for _, p := range pieces {
		low, high := extent(p.at)
		shift := point{}
		if !first && (!p.fixed || low.X < right+1) {
			shift.X = right + 1.5 - low.X
		}
		for i, a := range p.atoms {
			d.At[a] = plus(p.at[i], shift)
		}
		right, first = math.Max(right, high.X+shift.X), false
	}
	d.wedge()
	return d
}

// component draws one connected molecule; fixed reports that it was laid over ref.
func component(m *molecule.Molecule, ref *Drawing, pairs [][2]int) (at []point, fixed bool) {
	c, rank := canonical(m)
	at = make([]point, len(m.Atoms))
	back := func(s *sheet) {
		for i := range at {
			at[i] = s.at[rank[i]]
		}
	}
	fresh := newSheet(c)
	fresh.start()
	fresh.untangle()
	fresh.orient()
	if len(pairs) == 0 {
		back(fresh)
		return at, false
	}
	moved := make([][2]int, len(pairs))
	for i, p := range pairs {
		moved[i] = [2]int{rank[p[0]], p[1]}
	}
	if s := holding(c, ref, moved); s != nil {
		s.untangle()
		if s.conflicts() <= fresh.conflicts() {
			back(s)
			return at, true
		}
	}
	fresh.layOver(ref, moved)
	back(fresh)
	return at, true
}

// canonical rewrites m in the order of its canonical SMILES, atoms and bonds, so that
// nothing in the drawing depends on how the input was written; rank holds the place of
// each atom of m in it.
func canonical(m *molecule.Molecule) (c *molecule.Molecule, rank []int) {
	rank = make([]int, len(m.Atoms))
	for i := range rank {
		rank[i] = i
	}
	mapped := m.Renumber(rank) // a copy: the maps of m stay
	for i := range mapped.Atoms {
		mapped.Atoms[i].Map = i + 1
	}
	c, err := molecule.ParseSMILES(mapped.MappedSMILES(), molecule.AllowWildcard)
	if err != nil || len(c.Atoms) != len(m.Atoms) {
		// What SMILES cannot say is drawn in the canonical order of its atoms.
		rank = m.CanonicalOrder()
		return m.Renumber(rank), rank
	}
	for k := range c.Atoms {
		rank[c.Atoms[k].Map-1] = k
	}
	return c, rank
}

// scaledPoints returns the coordinates of a molfile with bonds of unit length; nil
// where there are none worth using.
func scaledPoints(m *molecule.Molecule) []point {
	if len(m.Points) != len(m.Atoms) || len(m.Atoms) == 0 {
		return nil
	}
	if len(m.Atoms) == 1 {
		return []point{{}}
	}
	var lengths []float64
	for i := range m.Bonds {
		lengths = append(lengths, distance(m.Points[m.Bonds[i].A], m.Points[m.Bonds[i].B]))
	}
	scale := 1.0
	if len(lengths) > 0 {
		slices.Sort(lengths)
		scale = lengths[len(lengths)/2]
		if lengths[0] < 0.05*scale {
			return nil
		}
	}
	if !(scale > 1e-6) || math.IsInf(scale, 0) {
		return nil
	}
	middle := centre(m.Points)
	at := make([]point, len(m.Points))
	for i, p := range m.Points {
		at[i] = times(minus(p, middle), 1/scale)
		if math.IsNaN(at[i].X+at[i].Y) || math.IsInf(at[i].X+at[i].Y, 0) {
			return nil
		}
	}
	return at
}

func extent(at []point) (low, high point) {
	low, high = point{X: math.Inf(1), Y: math.Inf(1)}, point{X: math.Inf(-1), Y: math.Inf(-1)}
	for _, p := range at {
		low.X, low.Y = math.Min(low.X, p.X), math.Min(low.Y, p.Y)
		high.X, high.Y = math.Max(high.X, p.X), math.Max(high.Y, p.Y)
	}
	return low, high
}
