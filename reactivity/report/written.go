package report

import "lobecast/frontier/molecule"

// written gives, for the atoms of m in the order in which its canonical SMILES string
// names them, their numbers in the input and, where m came with coordinates, their
// places. With it a reader of the report (the page, for one) finds in the SMILES the
// atoms that the report speaks of.
func written(m *molecule.Molecule) (numbers []int, points [][2]float64) {
	same := make([]int, len(m.Atoms))
	for i := range same {
		same[i] = i
	}
	mapped := m.Renumber(same) // a copy, so that the maps of m stay
	for i := range mapped.Atoms {
		mapped.Atoms[i].Map = i + 1
	}
	back, err := molecule.ParseSMILES(mapped.MappedSMILES(), molecule.AllowWildcard)
	if err != nil || len(back.Atoms) != len(m.Atoms) {
		return nil, nil
	}
	for i := range back.Atoms {
		k := back.Atoms[i].Map - 1
		numbers = append(numbers, m.Atoms[k].Number)
		if len(m.Points) == len(m.Atoms) {
			points = append(points, [2]float64{Round(m.Points[k].X), Round(m.Points[k].Y)})
		}
	}
	return numbers, points
}
