package reactivity

import (
	"fmt"
	"math"
	"slices"
	"sort"
	"strings"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// PairConditions say how a cycloaddition is run, as far as the chemist has stated it.
type PairConditions struct {
	Set *frontier.Set // parameter set; nil means the default set
	// Twists are about bonds of the first molecule, TwistsB of the second.
	Twists, TwistsB []frontier.Twist
	// Medium is acidic, neutral or unknown; both components are judged as written, and
	// an acidic medium is only noted.
	Medium terms.Medium
	// LewisAcid says that a Lewis acid sits on the carbonyl group next to a reacting π
	// bond; see [LewisEffect].
	LewisAcid bool
	// NoProducts leaves the products to be built on demand, see [PairJudgement.Products].
	NoProducts bool
	// NoWords leaves out relations, secondary overlaps and reasons, which cost a third
	// of the time: for surveys.
	NoWords bool
	// NoLimits leaves out the limits on chances.
	NoLimits bool
	// Most is the number of joinings reported in full, best first; 0 means all.
	Most int
	// Meeting is what [Meet] found for the two molecules, where that is known already.
	Meeting *Meeting
	// Between restricts the judgement to the joining with these new bonds, [atom of the
	// first, atom of the second]; nil judges all. Where no joining has them, all are
	// judged.
	Between *[2][2]int
}

// Gaps are the two frontier gaps of a joining, in |β|.
type Gaps struct {
	Normal  float64 // from the HOMO of the diene or dipole to the LUMO of the partner
	Inverse float64 // from the HOMO of the partner to the LUMO of the diene or dipole
}

// The words for which frontier pair dominates (R. Sustmann, Tetrahedron Lett. 1971,
// 2721, types I, III and II).
const (
	NormalDemand  = "normal"
	InverseDemand = "inverse"
	NeutralDemand = "neutral"
)

// neutralRange is the difference of the two gaps, in |β|, below which neither is said
// to dominate (common practice (no source); a tenth of |β| is about 0.25 eV).
const neutralRange = 0.1

// Demand names the direction of the smaller gap; neutral when they differ by less than
// a tenth of |β|.
func (g Gaps) Demand() string {
	switch d := g.Normal - g.Inverse; {
	case d < -neutralRange:
		return NormalDemand
	case d > neutralRange:
		return InverseDemand
	}
	return NeutralDemand
}

// Joining is one pair of reacting π systems.
type Joining struct {
	// Order is the rank among the joinings, from 1: by ΔE of the best orientation, C=O
	// and C≡N partners after the others, and after them what gives up an aromatic ring
	// for good.
	Order int
	A, B  End
	// DeltaE is that of the best first bond of the best orientation, in |β|.
	DeltaE float64
	Gaps   Gaps
	Demand string

	combination Combination
	index       int // of combination among those given
	a, b        reacting
	second      float64 // ΔE of the other bonds, to order joinings that share their best first bond
}

// Adduct is one orientation of one joining.
type Adduct struct {
	Joining int // the Order of its joining
	Rank    int // within its joining, from 1
	// Bonds are the new bonds: [atom index in the first molecule, in the second].
	Bonds [2][2]int
	Count int // equivalent ways
	// Relation names the positions of the substituents in the new ring: "ortho"
	// (1,2-), "meta" (1,3-), "para" (1,4-), or the locants of the heterocycle.
	Relation string
	// DeltaE is that of the better first bond, in |β|; FirstBonds those of both bonds,
	// aligned with Bonds; First says which forms first.
	DeltaE     float64
	FirstBonds [2]float64
	First      int
	// Asynchronicity is |ΔE₁ − ΔE₂| of the two possible first bonds, in |β|: large when
	// one bond runs far ahead of the other in the transition state.
	Asynchronicity float64
	// Normal and Inverse are 2(Σ k c c′)²/gap for the two directions, in |β|: the
	// stabilization by the HOMO of the diene or dipole with the LUMO of the partner, and
	// by the other pair (Fukui; Houk 1973).
	Normal, Inverse float64
	// Overlap is |Σ k c c′| of the frontier pair of smaller gap (over a degenerate
	// shell the root of the sum of squares).
	Overlap float64
	// Charges is −Σ k q q′ over the two bonds, the electrostatic part (Klopman 1968,
	// Salem 1968), in units of e²; positive is attractive.
	Charges float64
	// Secondary is the overlap behind the endo rule.
	Secondary Secondary
	// Configuration names the diastereomers that form: "endo and exo", …
	Configuration string
	Products      []AdductProduct
	// Strained says why the ring of an intramolecular adduct cannot well form; such an
	// adduct is ranked after those that can.
	Strained string
	// Chance is the probability that this orientation is the recorded main product
	// within its joining; it is not a yield and not an isomer ratio. Nil where no
	// chances are fitted.
	Chance  *float64
	Limits  *[2]float64
	Because string

	orientation Orientation
	// chanceReason names the terms that decided the chances, see orientation.go.
	chanceReason string
}

// PairJudgement holds everything said of one pair.
type PairJudgement struct {
	A, B                 *molecule.Molecule // B is nil in an intramolecular reaction
	PiA, PiB             *frontier.Pi
	SolutionA, SolutionB *frontier.Solution
	EndsA, EndsB         *Ends
	Set                  *frontier.Set
	Demand               string // of the first joining
	Call                 terms.Call
	ChanceAbsent         string
	Joinings             []Joining
	Adducts              []Adduct // by joining, then rank
	// Listed is how many of them, from the front, are written and reported.
	Listed       int
	Refused      []RefusedEnd
	RefusedIn    []int // 0 or 1: the molecule a refused end lies in
	Notes        []string
	Warnings     []string
	Borrowed     []string
	Lewis        *LewisEffect
	Swapped      bool // the first molecule is the partner in the first joining
	sideA, sideB *pairSide
}

// Pair ranks the adducts of a cycloaddition of two molecules, given in either order; b
// nil means an intramolecular one. Every π system is solved once; first the joinings
// are ordered, then the orientations within each.
//
// Errors: no diene or dipole, no π bond to add to, an s-trans diene, all with their
// place (*molecule.Error), and what [frontier.Perceive] and [frontier.Set.Solve] refuse.
func Pair(a, b *molecule.Molecule, c PairConditions) (*PairJudgement, error) {
	set := c.Set
	if set == nil {
		set = DefaultSet()
	}
	meeting := c.Meeting
	if meeting == nil {
		var err error
		if meeting, err = Meet(a, b); err != nil {
			return nil, err
		}
	}
	ea, eb, combinations := meeting.A, meeting.B, meeting.Combinations
	if c.Between != nil {
		combinations = between(combinations, *c.Between)
	}
	sideA, err := newPairSide(a, set, c.Twists)
	if err != nil {
		return nil, err
	}
	sideB := sideA
	if b != nil {
		if sideB, err = newPairSide(b, set, c.TwistsB); err != nil {
			return nil, err
		}
	}
	p, err := judgePair(ea, eb, sideA, sideB, set, combinations, c, nil)
	if err != nil {
		return nil, err
	}
	if c.LewisAcid {
		with, effect, err := p.coordinate(combinations, c)
		switch {
		case err != nil:
			return nil, err
		case with == nil:
			p.Notes = append(p.Notes, "a Lewis acid was stated, but neither reacting π bond of the first joining carries a carbonyl group for it to sit on: judged without it")
		default:
			p = with
			p.Lewis = effect
		}
	}
	p.fillOrientations(c)
	p.rankByChance()
	if !c.NoWords {
		p.explainAll()
		if p.Lewis != nil {
			p.Lewis.Without.explainAll()
		}
	}
	p.list()
	if !c.NoProducts {
		for k := range p.Adducts[:p.Listed] {
			if _, err := p.Products(k); err != nil {
				return nil, err
			}
		}
	}
	return p, nil
}

// mostListed is the number of adducts that a pair is listed with; a chemist reads the
// first few, and molecules of many double bonds have thousands.
const mostListed = 100

// list sets how many adducts are listed: whole joinings, until there are mostListed.
func (p *PairJudgement) list() {
	p.Listed = len(p.Adducts)
	for k := mostListed; k < len(p.Adducts); k++ {
		if p.Adducts[k].Joining != p.Adducts[k-1].Joining {
			p.Listed = k
			p.Notes = append(p.Notes, fmt.Sprintf("%d of %d adducts are listed, those of the %d readiest joinings of %d", k, len(p.Adducts), p.Adducts[k-1].Joining, len(p.Joinings)))
			return
		}
	}
}

// between keeps the combination that can form the two bonds, or all where none can.
func between(list []Combination, bonds [2][2]int) []Combination {
	for k := range list {
		for _, o := range list[k].Orientations {
			if o.Bonds == bonds || o.Bonds == [2][2]int{bonds[1], bonds[0]} {
				return list[k : k+1]
			}
		}
	}
	return list
}

// rankByChance orders the adducts of each joining anew where all of them have a chance.
func (p *PairJudgement) rankByChance() {
	for from := 0; from < len(p.Adducts); {
		to := from
		complete := true
		for to < len(p.Adducts) && p.Adducts[to].Joining == p.Adducts[from].Joining {
			complete = complete && p.Adducts[to].Chance != nil
			to++
		}
		if list := p.Adducts[from:to]; complete {
			sort.SliceStable(list, func(x, y int) bool { return *list[x].Chance > *list[y].Chance+1e-9 })
			for k := range list {
				list[k].Rank = k + 1
			}
		}
		from = to
	}
}

// judgePair orders the joinings and orientations of two solved sides. kept, where not
// nil, is the order of the joinings to keep, as indices into combinations.
func judgePair(ea, eb *Ends, sideA, sideB *pairSide, set *frontier.Set, combinations []Combination, c PairConditions, kept []int) (*PairJudgement, error) {
	p := &PairJudgement{
		A: ea.Molecule, PiA: sideA.pi, SolutionA: sideA.sol, EndsA: ea, EndsB: eb, Set: set,
		Call: terms.Open, sideA: sideA, sideB: sideB,
	}
	p.Warnings = sideA.pi.Warnings
	p.Borrowed = sideA.sol.Borrowed()
	p.refusedEnds(ea, 0)
	if c.Medium == terms.Acidic {
		p.Notes = append(p.Notes, "an acidic medium was stated: both components are judged as written, not protonated; a Lewis or Brønsted acid on a carbonyl group can be stated apart")
	}
	if eb != nil {
		p.B, p.PiB, p.SolutionB = eb.Molecule, sideB.pi, sideB.sol
		p.Warnings = sharedNotes(p.Warnings, sideB.pi.Warnings)
		p.Borrowed = sharedNotes(p.Borrowed, sideB.sol.Borrowed())
		sort.Strings(p.Borrowed)
		p.refusedEnds(eb, 1)
	}
	var adducts [][]Adduct
	var order []int
	for k := range combinations {
		comb := &combinations[k]
		ra, okA := sideA.locate(&comb.A)
		rb, okB := sideB.locate(&comb.B)
		if !okA || !okB {
			which, end, m := "first", &comb.A, ea.Molecule
			if okA {
				which, end = "second", &comb.B
				if eb != nil {
					m = eb.Molecule
				}
			}
			p.Notes = sharedNotes(p.Notes, []string{fmt.Sprintf("the %s of atoms %s in the %s molecule has no π system of its own and is left out", end.Kind, numbersOf(m, end.Atoms), which)})
			continue
		}
		if ra.orbitals().Open || rb.orbitals().Open {
			p.Notes = sharedNotes(p.Notes, []string{"a reacting π system has a partly filled degenerate level: it is computed and gets no call"})
		}
		j := Joining{A: comb.A, B: comb.B, combination: *comb, index: k, a: ra, b: rb}
		list := make([]Adduct, 0, 2)
		for _, o := range comb.Orientations {
			ad, err := orient(&j, o)
			if err != nil {
				return nil, err
			}
			list = append(list, ad)
		}
		if eb == nil {
			markStrained(ea.Molecule, comb, list)
		}
		sort.SliceStable(list, func(x, y int) bool {
			if sx, sy := list[x].Strained != "", list[y].Strained != ""; sx != sy {
				return sy
			}
			return list[x].DeltaE < list[y].DeltaE-1e-9
		})
		j.DeltaE = list[0].DeltaE
		j.second = math.Max(list[0].FirstBonds[0], list[0].FirstBonds[1])
		p.Joinings = append(p.Joinings, j)
		adducts = append(adducts, list)
		order = append(order, len(order))
	}
	if len(p.Joinings) == 0 {
		m := ea.Molecule
		return nil, &molecule.Error{Text: m.Source, Reason: "none of the reacting groups has a π system that can be computed", Remedy: "check the structures"}
	}
	sort.SliceStable(order, func(x, y int) bool {
		jx, jy := &p.Joinings[order[x]], &p.Joinings[order[y]]
		if kept != nil {
			place := func(j *Joining) uint { return uint(slices.Index(kept, j.index)) } // absent: last
			return place(jx) < place(jy)
		}
		if lx, ly := jx.late(), jy.late(); lx != ly {
			return lx < ly
		}
		if math.Abs(jx.DeltaE-jy.DeltaE) > 1e-9 {
			return jx.DeltaE < jy.DeltaE
		}
		return jx.second < jy.second-1e-9
	})
	if kept != nil && len(order) > len(kept) {
		order = order[:len(kept)]
	}
	if c.Most > 0 && len(order) > c.Most {
		p.Notes = append(p.Notes, fmt.Sprintf("%d of %d possible joinings are listed", c.Most, len(order)))
		order = order[:c.Most]
	}
	joinings := make([]Joining, 0, len(order))
	for n, k := range order {
		j := p.Joinings[k]
		j.Order = n + 1
		j.Gaps = j.gapsOf()
		j.Demand = j.Gaps.Demand()
		joinings = append(joinings, j)
		for r := range adducts[k] {
			ad := adducts[k][r]
			ad.Joining, ad.Rank = j.Order, r+1
			p.Adducts = append(p.Adducts, ad)
		}
	}
	p.Joinings = joinings
	first := &p.Joinings[0]
	p.Demand = first.Demand
	p.Swapped = first.A.Role == RolePartner
	if first.A.Kind == kindKetene || first.B.Kind == kindKetene {
		p.Notes = append(p.Notes, "ketenes usually add to alkenes and dienes as [π2s+π2a], giving cyclobutanones, which is not ranked here; see the orbital symmetry of the [2+2] addition")
	}
	return p, nil
}

// refusedEnds takes over the carbon dienes of one molecule that were refused, with
// their atoms in the reason. Where something else reacts, a benzene ring and the half
// of a transoid enone are not worth a word.
func (p *PairJudgement) refusedEnds(e *Ends, in int) {
	which := [2]string{"first", "second"}[in]
	for _, r := range e.Refused {
		carbon := r.Reason != refusedBenzene
		for _, i := range r.Atoms {
			carbon = carbon && e.Molecule.Atoms[i].Element == 6
		}
		if carbon {
			r.Reason = fmt.Sprintf("atoms %s of the %s molecule: %s", numbersOf(e.Molecule, r.Atoms), which, r.Reason)
			p.Refused = append(p.Refused, r)
			p.RefusedIn = append(p.RefusedIn, in)
		}
	}
}

// orient computes the indices of one orientation of a joining.
func orient(j *Joining, o Orientation) (Adduct, error) {
	ad := Adduct{Bonds: o.Bonds, Count: o.Count, orientation: o}
	ia := [2]int{j.a.first(), j.a.last()}
	ib := [2]int{j.b.first(), j.b.last()}
	if o.Bonds[0][1] != j.B.First() {
		ib[0], ib[1] = ib[1], ib[0]
	}
	for k := range 2 {
		e, err := firstBond(&j.a, ia[k], &j.b, ib[k])
		if err != nil {
			return ad, err
		}
		ad.FirstBonds[k] = e
	}
	if ad.FirstBonds[1] < ad.FirstBonds[0]-1e-9 {
		ad.First = 1
	}
	ad.DeltaE = ad.FirstBonds[ad.First]
	ad.Asynchronicity = math.Abs(ad.FirstBonds[0] - ad.FirstBonds[1])
	k := [2]float64{
		formingK(j.a.element(ia[0]), j.b.element(ib[0])),
		formingK(j.a.element(ia[1]), j.b.element(ib[1])),
	}
	oa, ob := j.a.orbitals(), j.b.orbitals()
	up := shellInteraction(oa, oa.HOMO, ob, ob.LUMO, ia, ib, k)
	down := shellInteraction(oa, oa.LUMO, ob, ob.HOMO, ia, ib, k)
	if j.A.Role == RolePartner {
		up, down = down, up
	}
	ad.Normal, ad.Inverse = up, down
	// the pair of smaller gap; of two alike, that of normal demand
	gaps := j.gapsOf()
	if gaps.inverseDominates() == (j.A.Role == RolePartner) {
		ad.Overlap = math.Sqrt(shellOverlap(oa, oa.HOMO, ob, ob.LUMO, ia, ib, k))
	} else {
		ad.Overlap = math.Sqrt(shellOverlap(oa, oa.LUMO, ob, ob.HOMO, ia, ib, k))
	}
	qa, qb := j.a.side.populations(j.a.system), j.b.side.populations(j.b.system)
	for n := range 2 {
		ca := j.a.electrons(ia[n]) - qa[ia[n]]
		cb := j.b.electrons(ib[n]) - qb[ib[n]]
		ad.Charges -= k[n] * ca * cb
	}
	return ad, nil
}

// electrons is what a centre brings to its π system.
func (r *reacting) electrons(local int) float64 {
	return r.side.pi.Centres[r.side.pi.Systems[r.system][local]].Electrons
}

// shellInteraction is 2 Σ (Σ_bonds k c c′)² / |gap| over the orbitals of an occupied
// and an empty shell; a vanishing gap gives +Inf.
func shellInteraction(oa *frontier.Orbitals, sa [2]int, ob *frontier.Orbitals, sb [2]int, ia, ib [2]int, k [2]float64) float64 {
	if sa[1] <= sa[0] || sb[1] <= sb[0] {
		return 0
	}
	return 2 * shellOverlap(oa, sa, ob, sb, ia, ib, k) / math.Abs(oa.X[sa[0]]-ob.X[sb[0]])
}

// shellOverlap is Σ (Σ_bonds k c c′)² over the orbitals of two shells; it does not
// depend on the choice of orbitals within a degenerate shell. The addition is
// suprafacial on both, so a mismatch of phases at the two bonds subtracts.
func shellOverlap(oa *frontier.Orbitals, sa [2]int, ob *frontier.Orbitals, sb [2]int, ia, ib [2]int, k [2]float64) float64 {
	sum := 0.0
	for i := sa[0]; i < sa[1]; i++ {
		for j := sb[0]; j < sb[1]; j++ {
			s := 0.0
			for n := range 2 {
				s += k[n] * oa.Coefficient(ia[n], i) * ob.Coefficient(ib[n], j)
			}
			sum += s * s
		}
	}
	return sum
}

// late is 0 for an ordinary joining, 1 where the partner is a C=O or C≡N bond, 2 where
// the joining gives up an aromatic ring for an exocyclic double bond (a vinylarene as
// diene, a heteroarene bond as partner, a bay region). The first bond feels neither the
// weak bond to O or N that has to follow nor the whole loss of the ring, so such
// joinings are listed after the others (common practice (no source): they react where
// nothing else can).
func (j *Joining) late() int {
	tier := 0
	for _, e := range [2]*End{&j.A, &j.B} {
		switch e.Kind {
		case kindVinylarene, kindHeteroarene, kindBay:
			return 2
		case kindAldehyde, kindKetone, kindNitrile:
			tier = 1
		}
	}
	return tier
}

// gapsOf reads the two frontier gaps off the orbitals; NaN where a system has no HOMO
// or no LUMO.
func (j *Joining) gapsOf() Gaps {
	four, partner := j.a.orbitals(), j.b.orbitals()
	if j.A.Role == RolePartner {
		four, partner = partner, four
	}
	gap := func(up, down *frontier.Orbitals) float64 {
		if up.HOMO[1] <= up.HOMO[0] || down.LUMO[1] <= down.LUMO[0] {
			return math.NaN()
		}
		return up.X[up.HOMO[0]] - down.X[down.LUMO[0]]
	}
	return Gaps{Normal: gap(four, partner), Inverse: gap(partner, four)}
}

// inverseDominates says whether the gap of inverse demand is the smaller one.
func (g Gaps) inverseDominates() bool { return g.Inverse < g.Normal-1e-9 }

// AAtoms and BAtoms are the reacting paths in the first and the second molecule.
func (j *Joining) AAtoms() []int { return j.A.Atoms }

// BAtoms is the reacting path in the second molecule; see [Joining.AAtoms].
func (j *Joining) BAtoms() []int { return j.B.Atoms }

// RoleA and RoleB say what the two molecules bring: "diene (furan)", "partner (alkene)".
func (j *Joining) RoleA() string { return j.A.words() }

// RoleB is the role of the second molecule; see [Joining.RoleA].
func (j *Joining) RoleB() string { return j.B.words() }

// words names an end by its role and kind.
func (e *End) words() string {
	return string(e.Role) + " (" + strings.TrimSuffix(e.Kind, " diene") + ")"
}

// JoiningOf is the joining an adduct belongs to.
func (p *PairJudgement) JoiningOf(ad *Adduct) *Joining { return &p.Joinings[ad.Joining-1] }

// AdductsOf lists the adducts of a joining, by rank.
func (p *PairJudgement) AdductsOf(j *Joining) []*Adduct {
	var list []*Adduct
	for k := range p.Adducts {
		if p.Adducts[k].Joining == j.Order {
			list = append(list, &p.Adducts[k])
		}
	}
	return list
}

// Products builds the products of one adduct, once.
func (p *PairJudgement) Products(k int) ([]AdductProduct, error) {
	ad := &p.Adducts[k]
	if ad.Products != nil {
		return ad.Products, nil
	}
	j := p.JoiningOf(ad)
	list, err := adductProducts(p.A, p.B, &j.combination, ad.orientation)
	if err != nil {
		return nil, fmt.Errorf("adduct of %s: %w", j.label(p), err)
	}
	ad.Products = list
	ad.Configuration = configurationWords(list)
	if len(list) == 1 && list[0].Configuration == "" && ad.Secondary.Text != "" {
		ad.Secondary.Text = "the endo and the exo transition state give the same product"
	}
	return list, nil
}

// label names a joining for messages.
func (j *Joining) label(p *PairJudgement) string {
	mb := p.B
	if mb == nil {
		mb = p.A
	}
	return fmt.Sprintf("%s %s with %s %s", j.A.Kind, numbersOf(p.A, j.A.Atoms), j.B.Kind, numbersOf(mb, j.B.Atoms))
}

// Constitution builds the flat adduct of one orientation.
func (p *PairJudgement) Constitution(ad *Adduct) (*molecule.Molecule, error) {
	return BuildAdduct(p.A, p.B, &p.JoiningOf(ad).combination, ad.orientation)
}

// Find gives the adduct with these new bonds, or the one that is equal to it by
// symmetry.
func (p *PairJudgement) Find(bonds [2][2]int) (*Adduct, bool) {
	for k := range p.Adducts {
		b := p.Adducts[k].Bonds
		if b == bonds || b[0] == bonds[1] && b[1] == bonds[0] {
			return &p.Adducts[k], true
		}
	}
	m, err := joinTwo(p.A, p.B, bonds)
	if err != nil {
		return nil, false
	}
	return p.FindProduct(m)
}

// joinTwo builds the adduct of two given bonds, whichever ends they belong to.
func joinTwo(a, b *molecule.Molecule, bonds [2][2]int) (*molecule.Molecule, error) {
	ea, eb := FindEnds(a), endsOrNil(b)
	other := ea
	if eb != nil {
		other = eb
	}
	match := func(e *End, i, j int) bool {
		return e.First() == i && e.Last() == j || e.First() == j && e.Last() == i
	}
	for _, x := range append(ea.four(), pointers(ea.Partners)...) {
		if !match(x, bonds[0][0], bonds[1][0]) {
			continue
		}
		for _, y := range append(other.four(), pointers(other.Partners)...) {
			if match(y, bonds[0][1], bonds[1][1]) && (x.Role == RolePartner) != (y.Role == RolePartner) {
				return BuildAdduct(a, b, &Combination{A: *x, B: *y}, Orientation{Bonds: bonds})
			}
		}
	}
	return nil, fmt.Errorf("these two bonds join no diene or dipole with a partner")
}

func pointers(list []End) []*End {
	out := make([]*End, len(list))
	for k := range list {
		out[k] = &list[k]
	}
	return out
}

// FindProduct gives the first adduct whose constitution is that of product,
// configuration left aside.
func (p *PairJudgement) FindProduct(product *molecule.Molecule) (*Adduct, bool) {
	formula := product.Formula()
	for k := range p.Adducts {
		m, err := p.Constitution(&p.Adducts[k])
		if err != nil {
			continue
		}
		if m.Formula() != formula { // the same for every adduct
			return nil, false
		}
		if m.SameConstitution(product) {
			return &p.Adducts[k], true
		}
	}
	return nil, false
}
