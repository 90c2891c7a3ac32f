package review

import (
	"fmt"

	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/reactivity/reading"
)

// readier is the difference of lowest localization energies, in |β|, below which two
// molecules count as equally ready: the spread between published parameter sets moves
// differences between molecules by about this much.
const readier = 0.05

// secondTime tells whether the product is more or less ready than the substrate to
// react again at its best site. It compares the lowest localization energies, which,
// unlike frontier densities, may be compared between molecules.
func secondTime(r *reading.Reading, first *reactivity.Attack, cond reactivity.Conditions, offset int) (string, bool) {
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
