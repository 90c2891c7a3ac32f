package reactivity

import (
	"fmt"
	"slices"

	"lobecast/frontier/molecule"
)

// Combination is one way of joining two π systems: a diene or dipole with a partner.
type Combination struct {
	// A lies in the first molecule, B in the second, whichever of the two is the
	// partner. In an intramolecular combination A is the diene or dipole.
	A, B End
	// Orientations are the ways round: two, or one where symmetry makes them equal.
	Orientations []Orientation
}

// Orientation says which atoms are joined.
type Orientation struct {
	// Bonds are the two new bonds: [atom index in the first molecule, in the second].
	Bonds [2][2]int
	// Count is the number of equivalent ways among all combinations and orientations.
	Count int
	// key is equal for two orientations exactly when the molecule's symmetry carries
	// one into the other (or, with two like molecules, exchanges their roles).
	key uint64
}

// fewestRingAtoms is the smallest ring, other than the one of the cycloaddition
// itself, that an intramolecular addition is allowed to close (common practice (no
// source): three tether atoms make a five-ring, two are too short).
const fewestRingAtoms = 5

// Meeting is what [Meet] finds, and the ends of the two molecules it found it from.
type Meeting struct {
	A, B         *Ends // B is nil within one molecule
	Combinations []Combination
}

// Meet lists every combination of a diene or dipole with a partner, in either order of
// the molecules; b nil means within a. Combinations that symmetry makes equal are listed
// once. The order follows the atoms: dienes and dipoles of a first. A [Pair] that follows
// can take what was found.
//
// A pair that cannot react is refused with the reason: no diene or dipole (an s-trans
// one is named), or a partner without a π bond.
func Meet(a, b *molecule.Molecule) (*Meeting, error) {
	x := &Meeting{A: FindEnds(a), B: endsOrNil(b)}
	var err error
	x.Combinations, err = combineEnds(x.A, x.B)
	return x, err
}

func endsOrNil(m *molecule.Molecule) *Ends {
	if m == nil {
		return nil
	}
	return FindEnds(m)
}

func combineEnds(ea, eb *Ends) ([]Combination, error) {
	var list []Combination
	if eb == nil {
		list = within(ea)
	} else {
		for _, d := range ea.four() {
			for k := range eb.Partners {
				list = append(list, Combination{A: *d, B: eb.Partners[k]})
			}
		}
		for _, d := range eb.four() {
			for k := range ea.Partners {
				list = append(list, Combination{A: ea.Partners[k], B: *d})
			}
		}
	}
	if len(list) == 0 {
		return nil, noCombination(ea, eb)
	}
	for k := range list {
		c := &list[k]
		p, q, r, s := c.A.First(), c.A.Last(), c.B.First(), c.B.Last()
		c.Orientations = []Orientation{
			{Bonds: [2][2]int{{p, r}, {q, s}}, Count: 1},
			{Bonds: [2][2]int{{p, s}, {q, r}}, Count: 1},
		}
	}
	var mb *molecule.Molecule
	if eb != nil {
		mb = eb.Molecule
	}
	if err := tooManyPairings(ea.Molecule, mb, list); err != nil {
		return nil, err
	}
	return mergeEquivalent(ea.Molecule, mb, list), nil
}

// four lists the dienes and dipoles.
func (e *Ends) four() []*End {
	list := make([]*End, 0, len(e.Dienes)+len(e.Dipoles))
	for k := range e.Dienes {
		list = append(list, &e.Dienes[k])
	}
	for k := range e.Dipoles {
		list = append(list, &e.Dipoles[k])
	}
	return list
}

// within lists the intramolecular combinations: no atom in common, and a tether long
// enough that no ring smaller than fewestRingAtoms closes beside the new one.
func within(e *Ends) []Combination {
	var list []Combination
	for _, d := range e.four() {
		near := withinBonds(e.Molecule, d.First(), fewestRingAtoms-2)
		far := withinBonds(e.Molecule, d.Last(), fewestRingAtoms-2)
		for k := range e.Partners {
			p := &e.Partners[k]
			if slices.Contains(d.Atoms, p.First()) || slices.Contains(d.Atoms, p.Last()) {
				continue
			}
			if near[p.First()] || near[p.Last()] || far[p.First()] || far[p.Last()] {
				continue
			}
			if !connected(e.Molecule, d.First(), p.First()) {
				continue
			}
			list = append(list, Combination{A: *d, B: *p})
		}
	}
	return list
}

// withinBonds marks the atoms at most steps bonds away from i.
func withinBonds(m *molecule.Molecule, i, steps int) map[int]bool {
	seen := map[int]bool{i: true}
	edge := []int{i}
	for range steps {
		var next []int
		for _, j := range edge {
			for _, h := range m.Neighbours(j) {
				if !seen[h.Atom] {
					seen[h.Atom] = true
					next = append(next, h.Atom)
				}
			}
		}
		edge = next
	}
	return seen
}

// connected says whether a path of bonds leads from i to j.
func connected(m *molecule.Molecule, i, j int) bool {
	return withinBonds(m, i, len(m.Atoms))[j]
}

