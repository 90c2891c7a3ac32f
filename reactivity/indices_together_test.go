package reactivity

import (
	"math"

	"lobecast/frontier"
	"lobecast/frontier/terms"
)

// indexed holds every index of every centre of one solved molecule, for the tests that
// put them to measurements: [centre][toward][index], the last in the order of IndexNames.
type indexed [][3][8]float64

// allIndices computes every index of every centre once.
func allIndices(sol *frontier.Solution, w *Workspace) (indexed, error) {
	out := make(indexed, len(sol.Pi.Centres))
	smooth := SmoothedDensities(sol.Systems, SmoothingDecay)
	for k, o := range sol.Systems {
		if err := w.Reset(o); err != nil {
			return nil, err
		}
		l, f, s, d := w.Localization(), FrontierDensities(o), Superdelocalizabilities(o), smooth[k]
		q, free, number := o.Populations(), o.FreeValences(sol.Matrices[k].Links), ReactivityNumbers(o)
		polarizability, closed := o.SelfPolarizabilities()
		for i, c := range sol.Pi.Systems[k] {
			self := math.NaN()
			if closed {
				self = polarizability[i]
			}
			rest := [4]float64{sol.Pi.Centres[c].Electrons - q[i], free[i], self, number[i]}
			for t, x := range [3][4]float64{
				{l.Electrophile[i], f.Electrophile[i], d.Electrophile[i], s.Electrophile[i]},
				{l.Nucleophile[i], f.Nucleophile[i], d.Nucleophile[i], s.Nucleophile[i]},
				{l.Radical[i], f.Radical[i], d.Radical[i], s.Radical[i]},
			} {
				out[c][t] = [8]float64{x[0], x[1], x[2], x[3], rest[0], rest[1], rest[2], rest[3]}
			}
		}
	}
	return out, nil
}

func (x indexed) values(centre int, toward terms.Toward) [8]float64 {
	for t, w := range terms.Towards {
		if w == toward {
			return x[centre][t]
		}
	}
	panic("attack by " + string(toward))
}
