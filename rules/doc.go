// Package rules holds what the Hückel model cannot see and what a chemist is usually
// warned of: entries with a stable code, a trigger on structure, agents and kind of
// step, a reason, an example and a source.
//
// Group "outside" lists limits of the model; "override" entries name cases where
// practice goes another way than the orbitals say, and stand beside the ranking;
// "caution" lists the usual hazards. A caution is no safety assessment. Orbital
// symmetry has a package of its own, rules/symmetry; agents are in rules/agents.
package rules
