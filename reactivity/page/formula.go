package page

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"lobecast/frontier/layout"
	"lobecast/frontier/molecule"
)

// formula is a structural formula on a canvas: bonds in Kekulé form, heteroatoms with
// their hydrogens and charges, wedges at stated stereocentres.
type formula struct {
	*canvas
	d      *layout.Drawing
	labels []*label
}

// label is the lettering of one atom.
type label struct {
	core  box // symbol and hydrogens on its line
	boxes []box
}

// newFormula draws d on the canvas with its origin at that of the canvas.
func newFormula(c *canvas, d *layout.Drawing) *formula {
	f := &formula{canvas: c, d: d, labels: make([]*label, len(d.At))}
	for i := range d.At {
		f.letter(i)
	}
	wedges := map[int]layout.Wedge{}
	for _, w := range d.Wedges {
		if w.To >= 0 {
			wedges[d.Molecule.BondBetween(w.From, w.To)] = w
		} else {
			f.hydrogenWedge(w)
		}
	}
	for b := range d.Molecule.Bonds {
		if w, ok := wedges[b]; ok {
			f.wedge(w)
			continue
		}
		f.bond(b)
	}
	return f
}

// at is the position of atom i in pixels.
func (f *formula) at(i int) point { return f.pixel(f.d.At[i]) }

func (f *formula) pixel(p point) point {
	return point{X: p.X * bondLength, Y: -p.Y * bondLength}
}

// labelled reports whether atom i is written as letters: everything but plain carbon
// in a skeleton.
func labelled(m *molecule.Molecule, i int) bool {
	a := &m.Atoms[i]
	if a.Element != 6 || a.Charge != 0 || a.Isotope != 0 || a.Unpaired != 0 || m.Degree(i) == 0 {
		return true
	}
	// A carbon between two double bonds lies on a straight line and would not be seen.
	if near := m.Neighbours(i); len(near) == 2 {
		return m.Bonds[near[0].Bond].Order == 2 && m.Bonds[near[1].Bond].Order == 2
	}
	return false
}

// letter writes the label of atom i, hydrogens on the side that is free.
func (f *formula) letter(i int) {
	m := f.d.Molecule
	at := f.at(i)
	f.reach(at, 2)
	if !labelled(m, i) {
		return
	}
	a := &m.Atoms[i]
	symbol := molecule.Symbol(a.Element)
	if a.Element == 0 {
		symbol = "R"
	}
	var h, count string
	if a.Hydrogens > 0 {
		h = "H"
		if a.Hydrogens > 1 {
			count = fmt.Sprint(a.Hydrogens)
		}
	}
	charge := ""
	if a.Charge != 0 {
		if n := max(a.Charge, -a.Charge); n > 1 {
			charge = fmt.Sprint(n)
		}
		if a.Charge > 0 {
			charge += "+"
		} else {
			charge += "−"
		}
	}
	charge += strings.Repeat("•", a.Unpaired)
	isotope := ""
	if a.Isotope != 0 {
		isotope = fmt.Sprint(a.Isotope)
	}
	l := &label{}
	f.labels[i] = l
	wSymbol := textWidth(symbol, labelSize)
	wH, wCount := textWidth(h, labelSize), textWidth(count, smallSize)
	wIso := textWidth(isotope, smallSize)
	half := labelSize * 0.5
	x := at.X - wSymbol/2
	var spans strings.Builder
	piece := func(x, y, size float64, s string) {
		if s == "" {
			return
		}
		fmt.Fprintf(&spans, `<tspan x="%s" y="%s" font-size="%s">%s</tspan>`, px(x), px(y+size*0.36), px(size), text(s))
		l.boxes = append(l.boxes, box{point{X: x, Y: y - size*0.5}, point{X: x + textWidth(s, size), Y: y + size*0.5}})
	}
	const raise, sink = 5.5, 4.0
	piece(x-wIso, at.Y-raise, smallSize, isotope)
	piece(x, at.Y, labelSize, symbol)
	l.core = box{point{X: x, Y: at.Y - half}, point{X: x + wSymbol, Y: at.Y + half}}
	right := x + wSymbol
	switch side := f.hydrogenSide(i); {
	case h == "":
		piece(right, at.Y-raise, smallSize, charge)
	case side == 'r':
		piece(right, at.Y, labelSize, h)
		piece(right+wH, at.Y+sink, smallSize, count)
		piece(right+wH+wCount*0.7, at.Y-raise, smallSize, charge)
		l.core.high.X += wH
	case side == 'l':
		piece(x-wIso-wCount-wH, at.Y, labelSize, h)
		piece(x-wIso-wCount, at.Y+sink, smallSize, count)
		piece(right, at.Y-raise, smallSize, charge)
		l.core.low.X -= wH + wCount
	default:
		y := at.Y - labelSize
		if side == 'd' {
			y = at.Y + labelSize
		}
		hx := at.X - wH/2
		piece(hx, y, labelSize, h)
		piece(hx+wH, y+sink, smallSize, count)
		piece(right, at.Y-raise, smallSize, charge)
		if side == 'd' {
			l.core.high.Y += labelSize
		} else {
			l.core.low.Y -= labelSize
		}
	}
	for _, b := range l.boxes {
		f.reach(b.low, 1)
		f.reach(b.high, 1)
		f.boxes = append(f.boxes, b)
	}
	f.add(layerLabels, `<text class="atom">%s</text>`, spans.String())
}

