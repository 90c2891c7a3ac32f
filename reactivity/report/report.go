package report

// Format is the version of the report's shape; it changes when a key changes meaning.
const Format = 1

// ChanceMeaning stands beside every chance.
const ChanceMeaning = "probability that this is the recorded main product; not a yield, not an isomer ratio"

// NotSafety stands in every report that speaks of a step.
const NotSafety = "a prediction of position is no safety assessment: follow the safety data sheets, local codes and a qualified chemist's hazard review"

// The kinds of report.
const (
	KindSites    = "sites"
	KindPair     = "pair"
	KindSymmetry = "symmetry"
	KindOrbitals = "orbitals"
	KindReview   = "review"
)

// Report is one whole answer.
type Report struct {
	Format     int      `toml:"format"`
	Kind       string   `toml:"kind"`
	Program    string   `toml:"program"`
	Title      string   `toml:"title,omitempty"`
	Parameters string   `toml:"parameters"`
	Borrowed   []string `toml:"borrowed"`
	Safety     string   `toml:"safety,omitempty"`

	Risk      []Risk      `toml:"risk,omitempty"`
	Structure []Structure `toml:"structure,omitempty"`
	Pair      []Pair      `toml:"pair,omitempty"`
	Process   []Process   `toml:"process,omitempty"`
	Step      []Step      `toml:"step,omitempty"`
	Outside   []Remark    `toml:"outside,omitempty"`
	Caution   []Remark    `toml:"caution,omitempty"`
	Record    []Record    `toml:"record,omitempty"`
	Refused   []Refused   `toml:"refused,omitempty"`
}

// Remark is an [[outside]] or [[caution]] entry.
type Remark struct {
	Code      string `toml:"code"`
	Text      string `toml:"text"`
	AppliesTo string `toml:"applies_to"` // which structure or step of this report
}

// Record is the quoted row of the record: how often such calls were right.
type Record struct {
	Event    string `toml:"event"`
	Outcomes int    `toml:"outcomes"` // recorded reactions behind the row
	// Substrates counts distinct substrates, each of which weighs 1.
	Substrates int         `toml:"substrates"`
	Top1       *float64    `toml:"top_1"`
	Top1Limits *[2]float64 `toml:"top_1_limits,omitempty"` // Wilson, 95 %
	Top2       *float64    `toml:"top_2,omitempty"`
	LogLoss    *float64    `toml:"log_loss,omitempty"` // natural logarithm
	Chance     *float64    `toml:"chance_level,omitempty"`
	Clear      *float64    `toml:"clear_share,omitempty"`
	ClearRight *float64    `toml:"clear_right,omitempty"`
	Text       string      `toml:"text"`
}

// Refused is one input that could not be used.
type Refused struct {
	Input   string `toml:"input"`
	File    string `toml:"file,omitempty"`
	Line    int    `toml:"line,omitzero"`
	Column  int    `toml:"column,omitzero"`
	Message string `toml:"message"`
}

// Risk is one line of the order of risk, the most doubtful step first.
type Risk struct {
	Order int    `toml:"order"`
	Step  int    `toml:"step"`
	Line  string `toml:"line"`
}
