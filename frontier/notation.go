package frontier

// Groups that can legally be written with more than one set of bond orders and
// charges are brought to one of them here, in the working copy only. What remains
// different afterwards (where a charge sits along a conjugated chain) is settled in
// charge.go.

// hypervalent says whether atom i is a main-group atom beyond the octet of a π atom
// (sulfoxide, sulfone, phosphoryl, iodane, perchlorate …): its multiple bonds are
// treated as single bonds to charged ligands, and it has no p orbital.
func (p *perception) hypervalent(i int) bool {
	s := p.sigma[i]
	switch p.m.Atoms[i].Element {
	case 16, 34, 52:
		return s >= 3
	case 15, 33, 51:
		return s >= 4 || s == 3 && p.m.Valence(i) >= 5
	case 17, 35, 53:
		return s >= 2
	case 14, 32:
		return s >= 4
	}
	return false
}

// unifyNotation rewrites pentavalent nitrogen, tetravalent two-coordinate chalcogen
// and hypervalent atoms with charges, and propargyl-allenyl pairs with the triple bond.
func (p *perception) unifyNotation() {
	m := p.m
	for i := range m.Atoms {
		switch z := m.Atoms[i].Element; {
		case z == 7 && p.charge[i] == 0:
			for p.valence(i) >= 5 {
				if !p.separate(i) {
					break
				}
			}
		case (z == 16 || z == 34 || z == 52) && p.sigma[i] == 2 && p.charge[i] == 0 && p.valence(i) == 4:
			p.separate(i)
		case p.hypervalent(i):
			for p.separate(i) {
			}
		case z == 5 && p.charge[i] < 0:
			// B−=X+ is the same as B–X
			for _, h := range m.Neighbours(i) {
				if p.order[h.Bond] == 2 && p.charge[h.Atom] > 0 {
					p.order[h.Bond] = 1
					p.charge[i]++
					p.charge[h.Atom]--
				}
			}
		}
	}
	for i := range m.Atoms {
		p.straighten(i)
	}
	for i := range m.Atoms {
		for _, h := range m.Neighbours(i) {
			switch p.order[h.Bond] {
			case 2:
				p.double[i]++
			case 3:
				p.triple[i]++
			}
		}
	}
}

func (p *perception) valence(i int) int {
	v := p.m.Atoms[i].Hydrogens
	for _, h := range p.m.Neighbours(i) {
		v += int(p.order[h.Bond])
	}
	return v
}

// separate turns one multiple bond of atom i into a bond lower by one, with a positive
// charge on i and a negative one on the neighbour: on oxygen rather than on sulfur,
// nitrogen, carbon. A double bond is taken before a triple one. It reports whether
// there was one.
func (p *perception) separate(i int) bool {
	best, rank := -1, 1<<30
	for _, h := range p.m.Neighbours(i) {
		if p.order[h.Bond] < 2 {
			continue
		}
		r := 10 * int(p.order[h.Bond])
		switch p.m.Atoms[h.Atom].Element {
		case 8:
			r += 1
		case 16, 34, 52:
			r += 2
		case 7:
			r += 3
		default:
			r += 4
		}
		if p.charge[h.Atom] > 0 {
			r-- // takes up the charge where it is
		}
		if r < rank {
			best, rank = h.Bond, r
		}
	}
	if best < 0 {
		return false
	}
	j := p.m.Other(best, i)
	p.order[best]--
	p.charge[i]++
	p.charge[j]--
	return true
}

// straighten turns X=Y=Z, where X is a linear end that carries a charge or an unpaired
// electron, into X≡Y–Z with that charge on Z: [N-]=[N+]=N into N#[N+]-[N-], and so
// for diazo compounds, nitrile oxides, imines and ylides, propargyl ions, ketenyl and
// cyanate ions. Acylium and nitrilium ions written with C+ get their triple bond.
func (p *perception) straighten(x int) {
	m := p.m
	z := m.Atoms[x].Element
	if !(z == 6 && p.sigma[x] == 2 || z == 7 && p.sigma[x] == 1) {
		return
	}
	bond := -1
	for _, h := range m.Neighbours(x) {
		switch p.order[h.Bond] {
		case 2:
			if bond >= 0 {
				return
			}
			bond = h.Bond
		case 3:
			return
		}
	}
	if bond < 0 {
		return
	}
	y := m.Other(bond, x)
	for _, h := range m.Neighbours(y) {
		if h.Bond == bond || p.order[h.Bond] != 2 || p.sigma[y] != 2 {
			continue
		}
		if p.charge[x] == 0 && m.Atoms[x].Unpaired == 0 {
			continue
		}
		p.order[bond], p.order[h.Bond] = 3, 1
		c := p.charge[x]
		p.charge[x], p.charge[h.Atom] = 0, p.charge[h.Atom]+c
		return
	}
	if z == 6 && p.charge[x] > 0 && p.charge[y] == 0 {
		switch m.Atoms[y].Element {
		case 7, 8, 16:
			p.order[bond] = 3
			p.charge[x], p.charge[y] = 0, 1
		}
	}
}
