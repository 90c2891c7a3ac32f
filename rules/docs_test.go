package rules

import (
	"flag"
	"fmt"
	"os"
	"strings"
	"testing"
)

var updateDocs = flag.Bool("update-docs", false, "write the tables of docs/limits-and-cautions.md anew")

// docs/limits-and-cautions.md lists every entry of the catalogue with its reason, example
// and source. Run with -update-docs to write the tables anew.
func TestCatalogueIsDocumented(t *testing.T) {
	const path = "../docs/limits-and-cautions.md"
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	text := string(data)
	cell := strings.NewReplacer("|", `\|`, "\n", " ").Replace
	for _, g := range []Group{OutsideGroup, OverrideGroup, CautionGroup} {
		var b strings.Builder
		b.WriteString("\n| code | what the report says | why | example | source |\n|---|---|---|---|---|\n")
		for _, e := range Catalogue() {
			if e.Group == g {
				fmt.Fprintf(&b, "| `%s` | %s | %s | %s | %s |\n", e.Code, cell(e.Text), cell(e.Reason), cell(e.Example), cell(e.Source))
			}
		}
		begin, end := fmt.Sprintf("<!-- begin %s -->", g), fmt.Sprintf("<!-- end %s -->", g)
		i, j := strings.Index(text, begin), strings.Index(text, end)
		if i < 0 || j < i {
			t.Fatalf("%s has no place for the entries of group %s", path, g)
		}
		i += len(begin)
		if text[i:j] == b.String() {
			continue
		}
		if !*updateDocs {
			t.Errorf("%s is out of date in group %s; run go test ./rules -run TestCatalogueIsDocumented -update-docs", path, g)
		}
		text = text[:i] + b.String() + text[j:]
	}
	if *updateDocs {
		if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}
