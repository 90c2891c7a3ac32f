package review

import (
	"fmt"
	"slices"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/place"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/reactivity/reading"
	"lobecast/reactivity/report"
	"lobecast/rules"
)

// judgeSites judges a site event: the sites of the substrate are ranked with their
// chances and the intended one is looked up among them; the best site of every other
// reactant is set beside them by localization energy, which alone may be compared
// between molecules (see rivals).
func judgeSites(s *RouteStep, r *reading.Reading, opt Options) judged {
	x := describeReading(s, r)
	out := judged{reactant: reactants(r), product: r.Product}
	cond := conditions(r, opt)
	cond.Twists = s.Twists

	arena := r.Substrate
	towards := []terms.Toward{r.Event.Toward()}
	j, err := reactivity.Judge(arena, cond, towards)
	if err != nil {
		x.Standing, x.Reason = string(terms.NotJudged), err.Error()
		out.step = x
		return out
	}
	out.borrowed = j.Borrowed
	x.Warnings = append(x.Warnings, j.Warnings...)

	planned := r.Sites
	main := -1
	for k := range j.Attacks {
		if j.Attacks[k].Event == r.Event {
			main = k
		}
	}
	if main < 0 {
		x.Standing = string(terms.NotJudged)
		x.Reason = fmt.Sprintf("no candidate site for %s was found in the reactants", r.Event)
		out.step = x
		return out
	}
	attack := &j.Attacks[main]
	out.events = append(out.events, attack.Event)
	structure := report.NewStructure(arena.SMILES(), "", j)
	only := *j
	only.Attacks = []reactivity.Attack{*attack}
	structure.Attack = report.NewAttacks(&only, r.Incoming, towards)
	x.Structure = []report.Structure{structure}
	x.Call = string(attack.Call)
	x.Record = []report.Record{report.NewRecord(attack.Event)}

	namer := place.NewNamer(arena)
	standing(&x, arena, namer, attack, planned)
	x.Candidate = candidates(arena, namer, attack, r, planned)
	x.Competing = competing(namer, j, r.Event)

	situation := situationOf(r)
	if len(attack.Sites) > 0 {
		situation.Site = attack.Sites[0].Atoms
	}
	situation.Twists = [][]frontier.Twist{s.Twists}
	addRemarks(&x, situation)
	onlyCandidate(&x, attack)
	doubt(&x)

	meetRivals(&x, rivals(r, attack, cond))

	if again, ok := secondTime(r, attack, cond); ok {
		x.Again = again
	}
	x.WhatIf = whatWouldMoveIt(arena, attack, cond, namer)
	out.step = x
	if len(x.Outside) > 0 {
		out.outside = x.Outside[0].Text
	}
	for _, r := range x.Outside {
		if slices.Contains(hardly, r.Code) {
			out.outside = r.Text
		}
	}
	return out
}

// describeReading copies what was written and what it was read as.
func describeReading(s *RouteStep, r *reading.Reading) report.Step {
	x := describeStep(s)
	x.Kind, x.Event = string(r.Kind), string(r.Event)
	x.Medium, x.MediumFrom = string(r.Medium), r.MediumFrom
	if r.Activation != "" {
		x.Activation = string(r.Activation)
	}
	if r.Substrate != nil {
		x.Substrate = r.Substrate.SMILES()
	}
	if r.Product != nil {
		x.Product = r.Product.SMILES()
	}
	if r.Incoming != nil {
		x.Incoming = r.Incoming.String()
	}
	for _, a := range r.Agents {
		x.Read = append(x.Read, a.String())
	}
	for _, a := range r.Aside {
		x.Aside = append(x.Aside, report.Aside{Name: a.Name, SMILES: a.SMILES})
	}
	if r.MapNote != "" {
		x.Warnings = append(x.Warnings, r.MapNote)
	}
	x.Warnings = append(x.Warnings, r.Notes...)
	return x
}

func conditions(r *reading.Reading, opt Options) reactivity.Conditions {
	c := reactivity.Conditions{Set: opt.Set, Medium: r.Medium, NoLimits: opt.NoLimits}
	if c.Medium == "" {
		c.Medium = opt.Medium
	}
	if r.Incoming != nil {
		c.Incoming = r.Incoming.Class
		c.Nucleophile = r.Incoming.Nucleophile
	}
	return c
}

func reactants(r *reading.Reading) []*molecule.Molecule {
	var list []*molecule.Molecule
	if r.Substrate != nil {
		list = append(list, r.Substrate)
	}
	if r.Partner != nil {
		list = append(list, r.Partner)
	}
	for _, m := range r.Others {
		if m != r.Partner {
			list = append(list, m)
		}
	}
	return list
}

// findSite returns the index of the site set that holds one of the atoms, or -1.
func findSite(sites []reactivity.Site, atoms []int) int {
	for k := range sites {
		for _, a := range atoms {
			if slices.Contains(sites[k].Atoms, a) {
				return k
			}
		}
	}
	return -1
}

