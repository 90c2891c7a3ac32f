package reactivity

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"io"
	"math"
	"os"
	"path/filepath"
	"strconv"

	"gonum.org/v1/gonum/mat"

	"lobecast/frontier"
)

// publishedBase is the set whose values the priors are centred on.
const publishedBase = "van-catledge-1980"

// Refitting is a repeated fit with its record.
type Refitting struct {
	data       *fitData
	point      *fitPoint
	covariance *mat.SymDense
	// Cross-validated predictions by event, in the order of rows.
	bySubstrate, byGroup [][]prediction
	published            [][]prediction // by substrate, the parameters held at the published values
	coverage             []coverage
	folder               string
}

// Refit repeats the calibration: it reads the outcome files of folder
// (electrophilic_substitution.csv, nucleophilic_substitution.csv, diels_alder.csv), fits the
// parameters of the calibrated set and the weights of all events together, and
// cross-validates over substrates and over groups. The same data give the same numbers
// on the same architecture, on any number of cores. Progress goes to log, which may be
// nil.
func Refit(folder string, log io.Writer) (*Refitting, error) {
	base, err := frontier.Load(publishedBase)
	if err != nil {
		return nil, err
	}
	d, err := newFitData(folder, base)
	if err != nil {
		return nil, err
	}
	r := &Refitting{data: d, folder: folder}
	say := func(format string, args ...any) {
		if log != nil {
			fmt.Fprintf(log, format+"\n", args...)
		}
	}
	say("%d free parameters, %d numbers to fit in all", d.prior.columns.n, d.dimension())
	if err := r.fit(say); err != nil {
		return nil, err
	}
	say("cross-validation over substrates")
	if r.bySubstrate, err = d.crossValidate(func(r *siteRow) int { return r.fold }, func(r *pairRow) int { return r.fold }, log); err != nil {
		return nil, err
	}
	say("cross-validation over groups")
	group := func(g uint64) int { return foldOf(strconv.FormatUint(g, 16)) }
	if r.byGroup, err = d.crossValidate(func(r *siteRow) int { return group(r.group) }, func(r *pairRow) int { return group(r.group) }, log); err != nil {
		return nil, err
	}
	say("cross-validation with the published parameters")
	d.held = true
	r.published, err = d.crossValidate(func(r *siteRow) int { return r.fold }, func(r *pairRow) int { return r.fold }, nil)
	d.held = false
	if err != nil {
		return nil, err
	}
	say("simulation of the limits")
	if err := r.simulate(); err != nil {
		return nil, err
	}
	// Leave the data at the fitted point.
	return r, d.linearize(r.point)
}

// fit finds the most probable point and its covariance.
func (r *Refitting) fit(say func(string, ...any)) error {
	d := r.data
	p, _, err := d.maximize(d.start(), d.everything(), func(round int, o float64) {
		say("round %d: objective %.4f", round+1, o)
	})
	if err != nil {
		return err
	}
	r.point = roundPoint(p)
	if err := d.linearize(r.point); err != nil {
		return err
	}
	var chol mat.Cholesky
	if !chol.Factorize(d.information(r.point, d.everything())) {
		return fmt.Errorf("the information matrix of the fit is not positive definite")
	}
	r.covariance = new(mat.SymDense)
	return chol.InverseTo(r.covariance)
}

// roundPoint keeps 6 decimals, as the numbers are embedded.
func roundPoint(p *fitPoint) *fitPoint {
	q := p.clone()
	round := func(s []float64) {
		for i, v := range s {
			s[i] = math.Round(v*1e6) / 1e6
			if s[i] == 0 {
				s[i] = 0
			}
		}
	}
	round(q.theta)
	for _, w := range q.weights {
		round(w)
	}
	return q
}

func sixDigits(v float64) string { return strconv.FormatFloat(v, 'f', 6, 64) }

// deviation is the square root of a diagonal element of the covariance.
func (r *Refitting) deviation(i int) float64 { return math.Sqrt(r.covariance.At(i, i)) }

