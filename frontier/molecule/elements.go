package molecule

// symbols lists the chemical symbols by atomic number; index 0 is the wildcard.
var symbols = [...]string{
	"*",
	"H", "He",
	"Li", "Be", "B", "C", "N", "O", "F", "Ne",
	"Na", "Mg", "Al", "Si", "P", "S", "Cl", "Ar",
	"K", "Ca", "Sc", "Ti", "V", "Cr", "Mn", "Fe", "Co", "Ni", "Cu", "Zn", "Ga", "Ge", "As", "Se", "Br", "Kr",
	"Rb", "Sr", "Y", "Zr", "Nb", "Mo", "Tc", "Ru", "Rh", "Pd", "Ag", "Cd", "In", "Sn", "Sb", "Te", "I", "Xe",
	"Cs", "Ba",
	"La", "Ce", "Pr", "Nd", "Pm", "Sm", "Eu", "Gd", "Tb", "Dy", "Ho", "Er", "Tm", "Yb", "Lu",
	"Hf", "Ta", "W", "Re", "Os", "Ir", "Pt", "Au", "Hg", "Tl", "Pb", "Bi", "Po", "At", "Rn",
	"Fr", "Ra",
	"Ac", "Th", "Pa", "U", "Np", "Pu", "Am", "Cm", "Bk", "Cf", "Es", "Fm", "Md", "No", "Lr",
	"Rf", "Db", "Sg", "Bh", "Hs", "Mt", "Ds", "Rg", "Cn", "Nh", "Fl", "Mc", "Lv", "Ts", "Og",
}

// numbers is the inverse of symbols, keyed by the two bytes of a symbol.
var numbers = func() (t [27 * 27]uint8) {
	for z, s := range symbols {
		if z > 0 {
			t[symbolKey(s)] = uint8(z)
		}
	}
	return t
}()

// symbolKey packs a symbol of one capital and at most one small letter.
func symbolKey(s string) int {
	k := int(s[0]-'A') * 27
	if len(s) == 2 {
		k += int(s[1]-'a') + 1
	}
	return k
}

// Symbol returns the chemical symbol of atomic number z, "*" for 0, and "?" when no
// such element is known.
func Symbol(z int) string {
	if z < 0 || z >= len(symbols) {
		return "?"
	}
	return symbols[z]
}

// Number returns the atomic number of a chemical symbol, written with a capital, or
// false. The wildcard "*" has the number 0.
func Number(symbol string) (int, bool) {
	if symbol == "*" {
		return 0, true
	}
	if len(symbol) == 0 || len(symbol) > 2 || symbol[0] < 'A' || symbol[0] > 'Z' ||
		len(symbol) == 2 && (symbol[1] < 'a' || symbol[1] > 'z') {
		return 0, false
	}
	z := int(numbers[symbolKey(symbol)])
	return z, z > 0
}

// IsMetal tells whether the element is counted among the metals. The metalloids B,
// Si, Ge, As, Sb, Te, At and all nonmetals are not; Po is.
func IsMetal(z int) bool {
	switch {
	case z <= 2, z >= 5 && z <= 10, z >= 14 && z <= 18, z >= 32 && z <= 36, z >= 51 && z <= 54,
		z == 85, z == 86, z == 118:
		return false
	}
	return z < len(symbols)
}

// mainGroupElectrons is the number of valence electrons of a nonmetal or metalloid,
// or -1 for a metal and for the wildcard, whose valence is not judged.
func mainGroupElectrons(z int) int {
	switch z {
	case 1:
		return 1
	case 2, 10, 18, 36, 54, 86, 118:
		return 8
	case 5:
		return 3
	case 6, 14, 32:
		return 4
	case 7, 15, 33, 51:
		return 5
	case 8, 16, 34, 52:
		return 6
	case 9, 17, 35, 53, 85:
		return 7
	}
	return -1
}

// elementNames spells out the elements that refusals speak of most.
var elementNames = map[int]string{
	1: "hydrogen", 2: "helium", 5: "boron", 6: "carbon", 7: "nitrogen", 8: "oxygen", 9: "fluorine", 10: "neon",
	14: "silicon", 15: "phosphorus", 16: "sulfur", 17: "chlorine", 18: "argon", 32: "germanium", 33: "arsenic",
	34: "selenium", 35: "bromine", 36: "krypton", 51: "antimony", 52: "tellurium", 53: "iodine", 54: "xenon",
}

// elementName is the name of an element, or its symbol where the name is rarely met.
func elementName(z int) string {
	if s, ok := elementNames[z]; ok {
		return s
	}
	return Symbol(z)
}
