package survey

import (
	"container/heap"
	"sort"
)

// doubtful keeps the N records whose planned choice has the lowest chance (of
// structures, whose first site has), in bounded memory.
type doubtful struct {
	n    int
	list []Result
}

// doubt is the chance by which records are ordered; those without one come last.
func doubt(r *Result) float64 {
	switch {
	case r.PlannedChance != nil:
		return *r.PlannedChance
	case r.FirstChance != nil && r.PlannedRank == 0:
		return *r.FirstChance
	}
	return 2
}

// before orders by doubt, then by line.
func before(a, b *Result) bool {
	if x, y := doubt(a), doubt(b); x != y {
		return x < y
	}
	return a.Line < b.Line
}

// The heap has the least doubtful record on top, which goes first.
func (d *doubtful) Len() int           { return len(d.list) }
func (d *doubtful) Less(i, j int) bool { return before(&d.list[j], &d.list[i]) }
func (d *doubtful) Swap(i, j int)      { d.list[i], d.list[j] = d.list[j], d.list[i] }
func (d *doubtful) Push(x any)         { d.list = append(d.list, x.(Result)) }
func (d *doubtful) Pop() any {
	x := d.list[len(d.list)-1]
	d.list = d.list[:len(d.list)-1]
	return x
}

func (d *doubtful) add(r Result) {
	heap.Push(d, r)
	if len(d.list) > d.n {
		heap.Pop(d)
	}
}

func (d *doubtful) sorted() []Result {
	sort.Slice(d.list, func(i, j int) bool { return before(&d.list[i], &d.list[j]) })
	return d.list
}
