package reactivity

import (
	"encoding/csv"
	"errors"
	"fmt"
	"hash/fnv"
	"io"
	"os"
	"path/filepath"
	"strconv"
	"strings"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// Names of the outcome files in the folder a refit is given.
const (
	electrophilicFile = "electrophilic_substitution.csv"
	nucleophilicFile  = "nucleophilic_substitution.csv"
	dielsAlderFile    = "diels_alder.csv"
)

// siteOutcome is one published substitution: which site of a substrate was hit.
type siteOutcome struct {
	ID         string
	SMILES     string
	Site       []int // equivalent atoms, indices in the SMILES
	Incoming   string
	Acidic     bool  // strong acid among the reagents
	Halogens   []int // nucleophilic: the carbons that carry a halogen
	SameChoice bool  // nucleophilic: the choice is between like halogens
}

// pairOutcome is one published Diels–Alder reaction with a choice of orientation.
type pairOutcome struct {
	ID    string
	A, B  string
	Bonds [2][2]int // [atom of A, atom of B], as observed
}

// table reads a CSV file with a header and hands each row over by column name.
func table(path string, need []string, row func(get func(string) string) error) error {
	f, err := os.Open(path)
	if err != nil {
		return err
	}
	defer f.Close()
	r := csv.NewReader(f)
	header, err := r.Read()
	if err != nil {
		return fmt.Errorf("%s: %w", path, err)
	}
	column := map[string]int{}
	for i, name := range header {
		column[strings.TrimPrefix(name, "\ufeff")] = i
	}
	for _, n := range need {
		if _, ok := column[n]; !ok {
			return fmt.Errorf("%s: there is no column %q in the header", path, n)
		}
	}
	for {
		rec, err := r.Read()
		if errors.Is(err, io.EOF) {
			return nil
		}
		if err != nil {
			return fmt.Errorf("%s: %w", path, err)
		}
		line, _ := r.FieldPos(0)
		if err := row(func(name string) string { return rec[column[name]] }); err != nil {
			return fmt.Errorf("%s: line %d: %w", path, line, err)
		}
	}
}

func integers(text, separator string) ([]int, error) {
	var list []int
	for _, p := range strings.Split(text, separator) {
		if p = strings.TrimSpace(p); p == "" {
			continue
		}
		n, err := strconv.Atoi(p)
		if err != nil {
			return nil, fmt.Errorf("%q is not a whole number", p)
		}
		list = append(list, n)
	}
	return list, nil
}

// readElectrophilic reads the outcomes of electrophilic substitution in a folder.
func readElectrophilic(folder string) ([]siteOutcome, error) {
	var list []siteOutcome
	need := []string{"id", "substrate_smiles", "site_atom_index", "electrophile_class", "equivalent_site_indices", "strong_acid"}
	err := table(filepath.Join(folder, electrophilicFile), need, func(get func(string) string) error {
		site, err := integers(get("equivalent_site_indices"), " ")
		if err != nil {
			return err
		}
		incoming := get("electrophile_class")
		if i := strings.IndexByte(incoming, '/'); i > 0 {
			incoming = incoming[:i]
		}
		list = append(list, siteOutcome{
			ID: get("id"), SMILES: get("substrate_smiles"), Site: site, Incoming: incoming,
			Acidic: get("strong_acid") == "yes",
		})
		return nil
	})
	return list, err
}

// readNucleophilic reads the outcomes of nucleophilic aromatic substitution.
func readNucleophilic(folder string) ([]siteOutcome, error) {
	var list []siteOutcome
	need := []string{"id", "substrate_smiles", "equivalent_site_indices", "candidate_sites", "nucleophilic_atom", "same_halogen_choice"}
	err := table(filepath.Join(folder, nucleophilicFile), need, func(get func(string) string) error {
		site, err := integers(get("equivalent_site_indices"), " ")
		if err != nil {
			return err
		}
		var halogens []int
		for _, c := range strings.Fields(get("candidate_sites")) {
			at, _, _ := strings.Cut(c, ":")
			n, err := strconv.Atoi(at)
			if err != nil {
				return fmt.Errorf("candidate %q: %w", c, err)
			}
			halogens = append(halogens, n)
		}
		list = append(list, siteOutcome{
			ID: get("id"), SMILES: get("substrate_smiles"), Site: site, Incoming: get("nucleophilic_atom"),
			Halogens: halogens, SameChoice: get("same_halogen_choice") == "yes",
		})
		return nil
	})
	return list, err
}

// readPairs reads Diels–Alder outcomes. Where several pairs of bonds give the product,
// the first is taken.
func readPairs(folder string) ([]pairOutcome, error) {
	var list []pairOutcome
	need := []string{"id", "component1_smiles", "component2_smiles", "bond_forming_pairs"}
	err := table(filepath.Join(folder, dielsAlderFile), need, func(get func(string) string) error {
		first, _, _ := strings.Cut(get("bond_forming_pairs"), ";")
		p := pairOutcome{ID: get("id"), A: get("component1_smiles"), B: get("component2_smiles")}
		bonds := strings.Fields(first)
		if len(bonds) != 2 {
			return fmt.Errorf("bond_forming_pairs %q: expected two bonds", first)
		}
		for k, b := range bonds {
			ends, err := integers(b, "-")
			if err != nil || len(ends) != 2 {
				return fmt.Errorf("bond %q: expected two atoms", b)
			}
			p.Bonds[k] = [2]int{ends[0], ends[1]}
		}
		list = append(list, p)
		return nil
	})
	return list, err
}

// hash64 is the FNV-1a hash of a text.
func hash64(text string) uint64 {
	h := fnv.New64a()
	h.Write([]byte(text))
	return h.Sum64()
}

// folds is the number of parts of a cross-validation.
const folds = 5

// foldOf deals a key to a fold, evenly and independently of the order of rows.
func foldOf(key string) int {
	x := hash64(key)
	x ^= x >> 33 // FNV mixes its low bits poorly
	x *= 0xff51afd7ed558ccd
	x ^= x >> 33
	return int(x % folds)
}

// environmentKey names the ring system of the given atoms (or, outside rings, the atoms
// and their neighbours) with the substituents on it, the sites marked: outcomes with
// equal keys count as one group. It is a hash over refined atom labels, so that it
// does not depend on the numbering.
func environmentKey(m *molecule.Molecule, sites []int) uint64 {
	in := make([]bool, len(m.Atoms))
	marked := make([]bool, len(m.Atoms))
	core := make([]bool, len(m.Atoms))
	for _, s := range sites {
		marked[s], core[s] = true, true
	}
	for _, system := range m.RingSystems() {
		hit := false
		for _, i := range system {
			hit = hit || marked[i]
		}
		if hit {
			for _, i := range system {
				core[i] = true
			}
		}
	}
	for i, c := range core {
		if !c {
			continue
		}
		in[i] = true
		for _, h := range m.Neighbours(i) {
			in[h.Atom] = true
		}
	}
	label := make([]uint64, len(m.Atoms))
	next := make([]uint64, len(m.Atoms))
	for i := range m.Atoms {
		a := &m.Atoms[i]
		label[i] = hash64(fmt.Sprint(a.Element, a.Charge, a.Aromatic, core[i] && a.Hydrogens > 0, marked[i], core[i]))
	}
	mix := func(x uint64) uint64 {
		x ^= x >> 33
		x *= 0xff51afd7ed558ccd
		x ^= x >> 33
		return x
	}
	for range 8 {
		for i := range m.Atoms {
			if !in[i] {
				continue
			}
			sum := uint64(0)
			for _, h := range m.Neighbours(i) {
				if !in[h.Atom] || !core[i] && !core[h.Atom] {
					continue
				}
				order := uint64(m.Bonds[h.Bond].Order)
				if m.Bonds[h.Bond].Aromatic {
					order = 5
				}
				sum += mix(label[h.Atom] + order*0x9e3779b97f4a7c15)
			}
			next[i] = mix(label[i]*3 + sum)
		}
		label, next = next, label
	}
	total := uint64(0)
	for i, x := range label {
		if in[i] {
			total += mix(x)
		}
	}
	return total
}

// eventTitle is how the record names the event of an outcome file.
func eventTitle(e terms.Event) string {
	if e == terms.CycloadditionOrientation {
		return "Diels–Alder orientation"
	}
	return string(e)
}
