package reading

import (
	"fmt"

	"lobecast/frontier/molecule"
	"lobecast/rules/agents"
)

// nearest names a step that no event of the model explains, by the functional groups
// that came and went and by the agents, in the trade's words.
func (r *reader) nearest() {
	var before, after groups
	for _, m := range r.reactants {
		before.add(m)
	}
	reagent := groups{}
	for _, m := range r.unlisted() {
		reagent.add(m)
	}
	after.add(r.Product)
	name := "rearrangement"
	if !r.isomerizes() {
		name = r.name(&before, &after, &reagent)
	}
	why := outsideReason(name)
	r.other(name, why)
	if missing := r.missing(); missing != "" && name == "" {
		r.Impossible = missing
	}
}

// isomerizes tells whether the product has just the atoms of one reactant, so that nothing
// was added, lost or exchanged.
func (r *reader) isomerizes() bool {
	want, h := compositionOf(r.Product), hydrogens(r.Product)
	for _, m := range r.reactants {
		if compositionOf(m) == want && hydrogens(m) == h {
			return true
		}
	}
	return false
}

// closesByMetathesis tells whether a reactant with two C=C lost ethene and gained a ring.
func (r *reader) closesByMetathesis() bool {
	for _, m := range r.reactants {
		lost := compositionOf(m)
		for i, n := range compositionOf(r.Product) {
			lost[i] -= n
		}
		if lost == (composition{6: 2}) && hydrogens(m)-hydrogens(r.Product) == 4 && ringCount(r.Product) == ringCount(m)+1 {
			return true
		}
	}
	return false
}

