package main

import (
	"bytes"
	"compress/gzip"
	"context"
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"regexp"
	"runtime"
	"runtime/metrics"
	"strings"
	"sync/atomic"
	"syscall"
	"testing"
	"time"
)

// What a hostile input may cost. The aims are those of docs/fuzzing.md; a test shares its
// machine, so it asserts looser bounds and logs what lies above the aims.
const (
	hostileAim, hostileBound       = 200 * time.Millisecond, 4 * time.Second
	hostileMemory, hostileMemories = 64 << 20, 192 << 20
)

var writeHostile = flag.Bool("list-hostile", false, "log time and memory of every hostile input")

// hostile is one call of the program with input made to stall it, to fill its memory or
// to break it. In the arguments @NAME stands for the file of that name.
type hostile struct {
	name  string
	args  []string
	stdin string
	files map[string]string
	code  int    // the exit status
	says  string // must be part of standard output or standard error
}

func rep(s string, n int) string { return strings.Repeat(s, n) }

// acene is n linearly fused benzene rings.
func acene(n int) string {
	var there, back []string
	for i := 1; i < n; i++ {
		there = append(there, fmt.Sprintf("c%%%d", 10+i%80))
		back = append(back, fmt.Sprintf("c%%%d", 10+(n-i)%80))
	}
	return "c1cc" + strings.Join(there, "c") + "cccc" + strings.Join(back, "c") + "c1"
}

// grid is a square lattice of rows by columns atoms, written atom by atom with ring
// closures between the rows.
func grid(rows, columns int, atom string) string {
	var b strings.Builder
	for r := range rows {
		for k := range columns {
			c := k
			if r%2 == 1 {
				c = columns - 1 - k // the chain runs to and fro
			}
			b.WriteString(atom)
			// The first and last of a row are joined by the chain itself.
			if up := r > 0 && k > 0; up {
				fmt.Fprintf(&b, "%%%d", 10+c+40*((r-1)%2))
			}
			if down := r < rows-1 && k < columns-1; down {
				fmt.Fprintf(&b, "%%%d", 10+c+40*(r%2))
			}
		}
	}
	return b.String()
}

// dendrimer is a tree of benzene rings, each carrying two more, depth times.
func dendrimer(depth int) string {
	if depth == 0 {
		return "c9ccccc9"
	}
	arm := dendrimer(depth - 1)
	d := depth % 9
	return fmt.Sprintf("c%dcc(%s)cc(%s)c%d", d, arm, arm, d)
}

// alkylDendrimer is a tree of saturated carbons with three branches at each.
func alkylDendrimer(depth int, leaf string) string {
	if depth == 0 {
		return leaf
	}
	arm := alkylDendrimer(depth-1, leaf)
	return "C(" + arm + ")(" + arm + ")" + arm
}

// complete is a complete graph.
func completeGraph(n int, atom string) string {
	var b strings.Builder
	open := map[[2]int]int{}
	next := 10
	for i := range n {
		b.WriteString(atom)
		for j := range n {
			if j == i || j == i-1 || j == i+1 {
				continue
			}
			key := [2]int{min(i, j), max(i, j)}
			if open[key] == 0 {
				open[key] = next
				next++
			}
			fmt.Fprintf(&b, "%%%d", open[key])
		}
	}
	return b.String()
}

// fullerene is buckminsterfullerene.
const fullerene = "c12c3c4c5c1c1c6c7c2c2c8c3c3c9c4c4c%10c5c5c1c1c6c6c%11c7c2c2c7c8c3c3c8c9c4c4c9c%10c5c5c1c1c6c6c%11c2c2c7c3c3c8c4c4c9c5c1c1c6c2c3c41"

// molfile writes a V2000 molfile with these counts, atoms and bonds.
func molfile(counts string, atoms, bonds []string) string {
	return "hostile\n\n\n" + counts + "  0  0  0  0  0  0  0  0999 V2000\n" + strings.Join(append(atoms, bonds...), "\n") + "\nM  END\n"
}

func molAtoms(n int, symbol string) []string {
	list := make([]string, n)
	for i := range list {
		list[i] = fmt.Sprintf("%10.4f%10.4f%10.4f %-3s 0  0  0  0  0  0  0  0  0  0  0  0", float64(i%31), float64(i/31), 0.0, symbol)
	}
	return list
}

