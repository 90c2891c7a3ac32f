package molecule

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"
	"testing"
)

// checkRefusal makes sure that an error can be shown to a person.
func checkRefusal(t *testing.T, err error, lines bool) {
	t.Helper()
	var e *Error
	if !errors.As(err, &e) {
		t.Fatalf("%v is no *Error", err)
	}
	if e.Reason == "" || lines && e.Line < 1 || !lines && e.Column < 1 {
		t.Fatalf("a refusal without a place: %+v", e)
	}
	e.Excerpt()
}

func FuzzReadMolfile(f *testing.F) {
	f.Add([]byte(vinylAmine))
	f.Add([]byte(vinylAmine3000))
	f.Add([]byte(vinylAmine + "> <ID>\n1\n\n$$$$\n" + vinylAmine3000))
	f.Add([]byte(wedges))
	f.Add([]byte(methylImidazole))
	f.Add([]byte(aromaticRing("N", "C")))
	f.Add([]byte(drawn("F -1.5 0.87 0;C -1 0 0;C 0 0 0;C 1 0 0;C 1.5 -0.87 0;Br 1.5 0.87 0", "2 1 1 1;2 3 2 0;3 4 2 0;4 5 1 0;4 6 1 0")))
	f.Fuzz(func(t *testing.T, data []byte) {
		if len(data) > 20000 {
			return
		}
		s := NewSDFScanner(bytes.NewReader(data), "fuzz.sdf")
		for n := 0; ; n++ {
			m, err := s.Next()
			if err == io.EOF {
				break
			}
			if n > len(data) {
				t.Fatal("the file does not end")
			}
			if err != nil {
				checkRefusal(t, err, true)
				continue
			}
			checkConsistent(t, "record", m)
			checkRoundTrip(t, m)
		}
	})
}

// checkRoundTrip writes the molecule as SMILES, reads that, and expects the same.
func checkRoundTrip(t *testing.T, m *Molecule) {
	t.Helper()
	if len(m.Atoms) > 200 {
		return
	}
	s := m.SMILES()
	back, err := ParseSMILES(s)
	if err != nil {
		t.Fatalf("%s is written, and refused: %v", s, err)
	}
	if got := back.SMILES(); got != s {
		t.Fatalf("%s is read back as %s", s, got)
	}
}

func FuzzParseReaction(f *testing.F) {
	for _, c := range reactionRefusals {
		f.Add(c.text)
	}
	f.Add(mappedReaction)
	f.Add("C(.N)O.C1CC2.O12>[Na+].[Cl-]>[13CH3:1]%10.C%10 name")
	f.Fuzz(func(t *testing.T, s string) {
		if len(s) > 5000 {
			return
		}
		r, err := ParseReaction(s, AllowWildcard)
		if err != nil {
			checkRefusal(t, err, false)
			return
		}
		last := 0
		for _, m := range allMolecules(r) {
			if len(m.Components()) != 1 {
				t.Fatalf("a molecule of %d components", len(m.Components()))
			}
			checkConsistent(t, "reaction", m)
			numbers := make([]int, len(m.Atoms))
			for i, a := range m.Atoms {
				numbers[i] = a.Number
				if a.Offset < 0 || a.Offset >= len(s) {
					t.Fatalf("offset %d in a text of %d bytes", a.Offset, len(s))
				}
				at := strings.ToUpper(strings.TrimLeft(s[a.Offset:], "[0123456789"))
				if !strings.HasPrefix(at, strings.ToUpper(Symbol(a.Element))) {
					t.Fatalf("atom %d of element %s is at %q", a.Number, Symbol(a.Element), s[a.Offset:])
				}
			}
			// Numbers run on; only molecules inside one another's branches interleave.
			low, high := slices.Min(numbers), slices.Max(numbers)
			if !strings.ContainsAny(s, "(%0123456789") && low <= last {
				t.Fatalf("number %d follows %d", low, last)
			}
			last = max(last, high)
		}
	})
}

