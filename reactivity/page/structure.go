package page

import (
	"math"

	"lobecast/frontier"
	"lobecast/frontier/layout"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity/report"
)

// drawable is a molecule of a report, drawn, with the numbers its atoms have there.
type drawable struct {
	m       *molecule.Molecule
	d       *layout.Drawing
	indexOf map[int]int // number in the report → atom index
	sol     *frontier.Solution
}

// newDrawable reads the SMILES of a report; nil where it cannot be read. numbers are
// the input numbers of its atoms, in the order written; without them the atoms are
// numbered as written.
func newDrawable(smiles string, numbers []int, points [][2]float64) *drawable {
	if smiles == "" || len(smiles) > 20000 {
		return nil
	}
	m, err := molecule.ParseSMILES(smiles, molecule.AllowWildcard)
	if err != nil || len(m.Atoms) == 0 || len(m.Atoms) > 400 {
		return nil
	}
	x := &drawable{m: m, indexOf: map[int]int{}}
	for i := range m.Atoms {
		n := i + 1
		if len(numbers) == len(m.Atoms) {
			n = numbers[i]
		}
		x.indexOf[n] = i
	}
	if len(points) == len(m.Atoms) {
		m.Points = make([]molecule.Point, len(points))
		for i, p := range points {
			m.Points[i] = molecule.Point{X: p[0], Y: p[1]}
		}
	}
	return x
}

// draw lays the molecule out, over that of ref where there is one.
func (x *drawable) draw(ref *drawable) *drawable {
	if x == nil || x.d != nil {
		return x
	}
	if ref != nil && ref.d != nil {
		x.d = layout.Like(x.m, ref.d, layout.Match(x.m, ref.m))
	} else {
		x.d = layout.Compute(x.m)
	}
	return x
}

// solve computes the orbitals; false where the parameters are not at hand or the
// structure is refused.
func (x *drawable) solve(set *frontier.Set) bool {
	if x == nil || set == nil {
		return false
	}
	if x.sol != nil {
		return true
	}
	pi, err := frontier.Perceive(x.m, frontier.Options{})
	if err != nil {
		return false
	}
	x.sol, err = set.Solve(pi)
	return err == nil
}

// knownSet loads the named parameter set if it is one that comes with the program. A
// report never makes the page open a file.
func knownSet(name string) *frontier.Set {
	for _, known := range frontier.Sets() {
		if known == name {
			set, err := frontier.Load(name)
			if err != nil {
				return nil
			}
			return set
		}
	}
	return nil
}

// orbital is one level, or one degenerate set of levels, of a π system, on the atoms
// of a molecule.
type orbital struct {
	name  string
	x     float64
	atoms []int
	c     []float64 // coefficients; of a degenerate set, the mean of c²
	mean  bool      // c holds means of squares
	count int
}

// frontierOf takes the HOMO or LUMO shell of the system that reacts: the highest HOMO,
// the lowest LUMO among the conjugated systems, or those of the system of the atom
// given (−1 for none).
func (x *drawable) frontierOf(homo bool, atom int) *orbital {
	best := -1
	if atom >= 0 {
		if k, _, ok := x.sol.Find(atom); ok {
			best = k
		} else {
			return nil
		}
	}
	edge := math.Inf(1)
	if atom < 0 {
		for k, o := range x.sol.Systems {
			if x.sol.Pi.Local[k] || o.N < 2 {
				continue
			}
			shell := o.LUMO
			if homo {
				shell = o.HOMO
			}
			if shell[1] <= shell[0] {
				continue
			}
			value := -o.X[shell[0]] // lowest LUMO: largest x
			if homo {
				value = o.X[shell[0]] // highest HOMO: smallest x
			}
			if value < edge-1e-9 {
				best, edge = k, value
			}
		}
	}
	if best < 0 {
		return nil
	}
	o := x.sol.Systems[best]
	shell, name := o.LUMO, "LUMO"
	if homo {
		shell, name = o.HOMO, "HOMO"
	}
	if shell[1] <= shell[0] {
		return nil
	}
	r := &orbital{name: name, x: o.X[shell[0]], count: shell[1] - shell[0]}
	r.mean = r.count > 1
	sign := 0.0
	for i, c := range x.sol.Matrices[best].Centres {
		centre := x.sol.Pi.Centres[c]
		if centre.Alkyl {
			continue
		}
		r.atoms = append(r.atoms, centre.Atom)
		if r.mean {
			sum := 0.0
			for j := shell[0]; j < shell[1]; j++ {
				sum += o.Coefficient(i, j) * o.Coefficient(i, j)
			}
			r.c = append(r.c, sum/float64(r.count))
			continue
		}
		v := o.Coefficient(i, shell[0])
		// The sign of an orbital is free: the first sizeable coefficient is positive.
		if sign == 0 && math.Abs(v) > 1e-6 {
			sign = math.Copysign(1, v)
		}
		if sign != 0 {
			v *= sign
		}
		r.c = append(r.c, v)
	}
	return r
}

// lobes draws the orbital on a formula of its molecule; flip turns all signs.
func (f *formula) lobes(o *orbital, flip bool) {
	for k, a := range o.atoms {
		switch {
		case o.mean:
			f.share(a, o.c[k])
		case flip:
			f.lobe(a, -o.c[k])
		default:
			f.lobe(a, o.c[k])
		}
	}
}

// caption says in words what an orbital picture shows.
func (o *orbital) caption() string {
	s := o.name + ", x = " + signed(o.x)
	if o.mean {
		s += ", " + countWord(o.count) + " equal levels: circles show the mean c², signs have no meaning"
	}
	return s
}

func countWord(n int) string {
	words := []string{"no", "one", "two", "three", "four", "five", "six"}
	if n >= 0 && n < len(words) {
		return words[n]
	}
	return trimmed(float64(n), 0)
}

// sitesPicture draws a molecule with the sites of an attack pinned.
func sitesPicture(x *drawable, a *report.Attack, planned []int) string {
	c := newCanvas()
	f := newFormula(c, x.d)
	wanted := map[int]bool{}
	for _, n := range planned {
		wanted[n] = true
	}
	name := "structure of " + x.m.Formula()
	if a != nil {
		name += " with the sites of " + a.Event + " by rank"
		// A long tail of unlikely sites would hide the structure.
		const most = 9
		for k := range a.Site {
			s := &a.Site[k]
			isPlanned := false
			for _, n := range s.Atoms {
				isPlanned = isPlanned || wanted[n]
			}
			if k >= most && !isPlanned {
				continue
			}
			for _, n := range s.Atoms {
				if i, ok := x.indexOf[n]; ok {
					f.pin(i, s.Rank, s.Chance, isPlanned)
				}
			}
		}
	}
	return c.svg("figure structure", name, 4)
}

// plainPicture draws a molecule as it is.
func plainPicture(x *drawable, name string) string {
	c := newCanvas()
	newFormula(c, x.d)
	return c.svg("figure structure", name, 4)
}

// orbitalPicture draws a molecule with one orbital.
func orbitalPicture(x *drawable, o *orbital) string {
	c := newCanvas()
	f := newFormula(c, x.d)
	f.lobes(o, false)
	return c.svg("figure structure", o.caption()+" of "+x.m.Formula(), 4)
}

// towardHOMO reports whether the attack is decided by the HOMO (electrophile) or the
// LUMO (nucleophile); for radicals both matter and the HOMO is drawn first.
func towardHOMO(toward string) bool { return toward != string(terms.Nucleophile) }
