package molecule

import (
	"bytes"
	"io"
	"strings"
)

// maxFieldBytes bounds what is kept of the data items of one record.
const maxFieldBytes = 1 << 20

// SDFScanner reads the records of an SD file one after the other, in constant memory.
//
//	s := molecule.NewSDFScanner(r, "library.sdf")
//	for {
//		m, err := s.Next()
//		if err == io.EOF {
//			break
//		}
//		…
//	}
type SDFScanner struct {
	lr     *lineReader
	record int
	line   int
	fields []Field
	failed error
}

// Field is a data item of an SD file: its name, and its lines joined by newlines.
type Field struct{ Name, Value string }

// NewSDFScanner reads from r; the name of the file serves messages only. What is
// compressed must be expanded by r.
func NewSDFScanner(r io.Reader, file string) *SDFScanner {
	return &SDFScanner{lr: newLineReader(r, file)}
}

// Next reads the next record and returns its structure, as [ReadMolfile] does. After
// the last record it returns io.EOF.
//
// An error of type [*Error] refuses one record only: the next call goes on behind its
// delimiter, the line $$$$. Any other error comes from the reader and is final.
func (s *SDFScanner) Next() (*Molecule, error) {
	if s.failed != nil {
		return nil, s.failed
	}
	s.fields = s.fields[:0]
	s.lr.delimiter = false
	s.line = s.lr.number + 1
	m, err := readRecord(s.lr)
	if err == io.EOF {
		s.failed = err
		return nil, err
	}
	s.record++
	if _, refused := err.(*Error); err != nil && !refused {
		s.failed = err
		return nil, err
	}
	if !s.lr.delimiter {
		if end := s.readData(err == nil); end != nil && end != io.EOF {
			s.failed = end
			return nil, end
		}
	}
	return m, err
}

// Record is the number of the record that Next read last, from 1.
func (s *SDFScanner) Record() int { return s.record }

// Line is the number of the line on which that record begins, from 1.
func (s *SDFScanner) Line() int { return s.line }

// Fields are the data items of the record that Next read last, in the order of the
// file; they are overwritten by the next call. Of a refused record there are none.
// What exceeds 1 MiB in one record is left out.
func (s *SDFScanner) Fields() []Field { return s.fields }

// Field is the value of the first data item of the name given, and whether there is
// one.
func (s *SDFScanner) Field(name string) (string, bool) {
	for i := range s.fields {
		if s.fields[i].Name == name {
			return s.fields[i].Value, true
		}
	}
	return "", false
}

// readData reads up to the delimiter, and keeps the data items where keep is set.
func (s *SDFScanner) readData(keep bool) error {
	kept := 0
	var value []byte
	open := false
	shut := func() {
		if open {
			s.fields[len(s.fields)-1].Value = strings.ToValidUTF8(string(bytes.TrimSuffix(value, []byte("\n"))), "\uFFFD")
			value, open = value[:0], false
		}
	}
	for {
		if err := s.lr.next(); err != nil {
			shut()
			return err
		}
		line := s.lr.line
		if s.lr.delimiter {
			shut()
			return nil
		}
		if !keep {
			continue
		}
		switch {
		case len(bytes.TrimSpace(line)) == 0:
			shut()
		case line[0] == '>' && !open:
			kept += len(line)
			if kept <= maxFieldBytes {
				s.fields = append(s.fields, Field{Name: fieldName(line[1:])})
				open = true
			}
		case open:
			kept += len(line) + 1
			if kept <= maxFieldBytes {
				value = append(append(value, line...), '\n')
			}
		}
	}
}

// fieldName is the name between angle brackets of a data header, or the header where
// it has none.
func fieldName(header []byte) string {
	if from := bytes.IndexByte(header, '<'); from >= 0 {
		if to := bytes.LastIndexByte(header, '>'); to > from {
			header = header[from+1 : to]
		}
	}
	return strings.TrimSpace(lineText(header))
}
