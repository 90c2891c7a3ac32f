package frontier

import (
	"fmt"
	"slices"
	"sort"
)

// Matrix is the Hückel matrix of one π system under a parameter set. Each element is
// linear in the parameters: H_rr = Σ w θ over Diagonal[r], and for link l, H_IJ =
// Σ w θ over LinkTerms[l]. So ∂H/∂θ is exact, and with q_r and 2p_rs it gives the
// derivative of E_π by every parameter.
type Matrix struct {
	N         int
	H         []float64 // row-major N×N, in β relative to α
	Diagonal  [][]Term  // per centre
	LinkTerms [][]Term  // per link
	Links     []Link    // by local index
	Electrons float64
	Centres   []int    // local index → index into Pi.Centres
	Borrowed  []string // entries of the set taken from elsewhere, "k C Br (streitwieser-1961)"
}

// Matrix builds the matrix of one system of pi. Error: a strict set that lacks an
// entry (the entry is named).
func (s *Set) Matrix(pi *Pi, system int) (*Matrix, error) {
	if system < 0 || system >= len(pi.Systems) {
		return nil, fmt.Errorf("π system %d of %d does not exist", system+1, len(pi.Systems))
	}
	members := pi.Systems[system]
	n := len(members)
	m := &Matrix{N: n, H: make([]float64, n*n), Centres: members, Diagonal: make([][]Term, n)}
	var localSpace, classSpace [64]int
	local, class := localSpace[:0], classSpace[:0]
	for range pi.Centres {
		local = append(local, -1)
	}
	for i, c := range members {
		local[c] = i
		k, ok := classIndex[pi.Centres[c].Class]
		if !ok {
			return nil, fmt.Errorf("no class of centre is called %q", pi.Centres[c].Class)
		}
		class = append(class, k)
		m.Electrons += pi.Centres[c].Electrons
	}
	m.Electrons = whole(m.Electrons)
	links, shifts := 0, 0
	for _, l := range pi.Links {
		if local[l.I] >= 0 && local[l.J] >= 0 {
			links++
		}
	}
	for _, d := range pi.Inductive {
		if local[d.Centre] >= 0 {
			shifts++
		}
	}
	terms := make([]Term, 0, n+links+shifts)
	m.Links, m.LinkTerms = make([]Link, 0, links), make([][]Term, 0, links)
	var borrowedSpace [64]Parameter
	borrowed := borrowedSpace[:0]
	shift := 0 // pi.Inductive ascends by centre, as do the members of a system
	for i, k := range class {
		start := len(terms)
		p := hOf[k]
		if s.missing[p] {
			return nil, s.lacks(p)
		}
		if s.Borrowed[p] != "" {
			borrowed = append(borrowed, p)
		}
		terms = append(terms, Term{p, 1})
		h := s.Values[p]
		for shift < len(pi.Inductive) && pi.Inductive[shift].Centre < members[i] {
			shift++
		}
		for ; shift < len(pi.Inductive) && pi.Inductive[shift].Centre == members[i]; shift++ {
			p, ok := inductiveOf[pi.Inductive[shift].Cause]
			if !ok {
				return nil, fmt.Errorf("no inductive shift is called %q", pi.Inductive[shift].Cause)
			}
			if s.Values[p] != 0 && s.Borrowed[p] != "" {
				borrowed = append(borrowed, p)
			}
			terms = append(terms, Term{p, 1})
			h += s.Values[p]
		}
		m.H[i*n+i] = h
		m.Diagonal[i] = terms[start:len(terms):len(terms)]
	}
	for _, l := range pi.Links {
		a, b := local[l.I], local[l.J]
		if a < 0 || b < 0 {
			continue
		}
		if a > b {
			a, b = b, a
		}
		p := linkParameter(class[a], class[b])
		if l.Kind != AnyLink {
			p = linkKindParameter[l.Kind]
		}
		if p < 0 {
			return nil, fmt.Errorf("no resonance integral is defined between %s and %s", classes[class[a]].Class, classes[class[b]].Class)
		}
		if s.missing[p] {
			return nil, s.lacks(p)
		}
		if s.Borrowed[p] != "" {
			borrowed = append(borrowed, p)
		}
		start := len(terms)
		terms = append(terms, Term{p, l.Cos})
		m.LinkTerms = append(m.LinkTerms, terms[start:len(terms):len(terms)])
		m.Links = append(m.Links, Link{I: a, J: b, Cos: l.Cos, Kind: l.Kind})
		v := s.Values[p] * l.Cos
		m.H[a*n+b], m.H[b*n+a] = v, v
	}
	m.Borrowed = s.borrowedNames(borrowed)
	return m, nil
}

// borrowedNames lists borrowed entries once each, in parameter order.
func (s *Set) borrowedNames(used []Parameter) []string {
	if len(used) == 0 {
		return nil
	}
	slices.Sort(used)
	used = slices.Compact(used)
	names := make([]string, len(used))
	for i, p := range used {
		names[i] = parameterNames[p] + " (" + s.Borrowed[p] + ")"
	}
	return names
}

// lacks is the refusal of a strict set.
func (s *Set) lacks(p Parameter) error {
	return fmt.Errorf("the strict set %s has no entry %q, which this structure needs", s.Name, p)
}

// Solution is every π system of a molecule solved under one set.
type Solution struct {
	Pi       *Pi
	Set      *Set
	Matrices []*Matrix   // aligned with Pi.Systems
	Systems  []*Orbitals // aligned with Pi.Systems
}

// Solve builds and solves the matrices of all systems of pi, each apart from the
// others.
func (s *Set) Solve(pi *Pi) (*Solution, error) {
	sol := &Solution{Pi: pi, Set: s, Matrices: make([]*Matrix, len(pi.Systems)), Systems: make([]*Orbitals, len(pi.Systems))}
	for i := range pi.Systems {
		m, err := s.Matrix(pi, i)
		if err != nil {
			return nil, err
		}
		o, err := Solve(m.N, m.H, m.Electrons)
		if err != nil {
			return nil, err
		}
		sol.Matrices[i], sol.Systems[i] = m, o
	}
	return sol, nil
}

// Borrowed lists the entries of the set that the solution uses and that were taken
// from elsewhere, once each.
func (sol *Solution) Borrowed() []string {
	seen := map[string]bool{}
	var all []string
	for _, m := range sol.Matrices {
		for _, b := range m.Borrowed {
			if !seen[b] {
				seen[b] = true
				all = append(all, b)
			}
		}
	}
	sort.Strings(all)
	return all
}

// Find gives the system and the local index of an atom's conjugated centre; false
// where it has none.
func (sol *Solution) Find(atom int) (system, local int, ok bool) {
	if atom < 0 || atom >= len(sol.Pi.CentreOf) || sol.Pi.CentreOf[atom] < 0 {
		return 0, 0, false
	}
	c := sol.Pi.CentreOf[atom]
	for s, members := range sol.Pi.Systems {
		for i, m := range members {
			if m == c {
				return s, i, true
			}
		}
	}
	return 0, 0, false
}
