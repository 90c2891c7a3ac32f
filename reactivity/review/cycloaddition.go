package review

import (
	"fmt"
	"regexp"
	"strconv"
	"strings"

	"lobecast/frontier/molecule"
	"lobecast/frontier/place"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/reactivity/reading"
	"lobecast/reactivity/report"
	"lobecast/rules/agents"
)

// judgeCycloaddition judges a step that states diene (or dipole) and partner. The
// intended bonds are mapped :1 with :3 and :2 with :4 where they are stated.
func judgeCycloaddition(s *RouteStep, opt Options) judged {
	if s.Components != "" && s.Diene == "" && s.Substrate == "" {
		return judgeComponents(s, &reading.Reading{Kind: s.Kind, Agents: agents.ParseWords(s.Agents), Activation: s.Activation})
	}
	r := &reading.Reading{Kind: terms.Cycloaddition, Agents: agents.ParseWords(s.Agents), Activation: s.Activation}
	key, smiles := "diene", s.Diene
	if smiles == "" {
		key, smiles = "substrate", s.Substrate
	}
	a, err := s.read(key, smiles)
	if err != nil {
		return s.refused(key, smiles, err)
	}
	r.Substrate = a
	second := a
	if s.Partner != "" {
		b, err := s.read("partner", s.Partner)
		if err != nil {
			return s.refused("partner", s.Partner, err)
		}
		r.Partner, second = b, b
	}
	one, two, three, four := a.AtomByMap(1), a.AtomByMap(2), second.AtomByMap(3), second.AtomByMap(4)
	if one >= 0 && two >= 0 && three >= 0 && four >= 0 {
		r.Bonds = [][2]int{{one, three}, {two, four}}
	}
	return judgePairReading(s, r, opt)
}

// judgePairReading judges a cycloaddition: whether orbital symmetry allows it under
// the activation, and which way round it goes.
func judgePairReading(s *RouteStep, r *reading.Reading, opt Options) judged {
	if r.Activation == "" {
		r.Activation = terms.Thermal
	}
	x := describeReading(s, r)
	x.Event = string(terms.CycloadditionOrientation)
	out := judged{reactant: reactants(r), product: r.Product, events: []terms.Event{terms.CycloadditionOrientation}}
	lewis := s.LewisAcid || agents.Any(r.Agents, agents.LewisAcid)
	j, err := reactivity.Pair(r.Substrate, r.Partner, reactivity.PairConditions{
		Set: opt.Set, LewisAcid: lewis, Medium: r.Medium, NoLimits: opt.NoLimits,
	})
	if err != nil {
		if s.Reaction == "" {
			return s.refused("kind", s.Diene+s.Substrate, err)
		}
		x.Standing, x.Reason = string(terms.NotJudged), err.Error()
		out.step = x
		return out
	}
	out.borrowed = j.Borrowed
	p := report.NewPair(j)
	x.Pair = []report.Pair{p}
	x.Call = string(j.Call)
	x.Record = []report.Record{report.NewRecord(terms.CycloadditionOrientation)}
	second := r.Partner
	if second == nil {
		second = r.Substrate
	}
	planned := plannedAdduct(j, r)
	pairCandidates(&x, j, planned, r.Substrate, second)
	pairStanding(&x, j, r, planned, second)
	situation := situationOf(r)
	situation.Event = terms.CycloadditionOrientation
	addRemarks(&x, situation)
	if len(x.Outside) > 0 {
		out.outside = x.Outside[0].Text
	}
	out.step = x
	return out
}

// plannedAdduct finds the intended adduct by its bonds, or by its constitution.
func plannedAdduct(j *reactivity.PairJudgement, r *reading.Reading) *reactivity.Adduct {
	if len(r.Bonds) == 2 {
		if a, ok := j.Find([2][2]int{r.Bonds[0], r.Bonds[1]}); ok {
			return a
		}
	}
	if r.Product != nil {
		if a, ok := j.FindProduct(r.Product); ok {
			return a
		}
	}
	return nil
}

