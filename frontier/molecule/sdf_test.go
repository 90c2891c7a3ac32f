package molecule

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"runtime"
	"strings"
	"testing"
	"testing/iotest"
)

// scanAll reads an SD file and notes each record as "number@line formula" or
// "number@line refusal".
func scanAll(t testing.TB, r io.Reader) []string {
	t.Helper()
	s := NewSDFScanner(r, "x.sdf")
	var out []string
	for n := 1; n <= 1000; n++ {
		line := s.lr.number + 1
		m, err := s.Next()
		if err == io.EOF {
			if _, again := s.Next(); again != io.EOF {
				t.Errorf("after the end: %v", again)
			}
			return out
		}
		what := ""
		if err != nil {
			what = err.Error()
		} else {
			what = m.Formula()
		}
		out = append(out, fmt.Sprintf("%d@%d %s", n, line, what))
		var e *Error
		if err != nil && !errors.As(err, &e) {
			if _, again := s.Next(); again != err {
				t.Errorf("after %v: %v", err, again)
			}
			return out
		}
	}
	t.Error("the file does not end")
	return out
}

// A bad record is refused at its place, and the next one is read, wherever the bad one
// breaks off.
func TestSDFGoesOn(t *testing.T) {
	const good = "> <ID> (4)\nA-1\nsecond line\n\n>  25  <empty>\n\n$$$$\n"
	for _, c := range []struct{ name, text, want string }{
		{"two records", vinylAmine + good + vinylAmine3000 + "$$$$\n",
			"1@1 C2H5N\n2@18 C2H5N"},
		{"no delimiter at the end", vinylAmine + "$$$$\n" + vinylAmine,
			"1@1 C2H5N\n2@12 C2H5N"},
		{"blank lines at the end", vinylAmine + "$$$$\n\n\n", "1@1 C2H5N"},
		{"bad atom", change(vinylAmine, 6, "nonsense") + "> <ID>\nB\n\n$$$$\n" + vinylAmine + "$$$$\n",
			"1@1 x.sdf: line 6, column 1: the line is too short for atom 2 of 3; does the counts line promise too many atoms?\n2@15 C2H5N"},
		{"bad valence", change(vinylAmine, 8, "  1  2  3  0") + "$$$$\n" + change(vinylAmine, 9, "  2  3  3  0") + "$$$$\n" + vinylAmine,
			"1@1 C2H3N\n2@12 x.sdf: line 17, column 32: atom 2: carbon has bonds that add up to 5 and no charge; check for a surplus bond or a missing charge\n3@23 C2H5N"},
		{"cut record", strings.Join(strings.Split(vinylAmine, "\n")[:6], "\n") + "\n$$$$\n" + vinylAmine,
			"1@1 x.sdf: line 7, column 1: the record ends before atom 3 of 3; the record is cut short or its counts line is too high\n2@8 C2H5N"},
		{"cut header", "title\n$$$$\n" + vinylAmine,
			"1@1 x.sdf: line 2, column 1: the record ends before its counts line; a molfile has three header lines, then the counts line\n2@3 C2H5N"},
		{"empty record", "$$$$\n" + vinylAmine,
			"1@1 x.sdf: line 1, column 1: the record is empty; a molfile has three header lines, then the counts line\n2@2 C2H5N"},
		{"properties cut", change(vinylAmine, 10, "$$$$") + vinylAmine,
			"1@1 x.sdf: line 10, column 1: the record ends before M  END; the record is cut short; charges may be missing\n2@11 C2H5N"},
		{"overlong line", change(vinylAmine, 6, strings.Repeat("x", 200000)) + "$$$$\n" + vinylAmine,
			"1@1 x.sdf: line 6: the line is longer than 65536 bytes; lines of a connection table have at most 80 characters\n2@12 C2H5N"},
		{"overlong data", vinylAmine + "> <big>\n" + strings.Repeat("y", 200000) + "\n\n$$$$\n" + vinylAmine,
			"1@1 C2H5N\n2@15 C2H5N"},
		{"counts beyond the file", "\n\n\n999999  0  0  0  0  0  0  0  0999 V2000\n",
			"1@1 x.sdf: line 4: the file ends before atom 1 of 999; the file is cut short or its counts line is too high"},
		{"blank counts line", "\n\n\n\n\n  1  0\nM  END\n$$$$\n" + vinylAmine,
			"1@1 x.sdf: line 4: the counts line is blank; it is the fourth line and states the numbers of atoms and bonds\n2@9 C2H5N"},
		{"nothing", "", ""},
		{"blank", "\n\n \n\n\n", ""},
	} {
		want := c.want
		if got := strings.Join(scanAll(t, strings.NewReader(c.text)), "\n"); got != want {
			t.Errorf("%s:\n got %.2000s\nwant %.2000s", c.name, got, want)
		}
		for name, text := range map[string]string{
			"CR LF": strings.ReplaceAll(c.text, "\n", "\r\n"),
			"CR":    strings.ReplaceAll(c.text, "\n", "\r"),
			"BOM":   "\xef\xbb\xbf" + c.text,
		} {
			if got := strings.Join(scanAll(t, iotest.HalfReader(strings.NewReader(text))), "\n"); got != want {
				t.Errorf("%s with %s:\n got %.2000s\nwant %.2000s", c.name, name, got, want)
			}
		}
	}
}