// Write puts the fitted numbers and the record in their places below root, the top of
// the source tree: frontier/sets/calibrated.toml, reactivity/calibration/*.csv,
// docs/record.md with its diagrams and docs/calibration-terms.md.
func (r *Refitting) Write(root string) error {
	files, err := r.Files()
	if err != nil {
		return err
	}
	for _, f := range files {
		path := filepath.Join(root, filepath.FromSlash(f.Path))
		if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
			return err
		}
		if err := os.WriteFile(path, f.Content, 0o644); err != nil {
			return err
		}
	}
	return nil
}

// File is one file a refit yields, its path below the top of the source tree.
type File struct {
	Path    string
	Content []byte
}

// Files are the contents that [Refitting.Write] writes.
func (r *Refitting) Files() ([]File, error) {
	files := []File{
		{"frontier/sets/calibrated.toml", []byte(r.calibratedSet().TOML())},
		{"reactivity/calibration/parameters.csv", r.parametersCSV()},
		{"reactivity/calibration/weights.csv", r.weightsCSV()},
		{"reactivity/calibration/shares.csv", r.sharesCSV()},
		{"reactivity/calibration/covariance.csv", r.covarianceCSV()},
		{"docs/calibration-terms.md", r.termsMarkdown()},
	}
	if r.bySubstrate == nil {
		return files, nil
	}
	record, err := r.recordMarkdown()
	if err != nil {
		return nil, err
	}
	files = append(files, File{"reactivity/calibration/record.csv", r.recordCSV()}, File{"docs/record.md", record})
	for k, e := range fittedEvents {
		files = append(files, File{"docs/" + diagramName(e), r.reliabilitySVG(k)})
	}
	return files, nil
}

// calibratedSet is the set at the fitted point, sources and all.
func (r *Refitting) calibratedSet() *frontier.Set {
	d := r.data
	s := d.prior.setWith(d.base, r.point.theta)
	s.Name = calibratedName
	s.Citation = "fitted to published outcomes of electrophilic and nucleophilic substitution and of Diels–Alder orientation; see docs/calibration.md"
	s.Note = "Most probable values under Gaussian priors at the published ones. Entries that too few outcomes hold keep the value they have in the published set, or follow their parent class; they are marked as borrowed."
	for i := range s.Values {
		p := frontier.Parameter(i)
		if c := d.prior.own[p]; c >= 0 {
			s.Given[i], s.Borrowed[i] = true, ""
			s.Source[i] = fmt.Sprintf("fitted, ± %.3f; prior %.3f ± %.2f", r.deviation(int(c)), d.prior.published[c], d.prior.spread[c])
			if q := d.prior.parent[c]; q >= 0 {
				s.Source[i] = fmt.Sprintf("fitted, ± %.3f; prior that of %s, apart by ± %.2f", r.deviation(int(c)), d.prior.names[q], d.prior.spread[c])
			}
			continue
		}
		if s.Values[i] != d.base.Values[i] {
			s.Values[i] = math.Round(s.Values[i]*1e6) / 1e6
			s.Given[i] = true
			s.Source[i] = fmt.Sprintf("%s, moved with its parent class; was: %s", s.Name, s.Source[i])
			if s.Borrowed[i] == "" {
				s.Borrowed[i] = publishedBase
			}
			continue
		}
		if s.Given[i] && s.Borrowed[i] == "" && p.String() != "h C" && p.String() != "k C C" {
			s.Borrowed[i] = publishedBase
		}
	}
	return s
}

func csvBytes(rows [][]string) []byte {
	var b bytes.Buffer
	w := csv.NewWriter(&b)
	w.WriteAll(rows) // a bytes.Buffer takes everything
	return b.Bytes()
}

