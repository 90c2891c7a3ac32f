package main

import (
	"bytes"
	"fmt"

	"lobecast/reactivity"
)

type recordCommand struct {
	Refit  string `placeholder:"FOLDER" help:"Repeat the fit and the cross-validation from the outcome files in FOLDER (takes minutes)."`
	Event  string `placeholder:"EVENT" help:"Only this event."`
	Output string `short:"o" placeholder:"FILE" help:"Write to FILE instead of standard output (with --refit: a folder for the fitted data, the record and its drawings)."`
}

func (r *recordCommand) Help() string {
	return `Prints the record: per event, how often the first and the first two sites were the recorded ones on published outcomes, cross-validated, with limits.

  lobecast record
  lobecast record --refit testdata/outcomes -o refit`
}

func (r *recordCommand) Run(c *command) error {
	if r.Refit != "" {
		if err := reactivity.Refit(c.ctx, r.Refit, r.Output, c.stderr); err != nil {
			return fileError{fmt.Errorf("refit: %w", err)}
		}
		return nil
	}
	var buf bytes.Buffer
	if err := reactivity.WriteRecord(&buf, r.Event); err != nil {
		return usageError{err.Error()}
	}
	return deliver(c, r.Output, buf.Bytes())
}
