package molecule

import (
	"math/rand"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// graphSMILES writes a graph as a SMILES string of uranium atoms, whose valence is not
// judged, so that any graph can be given.
func graphSMILES(n int, edges [][2]int) string {
	var b strings.Builder
	number := map[[2]int]int{}
	used := make([]bool, 100)
	for i := range n {
		if i > 0 {
			b.WriteByte('.')
		}
		b.WriteString("[U]")
		var done []int
		for _, e := range edges {
			if e[0] != i && e[1] != i {
				continue
			}
			d, open := number[e]
			if open {
				done = append(done, d)
			} else {
				for d = 1; used[d]; d++ {
				}
				used[d] = true
				number[e] = d
			}
			b.WriteString("%" + strconv.Itoa(d/10) + strconv.Itoa(d%10))
		}
		for _, d := range done {
			used[d] = false
		}
	}
	return b.String()
}

// lcf gives the edges of a cubic graph in the notation of Lederberg, Coxeter and Frucht.
func lcf(n int, jumps ...int) [][2]int {
	var edges [][2]int
	add := func(a, b int) {
		a, b = min(a, b), max(a, b)
		if !slices.Contains(edges, [2]int{a, b}) {
			edges = append(edges, [2]int{a, b})
		}
	}
	for i := range n {
		add(i, (i+1)%n)
		add(i, ((i+jumps[i%len(jumps)])%n+n)%n)
	}
	return edges
}

// hardGraphs are graphs on which refinement alone cannot tell atoms apart. Orbits are
// those of the graph-theory literature: the Frucht graph has no symmetry but identity
// (Frucht, Can. J. Math. 1, 365 (1949)); the Shrikhande graph and the 4 by 4 rook's graph
// are two different strongly regular graphs of the same parameters (Shrikhande, Ann. Math.
// Stat. 30, 781 (1959)), all of whose vertices are equivalent, as in the Petersen, Heawood,
// Pappus and dodecahedron graphs; the vertices of the Gray graph fall into two orbits
// (Bouwer, J. Comb. Theory B 12, 32 (1972)). From memory, and checked against a brute-force search
// below for the smaller ones.
func hardGraphs() map[string]struct {
	smiles string
	orbits int
} {
	type entry = struct {
		smiles string
		orbits int
	}
	var rook, shrikhande [][2]int
	for a := range 16 {
		for b := a + 1; b < 16; b++ {
			x, y := (b/4-a/4+4)%4, (b%4-a%4+4)%4
			if x == 0 || y == 0 {
				rook = append(rook, [2]int{a, b})
			}
			if x == 0 && (y == 1 || y == 3) || y == 0 && (x == 1 || x == 3) || x == y && (x == 1 || x == 3) {
				shrikhande = append(shrikhande, [2]int{a, b})
			}
		}
	}
	var petersen [][2]int
	for i := range 5 {
		petersen = append(petersen, [2]int{i, (i + 1) % 5}, [2]int{i, i + 5}, [2]int{5 + i, 5 + (i+2)%5})
	}
	return map[string]entry{
		"Frucht":       {graphSMILES(12, lcf(12, -5, -2, -4, 2, 5, -2, 2, 5, -2, -5, 4, 2)), 12},
		"rook":         {graphSMILES(16, rook), 1},
		"Shrikhande":   {graphSMILES(16, shrikhande), 1},
		"Petersen":     {graphSMILES(10, petersen), 1},
		"Heawood":      {graphSMILES(14, lcf(14, 5, -5)), 1},
		"Pappus":       {graphSMILES(18, lcf(18, 5, 7, -7, 7, -7, -5)), 1},
		"dodecahedron": {graphSMILES(20, lcf(20, 10, 7, 4, -4, -7, 10, -4, 7, -7, 4)), 1},
		"Gray":         {graphSMILES(54, lcf(54, -25, 7, -7, 13, -13, 25)), 2},
		"cube":         {graphSMILES(8, lcf(8, 3, -3)), 1},
		"prism":        {graphSMILES(6, [][2]int{{0, 1}, {1, 2}, {0, 2}, {3, 4}, {4, 5}, {3, 5}, {0, 3}, {1, 4}, {2, 5}}), 1},
		"K33":          {graphSMILES(6, lcf(6, 3)), 1},
	}
}

func TestHardGraphs(t *testing.T) {
	r := rand.New(rand.NewSource(3))
	seen := map[string]string{}
	for name, g := range hardGraphs() {
		m := mustParse(t, g.smiles)
		s := m.SMILES()
		for range 20 {
			if got := m.Renumber(r.Perm(len(m.Atoms))).SMILES(); got != s {
				t.Errorf("%s: written as %s and, renumbered, as %s", name, s, got)
			}
		}
		if other, ok := seen[s]; ok {
			t.Errorf("%s and %s are both written as %s", other, name, s)
		}
		seen[s] = name
		distinct := slices.Clone(m.Classes())
		slices.Sort(distinct)
		if got := len(slices.Compact(distinct)); got != g.orbits {
			t.Errorf("%s: %d orbits, want %d", name, got, g.orbits)
		}
		if len(m.Atoms) <= 20 {
			checkClasses(t, name, m)
		}
	}
}

// TestClassesByBruteForce compares the classes with a search for automorphisms that
// knows nothing of refinement.
func TestClassesByBruteForce(t *testing.T) {
	for _, s := range []string{
		"CC", "CC(C)(C)C", "c1ccccc1", "Cc1ccc(C)cc1", "c1ccc2ccccc2c1", "C12C3C4C1C5C2C3C45", "C1CC2CCC1C2", "CC(C)(C)c1cc(C(C)(C)C)ccc1",
		"FC(F)(F)c1ccc(C(F)(F)F)cc1", "C1CC1C1CC1", "C1C2CC3CC1CC(C2)C3", "[O-][N+](=O)c1ccccc1", "CN(C)C=O", "C1=CC=CC=CC=C1", "Cc1cccc(C)c1C",
		"C.C.CC", "c1ccccc1.c1ccccc1.C", "[Na+].[Cl-].[Na+].[Cl-]", "C1CC2(C1)CC2", "C1CC2(CC1)CCCC2", "c1cc2ccc1CC2", "OCC(CO)(CO)CO", "C1CCC2(CC1)C1CCC2CC1",
		"C1CC1.C1CC1", "C1CCCCC1.C1CC1", "CC=CC", "C=CC=C", "C=C=C", "N#CC#N", "[2H]C([2H])[2H]",
	} {
		checkClasses(t, s, mustParse(t, s))
	}
}

// checkClasses looks for an automorphism from each atom to each other by plain search.
func checkClasses(t *testing.T, name string, m *Molecule) {
	t.Helper()
	n := len(m.Atoms)
	like := func(a, b int) bool {
		x, y := m.Atoms[a], m.Atoms[b]
		return x.Element == y.Element && x.Isotope == y.Isotope && x.Charge == y.Charge && x.Hydrogens == y.Hydrogens &&
			x.Unpaired == y.Unpaired && x.Aromatic == y.Aromatic && m.Degree(a) == m.Degree(b)
	}
	label := func(a, b int) int {
		k := m.BondBetween(a, b)
		switch {
		case k < 0:
			return 0
		case m.Bonds[k].Aromatic:
			return 5
		}
		return m.Bonds[k].Order
	}
	// Atoms in an order in which each follows a neighbour where it can.
	mapped := func(from, to int) bool {
		var order []int
		placed := make([]bool, n)
		for _, root := range append([]int{from}, ascending(n)...) {
			if placed[root] {
				continue
			}
			placed[root] = true
			order = append(order, root)
			for k := len(order) - 1; k < len(order); k++ {
				for _, h := range m.Neighbours(order[k]) {
					if !placed[h.Atom] {
						placed[h.Atom] = true
						order = append(order, h.Atom)
					}
				}
			}
		}
		image := make([]int, n)
		used := make([]bool, n)
		var extend func(k int) bool
		extend = func(k int) bool {
			if k == n {
				return true
			}
			a := order[k]
			for b := range n {
				if used[b] || !like(a, b) || k == 0 && b != to {
					continue
				}
				ok := true
				for _, c := range order[:k] {
					if label(a, c) != label(b, image[c]) {
						ok = false
						break
					}
				}
				if ok {
					image[a], used[b] = b, true
					if extend(k + 1) {
						return true
					}
					used[b] = false
				}
			}
			return false
		}
		return extend(0)
	}
	classes := m.Classes()
	for a := range n {
		want := a
		for b := range a {
			if classes[b] == b && mapped(a, b) {
				want = b
				break
			}
		}
		if classes[a] != want {
			t.Errorf("%s: atom %d is of class %d, want %d", name, a, classes[a], want)
		}
	}
}

func ascending(n int) []int {
	s := make([]int, n)
	for i := range s {
		s[i] = i
	}
	return s
}

// TestCanonicalOrder wants the canonical order to be a permutation that maps renumbered
// molecules onto each other.
func TestCanonicalOrder(t *testing.T) {
	r := rand.New(rand.NewSource(9))
	for _, s := range []string{"Oc1ccc2ccccc2c1", "C[C@H](O)[C@@H](N)C(=O)O", "CCO.[Na+].[Cl-].OCC", "C/C=C/C1CC1"} {
		m := mustParse(t, s)
		perm := r.Perm(len(m.Atoms))
		q := m.Renumber(perm)
		a, b := m.CanonicalOrder(), q.CanonicalOrder()
		seen := make([]bool, len(a))
		for i, k := range a {
			if seen[k] {
				t.Errorf("%s: place %d is given twice", s, k)
			}
			seen[k] = true
			if k != b[perm[i]] && m.Classes()[i] == i {
				x, y := m.Atoms[i], q.Atoms[slices.Index(b, k)]
				if x.Element != y.Element || x.Hydrogens != y.Hydrogens {
					t.Errorf("%s: place %d holds different atoms", s, k)
				}
			}
		}
	}
}
