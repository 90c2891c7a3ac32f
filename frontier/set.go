package frontier

import (
	"embed"
	"errors"
	"fmt"
	"io/fs"
	"math"
	"os"
	"sort"
	"strconv"
	"strings"
	"sync"

	"github.com/BurntSushi/toml"

	"lobecast/frontier/molecule"
	"lobecast/frontier/nesting"
)

// Set is a named parameter set: a value for every [Parameter], each
// with its source. α_X = α_C + h_X β, β_XY = k_XY β; all values in units of β.
type Set struct {
	Name     string
	Citation string
	// Note says what the values were fitted to, and how far they were verified.
	Note   string
	Strict bool // a missing entry refuses the structure instead of being borrowed

	Names  []string  // of the parameters, common to all sets
	Values []float64 // aligned with Names
	Source []string  // where each value comes from
	// Borrowed names, for an entry the set itself does not give, what it was taken
	// from; empty for the set's own entries.
	Borrowed []string
	// Given marks the entries that stand in the file under their own name. The others
	// hold the value of their parent class, or, in a set that is not strict, that of
	// the default set.
	Given []bool
	// missing marks entries without any value; only a strict set has them.
	missing []bool
}

// DefaultSet is the name of the set used where none is asked for and no calibrated
// set is at hand.
const DefaultSet = "van-catledge-1980"

//go:embed sets/*.toml
var setFiles embed.FS

// Sets lists the names of the embedded parameter sets, in alphabetical order.
func Sets() []string {
	entries, err := fs.ReadDir(setFiles, "sets")
	if err != nil {
		panic(err) // the folder is embedded
	}
	var names []string
	for _, e := range entries {
		names = append(names, strings.TrimSuffix(e.Name(), ".toml"))
	}
	sort.Strings(names)
	return names
}

var (
	embeddedMutex sync.Mutex
	embedded      = map[string]*Set{}
)

// Load gives the embedded set of that name, or reads the TOML file at that path. The
// result is shared: do not change it; see [Set.Clone].
func Load(nameOrPath string) (*Set, error) {
	for _, n := range Sets() {
		if n == nameOrPath {
			return loadEmbedded(n)
		}
	}
	text, err := os.ReadFile(nameOrPath)
	if err != nil {
		if errors.Is(err, fs.ErrNotExist) && !strings.ContainsAny(nameOrPath, "./\\") {
			return nil, fmt.Errorf("no parameter set is called %q; there are %s, and files ending in .toml", nameOrPath, strings.Join(Sets(), ", "))
		}
		return nil, fmt.Errorf("parameter set: %w", err)
	}
	if len(text) > maxSetFile {
		return nil, fmt.Errorf("%s: a parameter set of more than %d bytes is not read", nameOrPath, maxSetFile)
	}
	s, err := ParseSet(string(text))
	if err != nil {
		var e *molecule.Error
		if errors.As(err, &e) {
			e.File = nameOrPath
			return nil, e
		}
		return nil, fmt.Errorf("%s: %w", nameOrPath, err)
	}
	return s, nil
}

// maxSetFile bounds a parameter file, in bytes.
const maxSetFile = 4 << 20

func loadEmbedded(name string) (*Set, error) {
	embeddedMutex.Lock()
	defer embeddedMutex.Unlock()
	if s := embedded[name]; s != nil {
		return s, nil
	}
	text, err := setFiles.ReadFile("sets/" + name + ".toml")
	if err != nil {
		return nil, err
	}
	s, err := parseSet(string(text), func() (*Set, error) { return nil, nil })
	if err != nil {
		return nil, fmt.Errorf("embedded set %s: %w", name, err)
	}
	embedded[name] = s
	return s, nil
}

// entry is one line of a set file: a bare number, or a table with its source.
type entry struct {
	Value    float64
	Source   string
	Borrowed string
}