// name is the decision list: the more special the sign, the earlier it is asked for.
func (r *reader) name(b, a, x *groups) string {
	has := func(role agents.Role) bool { return agents.Any(r.Agents, role) }
	named := func(names ...string) bool {
		for _, g := range r.Agents {
			for _, n := range names {
				if g.Name == n {
					return true
				}
			}
		}
		return false
	}
	alkylHalide := func(g *groups) int { return g.alkylChloride + g.alkylBromide + g.alkylIodide }
	carbons := func() int {
		n := 0
		for _, m := range r.reactants {
			n = max(n, int(compositionOf(m)[6]))
		}
		return int(compositionOf(r.Product)[6]) - n
	}()
	single := len(r.reactants) == 1
	switch {
	case r.closesByMetathesis():
		return "ring-closing metathesis"
	// couplings with a metalloid
	case b.boronic > a.boronic && b.arylHalide+b.vinylHalide+b.sulfonate+alkylHalide(b) > a.arylHalide+a.vinylHalide+a.sulfonate+alkylHalide(a):
		return "boronate cross-coupling"
	case b.boronic < a.boronic:
		return "borylation"
	case b.stannane > a.stannane:
		return "stannane cross-coupling"
	case b.terminalAlkyne > a.terminalAlkyne && b.alkyne <= a.alkyne && (b.arylHalide+b.vinylHalide+b.sulfonate > a.arylHalide+a.vinylHalide+a.sulfonate || has(agents.TransitionMetal)):
		return "alkyne cross-coupling"
	case x.terminalAlkyne > 0 && a.alkyne > b.alkyne && b.arylHalide+b.vinylHalide > a.arylHalide+a.vinylHalide:
		return "alkyne cross-coupling"
	case b.organozinc > 0 && carbons > 0:
		return "organozinc cross-coupling"
	case has(agents.MetalCatalyst) && b.arylHalide > a.arylHalide && a.nitrile > b.nitrile:
		return "cyanation of an aryl halide"
	case has(agents.MetalCatalyst) && b.arylHalide > a.arylHalide && b.alkene >= a.alkene && b.alkene > 0 && a.alkene > 0 && carbons > 0 && b.nH == a.nH:
		return "alkene cross-coupling"
	case has(agents.MetalCatalyst) && b.arylHalide > a.arylHalide && carbons > 0 && b.nH > a.nH:
		return "metal-catalysed amination"

	case has(agents.TransitionMetal) && !has(agents.Hydrogen) && b.arylHalide > a.arylHalide && r.halogens(7) > 0 && x.nH > 0:
		return "metal-catalysed amination"

	// reductions of groups that stand alone
	case b.nitro > a.nitro && a.primaryAmine > b.primaryAmine && carbons <= 0:
		return "nitro reduction"
	case b.azide > a.azide && a.primaryAmine > b.primaryAmine:
		return "azide reduction"
	case b.nitrile > a.nitrile && a.primaryAmine+a.secondaryAmine+a.boc > b.primaryAmine+b.secondaryAmine+b.boc && carbons <= 0:
		return "nitrile reduction"
	case b.nitrile > a.nitrile && a.acid > b.acid:
		return "nitrile hydrolysis"
	case b.nitrile > a.nitrile && a.amide > b.amide && carbons <= 0:
		return "nitrile hydration"
	case b.nitrile > a.nitrile && a.aldehyde > b.aldehyde:
		return "nitrile reduction"

	// protecting groups
	case a.boc > b.boc || a.cbz > b.cbz || a.fmoc > b.fmoc:
		if a.nH < b.nH || x.carbonate+x.anhydride > 0 || has(agents.Protecting) {
			return "carbamate protection"
		}
		return "carbamate formation"
	case b.boc > a.boc || b.cbz > a.cbz || b.fmoc > a.fmoc:
		if a.carbamate < b.carbamate && carbons <= 0 {
			return "carbamate removal"
		}
		if a.carbamate < b.carbamate {
			return "carbamate removal"
		}
	case a.silylEther > b.silylEther:
		return "silyl protection"
	case b.silylEther > a.silylEther:
		return "silyl ether cleavage"
	case b.tertButylEster > a.tertButylEster && a.acid > b.acid:
		return "tert-butyl ester cleavage"
	case b.benzylEther > a.benzylEther && a.alcohol+a.phenol > b.alcohol+b.phenol:
		return "O-debenzylation"
	case b.benzylEster > a.benzylEster && a.acid > b.acid:
		return "O-debenzylation"
	case b.benzylN > a.benzylN && carbons < 0 && a.nH > b.nH:
		return "N-debenzylation"
	case single && b.arylMethylEther > a.arylMethylEther && a.phenol > b.phenol && carbons < 0,
		single && b.arylEther > a.arylEther && a.phenol > b.phenol && carbons < 0:
		return "aryl ether cleavage"

	// acid derivatives
	case a.acylChloride > b.acylChloride:
		return "acid chloride formation"
	case a.sulfonylChloride > b.sulfonylChloride:
		return "sulfonyl chloride formation"
	case a.sulfonamide > b.sulfonamide:
		return "sulfonamide formation"
	case a.sulfonate > b.sulfonate:
		return "sulfonate ester formation"
	case a.urea > b.urea || a.carbamate > b.carbamate && b.isocyanate > 0 && a.urea+a.carbamate > b.urea+b.carbamate:
		if a.urea > b.urea {
			return "urea formation"
		}
		return "carbamate formation"
	case b.phenol+b.alcohol > a.phenol+a.alcohol && a.carbonate+a.carbamate > b.carbonate+b.carbamate && b.acylChloride+x.acylChloride > a.acylChloride:
		return "ester from acyl chloride"
	case b.acid > a.acid && a.alcohol > b.alcohol && carbons <= 0 && has(agents.Hydride|agents.Reductant):
		return "acid reduction"
	case b.ester > a.ester && a.alcohol > b.alcohol && has(agents.Hydride) && a.acid == b.acid:
		return "ester reduction"
	case b.amide > a.amide && (has(agents.Hydride) || a.acid == b.acid && a.secondaryAmine+a.tertiaryAmine > b.secondaryAmine+b.tertiaryAmine && carbons <= 0) && a.acid <= b.acid:
		return "amide reduction"
	case b.ester > a.ester && a.acid > b.acid:
		return "ester hydrolysis"
	case b.amide > a.amide && a.acid > b.acid:
		return "amide hydrolysis"
	case b.ester > a.ester && a.amide > b.amide:
		return "amide formation from an ester"
	case b.anhydride+x.anhydride > 0 && r.acetylated(b, a):
		return "acetylation"
	case a.amide > b.amide && (b.acylChloride > a.acylChloride || x.acylChloride > 0 || x.anhydride > 0 || b.anhydride > a.anhydride):
		return "N-acylation"
	case a.ester > b.ester && (b.acylChloride > a.acylChloride || x.acylChloride > 0) && b.acid <= a.acid:
		return "ester from acyl chloride"
	case a.amide > b.amide && (b.acid > a.acid || has(agents.Coupling) || x.acid > 0):
		return "amide coupling"
	case a.amide > b.amide:
		return "N-acylation"
	case a.ester > b.ester && (b.acid > a.acid || x.acid > 0):
		return "esterification"
	case a.ester > b.ester && (b.anhydride > 0 || x.anhydride > 0):
		return "ester formation from an anhydride"

	// oxidations
	case a.sulfoxide > b.sulfoxide || a.sulfone > b.sulfone && (b.sulfide > a.sulfide || b.sulfoxide > a.sulfoxide):
		return "sulfide oxidation"
	case b.alcohol > a.alcohol && a.aldehyde+a.ketone+a.acid > b.aldehyde+b.ketone+b.acid && carbons <= 0:
		return "alcohol oxidation"
	case b.aldehyde > a.aldehyde && a.acid > b.acid:
		return "aldehyde oxidation"
	case a.nOxide > b.nOxide:
		return "N-oxidation"
	case a.epoxide > b.epoxide:
		return "epoxidation"

	// amines
	case b.aldehyde > a.aldehyde && b.nH > 0 && ringCount(r.Product) > r.rings() && !has(agents.Hydride|agents.Hydrogen|agents.Reductant):
		return "ring closure by condensation"
	case b.aldehyde+b.ketone+x.aldehyde+x.ketone > a.aldehyde+a.ketone && (has(agents.Hydride|agents.Hydrogen) || a.imine <= b.imine) && (a.primaryAmine > b.primaryAmine || a.secondaryAmine > b.secondaryAmine || a.tertiaryAmine > b.tertiaryAmine) && a.imine+a.oxime <= b.imine+b.oxime && (b.aldehyde+b.ketone > a.aldehyde+a.ketone || !r.methylOnly(b, a)):
		return "reductive amination"
	case has(agents.Diazotizing) && b.primaryAmine > a.primaryAmine && carbons <= 1 && (r.halogens(9)+r.halogens(17)+r.halogens(35)+r.halogens(53) > 0 || a.nitrile > b.nitrile || a.phenol > b.phenol):
		return "diazotization and replacement of N2"
	case b.alkene > a.alkene && carbons <= 0 && a.alcohol > b.alcohol && r.halogens(17)+r.halogens(35)+r.halogens(53) > 0:
		return "halohydrin formation"
	case b.alkene > a.alkene && carbons <= 0 && a.alcohol > b.alcohol:
		if named("borane") || named("9-BBN") {
			return "hydroboration and oxidation"
		}
		return "hydration or dihydroxylation of C=C"
	case r.several(b, a):
		return "substitution at several positions"
	case b.epoxide > a.epoxide && a.alcohol > b.alcohol:
		return "epoxide opening"
	case r.methylOnly(b, a) && a.methylN > b.methylN:
		return "N-methylation"
	case (alkylHalide(b)+alkylHalide(x)+b.sulfonate+b.epoxide) > alkylHalide(a)+a.sulfonate && b.nH > a.nH && carbons > 0:
		if carbons == 1 && a.methylN > b.methylN {
			return "N-methylation"
		}
		return "N-alkylation"
	case (has(agents.Hydride) || has(agents.Reductant)) && a.secondaryAmine+a.tertiaryAmine > b.tertiaryAmine && b.nH > a.nH && carbons > 0:
		return "reductive amination"
	case b.aldehyde+b.ketone > a.aldehyde+a.ketone && a.imine+a.oxime > b.imine+b.oxime:
		return "condensation to C=N"

	// alcohols, ethers, halides
	case carbons == 1 && a.methylO > b.methylO && (b.phenol+b.alcohol > a.phenol+a.alcohol || a.arylMethylEther > b.arylMethylEther || a.alkylEther > b.alkylEther || has(agents.Methylating)):
		return "O-methylation"
	case b.alcohol+b.phenol > a.alcohol+a.phenol && r.halogens(17) > 0 && carbons <= 0:
		return "alcohol to chloride"
	case b.alcohol > a.alcohol && a.alkylBromide > b.alkylBromide:
		return "alcohol to bromide"
	case a.alkylBromide > b.alkylBromide && carbons <= 0 && (named("N-bromosuccinimide") || has(agents.Brominating) || has(agents.RadicalStarter)):
		if r.benzylic(35) {
			return "benzylic bromination"
		}
		return "bromination of a saturated carbon"
	case a.alkylChloride > b.alkylChloride && carbons <= 0:
		return "chlorination of a saturated carbon"
	case b.phenol > a.phenol && a.arylEther > b.arylEther:
		return "O-alkylation"
	case b.alcohol > a.alcohol && a.alkylEther+a.arylEther > b.alkylEther+b.arylEther:
		return "O-alkylation"
	case b.sulfide+b.thiol > 0 && a.sulfide > b.sulfide:
		return "S-alkylation"
	case b.aldehyde+b.ketone > a.aldehyde+a.ketone && a.alkene > b.alkene && (b.ylide+b.phosphonate+x.ylide > 0):
		return "olefination"
	case b.aldehyde+b.ketone > a.aldehyde+a.ketone && a.alcohol > b.alcohol && carbons <= 0:
		return "carbonyl reduction"
	case b.aldehyde+b.ketone > a.aldehyde+a.ketone && a.alkene > b.alkene:
		return "aldol-type condensation"
	case b.arylHalide > a.arylHalide && carbons <= 0 && (has(agents.Hydrogen | agents.MetalCatalyst)):
		return "dehalogenation"
	case b.aldehyde > a.aldehyde && a.alkene > b.alkene && carbons > 0:
		return "aldol-type condensation"
	case b.alkene > a.alkene && carbons <= 0 && (has(agents.Hydrogen) || has(agents.MetalCatalyst)):
		return "hydrogenation of C=C"
	case b.alkyne > a.alkyne && carbons <= 0:
		return "hydrogenation of C≡C"
	case has(agents.Organometal):
		return "reaction of an organometallic reagent"
	case a.alkene > b.alkene && carbons <= 0 && (b.alcohol > a.alcohol || alkylHalide(b) > alkylHalide(a)):
		return "elimination"
	case alkylHalide(b) > alkylHalide(a) && carbons > 0:
		return "alkylation of carbon"
	case alkylHalide(b)+b.sulfonate > alkylHalide(a)+a.sulfonate && a.azide+a.nitrile > b.azide+b.nitrile:
		return "displacement at a saturated carbon"
	case b.acetal > a.acetal && a.aldehyde+a.ketone > b.aldehyde+b.ketone:
		return "acetal cleavage"
	case b.amide > a.amide && carbons < 0:
		return "amide cleavage"
	case r.halogens(17) > 0 && carbons <= 0 && named("phosphorus oxychloride", "thionyl chloride", "phosphorus pentachloride", "oxalyl chloride"):
		return "deoxychlorination of a lactam or hydroxyazine"
	case r.conserved(r.Product) && b.alkene > a.alkene && r.withAcceptor():
		return "conjugate addition of a carbon nucleophile"
	case r.aromaticRings() > 0 && ringCount(r.Product) > r.rings():
		return "ring closure to a heteroarene"
	case r.aromaticRings() > 0:
		return "aromatization"
	case r.aromaticRings() < 0 && a.ketone >= b.ketone+2:
		return "oxidation to a quinone"
	case ringCount(r.Product) > r.rings():
		return "ring closure"
	}
	return ""
}

