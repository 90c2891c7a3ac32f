package review

import (
	"fmt"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/reactivity/reading"
)

// readier is the difference of lowest localization energies, in |β|, below which two
// molecules count as equally ready: the spread between published parameter sets moves
// differences between molecules by about this much.
const readier = 0.05

// secondTime tells whether the product is more or less ready than the substrate to
// react again at its best site: for a nucleophile by the lowest localization energies,
// which, unlike frontier densities, may be compared between molecules; for an
// electrophile by the group that came in.
func secondTime(r *reading.Reading, first *reactivity.Attack, cond reactivity.Conditions) (string, bool) {
	if r.Product == nil || (r.Event != terms.ElectrophilicSubstitution && r.Event != terms.NucleophilicSubstitution) {
		return "", false
	}
	cond.NoLimits = true
	again, err := reactivity.Judge(r.Product, cond, []terms.Toward{r.Event.Toward()})
	if err != nil {
		return "", false
	}
	for k := range again.Attacks {
		a := &again.Attacks[k]
		if a.Event != r.Event {
			continue
		}
		before, ok1 := lowest(first.Sites)
		after, ok2 := lowest(a.Sites)
		if !ok1 || !ok2 {
			continue
		}
		numbers := fmt.Sprintf("lowest localization energy %.3f |β| before, %.3f |β| after", before, after)
		if r.Event == terms.ElectrophilicSubstitution {
			return secondElectrophile(r, numbers), true
		}
		if n := r.Incoming; n != nil && (n.Nucleophile == "N" || n.Nucleophile == "O") && sharesRing(r) {
			return "an amine or alkoxide came in for the leaving group, which makes the ring a good deal less ready: it should stop at one (" + numbers + "; how much the donor deactivates is common practice)", true
		}
		switch {
		case after < before-readier:
			return "the product is readier to react again than the substrate (" + numbers + "): over-reaction is likely without control of stoichiometry", true
		case after > before+readier:
			return "the product is less ready to react again than the substrate (" + numbers + "): it should stop at one", true
		}
		return "the product is about as ready to react again as the substrate (" + numbers + "): watch for a second reaction", true
	}
	return "the product has no site left for a second reaction of this kind", true
}

// sharesRing tells whether the substrate's leaving groups stand on one aromatic ring
// system, so that what replaces the first bears on the second.
func sharesRing(r *reading.Reading) bool {
	m := r.Substrate
	if m == nil || len(r.Sites) == 0 {
		return false
	}
	for _, system := range m.RingSystems() {
		held, halides := false, 0
		for _, a := range system {
			held = held || a == r.Sites[0]
			for _, h := range m.Neighbours(a) {
				switch m.Atoms[h.Atom].Element {
				case 9, 17, 35, 53:
					halides++
				}
			}
		}
		if held {
			return halides > 1
		}
	}
	return false
}

// secondElectrophile judges a second electrophilic attack by the group that came in: a
// π localization energy does not see the σ withdrawal by which nitro, acyl and halogen
// groups deactivate (nitrobenzene comes out like benzene), so the energies stand beside
// the verdict and do not make it. What each group does is common practice (no source).
func secondElectrophile(r *reading.Reading, numbers string) string {
	class := ""
	if r.Incoming != nil {
		class = r.Incoming.Class
	}
	switch class {
	case "nitration", "acylation", "formylation", "sulfonation", "chlorosulfonation", "sulfonylation", "nitrosation", "azo coupling":
		return "an acceptor came in, which deactivates the ring: it should stop at one (" + numbers + "; σ withdrawal is not in these)"
	case "bromination", "chlorination", "iodination", "fluorination":
		if excessive(r.Substrate) {
			return "a halogen deactivates only a little, and this ring is strongly activated: a second halogenation is likely unless the reagent is metered (" + numbers + ")"
		}
		return "a halogen deactivates a little: with one equivalent it should stop at one (" + numbers + "; σ withdrawal is not in these)"
	case "alkylation", "aminomethylation", "thiolation":
		return "a donor came in, which activates the ring: over-reaction is likely without an excess of the arene (" + numbers + ")"
	}
	return "no general rule for this group (" + numbers + "; σ withdrawal is not in these)"
}

// excessive tells whether a molecule holds a ring that halogens attack without a
// catalyst: anilines, phenols, pyrroles, indoles, furans.
func excessive(m *molecule.Molecule) bool {
	for _, p := range excessiveRings {
		if p.Has(m) {
			return true
		}
	}
	return false
}

var excessiveRings = []*molecule.Pattern{
	molecule.MustPattern("[NH2]c1ccccc1"), molecule.MustPattern("[CH3]N([CH3])c1ccccc1"), molecule.MustPattern("[CH3][NH]c1ccccc1"),
	molecule.MustPattern("[OH]c1ccccc1"), molecule.MustPattern("[nH]1cccc1"), molecule.MustPattern("Cn1cccc1"), molecule.MustPattern("o1cccc1"),
}

func lowest(sites []reactivity.Site) (float64, bool) {
	best, found := 0.0, false
	for k := range sites {
		v, ok := sites[k].Index["localization"]
		if !ok || v.Absent != "" {
			continue
		}
		if !found || v.X < best {
			best, found = v.X, true
		}
	}
	return best, found
}
