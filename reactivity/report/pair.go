package report

// Pair is the ranking of the cycloadditions of two molecules, or of one with itself.
type Pair struct {
	A      string `toml:"a"` // canonical SMILES of the first argument
	B      string `toml:"b,omitempty"`
	InputA string `toml:"input_a"`
	// NumbersA and NumbersB are the numbers in the input of the atoms of A and B, in the
	// order in which their SMILES are written.
	NumbersA []int  `toml:"numbers_a,omitempty"`
	NumbersB []int  `toml:"numbers_b,omitempty"`
	InputB   string `toml:"input_b,omitempty"`
	Demand   string `toml:"demand"` // normal, inverse or neutral
	Call     string `toml:"call"`
	// Thermal is the orbital-symmetry verdict of the suprafacial addition.
	Thermal       string    `toml:"thermal,omitempty"`
	Photochemical string    `toml:"photochemical,omitempty"`
	ChanceMeaning string    `toml:"chance_meaning,omitempty"`
	ChanceAbsent  string    `toml:"chance_absent,omitempty"`
	LewisAcid     string    `toml:"lewis_acid,omitempty"`
	Notes         []string  `toml:"notes,omitempty"`
	Gaps          *Gaps     `toml:"gaps,omitempty"`
	Joining       []Joining `toml:"joining,omitempty"`
	Adduct        []Adduct  `toml:"adduct,omitempty"`
}

// Gaps are the two frontier gaps in |β|.
type Gaps struct {
	HOMOaLUMOb *float64 `toml:"homo_a_lumo_b"`
	HOMObLUMOa *float64 `toml:"homo_b_lumo_a,omitempty"`
	Dominant   string   `toml:"dominant,omitempty"`
	// The same gaps without the Lewis acid that was stated.
	WithoutHOMOaLUMOb *float64 `toml:"homo_a_lumo_b_without_lewis_acid,omitempty"`
	WithoutHOMObLUMOa *float64 `toml:"homo_b_lumo_a_without_lewis_acid,omitempty"`
}

// Joining says which π systems join.
type Joining struct {
	Order  int      `toml:"order"`
	AAtoms []int    `toml:"a_atoms"`
	BAtoms []int    `toml:"b_atoms"`
	RoleA  string   `toml:"role_a"`
	RoleB  string   `toml:"role_b"`
	DeltaE *float64 `toml:"delta_e"`
}

// Adduct is one orientation of a joining.
type Adduct struct {
	Joining       int         `toml:"joining"`
	Rank          int         `toml:"rank"`
	Bonds         [][2]int    `toml:"bonds"`
	Relation      string      `toml:"relation"`
	Configuration string      `toml:"configuration,omitempty"`
	Chance        *float64    `toml:"chance,omitempty"`
	Limits        *[2]float64 `toml:"chance_limits,omitempty"`
	Because       string      `toml:"because,omitempty"`
	DeltaE        *float64    `toml:"delta_e"`
	FirstBond     *[2]int     `toml:"first_bond,omitempty"`
	Asynchronous  *float64    `toml:"asynchronicity,omitempty"` // |β|
	Frontier      *float64    `toml:"frontier_product,omitempty"`
	Product       string      `toml:"product"`
	Endo          string      `toml:"endo,omitempty"`
	Exo           string      `toml:"exo,omitempty"`
	EndoNote      string      `toml:"endo_note,omitempty"`
}
