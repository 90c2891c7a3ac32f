package main

import (
	"fmt"

	"lobecast/reactivity/report"
	"lobecast/reactivity/review"
)

type compareCommand struct {
	Old    string `arg:"" help:"The earlier report of review."`
	New    string `arg:"" help:"The later report of review."`
	Output string `short:"o" placeholder:"FILE" help:"Write to FILE instead of standard output."`
}

func (k *compareCommand) Help() string {
	return `Tells, step by step, what changed between two reviews: standing, call, rank and chance of the planned choice, first-ranked place, remarks.

  lobecast compare monday.toml tuesday.toml`
}

func (k *compareCommand) Run(c *command) error {
	before, err := readReport(c, k.Old)
	if err != nil {
		return err
	}
	after, err := readReport(c, k.New)
	if err != nil {
		return err
	}
	text, err := review.Compare(before, after)
	if err != nil {
		return fileError{err}
	}
	return deliver(c, k.Output, []byte(text))
}

// readReport reads a report file, or standard input.
func readReport(c *command, path string) (*report.Report, error) {
	data, err := readInput(c, path, reportFileLimit)
	if err != nil {
		return nil, err
	}
	r, err := report.Read(data)
	if err != nil {
		return nil, fileError{fmt.Errorf("%s is not a report: %w", path, err)}
	}
	return r, nil
}

const reportFileLimit = 256 << 20
