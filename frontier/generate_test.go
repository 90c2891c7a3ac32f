package frontier

import (
	"math/rand/v2"
	"strings"

	"lobecast/frontier/molecule"
)

// graph is a random π graph: the symmetric matrix of a connected set of centres.
type graph struct {
	n     int
	h     []float64
	links []Link
}

func (g *graph) join(i, j int, k float64) {
	if i > j {
		i, j = j, i
	}
	if i == j || g.h[i*g.n+j] != 0 {
		return
	}
	g.h[i*g.n+j], g.h[j*g.n+i] = k, k
	g.links = append(g.links, Link{I: i, J: j, Cos: 1})
}

// randomGraph grows a connected graph of n centres of degree at most three; bipartite
// ones have no odd ring. With hetero, some h and k differ from those of carbon.
func randomGraph(r *rand.Rand, n int, bipartite, hetero bool) *graph {
	g := &graph{n: n, h: make([]float64, n*n)}
	side, degree := make([]int, n), make([]int, n)
	value := func() float64 {
		if hetero && r.IntN(3) == 0 {
			return 0.5 + r.Float64()
		}
		return 1
	}
	for i := 1; i < n; i++ {
		j := r.IntN(i)
		for degree[j] >= 3 {
			j = r.IntN(i)
		}
		side[i] = 1 - side[j]
		g.join(i, j, value())
		degree[i]++
		degree[j]++
	}
	for extra := r.IntN(n/2 + 1); extra > 0; extra-- {
		i, j := r.IntN(n), r.IntN(n)
		if i == j || degree[i] >= 3 || degree[j] >= 3 || bipartite && side[i] == side[j] || g.h[i*n+j] != 0 {
			continue
		}
		g.join(i, j, value())
		degree[i]++
		degree[j]++
	}
	if hetero {
		for i := 0; i < n; i++ {
			if r.IntN(4) == 0 {
				g.h[i*n+i] = 3*r.Float64() - 0.5
			}
		}
	}
	return g
}

// fragments from which legal SMILES are strung together. Each begins with an atom the
// chain before it may bond to and ends with one that may bond on.
var (
	chainPieces = []string{"C=C", "C#C", "c1ccc(cc1)", "c1cc(cnc1)", "C(=O)", "C(=O)N", "C(=O)O", "N", "O", "S",
		"C", "CC", "c1cc(sc1)", "c1cc([nH]c1)", "c1cc(oc1)", "C=N", "N=N", "C(C)=C", "C(F)=C", "c1cc(c2ccccc2c1)",
		"C(=C)", "S(=O)(=O)", "C(C(F)(F)F)=C", "c1cn(cn1)", "B(O)", "C=C=C", "C(=S)", "C(=[NH2+])N", "P(C)(=O)",
		"c1ccc2c(c1)[nH]cc2", "c1cc[n+](cc1)", "C=[N+]([O-])C", "c1nc(ns1)"}
	endPieces = []string{"C", "N", "O", "F", "Cl", "Br", "I", "C#N", "[N+](=O)[O-]", "C(=O)[O-]", "N=[N+]=[N-]", "N=C=O",
		"C(F)(F)F", "c1ccccc1", "C=C", "OC", "SC", "N(C)C", "[N+](C)(C)C", "C#[N+][O-]", "[O-]", "C=[N+]=[N-]", "B(O)O",
		"S(C)(=O)=O", "[CH2+]", "[CH2-]", "[CH2]", "C(C)(C)C", "[Si](C)(C)C", "P(C)C"}
)

// randomSMILES strings fragments together into a legal SMILES, or returns "" where the
// reader refuses the result (a valence the pieces do not allow).
func randomSMILES(r *rand.Rand) (string, *molecule.Molecule) {
	var b strings.Builder
	b.WriteString(endPieces[r.IntN(12)])
	if s := b.String(); strings.HasSuffix(s, "]") || strings.HasPrefix(s, "[") {
		b.Reset()
		b.WriteString("C")
	}
	for k := r.IntN(4) + 1; k > 0; k-- {
		b.WriteString(chainPieces[r.IntN(len(chainPieces))])
	}
	b.WriteString(endPieces[r.IntN(len(endPieces))])
	if r.IntN(6) == 0 {
		b.WriteString("." + endPieces[r.IntN(len(endPieces))] + chainPieces[r.IntN(len(chainPieces))])
	}
	m, err := molecule.ParseSMILES(b.String())
	if err != nil {
		return "", nil
	}
	return b.String(), m
}
