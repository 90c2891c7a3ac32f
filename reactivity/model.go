package reactivity

import (
	"embed"
	"encoding/csv"
	"fmt"
	"math"
	"strconv"
	"strings"
	"sync"

	"lobecast/frontier"
	"lobecast/frontier/terms"
)

// The fitted numbers: weights.csv (event, term, weight, error), parameters.csv
// (parameter, published, prior, value, error), shares.csv (event, class, share of the
// outcomes), covariance.csv (covariance of parameters and weights), record.csv. All are
// written by [Refitting.Write].
//
//go:embed calibration/*.csv
var calibrationFiles embed.FS

// calibratedName is the parameter set the chances are fitted with.
const calibratedName = "calibrated"

// model is the fitted model: the calibrated set and the weights of every event.
type model struct {
	set     *frontier.Set
	columns parameterColumns
	sites   map[terms.Event]*siteFit // layout and weights only, no outcomes
	weights map[terms.Event][]float64
	pairs   *pairFit

	covariance func() *covariance // read when first asked for
}

// covariance holds the posterior covariance of the parameters of the set and of the
// weights of each event with them; of two events' weights with each other nothing is
// needed.
type covariance struct {
	// event → dense symmetric matrix over parameters, then weights.
	joint map[terms.Event][]float64
	size  map[terms.Event]int // rows of each
}

var fittedEvents = []terms.Event{terms.ElectrophilicSubstitution, terms.NucleophilicSubstitution, terms.CycloadditionOrientation}

// fitted is the model in the binary.
var fitted = sync.OnceValue(func() *model {
	m, err := loadModel()
	if err != nil {
		panic("reactivity: embedded calibration: " + err.Error())
	}
	return m
})

func calibrationTable(name string, fields int, row func(rec []string) error) error {
	f, err := calibrationFiles.Open("calibration/" + name)
	if err != nil {
		return err
	}
	defer f.Close()
	r := csv.NewReader(f)
	r.FieldsPerRecord = fields
	r.ReuseRecord = true
	for line := 1; ; line++ {
		rec, err := r.Read()
		if err != nil {
			if rec == nil && err.Error() == "EOF" {
				return nil
			}
			return fmt.Errorf("%s: %w", name, err)
		}
		if line == 1 {
			continue
		}
		if err := row(rec); err != nil {
			return fmt.Errorf("%s, line %d: %w", name, line, err)
		}
	}
}

func eventWeightNames(e terms.Event) []string {
	if e == terms.CycloadditionOrientation {
		return pairWeightNames()
	}
	return weightNames(e)
}

// loadModel reads the embedded calibration and checks that it has been written for the
// terms of this program: each event must list exactly the terms of the code, in order.
func loadModel() (*model, error) {
	set, err := frontier.Load(calibratedName)
	if err != nil {
		return nil, err
	}
	m := &model{set: set, sites: map[terms.Event]*siteFit{}, weights: map[terms.Event][]float64{}}
	m.columns.column = make([]int32, len(set.Values))
	for i := range m.columns.column {
		m.columns.column[i] = -1
	}
	err = calibrationTable("parameters.csv", 5, func(rec []string) error {
		p, ok := frontier.ParameterOf(rec[0])
		if !ok {
			return fmt.Errorf("no parameter is called %q", rec[0])
		}
		m.columns.column[p] = int32(m.columns.n)
		m.columns.n++
		v, err := strconv.ParseFloat(rec[3], 64)
		if err == nil && math.Abs(v-set.Values[p]) > 1e-9 {
			err = fmt.Errorf("%s is %v here and %v in the calibrated set", rec[0], v, set.Values[p])
		}
		return err
	})
	if err != nil {
		return nil, err
	}
	followParents(m.columns.column)
	err = calibrationTable("weights.csv", 4, func(rec []string) error {
		e := terms.Event(rec[0])
		names := eventWeightNames(e)
		k := len(m.weights[e])
		if k >= len(names) || names[k] != rec[1] {
			return fmt.Errorf("the weight of %q of %s does not belong to a term of this program; refit", rec[1], e)
		}
		w, err := strconv.ParseFloat(rec[2], 64)
		m.weights[e] = append(m.weights[e], w)
		return err
	})
	if err != nil {
		return nil, err
	}
	share := map[terms.Event][]float64{}
	err = calibrationTable("shares.csv", 3, func(rec []string) error {
		e := terms.Event(rec[0])
		k := len(share[e])
		if classes := attackerClasses[e]; k >= len(classes) || classes[k] != rec[1] {
			return fmt.Errorf("%q is not the next class of what comes in for %s; refit", rec[1], e)
		}
		x, err := strconv.ParseFloat(rec[2], 64)
		share[e] = append(share[e], x)
		return err
	})
	if err != nil {
		return nil, err
	}
	for _, e := range fittedEvents {
		n := len(eventWeightNames(e))
		if len(m.weights[e]) != n {
			return nil, fmt.Errorf("weights.csv gives %d of the %d weights of %s; refit", len(m.weights[e]), n, e)
		}
		if e == terms.CycloadditionOrientation {
			m.pairs = &pairFit{weights: n}
			continue
		}
		m.sites[e] = &siteFit{event: e, count: physicalCount(e), terms: siteTermList(e), share: share[e], weights: n}
	}
	m.covariance = sync.OnceValue(func() *covariance {
		c, err := loadCovariance(m.columns.n)
		if err != nil {
			panic("reactivity: embedded calibration: " + err.Error())
		}
		return c
	})
	return m, nil
}

