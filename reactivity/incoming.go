package reactivity

import (
	"errors"
	"fmt"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Incoming is a group that binds to a site: what an electrophile, a nucleophile or a
// radical leaves there.
type Incoming struct {
	// Class is the word for the electrophile, as in [Conditions]: "nitration", …; empty
	// where none fits.
	Class string
	// Nucleophile is the symbol of the atom that binds.
	Nucleophile string
	// Group is the group with its point of attachment, the wildcard atom Open.
	Group *molecule.Molecule
	Open  int // index of the wildcard in Group
	Binds int // index of the atom that binds
}

// ParseIncoming reads a group from a SMILES with exactly one *, singly bonded, where
// the group binds: "*Br", "*[N+](=O)[O-]", "*C(C)=O".
func ParseIncoming(smiles string) (*Incoming, error) {
	m, err := molecule.ParseSMILES(smiles, molecule.AllowWildcard)
	if err != nil {
		return nil, err
	}
	return NewIncoming(m)
}

// NewIncoming makes an incoming group of a molecule with one wildcard atom.
func NewIncoming(m *molecule.Molecule) (*Incoming, error) {
	open := -1
	for i, a := range m.Atoms {
		if a.Element != 0 {
			continue
		}
		if open >= 0 {
			return nil, errors.New("the incoming group has more than one *; write one where it binds, for instance *Br")
		}
		open = i
	}
	if open < 0 {
		return nil, errors.New("the incoming group has no * to say where it binds; write for instance *Br or *C(C)=O")
	}
	if len(m.Components()) != 1 {
		return nil, errors.New("the incoming group must be one connected group; write for instance *[N+](=O)[O-]")
	}
	if m.Degree(open) != 1 || m.Bonds[m.Neighbours(open)[0].Bond].Order != 1 {
		return nil, errors.New("the * must stand at the end of one single bond, for instance *C(C)=O")
	}
	in := &Incoming{Group: m, Open: open, Binds: m.Neighbours(open)[0].Atom}
	in.Nucleophile = molecule.Symbol(m.Atoms[in.Binds].Element)
	in.Class = attackerClass(m, open, in.Binds)
	return in, nil
}

// Towards lists the kinds of attack that bring the group, in the order of [terms.Towards]:
// a nitro, acyl, sulfo or diazenyl group comes as an electrophile, an amine or an alcohol
// as a nucleophile (common practice (no source)); halogens, carbon and sulfur may come any
// way.
func (x *Incoming) Towards() []terms.Toward {
	switch x.Class {
	case "nitration", "nitrosation", "azo coupling", "acylation", "formylation", "aminomethylation", "sulfonation", "chlorosulfonation":
		return []terms.Toward{terms.Electrophile}
	case "":
		if x.Nucleophile == "N" || x.Nucleophile == "O" {
			return []terms.Toward{terms.Nucleophile}
		}
	}
	return terms.Towards
}

// attackerClass names the electrophilic substitution that leaves a group: the words
// of the trade, as the outcome files use them.
func attackerClass(m *molecule.Molecule, open, binds int) string {
	a := m.Atoms[binds]
	oxo, sulfonylChloride, hydroxyl, nitrogen := 0, false, false, -1
	other := 0
	for _, h := range m.Neighbours(binds) {
		if h.Atom == open {
			continue
		}
		b, n := m.Bonds[h.Bond], m.Atoms[h.Atom]
		switch {
		case n.Element == 8 && (b.Order == 2 || n.Charge < 0):
			oxo++
		case n.Element == 17:
			sulfonylChloride = true
		case n.Element == 8:
			hydroxyl = true
		case n.Element == 7 && b.Order >= 2:
			nitrogen = h.Atom
		default:
			other++
		}
	}
	switch a.Element {
	case 9:
		return "fluorination"
	case 17:
		return "chlorination"
	case 35:
		return "bromination"
	case 53:
		return "iodination"
	case 7:
		if oxo == 2 {
			return "nitration"
		}
		if nitrogen >= 0 {
			return "azo coupling"
		}
		if oxo == 1 {
			return "nitrosation"
		}
	case 6:
		if oxo == 1 && m.Bonds[bondTo(m, binds, 8)].Order == 2 {
			if a.Hydrogens == 1 && other == 0 {
				return "formylation"
			}
			return "acylation"
		}
		if a.Hydrogens > 0 && oxo == 0 {
			for _, h := range m.Neighbours(binds) {
				if m.Atoms[h.Atom].Element == 7 && m.Bonds[h.Bond].Order == 1 && !a.Aromatic {
					return "aminomethylation"
				}
			}
			return "alkylation"
		}
		if !a.Aromatic && oxo == 0 && m.Valence(binds) == 4 && nitrogen < 0 {
			return "alkylation"
		}
	case 16:
		switch {
		case oxo == 2 && sulfonylChloride:
			return "chlorosulfonation"
		case oxo == 2 && (hydroxyl || other == 0):
			return "sulfonation"
		case oxo == 3:
			return "sulfonation"
		case oxo == 2:
			return "sulfonylation"
		}
		if bondTo(m, binds, 6) >= 0 {
			for _, h := range m.Neighbours(binds) {
				if m.Atoms[h.Atom].Element == 6 {
					for _, g := range m.Neighbours(h.Atom) {
						if m.Atoms[g.Atom].Element == 7 && m.Bonds[g.Bond].Order == 3 {
							return "thiocyanation"
						}
					}
				}
			}
			return "thiolation"
		}
	}
	return ""
}

func bondTo(m *molecule.Molecule, i, element int) int {
	for _, h := range m.Neighbours(i) {
		if m.Atoms[h.Atom].Element == element {
			return h.Bond
		}
	}
	return -1
}

// String shows the group as it is written.
func (in *Incoming) String() string {
	if in.Group.Source != "" {
		return in.Group.Source
	}
	return fmt.Sprintf("*%s", in.Nucleophile)
}
