package symmetry

import (
	"fmt"
	"slices"
	"sort"
	"strings"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Sizes of the rings that electrocyclic processes are sought for.
const (
	smallestClosure = 3
	largestClosure  = 8
	largestOpening  = 10
)

// Closure judges the electrocyclic closure of a conjugated chain, conrotatory and
// disrotatory, and builds what forms. The ends are the atoms mapped :1 and :2; without
// maps the longest chain that can close is taken where it is unique. Photochromic
// closures (a 1,2-diarylethene) and charged chains (allyl, pentadienyl, with a
// carbonyl carbon as the vacancy of a Nazarov closure) are found the same way.
//
// Errors are [*molecule.Error]: no chain of three or more atoms, several chains,
// mapped ends without a chain between them.
func Closure(m *molecule.Molecule) (*Answer, error) { return closure(m, "") }

// ClosureGiving is [Closure] where the product is known: of several closures the one
// that gives its constitution is judged.
func ClosureGiving(m, product *molecule.Molecule) (*Answer, error) {
	return closure(m, product.FlatSMILES())
}

func closure(m *molecule.Molecule, wanted string) (*Answer, error) {
	a, b := m.AtomByMap(1), m.AtomByMap(2)
	if (a < 0) != (b < 0) {
		return nil, refuse(m, max(a, b), "only one end of the closure is mapped", "map both ends, as [CH2:1] and [CH2:2]")
	}
	var found []*electrocyclic
	if a >= 0 {
		found = closuresBetween(m, a, b)
		if len(found) == 0 {
			return nil, refuse(m, a, fmt.Sprintf("no conjugated chain runs from %s to %s that could close", label(m, a), label(m, b)),
				"map the two ends of a polyene, or of an allyl, pentadienyl or heptatrienyl ion")
		}
		if wanted == "" {
			found = found[:1]
		}
	} else {
		found = findClosures(m, false)
		if wanted != "" {
			// The chains that a chemist thinks of first, before all others.
			if a, err := electrocyclicAnswer(m, found, wanted, "closure", "the two ends :1 and :2"); err == nil {
				return a, nil
			}
			found = findClosures(m, true)
		}
		if len(found) == 0 {
			return nil, refuse(m, -1, "no conjugated chain is found whose ends could close to a ring", "map the ends :1 and :2, or give the molecule as it reacts (the ion, the Z isomer)")
		}
	}
	return electrocyclicAnswer(m, found, wanted, "closure", "the two ends :1 and :2")
}

// Opening judges the electrocyclic opening of a ring, conrotatory and disrotatory,
// and builds what forms. The breaking bond joins the atoms mapped :1 and :2; without
// maps it is found where it is unique. Aziridines, epoxides, cyclopropyl ions and
// benzopyrans open the same way.
func Opening(m *molecule.Molecule) (*Answer, error) { return opening(m, "") }

// OpeningGiving is [Opening] where the product is known: of several openings the one
// that gives its constitution is judged.
func OpeningGiving(m, product *molecule.Molecule) (*Answer, error) {
	return opening(m, product.FlatSMILES())
}

func opening(m *molecule.Molecule, wanted string) (*Answer, error) {
	a, b := m.AtomByMap(1), m.AtomByMap(2)
	if (a < 0) != (b < 0) {
		return nil, refuse(m, max(a, b), "only one end of the breaking bond is mapped", "map both its atoms, as [CH2:1] and [CH2:2]")
	}
	var found []*electrocyclic
	if a >= 0 {
		k := m.BondBetween(a, b)
		if k < 0 || m.Bonds[k].Order != 1 || !m.BondInRing(k) {
			return nil, refuse(m, a, fmt.Sprintf("%s and %s are not joined by a single bond of a ring", label(m, a), label(m, b)), "map the two atoms of the σ bond that breaks")
		}
		found = openingsOf(m, k)
		if len(found) == 0 {
			return nil, refuse(m, a, fmt.Sprintf("the ring of %s and %s holds no conjugated chain between them", label(m, a), label(m, b)),
				"an electrocyclic opening needs a π system, a lone pair or a vacancy at the rest of the ring")
		}
		if wanted == "" {
			found = found[:1]
		}
	} else {
		for k := range m.Bonds {
			if m.Bonds[k].Order == 1 && !m.Bonds[k].Aromatic && m.BondInRing(k) {
				// Of two chains beside one bond the longer one opens: the ring it leaves has room
				// for what its mode makes (bicyclo[4.2.0]octa-2,4,7-triene gives cyclooctatetraene
				// by six electrons, not by four).
				list := openingsOf(m, k)
				slices.SortStableFunc(list, func(a, b *electrocyclic) int { return len(b.atoms) - len(a.atoms) })
				for _, x := range list {
					if !x.weak || wanted != "" {
						found = append(found, x)
						if wanted == "" {
							break
						}
					}
				}
			}
		}
		if wanted == "" {
			found = preferHetero(found)
		}
		if len(found) == 0 {
			return nil, refuse(m, -1, "no ring is found that could open electrocyclically", "map the atoms of the σ bond that breaks :1 and :2")
		}
	}
	return electrocyclicAnswer(m, found, wanted, "opening", "the atoms of the breaking bond :1 and :2")
}

// electrocyclic is one closure or opening found in a molecule.
type electrocyclic struct {
	f       *frame
	atoms   []int // the ring, from end to end of the chain
	pi      *chain
	opening bool
	weak    bool // only through a lone pair or a carbonyl: not proposed without maps
}

// isPi reports whether an atom can be part of a reacting chain.
func isPi(f *frame, i int) bool {
	return f.partner(i) >= 0 || f.vacancy(i) || f.lonePair(i)
}

// chainsFrom lists the paths of π atoms of lengths up to most that start at atom a,
// calling done for each.
func chainsFrom(f *frame, a, most int, done func(path []int)) {
	path := make([]int, 1, most)
	path[0] = a
	var walk func()
	walk = func() {
		if len(path) >= smallestClosure {
			done(path)
		}
		if len(path) == most {
			return
		}
		for _, h := range f.m.Neighbours(path[len(path)-1]) {
			if slices.Contains(path, h.Atom) || !isPi(f, h.Atom) {
				continue
			}
			path = append(path, h.Atom)
			walk()
			path = path[:len(path)-1]
		}
	}
	if isPi(f, a) {
		walk()
	}
}

// canFold reports whether no bond inside the chain is held trans, by its stated
// geometry or by a small ring.
//
// A skeleton that brings the ends close by itself, as the periphery of fused rings
// does, needs no folding.
func canFold(f *frame, atoms []int) bool {
	if n := len(atoms); n > 4 && near(f.m, atoms[0], atoms[n-1], 3) {
		return true
	}
	for i := 1; i+2 < len(atoms); i++ {
		if f.relation(atoms[i], atoms[i+1], atoms[i-1], atoms[i+2]) == molecule.Opposite {
			return false
		}
	}
	return true
}

// near reports whether two atoms are at most the given number of bonds apart.
func near(m *molecule.Molecule, a, b, most int) bool {
	front, seen := []int{a}, map[int]bool{a: true}
	for range most {
		var next []int
		for _, i := range front {
			for _, h := range m.Neighbours(i) {
				if h.Atom == b {
					return true
				}
				if !seen[h.Atom] {
					seen[h.Atom] = true
					next = append(next, h.Atom)
				}
			}
		}
		front = next
	}
	return false
}

// closuresBetween lists the closures of the chains from a to b, longest first.
func closuresBetween(m *molecule.Molecule, a, b int) []*electrocyclic {
	base := newFrame(m)
	var list []*electrocyclic
	if m.BondBetween(a, b) >= 0 {
		return nil
	}
	tried := 0
	chainsFrom(base, a, 2*largestClosure, func(path []int) {
		if path[len(path)-1] != b || tried > 2000 {
			return
		}
		tried++
		if c := closureOf(m, path); c != nil {
			list = append(list, c)
		}
	})
	sort.SliceStable(list, func(i, j int) bool {
		if list[i].weak != list[j].weak {
			return !list[i].weak
		}
		if fi, fj := canFold(list[i].f, list[i].atoms), canFold(list[j].f, list[j].atoms); fi != fj {
			return fi
		}
		return len(list[i].atoms) > len(list[j].atoms)
	})
	return list
}

// closureOf tries to close a path of π atoms.
func closureOf(m *molecule.Molecule, path []int) *electrocyclic {
	f := newFrame(m)
	atoms := slices.Clone(path)
	c, ok := f.pattern(atoms)
	if !ok {
		return nil
	}
	if n := c.electrons(); n == 0 || n >= 2*len(atoms) {
		return nil
	}
	weak := c.hole >= 0 && c.polar < 0 && c.lone == 2 && m.Atoms[atoms[c.hole]].Charge == 0
	return &electrocyclic{f: f, atoms: atoms, pi: c, weak: weak}
}

// findClosures lists the closures of the longest chains that can fold and close, or of
// all such chains.
func findClosures(m *molecule.Molecule, all bool) []*electrocyclic {
	base := newFrame(m)
	aromatic := aromaticRings(m)
	var list []*electrocyclic
	longest, tried, best := 0, 0, 3
	for i := range m.Atoms {
		chainsFrom(base, i, largestClosure, func(path []int) {
			n := len(path)
			last := path[n-1]
			// Ylides before chains with carbon ends before those with a heteroatom end.
			rank := 1
			switch {
			case n == 3 && ylide(m, path):
				rank = 0
			case m.Atoms[i].Element != 6 || m.Atoms[last].Element != 6:
				rank = 2
			}
			if !all && (rank > best || rank == best && n < longest) || last < i || m.BondBetween(i, last) >= 0 || tried > mostTried {
				return
			}
			tried++
			for _, ring := range aromatic {
				inside := 0
				for _, x := range path {
					if slices.Contains(ring, x) {
						inside++
					}
				}
				if inside > 2 {
					return
				}
			}
			if !canFold(base, path) || n == 3 && m.Atoms[path[0]].Charge+m.Atoms[path[1]].Charge+m.Atoms[path[2]].Charge == 0 && !ylide(m, path) {
				return
			}
			c := closureOf(m, path)
			if c == nil || c.weak && !all {
				return
			}
			if !all && (rank < best || n > longest) {
				best, longest, list = rank, n, list[:0]
			}
			list = append(list, c)
		})
	}
	return list
}

// ylide reports whether a chain of three holds a dipole, as azomethine ylides do.
func ylide(m *molecule.Molecule, path []int) bool {
	return m.Atoms[path[1]].Charge == 1 && (m.Atoms[path[0]].Charge == -1 || m.Atoms[path[2]].Charge == -1)
}

// aromaticRings lists the aromatic rings of a molecule.
func aromaticRings(m *molecule.Molecule) [][]int {
	var list [][]int
	for _, ring := range m.Rings() {
		all := true
		for _, i := range ring {
			all = all && m.Atoms[i].Aromatic
		}
		if all && len(ring) <= smallRing {
			list = append(list, ring)
		}
	}
	return list
}

// openingsOf lists the openings that break bond k, largest ring of the smallest set
// last.
func openingsOf(m *molecule.Molecule, k int) []*electrocyclic {
	a, b := m.Bonds[k].A, m.Bonds[k].B
	var list []*electrocyclic
	for _, x := range []int{a, b} {
		f := newFrame(m)
		if f.partner(x) >= 0 || m.Atoms[x].Element == 1 {
			return nil
		}
	}
	for _, ring := range m.Rings() {
		n := len(ring)
		i := slices.Index(ring, a)
		if n > largestOpening || i < 0 {
			continue
		}
		var atoms []int
		switch b {
		case ring[(i+n-1)%n]: // a, forward, …, b
			for j := 0; j < n; j++ {
				atoms = append(atoms, ring[(i+j)%n])
			}
		case ring[(i+1)%n]:
			for j := 0; j < n; j++ {
				atoms = append(atoms, ring[(i+n-j)%n])
			}
		default:
			continue
		}
		f := newFrame(m)
		c, ok := f.pattern(atoms[1 : n-1])
		if !ok || c.hole >= 0 && c.electrons() == 0 && n > 3 {
			continue
		}
		weak := c.polar >= 0 || n > 3 && c.hole >= 0 && c.lone == 2 && f.m.Atoms[c.atoms[c.hole]].Charge == 0
		list = append(list, &electrocyclic{f: f, atoms: atoms, pi: c, opening: true, weak: weak})
	}
	return list
}

// preferHetero keeps, of several openings, those of the smallest number of ring atoms
// three (aziridine, epoxide) or with a heteroatom at the bond (benzopyran) where the
// others are none of theirs.
func preferHetero(list []*electrocyclic) []*electrocyclic {
	hetero := func(x *electrocyclic) bool {
		n := len(x.atoms)
		return n > 3 && (x.f.m.Atoms[x.atoms[0]].Element != 6) != (x.f.m.Atoms[x.atoms[n-1]].Element != 6)
	}
	var some []*electrocyclic
	for _, x := range list {
		if hetero(x) {
			some = append(some, x)
		}
	}
	if len(some) > 0 {
		return some
	}
	// The bond of a three-membered ring beside its heteroatom is no electrocyclic one.
	for _, x := range list {
		n := len(x.atoms)
		if x.f.m.Atoms[x.atoms[0]].Element == 6 && x.f.m.Atoms[x.atoms[n-1]].Element == 6 {
			some = append(some, x)
		}
	}
	return some
}

// cycle is the ring of orbitals: the chain from end to end, closed by the σ bond.
func (x *electrocyclic) cycle() *Cycle {
	n := len(x.atoms)
	o := make([]Orbital, n)
	for i, a := range x.atoms {
		o[i] = Orbital{Atom: a, Kind: Pi}
		switch {
		case !x.opening:
			o[i].Electrons = x.pi.at(i)
		case i == 0 || i == n-1:
			o[i].Electrons, o[i].Kind = 1, Sigma
		default:
			o[i].Electrons = x.pi.at(i - 1)
		}
	}
	c := newCycle(o)
	for i := 0; i < n-1; i++ {
		inner := 0.0
		if i > 0 && i < n-2 {
			inner = piStrength
		}
		if x.opening {
			c.set(i, inner, piStrength)
		} else {
			c.set(i, piStrength, inner)
		}
	}
	if x.opening {
		c.set(n-1, sigmaStrength, 0)
	} else {
		c.set(n-1, 0, sigmaStrength)
	}
	return c
}

// shifts lists the electron shifts: one for an even ring, one for each place of the
// unpaired position of an odd one.
func (x *electrocyclic) shifts(c *Cycle) []*shift {
	n := len(x.atoms)
	build := func(hole int) *shift {
		s := &shift{f: x.f, cycle: c, electrons: make([]int, n)}
		for i := range s.electrons {
			s.electrons[i] = 1
		}
		if hole >= 0 {
			s.electrons[hole] = x.pi.lone
		}
		if x.opening {
			h := x.pi.hole
			if h >= 0 {
				h++
			}
			s.before = append(pairs(n-1, h, 0)[:0:0], [2]int{0, n - 1})
			h = x.pi.hole
			s.before = append(s.before, pairs(n-2, h, 1)...)
			s.after = pairs(n, hole, 0)
		} else {
			s.before = pairs(n, x.pi.hole, 0)
			h := hole
			if h >= 0 {
				h--
			}
			s.after = append([][2]int{{0, n - 1}}, pairs(n-2, h, 1)...)
		}
		return s
	}
	if n%2 == 0 {
		return []*shift{build(-1)}
	}
	var list []*shift
	if x.opening {
		for h := 0; h < n; h += 2 {
			list = append(list, build(h))
		}
	} else {
		for h := 1; h < n-1; h += 2 {
			list = append(list, build(h))
		}
	}
	return list
}

// plain is the product without configuration.
func (x *electrocyclic) plain() (*Product, error) {
	s, err := x.best(x.cycle())
	if err != nil {
		return nil, err
	}
	return s.product(nil, nil)
}

// best is the shift whose product reads first, so that the answer does not depend on
// how the reactant is numbered; the unpaired position goes to the middle where it can.
func (x *electrocyclic) best(c *Cycle) (*shift, error) {
	list := x.shifts(c)
	n := len(x.atoms)
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
		k := p.Molecule.FlatSMILES()
		if n%2 == 1 {
			// A charge beside the middle of the chain is written first: the double bonds at
			// the ends can then carry their geometry.
			h := slices.IndexFunc(s.electrons, func(e int) bool { return e != 1 })
			k = fmt.Sprintf("%02d %s", abs(2*h-(n-1)), k)
		}
		if chosen == nil || k < key {
			chosen, key = s, k
		}
	}
	if chosen == nil {
		return nil, firstErr
	}
	return chosen, nil
}

