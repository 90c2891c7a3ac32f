package reactivity

import (
	"fmt"
	"slices"

	"lobecast/frontier/terms"
)

// term is one named contribution to the logarithm of the chance of a site.
type term struct {
	Name   string  // stable; the key in calibration files
	Reason string  // how a report puts it: "ortho to an alkoxy group"
	Prior  float64 // standard deviation of the Gaussian prior on the weight, mean 0
}

// feature is the value of one term at a candidate.
type feature struct {
	term  int32
	value float64
}

// Terms of a ring environment, shared by the events that count them; each event has
// its own weights. The blocks of kinds come first.
const (
	termFlank  = 0                             // + substituent: it stands ortho
	termPara   = termFlank + int(substituents) // + substituent: it stands para
	termSingle = termPara + int(substituents)  // then the single terms
)

const (
	termFlanks = termSingle + iota
	termBetween
	termOrthoAza
	termOrthoN
	termOrthoO
	termOrthoS
	termOrthoOther
	termPeriH
	termPeriGroup
	termPeriHetero
	termParaHetero
	termMetaHetero
	termFive
	termAlphaN
	termAlphaO
	termAlphaS
	termBeta
	termBetaGroup
	termRingN
	termWithdrawing
	termDonating
	termFused
	termField
	termCharge
	ringTerms // their number
)

// termPrior is the standard deviation of the prior on the weight of a counted term, in
// units of the logarithm of a ratio of chances.
const termPrior = 1.0

// ringTermList names the terms of a ring environment.
func ringTermList() []term {
	list := make([]term, ringTerms)
	for s := substituent(0); s < substituents; s++ {
		word := substituentWords[s]
		list[termFlank+int(s)] = term{"ortho " + word, "ortho to " + article(word), termPrior}
		list[termPara+int(s)] = term{"para " + word, "para to " + article(word), termPrior}
	}
	single := []term{
		{"ortho groups", "groups on the neighbouring ring atoms", 2},
		{"between two groups", "between two groups", termPrior},
		{"ortho ring N, one electron", "next to a pyridine-type N", termPrior},
		{"ortho ring N, lone pair", "next to a pyrrole-type N", termPrior},
		{"ortho ring O", "next to a ring O", termPrior},
		{"ortho ring S", "next to a ring S", termPrior},
		{"ortho other heteroatom", "next to another ring heteroatom", termPrior},
		{"peri H", "peri to a C–H", termPrior},
		{"peri group", "peri to a substituted carbon", termPrior},
		{"peri heteroatom", "peri to a ring heteroatom", termPrior},
		{"para ring heteroatom", "para to a ring heteroatom", termPrior},
		{"meta ring heteroatoms", "meta to a ring heteroatom", termPrior},
		{"five-membered ring", "in a five-membered ring", termPrior},
		{"α to pyrrole-type N", "α to a pyrrole-type N", termPrior},
		{"α to ring O", "α to a furan-type O", termPrior},
		{"α to ring S", "α to a thiophene-type S", termPrior},
		{"β in a five-membered ring", "β in a five-membered ring", termPrior},
		{"groups opposite in a five-membered ring", "groups across the five-membered ring", termPrior},
		{"pyridine-type N in the ring", "pyridine-type N in the ring", termPrior},
		{"acceptors on the ring", "acceptor groups on the ring", termPrior},
		{"donors on the ring", "donor groups on the ring", termPrior},
		{"aromatic rings fused", "aromatic rings fused to the ring", termPrior},
		{"σ-inductive field", "σ-inductive field", 2},
		{"charge by distance", "formal charge by distance", 2},
	}
	copy(list[termSingle:], single)
	return list
}

// article puts a or an before a word.
func article(word string) string {
	switch word {
	case "N=", "NH2", "NHR", "NR2", "N-alkyl", "N-aryl", "N-acyl", "N-sulfonyl", "N-silyl", "F", "I",
		"OCF3-like group", "O of a fused ring", "N of a fused ring", "S of a fused ring":
		return "an " + word
	}
	switch word[0] {
	case 'a', 'e', 'i', 'o', 'u':
		return "an " + word
	}
	return "a " + word
}

