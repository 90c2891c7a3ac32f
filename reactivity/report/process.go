package report

// Process is a verdict of orbital symmetry.
type Process struct {
	Input         string   `toml:"input"`
	Name          string   `toml:"name,omitempty"`
	Components    string   `toml:"components"`
	Electrons     int      `toml:"electrons"`
	Thermal       string   `toml:"thermal,omitempty"`       // allowed or forbidden; absent on disagreement
	Photochemical string   `toml:"photochemical,omitempty"` // likewise
	Mode          string   `toml:"mode,omitempty"`
	Derivations   int      `toml:"derivations"`
	Agreement     string   `toml:"agreement"`
	Feasible      string   `toml:"feasible,omitempty"`
	Product       string   `toml:"product,omitempty"`
	GapBefore     *float64 `toml:"gap_before,omitempty"` // |β|
	GapAfter      *float64 `toml:"gap_after,omitempty"`
	PiBefore      string   `toml:"pi_before,omitempty"`
	PiAfter       string   `toml:"pi_after,omitempty"`
	Notes         []string `toml:"notes,omitempty"`

	// Reactant is the canonical SMILES of the reactants, in the order given; Numbers are
	// the numbers in the input of its atoms, in the order written.
	Reactant string     `toml:"reactant,omitempty"`
	Numbers  []int      `toml:"numbers,omitempty"`
	Forms    [][2]int   `toml:"forms,omitempty"`  // σ bonds that form, as numbers in the input
	Breaks   [][2]int   `toml:"breaks,omitempty"` // σ bonds that break
	Orbital  []Reacting `toml:"orbital,omitempty"`
}

// Reacting is one orbital of the reacting ring, in its order round the ring.
type Reacting struct {
	Label string   `toml:"label"`         // "C3", "H on C5"
	Atom  int      `toml:"atom,omitzero"` // number in the input; absent for a hydrogen that was not written
	Kind  string   `toml:"kind"`          // π, σ or ω
	HOMO  *float64 `toml:"homo"`          // coefficient in the highest occupied level of the reactant
	LUMO  *float64 `toml:"lumo"`          // coefficient in the lowest empty level of the reactant
}
