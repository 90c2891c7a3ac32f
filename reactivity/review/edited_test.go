package review

import (
	"context"
	"fmt"
	"strings"
	"testing"

	"lobecast/frontier"
	"lobecast/reactivity/report"
)

const good = "[[step]]\nname = \"kept\"\nreaction = \"COc1ccccc1>>COc1ccc(Br)cc1\"\nagents = \"NBS, MeCN\"\n"

// reviewed judges a route text with the default parameter set.
func reviewed(t *testing.T, text string) *report.Report {
	t.Helper()
	route, err := ParseRoute(text, "route.toml")
	if err != nil {
		t.Fatalf("%v\n%s", err, text)
	}
	set, err := frontier.Load("calibrated")
	if err != nil {
		t.Fatal(err)
	}
	return Review(context.Background(), route, Options{Set: set, NoLimits: true})
}

// Slips of the pen are refused at their line, with the word that was meant, and the
// step after them is judged all the same.
func TestSlipsAreRefusedAtTheirLine(t *testing.T) {
	for _, row := range []struct {
		name, step string
		line       int // of the fault, from 1, where the text begins with the step
		says       []string
	}{
		{"unknown key", "[[step]]\nreaction = \"c1ccccc1>>Brc1ccccc1\"\nmedum = \"neutral\"\n", 3, []string{`"medum"`, `"medium"`}},
		{"unknown key, nothing near", "[[step]]\nreaction = \"c1ccccc1>>Brc1ccccc1\"\nzzzzzzzz = 1\n", 3, []string{`"zzzzzzzz"`, "known are"}},
		{"wrong kind", "[[step]]\nkind = \"cycloadition\"\ndiene = \"C=CC=C\"\npartner = \"C=C\"\n", 2, []string{`did you mean "cycloaddition"`}},
		{"kind of another language", "[[step]]\nkind = \"bromination\"\nsubstrate = \"c1ccccc1\"\n", 2, []string{"electrophilic substitution"}},
		{"kind in capitals", "[[step]]\nkind = \"Sigmatropic\"\nsubstrate = \"C=CCOC=C\"\n", 2, []string{`did you mean "sigmatropic"`}},
		{"missing partner", "[[step]]\n\nkind = \"cycloaddition\"\ndiene = \"C=CC=C\"\n", 4, []string{"partner is missing"}},
		{"missing diene", "[[step]]\nkind = \"cycloaddition\"\npartner = \"C=C\"\n", 2, []string{"needs diene"}},
		{"diene and dipole", "[[step]]\nkind = \"cycloaddition\"\ndiene = \"C=CC=C\"\ndipole = \"CN=[N+]=[N-]\"\npartner = \"C=C\"\n", 4, []string{"either a diene or a dipole"}},
		{"misspelt medium", "[[step]]\nreaction = \"c1ccccc1>>Brc1ccccc1\"\nmedium = \"acidc\"\n", 3, []string{`"acidc"`, `did you mean "acidic"`}},
		{"misspelt activation", "[[step]]\nkind = \"electrocyclic\"\nsubstrate = \"C=CC=CC=C\"\nactivation = \"photochemcal\"\n", 4, []string{`did you mean "photochemical"`}},
		{"misspelt direction", "[[step]]\nkind = \"electrocyclic\"\nsubstrate = \"C=CC=CC=C\"\ndirection = \"close\"\n", 4, []string{`did you mean "closure"`}},
		{"number for text", "[[step]]\nname = 7\nreaction = \"c1ccccc1>>Brc1ccccc1\"\n", 2, []string{"name must be text in quotes"}},
		{"list for text", "[[step]]\nreaction = \"c1ccccc1>>Brc1ccccc1\"\nagents = [\"NBS\",\n\"MeCN\"]\n", 3, []string{"agents must be text in quotes"}},
		{"table for text", "[[step]]\nreaction = \"c1ccccc1>>Brc1ccccc1\"\n[step.agents]\nfirst = \"NBS\"\n", 3, []string{"agents must be text in quotes"}},
		{"dotted key", "[[step]]\nreaction = \"c1ccccc1>>Brc1ccccc1\"\nagents.first = \"NBS\"\n", 3, []string{"agents must be text in quotes"}},
		{"text for a switch", "[[step]]\nkind = \"cycloaddition\"\ndiene = \"C=CC=C\"\npartner = \"C=CC=O\"\nlewis_acid = \"yes\"\n", 5, []string{"true or false, without quotes"}},
		{"neither reaction nor kind", "[[step]]\nname = \"empty\"\n", 1, []string{"neither a reaction nor a kind"}},
		{"both ways at once", "[[step]]\nreaction = \"c1ccccc1>>Brc1ccccc1\"\nsubstrate = \"c1ccccc1\"\n", 3, []string{"leave one of them out"}},
		{"product from nowhere", "[[step]]\nreaction = \"COc1ccccc1>>COc1ccc([Si](C)(C)C)cc1\"\n", 2, []string{"Si"}},
		{"bad SMILES", "[[step]]\nname = \"x\"\nreaction = \"COc1ccccc>>COc1ccc(Br)cc1\"\n", 3, []string{"^"}},
		{"bad SMILES of the partner", "[[step]]\nkind = \"cycloaddition\"\ndiene = \"C=CC=C\"\npartner = \"C=C(\"\n", 4, []string{"^"}},
		{"no arrow", "[[step]]\nreaction = \"COc1ccccc1\"\n", 2, []string{">"}},
		{"one arrow", "[[step]]\nreaction = \"COc1ccccc1>COc1ccc(Br)cc1\"\n", 2, []string{">"}},
		{"line break within the reaction", "[[step]]\nreaction = \"\"\"COc1ccccc1>>\nCOc1ccc(Br)cc1\"\"\"\n", 2, nil},
		{"incoming without a star", "[[step]]\nkind = \"electrophilic substitution\"\nsubstrate = \"CO[c:1]1ccccc1\"\nincoming = \"Br\"\n", 4, []string{"*"}},
		{"the same key twice", "[[step]]\nname = \"x\"\nreaction = \"c1ccccc1>>Brc1ccccc1\"\nname = \"y\"\n", 4, []string{"name"}},
		{"quote forgotten", "[[step]]\nname = \"x\nreaction = \"c1ccccc1>>Brc1ccccc1\"\n", 2, nil},
		{"no quotes at all", "[[step]]\nreaction = c1ccccc1>>Brc1ccccc1\n", 2, nil},
		{"a backslash in a SMILES", "[[step]]\nreaction = \"C/C=C\\C>>CC\"\n", 2, nil},
		{"long string left open", "[[step]]\nnote = \"\"\"never closed\nreaction = \"c1ccccc1>>Brc1ccccc1\"\n\n", 0, nil},
		{"unicode in a key", "[[step]]\nreaction = \"c1ccccc1>>Brc1ccccc1\"\n\"agénts\" = \"NBS\"\n", 3, []string{`did you mean "agents"`}},
	} {
		t.Run(row.name, func(t *testing.T) {
			for _, ending := range []string{"\n", "\r\n"} {
				for offset, head := range []string{"", "title = \"é – µ\"\n"} {
					text := strings.ReplaceAll(head+row.step+good+"# "+"[[step]]\n", "\n", ending)
					r := reviewed(t, text)
					if len(r.Step) != 2 {
						t.Fatalf("%d steps, not 2", len(r.Step))
					}
					first, second := r.Step[0], r.Step[1]
					if second.Name != "kept" || second.Planned == nil || len(second.Refused) != 0 {
						t.Errorf("the step after the fault is not judged: %+v", second)
					}
					if first.Standing != "not judged" || len(first.Refused) == 0 {
						t.Fatalf("not refused: %s: %s", first.Standing, first.Reason)
					}
					p := first.Refused[0]
					if row.line > 0 && p.Line != row.line+offset {
						t.Errorf("refused at line %d, not %d: %s", p.Line, row.line+offset, p.Message)
					}
					for _, s := range row.says {
						if !strings.Contains(p.Message, s) {
							t.Errorf("%q does not say %s", p.Message, s)
						}
					}
					if strings.Contains(p.Message, "\r") {
						t.Errorf("carriage return in %q", p.Message)
					}
				}
			}
		})
	}
}