// ringFeatures appends the terms of an environment.
func ringFeatures(e *environment, dst []feature) []feature {
	add := func(t int, v float64) {
		if v != 0 {
			dst = append(dst, feature{int32(t), v})
		}
	}
	for _, s := range e.flank[:e.flanks] {
		add(termFlank+int(s), 1)
	}
	for _, s := range e.para[:e.paras] {
		add(termPara+int(s), 1)
	}
	add(termFlanks, float64(e.flanks))
	if e.flanks >= 2 {
		add(termBetween, 1)
	}
	for _, o := range e.orthoRing[:e.orthos] {
		add(termOrthoAza+int(o), 1)
	}
	add(termPeriH, float64(e.periH))
	add(termPeriGroup, float64(e.periGroup))
	add(termPeriHetero, float64(e.periHetero))
	add(termParaHetero, boolFloat(e.paraHetero))
	add(termMetaHetero, float64(e.metaHetero))
	add(termFive, boolFloat(e.five))
	add(termAlphaN, boolFloat(e.alphaN))
	add(termAlphaO, boolFloat(e.alphaO))
	add(termAlphaS, boolFloat(e.alphaS))
	add(termBeta, boolFloat(e.beta))
	add(termBetaGroup, float64(e.betaGroups))
	add(termRingN, float64(e.ringN))
	add(termWithdrawing, float64(e.withdrawing))
	add(termDonating, float64(e.donating))
	add(termFused, float64(e.fused))
	add(termField, e.field)
	add(termCharge, e.charge)
	return dst
}

// The classes of what comes in that the fit tells apart, by event. The first is the
// class the plain terms describe.
var attackerClasses = map[terms.Event][]string{
	terms.ElectrophilicSubstitution: {"halogenation", "nitration", "carbon or sulfur electrophile"},
	terms.NucleophilicSubstitution:  {"nitrogen nucleophile", "oxygen nucleophile", "sulfur nucleophile"},
}

// attackerClassOf places what comes in, in the words of [Conditions] or of the outcome
// files, in attackerClasses; -1 for unknown.
func attackerClassOf(event terms.Event, incoming string) int {
	switch event {
	case terms.ElectrophilicSubstitution:
		switch incoming {
		case "chlorination", "bromination", "iodination", "fluorination", "thiocyanation":
			return 0
		case "nitration", "nitrosation", "azo coupling":
			return 1
		case "":
			return -1
		}
		return 2
	case terms.NucleophilicSubstitution:
		switch incoming {
		case "N":
			return 0
		case "O":
			return 1
		case "S":
			return 2
		}
	}
	return -1
}

// crossedTerms lists the terms that weigh differently with the class of what comes in:
// size and hardness of the electrophile act through crowding, field and charge, and
// through the hydroxyl group that may hold it.
var crossedTerms = map[terms.Event][]int{
	terms.ElectrophilicSubstitution: {
		termFlanks, termFive, termAlphaN, termAlphaS, termFlank + int(subHydroxy), termRingN, termField, termCharge,
	},
	terms.NucleophilicSubstitution: {termFlanks, termLeavingF},
}

// Terms of nucleophilic substitution beyond those of a ring environment.
const (
	termLeavingF = ringTerms + iota
	termLeavingBr
	termLeavingI
	termAzaIn // + distance−1, 1 to 3: N that brings one electron in the same ring
	_
	_
	termAzaOut // + distance−2, 2 to 5: such an N in another ring of the π system
	_
	_
	_
	termSixRing
	termVinyl
	displacementTerms
)

