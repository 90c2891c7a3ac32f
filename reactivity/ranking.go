package reactivity

import (
	"fmt"
	"math"
	"sort"
	"strings"
	"sync"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Attackers are the words for what comes in, as [Conditions].Incoming takes them:
// classes of electrophilic substitution, then the atom of a nucleophile that binds.
var Attackers = []string{
	"nitration", "chlorination", "bromination", "iodination", "acylation", "formylation",
	"sulfonation", "other", "N", "O", "S",
}

// rankTolerance is the difference below which two ranking numbers count as equal.
const rankTolerance = 1e-9

// species is one form of the molecule that reacts: as written, a tautomer of it, or
// protonated.
type species struct {
	v          *view
	pi         *frontier.Pi
	solution   *frontier.Solution
	values     *evaluation
	protonated bool
	site       int // atom that took the proton
}

// workspaces of the indices, one per goroutine that judges.
var indexWorkspaces = sync.Pool{New: func() any { return new(Workspace) }}

// Judge ranks the sites of one connected molecule for every event of the given kinds
// of attack (all where towards is empty).
//
// The molecule is judged as written in neutral medium, with its most basic nitrogen
// protonated in acidic medium, and in both forms where the medium is unknown. Errors
// are refusals: no π system, a metal, an entry that a strict set lacks.
func Judge(m *molecule.Molecule, c Conditions, towards []terms.Toward) (*Judgement, error) {
	if len(towards) == 0 {
		towards = terms.Towards
	}
	set, err := c.set()
	if err != nil {
		return nil, err
	}
	forms, warnings, err := speciesOf(m, c, set)
	if err != nil {
		return nil, err
	}
	first := forms[0]
	j := &Judgement{
		Molecule: first[0].v.m, Pi: first[0].pi, Solution: first[0].solution,
		Warnings: append(warnings, first[0].pi.Warnings...), Borrowed: first[0].solution.Borrowed(),
	}
	for _, toward := range terms.Towards {
		if !wanted(toward, towards) {
			continue
		}
		for _, event := range terms.Events {
			if event.Toward() != toward {
				continue
			}
			if a := judgeEvent(forms, c, set, event); a != nil {
				j.Attacks = append(j.Attacks, *a)
			}
		}
	}
	return j, nil
}

func wanted(t terms.Toward, list []terms.Toward) bool {
	for _, x := range list {
		if x == t {
			return true
		}
	}
	return false
}

// set is the parameter set to judge by.
func (c *Conditions) set() (*frontier.Set, error) {
	if c.Set != nil {
		return c.Set, nil
	}
	return frontier.Load(frontier.DefaultSet)
}

// formsOf perceives the forms in which a molecule reacts: one list per protonation
// state, each of the form and its fast tautomers.
func formsOf(m *molecule.Molecule, medium terms.Medium, twists []frontier.Twist) (forms [][]*species, err error) {
	add := func(m *molecule.Molecule, protonated bool, site int) error {
		var list []*species
		for k, t := range frontier.Tautomers(m) {
			pi, err := frontier.Perceive(t, frontier.Options{Twists: twists})
			if err != nil {
				if k > 0 {
					continue
				}
				return err
			}
			list = append(list, &species{v: newView(t), pi: pi, protonated: protonated, site: site})
		}
		class := list[0].v.class
		smiles := ""
		for k, s := range list[1:] {
			if k == 0 {
				smiles = m.FlatSMILES()
			}
			if s.v.m.FlatSMILES() == smiles {
				mergeClasses(class, m, s.v.m)
			}
		}
		for _, s := range list[1:] {
			s.v.class = class
		}
		forms = append(forms, list)
		return nil
	}
	if medium != terms.Acidic {
		if err := add(m, false, -1); err != nil {
			return nil, err
		}
	}
	if medium != terms.Neutral {
		p, site, ok := frontier.Protonated(m)
		switch {
		case ok:
			if err := add(p, true, site); err != nil && medium == terms.Acidic {
				return nil, err
			}
		case medium == terms.Acidic:
			if err := add(m, false, -1); err != nil {
				return nil, err
			}
		}
	}
	return forms, nil
}

// speciesOf solves the forms in which the molecule reacts and computes their indices.
func speciesOf(m *molecule.Molecule, c Conditions, set *frontier.Set) (forms [][]*species, warnings []string, err error) {
	medium := c.Medium
	if medium == "" {
		medium = terms.UnknownMedium
	}
	if forms, err = formsOf(m, medium, c.Twists); err != nil {
		return nil, nil, err
	}
	if medium == terms.Acidic {
		if s := forms[0][0]; s.protonated {
			warnings = append(warnings, fmt.Sprintf("in acidic medium: protonated at N %d", m.Atoms[s.site].Number))
		} else {
			warnings = append(warnings, "in acidic medium: no nitrogen basic enough to be protonated")
		}
	}
	w := indexWorkspaces.Get().(*Workspace)
	defer indexWorkspaces.Put(w)
	for _, list := range forms {
		for _, s := range list {
			if s.solution, err = set.Solve(s.pi); err != nil {
				return nil, nil, err
			}
			if s.values, err = evaluate(s.solution, SmoothingDecay, w); err != nil {
				return nil, nil, err
			}
		}
	}
	return forms, warnings, nil
}

// SmoothingDecay is λ of the smoothed frontier density, per |β|: how fast levels below
// the highest occupied one (above the lowest empty one) lose weight.
const SmoothingDecay = 2.0

// judgeEvent ranks the candidates of one event; nil where there are none.
func judgeEvent(forms [][]*species, c Conditions, set *frontier.Set, event terms.Event) *Attack {
	list := candidates(forms[0][0].v, forms[0][0].pi, event)
	if len(list) == 0 {
		return nil
	}
	a := &Attack{Event: event, Call: terms.Open}
	a.ChanceAbsent = chanceAbsent(event)
	for _, f := range forms {
		a.Species = append(a.Species, f[0].v.m.SMILES())
	}
	if len(forms) > 1 {
		a.Notes = append(a.Notes, "the medium is unknown; ranked as the neutral form")
	}
	if forms[0][0].values.open {
		a.Notes = append(a.Notes, "a shell of levels is only partly filled: no call")
	}
	toward := event.Toward()
	all := make([]Site, len(list))
	for k, cand := range list {
		all[k] = siteOf(forms[0], cand, toward)
	}
	sort.SliceStable(all, func(i, j int) bool {
		x, y := all[i].Index["localization"], all[j].Index["localization"]
		if (x.Absent != "") != (y.Absent != "") {
			return y.Absent != ""
		}
		if x.Absent == "" && math.Abs(x.X-y.X) > rankTolerance {
			return x.X < y.X
		}
		return all[i].Atoms[0] < all[j].Atoms[0]
	})
	a.place(all)
	a.Disagree = disagreement(forms[0][0].v.m, a.Sites, toward)
	return a
}

// place deals ranked sites out to the two lists of an attack.
func (a *Attack) place(all []Site) {
	for _, s := range all {
		list := &a.Sites
		if s.Ipso {
			list = &a.Ipso
		}
		s.Rank = len(*list) + 1
		*list = append(*list, s)
	}
}

// siteOf makes the site of a candidate with its indices, averaged over the tautomers
// of one form and over the equivalent atoms.
func siteOf(forms []*species, c Candidate, toward terms.Toward) Site {
	s := Site{Atoms: c.Atoms, Ipso: c.Ipso, Leaving: c.Leaving, Index: make(map[string]Value, len(IndexNames))}
	var sum [8]float64
	n := 0.0
	for _, f := range forms {
		for _, atom := range c.Atoms {
			centre := centreOf(f.pi, atom)
			if centre < 0 {
				continue
			}
			v := f.values.values(centre, toward)
			for k, x := range v {
				sum[k] += x
			}
			n++
		}
	}
	e := forms[0].values
	centre := centreOf(forms[0].pi, c.Atoms[0])
	for k, name := range IndexNames {
		x := sum[k] / n
		if math.IsNaN(x) {
			s.Index[name] = Value{Absent: e.absentReason(name)}
			continue
		}
		v := Value{X: x}
		if name == "superdelocalizability" {
			v.Note = e.note[e.system[centre]]
		}
		s.Index[name] = v
	}
	return s
}

// witnesses are the indices compared with the ranking, and the sign that makes larger
// mean more readily attacked.
func witnesses(toward terms.Toward) map[string]float64 {
	charge := -1.0
	if toward == terms.Nucleophile {
		charge = 1
	}
	w := map[string]float64{
		"localization": -1, "frontier_density": 1, "smoothed_density": 1,
		"superdelocalizability": 1, "charge": charge, "reactivity_number": -1,
	}
	if toward == terms.Radical {
		delete(w, "charge")
		w["free_valence"] = 1
	}
	return w
}

// disagreement says which indices would put another site first.
func disagreement(m *molecule.Molecule, sites []Site, toward terms.Toward) string {
	if len(sites) < 2 {
		return ""
	}
	sign := witnesses(toward)
	var parts []string
	for k := 1; k < len(sites); k++ {
		var names []string
		for _, name := range IndexNames {
			w, ok := sign[name]
			if !ok || sites[k].Index[name].Absent != "" || sites[0].Index[name].Absent != "" {
				continue
			}
			best := true
			for j := range sites {
				if j != k && sites[j].Index[name].Absent == "" &&
					w*sites[j].Index[name].X > w*sites[k].Index[name].X+rankTolerance-boolFloat(j < k)*2*rankTolerance {
					best = false
					break
				}
			}
			if best {
				names = append(names, strings.ReplaceAll(name, "_", " "))
			}
		}
		if len(names) > 0 {
			parts = append(parts, fmt.Sprintf("%s would put atom %s first", join(names), listNumbers(m, sites[k].Atoms)))
		}
	}
	return strings.Join(parts, "; ")
}

func boolFloat(b bool) float64 {
	if b {
		return 1
	}
	return 0
}

// listNumbers lists the numbers of atoms as a chemist reads them.
func listNumbers(m *molecule.Molecule, atoms []int) string {
	parts := make([]string, len(atoms))
	for k, i := range atoms {
		parts[k] = fmt.Sprint(m.Atoms[i].Number)
	}
	return strings.Join(parts, ", ")
}

// join lists words: "a", "a and b", "a, b and c".
func join(words []string) string {
	switch n := len(words); n {
	case 0:
		return ""
	case 1:
		return words[0]
	default:
		return strings.Join(words[:n-1], ", ") + " and " + words[n-1]
	}
}

// chanceAbsent says why an event has no chances.
func chanceAbsent(event terms.Event) string {
	switch event {
	case terms.ElectrophilicSubstitution, terms.NucleophilicSubstitution:
		return "no fitted chances are at hand"
	}
	return "fewer than 200 published outcomes stand behind this event: it is ranked by localization energy only"
}
