package main

import (
	"fmt"

	"lobecast/frontier/terms"
	"lobecast/reactivity/review"
)

type reviewCommand struct {
	Route      string `arg:"" optional:"" help:"Route file (TOML), or - for standard input."`
	Template   bool   `help:"Print a route file to fill in."`
	Medium     string `enum:"neutral,acidic,unknown" default:"unknown" help:"Medium of steps that state none and whose agents do not decide (default ${default})."`
	Parameters string `placeholder:"NAME|FILE" help:"Parameter set by name, or a TOML file (default: calibrated)."`
	NoLimits   bool   `help:"Leave out the limits on chances and indices (faster); calls then rest on the chances alone."`
	outputOptions
}

func (r *reviewCommand) Help() string {
	return `Judges every step of a route: where the reagent goes by the frontier orbitals, how sure that is, how often such calls were right, and what the model cannot see. The steps are put in order of risk.

  lobecast review testdata/routes/benzimidazole.toml --brief
  lobecast review route.toml -o report.toml && lobecast page report.toml -o page.html
  lobecast review --template > route.toml`
}

func (r *reviewCommand) Run(c *command) error {
	if r.Template {
		return deliver(c, r.Output, []byte(review.Template))
	}
	if r.Route == "" {
		return usageError{"review needs a route file; `lobecast review --template` prints one to fill in"}
	}
	set, err := loadSet(r.Parameters)
	if err != nil {
		return err
	}
	data, err := readInput(c, r.Route, review.RouteLimit)
	if err != nil {
		return err
	}
	name := r.Route
	if name == "-" {
		name = "standard input"
	}
	route, err := review.ParseRoute(string(data), name)
	if err != nil {
		return fileError{err}
	}
	out := review.Review(c.ctx, route, review.Options{
		Set: set, Program: programName(), Medium: terms.Medium(r.Medium), NoLimits: r.NoLimits,
	})
	if err := r.write(c, out); err != nil {
		return err
	}
	if c.ctx.Err() != nil {
		return fmt.Errorf("interrupted: the steps judged so far were written: %w", c.ctx.Err())
	}
	return nil
}