// loadCovariance reads covariance.csv: for each event the rows of its lower triangle
// over parameters and weights. The first column is the number of the event among the
// fitted ones, from 1; the block of the parameters stands once, under 0.
func loadCovariance(parameters int) (*covariance, error) {
	c := &covariance{joint: map[terms.Event][]float64{}}
	text, err := calibrationFiles.ReadFile("calibration/covariance.csv")
	if err != nil {
		return nil, err
	}
	size := map[terms.Event]int{}
	c.size = size
	for _, e := range fittedEvents {
		n := parameters + len(eventWeightNames(e))
		size[e] = n
		c.joint[e] = make([]float64, n*n)
	}
	rows := map[terms.Event]int{}
	for _, e := range fittedEvents {
		rows[e] = parameters
	}
	shared := 0
	for line, l := range strings.Split(strings.TrimRight(string(text), "\n"), "\n") {
		if line == 0 {
			continue
		}
		fields := strings.Split(l, ",")
		var e terms.Event
		if k, err := strconv.Atoi(fields[0]); err != nil || k < 0 || k > len(fittedEvents) {
			return nil, fmt.Errorf("covariance.csv, line %d: unknown event %q", line+1, fields[0])
		} else if k > 0 {
			e = fittedEvents[k-1]
		}
		at := shared
		targets := fittedEvents
		if e != "" {
			at = rows[e]
			rows[e]++
			targets = []terms.Event{e}
		} else {
			shared++
		}
		if len(fields)-1 != at+1 {
			return nil, fmt.Errorf("covariance.csv, line %d: %d numbers instead of %d", line+1, len(fields)-1, at+1)
		}
		for j, f := range fields[1:] {
			v, err := strconv.ParseFloat(f, 64)
			if err != nil {
				return nil, fmt.Errorf("covariance.csv, line %d: %w", line+1, err)
			}
			for _, t := range targets {
				n := size[t]
				if at >= n {
					return nil, fmt.Errorf("covariance.csv, line %d: too many rows", line+1)
				}
				c.joint[t][at*n+j], c.joint[t][j*n+at] = v, v
			}
		}
	}
	for _, e := range fittedEvents {
		if shared != parameters || rows[e] != size[e] {
			return nil, fmt.Errorf("covariance.csv gives %d rows of %d for %s; refit", rows[e], size[e], e)
		}
	}
	return c, nil
}

// calibrated tells whether a set is the one the chances are fitted with.
func (m *model) calibrated(s *frontier.Set) bool {
	if s == m.set {
		return true
	}
	if len(s.Values) != len(m.set.Values) {
		return false
	}
	for i, v := range s.Values {
		if v != m.set.Values[i] {
			return false
		}
	}
	return true
}

// quadratic computes variances gᵀ Σ g for one event, g over the parameters and then the
// weights of the event, or over a numbering of its own.
type quadratic struct {
	size   int
	matrix []float64
	index  []int32   // entries of g that matter
	part   []float64 // Σ gathered for them
	values []float64
}

// set takes the covariance of an event; where only parameters matter, any will do.
func (q *quadratic) set(c *covariance, e terms.Event) {
	q.matrix = c.joint[e]
	q.size = c.size[e]
}

// gather picks the entries of g that matter, and the rows and columns of Σ that belong
// to them.
func (q *quadratic) gather(index, whole []int32) {
	q.index = index
	n := len(index)
	q.part = grow(q.part, n*n)
	for a, i := range whole {
		row := q.matrix[int(i)*q.size : (int(i)+1)*q.size]
		part := q.part[a*n : (a+1)*n]
		for b, j := range whole {
			part[b] = row[j]
		}
	}
}

// of is the variance along g, given densely.
func (q *quadratic) of(g []float64) float64 {
	n := len(q.index)
	q.values = grow(q.values, n)
	for a, i := range q.index {
		q.values[a] = g[i]
	}
	sum := 0.0
	for a, x := range q.values {
		if x == 0 {
			continue
		}
		row := q.part[a*n : (a+1)*n]
		s := 0.0
		for b, y := range q.values {
			s += row[b] * y
		}
		sum += x * s
	}
	return math.Max(sum, 0)
}