// UnmarshalTOML takes a number or { value, source, borrowed }.
func (e *entry) UnmarshalTOML(v any) error {
	number := func(v any) (float64, error) {
		var f float64
		switch x := v.(type) {
		case float64:
			f = x
		case int64:
			f = float64(x)
		default:
			return 0, fmt.Errorf("value must be a number, not %v", v)
		}
		if math.IsNaN(f) || math.Abs(f) > 20 {
			return 0, fmt.Errorf("value %v is not a usable parameter; h and k are in units of β, between -20 and 20", f)
		}
		return f, nil
	}
	t, ok := v.(map[string]any)
	if !ok {
		f, err := number(v)
		e.Value = f
		return err
	}
	if _, ok := t["value"]; !ok {
		return errors.New("entry has no value; write { value = …, source = \"…\" }")
	}
	keys := make([]string, 0, len(t))
	for k := range t {
		keys = append(keys, k)
	}
	sort.Strings(keys)
	for _, k := range keys {
		var err error
		switch k {
		case "value":
			e.Value, err = number(t[k])
		case "source":
			e.Source, ok = t[k].(string)
		case "borrowed":
			e.Borrowed, ok = t[k].(string)
		default:
			return fmt.Errorf("unknown key %q; an entry has value, source and borrowed", k)
		}
		if err != nil {
			return err
		}
		if !ok {
			return fmt.Errorf("%s must be text in quotes", k)
		}
	}
	return nil
}

// setFile is a parameter set as written.
type setFile struct {
	Format    int              `toml:"format"`
	Name      string           `toml:"name"`
	Citation  string           `toml:"citation"`
	Note      string           `toml:"note"`
	Strict    bool             `toml:"strict"`
	H         map[string]entry `toml:"h"`
	K         map[string]entry `toml:"k"`
	Inductive map[string]entry `toml:"inductive"`
}

// ParseSet reads a parameter set in TOML, in the form [Set.TOML] writes. Entries left
// out take the value of their parent class, then that of the default set, which is
// listed as borrowed; in a strict set they stay missing. Errors are *molecule.Error
// with line and the line itself.
func ParseSet(text string) (*Set, error) {
	return parseSet(text, func() (*Set, error) { return loadEmbedded(DefaultSet) })
}

func parseSet(text string, fallback func() (*Set, error)) (*Set, error) {
	if line, err := nesting.Check(text); err != nil {
		return nil, &molecule.Error{Line: line, Text: lineAt(text, line), Reason: err.Error(), Remedy: "compare with a set printed by the parameters command"}
	}
	var f setFile
	md, err := toml.Decode(text, &f)
	if err != nil {
		return nil, setError(text, err)
	}
	for _, k := range md.Undecoded() {
		if len(k) > 1 && (k[0] == "h" || k[0] == "k" || k[0] == "inductive") {
			continue // checked with its value below
		}
		return nil, setLine(text, k, fmt.Sprintf("unknown key %q", k.String()), "the keys are format, name, citation, note, strict and the tables [h], [k], [inductive]")
	}
	if f.Format > 1 {
		return nil, setLine(text, toml.Key{"format"}, fmt.Sprintf("format %d is newer than this program reads", f.Format), "use format 1")
	}
	if f.Name == "" {
		return nil, &molecule.Error{Line: 1, Text: firstLine(text), Reason: "the parameter set has no name", Remedy: `add name = "…"`}
	}
	n := len(parameterNames)
	s := &Set{
		Name: f.Name, Citation: f.Citation, Note: f.Note, Strict: f.Strict,
		Names: parameterNames, Values: make([]float64, n), Source: make([]string, n),
		Borrowed: make([]string, n), Given: make([]bool, n), missing: make([]bool, n),
	}
	seen := map[Parameter]string{}
	for _, key := range md.Keys() {
		if len(key) != 2 {
			continue
		}
		var e entry
		switch key[0] {
		case "h":
			e = f.H[key[1]]
		case "k":
			e = f.K[key[1]]
		case "inductive":
			e = f.Inductive[key[1]]
		default:
			continue
		}
		p, ok := parameterOf[key[0]+" "+key[1]]
		if !ok && key[0] == "k" {
			p, ok = swappedPair(key[1])
		}
		if !ok {
			return nil, setLine(text, key, fmt.Sprintf("no parameter is called %q in [%s]", key[1], key[0]), nearestParameter(key[0], key[1]))
		}
		if other, twice := seen[p]; twice {
			return nil, setLine(text, key, fmt.Sprintf("%q and %q are the same parameter", other, key[1]), "keep one of them")
		}
		seen[p] = key[1]
		if e.Source == "" {
			e.Source = "set file"
		}
		s.Values[p], s.Source[p], s.Borrowed[p], s.Given[p] = e.Value, e.Source, e.Borrowed, true
	}
	var base *Set
	if !s.Strict {
		if base, err = fallback(); err != nil {
			return nil, err
		}
	}
	for i := range s.Values {
		p := Parameter(i)
		switch parent := p.Parent(); {
		case s.Given[p]:
		case parent != p && !s.missing[parent] && (s.Given[parent] || base == nil || !base.Given[p]):
			s.Values[p], s.Source[p], s.Borrowed[p] = s.Values[parent], "as "+parent.String()+": "+s.Source[parent], s.Borrowed[parent]
		case base != nil:
			s.Values[p], s.Source[p], s.Borrowed[p] = base.Values[p], base.Source[p], base.Name
		case strings.HasPrefix(parameterNames[p], "inductive "):
			s.Source[p] = "not given: no shift"
		default:
			s.missing[p] = true
		}
	}
	return s, nil
}

