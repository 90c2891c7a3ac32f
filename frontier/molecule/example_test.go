package molecule_test

import (
	"errors"
	"fmt"

	"lobecast/frontier/molecule"
)

func ExampleParseSMILES() {
	m, err := molecule.ParseSMILES("CN1C=NC2=C1C(=O)N(C)C(=O)N2C caffeine")
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(m.Name, m.Formula(), m.SMILES())
	for i, a := range m.Atoms[:3] {
		fmt.Println(a.Number, molecule.Symbol(a.Element), a.Hydrogens, a.Aromatic, m.Degree(i))
	}
	// Output:
	// caffeine C8H10N4O2 Cn1cnc2c1c(=O)n(C)c(=O)n2C
	// 1 C 3 false 1
	// 2 N 0 true 3
	// 3 C 1 true 2
}

func ExampleParseSMILES_refusal() {
	_, err := molecule.ParseSMILES("Cc1ccnc1")
	var e *molecule.Error
	if errors.As(err, &e) {
		fmt.Print(e.Excerpt())
		fmt.Println(e.Remedy)
	}
	// Output:
	// Cc1ccnc1
	//      ^
	// write [nH] for the nitrogen that carries hydrogen, or [n+] or [n-] for a charged one
}

func ExampleAllowWildcard() {
	m, err := molecule.ParseSMILES("*[N+](=O)[O-]", molecule.AllowWildcard)
	fmt.Println(m.SMILES(), err)
	// Output: *[N+](=O)[O-] <nil>
}

func ExampleMolecule_SMILES() {
	for _, s := range []string{"OC(=O)[C@H](C)N", "N[C@@H](C)C(=O)O", "N[C@H](C)C(=O)O"} {
		m, err := molecule.ParseSMILES(s)
		if err != nil {
			fmt.Println(err)
			return
		}
		fmt.Println(m.SMILES(), m.FlatSMILES())
	}
	// Output:
	// C[C@H](N)C(=O)O CC(N)C(=O)O
	// C[C@H](N)C(=O)O CC(N)C(=O)O
	// C[C@@H](N)C(=O)O CC(N)C(=O)O
}

func ExampleMolecule_Classes() {
	m, err := molecule.ParseSMILES("Cc1ccccc1")
	if err != nil {
		fmt.Println(err)
		return
	}
	// The two ortho positions, and the two meta positions, are equivalent.
	fmt.Println(m.Classes())
	// Output: [0 1 2 3 4 3 2]
}

func ExampleMolecule_Rings() {
	m, err := molecule.ParseSMILES("C1CC1c1ccc2cccc2cc1")
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, ring := range m.Rings() {
		fmt.Println(len(ring), ring)
	}
	fmt.Println(m.RingSystems())
	// Output:
	// 3 [0 1 2]
	// 5 [6 7 8 9 10]
	// 7 [3 4 5 6 10 11 12]
	// [[0 1 2] [3 4 5 6 7 8 9 10 11 12]]
}

func ExampleMolecule_Split() {
	m, err := molecule.ParseSMILES("CC(=O)[O-].[Na+]")
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, part := range m.Split() {
		fmt.Println(part.Formula(), part.Atoms[0].Number)
	}
	// Output:
	// C2H3O2- 1
	// Na+ 5
}