// molChain joins n atoms in a chain of alternating double bonds.
func molChain(n int) []string {
	list := make([]string, n-1)
	for i := range list {
		list[i] = fmt.Sprintf("%3d%3d%3d  0", i+1, i+2, 1+(i+1)%2)
	}
	return list
}

func v3000(atoms, bonds int, lines string) string {
	return fmt.Sprintf("hostile\n\n\n  0  0  0     0  0            999 V3000\nM  V30 BEGIN CTAB\nM  V30 COUNTS %d %d 0 0 0\n%sM  V30 END CTAB\nM  END\n", atoms, bonds, lines)
}

func zip(s string) string {
	var b bytes.Buffer
	z := gzip.NewWriter(&b)
	z.Write([]byte(s))
	z.Close()
	return b.String()
}

// goodReport is a report as the program writes it, to be spoilt.
func goodReport(t *testing.T, args ...string) string {
	t.Helper()
	code, out, errs := call(t, "", args...)
	if code != exitOK {
		t.Fatalf("%v: status %d: %s", args, code, errs)
	}
	return out
}

func hostileCases(t *testing.T) []hostile {
	var all []hostile
	add := func(code int, says, name, stdin string, args ...string) {
		all = append(all, hostile{name: name, args: args, stdin: stdin, code: code, says: says})
	}
	file := func(code int, says, name, path, text string, args ...string) {
		all = append(all, hostile{name: name, args: args, files: map[string]string{path: text}, code: code, says: says})
	}

	// Structures as an argument of sites: answered (0) or refused (1).
	for _, c := range []struct {
		code       int
		says, name string
		smiles     string
	}{
		{1, "20000 atoms", "chain of 100000", rep("C", 100000)},
		{1, "π", "chain of 19999", rep("C", 19999)},
		{1, "", "polyene of 19998", rep("C=C", 9999)},
		{1, "1000", "polyene of 1002", rep("C=C", 501)},
		{0, "C300H302", "polyene of 300", rep("C=C", 150)},
		{1, "", "ring of 19998 aromatic atoms", "c1" + rep("c", 19996) + "c1"},
		{1, "", "100000 ring closures", rep("C1CC1", 50000)},
		{1, "π", "5000 cyclopropanes", rep("C1CC1", 5000)},
		{1, "", "100000 brackets deep", rep("C(", 100000)},
		{1, "π", "19000 branches deep", rep("C(", 9500) + "C" + rep(")", 9500)},
		{1, "", "19999 dots", rep("C.", 19998) + "C"},
		{1, "", "3000 benzenes apart", rep("c1ccccc1.", 3000) + "C"},
		{1, "molecules apart", "200 polyenes apart", manyPolyenes(200)},
		{0, "", "100 benzenes apart", rep("c1ccccc1.", 99) + "c1ccccc1"},
		{0, "", "a phenol with 6000 salts", rep("[Na+].[Cl-].", 3000) + "Oc1ccccc1"},
		{1, "", "isotope 10^500000", "[" + rep("9", 500000) + "C]"},
		{1, "", "isotope past 64 bits", "[99999999999999999999C]"},
		{1, "", "charge of 500000 signs", "[Fe" + rep("+", 500000) + "]"},
		{1, "", "charge past 64 bits", "[C+99999999999999999999]"},
		{1, "", "hydrogens past 64 bits", "[CH99999999999999999999]"},
		{1, "", "map past 64 bits", "[CH3:99999999999999999999]"},
		{1, "", "carbon of charge 15", "[C+15]"},
		{1, "", "nine hydrogens on a carbon", "[CH9]"},
		{1, "", "carbon of nine bonds", "C(C)(C)(C)(C)(C)(C)(C)(C)C"},
		{1, "", "percent signs", "C" + rep("%10", 100000)},
		{1, "", "bond signs", "C" + rep("=", 500000)},
		{1, "", "square brackets", rep("[", 500000)},
		{1, "", "parentheses", rep("(", 500000)},
		{1, "", "closing parentheses", rep(")", 500000)},
		{1, "", "two megabytes", rep("c", 2<<20)},
		{1, "", "bytes that are no UTF-8", rep("\xff", 100000)},
		{1, "", "zero bytes", "c1ccccc1\x00\x00\x00"},
		{1, "", "right-to-left marks", "c1ccccc1\u202eC\u200f"},
		{1, "", "wide digits", "c１ccccc１"},
		{1, "", "Greek and Cyrillic letters", "СС=СС"},
		{1, "", "a byte order mark", "\ufeffc1ccccc1"},
		{0, "C6H6", "line ends within", "c1ccccc1\r\nC"},
		{1, "", "escape sequences", "\x1b[31mC\x1b[0m"},
		{1, "", "empty", ""},
		{1, "", "white space", "   "},
		{0, "C60", "fullerene", fullerene},
		{0, "C30H18", "heptacene", acene(7)},
		{0, "C122H64", "acene of 30 rings", acene(30)},
		{1, "interwoven", "300 rings whose closures cross", acene(300)},
		{0, "C900H4", "grid of 30 by 30 aromatic atoms", grid(30, 30, "c")},
		{0, "C100H4", "grid of 10 by 10 aromatic atoms", grid(10, 10, "c")},
		{1, "", "grid of 30 by 30 saturated atoms", grid(30, 30, "C")},
		{1, "", "grid of 30 by 30 borons", grid(30, 30, "B")},
		{1, "", "complete graph of 12", completeGraph(12, "[U]")},
		{1, "", "complete graph of 12 carbons", completeGraph(12, "C")},
		{0, "C42H30", "hexaphenylbenzene", "c1(c2ccccc2)" + rep("c(c2ccccc2)", 4) + "c1c2ccccc2"},
		{1, "", "star of 19998 methyls", "[U]" + rep("(C)", 19998)},
		{0, "", "dendrimer of 15 rings", dendrimer(3)},
		{0, "", "dendrimer of 31 rings", dendrimer(4)},
		{1, "1000", "dendrimer of 255 rings", dendrimer(7)},
		{1, "π", "alkyl dendrimer of 6 layers", alkylDendrimer(6, "C")},
		{0, "", "benzene with a dendrimer", "c1ccccc1" + alkylDendrimer(5, "C")},
		{0, "", "dendrimer with 27 vinyl ends", alkylDendrimer(3, "C=C")},
		{1, "", "cumulene of 1000", "C" + rep("=C", 1000)},
		{0, "", "polyyne of 200", rep("C#C", 100)},
		{0, "", "100 allenes", rep("C=C=CC", 100)},
		{0, "", "100 nitro groups", "c1ccccc1" + rep("C([N+](=O)[O-])", 100) + "C"},
		{0, "", "100 amides", rep("C(=O)N", 100) + "c1ccccc1"},
		{0, "", "100 azides", rep("C(N=[N+]=[N-])", 100) + "c1ccccc1"},
		{1, "", "19999 aromatic nitrogens", rep("n", 19999)},
		{0, "", "all atoms charged", rep("[C+]", 300)},
		{0, "", "40 anions in a chain", "[CH2-]" + rep("[CH-]", 38) + "[CH2-]"},
		{0, "", "40 radicals in a chain", "[CH2]" + rep("[CH]", 38) + "[CH2]"},
		{0, "", "50 pyridines in a chain", rep("c1ccc(nc1)", 49) + "c1ccccn1"},
		{0, "", "cucurbit of double bonds", "C1=CC=C1" + rep("C1=CC=C1", 30)},
		{1, "", "metal in a porphyrin", "C1=CC2=CC3=CC=C4N3[Fe]N5C(=C4)C=CC5=CC1=N2"},
	} {
		add(c.code, c.says, "sites, "+c.name, "", "sites", "--", c.smiles)
	}
	add(1, "", "orbitals, polyene of 1002", "", "orbitals", rep("C=C", 501))
	add(0, "", "orbitals, fullerene", "", "orbitals", fullerene)
	add(2, "--incoming", "incoming group of 100000 atoms", "", "sites", "c1ccccc1C", "--incoming", "*"+rep("C", 100000))
	add(2, "--twist", "twist of NaN degrees", "", "sites", "c1ccccc1-c1ccccc1", "--twist", "6-7=NaN")
	add(2, "--twist", "twist of infinite degrees", "", "sites", "c1ccccc1-c1ccccc1", "--twist", "6-7=Inf")
	add(2, "--twist", "twist past 64 bits", "", "sites", "c1ccccc1-c1ccccc1", "--twist", rep("9", 400)+"-7=10")

	// Pairs and pericyclic processes.
	add(1, "", "pair, polyene of 1002 with ethene", "", "pair", rep("C=C", 501), "C=C")
	add(1, "", "pair, polyene of 40 with fullerene", "", "pair", rep("C=C", 20), fullerene)
	add(1, "diene", "pair, dendrimer of 15 rings with ethene", "", "pair", dendrimer(3), "C=C")
	add(0, "", "pair, polyene of 40 with ethene", "", "pair", rep("C=C", 20), "C=C")
	add(0, "", "pair, 20 dienes in one molecule", "", "pair", "C=CC=C"+rep("CCC=CC=C", 19), "C=CC=O")
	add(1, "", "pair within a chain of 19999", "", "pair", rep("C", 19999))
	add(0, "", "pair within 20 dienes", "", "pair", "C=CC=C"+rep("CCC=CC=C", 19))
	add(1, "", "components, 100000 of them", "", "symmetry", "π2s"+rep("+π2s", 100000))
	add(1, "", "component past 64 bits", "", "symmetry", "π99999999999999999999s+π2s")
	add(1, "", "components, 100000 brackets", "", "symmetry", rep("(", 100000)+"π2s"+rep(")", 100000))
	add(1, "", "components of no UTF-8", "", "symmetry", "\xcf4s+\x802s")
	add(1, "", "components of zero bytes", "", "symmetry", "π4s\x00+π2s")
	add(1, "", "closure of a polyene of 1002", "", "symmetry", "--closure", rep("C=C", 501))
	add(1, "", "opening of fullerene", "", "symmetry", "--opening", fullerene)
	add(2, "--shift", "shift of huge order", "", "symmetry", "--shift", "99999999999999999999,3", "C=CCCC=C")
	add(2, "--shift", "shift of a long order", "", "symmetry", "--shift", "999,999", "C=CCCC=C")

	// Molfiles and SD files.
	many := molfile("999999", molAtoms(20, "C"), nil)
	file(1, "", "molfile of fewer atoms than it says", "a.mol", many, "sites", "@a.mol")
	file(1, "", "molfile of negative counts", "a.mol", molfile(" -1 -1", nil, nil), "sites", "@a.mol")
	file(1, "1000", "V3000 polyene of 1200", "a.mol", v3000Chain(1200), "sites", "@a.mol")
	file(1, "", "molfile with bonds to nowhere", "a.mol", molfile("  2  1", molAtoms(2, "C"), []string{"  1 77  2  0"}), "sites", "@a.mol")
	file(1, "", "molfile of NaN coordinates", "a.mol", strings.ReplaceAll(molfile("  2  1", molAtoms(2, "C"), molChain(2)), "    0.0000", "       NaN"), "sites", "@a.mol")
	file(1, "", "molfile of infinite coordinates", "a.mol", strings.ReplaceAll(molfile("  2  1", molAtoms(2, "C"), molChain(2)), "    0.0000", "      +Inf"), "sites", "@a.mol")
	file(1, "", "molfile with a bond to itself", "a.mol", molfile("  2  1", molAtoms(2, "C"), []string{"  1  1  2  0"}), "sites", "@a.mol")
	file(1, "", "molfile with one bond twice", "a.mol", molfile("  2  2", molAtoms(2, "C"), []string{"  1  2  2  0", "  2  1  1  0"}), "sites", "@a.mol")
	file(1, "", "molfile of an unknown element", "a.mol", molfile("  2  1", molAtoms(2, "Zz"), molChain(2)), "sites", "@a.mol")
	file(0, "C300H302", "molfile of 300 atoms", "a.mol", molfile("300299", molAtoms(300, "C"), molChain(300)), "sites", "@a.mol")
	file(1, "", "molfile of random bytes", "a.mol", noise(100000), "sites", "@a.mol")
	file(1, "", "molfile of zero bytes", "a.mol", rep("\x00", 1<<20), "sites", "@a.mol")
	file(1, "", "molfile of one line of 8 MiB", "a.mol", rep("x", 8<<20), "sites", "@a.mol")
	file(1, "", "V3000 with counts past 64 bits", "a.mol", strings.Replace(v3000(2, 1, ""), "COUNTS 2", "COUNTS 99999999999999999999", 1), "sites", "@a.mol")
	file(1, "", "V3000 of a million atoms said", "a.mol", v3000(1000000, 0, "M  V30 BEGIN ATOM\nM  V30 END ATOM\n"), "sites", "@a.mol")
	file(1, "", "V3000 continued 100000 times", "a.mol", v3000(2, 1, rep("M  V30 -\n", 100000)), "sites", "@a.mol")
	file(1, "", "SD file of 10000 ends of record", "a.sdf", rep("$$$$\n", 10000), "sites", "@a.sdf")
	file(3, "", "empty SD file", "a.sdf", "", "sites", "@a.sdf")
	file(3, "", "empty SMILES file", "a.smi", "", "sites", "@a.smi")
	file(1, "", "SMILES file of zero bytes", "a.smi", rep("\x00\n", 1000), "sites", "@a.smi")

	// Routes.
	route := func(reaction string) string { return "[[step]]\nreaction = \"" + reaction + "\"\n" }
	for _, c := range []struct {
		code       int
		says, name string
		text       string
	}{
		{1, "", "chain of 100000 reacting", route(rep("C", 100000) + ">>" + rep("C", 100000) + "O")},
		{0, "not judged", "polyene of 1002 brominated", route(rep("C=C", 501) + "C>>BrC=C" + rep("C=C", 500) + "C")},
		{1, "", "1000 arrows", route(rep(">", 1000))},
		{1, "", "no molecule at all", route(">>")},
		{0, "", "3000 molecules", route("c1ccccc1." + rep("O.", 3000) + "BrBr>>Brc1ccccc1")},
		{0, "", "200 like substrates", route(rep("c1ccccc1C.", 200) + "BrBr>>Brc1ccccc1C")},
		{0, "", "dendrimer brominated", route(dendrimer(3) + ".BrBr>>" + dendrimer(3))},
		{0, "", "fullerene with cyclopentadiene, no change", route("C1C=CC=C1." + fullerene + ">>C1C=CC=C1." + fullerene)},
		{0, "", "acene of 25 rings nitrated", route(acene(25) + "." + "O[N+](=O)[O-]>>O=[N+]([O-])c1" + acene(25)[2:])},
		{0, "", "maps of every atom alike", route("[cH:1]1[cH:1][cH:1][cH:1][cH:1][cH:1]1>>[cH:1]1[cH:1][cH:1][cH:1][cH:1][c:1]1Br")},
		{3, "line 1", "no TOML", "title = \nand no steps\n"},
		{3, "", "binary", noise(100000)},
		{3, "", "zero bytes", rep("\x00", 100000)},
		{3, "", "empty", ""},
		{3, "nested", "tables 10000 deep", "a = " + rep("[", 10000) + rep("]", 10000)},
		{3, "nested", "inline tables 10000 deep", "a = " + rep("{a=", 10000) + "1" + rep("}", 10000)},
		{3, "parts", "dotted key of 10000 parts", "a" + rep(".a", 10000) + " = 1"},
		{3, "line 3", "keys twice", "[[step]]\nname = \"a\"\nname = \"b\"\nreaction = \"C>>C\"\n"},
		{3, "line 2", "numbers where text belongs", "[[step]]\nname = 1e999\nreaction = nan\nmedium = inf\n"},
		{3, "", "text of no UTF-8", "title = \"\xff\xfe\"\n"},
		{1, "", "right-to-left marks in a name", "[[step]]\nname = \"\u202e\"\nreaction = \"c1ccccc1\u202e>>C\"\n"},
		{0, "", "a name of a megabyte", "[[step]]\nname = \"" + rep("x", 1<<20) + "\"\nreaction = \"CCO>>CC=O\"\n"},
		{0, "", "agents of 100000 words", "[[step]]\nreaction = \"c1ccccc1C>>Cc1ccc(Br)cc1\"\nagents = \"" + rep("NBS, ", 20000) + "\"\n"},
		{1, "", "1000 empty steps", rep("[[step]]\n", 1000)},
		{3, "", "a string left open over 1 MiB", "[[step]]\nreaction = \"C>>C\"\nnote = \"\"\"" + rep("x\n", 1<<19)},
	} {
		file(c.code, c.says, "route, "+c.name, "route.toml", c.text, "review", "@route.toml")
	}

	// Reports given back to page and compare.
	sites := goodReport(t, "sites", "Cc1ccccc1")
	review := goodReport(t, "review", filepath.Join("..", "..", "docs", "examples", "two-steps.toml"))
	number := regexp.MustCompile(`(?m)^((?:chance|localization|charge|frontier_density) = ).*$`)
	atoms := regexp.MustCompile(`(?m)^((?:planned_)?atoms = ).*$`)
	smiles := regexp.MustCompile(`(?m)^(smiles = ).*$`)
	for _, c := range []struct {
		code       int
		says, name string
		text       string
	}{
		{3, "", "binary", noise(100000)},
		{3, "", "no report", "format = 1\n" + rep("[[a]]\n", 10000)},
		{3, "", "format past 64 bits", "format = 99999999999999999999\nkind = \"sites\"\n"},
		{3, "", "tables 10000 deep", "format = 1\nkind = \"sites\"\na = " + rep("[", 10000) + rep("]", 10000)},
		{0, "<html", "values that are NaN", number.ReplaceAllString(sites, "${1}nan")},
		{3, "", "values past any float", number.ReplaceAllString(sites, "${1}1e999")},
		{0, "<html", "infinite values and ranks", strings.ReplaceAll(number.ReplaceAllString(sites, "${1}inf"), "rank = 1", "rank = 9223372036854775807")},
		{0, "<html", "atoms that are not there", atoms.ReplaceAllString(sites, "${1}[-1, 0, 99999, 9223372036854775807]")},
		{0, "<html", "a structure of 100000 atoms", smiles.ReplaceAllString(sites, `${1}"`+rep("C", 100000)+`"`)},
		{0, "<html", "a structure of 1000 atoms", smiles.ReplaceAllString(sites, `${1}"`+rep("C=C", 500)+`"`)},
		{0, "<html", "a structure that is none", smiles.ReplaceAllString(sites, `${1}"c1cc<script>"`)},
		{0, "<html", "a grid for a structure", smiles.ReplaceAllString(sites, `${1}"`+grid(12, 12, "C")+`"`)},
		{0, "<html", "a fullerene for a structure", smiles.ReplaceAllString(sites, `${1}"`+fullerene+`"`)},
		{0, "<html", "a dendrimer for a structure", smiles.ReplaceAllString(sites, `${1}"`+dendrimer(4)+`"`)},
		{0, "<html", "a saturated dendrimer for a structure", smiles.ReplaceAllString(sites, `${1}"`+alkylDendrimer(5, "C")+`"`)},
		{0, "<html", "markup in the title", strings.Replace(review, "title = \"", "title = \"</title><script>alert(1)</script>", 1)},
		{0, "<html", "a review whose atoms are not there", atoms.ReplaceAllString(review, "${1}[0, -7, 4000]")},
		{0, "<html", "a review whose structures are chains", smiles.ReplaceAllString(review, `${1}"`+rep("C", 3000)+`"`)},
		{0, "<html", "1000 empty structures", "format = 1\nkind = \"sites\"\n" + rep("[[structure]]\n", 1000)},
		{0, "<html", "1000 empty steps", "format = 1\nkind = \"review\"\n" + rep("[[step]]\n[step.planned]\n", 1000)},
	} {
		file(c.code, c.says, "page, "+c.name, "report.toml", c.text, "page", "@report.toml")
		if c.code == 3 {
			file(3, "", "compare, "+c.name, "report.toml", c.text, "compare", "@report.toml", "@report.toml")
		}
	}
	file(0, "", "compare, 1000 empty steps", "report.toml", "format = 1\nkind = \"review\"\n"+rep("[[step]]\n", 1000), "compare", "@report.toml", "@report.toml")
	file(0, "", "compare, a review with NaN", "report.toml", number.ReplaceAllString(review, "${1}nan"), "compare", "@report.toml", "@report.toml")

	// Parameter sets.
	for _, c := range []struct{ name, text string }{
		{"binary", noise(10000)},
		{"tables 10000 deep", "a = " + rep("[", 10000) + rep("]", 10000)},
		{"h of NaN", "name = \"a\"\n[h]\nC = { value = nan, source = \"x\" }\n"},
		{"h infinite", "name = \"a\"\n[h]\nC = { value = inf, source = \"x\" }\n"},
		{"h past any float", "name = \"a\"\n[h]\nC = { value = 1e999, source = \"x\" }\n"},
		{"keys twice", "name = \"a\"\nname = \"b\"\n"},
		{"unknown entries", "name = \"a\"\n[h]\n" + rep("", 1) + manyKeys(10000)},
		{"zero bytes", rep("\x00", 10000)},
	} {
		file(3, "set.toml", "parameter set, "+c.name, "set.toml", c.text, "sites", "c1ccncc1", "--parameters", "@set.toml")
	}
	file(0, "", "parameter set, huge h", "set.toml", "name = \"a\"\n[h]\n\"N.pyridine\" = { value = 1e6, source = \"x\" }\n", "parameters")

	// Surveys: lines, filters, shards.
	add(1, "1 MiB", "survey, a line of 3 MiB", rep("C", 3<<20)+"\nc1ccccc1C\n", "survey", "-", "--as", "csv")
	add(1, "", "survey, random bytes", noise(20000), "survey", "-", "--as", "csv")
	add(1, "", "survey, zero bytes", rep("\x00", 1<<20), "survey", "-")
	add(0, "", "survey, a million empty lines", rep("\n", 1<<20), "survey", "-", "--as", "csv")
	add(1, "", "survey, 2000 broken lines", rep("C(\n", 2000), "survey", "-", "--as", "csv")
	add(0, "", "survey, names of quotes and commas", rep("c1ccccc1 \"a\",'b';=1+1\t\x01\n", 20), "survey", "-")
	add(1, "", "survey, 1000 arrows a line", rep(rep(">", 1000)+"\n", 100), "survey", "-")
	add(0, "", "survey, molecules apart without end", rep("c1ccccc1.", 2500)+"C>>C\n", "survey", "-")
	add(1, "", "survey, a polyene of 1002", rep("C=C", 501)+"\n", "survey", "-", "--as", "csv")
	add(1, "", "survey, a reaction of a chain of 9000", rep("C", 9000)+">>"+rep("C", 9000)+"Br\n", "survey", "-", "--as", "csv")
	add(3, "unexpected EOF", "survey, gzip cut short", zip(rep("c1ccccc1C\n", 1000))[:40], "survey", "-", "--as", "csv")
	add(3, "gzip", "survey, two bytes of gzip", "\x1f\x8b", "survey", "-")
	add(1, "", "survey, gzip of 8 MiB of one letter", zip(rep("C", 8<<20)), "survey", "-", "--as", "csv")
	add(2, "--where", "filter of 100000 words", "", "survey", "-", "--where", rep("and ", 100000))
	add(2, "--where", "filter with an open quote", "", "survey", "-", "--where", "name = '"+rep("x", 100000))
	add(2, "--where", "filter of zero bytes", "", "survey", "-", "--where", "\x00 = \x00")
	add(0, "", "filter of 20000 conditions", "c1ccccc1C\n", "survey", "-", "--where", "line > 0"+rep(" and line > 0", 20000))
	add(2, "NaN", "filter against NaN", "c1ccccc1C\n", "survey", "-", "--where", "planned_chance < NaN")
	add(2, "--shard", "shard past 64 bits", "", "survey", "-", "--shard", "1/99999999999999999999")
	add(2, "--shard", "shard below nothing", "", "survey", "-", "--shard", "-1/-3")
	add(0, "", "shard of 2^62", "c1ccccc1C\n", "survey", "-", "--shard", "1/4611686018427387904")
	add(0, "", "the 2^62 most doubtful", "c1ccccc1C\n", "survey", "-", "--top", "4611686018427387904")
	return all
}

