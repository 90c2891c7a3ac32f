package page

import (
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"math"
	"reflect"
	"strconv"
	"strings"
	"testing"
	"unicode"

	"lobecast/reactivity/report"
)

// node is one element of a parsed document.
type node struct {
	name     string
	attr     map[string]string
	children []*node
	text     string
}

func (n *node) walk(f func(*node)) {
	f(n)
	for _, c := range n.children {
		c.walk(f)
	}
}

// tree parses a document with encoding/xml, strictly.
func tree(t testing.TB, name string, data []byte) *node {
	t.Helper()
	d := xml.NewDecoder(bytes.NewReader(data))
	root := &node{}
	stack := []*node{root}
	for {
		tok, err := d.Token()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			line, column := d.InputPos()
			t.Fatalf("%s: line %d, column %d: %v", name, line, column, err)
		}
		top := stack[len(stack)-1]
		switch x := tok.(type) {
		case xml.StartElement:
			n := &node{name: x.Name.Local, attr: map[string]string{}}
			for _, a := range x.Attr {
				if _, twice := n.attr[a.Name.Local]; twice {
					t.Errorf("%s: <%s> has attribute %s twice", name, n.name, a.Name.Local)
				}
				n.attr[a.Name.Local] = a.Value
			}
			top.children = append(top.children, n)
			stack = append(stack, n)
		case xml.EndElement:
			stack = stack[:len(stack)-1]
		case xml.CharData:
			for _, n := range stack {
				n.text += string(x)
			}
		}
	}
	if len(stack) != 1 || len(root.children) != 1 {
		t.Fatalf("%s: %d root elements, %d left open", name, len(root.children), len(stack)-1)
	}
	return root.children[0]
}

func TestPagesAreWellFormedAndAlone(t *testing.T) {
	for kind, r := range everyReport(t) {
		doc := tree(t, kind, render(t, r))
		ids, targets := map[string]bool{}, []string{}
		level := 0
		doc.walk(func(n *node) {
			if id := n.attr["id"]; id != "" {
				if ids[id] {
					t.Errorf("%s: id %q twice", kind, id)
				}
				ids[id] = true
			}
			for name, value := range n.attr {
				switch {
				case name == "href" && strings.HasPrefix(value, "#"):
					targets = append(targets, value[1:])
				case name == "href", name == "src", name == "srcset", name == "data", name == "action", name == "poster", strings.HasPrefix(name, "on"):
					t.Errorf("%s: <%s %s=%q> leaves the file", kind, n.name, name, value)
				case strings.Contains(value, "://") && name != "xmlns":
					t.Errorf("%s: <%s %s=%q> names an address", kind, n.name, name, value)
				}
			}
			switch n.name {
			case "script", "link", "iframe", "img", "object", "embed", "base":
				t.Errorf("%s: <%s> on a page that needs none", kind, n.name)
			case "style":
				if strings.Contains(n.text, "url(") || strings.Contains(n.text, "@import") {
					t.Errorf("%s: the style loads something", kind)
				}
			case "h1", "h2", "h3", "h4":
				h := int(n.name[1] - '0')
				if h > level+1 {
					t.Errorf("%s: heading %q of level %d follows level %d", kind, n.text, h, level)
				}
				level = h
			case "svg":
				hidden := n.attr["aria-hidden"] == "true"
				if !hidden && (n.attr["role"] != "img" || n.attr["aria-label"] == "" || len(n.children) == 0 || n.children[0].name != "title") {
					t.Errorf("%s: a drawing without a name", kind)
				}
			case "th":
				if n.attr["scope"] == "" {
					t.Errorf("%s: table heading %q has no scope", kind, n.text)
				}
			}
		})
		for _, id := range targets {
			if !ids[id] {
				t.Errorf("%s: link to #%s, which is not there", kind, id)
			}
		}
	}
}

func TestSameReportSameBytes(t *testing.T) {
	for kind, r := range everyReport(t) {
		once := render(t, r)
		for range 3 {
			if !bytes.Equal(once, render(t, r)) {
				t.Errorf("%s: two renderings differ", kind)
			}
		}
		if !bytes.Equal(once, render(t, throughTOML(t, r))) {
			t.Errorf("%s: the page of the report read back differs", kind)
		}
	}
}

// hostile is text that must be shown and not obeyed.
const hostile = "</title></style><script>alert(1)</script><b onclick='x'>\"&amp;&#x41;]]>\x00\x01\x1b\x7f\u202e\u200f\u2028\ufeff\ufffe\xff'--><!-- <svg/onload=x>"

