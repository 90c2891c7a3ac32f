package main

import (
	"fmt"

	"lobecast/reactivity/page"
)

type pageCommand struct {
	Report string `arg:"" help:"Report file (TOML), or - for standard input."`
	Output string `short:"o" placeholder:"FILE" help:"Write to FILE instead of standard output; the file is replaced in one go."`

	Picture string `placeholder:"FILE.svg" help:"Write one drawing as SVG to FILE (- for standard output) instead of the page."`
	Show    string `placeholder:"WORD" help:"Which drawing: structure, sites, homo, lumo, levels, charges, orders, pair or phases; by default what the report is about."`
	Of      int    `placeholder:"N" help:"Number of the structure, pair, process or step to draw; by default the first that can be drawn."`
	Rank    int    `placeholder:"N" help:"Orientation of a cycloaddition to draw; by default the planned one, or the first."`
}

func (k *pageCommand) Help() string {
	return `The page is one file: no network, no script needed, prints to A4.

  lobecast review route.toml -o report.toml
  lobecast page report.toml -o page.html
  lobecast page report.toml --picture step3.svg --of 3`
}

func (k *pageCommand) Run(c *command) error {
	if k.Picture != "" && k.Output != "" {
		return usageError{"--picture writes the drawing instead of the page: leave -o out, or run the command twice"}
	}
	r, err := readReport(c, k.Report)
	if err != nil {
		return err
	}
	if k.Of < 0 || k.Rank < 0 {
		return usageError{"--of and --rank count from 1"}
	}
	if k.Picture != "" {
		svg, err := page.Picture(r, page.Choice{Show: k.Show, Of: k.Of, Rank: k.Rank})
		if err != nil {
			return fileError{fmt.Errorf("%s: %w", k.Report, err)}
		}
		return deliver(c, k.Picture, svg)
	}
	if k.Show != "" || k.Of > 0 || k.Rank > 0 {
		return usageError{"--show, --of and --rank choose a drawing: give --picture FILE.svg too"}
	}
	html, err := page.Render(r)
	if err != nil {
		return fileError{fmt.Errorf("%s: %w", k.Report, err)}
	}
	return deliver(c, k.Output, html)
}
