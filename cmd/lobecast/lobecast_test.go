package main

import (
	"bytes"
	"context"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"lobecast/reactivity/report"
)

// call runs the program in this process.
func call(t *testing.T, stdin string, args ...string) (code int, stdout, stderr string) {
	t.Helper()
	var out, errs bytes.Buffer
	code = run(context.Background(), args, strings.NewReader(stdin), &out, &errs)
	return code, out.String(), errs.String()
}

// Every exit status of the contract, and what stands on which stream.
func TestExitStatus(t *testing.T) {
	dir := t.TempDir()
	broken := filepath.Join(dir, "broken.toml")
	os.WriteFile(broken, []byte("title = \nand no steps\n"), 0o644)
	half := filepath.Join(dir, "half.toml")
	os.WriteFile(half, []byte("[[step]]\nname = \n[[step]]\nkind = \"other\"\n"), 0o644)
	empty := filepath.Join(dir, "empty.smi")
	os.WriteFile(empty, nil, 0o644)
	notReport := filepath.Join(dir, "x.toml")
	os.WriteFile(notReport, []byte("a = 1\n"), 0o644)
	for _, c := range []struct {
		name   string
		args   []string
		stdin  string
		code   int
		stderr string // must be part of standard error
		stdout string // must be part of standard output
	}{
		{"answered", []string{"sites", "c1ccccc1C"}, "", exitOK, "", "[[structure.attack.site]]"},
		{"not judged is an answer", []string{"review", "-"}, "[[step]]\nreaction = \"CCO>>CC=O\"\n", exitOK, "", `standing = "not judged"`},
		{"no π system", []string{"sites", "CCO"}, "", exitRefused, "π", "[[refused]]"},
		{"bad SMILES", []string{"sites", "c1cccc1"}, "", exitRefused, "column 1", "[[refused]]"},
		{"one good, one bad", []string{"sites", "c1ccccc1", "C("}, "", exitRefused, "column", "[[structure]]"},
		{"standard input", []string{"sites", "-"}, "c1ccsc1\n", exitOK, "", "C4H4S"},
		{"no command", []string{"frobnicate"}, "", exitUsage, "unexpected argument", ""},
		{"unknown flag", []string{"sites", "c1ccccc1", "--colour"}, "", exitUsage, "unknown flag", ""},
		{"bad choice", []string{"sites", "c1ccccc1", "--medium", "soap"}, "", exitUsage, "neutral", ""},
		{"bad twist", []string{"sites", "c1ccccc1", "--twist", "1=2"}, "", exitUsage, "--twist", ""},
		{"bad incoming", []string{"sites", "c1ccccc1", "--incoming", "Br"}, "", exitUsage, "*", ""},
		{"no route", []string{"review"}, "", exitUsage, "--template", ""},
		{"missing file", []string{"review", filepath.Join(dir, "nowhere.toml")}, "", exitFile, "nowhere.toml", ""},
		{"broken TOML", []string{"review", broken}, "", exitFile, "line 1", ""},
		{"one broken step", []string{"review", half}, "", exitRefused, "line 2", "number = 2"},
		{"empty SMILES file", []string{"sites", empty}, "", exitFile, "no structure", ""},
		{"folder", []string{"review", dir}, "", exitFile, "folder", ""},
		{"no report", []string{"page", notReport}, "", exitFile, "not a report", ""},
		{"compare needs reports", []string{"compare", notReport, notReport}, "", exitFile, "not a report", ""},
		{"unknown set", []string{"sites", "c1ccccc1", "--parameters", "nobody-1900"}, "", exitFile, "nobody-1900", ""},
		{"components", []string{"symmetry", "π4s+π2s"}, "", exitOK, "", `thermal = "allowed"`},
		{"impossible component", []string{"symmetry", "π3s"}, "", exitRefused, "", "[[refused]]"},
		{"symmetry of nothing", []string{"symmetry"}, "", exitUsage, "components", ""},
		{"addition", []string{"symmetry", "--addition", "C=C", "C=C"}, "", exitOK, "", `product = "C1CCC1"`},
		{"ene", []string{"symmetry", "--ene", "CC=C", "N=N"}, "", exitOK, "", `[[process]]`},
		{"ene without partner", []string{"symmetry", "--ene", "CC=C"}, "", exitUsage, "partner", ""},
		{"output over input", []string{"review", "../../testdata/routes/quinone.toml", "-o", "../../testdata/routes/quinone.toml"}, "", exitUsage, "written over", ""},
		{"picture and page", []string{"page", "x.toml", "--picture", "a.svg", "-o", "a.html"}, "", exitUsage, "instead of the page", ""},
		{"standard input twice", []string{"survey", "-", "-"}, "", exitUsage, "twice", ""},
		{"a call there is not", []string{"survey", "-", "--where", "call = celar"}, "", exitUsage, "clear, leaning", ""},
		{"no site", []string{"sites", "COc1ccccc1", "--toward", "nucleophile", "--brief"}, "", exitOK, "", "no candidate site"},
		{"shift without structure", []string{"symmetry", "--shift", "3,3"}, "", exitUsage, "SMILES", ""},
		{"pair", []string{"pair", "C=CC=C", "C=CC=O"}, "", exitOK, "", "[[pair.adduct]]"},
		{"no diene", []string{"pair", "CC", "C=C"}, "", exitRefused, "", "[[refused]]"},
		{"unknown event", []string{"record", "--event", "magic"}, "", exitUsage, "the events are", ""},
		{"refit of no folder", []string{"record", "--refit", filepath.Join(dir, "nowhere")}, "", exitFile, "nowhere", ""},
		{"into without refit", []string{"record", "--into", dir}, "", exitUsage, "--refit", ""},
		{"bad shard", []string{"survey", "-", "--shard", "9/3"}, "", exitUsage, "--shard", ""},
		{"bad filter", []string{"survey", "-", "--where", "colour = red"}, "", exitUsage, "no column", ""},
		{"resume without file", []string{"survey", "-", "--resume"}, "", exitUsage, "-o", ""},
		{"survey refuses a line", []string{"survey", "-"}, "c1ccccc1C\nC(\n", exitRefused, "1 refused", "[[result]]"},
		{"template", []string{"review", "--template"}, "", exitOK, "", "[[step]]"},
		{"parameters", []string{"parameters"}, "", exitOK, "", "van-catledge-1980"},
		{"one set", []string{"parameters", "streitwieser-1961"}, "", exitOK, "", "Streitwieser"},
		{"completion", []string{"completion", "bash"}, "", exitOK, "", "complete"},
		{"manual", []string{"manual"}, "", exitOK, "", ".TH LOBECAST"},
		{"version", []string{"--version"}, "", exitOK, "", ""},
	} {
		t.Run(c.name, func(t *testing.T) {
			code, out, errs := call(t, c.stdin, c.args...)
			if code != c.code {
				t.Errorf("%v: status %d, want %d\n%s%s", c.args, code, c.code, out, errs)
			}
			if !strings.Contains(errs, c.stderr) {
				t.Errorf("%v: standard error %q lacks %q", c.args, errs, c.stderr)
			}
			if !strings.Contains(out, c.stdout) {
				t.Errorf("%v: standard output lacks %q:\n%.600s", c.args, c.stdout, out)
			}
			if code == exitUsage && out != "" {
				t.Errorf("%v: a usage error prints to standard output: %q", c.args, out)
			}
		})
	}
}