func abs(i int) int {
	if i < 0 {
		return -i
	}
	return i
}

// electrocyclicAnswer judges both modes of what was found; several candidates must
// lead to the same constitution.
func electrocyclicAnswer(m *molecule.Molecule, found []*electrocyclic, wanted, what, mapHelp string) (*Answer, error) {
	x, err := oneOf(m, found, wanted, mapHelp, func(x *electrocyclic) (candidate, error) {
		p, err := x.plain()
		if err != nil {
			return candidate{}, err
		}
		flat := p.Molecule.FlatSMILES()
		return candidate{fmt.Sprintf("%02d %s", len(x.atoms), flat), flat, pathLabels(m, []int{x.atoms[0], x.atoms[len(x.atoms)-1]})}, nil
	})
	if err != nil {
		return nil, err
	}
	n := len(x.atoms)
	f := x.f
	if x.opening {
		f.implyFusion(x.atoms)
	}
	a := &Answer{
		Reactants: []*molecule.Molecule{m}, Joined: m, Kind: terms.Electrocyclic,
		Name: fmt.Sprintf("electrocyclic %s, %d atoms, %d electrons", what, n, x.cycle().electrons()),
	}
	bond := [2]int{m.Atoms[x.atoms[0]].Number, m.Atoms[x.atoms[n-1]].Number}
	if x.opening {
		a.Broken = [][2]int{bond}
	} else {
		a.Bonds = [][2]int{bond}
	}
	achiral := m.SMILES() == m.Mirrored().SMILES()
	base := x.cycle()
	s, err := x.best(base)
	if err != nil {
		return nil, err
	}
	for _, con := range []bool{true, false} {
		sign := 1.0
		mode := "disrotatory"
		if con {
			sign, mode = -1, "conrotatory"
		}
		p := Process{Kind: terms.Electrocyclic, Mode: mode, Feasible: true}
		switch {
		case !x.opening:
			p.Parts = Components{{Kind: Pi, Electrons: x.pi.electrons(), Antara: con}}
		case n == 3 || x.pi.electrons() == 0 || x.pi.electrons() == 2 && x.pi.hole == 0 && n == 3:
			p.Parts = Components{{Kind: Omega, Electrons: x.pi.lone}, {Kind: Sigma, Electrons: 2, Antara: con}}
		default:
			p.Parts = Components{{Kind: Pi, Electrons: x.pi.electrons()}, {Kind: Sigma, Electrons: 2, Antara: con}}
		}
		if err := p.finish(base.withSign(sign), f); err != nil {
			return nil, err
		}
		for _, up := range []bool{true, false} {
			q, err := x.stereoisomer(s, con, up)
			if err != nil {
				return nil, err
			}
			p.Products = collect(p.Products, q, achiral)
		}
		if x.opening {
			// Alkyl and donor groups usually turn outward: that product first.
			slices.SortStableFunc(p.Products, func(a, b Product) int {
				return strings.Count(b.Configuration, "outward") - strings.Count(a.Configuration, "outward")
			})
		}
		p.Later = later(p.Products)
		x.feasibility(&p, con)
		a.Processes = append(a.Processes, p)
	}
	if x.opening && f.stereo != nil {
		a.Notes = append(a.Notes, "the configuration at the breaking bond is not stated; its fusion with a small ring is taken to be cis")
	}
	if !x.opening && x.impliedByEight() {
		a.Notes = append(a.Notes, "double bonds in the eight-membered ring whose geometry is not stated are taken to be cis")
	}
	if x.pi.polar >= 0 {
		a.polar = []int{x.pi.polar}
		a.Notes = append(a.Notes, fmt.Sprintf("the π pair of %s=%s is counted with %s, so that %s brings an empty orbital to the chain",
			label(m, x.pi.atoms[x.pi.hole]), label(m, x.pi.polar), label(m, x.pi.polar), label(m, x.pi.atoms[x.pi.hole])))
	}
	if x.opening {
		a.Notes = append(a.Notes, "of two directions of one mode, which groups turn outward is a matter of torquoselectivity, which this rule does not judge; alkyl and donor groups usually do (Kirmse, Rondan, Houk, J. Am. Chem. Soc. 1984, 106, 7989)")
	}
	a.complete(x.atoms)
	return a, nil
}

