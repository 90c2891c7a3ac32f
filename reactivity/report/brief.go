package report

import (
	"fmt"
	"io"
	"strings"
)

// WriteBrief writes the report as aligned text of at most [BriefWidth] columns.
func (r *Report) WriteBrief(w io.Writer) error {
	var b strings.Builder
	if r.Title != "" {
		wrap(&b, r.Title, "", "")
		b.WriteString("\n")
	}
	r.briefReview(&b)
	for i := range r.Structure {
		if i > 0 {
			b.WriteString("\n")
		}
		r.Structure[i].brief(&b, r.Kind)
	}
	for i := range r.Pair {
		if i > 0 {
			b.WriteString("\n")
		}
		r.Pair[i].brief(&b)
	}
	for i := range r.Process {
		if i > 0 {
			b.WriteString("\n")
		}
		r.Process[i].brief(&b)
	}
	briefRemarks(&b, "not modelled", r.Outside)
	briefRemarks(&b, "caution", r.Caution)
	for _, row := range r.Record {
		wrap(&b, "record, "+row.Event+": "+row.Text, "", "  ")
	}
	for _, x := range r.Refused {
		b.WriteString("refused: ")
		b.WriteString(x.Message + "\n")
	}
	fmt.Fprintf(&b, "parameters %s; %s\n", r.Parameters, r.Program)
	if r.Safety != "" {
		wrap(&b, r.Safety, "", "")
	}
	_, err := io.WriteString(w, b.String())
	return err
}

func briefRemarks(b *strings.Builder, word string, list []Remark) {
	seen := map[string]bool{}
	for _, x := range list {
		if seen[x.Code] {
			continue
		}
		seen[x.Code] = true
		wrap(b, word+": "+x.Text, "", "  ")
	}
}

func (s *Structure) brief(b *strings.Builder, kind string) {
	head := s.SMILES
	if s.Name != "" {
		head = s.Name + "  " + head
	}
	wrap(b, head, "", "  ")
	if s.Input != "" && s.Input != s.SMILES && kind != KindReview {
		wrap(b, s.Input+" as given: atoms are numbered in this order", "", "  ")
	}
	medium := ""
	if s.Medium != "" {
		medium = ", medium " + s.Medium
	}
	fmt.Fprintf(b, "%s, %d π atoms, %s π electrons%s\n", s.Formula, s.PiAtoms, trimZeros(number(s.PiElectrons, 2)), medium)
	for _, a := range s.Aside {
		wrap(b, "set aside: "+a.Name+" "+a.SMILES, "", "  ")
	}
	for _, w := range s.Warnings {
		wrap(b, "note: "+w, "", "  ")
	}
	if kind == KindOrbitals {
		s.briefOrbitals(b)
	}
	for i := range s.Attack {
		b.WriteString("\n")
		s.Attack[i].brief(b)
	}
}

func trimZeros(s string) string {
	if strings.Contains(s, ".") {
		s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	}
	return s
}

func (a *Attack) brief(b *strings.Builder) {
	fmt.Fprintf(b, "%s: %s\n", a.Event, a.Call)
	t := &table{
		head:  []string{"rank", "place", "atoms", "chance [90 %]", "L", "f", "S", "charge"},
		right: []bool{true, false, false, false, true, true, true, true},
		cut:   1,
	}
	row := func(s *Site, rank string) {
		x := s.Index
		if x == nil {
			x = &Index{}
		}
		where := s.Place
		if s.Leaving != "" && !strings.HasPrefix(where, "C–") {
			where += " (" + s.Leaving + ")"
		}
		t.add(rank, where, numbers(s.Atoms), chance(s.Chance, s.Limits),
			number(x.Localization, 3), number(x.SmoothedDensity, 3), number(x.Superdelocalizability, 3), number(x.Charge, 3))
	}
	for i := range a.Site {
		row(&a.Site[i], fmt.Sprint(a.Site[i].Rank))
	}
	for i := range a.Ipso {
		row(&a.Ipso[i], "ipso")
	}
	t.write(b)
	if a.ChanceAbsent != "" {
		wrap(b, "no chances: "+a.ChanceAbsent, "", "  ")
	}
	if len(a.Site) > 0 && a.Site[0].Because != "" {
		wrap(b, "why: "+a.Site[0].Because, "", "  ")
	}
	if a.Disagree != "" {
		wrap(b, "indices: "+a.Disagree, "", "  ")
	}
	for _, n := range a.Notes {
		wrap(b, "note: "+n, "", "  ")
	}
	if a.ChanceMeaning != "" {
		wrap(b, "chance: "+a.ChanceMeaning+". L in |β|, f smoothed density, S in 1/|β|, charge in e", "", "  ")
	} else {
		b.WriteString("L in |β|, f smoothed density, S in 1/|β|, charge in e\n")
	}
}

