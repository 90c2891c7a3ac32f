package review

import (
	"context"
	"fmt"
	"runtime"
	"sync"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity/report"
)

// Review judges every step of a route. Steps are judged side by side and reported in
// order; when ctx ends, the steps not yet judged are reported as not judged.
func Review(ctx context.Context, route *Route, opt Options) *report.Report {
	steps := make([]judged, len(route.Steps))
	var wg sync.WaitGroup
	queue := make(chan int)
	for w := 0; w < runtime.GOMAXPROCS(0); w++ {
		wg.Add(1)
		go func() {
			defer wg.Done()
			for i := range queue {
				if ctx.Err() != nil {
					steps[i] = notJudged(&route.Steps[i], "interrupted before this step was judged")
					continue
				}
				steps[i] = judgeStep(&route.Steps[i], opt)
			}
		}()
	}
	for i := range route.Steps {
		queue <- i
	}
	close(queue)
	wg.Wait()

	b := report.NewBuilder(report.KindReview, opt.Program, opt.Set)
	b.SetTitle(route.Title)
	for _, p := range route.Problems {
		b.AddRefused(p)
	}
	for i := range steps {
		steps[i].step.Number = i + 1
	}
	followSteps(steps)
	for i := range steps {
		b.AddStep(steps[i].step, steps[i].borrowed, steps[i].events)
	}
	b.SetRisk(riskOrder(steps))
	return b.Report()
}

// judged is a step with what the comparison of steps needs.
type judged struct {
	step     report.Step
	reactant []*molecule.Molecule // main reactants, for the step before
	product  *molecule.Molecule   // main product, for the step after
	events   []terms.Event        // whose record rows the report quotes
	borrowed []string
	outside  string // first reason the model cannot see something, for the risk line
}

// describeStep copies what was written.
func describeStep(s *RouteStep) report.Step {
	return report.Step{
		Name: s.Name, Line: s.Line, Kind: string(s.Kind), Reaction: s.Reaction,
		Agents: s.Agents, Medium: string(s.Medium), Activation: string(s.Activation), Note: s.Note,
		Refused: s.Problems,
	}
}

func notJudged(s *RouteStep, reason string) judged {
	x := describeStep(s)
	if x.Kind == "" {
		x.Kind = string(terms.OtherStep)
	}
	x.Standing, x.Reason = string(terms.NotJudged), reason
	return judged{step: x}
}

// judgeStep judges one step; it never fails, since a step that cannot be judged says
// why.
func judgeStep(s *RouteStep, opt Options) (out judged) {
	defer func() {
		if r := recover(); r != nil {
			// An invariant broke in this step: the others must not suffer.
			out = notJudged(s, fmt.Sprintf("internal fault, please report this step: %v", r))
		}
	}()
	if len(s.Problems) > 0 {
		return notJudged(s, "the step was refused as it is written: see refused")
	}
	if s.Reaction != "" {
		return judgeReaction(s, opt)
	}
	switch s.Kind {
	case terms.Cycloaddition:
		return judgeCycloaddition(s, opt)
	case terms.Electrocyclic, terms.Sigmatropic, terms.Cheletropic, terms.Ene:
		return judgePericyclic(s, opt)
	case terms.OtherStep:
		return notJudged(s, "a step of kind other lies outside the model")
	}
	return judgeSubstrate(s, opt)
}