// hydrogenSide chooses where the hydrogens of atom i stand: r, l, u or d.
func (f *formula) hydrogenSide(i int) byte {
	m := f.d.Molecule
	near := m.Neighbours(i)
	if len(near) == 0 {
		switch m.Atoms[i].Element { // H2O, HCl, but NH3, CH4
		case 8, 9, 16, 17, 34, 35, 53:
			return 'l'
		}
		return 'r'
	}
	type side struct {
		name byte
		dir  point
		cost float64
	}
	sides := []side{{'r', point{X: 1}, 0}, {'l', point{X: -1}, 0.05}, {'d', point{Y: -1}, 0.45}, {'u', point{Y: 1}, 0.46}}
	best, bestCost := byte('r'), math.Inf(1)
	for _, s := range sides {
		cost := s.cost
		for _, h := range near {
			c := dot(unit(minus(f.d.At[h.Atom], f.d.At[i])), s.dir)
			if c > 0.3 {
				cost += 2 * c
			}
		}
		for k, p := range f.d.At {
			if k == i || m.BondBetween(i, k) >= 0 {
				continue
			}
			if r := minus(p, f.d.At[i]); length(r) < 1.6 && dot(unit(r), s.dir) > 0.75 {
				cost += 0.8
			}
		}
		if cost < bestCost {
			best, bestCost = s.name, cost
		}
	}
	return best
}

// clip shortens the line from a toward b where it would run into the label of atom i,
// which stands at b.
func (f *formula) clip(a, b point, i int) point {
	l := f.labels[i]
	if l == nil {
		return b
	}
	const steps = 64
	for k := range steps {
		p := plus(a, times(minus(b, a), float64(k)/steps))
		if l.core.contains(p, 2) {
			return p
		}
		for _, x := range l.boxes {
			if x.contains(p, 0.8) {
				return p
			}
		}
	}
	return b
}

// stroke draws a line of a bond between atoms i and j, kept clear of their labels.
func (f *formula) stroke(a, b point, i, j int) {
	to := f.clip(a, b, j)
	from := f.clip(b, a, i)
	f.line(layerBonds, "bond", from, to)
	f.segments = append(f.segments, [2]point{from, to})
}

func (f *formula) bond(b int) {
	m := f.d.Molecule
	bond := &m.Bonds[b]
	p, q := f.at(bond.A), f.at(bond.B)
	along := unit(minus(q, p))
	across := point{X: -along.Y, Y: along.X}
	shifted := func(off, short float64) {
		a, c := plus(p, times(across, off)), plus(q, times(across, off))
		if f.labels[bond.A] == nil {
			a = plus(a, times(along, short))
		}
		if f.labels[bond.B] == nil {
			c = minus(c, times(along, short))
		}
		f.stroke(a, c, bond.A, bond.B)
	}
	switch bond.Order {
	case 2:
		if side, inRing := f.innerSide(b); side != 0 {
			shifted(0, 0)
			short := 3.6
			if !inRing {
				short = 2.6
			}
			shifted(side*lineGap, short)
			return
		}
		shifted(lineGap/2, 0)
		shifted(-lineGap/2, 0)
	case 3:
		shifted(0, 0)
		shifted(lineGap*0.85, 2.5)
		shifted(-lineGap*0.85, 2.5)
	case 4:
		for _, off := range []float64{-1.5, -0.5, 0.5, 1.5} {
			shifted(off*lineGap*0.7, 1)
		}
	default:
		shifted(0, 0)
	}
}

