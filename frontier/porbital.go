package frontier

// assignOrbitals gives every atom its p orbital, with the electrons it holds as drawn
// and those it would hold if the atom were neutral; then decides which lone-pair
// donors and borons join: those bonded to an atom with a p orbital of its own.
func (p *perception) assignOrbitals() {
	m := p.m
	for i := range m.Atoms {
		p.assign(i)
	}
	for i := range m.Atoms {
		if p.role[i] == acceptor && p.beside(i, owner) {
			p.has[i] = true
		}
	}
	for i := range m.Atoms {
		switch p.role[i] {
		case owner:
			p.has[i] = true
		case donor:
			for _, h := range m.Neighbours(i) {
				r := p.role[h.Atom]
				if r == owner || r == acceptor && p.has[h.Atom] {
					p.has[i] = true
					break
				}
			}
		}
	}
	for i := range m.Atoms {
		// O− on an amine N that a cation elsewhere may turn into N+: a quinoid drawing
		// of an N-oxide.
		if p.role[i] != donor || p.has[i] || m.Atoms[i].Element != 8 || p.charge[i] >= 0 || len(m.Neighbours(i)) != 1 {
			continue
		}
		if to := m.Neighbours(i)[0].Atom; p.has[to] && m.Atoms[to].Element == 7 && p.cationic() {
			p.has[i] = true
		}
	}
	for i := range m.Atoms {
		// A carbene beside a lone pair is a singlet: its p orbital is empty.
		if m.Atoms[i].Element == 6 && p.sigma[i] == 2 && p.double[i]+p.triple[i] == 0 && p.charge[i] == 0 && p.role[i] == owner && p.beside(i, donor) {
			p.e[i], p.base[i] = 0, 0
		}
	}
}

// cationic says whether some p orbital is short of an electron.
func (p *perception) cationic() bool {
	for i := range p.m.Atoms {
		if p.has[i] && p.excess(int32(i)) > 0 {
			return true
		}
	}
	return false
}

// beside says whether atom i has a neighbour of that role.
func (p *perception) beside(i int, r role) bool {
	for _, h := range p.m.Neighbours(i) {
		if p.role[h.Atom] == r {
			return true
		}
	}
	return false
}

// set records role, electrons as drawn and electrons when neutral.
func (p *perception) set(i int, r role, e, base int8) {
	p.role[i], p.e[i], p.base[i] = r, e, base
}

// setLinear gives atom i two p orbitals with one electron each.
func (p *perception) setLinear(i int) {
	p.linear[i] = true
	p.set(i, owner, 1, 1)
	p.has[p.n+i], p.e[p.n+i], p.base[p.n+i] = true, 1, 1
}

func (p *perception) assign(i int) {
	a := &p.m.Atoms[i]
	s, c, dbl, trp := p.sigma[i], p.charge[i], p.double[i], p.triple[i]
	if p.hypervalent(i) {
		return
	}
	switch a.Element {
	case 6, 14, 32:
		switch {
		case trp > 0 || dbl > 1:
			p.setLinear(i)
		case dbl == 1:
			p.set(i, owner, 1, 1)
		case s > 3:
		case c > 0:
			p.set(i, owner, 0, 1)
		case c < 0 && s == 3:
			p.set(i, owner, 2, 1)
		case c == 0 && s >= 2: // radical, carbene
			p.set(i, owner, 1, 1)
		}
	case 7, 15, 33:
		switch {
		case trp > 0 || dbl > 1:
			p.setLinear(i)
		case dbl == 1 && s == 3:
			p.set(i, owner, 1, 2)
		case dbl == 1:
			p.set(i, owner, 1, 1)
		case s == 3 && c == 0:
			p.set(i, donor, 2, 2)
		case s == 3 && a.Unpaired > 0: // radical cation
			p.set(i, owner, 1, 2)
		case s == 3 && c > 0: // ylide written with C–N bond only
			p.set(i, outside, 0, 0)
		case s <= 2 && c < 0:
			p.set(i, donor, 2, 1)
		case s == 2 && c > 0:
			p.set(i, owner, 0, 1)
		case s <= 2 && c == 0: // aminyl, nitrene
			p.set(i, owner, 1, 1)
		}
	case 8, 16, 34, 52:
		switch {
		case s > 2:
		case trp > 0:
			p.setLinear(i)
		case dbl > 0 && s == 2:
			p.set(i, owner, 1, 2)
		case dbl > 0:
			p.set(i, owner, 1, 1)
		case s == 2 && c == 0:
			p.set(i, donor, 2, 2)
		case s == 2 && a.Unpaired > 0: // radical cation
			p.set(i, owner, 1, 2)
		case s == 1 && c < 0:
			p.set(i, donor, 2, 1)
		case s == 1 && c == 0: // oxyl radical
			p.set(i, owner, 1, 1)
		}
	case 9, 17, 35, 53:
		switch {
		case s == 1 && dbl == 1:
			p.set(i, owner, 1, 2)
		case s == 1 && c == 0 && trp == 0:
			p.set(i, donor, 2, 2)
		}
	case 5:
		switch {
		case dbl == 1 && s == 3:
			p.set(i, owner, 1, 0)
		case dbl == 1:
			p.set(i, owner, 1, 1)
		case s == 3 && c == 0:
			p.set(i, acceptor, 0, 0)
		}
	}
}
