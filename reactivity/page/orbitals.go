package page

import (
	"fmt"
	"math"

	"lobecast/reactivity/report"
)

// orbitals writes the card of one structure of an orbitals report: levels, the
// frontier orbitals, and on demand all orbitals, charges, bond orders and numbers.
func (w *writer) orbitals(s *report.Structure) {
	w.f("<section class=\"card\">\n<div class=\"heading\"><h2>%s</h2></div>\n", text(structureName(s)))
	w.structureLine(s)
	x := newDrawable(s.SMILES, s.Numbers, s.Points).draw(nil)
	systems := 0
	for i := range s.Atom {
		systems = max(systems, s.Atom[i].System)
	}
	for k := 1; k <= systems; k++ {
		y := systemOf(s, k)
		if len(y.level) == 0 {
			continue
		}
		if systems > 1 {
			name := fmt.Sprintf("π system %d of %d", k, systems)
			if y.local {
				name += ", a local π bond"
			}
			w.f("<h3>%s</h3>\n", text(name))
		}
		w.f("<div class=\"pictures\">\n")
		w.figure(levelDiagram(y.x, y.occupation, "level diagram"), "levels x in E = α + xβ, the bonding ones below; arrows are electrons")
		if x != nil {
			homo, lumo := frontierRungs(rungs(y.x, y.occupation))
			for _, which := range []struct {
				rung int
				name string
			}{{homo, "HOMO"}, {lumo, "LUMO"}} {
				if which.rung < 0 || which.name == "LUMO" && lumo == homo {
					continue
				}
				name := which.name
				if lumo == homo {
					name = "HOMO, partly filled"
				}
				o := y.orbital(x, which.rung, name)
				w.figure(orbitalPicture(x, o), o.caption())
			}
		}
		w.f("</div>\n")
		if x == nil {
			continue
		}
		if sets := rungs(y.x, y.occupation); len(sets) > 2 && len(sets) <= 24 {
			w.f("<details>\n<summary>All orbitals</summary>\n<div class=\"pictures\">\n")
			for r := range sets {
				o := y.orbital(x, r, fmt.Sprintf("level %d", r+1))
				w.figure(orbitalPicture(x, o), o.caption())
			}
			w.f("</div>\n</details>\n")
		}
	}
	if x != nil {
		w.f("<details>\n<summary>Charges and bond orders</summary>\n<div class=\"pictures\">\n")
		w.figure(chargePicture(x, s), "π charges, in e")
		w.figure(orderPicture(x, s), "π bond orders")
		w.f("</div>\n</details>\n")
	}
	w.orbitalTables(s)
	w.f("</section>\n")
}

// system is one π system of an orbitals report.
type system struct {
	atoms         []*report.Atom
	level         []*report.Level
	x, occupation []float64
	local         bool
}

func systemOf(s *report.Structure, k int) *system {
	y := &system{}
	for i := range s.Atom {
		if s.Atom[i].System == k {
			y.atoms = append(y.atoms, &s.Atom[i])
			y.local = y.local || s.Atom[i].Local
		}
	}
	for i := range s.Level {
		l := &s.Level[i]
		if l.System != k || l.X == nil || l.Occupation == nil || len(l.Coefficients) != len(y.atoms) {
			continue
		}
		y.level = append(y.level, l)
		y.x, y.occupation = append(y.x, *l.X), append(y.occupation, *l.Occupation)
	}
	return y
}

// orbital takes one rung of the system as an orbital on the atoms of x.
func (y *system) orbital(x *drawable, rung int, name string) *orbital {
	sets := rungs(y.x, y.occupation)
	from := 0
	for _, r := range sets[:rung] {
		from += r.count
	}
	set := sets[rung]
	o := &orbital{name: name, x: set.x, count: set.count, mean: set.count > 1}
	for i, a := range y.atoms {
		index, ok := x.indexOf[a.Atom]
		if !ok || a.Alkyl {
			continue
		}
		o.atoms = append(o.atoms, index)
		if !o.mean {
			o.c = append(o.c, y.level[from].Coefficients[i])
			continue
		}
		sum := 0.0
		for j := range set.count {
			c := y.level[from+j].Coefficients[i]
			sum += c * c
		}
		o.c = append(o.c, sum/float64(set.count))
	}
	return o
}