// manyPolyenes is n polyenes of different lengths, apart.
func manyPolyenes(n int) string {
	var list []string
	for i := range n {
		list = append(list, "C=C"+rep("C=C", i%40)+rep("C", i/40))
	}
	return strings.Join(list, ".")
}

func manyKeys(n int) string {
	var b strings.Builder
	for i := range n {
		fmt.Fprintf(&b, "K%d = { value = 1, source = \"x\" }\n", i)
	}
	return b.String()
}

func v3000Chain(n int) string {
	var b strings.Builder
	b.WriteString("M  V30 BEGIN ATOM\n")
	for i := range n {
		fmt.Fprintf(&b, "M  V30 %d C %d 0 0 0\n", i+1, i)
	}
	b.WriteString("M  V30 END ATOM\nM  V30 BEGIN BOND\n")
	for i := 1; i < n; i++ {
		fmt.Fprintf(&b, "M  V30 %d %d %d %d\n", i, 1+i%2, i, i+1)
	}
	b.WriteString("M  V30 END BOND\n")
	return v3000(n, n-1, b.String())
}

// noise is n bytes that look like nothing, the same each time.
func noise(n int) string {
	b := make([]byte, n)
	x := uint32(2463534242)
	for i := range b {
		x ^= x << 13
		x ^= x >> 17
		x ^= x << 5
		b[i] = byte(x >> 11)
	}
	return string(b)
}

