package reactivity_test

import (
	"fmt"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/reactivity"
)

// The three localization energies and the frontier densities of naphthalene's two kinds
// of position.
func ExampleLocalizationEnergies() {
	m, err := molecule.ParseSMILES("c1ccc2ccccc2c1")
	if err != nil {
		fmt.Println(err)
		return
	}
	pi, err := frontier.Perceive(m, frontier.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	set, err := frontier.Load("van-catledge-1980")
	if err != nil {
		fmt.Println(err)
		return
	}
	solution, err := set.Solve(pi)
	if err != nil {
		fmt.Println(err)
		return
	}
	o := solution.Systems[0]
	l, err := reactivity.LocalizationEnergies(o)
	if err != nil {
		fmt.Println(err)
		return
	}
	f, n := reactivity.FrontierDensities(o), reactivity.ReactivityNumbers(o)
	for _, site := range []struct {
		name string
		atom int
	}{{"C-1", 2}, {"C-2", 1}} {
		fmt.Printf("%s: L %.4f, frontier density %.4f, reactivity number %.4f\n",
			site.name, l.Electrophile[site.atom], f.Electrophile[site.atom], n[site.atom])
	}
	// Output:
	// C-1: L 2.2986, frontier density 0.3618, reactivity number 1.8091
	// C-2: L 2.4797, frontier density 0.1382, reactivity number 2.1213
}

// Butadiene and acrolein: the first bond joins the diene's end to the β-carbon, and the
// frontier orbitals say which way the electrons go.
func ExampleApproach() {
	diene, err := frontier.Solve(4, []float64{
		0, 1, 0, 0,
		1, 0, 1, 0,
		0, 1, 0, 1,
		0, 0, 1, 0}, 4)
	if err != nil {
		fmt.Println(err)
		return
	}
	// C=C–C=O with h = 1, k = 1 for O (A. Streitwieser, Molecular Orbital Theory for
	// Organic Chemists, Wiley 1961).
	acrolein, err := frontier.Solve(4, []float64{
		0, 1, 0, 0,
		1, 0, 1, 0,
		0, 1, 0, 1,
		0, 0, 1, 1}, 4)
	if err != nil {
		fmt.Println(err)
		return
	}
	var a, b reactivity.Workspace
	if err := a.Reset(diene); err != nil {
		fmt.Println(err)
		return
	}
	if err := b.Reset(acrolein); err != nil {
		fmt.Println(err)
		return
	}
	pair := reactivity.NewApproach(&a, &b)
	beta, err := pair.FirstBond(0, 0)
	if err != nil {
		fmt.Println(err)
		return
	}
	alpha, err := pair.FirstBond(0, 1)
	if err != nil {
		fmt.Println(err)
		return
	}
	gives, takes := pair.FrontierGaps()
	fmt.Printf("first bond to the β-carbon %.4f, to the α-carbon %.4f\n", beta, alpha)
	fmt.Printf("gap: diene gives %.4f, diene takes %.4f\n", gives, takes)
	// Output:
	// first bond to the β-carbon 2.9085, to the α-carbon 4.1664
	// gap: diene gives 0.9653, diene takes 1.6180
}
