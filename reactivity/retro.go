package reactivity

import (
	"slices"

	"lobecast/frontier/molecule"
)

// Retro is one way a cyclohexene, or a six-ring with a double bond and heteroatoms,
// falls back into a diene and a partner.
type Retro struct {
	// Bonds are the two σ bonds that break: [end of the diene, partner atom].
	Bonds [2][2]int
	// Diene and Partner are the paths of the two components, as atom indices of the
	// molecule that breaks up.
	Diene   [4]int
	Partner [2]int
	// Components are the canonical SMILES of what is left, the piece with the diene
	// first; one only where the ring was part of a larger one.
	Components []string
	Molecules  []*molecule.Molecule

	key string // SMILES of all components, to tell ways apart
}

// RetroDielsAlder lists the ways in which six-rings with a double bond can fall into
// a diene and a partner: a–b=c–d breaks at a–p and d–q, and a=b–c=d and p=q appear. A
// partner bond p=q that is double becomes a triple bond. A bond b=c of an aromatic ring
// takes part only where the diene that appears is aromatic itself (anthracene from its
// adducts). Ways that symmetry makes equal are listed
// once. An error says that no such ring exists.
func RetroDielsAlder(m *molecule.Molecule) ([]Retro, error) {
	var list []Retro
	seen := map[string]bool{}
	for bc := range m.Bonds {
		if m.Bonds[bc].Order != 2 && !m.Bonds[bc].Aromatic || !m.BondInRing(bc) {
			continue
		}
		b, c := m.Bonds[bc].A, m.Bonds[bc].B
		for _, ha := range m.Neighbours(b) {
			for _, hd := range m.Neighbours(c) {
				if ha.Atom == c || hd.Atom == b || ha.Atom == hd.Atom {
					continue
				}
				for _, hp := range m.Neighbours(ha.Atom) {
					for _, hq := range m.Neighbours(hd.Atom) {
						path := [6]int{ha.Atom, b, c, hd.Atom, hq.Atom, hp.Atom}
						if r, ok := retroAt(m, bc, path); ok && !seen[r.key] {
							seen[r.key] = true
							list = append(list, r)
						}
					}
				}
			}
		}
	}
	if len(list) == 0 {
		return nil, &molecule.Error{Text: m.Source, Reason: "no six-ring with a double bond that could fall into a diene and a partner",
			Remedy: "a retro-Diels–Alder reaction needs a cyclohexene or one of its heteroanalogues"}
	}
	return list, nil
}

// retroAt breaks the six-ring a–b=c–d–q–p, where it is one.
func retroAt(m *molecule.Molecule, bc int, ring [6]int) (r Retro, ok bool) {
	a, b, c, d, q, p := ring[0], ring[1], ring[2], ring[3], ring[4], ring[5]
	for k := range ring {
		for l := range k {
			if ring[k] == ring[l] {
				return r, false
			}
		}
	}
	pq := m.BondBetween(p, q)
	if pq < 0 || m.Bonds[pq].Aromatic || m.Bonds[pq].Order > 2 ||
		!singleBonds(m, [][2]int{{a, b}, {c, d}, {d, q}, {p, a}}) {
		return r, false
	}
	e := m.Edit()
	aromatic := m.Bonds[bc].Aromatic
	if aromatic {
		orders, found := kekuleWithout(m, []int{b, c})
		if !found {
			return r, false
		}
		bonds := make([]int, 0, len(orders))
		for k := range orders {
			bonds = append(bonds, k)
		}
		slices.Sort(bonds)
		for _, k := range bonds {
			e.SetOrder(m.Bonds[k].A, m.Bonds[k].B, orders[k])
		}
	}
	e.RemoveBond(a, p)
	e.RemoveBond(d, q)
	e.SetOrder(a, b, 2)
	e.SetOrder(b, c, 1)
	e.SetOrder(c, d, 2)
	e.SetOrder(p, q, m.Bonds[pq].Order+1)
	whole, err := e.Done()
	if err != nil {
		return r, false // a valence that the pieces cannot have
	}
	if aromatic && !(whole.Atoms[a].Aromatic && whole.Atoms[d].Aromatic) {
		return r, false // an aromatic ring is given up only where another takes its place
	}
	r = Retro{Bonds: [2][2]int{{a, p}, {d, q}}, Diene: [4]int{a, b, c, d}, Partner: [2]int{p, q}, key: whole.SMILES()}
	pieces := whole.Split()
	for _, first := range [2]bool{true, false} {
		for n, atoms := range whole.Components() {
			if slices.Contains(atoms, a) == first {
				r.Molecules = append(r.Molecules, pieces[n])
				r.Components = append(r.Components, pieces[n].SMILES())
			}
		}
	}
	return r, true
}

// singleBonds says whether all these pairs are joined by single bonds outside
// aromatic rings.
func singleBonds(m *molecule.Molecule, pairs [][2]int) bool {
	for _, p := range pairs {
		b := m.BondBetween(p[0], p[1])
		if b < 0 || m.Bonds[b].Order != 1 || m.Bonds[b].Aromatic {
			return false
		}
	}
	return true
}
