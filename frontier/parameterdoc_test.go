package frontier

import (
	"fmt"
	"os"
	"strings"
	"testing"
)

// The tables of docs/parameters.md are written from the sets and classes themselves;
// run with -update after a change.
func TestParameterTables(t *testing.T) {
	const path = "../docs/parameters.md"
	text, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	doc := string(text)
	sets := []*Set{mustLoad(t, "van-catledge-1980"), mustLoad(t, "streitwieser-1961")}
	tables := map[string]string{
		"classes":    classTable(sets),
		"pairs":      pairTable(sets),
		"inductive":  inductiveTable(sets),
		"sources":    sourceTable(sets),
		"parameters": fmt.Sprintf("%d classes (%d of them roots), %d parameters in all.\n", len(classes), len(rootClass), len(parameterNames)),
	}
	for name, table := range tables {
		begin, end := "<!-- begin "+name+" -->\n", "<!-- end "+name+" -->"
		i := strings.Index(doc, begin)
		j := strings.Index(doc, end)
		if i < 0 || j < i {
			t.Errorf("%s has no place for %q", path, name)
			continue
		}
		i += len(begin)
		if doc[i:j] != table {
			if !*update {
				t.Errorf("%s: table %q is not what the sets hold; run with -update", path, name)
			}
			doc = doc[:i] + table + doc[j:]
		}
	}
	if *update && doc != string(text) {
		if err := os.WriteFile(path, []byte(doc), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}

// mark gives a value with the letter of where it comes from.
func mark(s *Set, p Parameter) string {
	v := fmt.Sprintf("%.4g", s.Values[p])
	switch s.Borrowed[p] {
	case "":
		return v
	case "own interpolation":
		return v + " i"
	case "own scale":
		return v + " f"
	case "streitwieser-1961":
		return v + " s"
	case "van-catledge-1980":
		return v + " v"
	case "derflinger-lischka-1969":
		return v + " d"
	}
	return v + " ?"
}

func classTable(sets []*Set) string {
	var b strings.Builder
	b.WriteString("| class | which atoms | h, VC | k to C, VC | h, St | k to C, St |\n|---|---|---|---|---|---|\n")
	for i, c := range classes {
		name := string(c.Class)
		if c.Parent != c.Class {
			name = "– " + name
		}
		fmt.Fprintf(&b, "| %s | %s |", name, c.About)
		for _, s := range sets {
			for _, p := range []Parameter{hOf[i], kWithCarbon[i]} {
				if c.Parent != c.Class && !s.Given[p] {
					b.WriteString(" = |")
					continue
				}
				b.WriteString(" " + mark(s, p) + " |")
			}
		}
		b.WriteString("\n")
	}
	return b.String()
}

func pairTable(sets []*Set) string {
	var b strings.Builder
	b.WriteString("| pair | VC | St |\n|---|---|---|\n")
	for p, name := range parameterNames {
		t, key := table(name)
		if t != "k" || strings.HasPrefix(key, "C ") {
			continue
		}
		fmt.Fprintf(&b, "| %s | %s | %s |\n", key, mark(sets[0], Parameter(p)), mark(sets[1], Parameter(p)))
	}
	return b.String()
}

func inductiveTable(sets []*Set) string {
	var b strings.Builder
	b.WriteString("| cause | stands for | shift of h, both sets |\n|---|---|---|\n")
	for _, g := range inductives {
		fmt.Fprintf(&b, "| %s | %s | %s |\n", g.Name, g.About, mark(sets[0], inductiveOf[g.Name]))
	}
	return b.String()
}

// sourceTable counts the entries of each set by source and how far it is verified.
func sourceTable(sets []*Set) string {
	var b strings.Builder
	for _, s := range sets {
		type line struct {
			text string
			n    int
		}
		var lines []line
		for i := range s.Values {
			if !s.Given[i] {
				continue
			}
			from := "own"
			if s.Borrowed[i] != "" {
				from = "borrowed: " + s.Borrowed[i]
			}
			source := s.Source[i]
			switch {
			case strings.HasPrefix(source, "from the van-catledge-1980 pairs"):
				source = "from the van-catledge-1980 pairs by the substitutions stated on the line"
			case strings.HasPrefix(source, "0.2 (F/0.86)"):
				source = "0.2 (F/0.86), see the table of inductive shifts"
			}
			text := from + " | " + source
			found := false
			for k := range lines {
				if lines[k].text == text {
					lines[k].n++
					found = true
				}
			}
			if !found {
				lines = append(lines, line{text, 1})
			}
		}
		fmt.Fprintf(&b, "\n**%s**: %s\n\n| entries | status | source, as on the line |\n|---|---|---|\n", s.Name, s.Note)
		for _, l := range lines {
			fmt.Fprintf(&b, "| %d | %s |\n", l.n, l.text)
		}
	}
	b.WriteString("\n")
	return b.String()
}
