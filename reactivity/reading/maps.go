package reading

import (
	"fmt"

	"lobecast/frontier/molecule"
)

// mapped compares the atom map of the product with the site that the structures give.
func (r *reader) mapped(p *molecule.Molecule, a int, m *molecule.Molecule, site int) {
	n := p.Atoms[a].Map
	if n == 0 {
		return
	}
	at := m.AtomByMap(n)
	if at < 0 {
		return
	}
	for _, s := range r.Sites {
		if s == at {
			return
		}
	}
	r.MapNote = fmt.Sprintf("the atom map is wrong: it puts the new bond on atom %d (map %d), the structures put it on atom %d; the structures are followed",
		m.Atoms[at].Number, n, m.Atoms[site].Number)
}

// compareMaps reports a map number that stands on different elements in the substrate
// and in the product.
func (r *reader) compareMaps() {
	if r.MapNote != "" {
		return
	}
	for _, a := range r.Product.Atoms {
		if a.Map == 0 {
			continue
		}
		for _, m := range append([]*molecule.Molecule{r.Substrate}, r.Others...) {
			if i := m.AtomByMap(a.Map); i >= 0 {
				if m.Atoms[i].Element != a.Element {
					r.MapNote = fmt.Sprintf("the atom map is wrong: map %d stands on %s in the reactants and on %s in the product; the structures are followed",
						a.Map, molecule.Symbol(m.Atoms[i].Element), molecule.Symbol(a.Element))
					return
				}
				break
			}
		}
	}
}
