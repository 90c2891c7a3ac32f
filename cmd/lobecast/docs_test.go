package main

import (
	"bytes"
	"context"
	"flag"
	"fmt"
	"io/fs"
	"maps"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"
	"unicode"
)

var updateDocs = flag.Bool("update-docs", false, "write the outputs shown in README.md and docs/ anew")

// What is printed beside each command in a console block of any page is what the command
// prints. The commands run as a reader would type them at the top of a clone; only the
// version of the program is not compared. Run with -update-docs to write the outputs anew.
func TestDocumentedOutput(t *testing.T) {
	root, err := filepath.Abs(filepath.Join("..", ".."))
	if err != nil {
		t.Fatal(err)
	}
	blocks := 0
	all := pages(t)
	for _, page := range slices.Sorted(maps.Keys(all)) {
		text := all[page]
		work := t.TempDir()
		for _, name := range []string{"testdata", "docs"} {
			if err := os.Symlink(filepath.Join(root, name), filepath.Join(work, name)); err != nil {
				t.Fatal(err)
			}
		}
		t.Chdir(work)
		var renewed strings.Builder
		rest := text
		for {
			before, after, ok := strings.Cut(rest, "```console\n")
			renewed.WriteString(before)
			if !ok {
				break
			}
			block, tail, ok := strings.Cut(after, "```\n")
			if !ok {
				t.Fatalf("%s: a console block is not closed", page)
			}
			rest = tail
			fresh := runBlock(t, page, block)
			blocks++
			renewed.WriteString("```console\n" + fresh + "```\n")
			if !*updateDocs && plainVersion(fresh) != plainVersion(block) {
				t.Errorf("%s shows what is no longer printed (go test ./cmd/lobecast -run TestDocumentedOutput -update-docs writes it anew):\n%s", page, firstDifference(block, fresh))
			}
		}
		// A chance quoted in the text is one of those shown.
		for _, quoted := range chanceQuoted.FindAllStringSubmatch(consoleBlock.ReplaceAllString(text, ""), -1) {
			if !strings.Contains(strings.Join(consoleBlock.FindAllString(renewed.String(), -1), "\n"), quoted[1]) {
				t.Errorf("%s quotes the chance %s, which none of its outputs shows", page, quoted[1])
			}
		}
		if *updateDocs && renewed.String() != text {
			if err := os.WriteFile(filepath.Join(root, page), []byte(renewed.String()), 0o644); err != nil {
				t.Fatal(err)
			}
		}
	}
	if blocks < 35 {
		t.Errorf("only %d console blocks were found and run", blocks)
	}
}

var (
	consoleBlock = regexp.MustCompile("(?s)```console\n.*?```\n")
	chanceQuoted = regexp.MustCompile("`([01]\\.[0-9]{2} \\[[01]\\.[0-9]{2}–[01]\\.[0-9]{2}\\])`")
)

var versionShown = regexp.MustCompile(`(program = "|; |^|\n)lobecast (unversioned|[0-9a-f]{12}|[0-9]+\.[0-9]+\.[^\s"]+)`)

func plainVersion(s string) string { return versionShown.ReplaceAllString(s, "${1}lobecast VERSION") }

func firstDifference(want, got string) string {
	a, b := strings.Split(plainVersion(want), "\n"), strings.Split(plainVersion(got), "\n")
	command := ""
	for i := 0; i < len(a) || i < len(b); i++ {
		x, y := "(nothing)", "(nothing)"
		if i < len(a) {
			x = a[i]
		}
		if i < len(b) {
			y = b[i]
		}
		if strings.HasPrefix(y, "$ ") {
			command = y
		}
		if x != y {
			return fmt.Sprintf("%s\n  shown:   %s\n  printed: %s", command, x, y)
		}
	}
	return "no difference"
}

// runBlock runs the commands of a block, the lines that begin with "$ ", and returns the
// block with their outputs.
func runBlock(t *testing.T, page, block string) string {
	var b strings.Builder
	for _, line := range strings.Split(block, "\n") {
		command, ok := strings.CutPrefix(line, "$ ")
		if !ok {
			continue
		}
		b.WriteString(line + "\n" + runLine(t, page, command))
	}
	return b.String()
}