// fill puts a text into every string of a value.
func fill(v reflect.Value, s string) {
	switch v.Kind() {
	case reflect.Pointer:
		if !v.IsNil() {
			fill(v.Elem(), s)
		}
	case reflect.Struct:
		for i := range v.NumField() {
			fill(v.Field(i), s)
		}
	case reflect.Slice, reflect.Array:
		for i := range v.Len() {
			fill(v.Index(i), s)
		}
	case reflect.String:
		v.SetString(s)
	}
}

func TestHostileTextIsShownAsText(t *testing.T) {
	for kind, r := range everyReport(t) {
		// Everything hostile, SMILES included; then everything but the SMILES, so that the
		// drawings are there too.
		smiles := func(r *report.Report) []*string {
			var list []*string
			for i := range r.Structure {
				list = append(list, &r.Structure[i].SMILES)
			}
			for i := range r.Pair {
				list = append(list, &r.Pair[i].A, &r.Pair[i].B)
				for k := range r.Pair[i].Adduct {
					list = append(list, &r.Pair[i].Adduct[k].Product)
				}
			}
			for i := range r.Process {
				list = append(list, &r.Process[i].Reactant, &r.Process[i].Product)
			}
			for i := range r.Step {
				s := &r.Step[i]
				for k := range s.Structure {
					list = append(list, &s.Structure[k].SMILES)
				}
				list = append(list, &s.Product)
			}
			return list
		}
		var kept []string
		for _, s := range smiles(r) {
			kept = append(kept, *s)
		}
		fill(reflect.ValueOf(r), hostile)
		for _, withSMILES := range []bool{false, true} {
			r.Kind = kind
			if withSMILES {
				for i, s := range smiles(r) {
					*s = kept[i]
				}
				r.Parameters = "van-catledge-1980"
			}
			out := render(t, r)
			doc := tree(t, kind, out)
			found := false
			doc.walk(func(n *node) {
				if n.name == "script" || n.name == "b" && n.attr["onclick"] != "" || n.name == "svg" && n.attr["onload"] != "" {
					t.Errorf("%s: hostile text became <%s>", kind, n.name)
				}
				found = found || strings.Contains(n.text, "<script>alert(1)</script>")
			})
			if !found {
				t.Errorf("%s: the hostile text is not shown", kind)
			}
			for _, c := range string(out) {
				if c < 0x20 && c != '\n' && c != '\t' || c == 0x7f || unicode.Is(unicode.Cf, c) || c == 0x2028 || c == unicode.ReplacementChar {
					t.Errorf("%s: the page holds %U", kind, c)
					break
				}
			}
		}
	}
}

func TestPictures(t *testing.T) {
	reports := everyReport(t)
	for _, c := range []struct {
		kind   string
		choice Choice
		want   string // class that must be drawn
	}{
		{report.KindSites, Choice{}, "pin first"},
		{report.KindSites, Choice{Show: "homo"}, "lobe plus"},
		{report.KindSites, Choice{Show: "lumo", Of: 2}, "lobe minus"},
		{report.KindSites, Choice{Show: "levels"}, "level frontier"},
		{report.KindSites, Choice{Show: "structure"}, "bond"},
		{report.KindOrbitals, Choice{}, "level frontier"},
		{report.KindOrbitals, Choice{Show: "homo"}, "lobe plus"},
		{report.KindOrbitals, Choice{Show: "lumo", Of: 2}, "lobe mean"},
		{report.KindOrbitals, Choice{Show: "charges", Of: 5}, "value"},
		{report.KindOrbitals, Choice{Show: "orders"}, "value"},
		{report.KindPair, Choice{}, "forming"},
		{report.KindPair, Choice{Rank: 2}, "forming"},
		{report.KindPair, Choice{Of: 3}, "forming"},
		{report.KindSymmetry, Choice{}, "lobe plus"},
		{report.KindSymmetry, Choice{Show: "structure", Of: 5}, "breaking"},
		{report.KindReview, Choice{}, "ring"},
		{report.KindReview, Choice{Of: 3}, "forming"},
		{report.KindReview, Choice{Of: 4}, "lobe plus"},
	} {
		out, err := Picture(reports[c.kind], c.choice)
		if err != nil {
			t.Errorf("%s %+v: %v", c.kind, c.choice, err)
			continue
		}
		doc := tree(t, c.kind, out)
		if doc.name != "svg" {
			t.Errorf("%s %+v: root is <%s>", c.kind, c.choice, doc.name)
		}
		found := false
		doc.walk(func(n *node) { found = found || n.attr["class"] == c.want })
		if !found {
			t.Errorf("%s %+v: no %q in the drawing", c.kind, c.choice, c.want)
		}
	}
	for _, c := range []struct {
		kind   string
		choice Choice
	}{
		{report.KindSites, Choice{Show: "charges"}}, {report.KindSites, Choice{Of: 9}}, {report.KindSymmetry, Choice{Show: "sites"}},
		{report.KindReview, Choice{Of: 2}}, {report.KindSites, Choice{Show: "rainbow"}}, {report.KindPair, Choice{Rank: 9}},
	} {
		if out, err := Picture(reports[c.kind], c.choice); err == nil {
			t.Errorf("%s %+v: %d bytes, want a refusal", c.kind, c.choice, len(out))
		}
	}
}