// several tells whether two or more hydrogens of arenes gave way to halogen or nitro
// groups, with nothing else changed.
func (r *reader) several(b, a *groups) bool {
	if len(r.reactants) != 1 || compositionOf(r.reactants[0])[6] != compositionOf(r.Product)[6] || len(r.Product.Rings()) != len(r.reactants[0].Rings()) {
		return false
	}
	return a.arylHalide >= b.arylHalide+2 && a.nitro == b.nitro || a.nitro >= b.nitro+2 && a.arylHalide == b.arylHalide
}

// withAcceptor tells whether a reactant is an alkene or alkyne with an acceptor.
func (r *reader) withAcceptor() bool {
	for _, m := range r.reactants {
		if acceptor(m) {
			return true
		}
	}
	return false
}

// aromaticRings is the number of aromatic rings that the product has more than the
// reactants.
func (r *reader) aromaticRings() int {
	n := countAromaticRings(r.Product)
	for _, m := range r.reactants {
		n -= countAromaticRings(m)
	}
	return n
}

func countAromaticRings(m *molecule.Molecule) int {
	n := 0
	for _, ring := range m.Rings() {
		all := true
		for _, a := range ring {
			all = all && m.Atoms[a].Aromatic
		}
		if all {
			n++
		}
	}
	return n
}

