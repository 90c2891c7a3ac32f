package reactivity

import (
	"fmt"
	"math"
	"slices"
	"sort"
	"strings"
	"sync"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

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
	site       int          // atom that took the proton
	spaces     []*Workspace // by system, made when first asked for
	// sensitivity is set where the indices carry limits.
	sensitivity *sensitivity
}

// space is a workspace of the indices that stands on system k.
func (s *species) space(k int) (*Workspace, error) {
	if s.spaces == nil {
		s.spaces = make([]*Workspace, len(s.solution.Systems))
	}
	if s.spaces[k] == nil {
		w := indexWorkspaces.Get().(*Workspace)
		if err := w.Reset(s.solution.Systems[k]); err != nil {
			indexWorkspaces.Put(w)
			return nil, err
		}
		s.spaces[k] = w
	}
	return s.spaces[k], nil
}

// release hands the workspaces back.
func (s *species) release() {
	for k, w := range s.spaces {
		if w != nil {
			indexWorkspaces.Put(w)
			s.spaces[k] = nil
		}
	}
}

// workspaces of the indices, one per goroutine that judges.
var indexWorkspaces = sync.Pool{New: func() any { return new(Workspace) }}

// Judge ranks the sites of one connected molecule for every event of the given kinds
// of attack (all where towards is empty).
//
// The molecule is judged as written in neutral medium, with its most basic nitrogen
// protonated in acidic medium, and in both forms where the medium is unknown. Where
// the calibrated set is used, electrophilic and nucleophilic substitution carry chances
// and are ranked by them; everything else is ranked by the localization energy of the
// event. Errors are refusals: no π system, a metal, an entry that a strict set lacks.
func Judge(m *molecule.Molecule, c Conditions, towards []terms.Toward) (*Judgement, error) {
	if len(towards) == 0 {
		towards = terms.Towards
	}
	set := c.Set
	if set == nil {
		set = DefaultSet()
	}
	if c.Medium == "" {
		c.Medium = terms.UnknownMedium
	}
	freeBase := c.Medium == terms.Acidic && (c.Incoming == "azo coupling" || c.Incoming == "nitrosation")
	if freeBase {
		c.Medium = terms.Neutral
	}
	forms, primary, warnings, err := speciesOf(m, c, set)
	if err != nil {
		return nil, err
	}
	if freeBase {
		warnings = append(warnings, "so weak an electrophile attacks the free base only, of which some is left in dilute acid: judged as written, not protonated")
	}
	defer func() {
		for _, list := range forms {
			for _, s := range list {
				s.release()
			}
		}
	}()
	first := forms[primary][0]
	j := &Judgement{
		Molecule: first.v.m, Pi: first.pi, Solution: first.solution,
		Warnings: append(warnings, first.pi.Warnings...), Borrowed: first.solution.Borrowed(),
	}
	x := judging{forms: forms, primary: primary, c: c}
	if fitted := fitted(); fitted.calibrated(set) {
		x.model = fitted
	}
	for _, toward := range terms.Towards {
		if !slices.Contains(towards, toward) {
			continue
		}
		for _, event := range terms.Events {
			if event.Toward() != toward || c.Only != "" && c.Only != event {
				continue
			}
			a, err := x.event(event)
			if err != nil {
				return nil, err
			}
			if a != nil {
				j.Attacks = append(j.Attacks, *a)
			}
		}
	}
	return j, nil
}

// formsOf perceives the forms in which a molecule reacts: as written, with its fast
// tautomers, and unless the medium is neutral, protonated at its most basic nitrogen.
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
	if err := add(m, false, -1); err != nil {
		return nil, err
	}
	if medium != terms.Neutral {
		if p, site, ok := frontier.Protonated(m); ok {
			// A form that cannot be perceived is left out: the other one stands.
			_ = add(p, true, site)
		}
	}
	return forms, nil
}

