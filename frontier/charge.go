package frontier

// Where a formal charge can be drawn in several places along a conjugated chain, the
// best of them is taken, and equally good places share it, so that the drawing does
// not matter. The places a charge can move to are those an alternating path leads to:
// the vertices that some largest matching of the p orbitals leaves unpaired (Edmonds,
// Can. J. Math. 1965, 17, 449; Gallai 1964). Sets of unpaired vertices exchange one by
// one like bases of a matroid, so that moving charges singly to cheaper places ends in
// the same best set whatever the start.
//
// In order: charges of opposite sign that a path joins cancel; a negative charge goes
// next to a positive atom that cannot lose its charge (nitro, N-oxide, azide, diazo,
// nitrone, ylide), one to each; other charges go to the element that bears them best,
// O before N before C for anions, N before S before O before C for cations, inside
// an aromatic ring for cations and on it for phenolates.

// chargeSpace is the working state of settleCharges.
type chargeSpace struct {
	head, next []int32 // neighbours of each orbital, as linked lists
	to         []int32

	used          []bool
	parent, basis []int32
	queue         []int32
	blossom, path []bool

	union []int32
	bound []bool
	even  []int32
	extra []int32
}

func (c *chargeSpace) reset(n int) {
	c.head = size(c.head, n)
	for i := range c.head {
		c.head[i] = -1
	}
	c.next, c.to = c.next[:0], c.to[:0]
	c.used, c.parent, c.basis = size(c.used, n), size(c.parent, n), size(c.basis, n)
	c.blossom, c.path, c.bound = size(c.blossom, n), size(c.path, n), size(c.bound, n)
	c.union = size(c.union, n)
	for i := range c.union {
		c.union[i] = int32(i)
	}
}

func (c *chargeSpace) edge(a, b int32) {
	c.to = append(c.to, b)
	c.next = append(c.next, c.head[a])
	c.head[a] = int32(len(c.to) - 1)
}

func find(union []int32, i int32) int32 {
	for union[i] != i {
		union[i] = union[union[i]]
		i = union[i]
	}
	return i
}

func join(union []int32, a, b int32) {
	a, b = find(union, a), find(union, b)
	if a > b {
		a, b = b, a
	}
	union[b] = a
}

// excess is the formal charge of an orbital, negative for surplus electrons.
func (p *perception) excess(o int32) int8 { return p.base[o] - p.e[o] }

// atom of an orbital.
func (p *perception) atom(o int32) int {
	if int(o) >= p.n {
		return int(o) - p.n
	}
	return int(o)
}

// settleCharges moves charges to their best places and fills p.share.
func (p *perception) settleCharges() {
	charged := false
	for o := range p.has {
		if p.has[o] {
			p.share[o] = float64(p.e[o])
			charged = charged || p.e[o] != p.base[o]
		}
	}
	if !charged {
		return
	}
	c := &p.charges
	c.reset(2 * p.n)
	for _, l := range p.pairs {
		c.edge(l[0], l[1])
		c.edge(l[1], l[0])
	}
	p.cancelCharges()
	p.bindAnions()
	for again, rounds := true, 0; again && rounds < 4*p.n; rounds++ {
		again = false
		for o := range p.has {
			if p.has[o] && p.moveAnion(int32(o), false) {
				again = true
			}
		}
		for o := range p.has {
			if p.has[o] && p.moveCation(int32(o), false) {
				again = true
			}
		}
	}
	for o := range p.has { // now let equals share
		if p.has[o] {
			p.moveAnion(int32(o), true)
			p.moveCation(int32(o), true)
		}
	}
	p.shareBesidePositive()
	sum, count := make([]float64, 2*p.n), make([]int, 2*p.n)
	for o := range p.has {
		if p.has[o] {
			r := find(c.union, int32(o))
			sum[r] += float64(p.e[o])
			count[r]++
		}
	}
	for o := range p.has {
		if p.has[o] {
			r := find(c.union, int32(o))
			p.share[o] = sum[r] / float64(count[r])
		}
	}
}

