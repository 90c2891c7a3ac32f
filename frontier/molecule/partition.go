package molecule

import "slices"

// partition is an ordered partition of the atoms of one component into cells, refined
// until the atoms of a cell see the same numbers of bonds of each kind into every
// other cell. All choices depend on cells and counts only, never on atom indices, so
// that renumbered molecules give the same sequence of cells.
type partition struct {
	n     int
	start []int32 // neighbours of v are nbr[start[v]:start[v+1]]
	nbr   []int32
	label []uint8 // bond label of each: order, or 5 for aromatic

	elem []int32 // atoms, cell after cell
	pos  []int32 // place of each atom in elem
	cell []int32 // first place of each atom's cell
	size []int32 // size of the cell that begins at a place
	free int     // number of cells

	queue  []int32 // cells still to split others, by first place
	queued []bool
	key    []uint64
	moved  []int32 // by first place: atoms of the cell reached by the splitter
	hit    []int32 // cells reached
	buffer []int32
	trace  uint64 // hash of all that refinement has seen
}

// resize readies the partition for n atoms and e bond ends.
func (p *partition) resize(n, e int) {
	p.n = n
	p.start = sized(p.start, n+1)
	p.nbr = sized(p.nbr, e)
	p.label = sized(p.label, e)
	p.elem = sized(p.elem, n)
	p.pos = sized(p.pos, n)
	p.cell = sized(p.cell, n)
	p.size = sized(p.size, n)
	p.queued = sized(p.queued, n)
	p.key = sized(p.key, n)
	p.moved = sized(p.moved, n)
	clear(p.moved)
	clear(p.queued)
	p.queue, p.hit = p.queue[:0], p.hit[:0]
	p.trace = 0
}

// sized returns a slice of length n, reusing s where it is large enough.
func sized[T any](s []T, n int) []T {
	if cap(s) >= n {
		return s[:n]
	}
	return make([]T, n, n+n/4)
}

func mix(h, x uint64) uint64 {
	h ^= x + 0x9e3779b97f4a7c15 + h<<6 + h>>2
	h *= 0xff51afd7ed558ccd
	return h ^ h>>32
}

// begin makes the cells of equal keys, in the order of the keys, and queues them all.
func (p *partition) begin() {
	for i := range p.elem {
		p.elem[i] = int32(i)
	}
	p.sortByKey(p.elem)
	p.free = 0
	for i := 0; i < p.n; {
		j := i + 1
		k := p.key[p.elem[i]]
		for j < p.n && p.key[p.elem[j]] == k {
			j++
		}
		p.newCell(i, j)
		p.push(int32(i))
		p.trace = mix(mix(p.trace, k), uint64(j))
		i = j
	}
	clear(p.key)
}

func (p *partition) newCell(from, to int) {
	p.size[from] = int32(to - from)
	for i := from; i < to; i++ {
		v := p.elem[i]
		p.cell[v], p.pos[v] = int32(from), int32(i)
	}
	p.free++
}

func (p *partition) push(c int32) {
	if !p.queued[c] {
		p.queued[c] = true
		p.queue = append(p.queue, c)
	}
}

func (p *partition) sortByKey(atoms []int32) {
	if len(atoms) <= 12 {
		for i := 1; i < len(atoms); i++ {
			v := atoms[i]
			k := p.key[v]
			j := i
			for ; j > 0 && p.key[atoms[j-1]] > k; j-- {
				atoms[j] = atoms[j-1]
			}
			atoms[j] = v
		}
		return
	}
	slices.SortFunc(atoms, func(a, b int32) int {
		switch ka, kb := p.key[a], p.key[b]; {
		case ka < kb:
			return -1
		case ka > kb:
			return 1
		}
		return 0
	})
}

// split makes cells of equal keys of the atoms at places from … to of one cell, whose
// first untouched atoms (key 0) stay in front; keys are cleared. Of the new cells the
// largest need not split others unless the old one still had to.
func (p *partition) split(c int32) {
	size := p.size[c]
	from := c + size - p.moved[c]
	tail := p.elem[from : c+size]
	p.moved[c] = 0
	p.sortByKey(tail)
	first, last := p.key[tail[0]], p.key[tail[len(tail)-1]]
	p.trace = mix(p.trace, uint64(c)<<32|uint64(len(tail)))
	if from == c && first == last {
		p.trace = mix(p.trace, first)
		for _, v := range tail {
			p.key[v] = 0
		}
		return
	}
	was := p.queued[c]
	largest, largestSize := c, from-c
	p.free--
	if from > c {
		p.size[c] = from - c
		p.free++
	}
	for i := from; i < c+size; {
		k := p.key[p.elem[i]]
		j := i + 1
		for j < c+size && p.key[p.elem[j]] == k {
			j++
		}
		p.newCell(int(i), int(j))
		p.trace = mix(mix(p.trace, k), uint64(j))
		if j-i > largestSize {
			largest, largestSize = i, j-i
		}
		i = j
	}
	for i := c; i < c+size; i += p.size[i] {
		if was || i != largest {
			p.push(i)
		}
	}
	for _, v := range tail {
		p.key[v] = 0
	}
}

// touch notes that the splitter reaches atom v with weight w.
func (p *partition) touch(v int32, w uint64) {
	if p.key[v] == 0 {
		c := p.cell[v]
		if p.size[c] == 1 {
			p.trace += uint64(c+1) * (w ^ 0x9e3779b97f4a7c15) // order does not matter
			return
		}
		if p.moved[c] == 0 {
			p.hit = append(p.hit, c)
		}
		p.moved[c]++
		at := c + p.size[c] - p.moved[c]
		u := p.elem[at]
		p.elem[p.pos[v]], p.elem[at] = u, v
		p.pos[u], p.pos[v] = p.pos[v], at
	}
	p.key[v] += w
}

// splitHit splits all cells reached, in order.
func (p *partition) splitHit() {
	slices.Sort(p.hit)
	for _, c := range p.hit {
		p.split(c)
	}
	p.hit = p.hit[:0]
}

// refine splits cells until nothing is queued or every atom has its own.
func (p *partition) refine() {
	head := 0
	for ; head < len(p.queue); head++ {
		s := p.queue[head]
		p.queued[s] = false
		if p.free == p.n {
			continue
		}
		p.buffer = append(p.buffer[:0], p.elem[s:s+p.size[s]]...)
		p.trace = mix(p.trace, uint64(s))
		for _, v := range p.buffer {
			for e := p.start[v]; e < p.start[v+1]; e++ {
				p.touch(p.nbr[e], 1<<(12*(p.label[e]-1)))
			}
		}
		p.splitHit()
	}
	p.queue = p.queue[:0]
	p.trace = mix(p.trace, uint64(p.free))
}

// individualize gives atom v a cell of its own, in front of the rest of its cell.
func (p *partition) individualize(v int32) {
	c := p.cell[v]
	u := p.elem[c]
	p.elem[c], p.elem[p.pos[v]] = v, u
	p.pos[u], p.pos[v] = p.pos[v], c
	size := p.size[c]
	p.size[c] = 1
	p.newCell(int(c+1), int(c+size))
	p.push(c)
	p.trace = mix(p.trace, uint64(c))
}
