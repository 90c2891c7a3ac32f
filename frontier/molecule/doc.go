// Package molecule holds the molecular graph, its readers and its writers: SMILES
// (OpenSMILES), reaction SMILES, V2000 and V3000 molfiles and SD files.
//
// It knows about atoms, bonds, valence, rings, symmetry and configuration, and
// nothing about orbitals. Everything else in the project takes a *Molecule.
//
// # From text to graph
//
// A SMILES string is cut into tokens that keep their byte offsets (smileslex.go), joined
// to a raw graph (smilesparse.go), and given its chemistry (smiles.go): alternating double
// bonds for lower-case atoms, by a matching in the graph of the atoms that ask for one
// (kekule.go, matching.go); hydrogens up to the valence (valence.go); configurations
// (smilesstereo.go); plain [H] atoms folded into counts. Every reader and the [Editor] end
// in the same completion (finish.go): neighbour lists, valences and unpaired electrons,
// rings (ring.go, ringsearch.go), aromaticity (aromatic.go, where it is defined).
//
// # From graph to text
//
// [Molecule.SMILES] numbers each component canonically (partition.go, canonical.go,
// canonicalorder.go) and writes it (smileswrite.go, smileswritestereo.go). The numbering
// is exact: colour refinement, then a search over the ties that refinement leaves, with
// branches cut off by the automorphisms found; these give [Molecule.Classes] too. Work is
// bounded; a molecule so symmetrical that the bound is met, far beyond any that is drawn,
// is written correctly but perhaps not canonically.
//
// One molecule has one string whatever the order of its atoms, its Kekulé form, lower case
// or capitals, and explicit hydrogens. Not unified are forms that differ in charges or in
// the places of hydrogens: the two notations of a nitro group, ylide and double bond,
// tautomers. Configurations that say nothing are left out.
//
// # Departures from the OpenSMILES specification
//
//   - Neutral nitrogen takes no hydrogen beyond valence 3, and a halogen none beyond 1:
//     CN(C)(C)C is refused, with advice, where the specification would add a hydrogen.
//   - Valences are checked in brackets too. What is missing there to the next valence is
//     taken for unpaired electrons.
//   - A lone pair on a centre of three neighbours is its last ligand, wherever the centre
//     stands in the text.
//   - The configuration of a double bond in a ring of fewer than eight atoms, or of an
//     aromatic one, is not kept.
//   - In a ring of alternating double bonds without other substituents and with an odd
//     number of Z bonds, one bond is written without configuration: SMILES would need
//     explicit hydrogens there.
package molecule