// chargePicture writes the π charges beside the atoms.
func chargePicture(x *drawable, s *report.Structure) string {
	c := newCanvas()
	f := newFormula(c, x.d)
	for i := range s.Atom {
		a := &s.Atom[i]
		if index, ok := x.indexOf[a.Atom]; ok && !a.Local && !a.Alkyl && a.Charge != nil {
			f.beside(index, "value", 9.5, signedFixed(*a.Charge))
		}
	}
	return c.svg("figure structure", "π charges of "+s.Formula, 4)
}

// signedFixed writes a charge with three decimals and its sign.
func signedFixed(x float64) string {
	s := trimmedFixed(x, 3)
	if math.Abs(x) >= 0.0005 && x > 0 {
		s = "+" + s
	}
	return s
}

// orderPicture writes the π bond orders beside the bonds.
func orderPicture(x *drawable, s *report.Structure) string {
	c := newCanvas()
	f := newFormula(c, x.d)
	atom := map[int]*report.Atom{}
	for i := range s.Atom {
		atom[s.Atom[i].Centre] = &s.Atom[i]
	}
	for i := range s.Bond {
		b := &s.Bond[i]
		p, q := atom[b.Centres[0]], atom[b.Centres[1]]
		if p == nil || q == nil || p.Local || p.Alkyl || q.Alkyl || b.Order == nil {
			continue
		}
		a, ok1 := x.indexOf[p.Atom]
		k, ok2 := x.indexOf[q.Atom]
		if ok1 && ok2 {
			f.besideBond(a, k, "value", 9.5, trimmedFixed(*b.Order, 3))
		}
	}
	return c.svg("figure structure", "π bond orders of "+s.Formula, 4)
}

// orbitalTables writes the numbers behind the pictures.
func (w *writer) orbitalTables(s *report.Structure) {
	w.f("<details>\n<summary>Numbers</summary>\n<table class=\"stack\">\n<caption>h in |β|, charges in e, free valence √3 − Σp.</caption>\n<thead><tr><th scope=\"col\">Centre</th><th scope=\"col\">Atom</th><th scope=\"col\">Class</th><th scope=\"col\" class=\"n\">h</th><th scope=\"col\" class=\"n\">electrons</th><th scope=\"col\" class=\"n\">charge</th><th scope=\"col\" class=\"n\">free valence</th></tr></thead>\n<tbody>\n")
	for i := range s.Atom {
		a := &s.Atom[i]
		w.f("<tr><td data-label=\"centre\">%d</td><td data-label=\"atom\">%s%d</td><td data-label=\"class\">%s</td><td class=\"n\" data-label=\"h\">%s</td><td class=\"n\" data-label=\"electrons\">%s</td><td class=\"n\" data-label=\"charge\">%s</td><td class=\"n\" data-label=\"free valence\">%s</td></tr>\n",
			a.Centre, text(a.Element), a.Atom, text(a.Class), text(number(a.H, 3)), text(number(a.Electrons, 2)), text(number(a.Charge, 4)), text(number(a.FreeValence, 4)))
	}
	w.f("</tbody>\n</table>\n<table class=\"stack\">\n<thead><tr><th scope=\"col\">Link of centres</th><th scope=\"col\" class=\"n\">k</th><th scope=\"col\" class=\"n\">bond order</th></tr></thead>\n<tbody>\n")
	for i := range s.Bond {
		b := &s.Bond[i]
		w.f("<tr><td data-label=\"link\">%d–%d</td><td class=\"n\" data-label=\"k\">%s</td><td class=\"n\" data-label=\"bond order\">%s</td></tr>\n",
			b.Centres[0], b.Centres[1], text(number(b.K, 3)), text(number(b.Order, 4)))
	}
	w.f("</tbody>\n</table>\n</details>\n")
}