// Faults outside the steps are placed too.
func TestHeadSlips(t *testing.T) {
	for _, row := range []struct {
		text string
		line int
		says string
	}{
		{"titel = \"x\"\n" + good, 1, `did you mean "title"`},
		{"title = 3\n" + good, 1, "title must be text"},
		{"\nagents = \"NBS\"\n" + good, 2, "stands outside the steps"},
		{good + "\n[[stpe]]\nname = \"x\"\n", 6, `did you mean "step"`},
		{good + "\n[notes]\nreaction = \"x\"\n", 6, "unknown key"},
		{"title = \"x\ny\"\n" + good, 1, ""},
	} {
		route, err := ParseRoute(row.text, "route.toml")
		if err != nil {
			t.Errorf("%q: %v", row.text, err)
			continue
		}
		if len(route.Steps) != 1 || len(route.Steps[0].Problems) != 0 {
			t.Errorf("%q: steps %+v", row.text, route.Steps)
		}
		if len(route.Problems) != 1 || route.Problems[0].Line != row.line || !strings.Contains(route.Problems[0].Message, row.says) {
			t.Errorf("%q: problems %+v", row.text, route.Problems)
		}
	}
}

// A file that holds no step at all is an error that says what to do.
func TestNoRoute(t *testing.T) {
	for _, row := range []struct{ text, says string }{
		{"", "begin each with [[step]]"},
		{"title = \"x\"\n", "begin each with [[step]]"},
		{"[step]\nname = \"x\"\n", "line 1: a step begins with [[step]], in double brackets"},
		{"title = \"x\"\nstep = \"COc1ccccc1\"\n", "line 2: step is a table"},
		{"step = [1, 2]\n", "line 1"},
		{"steps = 4\n", `did you mean "step"`},
		{"COc1ccccc1>>COc1ccc(Br)cc1\n", "line 1"},
		{"\x00\x01", "not a route file"},
	} {
		_, err := ParseRoute(row.text, "route.toml")
		if err == nil || !strings.Contains(err.Error(), row.says) {
			t.Errorf("%q: got %v, want %q", row.text, err, row.says)
		}
	}
}