// pairStanding compares the planned adduct with the ranking; what orbital symmetry
// forbids is forbidden whatever the ranking says.
func pairStanding(x *report.Step, j *reactivity.PairJudgement, r *reading.Reading, planned *reactivity.Adduct, second *molecule.Molecule) {
	if p := &x.Pair[0]; r.Activation == terms.Photochemical && p.Photochemical == "forbidden" {
		x.Standing = string(terms.Forbidden)
		x.Reason = "the suprafacial addition [π4s+π2s] is forbidden under light; it is allowed under heat"
	} else if r.Activation == terms.Thermal && p.Thermal == "forbidden" {
		x.Standing = string(terms.Forbidden)
		x.Reason = "the suprafacial addition is forbidden under heat"
	}
	if planned != nil {
		x.Planned = &report.Planned{Place: adductPlace(planned, r.Substrate, second), Rank: planned.Rank, Chance: report.Chance(planned.Chance), Limits: report.Limits(planned.Limits)}
		for _, b := range planned.Bonds {
			x.Planned.Bonds = append(x.Planned.Bonds, [2]int{r.Substrate.Atoms[b[0]].Number, second.Atoms[b[1]].Number})
		}
	}
	if x.Standing == string(terms.Forbidden) {
		// A chance is one of orientation; where the addition is forbidden it says nothing.
		for i := range x.Candidate {
			x.Candidate[i].Chance, x.Candidate[i].Limits = nil, nil
		}
		if x.Planned != nil {
			x.Planned.Chance, x.Planned.Limits = nil, nil
			x.Planned.Absent = "the addition is forbidden: which way round it would go says nothing"
		}
		for i := range x.Pair {
			for k := range x.Pair[i].Adduct {
				x.Pair[i].Adduct[k].Chance, x.Pair[i].Adduct[k].Limits = nil, nil
			}
			x.Pair[i].ChanceMeaning, x.Pair[i].ChanceAbsent = "", "the addition is forbidden by orbital symmetry"
		}
		x.Call = string(terms.Open)
	}
	if x.Standing != "" {
		return
	}
	switch {
	case planned == nil && (len(r.Bonds) > 0 || r.Product != nil):
		x.Standing = string(terms.NotJudged)
		x.Reason = "the intended adduct is not among those that were found"
	case planned == nil:
		x.Standing = string(terms.NotJudged)
		x.Reason = "no intended orientation is stated: map the ends :1 :2 and :3 :4, or give the product"
	case lone(j, planned.Joining):
		x.Standing = string(terms.NotJudged)
		x.Reason = "nothing to choose: both orientations give the same adduct; orbital symmetry allows the addition"
		x.Planned.Absent = "both orientations give the same adduct"
	case planned.Chance == nil:
		x.Standing = string(terms.NotJudged)
		x.Planned.Absent = j.ChanceAbsent
		if x.Planned.Absent == "" {
			x.Planned.Absent = "no chance is fitted for this kind of cycloaddition"
		}
		x.Reason = fmt.Sprintf("ranked only: the intended orientation is rank %d; %s", planned.Rank, x.Planned.Absent)
	default:
		first := firstOf(j, planned.Joining)
		x.Standing, x.Reason = stand(planned.Rank-1, j.Call, planned.Limits, first.Limits)
		if planned.Joining > 1 {
			if x.Standing == string(terms.Supported) {
				x.Standing = string(terms.Contested)
			}
			x.Reason += fmt.Sprintf("; but another pair of π systems joins more readily (this is the %s of %d)", ordinal(planned.Joining), len(j.Joinings))
		}
	}
	if planned != nil {
		if text := drawnConfiguration(planned, r.Product); text != "" {
			x.Reason += "; " + text
		}
	}
}

