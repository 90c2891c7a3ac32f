package review

import (
	"os"
	"regexp"
	"slices"
	"strings"
	"testing"

	"lobecast/frontier/terms"
)

// docs/route.md explains every key of a route file and every word that one may take,
// and no other key.
func TestRouteKeysAreDocumented(t *testing.T) {
	data, err := os.ReadFile("../../docs/route.md")
	if err != nil {
		t.Fatal(err)
	}
	text := string(data)
	_, keys, ok := strings.Cut(text, "\n## Keys\n")
	if !ok {
		t.Fatal("docs/route.md has no section Keys")
	}
	keys, _, _ = strings.Cut(keys, "\n### ")
	known := append(append([]string(nil), headKeys...), stepKeys...)
	for _, key := range known {
		if !strings.Contains(keys, "\n| `"+key+"` |") {
			t.Errorf("docs/route.md has no row for %s", key)
		}
	}
	for _, m := range regexp.MustCompile("(?m)^\\| `([a-z_]+)` \\|").FindAllStringSubmatch(keys, -1) {
		if !slices.Contains(known, m[1]) {
			t.Errorf("docs/route.md has a row for %s, which is no key of a route file", m[1])
		}
	}
	words := append(append(kinds(), media()...), string(terms.Thermal), string(terms.Photochemical), "closure", "opening")
	for _, w := range words {
		if !strings.Contains(text, "`"+w+"`") {
			t.Errorf("docs/route.md does not name the word %s", w)
		}
	}
}

// The template can be judged as it is printed.
func TestTemplateIsARoute(t *testing.T) {
	route, err := ParseRoute(Template, "template")
	if err != nil {
		t.Fatal(err)
	}
	if len(route.Problems) > 0 || len(route.Steps) < 4 {
		t.Fatalf("%d steps, problems %v", len(route.Steps), route.Problems)
	}
	for i := range route.Steps {
		if p := route.Steps[i].Problems; len(p) > 0 {
			t.Errorf("step %d: %v", i+1, p)
		}
	}
}
