package frontier

import "errors"

// The reasons for which a structure is refused; test with errors.Is.
var (
	ErrNoPi  = errors.New("the structure has no π system")
	ErrMetal = errors.New("a metal is bonded to the structure")
	ErrSize  = errors.New("the π system is too large")
)

// Refusal says why a structure cannot be treated, and at which atom.
type Refusal struct {
	Cause  error  // one of ErrNoPi, ErrMetal, ErrSize
	Atom   int    // index into Molecule.Atoms, -1 where no single atom is the reason
	Reason string // lower case, no final stop
	Remedy string
}

// Error gives reason and remedy in one line.
func (r *Refusal) Error() string {
	if r.Remedy == "" {
		return r.Reason
	}
	return r.Reason + "; " + r.Remedy
}

// Unwrap is the cause.
func (r *Refusal) Unwrap() error { return r.Cause }