func displacementTermList() []term {
	list := append(ringTermList(), make([]term, displacementTerms-ringTerms)...)
	set := func(i int, name, reason string) { list[i] = term{name, reason, termPrior} }
	set(termLeavingF, "leaving F", "F as leaving group")
	set(termLeavingBr, "leaving Br", "Br as leaving group")
	set(termLeavingI, "leaving I", "I as leaving group")
	for d := range 3 {
		where := [...]string{"ortho", "meta", "para"}[d]
		set(termAzaIn+d, fmt.Sprintf("aza N, %d bonds away in the ring", d+1), where+" to a ring N")
	}
	for d := range 4 {
		set(termAzaOut+d, fmt.Sprintf("aza N, %d bonds away in another ring", d+2), fmt.Sprintf("a ring N %d bonds away", d+2))
	}
	set(termSixRing, "six-membered ring", "in a six-membered ring")
	set(termVinyl, "vinylic", "on a C=C outside rings")
	return list
}

// crossName names a term weighed apart for a class of what comes in.
func crossName(name, class string) string { return name + ", " + class }

// siteTermList lists all static terms of an event: those of the environment, then the
// crossed ones, class by class.
func siteTermList(event terms.Event) []term {
	var list []term
	switch event {
	case terms.ElectrophilicSubstitution:
		list = ringTermList()
	case terms.NucleophilicSubstitution:
		list = displacementTermList()
	default:
		return nil
	}
	for _, class := range attackerClasses[event][1:] {
		for _, t := range crossedTerms[event] {
			list = append(list, term{crossName(list[t].Name, class), list[t].Reason, 0.5})
		}
	}
	return list
}

// siteFeatures describes candidate atom r for an event, without crossed terms.
func (v *view) siteFeatures(event terms.Event, r int, dst []feature) []feature {
	e := v.surroundings(r)
	dst = ringFeatures(&e, dst)
	if event != terms.NucleophilicSubstitution {
		return dst
	}
	add := func(t int, x float64) {
		if x != 0 {
			dst = append(dst, feature{int32(t), x})
		}
	}
	m := v.m
	if h := v.halogenOn(r); h >= 0 {
		switch m.Atoms[h].Element {
		case 9:
			add(termLeavingF, 1)
		case 35:
			add(termLeavingBr, 1)
		case 53:
			add(termLeavingI, 1)
		}
	}
	var in [3]float64
	var out [4]float64
	for x := range m.Atoms {
		if m.Atoms[x].Element != 7 || !v.azaNitrogen(x) {
			continue
		}
		d := v.bonds(r, x)
		switch same := v.sameRing(r, x); {
		case d < 1:
		case same && d <= 3:
			in[d-1]++
		case !same && d >= 2 && d <= 5:
			out[d-2]++
		}
	}
	for d, n := range in {
		add(termAzaIn+d, n)
	}
	for d, n := range out {
		add(termAzaOut+d, n)
	}
	six := false
	for _, k := range m.RingsOf(r) {
		ring := m.Rings()[k]
		all := len(ring) == 6
		for _, i := range ring {
			all = all && m.Atoms[i].Aromatic
		}
		six = six || all
	}
	add(termSixRing, boolFloat(six))
	add(termVinyl, boolFloat(!m.Atoms[r].Aromatic))
	return dst
}

// sameRing tells whether a ring of the set holds both atoms.
func (v *view) sameRing(a, b int) bool {
	for _, k := range v.m.RingsOf(a) {
		if slices.Contains(v.m.Rings()[k], b) {
			return true
		}
	}
	return false
}

// crossFeatures appends the crossed terms for a class of what comes in, or, where it is
// unknown (-1), for the classes in the proportion of the outcomes.
func crossFeatures(event terms.Event, class int, share []float64, base int, dst []feature) []feature {
	crossed := crossedTerms[event]
	n := len(dst)
	for c := 1; c < len(attackerClasses[event]); c++ {
		weight := 0.0
		switch {
		case class == c:
			weight = 1
		case class < 0:
			weight = share[c]
		}
		if weight == 0 {
			continue
		}
		for k, t := range crossed {
			for _, f := range dst[:n] {
				if int(f.term) == t {
					dst = append(dst, feature{int32(base + (c-1)*len(crossed) + k), f.value * weight})
				}
			}
		}
	}
	return dst
}

// plainTerms is the number of terms before the crossed ones.
func plainTerms(event terms.Event) int {
	if event == terms.NucleophilicSubstitution {
		return displacementTerms
	}
	return ringTerms
}
