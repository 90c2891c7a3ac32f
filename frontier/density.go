package frontier

import "math"

// Populations are the π populations q_r = Σ n_j c²_jr, one per centre, in electrons
// (Coulson and Longuet-Higgins, Proc. R. Soc. Lond. A 1947, 191, 39). They sum to
// Electrons.
func (o *Orbitals) Populations() []float64 {
	q := make([]float64, o.N)
	occ := o.occupied()
	for r := range q {
		row := o.C[r*o.N : r*o.N+occ]
		for j, c := range row {
			q[r] += o.Occupation[j] * c * c
		}
	}
	return q
}

// BondOrder is p_rs = Σ n_j c_jr c_js (Coulson, Proc. R. Soc. Lond. A 1939, 169, 413).
// For r = s it is the population.
func (o *Orbitals) BondOrder(r, s int) float64 {
	p := 0.0
	occ := o.occupied()
	a, b := o.C[r*o.N:r*o.N+occ], o.C[s*o.N:s*o.N+occ]
	for j := range a {
		p += o.Occupation[j] * a[j] * b[j]
	}
	return p
}

// Density is the bond-order matrix P, row-major N×N: populations on the diagonal,
// bond orders off it. For a closed shell P² = 2P.
func (o *Orbitals) Density() []float64 {
	n, occ := o.N, o.occupied()
	p := make([]float64, n*n)
	for r := 0; r < n; r++ {
		a := o.C[r*n : r*n+occ]
		for s := 0; s <= r; s++ {
			b := o.C[s*n : s*n+occ]
			v := 0.0
			for j := range a {
				v += o.Occupation[j] * a[j] * b[j]
			}
			p[r*n+s], p[s*n+r] = v, v
		}
	}
	return p
}

// MaximumBonding is Coulson's √3, the largest sum of π bond orders a carbon can have:
// that of the middle carbon of trimethylenemethane (Moffitt's value, used by Coulson,
// Discuss. Faraday Soc. 1947, 2, 9).
var MaximumBonding = math.Sqrt(3)

// FreeValences are F_r = √3 − Σ_s p_rs, the sum over the linked neighbours of r
// (Coulson, Discuss. Faraday Soc. 1947, 2, 9). Links to hyperconjugating alkyl groups
// count like any other. The constant is that of carbon; for a heteroatom the number
// is formal.
func (o *Orbitals) FreeValences(links []Link) []float64 {
	f := make([]float64, o.N)
	for r := range f {
		f[r] = MaximumBonding
	}
	for _, l := range links {
		p := o.BondOrder(l.I, l.J)
		f[l.I] -= p
		f[l.J] -= p
	}
	return f
}