// A report is replaced in one go: permissions and links stay, and a folder that cannot
// be written leaves no half-written file.
func TestOutputFile(t *testing.T) {
	dir := t.TempDir()
	target := filepath.Join(dir, "real.toml")
	os.WriteFile(target, []byte("old"), 0o640)
	link := filepath.Join(dir, "link.toml")
	if err := os.Symlink(target, link); err != nil {
		t.Fatal(err)
	}
	if code, _, errs := call(t, "", "sites", "c1ccccc1", "-o", link); code != exitOK {
		t.Fatalf("status %d: %s", code, errs)
	}
	if info, _ := os.Lstat(link); info.Mode()&os.ModeSymlink == 0 {
		t.Error("the link was replaced by a file")
	}
	info, _ := os.Stat(target)
	if info.Mode().Perm() != 0o640 {
		t.Errorf("permissions became %v", info.Mode().Perm())
	}
	data, _ := os.ReadFile(target)
	if _, err := report.Read(data); err != nil {
		t.Errorf("what was written is no report: %v", err)
	}
	if code, _, _ := call(t, "", "sites", "c1ccccc1", "-o", filepath.Join(dir, "no", "such", "folder.toml")); code != exitFile {
		t.Errorf("status %d for a folder that does not exist", code)
	}
	if code, _, _ := call(t, "", "sites", "c1ccccc1", "-o", dir); code != exitFile {
		t.Errorf("status %d for a folder as output", code)
	}
	left, _ := os.ReadDir(dir)
	if len(left) != 2 {
		t.Errorf("files left over: %v", left)
	}
}

// Survey never writes over what it did not begin, nor over its input.
func TestSurveyOutputFile(t *testing.T) {
	dir := t.TempDir()
	in := filepath.Join(dir, "in.smi")
	os.WriteFile(in, []byte(strings.Repeat("COc1ccccc1\nClc1ccnc(Cl)n1\n", 50)), 0o644)
	out := filepath.Join(dir, "out.csv")
	if code, _, errs := call(t, "", "survey", in, "--as", "csv", "-o", out); code != exitOK {
		t.Fatalf("status %d: %s", code, errs)
	}
	whole, _ := os.ReadFile(out)
	if code, _, _ := call(t, "", "survey", in, "--as", "csv", "-o", out); code != exitUsage {
		t.Error("an output that is there already is taken without --resume")
	}
	os.WriteFile(out, whole[:len(whole)/2], 0o644)
	if code, _, errs := call(t, "", "survey", in, "--as", "csv", "-o", out, "--resume"); code != exitOK {
		t.Fatalf("status %d: %s", code, errs)
	}
	if again, _ := os.ReadFile(out); !bytes.Equal(again, whole) {
		t.Error("the resumed output differs")
	}
	if code, _, _ := call(t, "", "survey", in, "-o", in); code != exitUsage {
		t.Error("the input is taken as output")
	}
}

