package frontier

import (
	"lobecast/frontier/molecule"
)

// Protonated is the species an acidic medium makes of m: the most basic nitrogen takes
// one proton. Atom indices stay the same; site is the nitrogen. It reports false, and
// m itself, where no nitrogen is basic enough, or where the structure already states a
// proton on one.
//
// Nitrogens are ordered by an estimate of the pKa of their conjugate acid: a textbook
// value for the parent (pyridine 5.2, imidazole 7.0, aniline 4.6, guanidine 13.6 …)
// with rounded increments for what stands beside it (common practice; values from
// memory). The estimate only has to order sites within one molecule: ring N before
// NH2 in aminoazines, alkylamine before both.
func Protonated(m *molecule.Molecule) (species *molecule.Molecule, site int, ok bool) {
	p := perceptions.Get().(*perception)
	defer perceptions.Put(p)
	p.examine(m)

	site = -1
	var best float64
	var rivals []int
	for i := range m.Atoms {
		if m.Atoms[i].Element != 7 {
			continue
		}
		if m.Atoms[i].Charge > 0 && p.hydrogens(i) > 0 {
			return m, -1, false
		}
		k, basic := p.basicity(i)
		switch {
		case !basic || k < leastBasic:
		case site < 0 || k > best+1e-9:
			site, best, rivals = i, k, append(rivals[:0], i)
		case k > best-1e-9:
			rivals = append(rivals, i)
		}
	}
	if site < 0 {
		return m, -1, false
	}
	if len(rivals) > 1 {
		site = richest(m, rivals)
	}
	e := m.Edit()
	e.Atom(site).Charge++
	e.SetHydrogens(site, m.Atoms[site].Hydrogens+1)
	species, err := e.Done()
	if err != nil {
		return m, -1, false
	}
	return species, site, true
}

// leastBasic is the pKa of the weakest conjugate acid still formed in strong acid.
const leastBasic = -4.0

// mostCompared is the number of π centres up to which the populations of equally basic
// nitrogens are computed to choose between them.
const mostCompared = 256

// richest picks among equally basic nitrogens the one with the largest π population in
// the default set, then the first in the canonical numbering.
func richest(m *molecule.Molecule, rivals []int) int {
	rank := m.CanonicalOrder()
	population := func(int) float64 { return 0 }
	if set, err := loadEmbedded(DefaultSet); err == nil {
		if pi, err := Perceive(m, Options{Cap: mostCompared}); err == nil {
			if sol, err := set.Solve(pi); err == nil {
				population = func(atom int) float64 {
					s, l, ok := sol.Find(atom)
					if !ok {
						return 0
					}
					return sol.Systems[s].BondOrder(l, l)
				}
			}
		}
	}
	best := rivals[0]
	for _, r := range rivals[1:] {
		d := population(r) - population(best)
		if d > 1e-9 || d > -1e-9 && rank[r] < rank[best] {
			best = r
		}
	}
	return best
}

// basicity estimates the pKa of the conjugate acid of nitrogen i; false where its lone
// pair is not available.
func (p *perception) basicity(i int) (pKa float64, ok bool) {
	if p.charge[i] < 0 && !p.positiveBeside(i) {
		return 15, true
	}
	if p.charge[i] != 0 || p.linear[i] || p.sigma[i] > 3 {
		return 0, false
	}
	if !p.has[i] {
		if p.sigma[i] != 3 {
			return 0, false
		}
		return p.alkylamine(i)
	}
	switch p.classify(int32(i)) {
	case "N2 amine", "N2 hydrazine":
		return 4.6 + 0.3*float64(2-min(2, p.hydrogens(i))) + p.arylIncrement(i), true
	case "N2 diarylamine":
		return 0.8 + p.arylIncrement(i), true
	case "N1 azine":
		return p.azine(i), true
	case "N1 azole":
		return p.azole(i), true
	case "N1 imine", "N1":
		return p.imine(i), true
	case "N1 oxime":
		for _, h := range p.m.Neighbours(i) {
			if p.m.Atoms[h.Atom].Element == 7 {
				return 3, true // hydrazone
			}
		}
		return -1, true
	case "N1 azo":
		return -2.5, true
	}
	return 0, false
}

func (p *perception) positiveBeside(i int) bool {
	for _, h := range p.m.Neighbours(i) {
		if p.charge[h.Atom] > 0 {
			return true
		}
	}
	return false
}