// grow searches alternating paths from the unpaired orbital root, with shrinking of
// odd cycles. Only paired orbitals take part, and holes where asked. It returns an
// unpaired orbital it reached (target, or a hole), or -1; c.used then marks what a
// path of even length leads to.
func (p *perception) grow(root, target, banned int32, holes bool) int32 {
	c := &p.charges
	clear(c.used)
	for i := range c.parent {
		c.parent[i], c.basis[i] = -1, int32(i)
	}
	c.used[root] = true
	c.queue = append(c.queue[:0], root)
	for head := 0; head < len(c.queue); head++ {
		v := c.queue[head]
		for k := c.head[v]; k >= 0; k = c.next[k] {
			to := c.to[k]
			if to == banned || c.basis[v] == c.basis[to] || p.mate[v] == to {
				continue
			}
			hole := holes && p.e[to] == 0 && p.excess(to) > 0
			if to != root && to != target && !hole && (p.e[to] != 1 || p.mate[to] < 0) {
				continue
			}
			switch {
			case to == root || p.mate[to] >= 0 && c.parent[p.mate[to]] >= 0:
				base := p.commonBase(v, to)
				if base < 0 {
					continue // the two lie in no odd cycle through the root
				}
				clear(c.blossom)
				p.markPath(v, base, to)
				p.markPath(to, base, v)
				for i := range c.basis {
					if c.blossom[c.basis[i]] {
						c.basis[i] = base
						if !c.used[i] {
							c.used[i] = true
							c.queue = append(c.queue, int32(i))
						}
					}
				}
			case c.parent[to] < 0:
				c.parent[to] = v
				if p.mate[to] < 0 {
					return to
				}
				c.used[p.mate[to]] = true
				c.queue = append(c.queue, p.mate[to])
			}
		}
	}
	return -1
}

// commonBase is where the alternating paths back from a and b meet, -1 where they do
// not.
func (p *perception) commonBase(a, b int32) int32 {
	c := &p.charges
	clear(c.path)
	for {
		a = c.basis[a]
		c.path[a] = true
		if p.mate[a] < 0 || c.parent[p.mate[a]] < 0 {
			break
		}
		a = c.parent[p.mate[a]]
	}
	for {
		b = c.basis[b]
		if c.path[b] {
			return b
		}
		if p.mate[b] < 0 || c.parent[p.mate[b]] < 0 {
			return -1
		}
		b = c.parent[p.mate[b]]
	}
}

func (p *perception) markPath(v, base, child int32) {
	c := &p.charges
	for c.basis[v] != base {
		c.blossom[c.basis[v]], c.blossom[c.basis[p.mate[v]]] = true, true
		c.parent[v] = child
		child = p.mate[v]
		v = c.parent[p.mate[v]]
	}
}

// augment pairs along the path that ends at v.
func (p *perception) augment(v int32) {
	for v >= 0 {
		u := p.charges.parent[v]
		w := p.mate[u]
		p.mate[v], p.mate[u] = u, v
		v = w
	}
}

// shift moves the unpaired state of a to c, which an even path from a must lead to.
func (p *perception) shift(a, c int32) {
	if a == c {
		return
	}
	x := p.mate[c]
	p.mate[c], p.mate[x] = -1, -1
	e := p.e[c]
	p.e[c] = p.e[a]
	p.e[a] = e
	if p.grow(a, x, c, false) != x { // cannot be, by the choice of c
		p.mate[c], p.mate[x] = x, c
		p.e[a], p.e[c] = p.e[c], e
		return
	}
	p.augment(x)
}

// reach lists the orbitals an even path leads to from root, root included.
func (p *perception) reach(root int32) []int32 {
	c := &p.charges
	p.grow(root, -1, -1, false)
	c.even = c.even[:0]
	for o, u := range c.used {
		if u {
			c.even = append(c.even, int32(o))
		}
	}
	return c.even
}

func (p *perception) isAnion(o int32) bool  { return p.has[o] && p.e[o] == 2 && p.excess(o) < 0 }
func (p *perception) isCation(o int32) bool { return p.has[o] && p.excess(o) > 0 }

// cancelCharges pairs off charges of opposite sign that an alternating path joins.
func (p *perception) cancelCharges() {
	for o := range p.has {
		a := int32(o)
		if !p.isAnion(a) {
			continue
		}
		if hole := p.grow(a, -1, -1, true); hole >= 0 {
			p.e[a], p.e[hole] = 1, 1
			p.augment(hole)
			continue
		}
		for _, c := range p.reach(a) {
			if c != a && p.e[c] == 1 && p.excess(c) > 0 {
				p.shift(a, c)
				break
			}
		}
	}
}

// positive says whether atom i is a positive atom that holds an anion beside it: a
// linear N+, a three-coordinate N+ with its p orbital, or an onium atom outside the
// π system.
func (p *perception) positive(i int) bool {
	if p.has[i] {
		return p.linear[i] && p.charge[i] > 0 || p.e[i] == 1 && p.excess(int32(i)) > 0 && p.m.Atoms[i].Element == 7
	}
	if p.charge[i] <= 0 || p.m.Atoms[i].Element <= 6 || p.sigma[i] < 3 {
		return false
	}
	net := p.charge[i] // less what O− outside the π system makes up for, as in a sulfone
	for _, h := range p.m.Neighbours(i) {
		if !p.has[h.Atom] && p.charge[h.Atom] < 0 {
			net += p.charge[h.Atom]
		}
	}
	return net > 0
}

