package reactivity

import (
	"math"
	"testing"
	"time"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// FuzzJudge: every structure that can be read is ranked or refused, in bounded time; ranks
// rise from 1, chances are probabilities that sum to no more than one and lie within their
// limits, and no reported index is infinite.
func FuzzJudge(f *testing.F) {
	for i, s := range []string{
		"c1ccc2ccccc2c1", "COc1ccc2[nH]ccc2c1", "Nc1ccccc1", "O=[N+]([O-])c1ccc(F)cc1", "Clc1ccncn1",
		"C=CC(=O)C", "CC(=O)C=CC=C", "N#CC=C", "C1=CCCC1N", "c1ccc2[nH]c3ccccc3c2c1", "C[n+]1ccccc1",
		"c1cnc2[nH]ccc2c1", "Brc1nc2ccccc2s1", "COC=CC=C", "O=C1C=CC(=O)C=C1", "[CH2]C=C", "[O-]c1ccccc1",
	} {
		f.Add(s, uint8(i))
	}
	media := []terms.Medium{"", terms.Neutral, terms.Acidic, terms.UnknownMedium}
	f.Fuzz(func(t *testing.T, text string, choice uint8) {
		if len(text) > 120 {
			return
		}
		m, err := molecule.ParseSMILES(text)
		if err != nil {
			return
		}
		parts, _ := molecule.SetAside(m)
		c := Conditions{Medium: media[choice%4], NoLimits: choice&4 != 0, Terse: choice&8 != 0}
		began := time.Now()
		j, err := Judge(parts[0], c, nil)
		if d := time.Since(began); d > 4*time.Second {
			t.Fatalf("%q took %v", text, d)
		}
		if err != nil {
			if err.Error() == "" {
				t.Errorf("%q: a refusal without a word", text)
			}
			return
		}
		for _, a := range j.Attacks {
			sum := 0.0
			for k, s := range a.Sites {
				if s.Rank < 1 || s.Rank > k+1 || len(s.Atoms) == 0 {
					t.Errorf("%q, %s: site %d has rank %d and %d atoms", text, a.Event, k, s.Rank, len(s.Atoms))
				}
				if s.Chance != nil {
					sum += *s.Chance
					if !(*s.Chance >= 0 && *s.Chance <= 1) {
						t.Errorf("%q, %s: chance %g", text, a.Event, *s.Chance)
					}
				}
				if l := s.Limits; l != nil && !(l[0] >= 0 && l[0] <= *s.Chance+1e-9 && *s.Chance <= l[1]+1e-9 && l[1] <= 1) {
					t.Errorf("%q, %s: chance %g has limits %v", text, a.Event, *s.Chance, *l)
				}
				for name, v := range s.Index {
					if v.Absent == "" && (math.IsNaN(v.X) || math.IsInf(v.X, 0)) {
						t.Errorf("%q, %s: %s is %g", text, a.Event, name, v.X)
					}
				}
			}
			if sum > 1+1e-6 {
				t.Errorf("%q, %s: chances sum to %g", text, a.Event, sum)
			}
		}
	})
}
