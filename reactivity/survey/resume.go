package survey

import (
	"bytes"
	"fmt"
	"io"
	"os"
	"strconv"
)

// Resume prepares an output file that an earlier run left: it cuts off a torn last
// record and tells the line up to which the input is done. The file may be empty.
func Resume(f *os.File, csv bool) (done int, err error) {
	size, err := f.Seek(0, io.SeekEnd)
	if err != nil {
		return 0, err
	}
	if err := sameForm(f, csv); err != nil {
		return 0, err
	}
	end, last, err := lastWhole(f, size, csv)
	if err != nil {
		return 0, err
	}
	if err := f.Truncate(end); err != nil {
		return 0, err
	}
	if _, err := f.Seek(end, io.SeekStart); err != nil {
		return 0, err
	}
	if len(last) == 0 {
		return 0, nil
	}
	return lineOf(last, csv)
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

// lineOf reads the line number of a record.
func lineOf(record []byte, csv bool) (int, error) {
	bad := fmt.Errorf("the output file was not written by survey in this form: its last record has no line number; give another -o, or the --as it was written with")
	if csv {
		if bytes.Equal(append(record, '\n'), []byte(Header)) {
			return 0, nil
		}
		field, _, ok := bytes.Cut(record, []byte(","))
		n, err := strconv.Atoi(string(field))
		if !ok || err != nil {
			return 0, bad
		}
		return n, nil
	}
	if !bytes.HasPrefix(record, []byte("[[result]]")) {
		return 0, bad
	}
	for _, l := range bytes.Split(record, []byte("\n")) {
		if v, ok := bytes.CutPrefix(l, []byte("line = ")); ok {
			n, err := strconv.Atoi(string(v))
			if err != nil {
				return 0, bad
			}
			return n, nil
		}
	}
	return 0, bad
}
