package reactivity

import "lobecast/frontier/molecule"

// LeavingSite is a group that can leave an unsaturated carbon.
type LeavingSite struct {
	Group []int // atoms of the leaving group, the bound one first
	Name  string
}

// LeavingSites lists the aromatic and vinylic carbons of m that carry a leaving group.
func LeavingSites(m *molecule.Molecule) []LeavingSite {
	var list []LeavingSite
	for i, a := range m.Atoms {
		if a.Element != 6 {
			continue
		}
		unsaturated := a.Aromatic
		for _, h := range m.Neighbours(i) {
			if m.Bonds[h.Bond].Order == 2 && m.Atoms[h.Atom].Element == 6 {
				unsaturated = true
			}
		}
		if !unsaturated {
			continue
		}
		if g := leavingAtom(m, i); g >= 0 {
			group := branch(m, i, g)
			name := molecule.Symbol(m.Atoms[g].Element)
			if len(group) > 1 {
				name = groupName(m, group)
			}
			list = append(list, LeavingSite{Group: group, Name: name})
		}
	}
	return list
}

// groupName is a key of the constitution of a leaving group of several atoms.
func groupName(m *molecule.Molecule, group []int) string {
	keep := map[int]bool{}
	for _, g := range group {
		keep[g] = true
	}
	e := m.Edit()
	e.SetHydrogens(group[0], m.Atoms[group[0]].Hydrogens+1)
	for i := len(m.Atoms) - 1; i >= 0; i-- {
		if !keep[i] {
			e.RemoveAtom(i)
		}
	}
	x, err := e.Done()
	if err != nil {
		return molecule.Symbol(m.Atoms[group[0]].Element)
	}
	return x.FlatSMILES()
}

// Attach puts a copy of the leaving group, taken from m, on atom a of the molecule
// being edited.
func (s *LeavingSite) Attach(e *molecule.Editor, m *molecule.Molecule, a int) {
	at := map[int]int{}
	for _, g := range s.Group {
		x := m.Atoms[g]
		x.Stereo, x.Map = molecule.Stereo{}, 0
		at[g] = e.AddAtom(x)
	}
	e.AddBond(a, at[s.Group[0]], 1)
	for _, b := range m.Bonds {
		i, ok1 := at[b.A]
		j, ok2 := at[b.B]
		if ok1 && ok2 {
			e.AddBond(i, j, b.Order)
		}
	}
}