// innerSide says on which side of double bond b its second line stands: toward the
// middle of its ring, or toward the substituents of a chain; 0 for a line on either
// side of the axis.
func (f *formula) innerSide(b int) (side float64, inRing bool) {
	m := f.d.Molecule
	bond := &m.Bonds[b]
	p, q := f.at(bond.A), f.at(bond.B)
	along := unit(minus(q, p))
	across := point{X: -along.Y, Y: along.X}
	middle := times(plus(p, q), 0.5)
	best := 0
	for _, ring := range m.Rings() {
		k := slices.Index(ring, bond.A)
		n := len(ring)
		if k < 0 || ring[(k+1)%n] != bond.B && ring[(k+n-1)%n] != bond.B {
			continue
		}
		centre, doubles := point{}, 0
		for i, a := range ring {
			centre = plus(centre, times(f.at(a), 1/float64(n)))
			if m.Bonds[m.BondBetween(a, ring[(i+1)%n])].Order == 2 {
				doubles++
			}
		}
		value := doubles*10 + 9 - min(n, 9)
		if value > best {
			best = value
			side = 1
			if dot(minus(centre, middle), across) < 0 {
				side = -1
			}
		}
	}
	if best > 0 {
		return side, true
	}
	if m.Degree(bond.A) == 1 || m.Degree(bond.B) == 1 || f.straight(bond.A) || f.straight(bond.B) {
		return 0, false
	}
	balance := 0.0
	for _, end := range []int{bond.A, bond.B} {
		for _, h := range m.Neighbours(end) {
			if h.Atom != bond.A && h.Atom != bond.B {
				balance += dot(minus(f.at(h.Atom), f.at(end)), across)
			}
		}
	}
	if balance > 1e-6 {
		return 1, false
	}
	if balance < -1e-6 {
		return -1, false
	}
	return 1, false
}

// straight reports whether atom i sits between two double bonds.
func (f *formula) straight(i int) bool {
	m := f.d.Molecule
	near := m.Neighbours(i)
	return len(near) == 2 && m.Bonds[near[0].Bond].Order == 2 && m.Bonds[near[1].Bond].Order == 2
}

func (f *formula) wedge(w layout.Wedge) {
	p := f.at(w.From)
	q := f.clip(p, f.at(w.To), w.To)
	if f.labels[w.From] != nil {
		p = f.clip(q, p, w.From)
	}
	f.wedgeBetween(p, q, w.Up)
}

func (f *formula) hydrogenWedge(w layout.Wedge) {
	p, q := f.at(w.From), f.pixel(w.Hydrogen)
	f.write(layerLabels, "atom", "middle", labelSize*0.85, q, "H")
	stop := plus(p, times(minus(q, p), math.Max(0.2, 1-7.5/length(minus(q, p)))))
	f.wedgeBetween(p, stop, w.Up)
}

func (f *formula) wedgeBetween(p, q point, up bool) {
	along := unit(minus(q, p))
	across := times(point{X: -along.Y, Y: along.X}, wedgeWidth)
	f.segments = append(f.segments, [2]point{p, q})
	f.reach(plus(q, across), 1)
	f.reach(minus(q, across), 1)
	if up {
		a, b := plus(q, across), minus(q, across)
		f.add(layerBonds, `<path class="wedge" d="M%s %sL%s %sL%s %sZ"/>`,
			px(p.X), px(p.Y), px(a.X), px(a.Y), px(b.X), px(b.Y))
		return
	}
	n := max(4, int(length(minus(q, p))/4))
	for k := 1; k <= n; k++ {
		t := float64(k) / float64(n)
		c := plus(p, times(minus(q, p), t))
		f.line(layerBonds, "bond", plus(c, times(across, t)), minus(c, times(across, t)))
	}
}