// binds says whether positive atom i holds an anion on orbital o of a neighbour. Ring
// atoms of mesoionic compounds are left to compete with the oxygen outside the ring.
func (p *perception) binds(i int, o int32) bool {
	a := p.atom(o)
	if int(o) >= p.n || !p.has[o] {
		return false
	}
	switch p.m.Atoms[a].Element {
	case 6, 7:
		return p.has[i] && p.linear[i] || !p.ringPi[a]
	case 8, 16:
		return p.has[i]
	}
	return false
}

// bindAnions gives each positive atom one anion on a neighbour, where there is one or
// where one can come to, and marks it.
func (p *perception) bindAnions() {
	c := &p.charges
	m := p.m
	for i := range m.Atoms {
		if !p.positive(i) {
			continue
		}
		for _, h := range m.Neighbours(i) {
			if o := int32(h.Atom); p.isAnion(o) && p.binds(i, o) && !c.bound[o] {
				c.bound[o] = true
				break
			}
		}
	}
	for i := range m.Atoms {
		if !p.positive(i) || p.holds(i) {
			continue
		}
		best, from, cost := int32(-1), int32(-1), 0.0
		for a := range p.has {
			if !p.isAnion(int32(a)) || c.bound[a] {
				continue
			}
			for _, o := range p.reach(int32(a)) {
				at := p.atom(o)
				if p.m.BondBetween(i, at) < 0 || !p.binds(i, o) || p.e[o] != 1 && o != int32(a) {
					continue
				}
				if k := p.anionCost(o); best < 0 || k < cost-1e-9 {
					best, from, cost = o, int32(a), k
				}
			}
		}
		if best >= 0 {
			p.shift(from, best)
			c.bound[best] = true
		}
	}
}

// holds says whether a bound anion stands beside atom i.
func (p *perception) holds(i int) bool {
	for _, h := range p.m.Neighbours(i) {
		if p.charges.bound[h.Atom] && p.isAnion(int32(h.Atom)) && p.binds(i, int32(h.Atom)) {
			return true
		}
	}
	return false
}

// anionCost orders the places of a negative charge.
func (p *perception) anionCost(o int32) float64 {
	a := p.atom(o)
	switch p.m.Atoms[a].Element {
	case 8:
		return 0 - p.onRing(a)
	case 16, 34, 52:
		return -0.5 - p.onRing(a)
	case 7:
		if p.linear[a] && p.sigma[a] == 1 {
			for _, h := range p.m.Neighbours(a) {
				if p.charge[h.Atom] <= 0 { // nitrile
					return 6
				}
			}
		}
		if p.ring5[a] {
			return 1.8
		}
		return 2
	case 6, 14, 32:
		if p.ring5[a] {
			return 3.8
		}
		return 4
	}
	return 5
}

// onRing favours a place on a six-membered ring of π atoms: phenolate before enolate.
func (p *perception) onRing(a int) float64 {
	for _, h := range p.m.Neighbours(a) {
		if p.ring6[h.Atom] {
			return 0.2
		}
	}
	return 0
}

// mayHold says whether a negative charge may stand on orbital o.
func (p *perception) mayHold(o int32) bool {
	if p.e[o] != 1 || p.excess(o) != 0 {
		return false
	}
	switch p.m.Atoms[p.atom(o)].Element {
	case 5, 9, 17, 35, 53:
		return false
	}
	return !(p.linear[p.atom(o)] && p.charge[p.atom(o)] > 0)
}

// moveAnion moves the anion on orbital a to the cheapest place in reach, or, to share,
// joins it with the places as cheap as its own. It reports whether it moved.
func (p *perception) moveAnion(a int32, sharing bool) bool {
	if !p.isAnion(a) {
		return false
	}
	c := &p.charges
	best, cost := a, p.anionCost(a)
	for _, o := range p.reach(a) {
		if o == a || !p.mayHold(o) || c.bound[a] && !p.samePositive(a, o) {
			continue
		}
		k := p.anionCost(o)
		switch {
		case sharing && k < cost+1e-9 && k > cost-1e-9:
			join(c.union, a, o)
		case !sharing && k < cost-1e-9:
			best, cost = o, k
		}
	}
	if best == a {
		return false
	}
	p.shift(a, best)
	c.bound[a], c.bound[best] = c.bound[best], c.bound[a]
	return true
}

