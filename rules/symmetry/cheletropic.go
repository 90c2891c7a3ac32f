package symmetry

import (
	"fmt"
	"slices"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// extruded lists the atoms that form two σ bonds at once, or lose them.
//
// The lone pair and the vacancy of such an atom are taken as two equivalent lobes
// with a bonding link between them: their in-phase combination is the lone pair, the
// out-of-phase one the vacancy. Used suprafacially (linear approach) both lobes meet
// the chain with the lone pair's sign; used antarafacially (non-linear approach) with
// that of the vacancy.
func extruded(m *molecule.Molecule, i int) bool {
	a := &m.Atoms[i]
	switch a.Element {
	case 16, 34: // SO2, SO, SeO2
		if a.Charge != 0 || m.Degree(i) == 0 {
			return false
		}
		for _, h := range m.Neighbours(i) {
			if m.Atoms[h.Atom].Element != 8 || m.Bonds[h.Bond].Order != 2 {
				return false
			}
		}
		return true
	case 6:
		if carbonMonoxide(m, i) >= 0 {
			return true
		}
		return a.Charge == 0 && m.Valence(i) == 2 // a carbene
	case 7:
		return a.Charge == 0 && m.Valence(i) == 1 // a nitrene
	}
	return false
}

// carbonMonoxide returns the O (or N of an isocyanide) bonded to a carbon written with
// a triple bond and opposite charges, or −1.
func carbonMonoxide(m *molecule.Molecule, i int) int {
	if m.Atoms[i].Charge != -1 || m.Degree(i) != 1 {
		return -1
	}
	h := m.Neighbours(i)[0]
	if m.Bonds[h.Bond].Order == 3 && m.Atoms[h.Atom].Charge == 1 {
		return h.Atom
	}
	return -1
}

// cheletropicModes are the four combinations of faces: on the chain and on the single
// atom.
var cheletropicModes = []struct{ chain, lone bool }{{false, false}, {true, false}, {false, true}, {true, true}}

// cheletropicMode puts a combination into words.
func cheletropicMode(n int, chain, lone bool) string {
	way := "linear"
	if lone {
		way = "non-linear"
	}
	turn := "disrotatory"
	switch {
	case n == 2 && chain:
		turn = "antarafacial"
	case n == 2:
		turn = "suprafacial"
	case chain:
		turn = "conrotatory"
	}
	return way + ", " + turn
}

// Cheletropic judges the addition of SO2, CO, an isocyanide or a carbene (x) to both
// ends of a chain, linear and non-linear. The ends of the chain are mapped :1 :2
// where it is not the only diene (or, without dienes, the only π bond).
func Cheletropic(chain, x *molecule.Molecule) (*Answer, error) {
	ends, err := componentOf(chain, 1, 2, []int{4, 2})
	if err != nil {
		return nil, err
	}
	single := x.AtomByMap(3)
	if single < 0 {
		for i := range x.Atoms {
			if extruded(x, i) {
				if single >= 0 {
					return nil, refuse(x, i, "several atoms could form both new bonds", "map the one meant :3")
				}
				single = i
			}
		}
	}
	if single < 0 || !extruded(x, single) {
		return nil, refuse(x, single, "no atom is found that could form two σ bonds at once", "give SO2 (O=S=O), CO ([C-]#[O+]), an isocyanide or a carbene ([CH2])")
	}
	m, err := join(chain, x)
	if err != nil {
		return nil, err
	}
	at := single + len(chain.Atoms)
	f := newFrame(m)
	if o := carbonMonoxide(m, at); o >= 0 {
		f.order[m.BondBetween(at, o)] = 2
		f.charge[at], f.charge[o] = 0, 0
	}
	s := &assembly{f: f}
	if !s.newPi(ends) {
		return nil, refuse(chain, ends[0], "the chain has no double bonds where the addition needs them", "map its ends :1 :2")
	}
	s.newOmega(at)
	base := s.cycle()
	if err := base.check(); err != nil {
		return nil, refuse(chain, ends[0], err.Error(), "check charges and the mapped atoms")
	}
	a := s.start(terms.Cheletropic, fmt.Sprintf("cheletropic addition of %s to a chain of %d atoms", x.SMILES(), len(ends)), []*molecule.Molecule{chain, x})
	best, err := s.best(base)
	if err != nil {
		return nil, refuse(chain, ends[0], err.Error(), "check charges and the mapped atoms")
	}
	n := len(ends)
	for _, mode := range cheletropicModes {
		p, err := s.process(terms.Cheletropic, base, []bool{mode.chain, mode.lone})
		if err != nil {
			return nil, err
		}
		p.Mode = cheletropicMode(n, mode.chain, mode.lone)
		var e0, e1 end
		if n == 2 {
			e0, e1 = f.alkeneEnds(ends[0], ends[1], false)
		} else {
			e0, e1 = f.end(ends, false), f.end(ends, true)
		}
		for _, top := range []bool{true, false} {
			var centres []centre
			if c, ok := attach(ends[0], ends[1], at, e0, false, 1, top); ok {
				centres = append(centres, c)
			}
			if c, ok := attach(ends[n-1], ends[n-2], at, e1, true, 1, top != mode.chain); ok {
				centres = append(centres, c)
			}
			q, err := best.product(centres, nil)
			if err != nil {
				return nil, err
			}
			if h0, ok0 := heavy(m, e0); ok0 && e0.known && e1.known {
				if h1, ok1 := heavy(m, e1); ok1 {
					q.Configuration = "trans"
					if (h0 == h1) != mode.chain {
						q.Configuration = "cis"
					}
				}
			}
			p.Products = collect(p.Products, q, achiral(m))
		}
		cheletropicFeasibility(&p, f, ends, mode.chain, mode.lone)
		a.Processes = append(a.Processes, p)
	}
	a.complete(ends)
	return a, nil
}

// cheletropicFeasibility applies what the trade states.
func cheletropicFeasibility(p *Process, f *frame, chain []int, antara, lone bool) {
	if !canFold(f, chain) {
		p.infeasible("a bond inside the chain is held trans, so that its ends cannot be reached together")
	}
	switch {
	case antara && len(chain) <= 4:
		p.infeasible(fmt.Sprintf("a chain of %d atoms cannot be met on opposite faces by one atom", len(chain)))
	case antara:
		p.note("the chain must be long and loose enough to be met on opposite faces")
	}
	if lone && len(chain) == 2 {
		p.note("the non-linear path is the one carbenes follow")
	}
}

// Extrusion judges the loss of SO2 or CO from a ring, the reverse of a cheletropic
// addition: the components named are those of the addition. The atom that leaves is
// mapped :3 where it is not unique.
func Extrusion(m *molecule.Molecule) (*Answer, error) {
	mapped := m.AtomByMap(3)
	var list []*extrusion
	for i := range m.Atoms {
		if mapped >= 0 && i != mapped {
			continue
		}
		list = append(list, extrusionsOf(m, i)...)
	}
	if len(list) == 0 {
		return nil, refuse(m, mapped, "no ring is found that could lose SO2 or CO", "an SO2 or CO between the two ends of a diene (or of a single bond) is needed; map it :3")
	}
	x, err := oneOf(m, list, "", "the atom that leaves :3", func(x *extrusion) (candidate, error) {
		p, err := x.shift(x.cycle()).product(nil, nil)
		if err != nil {
			return candidate{}, err
		}
		flat := p.Molecule.FlatSMILES()
		return candidate{flat, flat, label(m, x.single)}, nil
	})
	if err != nil {
		return nil, err
	}
	n := len(x.chain)
	a := &Answer{
		Reactants: []*molecule.Molecule{m}, Joined: m, Kind: terms.Cheletropic,
		Name:   fmt.Sprintf("cheletropic extrusion at %s from a chain of %d atoms", label(m, x.single), n),
		Broken: [][2]int{{m.Atoms[x.chain[0]].Number, m.Atoms[x.single].Number}, {m.Atoms[x.single].Number, m.Atoms[x.chain[n-1]].Number}},
	}
	f := x.f
	base := x.cycle()
	s := x.shift(base)
	for _, mode := range cheletropicModes {
		p := Process{Kind: terms.Cheletropic, Feasible: true, Mode: cheletropicMode(n, mode.chain, mode.lone)}
		p.Parts = Components{{Kind: Pi, Electrons: n, Antara: mode.chain}, {Kind: Omega, Electrons: 2, Antara: mode.lone}}
		sign := 1.0
		if mode.chain != mode.lone {
			sign = -1
		}
		if err := p.finish(base.withSign(sign), f); err != nil {
			return nil, err
		}
		for _, turn := range []int{1, -1} {
			var geometries []geometry
			c := x.chain
			e0 := f.detach(c[0], c[1], x.single, false, turn, true)
			e1 := f.detach(c[n-1], c[n-2], x.single, true, turn, !mode.chain)
			if n == 2 {
				if e0.known && e1.known && !e0.open && !e1.open && !e0.alike && !e1.alike {
					geometries = append(geometries, geometry{a: c[0], b: c[1], refA: e0.in, refB: e1.in, g: molecule.Together})
				}
			} else {
				if g, ok := endGeometry(c[0], c[1], c[2], e0); ok {
					geometries = append(geometries, g)
				}
				if g, ok := endGeometry(c[n-1], c[n-2], c[n-3], e1); ok {
					geometries = append(geometries, g)
				}
				for k := 1; k+2 < n; k++ {
					geometries = append(geometries, geometry{a: c[k], b: c[k+1], refA: c[k-1], refB: c[k+2], g: molecule.Together, inner: true})
				}
			}
			q, err := s.product(nil, geometries)
			if err != nil {
				return nil, err
			}
			if n > 2 && e0.known && e1.known && !e0.open && !e1.open {
				q.Configuration = endPair(e0, e1)
			}
			p.Products = collect(p.Products, q, achiral(m))
		}
		if transInSmallRing(p.Products) {
			p.infeasible("the product would hold a trans double bond in a ring of seven or fewer atoms")
		}
		if mode.chain && n <= 4 {
			p.infeasible(fmt.Sprintf("a chain of %d atoms cannot be left on opposite faces by one atom", n))
		}
		a.Processes = append(a.Processes, p)
	}
	a.complete(x.chain)
	return a, nil
}

// extrusion is the loss of one atom between the ends of a chain.
type extrusion struct {
	f      *frame
	chain  []int
	single int
}

// extrusionsOf lists the ways atom i could leave.
func extrusionsOf(m *molecule.Molecule, i int) []*extrusion {
	a := &m.Atoms[i]
	oxygen, ring := -1, []int{}
	for _, h := range m.Neighbours(i) {
		switch {
		case m.Atoms[h.Atom].Element == 8 && m.Bonds[h.Bond].Order == 2 && m.Degree(h.Atom) == 1:
			oxygen = h.Atom
		case m.Bonds[h.Bond].Order == 1 && m.BondInRing(h.Bond):
			ring = append(ring, h.Atom)
		default:
			return nil
		}
	}
	if oxygen < 0 || len(ring) != 2 || a.Charge != 0 || a.Element != 16 && a.Element != 6 && a.Element != 34 {
		return nil
	}
	var list []*extrusion
	for _, r := range m.Rings() {
		at := slices.Index(r, i)
		n := len(r)
		if at < 0 || n > largestOpening || n%2 == 0 {
			continue
		}
		var chain []int
		for k := 1; k < n; k++ {
			chain = append(chain, r[(at+k)%n])
		}
		f := newFrame(m)
		if f.partner(chain[0]) >= 0 || f.partner(chain[n-2]) >= 0 {
			continue
		}
		if n > 3 {
			if _, ok := f.pattern(chain[1 : n-2]); !ok {
				continue
			}
		}
		if a.Element == 6 {
			f.order[m.BondBetween(i, oxygen)] = 3
			f.charge[i], f.charge[oxygen] = f.charge[i]-1, f.charge[oxygen]+1
		}
		list = append(list, &extrusion{f: f, chain: chain, single: i})
	}
	return list
}

// cycle is the ring of orbitals: the chain, then the two lobes of the atom that
// leaves.
func (x *extrusion) cycle() *Cycle {
	n := len(x.chain)
	var o []Orbital
	for i, a := range x.chain {
		k := Pi
		if i == 0 || i == n-1 {
			k = Sigma
		}
		o = append(o, Orbital{Atom: a, Kind: k, Electrons: 1})
	}
	o = append(o, Orbital{Atom: x.single, Kind: Sigma, Electrons: 1}, Orbital{Atom: x.single, Kind: Sigma, Electrons: 1})
	c := newCycle(o)
	for i := 0; i < n-1; i++ {
		r := 0.0
		if i > 0 && i < n-2 {
			r = piStrength
		}
		c.set(i, r, piStrength)
	}
	c.set(n-1, sigmaStrength, 0)
	c.set(n, 0, piStrength)
	c.set(n+1, sigmaStrength, 0)
	return c
}

// shift is the electron shift of the extrusion.
func (x *extrusion) shift(c *Cycle) *shift {
	n := len(x.chain)
	s := &shift{f: x.f, cycle: c, electrons: make([]int, n+2)}
	for i := range s.electrons {
		s.electrons[i] = 1
	}
	s.before = append([][2]int{{n - 1, n}, {n + 1, 0}}, pairs(n-2, -1, 1)...)
	s.after = append([][2]int{{n, n + 1}}, pairs(n, -1, 0)...)
	return s
}
