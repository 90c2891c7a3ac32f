// Package agents knows the common reagents, acids, bases, solvents and catalysts by
// name, by the usual abbreviation and by structure, and what each does in a step.
//
// The roles are facts of the trade (common practice, no source); an agent that is not
// in the table is returned without a role, never guessed at.
package agents