// peakHeap watches the live and not yet collected objects of the heap until stopped.
func peakHeap() (stop func() uint64) {
	sample := []metrics.Sample{{Name: "/memory/classes/heap/objects:bytes"}}
	runtime.GC()
	metrics.Read(sample)
	base := sample[0].Value.Uint64()
	var peak atomic.Uint64
	look := func(s []metrics.Sample) {
		metrics.Read(s)
		if v := s[0].Value.Uint64(); v > peak.Load() {
			peak.Store(v)
		}
	}
	end, ended := make(chan struct{}), make(chan struct{})
	go func() {
		defer close(ended)
		s := []metrics.Sample{{Name: sample[0].Name}}
		tick := time.NewTicker(2 * time.Millisecond)
		defer tick.Stop()
		for {
			look(s)
			select {
			case <-end:
				return
			case <-tick.C:
			}
		}
	}()
	return func() uint64 {
		look(sample)
		close(end)
		<-ended
		return peak.Load() - min(base, peak.Load())
	}
}

// processTime is the processor time this process has used so far: the measure of cost on
// a machine that others use too.
func processTime() time.Duration {
	var u syscall.Rusage
	if err := syscall.Getrusage(syscall.RUSAGE_SELF, &u); err != nil {
		panic(err)
	}
	return time.Duration(u.Utime.Nano() + u.Stime.Nano())
}