func (r *Refitting) parametersCSV() []byte {
	rows := [][]string{{"parameter", "published", "prior", "value", "error"}}
	for c, name := range r.data.prior.names {
		rows = append(rows, []string{name, strconv.FormatFloat(r.data.prior.published[c], 'g', -1, 64),
			strconv.FormatFloat(r.data.prior.spread[c], 'g', 6, 64), sixDigits(r.point.theta[c]), sixDigits(r.deviation(c))})
	}
	return csvBytes(rows)
}

// offset is where the weights of fitted event k begin in the joint vector.
func (r *Refitting) offset(k int) int {
	n := len(r.point.theta)
	for _, w := range r.point.weights[:k] {
		n += len(w)
	}
	return n
}

func (r *Refitting) weightsCSV() []byte {
	rows := [][]string{{"event", "term", "weight", "error"}}
	for k, e := range fittedEvents {
		at := r.offset(k)
		for i, name := range eventWeightNames(e) {
			rows = append(rows, []string{string(e), name, sixDigits(r.point.weights[k][i]), sixDigits(r.deviation(at + i))})
		}
	}
	return csvBytes(rows)
}

func (r *Refitting) sharesCSV() []byte {
	rows := [][]string{{"event", "class", "share"}}
	for _, f := range r.data.sites {
		for k, c := range attackerClasses[f.event] {
			rows = append(rows, []string{string(f.event), c, sixDigits(f.share[k])})
		}
	}
	return csvBytes(rows)
}

func (r *Refitting) covarianceCSV() []byte {
	var b bytes.Buffer
	b.WriteString("event,lower triangle of the covariance over the parameters and then the weights of the event\n")
	n := len(r.point.theta)
	row := func(event, i int, columns []int) {
		b.WriteString(strconv.Itoa(event))
		for _, j := range columns {
			v := r.covariance.At(i, j)
			t := "0"
			if math.Abs(v) >= 1e-9 {
				t = strconv.FormatFloat(v, 'g', 4, 64)
			}
			b.WriteString("," + t)
		}
		b.WriteByte('\n')
	}
	columns := make([]int, 0, n)
	for i := range n {
		columns = append(columns, i)
		row(0, i, columns)
	}
	for k := range fittedEvents {
		at := r.offset(k)
		columns := append([]int(nil), columns...)
		for i := range r.point.weights[k] {
			columns = append(columns, at+i)
			row(k+1, at+i, columns)
		}
	}
	return b.Bytes()
}

// termsMarkdown is docs/calibration-terms.md: every fitted number with its error.
func (r *Refitting) termsMarkdown() []byte {
	var b bytes.Buffer
	p := func(format string, args ...any) { fmt.Fprintf(&b, format+"\n", args...) }
	p("# Every fitted number\n")
	p("Written by the refit; see [calibration.md](calibration.md) for what the terms mean. ± is the standard deviation of the posterior.\n")
	p("## Parameters of the calibrated set\n")
	p("| parameter | published | prior ± | fitted | ± |")
	p("|---|---|---|---|---|")
	for c, name := range r.data.prior.names {
		p("| %s | %.2f | %.2f | %.4f | %.3f |", name, r.data.prior.published[c], r.data.prior.spread[c], r.point.theta[c], r.deviation(c))
	}
	for k, e := range fittedEvents {
		p("\n## %s\n", eventTitle(e))
		p("Weights on the logarithm of a chance. Indices count per 0.1 |β| (energies), 0.1 (density), 0.1 e (charge).\n")
		p("| term | prior | weight | ± |")
		p("|---|---|---|---|")
		mean, prior := r.data.weightPrior(k)
		at := r.offset(k)
		for i, name := range eventWeightNames(e) {
			w := r.point.weights[k][i]
			if math.Abs(w-mean[i]) < 5e-7 {
				continue // no outcome speaks to it: the prior stands
			}
			p("| %s | %.2f ± %.2f | %.3f | %.3f |", name, mean[i], prior[i], w, r.deviation(at+i))
		}
	}
	return b.Bytes()
}
