package symmetry

import (
	"errors"
	"testing"

	"lobecast/frontier/molecule"
)

// Whatever molecule is given, every process answers or refuses with a reason, keeps
// the formula, and never finds its derivations at odds.
func FuzzProcesses(f *testing.F) {
	for _, r := range []string{
		"C/C=C/C=C\\C=C/C", "C[C@H]1C=C[C@@H]1C", "C=CCOc1ccccc1", "C[CH+:1]C([O-])=[CH:2]C.o1[cH:3]cc[cH:4]1",
		"[NH2+](c1ccccc1)[NH2+]c1ccccc1", "CS(=O)CC=C", "O=C1C2C=CC1C=C2", "C=C=C=C", "[H][H].C=C", "c1ccc2ccccc2c1",
		"C=[N+]=[N-]", "[2H]C([2H])([2H])C=C", "O=S1(=O)CC=CC1", "CN1c2ccccc2C(C)(C)C12Oc1ccccc1C=C2",
	} {
		f.Add(r)
	}
	f.Fuzz(func(t *testing.T, s string) {
		if len(s) > 120 {
			return
		}
		m, err := molecule.ParseSMILES(s)
		if err != nil {
			return
		}
		for name, ask := range map[string]func() (*Answer, error){
			"closure":       func() (*Answer, error) { return Closure(m) },
			"opening":       func() (*Answer, error) { return Opening(m) },
			"[3,3]":         func() (*Answer, error) { return Shift(m, 3, 3) },
			"[2,3]":         func() (*Answer, error) { return Shift(m, 2, 3) },
			"[1,2]":         func() (*Answer, error) { return Shift(m, 1, 2) },
			"[1,5]":         func() (*Answer, error) { return Shift(m, 1, 5) },
			"extrusion":     func() (*Answer, error) { return Extrusion(m) },
			"retro-ene":     func() (*Answer, error) { return RetroEne(m) },
			"ene":           func() (*Answer, error) { return Ene(m, nil) },
			"cycloaddition": func() (*Answer, error) { return CycloadditionBetween(m, nil) },
			"with ethene":   func() (*Answer, error) { return CycloadditionBetween(m, mustRead(t, "C=C")) },
			"with SO2":      func() (*Answer, error) { return Cheletropic(m, mustRead(t, "O=S=O")) },
			"hydrogen":      func() (*Answer, error) { return Transfer(m, mustRead(t, "C=C")) },
		} {
			a, err := ask()
			if err != nil {
				var e *molecule.Error
				if errors.As(err, &e) {
					_ = e.Excerpt()
				}
				continue
			}
			for _, p := range a.Processes {
				if !p.Agree {
					t.Errorf("%s of %q, %s: %s", name, s, p.Mode, p.Agreement)
				}
				for _, q := range p.Products {
					if q.Molecule.Formula() != a.Joined.Formula() {
						t.Errorf("%s of %q: product %s is %s, the reactants %s", name, s, q.SMILES, q.Molecule.Formula(), a.Joined.Formula())
					}
				}
			}
		}
	})
}
