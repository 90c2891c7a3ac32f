package frontier

// ClassInfo describes one class of centre.
type ClassInfo struct {
	Class Class
	// Parent is the class whose h and k stand in where a set gives none of its own;
	// equal to Class for the roots. Links between two heteroatoms always take the k of
	// the two roots.
	Parent Class
	// About says which atoms belong to it.
	About string
}

// classes lists every class, roots first within each family. The order is that of
// parameter vectors and of printed sets: append only.
var classes = []ClassInfo{
	{"C", "C", "carbon, one orbital of the π system"},
	{"alkyl", "alkyl", "hyperconjugating alkyl group on a π carbon (2 electrons, heteroatom model)"},
	{"alkyl methyl", "alkyl", "CH3"},
	{"alkyl primary", "alkyl", "CH2R"},
	{"alkyl secondary", "alkyl", "CHR2"},
	{"alkyl tertiary", "alkyl", "CR3"},
	{"alkyl hetero", "alkyl", "sp3 carbon that bears N, O, S, P or one halogen"},
	{"B", "B", "trivalent boron on a π atom (0 electrons)"},

	{"N1", "N1", "N that brings one electron: imine, azine, azo"},
	{"N1 azine", "N1", "in a six-membered ring of π atoms: pyridine, pyrimidine"},
	{"N1 azole", "N1", "in a five-membered ring of π atoms: N-3 of imidazole, N-2 of pyrazole"},
	{"N1 imine", "N1", "C=N–C or C=N–H"},
	{"N1 oxime", "N1", "C=N–O or C=N–N: oxime, hydrazone"},
	{"N1 azo", "N1", "N=N outside such rings"},
	{"N1 nitroso", "N1", "N=O"},
	{"N1 nitrile", "N1", "C≡N"},
	{"N1 diazonium", "N1", "outer N of N2+"},

	{"N2", "N2", "N that brings a lone pair"},
	{"N2 amine", "N2", "amine N on one π atom"},
	{"N2 diarylamine", "N2", "amine N on two or three π atoms"},
	{"N2 amide", "N2", "N–C=O or N–C=S of an amide"},
	{"N2 carbamate", "N2", "N–C(=O)O"},
	{"N2 urea", "N2", "N–C(=O)N"},
	{"N2 imide", "N2", "N with two acyl groups"},
	{"N2 amidine", "N2", "N–C=N outside rings of π atoms, where the C carries no O"},
	{"N2 sulfonamide", "N2", "N on S(VI), S(IV) or P(V)"},
	{"N2 hydrazine", "N2", "N on another N or O: hydrazine, hydrazone, hydroxylamine"},
	{"N2 pyrrole", "N2", "in a five-membered ring of π atoms: pyrrole, indole, N-1 of imidazole"},
	{"N2 acylpyrrole", "N2", "the same with an acyl or sulfonyl group on it"},
	{"N2 pyridone", "N2", "in a ring of π atoms that holds a C=O: pyridone, pyrimidinone"},

	{"N+", "N+", "three-coordinate N with a positive charge (1 electron)"},
	{"N+ azinium", "N+", "in a ring of π atoms: pyridinium, N-alkyl azolium"},
	{"N+ iminium", "N+", "C=N+ outside such rings"},
	{"N+ nitro", "N+", "N of NO2"},
	{"N+ oxide", "N+", "N of an N-oxide or nitrone"},
	{"N+ dipole", "N+", "linear N of azide, diazo, diazonium, nitrile oxide, nitrilium, isocyanide"},
	{"N amidinium", "N+", "N that shares a positive charge with like N: amidinium, imidazolium, cyanine"},

	{"N-", "N-", "two-coordinate N with a negative charge"},
	{"N- azolide", "N-", "in a five-membered ring of π atoms"},
	{"N- dipole", "N-", "negative end of azide, diazo, nitrile imine, azomethine imine"},

	{"O1", "O1", "O that brings one electron"},
	{"O1 aldehyde", "O1", "HC=O"},
	{"O1 ketone", "O1", "C–C(=O)–C"},
	{"O1 ring", "O1", "C=O of a carbon in a ring of π atoms: quinone, pyridone, pyrone"},
	{"O1 ester", "O1", "C(=O)OR, carbonate, anhydride"},
	{"O1 acid", "O1", "C(=O)OH"},
	{"O1 amide", "O1", "C(=O)N: amide, carbamate, urea"},
	{"O1 acyl halide", "O1", "C(=O)X"},
	{"O1 nitroso", "O1", "N=O"},
	{"O1 cumulene", "O1", "C=O of ketene and isocyanate"},

	{"O2", "O2", "O that brings a lone pair"},
	{"O2 hydroxy", "O2", "OH of phenol and enol"},
	{"O2 ether", "O2", "OR on one π atom"},
	{"O2 diaryl ether", "O2", "O between two π atoms, neither of them acyl"},
	{"O2 ester", "O2", "acyl O–R, R not a π atom"},
	{"O2 aryl ester", "O2", "acyl O–Ar, anhydride"},
	{"O2 acid", "O2", "OH of a carboxylic acid"},
	{"O2 furan", "O2", "in a five-membered ring of π atoms"},
	{"O2 pyran", "O2", "in a six-membered ring of π atoms"},
	{"O2 oxime", "O2", "O on N"},
	{"O2 boron", "O2", "O on B"},
	{"O2 sulfonate", "O2", "O on S(VI) or P(V)"},

	{"O+", "O+", "two-coordinate O with a positive charge: pyrylium, oxocarbenium"},
	{"O-", "O-", "one-coordinate O with a negative charge"},
	{"O- phenolate", "O-", "on C: phenolate, enolate"},
	{"O- oxide", "O-", "on N: N-oxide, nitrone"},
	{"O carboxylate", "O-", "on C, sharing a negative charge with like O"},
	{"O nitro", "O-", "on N, sharing a negative charge with like O"},

	{"F", "F", "fluorine"},
	{"Cl", "Cl", "chlorine"},
	{"Br", "Br", "bromine"},
	{"I", "I", "iodine"},
	{"Si", "Si", "three-coordinate silicon (1 electron)"},
	{"P1", "P1", "P that brings one electron"},
	{"P2", "P2", "P that brings a lone pair"},
	{"S1", "S1", "S that brings one electron: C=S"},
	{"S2", "S2", "S that brings a lone pair"},
	{"S2 thioether", "S2", "SH or SR on a π atom"},
	{"S2 thioester", "S2", "S on an acyl group"},
	{"S2 thiophene", "S2", "in a ring of π atoms"},
	{"S+", "S+", "two-coordinate S with a positive charge: thiopyrylium"},
	{"S-", "S-", "one-coordinate S with a negative charge"},
	{"Se1", "Se1", "Se or Te that brings one electron"},
	{"Se2", "Se2", "Se or Te that brings a lone pair"},
}

