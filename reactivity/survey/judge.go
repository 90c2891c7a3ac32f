package survey

import (
	"errors"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"lobecast/frontier/molecule"
	"lobecast/frontier/place"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/reactivity/reading"
)

// judge turns one item into its record; it never fails.
func judge(it *item, opt *Options) (res Result) {
	res.Line = it.line
	defer func() {
		if p := recover(); p != nil {
			// An invariant broke on this one line: it must not take the run with it.
			res = Result{Line: it.line, Name: res.Name, Input: res.Input, Status: Refused,
				Message: fmt.Sprintf("internal fault, please report this line: %v", p)}
		}
	}()
	res.Input, res.Name = it.input()
	if it.err != nil {
		res.refuse(it.err)
		return res
	}
	switch {
	case it.mol != nil:
		res.structure(it.mol, opt)
	case strings.IndexByte(res.Input, '>') >= 0:
		res.reaction(opt)
	default:
		m, err := molecule.ParseSMILES(res.Input)
		if err != nil {
			res.refuse(err)
			return res
		}
		res.structure(m, opt)
	}
	return res
}

// input is what a record says was judged, and its name.
func (it *item) input() (text, name string) {
	if it.mol != nil {
		return it.mol.SMILES(), it.mol.Name
	}
	text = strings.TrimLeft(it.text, " \t")
	if i := strings.IndexAny(text, " \t"); i >= 0 {
		return text[:i], strings.TrimSpace(text[i+1:])
	}
	return text, ""
}

func (r *Result) refuse(err error) {
	r.Status, r.Message = Refused, err.Error()
	var e *molecule.Error
	if errors.As(err, &e) && e.Column > 0 {
		r.Message = fmt.Sprintf("column %d: %s", e.Column, e.Reason)
		if e.Remedy != "" {
			r.Message += "; " + e.Remedy
		}
	}
}

func (r *Result) notJudged(kind, message string) {
	r.Status, r.Kind, r.Message = NotJudged, kind, message
}

// structure ranks the sites of a molecule: the first event that has candidates, in
// the order of the events.
func (r *Result) structure(m *molecule.Molecule, opt *Options) {
	parts, _ := molecule.SetAside(m)
	r.Kind = "sites"
	part := parts[0]
	c := opt.conditions()
	if opt.Incoming != nil {
		c.Incoming, c.Nucleophile = opt.Incoming.Class, opt.Incoming.Nucleophile
	}
	j, err := reactivity.Judge(part, c, opt.towards())
	if err != nil {
		r.refuse(err)
		return
	}
	if len(parts) > 1 {
		r.Message = fmt.Sprintf("%d molecules: only the first is ranked", len(parts))
	}
	for k := range j.Attacks {
		if len(j.Attacks[k].Sites) > 0 {
			r.attack(part, &j.Attacks[k], nil)
			return
		}
	}
	r.notJudged("sites", "no candidate site")
}

// attack fills in a ranking and, where an intention is known, how it fares.
func (r *Result) attack(m *molecule.Molecule, a *reactivity.Attack, planned []int) {
	r.Status = Judged
	r.Call = string(a.Call)
	first := &a.Sites[0]
	r.FirstAtoms = joinNumbers(m, first.Atoms)
	r.FirstPlace = place.NewNamer(m).Site(first.Atoms)
	r.FirstChance = first.Chance
	for k := range a.Sites {
		for _, p := range planned {
			if slices.Contains(a.Sites[k].Atoms, p) {
				s := &a.Sites[k]
				r.PlannedRank, r.PlannedChance, r.PlannedLimits = s.Rank, s.Chance, s.Limits
				return
			}
		}
	}
	if planned != nil {
		r.Status = NotJudged
		r.Message = "the intended site is no candidate for " + string(a.Event)
	}
}

func joinNumbers(m *molecule.Molecule, atoms []int) string {
	var b []byte
	for i, a := range atoms {
		if i > 0 {
			b = append(b, ' ')
		}
		b = strconv.AppendInt(b, int64(m.Atoms[a].Number), 10)
	}
	return string(b)
}

// reaction reads a reaction, finds its intention, and ranks it.
func (r *Result) reaction(opt *Options) {
	rxn, err := molecule.ParseReaction(r.Input)
	if err != nil {
		r.refuse(err)
		return
	}
	x, err := reading.Read(rxn, "", reading.Stated{Medium: opt.Medium})
	if err != nil {
		r.refuse(err)
		return
	}
	r.Kind = string(x.Kind)
	switch {
	case x.Impossible != "":
		r.Status, r.Message = Refused, x.Impossible
	case x.Kind == terms.OtherStep:
		r.notJudged(r.Kind, "outside the model")
		if x.Nearest != "" {
			r.Message = x.Nearest + ": outside the model"
		} else if x.Outside != "" {
			r.Message = x.Outside
		}
	case x.Event == terms.CycloadditionOrientation:
		r.cycloaddition(x, opt)
	case x.Event != "":
		r.site(x, opt)
	default:
		r.notJudged(r.Kind, "orbital symmetry only: see lobecast review")
	}
}

func (r *Result) site(x *reading.Reading, opt *Options) {
	c := opt.conditions()
	c.Medium = x.Medium
	if x.Incoming != nil {
		c.Incoming, c.Nucleophile = x.Incoming.Class, x.Incoming.Nucleophile
	}
	c.Only = x.Event
	j, err := reactivity.Judge(x.Substrate, c, []terms.Toward{x.Event.Toward()})
	if err != nil {
		r.notJudged(r.Kind, err.Error())
		return
	}
	for k := range j.Attacks {
		if j.Attacks[k].Event == x.Event && len(j.Attacks[k].Sites) > 0 {
			r.attack(x.Substrate, &j.Attacks[k], x.Sites)
			return
		}
	}
	r.notJudged(r.Kind, "no candidate site for "+string(x.Event))
}

func (r *Result) cycloaddition(x *reading.Reading, opt *Options) {
	bonds := [2][2]int{x.Bonds[0], x.Bonds[1]}
	j, err := reactivity.Pair(x.Substrate, x.Partner, reactivity.PairConditions{
		Set: opt.Set, Medium: x.Medium, NoProducts: true, NoLimits: opt.NoLimits, Meeting: x.Meeting, Between: &bonds,
	})
	if err != nil {
		r.notJudged(r.Kind, err.Error())
		return
	}
	if len(j.Adducts) == 0 {
		r.notJudged(r.Kind, "no adduct was found")
		return
	}
	second := x.Partner
	if second == nil {
		second = x.Substrate
	}
	r.Status, r.Call = Judged, string(j.Call)
	planned, ok := j.Find(bonds)
	if !ok {
		r.notJudged(r.Kind, "the intended adduct is not among those that were found")
		return
	}
	r.PlannedRank, r.PlannedChance, r.PlannedLimits = planned.Rank, planned.Chance, planned.Limits
	for i := range j.Adducts {
		a := &j.Adducts[i]
		if a.Joining != planned.Joining {
			continue
		}
		r.FirstAtoms = fmt.Sprintf("%d-%d %d-%d",
			x.Substrate.Atoms[a.Bonds[0][0]].Number, second.Atoms[a.Bonds[0][1]].Number,
			x.Substrate.Atoms[a.Bonds[1][0]].Number, second.Atoms[a.Bonds[1][1]].Number)
		r.FirstPlace = strings.TrimSpace(a.Relation + " adduct")
		r.FirstChance = a.Chance
		return
	}
}
