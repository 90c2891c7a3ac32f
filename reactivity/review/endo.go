package review

import (
	"lobecast/frontier/molecule"
	"lobecast/reactivity"
)

// drawnConfiguration says which diastereomer of an adduct the product shows, endo or exo,
// and what secondary overlap expects; empty where the product leaves it open or there is
// none to tell.
func drawnConfiguration(ad *reactivity.Adduct, product *molecule.Molecule) string {
	if product == nil || ad.Secondary.Overlap == 0 {
		return ""
	}
	drawn, mirror := product.SMILES(), product.Mirrored().SMILES()
	which := ""
	for _, p := range ad.Products {
		if p.SMILES == drawn || p.Racemic && p.SMILES == mirror {
			which = p.Configuration
		}
	}
	favoured := "endo"
	if ad.Secondary.Overlap < 0 {
		favoured = "exo"
	}
	switch which {
	case favoured:
		return "drawn is the " + which + " adduct, which secondary overlap favours"
	case "endo", "exo":
		return "drawn is the " + which + " adduct, and secondary overlap favours " + favoured + ": it is expected where the addition is reversible, as with furans, or where size decides"
	}
	return ""
}
