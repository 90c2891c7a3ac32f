package reactivity

import "lobecast/frontier/molecule"

// view is a molecule with what perception of sites and of neighbours asks over and
// over: classes, distances, kinds of atom.
type view struct {
	m        *molecule.Molecule
	class    []int   // class of each atom, see [molecule.Molecule.Classes]
	distance []int16 // bonds between atoms, row-major; -1 where not connected; made on demand
	queue    []int
}

func newView(m *molecule.Molecule) *view {
	return &view{m: m, class: resonanceClasses(m)}
}

// aromaticCH tells whether an atom is an aromatic carbon that bears hydrogen.
func (v *view) aromaticCH(i int) bool {
	a := &v.m.Atoms[i]
	return a.Element == 6 && a.Aromatic && a.Hydrogens > 0
}

// substitutedAromatic tells whether an atom is an aromatic carbon with a group that is
// not part of a ring with it.
func (v *view) substitutedAromatic(i int) bool {
	a := &v.m.Atoms[i]
	if a.Element != 6 || !a.Aromatic || a.Hydrogens > 0 {
		return false
	}
	for _, h := range v.m.Neighbours(i) {
		if !v.m.BondInRing(h.Bond) {
			return v.m.Bonds[h.Bond].Order == 1
		}
	}
	return false
}

// alkeneCarbon tells whether an atom is a carbon of a C=C that is not aromatic.
func (v *view) alkeneCarbon(i int) bool {
	if v.m.Atoms[i].Element != 6 {
		return false
	}
	for _, h := range v.m.Neighbours(i) {
		b := &v.m.Bonds[h.Bond]
		if b.Order == 2 && !b.Aromatic && v.m.Atoms[h.Atom].Element == 6 {
			return true
		}
	}
	return false
}

// donorAlkeneCH tells whether an atom is the CH of a C=C whose other carbon bears an
// oxygen, nitrogen or sulfur with a lone pair: the β carbon of an enamine or enol ether.
func (v *view) donorAlkeneCH(i int) bool {
	m := v.m
	if m.Atoms[i].Element != 6 || m.Atoms[i].Hydrogens == 0 {
		return false
	}
	for _, h := range m.Neighbours(i) {
		b := &m.Bonds[h.Bond]
		if b.Order != 2 || b.Aromatic || m.Atoms[h.Atom].Element != 6 {
			continue
		}
		for _, d := range m.Neighbours(h.Atom) {
			z := m.Atoms[d.Atom].Element
			if d.Atom != i && m.Bonds[d.Bond].Order == 1 && (z == 7 || z == 8 || z == 16) &&
				m.Atoms[d.Atom].Charge <= 0 && v.mostOrder(d.Atom) == 1 {
				return true
			}
		}
	}
	return false
}

// unsaturatedCarbon tells whether an atom is an aromatic or vinylic carbon.
func (v *view) unsaturatedCarbon(i int) bool {
	return v.m.Atoms[i].Element == 6 && (v.m.Atoms[i].Aromatic || v.alkeneCarbon(i))
}

// acceptorCarbon tells whether a nucleophile may add to an atom: the carbon of C=O,
// C=S, C=N, C≡N; the β and δ carbons of an acceptor; C–H of an azine or azinium ion; the
// carbons of a pyrylium ring. Carbocations are looked at apart, see [chargeShifts].
func (v *view) acceptorCarbon(i int) bool {
	m := v.m
	a := &m.Atoms[i]
	if a.Element != 6 {
		return false
	}
	if a.Aromatic {
		return a.Hydrogens > 0 && v.azineCarbon(i) || v.pyryliumCarbon(i)
	}
	for _, h := range m.Neighbours(i) {
		b := &m.Bonds[h.Bond]
		if b.Order >= 2 && !b.Aromatic {
			switch m.Atoms[h.Atom].Element {
			case 7, 8, 16:
				return true
			}
		}
	}
	return v.vinylogous(i, 2)
}

// vinylogous tells whether atom i is the far end of a C=C or C≡C whose near end bears
// an acceptor, directly or through up to depth−1 more double bonds.
func (v *view) vinylogous(i, depth int) bool {
	m := v.m
	if depth == 0 {
		return false
	}
	for _, h := range m.Neighbours(i) {
		b := &m.Bonds[h.Bond]
		if b.Order < 2 || b.Aromatic || m.Atoms[h.Atom].Element != 6 {
			continue
		}
		for _, d := range m.Neighbours(h.Atom) {
			if d.Atom == i {
				continue
			}
			if v.acceptor(d.Atom) || m.Atoms[d.Atom].Element == 6 && m.Bonds[d.Bond].Order == 1 && v.vinylogous(d.Atom, depth-1) {
				return true
			}
		}
	}
	return false
}

