package page

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"lobecast/frontier/layout"
	"lobecast/frontier/molecule"
	"lobecast/reactivity/report"
)

// pairPicture draws one orientation of a cycloaddition: the first molecule above, the
// second below, reacting ends facing each other, forming bonds dashed, and the
// dominating frontier pair on them. Where the pair's molecules cannot be drawn, it is
// empty.
func (w *writer) pairPicture(p *report.Pair, j *report.Joining, a *report.Adduct) (svg, caption string) {
	top := newDrawable(p.A, p.NumbersA, nil)
	if top == nil || p.B == "" || len(j.AAtoms) < 2 || len(j.BAtoms) < 2 || len(a.Bonds) != 2 {
		return "", ""
	}
	bottom := newDrawable(p.B, p.NumbersB, nil)
	if bottom == nil {
		return "", ""
	}
	chainA, okA := indices(top, j.AAtoms)
	chainB, okB := indices(bottom, j.BAtoms)
	if !okA || !okB || !connected(top.m) || !connected(bottom.m) {
		return "", ""
	}
	firstA, ok1 := top.indexOf[a.Bonds[0][0]]
	firstB, ok2 := bottom.indexOf[a.Bonds[0][1]]
	lastB, ok3 := bottom.indexOf[a.Bonds[1][1]]
	lastA, ok4 := top.indexOf[a.Bonds[1][0]]
	if !ok1 || !ok2 || !ok3 || !ok4 {
		return "", ""
	}
	// Both chains run from the left bond to the right one.
	if chainA[0] != firstA {
		firstA, lastA, firstB, lastB = lastA, firstA, lastB, firstB
	}
	if chainB[0] != firstB {
		slices.Reverse(chainB)
	}
	top.d = layout.Facing(top.m, chainA)
	bottom.d = layout.Facing(bottom.m, chainB).Mirrored()
	// Ends above each other, and room between for the forming bonds.
	middle := func(d *layout.Drawing, p, q int) molecule.Point {
		return molecule.Point{X: (d.At[p].X + d.At[q].X) / 2, Y: (d.At[p].Y + d.At[q].Y) / 2}
	}
	mt, mb := middle(top.d, firstA, lastA), middle(bottom.d, firstB, lastB)
	// What hangs below the ends of the first (a ring closed through them) or above those
	// of the second needs room as well.
	need := 1.7
	for i := range top.d.At {
		need = math.Max(need, mt.Y-top.d.At[i].Y+1.1)
	}
	for i := range bottom.d.At {
		need = math.Max(need, bottom.d.At[i].Y-mb.Y+1.1)
	}
	bottom.d = bottom.d.Moved(mt.X-mb.X, mt.Y-mb.Y-need)
	bottom.d = clear(top.d, bottom.d)

	c := newCanvas()
	ft := newFormula(c, top.d)
	fb := newFormula(c, bottom.d)
	for _, pair := range [][2]int{{firstA, firstB}, {lastA, lastB}} {
		from, to := ft.at(pair[0]), fb.at(pair[1])
		dir := unit(minus(to, from))
		c.line(layerGuides, "forming", plus(from, times(dir, 5)), minus(to, times(dir, 5)))
	}
	caption = "the two molecules face each other; dashed lines are the bonds that form"
	if top.solve(w.set) && bottom.solve(w.set) && p.Gaps != nil && p.Gaps.HOMOaLUMOb != nil && p.Gaps.HOMObLUMOa != nil {
		normal := *p.Gaps.HOMOaLUMOb <= *p.Gaps.HOMObLUMOa
		oa, ob := top.frontierOf(normal, firstA), bottom.frontierOf(!normal, firstB)
		if oa != nil && ob != nil {
			// The free sign of the second orbital is chosen so that the two bonds together
			// are bonding.
			flip := false
			if !oa.mean && !ob.mean {
				sum := oa.on(firstA)*ob.on(firstB) + oa.on(lastA)*ob.on(lastB)
				flip = sum < 0
			}
			ft.lobes(oa, false)
			fb.lobes(ob, flip)
			caption = oa.name + " of A (x = " + signed(oa.x) + ") faces " + ob.name + " of B (x = " + signed(ob.x) + "); dashed lines are the bonds that form"
		}
	}
	for _, n := range [][2]int{a.Bonds[0], a.Bonds[1]} {
		ft.beside(top.indexOf[n[0]], "value", 9.5, fmt.Sprint(n[0]))
		fb.beside(bottom.indexOf[n[1]], "value", 9.5, fmt.Sprint(n[1]))
	}
	name := strings.TrimSpace(a.Relation + " orientation: " + caption)
	return c.svg("figure structure", name, 6), caption
}

// on is the coefficient of the orbital on atom i.
func (o *orbital) on(i int) float64 {
	for k, a := range o.atoms {
		if a == i {
			return o.c[k]
		}
	}
	return 0
}

// clear lowers the second drawing until no two atoms of the two come near.
func clear(top, bottom *layout.Drawing) *layout.Drawing {
	for range 20 {
		near := math.Inf(1)
		for _, p := range top.At {
			for _, q := range bottom.At {
				near = math.Min(near, math.Hypot(p.X-q.X, p.Y-q.Y))
			}
		}
		if near > 1.25 {
			break
		}
		bottom = bottom.Moved(0, -0.25)
	}
	return bottom
}

// indices turns numbers of the report into atoms of x.
func indices(x *drawable, numbers []int) ([]int, bool) {
	list := make([]int, len(numbers))
	for k, n := range numbers {
		i, ok := x.indexOf[n]
		if !ok {
			return nil, false
		}
		list[k] = i
	}
	return list, true
}

func connected(m *molecule.Molecule) bool { return len(m.Components()) == 1 }
