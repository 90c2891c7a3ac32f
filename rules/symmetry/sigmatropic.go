package symmetry

import (
	"fmt"
	"slices"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// largestShift is the highest order of a sigmatropic shift that is sought.
const largestShift = 9

// Shift judges the sigmatropic shift of order [i,j]: the σ bond between atoms 1 and
// 1′ migrates to atoms i and j′. The migrating bond is mapped :3 :4 (for [1,j]: the
// migrating atom and the atom it leaves), its new ends :1 :2, where the process is
// not unique; for [1,j] either or both of the leaving atom :4 and the arriving atom
// :1 or :2 suffice. Without maps a [1,j] shift is that of a hydrogen where there is
// one, else of the group bonded to the chain.
//
// Every combination of faces is judged: supra- or antarafacial on each chain, and
// retention or inversion at a migrating carbon.
func Shift(m *molecule.Molecule, i, j int) (*Answer, error) { return sigmatropicShift(m, i, j, "") }

// ShiftGiving is [Shift] where the product is known: of several shifts the one that
// gives its constitution is judged.
func ShiftGiving(m *molecule.Molecule, i, j int, product *molecule.Molecule) (*Answer, error) {
	return sigmatropicShift(m, i, j, product.FlatSMILES())
}

func sigmatropicShift(m *molecule.Molecule, i, j int, wanted string) (*Answer, error) {
	switch {
	case i < 1 || j < 1 || i > largestShift || j > largestShift || i == 1 && j == 1:
		return nil, refuse(m, -1, fmt.Sprintf("[%d,%d] is no order of a sigmatropic shift", i, j), fmt.Sprintf("give two numbers from 1 to %d, not both 1, as in 3,3 or 1,5", largestShift))
	case i > j:
		i, j = j, i
	}
	if i%2 == 0 && j%2 == 0 {
		return nil, refuse(m, -1, fmt.Sprintf("a [%d,%d] shift would need an ion at both chains", i, j), "check the order: count both ends of the migrating bond as 1")
	}
	list := findShifts(m, i, j, wanted != "")
	if len(list) == 0 {
		return nil, refuse(m, -1, fmt.Sprintf("no σ bond is found that could undergo a [%d,%d] shift", i, j),
			"map the migrating bond :3 :4 and its new ends :1 :2, and check that the chains are conjugated as the shift needs them")
	}
	x, err := oneOf(m, list, wanted, "the migrating bond :3 :4 and its new ends :1 :2", func(x *sigmatropic) (candidate, error) {
		p, err := x.plain()
		if err != nil {
			return candidate{}, err
		}
		flat := p.Molecule.FlatSMILES()
		return candidate{x.signature() + flat, flat, x.name(x.p[0]) + "–" + x.name(x.q[0]) + " to " + x.name(x.p[i-1]) + "–" + x.name(x.q[j-1])}, nil
	})
	if err != nil {
		return nil, err
	}
	return x.answer(m)
}

// mostTried bounds the combinations of paths that are looked at in one molecule.
const mostTried = 20000

// sigmatropic is one shift found in a molecule: chains p and q, whose first atoms the
// migrating bond joins and whose last atoms it will join.
type sigmatropic struct {
	f      *frame
	p, q   []int
	pp, pq *chain // the π parts: p and q without their first atoms; nil where there is none
}

// signature tells apart shifts that lead to the same constitution by different bonds.
func (x *sigmatropic) signature() string {
	s := ""
	for _, i := range append(slices.Clone(x.p), x.q...) {
		s += molecule.Symbol(x.f.m.Atoms[i].Element) + " "
	}
	return s
}

// pathsFrom lists the simple paths of n atoms from a that avoid the given atoms and
// consist, beyond the first, of π atoms.
func pathsFrom(f *frame, a, n int, avoid []int, done func([]int)) {
	path := append(make([]int, 0, n), a)
	var walk func()
	walk = func() {
		if len(path) == n {
			done(path)
			return
		}
		for _, h := range f.m.Neighbours(path[len(path)-1]) {
			y := h.Atom
			if slices.Contains(path, y) || slices.Contains(avoid, y) || f.m.Atoms[y].Element == 1 || !isPi(f, y) && !oxide(f, y) {
				continue
			}
			path = append(path, y)
			walk()
			path = path[:len(path)-1]
		}
	}
	walk()
}

// oxide reports whether an atom is the oxygen of S=O or P=O.
func oxide(f *frame, i int) bool {
	p := f.partner(i)
	return f.m.Atoms[i].Element == 8 && p >= 0 && f.m.Atoms[p].Element > 14
}

// findShifts lists the shifts of the given order that the maps allow; of [1,j] shifts
// those of hydrogen where there are any, unless all are asked for.
func findShifts(m *molecule.Molecule, i, j int, all bool) []*sigmatropic {
	one, two, three, four := m.AtomByMap(1), m.AtomByMap(2), m.AtomByMap(3), m.AtomByMap(4)
	mapped := one >= 0 || two >= 0 || three >= 0 || four >= 0
	var list []*sigmatropic
	fits := func(x *sigmatropic) bool {
		if i == 1 {
			// The migrating atom is x.p[0]: mapped :3 (or, when it is a hydrogen that is no
			// node, not at all), the leaving atom :4, the arriving one :1 or :2.
			end := one
			if end < 0 || end == x.p[0] {
				end = two
			}
			made := slices.Contains(x.f.made, x.p[0])
			switch {
			case three >= 0 && four >= 0:
				if !(x.p[0] == three && x.q[0] == four || x.p[0] == four && x.q[0] == three) {
					return false
				}
			case four >= 0 && x.q[0] != four:
				return false
			case three >= 0 && x.p[0] != three && !(made && x.q[0] == three):
				return false
			}
			return end < 0 || x.q[j-1] == end
		}
		bond := func(a, b, u, v int) bool {
			switch {
			case u >= 0 && v >= 0:
				return a == u && b == v || a == v && b == u
			case u >= 0 || v >= 0:
				w := max(u, v)
				return a == w || b == w
			}
			return true
		}
		return bond(x.p[0], x.q[0], three, four) && bond(x.p[i-1], x.q[j-1], one, two)
	}
	tried := 0
	try := func(base *frame, p, q []int) {
		if tried++; tried > mostTried {
			return
		}
		x := &sigmatropic{p: slices.Clone(p), q: slices.Clone(q), f: newFrame(base.m)}
		x.f.made = base.made
		if base.m.BondBetween(p[i-1], q[j-1]) >= 0 {
			return
		}
		if !fits(x) {
			return
		}
		ok := true
		if i > 1 {
			x.pp, ok = x.f.pattern(x.p[1:])
		}
		if ok && j > 1 {
			x.pq, ok = x.f.pattern(x.q[1:])
		}
		if !ok || i > 1 && x.f.partner(x.p[0]) >= 0 && base.m.Atoms[x.p[0]].Element < 15 {
			return
		}
		// The atom the bond leaves must be saturated in the form in use.
		if x.f.partner(x.q[0]) >= 0 {
			return
		}
		if c := x.cycle(); c.check() != nil {
			return
		}
		list = append(list, x)
	}
	// Bonds between nodes.
	base := newFrame(m)
	for k := range m.Bonds {
		if m.Bonds[k].Order != 1 || m.Bonds[k].Aromatic {
			continue
		}
		for _, ends := range [][2]int{{m.Bonds[k].A, m.Bonds[k].B}, {m.Bonds[k].B, m.Bonds[k].A}} {
			p0, q0 := ends[0], ends[1]
			if m.Atoms[q0].Element == 1 || i == j && i > 1 && p0 > q0 {
				continue
			}
			if i == 1 {
				if !mapped && !all && m.Atoms[p0].Element != 1 && base.partner(p0) >= 0 {
					continue
				}
				pathsFrom(base, q0, j, []int{p0}, func(q []int) { try(base, []int{p0}, q) })
				continue
			}
			if m.Atoms[p0].Element == 1 {
				continue
			}
			pathsFrom(base, p0, i, []int{q0}, func(p []int) {
				p = slices.Clone(p)
				pathsFrom(base, q0, j, p, func(q []int) { try(base, p, q) })
			})
		}
	}
	if i > 1 {
		return list
	}
	var hydrogen []*sigmatropic
	for _, x := range list {
		if m.Atoms[x.p[0]].Element == 1 {
			hydrogen = append(hydrogen, x)
		}
	}
	// Hydrogens that are no nodes, unless the migrating atom is mapped.
	if three < 0 || four < 0 {
		nodes := list
		list = nil
		for a := range m.Atoms {
			if m.Atoms[a].Hydrogens == 0 || base.partner(a) >= 0 || m.Atoms[a].Element == 6 && m.Atoms[a].Charge != 0 {
				continue
			}
			if !slices.ContainsFunc(m.Neighbours(a), func(h molecule.Half) bool { return isPi(base, h.Atom) }) {
				continue
			}
			n, h, err := withHydrogen(m, a)
			if err != nil {
				continue
			}
			fh := newFrame(n)
			fh.made = []int{h}
			pathsFrom(fh, a, j, []int{h}, func(q []int) { try(fh, []int{h}, q) })
		}
		hydrogen = append(hydrogen, list...)
		list = nodes
	}
	if all {
		return append(hydrogen, list...)
	}
	if len(hydrogen) > 0 {
		return hydrogen
	}
	return list
}

// cycle is the ring of orbitals: q from its far end to the migrating bond, then p to
// its far end; the bond that forms closes it.
func (x *sigmatropic) cycle() *Cycle {
	i, j := len(x.p), len(x.q)
	o := make([]Orbital, 0, i+j)
	for l := j; l >= 1; l-- {
		orb := Orbital{Atom: x.q[l-1], Kind: Pi, Electrons: 1}
		if l == 1 {
			orb.Kind = Sigma
		} else {
			orb.Electrons = x.pq.at(l - 2)
		}
		o = append(o, orb)
	}
	for k := 1; k <= i; k++ {
		orb := Orbital{Atom: x.p[k-1], Kind: Pi, Electrons: 1}
		if k == 1 {
			orb.Kind = Sigma
		} else {
			orb.Electrons = x.pp.at(k - 2)
		}
		o = append(o, orb)
	}
	c := newCycle(o)
	link := func(at, k, n int) { // between atoms k and k+1 of a chain of n
		r, p := 0.0, 0.0
		if k >= 2 {
			r = piStrength
		}
		if k+1 <= n-1 {
			p = piStrength
		}
		c.set(at, r, p)
	}
	for l := j; l > 1; l-- {
		link(j-l, l-1, j)
	}
	c.set(j-1, sigmaStrength, 0)
	for k := 1; k < i; k++ {
		link(j+k-1, k, i)
	}
	c.set(i+j-1, 0, sigmaStrength)
	return c
}

// best is the electron shift whose product reads first among those that differ in
// where an unpaired position ends.
func (x *sigmatropic) best(c *Cycle) (*shift, error) {
	i, j := len(x.p), len(x.q)
	posQ := func(l int) int { return j - l }
	posP := func(k int) int { return j + k - 1 }
	build := func(hp, hq int) *shift { // atoms (from 1) of p and q left unpaired in the product
		s := &shift{f: x.f, cycle: c, electrons: make([]int, i+j)}
		for n := range s.electrons {
			s.electrons[n] = 1
		}
		s.before = [][2]int{{posP(1), posQ(1)}}
		s.after = [][2]int{{posP(i), posQ(j)}}
		add := func(part *chain, n, hole int, pos func(int) int) {
			if part == nil {
				return
			}
			for _, d := range pairs(n-1, part.hole, 2) {
				s.before = append(s.before, [2]int{pos(d[0]), pos(d[1])})
			}
			h := -1
			if part.hole >= 0 {
				h = hole - 1
				s.electrons[pos(hole)] = part.lone
			}
			for _, d := range pairs(n-1, h, 1) {
				s.after = append(s.after, [2]int{pos(d[0]), pos(d[1])})
			}
		}
		add(x.pp, i, hp, posP)
		add(x.pq, j, hq, posQ)
		return s
	}
	holes := func(part *chain, n int) []int {
		if part == nil || part.hole < 0 {
			return []int{0}
		}
		var list []int
		for h := 1; h <= n-1; h += 2 {
			list = append(list, h)
		}
		return list
	}
	var list []*shift
	for _, hp := range holes(x.pp, i) {
		for _, hq := range holes(x.pq, j) {
			list = append(list, build(hp, hq))
		}
	}
	return readsFirst(list)
}

// plain is the product without configuration.
func (x *sigmatropic) plain() (*Product, error) {
	s, err := x.best(x.cycle())
	if err != nil {
		return nil, err
	}
	return s.product(nil, nil)
}

// answer judges every combination of faces.
func (x *sigmatropic) answer(m *molecule.Molecule) (*Answer, error) {
	i, j := len(x.p), len(x.q)
	f := x.f
	a := &Answer{
		Reactants: []*molecule.Molecule{m}, Joined: f.m, Kind: terms.Sigmatropic,
		Name: fmt.Sprintf("[%d,%d] sigmatropic shift of %s–%s", i, j, x.name(x.p[0]), x.name(x.q[0])),
	}
	if i == 1 {
		a.Name = fmt.Sprintf("[1,%d] sigmatropic shift of %s", j, x.name(x.p[0]))
	}
	number := func(k int) int {
		if slices.Contains(f.made, k) {
			return 0
		}
		return f.m.Atoms[k].Number
	}
	a.Broken = [][2]int{{number(x.p[0]), number(x.q[0])}}
	a.Bonds = [][2]int{{number(x.p[i-1]), number(x.q[j-1])}}
	base := x.cycle()
	s, err := x.best(base)
	if err != nil {
		return nil, refuse(m, -1, err.Error(), "check charges and the mapped atoms")
	}
	achiral := m.SMILES() == m.Mirrored().SMILES()
	hydrogen := f.m.Atoms[x.p[0]].Element == 1
	choices := func(n int) []bool {
		if n > 2 {
			return []bool{false, true}
		}
		return []bool{false} // a single orbital is used with one lobe
	}
	inversions := []bool{false}
	if i == 1 && !hydrogen {
		inversions = []bool{false, true}
	}
	for _, antaQ := range choices(j) {
		for _, antaP := range choices(i) {
			for _, inversion := range inversions {
				if i == j && antaQ && !antaP {
					continue // the same as the other way about
				}
				sign := 1.0
				for _, minus := range []bool{antaQ, antaP, inversion} {
					if minus {
						sign = -sign
					}
				}
				p := Process{Kind: terms.Sigmatropic, Feasible: true, Mode: x.mode(antaP, antaQ, inversion)}
				p.Parts = Components{{Kind: Sigma, Electrons: 2, Antara: inversion}}
				for _, part := range []struct {
					c     *chain
					antar bool
				}{{x.pp, antaP}, {x.pq, antaQ}} {
					if part.c == nil {
						continue
					}
					kind := Pi
					if len(part.c.atoms) == 1 {
						kind = Omega
					}
					p.Parts = append(p.Parts, Component{Kind: kind, Electrons: part.c.electrons(), Antara: part.antar})
				}
				if err := p.finish(base.withSign(sign), f); err != nil {
					return nil, err
				}
				if err := x.stereoisomers(&p, s, antaP, antaQ, inversion, achiral); err != nil {
					return nil, err
				}
				p.Later = later(p.Products)
				x.feasibility(&p, antaP, antaQ, inversion)
				a.Processes = append(a.Processes, p)
			}
		}
	}
	a.complete(append(slices.Clone(x.p), x.q...))
	return a, nil
}

// name names an atom, a hydrogen by itself.
func (x *sigmatropic) name(i int) string {
	if x.f.m.Atoms[i].Element == 1 {
		return "H"
	}
	return label(x.f.m, i)
}

// mode puts the faces into words.
func (x *sigmatropic) mode(antaP, antaQ, inversion bool) string {
	word := func(anta bool) string {
		if anta {
			return "antarafacial"
		}
		return "suprafacial"
	}
	if len(x.p) == 1 {
		s := word(antaQ)
		if x.f.m.Atoms[x.p[0]].Element != 1 {
			if inversion {
				s += ", inversion"
			} else {
				s += ", retention"
			}
		}
		return s
	}
	switch {
	case len(x.p) == 2:
		return word(antaQ)
	case antaP == antaQ:
		return word(antaP) + " on both chains"
	case len(x.p) == len(x.q):
		return "suprafacial on one chain, antarafacial on the other"
	}
	return fmt.Sprintf("%s on the chain of %d, %s on the chain of %d", word(antaP), len(x.p), word(antaQ), len(x.q))
}

// stereoisomers builds the products of a mode: chains facing each other, seen from
// above with p on top. For two chains of three or more atoms the arrangement in which
// they curve opposite ways (chair, turns +1 and −1) is taken; turning both round gives
// the other chair.
func (x *sigmatropic) stereoisomers(p *Process, s *shift, antaP, antaQ, inversion, achiral bool) error {
	f := x.f
	i, j := len(x.p), len(x.q)
	chair := i >= 3 && j >= 3
	for _, turn := range []int{1, -1} {
		// The face of q toward p is the upper one, of p the lower one; with a single
		// migrating atom both faces of q are tried by the turn.
		turnQ, turnP := turn, turn
		if chair {
			turnP = -turn
		}
		var centres []centre
		var geometries []geometry
		open := func(chain []int, turn int, leaving, fresh int, leaveTop, arriveTop bool) {
			n := len(chain)
			if n < 2 {
				return
			}
			e := f.detach(chain[0], chain[1], leaving, false, turn, leaveTop)
			if n > 2 {
				if g, ok := endGeometry(chain[0], chain[1], chain[2], e); ok {
					geometries = append(geometries, g)
				}
			}
			for k := 1; k+2 < n; k++ {
				geometries = append(geometries, geometry{a: chain[k], b: chain[k+1], refA: chain[k-1], refB: chain[k+2], g: molecule.Together, inner: true})
			}
			var last end
			if n > 2 {
				last = f.end(chain, true)
			} else {
				return
			}
			if c, ok := attach(chain[n-1], chain[n-2], fresh, last, true, turn, arriveTop); ok {
				centres = append(centres, c)
			}
		}
		open(x.q, turnQ, x.p[0], x.p[i-1], true, !antaQ)
		open(x.p, turnP, x.q[0], x.q[j-1], false, antaP)
		// Retention or inversion at a migrating carbon.
		if i == 1 && j > 1 {
			if st := f.configuration(x.p[0]); st.Class == molecule.Tetrahedral && len(st.Ligands) == 4 {
				c := centre{atom: x.p[0], perm: st.Permutation}
				copy(c.ligands[:], st.Ligands)
				for k := range c.ligands {
					if c.ligands[k] == x.q[0] {
						c.ligands[k] = x.q[j-1]
					}
				}
				if inversion {
					c.perm = 3 - c.perm
				}
				centres = append(centres, c)
			}
		}
		q, err := s.product(centres, geometries)
		if err != nil {
			return err
		}
		p.Products = collect(p.Products, q, achiral)
	}
	// A product that states less than another is that other with an open end.
	if len(p.Products) == 2 && p.Products[0].Molecule.FlatSMILES() == p.Products[0].SMILES {
		p.Products = p.Products[1:]
	} else if len(p.Products) == 2 && p.Products[1].Molecule.FlatSMILES() == p.Products[1].SMILES {
		p.Products = p.Products[:1]
	}
	return nil
}

// feasibility applies what the trade states about reaching the faces.
func (x *sigmatropic) feasibility(p *Process, antaP, antaQ, inversion bool) {
	f := x.f
	i, j := len(x.p), len(x.q)
	for _, part := range [][]int{x.p, x.q} {
		if i != j && !canFold(f, part) { // equal chains may lie on each other stretched out
			p.infeasible("an inner bond of the chain is held trans, so that its ends cannot meet")
		}
	}
	inRing := func(chain []int) bool {
		for _, ring := range f.m.Rings() {
			n := 0
			for _, a := range chain {
				if slices.Contains(ring, a) {
					n++
				}
			}
			if n == len(chain) && len(ring) <= 8 {
				return true
			}
		}
		return false
	}
	switch {
	case i == 1:
		switch {
		case antaQ && inRing(x.q):
			p.infeasible("the chain lies in a ring: its two faces cannot both be reached")
		case antaQ && j == 2:
			p.infeasible("two neighbouring atoms cannot be met on opposite faces")
		case antaQ && j == 3:
			p.infeasible("an antarafacial allyl component in a four-membered ring of atoms: out of reach")
		case antaQ && j < 7:
			p.infeasible(fmt.Sprintf("a chain of %d atoms is too short to be met on opposite faces", j))
		case antaQ:
			p.note("needs a helical chain: possible in an open chain, as in previtamin D")
		case inversion && j == 3:
			p.note("strained: seen only where the skeleton holds the group over the chain, as in bicyclo[3.2.0]heptenes")
		}
	case antaP || antaQ:
		long := func(anta bool, n int) bool { return !anta || n >= 7 }
		if !long(antaP, i) || !long(antaQ, j) {
			p.infeasible("an antarafacial allyl or short chain in a ring of this size: allowed or not, out of reach")
		}
	case i == 3 && j == 3 && p.Thermal == Allowed:
		p.note("the product's configuration is that of the chair; a boat, where a ring enforces it, turns one end round")
	}
	if transInSmallRing(p.Products) {
		p.infeasible("the product would hold a trans double bond in a ring of seven or fewer atoms")
	}
}
