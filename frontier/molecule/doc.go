// Package molecule holds the molecular graph, its readers and its writers: SMILES
// (OpenSMILES), reaction SMILES, V2000 and V3000 molfiles and SD files.
//
// It knows about atoms, bonds, valence, rings, symmetry and configuration, and
// nothing about orbitals. Everything else in the project takes a *Molecule.
package molecule
