package report

// Aside is a component that was set aside: a counter-ion, a salt, a solvent.
type Aside struct {
	Name   string `toml:"name"`
	SMILES string `toml:"smiles"`
}

// Structure is one molecule with what was found and ranked in it.
type Structure struct {
	Input  string `toml:"input"`
	Name   string `toml:"name,omitempty"`
	SMILES string `toml:"smiles"` // canonical
	// Numbers are the numbers in the input of the atoms of SMILES, in the order written.
	Numbers []int `toml:"numbers,omitempty"`
	// Points are the coordinates of a molfile, for the atoms of SMILES in that order.
	Points      [][2]float64 `toml:"points,omitempty"`
	Formula     string       `toml:"formula"`
	PiAtoms     int          `toml:"pi_atoms"`
	PiElectrons *float64     `toml:"pi_electrons"`
	Medium      string       `toml:"medium,omitempty"`
	Hyper       []int        `toml:"hyperconjugating,omitempty"` // carbons whose alkyl group hyperconjugates
	Warnings    []string     `toml:"warnings,omitempty"`
	Aside       []Aside      `toml:"aside,omitempty"`

	// orbitals reports only
	Level []Level `toml:"level,omitempty"`
	Atom  []Atom  `toml:"atom,omitempty"`
	Bond  []Bond  `toml:"bond,omitempty"`

	Attack []Attack `toml:"attack,omitempty"`
}

// Attack is the ranking of one event.
type Attack struct {
	Toward        string   `toml:"toward"`
	Event         string   `toml:"event"`
	Call          string   `toml:"call"`
	ChanceMeaning string   `toml:"chance_meaning,omitempty"`
	ChanceAbsent  string   `toml:"chance_absent,omitempty"`
	Disagree      string   `toml:"indices_disagree,omitempty"`
	Species       []string `toml:"species,omitempty"`
	Notes         []string `toml:"notes,omitempty"`
	Site          []Site   `toml:"site,omitempty"`
	Ipso          []Site   `toml:"ipso,omitempty"`
}

// Site is one set of equivalent atoms.
type Site struct {
	Rank    int         `toml:"rank"`
	Atoms   []int       `toml:"atoms"` // numbers in the input, from 1
	Place   string      `toml:"place"`
	Chance  *float64    `toml:"chance,omitempty"`
	Limits  *[2]float64 `toml:"chance_limits,omitempty"` // 90 %
	Because string      `toml:"because,omitempty"`
	Leaving string      `toml:"leaving,omitempty"`
	Product string      `toml:"product,omitempty"`
	Index   *Index      `toml:"index,omitempty"`
}

// Index holds the indices of attack of a site. Limits are 90 %.
type Index struct {
	Localization       *float64    `toml:"localization,omitempty"`
	LocalizationLimits *[2]float64 `toml:"localization_limits,omitempty"`
	LocalizationAbsent string      `toml:"localization_absent,omitempty"`

	FrontierDensity       *float64 `toml:"frontier_density,omitempty"`
	FrontierDensityAbsent string   `toml:"frontier_density_absent,omitempty"`

	SmoothedDensity       *float64    `toml:"smoothed_density,omitempty"`
	SmoothedDensityLimits *[2]float64 `toml:"smoothed_density_limits,omitempty"`
	SmoothedDensityAbsent string      `toml:"smoothed_density_absent,omitempty"`

	Superdelocalizability       *float64    `toml:"superdelocalizability,omitempty"`
	SuperdelocalizabilityLimits *[2]float64 `toml:"superdelocalizability_limits,omitempty"`
	SuperdelocalizabilityAbsent string      `toml:"superdelocalizability_absent,omitempty"`
	SuperdelocalizabilityNote   string      `toml:"superdelocalizability_note,omitempty"`

	Charge       *float64    `toml:"charge,omitempty"` // π charge: electrons brought minus π population
	ChargeLimits *[2]float64 `toml:"charge_limits,omitempty"`
	ChargeAbsent string      `toml:"charge_absent,omitempty"`

	FreeValence       *float64 `toml:"free_valence,omitempty"`
	FreeValenceAbsent string   `toml:"free_valence_absent,omitempty"`

	SelfPolarizability       *float64 `toml:"self_polarizability,omitempty"` // 1/|β|
	SelfPolarizabilityAbsent string   `toml:"self_polarizability_absent,omitempty"`

	ReactivityNumber       *float64 `toml:"reactivity_number,omitempty"`
	ReactivityNumberAbsent string   `toml:"reactivity_number_absent,omitempty"`
}

// Atom is one centre of an orbitals report.
type Atom struct {
	Centre      int      `toml:"centre"` // from 1, over all π systems of the structure
	System      int      `toml:"system"` // from 1
	Local       bool     `toml:"local,omitempty"`
	Atom        int      `toml:"atom"` // number in the input
	Element     string   `toml:"element"`
	Class       string   `toml:"class"`
	Alkyl       bool     `toml:"alkyl,omitempty"`
	H           *float64 `toml:"h"`
	Electrons   *float64 `toml:"electrons"`
	Population  *float64 `toml:"population"`
	Charge      *float64 `toml:"charge"`
	FreeValence *float64 `toml:"free_valence,omitempty"`
	FreeAbsent  string   `toml:"free_valence_absent,omitempty"`
	SelfPol     *float64 `toml:"self_polarizability,omitempty"` // 1/|β|
	SelfAbsent  string   `toml:"self_polarizability_absent,omitempty"`
}

// Bond is one resonance integral of an orbitals report.
type Bond struct {
	Centres [2]int   `toml:"centres"`
	K       *float64 `toml:"k"`
	Order   *float64 `toml:"order"`
}

// Level is one orbital level: its energy is α + xβ.
type Level struct {
	System       int       `toml:"system"`
	X            *float64  `toml:"x"`
	Occupation   *float64  `toml:"occupation"`
	Degeneracy   int       `toml:"degeneracy,omitzero"` // when above 1
	Coefficients []float64 `toml:"coefficients"`        // over the centres of the system, in ascending order
}
