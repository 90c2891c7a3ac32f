package symmetry

import (
	"errors"
	"strings"
	"testing"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Spellings of the notation as the trade prints it (Woodward, Hoffmann 1969) and as a
// keyboard gives it.
func TestParseComponentsSpellings(t *testing.T) {
	for in, want := range map[string]string{
		"π4s+π2s":               "π4s+π2s",
		"pi4s+pi2s":             "π4s+π2s",
		"p4s+p2s":               "π4s+π2s",
		"[π4s + π2s]":           "π4s+π2s",
		" ( pi 4 s + pi 2 s ) ": "π4s+π2s",
		"π₄ₛ+π₂ₐ":               "π4s+π2a",
		"sigma2a+pi2s":          "σ2a+π2s",
		"s2a + p2s":             "σ2a+π2s",
		"s2s+s2s+p2s":           "σ2s+σ2s+π2s",
		"omega0s+s2s":           "ω0s+σ2s",
		"w2s+σ2s":               "ω2s+σ2s",
		"Pi14a+PI2S":            "π14a+π2s",
		"pi6s":                  "π6s",
	} {
		cs, err := ParseComponents(in)
		if err != nil {
			t.Errorf("%q: %v", in, err)
			continue
		}
		if cs.String() != want {
			t.Errorf("%q is read as %s, want %s", in, cs, want)
		}
		again, err := ParseComponents(cs.String())
		if err != nil || again.String() != cs.String() {
			t.Errorf("%s does not read back: %v %v", cs, again, err)
		}
	}
}

// The mark ▼ stands before the character the error must point at.
func TestParseComponentsRefusals(t *testing.T) {
	for _, c := range []struct{ in, reason string }{
		{"▼", "empty"},
		{"   ▼", "empty"},
		{"π▼3s", "even number"},
		{"pi▼3s", "even number"},
		{"π4s+π▼3s", "even number"},
		{"π4▼x", "expected s or a"},
		{"π4s+π2▼", "expected s or a after π2, found the end"},
		{"π▼s", "number of electrons"},
		{"π▼0s+π2s", "at least two"},
		{"σ▼4s+π2s", "one bond"},
		{"σ▼0s+π2s", "one bond"},
		{"ω▼4s+π2s", "single orbital"},
		{"π▼-4s", "number of electrons"},
		{"▼4s+π2s", "kind of a component"},
		{"▼x4s+π2s", "kind of a component"},
		{"▼δ2s+π2s", "kind of a component"},
		{"π4s▼π2s", "expected + or the end"},
		{"π4s+▼+π2s", "found \"+\""},
		{"▼+π4s", "found \"+\""},
		{"π4s+▼", "found the end"},
		{"▼[π4s+π2s", "not closed"},
		{"[π4s+π2s▼)", "expected + or"},
		{"π4s+π2s▼]", "expected + or the end"},
		{"[▼]", "kind of a component"},
		{"π▼100s+π2s", "more than 98"},
		{"π▼99999999999999999999999s", "more than 98"},
		{"▼σ2s", "alone"},
		{"▼ω2s", "alone"},
		{"▼ω0s+ω0s", "no component brings"},
		{"π4s▼,π2s", "expected + or the end"},
		{"▼\xff4s", "byte 0xff"},
	} {
		at := strings.Index(c.in, "▼")
		in := strings.Replace(c.in, "▼", "", 1)
		_, err := ParseComponents(in)
		var e *molecule.Error
		if !errors.As(err, &e) {
			t.Errorf("%q: not refused with a place: %v", in, err)
			continue
		}
		if want := len([]rune(c.in[:at])) + 1; e.Column != want {
			t.Errorf("%q: column %d, want %d (%v)", in, e.Column, want, err)
		}
		if !strings.Contains(e.Reason, c.reason) {
			t.Errorf("%q: reason %q does not hold %q", in, e.Reason, c.reason)
		}
		if e.Remedy == "" {
			t.Errorf("%q: no remedy", in)
		}
		if !strings.Contains(e.Excerpt(), "^") && in != "" {
			t.Errorf("%q: no caret in\n%s", in, e.Excerpt())
		}
	}
}

// The general rule on cases whose verdict Woodward and Hoffmann print (1969).
func TestGeneralRule(t *testing.T) {
	for _, c := range []struct {
		in      string
		thermal Verdict
	}{
		{"π4s+π2s", Allowed},
		{"π2s+π2s", Forbidden},
		{"π2s+π2a", Allowed},
		{"π4s+π4s", Forbidden},
		{"π6s+π4s", Allowed},
		{"π8s+π2s", Allowed},
		{"π14a+π2s", Allowed},
		{"π2s+π2s+π2s", Allowed},
		{"σ2s+π4s", Allowed},
		{"σ2s+π6a", Allowed},
		{"σ2a+π2s", Allowed},
		{"ω0s+σ2s", Allowed},
		{"ω2s+σ2s", Forbidden},
		{"π4s+ω2s", Allowed},
		{"π2s+ω2a", Allowed},
		{"π4s+π4s+π2s", Allowed},
		{"π4s+π4s+π2s+π2s", Forbidden},
	} {
		cs, err := ParseComponents(c.in)
		if err != nil {
			t.Fatal(err)
		}
		if got := cs.Thermal(); got != c.thermal {
			t.Errorf("%s thermal: %s, want %s", c.in, got, c.thermal)
		}
		if cs.Photochemical() == cs.Thermal() {
			t.Errorf("%s: the same verdict in the dark and under light", c.in)
		}
		if cs.Verdict(terms.Thermal) != cs.Thermal() || cs.Verdict(terms.Photochemical) != cs.Photochemical() {
			t.Errorf("%s: Verdict does not follow the activation", c.in)
		}
		reversed := make(Components, 0, len(cs))
		for i := range cs {
			reversed = append(reversed, cs[len(cs)-1-i])
		}
		if reversed.Thermal() != cs.Thermal() {
			t.Errorf("%s: the order of the components matters", c.in)
		}
	}
}

// Whatever is written, the reader answers or refuses with a place inside the text,
// and what it answers reads back to itself.
func FuzzParseComponents(f *testing.F) {
	for _, s := range []string{"π4s+π2s", "[pi 4 s+w0s]", "s2s+p₂ₐ", "π3s", "", "(π2s", "+", "ω2s+σ2a+π98s", "\xff"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		cs, err := ParseComponents(s)
		if err != nil {
			var e *molecule.Error
			if !errors.As(err, &e) {
				t.Fatalf("%q: an error without place: %v", s, err)
			}
			if e.Column < 1 || e.Column > len([]rune(s))+1 {
				t.Fatalf("%q: column %d is outside", s, e.Column)
			}
			_ = e.Excerpt()
			return
		}
		again, err := ParseComponents(cs.String())
		if err != nil || again.String() != cs.String() {
			t.Fatalf("%q: %s reads back as %v, %v", s, cs, again, err)
		}
		if cs.Electrons()%2 != 0 || cs.Thermal() == NoVerdict || cs.Thermal() == cs.Photochemical() {
			t.Fatalf("%q: %s gives %s and %s", s, cs, cs.Thermal(), cs.Photochemical())
		}
	})
}
