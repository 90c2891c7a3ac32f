// Package layout draws molecules on the plane: it gives every atom a position and
// every stated stereocentre its wedges, so that a chemist recognises the structure.
//
// Rings are regular polygons where the ring system allows it, chains run in zigzag,
// double bonds have their stated geometry, and substituents point outward. What
// still collides is turned about bonds, then bent, then relaxed. The result depends
// on the constitution and configuration alone, not on the order in which atoms were
// written, and can be laid over the drawing of a related molecule ([Like]), so that
// substrate, product and orbitals of one step line up.
//
// Lengths are in bonds: the usual distance of bonded atoms is 1. The y axis points up.
package layout
