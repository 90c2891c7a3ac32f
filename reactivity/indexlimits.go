package reactivity

import (
	"math"

	"lobecast/frontier/terms"
)

// limitedIndices are the indices that carry 90 % limits from the covariance of h and k,
// as places in [IndexNames].
var limitedIndices = [4]int{0, 2, 3, 4} // localization, smoothed density, superdelocalizability, charge

// indexDerivatives gives the derivatives by the fitted parameters of the limited indices
// of centres of one species, toward one kind of attack.
type indexDerivatives struct {
	s       *species
	toward  terms.Toward
	columns *parameterColumns
	sides   []*responder // toward itself; both an electrophile and a nucleophile for a radical
	spaces  []*Workspace
	by      []float64
	element []float64
	system  []int
	local   []int
}

func newIndexDerivatives(s *species, toward terms.Toward, columns *parameterColumns) *indexDerivatives {
	d := &indexDerivatives{s: s, toward: toward, columns: columns, system: s.values.system, local: s.values.local}
	list := []terms.Toward{toward}
	if toward == terms.Radical {
		list = []terms.Toward{terms.Electrophile, terms.Nucleophile}
	}
	for _, t := range list {
		w := indexWorkspaces.Get().(*Workspace)
		d.spaces = append(d.spaces, w)
		d.sides = append(d.sides, newResponder(s.solution, t, 3, columns, w))
	}
	return d
}

func (d *indexDerivatives) release() {
	for _, w := range d.spaces {
		indexWorkspaces.Put(w)
	}
}

// add adds share times the derivatives at a centre to dst, one row of columns per
// limited index.
func (d *indexDerivatives) add(centre int, share float64, dst []float64) error {
	n := d.columns.n
	k, local := d.system[centre], d.local[centre]
	m := d.s.solution.Matrices[k]
	var z [3]float64
	d.by = grow(d.by, 3*n)
	half := share / float64(len(d.sides))
	for i, r := range d.sides {
		clear(d.by)
		if err := r.at(centre, k, local, half, z[:], d.by); err != nil {
			return err
		}
		// Energies of attack are means of the two sides as well: L^R = (L^E + L^N)/2.
		if d.toward != terms.Radical || !d.s.values.open {
			addTo(dst[:n], d.by[:n])
		}
		addTo(dst[n:2*n], d.by[n:2*n])
		addTo(dst[3*n:4*n], d.by[2*n:3*n])
		var err error
		if d.element, err = d.spaces[i].SuperdelocalizabilityGradient(local, r.toward, m.Links, d.element); err != nil {
			return err
		}
		d.columns.contract(m, d.element, half, dst[2*n:3*n])
	}
	if d.toward == terms.Radical && d.s.values.open {
		var err error
		if d.element, err = d.spaces[0].LocalizationGradient(local, d.toward, m.Links, d.element); err != nil {
			return err
		}
		d.columns.contract(m, d.element, share, dst[:n])
	}
	return nil
}

func addTo(dst, x []float64) {
	for i, v := range x {
		dst[i] += v
	}
}

// indexLimits fills in the limits of the indices of sites, in the order of candidates.
func (m *model) indexLimits(forms []*species, sites []Site, toward terms.Toward) error {
	n := m.columns.n
	all := make([]float64, len(sites)*4*n)
	for _, s := range forms {
		d := newIndexDerivatives(s, toward, &m.columns)
		err := func() error {
			defer d.release()
			for c := range sites {
				atoms := sites[c].Atoms
				if len(forms) == 1 && !s.protonated {
					atoms = atoms[:1]
				}
				for _, a := range atoms {
					if centre := centreOf(s.pi, a); centre >= 0 {
						if err := d.add(centre, 1/float64(len(forms)*len(atoms)), all[c*4*n:(c+1)*4*n]); err != nil {
							return err
						}
					}
				}
			}
			return nil
		}()
		if err != nil {
			return err
		}
	}
	var index []int32
	for i := range n {
		for k := i; k < len(all); k += n {
			if all[k] != 0 {
				index = append(index, int32(i))
				break
			}
		}
	}
	q := m.covariance().quadratic(terms.ElectrophilicSubstitution)
	q.gather(index)
	for c := range sites {
		for k, at := range limitedIndices {
			name := IndexNames[at]
			v := sites[c].Index[name]
			if v.Absent != "" {
				continue
			}
			deviation := math.Sqrt(q.of(all[(c*4+k)*n : (c*4+k+1)*n]))
			if deviation < 1e-12 || math.IsNaN(deviation) {
				continue
			}
			v.Limits = &[2]float64{v.X - z90*deviation, v.X + z90*deviation}
			sites[c].Index[name] = v
		}
	}
	return nil
}
