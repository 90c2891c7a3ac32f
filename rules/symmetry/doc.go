// Package symmetry judges pericyclic processes by the conservation of orbital
// symmetry.
//
// A verdict can be reached in two ways. The count applies the general rule of
// Woodward and Hoffmann (The Conservation of Orbital Symmetry, Angew. Chem. Int.
// Ed. Engl. 1969, 8, 781; book 1970) to the components of a process. The
// correlation, which needs a structure, builds Hückel-type matrices of reactant and
// product in one common basis of p and hybrid orbitals, follows the levels from one
// to the other and counts crossings of occupied with empty levels (Longuet-Higgins,
// Abrahamson, J. Am. Chem. Soc. 1965, 87, 2045; the sign of the overlaps round the
// ring after Zimmerman, J. Am. Chem. Soc. 1966, 88, 1564). It knows no component,
// no 4q + 2 and no 4r. Where the two disagree there is no verdict, and the
// [Process] says so.
//
// A symmetry verdict is about one concerted path. Allowed is not fast, and forbidden
// is not impossible: stepwise paths through diradicals, ions or excited triplets
// stay open.
package symmetry
