package place

import "lobecast/frontier/molecule"

// Substituent is the trade's short name of the group that atom g begins on atom at:
// "OMe", "NO2", "aryl".
func Substituent(m *molecule.Molecule, at, g int) string { return group(m, at, g) }
