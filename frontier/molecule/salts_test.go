package molecule

import (
	"fmt"
	"strings"
	"testing"
)

// Names and limits of salts are common practice of the trade (no source); the
// structures behind them are the ordinary ones.
func TestSetAside(t *testing.T) {
	for _, c := range []struct{ smiles, main, aside string }{
		{"CCN.Cl", "CCN", "hydrochloride"},
		{"C[n+]1ccccc1.[I-]", "C[n+]1ccccc1", "iodide"},
		{"[Na+].Cc1ccc(O)cc1.[OH-]", "Cc1ccc(O)cc1", "sodium, hydroxide"},
		{"[K+].[K+].[O-]C(=O)[O-].Nc1ccccc1", "Nc1ccccc1", "potassium, potassium, carbonate"},
		{"NCc1ccccc1.OC(=O)C(F)(F)F", "NCc1ccccc1", "trifluoroacetic acid"},
		{"[NH3+]Cc1ccccc1.[O-]C(=O)C(F)(F)F", "[NH3+]Cc1ccccc1", "trifluoroacetate"},
		{"c1ccc2ccccc2c1.O.O.CCO", "c1ccc2ccccc2c1", "water, water, ethanol"},
		{"Nc1ccccc1.OC(=O)/C=C/C(=O)O", "Nc1ccccc1", "fumaric acid"},
		{"Nc1ccccc1.OC(=O)/C=C\\C(=O)O", "Nc1ccccc1", "maleic acid"},
		{"Nc1ccccc1.OC(=O)C=CC(=O)O", "Nc1ccccc1", "maleic or fumaric acid"},
		{"c1ccoc1.c1ccsc1", "c1ccoc1.c1ccsc1", ""},
		{"c1ccoc1.[Pd].Cl[Zn]Cl", "c1ccoc1", "Pd, Cl2Zn"},
		// Everything is on the list: the largest organic component stays.
		{"CC(=O)[O-].[Na+]", "CC(=O)[O-]", "sodium"},
		{"c1ccncc1.Cl", "c1ccncc1", "hydrochloride"},
		{"[Na+].[Cl-]", "[Na+]", "chloride"},
		{"O=S(=O)(O)O.C", "C", "sulfuric acid"},
		// A multiple bond without metal may be the reagent that matters.
		{"[Na+].[N-]=[N+]=[N-]", "[N-]=[N+]=[N-]", "sodium"},
		{"O=[O+][O-].C=C.ClCCl", "O=[O+][O-].C=C", "dichloromethane"},
		{"c1ccccc1", "c1ccccc1", ""},
	} {
		m, err := ParseSMILES(c.smiles)
		if err != nil {
			t.Fatal(err)
		}
		main, aside := SetAside(m)
		var names, mains []string
		total := 0
		for _, a := range aside {
			names = append(names, a.Name)
			total += len(a.Atoms)
		}
		for _, p := range main {
			mains = append(mains, p.SMILES())
			total += len(p.Atoms)
		}
		var want []string
		for _, s := range strings.Split(c.main, ".") {
			p, err := ParseSMILES(s)
			if err != nil {
				t.Fatal(err)
			}
			want = append(want, p.SMILES())
		}
		if got := strings.Join(names, ", "); got != c.aside || strings.Join(mains, ".") != strings.Join(want, ".") {
			t.Errorf("%s: main %s, aside %q; want %s, %q", c.smiles, strings.Join(mains, "."), got, c.main, c.aside)
		}
		if total != len(m.Atoms) {
			t.Errorf("%s: %d atoms of %d accounted for", c.smiles, total, len(m.Atoms))
		}
	}
}

// Every entry is found again under its own name, is legal, and occurs once.
func TestCompanionList(t *testing.T) {
	names := map[string]bool{}
	flat := map[string]string{}
	for _, c := range companions {
		m, err := ParseSMILES(c.smiles)
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if len(m.Atoms) > largestCompanion {
			t.Errorf("%s has %d atoms, more than the limit", c.name, len(m.Atoms))
		}
		if name, kind, ok := CompanionName(m); !ok || name != c.name || kind != c.kind {
			t.Errorf("%s (%s) is found as %q", c.name, c.smiles, name)
		}
		if other, twice := flat[m.FlatSMILES()]; twice {
			t.Errorf("%s and %s are one structure", c.name, other)
		}
		flat[m.FlatSMILES()] = c.name
		names[c.name] = true
	}
	if len(names) < 80 {
		t.Errorf("%d names, at least 80 wanted", len(names))
	}
}

func ExampleSetAside() {
	m, _ := ParseSMILES("[Na+].CC(=O)Oc1ccccc1C(=O)[O-].O")
	main, aside := SetAside(m)
	fmt.Println(main[0].Formula())
	for _, a := range aside {
		fmt.Println("set aside:", a.Name)
	}
	// Output:
	// C9H7O4-
	// set aside: sodium
	// set aside: water
}
