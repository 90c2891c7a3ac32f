package frontier

import (
	"fmt"
	"math"
)

// systemSpace is the working state of assemble.
type systemSpace struct {
	root   []int32 // union-find over orbitals
	real   []int32 // real p orbitals per root
	bent   []bool  // per root: reaches beyond linear chains and their ends
	local  []bool  // per root
	centre []int32 // per orbital
	bound  []alkylGroup
}

// alkylGroup is a hyperconjugating group on a π carbon.
type alkylGroup struct {
	carbon int   // the sp3 carbon
	on     int32 // orbital of the π carbon
	class  Class
	centre int32
}

// assemble builds the result from orbitals, links and settled charges.
func (p *perception) assemble(opt Options) (*Pi, error) {
	m, n := p.m, p.n
	sp := &p.systems
	sp.root = size(sp.root, 2*n)
	for i := range sp.root {
		sp.root[i] = int32(i)
	}
	for _, l := range p.pairs {
		join(sp.root, l[0], l[1])
	}
	sp.real, sp.bent = size(sp.real, 2*n), size(sp.bent, 2*n)
	sp.local, sp.centre = size(sp.local, 2*n), size(sp.centre, 2*n)
	total, largest := 0, int32(0)
	for o := range p.has {
		if !p.has[o] {
			continue
		}
		r := find(sp.root, int32(o))
		sp.real[r]++
		total++
		largest = max(largest, sp.real[r])
		if a := p.atom(int32(o)); !p.linear[a] && !p.chainEnd(a) {
			sp.bent[r] = true
		}
	}
	if largest < 2 {
		return nil, &Refusal{Cause: ErrNoPi, Atom: -1,
			Reason: "the structure has no π system: no double or triple bond and no aromatic ring",
			Remedy: "Hückel theory says nothing about saturated structures"}
	}
	limit := opt.Cap
	if limit <= 0 {
		limit = DefaultCap
	}
	if total > limit {
		return nil, &Refusal{Cause: ErrSize, Atom: -1,
			Reason: fmt.Sprintf("the structure has %d π centres, more than the cap of %d", total, limit),
			Remedy: "cut it down to the part that reacts"}
	}
	p.markLocal()
	p.findAlkyl()

	count := total + len(sp.bound)
	pi := &Pi{Molecule: m, Centres: make([]Centre, 0, count), CentreOf: make([]int, n)}
	rootOf := make([]int32, 0, count)
	for i := range pi.CentreOf {
		pi.CentreOf[i] = -1
	}
	for i := range m.Atoms {
		for _, o := range [2]int32{int32(i), int32(n + i)} {
			if !p.has[o] {
				continue
			}
			c := len(pi.Centres)
			sp.centre[o] = int32(c)
			r := find(sp.root, o)
			rootOf = append(rootOf, r)
			pi.Centres = append(pi.Centres, Centre{Atom: i, Class: p.classify(o), Electrons: p.share[o]})
			if !sp.local[r] && pi.CentreOf[i] < 0 {
				pi.CentreOf[i] = c
			}
		}
	}
	pi.Links = make([]Link, 0, len(p.pairs)+len(sp.bound))
	for _, l := range p.pairs {
		a, b := int(sp.centre[l[0]]), int(sp.centre[l[1]])
		if a > b {
			a, b = b, a
		}
		pi.Links = append(pi.Links, Link{I: a, J: b, Cos: 1})
	}
	for g := range sp.bound {
		group := &sp.bound[g]
		r := find(sp.root, group.on)
		c := -1
		for f := 0; f < g; f++ { // one centre where a group closes a ring on one system
			if other := &sp.bound[f]; other.carbon == group.carbon && find(sp.root, other.on) == r {
				c = int(other.centre)
			}
		}
		if c < 0 {
			c = len(pi.Centres)
			pi.Centres = append(pi.Centres, Centre{Atom: group.carbon, Class: group.class, Electrons: 2, Alkyl: true})
			rootOf = append(rootOf, r)
		}
		group.centre = int32(c)
		pi.Links = append(pi.Links, Link{I: int(sp.centre[group.on]), J: c, Cos: 1})
	}
	p.linkKinds(pi)
	p.findInductive(pi)
	p.gatherSystems(pi, rootOf)
	p.warn(pi)
	return pi, nil
}

