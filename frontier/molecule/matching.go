package molecule

import "sync"

// matcher finds matchings of double bonds in a general graph of p orbitals, by
// augmenting paths with blossoms (Edmonds, Can. J. Math. 17, 449 (1965)). Vertices
// are atoms; the graph is given by the bonds that may be double.
type matcher struct {
	m        *Molecule
	usable   []bool  // by bond: may be double
	barred   []bool  // by atom: left out for the time being
	mate     []int32 // partner of each atom, -1 when single
	optional []bool  // atoms that may stay single although they are in the graph; nil when there are none

	base, parent []int32
	outer        []bool
	queue        []int32
	touched      []int32
	mark         []int32
	stamp        int32

	needs []bool  // scratch of the callers, by atom
	free  []int32 // scratch of greedy
	ends  []int32
	saved []int32
}

var matchers = sync.Pool{New: func() any { return new(matcher) }}

// borrowMatcher returns a matcher without usable bonds and without partners.
func borrowMatcher(m *Molecule) *matcher {
	n := len(m.Atoms)
	k := matchers.Get().(*matcher)
	k.m, k.optional = m, nil
	k.usable = sized(k.usable, len(m.Bonds))
	k.barred = sized(k.barred, n)
	k.outer = sized(k.outer, n)
	k.needs = sized(k.needs, n)
	k.mate = sized(k.mate, n)
	k.base = sized(k.base, n)
	k.parent = sized(k.parent, n)
	k.mark = sized(k.mark, n)
	k.free = sized(k.free, n)
	clear(k.usable)
	clear(k.barred)
	clear(k.outer)
	clear(k.needs)
	clear(k.mark)
	k.stamp = 0
	for i := range k.mate {
		k.mate[i], k.base[i], k.parent[i] = -1, int32(i), -1
	}
	return k
}

// newMatcher returns a matcher for the graph of the bonds that usable names.
func newMatcher(m *Molecule, usable func(bond int) bool) *matcher {
	k := borrowMatcher(m)
	for b := range m.Bonds {
		k.usable[b] = usable(b)
	}
	return k
}

// release gives the matcher back; its slices must not be used afterwards.
func (k *matcher) release() {
	k.m = nil
	if cap(k.mate) <= 4096 {
		matchers.Put(k)
	}
}

// augment looks for an augmenting path from the single atom root and applies it. It
// ends at another single atom, or at an optional atom that becomes single.
func (k *matcher) augment(root int) bool {
	defer k.reset()
	k.reach(int32(root))
	k.outer[root] = true
	k.queue = append(k.queue[:0], int32(root))
	for head := 0; head < len(k.queue); head++ {
		v := k.queue[head]
		if k.optional != nil && k.optional[v] && int(v) != root && k.mate[v] >= 0 {
			k.flip(v)
			return true
		}
		for _, h := range k.m.adjacency[v] {
			w := int32(h.Atom)
			if !k.usable[h.Bond] || k.barred[w] {
				continue
			}
			if k.base[v] == k.base[w] || k.mate[v] == w {
				continue
			}
			if int(w) == root || k.mate[w] >= 0 && k.parent[k.mate[w]] >= 0 {
				k.contract(v, w)
				continue
			}
			if k.parent[w] >= 0 {
				continue
			}
			k.reach(w)
			k.parent[w] = v
			if k.mate[w] < 0 {
				k.apply(w)
				return true
			}
			x := k.mate[w]
			k.reach(x)
			k.outer[x] = true
			k.queue = append(k.queue, x)
		}
	}
	return false
}

// reach notes an atom whose marks must be reset.
func (k *matcher) reach(v int32) { k.touched = append(k.touched, v) }

func (k *matcher) reset() {
	for _, v := range k.touched {
		k.base[v], k.parent[v], k.outer[v] = v, -1, false
	}
	k.touched = k.touched[:0]
}

// apply matches along the path that ends at the single atom w.
func (k *matcher) apply(w int32) {
	for w >= 0 {
		v := k.parent[w]
		next := k.mate[v]
		k.mate[w], k.mate[v] = v, w
		w = next
	}
}

// flip matches along the even path that ends at atom v, which becomes single.
func (k *matcher) flip(v int32) {
	w := k.mate[v]
	k.mate[v] = -1
	k.mate[w] = -1
	k.apply(w)
}

// contract shrinks the odd cycle that the edge between the outer atoms v and w closes.
func (k *matcher) contract(v, w int32) {
	b := k.common(v, w)
	k.stamp++
	inside := k.stamp
	k.walk(v, b, w, inside)
	k.walk(w, b, v, inside)
	for _, x := range k.touched {
		if k.mark[k.base[x]] == inside {
			k.base[x] = b
			if !k.outer[x] {
				k.outer[x] = true
				k.queue = append(k.queue, x)
			}
		}
	}
}

// common is the base of the blossom: the nearest common base of v and w.
func (k *matcher) common(v, w int32) int32 {
	k.stamp++
	for {
		v = k.base[v]
		k.mark[v] = k.stamp
		if k.mate[v] < 0 {
			break
		}
		v = k.parent[k.mate[v]]
		if v < 0 {
			break
		}
	}
	for {
		w = k.base[w]
		if k.mark[w] == k.stamp {
			return w
		}
		w = k.parent[k.mate[w]]
	}
}

// walk marks the bases from v down to the base b and turns the parents round.
func (k *matcher) walk(v, b, child, inside int32) {
	for k.base[v] != b {
		x := k.mate[v]
		k.mark[k.base[v]], k.mark[k.base[x]] = inside, inside
		k.parent[v] = child
		child = x
		v = k.parent[x]
	}
}