// Harmless ways of writing a route are read alike: byte order mark, CRLF, comments,
// long strings, literal strings, inline tables, header spacing.
func TestHarmlessWriting(t *testing.T) {
	for name, text := range map[string]string{
		"mark":            "\ufeff" + good,
		"crlf":            strings.ReplaceAll(good, "\n", "\r\n"),
		"no last newline": strings.TrimSuffix(good, "\n"),
		"comments":        "# [[step]]\n" + strings.ReplaceAll(good, "\n", " # x = \"\"\" [[step]]\n"),
		"spaces":          "\t[[ step ]]\n  \"name\" = 'kept'\n\treaction='COc1ccccc1>>COc1ccc(Br)cc1'\n",
		"long note":       good + "note = \"\"\"\n[[step]]\nmedium = 3\n\\\"\"\"\nstill\n\"\"\"\n",
		"literal note":    good + "note = '''\n[[step]]\nmedium = \"\"\"\n'''\n",
		"inline":          "step = [\n  {name = \"kept\", reaction = \"COc1ccccc1>>COc1ccc(Br)cc1\"},\n]\n",
		"unicode":         "title = \"Цель – 目標\"\n" + good + "note = \"0 °C → rt\"\n",
	} {
		route, err := ParseRoute(text, "route.toml")
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		if len(route.Steps) != 1 || route.Steps[0].Name != "kept" || len(route.Problems)+len(route.Steps[0].Problems) > 0 {
			t.Errorf("%s: %+v", name, route)
		}
	}
}

// Two faults of one step are both listed, and each step's faults at its own lines.
func TestEveryFaultIsListed(t *testing.T) {
	var b strings.Builder
	for i := range 5 {
		fmt.Fprintf(&b, "[[step]]\nreaction = \"c1ccccc1>>Brc1ccccc1\"\nmedium = \"wet %d\"\nyield = 3\n", i)
	}
	r := reviewed(t, b.String())
	for i, s := range r.Step {
		if len(s.Refused) != 2 {
			t.Fatalf("step %d: %d faults", i+1, len(s.Refused))
		}
		for _, p := range s.Refused {
			if want := 4*i + 3; p.Line != want && p.Line != want+1 {
				t.Errorf("step %d: fault at line %d", i+1, p.Line)
			}
		}
	}
}

// A map that contradicts the product is reported; the structures decide.
func TestContradictoryMap(t *testing.T) {
	r := reviewed(t, "[[step]]\nreaction = \"[CH3:1][O:2][c:3]1[cH:4][cH:5][cH:6][cH:7][cH:8]1>>[CH3:1][O:2][c:3]1[cH:4][cH:5][c:7](Br)[cH:6][cH:8]1\"\nagents = \"NBS\"\n")
	s := r.Step[0]
	if len(s.Warnings) == 0 || !strings.Contains(strings.Join(s.Warnings, " "), "map") {
		t.Errorf("no word on the map: %+v", s.Warnings)
	}
	if s.Planned == nil || s.Planned.Place != "para to OMe" {
		t.Errorf("planned %+v", s.Planned)
	}
}
