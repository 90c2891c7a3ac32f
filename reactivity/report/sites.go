package report

import (
	"strings"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/place"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
	"lobecast/rules"
)

// AddSites ranks the sites of one input structure and adds it to the report. Salts
// and counter-ions are set aside and named; what cannot be judged is refused.
func (b *Builder) AddSites(input, name string, m *molecule.Molecule, cond reactivity.Conditions, towards []terms.Toward, in *reactivity.Incoming) {
	parts, aside := molecule.SetAside(m)
	if b.tooMany(input, len(parts)) {
		return
	}
	for _, part := range parts {
		j, err := reactivity.Judge(part, cond, towards)
		if err != nil {
			b.Refuse(input, err)
			continue
		}
		s := NewStructure(input, name, j)
		s.Medium = string(cond.Medium)
		s.Aside = newAsides(aside)
		s.Attack = NewAttacks(j, in, towards)
		if len(s.Attack) == 0 {
			s.Warnings = append(s.Warnings, noSite(towards))
		}
		for _, a := range j.Attacks {
			b.quote(a.Event)
			situation := &rules.Situation{
				Molecules: []*molecule.Molecule{part}, Event: a.Event,
				Medium: cond.Medium, Incoming: cond.Incoming, Nucleophile: cond.Nucleophile,
				Twists: [][]frontier.Twist{cond.Twists},
			}
			if len(a.Sites) > 0 {
				situation.Site = a.Sites[0].Atoms
			}
			b.outside(rules.Outside(situation), s.SMILES)
			b.caution(rules.Cautions(situation), s.SMILES)
		}
		b.borrow(j.Borrowed)
		b.report.Structure = append(b.report.Structure, s)
	}
}

// noSite says that no position is attacked in the ways asked for.
func noSite(towards []terms.Toward) string {
	var ways []string
	for _, t := range towards {
		article := "a "
		if t == terms.Electrophile {
			article = "an "
		}
		ways = append(ways, article+string(t))
	}
	return "no candidate site for attack by " + strings.Join(ways, " or ") + ": the events looked for are listed in docs/method.md"
}

func newAsides(aside []molecule.Aside) []Aside {
	var list []Aside
	for _, a := range aside {
		list = append(list, Aside{Name: a.Name, SMILES: a.SMILES})
	}
	return list
}

// NewStructure describes a judged molecule, without its rankings.
func NewStructure(input, name string, j *reactivity.Judgement) Structure {
	s := describe(input, name, j.Molecule, j.Pi)
	s.Warnings = append(s.Warnings, j.Warnings...)
	return s
}

func describe(input, name string, m *molecule.Molecule, pi *frontier.Pi) Structure {
	s := Structure{Input: input, Name: name, SMILES: m.SMILES(), Formula: m.Formula()}
	s.Numbers, s.Points = written(m)
	electrons := 0.0
	for k, system := range pi.Systems {
		if pi.Local[k] {
			continue
		}
		for _, c := range system {
			centre := pi.Centres[c]
			if centre.Alkyl {
				s.Hyper = append(s.Hyper, m.Atoms[centre.Atom].Number)
				continue
			}
			s.PiAtoms++
			electrons += centre.Electrons
		}
	}
	s.PiElectrons = Num(electrons)
	s.Warnings = append(s.Warnings, pi.Warnings...)
	return s
}

// NewAttacks makes the ranking tables of a judgement. in may be nil; with it, each
// site gets its product.
func NewAttacks(j *reactivity.Judgement, in *reactivity.Incoming, towards []terms.Toward) []Attack {
	namer := place.NewNamer(j.Molecule)
	wanted := map[terms.Toward]bool{}
	for _, t := range towards {
		wanted[t] = true
	}
	var list []Attack
	for _, a := range j.Attacks {
		if !wanted[a.Event.Toward()] {
			continue
		}
		x := Attack{
			Toward: string(a.Event.Toward()), Event: string(a.Event), Call: string(a.Call),
			ChanceAbsent: a.ChanceAbsent, Disagree: a.Disagree, Species: a.Species, Notes: a.Notes,
		}
		for _, s := range a.Sites {
			if s.Chance != nil {
				x.ChanceMeaning = ChanceMeaning
			}
			x.Site = append(x.Site, newSite(j.Molecule, namer, a.Event, s, in))
		}
		for _, s := range a.Ipso {
			x.Ipso = append(x.Ipso, newSite(j.Molecule, namer, a.Event, s, nil))
		}
		list = append(list, x)
	}
	return list
}

func newSite(m *molecule.Molecule, namer *place.Namer, e terms.Event, s reactivity.Site, in *reactivity.Incoming) Site {
	x := Site{
		Rank: s.Rank, Atoms: Numbers(m, s.Atoms), Place: namer.Site(s.Atoms),
		Chance: Chance(s.Chance), Limits: Limits(s.Limits), Because: s.Because, Leaving: s.Leaving,
		Index: newIndex(s.Index),
	}
	if in != nil && len(s.Atoms) > 0 {
		if p, err := reactivity.Product(m, e, s.Atoms[0], in); err == nil {
			x.Product = p.SMILES()
		}
	}
	return x
}

// Numbers are the input numbers of atoms, in the order given.
func Numbers(m *molecule.Molecule, atoms []int) []int {
	list := make([]int, len(atoms))
	for i, a := range atoms {
		list[i] = m.Atoms[a].Number
	}
	return list
}

func newIndex(values map[string]reactivity.Value) *Index {
	if len(values) == 0 {
		return nil
	}
	x := &Index{}
	for _, f := range []struct {
		name         string
		value        **float64
		limits       **[2]float64
		absent, note *string
	}{
		{"localization", &x.Localization, &x.LocalizationLimits, &x.LocalizationAbsent, nil},
		{"frontier_density", &x.FrontierDensity, nil, &x.FrontierDensityAbsent, nil},
		{"smoothed_density", &x.SmoothedDensity, &x.SmoothedDensityLimits, &x.SmoothedDensityAbsent, nil},
		{"superdelocalizability", &x.Superdelocalizability, &x.SuperdelocalizabilityLimits, &x.SuperdelocalizabilityAbsent, &x.SuperdelocalizabilityNote},
		{"charge", &x.Charge, &x.ChargeLimits, &x.ChargeAbsent, nil},
		{"free_valence", &x.FreeValence, nil, &x.FreeValenceAbsent, nil},
		{"self_polarizability", &x.SelfPolarizability, nil, &x.SelfPolarizabilityAbsent, nil},
		{"reactivity_number", &x.ReactivityNumber, nil, &x.ReactivityNumberAbsent, nil},
	} {
		v, ok := values[f.name]
		if !ok {
			continue
		}
		*f.absent = v.Absent
		if f.note != nil {
			*f.note = v.Note
		}
		if v.Absent != "" {
			continue
		}
		*f.value = Num(v.X)
		if f.limits != nil {
			*f.limits = Limits(v.Limits)
		}
	}
	return x
}
