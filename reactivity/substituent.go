package reactivity

// substituent is the kind of a neighbour of a ring atom, as the steric and electronic
// terms of the chances count it.
type substituent uint8

const (
	subNone substituent = iota
	subAlkyl
	subSecondary
	subTertiary
	subCX3
	subAryl
	subVinyl
	subAcyl
	subEster
	subCarboxamide
	subCyano
	subImidoyl
	subNitro
	subAmmonium
	subNH2
	subNHR
	subNR2
	subAmido
	subSulfonamido
	subAzolyl
	subImino
	subHydroxy
	subAlkoxy
	subAcyloxy
	subOCX3
	subSilyloxy
	subOxo
	subThio
	subSulfonyl
	subF
	subCl
	subBr
	subI
	subSilyl
	subOther
	subFusedRing
	subRingAlkyl5
	subRingAlkyl6
	subRingOxo
	subRingO
	subRingN
	subRingAmide
	subRingS
	subOnNAlkyl
	subOnNAryl
	subOnNAcyl
	subOnNSulfonyl
	subOnNSilyl
	substituents
)

// substituentWords name the kinds, for terms and for reasons given in reports.
var substituentWords = [substituents]string{
	subNone: "none", subAlkyl: "primary alkyl", subSecondary: "secondary alkyl", subTertiary: "tertiary alkyl",
	subCX3: "CF3-like group", subAryl: "aryl", subVinyl: "vinyl or alkynyl", subAcyl: "acyl",
	subEster: "ester or acid", subCarboxamide: "carboxamide", subCyano: "cyano", subImidoyl: "C=N",
	subNitro: "nitro", subAmmonium: "ammonium", subNH2: "NH2", subNHR: "NHR", subNR2: "NR2",
	subAmido: "amide N", subSulfonamido: "sulfonamide N", subAzolyl: "azol-1-yl", subImino: "N=",
	subHydroxy: "hydroxy", subAlkoxy: "alkoxy", subAcyloxy: "acyloxy", subOCX3: "OCF3-like group",
	subSilyloxy: "silyloxy", subOxo: "ring C=O", subThio: "thioether S", subSulfonyl: "sulfonyl or sulfinyl",
	subF: "F", subCl: "Cl", subBr: "Br", subI: "I", subSilyl: "silyl", subOther: "other group",
	subFusedRing: "fused aromatic ring", subRingAlkyl5: "alkyl of a fused small ring", subRingAlkyl6: "alkyl of a fused ring",
	subRingOxo: "C=O of a fused ring", subRingO: "O of a fused ring", subRingN: "N of a fused ring",
	subRingAmide: "amide N of a fused ring", subRingS: "S of a fused ring",
	subOnNAlkyl: "N-alkyl", subOnNAryl: "N-aryl", subOnNAcyl: "N-acyl", subOnNSulfonyl: "N-sulfonyl", subOnNSilyl: "N-silyl",
}

// kindOf classes the substituent that begins with atom x on ring atom a.
func (v *view) kindOf(a, x int) substituent {
	m := v.m
	atom := &m.Atoms[x]
	most := v.mostOrder(x)
	switch atom.Element {
	case 6:
		switch {
		case atom.Aromatic:
			return subAryl
		case most == 3:
			for _, h := range m.Neighbours(x) {
				if m.Bonds[h.Bond].Order == 3 && m.Atoms[h.Atom].Element == 7 {
					return subCyano
				}
			}
			return subVinyl
		case most == 2:
			return v.carbonylKind(a, x)
		}
		halogens, others := 0, 0
		for _, h := range m.Neighbours(x) {
			if h.Atom == a {
				continue
			}
			others++
			if isHalogen(m.Atoms[h.Atom].Element) {
				halogens++
			}
		}
		switch {
		case halogens >= 2:
			return subCX3
		case others >= 3:
			return subTertiary
		case others == 2:
			return subSecondary
		}
		return subAlkyl
	case 7:
		return v.nitrogenKind(a, x, most)
	case 8:
		return v.oxygenKind(a, x, most)
	case 16, 34, 52:
		if v.hypervalent(x) {
			return subSulfonyl
		}
		return subThio
	case 9:
		return subF
	case 17:
		return subCl
	case 35:
		return subBr
	case 53:
		return subI
	case 14, 32, 50:
		return subSilyl
	}
	return subOther
}

