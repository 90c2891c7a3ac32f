package molecule

import (
	"math/rand"
	"slices"
	"testing"
)

// TestRingSets checks the sizes of the smallest set of smallest rings against the faces of
// well-known cages and ring systems (counts by Euler's formula, one face less than the
// polyhedron has).
func TestRingSets(t *testing.T) {
	for _, c := range []struct {
		name, smiles string
		sizes        []int
	}{
		{"none", "CC(C)C", nil},
		{"cubane", "C12C3C4C1C5C2C3C45", []int{4, 4, 4, 4, 4}},
		{"prismane", "C12C3C1C1C2C31", []int{3, 3, 4, 4}},
		{"tetrahedrane", "C12C3C1C23", []int{3, 3, 3}},
		{"adamantane", "C1C2CC3CC1CC(C2)C3", []int{6, 6, 6}},
		{"norbornane", "C1CC2CCC1C2", []int{5, 5}},
		{"bicyclo[2.2.2]octane", "C1CC2CCC1CC2", []int{6, 6}},
		{"spiro[4.5]decane", "C1CCCC12CCCCC2", []int{5, 6}},
		{"coronene", "c1cc2ccc3ccc4ccc5ccc6ccc1c7c2c3c4c5c67", []int{6, 6, 6, 6, 6, 6, 6}},
		{"[2.2]paracyclophane", "c1cc2ccc1CCc1ccc(cc1)CC2", []int{6, 6, 12}},
		{"a large ring with a bridge", "C1CCCCCCCCCCCCCC2CCCCCCCCCCCCCC12", []int{15, 16}},
		{"two bridged large rings", "C12CCCCCCCCCCCCC(CCCCCCCCCCCCC1)CCCCCCCCCCCCC2", []int{27, 27}},
	} {
		m := mustParse(t, c.smiles)
		var sizes []int
		for r, ring := range m.Rings() {
			sizes = append(sizes, len(ring))
			for k, a := range ring {
				b := m.BondBetween(a, ring[(k+1)%len(ring)])
				if b < 0 || b != m.rings.bonds[r][k] {
					t.Errorf("%s: ring %v is not closed at atom %d", c.name, ring, a)
				}
				if !m.InRing(a) || !m.BondInRing(b) || !slices.Contains(m.RingSizes(a), len(ring)) {
					t.Errorf("%s: atom %d does not know of ring %v", c.name, a, ring)
				}
			}
		}
		slices.Sort(sizes)
		if !slices.Equal(sizes, c.sizes) {
			t.Errorf("%s: rings of %v, want %v", c.name, sizes, c.sizes)
		}
		// The rings must be independent and the shortest whatever the numbering.
		q := m.Renumber(rand.New(rand.NewSource(1)).Perm(len(m.Atoms)))
		var again []int
		for _, ring := range q.Rings() {
			again = append(again, len(ring))
		}
		slices.Sort(again)
		if !slices.Equal(again, sizes) {
			t.Errorf("%s: rings of %v and, renumbered, of %v", c.name, sizes, again)
		}
	}
}

// TestRingBonds compares the ring bonds with removal of each bond in turn.
func TestRingBonds(t *testing.T) {
	for _, s := range []string{"C1CC1CC1CC1", "c1ccccc1-c1ccccc1", "C1CC2(C1)CC2", "CC(C)C", "C1CC2CCC1C2", "C1CC1.C.C2CCC2C", "C1CC1C(C1CC1)C1CC1"} {
		m := mustParse(t, s)
		for b := range m.Bonds {
			seen := make([]bool, len(m.Atoms))
			list := []int{m.Bonds[b].A}
			seen[m.Bonds[b].A] = true
			for k := 0; k < len(list); k++ {
				for _, h := range m.Neighbours(list[k]) {
					if h.Bond != b && !seen[h.Atom] {
						seen[h.Atom] = true
						list = append(list, h.Atom)
					}
				}
			}
			if want := seen[m.Bonds[b].B]; m.BondInRing(b) != want {
				t.Errorf("%s: bond %d in a ring: %v, want %v", s, b, !want, want)
			}
		}
	}
}
