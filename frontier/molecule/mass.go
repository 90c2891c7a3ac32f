package molecule

// commonMasses are the integers nearest to the standard atomic weights (IUPAC; for
// elements without one, the mass number of a long-lived isotope), by atomic number.
// The mass difference column of a V2000 atom line counts from these.
var commonMasses = [...]int16{
	0,
	1, 4, 7, 9, 11, 12, 14, 16, 19, 20, // H to Ne
	23, 24, 27, 28, 31, 32, 35, 40, 39, 40, // Na to Ca
	45, 48, 51, 52, 55, 56, 59, 59, 64, 65, // Sc to Zn
	70, 73, 75, 79, 80, 84, 85, 88, 89, 91, // Ga to Zr
	93, 96, 98, 101, 103, 106, 108, 112, 115, 119, // Nb to Sn
	122, 128, 127, 131, 133, 137, 139, 140, 141, 144, // Sb to Nd
	145, 150, 152, 157, 159, 163, 165, 167, 169, 173, // Pm to Yb
	175, 178, 181, 184, 186, 190, 192, 195, 197, 201, // Lu to Hg
	204, 207, 209, 209, 210, 222, 223, 226, 227, 232, // Tl to Th
	231, 238, 237, 244, 243, 247, 247, 251, 252, 257, // Pa to Fm
	258, 259, 262, 267, 268, 269, 270, 269, 278, 281, // Md to Ds
	281, 285, 284, 289, 288, 293, 292, 294, // Rg to Og
}

func commonMass(z int) int {
	if z < 0 || z >= len(commonMasses) {
		return 0
	}
	return int(commonMasses[z])
}
