package main

import (
	"fmt"

	"lobecast/reactivity/page"
)

type pageCommand struct {
	Report string `arg:"" help:"Report file (TOML), or - for standard input."`
	Output string `short:"o" placeholder:"FILE" help:"Write to FILE instead of standard output; the file is replaced in one go."`
}

func (p *pageCommand) Help() string {
	return `The page is one file: no network, no script needed, prints to A4.

  lobecast review route.toml -o report.toml
  lobecast page report.toml -o page.html`
}

func (p *pageCommand) Run(c *command) error {
	r, err := readReport(c, p.Report)
	if err != nil {
		return err
	}
	html, err := page.Render(r)
	if err != nil {
		return fileError{fmt.Errorf("%s: %w", p.Report, err)}
	}
	return deliver(c, p.Output, html)
}