// inductives are the causes of a shift of h on a π carbon: groups without an orbital
// of the π system, then π heteroatoms by root class, whose auxiliary shift is zero
// in the published sets but is a parameter like any other.
var inductives = []struct{ Name, About string }{
	{"alkyl", "an alkyl group (inductive model of the methyl group)"},
	{"CX3", "a carbon with two or three halogens: CF3, CHF2, CCl3"},
	{"CH2X", "an sp3 carbon with N, O, S, P or one halogen"},
	{"CH2Z+", "an sp3 carbon with a positively charged atom: CH2NR3+"},
	{"NR3+", "an ammonium N"},
	{"SO", "S of a sulfoxide or sulfinyl group"},
	{"SO2", "S of a sulfone, sulfonamide, sulfonate"},
	{"SR2+", "a sulfonium S"},
	{"SF5", "S with five or more ligands"},
	{"PO", "P(V) with oxygen or sulfur on it"},
	{"PR3+", "a phosphonium P"},
	{"SiR3", "a four-coordinate Si or Ge"},
	{"IR", "a hypervalent or onium halogen"},
	{"B", "a π boron"},
	{"N1", "a π N of one electron"},
	{"N2", "a π N of two electrons"},
	{"N+", "a π N with a positive charge"},
	{"N-", "a π N with a negative charge"},
	{"O1", "a π O of one electron"},
	{"O2", "a π O of two electrons"},
	{"O+", "a π O with a positive charge"},
	{"O-", "a π O with a negative charge"},
	{"F", "fluorine"}, {"Cl", "chlorine"}, {"Br", "bromine"}, {"I", "iodine"},
	{"Si", "a π Si"}, {"P1", "a π P of one electron"}, {"P2", "a π P of two electrons"},
	{"S1", "a π S of one electron"}, {"S2", "a π S of two electrons"},
	{"S+", "a π S with a positive charge"}, {"S-", "a π S with a negative charge"},
	{"Se1", "a π Se or Te of one electron"}, {"Se2", "a π Se or Te of two electrons"},
}
