// Package reading finds out what a written reaction is: which kind of step, which
// atom or which new bonds are intended, what comes in, and in what medium.
//
// It never trusts an atom map: the product is taken apart and compared, by canonical
// form, with the reactants. Salts, counter-ions and solvents are set aside first. A
// reaction that no event of the model explains is given the trade's nearest name.
package reading
