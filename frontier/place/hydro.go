package place

import (
	"slices"
	"strings"
)

var multiples = [...]string{2: "di", 4: "tetra", 6: "hexa", 8: "octa", 10: "deca", 12: "dodeca", 14: "tetradeca"}

// title is the name of the ring system with what sets it apart from its frame: hydro
// positions ("3,4-dihydroisoquinoline"), another place of the indicated hydrogen
// ("3H-indole"), ring ketones ("quinazoline-2,4-dione"), N-oxides and azinium ions.
// Where the rules for these do not reach, it is the plain name of the frame.
func (n *Namer) title(x *fit) string {
	f := x.frame
	var ketones, added, missing, saturated []string
	oxide, cation, named, thio := false, false, false, false
	for _, k := range byLocant(f) {
		a := x.at[k]
		named = named || f.oxo[k] != 0
		if f.oxo[k] == 0 && f.atom[k] == 6 {
			switch oxo(n.m, a) {
			case 8:
				ketones = append(ketones, f.number[k])
				continue
			case 16:
				thio = true
				continue
			}
		}
		if f.atom[k] == 6 && full(n.m, a) {
			saturated = append(saturated, f.number[k])
		}
		switch full := full(n.m, a); {
		case full && !f.full[k]:
			added = append(added, f.number[k])
		case !full && f.full[k]:
			missing = append(missing, f.number[k])
		}
		if f.atom[k] == 7 && f.charge[k] == 0 && n.m.Atoms[a].Charge > 0 && !full(n.m, a) {
			cation = true
			for _, h := range n.m.Neighbours(a) {
				if n.m.Atoms[h.Atom].Element == 8 && n.m.Atoms[h.Atom].Charge < 0 {
					oxide = true
				}
			}
		}
	}
	name := f.name
	switch {
	case thio || named && (len(ketones) > 0 || len(missing) > 0):
		return name
	case len(ketones) > 0 && strings.Contains(name, "hydro"):
		name = strings.TrimPrefix(name[strings.LastIndex(name, "hydro")+len("hydro"):], "-")
		return prefixed(hydro(saturated), ketone(name, ketones))
	case len(ketones) > 0:
		return ketone(name, ketones)
	case len(missing) == 1 && len(added) == 1:
		return added[0] + "H-" + strings.TrimPrefix(strings.TrimPrefix(name, "2H-"), "4H-")
	case len(missing) > 0:
		return name
	case len(added)%2 == 0 && len(added) > 0:
		if !strings.Contains(name, "hydro") {
			name = prefixed(hydro(added), name)
		}
	}
	switch {
	case oxide:
		name += " N-oxide"
	case cation && strings.HasSuffix(name, "e"):
		name = strings.TrimSuffix(name, "e") + "ium"
	}
	return name
}

// hydro is the prefix for added hydrogen, "" where the number of places is odd or too
// large to have one.
func hydro(places []string) string {
	if len(places) == 0 || len(places)%2 != 0 || len(places) >= len(multiples) {
		return ""
	}
	return strings.Join(places, ",") + "-" + multiples[len(places)] + "hydro"
}

// prefixed puts a prefix before a name, with a hyphen where the name begins with a locant.
func prefixed(prefix, name string) string {
	if prefix != "" && name[0] >= '0' && name[0] <= '9' {
		return prefix + "-" + name
	}
	return prefix + name
}

// ketone adds the ending of ring ketones.
func ketone(name string, places []string) string {
	switch len(places) {
	case 1:
		return strings.TrimSuffix(name, "e") + "-" + places[0] + "-one"
	case 2:
		return name + "-" + strings.Join(places, ",") + "-dione"
	case 3:
		return name + "-" + strings.Join(places, ",") + "-trione"
	}
	return name
}

// byLocant lists the positions of a frame by rising locant.
func byLocant(f *frame) []int {
	order := make([]int, len(f.rank))
	for k := range order {
		order[k] = k
	}
	slices.SortFunc(order, func(a, b int) int { return f.rank[a] - f.rank[b] })
	return order
}
