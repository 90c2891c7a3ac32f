package frontier

import "testing"

// drugs are drug-sized structures of 15 to 30 π centres.
var drugs = []struct{ name, smiles string }{
	{"hydrocarbon", "c1ccc2c(c1)ccc1c2ccc2ccccc21"},
	{"amide", "CC(=O)Nc1ccc(cc1)C(=O)NCc1ccc(OC)c(Cl)c1"},
	{"kinase type", "COc1cc2ncnc(Nc3ccc(F)c(Cl)c3)c2cc1OCCCN1CCOCC1"},
	{"nitro", "O=[N+]([O-])c1ccc(Nc2ncc(Br)c(n2)-c2ccccc2)cc1"},
	{"cation", "CN(C)c1ccc(cc1)C(c1ccccc1)=C1C=CC(=[N+](C)C)C=C1"},
}

func BenchmarkPerceive(b *testing.B) {
	for _, d := range drugs {
		m := mustParse(b, d.smiles)
		b.Run(d.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := Perceive(m, Options{}); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkPerceiveAndMatrix(b *testing.B) {
	set := mustLoad(b, DefaultSet)
	for _, d := range drugs {
		m := mustParse(b, d.smiles)
		b.Run(d.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				pi, err := Perceive(m, Options{})
				if err != nil {
					b.Fatal(err)
				}
				for s := range pi.Systems {
					if _, err := set.Matrix(pi, s); err != nil {
						b.Fatal(err)
					}
				}
			}
		})
	}
}

func BenchmarkSolve(b *testing.B) {
	set := mustLoad(b, DefaultSet)
	for _, d := range drugs {
		pi := mustPerceive(b, d.smiles)
		m, err := set.Matrix(pi, 0)
		if err != nil {
			b.Fatal(err)
		}
		b.Run(d.name, func(b *testing.B) {
			b.ReportAllocs()
			b.ReportMetric(float64(m.N), "centres")
			for b.Loop() {
				if _, err := Solve(m.N, m.H, m.Electrons); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkProtonated(b *testing.B) {
	m := mustParse(b, drugs[2].smiles)
	b.ReportAllocs()
	for b.Loop() {
		if _, _, ok := Protonated(m); !ok {
			b.Fatal("no basic nitrogen")
		}
	}
}
