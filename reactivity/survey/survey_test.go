package survey

import (
	"bytes"
	"compress/gzip"
	"context"
	"encoding/csv"
	"errors"
	"io"
	"math/rand/v2"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/BurntSushi/toml"

	"lobecast/reactivity"
)

// A mixed input: structures, reactions, names, faults, blank lines.
var mixed = strings.Join([]string{
	"c1ccc2ccccc2c1 naphthalene",
	"",
	"# a comment",
	"COc1ccccc1>BrBr>COc1ccc(Br)cc1 anisole, \"para\"",
	"not a smiles",
	"CCO ethanol",
	"Clc1ccnc(Cl)n1.C1COCCN1>>Clc1nccc(N2CCOCC2)n1",
	"c1cccc1",
	"CC(=O)OC(C)=O.Nc1ccccc1>>CC(=O)Nc1ccccc1",
	"C=CC=C.C=CC=O>>O=CC1CCC=CC1",
	"CO/C=C/C=C.C=CC=O>>COC1C=CCCC1C=O",
	"[Na+].[O-]c1ccccc1 salt\tname",
	"C>>",
	"cc>x>",
}, "\n") + "\n"

func text(name, s string) Input {
	return Input{Name: name, Open: func() (io.ReadCloser, error) { return io.NopCloser(strings.NewReader(s)), nil }}
}

func run(t *testing.T, in string, opt Options) (string, Summary) {
	t.Helper()
	opt.Set = reactivity.DefaultSet()
	var out bytes.Buffer
	sum, err := Run(context.Background(), []Input{text("in.smi", in)}, &out, Mark{}, true, opt, nil)
	if err != nil {
		t.Fatal(err)
	}
	return out.String(), sum
}

func TestEveryLineBecomesARecord(t *testing.T) {
	out, sum := run(t, mixed, Options{CSV: true})
	rows, err := csv.NewReader(strings.NewReader(out)).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	if strings.Join(rows[0], ",")+"\n" != Header {
		t.Errorf("header is %q", rows[0])
	}
	lines := []string{"1", "4", "5", "6", "7", "8", "9", "10", "11", "12", "13", "14"}
	status := []string{Judged, Judged, Refused, Refused, Judged, Refused, NotJudged, Judged, Judged, Judged, Refused, Refused}
	if len(rows) != len(lines)+1 {
		t.Fatalf("%d records, want %d:\n%s", len(rows)-1, len(lines), out)
	}
	for i, row := range rows[1:] {
		if row[0] != lines[i] || row[4] != status[i] {
			t.Errorf("record %d is line %s, %s (%s); want line %s, %s", i+1, row[0], row[4], row[13], lines[i], status[i])
		}
	}
	if rows[2][1] != `anisole, "para"` {
		t.Errorf("name is %q", rows[2][1])
	}
	if sum.Read != 12 || sum.Refused != 5 || sum.Written != 12 {
		t.Errorf("summary %+v", sum)
	}
}

func TestTOMLRecordsDecode(t *testing.T) {
	out, _ := run(t, mixed, Options{})
	var doc struct {
		Result []map[string]any `toml:"result"`
	}
	if _, err := toml.Decode(out, &doc); err != nil {
		t.Fatal(err)
	}
	if len(doc.Result) != 12 {
		t.Errorf("%d records", len(doc.Result))
	}
	for _, r := range doc.Result {
		if r["format"] != int64(1) || r["status"] == nil || r["line"] == nil {
			t.Errorf("record lacks keys: %v", r)
		}
	}
}

// repeated is a longer input, so that batches and their order matter.
func repeated(n int) string { return strings.Repeat(mixed, n) }

func TestSameBytesOnAnyNumberOfWorkers(t *testing.T) {
	in := repeated(40)
	one, _ := run(t, in, Options{CSV: true, Workers: 1})
	for _, w := range []int{2, 3, 7} {
		if many, _ := run(t, in, Options{CSV: true, Workers: w}); many != one {
			t.Errorf("%d workers give other bytes than one", w)
		}
	}
}

