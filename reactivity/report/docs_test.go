package report_test

import (
	"os"
	"reflect"
	"regexp"
	"sort"
	"strings"
	"testing"

	"lobecast/frontier/terms"
	"lobecast/reactivity/report"
	"lobecast/reactivity/survey"
)

const page = "../../docs/report.md"

// same names the tables that have the keys of another: docs/report.md documents the other
// and says so.
var same = map[string]string{
	"step.structure": "structure", "step.pair": "pair", "step.process": "process",
	"step.outside": "outside", "step.caution": "caution", "step.record": "record",
	"step.refused": "refused", "step.aside": "structure.aside",
	"structure.attack.ipso": "structure.attack.site",
}

// tables walks the types of the report and lists the keys of every table by its path:
// "" for the head, "structure.attack.site.index" and so on.
func tables(t reflect.Type, path string, into map[string]map[string]bool) {
	if into[path] == nil {
		into[path] = map[string]bool{}
	}
	for i := range t.NumField() {
		f := t.Field(i)
		key, _, _ := strings.Cut(f.Tag.Get("toml"), ",")
		in := f.Type
		for in.Kind() == reflect.Pointer || in.Kind() == reflect.Slice {
			in = in.Elem()
		}
		if in.Kind() != reflect.Struct {
			into[path][key] = true
			continue
		}
		sub := key
		if path != "" {
			sub = path + "." + key
		}
		if same[sub] == "" {
			tables(in, sub, into)
		}
	}
}

// documented reads docs/report.md: below each heading that names a table, the rows
// "| `key` | …" document its keys.
func documented(t *testing.T) map[string]map[string]bool {
	data, err := os.ReadFile(page)
	if err != nil {
		t.Fatal(err)
	}
	heading := regexp.MustCompile("^#+ .*`\\[+([a-z_.]+)\\]+`")
	row := regexp.MustCompile("^\\| `([a-z0-9_]+)`")
	list := map[string]map[string]bool{}
	at := "none"
	for _, line := range strings.Split(string(data), "\n") {
		if strings.HasPrefix(line, "#") {
			at = "none"
			if m := heading.FindStringSubmatch(line); m != nil {
				at = m[1]
			} else if strings.Contains(line, "Head of the file") {
				at = ""
			}
			continue
		}
		if m := row.FindStringSubmatch(line); m != nil && at != "none" {
			if list[at] == nil {
				list[at] = map[string]bool{}
			}
			list[at][m[1]] = true
		}
	}
	return list
}

// Every key of every report is documented under its table, and nothing is documented
// that there is not.
func TestEveryKeyIsDocumented(t *testing.T) {
	want := map[string]map[string]bool{}
	tables(reflect.TypeOf(report.Report{}), "", want)
	want["result"] = map[string]bool{"format": true}
	for _, c := range survey.ColumnNames {
		want["result"][c] = true
	}
	got := documented(t)
	for _, path := range sorted(want) {
		for _, key := range sorted(want[path]) {
			if !got[path][key] {
				t.Errorf("docs/report.md does not document %s of [%s]", key, path)
			}
		}
	}
	for _, path := range sorted(got) {
		for _, key := range sorted(got[path]) {
			if !want[path][key] {
				t.Errorf("docs/report.md documents %s of [%s], which no report has", key, path)
			}
		}
	}
}

// The fixed words of a report are explained.
func TestEveryWordIsDocumented(t *testing.T) {
	data, err := os.ReadFile(page)
	if err != nil {
		t.Fatal(err)
	}
	text := string(data)
	var words []string
	for _, w := range terms.Events {
		words = append(words, string(w))
	}
	for _, w := range terms.Kinds {
		words = append(words, string(w))
	}
	for _, w := range []terms.Standing{terms.Supported, terms.Contested, terms.Opposed, terms.Forbidden, terms.NotJudged} {
		words = append(words, string(w))
	}
	for _, w := range []terms.Call{terms.Clear, terms.Leaning, terms.Split, terms.Open} {
		words = append(words, string(w))
	}
	words = append(words, survey.Judged, survey.NotJudged, survey.Refused,
		report.KindSites, report.KindPair, report.KindSymmetry, report.KindOrbitals, report.KindReview)
	for _, w := range words {
		if !strings.Contains(text, "`"+w+"`") {
			t.Errorf("docs/report.md does not explain `%s`", w)
		}
	}
}

func sorted[V any](m map[string]V) []string {
	var keys []string
	for k := range m {
		keys = append(keys, k)
	}
	sort.Strings(keys)
	return keys
}
