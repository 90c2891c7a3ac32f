package symmetry

import (
	"slices"

	"lobecast/frontier/molecule"
)

// later lists what products go over to at once by moving one proton, without
// configuration: a cyclohexadienone (or its imine) to the phenol (aniline), an enol to the
// carbonyl compound, an oxyallyl or hydroxyallyl cation in a ring of five to the
// cyclopentenones.
func later(products []Product) []Product {
	if len(products) == 0 {
		return nil
	}
	var list []Product
	first := products[0].Molecule
	for _, m := range slices.Concat(aromatized(first), ketones(first), cyclopentenones(first)) {
		s := m.FlatSMILES()
		if !slices.ContainsFunc(list, func(p Product) bool { return p.SMILES == s }) {
			list = append(list, Product{Molecule: m, SMILES: s})
		}
	}
	return list
}

// laterConstitutions are those of [later] for a candidate process.
func laterConstitutions(x any) []string {
	plain, ok := x.(interface{ plain() (*Product, error) })
	if !ok {
		return nil
	}
	p, err := plain.plain()
	if err != nil {
		return nil
	}
	var list []string
	for _, q := range later([]Product{*p}) {
		list = append(list, q.SMILES)
	}
	return list
}

// withoutCentre clears the configuration of an edited molecule's atoms.
func withoutCentre(m *molecule.Molecule) *molecule.Editor {
	e := m.Edit()
	for i := range m.Atoms {
		e.Atom(i).Stereo = molecule.Stereo{}
	}
	return e
}

// aromatized moves a proton from an sp3 carbon of a six-membered ring to the oxygen or
// nitrogen doubly bonded to its neighbour, where the ring becomes aromatic.
func aromatized(m *molecule.Molecule) []*molecule.Molecule {
	var list []*molecule.Molecule
	for _, ring := range m.Rings() {
		if len(ring) != 6 {
			continue
		}
		for k, c := range ring {
			if m.Atoms[c].Hydrogens == 0 || m.Valence(c) != m.Degree(c)+m.Atoms[c].Hydrogens {
				continue
			}
			for _, d := range []int{ring[(k+1)%6], ring[(k+5)%6]} {
				for _, h := range m.Neighbours(d) {
					x := h.Atom
					if slices.Contains(ring, x) || m.Bonds[h.Bond].Order != 2 || !electronegative(m.Atoms[x].Element) || m.Atoms[x].Charge != 0 {
						continue
					}
					e := withoutCentre(m)
					e.SetHydrogens(c, m.Atoms[c].Hydrogens-1)
					e.SetHydrogens(x, m.Atoms[x].Hydrogens+1)
					e.SetOrder(d, x, 1)
					e.SetOrder(c, d, 2)
					if p, err := e.Done(); err == nil && p.Atoms[c].Aromatic {
						list = append(list, p)
					}
				}
			}
		}
	}
	return list
}

// ketones moves the proton of an enol to the far end of its double bond. In a cation it
// would not go there.
func ketones(m *molecule.Molecule) []*molecule.Molecule {
	var list []*molecule.Molecule
	if slices.ContainsFunc(m.Atoms, func(a molecule.Atom) bool { return a.Charge != 0 }) {
		return nil
	}
	for x := range m.Atoms {
		if a := &m.Atoms[x]; a.Element != 8 || a.Hydrogens != 1 || a.Charge != 0 || m.Degree(x) != 1 {
			continue
		}
		c := m.Neighbours(x)[0].Atom
		if m.Atoms[c].Element != 6 || m.Atoms[c].Aromatic {
			continue
		}
		for _, h := range m.Neighbours(c) {
			if d := h.Atom; m.Bonds[h.Bond].Order == 2 && m.Atoms[d].Element == 6 {
				e := withoutCentre(m)
				e.SetOrder(c, d, 1)
				e.SetOrder(c, x, 2)
				e.SetHydrogens(x, 0)
				e.SetHydrogens(d, m.Atoms[d].Hydrogens+1)
				if p, err := e.Done(); err == nil {
					list = append(list, p)
				}
			}
		}
	}
	return list
}

// cyclopentenones gives the ketones of a ring of five with O–C(=C)–C(+): the proton
// beside the cation is lost, and taken up at the other end of the allyl part (and one
// more lost from a hydroxyl).
func cyclopentenones(m *molecule.Molecule) []*molecule.Molecule {
	var list []*molecule.Molecule
	for _, ring := range m.Rings() {
		if len(ring) != 5 {
			continue
		}
		for k, c := range ring { // the carbon that bears oxygen
			oxygen := -1
			for _, h := range m.Neighbours(c) {
				if m.Atoms[h.Atom].Element == 8 && m.Degree(h.Atom) == 1 && m.Bonds[h.Bond].Order == 1 {
					oxygen = h.Atom
				}
			}
			if oxygen < 0 {
				continue
			}
			for _, way := range []int{1, 4} {
				cation, double := ring[(k+way)%5], ring[(k+5-way)%5]
				beside, beyond := ring[(k+2*way)%5], ring[(k+2*(5-way))%5]
				db := m.BondBetween(c, double)
				if m.Atoms[cation].Charge != 1 || m.Atoms[cation].Element != 6 || db < 0 || m.Bonds[db].Order != 2 {
					continue
				}
				// Either allyl end may be the one that keeps the new double bond.
				for _, end := range [][2]int{{cation, beside}, {double, beyond}} {
					keep, lose := end[0], end[1]
					take := cation + double - keep
					if m.Atoms[lose].Hydrogens == 0 || m.Valence(lose) != m.Degree(lose)+m.Atoms[lose].Hydrogens {
						continue
					}
					e := withoutCentre(m)
					e.Atom(cation).Charge = 0
					e.SetOrder(c, double, 1)
					e.SetOrder(keep, lose, 2)
					e.SetHydrogens(lose, m.Atoms[lose].Hydrogens-1)
					e.SetHydrogens(take, m.Atoms[take].Hydrogens+1)
					e.SetOrder(c, oxygen, 2)
					e.Atom(oxygen).Charge = 0
					e.SetHydrogens(oxygen, 0)
					if p, err := e.Done(); err == nil {
						list = append(list, p)
					}
				}
			}
		}
	}
	return list
}