// alkylamine is an amine off the π system: triethylamine 10.7, morpholine 8.4,
// benzylamine 9.3, glycine esters 7.7, hydrazines and hydroxylamines lower.
func (p *perception) alkylamine(i int) (float64, bool) {
	m := p.m
	k := 10.7
	if p.hydrogens(i) == 3 {
		k = 9.2
	}
	for _, h := range m.Neighbours(i) {
		j := h.Atom
		switch z := m.Atoms[j].Element; {
		case p.hypervalent(j) && z != 14:
			return 0, false
		case z == 7:
			k -= 5
		case z == 8:
			k -= 5
		case z == 6:
			for _, g := range m.Neighbours(j) {
				f := g.Atom
				if f == i {
					continue
				}
				switch y := m.Atoms[f].Element; {
				case y == 6 && p.acyl(f):
					k -= 3
				case y == 6 && p.has[f] && p.linear[f]:
					k -= 5
				case y == 6 && p.has[f]:
					k -= 1.3
				case y == 6:
					for _, x := range m.Neighbours(f) {
						switch m.Atoms[x.Atom].Element {
						case 1, 6, 14:
						case 9, 17, 35, 53:
							k -= 1.8
						default:
							if x.Atom != i {
								k -= 1.1
							}
						}
					}
				case y != 1:
					k -= 3.5
				}
			}
		}
	}
	return k, true
}

// groupOf sorts what is bonded to a ring atom outside the ring.
type groupOf uint8

const (
	groupAlkyl groupOf = iota
	groupAmino
	groupOxy
	groupHalogen
	groupNitro
	groupCyano
	groupAcyl
	groupAcceptor // CF3, sulfonyl, ammonium
	groupOther
)

func (p *perception) substituent(j int) groupOf {
	switch z := p.m.Atoms[j].Element; {
	case z == 7 && p.sigma[j] == 3 && p.charge[j] == 0:
		switch p.classify(int32(j)) {
		case "N2 amine", "N2 diarylamine", "N2 hydrazine", "N2 amidine":
			return groupAmino
		}
		return groupOther
	case z == 7 && p.sigma[j] == 3 && p.oxides(j) > 0:
		return groupNitro
	case z == 8 || z == 16 && p.sigma[j] == 2:
		return groupOxy
	case z == 9 || z == 17 || z == 35 || z == 53:
		return groupHalogen
	case z == 6 && p.linear[j]:
		return groupCyano
	case z == 6 && p.acyl(j):
		return groupAcyl
	case p.inductiveCause(j) != "" && !p.has[j] && z != 6, z == 6 && !p.has[j] && p.inductiveCause(j) == "CX3":
		return groupAcceptor
	case z == 6 && !p.has[j]:
		return groupAlkyl
	}
	return groupOther
}

// arylIncrement is what the substituents of the ring do to an aniline.
func (p *perception) arylIncrement(i int) float64 {
	m := p.m
	k := 0.0
	for _, h := range m.Neighbours(i) {
		for _, r := range m.RingsOf(h.Atom) {
			ring := m.Rings()[r]
			if m.BondInRing(h.Bond) || len(ring) > 6 {
				continue
			}
			for _, a := range ring {
				if m.Atoms[a].Element == 7 && p.has[a] && p.share[a] < 1.5 {
					k -= 3
				}
				for _, g := range m.Neighbours(a) {
					if g.Atom == i || m.BondInRing(g.Bond) || m.Atoms[g.Atom].Element == 1 {
						continue
					}
					switch p.substituent(g.Atom) {
					case groupAlkyl:
						k += 0.2
					case groupAmino:
						k++
					case groupOxy:
						k += 0.3
					case groupHalogen:
						k--
					case groupNitro:
						k -= 3.5
					case groupCyano:
						k -= 2.8
					case groupAcyl:
						k -= 2
					case groupAcceptor:
						k -= 2
					}
				}
			}
		}
	}
	return k
}