// lone tells whether a joining has one orientation only.
func lone(j *reactivity.PairJudgement, joining int) bool {
	n := 0
	for i := range j.Adducts {
		if j.Adducts[i].Joining == joining {
			n++
		}
	}
	return n == 1
}

func firstOf(j *reactivity.PairJudgement, joining int) *reactivity.Adduct {
	for i := range j.Adducts {
		if j.Adducts[i].Joining == joining {
			return &j.Adducts[i]
		}
	}
	return &j.Adducts[0]
}

func ordinal(n int) string {
	switch n {
	case 1:
		return "first"
	case 2:
		return "second"
	case 3:
		return "third"
	}
	return fmt.Sprintf("%dth", n)
}

// adductPlace names an orientation: by the relation of the substituents, or where
// there is none by the new bonds.
func adductPlace(a *reactivity.Adduct, first, second *molecule.Molecule) string {
	if a.Relation != "" {
		return relationAdduct(named(a.Relation, first))
	}
	return fmt.Sprintf("adduct with bonds %d–%d and %d–%d", first.Atoms[a.Bonds[0][0]].Number, second.Atoms[a.Bonds[0][1]].Number,
		first.Atoms[a.Bonds[1][0]].Number, second.Atoms[a.Bonds[1][1]].Number)
}

var toAtom = regexp.MustCompile(`to atom (\d+)`)

// named puts the substituent in the place of the atom number that carries it: "ortho"
// to OMe. Where the atom carries none, or two atoms carry the same, the number stays.
func named(relation string, m *molecule.Molecule) string {
	words := map[string]bool{}
	clash := false
	text := toAtom.ReplaceAllStringFunc(relation, func(s string) string {
		n, err := strconv.Atoi(s[len("to atom "):])
		if err != nil {
			return s
		}
		for i := range m.Atoms {
			if m.Atoms[i].Number != n {
				continue
			}
			if w := carried(m, i); w != "" {
				clash = clash || words[w]
				words[w] = true
				return "to " + w
			}
		}
		return s
	})
	if clash {
		return relation
	}
	return text
}

// carried names what an sp2 atom of a diene carries beside its chain: a heteroatom
// before a carbon group.
func carried(m *molecule.Molecule, i int) string {
	word := ""
	for _, h := range m.Neighbours(i) {
		b := m.Bonds[h.Bond]
		if b.Order != 1 || m.BondInRing(h.Bond) {
			continue
		}
		if m.Atoms[h.Atom].Element != 6 {
			return place.Substituent(m, i, h.Atom)
		}
		chain := false
		for _, g := range m.Neighbours(h.Atom) {
			chain = chain || m.Bonds[g.Bond].Order == 2 && m.Atoms[g.Atom].Element == 6 && !m.Bonds[g.Bond].Aromatic
		}
		if !chain && word == "" {
			word = place.Substituent(m, i, h.Atom)
		}
	}
	return word
}

// relationAdduct joins a relation and its noun: "ortho" (1,2-) adduct, 3,5-adduct.
func relationAdduct(relation string) string {
	if strings.HasSuffix(relation, "-") {
		return relation + "adduct"
	}
	return relation + " adduct"
}

// pairCandidates is the table of a cycloaddition: the orientations of the planned
// joining, or of the first.
func pairCandidates(x *report.Step, j *reactivity.PairJudgement, planned *reactivity.Adduct, a0, second *molecule.Molecule) {
	joining := 1
	if planned != nil {
		joining = planned.Joining
	}
	for i := range j.Adducts {
		a := &j.Adducts[i]
		if a.Joining != joining {
			continue
		}
		c := report.Candidate{Rank: a.Rank, Place: adductPlace(a, a0, second), Chance: report.Chance(a.Chance), Limits: report.Limits(a.Limits), Planned: a == planned}
		if len(a.Products) > 0 {
			c.Product = a.Products[0].SMILES
		}
		x.Candidate = append(x.Candidate, c)
	}
}