// standing compares the intention with the ranking.
func standing(x *report.Step, m *molecule.Molecule, namer *place.Namer, attack *reactivity.Attack, planned []int) {
	if len(planned) == 0 {
		x.Standing = string(terms.NotJudged)
		x.Reason = "no intended atom is stated: map it, for instance [cH:1], or give the product"
		return
	}
	k := findSite(attack.Sites, planned)
	if k < 0 {
		x.Planned = &report.Planned{Atoms: report.Numbers(m, planned), Place: namer.Site(planned)}
		if i := findSite(attack.Ipso, planned); i >= 0 {
			x.Standing = string(terms.NotJudged)
			x.Reason = fmt.Sprintf("%s is a substituted (ipso) carbon: it is ranked apart and has no chance", namer.Site(planned))
			x.Planned.Absent = x.Reason
			return
		}
		x.Standing = string(terms.NotJudged)
		x.Reason = fmt.Sprintf("%s is no candidate for %s", namer.Site(planned), attack.Event)
		x.Planned.Absent = x.Reason
		return
	}
	site := &attack.Sites[k]
	x.Planned = &report.Planned{
		Atoms: report.Numbers(m, site.Atoms), Place: namer.Site(site.Atoms), Rank: site.Rank,
		Chance: report.Chance(site.Chance), Limits: report.Limits(site.Limits),
	}
	if site.Chance == nil {
		x.Planned.Absent = attack.ChanceAbsent
		x.Standing = string(terms.NotJudged)
		x.Reason = fmt.Sprintf("ranked only: %s; the intended site is rank %d of %d", attack.ChanceAbsent, site.Rank, len(attack.Sites))
		return
	}
	first := &attack.Sites[0]
	x.Standing, x.Reason = stand(k, attack.Call, site.Limits, first.Limits)
}

// onlyCandidate says that a chance without rivals says nothing.
func onlyCandidate(x *report.Step, attack *reactivity.Attack) {
	if len(attack.Sites) == 1 && x.Planned != nil && x.Planned.Chance != nil {
		x.Reason += "; it is the only candidate, so that its chance says nothing about whether the step goes"
	}
}

// hardly are the rules under which a step hardly goes at all, or goes elsewhere, however
// clear the position is.
var hardly = []string{
	"metal-catalysis", "directed-metalation", "radical-halogenation", "aryne", "unactivated-halide", "leaving-sulfone-or-nitro",
	"friedel-crafts-deactivated", "friedel-crafts-basic-nitrogen", "azine-hardly-attacked", "pyrone-benzo-ring", "free-base-coupling",
}

// doubt makes a supported step contested where one of the rules [hardly] applies.
func doubt(x *report.Step) {
	if x.Standing != string(terms.Supported) {
		return
	}
	for _, r := range x.Outside {
		if slices.Contains(hardly, r.Code) {
			x.Standing = string(terms.Contested)
			x.Reason += "; but " + r.Text
			return
		}
	}
}

// stand is the standing of the k-th ranked choice (from 0) under a call.
func stand(k int, call terms.Call, planned, first *[2]float64) (string, string) {
	switch {
	case k == 0 && call == terms.Clear:
		return string(terms.Supported), "the intended choice is first, and the call is clear"
	case k == 0:
		return string(terms.Contested), fmt.Sprintf("the intended choice is first, but the call is only %s", call)
	case k == 1 && planned != nil && first != nil && planned[1] >= first[0]:
		return string(terms.Contested), "the intended choice is second, and its limits reach those of the first"
	}
	return string(terms.Opposed), fmt.Sprintf("the intended choice is rank %d, behind the first beyond the limits", k+1)
}

// candidates is the table of a step: place, chance, product.
func candidates(m *molecule.Molecule, namer *place.Namer, attack *reactivity.Attack, r *reading.Reading, planned []int) []report.Candidate {
	var list []report.Candidate
	for k := range attack.Sites {
		site := &attack.Sites[k]
		c := report.Candidate{
			Rank: site.Rank, Place: namer.Site(site.Atoms),
			Chance: report.Chance(site.Chance), Limits: report.Limits(site.Limits),
			Planned: findSite(attack.Sites[k:k+1], planned) == 0,
		}
		if r.Incoming != nil {
			if p, err := reactivity.Product(m, attack.Event, site.Atoms[0], r.Incoming); err == nil {
				c.Product = mainProduct(p, site.Atoms[0])
			}
		}
		list = append(list, c)
	}
	return list
}

// mainProduct is the component of a product that holds the attacked atom.
func mainProduct(p *molecule.Molecule, site int) string {
	parts := p.Components()
	if len(parts) < 2 {
		return p.SMILES()
	}
	number := p.Atoms[site].Number
	for _, part := range p.Split() {
		for _, a := range part.Atoms {
			if a.Number == number {
				return part.SMILES()
			}
		}
	}
	return p.SMILES()
}

// competing names other events that the same reagent could set off on these
// molecules: the first-ranked site of each.
func competing(namer *place.Namer, j *reactivity.Judgement, event terms.Event) []string {
	var list []string
	for k := range j.Attacks {
		a := &j.Attacks[k]
		if a.Event == event || len(a.Sites) == 0 || a.Event.Toward() != event.Toward() {
			continue
		}
		list = append(list, fmt.Sprintf("%s at %s (not weighed against the planned event: no common scale of chances)", a.Event, namer.Site(a.Sites[0].Atoms)))
	}
	return list
}

func situationOf(r *reading.Reading) *rules.Situation {
	s := &rules.Situation{
		Molecules: reactants(r), Product: r.Product, Event: r.Event, Kind: r.Kind,
		Agents: r.Agents, Medium: r.Medium, Activation: r.Activation, Site: r.Sites,
	}
	if r.Incoming != nil {
		s.Incoming, s.Nucleophile = r.Incoming.Class, r.Incoming.Nucleophile
	}
	return s
}

func addRemarks(x *report.Step, s *rules.Situation) {
	for _, r := range rules.Outside(s) {
		x.Outside = append(x.Outside, report.Remark{Code: r.Code, Text: r.Text, AppliesTo: x.Name})
	}
	for _, r := range rules.Cautions(s) {
		x.Caution = append(x.Caution, report.Remark{Code: r.Code, Text: r.Text, AppliesTo: x.Name})
	}
}
