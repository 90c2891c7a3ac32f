package frontier

import (
	"fmt"
	"sync"

	"lobecast/frontier/molecule"
)

// DefaultCap is the largest number of π centres that is treated unless
// [Options.Cap] says otherwise.
const DefaultCap = 1000

// Options are what a user may state about a π system.
type Options struct {
	// Twists are torsion angles between π atoms that the user knows; k of their link
	// is multiplied by cos θ.
	Twists []Twist
	// Cap is the largest number of centres; 0 means [DefaultCap].
	Cap int
}

// Perceive finds the π system of a molecule.
//
// The class of a centre follows its element, its σ neighbours and the charge of its
// group, never the drawn bond order, so that every legal way of writing a group gives
// the same matrix. The way there: notations of one and the same structure are brought
// to one form (notation.go); each atom gets its p orbitals with the electrons they
// hold (porbital.go); linear atoms get two, in two planes (linear.go); formal charges
// are moved along alternating paths to where they are most stable, and shared between
// equivalent places (charge.go); then classes, alkyl groups and inductive shifts are
// read off (classify.go, alkyl.go).
//
// Errors are *[Refusal]: no π system, a metal bonded to the structure, more centres
// than the cap; or a twist that names no link.
func Perceive(m *molecule.Molecule, opt Options) (*Pi, error) {
	for i := range m.Atoms {
		if z := m.Atoms[i].Element; z > 2 && m.Degree(i) > 0 && molecule.IsMetal(z) {
			return nil, &Refusal{Cause: ErrMetal, Atom: i,
				Reason: fmt.Sprintf("atom %d is a metal (%s) bonded to the structure, which the π model does not cover", m.Atoms[i].Number, molecule.Symbol(z)),
				Remedy: "give the structure without the metal, or as the free ion"}
		}
	}
	p := perceptions.Get().(*perception)
	defer perceptions.Put(p)
	p.examine(m)
	pi, err := p.assemble(opt)
	if err != nil {
		return nil, err
	}
	if err := pi.twist(opt.Twists); err != nil {
		return nil, err
	}
	return pi, nil
}

// examine finds the p orbitals of a molecule, their links, and where its charges stand.
func (p *perception) examine(m *molecule.Molecule) {
	p.reset(m)
	p.unifyNotation()
	p.assignOrbitals()
	p.linkOrbitals()
	p.findConjugatedRings()
	p.settleCharges()
}

var perceptions = sync.Pool{New: func() any { return new(perception) }}

// perception is the working state. Orbital i is the first p orbital of atom i,
// orbital n+i its second, at right angles to the first.
type perception struct {
	m *molecule.Molecule
	n int

	order  []int8 // of each bond, after unifyNotation
	charge []int8 // of each atom, after unifyNotation
	sigma  []int8 // neighbours including hydrogens
	double []int8 // double bonds of the atom
	triple []int8

	role   []role     // of each atom
	has    []bool     // per orbital: exists and is part of the π system
	e      []int8     // electrons in the orbital
	base   []int8     // electrons it holds when the atom is neutral
	mate   []int32    // the orbital it is paired with in a π bond, -1 for none
	linear []bool     // atom has two p orbitals in a chain of linear atoms
	pairs  [][2]int32 // links between orbitals

	ring5, ring6, ringPi []bool // atom lies in a 5-, 6-, any-membered ring of π atoms

	ringBond []bool // per bond: in a ring of π atoms of any size

	charges chargeSpace
	share   []float64 // electrons after sharing
	systems systemSpace
}

// role of an atom in the π system.
type role uint8

const (
	outside  role = iota // no p orbital
	owner                // has a p orbital of its own: double bond, charge, radical
	donor                // brings a lone pair if an owner is next to it
	acceptor             // empty orbital of boron, if a π atom is next to it
)

// size gives a slice of length n of zeros, reusing s.
func size[T any](s []T, n int) []T {
	if cap(s) < n {
		return make([]T, n, n+n/2)
	}
	s = s[:n]
	clear(s)
	return s
}

func (p *perception) reset(m *molecule.Molecule) {
	n := len(m.Atoms)
	p.m, p.n = m, n
	p.order = size(p.order, len(m.Bonds))
	p.charge, p.sigma = size(p.charge, n), size(p.sigma, n)
	p.double, p.triple = size(p.double, n), size(p.triple, n)
	p.role, p.linear = size(p.role, n), size(p.linear, n)
	p.has, p.e, p.base = size(p.has, 2*n), size(p.e, 2*n), size(p.base, 2*n)
	p.mate = size(p.mate, 2*n)
	for i := range p.mate {
		p.mate[i] = -1
	}
	p.pairs = p.pairs[:0]
	p.ring5, p.ring6, p.ringPi = size(p.ring5, n), size(p.ring6, n), size(p.ringPi, n)
	p.share = size(p.share, 2*n)
	for b := range m.Bonds {
		p.order[b] = int8(m.Bonds[b].Order)
	}
	for i := range m.Atoms {
		p.charge[i] = int8(m.Atoms[i].Charge)
		p.sigma[i] = int8(m.Degree(i) + m.Atoms[i].Hydrogens)
	}
}

// hydrogens counts the hydrogens of an atom, those that are nodes included.
func (p *perception) hydrogens(i int) int {
	h := p.m.Atoms[i].Hydrogens
	for _, nb := range p.m.Neighbours(i) {
		if p.m.Atoms[nb.Atom].Element == 1 {
			h++
		}
	}
	return h
}

// findConjugatedRings marks the atoms of rings all of whose members have a p orbital.
func (p *perception) findConjugatedRings() {
	for _, ring := range p.m.Rings() {
		if len(ring) > 8 {
			continue
		}
		all := true
		for _, a := range ring {
			if !p.has[a] {
				all = false
				break
			}
		}
		if !all {
			continue
		}
		for _, a := range ring {
			p.ringPi[a] = true
			switch len(ring) {
			case 5:
				p.ring5[a] = true
			case 6:
				p.ring6[a] = true
			}
		}
	}
}
