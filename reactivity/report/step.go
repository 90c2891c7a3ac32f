package report

// Step is one judged step of a route.
type Step struct {
	Number     int      `toml:"number"`
	Name       string   `toml:"name"`
	Line       int      `toml:"line,omitzero"` // line of the route file where the step begins
	Kind       string   `toml:"kind"`
	Event      string   `toml:"event,omitempty"`
	Standing   string   `toml:"standing"`
	Reason     string   `toml:"standing_reason,omitempty"`
	Call       string   `toml:"call,omitempty"`
	Reaction   string   `toml:"reaction,omitempty"`
	Substrate  string   `toml:"substrate,omitempty"`
	Product    string   `toml:"product,omitempty"`
	Incoming   string   `toml:"incoming,omitempty"`
	Agents     string   `toml:"agents,omitempty"`
	Read       []string `toml:"agents_read,omitempty"` // what each agent was taken for
	Medium     string   `toml:"medium,omitempty"`
	MediumFrom string   `toml:"medium_from,omitempty"`
	Activation string   `toml:"activation,omitempty"`
	Note       string   `toml:"note,omitempty"`
	Reading    string   `toml:"nearest_reading,omitempty"`
	Competing  []string `toml:"competing,omitempty"`
	Again      string   `toml:"second_time,omitempty"` // will it stop at one?
	WhatIf     []string `toml:"what_would_move_it,omitempty"`
	Warnings   []string `toml:"warnings,omitempty"`
	Aside      []Aside  `toml:"aside,omitempty"`
	Planned    *Planned `toml:"planned,omitempty"`

	Candidate []Candidate `toml:"candidate,omitempty"`
	Structure []Structure `toml:"structure,omitempty"`
	Pair      []Pair      `toml:"pair,omitempty"`
	Process   []Process   `toml:"process,omitempty"`
	Outside   []Remark    `toml:"outside,omitempty"`
	Caution   []Remark    `toml:"caution,omitempty"`
	Record    []Record    `toml:"record,omitempty"`
	Refused   []Refused   `toml:"refused,omitempty"`
}

// Planned is the intention of a step and how it fares.
type Planned struct {
	Atoms  []int       `toml:"atoms,omitempty"`
	Bonds  [][2]int    `toml:"bonds,omitempty"`
	Place  string      `toml:"place,omitempty"`
	Rank   int         `toml:"rank,omitzero"`
	Chance *float64    `toml:"chance,omitempty"`
	Limits *[2]float64 `toml:"chance_limits,omitempty"`
	Absent string      `toml:"chance_absent,omitempty"`
}

// Candidate is one row of a step's table: a place, its product, its chance.
type Candidate struct {
	Rank    int         `toml:"rank"`
	Place   string      `toml:"place"`
	Chance  *float64    `toml:"chance,omitempty"`
	Limits  *[2]float64 `toml:"chance_limits,omitempty"`
	Product string      `toml:"product"`
	Planned bool        `toml:"planned,omitempty"`
}
