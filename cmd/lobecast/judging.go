package main

import (
	"fmt"

	"lobecast/frontier"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
)

// judgingOptions are shared by the commands that judge structures.
type judgingOptions struct {
	Toward     string   `enum:"electrophile,nucleophile,radical," default:"" placeholder:"WHAT" help:"Only attack by an electrophile, a nucleophile or a radical (default: all that apply)."`
	Incoming   string   `placeholder:"SMILES" help:"The group that comes in, a SMILES with one * where it binds: *Br, *[N+](=O)[O-], *C(C)=O."`
	Medium     string   `enum:"neutral,acidic,unknown" default:"unknown" help:"Acidity of the medium: neutral, acidic or unknown (default ${default})."`
	Twist      []string `sep:"none" placeholder:"ATOM-ATOM=DEGREES" help:"Twist about a bond between π atoms; may be repeated."`
	Parameters string   `placeholder:"NAME|FILE" help:"Parameter set by name, or a TOML file (default: calibrated)."`
}

// towards lists the kinds of attack to rank: the one asked for, or all by which the
// incoming group, where one is given, can come in.
func (o judgingOptions) towards(incoming *reactivity.Incoming) []terms.Toward {
	switch {
	case o.Toward != "":
		return []terms.Toward{terms.Toward(o.Toward)}
	case incoming != nil:
		return incoming.Towards()
	}
	return terms.Towards
}

func (o judgingOptions) twists() ([]frontier.Twist, error) {
	var twists []frontier.Twist
	for _, text := range o.Twist {
		t, err := frontier.ParseTwist(text)
		if err != nil {
			return nil, usageError{"--twist: " + err.Error()}
		}
		twists = append(twists, t)
	}
	return twists, nil
}

// conditions turns the flags into what the ranking takes.
func (o judgingOptions) conditions() (reactivity.Conditions, *reactivity.Incoming, error) {
	cond := reactivity.Conditions{Medium: terms.Medium(o.Medium)}
	set, err := loadSet(o.Parameters)
	if err != nil {
		return cond, nil, err
	}
	cond.Set = set
	if cond.Twists, err = o.twists(); err != nil {
		return cond, nil, err
	}
	var incoming *reactivity.Incoming
	if o.Incoming != "" {
		if incoming, err = reactivity.ParseIncoming(o.Incoming); err != nil {
			return cond, nil, usageError{fmt.Sprintf("--incoming: %v", err)}
		}
		cond.Incoming, cond.Nucleophile = incoming.Class, incoming.Nucleophile
	}
	return cond, incoming, nil
}

// loadSet loads a parameter set by name or from a file; empty is the default set.
func loadSet(name string) (*frontier.Set, error) {
	if name == "" {
		return reactivity.DefaultSet(), nil
	}
	for _, known := range frontier.Sets() {
		if known == name {
			return frontier.Load(name)
		}
	}
	set, err := frontier.Load(name)
	if err != nil {
		return nil, fileError{err}
	}
	return set, nil
}
