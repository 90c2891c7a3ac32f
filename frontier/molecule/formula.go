package molecule

import (
	"sort"
	"strconv"
	"strings"
)

// Formula is the molecular formula of all components together, in the order of Hill
// (J. Am. Chem. Soc. 22, 478 (1900)): carbon, hydrogen, then the other elements by
// alphabet, or all by alphabet without carbon. The net charge stands at the end as
// +, -, 2+ and so on. Isotopes are counted with their element; wildcards come last.
func (m *Molecule) Formula() string {
	var counts [len(symbols)]int
	charge := 0
	for i := range m.Atoms {
		a := &m.Atoms[i]
		counts[a.Element]++
		counts[1] += a.Hydrogens
		charge += a.Charge
	}
	var b strings.Builder
	write := func(z int) {
		if counts[z] == 0 {
			return
		}
		b.WriteString(symbols[z])
		if counts[z] > 1 {
			b.WriteString(strconv.Itoa(counts[z]))
		}
		counts[z] = 0
	}
	if counts[6] > 0 {
		write(6)
		write(1)
	}
	var rest []int
	for z := 1; z < len(counts); z++ {
		if counts[z] > 0 {
			rest = append(rest, z)
		}
	}
	sort.Slice(rest, func(i, j int) bool { return symbols[rest[i]] < symbols[rest[j]] })
	for _, z := range rest {
		write(z)
	}
	write(0)
	switch {
	case charge == 1:
		b.WriteString("+")
	case charge == -1:
		b.WriteString("-")
	case charge > 1:
		b.WriteString(strconv.Itoa(charge) + "+")
	case charge < -1:
		b.WriteString(strconv.Itoa(-charge) + "-")
	}
	return b.String()
}
