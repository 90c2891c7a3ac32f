package molecule

// ligandCount is the number of ligands of each chirality class.
var ligandCount = [...]int{Tetrahedral: 4, Allenal: 4, SquarePlanar: 4, TrigonalBipyramidal: 5, Octahedral: 6}

// bondGeometry is the class, beside the chirality classes of atoms, under which the
// canonical numbering treats the configuration of a double bond.
const bondGeometry StereoClass = 15

// element of configuration: one stereo centre or stereo double bond, in the indices of
// one component. Of an allenal centre and of a double bond the first two ligands
// belong to one end and the last two to the other.
type stereoElement struct {
	class       StereoClass
	permutation uint8
	count       uint8
	centre      int32 // the atom, or atom A of the bond
	other       int32 // atom B of the bond, else -1
	source      int32 // index of the atom or bond in the molecule
	ligands     [6]int32
}

// arrangement places the ligands of a square-planar, trigonal-bipyramidal or octahedral
// centre: arrangement[i] is the place in the ligand list of the ligand at corner i.
type arrangement [6]int8

// Corners: square, in turn round it; bipyramid, axis from, axis to, then the others
// anticlockwise seen from the first; octahedron likewise.
var rotations = map[StereoClass][]arrangement{
	SquarePlanar:        group(4, arrangement{1, 2, 3, 0}, arrangement{3, 2, 1, 0}),
	TrigonalBipyramidal: group(5, arrangement{0, 1, 3, 4, 2}, arrangement{1, 0, 2, 4, 3}),
	Octahedral:          group(6, arrangement{0, 1, 3, 4, 5, 2}, arrangement{2, 4, 1, 3, 0, 5}),
}

// group closes generators of a rotation group under composition.
func group(n int, generators ...arrangement) []arrangement {
	var one arrangement
	for i := range one {
		one[i] = int8(i)
	}
	all := []arrangement{one}
	seen := map[arrangement]bool{one: true}
	for k := 0; k < len(all); k++ {
		for _, g := range generators {
			var p arrangement
			for i := 0; i < n; i++ {
				p[i] = all[k][g[i]]
			}
			for i := n; i < 6; i++ {
				p[i] = int8(i)
			}
			if !seen[p] {
				seen[p] = true
				all = append(all, p)
			}
		}
	}
	return all
}

// The tables of the OpenSMILES specification 1.0, chirality: the ligands on the axis
// (places in the list), the shape in which the list runs round the rest, and whether
// it runs anticlockwise (@) seen from the first ligand of the axis. In a square the
// list runs round it as U, 4 or Z.
var bipyramids = [20]struct {
	from, to      int8
	anticlockwise bool
}{
	{0, 4, true}, {0, 4, false}, {0, 3, true}, {0, 3, false}, {0, 2, true}, {0, 2, false}, {0, 1, true}, {0, 1, false},
	{1, 4, true}, {1, 3, true}, {1, 4, false}, {1, 3, false}, {1, 2, true}, {1, 2, false},
	{2, 4, true}, {2, 3, true}, {3, 4, true}, {3, 4, false}, {2, 3, false}, {2, 4, false},
}

var octahedra = [30]struct {
	to            int8
	shape         byte
	anticlockwise bool
}{
	{5, 'U', true}, {5, 'U', false}, {4, 'U', true}, {5, 'Z', true}, {4, 'Z', true}, {3, 'U', true},
	{3, 'Z', true}, {5, '4', false}, {4, '4', false}, {5, '4', true}, {4, '4', true}, {3, '4', false},
	{3, '4', true}, {5, 'Z', false}, {4, 'Z', false}, {4, 'U', false}, {3, 'Z', false}, {3, 'U', false},
	{2, 'U', true}, {2, 'Z', true}, {2, '4', false}, {2, '4', true}, {2, 'Z', false}, {2, 'U', false},
	{1, 'U', true}, {1, 'Z', true}, {1, '4', false}, {1, '4', true}, {1, 'Z', false}, {1, 'U', false},
}

// round lists four ligands in turn round a square, given in the order of the list.
func round(r [4]int8, shape byte) [4]int8 {
	switch shape {
	case '4':
		return [4]int8{r[0], r[3], r[1], r[2]}
	case 'Z':
		return [4]int8{r[0], r[1], r[3], r[2]}
	}
	return r
}

