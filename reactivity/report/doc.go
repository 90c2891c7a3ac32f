// Package report holds the report that every command writes: its types, key by key,
// and their TOML form. docs/report.md documents each key with its unit and meaning.
//
// Values that cannot be given are absent, and KEY_absent says why; an unreliable
// value carries KEY_note. Energies are in |β| relative to α unless said otherwise.
// Floats are rounded to four decimals on the way in (see [Num]), so that the same
// computation prints the same bytes on every processor architecture.
package report
