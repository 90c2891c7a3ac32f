package main

import (
	"fmt"
	"strings"

	"lobecast/frontier"
)

type parametersCommand struct {
	Name   string `arg:"" optional:"" help:"Set to print as TOML, by name or file; without it the sets are listed."`
	Output string `short:"o" placeholder:"FILE" help:"Write to FILE instead of standard output."`
}

func (p *parametersCommand) Help() string {
	return `A printed set can be edited and given back with --parameters FILE. With strict = true in the file, a missing entry refuses the structure instead of being borrowed.

  lobecast parameters
  lobecast parameters van-catledge-1980 -o mine.toml`
}

func (p *parametersCommand) Run(c *command) error {
	var text strings.Builder
	if p.Name == "" {
		for _, name := range frontier.Sets() {
			set, err := frontier.Load(name)
			if err != nil {
				return err
			}
			fmt.Fprintf(&text, "%-20s %s\n", name, set.Citation)
		}
	} else {
		set, err := loadSet(p.Name)
		if err != nil {
			return err
		}
		text.WriteString(set.TOML())
	}
	return deliver(c, p.Output, []byte(text.String()))
}
