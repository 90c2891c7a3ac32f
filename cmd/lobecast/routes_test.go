package main

import (
	"flag"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
)

var updateGolden = flag.Bool("update-golden", false, "write the golden reports of the example routes anew")

// programLine hides the version, which changes with every build.
var programLine = regexp.MustCompile(`lobecast [0-9a-z][^\s";]*`)

// The reports of the example routes, kept as golden files: testdata/routes/README.md
// says what each shows. They were read line by line when they were kept.
func TestExampleRoutes(t *testing.T) {
	folder := filepath.Join("..", "..", "testdata", "routes")
	for _, name := range []string{"quinazoline", "benzimidazole", "quinone"} {
		for _, form := range []struct {
			suffix string
			flags  []string
		}{{".golden.toml", nil}, {".golden.txt", []string{"--brief"}}} {
			args := append([]string{"review", filepath.Join(folder, name+".toml")}, form.flags...)
			code, out, errs := call(t, "", args...)
			if code != exitOK {
				t.Errorf("%s: status %d: %s", name, code, errs)
				continue
			}
			out = programLine.ReplaceAllString(out, "lobecast VERSION")
			golden := filepath.Join(folder, name+form.suffix)
			if *updateGolden {
				if err := os.WriteFile(golden, []byte(out), 0o644); err != nil {
					t.Fatal(err)
				}
				continue
			}
			want, err := os.ReadFile(golden)
			if err != nil {
				t.Fatal(err)
			}
			if out != string(want) {
				t.Errorf("%s differs from what is printed (go test ./cmd/lobecast -run ExampleRoutes -update-golden writes it anew):\n%s", golden, firstChangedLine(string(want), out))
			}
		}
	}
}

func firstChangedLine(want, got string) string {
	a, b := strings.Split(want, "\n"), strings.Split(got, "\n")
	for i := range a {
		if i >= len(b) || a[i] != b[i] {
			line := ""
			if i < len(b) {
				line = b[i]
			}
			return "kept:    " + a[i] + "\nprinted: " + line
		}
	}
	return "more is printed than is kept"
}
