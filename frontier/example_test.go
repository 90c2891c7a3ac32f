package frontier_test

import (
	"errors"
	"fmt"
	"log"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
)

func ExampleSolve() {
	// The matrix of butadiene, in units of β relative to α.
	h := []float64{
		0, 1, 0, 0,
		1, 0, 1, 0,
		0, 1, 0, 1,
		0, 0, 1, 0,
	}
	o, err := frontier.Solve(4, h, 4)
	if err != nil {
		log.Fatal(err)
	}
	fmt.Printf("levels %.3f\n", o.X)
	fmt.Printf("E = 4α + %.3fβ\n", o.Energy)
	fmt.Printf("bond orders %.3f %.3f %.3f\n", o.BondOrder(0, 1), o.BondOrder(1, 2), o.BondOrder(2, 3))
	// Output:
	// levels [1.618 0.618 -0.618 -1.618]
	// E = 4α + 4.472β
	// bond orders 0.894 0.447 0.894
}

func ExamplePerceive() {
	m, err := molecule.ParseSMILES("CC(=O)Nc1ccc(cc1)[N+](=O)[O-]")
	if err != nil {
		log.Fatal(err)
	}
	pi, err := frontier.Perceive(m, frontier.Options{})
	if err != nil {
		log.Fatal(err)
	}
	fmt.Printf("%d π atoms, %g π electrons\n", pi.Atoms(), pi.Electrons())
	for _, c := range pi.Centres {
		if c.Class != "C" {
			fmt.Printf("atom %d: %s, %g electrons\n", m.Atoms[c.Atom].Number, c.Class, c.Electrons)
		}
	}
	// Output:
	// 12 π atoms, 14 π electrons
	// atom 3: O1 amide, 1 electrons
	// atom 4: N2 amide, 2 electrons
	// atom 11: N+ nitro, 1 electrons
	// atom 12: O nitro, 1.5 electrons
	// atom 13: O nitro, 1.5 electrons
	// atom 1: alkyl methyl, 2 electrons
}

func ExamplePerceive_refusal() {
	m, err := molecule.ParseSMILES("CCCC")
	if err != nil {
		log.Fatal(err)
	}
	_, err = frontier.Perceive(m, frontier.Options{})
	fmt.Println(errors.Is(err, frontier.ErrNoPi))
	fmt.Println(err)
	// Output:
	// true
	// the structure has no π system: no double or triple bond and no aromatic ring; Hückel theory says nothing about saturated structures
}

func ExampleSet_Solve() {
	m, err := molecule.ParseSMILES("n1ccccc1")
	if err != nil {
		log.Fatal(err)
	}
	set, err := frontier.Load("streitwieser-1961")
	if err != nil {
		log.Fatal(err)
	}
	pi, err := frontier.Perceive(m, frontier.Options{})
	if err != nil {
		log.Fatal(err)
	}
	sol, err := set.Solve(pi)
	if err != nil {
		log.Fatal(err)
	}
	fmt.Printf("populations %.3f\n", sol.Systems[0].Populations())
	fmt.Println("borrowed:", sol.Borrowed())
	// Output:
	// populations [1.195 0.923 1.004 0.950 1.004 0.923]
	// borrowed: []
}

func ExampleParseSet() {
	_, err := frontier.ParseSet("name = \"mine\"\n[h]\nN1 = 0.5\nQ2 = 1.0\n")
	fmt.Println(err)
	// Output:
	// line 4, column 1: no parameter is called "Q2" in [h]; did you mean "N2"
}

func ExampleProtonated() {
	m, err := molecule.ParseSMILES("Nc1ccncc1")
	if err != nil {
		log.Fatal(err)
	}
	cation, site, ok := frontier.Protonated(m)
	fmt.Println(ok, "atom", m.Atoms[site].Number, cation.Formula())
	// Output:
	// true atom 5 C5H7N2+
}

func ExampleTautomers() {
	m, err := molecule.ParseSMILES("Cc1cc[nH]n1")
	if err != nil {
		log.Fatal(err)
	}
	for _, t := range frontier.Tautomers(m) {
		fmt.Println(t.SMILES())
	}
	// Output:
	// Cc1cc[nH]n1
	// Cc1ccn[nH]1
}
