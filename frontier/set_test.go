package frontier

import (
	"errors"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"lobecast/frontier/molecule"
)

// Spot checks of the embedded values against the published tables (Van-Catledge 1980;
// Streitwieser 1961; both from memory, as the sets say on every line).
func TestEmbeddedSets(t *testing.T) {
	for _, c := range []struct {
		set, name string
		value     float64
		borrowed  string
	}{
		{"van-catledge-1980", "h N1", 0.51, ""},
		{"van-catledge-1980", "h N2", 1.37, ""},
		{"van-catledge-1980", "h O1", 0.97, ""},
		{"van-catledge-1980", "k C O1", 1.06, ""},
		{"van-catledge-1980", "k C N2", 0.89, ""},
		{"van-catledge-1980", "k C O2", 0.66, ""},
		{"van-catledge-1980", "k N1 N1", 1.09, ""},
		{"van-catledge-1980", "h alkyl", 2.0, "streitwieser-1961"},
		{"van-catledge-1980", "h Br", 1.16, "derflinger-lischka-1969"},
		{"van-catledge-1980", "h N2 amide", 1.37, ""}, // as its parent
		{"streitwieser-1961", "h N1", 0.5, ""},
		{"streitwieser-1961", "k C N1", 1.0, ""},
		{"streitwieser-1961", "h N+", 2.0, ""},
		{"streitwieser-1961", "k N+ O-", 0.7, ""},
		{"streitwieser-1961", "h Cl", 2.0, ""},
		{"streitwieser-1961", "h S2", 1.11, "van-catledge-1980"},
	} {
		s := mustLoad(t, c.set)
		p, ok := ParameterOf(c.name)
		if !ok {
			t.Fatalf("no parameter %q", c.name)
		}
		if math.Abs(s.Values[p]-c.value) > 1e-12 || s.Borrowed[p] != c.borrowed {
			t.Errorf("%s, %s: %g borrowed from %q, want %g from %q", c.set, c.name, s.Values[p], s.Borrowed[p], c.value, c.borrowed)
		}
	}
	for _, name := range []string{"van-catledge-1980", "streitwieser-1961"} {
		s := mustLoad(t, name)
		for p, missing := range s.missing {
			if missing {
				t.Errorf("%s has no value for %s", name, Parameter(p))
			}
		}
		for i, source := range s.Source {
			if source == "" {
				t.Errorf("%s: %s has no source", name, s.Names[i])
			}
		}
	}
}

func TestSetRoundTrip(t *testing.T) {
	for _, name := range Sets() {
		s := mustLoad(t, name)
		text := s.TOML()
		again, err := ParseSet(text)
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		for i := range s.Values {
			if s.Values[i] != again.Values[i] || s.Borrowed[i] != again.Borrowed[i] || s.Given[i] && s.Source[i] != again.Source[i] {
				t.Errorf("%s: %s is %g (%s, %q) and comes back as %g (%s, %q)", name, s.Names[i],
					s.Values[i], s.Source[i], s.Borrowed[i], again.Values[i], again.Source[i], again.Borrowed[i])
			}
		}
		if again.TOML() != text {
			t.Errorf("%s: writing twice gives different text", name)
		}
		if again.Name != s.Name || again.Strict != s.Strict || again.Citation != s.Citation || again.Note != s.Note {
			t.Errorf("%s: heading comes back as %q %t", name, again.Name, again.Strict)
		}
	}
}

const userSet = `format = 1
name = "mine"
[h]
C = 0.0
N1 = 0.7
"N2 amine" = { value = 1.1, source = "fitted here" }
[k]
"C C" = 1.0
"C N1" = 1.1
"O1 N1" = 1.3
`

func TestUserSet(t *testing.T) {
	s, err := ParseSet(userSet)
	if err != nil {
		t.Fatal(err)
	}
	for name, want := range map[string]float64{"h N1": 0.7, "h N1 azine": 0.7, "h N2 amine": 1.1, "h N2": 1.37, "k C N1": 1.1, "k N1 O1": 1.3, "k C N1 imine": 1.1} {
		if v, ok := s.Value(name); !ok || v != want {
			t.Errorf("%s = %g, want %g", name, v, want)
		}
	}
	sol := mustSolve(t, s, "Nc1ccncc1")
	var own, borrowed bool
	for _, b := range sol.Borrowed() {
		own = own || strings.HasPrefix(b, "h N1") || strings.HasPrefix(b, "h N2 amine")
		borrowed = borrowed || b == "k C N2 amine (van-catledge-1980)"
	}
	if own || !borrowed {
		t.Errorf("borrowed entries %v", sol.Borrowed())
	}

	strict, err := ParseSet(strings.Replace(userSet, "[h]", "strict = true\n[h]", 1))
	if err != nil {
		t.Fatal(err)
	}
	if _, err := strict.Solve(mustPerceive(t, "c1ccncc1")); err != nil {
		t.Errorf("pyridine needs nothing the strict set lacks, but: %v", err)
	}
	_, err = strict.Solve(mustPerceive(t, "Oc1ccncc1"))
	if err == nil || !strings.Contains(err.Error(), `"h O2 hydroxy"`) || !strings.Contains(err.Error(), "mine") {
		t.Errorf("missing entry is not named: %v", err)
	}
}