// stereoisomer builds the product of one direction of a mode.
func (x *electrocyclic) stereoisomer(s *shift, con, up bool) (*Product, error) {
	n := len(x.atoms)
	f := x.f
	a, b := x.atoms[0], x.atoms[n-1]
	second := up != con
	var centres []centre
	var geometries []geometry
	var ea, eb end
	if x.opening {
		ea = f.detach(a, x.atoms[1], b, false, 1, up)
		eb = f.detach(b, x.atoms[n-2], a, true, 1, second)
		if g, ok := endGeometry(a, x.atoms[1], x.atoms[2], ea); ok {
			geometries = append(geometries, g)
		}
		if g, ok := endGeometry(b, x.atoms[n-2], x.atoms[n-3], eb); ok {
			geometries = append(geometries, g)
		}
	} else {
		ea, eb = f.end(x.atoms, false), f.end(x.atoms, true)
		if c, ok := attach(a, x.atoms[1], b, ea, false, 1, up); ok {
			centres = append(centres, c)
		}
		if c, ok := attach(b, x.atoms[n-2], a, eb, true, 1, second); ok {
			centres = append(centres, c)
		}
	}
	if x.opening || n > smallRing {
		// Inner double bonds of the chain are cis with respect to it.
		for i := 1; i+2 < n; i++ {
			geometries = append(geometries, geometry{a: x.atoms[i], b: x.atoms[i+1], refA: x.atoms[i-1], refB: x.atoms[i+2], g: molecule.Together, inner: true})
		}
	}
	p, err := s.product(centres, geometries)
	if err != nil {
		return nil, err
	}
	switch {
	case !ea.known || !eb.known || ea.open || eb.open || ea.alike && eb.alike:
	case x.opening:
		if !x.inRing(ea, eb) {
			p.Configuration = endPair(ea, eb)
			if n == 3 && p.Configuration != "" {
				p.Configuration += shapes[p.Configuration]
			}
		}
	case ea.alike || eb.alike:
	default:
		ha, oka := heavy(f.m, ea)
		hb, okb := heavy(f.m, eb)
		if oka && okb {
			same := (ha == hb) != con
			p.Configuration = "trans at the new bond"
			if same {
				p.Configuration = "cis at the new bond"
			}
		} else {
			p.Configuration = "outward groups cis at the new bond"
			if con {
				p.Configuration = "outward groups trans at the new bond"
			}
		}
	}
	return p, nil
}

