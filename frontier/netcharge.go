package frontier

// Charge is the π charge of a centre of the given population: of carbon 1 − q, its net
// charge in ions and ylides as well; of other atoms, whose σ frame may bear a formal
// charge, what they bring less q. In electrons.
func (pi *Pi) Charge(centre int, population float64) float64 {
	c := &pi.Centres[centre]
	if !c.Alkyl && pi.Molecule.Atoms[c.Atom].Element == 6 {
		return 1 - population
	}
	return c.Electrons - population
}
