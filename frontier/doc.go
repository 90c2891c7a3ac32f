// Package frontier makes the Hückel model of a molecule: its π systems, a matrix for
// each from a parameter set, the orbitals, and what follows from them.
//
// It takes a [molecule.Molecule] and knows nothing of events, ranking or reports. The
// indices of attack that are built on it stand in package reactivity.
//
// # From structure to π system
//
// [Perceive] gives the [Pi] of a molecule (perceive.go). Notations of one structure are
// brought to one form (notation.go); each atom gets its p orbitals with the electrons
// they hold (porbital.go), a linear one two of them (linear.go); formal charges go to
// where they are most stable and are shared between equivalent places (charge.go). What
// is left are centres with a [Class] (class.go, classify.go), links (linkkind.go), alkyl
// groups and inductive shifts (alkyl.go), gathered into separate systems (assemble.go).
// Twists that the user states weaken links (twist.go, twistnotation.go). A structure that
// the model does not cover is a [Refusal].
//
// Which species is looked at is asked before: [Tautomers] gives the fast NH tautomers,
// [Protonated] what an acidic medium makes (tautomer.go, protonate.go).
//
// # From π system to orbitals
//
// A [Set] holds a value with its source for every [Parameter] (set.go, parameter.go,
// sets/*.toml). [Set.Matrix] turns a system into its [Matrix], each element a sum of
// parameters with weights (matrix.go). [Solve] diagonalizes it and fills the levels, which
// gives [Orbitals] (solve.go, orbitals.go); [Set.Solve] does so for all systems of a
// molecule. [PiEnergy] is the energy alone, at less cost (energy.go).
//
// # From orbitals to numbers
//
// Populations, bond orders and free valences are in density.go, polarizabilities in
// polarizability.go, charges in netcharge.go.
//
// Energies are E = α + xβ with β < 0: a larger x is more bonding. A degenerate level is
// treated as a whole, never one vector of it.
package frontier
