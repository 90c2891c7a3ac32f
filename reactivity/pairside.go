package reactivity

import (
	"fmt"
	"math"
	"slices"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
)

// pairSide is one component of a cycloaddition with its orbitals: every π system is
// solved once, its localization energies are computed once, and every combination is
// read off from them.
type pairSide struct {
	m   *molecule.Molecule
	pi  *frontier.Pi
	sol *frontier.Solution
	// where holds, for every centre of pi, its system and its index there.
	where [][2]int
	// By system, nil until asked for.
	local      []*Localization
	population [][]float64
}

// newPairSide perceives and solves one component.
func newPairSide(m *molecule.Molecule, set *frontier.Set, twists []frontier.Twist) (*pairSide, error) {
	pi, err := frontier.Perceive(m, frontier.Options{Twists: twists})
	if err != nil {
		return nil, err
	}
	sol, err := set.Solve(pi)
	if err != nil {
		return nil, err
	}
	return pairSideOf(m, pi, sol), nil
}

func pairSideOf(m *molecule.Molecule, pi *frontier.Pi, sol *frontier.Solution) *pairSide {
	s := &pairSide{m: m, pi: pi, sol: sol, local: make([]*Localization, len(pi.Systems)), population: make([][]float64, len(pi.Systems))}
	s.where = make([][2]int, len(pi.Centres))
	for k, members := range pi.Systems {
		for l, c := range members {
			s.where[c] = [2]int{k, l}
		}
	}
	return s
}

// reacting is an end located in the π systems of its side.
type reacting struct {
	side    *pairSide
	end     *End
	system  int
	centres []int // local index of each atom of the path, -1 where it has none there
}

// locate finds the π system that holds both ends of e: the conjugated one, or, for an
// aryne and the outer bond of an allene, the local one.
func (s *pairSide) locate(e *End) (reacting, bool) {
	r := reacting{side: s, end: e, centres: make([]int, len(e.Atoms))}
	first, last := e.First(), e.Last()
	if !e.Local {
		a, b := s.pi.CentreOf[first], s.pi.CentreOf[last]
		if a >= 0 && b >= 0 && s.where[a][0] == s.where[b][0] && (e.Role != RolePartner || s.linked(a, b)) {
			r.system = s.where[a][0]
			for k, i := range e.Atoms {
				r.centres[k] = -1
				if c := s.pi.CentreOf[i]; c >= 0 && s.where[c][0] == r.system {
					r.centres[k] = s.where[c][1]
				}
			}
			return r, true
		}
	}
	for k, members := range s.pi.Systems {
		for q, i := range e.Atoms {
			r.centres[q] = -1
			for l, c := range members {
				if s.pi.Centres[c].Atom == i && !s.pi.Centres[c].Alkyl {
					r.centres[q] = l
				}
			}
		}
		n := len(e.Atoms) - 1
		if r.centres[0] >= 0 && r.centres[n] >= 0 && (e.Role != RolePartner || s.linked(members[r.centres[0]], members[r.centres[n]])) &&
			(!e.Local || s.pi.Local[k]) {
			r.system = k
			return r, true
		}
	}
	return r, false
}

// linked says whether a resonance integral joins two centres.
func (s *pairSide) linked(a, b int) bool {
	if a > b {
		a, b = b, a
	}
	for _, l := range s.pi.Links {
		if l.I == a && l.J == b {
			return true
		}
	}
	return false
}

func (r *reacting) orbitals() *frontier.Orbitals { return r.side.sol.Systems[r.system] }

// first and last are the local indices of the two ends.
func (r *reacting) first() int { return r.centres[0] }
func (r *reacting) last() int  { return r.centres[len(r.centres)-1] }

// element is the atomic number of a centre, by its local index.
func (r *reacting) element(local int) int {
	return r.side.m.Atoms[r.side.pi.Centres[r.side.pi.Systems[r.system][local]].Atom].Element
}

// localization computes the localization energies of one system, once.
func (s *pairSide) localization(system int) (*Localization, error) {
	if s.local[system] == nil {
		l, err := LocalizationEnergies(s.sol.Systems[system])
		if err != nil {
			return nil, err
		}
		s.local[system] = l
	}
	return s.local[system], nil
}

// populations gives the π populations of one system, computed once.
func (s *pairSide) populations(system int) []float64 {
	if s.population[system] == nil {
		s.population[system] = s.sol.Systems[system].Populations()
	}
	return s.population[system]
}

// firstBond is the energy of forming the one bond a–b first, in |β|:
//
//	ΔE = E_A + E_B − E_π(residues A∖a and B∖b filled together with N_A+N_B−2 electrons) − h_a − h_b − 2(k_ab − 1)
//
// The last term is what the two electrons of the forming bond gain, counted from a
// C–C bond, so that it vanishes where both ends are carbon; see [formingK]. Without it
// the oxygen end of every nitrone and nitrile oxide would attack every acceptor.
//
// The residues together take the electrons where they are best off, so that ΔE is the
// least of L^E_a + L^N_b, L^N_a + L^E_b and L^R_a + L^R_b, unless one system would ionize
// the other beforehand: the polarity chooses itself, and all pairs of centres follow from
// one solution of each system. Within one π system the residue has lost both centres.
// Definition after the localization energy of G. W. Wheland, J. Am. Chem. Soc. 1942, 64,
// 900; see docs/method.md.
func firstBond(a *reacting, i int, b *reacting, j int) (float64, error) {
	forming := 2 * (formingK(a.element(i), b.element(j)) - 1)
	if a.side == b.side && a.system == b.system {
		var w Workspace
		if err := w.Reset(a.orbitals()); err != nil {
			return math.NaN(), err
		}
		e, err := w.BondLocalization(i, j)
		return e - forming, err
	}
	la, err := a.side.localization(a.system)
	if err != nil {
		return math.NaN(), err
	}
	lb, err := b.side.localization(b.system)
	if err != nil {
		return math.NaN(), err
	}
	best := math.Inf(1)
	for _, e := range [3]float64{
		la.Electrophile[i] + lb.Nucleophile[j],
		la.Nucleophile[i] + lb.Electrophile[j],
		la.Radical[i] + lb.Radical[j],
	} {
		if e < best {
			best = e
		}
	}
	if math.IsInf(best, 1) {
		return math.NaN(), fmt.Errorf("no electrons can be shared out between the residues of the two π systems")
	}
	return best - forming, nil
}

// sharedNotes joins two lists without repeats, in order.
func sharedNotes(lists ...[]string) []string {
	var all []string
	for _, l := range lists {
		for _, s := range l {
			if !slices.Contains(all, s) {
				all = append(all, s)
			}
		}
	}
	return all
}
