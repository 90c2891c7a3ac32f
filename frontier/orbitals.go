package frontier

// Orbitals is the Hückel solution of one π system.
//
// Energies are E = α + xβ with β < 0: X runs from the most bonding level (largest x)
// to the most antibonding one. Degenerate levels (within [Degenerate]) are filled as
// a whole, by fractional occupation.
type Orbitals struct {
	N          int       // number of centres
	H          []float64 // the matrix solved, row-major N×N: h_r on the diagonal, k_rs off it
	X          []float64 // level energies in β relative to α, descending
	C          []float64 // coefficients, row-major N×N: C[r*N+j] of centre r in level j
	Occupation []float64 // electrons in level j, 0 … 2, fractional in a partly filled shell
	Electrons  float64   // π electrons
	Energy     float64   // E_π = Σ n_j x_j, in β relative to α

	// HOMO and LUMO are shells: the half-open range of level indices of the highest
	// occupied and lowest empty set of degenerate levels. A partly filled shell is both.
	HOMO, LUMO [2]int
	// Open is set when the highest occupied shell is only partly filled.
	Open bool
}

// Degenerate is the largest difference in x, in |β|, between levels treated as one.
const Degenerate = 1e-9

// Coefficient is c of centre r in level j.
func (o *Orbitals) Coefficient(r, j int) float64 { return o.C[r*o.N+j] }