// heavy tells whether the only ligand of an end that is no hydrogen points outward;
// ok is false where it has two.
func heavy(m *molecule.Molecule, e end) (outward, ok bool) {
	h := func(i int) bool { return i < 0 || m.Atoms[i].Element == 1 }
	if h(e.in) == h(e.out) {
		return false, false
	}
	return h(e.in), true
}

// shapes names the arrangement of a three-atom chain with one group at each end.
var shapes = map[string]string{
	"groups outward at both ends":                   " (W-shaped)",
	"groups inward at both ends":                    " (U-shaped)",
	"group outward at one end, inward at the other": " (sickle-shaped)",
}

// endPair says where the groups of two opened ends went, as far as one group at each
// tells.
func endPair(a, b end) string {
	side := func(e end) string {
		switch {
		case e.alike:
			return ""
		case e.out < 0:
			return "inward"
		case e.in < 0:
			return "outward"
		}
		return ""
	}
	sa, sb := side(a), side(b)
	switch {
	case sa == "" && sb == "":
		return ""
	case sa == "" || sb == "":
		return "group " + sa + sb
	case sa == sb:
		return "groups " + sa + " at both ends"
	}
	return "group outward at one end, inward at the other"
}

// inRing reports whether ligands of both ends belong to one small ring.
func (x *electrocyclic) inRing(a, b end) bool {
	for _, la := range []int{a.in, a.out} {
		for _, lb := range []int{b.in, b.out} {
			if la >= 0 && lb >= 0 && bridge(x.f.m, la, lb, x.atoms) > 0 {
				return true
			}
		}
	}
	return false
}

