package molecule

import (
	"fmt"
	"slices"
)

// readStereo turns the marks @ and / \ into configurations.
func (p *smilesParser) readStereo(m *Molecule) error {
	for i := range p.atoms {
		if p.atoms[i].class != NoStereo {
			if err := p.readCentre(m, i); err != nil {
				return err
			}
		}
	}
	return p.readGeometry(m)
}

// readCentre reads the configuration written at atom i.
func (p *smilesParser) readCentre(m *Molecule, i int) error {
	r := &p.atoms[i]
	class := r.class
	if r.short && p.cumulated(m, i) {
		class = Allenal
	}
	if r.aromatic && class == Tetrahedral && r.short && len(m.adjacency[i])+r.hydrogens < 3 {
		return refuse(p.s, r.start, "an aromatic atom with two neighbours has no configuration", "remove the @")
	}
	if class == Allenal {
		ligands, ok := p.allenalLigands(m, i)
		if !ok {
			return refuse(p.s, r.start, "@AL belongs to the middle atom of an even number of cumulated double bonds whose ends carry two different ligands each", "remove it, or check the double bonds")
		}
		m.Atoms[i].Stereo = Stereo{Class: Allenal, Permutation: r.permutation, Ligands: ligands}
		return nil
	}
	atoms, from := p.orderedNeighbours(m, i)
	want := ligandCount[class]
	have := len(atoms) + r.hydrogens
	switch {
	case r.hydrogens > 1:
		return refuse(p.s, r.start, fmt.Sprintf("an atom with %d hydrogens has no configuration", r.hydrogens), "remove the @")
	case have == want:
	case class == Tetrahedral && have == 3 && r.hydrogens == 0 || class != Tetrahedral && have == want-1:
		// The lone pair, or an empty position, is the last ligand.
	default:
		return refuse(p.s, r.start, fmt.Sprintf("a %s centre has %d ligands, this atom has %d", className(class), want, have), "check the neighbours, or remove the @")
	}
	ligands := make([]int, 0, want)
	if from {
		ligands = append(ligands, atoms[0])
		atoms = atoms[1:]
	}
	if r.hydrogens == 1 {
		ligands = append(ligands, ImplicitLigand)
	}
	ligands = append(ligands, atoms...)
	if have < want {
		ligands = append(ligands, ImplicitLigand)
	}
	m.Atoms[i].Stereo = Stereo{Class: class, Permutation: r.permutation, Ligands: ligands}
	return nil
}

func className(c StereoClass) string {
	return [...]string{"", "tetrahedral", "allenal", "square-planar", "trigonal-bipyramidal", "octahedral"}[c]
}

// keepsLonePair tells whether the lone pair of an element at a double bond counts as a
// ligand: N, P, As.
func keepsLonePair(element int) bool { return element == 7 || element == 15 || element == 33 }

// cumulated tells whether atom i stands between two double bonds.
func (p *smilesParser) cumulated(m *Molecule, i int) bool {
	adj := m.adjacency[i]
	return len(adj) == 2 && m.Bonds[adj[0].Bond].Order == 2 && m.Bonds[adj[1].Bond].Order == 2
}

// allenalLigands lists the four ligands at the ends of the cumulated chain through
// atom i, in the order of the text: the end written first comes first.
func (p *smilesParser) allenalLigands(m *Molecule, i int) ([]int, bool) {
	if !p.cumulated(m, i) {
		return nil, false
	}
	ligands := make([]int, 0, 4)
	lengths := [2]int{}
	order, _ := p.orderedNeighbours(m, i)
	for side, first := range order {
		at, from := first, i
		length := 1
		for p.cumulated(m, at) {
			h := m.adjacency[at][0]
			if h.Atom == from {
				h = m.adjacency[at][1]
			}
			at, from = h.Atom, at
			length++
			if length > len(m.Atoms) {
				return nil, false
			}
		}
		lengths[side] = length
		atoms, preceded := p.orderedNeighbours(m, at)
		h := m.Atoms[at].Hydrogens
		if h > 1 || h+len(atoms) > 3 {
			return nil, false
		}
		if h == 0 && len(atoms) == 2 && !keepsLonePair(m.Atoms[at].Element) {
			return nil, false
		}
		n := len(ligands)
		for k := 0; k <= len(atoms); k++ {
			// The hydrogen, or the lone pair of an end with one ligand, counts as written
			// behind the atom that leads here, if any does.
			if first := k == 0 && !preceded || k == 1 && preceded; first && len(atoms) == 2 {
				ligands = append(ligands, ImplicitLigand)
			}
			if k < len(atoms) && atoms[k] != from {
				ligands = append(ligands, atoms[k])
			}
		}
		if len(ligands) != n+2 {
			return nil, false
		}
	}
	for _, a := range ligands[:2] {
		if a != ImplicitLigand && (a == ligands[2] || a == ligands[3]) {
			return nil, false // a ring of four holds its ends in one plane
		}
	}
	return ligands, lengths[0] == lengths[1]
}

// readGeometry turns the directions of single bonds into the configuration of the
// double bonds between them. A chain of an odd number of cumulated double bonds
// carries its configuration on the middle bond, with references at the chain ends.
func (p *smilesParser) readGeometry(m *Molecule) error {
	if !slices.ContainsFunc(p.bonds, func(r rawBond) bool { return r.symbol == '/' || r.symbol == '\\' }) {
		return nil
	}
	for b := range m.Bonds {
		if m.Bonds[b].Order != 2 {
			continue
		}
		endA, beforeA, lenA := p.endOfChain(m, m.Bonds[b].A, m.Bonds[b].B, b)
		endB, beforeB, lenB := p.endOfChain(m, m.Bonds[b].B, m.Bonds[b].A, b)
		if lenA != lenB || endA < 0 || endB < 0 {
			continue
		}
		refA, upA, clashA := p.direction(m, endA, beforeA)
		refB, upB, clashB := p.direction(m, endB, beforeB)
		if refA < 0 || refB < 0 {
			continue
		}
		if clashA || clashB {
			if clashB && !clashA {
				endA = endB
			}
			return refuse(p.s, p.atoms[endA].start, "both substituents of the double bond are marked to lie on the same side", "turn one of the marks / and \\")
		}
		g := Opposite
		if upA == upB {
			g = Together
		}
		m.Bonds[b].Geometry, m.Bonds[b].RefA, m.Bonds[b].RefB = g, refA, refB
	}
	return nil
}

// endOfChain follows cumulated double bonds outward from bond b through atom at.
func (p *smilesParser) endOfChain(m *Molecule, at, from, b int) (end, before, length int) {
	for p.cumulated(m, at) {
		h := m.adjacency[at][0]
		if h.Atom == from {
			h = m.adjacency[at][1]
		}
		if h.Bond == b || length > len(m.Atoms) {
			return -1, -1, length
		}
		at, from = h.Atom, at
		length++
	}
	return at, from, length
}

// direction finds a marked bond at atom end; up tells whether its neighbour lies above.
// Two marked bonds that say the same clash.
func (p *smilesParser) direction(m *Molecule, end, before int) (ref int, up, clash bool) {
	ref = -1
	for _, h := range m.adjacency[end] {
		r := &p.bonds[h.Bond]
		if h.Atom == before || r.symbol != '/' && r.symbol != '\\' {
			continue
		}
		u := r.symbol == '/'
		if int(r.b) == end {
			u = !u
		}
		if ref < 0 {
			ref, up = h.Atom, u
			continue
		}
		clash = u == up
	}
	return ref, up, clash
}
