package reactivity

import (
	"fmt"
	"slices"

	"lobecast/frontier/molecule"
)

// Role is the part a π system plays in a cycloaddition.
type Role string

// The roles: a four-centre diene, a three-centre dipole, and the two-centre π bond
// that either of them adds to.
const (
	RoleDiene   Role = "diene"
	RoleDipole  Role = "dipole"
	RolePartner Role = "partner"
)

// End is a π system of one molecule that can take part in a cycloaddition.
type End struct {
	Role Role
	// Kind is the trade's word: "cyclic diene", "1-oxadiene", "furan", "azide",
	// "alkene", "ketone", …
	Kind string
	// Atoms is the path of atom indices: four for a diene, three for a dipole, two for
	// a partner. The first and the last are the ends that take the new bonds.
	Atoms []int
	// Aromatic is set where the addition gives up the aromaticity of a ring.
	Aromatic bool
	// Local is set where the reacting bond is the one in the plane of the ring (an
	// aryne), not the conjugated one.
	Local bool
	// Linear is set for dipoles of the propargyl–allenyl type (azide, diazo, nitrile
	// oxide, …): they keep one π bond, from Atoms[1] to Atoms[Keeps].
	Linear bool
	Keeps  int
}

// First and Last are the two ends that take the new bonds.
func (e *End) First() int { return e.Atoms[0] }

// Last is the other end; see [End.First].
func (e *End) Last() int { return e.Atoms[len(e.Atoms)-1] }

// RefusedEnd is a π system that looks like a diene and cannot react as one.
type RefusedEnd struct {
	Atoms  []int
	Reason string
}

// Ends holds everything in one molecule that can take part in a cycloaddition, each
// kind in the order of its atoms.
type Ends struct {
	Molecule *molecule.Molecule
	Dienes   []End
	Dipoles  []End
	Partners []End
	Refused  []RefusedEnd
}

// FindEnds finds the dienes, 1,3-dipoles and π bonds of a molecule. It looks at the
// graph only; no orbitals are computed. Every legal way of writing a group gives the
// same answer: aromatic rings are rewritten into the Kekulé form that the addition
// needs, and dipoles are recognized in charge-separated and in hypervalent notation.
func FindEnds(m *molecule.Molecule) *Ends {
	f := &endFinder{m: m, ends: &Ends{Molecule: m}}
	f.prepare()
	f.findDipoles()
	f.findDienes()
	f.findPartners()
	return f.ends
}

// endFinder carries what the three searches share.
type endFinder struct {
	m    *molecule.Molecule
	ends *Ends
	// inDipole marks the bonds that belong to a dipole.
	inDipole []bool
	// rings are the smallest rings; ringsOf lists those of each atom; aromatic marks
	// those whose bonds are all aromatic.
	rings    [][]int
	ringsOf  [][]int
	aromatic []bool
}

func (f *endFinder) prepare() {
	m := f.m
	f.inDipole = make([]bool, len(m.Bonds))
	f.rings = m.Rings()
	f.ringsOf = make([][]int, len(m.Atoms))
	f.aromatic = make([]bool, len(f.rings))
	for r, ring := range f.rings {
		f.aromatic[r] = true
		for k, i := range ring {
			f.ringsOf[i] = append(f.ringsOf[i], r)
			b := m.BondBetween(i, ring[(k+1)%len(ring)])
			if b < 0 || !m.Bonds[b].Aromatic {
				f.aromatic[r] = false
			}
		}
	}
}

// fusion says whether an atom lies in more than one aromatic ring.
func (f *endFinder) fusion(i int) bool {
	n := 0
	for _, r := range f.ringsOf[i] {
		if f.aromatic[r] {
			n++
		}
	}
	return n > 1
}

// acidCarbonyl says whether carbon c carries a single-bonded O, N, S or halogen, so
// that its C=O (a carboxylic acid's and its derivatives') takes no part itself. The
// atom but is left out: the neighbour through which a heterodiene runs.
func acidCarbonyl(m *molecule.Molecule, c, but int) bool {
	for _, h := range m.Neighbours(c) {
		if h.Atom == but || m.Bonds[h.Bond].Order != 1 {
			continue
		}
		switch m.Atoms[h.Atom].Element {
		case 7, 8, 9, 16, 17, 35, 53:
			return true
		}
	}
	return false
}

// smallRing returns the smallest ring of at most most atoms that holds the bond
// between i and j, or nil.
func (f *endFinder) smallRing(i, j, most int) []int {
	var best []int
	for _, r := range f.ringsOf[i] {
		ring := f.rings[r]
		if len(ring) > most || !slices.Contains(ring, j) {
			continue
		}
		if adjacentInRing(ring, i, j) && (best == nil || len(ring) < len(best)) {
			best = ring
		}
	}
	return best
}

// adjacentInRing says whether i and j follow each other in a cyclic list.
func adjacentInRing(ring []int, i, j int) bool {
	for k, a := range ring {
		b := ring[(k+1)%len(ring)]
		if a == i && b == j || a == j && b == i {
			return true
		}
	}
	return false
}

// ringNeighbour is the neighbour of i in a cyclic list that is not j.
func ringNeighbour(ring []int, i, j int) int {
	n := len(ring)
	for k, a := range ring {
		if a == i {
			if next := ring[(k+1)%n]; next != j {
				return next
			}
			return ring[(k+n-1)%n]
		}
	}
	return -1
}

// numbersOf writes the numbers of atoms as a chemist counts them: "1-2-3-4".
func numbersOf(m *molecule.Molecule, atoms []int) string {
	s := ""
	for k, i := range atoms {
		if k > 0 {
			s += "-"
		}
		s += fmt.Sprint(m.Atoms[i].Number)
	}
	return s
}