// A reader that fails, or gives nothing, ends the run.
func TestSDFReaderFails(t *testing.T) {
	broken := errors.New("the disk is gone")
	text := vinylAmine + "$$$$\n" + vinylAmine[:150]
	got := scanAll(t, io.MultiReader(strings.NewReader(text), iotest.ErrReader(broken)))
	if len(got) != 2 || got[1] != "2@12 the disk is gone" {
		t.Errorf("got %q", got)
	}
	if got := scanAll(t, silent{}); len(got) != 1 || !strings.Contains(got[0], io.ErrNoProgress.Error()) {
		t.Errorf("got %q", got)
	}
	if _, err := readMolfile(iotest.ErrReader(broken), ""); err != broken {
		t.Errorf("got %v", err)
	}
}

type silent struct{}

func (silent) Read([]byte) (int, error) { return 0, nil }

// endless repeats a text.
type endless struct {
	text []byte
	at   int
	left int
}

func (e *endless) Read(b []byte) (int, error) {
	if e.left <= 0 {
		return 0, io.EOF
	}
	n := copy(b, e.text[e.at:])
	e.at = (e.at + n) % len(e.text)
	e.left -= n
	return n, nil
}

// Memory does not grow with the length of the file, nor with the length of a line.
func TestSDFConstantMemory(t *testing.T) {
	record := []byte(vinylAmine + "> <ID>\n1\n\n$$$$\n")
	s := NewSDFScanner(&endless{text: record, left: 10 << 20 / len(record) * len(record)}, "")
	n := 0
	var before, after runtime.MemStats
	runtime.GC()
	runtime.ReadMemStats(&before)
	for {
		_, err := s.Next()
		if err == io.EOF {
			break
		}
		if err != nil {
			t.Fatal(err)
		}
		n++
	}
	runtime.GC()
	runtime.ReadMemStats(&after)
	if n < 10<<20/len(record)-1 {
		t.Errorf("%d records", n)
	}
	if grown := int64(after.HeapAlloc) - int64(before.HeapAlloc); grown > 1<<20 {
		t.Errorf("the heap grew by %d bytes over %d records", grown, n)
	}
	one := NewSDFScanner(&endless{text: []byte("x"), left: 64 << 20}, "")
	runtime.ReadMemStats(&before)
	if _, err := one.Next(); err == nil {
		t.Error("a line of 64 MiB is a record")
	}
	runtime.ReadMemStats(&after)
	if used := after.TotalAlloc - before.TotalAlloc; used > 4<<20 {
		t.Errorf("a line of 64 MiB took %d bytes", used)
	}
}

func ExampleSDFScanner() {
	// Two records, the first of which has a broken counts line.
	const text = `broken
  drawn by hand

  x  0
M  END
$$$$
water
  drawn by hand

  1  0  0  0  0  0  0  0  0  0999 V2000
    0.0000    0.0000    0.0000 O   0  0
M  END
> <supplier>
invented

$$$$
`
	s := NewSDFScanner(strings.NewReader(text), "two.sdf")
	for {
		m, err := s.Next()
		if err == io.EOF {
			break
		}
		if err != nil {
			fmt.Println(err)
			continue
		}
		fmt.Println(m.Name, m.Formula())
	}
	// Output:
	// two.sdf: line 4, column 3: the number of atoms is "x", not a whole number; it stands in columns 1 to 3
	// water H2O
}

func BenchmarkSDF(b *testing.B) {
	for _, name := range []string{"rdkit_v2000.sdf", "rdkit_v3000.sdf"} {
		data, err := os.ReadFile(filepath.Join(witnessFolder, name))
		if err != nil {
			b.Fatal(err)
		}
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			b.SetBytes(int64(len(data)))
			n := 0
			for b.Loop() {
				s := NewSDFScanner(bytes.NewReader(data), name)
				for {
					if _, err := s.Next(); err != nil {
						break
					}
					n++
				}
			}
			b.ReportMetric(float64(n)/b.Elapsed().Seconds(), "records/s")
		})
	}
}