// arrange is the arrangement that a permutation number of a class stands for.
func arrange(class StereoClass, permutation int) arrangement {
	a := arrangement{0, 1, 2, 3, 4, 5}
	switch class {
	case SquarePlanar:
		r := round([4]int8{0, 1, 2, 3}, "U4Z"[permutation-1])
		copy(a[:], r[:])
	case TrigonalBipyramidal:
		t := bipyramids[permutation-1]
		a[0], a[1] = t.from, t.to
		k := 2
		for i := int8(0); i < 5; i++ {
			if i != t.from && i != t.to {
				a[k] = i
				k++
			}
		}
		if !t.anticlockwise {
			a[3], a[4] = a[4], a[3]
		}
	case Octahedral:
		t := octahedra[permutation-1]
		var rest [4]int8
		k := 0
		for i := int8(1); i < 6; i++ {
			if i != t.to {
				rest[k] = i
				k++
			}
		}
		r := round(rest, t.shape)
		if !t.anticlockwise {
			r[1], r[3] = r[3], r[1]
		}
		a = arrangement{0, t.to, r[0], r[1], r[2], r[3]}
	}
	return a
}

// normalForm is the smallest arrangement that a rotation leads to.
func normalForm(class StereoClass, a arrangement) arrangement {
	n := ligandCount[class]
	best := a
	for _, r := range rotations[class] {
		var p arrangement
		for i := 0; i < 6; i++ {
			p[i] = int8(i)
		}
		for i := 0; i < n; i++ {
			p[i] = a[r[i]]
		}
		for i := 0; i < n; i++ {
			if p[i] != best[i] {
				if p[i] < best[i] {
					best = p
				}
				break
			}
		}
	}
	return best
}

// permutationNumbers finds the number of an arrangement in normal form.
var permutationNumbers = func() map[StereoClass]map[arrangement]int {
	all := map[StereoClass]map[arrangement]int{}
	for class, n := range map[StereoClass]int{SquarePlanar: 3, TrigonalBipyramidal: 20, Octahedral: 30} {
		t := map[arrangement]int{}
		for p := n; p >= 1; p-- {
			t[normalForm(class, arrange(class, p))] = p
		}
		all[class] = t
	}
	return all
}()

// reorder is the permutation number of a configuration after its ligands are listed in
// another order: the ligand now at place k was at place from[k] before. For the ends
// of an allene or double bond the new order must keep each end together.
func reorder(class StereoClass, permutation int, from []int8) int {
	switch class {
	case Tetrahedral, Allenal, bondGeometry:
		odd := false
		if class == bondGeometry {
			// Only an exchange of the two substituents of one end matters.
			odd = from[0]&1 != from[2]&1
		} else {
			for i := range from {
				for j := i + 1; j < len(from); j++ {
					if from[i] > from[j] {
						odd = !odd
					}
				}
			}
		}
		if odd {
			return 3 - permutation
		}
		return permutation
	}
	var place arrangement // new place of each old place
	for k, f := range from {
		place[f] = int8(k)
	}
	a := arrange(class, permutation)
	for i := 0; i < ligandCount[class]; i++ {
		a[i] = place[a[i]]
	}
	return permutationNumbers[class][normalForm(class, a)]
}

// valueUnder is the permutation number of the configuration with its ligands in the
// order of rank; hydrogens and lone pairs come first. The ligands must have different
// ranks (at each end, for allenes and double bonds).
func (e *stereoElement) valueUnder(rank []int32) int {
	n := int(e.count)
	var from [6]int8
	var key [6]int32
	for k := 0; k < n; k++ {
		from[k] = int8(k)
		key[k] = -1
		if l := e.ligands[k]; l >= 0 {
			key[k] = rank[l]
		}
	}
	if e.class == Allenal || e.class == bondGeometry {
		for _, k := range [2]int{0, 2} {
			if key[k] > key[k+1] {
				from[k], from[k+1] = from[k+1], from[k]
			}
		}
		return reorder(e.class, int(e.permutation), from[:4])
	}
	for i := 1; i < n; i++ {
		for j := i; j > 0 && key[from[j]] < key[from[j-1]]; j-- {
			from[j], from[j-1] = from[j-1], from[j]
		}
	}
	return reorder(e.class, int(e.permutation), from[:n])
}

// tied tells whether two ligands that the configuration tells apart have one rank.
func (e *stereoElement) tied(rank []int32) bool {
	at := func(k int) int32 {
		if l := e.ligands[k]; l >= 0 {
			return rank[l]
		}
		return -1
	}
	if e.class == Allenal || e.class == bondGeometry {
		return at(0) == at(1) || at(2) == at(3)
	}
	for i := 0; i < int(e.count); i++ {
		for j := 0; j < i; j++ {
			if at(i) == at(j) {
				return true
			}
		}
	}
	return false
}
