package reactivity

import (
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
}

// RetroDielsAlder lists the ways in which six-rings with a double bond can fall into
// a diene and a partner: a–b=c–d breaks at a–p and d–q, and a=b–c=d and p=q appear. A
// partner bond p=q that is double becomes a triple bond; one in an aromatic ring, or a
// double bond b=c in one, is left alone. Ways that symmetry makes equal are listed
// once. An error says that no such ring exists.
func RetroDielsAlder(m *molecule.Molecule) ([]Retro, error) {
	var list []Retro
	seen := map[string]bool{}
	for _, ring := range m.Rings() {
		if len(ring) != 6 {
			continue
		}
		for k := range ring {
			at := func(n int) int { return ring[(k+n)%6] }
			b, c := at(0), at(1)
			bond := m.Bonds[m.BondBetween(b, c)]
			if bond.Order != 2 || bond.Aromatic {
				continue
			}
			d, q, p, a := at(2), at(3), at(4), at(5)
			if !singleBonds(m, [][2]int{{a, b}, {c, d}, {d, q}, {p, a}}) {
				continue
			}
			pq := m.Bonds[m.BondBetween(p, q)]
			if pq.Aromatic || pq.Order > 2 {
				continue
			}
			e := m.Edit()
			e.RemoveBond(a, p)
			e.RemoveBond(d, q)
			e.SetOrder(a, b, 2)
			e.SetOrder(b, c, 1)
			e.SetOrder(c, d, 2)
			e.SetOrder(p, q, pq.Order+1)
			whole, err := e.Done()
			if err != nil {
				continue // a valence that the pieces cannot have
			}
			smiles := whole.SMILES()
			if seen[smiles] {
				continue
			}
			seen[smiles] = true
			r := Retro{Bonds: [2][2]int{{a, p}, {d, q}}, Diene: [4]int{a, b, c, d}, Partner: [2]int{p, q}}
			pieces := whole.Split()
			for _, first := range [2]bool{true, false} {
				for n, atoms := range whole.Components() {
					if contains(atoms, a) == first {
						r.Molecules = append(r.Molecules, pieces[n])
						r.Components = append(r.Components, pieces[n].SMILES())
					}
				}
			}
			list = append(list, r)
		}
	}
	if len(list) == 0 {
		return nil, &molecule.Error{Text: m.Source, Reason: "no six-ring with a double bond that could fall into a diene and a partner",
			Remedy: "a retro-Diels–Alder reaction needs a cyclohexene or one of its heteroanalogues"}
	}
	return list, nil
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
