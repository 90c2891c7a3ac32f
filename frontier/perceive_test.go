package frontier

import (
	"errors"
	"math"
	"strings"
	"testing"

	"lobecast/frontier/molecule"
)

func TestRefusals(t *testing.T) {
	long := strings.Repeat("C=C", 600)
	for _, c := range []struct {
		name, smiles string
		cause        error
	}{
		{"alkane", "CCCCCC", ErrNoPi},
		{"cyclohexane", "C1CCCCC1", ErrNoPi},
		{"alcohol", "CCO", ErrNoPi},
		{"water", "O", ErrNoPi},
		{"alkyl cation", "C[C+](C)C", ErrNoPi},
		{"dimethyl sulfone", "CS(C)(=O)=O", ErrNoPi},
		{"amine oxide", "C[N+](C)(C)[O-]", ErrNoPi},
		{"phosphate", "COP(=O)(O)O", ErrNoPi},
		{"arylzinc", "c1ccccc1[Zn]Cl", ErrMetal},
		{"stannane", "C=C[Sn](C)(C)C", ErrMetal},
		{"aryllithium", "[Li]c1ccccc1", ErrMetal},
		{"polyene of 1200 atoms", long, ErrSize},
	} {
		_, err := Perceive(mustParse(t, c.smiles), Options{})
		if !errors.Is(err, c.cause) {
			t.Errorf("%s: %v, want %v", c.name, err, c.cause)
		}
		var r *Refusal
		if errors.As(err, &r) && (r.Reason == "" || r.Cause == ErrMetal && r.Atom < 0) {
			t.Errorf("%s: refusal without reason or place: %+v", c.name, r)
		}
	}
	if _, err := Perceive(mustParse(t, long), Options{Cap: 1200}); err != nil {
		t.Errorf("raised cap: %v", err)
	}
	if _, err := Perceive(mustParse(t, "c1ccccc1C(=O)[O-].[Na+]"), Options{}); err != nil {
		t.Errorf("a free metal ion beside the structure: %v", err)
	}
}

// k = k₀ cos θ: at 90° biphenyl is two benzenes, in between the link's k follows.
func TestTwist(t *testing.T) {
	set := mustLoad(t, DefaultSet)
	m := mustParse(t, "c1ccccc1-c1ccccc1")
	solve := func(degrees float64) *Orbitals {
		pi, err := Perceive(m, Options{Twists: []Twist{{A: 7, B: 6, Degrees: degrees}}})
		if err != nil {
			t.Fatal(err)
		}
		sol, err := set.Solve(pi)
		if err != nil {
			t.Fatal(err)
		}
		return sol.Systems[0]
	}
	if e := solve(90).Energy; !near(e, 16) {
		t.Errorf("biphenyl at 90°: energy %g, want 16", e)
	}
	if e := solve(0).Energy; math.Abs(e-16.383) > printTolerance { // Coulson and Streitwieser 1965, from memory
		t.Errorf("planar biphenyl: energy %g", e)
	}
	if o := solve(60); !near(o.H[5*12+6], 0.5) {
		t.Errorf("k at 60° is %g", o.H[5*12+6])
	}
	for _, bad := range []Twist{{A: 1, B: 3, Degrees: 30}, {A: 6, B: 40, Degrees: 30}, {A: 6, B: 7, Degrees: math.NaN()}} {
		if _, err := Perceive(m, Options{Twists: []Twist{bad}}); err == nil {
			t.Errorf("twist %+v was taken", bad)
		}
	}
}

// Which biaryls and styrenes are warned about (common practice, no source).
func TestTwistWarnings(t *testing.T) {
	for smiles, want := range map[string]bool{
		"c1ccccc1-c1ccccc1":              false,
		"Cc1ccccc1-c1ccccc1":             false,
		"Cc1cccc(C)c1-c1ccccc1":          true,
		"Cc1ccccc1-c1ccccc1C":            false,
		"Cc1cccc(C)c1-c1ccccc1C":         true,
		"c1ccc2c(c1)ccc(C)c2-c1ccccc1":   true,
		"Cc1cccc(C)c1C=C":                false,
		"Cc1cccc(C)c1C(C)=C":             true,
		"C=Cc1ccccc1":                    false,
		"c1ccc2c(c1)ccc1ccccc12":         false,
		"CC1=C(C)C(C)=C(C)C1=C1CCCC1":    false,
		"Cc1cc(C)cc(C)c1-c1c(C)cc(C)cc1": true,
	} {
		pi := mustPerceive(t, smiles)
		if got := len(pi.Warnings) > 0; got != want {
			t.Errorf("%s: warnings %q", smiles, pi.Warnings)
		}
	}
	if pi := mustPerceive(t, "[CH2]c1ccccc1"); len(pi.Warnings) != 1 || !strings.Contains(pi.Warnings[0], "radical") {
		t.Errorf("benzyl radical: warnings %q", pi.Warnings)
	}
}