// opensSmallRing reports whether the ring that an opening leaves has seven atoms or fewer,
// so that one end turned inward and the other outward would make a trans double bond in it,
// whether or not the product shows it (Dewar benzene opens to benzene).
func (x *electrocyclic) opensSmallRing() bool {
	f, n := x.f, len(x.atoms)
	a, b := x.atoms[0], x.atoms[n-1]
	ea, eb := f.detach(a, x.atoms[1], b, false, 1, true), f.detach(b, x.atoms[n-2], a, true, 1, true)
	for _, la := range []int{ea.in, ea.out} {
		for _, lb := range []int{eb.in, eb.out} {
			if la < 0 || lb < 0 {
				continue
			}
			if size := bridge(f.m, la, lb, x.atoms); size > 0 && size+n <= smallRing {
				return true
			}
		}
	}
	return false
}

// impliedByEight reports whether a double bond of the chain without stated geometry
// lies in a ring of eight.
func (x *electrocyclic) impliedByEight() bool {
	m := x.f.m
	for _, ring := range m.Rings() {
		if len(ring) != impliedCis {
			continue
		}
		for i := 1; i < len(x.atoms); i++ {
			k := m.BondBetween(x.atoms[i-1], x.atoms[i])
			if m.Bonds[k].Order == 2 && m.Bonds[k].Geometry == molecule.NoGeometry && slices.Contains(ring, x.atoms[i-1]) && slices.Contains(ring, x.atoms[i]) {
				return true
			}
		}
	}
	return false
}

