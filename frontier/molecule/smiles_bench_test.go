package molecule

import "testing"

// benchmarkMolecules have 26 to 31 atoms; figures are per molecule.
var benchmarkMolecules = []string{
	"CC(C)(C)OC(=O)N1CCC(c2nc3ccccc3n2Cc2ccc(F)cc2)CC1",
	"O=C(Nc1ccc2[nH]ncc2c1)c1cccc(S(=O)(=O)N2CCc3ccccc32)c1",
	"C[C@]12CC[C@H]3[C@@H](CC[C@@H]4C[C@@H](O)CC[C@]34C)[C@@H]1CC[C@@H]2OC(=O)c1ccccc1",
}

func BenchmarkParseSMILES(b *testing.B) {
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		if _, err := ParseSMILES(benchmarkMolecules[i%len(benchmarkMolecules)]); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkSMILES(b *testing.B) {
	var ms []*Molecule
	for _, s := range benchmarkMolecules {
		ms = append(ms, mustParse(b, s))
	}
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		_ = ms[i%len(ms)].SMILES()
	}
}

func BenchmarkClasses(b *testing.B) {
	var ms []*Molecule
	for _, s := range benchmarkMolecules {
		ms = append(ms, mustParse(b, s))
	}
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		m := ms[i%len(ms)]
		m.derived = new(derived)
		_ = m.Classes()
	}
}
