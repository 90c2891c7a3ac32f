package survey

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"io"
	"os"
	"strconv"

	"github.com/BurntSushi/toml"
)

// Mark is the last record of an output: the line it is of, 0 where there is none, and what
// it says was judged.
type Mark struct {
	Line  int
	Input string
}

// belongs refuses to go on with the output of another input or shard. it is the item of
// the mark's line.
func (k Mark) belongs(it *item, shard Shard) error {
	if !shard.takes(k.Line) {
		return fmt.Errorf("the output file belongs to another shard: its last record is of line %d; give its own --shard, or another -o", k.Line)
	}
	input, _ := it.input()
	if input = onOneLine(input); input != k.Input {
		return fmt.Errorf("the output file belongs to another input: line %d is %.60q there and %.60q here; give the input it was made from, or another -o", k.Line, k.Input, input)
	}
	return nil
}

// Resume prepares an output file that an earlier run left: it cuts off a torn last
// record and tells which is the last whole one. The file may be empty.
func Resume(f *os.File, csv bool) (Mark, error) {
	none := Mark{}
	size, err := f.Seek(0, io.SeekEnd)
	if err != nil {
		return none, err
	}
	if err := sameForm(f, csv); err != nil {
		return none, err
	}
	end, last, err := lastWhole(f, size, csv)
	if err != nil {
		return none, err
	}
	if err := f.Truncate(end); err != nil {
		return none, err
	}
	if _, err := f.Seek(end, io.SeekStart); err != nil {
		return none, err
	}
	if len(last) == 0 {
		return none, nil
	}
	return markOf(last, csv)
}

// sameForm refuses a file that does not begin as an output of this form does: to cut
// it would destroy what it holds.
func sameForm(f *os.File, csv bool) error {
	head := make([]byte, len(Header))
	n, err := f.ReadAt(head, 0)
	if err != nil && err != io.EOF {
		return err
	}
	head = head[:n]
	begins := func(s string) bool {
		k := min(len(s), n)
		return string(head[:k]) == s[:k]
	}
	table := "[[result]]\nformat = "
	shard := n > 0 && head[0] >= '0' && head[0] <= '9' && bytes.IndexByte(head, ',') > 0 // a shard has no header
	switch {
	case n == 0, csv && (begins(Header) || shard), !csv && begins(table):
		return nil
	case csv && begins(table):
		return fmt.Errorf("the output file holds TOML records; resume it without --as csv")
	case !csv && (begins(Header) || shard):
		return fmt.Errorf("the output file holds CSV records; resume it with --as csv")
	}
	return fmt.Errorf("the output file was not written by survey; give another -o")
}

// lastWhole finds the end of the last whole record, and its text, reading backwards in
// growing steps.
func lastWhole(f *os.File, size int64, csv bool) (int64, []byte, error) {
	terminator := []byte(tomlEnd)
	if csv {
		terminator = []byte("\n")
	}
	for step := int64(1 << 16); ; step *= 4 {
		from := max(0, size-step)
		buf := make([]byte, size-from)
		if _, err := f.ReadAt(buf, from); err != nil && err != io.EOF {
			return 0, nil, err
		}
		end := bytes.LastIndex(buf, terminator)
		if end < 0 {
			if from == 0 {
				return 0, nil, nil // nothing whole
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
		return from + int64(end+len(terminator)), buf[start:end], nil
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
		if err != nil || len(fields) < 4 {
			return Mark{}, bad
		}
		n, err := strconv.Atoi(fields[0])
		if err != nil {
			return Mark{}, bad
		}
		return Mark{n, fields[3]}, nil
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
	return Mark{file.Result[0].Line, file.Result[0].Input}, nil
}
