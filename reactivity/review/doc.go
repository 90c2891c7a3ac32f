// Package review judges a whole route: it reads the route file, lets every step be
// read and ranked, compares the intention with the ranking, and puts the steps in
// order of risk.
//
// A step that cannot be judged is listed with the reason, never dropped; a step that
// is refused leaves the others judged.
package review
