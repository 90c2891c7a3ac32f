package nesting

import (
	"strings"
	"testing"
)

func TestCheck(t *testing.T) {
	deep, shallow := strings.Repeat("[", MaxDepth+1), strings.Repeat("[", MaxDepth)
	for _, c := range []struct {
		name, text string
		line       int
	}{
		{"a report", "format = 1\n[[structure]]\natoms = [[1, 2], [3]]\na.b = { c = 0.5 }\n", 0},
		{"as deep as may be", "a = " + shallow, 0},
		{"too deep", "a = 1\nb = " + deep, 2},
		{"tables within each other", "\n\na = " + strings.Repeat("{a=", MaxDepth+1), 3},
		{"over several lines", "a = [\n" + strings.Repeat("[\n", MaxDepth), MaxDepth + 1},
		{"long key", "x = 1\na" + strings.Repeat(".a", MaxDepth+1) + " = 1\n", 2},
		{"long table name", "[a" + strings.Repeat(".a", MaxDepth+1) + "]", 1},
		{"long key in an inline table", "a = {b = 1.5, a" + strings.Repeat(".a", MaxDepth+1) + " = 1}", 1},
		{"long quoted key", strings.Repeat(`"a".`, MaxDepth+1) + "a = 1", 1},
		{"many floats", "a = [" + strings.Repeat("1.5, ", 1000) + "]", 0},
		{"brackets in a string", "a = \"" + deep + "\"\nb = '" + deep + "'\n", 0},
		{"brackets in a long string", "a = \"\"\"\n" + deep + "\n\\\"\"\"\"\nb = 1\n", 0},
		{"brackets in a comment", "# " + deep + "\n", 0},
		{"after a long string", "a = '''\n\n'''\nb = " + deep, 4},
		{"after an open string", "a = \"x\nb = " + deep, 2},
		{"after an escaped quote", `a = "\"" # ` + "\nb = " + deep, 2},
		{"closed again", strings.Repeat("a = [[[]]]\n", 1000), 0},
	} {
		line, err := Check(c.text)
		if line != c.line || (err != nil) != (c.line > 0) {
			t.Errorf("%s: line %d, %v; want line %d", c.name, line, err, c.line)
		}
	}
}
