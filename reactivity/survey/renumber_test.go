package survey

import (
	"fmt"
	"math/rand/v2"
	"strings"
	"testing"

	"lobecast/frontier/molecule"
)

// renumbered writes a molecule from a random atom in a random order, in brackets and
// Kekulé form: the same molecule, another text. Configurations are left out.
func renumbered(m *molecule.Molecule, rng *rand.Rand) string {
	var b strings.Builder
	seen := make([]bool, len(m.Atoms))
	used := make([]bool, len(m.Bonds))
	closures := make([][]string, len(m.Atoms))
	next := 1
	order := func(i int) []molecule.Half {
		h := append([]molecule.Half(nil), m.Neighbours(i)...)
		rng.Shuffle(len(h), func(x, y int) { h[x], h[y] = h[y], h[x] })
		return h
	}
	sign := [...]string{"", "", "=", "#", "$"}
	// A first walk finds the ring closures, a second one writes.
	children := make([][]molecule.Half, len(m.Atoms))
	var walk func(i int)
	walk = func(i int) {
		seen[i] = true
		for _, h := range order(i) {
			if used[h.Bond] {
				continue
			}
			used[h.Bond] = true
			if seen[h.Atom] {
				label := fmt.Sprintf("%s%%(%d)", sign[m.Bonds[h.Bond].Order], next)
				if next < 100 {
					label = fmt.Sprintf("%s%%%02d", sign[m.Bonds[h.Bond].Order], next)
				}
				next++
				closures[i] = append(closures[i], label)
				closures[h.Atom] = append(closures[h.Atom], label)
				continue
			}
			children[i] = append(children[i], h)
			walk(h.Atom)
		}
	}
	var write func(i int)
	write = func(i int) {
		a := m.Atoms[i]
		b.WriteByte('[')
		if a.Isotope > 0 {
			fmt.Fprint(&b, a.Isotope)
		}
		b.WriteString(molecule.Symbol(a.Element))
		if a.Hydrogens > 0 {
			fmt.Fprintf(&b, "H%d", a.Hydrogens)
		}
		if a.Charge != 0 {
			fmt.Fprintf(&b, "%+d", a.Charge)
		}
		b.WriteByte(']')
		for _, c := range closures[i] {
			b.WriteString(c)
		}
		for k, h := range children[i] {
			if k+1 < len(children[i]) {
				b.WriteByte('(')
			}
			b.WriteString(sign[m.Bonds[h.Bond].Order])
			write(h.Atom)
			if k+1 < len(children[i]) {
				b.WriteByte(')')
			}
		}
	}
	first := true
	for _, part := range m.Components() {
		start := part[rng.IntN(len(part))]
		walk(start)
		if !first {
			b.WriteByte('.')
		}
		first = false
		write(start)
	}
	return b.String()
}

// renumberedReaction writes a reaction with each molecule renumbered and the molecules
// of each part shuffled.
func renumberedReaction(line string, rng *rand.Rand) (string, error) {
	rxn, err := molecule.ParseReaction(line)
	if err != nil {
		return "", err
	}
	var parts []string
	for _, list := range [][]*molecule.Molecule{rxn.Reactants, rxn.Agents, rxn.Products} {
		var texts []string
		for _, m := range list {
			texts = append(texts, renumbered(m, rng))
		}
		rng.Shuffle(len(texts), func(x, y int) { texts[x], texts[y] = texts[y], texts[x] })
		parts = append(parts, strings.Join(texts, "."))
	}
	return strings.Join(parts, ">") + " " + rxn.Name, nil
}

// A renumbered reaction gets the same judgement: rank, chance, limits, place.
func TestRenumberingChangesNoJudgement(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 4))
	var plain, shuffled []string
	for i, line := range strings.Split(strings.TrimSpace(outcomeReactions(t)), "\n") {
		if i%17 != 0 {
			continue
		}
		other, err := renumberedReaction(line, rng)
		if err != nil {
			t.Fatal(err)
		}
		plain, shuffled = append(plain, line), append(shuffled, other)
	}
	where := func(out string) []string {
		var list []string
		for _, l := range strings.Split(out, "\n") {
			list = append(list, l)
		}
		return list
	}
	a, _ := run(t, strings.Join(plain, "\n"), Options{CSV: true})
	b, _ := run(t, strings.Join(shuffled, "\n"), Options{CSV: true})
	la, lb := where(a), where(b)
	differ := 0
	for i := 1; i < len(la) && i < len(lb); i++ {
		if x, y := judgementOf(la[i]), judgementOf(lb[i]); x != y {
			differ++
			t.Logf("%s\n%s", la[i], lb[i])
		}
	}
	if differ > 0 {
		t.Errorf("%d of %d judgements change with the numbering", differ, len(plain))
	}
}

// judgementOf is a CSV record without its input and its atom numbers.
func judgementOf(line string) string {
	fields := strings.Split(line, ",")
	if len(fields) < 14 {
		return line
	}
	return strings.Join(append(append([]string{}, fields[1:3]...), fields[4:9]...), ",")
}