func TestShardsJoinToTheWhole(t *testing.T) {
	in := repeated(20)
	whole, _ := run(t, in, Options{})
	var joined []string
	for i := 1; i <= 5; i++ {
		part, _ := run(t, in, Options{Shard: Shard{i, 5}})
		joined = append(joined, strings.SplitAfter(part, tomlEnd)...)
	}
	count := map[string]int{}
	for _, r := range joined {
		count[r]++
	}
	for _, r := range strings.SplitAfter(whole, tomlEnd) {
		if r != "" {
			count[r]--
		}
	}
	for r, n := range count {
		if n != 0 && r != "" {
			t.Fatalf("record off by %d: %s", n, r)
		}
	}
}

// An output torn at any byte is mended and completed to the same bytes.
func TestResumeAtAnyByte(t *testing.T) {
	in := repeated(8)
	for _, form := range []bool{true, false} {
		whole, _ := run(t, in, Options{CSV: form})
		rng := rand.New(rand.NewPCG(1, 2))
		path := filepath.Join(t.TempDir(), "out")
		for k := 0; k < 60; k++ {
			cut := rng.IntN(len(whole) + 1)
			if k == 0 {
				cut = 0
			}
			if err := os.WriteFile(path, []byte(whole[:cut]), 0o644); err != nil {
				t.Fatal(err)
			}
			f, err := os.OpenFile(path, os.O_RDWR, 0)
			if err != nil {
				t.Fatal(err)
			}
			done, err := Resume(f, form, Shard{})
			if err != nil {
				t.Fatalf("cut at %d: %v", cut, err)
			}
			at, _ := f.Seek(0, io.SeekCurrent)
			opt := Options{CSV: form, Set: reactivity.DefaultSet()}
			if _, err := Run(context.Background(), []Input{text("in.smi", in)}, f, done, at == 0, opt, nil); err != nil {
				t.Fatal(err)
			}
			f.Close()
			got, _ := os.ReadFile(path)
			if string(got) != whole {
				t.Fatalf("csv %v, cut at %d of %d (done to line %d): the resumed output differs", form, cut, len(whole), done.Line)
			}
		}
	}
}

// A file that no survey wrote is refused and left as it is.
func TestResumeRefusesAForeignFile(t *testing.T) {
	path := filepath.Join(t.TempDir(), "out")
	for _, text := range []string{
		"some text\nof another kind\n", "1,2-dibromoethane is a carcinogen", "1,2-dibromoethane\n3,4-x\nimportant last line",
		Header + "3,4-x\nimportant", "[[result]]\nformat = 1\nof mine\n\nmore", "5,a,b\n",
	} {
		for _, form := range []bool{true, false} {
			for _, shard := range []Shard{{}, {2, 3}} {
				if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
					t.Fatal(err)
				}
				f, err := os.OpenFile(path, os.O_RDWR, 0)
				if err != nil {
					t.Fatal(err)
				}
				if _, err := Resume(f, form, shard); err == nil {
					t.Errorf("csv %v, shard %v: %q is gone on with", form, shard, text)
				}
				f.Close()
				if now, _ := os.ReadFile(path); string(now) != text {
					t.Errorf("csv %v: %q became %q", form, text, now)
				}
			}
		}
	}
}