// rings is the number of rings of all reactants.
func (r *reader) rings() int {
	n := 0
	for _, m := range r.reactants {
		n += ringCount(m)
	}
	for _, m := range r.unlisted() {
		n += ringCount(m)
	}
	return n
}

// methylOnly tells whether exactly one carbon came in and sits as CH3 on nitrogen.
func (r *reader) methylOnly(b, a *groups) bool {
	n := 0
	for _, m := range r.reactants {
		n = max(n, int(compositionOf(m)[6]))
	}
	d := int(compositionOf(r.Product)[6]) - n
	return d >= 1 && d <= 2 && a.methylN-b.methylN >= d
}

// acetylated tells whether an acetyl group came in on N or O.
func (r *reader) acetylated(b, a *groups) bool {
	n, acetyl := 0, 0
	for _, m := range r.reactants {
		n = max(n, int(compositionOf(m)[6]))
	}
	if a.amide+a.ester <= b.amide+b.ester {
		return false
	}
	p := r.Product
	for i := range p.Atoms {
		if carbonyl(p, i) && neighbours(p, i, 6, 1) == 1 {
			for _, h := range p.Neighbours(i) {
				if p.Atoms[h.Atom].Hydrogens == 3 {
					acetyl++
				}
			}
		}
	}
	for _, m := range r.reactants {
		for i := range m.Atoms {
			if carbonyl(m, i) && neighbours(m, i, 6, 1) == 1 && m.Degree(i) == 3 {
				for _, h := range m.Neighbours(i) {
					if m.Atoms[h.Atom].Hydrogens == 3 {
						acetyl--
					}
				}
			}
		}
	}
	d := int(compositionOf(p)[6]) - n
	return acetyl > 0 && d >= 2 && d%2 == 0
}