// noCombination says why nothing can be joined.
func noCombination(ea, eb *Ends) error {
	lack := func(e *Ends, name string) string {
		s := name + " has no diene or 1,3-dipole"
		for k, r := range e.Refused {
			if k == 0 {
				s += fmt.Sprintf(" (atoms %s: %s)", numbersOf(e.Molecule, r.Atoms), r.Reason)
			}
		}
		return s
	}
	refusal := func(e *Ends, atoms []int, reason, remedy string) error {
		col := 0
		if e.Molecule.Source != "" {
			col = 1
			if len(atoms) > 0 {
				if off := e.Molecule.Atoms[atoms[0]].Offset; off >= 0 && off < len(e.Molecule.Source) {
					col = len([]rune(e.Molecule.Source[:off])) + 1
				}
			}
		}
		return &molecule.Error{Text: e.Molecule.Source, Column: col, Reason: reason, Remedy: remedy}
	}
	firstRefused := func(e *Ends) []int {
		if len(e.Refused) > 0 {
			return e.Refused[0].Atoms
		}
		return nil
	}
	const needs = "a cycloaddition needs a conjugated diene that can turn s-cis, or a 1,3-dipole such as an azide, nitrone or nitrile oxide; [2+2] and other additions are judged by their orbital symmetry only"
	if eb == nil {
		if len(ea.four()) == 0 {
			return refusal(ea, firstRefused(ea), lack(ea, "the molecule"), needs+"; give a second molecule for a reaction of two")
		}
		reason := "no π bond of the molecule can reach its diene or dipole"
		if len(ea.Partners) == 0 {
			reason = "the molecule has no second π bond for its diene or dipole to add to"
		}
		return refusal(ea, ea.four()[0].Atoms, reason, "a tether of three atoms or more is needed; give a second molecule for a reaction of two")
	}
	fa, fb := len(ea.four()) > 0, len(eb.four()) > 0
	switch {
	case !fa && !fb:
		at := ea
		if len(ea.Refused) == 0 && len(eb.Refused) > 0 {
			at = eb
		}
		return refusal(at, firstRefused(at), lack(ea, "the first molecule")+", and "+lack(eb, "the second molecule"), needs)
	case fa:
		return refusal(eb, nil, "the second molecule has no π bond that the "+ea.four()[0].Kind+" of the first can add to", saturatedRemedy(eb))
	}
	return refusal(ea, nil, "the first molecule has no π bond that the "+eb.four()[0].Kind+" of the second can add to", saturatedRemedy(ea))
}

func saturatedRemedy(e *Ends) string {
	for i := range e.Molecule.Bonds {
		if e.Molecule.Bonds[i].Order > 1 {
			return "its double bonds belong to aromatic rings, acid derivatives or other groups that do not react as partners"
		}
	}
	return "the partner is saturated: an alkene, alkyne, carbonyl, imine, nitroso, azo or thiocarbonyl group is needed"
}

// mergeEquivalent gives every orientation its key, and joins combinations that
// symmetry makes equal.
func mergeEquivalent(a, b *molecule.Molecule, list []Combination) []Combination {
	colourA := refine(a, nil)
	colourB := colourA
	if b != nil {
		colourB = refine(b, nil)
	}
	// a first key from the classes of the atoms; where it is met twice, a sharp one
	seen := make(map[uint64]int, 2*len(list))
	for k := range list {
		for o := range list[k].Orientations {
			key := quickKey(&list[k], o, colourA, colourB)
			list[k].Orientations[o].key = key
			seen[key]++
		}
	}
	for k := range list {
		for o := range list[k].Orientations {
			if seen[list[k].Orientations[o].key] > 1 {
				list[k].Orientations[o].key = sharpKey(&list[k], o, a, b)
			}
		}
	}
	out := list[:0]
	met := make(map[[2]uint64]bool, len(list))
	count := make(map[uint64]int, 2*len(list))
	for k := range list {
		c := list[k]
		k0, k1 := c.Orientations[0].key, c.Orientations[1].key
		count[k0]++
		count[k1]++
		if k0 > k1 {
			k0, k1 = k1, k0
		}
		if met[[2]uint64{k0, k1}] {
			continue
		}
		met[[2]uint64{k0, k1}] = true
		if c.Orientations[0].key == c.Orientations[1].key {
			c.Orientations = c.Orientations[:1:1]
		}
		out = append(out, c)
	}
	for k := range out {
		for o := range out[k].Orientations {
			out[k].Orientations[o].Count = count[out[k].Orientations[o].key]
		}
	}
	return out
}

// walk lists the atoms of one orientation in order: the path of A, then that of B so
// that its first atom is bound to A's first.
func walk(c *Combination, o int) (pa, pb []int) {
	pa = c.A.Atoms
	if o == 0 {
		return pa, c.B.Atoms
	}
	pb = make([]int, len(c.B.Atoms))
	for k, i := range c.B.Atoms {
		pb[len(pb)-1-k] = i
	}
	return pa, pb
}

