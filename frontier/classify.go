package frontier

// classify gives the class of an orbital's centre from element, σ neighbours and the
// electrons it holds after charges were settled.
func (p *perception) classify(o int32) Class {
	i := p.atom(o)
	e := p.share[o]
	if int(o) >= p.n && p.e[o] == 2 { // second lone pair of a chain end
		switch p.m.Atoms[i].Element {
		case 8:
			if p.charge[i] < 0 {
				return p.oxygenClass(i, p.share[i])
			}
			return "O2"
		case 7:
			if p.charge[i] < 0 {
				return "N-"
			}
			return "N2"
		default:
			if p.charge[i] < 0 {
				return "S-"
			}
			return "S2"
		}
	}
	switch p.m.Atoms[i].Element {
	case 6:
		return "C"
	case 7:
		return p.nitrogenClass(i, e)
	case 8:
		return p.oxygenClass(i, e)
	case 16:
		return p.sulfurClass(i, e)
	case 34, 52:
		if e > 1.01 {
			return "Se2"
		}
		return "Se1"
	case 9:
		return "F"
	case 17:
		return "Cl"
	case 35:
		return "Br"
	case 53:
		return "I"
	case 15, 33:
		if e > 1.01 {
			return "P2"
		}
		return "P1"
	case 5:
		return "B"
	case 14, 32:
		return "Si"
	}
	return "C"
}

// shared says whether e is the share of a delocalized charge.
func shared(e float64) bool { return e > 1.01 && e < 1.99 }

func (p *perception) nitrogenClass(i int, e float64) Class {
	m := p.m
	if p.linear[i] {
		switch {
		case p.charge[i] > 0:
			return "N+ dipole"
		case e > 1.01:
			return "N- dipole"
		}
		for _, h := range m.Neighbours(i) {
			if m.Atoms[h.Atom].Element == 7 {
				return "N1 diazonium"
			}
		}
		return "N1 nitrile"
	}
	if p.sigma[i] == 3 {
		switch {
		case e > 1.99:
			return p.aminoClass(i)
		case shared(e):
			return "N amidinium"
		}
		oxides, anionic := 0, false
		for _, h := range m.Neighbours(i) {
			if m.Atoms[h.Atom].Element == 8 && p.sigma[h.Atom] == 1 {
				oxides++
				anionic = anionic || p.share[h.Atom] > 1.01
			}
		}
		switch {
		case oxides >= 2:
			return "N+ nitro"
		case oxides == 1 && anionic:
			return "N+ oxide"
		case p.ringPi[i]:
			return "N+ azinium"
		}
		return "N+ iminium"
	}
	if e > 1.01 {
		if p.ring5[i] {
			return "N- azolide"
		}
		for _, h := range m.Neighbours(i) {
			if m.Atoms[h.Atom].Element == 7 && p.has[h.Atom] && p.positive(h.Atom) {
				return "N- dipole"
			}
		}
		return "N-"
	}
	if e < 0.01 && p.charge[i] > 0 {
		return "N+"
	}
	switch {
	case p.ring6[i]:
		return "N1 azine"
	case p.ring5[i]:
		return "N1 azole"
	}
	single := false
	for _, h := range m.Neighbours(i) {
		switch m.Atoms[h.Atom].Element {
		case 8:
			if p.sigma[h.Atom] == 1 {
				return "N1 nitroso"
			}
			single = true
		case 7:
			if p.sigma[h.Atom] == 2 && p.share[h.Atom] < 1.01 && p.has[h.Atom] {
				return "N1 azo"
			}
			single = true
		}
	}
	if single {
		return "N1 oxime"
	}
	return "N1 imine"
}

// acyl says whether atom j is a π carbon with a one-coordinate O or S: carbonyl,
// thiocarbonyl.
func (p *perception) acyl(j int) bool {
	return p.m.Atoms[j].Element == 6 && p.has[j] && !p.linear[j] && p.oxides(j) > 0
}