// The most basic nitrogen; sites are atom numbers. Textbook facts (common practice);
// aminopyridines take the proton on the ring, DBU-type amidines on the imine N.
func TestProtonated(t *testing.T) {
	for _, c := range []struct {
		name, smiles string
		site         int // 0: none
	}{
		{"pyridine", "n1ccccc1", 1},
		{"2-aminopyridine", "Nc1ccccn1", 7},
		{"3-aminopyridine", "Nc1cccnc1", 6},
		{"aniline", "Nc1ccccc1", 1},
		{"quinoline", "c1ccc2ncccc2c1", 5},
		{"imidazole", "c1c[nH]cn1", 5},
		{"1-methylpyrazole", "Cn1cccn1", 6},
		{"thiazole", "c1cscn1", 5},
		{"acetamidine", "CC(=N)N", 3},
		{"guanidine", "NC(=N)N", 3},
		{"DBU", "C1CCC2=NCCCN2CC1", 5},
		{"nicotine", "CN1CCCC1c1cccnc1", 2},
		{"4-(aminomethyl)aniline", "NCc1ccc(N)cc1", 1},
		{"indole", "c1ccc2[nH]ccc2c1", 0},
		{"acetanilide", "CC(=O)Nc1ccccc1", 0},
		{"nitrobenzene", "O=[N+]([O-])c1ccccc1", 0},
		{"benzonitrile", "N#Cc1ccccc1", 0},
		{"toluenesulfonamide", "Cc1ccc(cc1)S(N)(=O)=O", 0},
		{"dimethylaminopyridine", "CN(C)c1ccncc1", 7},
		{"imidazole before pyridine", "Cn1ccnc1-c1cccnc1", 5},
		{"pyridinium already", "[nH+]1ccccc1", 0},
		{"anilinium already", "[NH3+]c1ccccc1", 0},
		{"toluene", "Cc1ccccc1", 0},
	} {
		m, err := molecule.ParseSMILES(c.smiles)
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		p, site, ok := Protonated(m)
		if ok != (c.site > 0) || ok && site != c.site-1 {
			t.Errorf("%s: site %d (%t), want atom %d", c.name, site+1, ok, c.site)
			continue
		}
		if !ok {
			continue
		}
		if p.Atoms[site].Charge != m.Atoms[site].Charge+1 || p.Atoms[site].Hydrogens != m.Atoms[site].Hydrogens+1 || len(p.Atoms) != len(m.Atoms) {
			t.Errorf("%s: protonated to %s", c.name, p.SMILES())
		}
		if m.Atoms[site].Charge != 0 {
			t.Errorf("%s: the original was changed", c.name)
		}
	}
}

// The same nitrogen whatever the numbering.
func TestProtonatedRenumbered(t *testing.T) {
	for _, smiles := range []string{"Cc1ccnc2ncccc12", "c1cnc2nccnc2n1", "Nc1ncc(Cl)c(N)n1", "CC(N)CCCN", "Cc1ncc[nH]1", "c1nc2ccccc2n1C"} {
		m := mustParse(t, smiles)
		p, _, ok := Protonated(m)
		n := len(m.Atoms)
		perm := make([]int, n)
		for i := range perm {
			perm[i] = n - 1 - i
		}
		q, _, ok2 := Protonated(m.Renumber(perm))
		if ok != ok2 || ok && p.SMILES() != q.SMILES() {
			t.Errorf("%s: %s or, renumbered, %s", smiles, p.SMILES(), q.SMILES())
		}
	}
}

func TestTautomers(t *testing.T) {
	for _, c := range []struct {
		name, smiles string
		want         []string // canonical SMILES in any order
	}{
		{"imidazole", "Cc1c[nH]cn1", []string{"Cc1c[nH]cn1", "Cc1cnc[nH]1"}},
		{"pyrazole", "Cc1cc[nH]n1", []string{"Cc1cc[nH]n1", "Cc1ccn[nH]1"}},
		{"1,2,4-triazole", "c1n[nH]cn1", []string{"c1n[nH]cn1", "c1nnc[nH]1"}},
		{"tetrazole", "Cc1nn[nH]n1", []string{"Cc1nn[nH]n1", "Cc1nnn[nH]1"}},
		{"benzimidazole", "Cc1ccc2[nH]cnc2c1", []string{"Cc1ccc2[nH]cnc2c1", "Cc1ccc2nc[nH]c2c1"}},
		{"indazole keeps its benzene ring", "c1ccc2[nH]ncc2c1", []string{"c1ccc2[nH]ncc2c1"}},
		{"benzotriazole", "Cc1ccc2[nH]nnc2c1", []string{"Cc1ccc2[nH]nnc2c1", "Cc1ccc2nn[nH]c2c1"}},
		{"purine", "c1ncc2[nH]cnc2n1", []string{"c1ncc2[nH]cnc2n1", "c1ncc2nc[nH]c2n1"}},
		{"pyrrole", "c1cc[nH]c1", []string{"c1cc[nH]c1"}},
		{"N-methylimidazole", "Cn1ccnc1", []string{"Cn1ccnc1"}},
		{"aniline", "Nc1ccccc1", []string{"Nc1ccccc1"}},
		{"two rings", "Cc1cc(-c2c[nH]cn2)[nH]n1", []string{"Cc1cc(-c2c[nH]cn2)[nH]n1", "Cc1cc(-c2c[nH]cn2)n[nH]1", "Cc1cc(-c2cnc[nH]2)[nH]n1", "Cc1cc(-c2cnc[nH]2)n[nH]1"}},
	} {
		m := mustParse(t, c.smiles)
		got := map[string]bool{}
		for i, x := range Tautomers(m) {
			if i == 0 && x != m {
				t.Errorf("%s: the molecule itself does not come first", c.name)
			}
			if x.Formula() != m.Formula() || len(x.Atoms) != len(m.Atoms) {
				t.Errorf("%s: %s has another formula", c.name, x.SMILES())
			}
			got[x.SMILES()] = true
		}
		want := map[string]bool{}
		for _, s := range c.want {
			want[mustParse(t, s).SMILES()] = true
		}
		for s := range want {
			if !got[s] {
				t.Errorf("%s: %s is missing from %v", c.name, s, got)
			}
		}
		if len(got) != len(want) {
			t.Errorf("%s: %v, want %v", c.name, got, want)
		}
	}
}
