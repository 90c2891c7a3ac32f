package reactivity

import (
	"math"

	"lobecast/frontier"
)

// parameterPrior is the Gaussian prior on the parameters of the calibrated set: a root
// class is drawn to its published value, a class split off from it to the fitted value
// of its parent.
type parameterPrior struct {
	columns   parameterColumns // of the free parameters, and of those that follow one
	own       []int32          // column of each parameter that is free itself, -1 for the others
	names     []string         // of the free parameters, by column
	published []float64        // their published values
	spread    []float64        // standard deviation of the prior, by column
	parent    []int            // column of the parent that is free too, -1 for none
	precision [][]float64      // dense, by column
}

// publishedSpread holds the standard deviation over published sets of h and k with
// carbon, where at least three of them give a value: Van-Catledge 1980, Streitwieser
// 1961, Derflinger and Lischka 1969, Pullman and Pullman 1963 (k far above 1 in the
// third and fourth, for C=O and lone-pair N and O, is left out, as those authors meant
// other things by it). Values as in testdata of the frontier package, partly from
// memory.
var publishedSpread = map[string]float64{
	"h N1": 0.19, "h N2": 0.23, "h O1": 0.12, "h O2": 0.05, "h F": 0.15, "h Cl": 0.31, "h Br": 0.24,
	"k C N1": 0.03, "k C N2": 0.22, "k C O2": 0.12, "k C F": 0.10, "k C Cl": 0.12,
}

// Widths of the prior where fewer sets are to be compared, and the least width given:
// the sets differ in what they were fitted to, so that a small spread says little.
const (
	leastSpread     = 0.12
	splitSpread     = 0.12 // of a class about its parent, in h and k
	inductiveSpread = 0.12
)

// newParameterPrior frees the listed parameters around the values of base.
func newParameterPrior(base *frontier.Set, free []frontier.Parameter) *parameterPrior {
	p := &parameterPrior{columns: parameterColumns{column: make([]int32, len(base.Values)), n: len(free)}}
	for i := range p.columns.column {
		p.columns.column[i] = -1
	}
	for c, f := range free {
		p.columns.column[f] = int32(c)
	}
	p.own = append([]int32(nil), p.columns.column...)
	followParents(p.columns.column)
	n := len(free)
	p.precision = make([][]float64, n)
	for c, f := range free {
		p.precision[c] = make([]float64, n)
		name := f.String()
		p.names = append(p.names, name)
		p.published = append(p.published, base.Values[f])
		parent := -1
		if f.Parent() != f {
			parent = int(p.own[f.Parent()])
		}
		p.parent = append(p.parent, parent)
		width := leastSpread
		switch {
		case f.Parent() != f:
			width = splitSpread
			if parent < 0 { // its parent occurs nowhere by itself: both widths
				width = math.Hypot(splitSpread, math.Max(leastSpread, publishedSpread[f.Parent().String()]))
			}
		case len(name) > 9 && name[:9] == "inductive":
			width = inductiveSpread
		default:
			width = math.Max(leastSpread, publishedSpread[name])
		}
		p.spread = append(p.spread, width)
	}
	for c := range free {
		w := 1 / (p.spread[c] * p.spread[c])
		p.precision[c][c] += w
		if q := p.parent[c]; q >= 0 {
			p.precision[c][q] -= w
			p.precision[q][c] -= w
			p.precision[q][q] += w
		}
	}
	return p
}

// add puts the prior's share of the loss, ½ (θ−θ₀)ᵀ Λ (θ−θ₀), into the gradient and
// returns it.
func (p *parameterPrior) add(theta, gradient []float64) float64 {
	loss := 0.0
	for i, row := range p.precision {
		d := theta[i] - p.published[i]
		g := 0.0
		for j, w := range row {
			if w != 0 {
				g += w * (theta[j] - p.published[j])
			}
		}
		gradient[i] += g
		loss += d * g / 2
	}
	return loss
}

// setWith is a copy of base with the free parameters at theta. A class that is not free
// follows its parent.
func (p *parameterPrior) setWith(base *frontier.Set, theta []float64) *frontier.Set {
	s := base.Clone()
	for i := range s.Values {
		f := frontier.Parameter(i)
		if c := p.own[f]; c >= 0 {
			s.Values[i] = theta[c]
		} else if c := p.columns.column[f]; c >= 0 {
			s.Values[i] += theta[c] - p.published[c]
		}
	}
	return s
}

// followParents gives a parameter without a column that of its nearest ancestor with one,
// whose moves it follows.
func followParents(column []int32) {
	for i := range column {
		for a := frontier.Parameter(i); column[i] < 0; a = a.Parent() {
			if column[a.Parent()] >= 0 {
				column[i] = column[a.Parent()]
			}
			if a == a.Parent() {
				break
			}
		}
	}
}