// Every hostile input is answered or refused with the status that fits, without an
// internal fault, and within bounded processor time and memory.
func TestHostileInputs(t *testing.T) {
	cases := hostileCases(t)
	if len(cases) < 100 {
		t.Errorf("%d hostile inputs, want 100 at least", len(cases))
	}
	dir := t.TempDir()
	slow, large := 0, 0
	for i, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			args := append([]string(nil), c.args...)
			for name, text := range c.files {
				path := filepath.Join(dir, fmt.Sprintf("%d-%s", i, name))
				if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
					t.Fatal(err)
				}
				for k := range args {
					if args[k] == "@"+name {
						args[k] = path
					}
				}
			}
			stop := peakHeap()
			var out, errs bytes.Buffer
			ctx, cancel := context.WithTimeout(context.Background(), time.Minute)
			start := processTime()
			code := run(ctx, args, strings.NewReader(c.stdin), &out, &errs)
			took := processTime() - start
			cancel()
			heap := stop()
			if code != c.code {
				t.Errorf("%s: status %d, want %d: %.300s", c.name, code, c.code, errs.String())
			}
			if !strings.Contains(out.String(), c.says) && !strings.Contains(errs.String(), c.says) {
				t.Errorf("%s: %q is nowhere in the answer: %.300s", c.name, c.says, errs.String())
			}
			for _, s := range []string{out.String(), errs.String()} {
				if k := strings.Index(s, "internal fault"); k >= 0 {
					t.Errorf("%s: %.300s", c.name, s[k:])
				}
			}
			if code != exitOK && errs.Len() == 0 {
				t.Errorf("%s: status %d without a word", c.name, code)
			}
			if took > hostileAim {
				slow++
			}
			if heap > hostileMemory {
				large++
			}
			if took > hostileAim || heap > hostileMemory || *writeHostile {
				t.Logf("%-50s status %d %8s %4d MiB", c.name, code, took.Round(time.Millisecond), heap>>20)
			}
			if took > hostileBound {
				t.Errorf("%s took %v", c.name, took)
			}
			if heap > hostileMemories {
				t.Errorf("%s held %d MiB", c.name, heap>>20)
			}
		})
	}
	t.Logf("%d hostile inputs: %d took longer than %v, %d held more than %d MiB", len(cases), slow, hostileAim, large, hostileMemory>>20)
}
