package symmetry

import (
	"fmt"
	"slices"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// part is one component of a process that several components join in: a π chain, a σ
// bond that breaks, or a single orbital with a lone pair (its atom named twice, once
// for each lobe combination).
type part struct {
	kind  Kind
	atoms []int // round the ring of orbitals
	pi    *chain
}

// electrons the component brings.
func (p *part) electrons() int {
	if p.pi != nil {
		return p.pi.electrons()
	}
	return 2
}

// assembly is a ring of components: the last atom of each becomes bonded to the first
// of the next, and the last of all to the first.
type assembly struct {
	f     *frame
	parts []*part
	// named replaces the components in the count and in print, for a reaction that is
	// named after its reverse.
	named Components
}

// newPi makes a π component of a chain of atoms.
func (x *assembly) newPi(atoms []int) bool {
	c, ok := x.f.pattern(atoms)
	if ok {
		x.parts = append(x.parts, &part{kind: Pi, atoms: atoms, pi: c})
	}
	return ok
}

// newSigma makes a σ component of a bond.
func (x *assembly) newSigma(a, b int) {
	x.parts = append(x.parts, &part{kind: Sigma, atoms: []int{a, b}})
}

// newOmega makes a lone-pair component of an atom that becomes bonded twice.
func (x *assembly) newOmega(a int) {
	x.parts = append(x.parts, &part{kind: Omega, atoms: []int{a, a}})
}

// cycle is the ring of orbitals.
func (x *assembly) cycle() *Cycle {
	var o []Orbital
	for _, p := range x.parts {
		for i, a := range p.atoms {
			orb := Orbital{Atom: a, Kind: p.kind, Electrons: 1}
			if p.pi != nil {
				orb.Electrons = p.pi.at(i)
			}
			o = append(o, orb)
		}
	}
	c := newCycle(o)
	at := 0
	for k, p := range x.parts {
		n := len(p.atoms)
		for i := 0; i < n-1; i++ {
			switch {
			case p.kind == Sigma:
				c.set(at, sigmaStrength, 0)
			case p.kind == Omega:
				c.set(at, piStrength, 0)
			case i > 0 && i < n-2:
				c.set(at, piStrength, piStrength)
			default:
				c.set(at, piStrength, 0)
			}
			at++
		}
		next := x.parts[(k+1)%len(x.parts)]
		if x.f.m.BondBetween(p.atoms[n-1], next.atoms[0]) >= 0 {
			c.set(at, 0, piStrength) // a single bond that becomes double
		} else {
			c.set(at, 0, sigmaStrength)
		}
		at++
	}
	return c
}

// shifts lists the electron shifts, one for each place of an unpaired position.
func (x *assembly) shifts(c *Cycle) []*shift {
	n := len(c.Orbitals)
	first := &shift{f: x.f, cycle: c, electrons: make([]int, n)}
	for i := range first.electrons {
		first.electrons[i] = 1
	}
	list := []*shift{first}
	at := 0
	for _, p := range x.parts {
		k := len(p.atoms)
		hole := -1
		if p.pi != nil {
			hole = p.pi.hole
		}
		before := pairs(k, hole, at)
		var next []*shift
		for _, s := range list {
			s.before = append(s.before, before...)
			s.after = append(s.after, [2]int{at + k - 1, (at + k) % n})
			if p.pi == nil {
				next = append(next, s)
				continue
			}
			if hole < 0 {
				s.after = append(s.after, pairs(k-2, -1, at+1)...)
				next = append(next, s)
				continue
			}
			for h := 1; h < k-1; h += 2 {
				t := &shift{f: s.f, cycle: s.cycle, before: slices.Clone(s.before), after: slices.Clone(s.after), electrons: slices.Clone(s.electrons)}
				t.after = append(t.after, pairs(k-2, h-1, at+1)...)
				t.electrons[at+h] = p.pi.lone
				next = append(next, t)
			}
		}
		list = next
		at += k
	}
	return list
}

// best is the electron shift whose product reads first.
func (x *assembly) best(c *Cycle) (*shift, error) { return readsFirst(x.shifts(c)) }

// readsFirst is the electron shift whose product has the first SMILES. The error is that
// of the first shift, where none has a product.
func readsFirst(list []*shift) (*shift, error) {
	var chosen *shift
	var firstErr error
	key := ""
	for _, s := range list {
		p, err := s.product(nil, nil)
		if err != nil {
			if firstErr == nil {
				firstErr = err
			}
			continue
		}
		if k := p.Molecule.FlatSMILES(); chosen == nil || k < key {
			chosen, key = s, k
		}
	}
	if chosen == nil {
		if firstErr == nil {
			firstErr = fmt.Errorf("the ends of a component are too close to each other")
		}
		return nil, firstErr
	}
	return chosen, nil
}

// plain is the product without configuration.
func (x *assembly) plain() (*Product, error) {
	s, err := x.best(x.cycle())
	if err != nil {
		return nil, err
	}
	return s.product(nil, nil)
}

// allAtoms lists the reacting atoms.
func (x *assembly) allAtoms() []int {
	var list []int
	for _, p := range x.parts {
		list = append(list, p.atoms...)
	}
	return list
}

// start begins an answer with the bonds that form and break.
func (x *assembly) start(kind terms.Kind, name string, reactants []*molecule.Molecule) *Answer {
	a := &Answer{Reactants: reactants, Joined: x.f.m, Kind: kind, Name: name}
	number := func(i int) int {
		if slices.Contains(x.f.made, i) {
			return 0
		}
		return x.f.m.Atoms[i].Number
	}
	for k, p := range x.parts {
		u, v := p.atoms[len(p.atoms)-1], x.parts[(k+1)%len(x.parts)].atoms[0]
		if x.f.m.BondBetween(u, v) < 0 {
			a.Bonds = append(a.Bonds, [2]int{number(u), number(v)})
		}
		if p.kind == Sigma {
			a.Broken = append(a.Broken, [2]int{number(p.atoms[0]), number(p.atoms[1])})
		}
	}
	return a
}

// process judges one choice of faces: antara[k] for component k.
func (x *assembly) process(kind terms.Kind, base *Cycle, antara []bool) (Process, error) {
	p := Process{Kind: kind, Feasible: true}
	sign := 1.0
	for k, c := range x.parts {
		p.Parts = append(p.Parts, Component{Kind: c.kind, Electrons: c.electrons(), Antara: antara[k]})
		if antara[k] {
			sign = -sign
		}
	}
	if x.named != nil {
		parts := slices.Clone(x.named)
		for k, c := range p.Parts {
			parts[k].Antara = c.Antara
		}
		p.Parts = parts
	}
	return p, p.finish(base.withSign(sign), x.f)
}

// achiral reports whether a molecule is its own mirror image.
func achiral(m *molecule.Molecule) bool { return m.SMILES() == m.Mirrored().SMILES() }
