package molecule

import "io"

// SDFScanner reads the records of an SD file, V2000 or V3000, one after the other, in
// constant memory. A molfile is an SD file of one record.
//
//	s := molecule.NewSDFScanner(r, "library.sdf")
//	for {
//		m, err := s.Next()
//		if err == io.EOF {
//			break
//		}
//		…
//	}
//
// What is taken over: elements, charges, isotopes, radicals, stated valences, atom
// maps, bonds, coordinates (in Points), the title line (in Name). Wedged bonds
// become configurations of atoms; double bonds take theirs from the coordinates,
// unless drawn crossed, next to a wavy bond, in a ring of fewer than eight atoms, or
// without coordinates. In a table without wedges but with three-dimensional
// coordinates these give the configurations of atoms too. The chiral flag is not
// used: a wedge is read as drawn, whether for one enantiomer or for relative
// configuration. Aromatic bonds (type 4) are turned into a Kekulé form; where no
// hydrogens are stated on nitrogen and several inequivalent places are possible,
// the table is refused. A coordination bond (type 9) is read as a single bond with
// the donor, its first atom, positive and the acceptor negative; hydrogen bonds
// (type 10) are left out. Explicit plain hydrogens become counts. The data items
// behind the table are passed over.
//
// Refused, as not being one complete structure: search queries (atom lists, bond
// types 5 to 8, search restrictions), R groups, attachment points, abbreviations
// that hide atoms, and repeat units of polymers.
type SDFScanner struct {
	lr     *lineReader
	failed error
}

// NewSDFScanner reads from r; the name of the file serves messages only. What is
// compressed must be expanded by r.
func NewSDFScanner(r io.Reader, file string) *SDFScanner {
	return &SDFScanner{lr: newLineReader(r, file)}
}

// Next reads the next record and returns its structure, whose Atom.Number is the number
// of the atom in the table. After the last record it returns io.EOF.
//
// An error of type [*Error] refuses one record only: the next call goes on behind its
// delimiter, the line $$$$. Any other error comes from the reader and is final.
func (s *SDFScanner) Next() (*Molecule, error) {
	if s.failed != nil {
		return nil, s.failed
	}
	s.lr.delimiter = false
	m, err := readRecord(s.lr)
	if err == io.EOF {
		s.failed = err
		return nil, err
	}
	if _, refused := err.(*Error); err != nil && !refused {
		s.failed = err
		return nil, err
	}
	for !s.lr.delimiter {
		end := s.lr.next()
		if end == io.EOF {
			break
		}
		if end != nil {
			s.failed = end
			return nil, end
		}
	}
	return m, err
}