// The output of another input, or of another shard, is not gone on with.
func TestResumeRefusesAnotherInput(t *testing.T) {
	in := repeated(2)
	for _, form := range []bool{true, false} {
		whole, _ := run(t, in, Options{CSV: form})
		path := filepath.Join(t.TempDir(), "out")
		if err := os.WriteFile(path, []byte(whole), 0o644); err != nil {
			t.Fatal(err)
		}
		f, err := os.OpenFile(path, os.O_RDWR, 0)
		if err != nil {
			t.Fatal(err)
		}
		defer f.Close()
		last, err := Resume(f, form, Shard{})
		if err != nil {
			t.Fatal(err)
		}
		other := "CCO\n" + in
		lines := strings.SplitAfter(in, "\n")
		short := strings.Join(lines[:5], "")
		blank := strings.Join(lines[:last.Line-1], "") + "\n" + in
		for _, c := range []struct {
			in, says string
			shard    Shard
		}{
			{other, "another input", Shard{}},
			{short, "another input", Shard{}},
			{blank, "another input", Shard{}},
			{in, "another shard", Shard{(last.Line-1)%3 + 1, 3}}, // takes the last line, not those before
			{in, "another shard", Shard{last.Line%3 + 1, 3}},
			{in, "", Shard{}},
		} {
			opt := Options{CSV: form, Set: reactivity.DefaultSet(), Shard: c.shard}
			_, err := Run(context.Background(), []Input{text("in.smi", c.in)}, io.Discard, last, false, opt, nil)
			if c.says == "" && err != nil || c.says != "" && (err == nil || !strings.Contains(err.Error(), c.says)) {
				t.Errorf("csv %v, shard %v: %v, want %q", form, c.shard, err, c.says)
			}
		}
	}
}

func TestGzipAndSDF(t *testing.T) {
	var z bytes.Buffer
	w := gzip.NewWriter(&z)
	w.Write([]byte(mixed))
	w.Close()
	plain, _ := run(t, mixed, Options{CSV: true})
	var out bytes.Buffer
	in := Input{Name: "in.smi.gz", Open: func() (io.ReadCloser, error) { return io.NopCloser(&z), nil }}
	if _, err := Run(context.Background(), []Input{in}, &out, Mark{}, true, Options{CSV: true, Set: reactivity.DefaultSet()}, nil); err != nil {
		t.Fatal(err)
	}
	if out.String() != plain {
		t.Error("gzip input gives another output than plain")
	}
}

func TestWhere(t *testing.T) {
	for _, c := range []struct {
		where string
		lines string
	}{
		{"status = refused", "5 6 8 13 14"},
		{"kind = sites and status = judged", "1 12"},
		{"line > 10 or line = 1", "1 11 12 13 14"},
		{"name ~ anisole", "4"},
		{"status != 'judged' and status != \"refused\"", "9"},
		{"planned_rank>=2", ""},
	} {
		f, err := ParseFilter(c.where)
		if err != nil {
			t.Errorf("%q: %v", c.where, err)
			continue
		}
		out, _ := run(t, mixed, Options{CSV: true, Where: f})
		rows, _ := csv.NewReader(strings.NewReader(out)).ReadAll()
		var lines []string
		for _, r := range rows[1:] {
			lines = append(lines, r[0])
		}
		if got := strings.Join(lines, " "); got != c.lines && c.where != "planned_rank>=2" {
			t.Errorf("%q keeps lines %s, want %s", c.where, got, c.lines)
		}
	}
	for _, bad := range []string{"", "line", "line <", "colour = red", "line ~ 3", "line < x", "name < a", "line = 1 xor line = 2", "line = 1 and", "name = 'open", "line ! 3", "call = celar", "status != judgd", "planned_chance < NaN"} {
		if _, err := ParseFilter(bad); err == nil {
			t.Errorf("%q is accepted", bad)
		}
	}
}

func TestParseShard(t *testing.T) {
	for _, bad := range []string{"", "3", "0/4", "5/4", "a/b", "1/0", "-1/3", "1/2/3"} {
		if _, err := ParseShard(bad); err == nil {
			t.Errorf("%q is accepted as a shard", bad)
		}
	}
}

func TestInterruptKeepsWholeRecords(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	var out bytes.Buffer
	opt := Options{CSV: true, Set: reactivity.DefaultSet()}
	_, err := Run(ctx, []Input{text("in.smi", repeated(400))}, &out, Mark{}, true, opt, func(int) { cancel() })
	if !errors.Is(err, context.Canceled) {
		t.Fatalf("error is %v", err)
	}
	whole, _ := run(t, repeated(400), Options{CSV: true})
	if !strings.HasPrefix(whole, out.String()) || !strings.HasSuffix(out.String(), "\n") {
		t.Error("what an interrupted run wrote is not the beginning of the whole")
	}
}

