package review

import (
	"fmt"

	"lobecast/frontier/molecule"
	"lobecast/frontier/place"
	"lobecast/frontier/terms"
	"lobecast/reactivity"
)

// whatWouldMoveIt recomputes the step in the other medium, and with each kind of free
// NH2 and OH on a π system acylated, and says where that changes the call.
func whatWouldMoveIt(m *molecule.Molecule, now *reactivity.Attack, cond reactivity.Conditions, namer *place.Namer) []string {
	if len(now.Sites) == 0 {
		return nil
	}
	cond.NoLimits = now.Sites[0].Limits == nil
	var list []string
	try := func(what string, changed *molecule.Molecule, c reactivity.Conditions) {
		j, err := reactivity.Judge(changed, c, []terms.Toward{now.Event.Toward()})
		if err != nil {
			return
		}
		for k := range j.Attacks {
			a := &j.Attacks[k]
			if a.Event != now.Event || len(a.Sites) == 0 {
				continue
			}
			moved := findSite(now.Sites[:1], a.Sites[0].Atoms) != 0
			if !moved && a.Call == now.Call {
				continue
			}
			where := namer.Site(a.Sites[0].Atoms)
			chance := ""
			if p := a.Sites[0].Chance; p != nil {
				chance = fmt.Sprintf(", chance %.2f", *p)
			}
			if moved {
				list = append(list, fmt.Sprintf("%s: %s comes first instead of %s (%s%s)", what, where, namer.Site(now.Sites[0].Atoms), a.Call, chance))
			} else {
				list = append(list, fmt.Sprintf("%s: %s stays first, and the call becomes %s (now %s)%s", what, where, a.Call, now.Call, chance))
			}
		}
	}
	other := cond
	switch cond.Medium {
	case terms.Acidic:
		other.Medium = terms.Neutral
		try("in neutral medium", m, other)
	default:
		other.Medium = terms.Acidic
		try("in acidic medium", m, other)
	}
	for _, group := range freeGroups(m) {
		changed, err := acylate(m, group.atoms)
		if err != nil {
			continue
		}
		try("with the "+group.name+" acetylated", changed, cond)
	}
	return list
}

// freeGroup is a kind of NH2, NHR or OH on an unsaturated carbon.
type freeGroup struct {
	name  string
	atoms []int
}

func freeGroups(m *molecule.Molecule) []freeGroup {
	amino, hydroxyl := freeGroup{name: "NH2"}, freeGroup{name: "OH"}
	for i, a := range m.Atoms {
		if a.Charge != 0 || a.Aromatic || m.Degree(i) != 1 {
			continue
		}
		n := m.Neighbours(i)[0]
		if m.Bonds[n.Bond].Order != 1 || !m.Atoms[n.Atom].Aromatic || m.Atoms[n.Atom].Element != 6 {
			continue
		}
		switch {
		case a.Element == 7 && a.Hydrogens == 2:
			amino.atoms = append(amino.atoms, i)
		case a.Element == 8 && a.Hydrogens == 1:
			hydroxyl.atoms = append(hydroxyl.atoms, i)
		}
	}
	var list []freeGroup
	if len(amino.atoms) > 0 {
		list = append(list, amino)
	}
	if len(hydroxyl.atoms) > 0 {
		list = append(list, hydroxyl)
	}
	return list
}

// acylate puts an acetyl group on each of the atoms; the other atoms keep their
// indices.
func acylate(m *molecule.Molecule, atoms []int) (*molecule.Molecule, error) {
	e := m.Edit()
	for _, i := range atoms {
		e.SetHydrogens(i, m.Atoms[i].Hydrogens-1)
		c := e.AddAtom(molecule.Atom{Element: 6, Offset: -1})
		o := e.AddAtom(molecule.Atom{Element: 8, Offset: -1})
		me := e.AddAtom(molecule.Atom{Element: 6, Hydrogens: 3, Offset: -1})
		e.AddBond(i, c, 1)
		e.AddBond(c, o, 2)
		e.AddBond(c, me, 1)
	}
	return e.Done()
}