func (s *Structure) briefOrbitals(b *strings.Builder) {
	t := &table{head: []string{"centre", "atom", "class", "h", "electrons", "charge", "free valence"},
		right: []bool{true, true, false, true, true, true, true}, cut: 2}
	for i := range s.Atom {
		a := &s.Atom[i]
		t.add(fmt.Sprint(a.Centre), fmt.Sprintf("%s%d", a.Element, a.Atom), a.Class, number(a.H, 3), number(a.Electrons, 2), number(a.Charge, 4), number(a.FreeValence, 4))
	}
	t.write(b)
	b.WriteString("\n")
	t = &table{head: []string{"level", "x (α + xβ)", "electrons", "coefficients"}, right: []bool{true, true, true}, cut: 3}
	for i := range s.Level {
		l := &s.Level[i]
		var c []string
		for _, x := range l.Coefficients {
			c = append(c, fmt.Sprintf("%.3f", x))
		}
		t.add(fmt.Sprint(i+1), number(l.X, 4), number(l.Occupation, 2), strings.Join(c, " "))
	}
	t.write(b)
	b.WriteString("\n")
	t = &table{head: []string{"link", "k", "bond order"}, right: []bool{false, true, true}, cut: -1}
	for i := range s.Bond {
		x := &s.Bond[i]
		t.add(fmt.Sprintf("%d–%d", x.Centres[0], x.Centres[1]), number(x.K, 3), number(x.Order, 4))
	}
	t.write(b)
}

func (p *Pair) brief(b *strings.Builder) {
	given := func(smiles, input string) {
		if input != "" && input != smiles {
			wrap(b, input+" as given: atoms are numbered in this order", "   ", "   ")
		}
	}
	wrap(b, p.A, "A  ", "   ")
	given(p.A, p.InputA)
	if p.B != "" {
		wrap(b, p.B, "B  ", "   ")
		given(p.B, p.InputB)
	}
	if p.Gaps != nil {
		wrap(b, fmt.Sprintf("demand %s; gap HOMO(A)–LUMO(B) %s |β|, HOMO(B)–LUMO(A) %s |β|; call %s", p.Demand,
			number(p.Gaps.HOMOaLUMOb, 3), number(p.Gaps.HOMObLUMOa, 3), p.Call), "", "  ")
	}
	if p.LewisAcid != "" {
		wrap(b, "Lewis acid: "+p.LewisAcid, "", "  ")
	}
	if p.Thermal != "" {
		fmt.Fprintf(b, "orbital symmetry: thermal %s, photochemical %s\n", p.Thermal, p.Photochemical)
	}
	t := &table{head: []string{"joins", "A", "B", "atoms A", "atoms B", "ΔE"}, right: []bool{true, false, false, false, false, true}, cut: 1}
	for i := range p.Joining {
		j := &p.Joining[i]
		t.add(fmt.Sprint(j.Order), j.RoleA, j.RoleB, numbers(j.AAtoms), numbers(j.BAtoms), number(j.DeltaE, 3))
	}
	t.write(b)
	b.WriteString("\n")
	t = &table{head: []string{"joins", "rank", "bonds", "relation", "chance [90 %]", "ΔE", "product"},
		right: []bool{true, true, false, false, false, true, false}, cut: 6}
	for i := range p.Adduct {
		a := &p.Adduct[i]
		var bonds []string
		for _, x := range a.Bonds {
			bonds = append(bonds, fmt.Sprintf("%d–%d", x[0], x[1]))
		}
		t.add(fmt.Sprint(a.Joining), fmt.Sprint(a.Rank), strings.Join(bonds, " "), a.Relation, chance(a.Chance, a.Limits), number(a.DeltaE, 3), a.Product)
	}
	t.write(b)
	for i := range p.Adduct {
		if p.Adduct[i].Because != "" {
			wrap(b, "why: "+p.Adduct[i].Because, "", "  ")
			break
		}
	}
	if p.ChanceAbsent != "" {
		wrap(b, "no chances: "+p.ChanceAbsent, "", "  ")
	}
	for _, n := range p.Notes {
		wrap(b, "note: "+n, "", "  ")
	}
}

