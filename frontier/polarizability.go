package frontier

// Mutual polarizabilities of atoms and bonds after Coulson and Longuet-Higgins, Proc.
// R. Soc. Lond. A 1947, 191, 39. All are in 1/|β|: the change of a population or
// bond order per unit of h or k. They exist only for closed shells; each method
// returns false for a partly filled shell, where first-order response is undefined.

// AtomPolarizabilities are π_rs = ∂q_r/∂h_s = 4 Σ_j^occ Σ_k^empty c_jr c_kr c_js c_ks
// / (x_j − x_k), row-major N×N. Each row sums to zero. Cost: of order n⁴/4, as n
// matrix products.
func (o *Orbitals) AtomPolarizabilities() (pi []float64, ok bool) {
	if o.Open {
		return nil, false
	}
	n, occ := o.N, o.occupied()
	pi = make([]float64, n*n)
	scaled := make([]float64, n*(n-occ))
	for j := 0; j < occ; j++ {
		for r := 0; r < n; r++ {
			for k := occ; k < n; k++ {
				scaled[r*(n-occ)+k-occ] = o.C[r*n+k] / (o.X[j] - o.X[k])
			}
		}
		for r := 0; r < n; r++ {
			cr := 4 * o.C[r*n+j]
			if cr == 0 {
				continue
			}
			a := scaled[r*(n-occ) : (r+1)*(n-occ)]
			for s := 0; s <= r; s++ {
				b := o.C[s*n+occ : s*n+n]
				sum := 0.0
				for k, v := range a {
					sum += v * b[k]
				}
				pi[r*n+s] += cr * o.C[s*n+j] * sum
			}
		}
	}
	for r := 0; r < n; r++ {
		for s := 0; s < r; s++ {
			pi[s*n+r] = pi[r*n+s]
		}
	}
	return pi, true
}

// SelfPolarizabilities are the π_rr, one per centre: how far the population of r
// follows its own h. Cost: of order n³.
func (o *Orbitals) SelfPolarizabilities() (pi []float64, ok bool) {
	if o.Open {
		return nil, false
	}
	n, occ := o.N, o.occupied()
	pi = make([]float64, n)
	for j := 0; j < occ; j++ {
		for k := occ; k < n; k++ {
			f := 4 / (o.X[j] - o.X[k])
			for r := range pi {
				a, b := o.C[r*n+j], o.C[r*n+k]
				pi[r] += f * a * a * b * b
			}
		}
	}
	return pi, true
}

// AtomBondPolarizability is π_{r,st} = ∂q_r/∂k_st = 2 ∂p_st/∂h_r, in 1/|β|.
func (o *Orbitals) AtomBondPolarizability(r, s, t int) (pi float64, ok bool) {
	if o.Open {
		return 0, false
	}
	n, occ := o.N, o.occupied()
	for j := 0; j < occ; j++ {
		for k := occ; k < n; k++ {
			mixed := o.C[s*n+j]*o.C[t*n+k] + o.C[t*n+j]*o.C[s*n+k]
			pi += 4 * o.C[r*n+j] * o.C[r*n+k] * mixed / (o.X[j] - o.X[k])
		}
	}
	return pi, true
}

// BondPolarizability is π_{rs,tu} = ∂p_rs/∂k_tu, in 1/|β|.
func (o *Orbitals) BondPolarizability(r, s, t, u int) (pi float64, ok bool) {
	if o.Open {
		return 0, false
	}
	n, occ := o.N, o.occupied()
	for j := 0; j < occ; j++ {
		for k := occ; k < n; k++ {
			a := o.C[r*n+j]*o.C[s*n+k] + o.C[s*n+j]*o.C[r*n+k]
			b := o.C[t*n+j]*o.C[u*n+k] + o.C[u*n+j]*o.C[t*n+k]
			pi += 2 * a * b / (o.X[j] - o.X[k])
		}
	}
	return pi, true
}
