package report

// Process is a verdict of orbital symmetry.
type Process struct {
	Input         string   `toml:"input"`
	Name          string   `toml:"name,omitempty"`
	Components    string   `toml:"components"`
	Electrons     int      `toml:"electrons"`
	Thermal       string   `toml:"thermal"`       // allowed or forbidden; absent on disagreement
	Photochemical string   `toml:"photochemical"` // likewise
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
}
