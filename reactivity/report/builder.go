package report

import (
	"errors"
	"fmt"
	"sort"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/rules"
)

// Builder gathers judgements into a report.
type Builder struct {
	report   Report
	borrowed map[string]bool
	events   map[terms.Event]bool
	remarks  map[Remark]bool
}

// NewBuilder starts a report of the given kind.
func NewBuilder(kind, program string, set *frontier.Set) *Builder {
	b := &Builder{
		borrowed: map[string]bool{},
		events:   map[terms.Event]bool{},
		remarks:  map[Remark]bool{},
	}
	b.report = Report{Format: Format, Kind: kind, Program: program, Parameters: set.Name}
	return b
}

// Refuse lists an input that could not be used.
func (b *Builder) Refuse(input string, err error) {
	b.report.Refused = append(b.report.Refused, NewRefused(input, err))
}

// maxMolecules is how many molecules one input may hold beside its salts: each is judged
// and reported, with the input, by itself.
const maxMolecules = 100

// tooMany refuses an input of too many molecules.
func (b *Builder) tooMany(input string, molecules int) bool {
	if molecules <= maxMolecules {
		return false
	}
	b.Refuse(input, fmt.Errorf("the input holds %d molecules apart, more than %d; give them as structures of their own, or use survey", molecules, maxMolecules))
	return true
}

// NewRefused places a refusal.
func NewRefused(input string, err error) Refused {
	r := Refused{Input: input, Message: err.Error()}
	var e *molecule.Error
	if errors.As(err, &e) {
		r.File, r.Line, r.Column = e.File, e.Line, e.Column
		if x := e.Excerpt(); x != "" {
			r.Message += "\n" + x
		}
	}
	return r
}

// borrow notes parameters taken from another set.
func (b *Builder) borrow(entries []string) {
	for _, e := range entries {
		b.borrowed[e] = true
	}
}

// outside adds remarks of what the model cannot see, each once per place.
func (b *Builder) outside(remarks []rules.Remark, appliesTo string) {
	for _, r := range remarks {
		x := Remark{Code: r.Code, Text: r.Text, AppliesTo: appliesTo}
		if !b.remarks[x] {
			b.remarks[x] = true
			b.report.Outside = append(b.report.Outside, x)
		}
	}
}

// caution adds cautions, each once per place.
func (b *Builder) caution(remarks []rules.Remark, appliesTo string) {
	for _, r := range remarks {
		x := Remark{Code: r.Code, Text: r.Text, AppliesTo: appliesTo}
		if !b.remarks[x] {
			b.remarks[x] = true
			b.report.Caution = append(b.report.Caution, x)
		}
	}
}

// quote makes the record row of an event part of the report.
func (b *Builder) quote(e terms.Event) { b.events[e] = true }

// Report finishes and returns the report.
func (b *Builder) Report() *Report {
	r := b.report
	r.Borrowed = make([]string, 0, len(b.borrowed))
	for e := range b.borrowed {
		r.Borrowed = append(r.Borrowed, e)
	}
	sort.Strings(r.Borrowed)
	for _, e := range terms.Events {
		if b.events[e] {
			r.Record = append(r.Record, NewRecord(e))
		}
	}
	r.Safety = NotSafety
	return &r
}

// NewRecord is the record row of an event; an event without enough outcomes says so.
func NewRecord(e terms.Event) Record {
	row, ok := reactivity.RecordFor(e)
	if !ok {
		return Record{Event: string(e), Text: "ranked only: fewer than 200 published outcomes stand behind this event, so no rate of success is known"}
	}
	lim := row.Top1Limits
	return Record{
		Event: string(e), Outcomes: row.Outcomes, Substrates: row.Substrates,
		Top1: Num(row.Top1), Top1Limits: Limits(&lim), Top2: Num(row.Top2),
		LogLoss: Num(row.LogLoss), Chance: Num(row.ChanceLevel),
		Clear: Num(row.ClearShare), ClearRight: Num(row.ClearRight),
		Text: row.String(),
	}
}

// AnyRefused tells whether any input was refused.
func (r *Report) AnyRefused() bool { return len(r.AllRefused()) > 0 }

// AllRefused lists the refusals of the report and of its steps.
func (r *Report) AllRefused() []Refused {
	all := append([]Refused(nil), r.Refused...)
	for i := range r.Step {
		all = append(all, r.Step[i].Refused...)
	}
	return all
}

// SetTitle gives the report the title of its route.
func (b *Builder) SetTitle(title string) { b.report.Title = title }

// AddRefused lists a refusal that is placed already.
func (b *Builder) AddRefused(r Refused) { b.report.Refused = append(b.report.Refused, r) }

// AddStep adds a judged step, with the parameters it borrowed and the events whose
// record the report quotes.
func (b *Builder) AddStep(s Step, borrowed []string, events []terms.Event) {
	b.borrow(borrowed)
	for _, e := range events {
		b.quote(e)
	}
	b.report.Step = append(b.report.Step, s)
}

// SetRisk gives the order of risk.
func (b *Builder) SetRisk(list []Risk) { b.report.Risk = list }