// chainEnd says whether bent atom i ends a cumulene or carries the second lone pair
// of a linear chain, so that its orbital alone does not make a conjugated system.
func (p *perception) chainEnd(i int) bool {
	if p.has[p.n+i] {
		return true
	}
	for _, h := range p.m.Neighbours(i) {
		if p.order[h.Bond] == 2 && p.linear[h.Atom] {
			// the end of a cumulene, unless its orbital reaches further
			for _, g := range p.m.Neighbours(i) {
				if g.Atom != h.Atom && p.has[g.Atom] {
					return false
				}
			}
			return true
		}
	}
	return false
}

// markLocal decides which systems are local π bonds: the second π bond of a triple
// bond; along a cumulene with an even number of double bonds, the plane that nothing
// conjugates with, the smaller one where neither does, both in an allene alone; along
// an odd one, the inner plane.
func (p *perception) markLocal() {
	sp := &p.systems
	for i := range p.m.Atoms {
		if !p.linear[i] {
			continue
		}
		a, b := find(sp.root, int32(i)), find(sp.root, int32(p.n+i))
		switch {
		case a == b:
		case p.triple[i] > 0:
			sp.local[b] = !sp.bent[b]
		case sp.bent[a] != sp.bent[b]:
			sp.local[a], sp.local[b] = !sp.bent[a], !sp.bent[b]
		case sp.bent[a]:
		case sp.real[a] < sp.real[b]:
			sp.local[a] = true
		case sp.real[b] < sp.real[a]:
			sp.local[b] = true
		case sp.real[a] == 2:
			sp.local[a], sp.local[b] = true, true
		}
	}
}

// gatherSystems lists the members of each system, conjugated ones first.
func (p *perception) gatherSystems(pi *Pi, rootOf []int32) {
	sp := &p.systems
	number := sp.real // now: number of the system of a root, -1 before it has one
	for i := range number {
		number[i] = -1
	}
	systems := 0
	for _, local := range [2]bool{false, true} {
		for _, r := range rootOf {
			if sp.local[r] == local && number[r] < 0 {
				number[r] = int32(systems)
				systems++
				pi.Local = append(pi.Local, local)
			}
		}
	}
	pi.Systems = make([][]int, systems)
	sizes := make([]int, systems)
	for _, r := range rootOf {
		sizes[number[r]]++
	}
	all := make([]int, len(rootOf))
	for s, k := range sizes {
		pi.Systems[s], all = all[:0:k], all[k:]
	}
	for c, r := range rootOf {
		pi.Systems[number[r]] = append(pi.Systems[number[r]], c)
	}
}

// warn adds what the report must say about the perception.
func (p *perception) warn(pi *Pi) {
	for i := range p.m.Atoms {
		a := &p.m.Atoms[i]
		switch {
		case a.Unpaired == 1 && p.has[i]:
			pi.Warnings = append(pi.Warnings, fmt.Sprintf("atom %d carries an unpaired electron: the structure is treated as a radical", a.Number))
		case a.Unpaired > 1 && p.has[i] && p.e[i] == 0:
			pi.Warnings = append(pi.Warnings, fmt.Sprintf("atom %d is a carbene beside a lone pair: it is treated as a singlet with an empty p orbital", a.Number))
		case a.Unpaired > 1 && p.has[i]:
			pi.Warnings = append(pi.Warnings, fmt.Sprintf("atom %d carries %d unpaired electrons; one of them is counted in its p orbital", a.Number, a.Unpaired))
		}
	}
	pi.warnTwists(p.ringPi)
}

// Atoms is the number of real p orbitals of the conjugated systems: hyperconjugating
// alkyl groups and local π bonds are not counted.
func (pi *Pi) Atoms() int {
	n := 0
	for s, members := range pi.Systems {
		if pi.Local[s] {
			continue
		}
		for _, c := range members {
			if !pi.Centres[c].Alkyl {
				n++
			}
		}
	}
	return n
}

// Electrons is the number of π electrons on the real p orbitals of the conjugated
// systems.
func (pi *Pi) Electrons() float64 {
	n := 0.0
	for s, members := range pi.Systems {
		if pi.Local[s] {
			continue
		}
		for _, c := range members {
			if !pi.Centres[c].Alkyl {
				n += pi.Centres[c].Electrons
			}
		}
	}
	return whole(n)
}

// SystemElectrons is the number of electrons of one system, alkyl groups included.
func (pi *Pi) SystemElectrons(system int) float64 {
	n := 0.0
	for _, c := range pi.Systems[system] {
		n += pi.Centres[c].Electrons
	}
	return whole(n)
}

// whole takes the rounding noise of shared electrons off a sum.
func whole(n float64) float64 { return math.Round(n*1e9) / 1e9 }
