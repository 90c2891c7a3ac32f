package reactivity

import (
	"fmt"
	"slices"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
)

// LewisEffect is what a Lewis acid on a carbonyl group changes, computed by solving the
// pair twice: once as it stands, once with the parameters of the coordinated oxygen.
// A coordinated oxygen is given h of the class "O+" (two-coordinate oxygen with a
// positive charge; Streitwieser 1961: 2.5 against 1.0 of a carbonyl), the limit of full
// coordination, as protonated acrolein stands for the complexed one in K. N. Houk,
// R. W. Strozier, J. Am. Chem. Soc. 1973, 95, 4094.
type LewisEffect struct {
	Molecule   int // 0: the acid sits on the first molecule, 1: on the second
	Atom       int // index of the coordinated oxygen there
	H          [2]float64
	Source     string
	Without    *PairJudgement // the same pair without the acid, no products
	GapsBefore Gaps           // of the joining that is first with the acid
	GapsAfter  Gaps
	// Preference is ΔE(second) − ΔE(first) of the two orientations of that joining, in
	// |β|, without and with the acid, for the orientation that is first with it. Where
	// the same atom of the partner is attacked in both, only the ends of the diene
	// differ, and the acid changes nothing here.
	Preference [2]float64
	// Frontier is the same for the stabilization by the frontier orbitals (both
	// directions), first minus second, in |β|.
	Frontier [2]float64
	// FirstBond and Asynchronicity are those of the first orientation.
	FirstBond, Asynchronicity [2]float64
	text                      string
}

// String says what the acid changes, in words and numbers.
func (e *LewisEffect) String() string { return e.text }

// carbonylToCoordinate picks the oxygen that a Lewis acid binds: of a carbonyl group
// conjugated with, or part of, a reacting π bond, the aldehyde or ketone before the
// amide before the ester (common practice (no source): the order of basicity in
// chelate-free complexes), then the first in the input.
func carbonylToCoordinate(m *molecule.Molecule, pi *frontier.Pi, near map[int]bool) int {
	best, score := -1, 0
	for i := range m.Atoms {
		if m.Atoms[i].Element != 8 || m.Degree(i) != 1 || m.Atoms[i].Charge != 0 || m.Atoms[i].Hydrogens != 0 || pi.CentreOf[i] < 0 {
			continue
		}
		c := m.Neighbours(i)[0].Atom
		if m.Bonds[m.Neighbours(i)[0].Bond].Order != 2 || m.Atoms[c].Element != 6 || !near[i] && !near[c] {
			continue
		}
		s := 3
		for _, h := range m.Neighbours(c) {
			switch {
			case h.Atom == i:
			case m.Atoms[h.Atom].Element == 7:
				s = min(s, 2)
			case m.Atoms[h.Atom].Element == 8 || m.Atoms[h.Atom].Element == 16:
				s = min(s, 1)
			case m.Atoms[h.Atom].Element != 6:
				s = 0
			}
		}
		if s > score {
			best, score = i, s
		}
	}
	return best
}

// coordinate judges the pair again with a Lewis acid on a carbonyl oxygen: of the
// partner of the first joining where it has one, else of its heterodiene. The result
// is nil where neither has one.
func (p *PairJudgement) coordinate(combinations []Combination, c PairConditions) (*PairJudgement, *LewisEffect, error) {
	first := &p.Joinings[0]
	type candidate struct {
		side *pairSide
		end  *End
		in   int
	}
	list := []candidate{{p.sideB, &first.B, 1}, {p.sideA, &first.A, 0}}
	if p.B == nil {
		list[0].in = 0
	}
	if first.A.Role == RolePartner {
		list[0], list[1] = list[1], list[0]
	}
	for _, k := range list {
		near := map[int]bool{}
		for _, i := range k.end.Atoms {
			near[i] = true
			for _, h := range k.side.m.Neighbours(i) {
				near[h.Atom] = true
			}
		}
		o := carbonylToCoordinate(k.side.m, k.side.pi, near)
		if o < 0 {
			continue
		}
		h, ok := p.Set.Value("h O+")
		if !ok {
			return nil, nil, fmt.Errorf("the parameter set %s gives no h for O+, which a coordinated oxygen needs", p.Set.Name)
		}
		source := "h of O+"
		if at, ok := frontier.ParameterOf("h O+"); ok {
			source += ": " + p.Set.Source[at]
		}
		side, before, err := k.side.withH(o, h)
		if err != nil {
			return nil, nil, err
		}
		sideA, sideB := p.sideA, p.sideB
		if k.side == sideA {
			sideA = side
		}
		if k.side == sideB {
			sideB = side
		}
		// full coordination would overstate the carbonyl group itself as a partner, so
		// the order of the joinings stays that without the acid
		kept := make([]int, len(p.Joinings))
		for n := range p.Joinings {
			kept[n] = p.Joinings[n].index
		}
		with, err := judgePair(p.EndsA, p.EndsB, sideA, sideB, p.Set, combinations, c, kept)
		if err != nil {
			return nil, nil, err
		}
		e := &LewisEffect{Molecule: k.in, Atom: o, H: [2]float64{before, h}, Source: source, Without: p}
		e.compare(with)
		return with, e, nil
	}
	return nil, nil, nil
}