// Broken parameter files are refused at their line.
func TestSetRefusals(t *testing.T) {
	for _, c := range []struct {
		name, text string
		line       int
		says       string
	}{
		{"syntax", "format = 1\nname = \"a\"\n[h\nC = 0\n", 3, ""},
		{"no name", "format = 1\n", 1, "no name"},
		{"unknown key", "name = \"a\"\nflavour = 3\n", 2, "flavour"},
		{"unknown table", "name = \"a\"\n[q]\nC = 1\n", 2, "q"},
		{"unknown class", "name = \"a\"\n[h]\nC = 0.0\n\"N2 amin\" = 1.0\n", 4, "N2 amine"},
		{"unknown pair", "name = \"a\"\n[k]\n\"C Q\" = 1.0\n", 3, "C Q"},
		{"unknown shift", "name = \"a\"\n[inductive]\nCF3 = 0.1\n", 3, "CX3"},
		{"text for a number", "name = \"a\"\n[h]\nC = \"zero\"\n", 3, "number"},
		{"not a number", "name = \"a\"\n[h]\nC = nan\n", 3, "usable"},
		{"infinite", "name = \"a\"\n[h]\nC = inf\n", 3, "usable"},
		{"out of range", "name = \"a\"\n[h]\nC = 1e6\n", 3, "usable"},
		{"entry without value", "name = \"a\"\n[h]\nC = { source = \"x\" }\n", 3, "value"},
		{"entry with unknown key", "name = \"a\"\n[h]\nC = { value = 0.0, weight = 2 }\n", 3, "weight"},
		{"source that is no text", "name = \"a\"\n[h]\nC = { value = 0.0, source = 2 }\n", 3, "source"},
		{"twice the same", "name = \"a\"\n[k]\n\"N1 O1\" = 1.0\n\"O1 N1\" = 1.1\n", 4, "same"},
		{"duplicate", "name = \"a\"\n[h]\nC = 0.0\nC = 1.0\n", 4, ""},
		{"later format", "format = 9\nname = \"a\"\n", 1, "newer"},
		{"number for a name", "name = 3\n", 0, ""},
		{"unended text", "name = \"a\n", 1, ""},
	} {
		_, err := ParseSet(c.text)
		var e *molecule.Error
		if !errors.As(err, &e) {
			t.Errorf("%s: %v is no placed refusal", c.name, err)
			continue
		}
		if e.Line != c.line || !strings.Contains(e.Error(), c.says) {
			t.Errorf("%s: line %d, want %d: %v", c.name, e.Line, c.line, e)
		}
		if e.Line > 0 && e.Text != strings.Split(c.text, "\n")[e.Line-1] {
			t.Errorf("%s: shows line %q", c.name, e.Text)
		}
	}
	if _, err := Load("no-such-set"); err == nil || !strings.Contains(err.Error(), DefaultSet) {
		t.Errorf("unknown set: %v", err)
	}
	path := filepath.Join(t.TempDir(), "bad.toml")
	if err := os.WriteFile(path, []byte("name = \"a\"\n[h]\nX = 1.0\n"), 0o600); err != nil {
		t.Fatal(err)
	}
	if _, err := Load(path); err == nil || !strings.Contains(err.Error(), "bad.toml: line 3") {
		t.Errorf("file and line are not named: %v", err)
	}
}

// Any text either parses or is refused; what parses writes and reads back.
func FuzzParseSet(f *testing.F) {
	f.Add(userSet)
	f.Add("name = \"a\"\n[h]\nC = { value = 1, source = \"β\" }\n")
	f.Add("[k]\n\"C C\" = 0x10\n")
	f.Fuzz(func(t *testing.T, text string) {
		s, err := ParseSet(text)
		if err != nil {
			_ = err.Error()
			return
		}
		again, err := ParseSet(s.TOML())
		if err != nil {
			t.Fatalf("%q: its own text is refused: %v", text, err)
		}
		for i := range s.Values {
			if s.Values[i] != again.Values[i] {
				t.Fatalf("%s: %g comes back as %g", s.Names[i], s.Values[i], again.Values[i])
			}
		}
	})
}