func (p *Process) brief(b *strings.Builder) {
	title := p.Input
	if p.Name != "" {
		title = p.Name + "  " + title
	}
	wrap(b, title, "", "  ")
	fmt.Fprintf(b, "%s, %d electrons: thermal %s, photochemical %s\n", p.Components, p.Electrons, orNone(p.Thermal), orNone(p.Photochemical))
	if p.Mode != "" {
		wrap(b, "mode: "+p.Mode, "", "  ")
	}
	wrap(b, "derivations: "+p.Agreement, "", "  ")
	if p.Feasible != "" {
		wrap(b, "geometry: "+p.Feasible, "", "  ")
	}
	if p.Product != "" {
		wrap(b, "product: "+p.Product, "", "  ")
	}
	if p.GapBefore != nil && p.GapAfter != nil {
		fmt.Fprintf(b, "gap: %s |β| before, %s |β| after\n", number(p.GapBefore, 3), number(p.GapAfter, 3))
	}
	for _, n := range p.Notes {
		wrap(b, "note: "+n, "", "  ")
	}
}

func orNone(s string) string {
	if s == "" {
		return "no verdict"
	}
	return s
}

// remarks gathers remarks of steps, each text once, in the order of the first step.
type remarks struct {
	text  []string
	steps map[string][]string
}

func (r *remarks) add(text string, step int) {
	if r.steps == nil {
		r.steps = map[string][]string{}
	}
	list, known := r.steps[text]
	if !known {
		r.text = append(r.text, text)
	}
	if n := fmt.Sprint(step); len(list) == 0 || list[len(list)-1] != n {
		r.steps[text] = append(list, n)
	}
}

func (r *remarks) write(b *strings.Builder, word string) {
	for _, text := range r.text {
		list := r.steps[text]
		steps := "step " + list[0]
		if len(list) > 1 {
			steps = "steps " + strings.Join(list, ", ")
		}
		wrap(b, fmt.Sprintf("%s, %s: %s", word, steps, text), "", "  ")
	}
}

func (r *Report) briefReview(b *strings.Builder) {
	if r.Kind != KindReview {
		return
	}
	t := &table{head: []string{"step", "name", "standing", "planned", "rank", "chance [90 %]"}, right: []bool{true, false, false, false, true}, cut: 3}
	for i := range r.Step {
		s := &r.Step[i]
		planned, rank, ch := "–", "–", "–"
		if s.Planned != nil {
			planned = s.Planned.Place
			if s.Planned.Rank > 0 {
				rank = fmt.Sprint(s.Planned.Rank)
			}
			ch = chance(s.Planned.Chance, s.Planned.Limits)
		}
		if s.Planned == nil && s.Reading != "" {
			planned = "(" + s.Reading + ")"
		}
		t.add(fmt.Sprint(s.Number), shorten(s.Name, 30), s.Standing, planned, rank, ch)
	}
	t.write(b)
	b.WriteString("\nin order of risk\n")
	for _, x := range r.Risk {
		wrap(b, x.Line, fmt.Sprintf("%2d  ", x.Order), "    ")
	}
	b.WriteString("\n")
	var notes, cautions remarks
	for i := range r.Step {
		s := &r.Step[i]
		for _, w := range s.Warnings {
			if !strings.Contains(w, "no nitrogen basic enough") { // of no use without the tables
				notes.add(w, s.Number)
			}
		}
		for _, x := range s.Caution {
			cautions.add(x.Text, s.Number)
		}
	}
	notes.write(b, "note")
	cautions.write(b, "caution")
}