// swappedPair finds a k whose two classes were written the other way round.
func swappedPair(key string) (Parameter, bool) {
	for i := 1; i < len(key); i++ {
		if key[i] == ' ' {
			if p, ok := parameterOf["k "+key[i+1:]+" "+key[:i]]; ok {
				return p, true
			}
		}
	}
	return 0, false
}

// setError places an error of the decoder.
func setError(text string, err error) error {
	var pe toml.ParseError
	if !errors.As(err, &pe) {
		return &molecule.Error{Reason: strings.TrimPrefix(err.Error(), "toml: "), Remedy: "compare with a set printed by the parameters command"}
	}
	line := pe.Position.Line
	if strings.Contains(pe.Message, `'\n'`) && line > 1 {
		line-- // the decoder counts the line end to the next line
		pe.Position.Col = 0
	}
	e := &molecule.Error{Line: line, Text: lineAt(text, line), Reason: strings.ToLower(pe.Message[:min(1, len(pe.Message))]) + pe.Message[min(1, len(pe.Message)):]}
	if pe.Message == "" {
		e.Reason = err.Error()
	}
	if pe.Position.Col > 0 && pe.Position.Col-1 <= len(e.Text) {
		e.Column = len([]rune(e.Text[:pe.Position.Col-1])) + 1
	}
	return e
}

// setLine is a refusal at the line of a key.
func setLine(text string, key toml.Key, reason, remedy string) error {
	line := keyLine(text, key)
	e := &molecule.Error{Line: line, Text: lineAt(text, line), Reason: reason, Remedy: remedy}
	if i := strings.Index(e.Text, key[len(key)-1]); i >= 0 && line > 0 {
		e.Column = len([]rune(e.Text[:i])) + 1
	}
	return e
}

// keyLine finds the line on which a key of a set file is written, 0 where it cannot.
func keyLine(text string, key toml.Key) int {
	name := key[len(key)-1]
	current := ""
	for i, l := range strings.Split(text, "\n") {
		t := strings.TrimSpace(l)
		if strings.HasPrefix(t, "[") {
			current = strings.Trim(strings.TrimSpace(strings.SplitN(t, "#", 2)[0]), "[] ")
			if len(key) == 1 && current == name {
				return i + 1
			}
			continue
		}
		left, _, ok := strings.Cut(t, "=")
		if !ok {
			continue
		}
		left = strings.Trim(strings.TrimSpace(left), `"'`)
		full := left
		if current != "" {
			full = current + "." + left
		}
		if len(key) == 1 && current == "" && left == name || len(key) > 1 && full == strings.Join(key, ".") {
			return i + 1
		}
	}
	return 0
}

func lineAt(text string, line int) string {
	lines := strings.Split(text, "\n")
	if line < 1 || line > len(lines) {
		return ""
	}
	return strings.TrimRight(lines[line-1], "\r")
}

func firstLine(text string) string { return lineAt(text, 1) }

