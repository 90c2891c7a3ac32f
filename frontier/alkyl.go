package frontier

// findAlkyl lists the hyperconjugating alkyl groups: sp3 carbons on a π carbon, in the
// heteroatom model of the methyl group (one centre of two electrons). Carbons with two
// or three halogens are σ acceptors instead, see findInductive.
func (p *perception) findAlkyl() {
	sp := &p.systems
	sp.bound = sp.bound[:0]
	m := p.m
	for i := range m.Atoms {
		if m.Atoms[i].Element != 6 || p.sigma[i] != 4 || p.has[i] {
			continue
		}
		class, cause := Class(""), ""
		for _, h := range m.Neighbours(i) {
			if m.Atoms[h.Atom].Element != 6 || !p.has[h.Atom] {
				continue
			}
			if class == "" && cause == "" {
				class, cause = p.alkylClass(i)
			}
			if class != "" {
				sp.bound = append(sp.bound, alkylGroup{carbon: i, on: int32(h.Atom), class: class})
			}
		}
	}
}

// alkylClass is the class of an sp3 carbon on a π carbon, empty for a σ acceptor, and
// its inductive cause.
func (p *perception) alkylClass(i int) (Class, string) {
	halogens, hetero, positive := 0, 0, false
	for _, h := range p.m.Neighbours(i) {
		switch z := p.m.Atoms[h.Atom].Element; z {
		case 1, 6:
		case 9, 17, 35, 53:
			halogens++
		default:
			if z != 14 && z != 5 && z != 32 {
				hetero++
			}
			positive = positive || p.charge[h.Atom] > 0 && p.sigma[h.Atom] >= 3 && !p.has[h.Atom] && !p.oxide(h.Atom)
		}
	}
	switch {
	case halogens >= 2:
		return "", "CX3"
	case positive:
		return "alkyl hetero", "CH2Z+"
	case halogens+hetero > 0:
		return "alkyl hetero", "CH2X"
	}
	switch p.hydrogens(i) {
	case 3:
		return "alkyl methyl", "alkyl"
	case 2:
		return "alkyl primary", "alkyl"
	case 1:
		return "alkyl secondary", "alkyl"
	}
	return "alkyl tertiary", "alkyl"
}

// oxide says whether an atom carries a singly bonded O or S of one neighbour (after
// unifyNotation: sulfoxide, sulfone, phosphoryl, amine oxide).
func (p *perception) oxide(i int) bool { return p.oxides(i) > 0 }

func (p *perception) oxides(i int) int {
	n := 0
	for _, h := range p.m.Neighbours(i) {
		switch p.m.Atoms[h.Atom].Element {
		case 8, 16:
			if p.sigma[h.Atom] == 1 {
				n++
			}
		}
	}
	return n
}

// findInductive lists what shifts h of the π carbons; of a linear carbon, both its
// orbitals.
func (p *perception) findInductive(pi *Pi) {
	m := p.m
	for c := range pi.Centres {
		centre := &pi.Centres[c]
		if centre.Class != "C" {
			continue
		}
		for _, h := range m.Neighbours(centre.Atom) {
			if cause := p.inductiveCause(h.Atom); cause != "" {
				pi.Inductive = append(pi.Inductive, Inductive{Centre: c, Cause: cause})
			}
		}
	}
}

// inductiveCause names what atom i does to a π carbon it is bonded to.
func (p *perception) inductiveCause(i int) string {
	z := p.m.Atoms[i].Element
	if p.has[i] {
		if z == 6 {
			return ""
		}
		root := rootClass[rootIndex[classIndex[p.classify(int32(i))]]]
		if root == "C" {
			return ""
		}
		return string(root)
	}
	switch z {
	case 6:
		if p.sigma[i] == 4 {
			_, cause := p.alkylClass(i)
			return cause
		}
	case 7:
		if p.sigma[i] == 4 {
			return "NR3+"
		}
	case 16, 34, 52:
		switch {
		case p.sigma[i] >= 5:
			return "SF5"
		case p.sigma[i] == 4:
			return "SO2"
		case p.sigma[i] == 3 && (p.oxide(i) || p.imide(i)):
			return "SO"
		case p.sigma[i] == 3 && p.charge[i] > 0:
			return "SR2+"
		}
	case 15, 33, 51:
		if p.sigma[i] >= 3 && (p.oxide(i) || p.imide(i)) {
			return "PO"
		}
		if p.sigma[i] == 4 && p.charge[i] > 0 {
			return "PR3+"
		}
	case 14, 32:
		if p.sigma[i] == 4 {
			return "SiR3"
		}
	case 17, 35, 53:
		if p.sigma[i] >= 2 {
			return "IR"
		}
	}
	return ""
}

// imide says whether a two-coordinate negative N stands on atom i (sulfilimine,
// iminophosphorane, after unifyNotation).
func (p *perception) imide(i int) bool {
	for _, h := range p.m.Neighbours(i) {
		if p.m.Atoms[h.Atom].Element == 7 && p.sigma[h.Atom] == 2 && p.charge[h.Atom] < 0 {
			return true
		}
	}
	return false
}