// samePositive says whether the atoms of both orbitals stand beside one positive atom
// that binds on either.
func (p *perception) samePositive(a, o int32) bool {
	for _, h := range p.m.Neighbours(p.atom(a)) {
		if p.positive(h.Atom) && p.m.BondBetween(h.Atom, p.atom(o)) >= 0 && p.binds(h.Atom, a) && p.binds(h.Atom, o) {
			return true
		}
	}
	return false
}

// shareBesidePositive joins like anions beside one positive atom (a nitronate), which
// cannot be told apart whichever of them came to be the bound one.
func (p *perception) shareBesidePositive() {
	m := p.m
	for i := range m.Atoms {
		if !p.has[i] || !p.positive(i) {
			continue
		}
		first := int32(-1)
		for _, h := range m.Neighbours(i) {
			o := int32(h.Atom)
			if m.Atoms[h.Atom].Element != 8 || p.sigma[h.Atom] != 1 || !p.has[o] {
				continue
			}
			if first < 0 {
				first = o
			} else {
				join(p.charges.union, first, o)
			}
		}
	}
}

// cationCost orders the places of a positive charge: on a lone-pair donor that then
// has a double bond, or, where there is none, an empty orbital of carbon.
func (p *perception) cationCost(o int32) float64 {
	a := p.atom(o)
	k := 20.0
	switch p.m.Atoms[a].Element {
	case 7:
		k = 0.5
		if p.ring5[a] || p.ring6[a] {
			k = 0
		}
	case 16, 34, 52:
		k = 1
	case 15, 33:
		k = 1.5
	case 8:
		k = 2
		if p.ring6[a] {
			k = 1.8
		}
	case 6, 14, 32:
		k = 10
	}
	for _, h := range p.m.Neighbours(a) {
		if p.isAnion(int32(h.Atom)) {
			return k - 1
		}
	}
	return k
}

// holeCost orders the places of an empty orbital: carbon, hardly ever a heteroatom.
func (p *perception) holeCost(o int32) float64 {
	switch p.m.Atoms[p.atom(o)].Element {
	case 6, 14, 32:
		return p.cationCost(o)
	}
	return 30
}

// moveCation moves the positive charge at orbital v to the cheapest place, or joins
// it with those as cheap. It reports whether it moved.
func (p *perception) moveCation(v int32, sharing bool) bool {
	if !p.isCation(v) {
		return false
	}
	c := &p.charges
	root := v
	if p.e[v] == 1 { // take back the lone pair: the partner is then the hole
		root = p.mate[v]
		if root < 0 {
			return false
		}
		p.mate[v], p.mate[root] = -1, -1
		p.e[v], p.e[root] = 2, 0
	}
	restore := func() {
		if root != v {
			p.mate[v], p.mate[root] = root, v
			p.e[v], p.e[root] = 1, 1
		}
	}
	even := p.reach(root)
	bestHole, bestDonor, cost := root, v, p.cationCost(v)
	if root == v {
		bestDonor, cost = -1, p.holeCost(v)
	}
	c.extra = c.extra[:0]
	for _, h := range even {
		for k := c.head[h]; k >= 0; k = c.next[k] {
			d := c.to[k]
			if p.e[d] != 2 || p.base[d] != 2 || int(d) >= p.n {
				continue
			}
			switch p.m.Atoms[p.atom(d)].Element {
			case 9, 17, 35, 53:
				continue
			}
			kd := p.cationCost(d)
			if kd < cost-1e-9 {
				bestHole, bestDonor, cost = h, d, kd
			}
			if kd < p.cationCost(v)+1e-9 && kd > p.cationCost(v)-1e-9 {
				c.extra = append(c.extra, d)
			}
		}
		if root == v && h != v && p.excess(h) == 0 {
			kh := p.holeCost(h)
			if kh < cost-1e-9 {
				bestHole, bestDonor, cost = h, -1, kh
			}
			if kh < p.holeCost(v)+1e-9 && kh > p.holeCost(v)-1e-9 {
				c.extra = append(c.extra, h)
			}
		}
	}
	if sharing {
		for _, d := range c.extra {
			join(c.union, v, d)
		}
	}
	if sharing || bestHole == root && (bestDonor == v || root == v && bestDonor < 0) {
		restore()
		return false
	}
	p.shift(root, bestHole)
	if bestDonor >= 0 {
		p.mate[bestHole], p.mate[bestDonor] = bestDonor, bestHole
		p.e[bestHole], p.e[bestDonor] = 1, 1
	}
	return true
}