// bruteForce counts the sets of atoms that a pattern fits, by trying every assignment.
func bruteForce(p *Pattern, m *Molecule) int {
	sets := map[string]bool{}
	at := make([]int, len(p.atoms))
	type link struct {
		a, b int
		bond patternBond
	}
	var links []link
	for _, s := range p.steps {
		if s.anchor >= 0 {
			links = append(links, link{s.atom, s.anchor, s.bond})
		}
		for _, c := range s.closes {
			links = append(links, link{s.atom, c.atom, c.bond})
		}
	}
	var assign func(k int)
	assign = func(k int) {
		if k == len(at) {
			for _, l := range links {
				b := m.BondBetween(at[l.a], at[l.b])
				if b < 0 || !l.bond.matches(&m.Bonds[b]) {
					return
				}
			}
			sorted := slices.Clone(at)
			slices.Sort(sorted)
			sets[fmt.Sprint(sorted)] = true
			return
		}
		for i := range m.Atoms {
			if !slices.Contains(at[:k], i) && p.atoms[k].matches(m, i) {
				at[k] = i
				assign(k + 1)
			}
		}
	}
	assign(0)
	return len(sets)
}

func FuzzPattern(f *testing.F) {
	f.Add("C=CC=O", "CC(=O)C=Cc1ccccc1")
	f.Add("c1cc*cc1", "c1ccc2ncccc2c1")
	f.Add("[N+](=O)[O-]", "CC(=O)C[N+](=O)[O-]")
	f.Add("*.[OH]", "OCCO")
	f.Add("C1CC1", "C1CC1C2CC2")
	f.Fuzz(func(t *testing.T, pattern, smiles string) {
		if len(pattern) > 500 || len(smiles) > 500 {
			return
		}
		p, err := NewPattern(pattern)
		if err != nil {
			checkRefusal(t, err, false)
			return
		}
		m, err := ParseSMILES(smiles)
		if err != nil {
			return
		}
		found := p.Find(m)
		if p.Has(m) != (len(found) > 0) {
			t.Fatal("Has and Find disagree")
		}
		for _, at := range found {
			for k, i := range at {
				if !p.atoms[k].matches(m, i) || slices.Contains(at[:k], i) {
					t.Fatalf("%v is no match", at)
				}
			}
		}
		if len(p.atoms) <= 4 && len(m.Atoms) <= 9 {
			if n := bruteForce(p, m); n != len(found) {
				t.Fatalf("%d found, %d by trying everything", len(found), n)
			}
		}
		// A pattern written without stars and brackets is found in itself.
		if q, err := ParseSMILES(pattern); err == nil && !strings.Contains(pattern, "*") && !p.Has(q) {
			t.Fatalf("%s is not found in itself", pattern)
		}
	})
}

func FuzzEditor(f *testing.F) {
	f.Add("F/C=C/[C@H](C)Cl", []byte{0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12})
	f.Add("FC(Cl)=[C@]=C(C)Br", []byte{4, 1, 0, 7, 5, 3, 2, 1})
	f.Add("c1ccc2ccccc2c1", []byte{0, 5, 0, 1, 0, 10, 3, 4, 6})
	f.Fuzz(func(t *testing.T, smiles string, steps []byte) {
		if len(smiles) > 200 || len(steps) > 60 {
			return
		}
		m, err := ParseSMILES(smiles)
		if err != nil {
			return
		}
		before := m.SMILES()
		e := m.Edit()
		for len(steps) >= 4 {
			op, a, b, n := steps[0], int(steps[1])-1, int(steps[2])-1, int(steps[3])
			steps = steps[4:]
			switch op % 9 {
			case 0:
				e.AddAtom(Atom{Element: n%20 + 1, Hydrogens: n / 100})
			case 1:
				e.AddBond(a, b, n%5)
			case 2:
				e.SetOrder(a, b, n%5)
			case 3:
				e.RemoveBond(a, b)
			case 4:
				e.RemoveAtom(a)
			case 5:
				e.SetHydrogens(a, n%5)
			case 6:
				e.ReplaceLigand(a, b, n-1)
			case 7:
				e.Atom(a).Charge = n%5 - 2
			case 8:
				e.Merge(m)
			}
			e.firstErr = nil // an impossible step leaves the editor as it was
		}
		got, err := e.Done()
		if m.SMILES() != before {
			t.Fatalf("the original %s is changed to %s", before, m.SMILES())
		}
		if err == nil && len(got.Atoms) > 0 {
			checkConsistent(t, "edited", got)
			checkRoundTrip(t, got)
		}
	})
}
