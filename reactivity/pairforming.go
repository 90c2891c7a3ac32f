package reactivity

// formingDistance is the length of the forming bonds, in ångström, at which their
// resonance integrals are compared: that of K. N. Houk, J. Sims, R. E. Duke, R. W.
// Strozier, J. K. George, J. Am. Chem. Soc. 1973, 95, 7287 (the value from memory).
const formingDistance = 2.75

// formingRatio is β of a forming σ bond relative to that of a C–C bond at the same
// distance. β is taken proportional to the overlap of the two 2p orbitals pointing at
// each other (R. S. Mulliken, C. A. Rieke, D. Orloff, H. Orloff, J. Chem. Phys. 1949,
// 17, 1248), with the exponents of J. C. Slater, Phys. Rev. 1930, 36, 57 (C 1.625,
// N 1.95, O 2.275): the contracted orbitals of N and O reach less far, so that their
// bonds begin to form later. Nothing here is fitted; the values are recomputed in the
// tests.
var formingRatio = map[[2]int]float64{
	{6, 6}: 1,
	{6, 7}: 0.6373,
	{6, 8}: 0.4147,
	{7, 7}: 0.3782,
	{7, 8}: 0.2288,
	{8, 8}: 0.1278,
}

// formingK is the resonance integral, in β of a forming C–C bond, of the bond that
// forms between two elements. Elements of later periods, whose orbitals reach farther
// and whose bonds are longer, are given that of carbon.
func formingK(a, b int) float64 {
	period := func(z int) int {
		if z == 7 || z == 8 {
			return z
		}
		return 6
	}
	a, b = period(a), period(b)
	if a > b {
		a, b = b, a
	}
	return formingRatio[[2]int{a, b}]
}