// speciesOf solves the forms in which the molecule reacts and computes their indices.
// primary is the form whose indices are reported.
func speciesOf(m *molecule.Molecule, c Conditions, set *frontier.Set) (forms [][]*species, primary int, warnings []string, err error) {
	if forms, err = formsOf(m, c.Medium, c.Twists); err != nil {
		return nil, 0, nil, err
	}
	if c.Medium == terms.Acidic {
		if len(forms) > 1 {
			primary = 1
			warnings = append(warnings, fmt.Sprintf("in acidic medium: protonated at N %d", m.Atoms[forms[1][0].site].Number))
		} else {
			warnings = append(warnings, "in acidic medium: no nitrogen basic enough to be protonated")
		}
	}
	for k, list := range forms {
		for _, s := range list {
			if s.solution, err = set.Solve(s.pi); err != nil {
				return nil, 0, nil, err
			}
			if k != primary {
				continue
			}
			if s.values, err = evaluateSome(s.solution, SmoothingDecay, s.space, c.Terse); err != nil {
				return nil, 0, nil, err
			}
		}
	}
	return forms, primary, warnings, nil
}

// SmoothingDecay is λ of the smoothed frontier density, per |β|: how fast levels below
// the highest occupied one (above the lowest empty one) lose weight.
const SmoothingDecay = 2.0

// judging is what the events of one molecule share.
type judging struct {
	forms   [][]*species // as written, protonated
	primary int
	c       Conditions
	model   *model // nil where another set than the calibrated one is used
	// sensitivity of the reported form and its tautomers, made when first asked for.
	sensitivity []*sensitivity
	columns     *localColumns // of all forms, made when first asked for
}

// columnsOf are the parameters that occur in the forms of the molecule.
func (x *judging) columnsOf() *localColumns {
	if x.columns == nil {
		var all []*frontier.Solution
		for _, list := range x.forms {
			for _, s := range list {
				all = append(all, s.solution)
			}
		}
		x.columns = newLocalColumns(&x.model.columns, all...)
	}
	return x.columns
}

// event ranks the candidates of one event; nil where there are none.
func (x *judging) event(event terms.Event) (*Attack, error) {
	forms := x.forms[x.primary]
	m := forms[0].v.m
	list := candidates(x.forms[0][0].v, x.forms[0][0].pi, event)
	if len(list) == 0 {
		return nil, nil
	}
	a := &Attack{Event: event, Call: terms.Open}
	toward := event.Toward()
	all := make([]Site, len(list))
	for k, cand := range list {
		all[k] = siteOf(forms, cand, toward, x.c.Terse)
	}
	if x.model != nil && !x.c.NoLimits && !x.c.Terse && x.limitsAffordable(a, all) {
		if x.sensitivity == nil {
			columns := x.columnsOf()
			for _, s := range forms {
				s.sensitivity = newSensitivity(s, columns)
				x.sensitivity = append(x.sensitivity, s.sensitivity)
			}
		}
		if err := x.model.indexLimits(x.sensitivity, all, toward); err != nil {
			return nil, err
		}
	}
	judged, err := x.chances(a, list, all)
	if err != nil {
		return nil, err
	}
	if judged == nil {
		a.Species = []string{m.SMILES()}
		if len(x.forms) > 1 && x.c.Medium == terms.UnknownMedium && toward == terms.Electrophile {
			a.Notes = append(a.Notes, "the medium is unknown; ranked in the form as written")
		}
	}
	order := make([]int, len(all))
	for k := range order {
		order[k] = k
	}
	sort.SliceStable(order, func(i, j int) bool { return before(&all[order[i]], &all[order[j]]) })
	at := make([]int, 0, len(all)) // candidates of a.Sites in order
	for _, k := range order {
		s := all[k]
		target := &a.Sites
		if s.Ipso {
			target = &a.Ipso
		} else {
			at = append(at, k)
		}
		s.Rank = len(*target) + 1
		*target = append(*target, s)
	}
	if x.c.Terse {
		return a, nil
	}
	for k := range a.Sites {
		if len(a.Sites) < 2 {
			break
		}
		switch {
		case judged == nil:
			a.Sites[k].Because = becauseByIndex(a.Sites, k, m)
		case k == 0:
			a.Sites[k].Because = judged.because(at[0], at[1], m, a.Sites[1].Atoms, x.primary)
		default:
			if text := judged.because(at[0], at[k], m, a.Sites[k].Atoms, x.primary); text != "" {
				a.Sites[k].Because = "atom " + listNumbers(m, a.Sites[0].Atoms) + " goes first " + text
			}
		}
	}
	a.Disagree = disagreement(m, a.Sites, toward)
	return a, nil
}

