package reactivity

import (
	"fmt"

	"lobecast/frontier/molecule"
)

// maxPairingWork bounds the pairings of two molecules: orientations times the square of
// the number of atoms, which is what telling equivalent ones apart costs. Two molecules of
// 60 atoms may have 2000 pairings; a polyene of 500 double bonds is refused.
const maxPairingWork = 30_000_000

// tooManyPairings refuses molecules whose pairings are too many to compare.
func tooManyPairings(a, b *molecule.Molecule, list []Combination) error {
	atoms := len(a.Atoms)
	if b != nil {
		atoms += len(b.Atoms)
	}
	pairings := 0
	for k := range list {
		pairings += len(list[k].Orientations)
	}
	if pairings*atoms*atoms <= maxPairingWork {
		return nil
	}
	return &molecule.Error{
		Text:   a.Source,
		Reason: fmt.Sprintf("these molecules of %d atoms can join in %d ways, too many to compare", atoms, pairings),
		Remedy: "give a smaller model of the reacting part",
	}
}
