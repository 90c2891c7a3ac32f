package place

import "slices"

// surroundings is what a ring system carries, for choosing between numberings.
type surroundings struct {
	senior []bool     // per ring atom: it carries the principal characteristic group
	added  []bool     // per ring atom: sp3
	prefix [][]string // per ring atom: names of its substituents, as prefixes
	names  []string   // all of them, sorted, each once
	low    []int      // scratch
	high   []int
}

// seniority orders characteristic groups as suffixes: acids, esters, amides, nitriles,
// aldehydes, ketones, hydroxy compounds, thiols, amines (IUPAC 2013, P-41).
var seniority = map[string]int{
	"CO2H": 1, "CO2−": 1, "boron group": 2, "SO3R": 2, "CO2R": 3, "OC(O)R": 3, "COCl": 4,
	"SO2Cl": 4, "C(O)NR2": 5, "NHC(O)R": 5, "NRC(O)R": 5, "SO2NR2": 5, "NHSO2R": 5,
	"CN": 6, "CHO": 7, "C(O)R": 8, "oxo": 8, "OH": 9, "O−": 9, "SH": 10,
	"NH2": 11, "NHR": 11, "NMe2": 11, "NR2": 11,
}

// prefixes are the names under which substituents are put into alphabetical order;
// others are ordered by their short name after these.
var prefixes = map[string]string{
	"Br": "bromo", "Cl": "chloro", "F": "fluoro", "I": "iodo", "NO2": "nitro", "NO": "nitroso",
	"Me": "methyl", "Et": "ethyl", "iPr": "propan-2-yl", "tBu": "tert-butyl", "CF3": "trifluoromethyl",
	"CHF2": "difluoromethyl", "OMe": "methoxy", "OR": "alkoxy", "OAr": "phenoxy", "OH": "hydroxy",
	"NH2": "amino", "NMe2": "dimethylamino", "NR2": "dialkylamino", "NHR": "alkylamino",
	"CN": "cyano", "CHO": "formyl", "CO2H": "carboxy", "aryl": "phenyl", "vinyl": "ethenyl",
	"alkynyl": "ethynyl", "N3": "azido", "SH": "sulfanyl", "SR": "sulfanyl-R", "oxo": "oxo",
}

// look gathers the surroundings of the ring system, once.
func (s *search) look() *surroundings {
	if s.view != nil {
		return s.view
	}
	n := len(s.ring)
	v := &surroundings{senior: make([]bool, n), added: make([]bool, n), prefix: make([][]string, n)}
	in := make(map[int]bool, n)
	for _, a := range s.ring {
		in[a] = true
	}
	best := 1 << 10
	class := make([]int, n)
	for i, a := range s.ring {
		class[i] = 1 << 10
		v.added[i] = s.m.Atoms[a].Element == 6 && full(s.m, a)
		for _, h := range s.m.Neighbours(a) {
			if in[h.Atom] {
				continue
			}
			word := group(s.m, a, h.Atom)
			if s.m.Degree(h.Atom) == 1 && s.m.Bonds[h.Bond].Order == 2 {
				word = "oxo"
			}
			if c, ok := seniority[word]; ok {
				class[i] = min(class[i], c)
				best = min(best, c)
			}
			name, ok := prefixes[word]
			if !ok {
				name = "~" + word
			}
			v.prefix[i] = append(v.prefix[i], name)
			v.names = append(v.names, name)
		}
	}
	for i := range class {
		v.senior[i] = best < 1<<10 && class[i] == best
	}
	slices.Sort(v.names)
	v.names = slices.Compact(v.names)
	s.view = v
	return v
}

// lower tells whether the present placing of the frame gives lower locants than the
// best so far: to the principal characteristic group, then to sp3 atoms, to all
// substituents together, and to the one cited first (IUPAC 2013, P-31.1.4).
func (s *search) lower(f *frame) bool {
	v := s.look()
	position := make(map[int]int, len(s.ring))
	for i, a := range s.ring {
		position[a] = i
	}
	compare := func(pick func(i int) int) int {
		v.low, v.high = v.low[:0], v.high[:0]
		for k := range f.rank {
			for range pick(s.at[k]) {
				v.low = append(v.low, f.rank[k])
			}
			for range pick(position[s.best.at[k]]) {
				v.high = append(v.high, f.rank[k])
			}
		}
		slices.Sort(v.low)
		slices.Sort(v.high)
		return slices.Compare(v.low, v.high)
	}
	one := func(flags []bool) func(int) int {
		return func(i int) int {
			if flags[i] {
				return 1
			}
			return 0
		}
	}
	if c := compare(one(v.senior)); c != 0 {
		return c < 0
	}
	if c := compare(one(v.added)); c != 0 {
		return c < 0
	}
	if c := compare(func(i int) int { return len(v.prefix[i]) }); c != 0 {
		return c < 0
	}
	for _, name := range v.names {
		c := compare(func(i int) int {
			n := 0
			for _, x := range v.prefix[i] {
				if x == name {
					n++
				}
			}
			return n
		})
		if c != 0 {
			return c < 0
		}
	}
	return false
}
