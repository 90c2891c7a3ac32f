package review

import _ "embed"

// Template is a route file to fill in, with every key explained.
//
//go:embed template.toml
var Template string
