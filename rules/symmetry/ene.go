package symmetry

import (
	"fmt"
	"slices"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Ene judges the ene reaction of an alkene with allylic hydrogen (a) and an enophile
// (b); b is nil for an intramolecular one (Conia, carbonyl-ene). Maps, where it is not
// unique: :1 the atom that loses the hydrogen, :2 the atom of the ene that forms the
// new σ bond, :3 the atom of the enophile it binds to, :4 the one the hydrogen goes to.
// The enol or enamine of a Conia reaction is given as such.
func Ene(a, b *molecule.Molecule) (*Answer, error) { return ene(a, b, "") }

// EneGiving is [Ene] where the product is known: of several reactions the one that
// gives its constitution is judged.
func EneGiving(a, b, product *molecule.Molecule) (*Answer, error) {
	return ene(a, b, product.FlatSMILES())
}

func ene(a, b *molecule.Molecule, wanted string) (*Answer, error) {
	m := a
	reactants := []*molecule.Molecule{a}
	offset := 0
	if b != nil && b != a {
		offset = len(a.Atoms)
		var err error
		if m, err = join(a, b); err != nil {
			return nil, err
		}
		reactants = append(reactants, b)
	}
	one, two, three, four := m.AtomByMap(1), m.AtomByMap(2), m.AtomByMap(3), m.AtomByMap(4)
	base := newFrame(m)
	bare := hydrogenated{m: m}
	var list []*assembly
	for c1 := range m.Atoms {
		if m.Atoms[c1].Hydrogens == 0 || base.partner(c1) >= 0 || offset > 0 && c1 >= offset || one >= 0 && c1 != one {
			continue
		}
		if m.Atoms[c1].Charge != 0 {
			continue
		}
		for _, h2 := range m.Neighbours(c1) {
			for _, h3 := range m.Neighbours(h2.Atom) {
				c3 := h3.Atom
				if c3 == c1 || base.order[h3.Bond] < 2 || two >= 0 && c3 != two || m.Atoms[h2.Atom].Element != 6 || m.Atoms[c3].Element != 6 || m.Bonds[h3.Bond].Aromatic {
					continue
				}
				for k := range m.Bonds {
					e := &m.Bonds[k]
					if e.Aromatic || base.order[k] < 2 || e.A == c3 || e.B == c3 || e.A == h2.Atom || e.B == h2.Atom || offset > 0 && e.A < offset {
						continue
					}
					for _, ends := range [][2]int{{e.A, e.B}, {e.B, e.A}} {
						c4, c5 := ends[0], ends[1]
						if three >= 0 && c4 != three || four >= 0 && c5 != four || m.BondBetween(c3, c4) >= 0 || m.BondBetween(c1, c5) >= 0 ||
							m.Atoms[c4].Element != 6 && m.Atoms[c4].Element != 7 && m.Atoms[c4].Element != 8 {
							continue
						}
						if m.Atoms[c4].Element == 8 && m.Atoms[c5].Element == 6 {
							continue // a carbonyl binds by its carbon
						}
						n, h, err := bare.with(c1)
						if err != nil {
							continue
						}
						x := &assembly{f: newFrame(n)}
						x.f.made = []int{h}
						x.newSigma(h, c1)
						if x.newPi([]int{h2.Atom, c3}) && x.newPi([]int{c4, c5}) {
							list = append(list, x)
						}
					}
				}
			}
		}
	}
	if len(list) == 0 {
		return nil, refuse(a, -1, "no ene (H–C–C=C) and enophile (a π bond) are found", "give the alkene with allylic hydrogen first and the enophile second; map :1 :2 and :3 :4 where several are possible")
	}
	// Carbon–carbon π bonds go before those to heteroatoms.
	carbon := slices.DeleteFunc(slices.Clone(list), func(x *assembly) bool {
		p := x.parts[2].atoms
		return x.f.m.Atoms[p[0]].Element != 6 || x.f.m.Atoms[p[1]].Element != 6
	})
	if len(carbon) > 0 && three < 0 && four < 0 && wanted == "" {
		list = carbon
	}
	return enoid(m, list, wanted, reactants, terms.Ene, "ene reaction", "the ene :1 (loses H) :2 (binds) and the enophile :3 (binds) :4 (takes H)")
}

// RetroEne judges the reverse: H–C–X–Y–C=Z with the σ bond X–Y breaking, as in the
// pyrolysis of esters and of β-hydroxy alkenes. The components named are those of the
// ene reaction it reverses. Maps, where it is not unique: :1 the
// atom that loses the hydrogen, :2 the atom that takes it.
func RetroEne(m *molecule.Molecule) (*Answer, error) {
	one, two := m.AtomByMap(1), m.AtomByMap(2)
	base := newFrame(m)
	bare := hydrogenated{m: m}
	var list []*assembly
	for a := range m.Atoms {
		if m.Atoms[a].Hydrogens == 0 || base.partner(a) >= 0 || one >= 0 && a != one {
			continue
		}
		for _, hb := range m.Neighbours(a) {
			b := hb.Atom
			if base.partner(b) >= 0 {
				continue
			}
			for _, hc := range m.Neighbours(b) {
				c := hc.Atom
				if c == a || base.partner(c) >= 0 || m.Atoms[c].Element == 1 {
					continue
				}
				for _, hd := range m.Neighbours(c) {
					d := hd.Atom
					if d == b || m.Bonds[hd.Bond].Order != 1 {
						continue
					}
					for _, he := range m.Neighbours(d) {
						e := he.Atom
						if e == c || base.order[he.Bond] < 2 || m.Bonds[he.Bond].Aromatic || e == a || e == b || two >= 0 && e != two {
							continue
						}
						n, h, err := bare.with(a)
						if err != nil {
							continue
						}
						x := &assembly{f: newFrame(n), named: Components{{Kind: Sigma, Electrons: 2}, {Kind: Pi, Electrons: 2}, {Kind: Pi, Electrons: 2}}}
						x.f.made = []int{h}
						x.newSigma(h, a)
						x.newSigma(b, c)
						if x.newPi([]int{d, e}) {
							list = append(list, x)
						}
					}
				}
			}
		}
	}
	if len(list) == 0 {
		return nil, refuse(m, -1, "no H–C–X–Y–C=Z is found that could undergo a retro-ene reaction", "map the atom that loses the hydrogen :1 and the one that takes it :2")
	}
	return enoid(m, list, "", []*molecule.Molecule{m}, terms.Ene, "retro-ene reaction", "the atom that loses the hydrogen :1 and the one that takes it :2")
}

// Transfer judges the concerted transfer of two hydrogens from neighbouring atoms of a
// donor to a π bond of an acceptor, or the addition of H2. Maps, where it is not
// unique: :1 :2 the atoms that lose hydrogen, :3 :4 those that take it.
func Transfer(donor, acceptor *molecule.Molecule) (*Answer, error) {
	m, err := join(donor, acceptor)
	if err != nil {
		return nil, err
	}
	offset := len(donor.Atoms)
	one, two, three, four := m.AtomByMap(1), m.AtomByMap(2), m.AtomByMap(3), m.AtomByMap(4)
	base := newFrame(m)
	bare := hydrogenated{m: m}
	var list []*assembly
	for k := range m.Bonds {
		e := &m.Bonds[k]
		if e.A < offset || base.order[k] < 2 || e.Aromatic || three >= 0 && e.A != three && e.B != three || four >= 0 && e.A != four && e.B != four {
			continue
		}
		// Dihydrogen written as a bond of two hydrogen nodes, or as [HH].
		for i := range donor.Atoms {
			if donor.Atoms[i].Element != 1 {
				continue
			}
			switch {
			case donor.Degree(i) == 1 && donor.Atoms[donor.Neighbours(i)[0].Atom].Element == 1 && i < donor.Neighbours(i)[0].Atom:
				x := &assembly{f: newFrame(m)}
				x.newSigma(i, donor.Neighbours(i)[0].Atom)
				if x.newPi([]int{e.A, e.B}) {
					list = append(list, x)
				}
			case donor.Degree(i) == 0 && donor.Atoms[i].Hydrogens == 1:
				n, h, err := bare.with(i)
				if err != nil {
					continue
				}
				x := &assembly{f: newFrame(n)}
				x.f.made = []int{i, h}
				x.newSigma(i, h)
				if x.newPi([]int{e.A, e.B}) {
					list = append(list, x)
				}
			}
		}
		for d := range donor.Bonds {
			b := &donor.Bonds[d]
			if b.Order != 1 || donor.Atoms[b.A].Hydrogens == 0 || donor.Atoms[b.B].Hydrogens == 0 || base.partner(b.A) >= 0 || base.partner(b.B) >= 0 {
				continue
			}
			if one >= 0 && b.A != one && b.B != one || two >= 0 && b.A != two && b.B != two {
				continue
			}
			for _, ends := range [][2]int{{b.A, b.B}, {b.B, b.A}} {
				n, h, err := bare.with(ends[0])
				if err != nil {
					continue
				}
				n, g, err := withHydrogen(n, ends[1])
				if err != nil {
					continue
				}
				x := &assembly{f: newFrame(n)}
				x.f.made = []int{h, g}
				x.newSigma(h, ends[0])
				x.newSigma(ends[1], g)
				if x.newPi([]int{e.A, e.B}) {
					list = append(list, x)
				}
			}
		}
	}
	if len(list) == 0 {
		return nil, refuse(donor, -1, "no two neighbouring hydrogens of the first molecule and π bond of the second are found", "give the donor of hydrogen first and the acceptor second")
	}
	return enoid(m, list, "", []*molecule.Molecule{donor, acceptor}, terms.Ene, "transfer of two hydrogens", "the atoms that lose hydrogen :1 :2 and those that take it :3 :4")
}

// enoid judges the suprafacial mode of a ring of components of which the last is the
// π bond that is added to, and the mode in which that bond is used antarafacially.
func enoid(m *molecule.Molecule, list []*assembly, wanted string, reactants []*molecule.Molecule, kind terms.Kind, name, help string) (*Answer, error) {
	x, err := oneOf(m, list, wanted, help, func(x *assembly) (candidate, error) {
		p, err := x.plain()
		if err != nil {
			return candidate{}, err
		}
		flat := p.Molecule.FlatSMILES()
		return candidate{flat, flat, pathLabels(x.f.m, x.allAtoms())}, nil
	})
	if err != nil {
		return nil, err
	}
	base := x.cycle()
	if err := base.check(); err != nil {
		return nil, refuse(m, -1, err.Error(), "check charges and the mapped atoms")
	}
	a := x.start(kind, name, reactants)
	s, err := x.best(base)
	if err != nil {
		return nil, refuse(m, -1, err.Error(), "check charges and the mapped atoms")
	}
	mirror := achiral(m)
	last := len(x.parts) - 1
	f := x.f
	for _, anta := range []bool{false, true} {
		antara := make([]bool, len(x.parts))
		antara[last] = anta
		p, err := x.process(kind, base, antara)
		if err != nil {
			return nil, err
		}
		p.Mode = "suprafacial on all components"
		if anta {
			p.Mode = "antarafacial on the π bond that is added to"
			p.infeasible("a π bond cannot be met on opposite faces in a ring of this size")
		}
		bond := x.parts[last].atoms
		var centres []centre
		before, after := x.parts[last-1].atoms[len(x.parts[last-1].atoms)-1], x.parts[0].atoms[0]
		if f.m.BondBetween(before, bond[0]) < 0 {
			e0, e1 := f.alkeneEnds(bond[0], bond[1], false)
			if c, ok := attach(bond[0], bond[1], before, e0, false, 1, true); ok {
				centres = append(centres, c)
			}
			if c, ok := attach(bond[1], bond[0], after, e1, true, 1, !anta); ok {
				centres = append(centres, c)
			}
		}
		q, err := s.product(centres, nil)
		if err != nil {
			return nil, err
		}
		p.Products = collect(p.Products, q, mirror)
		a.Processes = append(a.Processes, p)
	}
	a.Notes = append(a.Notes, "configuration is followed at the π bond that is added to only")
	a.complete(slices.DeleteFunc(x.allAtoms(), func(i int) bool { return f.m.Atoms[i].Element == 1 }))
	a.Name = fmt.Sprintf("%s of %s", name, reactants[0].SMILES())
	return a, nil
}
