package report

import (
	"math"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
)

// AddOrbitals solves one input structure and adds its matrix, levels, coefficients,
// charges, bond orders and free valences.
func (b *Builder) AddOrbitals(input, name string, m *molecule.Molecule, set *frontier.Set, acidic bool, twists []frontier.Twist) {
	parts, aside := molecule.SetAside(m)
	if b.tooMany(input, len(parts)) {
		return
	}
	for _, part := range parts {
		if acidic {
			if p, _, ok := frontier.Protonated(part); ok {
				part = p
			}
		}
		pi, err := frontier.Perceive(part, frontier.Options{Twists: twists})
		if err != nil {
			b.Refuse(input, err)
			continue
		}
		sol, err := set.Solve(pi)
		if err != nil {
			b.Refuse(input, err)
			continue
		}
		s := describe(input, name, part, pi)
		s.Aside = newAsides(aside)
		for k, o := range sol.Systems {
			s.addSystem(k, o, sol.Matrices[k], pi)
			b.borrow(sol.Matrices[k].Borrowed)
			if o.Open {
				s.Warnings = append(s.Warnings, "the highest occupied shell is only partly filled: it is filled as a whole, and its frontier densities are averages")
			}
		}
		b.report.Structure = append(b.report.Structure, s)
	}
}

// openShellAbsent is why a partly filled shell has no polarizability.
const openShellAbsent = "a degenerate shell is only partly filled: the perturbation sum does not exist"

func (s *Structure) addSystem(k int, o *frontier.Orbitals, x *frontier.Matrix, pi *frontier.Pi) {
	n := o.N
	population := o.Populations()
	density := o.Density()
	polarizability, polarizable := o.SelfPolarizabilities()
	for r := 0; r < n; r++ {
		c := pi.Centres[x.Centres[r]]
		a := Atom{
			Centre: x.Centres[r] + 1, System: k + 1, Local: pi.Local[k],
			Atom:    pi.Molecule.Atoms[c.Atom].Number,
			Element: molecule.Symbol(pi.Molecule.Atoms[c.Atom].Element),
			Class:   string(c.Class), Alkyl: c.Alkyl,
			H: Num(o.H[r*n+r]), Electrons: Num(c.Electrons),
			Population: Num(population[r]), Charge: Num(pi.Charge(x.Centres[r], population[r])),
		}
		if c.Alkyl {
			a.FreeAbsent = "an alkyl group is no p orbital"
		} else {
			sum := 0.0
			for t := 0; t < n; t++ {
				if t != r && o.H[r*n+t] != 0 {
					sum += density[r*n+t]
				}
			}
			a.FreeValence = Num(math.Sqrt(3) - sum)
		}
		if polarizable {
			a.SelfPol = Num(polarizability[r])
		} else {
			a.SelfAbsent = openShellAbsent
		}
		s.Atom = append(s.Atom, a)
	}
	for _, l := range x.Links {
		s.Bond = append(s.Bond, Bond{
			Centres: [2]int{x.Centres[l.I] + 1, x.Centres[l.J] + 1},
			K:       Num(o.H[l.I*n+l.J]), Order: Num(density[l.I*n+l.J]),
		})
	}
	for j := 0; j < n; j++ {
		level := Level{System: k + 1, X: Num(o.X[j]), Occupation: Num(o.Occupation[j])}
		for i := 0; i < n; i++ {
			if math.Abs(o.X[i]-o.X[j]) < frontier.Degenerate {
				level.Degeneracy++
			}
		}
		if level.Degeneracy == 1 {
			level.Degeneracy = 0
		}
		// The sign of a level is arbitrary: the first sizeable coefficient is positive.
		sign := 1.0
		for r := 0; r < n; r++ {
			if c := o.Coefficient(r, j); math.Abs(c) > 1e-6 {
				if c < 0 {
					sign = -1
				}
				break
			}
		}
		for r := 0; r < n; r++ {
			level.Coefficients = append(level.Coefficients, Round(sign*o.Coefficient(r, j)))
		}
		s.Level = append(s.Level, level)
	}
}