// azine is a six-ring N: pyridine 5.2, quinoline 4.9, pyridazine 2.3, pyrimidine 1.3,
// pyrazine 0.7; 4-aminopyridine 9.1, 2-aminopyridine 6.9, 2-chloropyridine 0.7.
func (p *perception) azine(i int) float64 {
	m := p.m
	k := 5.2
	for _, r := range m.RingsOf(i) {
		ring := m.Rings()[r]
		at := position(ring, i)
		if len(ring) != 6 || !p.ring6[i] {
			k -= 0.3
			continue
		}
		for x, a := range ring {
			d := x - at
			if d < 0 {
				d = -d
			}
			d = min(d, 6-d)
			if d == 0 {
				continue
			}
			if m.Atoms[a].Element == 7 && p.has[a] {
				if p.share[a] > 1.5 {
					continue // pyridone-type N
				}
				if d == 1 {
					k -= 2.9
				} else {
					k -= 4.1
				}
			}
			for _, g := range m.Neighbours(a) {
				if m.Atoms[g.Atom].Element == 1 {
					continue
				}
				if m.BondInRing(g.Bond) {
					if position(ring, g.Atom) < 0 {
						k -= 0.15 // fused ring
					}
					continue
				}
				if p.sigma[g.Atom] == 1 && m.Atoms[g.Atom].Element == 8 {
					k -= 3 // ring C=O
					continue
				}
				switch p.substituent(g.Atom) {
				case groupAlkyl:
					k += 0.7
				case groupAmino:
					k += [4]float64{0, 1.7, 0.8, 3.9}[d]
				case groupOxy:
					k += [4]float64{0, -1.9, -0.3, 1.4}[d]
				case groupHalogen:
					k += [4]float64{0, -4.5, -2.4, -1.4}[d]
				case groupNitro:
					k += [4]float64{0, -6, -4.4, -3.7}[d]
				case groupCyano:
					k += [4]float64{0, -5, -3.8, -3.3}[d]
				case groupAcyl, groupAcceptor:
					k += [4]float64{0, -3, -2, -1.8}[d]
				}
			}
		}
	}
	return k
}

// position is the place of atom a in a ring, -1 where it is not in it.
func position(ring []int, a int) int {
	for x, b := range ring {
		if a == b {
			return x
		}
	}
	return -1
}

// azole is the pyridine-type N of a five-ring: imidazole 7.0, benzimidazole 5.5,
// pyrazole 2.5, thiazole 2.5, oxazole 0.8, isoxazole −3, each further N −4.5.
func (p *perception) azole(i int) float64 {
	m := p.m
	k := 0.0
	for _, r := range m.RingsOf(i) {
		ring := m.Rings()[r]
		if len(ring) != 5 {
			continue
		}
		at := position(ring, i)
		k = 5.2
		for x, a := range ring {
			d := x - at
			if d < 0 {
				d = -d
			}
			d = min(d, 5-d)
			switch z := m.Atoms[a].Element; {
			case d == 0:
			case z == 7 && p.share[a] > 1.5 && d == 2:
				k += 1.8
			case z == 7 && p.share[a] > 1.5:
				k -= 2.7
			case z == 7:
				k -= 4.5
			case (z == 16 || z == 34) && d == 2:
				k -= 2.7
			case z == 16 || z == 34:
				k -= 5.7
			case z == 8 && d == 2:
				k -= 4.4
			case z == 8:
				k -= 8.2
			}
			for _, g := range m.Neighbours(a) {
				if m.Atoms[g.Atom].Element == 1 {
					continue
				}
				if m.BondInRing(g.Bond) {
					if position(ring, g.Atom) < 0 {
						k -= 0.75
					}
					continue
				}
				switch p.substituent(g.Atom) {
				case groupAlkyl:
					k += 0.5
				case groupAmino:
					k += 1.5
				case groupHalogen:
					k -= 3
				case groupNitro:
					k -= 6
				case groupCyano, groupAcyl, groupAcceptor:
					k -= 3
				}
			}
		}
	}
	return k
}

// imine is C=N outside aromatic rings: guanidine 13.6, amidine 12.4, imidate 6, imine 7.
func (p *perception) imine(i int) float64 {
	m := p.m
	k := 7.0
	for _, h := range m.Neighbours(i) {
		j := h.Atom
		if m.Atoms[j].Element != 6 {
			if p.hypervalent(j) {
				k -= 8
			}
			continue
		}
		if p.acyl(j) {
			k -= 6
			continue
		}
		if p.mate[i] != int32(j) {
			if p.has[j] {
				k -= 3 // N-aryl
			}
			continue
		}
		nitrogens := 0
		for _, g := range m.Neighbours(j) {
			switch z := m.Atoms[g.Atom].Element; {
			case g.Atom == i:
			case z == 7 && p.sigma[g.Atom] == 3 && p.has[g.Atom]:
				nitrogens++
			case z == 8 || z == 16:
				k--
			}
		}
		switch {
		case nitrogens >= 2:
			k += 6.6
		case nitrogens == 1:
			k += 5.4
		}
	}
	return k
}
