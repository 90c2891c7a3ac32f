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