// acceptor tells whether an atom, bound to a C=C, draws its electrons: the atom of
// C=O, C=N, C≡N, NO2, SO2, S=O, P=O, an azine carbon ortho or para to its nitrogen.
func (v *view) acceptor(i int) bool {
	m := v.m
	a := &m.Atoms[i]
	switch a.Element {
	case 6:
		if a.Aromatic {
			return v.beside(i)
		}
		for _, h := range m.Neighbours(i) {
			b := &m.Bonds[h.Bond]
			z := m.Atoms[h.Atom].Element
			if b.Order >= 2 && (z == 7 || z == 8 || z == 16) {
				return true
			}
		}
	case 7:
		return v.oxygens(i) == 2
	case 15, 16:
		return v.oxygens(i) > 0
	}
	return false
}

// azineCarbon tells whether an aromatic carbon lies in a six-membered ring with a
// nitrogen that brings one electron, or with the oxygen or sulfur of a pyrylium ion.
func (v *view) azineCarbon(i int) bool {
	for _, r := range v.m.RingsOf(i) {
		ring := v.m.Rings()[r]
		if len(ring) != 6 {
			continue
		}
		for _, x := range ring {
			if v.m.Atoms[x].Element == 7 && v.azaNitrogen(x) || v.pyryliumAtom(x) {
				return true
			}
		}
	}
	return false
}

// pyryliumAtom tells whether an atom is the aromatic oxygen, sulfur or selenium of a
// pyrylium ion.
func (v *view) pyryliumAtom(i int) bool {
	switch a := &v.m.Atoms[i]; a.Element {
	case 8, 16, 34:
		return a.Aromatic && a.Charge > 0
	}
	return false
}

// pyryliumCarbon tells whether an atom lies in the ring of a pyrylium ion: there a
// nucleophile adds to substituted carbons too.
func (v *view) pyryliumCarbon(i int) bool {
	for _, r := range v.m.RingsOf(i) {
		for _, x := range v.m.Rings()[r] {
			if v.pyryliumAtom(x) {
				return true
			}
		}
	}
	return false
}

// azaNitrogen tells whether an aromatic nitrogen brings one electron: pyridine,
// pyridinium, N-3 of imidazole.
func (v *view) azaNitrogen(i int) bool {
	a := &v.m.Atoms[i]
	return a.Aromatic && v.mostOrder(i) == 2
}

// mostOrder is the highest order among the bonds of an atom.
func (v *view) mostOrder(i int) int {
	most := 0
	for _, h := range v.m.Neighbours(i) {
		most = max(most, v.m.Bonds[h.Bond].Order)
	}
	return most
}

// oxygens counts the terminal oxygens of an atom, in either notation of NO2, SO2, PO.
func (v *view) oxygens(i int) int {
	n := 0
	for _, h := range v.m.Neighbours(i) {
		a := &v.m.Atoms[h.Atom]
		if a.Element == 8 && v.m.Degree(h.Atom) == 1 && a.Hydrogens == 0 {
			n++
		}
	}
	return n
}

// halogenOn is the halogen bound to an atom, or -1.
func (v *view) halogenOn(i int) int {
	for _, h := range v.m.Neighbours(i) {
		switch v.m.Atoms[h.Atom].Element {
		case 9, 17, 35, 53:
			return h.Atom
		}
	}
	return -1
}

// bonds is the number of bonds on the shortest path between two atoms, -1 where none.
func (v *view) bonds(i, j int) int {
	n := len(v.m.Atoms)
	if v.distance == nil {
		v.distance = make([]int16, n*n)
		for k := range v.distance {
			v.distance[k] = -2
		}
		v.queue = make([]int, 0, n)
	}
	row := v.distance[i*n : (i+1)*n]
	if row[i] == -2 {
		for k := range row {
			row[k] = -1
		}
		row[i] = 0
		queue := append(v.queue[:0], i)
		for k := 0; k < len(queue); k++ {
			for _, h := range v.m.Neighbours(queue[k]) {
				if row[h.Atom] < 0 {
					row[h.Atom] = row[queue[k]] + 1
					queue = append(queue, h.Atom)
				}
			}
		}
		v.queue = queue
	}
	return int(row[j])
}

// enamineRing tells whether the molecule holds a pyrrole ring, alone or fused: a
// five-membered aromatic ring whose only heteroatom is a nitrogen with a lone pair.
func (v *view) enamineRing() bool {
	m := v.m
	for _, ring := range m.Rings() {
		if len(ring) != 5 || !m.Atoms[ring[0]].Aromatic {
			continue
		}
		nitrogens, others := 0, 0
		for _, i := range ring {
			switch {
			case m.Atoms[i].Element == 7 && v.mostOrder(i) == 1:
				nitrogens++
			case m.Atoms[i].Element != 6:
				others++
			}
		}
		if nitrogens == 1 && others == 0 {
			return true
		}
	}
	return false
}
