package report

import (
	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/rules"
	"lobecast/rules/symmetry"
)

// AddPair ranks the cycloadditions of a and b (b nil: intramolecular) and adds them.
func (b *Builder) AddPair(inputA, inputB string, a, c *molecule.Molecule, cond reactivity.PairConditions) {
	j, err := reactivity.Pair(a, c, cond)
	if err != nil {
		input := inputA
		if inputB != "" {
			input += " + " + inputB
		}
		b.Refuse(input, err)
		return
	}
	p := NewPair(j)
	p.InputA, p.InputB = inputA, inputB
	situation := PairSituation(j)
	situation.Twists = [][]frontier.Twist{cond.Twists, cond.TwistsB}
	b.outside(rules.Outside(situation), p.A)
	b.caution(rules.Cautions(situation), p.A)
	b.quote(terms.CycloadditionOrientation)
	b.borrow(j.Borrowed)
	b.report.Pair = append(b.report.Pair, p)
}

// PairSituation is what the rules look at in a cycloaddition.
func PairSituation(j *reactivity.PairJudgement) *rules.Situation {
	s := &rules.Situation{Molecules: []*molecule.Molecule{j.A}, Event: terms.CycloadditionOrientation, Kind: terms.Cycloaddition, Activation: terms.Thermal}
	if j.B != nil {
		s.Molecules = append(s.Molecules, j.B)
	}
	return s
}

// NewPair makes the tables of a judged pair.
func NewPair(j *reactivity.PairJudgement) Pair {
	second := j.A
	p := Pair{A: j.A.SMILES(), Demand: j.Demand, Call: string(j.Call), Notes: append(append([]string(nil), j.Notes...), j.Warnings...)}
	p.NumbersA, _ = written(j.A)
	if j.B != nil {
		p.NumbersB, _ = written(j.B)
		p.B = j.B.SMILES()
		second = j.B
	}
	for _, r := range j.Refused {
		p.Notes = append(p.Notes, "not a reacting end: "+r.Reason)
	}
	verdict(&p, j)
	p.Gaps = newGaps(j)
	if j.Lewis != nil {
		p.LewisAcid = j.Lewis.String()
	}
	for i := range j.Joinings {
		if j.Listed < len(j.Adducts) && j.Joinings[i].Order >= j.Adducts[j.Listed].Joining {
			break
		}
		x := &j.Joinings[i]
		p.Joining = append(p.Joining, Joining{
			Order: x.Order, AAtoms: Numbers(j.A, x.AAtoms()), BAtoms: Numbers(second, x.BAtoms()),
			RoleA: x.RoleA(), RoleB: x.RoleB(), DeltaE: Num(x.DeltaE),
		})
	}
	for i := range j.Adducts[:j.Listed] {
		p.Adduct = append(p.Adduct, newAdduct(&j.Adducts[i], j.A, second))
		if j.Adducts[i].Chance != nil {
			p.ChanceMeaning = ChanceMeaning
		}
	}
	if p.ChanceMeaning == "" {
		p.ChanceAbsent = j.ChanceAbsent
	}
	return p
}

// verdict states the orbital symmetry of the suprafacial addition of the first joining.
func verdict(p *Pair, j *reactivity.PairJudgement) {
	parts, err := symmetry.ParseComponents("π4s+π2s")
	if err != nil || len(j.Joinings) == 0 {
		return
	}
	p.Thermal, p.Photochemical = string(parts.Thermal()), string(parts.Photochemical())
}

func newGaps(j *reactivity.PairJudgement) *Gaps {
	if len(j.Joinings) == 0 {
		return nil
	}
	x := &j.Joinings[0]
	// Gaps are kept by role; the report names the arguments.
	named := func(gaps reactivity.Gaps) (homoA, homoB *float64) {
		if x.A.Role == reactivity.RolePartner {
			return Num(gaps.Inverse), Num(gaps.Normal)
		}
		return Num(gaps.Normal), Num(gaps.Inverse)
	}
	g := &Gaps{}
	g.HOMOaLUMOb, g.HOMObLUMOa = named(x.Gaps)
	if j.Lewis != nil {
		g.WithoutHOMOaLUMOb, g.WithoutHOMObLUMOa = named(j.Lewis.GapsBefore)
	}
	switch {
	case g.HOMOaLUMOb == nil || g.HOMObLUMOa == nil:
	case *g.HOMOaLUMOb < *g.HOMObLUMOa:
		g.Dominant = "HOMO of A with LUMO of B"
	case *g.HOMOaLUMOb > *g.HOMObLUMOa:
		g.Dominant = "HOMO of B with LUMO of A"
	default:
		g.Dominant = "both alike"
	}
	return g
}

func newAdduct(x *reactivity.Adduct, a, second *molecule.Molecule) Adduct {
	n := func(b [2]int) [2]int { return [2]int{a.Atoms[b[0]].Number, second.Atoms[b[1]].Number} }
	y := Adduct{
		Joining: x.Joining, Rank: x.Rank, Bonds: [][2]int{n(x.Bonds[0]), n(x.Bonds[1])},
		Relation: x.Relation, Configuration: x.Configuration,
		Chance: Chance(x.Chance), Limits: Limits(x.Limits), Because: x.Because,
		DeltaE: Num(x.DeltaE), Asynchronous: Num(x.Asynchronicity), Frontier: Num(x.Overlap),
	}
	if x.First == 0 || x.First == 1 {
		first := n(x.Bonds[x.First])
		y.FirstBond = &first
	}
	for _, p := range x.Products {
		switch {
		case p.Configuration == "endo" && y.Endo == "":
			y.Endo = p.SMILES
		case p.Configuration == "exo" && y.Exo == "":
			y.Exo = p.SMILES
		}
		if y.Product == "" {
			y.Product = p.SMILES
		}
	}
	if y.Endo != "" && y.Exo != "" {
		drawn, other := "endo", "exo"
		if y.Product == y.Exo {
			drawn, other = "exo", "endo"
		}
		y.Configuration = "the product written is the " + drawn + " adduct, the " + other + " adduct stands beside it; racemic, one enantiomer is written"
	}
	y.EndoNote = x.Secondary.Text
	return y
}
