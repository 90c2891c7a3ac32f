package frontier

import "lobecast/frontier/molecule"

// Class names the kind of a centre to which a parameter set gives h, and to whose
// pairs it gives k: for instance "C", "N1", "N2 aryl amine". The classes are listed
// in class.go.
type Class string

// Centre is one p orbital (or one hyperconjugating alkyl group) of a π system.
type Centre struct {
	Atom      int     // index into Molecule.Atoms; of an alkyl group, its attached carbon
	Class     Class   // decides h and, in pairs, k
	Electrons float64 // what it brings; resonance-equivalent centres share (1.5 each in a carboxylate O O)
	Alkyl     bool    // hyperconjugating alkyl group, heteroatom model; not counted in pi_atoms
}

// Link is a resonance integral between two centres.
type Link struct {
	I, J int      // centre indices, I < J
	Cos  float64  // cos θ of a stated twist, 1 otherwise
	Kind LinkKind // of a link between two carbons
}

// Inductive is a shift of h of one π carbon by a neighbour: by a group without an
// orbital of the π system (CF3, a sulfonyl S, an ammonium N …), or by a π heteroatom.
type Inductive struct {
	Centre int    // the shifted carbon
	Cause  string // "CX3", "SO2", "NR3+", …; see inductives in class.go
}

// Pi is what perception finds in a molecule: its centres, their links, and how they
// fall into separate systems. It does not depend on a parameter set; see [Set.Matrix].
type Pi struct {
	Molecule *molecule.Molecule
	Centres  []Centre
	Links    []Link
	// Systems lists the centres of each separate π system, the conjugated ones first,
	// by lowest atom; a local π bond (the second π bond of an alkyne, …) is a system
	// of its own, marked in Local.
	Systems [][]int
	Local   []bool
	// CentreOf maps an atom to its conjugated centre, -1 where it has none. (A local
	// π bond's centres are found through Systems only.)
	CentreOf []int
	// Inductive lists what shifts h of a π carbon, ascending by centre; the value of
	// each kind is a parameter of the set, "inductive …".
	Inductive []Inductive
	// Warnings are statements for the report: possible twists, radicals, and so on.
	Warnings []string
}
