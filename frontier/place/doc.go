// Package place says where an atom is in words a chemist reads: the locant of a ring
// system ("C-3 of the indole"), the relation to the substituents of a benzene ring
// ("ortho to OMe, meta to NO2"), the trade's words along a chain ("β-carbon of the
// enone").
//
// Ring systems are numbered by the IUPAC recommendations on fused ring nomenclature
// (Moss, Pure Appl. Chem. 1998, 70, 143) with the retained exceptions (anthracene,
// phenanthrene, acridine, carbazole, xanthene, purine; rule P-25.2 of the 2013
// recommendations). Where a ring system may be numbered in several ways, the one that
// gives the substituents the lowest locants is taken.
package place
