package symmetry

import (
	"errors"
	"fmt"
)

// Orbital is one basis orbital of the reacting ring: a p orbital, a hybrid of a
// breaking or forming σ bond, a 1s orbital or one of the two lobes of a lone pair.
type Orbital struct {
	Atom      int // index in the joined reactants
	Kind      Kind
	Electrons int // electrons it brings in the reactant: 0, 1 or 2
}

// Link is the resonance integral between two orbitals that are neighbours in the
// ring, in |β|: its size in reactant and product, and the sign that the stated mode
// gives it. An orbital used on opposite faces cannot be given one phase that overlaps
// positively with both neighbours; one link then carries the minus sign.
type Link struct {
	I, J              int
	Reactant, Product float64
	Sign              float64
}

// Cycle is the ring of orbitals through which the electrons of a pericyclic process
// move: link i joins orbital i and orbital i+1, the last one closes the ring.
type Cycle struct {
	Orbitals []Orbital
	Links    []Link

	solved *[2]*Correlation // of both signs of the last link, shared by the copies of withSign
}

// Resonance integrals of the idealised ring, in |β|. The verdict does not hang on
// their values: the tests vary them.
const (
	piStrength    = 1.0 // p orbitals of one π system
	sigmaStrength = 1.5 // two hybrids pointing at each other
	ringStrength  = 1.0 // every link half-way
)

// newCycle closes a ring of orbitals; strengths are set by [Cycle.set].
func newCycle(orbitals []Orbital) *Cycle {
	c := &Cycle{Orbitals: orbitals, Links: make([]Link, len(orbitals))}
	for i := range c.Links {
		c.Links[i] = Link{I: i, J: (i + 1) % len(orbitals), Sign: 1}
	}
	c.solved = new([2]*Correlation)
	return c
}

// set gives link i its size in reactant and product.
func (c *Cycle) set(i int, reactant, product float64) {
	c.Links[i].Reactant, c.Links[i].Product = reactant, product
}

// withSign is the cycle with the sign of its last link set.
func (c *Cycle) withSign(sign float64) *Cycle {
	d := &Cycle{Orbitals: c.Orbitals, Links: append([]Link(nil), c.Links...), solved: c.solved}
	d.Links[len(d.Links)-1].Sign = sign
	return d
}

// correlation is Correlate, remembered: the modes of a process differ in one sign only.
func (c *Cycle) correlation() (*Correlation, error) {
	k := 0
	if c.Links[len(c.Links)-1].Sign < 0 {
		k = 1
	}
	if c.solved == nil || c.solved[k] == nil {
		r, err := c.Correlate()
		if err != nil || c.solved == nil {
			return r, err
		}
		c.solved[k] = r
	}
	return c.solved[k], nil
}

// electrons is the number of electrons of all orbitals.
func (c *Cycle) electrons() int {
	n := 0
	for _, o := range c.Orbitals {
		n += o.Electrons
	}
	return n
}

// check refuses cycles that are no closed-shell ring.
func (c *Cycle) check() error {
	switch n := c.electrons(); {
	case len(c.Orbitals) < 3:
		return errors.New("a pericyclic process needs a ring of at least three orbitals")
	case n%2 == 1:
		return fmt.Errorf("%d electrons take part: a radical has no closed shell to correlate; judge the ion or the closed-shell molecule", n)
	case n == 0 || n >= 2*len(c.Orbitals):
		return fmt.Errorf("%d electrons do not fit a ring of %d orbitals", n, len(c.Orbitals))
	}
	return nil
}
