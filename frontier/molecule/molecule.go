package molecule

import "fmt"

// Molecule is a molecular graph: one or several disconnected components, read
// from one SMILES string, molfile or reaction role.
//
// Bond orders are always a Kekulé form; aromaticity is perceived from that form
// (see aromatic.go), never taken over from lower-case input, so that every legal
// way of writing a molecule gives the same flags. Atoms are addressed by their
// index in Atoms (from 0); what a chemist is shown is Atom.Number (from 1).
//
// A Molecule returned by a reader or by [Editor.Done] is complete and must be
// treated as read-only. Rings and aromaticity are found when the molecule is finished;
// classes, canonical forms and hash are made on first use, each once, so that
// concurrent readers are safe.
type Molecule struct {
	Atoms []Atom
	Bonds []Bond

	// Name is the title of the record (molfile header, text after the SMILES).
	Name string
	// Source is the text the molecule was read from, for messages with a caret.
	Source string
	// Points holds the coordinates of a molfile, one per atom; nil otherwise.
	Points []Point

	adjacency [][]Half // adjacency[i] lists the bonds of atom i in ascending bond index
	rings     *ringSet // see ring.go
	derived   *derived // see canonicalorder.go
}

// Point is a position on the drawing plane, in the units of the file it came from.
type Point struct{ X, Y float64 }

// Atom is a node of the graph. Hydrogens without isotope, charge or map are kept as
// a count on their neighbour, not as nodes.
type Atom struct {
	Element   int  // atomic number; 0 is the wildcard *
	Isotope   int  // mass number, 0 when not stated
	Charge    int  // formal charge
	Hydrogens int  // attached hydrogens that are not nodes
	Unpaired  int  // unpaired electrons: 1 for a radical centre, 2 for a triplet carbene
	Aromatic  bool // member of a perceived aromatic ring
	Map       int  // atom map (:n), 0 when absent
	Number    int  // place in the input, from 1
	Offset    int  // byte offset in Molecule.Source, -1 when unknown
	Stereo    Stereo
}

// StereoClass is a chirality class of the OpenSMILES grammar.
type StereoClass uint8

// The chirality classes. NoStereo marks an atom without stated configuration.
const (
	NoStereo            StereoClass = iota
	Tetrahedral                     // @, @@, @TH1, @TH2
	Allenal                         // @AL1, @AL2
	SquarePlanar                    // @SP1 … @SP3
	TrigonalBipyramidal             // @TB1 … @TB20
	Octahedral                      // @OH1 … @OH30
)

// Stereo is the configuration stated at an atom: the ligands in their order, and
// the permutation number of the class. For Tetrahedral, Permutation 1 means that,
// seen from Ligands[0], the other ligands run anticlockwise (@), 2 clockwise (@@).
type Stereo struct {
	Class       StereoClass
	Permutation int
	// Ligands are atom indices in the order the configuration refers to;
	// ImplicitLigand stands for the hydrogen or lone pair that is not a node.
	Ligands []int
}

// ImplicitLigand marks the hydrogen (or lone pair) among Stereo.Ligands.
const ImplicitLigand = -1

// Geometry is the configuration of a double bond.
type Geometry uint8

// Geometries of a double bond, relative to Bond.RefA and Bond.RefB.
const (
	NoGeometry Geometry = iota
	Together            // RefA and RefB on the same side (cis)
	Opposite            // RefA and RefB on opposite sides (trans)
)

// Bond is an edge of the graph.
type Bond struct {
	A, B     int // atom indices
	Order    int // 1, 2, 3 or 4, in a Kekulé form
	Aromatic bool
	// Geometry of a double bond relative to RefA (a neighbour of A) and RefB (a
	// neighbour of B), both atom indices.
	Geometry   Geometry
	RefA, RefB int
}

// Half is one end of a bond seen from the atom at its other end.
type Half struct {
	Atom int // the neighbour
	Bond int // the bond that leads to it
}

// Neighbours lists the bonds of atom i, in ascending bond index. The slice is the
// molecule's own: do not change it.
func (m *Molecule) Neighbours(i int) []Half { return m.adjacency[i] }

// Degree is the number of neighbours of atom i that are nodes.
func (m *Molecule) Degree(i int) int { return len(m.adjacency[i]) }

// BondBetween returns the index of the bond between atoms i and j, or -1.
func (m *Molecule) BondBetween(i, j int) int {
	for _, h := range m.adjacency[i] {
		if h.Atom == j {
			return h.Bond
		}
	}
	return -1
}

// Other returns the atom of bond b that is not atom i.
func (m *Molecule) Other(b, i int) int {
	if m.Bonds[b].A == i {
		return m.Bonds[b].B
	}
	return m.Bonds[b].A
}

// Branch lists the atoms reached from first, a neighbour of hub, without passing hub:
// first itself, then the others, nearest first.
func (m *Molecule) Branch(hub, first int) []int {
	seen := make([]bool, len(m.Atoms))
	seen[hub], seen[first] = true, true
	list := []int{first}
	for k := 0; k < len(list); k++ {
		for _, h := range m.adjacency[list[k]] {
			if !seen[h.Atom] {
				seen[h.Atom] = true
				list = append(list, h.Atom)
			}
		}
	}
	return list
}

// Valence is the sum of the bond orders of atom i, its hydrogens included.
func (m *Molecule) Valence(i int) int {
	v := m.Atoms[i].Hydrogens
	for _, h := range m.adjacency[i] {
		v += m.Bonds[h.Bond].Order
	}
	return v
}

// AtomByMap returns the index of the atom that carries map number n, or -1. Where
// several carry it, the first in the input is meant.
func (m *Molecule) AtomByMap(n int) int {
	for i := range m.Atoms {
		if m.Atoms[i].Map == n {
			return i
		}
	}
	return -1
}

// Error is a refusal of input, placed for a chemist: what was read, where, why it
// cannot be used, and what to do.
type Error struct {
	File   string // empty for text from the command line
	Line   int    // from 1; 0 when the input has no lines
	Column int    // from 1, in characters
	Text   string // the offending line or SMILES
	Reason string // what is wrong; lower case, no final stop
	Remedy string // what to do about it; may be empty
}

// Error gives the refusal in one line; see [Error.Excerpt] for the caret.
func (e *Error) Error() string {
	where := ""
	if e.File != "" {
		where = e.File + ": "
	}
	if e.Line > 0 {
		where += fmt.Sprintf("line %d, ", e.Line)
	}
	if e.Column > 0 {
		where += fmt.Sprintf("column %d: ", e.Column)
	} else if e.Line > 0 {
		where = where[:len(where)-2] + ": "
	}
	s := where + e.Reason
	if e.Remedy != "" {
		s += "; " + e.Remedy
	}
	return s
}