// aminoClass is the class of a three-coordinate N with its lone pair.
func (p *perception) aminoClass(i int) Class {
	m := p.m
	acyls, inRing, sulfonyl, hetero, pis, amidine := 0, false, false, false, 0, false
	var acylCarbon int
	for _, h := range m.Neighbours(i) {
		j := h.Atom
		switch z := m.Atoms[j].Element; {
		case z == 6 && p.has[j]:
			pis++
			if p.acyl(j) {
				acyls++
				acylCarbon = j
			} else if !p.ringPi[j] {
				for _, g := range m.Neighbours(j) {
					if g.Atom != i && m.Atoms[g.Atom].Element == 7 && p.sigma[g.Atom] == 2 {
						amidine = true
					}
				}
			}
		case p.hypervalent(j):
			sulfonyl = true
		case z == 7 || z == 8:
			hetero = true
			if p.has[j] {
				pis++
			}
		case p.has[j]:
			pis++
		}
	}
	if p.ringPi[i] {
		inRing = p.oxoRing(i)
	}
	switch {
	case acyls >= 2:
		return "N2 imide"
	case inRing:
		return "N2 pyridone"
	case p.ring5[i] && (acyls > 0 || sulfonyl):
		return "N2 acylpyrrole"
	case p.ring5[i]:
		return "N2 pyrrole"
	case sulfonyl:
		return "N2 sulfonamide"
	case acyls == 1:
		for _, g := range m.Neighbours(acylCarbon) {
			switch {
			case g.Atom == i:
			case m.Atoms[g.Atom].Element == 8 && p.sigma[g.Atom] == 2:
				return "N2 carbamate"
			case m.Atoms[g.Atom].Element == 7:
				return "N2 urea"
			}
		}
		return "N2 amide"
	case hetero:
		return "N2 hydrazine"
	case amidine:
		return "N2 amidine"
	case pis >= 2:
		return "N2 diarylamine"
	}
	return "N2 amine"
}

// oxoRing says whether atom i lies in a ring of π atoms that holds a C=O carbon.
func (p *perception) oxoRing(i int) bool {
	for _, r := range p.m.RingsOf(i) {
		ring := p.m.Rings()[r]
		if len(ring) > 8 {
			continue
		}
		oxo := false
		all := true
		for _, a := range ring {
			all = all && p.has[a]
			oxo = oxo || p.acyl(a)
		}
		if all && oxo {
			return true
		}
	}
	return false
}

func (p *perception) oxygenClass(i int, e float64) Class {
	m := p.m
	if p.linear[i] {
		return "O+"
	}
	if p.sigma[i] == 1 {
		j := m.Neighbours(i)
		if len(j) == 0 {
			return "O-"
		}
		to := j[0].Atom
		z := m.Atoms[to].Element
		switch {
		case e > 1.01 && z == 7 && p.oxides(to) >= 2:
			return "O nitro"
		case e > 1.01 && z == 7:
			return "O- oxide"
		case shared(e) && z == 6:
			return "O carboxylate"
		case e > 1.01 && z == 6:
			return "O- phenolate"
		case e > 1.01:
			return "O-"
		case z == 7:
			return "O1 nitroso"
		case z != 6:
			return "O1"
		case p.linear[to]:
			return "O1 cumulene"
		case p.ringPi[to]:
			return "O1 ring"
		}
		nitrogen, oxygen, acid, halogen := false, false, false, false
		for _, h := range m.Neighbours(to) {
			switch m.Atoms[h.Atom].Element {
			case 7:
				nitrogen = true
			case 8, 16:
				if h.Atom != i {
					oxygen = true
					acid = acid || p.hydrogens(h.Atom) > 0
				}
			case 9, 17, 35, 53:
				halogen = true
			}
		}
		switch {
		case nitrogen:
			return "O1 amide"
		case acid:
			return "O1 acid"
		case oxygen:
			return "O1 ester"
		case halogen:
			return "O1 acyl halide"
		case p.hydrogens(to) > 0:
			return "O1 aldehyde"
		}
		return "O1 ketone"
	}
	if e < 1.99 {
		return "O+"
	}
	switch {
	case p.ring5[i]:
		return "O2 furan"
	case p.ringPi[i]:
		return "O2 pyran"
	}
	acyl, pis, nitrogen, boron, sulfonyl := false, 0, false, false, false
	for _, h := range m.Neighbours(i) {
		j := h.Atom
		switch z := m.Atoms[j].Element; {
		case p.hypervalent(j) && z != 14 && z != 32:
			sulfonyl = true
		case z == 7:
			nitrogen = true
		case z == 5:
			boron = true
		case p.acyl(j):
			acyl = true
			pis++
		case p.has[j]:
			pis++
		}
	}
	switch {
	case nitrogen:
		return "O2 oxime"
	case sulfonyl:
		return "O2 sulfonate"
	case boron:
		return "O2 boron"
	case acyl && p.hydrogens(i) > 0:
		return "O2 acid"
	case acyl && pis >= 2:
		return "O2 aryl ester"
	case acyl:
		return "O2 ester"
	case p.hydrogens(i) > 0:
		return "O2 hydroxy"
	case pis >= 2:
		return "O2 diaryl ether"
	}
	return "O2 ether"
}

func (p *perception) sulfurClass(i int, e float64) Class {
	switch {
	case p.linear[i]:
		return "S+"
	case p.sigma[i] == 1 && e > 1.01:
		return "S-"
	case p.sigma[i] == 1:
		return "S1"
	case e < 1.99:
		return "S+"
	case p.ringPi[i]:
		return "S2 thiophene"
	}
	for _, h := range p.m.Neighbours(i) {
		if p.acyl(h.Atom) {
			return "S2 thioester"
		}
	}
	return "S2 thioether"
}