// runLine runs one line as a shell would, as far as the pages need it: lobecast with
// quoted arguments, pipes into head, tail and sed -n 'a,bp', cat of a file, and echo $?.
func runLine(t *testing.T, page, line string) string {
	var out bytes.Buffer
	code := 0
	for _, part := range strings.Split(line, "; ") {
		if part == "echo $?" {
			fmt.Fprintln(&out, code)
			continue
		}
		var data, errs bytes.Buffer
		for i, stage := range strings.Split(part, " | ") {
			words := shellWords(t, page, stage)
			if i == 0 {
				code = firstStage(t, page, words, &data, &errs)
				continue
			}
			data = *bytes.NewBufferString(filterStage(t, page, words, data.String()))
		}
		out.Write(data.Bytes())
		out.Write(errs.Bytes())
	}
	return out.String()
}

func firstStage(t *testing.T, page string, words []string, out, errs *bytes.Buffer) int {
	if len(words) > 2 && words[0] == "go" && words[1] == "run" && words[2] == "./cmd/lobecast" {
		words = words[2:]
		words[0] = "lobecast"
	}
	switch words[0] {
	case "lobecast":
		return run(context.Background(), words[1:], strings.NewReader(""), out, errs)
	case "cat":
		for _, name := range words[1:] {
			data, err := os.ReadFile(name)
			if err != nil {
				t.Fatalf("%s: %v", page, err)
			}
			out.Write(data)
		}
		return 0
	}
	t.Fatalf("%s: the command %q is none that a page may show with its output", page, words[0])
	return 0
}

func filterStage(t *testing.T, page string, words []string, text string) string {
	lines := strings.SplitAfter(text, "\n")
	if lines[len(lines)-1] == "" {
		lines = lines[:len(lines)-1]
	}
	from, to := 0, len(lines)
	number := func(s string) int {
		n, err := strconv.Atoi(s)
		if err != nil {
			t.Fatalf("%s: %v", page, err)
		}
		return n
	}
	switch {
	case len(words) == 3 && words[0] == "head" && words[1] == "-n":
		to = number(words[2])
	case len(words) == 3 && words[0] == "tail" && words[1] == "-n":
		from = len(lines) - number(words[2])
	case len(words) == 3 && words[0] == "sed" && words[1] == "-n":
		a, b, _ := strings.Cut(strings.TrimSuffix(words[2], "p"), ",")
		from, to = number(a)-1, number(b)
	default:
		t.Fatalf("%s: the filter %q is none that a page may use", page, words)
	}
	from, to = max(0, from), min(to, len(lines))
	return strings.Join(lines[from:to], "")
}

// shellWords splits at spaces; single and double quotes keep text together.
func shellWords(t *testing.T, page, s string) []string {
	var words []string
	var word strings.Builder
	inside, quote := false, byte(0)
	for i := 0; i < len(s); i++ {
		c := s[i]
		switch {
		case quote != 0 && c == quote:
			quote = 0
		case quote != 0:
			word.WriteByte(c)
		case c == '\'' || c == '"':
			quote, inside = c, true
		case c == ' ':
			if inside {
				words = append(words, word.String())
				word.Reset()
				inside = false
			}
		default:
			word.WriteByte(c)
			inside = true
		}
	}
	if quote != 0 {
		t.Fatalf("%s: a quote is not closed in %q", page, s)
	}
	if inside {
		words = append(words, word.String())
	}
	return words
}

// pages are all pages of the documentation with their text.
func pages(t *testing.T) map[string]string {
	t.Helper()
	root := filepath.Join("..", "..")
	list := []string{filepath.Join(root, "README.md"), filepath.Join(root, "DEVELOPERS.md")}
	more, err := filepath.Glob(filepath.Join(root, "docs", "*.md"))
	if err != nil {
		t.Fatal(err)
	}
	all := map[string]string{}
	for _, path := range append(list, more...) {
		data, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		name, err := filepath.Rel(root, path)
		if err != nil {
			t.Fatal(err)
		}
		all[filepath.ToSlash(name)] = string(data)
	}
	return all
}

// Every command stands in the README; every flag of the command line is explained in
// the README or in docs/; and no page speaks of a flag that there is not.
func TestCommandsAndFlagsDocumented(t *testing.T) {
	var line commandLine
	parser, err := newParser(&line, &bytes.Buffer{}, &bytes.Buffer{})
	if err != nil {
		t.Fatal(err)
	}
	all := pages(t)
	var everything strings.Builder
	for _, text := range all {
		everything.WriteString(text)
	}
	flags := map[string]bool{"help": true, "version": true}
	for _, node := range parser.Model.Leaves(true) {
		if !strings.Contains(all["README.md"], "lobecast "+node.Name) {
			t.Errorf("README.md does not name the command %s", node.Name)
		}
		for _, f := range commandFlags(node) {
			if flags[f.Name] {
				continue
			}
			flags[f.Name] = true
			if !strings.Contains(everything.String(), "--"+f.Name) && f.Short == 0 {
				t.Errorf("no page explains --%s of %s", f.Name, node.Name)
			}
		}
	}
	used := regexp.MustCompile(`(?:lobecast [^\n` + "`" + `|]*|` + "`" + `)--([a-z][a-z-]+)`)
	for name, text := range all {
		for _, m := range used.FindAllStringSubmatch(text, -1) {
			if !flags[m[1]] && !foreignFlags[m[1]] {
				t.Errorf("%s speaks of --%s, which no command has", name, m[1])
			}
		}
	}
}

