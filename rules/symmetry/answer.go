package symmetry

import (
	"fmt"
	"slices"
	"sort"
	"strings"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
)

// finish derives the verdict both ways and takes down the reacting orbitals.
func (p *Process) finish(c *Cycle, f *frame) error {
	p.Components = p.Parts.String()
	p.cycle = c
	r, err := c.correlation()
	if err != nil {
		return &molecule.Error{Text: f.m.Source, Reason: err.Error(), Remedy: "check charges and the mapped atoms"}
	}
	p.judge(r)
	p.Electrons = r.Electrons
	return p.phases(c, f)
}

// phases takes down the coefficients of the frontier levels for a drawing.
func (p *Process) phases(c *Cycle, f *frame) error {
	n := len(c.Orbitals)
	h := make([]float64, n*n)
	start, err := c.at(pathEnds, h)
	if err != nil {
		return err
	}
	half, err := c.at(0.5-1e-3, h)
	if err != nil {
		return err
	}
	k := c.electrons() / 2
	for i, o := range c.Orbitals {
		a := &f.m.Atoms[o.Atom]
		number := a.Number
		if slices.Contains(f.made, o.Atom) {
			number = 0
		}
		p.Orbitals = append(p.Orbitals, Phase{
			Atom: number, Label: label(f.m, o.Atom), Kind: o.Kind, Before: float64(o.Electrons),
			HOMO: start.Coefficient(i, k-1), LUMO: start.Coefficient(i, k), Halfway: half.Coefficient(i, k-1),
		})
	}
	return nil
}

// infeasible marks a process the geometry does not allow.
func (p *Process) infeasible(reason string) {
	if p.Feasible {
		reason = "not feasible: " + reason
	}
	p.Feasible = false
	p.note(reason)
}

// note adds to the statement on geometry.
func (p *Process) note(s string) {
	if p.FeasibleNote != "" {
		p.FeasibleNote += "; "
	}
	p.FeasibleNote += s
}

// transInSmallRing reports whether every product holds a trans double bond in a ring
// too small for it.
func transInSmallRing(list []Product) bool {
	if len(list) == 0 {
		return false
	}
	for i := range list {
		if !strained(list[i].Molecule) {
			return false
		}
	}
	return true
}

// withoutStrained leaves out the products that hold such a double bond, where others
// do not.
func withoutStrained(list []Product) []Product {
	if transInSmallRing(list) {
		return list
	}
	return slices.DeleteFunc(list, func(q Product) bool { return strained(q.Molecule) })
}

// strained reports whether a molecule holds a trans double bond in a ring too small
// for it.
func strained(m *molecule.Molecule) bool {
	for k := range m.Bonds {
		b := &m.Bonds[k]
		if b.Geometry == molecule.NoGeometry || b.Order != 2 {
			continue
		}
		for _, ring := range m.Rings() {
			n := len(ring)
			i := slices.Index(ring, b.A)
			if n > smallRing || i < 0 {
				continue
			}
			var ra, rb int
			switch b.B {
			case ring[(i+1)%n]:
				ra, rb = ring[(i+n-1)%n], ring[(i+2)%n]
			case ring[(i+n-1)%n]:
				ra, rb = ring[(i+1)%n], ring[(i+n-2)%n]
			default:
				continue
			}
			g := b.Geometry
			if b.RefA != ra {
				g = flipped(g)
			}
			if b.RefB != rb {
				g = flipped(g)
			}
			if g == molecule.Opposite {
				return true
			}
		}
	}
	return false
}

