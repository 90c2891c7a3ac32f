package review

import (
	"strings"
	"testing"
	"time"
)

// FuzzParseRoute: no text makes the reader panic; what it reads has every fault at a
// line of the text, and says so in valid UTF-8 wherever the text is.
func FuzzParseRoute(f *testing.F) {
	for _, seed := range []string{
		Template,
		good,
		strings.ReplaceAll(good, "\n", "\r\n"),
		"title = \"x\ny\"\n" + good,
		good + "note = \"\"\"open\n" + good,
		"[[step]]\nreaction = 'a'\n[step.agents]\nx = [\n1,\n]\n" + good,
		"step = [{reaction = \"C>>C\"}, 3]\n",
		"[[step]]\n\"\" = 1\nkind = \"ene\"\n[[step.kind]]\n",
		"[[ step ]]\nkind = \"other\"\n[step]\n",
		"\ufeff[[\"step\"]]\nmedium = 'acidc'\nlewis_acid = \"\"\"\n\\\n\"\"\"\n",
	} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		began := time.Now()
		route, err := ParseRoute(text, "fuzz.toml")
		if d := time.Since(began); d > 2*time.Second {
			t.Errorf("%d bytes took %v", len(text), d)
		}
		if err != nil {
			if err.Error() == "" {
				t.Error("an error without a word")
			}
			return
		}
		if len(route.Steps) == 0 {
			t.Error("a route without steps")
		}
		lines := 1 + strings.Count(text, "\n")
		problems := route.Problems
		for i := range route.Steps {
			s := &route.Steps[i]
			problems = append(problems, s.Problems...)
			if s.Name == "" || s.Line > lines {
				t.Errorf("step %q at line %d of %d", s.Name, s.Line, lines)
			}
		}
		for _, p := range problems {
			if p.Message == "" || p.Line < 0 || p.Line > lines {
				t.Errorf("fault %+v in a text of %d lines", p, lines)
			}
		}
	})
}
