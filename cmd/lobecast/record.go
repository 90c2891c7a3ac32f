package main

import (
	"bytes"
	"fmt"

	"lobecast/reactivity"
)

type recordCommand struct {
	Event  string `placeholder:"EVENT" help:"Only this event."`
	Refit  string `placeholder:"FOLDER" help:"Repeat the fit and its cross-validation on the outcome files of FOLDER, and print the record that comes of it."`
	Into   string `placeholder:"FOLDER" help:"With --refit: write the fitted numbers and their pages into the source tree at FOLDER instead."`
	Output string `short:"o" placeholder:"FILE" help:"Write to FILE instead of standard output."`
}

func (r *recordCommand) Help() string {
	return `Prints the record: per event, how often the first and the first two sites were the recorded ones on published outcomes, cross-validated, with limits. A refit takes some minutes on all cores and gives the same bytes on the same architecture.

  lobecast record
  lobecast record --refit testdata/outcomes -o record.md
  lobecast record --refit testdata/outcomes --into .`
}

func (r *recordCommand) Run(c *command) error {
	switch {
	case r.Into != "" && r.Refit == "":
		return usageError{"--into needs --refit FOLDER, the folder of the outcome files"}
	case r.Refit != "" && r.Event != "":
		return usageError{"--refit fits all events together; leave --event out"}
	case r.Refit != "":
		return r.refit(c)
	}
	var buf bytes.Buffer
	if err := reactivity.WriteRecord(&buf, r.Event); err != nil {
		return usageError{err.Error()}
	}
	return deliver(c, r.Output, buf.Bytes())
}

// recordPage is the page of the record among the files of a refit.
const recordPage = "docs/record.md"

// refit repeats the fit; an interrupt ends it without waiting for the round at hand.
func (r *recordCommand) refit(c *command) error {
	type outcome struct {
		refit *reactivity.Refitting
		err   error
	}
	done := make(chan outcome, 1)
	go func() {
		fit, err := reactivity.Refit(r.Refit, c.stderr)
		done <- outcome{fit, err}
	}()
	var fit *reactivity.Refitting
	select {
	case <-c.ctx.Done():
		return fmt.Errorf("interrupted: nothing was written: %w", c.ctx.Err())
	case x := <-done:
		if x.err != nil {
			return fileError{x.err}
		}
		fit = x.refit
	}
	if r.Into != "" {
		if err := fit.Write(r.Into); err != nil {
			return fileError{err}
		}
		return nil
	}
	files, err := fit.Files()
	if err != nil {
		return fileError{err}
	}
	for _, f := range files {
		if f.Path == recordPage {
			return deliver(c, r.Output, f.Content)
		}
	}
	return fmt.Errorf("the refit gave no record")
}