// foreignFlags belong to other programs that the pages call.
var foreignFlags = map[string]bool{"array": true, "will-cite": true, "jobs": true, "joblog": true, "check": true, "no-install-recommends": true}

// Links between pages lead somewhere, and the README leads to every page.
func TestLinks(t *testing.T) {
	root := filepath.Join("..", "..")
	link := regexp.MustCompile(`\]\(([^)#\s]*)(#[^)\s]*)?\)`)
	all := pages(t)
	found := map[string]bool{}
	fenced := regexp.MustCompile("(?s)\n```.*?\n```|`[^`\n]*`")
	for name, text := range all {
		for _, m := range link.FindAllStringSubmatch(fenced.ReplaceAllString(text, ""), -1) {
			if strings.Contains(m[1], "://") {
				continue
			}
			to := filepath.Join(root, filepath.Dir(name), filepath.FromSlash(m[1]))
			if m[1] == "" {
				to = filepath.Join(root, filepath.FromSlash(name))
			}
			if _, err := os.Stat(to); err != nil {
				t.Errorf("%s: the link to %s leads nowhere", name, m[1])
				continue
			}
			if m[2] != "" && !anchors(t, to)[m[2][1:]] {
				t.Errorf("%s: %s has no heading for %s", name, to, m[2])
			}
			if name == "README.md" {
				found[filepath.ToSlash(filepath.Clean(m[1]))] = true
			}
		}
	}
	for name := range all {
		if name != "README.md" && !found[name] {
			t.Errorf("README.md has no link to %s", name)
		}
	}
}

// Files, functions and tests that the pages name exist.
func TestNamesInPagesExist(t *testing.T) {
	root := filepath.Join("..", "..")
	files := map[string]bool{}
	var code strings.Builder
	err := filepath.WalkDir(root, func(path string, d fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		if d.IsDir() && d.Name() == ".git" {
			return filepath.SkipDir
		}
		rel, err := filepath.Rel(root, path)
		if err != nil {
			return err
		}
		rel = filepath.ToSlash(rel)
		files[rel] = true
		files[filepath.Base(rel)] = true
		if filepath.Ext(path) == ".go" {
			data, err := os.ReadFile(path)
			if err != nil {
				return err
			}
			code.Write(data)
		}
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	names := regexp.MustCompile("`([A-Za-z0-9_./-]+\\.(?:go|csv|toml|md|rsmi|tsv|svg))`")
	tests := regexp.MustCompile(`\b((?:Test|Fuzz|Benchmark)[A-Z][A-Za-z0-9]+)`)
	made := regexp.MustCompile(`^(route|report|sites|mine|before|after|monday|tuesday|record|page)\.(toml|md|svg)$`)
	for name, text := range pages(t) {
		for _, m := range names.FindAllStringSubmatch(text, -1) {
			if !files[strings.TrimPrefix(m[1], "./")] && !made.MatchString(m[1]) {
				t.Errorf("%s names the file %s, which does not exist", name, m[1])
			}
		}
		for _, m := range tests.FindAllStringSubmatch(text, -1) {
			if !strings.Contains(code.String(), "func "+m[1]) {
				t.Errorf("%s names %s, which does not exist", name, m[1])
			}
		}
	}
}

// anchors are the names that the headings of a page can be linked by.
func anchors(t *testing.T, path string) map[string]bool {
	t.Helper()
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	list := map[string]bool{}
	for _, line := range strings.Split(string(data), "\n") {
		if !strings.HasPrefix(line, "#") {
			continue
		}
		title := strings.ToLower(strings.TrimSpace(strings.TrimLeft(line, "#")))
		list[strings.Map(func(r rune) rune {
			switch {
			case r == ' ':
				return '-'
			case r == '-' || r == '_' || unicode.IsLetter(r) || unicode.IsDigit(r):
				return r
			}
			return -1
		}, title)] = true
	}
	return list
}
