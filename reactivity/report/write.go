package report

import (
	"bytes"
	"fmt"
	"io"

	"github.com/BurntSushi/toml"

	"lobecast/frontier/nesting"
)

// Write writes the report as TOML.
func (r *Report) Write(w io.Writer) error {
	if r.Borrowed == nil {
		r.Borrowed = []string{}
	}
	var buf bytes.Buffer
	enc := toml.NewEncoder(&buf)
	enc.Indent = ""
	if err := enc.Encode(r); err != nil {
		return fmt.Errorf("report: %w", err)
	}
	_, err := w.Write(buf.Bytes())
	return err
}

// Read reads a report written by [Report.Write]. The format number must be one this
// version knows.
func Read(data []byte) (*Report, error) {
	if line, err := nesting.Check(string(data)); err != nil {
		return nil, fmt.Errorf("line %d: %w", line, err)
	}
	var r Report
	md, err := toml.Decode(string(data), &r)
	if err != nil {
		return nil, err
	}
	if !md.IsDefined("format") || !md.IsDefined("kind") {
		return nil, fmt.Errorf("it has no format and kind; give a file written by review, sites, pair, symmetry or orbitals")
	}
	if r.Format != Format {
		return nil, fmt.Errorf("report format %d is not known to this version, which reads format %d; write the report again", r.Format, Format)
	}
	return &r, nil
}