func TestUnknownKindIsRefused(t *testing.T) {
	if _, err := Render(&report.Report{Kind: "poem"}); err == nil {
		t.Error("a report of unknown kind was rendered")
	}
}

// luminance is the relative luminance of a colour #rgb or #rrggbb (WCAG 2.1).
func luminance(t *testing.T, colour string) float64 {
	t.Helper()
	h := strings.TrimPrefix(colour, "#")
	if len(h) == 3 {
		h = string([]byte{h[0], h[0], h[1], h[1], h[2], h[2]})
	}
	n, err := strconv.ParseUint(h, 16, 32)
	if err != nil || len(h) != 6 {
		t.Fatalf("colour %q", colour)
	}
	l := 0.0
	for i, w := range []float64{0.2126, 0.7152, 0.0722} {
		c := float64(n>>(16-8*i)&255) / 255
		if c <= 0.04045 {
			c /= 12.92
		} else {
			c = math.Pow((c+0.055)/1.055, 2.4)
		}
		l += w * c
	}
	return l
}

// Contrast of text is at least 4.5 to 1, of lines and marks that carry meaning 3 to 1
// (WCAG 2.1, success criteria 1.4.3 and 1.4.11, level AA), in light, dark and print.
func TestContrast(t *testing.T) {
	for k, block := range strings.Split(coloursCSS, ":root {")[1:] {
		colour := map[string]string{}
		for _, d := range strings.Split(block[:strings.Index(block, "}")], ";") {
			if name, value, ok := strings.Cut(d, ":"); ok && strings.Contains(value, "#") {
				colour[strings.TrimSpace(name)] = strings.TrimSpace(value)
			}
		}
		ratio := func(a, b string) float64 {
			x, y := luminance(t, colour[a]), luminance(t, colour[b])
			return (math.Max(x, y) + 0.05) / (math.Min(x, y) + 0.05)
		}
		for _, text := range []string{"--ink", "--soft", "--accent", "--warn"} {
			for _, ground := range []string{"--paper", "--wash"} {
				if r := ratio(text, ground); r < 4.5 {
					t.Errorf("scheme %d: %s on %s has contrast %.2f, want 4.5", k, text, ground, r)
				}
			}
		}
		// Letters stand on filled lobes, and numbers on filled discs.
		if r := ratio("--ink", "--lobe"); r < 4.5 {
			t.Errorf("scheme %d: ink on a lobe has contrast %.2f, want 4.5", k, r)
		}
		if r := ratio("--lobe-edge", "--paper"); r < 3 {
			t.Errorf("scheme %d: the edge of a lobe has contrast %.2f, want 3", k, r)
		}
	}
}

func TestTextEscapes(t *testing.T) {
	for in, want := range map[string]string{
		"a<b>&\"'":   "a&lt;b&gt;&amp;&#34;&#39;",
		"x\u202ey":   "x[U+202E]y",
		"a\x00b\x1b": "a\u2400b\u241b",
		"\xff":       "[byte FF]",
		"β–π°":       "β–π°",
		"a\nb":       "a\nb",
	} {
		if got := text(in); got != want {
			t.Errorf("text(%q) = %q, want %q", in, got, want)
		}
	}
}

func Example_page() {
	r := &report.Report{Format: report.Format, Kind: report.KindSites, Program: "lobecast", Parameters: "van-catledge-1980", Title: "Nothing to see"}
	html, err := Render(r)
	fmt.Println(strings.Contains(string(html), "<h1>Nothing to see</h1>"), err)
	// Output: true <nil>
}
