package main

import (
	"bytes"

	"lobecast/reactivity"
)

type recordCommand struct {
	Event  string `placeholder:"EVENT" help:"Only this event."`
	Output string `short:"o" placeholder:"FILE" help:"Write to FILE instead of standard output."`
}

func (r *recordCommand) Help() string {
	return `Prints the record: per event, how often the first and the first two sites were the recorded ones on published outcomes, cross-validated, with limits.

  lobecast record`
}

func (r *recordCommand) Run(c *command) error {
	var buf bytes.Buffer
	if err := reactivity.WriteRecord(&buf, r.Event); err != nil {
		return usageError{err.Error()}
	}
	return deliver(c, r.Output, buf.Bytes())
}