// The same input gives the same bytes.
func TestSameBytes(t *testing.T) {
	for _, args := range [][]string{
		{"sites", "Cc1ccc2[nH]ccc2c1", "Oc1ccc([N+](=O)[O-])cc1"},
		{"pair", "CO/C=C/C=C", "C=CC(=O)OC"},
		{"symmetry", "--closure", `C/C=C/C=C\C=C\C`},
		{"orbitals", "c1ccc2ccccc2c1"},
		{"review", filepath.Join("..", "..", "testdata", "routes", "quinone.toml")},
	} {
		_, first, _ := call(t, "", args...)
		for range 3 {
			if _, again, _ := call(t, "", args...); again != first {
				t.Errorf("%v: the bytes change from run to run", args)
			}
		}
	}
}

// No line of a brief table is wider than 100 columns.
func TestBriefWidth(t *testing.T) {
	for _, args := range [][]string{
		{"sites", "COc1cc2c(Nc3ccc(F)c(Cl)c3)ncnc2cc1OCCCN1CCOCC1"},
		{"pair", "CO/C=C/C=C", "C=CC(=O)OC"},
		{"symmetry", "--closure", `C/C=C/C=C\C=C\C`},
		{"review", filepath.Join("..", "..", "testdata", "routes", "quinazoline.toml")},
		{"review", filepath.Join("..", "..", "testdata", "routes", "benzimidazole.toml")},
		{"review", filepath.Join("..", "..", "testdata", "routes", "quinone.toml")},
	} {
		_, out, _ := call(t, "", append(args, "--brief")...)
		for _, line := range strings.Split(out, "\n") {
			if n := len([]rune(line)); n > report.BriefWidth {
				t.Errorf("%v: a line of %d columns: %s", args, n, line)
			}
		}
	}
}

// Reports that are written can be read again and give the same bytes.
func TestReportsReadBack(t *testing.T) {
	for _, args := range [][]string{
		{"sites", "Cc1ccc2[nH]ccc2c1", "C("},
		{"pair", "CO/C=C/C=C", "C=CC(=O)OC"},
		{"symmetry", "π4s+π2s"},
		{"orbitals", "C=CC=C"},
		{"review", filepath.Join("..", "..", "testdata", "routes", "benzimidazole.toml")},
	} {
		_, out, _ := call(t, "", args...)
		r, err := report.Read([]byte(out))
		if err != nil {
			t.Errorf("%v: %v", args, err)
			continue
		}
		var again bytes.Buffer
		if err := r.Write(&again); err != nil || again.String() != out {
			t.Errorf("%v: read and written again, the report differs (%v)", args, err)
		}
	}
}

// The help of every command names it and gives an example; the manual holds them all.
func TestHelp(t *testing.T) {
	_, manual, _ := call(t, "", "manual")
	for _, name := range []string{"review", "sites", "pair", "symmetry", "orbitals", "survey", "compare", "page", "record", "parameters"} {
		code, out, _ := call(t, "", name, "--help")
		if code != exitOK || !strings.Contains(out, "lobecast "+name) {
			t.Errorf("help of %s: status %d\n%s", name, code, out)
		}
		if !strings.Contains(manual, ".SS "+name) {
			t.Errorf("the manual lacks %s", name)
		}
	}
}

func TestInterruptedReviewKeepsWhatWasDone(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	var out, errs bytes.Buffer
	code := run(ctx, []string{"review", filepath.Join("..", "..", "testdata", "routes", "quinone.toml")}, strings.NewReader(""), &out, &errs)
	if code != exitInterrupted {
		t.Errorf("status %d: %s", code, errs.String())
	}
}

func TestCompare(t *testing.T) {
	dir := t.TempDir()
	a, b := filepath.Join(dir, "a.toml"), filepath.Join(dir, "b.toml")
	route := "[[step]]\nname = \"one\"\nkind = \"electrocyclic\"\nsubstrate = 'C/C=C/C=C\\C=C\\C'\nactivation = \"%\"\n"
	for file, activation := range map[string]string{a: "thermal", b: "photochemical"} {
		in := filepath.Join(dir, "route.toml")
		os.WriteFile(in, []byte(strings.Replace(route, "%", activation, 1)), 0o644)
		if code, _, errs := call(t, "", "review", in, "-o", file); code != exitOK {
			t.Fatalf("status %d: %s", code, errs)
		}
	}
	code, out, _ := call(t, "", "compare", a, b)
	if code != exitOK || !strings.Contains(out, "activation: thermal, now photochemical") {
		t.Errorf("status %d:\n%s", code, out)
	}
	if _, same, _ := call(t, "", "compare", a, a); !strings.Contains(same, "1 of 1 steps unchanged") {
		t.Errorf("a report against itself:\n%s", same)
	}
}
