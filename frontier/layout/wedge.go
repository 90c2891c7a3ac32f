package layout

import (
	"math"

	"lobecast/frontier/molecule"
)

// wedge chooses, for every tetrahedral centre with stated configuration, the bond that
// leaves the plane: a drawn hydrogen at ring fusions, otherwise the bond to the
// smallest group outside rings.
func (d *Drawing) wedge() {
	m := d.Molecule
	taken := make([]bool, len(m.Bonds))
	for a := range m.Atoms {
		st := &m.Atoms[a].Stereo
		if st.Class != molecule.Tetrahedral || len(st.Ligands) != 4 {
			continue
		}
		d.wedgeAt(a, st, taken)
	}
}

func (d *Drawing) wedgeAt(a int, st *molecule.Stereo, taken []bool) {
	m := d.Molecule
	near := m.Neighbours(a)
	implicit := false
	for _, l := range st.Ligands {
		implicit = implicit || l == molecule.ImplicitLigand
	}
	allRing := true
	for _, h := range near {
		allRing = allRing && m.BondInRing(h.Bond)
	}
	type choice struct {
		w    Wedge
		cost float64
	}
	var choices []choice
	if implicit && m.Atoms[a].Hydrogens == 1 && allRing && len(near) == 3 {
		choices = append(choices, choice{Wedge{From: a, To: -1, Hydrogen: d.hydrogenAt(a)}, 0})
	}
	for _, h := range near {
		b := &m.Bonds[h.Bond]
		if b.Order != 1 {
			continue
		}
		cost := 1.0
		if taken[h.Bond] {
			cost += 100
		}
		if m.BondInRing(h.Bond) {
			cost += 20
		}
		if m.Atoms[h.Atom].Stereo.Class == molecule.Tetrahedral {
			cost += 10
		}
		if m.Atoms[h.Atom].Element == 1 {
			cost -= 1
		}
		cost += math.Min(float64(m.Degree(h.Atom)), 4)
		choices = append(choices, choice{Wedge{From: a, To: h.Atom}, cost})
	}
	best, bestCost := Wedge{}, math.Inf(1)
	for _, c := range choices {
		c.w.Up = true
		v := d.volume(a, st, c.w)
		if math.Abs(v) < 0.05 {
			continue
		}
		// Permutation 1: seen from the first ligand the others run anticlockwise,
		// which is a negative volume.
		if v < 0 != (st.Permutation == 1) {
			c.w.Up = false
		}
		c.cost += 2 / math.Abs(v)
		if c.cost < bestCost {
			best, bestCost = c.w, c.cost
		}
	}
	if math.IsInf(bestCost, 1) {
		return
	}
	if best.To >= 0 {
		taken[m.BondBetween(a, best.To)] = true
	}
	d.Wedges = append(d.Wedges, best)
}

// volume is the signed volume, six times that of the tetrahedron of the ligands in
// their order, when wedge w is drawn.
func (d *Drawing) volume(a int, st *molecule.Stereo, w Wedge) float64 {
	var v [4][3]float64
	height := 1.0
	if !w.Up {
		height = -1
	}
	missing := -1
	var sum [3]float64
	for i, l := range st.Ligands {
		var p point
		z := 0.0
		switch {
		case l == molecule.ImplicitLigand && w.To < 0:
			p, z = minus(w.Hydrogen, d.At[a]), height
		case l == molecule.ImplicitLigand:
			missing = i
			continue
		default:
			p = minus(d.At[l], d.At[a])
			if l == w.To {
				z = height
			}
		}
		p = unit(p)
		v[i] = [3]float64{p.X, p.Y, z}
		for k := range 3 {
			sum[k] += v[i][k]
		}
	}
	if missing >= 0 {
		for k := range 3 {
			v[missing][k] = -sum[k]
		}
	}
	var e [3][3]float64
	for i := range 3 {
		for k := range 3 {
			e[i][k] = v[i+1][k] - v[0][k]
		}
	}
	return e[0][0]*(e[1][1]*e[2][2]-e[1][2]*e[2][1]) -
		e[0][1]*(e[1][0]*e[2][2]-e[1][2]*e[2][0]) +
		e[0][2]*(e[1][0]*e[2][1]-e[1][1]*e[2][0])
}

// hydrogenAt finds the emptiest direction around atom a for a drawn hydrogen.
func (d *Drawing) hydrogenAt(a int) point {
	best, bestRoom := point{}, -1.0
	for k := range 24 {
		p := plus(d.At[a], times(polar(float64(k)*math.Pi/12), 0.8))
		room := math.Inf(1)
		for i, q := range d.At {
			if i != a {
				room = math.Min(room, distance(p, q))
			}
		}
		for i := range d.Molecule.Bonds {
			b := &d.Molecule.Bonds[i]
			f := fromSegment(p, d.At[b.A], d.At[b.B])
			room = math.Min(room, f*1.2)
		}
		for _, w := range d.Wedges {
			if w.To < 0 {
				room = math.Min(room, distance(p, w.Hydrogen))
			}
		}
		if room > bestRoom+1e-6 {
			best, bestRoom = p, room
		}
	}
	return best
}
