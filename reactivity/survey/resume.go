package survey

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"io"
	"os"
	"slices"
	"strconv"

	"github.com/BurntSushi/toml"
)

// Mark is the last record of an output: the line it is of, 0 where there is none, and what
// it says was judged.
type Mark struct {
	Line  int
	Input string
	tail  []int // lines of the records before it, as far as they were looked at
}

// belongs refuses to go on with the output of another input or shard. it is the item of
// the mark's line.
func (k Mark) belongs(it *item, shard Shard) error {
	for _, line := range append(k.tail, k.Line) {
		if !shard.takes(line) {
			return fmt.Errorf("the output file belongs to another shard: it holds a record of line %d; give its own --shard, or another -o", line)
		}
	}
	input, _ := it.input()
	if input = onOneLine(input); input != k.Input {
		return k.foreign(fmt.Sprintf("%.60q", input))
	}
	return nil
}

// foreign says that the line of the mark is something else in the input.
func (k Mark) foreign(here string) error {
	return fmt.Errorf("the output file belongs to another input: line %d is %.60q there and %s here; give the input it was made from, or another -o", k.Line, k.Input, here)
}

// Resume prepares an output file that an earlier run left: it cuts off a torn last
// record and tells which is the last whole one. The file may be empty. A file that was
// not written by a survey in this form is refused and left as it is.
func Resume(f *os.File, csv bool, shard Shard) (Mark, error) {
	size, err := f.Seek(0, io.SeekEnd)
	if err != nil {
		return Mark{}, err
	}
	if err := sameForm(f, csv, shard); err != nil {
		return Mark{}, err
	}
	end, last, before, err := lastWhole(f, size, csv)
	if err != nil {
		return Mark{}, err
	}
	var mark Mark
	if len(last) > 0 {
		if mark, err = markOf(last, csv); err != nil {
			return Mark{}, err
		}
		mark.tail = linesOf(before, csv)
	}
	if err := f.Truncate(end); err != nil {
		return Mark{}, err
	}
	_, err = f.Seek(end, io.SeekStart)
	return mark, err
}

// sameForm refuses a file that does not begin as an output of this form does: to cut
// it would destroy what it holds.
func sameForm(f *os.File, csv bool, shard Shard) error {
	head := make([]byte, 512)
	n, err := f.ReadAt(head, 0)
	if err != nil && err != io.EOF {
		return err
	}
	head = head[:n]
	begins := func(s string) bool {
		k := min(len(s), n)
		return string(head[:k]) == s[:k]
	}
	const table = "[[result]]\nformat = "
	row := false // a shard other than the first has no header
	if comma := bytes.IndexByte(head, ','); comma > 0 {
		line, err := strconv.Atoi(string(head[:comma]))
		row = err == nil && line > 1 && shard.I > 1 && shard.takes(line)
	}
	switch {
	case n == 0, csv && (begins(Header) || row), !csv && begins(table):
		return nil
	case csv && n > len(table) && begins(table):
		return fmt.Errorf("the output file holds TOML records; resume it without --as csv")
	case !csv && n > len(Header) && begins(Header):
		return fmt.Errorf("the output file holds CSV records; resume it with --as csv")
	}
	return fmt.Errorf("the output file was not written by survey in this form and shard; give another -o, or the --as and --shard it was written with")
}

// lastWhole finds the end of the last whole record, its text, and some of what stands
// before it, reading backwards in growing steps.
func lastWhole(f *os.File, size int64, csv bool) (end int64, last, before []byte, err error) {
	terminator := []byte(tomlEnd)
	if csv {
		terminator = []byte("\n")
	}
	for step := int64(1 << 16); ; step *= 4 {
		from := max(0, size-step)
		buf := make([]byte, size-from)
		if _, err := f.ReadAt(buf, from); err != nil && err != io.EOF {
			return 0, nil, nil, err
		}
		end := bytes.LastIndex(buf, terminator)
		if end < 0 {
			if from == 0 {
				return 0, nil, nil, nil // nothing whole
			}
			continue
		}
		start := bytes.LastIndex(buf[:end], terminator)
		if start < 0 && from > 0 {
			continue
		}
		if start < 0 {
			start = 0
		} else {
			start += len(terminator)
		}
		return from + int64(end+len(terminator)), buf[start:end], buf[:start], nil
	}
}

// markOf reads the line number and the input of a record.
func markOf(record []byte, csvForm bool) (Mark, error) {
	bad := fmt.Errorf("the output file was not written by survey in this form: its last record has no line number; give another -o, or the --as it was written with")
	if csvForm {
		if bytes.Equal(append(record, '\n'), []byte(Header)) {
			return Mark{}, nil
		}
		fields, err := csv.NewReader(bytes.NewReader(record)).Read()
		if err != nil || len(fields) != len(ColumnNames) {
			return Mark{}, bad
		}
		n, err := strconv.Atoi(fields[0])
		if err != nil || n < 1 || !slices.Contains(statuses, Status(fields[4])) {
			return Mark{}, bad
		}
		return Mark{Line: n, Input: fields[3]}, nil
	}
	var file struct {
		Result []struct {
			Line  int
			Input string
		}
	}
	if _, err := toml.Decode(string(record), &file); err != nil || len(file.Result) != 1 || file.Result[0].Line < 1 {
		return Mark{}, bad
	}
	return Mark{Line: file.Result[0].Line, Input: file.Result[0].Input}, nil
}

// linesOf lists the line numbers of the records in a piece of an output; the first may be
// torn and is passed over.
func linesOf(piece []byte, csvForm bool) []int {
	prefix, end := []byte("\nline = "), byte('\n')
	if csvForm {
		prefix, end = []byte("\n"), ','
	}
	var list []int
	for {
		_, rest, ok := bytes.Cut(piece, prefix)
		if !ok {
			return list
		}
		digits, _, _ := bytes.Cut(rest[:min(len(rest), 24)], []byte{end})
		if n, err := strconv.Atoi(string(digits)); err == nil && n > 0 {
			list = append(list, n)
		}
		piece = rest
	}
}
