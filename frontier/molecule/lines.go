package molecule

import (
	"bytes"
	"io"
	"strings"
)

// maxLineBytes is the longest line the CTfile readers hold. The format itself
// allows 80 characters (V2000, V3000) and 200 (data items).
const maxLineBytes = 1 << 16

// lineReader gives the lines of a CTfile one by one, in constant memory. Lines end
// with LF, CR LF or CR. It also keeps the count of lines for messages.
type lineReader struct {
	src        io.Reader
	buf        []byte
	start, end int
	err        error // what src returned last
	file       string

	line      []byte // the line read last; valid until the next call of next
	number    int    // its number, from 1
	cut       bool   // the line was longer than maxLineBytes, the rest is dropped
	delimiter bool   // the line is the record delimiter of an SD file
	skipLF    bool   // the line ended with CR: a following LF belongs to it
	dropping  bool   // the rest of an overlong line is still to be dropped
}

func newLineReader(r io.Reader, file string) *lineReader {
	return &lineReader{src: r, file: file, buf: make([]byte, maxLineBytes)}
}

// next reads one line. At the end of the input it returns io.EOF, and what the
// underlying reader returned when that fails.
func (lr *lineReader) next() error {
	scanned := 0
	for {
		window := lr.buf[lr.start:lr.end]
		if lr.skipLF && len(window) > 0 {
			if window[0] == '\n' {
				lr.start++
				window = window[1:]
			}
			lr.skipLF = false
		}
		if i := endOfLine(window[scanned:]); i >= 0 {
			i += scanned
			lr.start += i + 1
			lr.skipLF = window[i] == '\r'
			if lr.dropping {
				lr.dropping = false
				scanned = 0
				continue
			}
			lr.take(window[:i], false)
			return nil
		}
		if lr.dropping {
			lr.start, lr.end, scanned = 0, 0, 0
		} else {
			scanned = len(window)
		}
		if lr.err != nil {
			if lr.start < lr.end && !lr.dropping {
				lr.start = lr.end
				lr.take(window, false)
				return nil
			}
			lr.dropping = false
			lr.line, lr.delimiter, lr.cut = nil, false, false
			return lr.err
		}
		if lr.start > 0 {
			copy(lr.buf, lr.buf[lr.start:lr.end])
			lr.end -= lr.start
			lr.start = 0
		}
		if lr.end == len(lr.buf) {
			lr.take(lr.buf, true)
			lr.start, lr.end = 0, 0
			lr.dropping = true
			return nil
		}
		lr.fill()
	}
}

// fill reads once more from the source, and gives up on one that neither gives
// bytes nor fails.
func (lr *lineReader) fill() {
	for range 100 {
		n, err := lr.src.Read(lr.buf[lr.end:])
		lr.end += n
		lr.err = err
		if n > 0 || err != nil {
			return
		}
	}
	lr.err = io.ErrNoProgress
}

func (lr *lineReader) take(line []byte, cut bool) {
	lr.number++
	if lr.number == 1 {
		line = bytes.TrimPrefix(line, []byte("\xef\xbb\xbf")) // byte order mark
	}
	lr.line, lr.cut = line, cut
	lr.delimiter = bytes.HasPrefix(line, []byte("$$$$"))
}

func endOfLine(b []byte) int {
	n := bytes.IndexByte(b, '\n')
	if n >= 0 {
		b = b[:n]
	}
	if r := bytes.IndexByte(b, '\r'); r >= 0 {
		return r
	}
	return n
}

// text is the line as it is shown to a person: valid UTF-8 without control
// characters.
func lineText(line []byte) string {
	s := strings.ToValidUTF8(string(line), "\uFFFD")
	for i := 0; i < len(s); i++ {
		if s[i] < ' ' || s[i] == 0x7f {
			return strings.Map(func(r rune) rune {
				if r < ' ' || r == 0x7f {
					return ' '
				}
				return r
			}, s)
		}
	}
	return s
}

// refuse places a refusal on the line read last. Column is from 1, in bytes, and
// is turned into characters; 0 is the line as a whole.
func (lr *lineReader) refuse(column int, reason, remedy string) *Error {
	return refuseLine(lr.file, lr.number, lr.line, column, reason, remedy)
}

func refuseLine(file string, number int, line []byte, column int, reason, remedy string) *Error {
	if column > 0 {
		// A byte of a broken UTF-8 sequence is one character after repair, at most.
		column = len([]rune(lineText(line[:min(column-1, len(line))]))) + 1
	}
	return &Error{File: file, Line: number, Column: column, Text: lineText(line), Reason: reason, Remedy: remedy}
}