// nearestParameter suggests the name closest to a misspelt one.
func nearestParameter(table, key string) string {
	best, distance := "", 1<<30
	for _, n := range parameterNames {
		t, k, _ := strings.Cut(n, " ")
		if t != table {
			continue
		}
		if d := editDistance(strings.ToLower(k), strings.ToLower(key)); d < distance {
			best, distance = k, d
		}
	}
	return fmt.Sprintf("did you mean %q", best)
}

// editDistance is the number of single-letter changes between two short strings.
func editDistance(a, b string) int {
	if len(a) > 64 {
		a = a[:64]
	}
	if len(b) > 64 {
		b = b[:64]
	}
	row := make([]int, len(b)+1)
	for j := range row {
		row[j] = j
	}
	for i := 1; i <= len(a); i++ {
		diagonal := row[0]
		row[0] = i
		for j := 1; j <= len(b); j++ {
			change := diagonal
			if a[i-1] != b[j-1] {
				change++
			}
			diagonal = row[j]
			row[j] = min(change, row[j]+1, row[j-1]+1)
		}
	}
	return row[len(b)]
}

// Clone is a copy that may be changed.
func (s *Set) Clone() *Set {
	c := *s
	c.Values = append([]float64(nil), s.Values...)
	c.Source = append([]string(nil), s.Source...)
	c.Borrowed = append([]string(nil), s.Borrowed...)
	c.Given = append([]bool(nil), s.Given...)
	c.missing = append([]bool(nil), s.missing...)
	return &c
}

// Value is the value of a named parameter; false for an unknown name or an entry that
// a strict set does not have.
func (s *Set) Value(name string) (float64, bool) {
	p, ok := parameterOf[name]
	if !ok || s.missing[p] {
		return 0, false
	}
	return s.Values[p], true
}

// TOML writes the set so that [ParseSet] reads the same values back: every entry that
// stands under its own name, one line each, with its source.
func (s *Set) TOML() string {
	var b strings.Builder
	b.WriteString("format = 1\n")
	fmt.Fprintf(&b, "name = %s\n", quoted(s.Name))
	if s.Citation != "" {
		fmt.Fprintf(&b, "citation = %s\n", quoted(s.Citation))
	}
	if s.Note != "" {
		fmt.Fprintf(&b, "note = %s\n", quoted(s.Note))
	}
	fmt.Fprintf(&b, "strict = %t\n", s.Strict)
	for _, t := range [...]string{"h", "k", "inductive"} {
		s.writeTable(&b, t)
	}
	return b.String()
}

// writeTable writes the entries of one table.
func (s *Set) writeTable(b *strings.Builder, t string) {
	open := false
	for i, name := range s.Names {
		p := Parameter(i)
		of, key := table(name)
		if of != t || s.missing[p] || !s.Given[p] && s.follows(p) {
			continue
		}
		if !open {
			fmt.Fprintf(b, "\n[%s]\n", t)
			open = true
		}
		fmt.Fprintf(b, "%s = { value = %s, source = %s", quoted(key), number(s.Values[p]), quoted(s.Source[p]))
		if s.Borrowed[p] != "" {
			fmt.Fprintf(b, ", borrowed = %s", quoted(s.Borrowed[p]))
		}
		b.WriteString(" }\n")
	}
}

// follows says whether p, not given, would be read back the same from its parent or
// from the rules for what is left out.
func (s *Set) follows(p Parameter) bool {
	parent := p.Parent()
	if parent == p {
		return s.Strict && s.Values[p] == 0
	}
	return s.Values[p] == s.Values[parent] && (s.Given[parent] || s.Strict)
}

// quoted is a TOML basic string.
func quoted(s string) string {
	var b strings.Builder
	b.WriteByte('"')
	for _, r := range s {
		switch {
		case r == '"' || r == '\\':
			b.WriteByte('\\')
			b.WriteRune(r)
		case r < 0x20 || r == 0x7f:
			fmt.Fprintf(&b, `\u%04X`, r)
		default:
			b.WriteRune(r)
		}
	}
	b.WriteByte('"')
	return b.String()
}

// number is a TOML float in its shortest exact form.
func number(v float64) string {
	if v == 0 {
		v = 0 // no −0
	}
	t := strconv.FormatFloat(v, 'g', -1, 64)
	if !strings.ContainsAny(t, ".e") {
		t += ".0"
	}
	return t
}
