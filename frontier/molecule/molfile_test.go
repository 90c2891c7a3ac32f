package molecule

import (
	"bytes"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// witnessFolder holds molfiles written by RDKit 2022.09.3; each record names the
// SMILES it was made from in its data item SMILES.
const witnessFolder = "../../testdata/molfiles"

// readMolfile reads the first record.
func readMolfile(r io.Reader, file string) (*Molecule, error) { return NewSDFScanner(r, file).Next() }

// sdfRecord is one record of a witness file.
type sdfRecord struct {
	m      *Molecule
	smiles string
}

func readWitness(t testing.TB, name string) []sdfRecord {
	t.Helper()
	text, err := os.ReadFile(filepath.Join(witnessFolder, name))
	if err != nil {
		t.Fatal(err)
	}
	made := strings.Split(string(text), "$$$$\n")
	s := NewSDFScanner(bytes.NewReader(text), name)
	var records []sdfRecord
	for n := 0; ; n++ {
		m, err := s.Next()
		if err == io.EOF {
			return records
		}
		if err != nil {
			t.Errorf("record %d: %v", n+1, err)
			continue
		}
		_, item, ok := strings.Cut(made[n], "<SMILES>")
		lines := strings.Split(item, "\n")
		if !ok || len(lines) < 2 {
			t.Fatalf("record %d of %s names no SMILES", n+1, name)
		}
		records = append(records, sdfRecord{m, lines[1]})
	}
}

// Each molfile must give the molecule of the SMILES string it was made from
// (witness: RDKit 2022.09.3, coordinates and wedges by its own layout).
func TestMolfilesOfReferenceLibrary(t *testing.T) {
	for _, file := range []struct {
		name    string
		records int
	}{{"rdkit_v2000.sdf", 85}, {"rdkit_v3000.sdf", 85}, {"rdkit_aromatic_v2000.sdf", 40}, {"rdkit_3d_v2000.sdf", 24}} {
		records := readWitness(t, file.name)
		if len(records) != file.records {
			t.Errorf("%s: %d records read, %d expected", file.name, len(records), file.records)
		}
		for _, r := range records {
			smiles := r.smiles
			want, err := ParseSMILES(smiles)
			if err != nil {
				t.Errorf("%s: %v", smiles, err)
				continue
			}
			if got, want := r.m.MappedSMILES(), want.MappedSMILES(); got != want {
				t.Errorf("%s, %s (%s): molfile gives %s, SMILES gives %s", file.name, r.m.Name, smiles, got, want)
			}
			if len(r.m.Points) != len(r.m.Atoms) {
				t.Errorf("%s, %s: %d points for %d atoms", file.name, r.m.Name, len(r.m.Points), len(r.m.Atoms))
			}
		}
	}
}