// withH solves a side again with another h at one atom; before is the value it had.
func (s *pairSide) withH(atom int, h float64) (*pairSide, float64, error) {
	at := s.where[s.pi.CentreOf[atom]]
	sol := *s.sol
	sol.Matrices = append([]*frontier.Matrix(nil), s.sol.Matrices...)
	sol.Systems = append([]*frontier.Orbitals(nil), s.sol.Systems...)
	m := *sol.Matrices[at[0]]
	m.H = append([]float64(nil), m.H...)
	before := m.H[at[1]*m.N+at[1]]
	m.H[at[1]*m.N+at[1]] = h
	o, err := frontier.Solve(m.N, m.H, m.Electrons)
	if err != nil {
		return nil, 0, err
	}
	sol.Matrices[at[0]], sol.Systems[at[0]] = &m, o
	return pairSideOf(s.m, s.pi, &sol), before, nil
}

// compare fills in what the acid changes in the joining that is first with it.
func (e *LewisEffect) compare(with *PairJudgement) {
	j := &with.Joinings[0]
	e.GapsAfter = j.Gaps
	after := with.AdductsOf(j)
	var before []*Adduct
	for k := range e.Without.Joinings {
		w := &e.Without.Joinings[k]
		if slices.Equal(w.A.Atoms, j.A.Atoms) && slices.Equal(w.B.Atoms, j.B.Atoms) {
			e.GapsBefore = w.Gaps
			before = e.Without.AdductsOf(w)
		}
	}
	m := with.A
	if e.Molecule == 1 {
		m = with.B
	}
	e.text = fmt.Sprintf("Lewis acid on O%d of the %s molecule, h %.2f → %.2f (%s): gap to the LUMO of the partner %.4f → %.4f |β|, other gap %.4f → %.4f |β|",
		m.Atoms[e.Atom].Number, [2]string{"first", "second"}[e.Molecule], e.H[0], e.H[1], e.Source,
		e.GapsBefore.Normal, e.GapsAfter.Normal, e.GapsBefore.Inverse, e.GapsAfter.Inverse)
	if len(before) == 0 {
		return
	}
	if len(before) == 2 && before[0].Bonds != after[0].Bonds {
		before[0], before[1] = before[1], before[0]
	}
	e.FirstBond = [2]float64{before[0].DeltaE, after[0].DeltaE}
	e.Asynchronicity = [2]float64{before[0].Asynchronicity, after[0].Asynchronicity}
	e.text += fmt.Sprintf("; ΔE of the first bond %.4f → %.4f |β|, asynchronicity %.4f → %.4f |β|",
		e.FirstBond[0], e.FirstBond[1], e.Asynchronicity[0], e.Asynchronicity[1])
	if len(after) == 2 && len(before) == 2 {
		frontier := func(x, y *Adduct) float64 { return x.Normal + x.Inverse - y.Normal - y.Inverse }
		e.Preference = [2]float64{before[1].DeltaE - before[0].DeltaE, after[1].DeltaE - after[0].DeltaE}
		e.Frontier = [2]float64{frontier(before[0], before[1]), frontier(after[0], after[1])}
		e.text += fmt.Sprintf("; lead of the first orientation in ΔE %+.4f → %+.4f |β|, in frontier stabilization %+.4f → %+.4f |β|",
			e.Preference[0], e.Preference[1], e.Frontier[0], e.Frontier[1])
	}
}