// quickKey is equal for equivalent orientations, and now and then for others.
func quickKey(c *Combination, o int, colourA, colourB []uint64) uint64 {
	pa, pb := walk(c, o)
	key := func(reverse bool) uint64 {
		ka, kb := pathColour(pa, colourA, reverse), pathColour(pb, colourB, reverse)
		if c.A.Role == RolePartner {
			ka, kb = kb, ka
		}
		return scramble(ka*3 + scramble(kb))
	}
	return min(key(false), key(true))
}

func pathColour(path []int, colour []uint64, reverse bool) uint64 {
	h := uint64(len(path))
	for k := range path {
		i := path[k]
		if reverse {
			i = path[len(path)-1-k]
		}
		h = scramble(h*31 + colour[i])
	}
	return h
}

// sharpKey is equal for equivalent orientations only, as far as refinement tells
// marked graphs apart. The marks follow the roles, so that two like molecules may
// exchange theirs.
func sharpKey(c *Combination, o int, a, b *molecule.Molecule) uint64 {
	four, partner := walk(c, o)
	fm, pm := a, b
	if c.A.Role == RolePartner {
		four, partner, fm, pm = partner, four, b, a
	}
	key := func(reverse bool) uint64 {
		if b == nil {
			return scramble(sumColours(refine(a, append(marks(four, 1, reverse), marks(partner, 9, reverse)...))))
		}
		k := sumColours(refine(fm, marks(four, 1, reverse)))
		return scramble(k*3 + scramble(sumColours(refine(pm, marks(partner, 9, reverse)))))
	}
	return min(key(false), key(true))
}

// mark is an atom with the colour that singles it out.
type mark struct {
	atom   int
	colour uint64
}

func marks(path []int, from uint64, reverse bool) []mark {
	list := make([]mark, len(path))
	for k, i := range path {
		p := k
		if reverse {
			p = len(path) - 1 - k
		}
		list[k] = mark{i, from + uint64(p)}
	}
	return list
}

// scramble is the finalizer of the splitmix64 generator (G. L. Steele, D. Lea, C. H.
// Flood, OOPSLA 2014): a bijection that spreads every bit.
func scramble(x uint64) uint64 {
	x += 0x9e3779b97f4a7c15
	x = (x ^ x>>30) * 0xbf58476d1ce4e5b9
	x = (x ^ x>>27) * 0x94d049bb133111eb
	return x ^ x>>31
}

// firstCount is the round of refine in which the classes are first counted; then after as
// many rounds again.
const firstCount = 4

// refine colours the atoms of a molecule by their surroundings, independent of
// numbering and of the Kekulé form drawn: colours are mixed with those of the
// neighbours until no more classes appear (H. L. Morgan, J. Chem. Doc. 1965, 5, 107,
// in the form of Weisfeiler and Leman). Marked
// atoms and their surroundings start with colours of their own.
func refine(m *molecule.Molecule, marked []mark) []uint64 {
	n := len(m.Atoms)
	both := make([]uint64, 2*n)
	colour, next := both[:n:n], both[n:]
	for i := range m.Atoms {
		a := &m.Atoms[i]
		colour[i] = scramble(uint64(a.Element)<<40 ^ uint64(a.Isotope)<<28 ^ uint64(a.Charge+8)<<20 ^
			uint64(a.Hydrogens)<<12 ^ uint64(a.Unpaired)<<8 ^ uint64(m.Degree(i)))
	}
	if len(marked) > 0 {
		addDistances(m, marked, colour)
	}
	classes := 0
	var few [64]uint64
	sorted := few[:]
	last := false
	count := firstCount
	for round := 1; !last; round++ {
		if round == count {
			count *= 2
			sorted = append(sorted[:0], colour...)
			slices.Sort(sorted)
			c := len(slices.Compact(sorted))
			// one round beyond the last division, so that the colours tell of every bond
			last = c == classes || c == n
			classes = c
		}
		for i := range m.Atoms {
			s := uint64(0)
			for _, h := range m.Neighbours(i) {
				order := uint64(m.Bonds[h.Bond].Order)
				if m.Bonds[h.Bond].Aromatic {
					order = 5
				}
				s += scramble(colour[h.Atom]*7 + order)
			}
			next[i] = scramble(colour[i]*3 + s)
		}
		colour, next = next, colour
	}
	return colour
}

// addDistances mixes into the colour of every atom how many bonds it lies from each mark,
// so that marks tell at once in the whole molecule.
func addDistances(m *molecule.Molecule, marked []mark, colour []uint64) {
	n := len(m.Atoms)
	room := make([]int32, 2*n)
	far, queue := room[:n], room[n:]
	for _, k := range marked {
		clear(far)
		far[k.atom] = 1
		queue = append(queue[:0], int32(k.atom))
		for head := 0; head < len(queue); head++ {
			i := queue[head]
			colour[i] += scramble(k.colour*0x100000001b3 + uint64(far[i]))
			for _, h := range m.Neighbours(int(i)) {
				if far[h.Atom] == 0 {
					far[h.Atom] = far[i] + 1
					queue = append(queue, int32(h.Atom))
				}
			}
		}
	}
}

func sumColours(colour []uint64) uint64 {
	s := uint64(len(colour))
	for _, c := range colour {
		s += scramble(c)
	}
	return s
}