func isHalogen(z int) bool { return z == 9 || z == 17 || z == 35 || z == 53 }

// hypervalent tells whether a sulfur or phosphorus carries three or more neighbours:
// sulfoxide, sulfone, phosphoryl, in either notation.
func (v *view) hypervalent(x int) bool {
	z := v.m.Atoms[x].Element
	return (z == 15 || z == 16 || z == 34) && v.m.Degree(x) >= 3
}

// carbonylKind classes an sp2 carbon x on a.
func (v *view) carbonylKind(a, x int) substituent {
	m := v.m
	double := -1
	hetero := -1
	for _, h := range m.Neighbours(x) {
		if m.Bonds[h.Bond].Order == 2 {
			double = h.Atom
		}
	}
	for _, h := range m.Neighbours(x) {
		z := m.Atoms[h.Atom].Element
		if h.Atom != a && h.Atom != double && (z == 7 || z == 8) && hetero < 0 {
			hetero = h.Atom
		}
	}
	switch m.Atoms[double].Element {
	case 8, 16:
		switch {
		case hetero < 0:
			return subAcyl
		case m.Atoms[hetero].Element == 8:
			return subEster
		}
		return subCarboxamide
	case 7:
		return subImidoyl
	}
	return subVinyl
}

// acylated tells whether an atom is bound to the carbon of a C=O or C=S other than
// through but.
func (v *view) acylated(x, but int) bool {
	m := v.m
	for _, h := range m.Neighbours(x) {
		if h.Atom == but || m.Atoms[h.Atom].Element != 6 {
			continue
		}
		for _, g := range m.Neighbours(h.Atom) {
			z := m.Atoms[g.Atom].Element
			if m.Bonds[g.Bond].Order == 2 && (z == 8 || z == 16) {
				return true
			}
		}
	}
	return false
}

// onHypervalent tells whether an atom is bound to S(VI), S(IV) or P(V) other than but.
func (v *view) onHypervalent(x, but int) bool {
	for _, h := range v.m.Neighbours(x) {
		if h.Atom != but && v.hypervalent(h.Atom) {
			return true
		}
	}
	return false
}

func (v *view) nitrogenKind(a, x, most int) substituent {
	m := v.m
	atom := &m.Atoms[x]
	switch {
	case v.oxygens(x) == 2:
		return subNitro
	case atom.Aromatic:
		return subAzolyl
	case atom.Charge > 0 && most == 1:
		return subAmmonium
	case v.onHypervalent(x, a):
		return subSulfonamido
	case v.acylated(x, a):
		return subAmido
	case most >= 2:
		return subImino
	case atom.Hydrogens >= 2:
		return subNH2
	case atom.Hydrogens == 1:
		return subNHR
	}
	return subNR2
}

func (v *view) oxygenKind(a, x, most int) substituent {
	m := v.m
	switch {
	case most == 2:
		return subOxo
	case m.Degree(x) == 1:
		return subHydroxy // the anion too
	case v.onHypervalent(x, a), v.acylated(x, a):
		return subAcyloxy
	}
	for _, h := range m.Neighbours(x) {
		if h.Atom == a {
			continue
		}
		if m.Atoms[h.Atom].Element == 14 {
			return subSilyloxy
		}
		fluorines := 0
		for _, g := range m.Neighbours(h.Atom) {
			if m.Atoms[g.Atom].Element == 9 {
				fluorines++
			}
		}
		if fluorines >= 2 {
			return subOCX3
		}
	}
	return subAlkoxy
}

// withdrawing tells whether a kind draws electrons from a ring by resonance or field.
func (s substituent) withdrawing() bool {
	switch s {
	case subCX3, subAcyl, subEster, subCarboxamide, subCyano, subNitro, subAmmonium, subSulfonyl:
		return true
	}
	return false
}

// donating tells whether a kind gives a lone pair of N or O to a ring.
func (s substituent) donating() bool {
	switch s {
	case subNH2, subNHR, subNR2, subAmido, subHydroxy, subAlkoxy:
		return true
	}
	return false
}