// halogens is the number of atoms of an element that the product has more than the
// reactants.
func (r *reader) halogens(element int) int {
	n := int(compositionOf(r.Product)[element])
	for _, m := range r.reactants {
		n -= int(compositionOf(m)[element])
	}
	return n
}

// benzylic tells whether the product has a new halogen on a carbon beside an arene.
func (r *reader) benzylic(element int) bool {
	p := r.Product
	for i := range p.Atoms {
		if p.Atoms[i].Element != element || p.Degree(i) != 1 {
			continue
		}
		c := p.Neighbours(i)[0].Atom
		for _, h := range p.Neighbours(c) {
			if p.Atoms[h.Atom].Aromatic && !p.Atoms[c].Aromatic {
				return true
			}
		}
	}
	return false
}

// outsideReason says why the model does not judge a step of this name.
func outsideReason(name string) string {
	switch name {
	case "":
		return ""
	case "boronate cross-coupling", "stannane cross-coupling", "alkyne cross-coupling", "alkene cross-coupling",
		"organozinc cross-coupling", "ring-closing metathesis", "metal-catalysed amination", "cyanation of an aryl halide", "borylation":
		return "the metal and its ligands decide, not the frontier orbitals of the free molecules"
	case "benzylic bromination", "bromination of a saturated carbon", "chlorination of a saturated carbon":
		return "a hydrogen of a saturated carbon is replaced, which no π index ranks"
	case "conjugate addition of a carbon nucleophile":
		return "only attack by N, O, S and stabilized or metal-bound carbon is looked for"
	case "substitution at several positions":
		return "one step is judged for one substitution: write a step for each"
	case "halohydrin formation":
		return "additions of HX and X2 are ranked, those with a second nucleophile are not"
	case "reaction of an organometallic reagent":
		return "aggregation, chelation and directed metalation decide"
	}
	return "no position of a π system is chosen in it"
}

// missing says which element of the product no reactant or agent can bring, or "".
func (r *reader) missing() string {
	if len(r.Agents) > 0 {
		for _, a := range r.Agents {
			if a.SMILES == "" {
				return "" // an agent without a structure may bring anything
			}
		}
	}
	var have composition
	add := func(m *molecule.Molecule) {
		for i, n := range compositionOf(m) {
			have[i] += n
		}
	}
	for _, m := range r.reactants {
		add(m)
	}
	for _, m := range r.unlisted() {
		add(m)
	}
	for _, a := range r.Agents {
		if m, err := molecule.ParseSMILES(a.SMILES); err == nil {
			add(m)
		}
	}
	for _, a := range r.Aside {
		if m, err := molecule.ParseSMILES(a.SMILES); err == nil {
			add(m)
		}
	}
	want := compositionOf(r.Product)
	for z, n := range want {
		if n > 0 && have[z] == 0 {
			return fmt.Sprintf("the product holds %s, which no reactant and no agent brings; complete the reactants or mend the product", molecule.Symbol(z))
		}
	}
	if want[6] > have[6] {
		return fmt.Sprintf("the product has %d carbons, all reactants and agents together %d; complete the reactants or mend the product", want[6], have[6])
	}
	return ""
}
