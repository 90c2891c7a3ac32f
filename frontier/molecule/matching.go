package molecule

// matcher finds matchings of double bonds in a general graph of p orbitals, by
// augmenting paths with blossoms (Edmonds, Can. J. Math. 17, 449 (1965)). Vertices
// are atoms; the graph is given by the bonds that may be double.
type matcher struct {
	m        *Molecule
	usable   func(bond int) bool
	mate     []int32 // partner of each atom, -1 when single
	optional []bool  // atoms that may stay single although they are in the graph

	base, parent []int32
	outer        []bool
	queue        []int32
	touched      []int32
	mark         []int32
	stamp        int32
}

func newMatcher(m *Molecule, usable func(int) bool) *matcher {
	n := len(m.Atoms)
	k := &matcher{m: m, usable: usable}
	buf := make([]int32, 4*n)
	k.mate, k.base, k.parent, k.mark = buf[:n:n], buf[n:2*n:2*n], buf[2*n:3*n:3*n], buf[3*n:]
	k.outer = make([]bool, n)
	for i := range k.mate {
		k.mate[i], k.base[i], k.parent[i] = -1, int32(i), -1
	}
	return k
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
			if !k.usable(h.Bond) {
				continue
			}
			w := int32(h.Atom)
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
