package review

import (
	"fmt"

	"lobecast/frontier/place"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/reactivity/reading"
	"lobecast/reactivity/report"
)

// rival is the best site of another reactant for the same event.
type rival struct {
	smiles, place string
	energy        float64 // localization energy in |β|
	against       float64 // the lowest of the substrate
}

// rivals finds, for every other reactant, the site that the same reagent would attack
// there, with its localization energy beside the lowest of the substrate. Chances are
// not mixed across molecules: they were fitted to choices within one molecule, and a
// frontier density has no meaning between two.
func rivals(r *reading.Reading, attack *reactivity.Attack, cond reactivity.Conditions) []rival {
	against, ok := lowest(attack.Sites)
	if !ok {
		return nil
	}
	cond.NoLimits, cond.Only = true, r.Event
	var list []rival
	for _, m := range r.Others {
		j, err := reactivity.Judge(m, cond, []terms.Toward{r.Event.Toward()})
		if err != nil {
			continue // no π system, and so nothing to be attacked
		}
		for k := range j.Attacks {
			sites := j.Attacks[k].Sites
			if j.Attacks[k].Event != r.Event || len(sites) == 0 {
				continue
			}
			best, energy := 0, 0.0
			for i := range sites {
				if v, ok := sites[i].Index["localization"]; ok && v.Absent == "" && (energy == 0 || v.X < energy) {
					best, energy = i, v.X
				}
			}
			if energy != 0 {
				list = append(list, rival{m.SMILES(), place.NewNamer(m).Site(sites[best].Atoms), energy, against})
			}
		}
	}
	return list
}

// meetRivals names the rivals of the substrate; one that is readier makes a supported
// step contested.
func meetRivals(x *report.Step, list []rival) {
	for _, v := range list {
		numbers := fmt.Sprintf("lowest localization energy %.3f |β| there, %.3f |β| in the substrate", v.energy, v.against)
		where := fmt.Sprintf("the other reactant %s, %s", v.smiles, v.place)
		switch {
		case v.energy < v.against-readier:
			x.Competing = append(x.Competing, fmt.Sprintf("%s: readier (%s), it may be attacked instead", where, numbers))
			if x.Standing == string(terms.Supported) {
				x.Standing = string(terms.Contested)
				x.Reason += fmt.Sprintf("; but the other reactant is readier at %s (%s)", v.place, numbers)
			}
		case v.energy < v.against+readier:
			x.Competing = append(x.Competing, fmt.Sprintf("%s: about as ready (%s)", where, numbers))
		default:
			x.Competing = append(x.Competing, fmt.Sprintf("%s: less ready (%s)", where, numbers))
		}
	}
}
