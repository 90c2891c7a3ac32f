package reactivity

import (
	"math"

	"lobecast/frontier"
	"lobecast/frontier/terms"
)

// IndexNames are the names of the indices of attack, in the order of reports.
var IndexNames = []string{
	"localization", "frontier_density", "smoothed_density", "superdelocalizability",
	"charge", "free_valence", "self_polarizability", "reactivity_number",
}

// evaluation holds the indices of every centre of one solved molecule. Slices are by
// centre index of the π system.
type evaluation struct {
	system []int // π system of each centre
	local  []int // its index there

	localization          [3][]float64 // by toward
	frontierDensity       [3][]float64
	smoothedDensity       [3][]float64
	superdelocalizability [3][]float64
	population            []float64
	charge                []float64
	freeValence           []float64
	selfPolarizability    []float64 // nil entries NaN where a shell is open
	reactivityNumber      []float64
	note                  []string // per system: why a superdelocalizability is unreliable
	open                  bool     // a shell is partly filled somewhere
}

// side is the place of a toward in the arrays of an evaluation.
func side(t terms.Toward) int {
	switch t {
	case terms.Nucleophile:
		return 1
	case terms.Radical:
		return 2
	}
	return 0
}

// evaluate computes all indices of all centres, with the given decay of the smoothed
// density.
func evaluate(sol *frontier.Solution, lambda float64, w *Workspace) (*evaluation, error) {
	return evaluateSome(sol, lambda, func(k int) (*Workspace, error) { return w, w.Reset(sol.Systems[k]) }, false)
}

// evaluateSome is evaluate; terse leaves out all but the localization energies.
func evaluateSome(sol *frontier.Solution, lambda float64, space func(system int) (*Workspace, error), terse bool) (*evaluation, error) {
	n := len(sol.Pi.Centres)
	e := &evaluation{system: make([]int, n), local: make([]int, n), note: make([]string, len(sol.Systems))}
	block := make([]float64, 17*n)
	take := func() []float64 {
		s := block[:n:n]
		block = block[n:]
		return s
	}
	for t := range 3 {
		e.localization[t], e.frontierDensity[t] = take(), take()
		e.smoothedDensity[t], e.superdelocalizability[t] = take(), take()
	}
	e.population, e.charge, e.freeValence, e.selfPolarizability, e.reactivityNumber = take(), take(), take(), take(), take()
	var smoothed []Densities
	if !terse {
		smoothed = SmoothedDensities(sol.Systems, lambda)
	}
	for k, o := range sol.Systems {
		w, err := space(k)
		if err != nil {
			return nil, err
		}
		l := w.Localization()
		e.open = e.open || o.Open
		if terse {
			for i, c := range sol.Pi.Systems[k] {
				e.system[c], e.local[c] = k, i
				e.localization[0][c], e.localization[1][c], e.localization[2][c] = l.Electrophile[i], l.Nucleophile[i], l.Radical[i]
			}
			continue
		}
		f := FrontierDensities(o)
		s := Superdelocalizabilities(o)
		q := o.Populations()
		fv := o.FreeValences(sol.Matrices[k].Links)
		pi, closed := o.SelfPolarizabilities()
		nr := ReactivityNumbers(o)
		e.note[k] = s.Note
		for i, c := range sol.Pi.Systems[k] {
			e.system[c], e.local[c] = k, i
			e.localization[0][c], e.localization[1][c], e.localization[2][c] = l.Electrophile[i], l.Nucleophile[i], l.Radical[i]
			e.frontierDensity[0][c], e.frontierDensity[1][c], e.frontierDensity[2][c] = f.Electrophile[i], f.Nucleophile[i], f.Radical[i]
			d := smoothed[k]
			e.smoothedDensity[0][c], e.smoothedDensity[1][c], e.smoothedDensity[2][c] = d.Electrophile[i], d.Nucleophile[i], d.Radical[i]
			e.superdelocalizability[0][c], e.superdelocalizability[1][c], e.superdelocalizability[2][c] = s.Electrophile[i], s.Nucleophile[i], s.Radical[i]
			e.population[c] = q[i]
			e.charge[c] = sol.Pi.Charge(c, q[i])
			e.freeValence[c] = fv[i]
			e.selfPolarizability[c], e.reactivityNumber[c] = math.NaN(), nr[i]
			if closed {
				e.selfPolarizability[c] = pi[i]
			}
		}
	}
	return e, nil
}

// values gives the indices of centre c toward one kind of attack, in the order of
// [IndexNames]; NaN where one is not defined.
func (e *evaluation) values(c int, toward terms.Toward) [8]float64 {
	t := side(toward)
	return [8]float64{
		e.localization[t][c], e.frontierDensity[t][c], e.smoothedDensity[t][c], e.superdelocalizability[t][c],
		e.charge[c], e.freeValence[c], e.selfPolarizability[c], e.reactivityNumber[c],
	}
}

// absentReason says why an index of a centre is not defined.
func (e *evaluation) absentReason(index string) string {
	switch index {
	case "localization":
		return "the residue cannot hold that many electrons"
	case "self_polarizability":
		return "first-order response is not defined for a partly filled shell"
	case "reactivity_number":
		return "defined only for alternant hydrocarbons whose residue has exactly one non-bonding level"
	}
	return "not defined here"
}
