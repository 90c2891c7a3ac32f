package survey

import (
	"bufio"
	"bytes"
	"compress/gzip"
	"errors"
	"fmt"
	"io"
	"regexp"
	"strings"

	"lobecast/frontier/molecule"
)

// MaxLine is the longest line that is read, in bytes; a longer one is refused and
// passed over.
const MaxLine = 1 << 20

// item is one line or record of the input.
type item struct {
	line int
	text string             // SMILES or reaction SMILES and name
	mol  *molecule.Molecule // of an SD record
	err  error
}

// countsLine is the fourth line of a molfile: numbers in columns of three, and the version
// in columns 35 to 39.
var countsLine = regexp.MustCompile(`^[ 0-9]{6}.{27} V[23]000`)

// open prepares one input: gzip is recognised by its first bytes, an SD file by its
// name or, on standard input, by its counts line.
func open(r io.Reader, name string) (func() (item, error), error) {
	b := bufio.NewReaderSize(r, 1<<16)
	lower := strings.ToLower(name)
	head, _ := b.Peek(2)
	if len(head) == 2 && head[0] == 0x1f && head[1] == 0x8b {
		z, err := gzip.NewReader(b)
		if err != nil {
			return nil, fmt.Errorf("cannot read %s as gzip: %w", name, err)
		}
		b = bufio.NewReaderSize(z, 1<<16)
		lower = strings.TrimSuffix(lower, ".gz")
	}
	if mark, _ := b.Peek(3); string(mark) == "\uFEFF" {
		_, _ = b.Discard(3) // a byte order mark, as some editors write
	} else if len(mark) >= 2 && (string(mark[:2]) == "\xff\xfe" || string(mark[:2]) == "\xfe\xff") {
		return nil, fmt.Errorf("cannot read %s: it is text in UTF-16; save it as UTF-8", name)
	}
	sdf := strings.HasSuffix(lower, ".sdf") || strings.HasSuffix(lower, ".sd") || strings.HasSuffix(lower, ".mol")
	if !sdf {
		head, _ := b.Peek(512)
		lines := bytes.SplitN(head, []byte("\n"), 5)
		sdf = len(lines) > 3 && countsLine.Match(lines[3])
	}
	if sdf {
		scanner := molecule.NewSDFScanner(b, name)
		return func() (item, error) {
			m, err := scanner.Next()
			if errors.Is(err, io.EOF) {
				return item{}, io.EOF
			}
			var refusal *molecule.Error
			if err != nil && !errors.As(err, &refusal) {
				return item{}, fmt.Errorf("cannot read %s: %w", name, err)
			}
			return item{mol: m, err: err}, nil
		}, nil
	}
	return func() (item, error) { return nextLine(b, name) }, nil
}

var errCarriageReturns = errors.New("the line goes on after a carriage return: the file has line ends of another kind; save it with line feeds")

var errLongLine = errors.New("the line is longer than 1 MiB; give smaller structures")

// nextLine reads a line; one that is too long is read past and refused.
func nextLine(b *bufio.Reader, name string) (item, error) {
	var long []byte
	for {
		part, err := b.ReadSlice('\n')
		if err == bufio.ErrBufferFull {
			if len(long)+len(part) > MaxLine {
				for err == bufio.ErrBufferFull {
					_, err = b.ReadSlice('\n')
				}
				if err != nil && err != io.EOF {
					return item{}, fmt.Errorf("cannot read %s: %w", name, err)
				}
				return item{text: string(long[:min(len(long), 200)]), err: errLongLine}, nil
			}
			long = append(long, part...)
			continue
		}
		if err != nil && err != io.EOF {
			return item{}, fmt.Errorf("cannot read %s: %w", name, err)
		}
		if err == io.EOF && len(part) == 0 && len(long) == 0 {
			return item{}, io.EOF
		}
		var text string
		if long != nil {
			text = string(append(long, part...))
		} else {
			text = string(part)
		}
		text = strings.TrimRight(text, "\r\n")
		if first, _, more := strings.Cut(text, "\r"); more {
			return item{text: first, err: errCarriageReturns}, nil
		}
		return item{text: text}, nil
	}
}