// feasibility applies what the trade states about electrocyclic geometry.
func (x *electrocyclic) feasibility(p *Process, con bool) {
	f := x.f
	n := len(x.atoms)
	if !x.opening && !canFold(f, x.atoms) {
		p.infeasible("an inner bond of the chain is held trans, so that its ends cannot meet; isomerize it first")
	}
	if transInSmallRing(p.Products) || x.opening && con && x.opensSmallRing() {
		p.infeasible("the product would hold a trans double bond in a ring of seven or fewer atoms")
	}
	if !x.opening {
		// Fusion: ligands of both ends in one ring beside the new one.
		ea, eb := f.end(x.atoms, false), f.end(x.atoms, true)
		if ea.known && eb.known && len(p.Products) > 0 {
			for _, la := range []int{ea.in, ea.out} {
				for _, lb := range []int{eb.in, eb.out} {
					if la < 0 || lb < 0 {
						continue
					}
					size := bridge(f.m, la, lb, x.atoms)
					trans := ((la == ea.in) == (lb == eb.in)) == con
					if size > 0 && trans && size+2+n <= 9 {
						p.infeasible(fmt.Sprintf("a %d- and a %d-membered ring would be fused trans", size+2, n))
					}
				}
			}
		}
	}
	if x.opening && n == 3 && x.pi.electrons() == 0 {
		p.note("where a leaving group departs as the ring opens, its side decides which of the two disrotatory directions is followed")
	}
	if n == 3 && !x.opening && p.Feasible {
		p.note("closures of three-membered rings are usually uphill: the opening is what is seen")
	}
}

