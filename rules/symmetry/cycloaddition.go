package symmetry

import (
	"fmt"
	"slices"
	"sort"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// longestComponent is the largest π chain of a cycloaddition that is sought.
const longestComponent = 18

// Cycloaddition judges the [m+n] cycloaddition of two π systems in every combination
// of faces and builds the adducts.
//
// ca and cb are the atoms of each component from end to end, as indices of a and b;
// ca[0] becomes bonded to cb[0] and the last of ca to the last of cb. For an
// intramolecular addition a and b are the same molecule.
func Cycloaddition(a, b *molecule.Molecule, ca, cb []int) (*Answer, error) {
	m, offset := a, 0
	reactants := []*molecule.Molecule{a}
	if a != b {
		offset = len(a.Atoms)
		var err error
		if m, err = join(a, b); err != nil {
			return nil, err
		}
		reactants = append(reactants, b)
	}
	for _, c := range []struct {
		m     *molecule.Molecule
		atoms []int
	}{{a, ca}, {b, cb}} {
		if err := checkPath(c.m, c.atoms); err != nil {
			return nil, err
		}
	}
	second := make([]int, len(cb))
	for i, x := range cb {
		second[len(cb)-1-i] = x + offset
	}
	for _, i := range ca {
		if slices.Contains(second, i) {
			return nil, refuse(m, i, label(m, i)+" is given in both components", "give two separate π systems")
		}
	}
	x := &assembly{f: newFrame(m)}
	for i, atoms := range [][]int{slices.Clone(ca), second} {
		if !x.newPi(atoms) {
			c, cm := ca, a
			if i == 1 {
				c, cm = cb, b
			}
			return nil, refuse(cm, c[0], fmt.Sprintf("the atoms %s are no π component with its double bonds where the addition needs them", pathLabels(cm, c)),
				"give the ends of a π bond, a diene or a dipole")
		}
	}
	base := x.cycle()
	if err := base.check(); err != nil {
		return nil, refuse(m, ca[0], err.Error(), "check charges and the mapped atoms")
	}
	name := fmt.Sprintf("[%d+%d] cycloaddition by electrons, (%d+%d) by atoms", x.parts[0].electrons(), x.parts[1].electrons(), len(ca), len(cb))
	answer := x.start(terms.Cycloaddition, name, reactants)
	s, err := x.best(base)
	if err != nil {
		return nil, refuse(m, ca[0], err.Error(), "check charges and the mapped atoms")
	}
	mirror := achiral(m)
	for _, antara := range [][]bool{{false, false}, {false, true}, {true, false}, {true, true}} {
		p, err := x.process(terms.Cycloaddition, base, antara)
		if err != nil {
			return nil, err
		}
		words := [2]string{"suprafacial", "suprafacial"}
		for k := range words {
			if antara[k] {
				words[k] = "antarafacial"
			}
		}
		p.Mode = words[0] + " + " + words[1]
		for _, turn := range []int{1, -1} {
			q, err := x.adduct(s, antara, turn)
			if err != nil {
				return nil, err
			}
			p.Products = collect(p.Products, q, mirror)
		}
		if len(p.Products) == 1 {
			p.Products[0].Configuration = ""
		}
		x.faces(&p, antara)
		answer.Processes = append(answer.Processes, p)
	}
	if pi := x.parts[0].pi; pi.polar >= 0 || x.parts[1].pi.polar >= 0 {
		for _, part := range x.parts {
			if part.pi.polar >= 0 {
				answer.polar = append(answer.polar, part.pi.polar)
				answer.Notes = append(answer.Notes, fmt.Sprintf("the π pair of %s=%s is counted with %s", label(m, part.pi.atoms[part.pi.hole]), label(m, part.pi.polar), label(m, part.pi.polar)))
			}
		}
	}
	answer.complete(x.parts[0].atoms)
	return answer, nil
}

// adduct builds one stereoisomer: the first component above, approached from below;
// the second below, approached from above, curving the same way (turn +1, endo) or
// the other.
func (x *assembly) adduct(s *shift, antara []bool, turn int) (*Product, error) {
	f := x.f
	a, b := x.parts[0].atoms, x.parts[1].atoms
	var centres []centre
	ends := func(atoms []int) (end, end) {
		if len(atoms) == 2 {
			return f.alkeneEnds(atoms[0], atoms[1], false)
		}
		return f.end(atoms, false), f.end(atoms, true)
	}
	add := func(atoms []int, e0, e1 end, before, after, turn int, top, anta bool) {
		n := len(atoms)
		if c, ok := attach(atoms[0], atoms[1], before, e0, false, turn, top); ok {
			centres = append(centres, c)
		}
		if c, ok := attach(atoms[n-1], atoms[n-2], after, e1, true, turn, top != anta); ok {
			centres = append(centres, c)
		}
	}
	a0, a1 := ends(a)
	b0, b1 := ends(b)
	// b runs from under the end of a to under its start: seen from above it turns the
	// other way when it lies under a with the same curvature.
	add(a, a0, a1, b[len(b)-1], b[0], 1, false, antara[0])
	add(b, b0, b1, a[len(a)-1], a[0], -turn, true, antara[1])
	var geometries []geometry
	for _, atoms := range [][]int{a, b} {
		if len(a)+len(b) > smallRing {
			for i := 1; i+2 < len(atoms); i++ {
				geometries = append(geometries, geometry{a: atoms[i], b: atoms[i+1], refA: atoms[i-1], refB: atoms[i+2], g: molecule.Together, inner: true})
			}
		}
	}
	p, err := s.product(centres, geometries)
	if err != nil {
		return nil, err
	}
	// Endo and exo: which side of a two-atom component lies under the longer one.
	if len(b) == 2 && len(a) > 2 && !b0.open && !b1.open && !antara[0] && !antara[1] {
		under := func(e end) int {
			if turn > 0 {
				return e.out
			}
			return e.in
		}
		away := func(e end) int {
			if turn > 0 {
				return e.in
			}
			return e.out
		}
		group := func(i int) bool { return i >= 0 && f.m.Atoms[i].Element != 1 }
		in, out := group(under(b0)) || group(under(b1)), group(away(b0)) || group(away(b1))
		switch {
		case in && !out:
			p.Configuration = "endo"
		case out && !in:
			p.Configuration = "exo"
		}
	}
	return p, nil
}

// faces applies what the trade states about antarafacial components.
func (x *assembly) faces(p *Process, antara []bool) {
	f := x.f
	for k, part := range x.parts {
		if part.kind != Pi {
			continue
		}
		if !canFold(f, part.atoms) {
			p.infeasible("a bond inside the chain " + pathLabels(f.m, part.atoms) + " is held trans, so that its ends cannot be reached together")
		}
		if !antara[k] {
			continue
		}
		switch n := len(part.atoms); {
		case n == 2 && cumulated(f, part.atoms):
			p.note("a cumulene such as a ketene can be met on opposite faces: its sp carbon is unhindered")
		case n == 2 && twisted(f, part.atoms):
			p.note("a twisted (trans-cyclic) alkene can be met on opposite faces")
		case n <= 6:
			p.infeasible(fmt.Sprintf("a π component of %d atoms cannot be met on opposite faces in a ring of this size", n))
		default:
			p.note(fmt.Sprintf("the component of %d atoms must be long and twisted enough to be met on opposite faces", n))
		}
	}
}

// cumulated reports whether an atom of a π bond is sp carbon of a cumulene.
func cumulated(f *frame, atoms []int) bool {
	for _, i := range atoms {
		doubles := 0
		for _, h := range f.m.Neighbours(i) {
			if f.order[h.Bond] == 2 {
				doubles++
			}
		}
		if doubles == 2 && f.m.Atoms[i].Element == 6 {
			return true
		}
	}
	return false
}

// twisted reports whether a double bond is trans in a ring.
func twisted(f *frame, atoms []int) bool {
	k := f.m.BondBetween(atoms[0], atoms[1])
	b := &f.m.Bonds[k]
	if b.Geometry == molecule.NoGeometry || !f.m.BondInRing(k) {
		return false
	}
	for _, ring := range f.m.Rings() {
		n := len(ring)
		i := slices.Index(ring, b.A)
		if i < 0 {
			continue
		}
		for _, d := range []int{1, n - 1} {
			if ring[(i+d)%n] == b.B {
				g := b.Geometry
				if b.RefA != ring[(i+n-d)%n] {
					g = flipped(g)
				}
				if b.RefB != ring[(i+2*d)%n] {
					g = flipped(g)
				}
				return g == molecule.Opposite
			}
		}
	}
	return false
}

// checkPath refuses atoms that are no path of a molecule.
func checkPath(m *molecule.Molecule, atoms []int) error {
	if len(atoms) < 2 || len(atoms) > longestComponent {
		return refuse(m, -1, fmt.Sprintf("a component of %d atoms cannot take part in a cycloaddition", len(atoms)), "give the atoms of each π component from end to end")
	}
	for i, x := range atoms {
		if x < 0 || x >= len(m.Atoms) || slices.Contains(atoms[:i], x) || i > 0 && m.BondBetween(atoms[i-1], x) < 0 {
			return refuse(m, -1, "the atoms of a component are no path of the molecule", "give the atoms of each π component from end to end")
		}
	}
	return nil
}

// pathLabels names the atoms of a path.
func pathLabels(m *molecule.Molecule, atoms []int) string {
	s := ""
	for i, x := range atoms {
		if i > 0 {
			s += "–"
		}
		s += label(m, x)
	}
	return s
}

// CycloadditionBetween judges the cycloaddition of two molecules whose component ends
// are mapped: :1 and :2 in a, :3 and :4 in b, the bonds forming 1–3 and 2–4. Where a
// molecule has no maps its only diene or dipole (a) or its only π bond (b) is taken.
// b is nil for an intramolecular addition, then all four ends are mapped in a. Of
// several chains between two ends the shortest is meant that has no lone pair or carbonyl
// carbon in it; [Cycloaddition] takes any.
func CycloadditionBetween(a, b *molecule.Molecule) (*Answer, error) {
	second := b
	if b == nil {
		second = a
		if a.AtomByMap(1) < 0 || a.AtomByMap(2) < 0 || a.AtomByMap(3) < 0 || a.AtomByMap(4) < 0 {
			return nil, refuse(a, -1, "the ends of an intramolecular cycloaddition are not mapped", "map the ends of one component :1 :2 and of the other :3 :4")
		}
	}
	ca, err := componentOf(a, 1, 2, []int{4, 3, 2})
	if err != nil {
		return nil, err
	}
	cb, err := componentOf(second, 3, 4, []int{2})
	if err != nil {
		return nil, err
	}
	one, err := Cycloaddition(a, second, ca, cb)
	if err != nil || a.AtomByMap(1) >= 0 && second.AtomByMap(3) >= 0 {
		return one, err
	}
	// The ends were found, not stated: either way round is meant.
	turned := slices.Clone(cb)
	slices.Reverse(turned)
	other, err := Cycloaddition(a, second, ca, turned)
	if err != nil {
		return nil, err
	}
	x, y := one.Processes[0].Products[0].Molecule.FlatSMILES(), other.Processes[0].Products[0].Molecule.FlatSMILES()
	if y < x {
		one, x, y = other, y, x
	}
	if x != y {
		one.Notes = append(one.Notes, "the other way round the product is "+y+"; symmetry allows or forbids both alike, which one forms is a matter of the coefficients")
	}
	return one, nil
}

// componentOf finds the π component between two mapped atoms, or the only one of the
// given lengths.
func componentOf(m *molecule.Molecule, from, to int, lengths []int) ([]int, error) {
	u, v := m.AtomByMap(from), m.AtomByMap(to)
	if (u < 0) != (v < 0) {
		return nil, refuse(m, max(u, v), fmt.Sprintf("only one end of the component :%d :%d is mapped", from, to), "map both ends")
	}
	f := newFrame(m)
	type found struct {
		atoms []int
		weak  bool
	}
	var list []found
	var locked []int // a diene that cannot become s-cis
	try := func(path []int, wanted bool) {
		g := newFrame(m)
		atoms := slices.Clone(path)
		c, ok := g.pattern(atoms)
		if !ok {
			return
		}
		if !wanted && !canFold(g, atoms) {
			if locked == nil && len(atoms) == 4 {
				locked = atoms
			}
			return
		}
		list = append(list, found{atoms, c.hole >= 0 && (c.polar >= 0 || c.lone == 2 && m.Atoms[atoms[c.hole]].Charge == 0)})
	}
	if u >= 0 {
		if k := m.BondBetween(u, v); k >= 0 && f.order[k] >= 2 {
			try([]int{u, v}, true)
		}
		tried := 0
		chainsFrom(f, u, longestComponent, func(path []int) {
			if path[len(path)-1] == v && tried < 2000 {
				tried++
				try(path, true)
			}
		})
		sort.SliceStable(list, func(i, j int) bool {
			if list[i].weak != list[j].weak {
				return !list[i].weak
			}
			return len(list[i].atoms) < len(list[j].atoms)
		})
		if len(list) == 0 {
			return nil, refuse(m, u, fmt.Sprintf("no π component runs from %s to %s", label(m, u), label(m, v)), "map the two ends of a π bond, a diene, a dipole or a longer chain")
		}
		return list[0].atoms, nil
	}
	classes := m.Classes()
	// Carbon–carbon π bonds go before those to heteroatoms.
	const heteroBond = -2
	if slices.Contains(lengths, 2) {
		lengths = append(slices.Clone(lengths), heteroBond)
	}
	for _, n := range lengths {
		list = list[:0]
		for i := range m.Atoms {
			if n == 2 || n == heteroBond {
				for _, h := range m.Neighbours(i) {
					carbons := m.Atoms[i].Element == 6 && m.Atoms[h.Atom].Element == 6
					if i < h.Atom && f.order[h.Bond] >= 2 && !m.Bonds[h.Bond].Aromatic && carbons == (n == 2) {
						try([]int{i, h.Atom}, false)
					}
				}
				continue
			}
			chainsFrom(f, i, n, func(path []int) {
				if len(path) != n || path[n-1] < i || m.BondBetween(i, path[n-1]) >= 0 {
					return
				}
				for _, x := range path[1:] {
					if m.Atoms[x].Aromatic {
						return
					}
				}
				if n == 3 && !ylide(m, path) {
					return
				}
				try(path, false)
			})
		}
		if n == 4 && len(list) == 0 && locked != nil {
			return nil, refuse(m, locked[0], fmt.Sprintf("the diene %s is held s-trans, so that its ends cannot be reached together", pathLabels(m, locked)),
				fmt.Sprintf("map the ends of another π system :%d and :%d", from, to))
		}
		var kept [][]int
		seen := map[string]bool{}
		for _, x := range list {
			if x.weak {
				continue
			}
			var one, other []int
			for i := range x.atoms {
				one = append(one, classes[x.atoms[i]])
				other = append(other, classes[x.atoms[len(x.atoms)-1-i]])
			}
			if slices.Compare(other, one) < 0 {
				one = other
			}
			if k := fmt.Sprint(one); !seen[k] {
				seen[k] = true
				kept = append(kept, x.atoms)
			}
		}
		if len(kept) == 1 {
			return kept[0], nil
		}
		if len(kept) > 1 {
			return nil, refuse(m, -1, fmt.Sprintf("%d π components could react (%s, %s, …)", len(kept), pathLabels(m, kept[0]), pathLabels(m, kept[1])),
				fmt.Sprintf("map the ends of the one meant :%d and :%d", from, to))
		}
	}
	return nil, refuse(m, -1, "no π component is found that could take part in a cycloaddition", fmt.Sprintf("map its ends :%d and :%d", from, to))
}

// Termolecular judges a cycloaddition of three or more components in a ring: each is
// given by its atoms from end to end, as indices of the one molecule m that holds all
// reactants; the last atom of each becomes bonded to the first of the next. A
// component of two atoms joined by a single bond is a σ bond that breaks. Only the
// all-suprafacial mode is judged; configurations are not followed.
func Termolecular(m *molecule.Molecule, components [][]int) (*Answer, error) {
	if len(components) < 2 || len(components) > maxComponents {
		return nil, refuse(m, -1, fmt.Sprintf("%d components are no pericyclic process", len(components)), "give two or more")
	}
	x := &assembly{f: newFrame(m)}
	seen := map[int]bool{}
	for _, c := range components {
		if err := checkPath(m, c); err != nil {
			return nil, err
		}
		for _, i := range c {
			if seen[i] {
				return nil, refuse(m, i, label(m, i)+" is given in two components", "give separate components")
			}
			seen[i] = true
		}
		if len(c) == 2 && x.f.order[m.BondBetween(c[0], c[1])] == 1 && !m.Bonds[m.BondBetween(c[0], c[1])].Aromatic {
			x.newSigma(c[0], c[1])
			continue
		}
		if !x.newPi(slices.Clone(c)) {
			return nil, refuse(m, c[0], fmt.Sprintf("the atoms %s are no π component with its double bonds where the process needs them", pathLabels(m, c)), "give the ends of a π bond, a diene or a σ bond")
		}
	}
	base := x.cycle()
	if err := base.check(); err != nil {
		return nil, refuse(m, components[0][0], err.Error(), "check charges and the atoms given")
	}
	answer := x.start(terms.Cycloaddition, fmt.Sprintf("cycloaddition of %d components", len(components)), []*molecule.Molecule{m})
	s, err := x.best(base)
	if err != nil {
		return nil, refuse(m, components[0][0], err.Error(), "check charges and the atoms given")
	}
	p, err := x.process(terms.Cycloaddition, base, make([]bool, len(x.parts)))
	if err != nil {
		return nil, err
	}
	p.Mode = "suprafacial on all components"
	q, err := s.product(nil, nil)
	if err != nil {
		return nil, err
	}
	p.Products = collect(nil, q, achiral(m))
	answer.Processes = append(answer.Processes, p)
	answer.complete(x.allAtoms())
	return answer, nil
}
