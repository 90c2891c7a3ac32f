package reactivity

import "lobecast/frontier/molecule"

// findDipoles lists the 1,3-dipoles x–y–z: azide, diazo, nitrone, nitrile oxide,
// nitrile imine, nitrile ylide, azomethine imine and ylide, carbonyl oxide, imine and
// ylide, thiocarbonyl ylide, ozone, nitrous oxide (Huisgen, Angew. Chem. Int. Ed.
// 1963, 2, 565). Charge-separated and hypervalent notation, with the charges at
// either end, are the same dipole: what counts is the chain of atoms, the total charge
// and the sum of its bond orders.
func (f *endFinder) findDipoles() {
	m := f.m
	for y := range m.Atoms {
		switch m.Atoms[y].Element {
		case 7, 8, 16:
		default:
			continue
		}
		near := m.Neighbours(y)
		for p := range near {
			for q := p + 1; q < len(near); q++ {
				f.tryDipole(near[p], y, near[q])
			}
		}
	}
}

// tryDipole judges the chain x–y–z.
func (f *endFinder) tryDipole(hx molecule.Half, y int, hz molecule.Half) {
	m := f.m
	x, z := hx.Atom, hz.Atom
	bx, bz := m.Bonds[hx.Bond], m.Bonds[hz.Bond]
	for _, h := range [2]molecule.Half{hx, hz} {
		for _, k := range [2]int{h.Atom, y} {
			if len(f.m.Neighbours(k)) > 3 {
				return
			}
		}
	}
	if m.Atoms[y].Hydrogens > 0 && m.Atoms[y].Element != 7 {
		return
	}
	orders := bx.Order + bz.Order
	centre := m.Atoms[y].Charge
	others := m.Degree(y) - 2 + m.Atoms[y].Hydrogens
	// y must be the onium atom: a positive charge, or the raised valence of N
	onium := centre == 1 || m.Atoms[y].Element == 7 && centre == 0 && m.Valence(y) == 5 ||
		m.Atoms[y].Element == 16 && centre == 0 && m.Valence(y) == 4 ||
		m.Atoms[y].Element == 8 && centre == 0 && m.Valence(y) == 4
	if !onium {
		return
	}
	linear := others == 0 && m.Atoms[y].Element == 7
	if m.Atoms[y].Element == 7 && !linear && others != 1 || m.Atoms[y].Element != 7 && others != 0 {
		return
	}
	// the chain carries four π electrons in the ends: bond orders 4 (linear) or 3
	// (bent) with one negative end, or one more in hypervalent notation
	charge := centre + m.Atoms[x].Charge + m.Atoms[z].Charge
	need := 3
	if linear {
		need = 4
	}
	negative := m.Atoms[x].Charge < 0 || m.Atoms[z].Charge < 0
	switch {
	case centre == 1 && orders == need && negative:
	case centre == 0 && orders == need+1 && !negative:
	default:
		return
	}
	if charge > 0 {
		return
	}
	// neither end may be an anion on a nitro or azoxy oxygen pair
	e := End{Role: RoleDipole, Atoms: []int{x, y, z}, Linear: linear}
	if m.Atoms[y].Element == 7 && !linear {
		if isOxide(m, x) && isOxide(m, z) {
			return // nitro
		}
		if (bx.Aromatic && bz.Aromatic) || (isOxide(m, x) || isOxide(m, z)) && (bx.Aromatic || bz.Aromatic) {
			return // an azine N-oxide; a ring of the azolium type
		}
		e.Aromatic = bx.Aromatic || bz.Aromatic
	}
	e.Kind = f.dipoleWord(&e)
	if e.Kind == "" {
		return
	}
	f.inDipole[hx.Bond], f.inDipole[hz.Bond] = true, true
	f.ends.Dipoles = append(f.ends.Dipoles, e)
}

// isOxide says whether an atom is an oxygen with no other neighbour.
func isOxide(m *molecule.Molecule, i int) bool {
	return m.Atoms[i].Element == 8 && m.Degree(i) == 1 && m.Atoms[i].Hydrogens == 0
}

// dipoleWord names a dipole, orders its atoms as the name does (the carbon or the
// substituted nitrogen first) and, for the linear ones, says which π bond stays.
func (f *endFinder) dipoleWord(e *End) string {
	m := f.m
	x, y, z := e.Atoms[0], e.Atoms[1], e.Atoms[2]
	zx, zz := m.Atoms[x].Element, m.Atoms[z].Element
	// the heavier hand last: C before N before O; of two N the substituted one first
	substituted := func(i int) bool { return m.Degree(i) > 1 || m.Atoms[i].Hydrogens > 0 }
	if zx > zz || zx == zz && !substituted(x) && substituted(z) {
		x, z, zx, zz = z, x, zz, zx
		e.Atoms[0], e.Atoms[2] = x, z
	}
	if e.Linear {
		bare := !substituted(z)
		switch {
		case zx == 7 && zz == 7 && bare:
			e.Keeps = 2
			return "azide"
		case zx == 7 && zz == 8:
			if substituted(x) {
				return ""
			}
			e.Keeps = 0
			return "nitrous oxide"
		case zx == 6 && zz == 7 && bare && m.Degree(x)+m.Atoms[x].Hydrogens == 3:
			e.Keeps = 2
			return "diazo"
		case zx == 6 && zz == 7 && m.Degree(x)+m.Atoms[x].Hydrogens <= 2:
			e.Keeps = 0
			return "nitrile imine"
		case zx == 6 && zz == 8 && m.Degree(x)+m.Atoms[x].Hydrogens <= 2:
			e.Keeps = 0
			return "nitrile oxide"
		case zx == 6 && zz == 6:
			// the nitrilium carbon has one substituent, the ylide carbon two
			if m.Degree(x)+m.Atoms[x].Hydrogens > m.Degree(z)+m.Atoms[z].Hydrogens {
				e.Atoms[0], e.Atoms[2] = z, x
			}
			e.Keeps = 0
			return "nitrile ylide"
		}
		return ""
	}
	switch m.Atoms[y].Element {
	case 7:
		switch {
		case zx == 6 && zz == 8:
			if !isOxide(m, z) {
				return ""
			}
			return "nitrone"
		case zx == 6 && zz == 7:
			return "azomethine imine"
		case zx == 6 && zz == 6:
			return "azomethine ylide"
		}
	case 8:
		switch {
		case zx == 8 && zz == 8:
			return "ozone"
		case zx == 6 && zz == 8:
			return "carbonyl oxide"
		case zx == 6 && zz == 7:
			return "carbonyl imine"
		case zx == 6 && zz == 6:
			return "carbonyl ylide"
		}
	case 16:
		if zx == 6 && zz == 6 {
			return "thiocarbonyl ylide"
		}
	}
	return ""
}