// bridge is the number of atoms of the shortest path from a to b that avoids the
// chain, ends included; 0 for none of at most five.
func bridge(m *molecule.Molecule, a, b int, avoid []int) int {
	dist := map[int]int{a: 1}
	queue := []int{a}
	for len(queue) > 0 {
		i := queue[0]
		queue = queue[1:]
		if i == b {
			return dist[i]
		}
		if dist[i] == 6 {
			continue
		}
		for _, h := range m.Neighbours(i) {
			if dist[h.Atom] == 0 && !slices.Contains(avoid, h.Atom) {
				dist[h.Atom] = dist[i] + 1
				queue = append(queue, h.Atom)
			}
		}
	}
	return 0
}

// candidate tells processes found in one structure apart.
type candidate struct {
	key   string // the same for processes that amount to the same
	flat  string // constitution of the product
	label string // for a message
}

// mostShown is how many possible processes a refusal names, mostCounted how many atoms of
// their products are looked at to count them.
const (
	mostShown   = 6
	mostCounted = 20_000
)

// oneOf keeps the one process that all candidates amount to; where they differ it
// asks for maps. With a wanted constitution, candidates that give another are left
// out first.
func oneOf[T any](m *molecule.Molecule, list []T, wanted, help string, describe func(T) (candidate, error)) (T, error) {
	var none T
	var keys, words []string
	var kept []T
	var firstErr error
	made, more := 0, false
	for _, x := range list {
		c, err := describe(x)
		if err != nil {
			if firstErr == nil {
				firstErr = err
			}
			continue
		}
		made++
		if wanted != "" && c.flat != wanted && !slices.Contains(laterConstitutions(x), wanted) {
			continue
		}
		if wanted == "" && len(kept) > mostShown && made*len(m.Atoms) > mostCounted {
			more = true
			break
		}
		if !slices.Contains(keys, c.key) {
			keys, kept, words = append(keys, c.key), append(kept, x), append(words, c.label)
		}
	}
	switch {
	case len(kept) == 1:
		return kept[0], nil
	case len(kept) > 1 && wanted != "":
		return kept[0], nil // different bonds, one product: the first in the order of the atoms
	case made > 0 && len(kept) == 0:
		return none, refuse(m, -1, "no such process of this structure gives the product named", "check the product, or map "+help)
	case firstErr != nil:
		return none, refuse(m, -1, firstErr.Error(), "give the molecule as it reacts")
	case len(kept) == 0:
		return none, refuse(m, -1, "the process is not found in this structure", "map "+help)
	}
	shown := words[:min(len(words), mostShown)]
	number := fmt.Sprint(len(kept))
	if more {
		number = "more than " + number
	}
	return none, refuse(m, -1, fmt.Sprintf("%s different processes are possible (%s)", number, strings.Join(shown, ", ")), "map "+help)
}