// complete sorts the modes and adds the reacting π system before and after.
func (a *Answer) complete(atoms []int) {
	sort.SliceStable(a.Processes, func(i, j int) bool {
		p, q := &a.Processes[i], &a.Processes[j]
		if (p.Thermal == Allowed) != (q.Thermal == Allowed) {
			return p.Thermal == Allowed
		}
		return p.Feasible && !q.Feasible
	})
	for i := range a.Processes {
		a.Processes[i].Products = withoutStrained(a.Processes[i].Products)
	}
	for i := range a.Processes {
		p := &a.Processes[i]
		for k, q := range p.Later {
			if k == 0 {
				p.Notes = append(p.Notes, "by a proton shift the product goes over to "+q.SMILES)
			} else {
				p.Notes[len(p.Notes)-1] += " or " + q.SMILES
			}
		}
	}
	a.addRealPaths()
	if s, ok := summary(a.Joined, atoms); ok {
		a.Before = s
	}
	for i := range a.Processes {
		if len(a.Processes[i].Products) == 0 {
			continue
		}
		q := &a.Processes[i].Products[0]
		var after []int
		for _, x := range atoms {
			if q.Atoms[x] >= 0 {
				after = append(after, q.Atoms[x])
			}
		}
		if s, ok := summary(q.Molecule, after); ok {
			a.After = s
		}
		break
	}
}

// PiSummary describes a conjugated system: its size and frontier levels with a
// published parameter set.
type PiSummary struct {
	Atoms      []int // atom numbers of the structure it was found in
	Electrons  float64
	HOMO, LUMO float64 // x in |β| relative to α
	Gap        float64 // x_HOMO − x_LUMO, |β|
	Set        string  // the parameter set
}

// String puts the system into words.
func (s *PiSummary) String() string {
	return fmt.Sprintf("%d π atoms, %.0f π electrons, HOMO %+.4f, LUMO %+.4f, gap %.4f |β| (%s)", len(s.Atoms), s.Electrons, s.HOMO, s.LUMO, s.Gap, s.Set)
}

// summarySet is the parameter set of the summaries: published, nothing fitted.
const summarySet = "van-catledge-1980"

// summary describes the conjugated system that holds most of the given atoms, the
// larger of two that hold as many.
func summary(m *molecule.Molecule, atoms []int) (*PiSummary, bool) {
	pi, err := frontier.Perceive(m, frontier.Options{})
	if err != nil {
		return nil, false
	}
	set, err := frontier.Load(summarySet)
	if err != nil {
		return nil, false
	}
	sol, err := set.Solve(pi)
	if err != nil {
		return nil, false
	}
	best, most := -1, -1
	for i, system := range pi.Systems {
		inside := 0
		for _, c := range system {
			if !pi.Centres[c].Alkyl && slices.Contains(atoms, pi.Centres[c].Atom) {
				inside++
			}
		}
		if score := 1000*inside + len(system); inside > 0 && score > most {
			best, most = i, score
		}
	}
	if best < 0 {
		return nil, false
	}
	o := sol.Systems[best]
	s := &PiSummary{Set: set.Name}
	for _, c := range pi.Systems[best] {
		if pi.Centres[c].Alkyl {
			continue
		}
		s.Atoms = append(s.Atoms, m.Atoms[pi.Centres[c].Atom].Number)
		s.Electrons += pi.Centres[c].Electrons
	}
	sort.Ints(s.Atoms)
	var okH, okL, okG bool
	s.HOMO, okH = o.HOMOLevel()
	s.LUMO, okL = o.LUMOLevel()
	s.Gap, okG = o.Gap()
	return s, okH && okL && okG
}

// componentFeasibility says what the trade states of a component string by itself.
func componentFeasibility(cs Components) string {
	var words []string
	for _, c := range cs {
		if c.Kind == Pi && c.Antara && len(cs) > 1 {
			switch {
			case c.Electrons == 2:
				words = append(words, c.String()+": reached by ketenes and other cumulenes and by twisted alkenes, hardly by others; out of reach for an allyl component in a six-membered ring")
			case c.Electrons <= 6:
				words = append(words, c.String()+": needs a chain long and loose enough to be met on opposite faces")
			}
		}
	}
	return strings.Join(words, "; ")
}