// before orders two sites: by chance where there is one, else by localization energy;
// equal ones by atom number.
func before(s, t *Site) bool {
	if s.Chance != nil && t.Chance != nil {
		if d := *s.Chance - *t.Chance; math.Abs(d) > rankTolerance {
			return d > 0
		}
	} else {
		x, y := s.Index["localization"], t.Index["localization"]
		if (x.Absent != "") != (y.Absent != "") {
			return y.Absent != ""
		}
		if x.Absent == "" && math.Abs(x.X-y.X) > rankTolerance {
			return x.X < y.X
		}
	}
	return s.Atoms[0] < t.Atoms[0]
}

// chances fills in the chances of the sites of an event and its call, or why there are
// none. Sites are in the order of candidates, the ipso carbons last.
func (x *judging) chances(a *Attack, list []Candidate, all []Site) (*judged, error) {
	event := a.Event
	m := x.forms[0][0].v.m
	switch {
	case event != terms.ElectrophilicSubstitution && event != terms.NucleophilicSubstitution:
		a.ChanceAbsent = "fewer than 200 published outcomes stand behind this event: it is ranked by localization energy only"
		return nil, nil
	case x.model == nil:
		a.ChanceAbsent = "chances are fitted with the calibrated parameter set, and another is used here"
		return nil, nil
	}
	n := 0
	for n < len(list) && !list[n].Ipso {
		n++
	}
	if n == 0 {
		a.ChanceAbsent = "no position that bears hydrogen"
		return nil, nil
	}
	if reason := fittedSites(event, m, list[:n]); reason != "" {
		a.ChanceAbsent = reason
		return nil, nil
	}
	forms := x.forms
	if event == terms.NucleophilicSubstitution {
		forms = forms[:1]
		if x.primary == 1 {
			a.Notes = append(a.Notes, "chances of displacement are fitted to free bases: they are those of the form as written")
		}
	}
	for _, f := range forms {
		if open(f[0].solution) {
			a.ChanceAbsent = "a shell of levels is only partly filled: no call"
			return nil, nil
		}
	}
	sites := make([][]int, n)
	for k := range sites {
		sites[k] = list[k].Atoms
	}
	var columns *localColumns
	if !x.c.NoLimits && x.chanceLimitsAffordable(a, forms, n) {
		columns = x.columnsOf()
	}
	incoming := x.c.Incoming
	if event == terms.NucleophilicSubstitution {
		incoming = x.c.Nucleophile
	}
	j, err := x.model.judge(event, forms, sites, incoming, x.c.Medium, columns)
	if err != nil {
		return nil, err
	}
	best := 0
	for k := range sites {
		p := j.chances[k]
		all[k].Chance = &p
		if j.limits != nil {
			l := j.limits[k]
			all[k].Limits = &l
		}
		if p > j.chances[best]+rankTolerance {
			best = k
		}
	}
	a.Call = callOf(j.chances[best], all[best].Limits)
	if !x.c.Terse {
		if event == terms.ElectrophilicSubstitution && x.c.Medium == terms.Acidic && x.forms[0][0].v.enamineRing() {
			a.Notes = append(a.Notes, "in strong acid indoles and pyrroles may react protonated at carbon (2-methylindole then nitrates at C-5); that form is not computed")
		}
		a.Species = j.speciesWords(forms)
		if len(forms) > 1 {
			a.Notes = append(a.Notes, "two forms may react; chances are their mixture in fitted proportion")
		}
	}
	return j, nil
}

// open tells whether a shell of some system is partly filled.
func open(s *frontier.Solution) bool {
	for _, o := range s.Systems {
		if o.Open {
			return true
		}
	}
	return false
}

// siteOf makes the site of a candidate with its indices, averaged over the tautomers
// of one form and over the equivalent atoms.
func siteOf(forms []*species, c Candidate, toward terms.Toward, terse bool) Site {
	names := IndexNames
	if terse {
		names = names[:1]
	}
	s := Site{Atoms: c.Atoms, Ipso: c.Ipso, Leaving: c.Leaving, Index: make(map[string]Value, len(names))}
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
	for k, name := range names {
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