type failing struct{ left int }

func (f *failing) Write(p []byte) (int, error) {
	if f.left -= len(p); f.left < 0 {
		return 0, errors.New("no space left on device")
	}
	return len(p), nil
}

func TestFullDisk(t *testing.T) {
	_, err := Run(context.Background(), []Input{text("in.smi", repeated(100))}, &failing{left: 20000}, Mark{}, true, Options{CSV: true, Set: reactivity.DefaultSet()}, nil)
	if err == nil || !strings.Contains(err.Error(), "no space left") {
		t.Errorf("error is %v", err)
	}
}

func TestLongLineIsRefusedAndPassedOver(t *testing.T) {
	in := "c1ccccc1\n" + strings.Repeat("C", 3<<20) + "\nc1ccccc1C\n"
	out, sum := run(t, in, Options{CSV: true})
	if sum.Read != 3 || sum.Refused != 1 {
		t.Errorf("summary %+v\n%.300s", sum, out)
	}
}

func FuzzLine(f *testing.F) {
	for _, l := range strings.Split(mixed, "\n") {
		f.Add(l)
	}
	opt := Options{CSV: true, Set: reactivity.DefaultSet()}
	f.Fuzz(func(t *testing.T, line string) {
		if len(line) > 400 || strings.Contains(line, "\n") {
			return
		}
		r := judge(&item{line: 1, text: line}, &opt)
		if strings.HasPrefix(r.Message, "internal fault") {
			t.Fatalf("%q: %s", line, r.Message)
		}
		rows, err := csv.NewReader(bytes.NewReader(r.appendCSV(nil))).ReadAll()
		if err != nil || len(rows) != 1 || len(rows[0]) != 14 {
			t.Fatalf("%q: CSV record is %v, %v", line, rows, err)
		}
		var doc any
		if _, err := toml.Decode(string(r.appendTOML(nil)), &doc); err != nil {
			t.Fatalf("%q: TOML record: %v", line, err)
		}
	})
}

// The table for reading has a line for each record, none wider than a terminal of 100.
func TestBriefTable(t *testing.T) {
	out, sum := run(t, mixed, Options{Brief: true})
	lines := strings.Split(strings.TrimSuffix(out, "\n"), "\n")
	if lines[0]+"\n" != BriefHeader || len(lines) != sum.Written+1 {
		t.Errorf("%d lines for %d records, the first %q", len(lines), sum.Written, lines[0])
	}
	for _, l := range lines {
		if utf8.RuneCountInString(l) > 100 {
			t.Errorf("%d columns: %s", utf8.RuneCountInString(l), l)
		}
	}
}

// Files as other programs write them: a byte order mark is passed over, line ends of
// carriage returns are refused and not taken for names, UTF-16 is named, and a counts line
// in the place of a name does not make an SD file.
func TestForeignText(t *testing.T) {
	for _, c := range []struct{ in, want string }{
		{"\uFEFFCOc1ccccc1 anisole\n", "judged"},
		{"COc1ccccc1 anisole\r\n", "judged"},
		{"COc1ccccc1 a\rc1ccoc1 b\r", "carriage return"},
		{"c1ccoc1 a\nc1ccoc1 b\nc1ccoc1 c\nc1ccoc1 made by V2000 tools\n", "made by V2000 tools"},
	} {
		out, _ := run(t, c.in, Options{CSV: true})
		if !strings.Contains(out, c.want) {
			t.Errorf("%q: %s", c.in, out)
		}
	}
	_, err := Run(context.Background(), []Input{text("in.smi", "\xff\xfeC\x00\n\x00")}, io.Discard, Mark{}, true, Options{CSV: true, Set: reactivity.DefaultSet()}, nil)
	if err == nil || !strings.Contains(err.Error(), "UTF-16") {
		t.Errorf("UTF-16: %v", err)
	}
}
