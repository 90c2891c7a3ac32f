package frontier

import (
	"fmt"
	"math"
	"math/rand/v2"
	"sort"
	"strings"
	"testing"

	"lobecast/frontier/molecule"
)

// scrambled is a set in which every parameter has a value of its own, so that two
// matrices that agree under it agree in every class, link and shift.
func scrambled(t testing.TB) *Set {
	s := mustLoad(t, DefaultSet).Clone()
	s.Name = "scrambled"
	r := rand.New(rand.NewPCG(1, 2))
	for i := range s.Values {
		s.Values[i] = 0.2 + r.Float64()
	}
	return s
}

// fingerprint describes all matrices of a molecule without regard to numbering: for
// every centre the environment that repeated refinement over its links gives, and the
// spectrum of every system.
func fingerprint(t testing.TB, s *Set, pi *Pi) string {
	t.Helper()
	sol, err := s.Solve(pi)
	if err != nil {
		t.Fatal(err)
	}
	var systems []string
	for k, m := range sol.Matrices {
		sig := make([]string, m.N)
		for i := range sig {
			sig[i] = fmt.Sprintf("%.6f/%.6f", m.H[i*m.N+i], pi.Centres[m.Centres[i]].Electrons)
		}
		for round := 0; round < m.N; round++ {
			next := make([]string, m.N)
			ids := map[string]int{}
			var parts []string
			for i := range sig {
				var around []string
				for _, l := range m.Links {
					if l.I == i || l.J == i {
						around = append(around, fmt.Sprintf("%.6f:%s", m.H[l.I*m.N+l.J], sig[l.I+l.J-i]))
					}
				}
				sort.Strings(around)
				next[i] = sig[i] + "(" + strings.Join(around, ",") + ")"
				parts = append(parts, next[i])
			}
			sort.Strings(parts)
			for _, p := range parts { // short names in place of grown strings
				if _, ok := ids[p]; !ok {
					ids[p] = len(ids)
				}
			}
			for i := range sig {
				sig[i] = fmt.Sprintf("%.6f/%.6f#%d", m.H[i*m.N+i], pi.Centres[m.Centres[i]].Electrons, ids[next[i]])
			}
		}
		sort.Strings(sig)
		var levels []string
		for _, x := range sol.Systems[k].X {
			levels = append(levels, fmt.Sprintf("%.6f", x+0.0))
		}
		systems = append(systems, fmt.Sprintf("local=%t electrons=%.6f %v %v", pi.Local[k], m.Electrons, sig, levels))
	}
	sort.Strings(systems)
	return strings.Join(systems, "\n")
}

// Pairs of legal ways to write one molecule. Which notations are in use is common
// practice (no source); that they mean one molecule follows from equal skeletons,
// hydrogens and electrons.
var notations = []struct{ name, a, b string }{
	{"aromatic and Kekulé benzene", "c1ccccc1O", "OC1=CC=CC=C1"},
	{"the two Kekulé forms of o-xylene", "CC1=C(C)C=CC=C1", "CC1=CC=CC=C1C"},
	{"naphthalene", "c1ccc2ccccc2c1", "C1=CC2=CC=CC=C2C=C1"},
	{"azulene", "c1ccc2cccc2cc1", "C1=CC=C2C=CC=C2C=C1"},
	{"pyridone", "O=c1cccc[nH]1", "O=C1C=CC=CN1"},
	{"pyridone, zwitterion", "O=c1cc[nH]cc1", "[O-]c1cc[nH+]cc1"},
	{"indole", "c1ccc2[nH]ccc2c1", "C1=CC=C2NC=CC2=C1"},
	{"furan", "c1ccoc1C", "CC1=CC=CO1"},
	{"nitrobenzene", "O=[N+]([O-])c1ccccc1", "O=N(=O)c1ccccc1"},
	{"nitromethane beside an alkene", "C=CC[N+]([O-])=O", "C=CCN(=O)=O"},
	{"nitroaniline as quinoid zwitterion", "Nc1ccc([N+](=O)[O-])cc1", "[NH2+]=C1C=CC(=[N+]([O-])[O-])C=C1"},
	{"nitrate ester of phenol", "O=[N+]([O-])Oc1ccccc1", "O=N(=O)Oc1ccccc1"},
	{"nitronate", "CC=[N+]([O-])[O-]", "C[CH-][N+](=O)[O-]"},
	{"nitronate beside a ketone", "CC(=O)C=[N+]([O-])[O-]", "CC([O-])=C[N+](=O)[O-]"},
	{"pyridine N-oxide", "[O-][n+]1ccccc1", "O=n1ccccc1"},
	{"4-aminopyridine N-oxide", "Nc1cc[n+]([O-])cc1", "[NH2+]=C1C=CN([O-])C=C1"},
	{"nitrone", "C[N+]([O-])=Cc1ccccc1", "CN(=O)=Cc1ccccc1"},
	{"azide", "c1ccccc1N=[N+]=[N-]", "c1ccccc1[N-][N+]#N"},
	{"azide, pentavalent", "c1ccccc1N=[N+]=[N-]", "c1ccccc1N=N#N"},
	{"azide on an alkyl group", "C=CCN=[N+]=[N-]", "C=CC[N-][N+]#N"},
	{"p-nitrophenyl azide", "O=[N+]([O-])c1ccc(N=[N+]=[N-])cc1", "O=N(=O)c1ccc([N-][N+]#N)cc1"},
	{"diazo ester", "COC(=O)C=[N+]=[N-]", "COC(=O)[CH-][N+]#N"},
	{"diazo ester, pentavalent", "COC(=O)C=[N+]=[N-]", "COC(=O)C=N#N"},
	{"diazoketone as enol diazonium", "CC(=O)C=[N+]=[N-]", "CC([O-])=C[N+]#N"},
	{"quinone diazide", "O=C1C=CC(=[N+]=[N-])C=C1", "[O-]c1ccc([N+]#N)cc1"},
	{"aminobenzenediazonium", "Nc1ccc([N+]#N)cc1", "[NH2+]=C1C=CC(=[N+]=[N-])C=C1"},
	{"nitrile oxide", "c1ccccc1C#[N+][O-]", "c1ccccc1C#N=O"},
	{"nitrile oxide, cumulated", "c1ccccc1C#[N+][O-]", "c1ccccc1[C-]=[N+]=O"},
	{"nitrous oxide", "[N-]=[N+]=O", "N#[N+][O-]"},
	{"nitrile imine", "c1ccccc1C#[N+][N-]c1ccccc1", "c1ccccc1[C-]=[N+]=Nc1ccccc1"},
	{"nitrile ylide", "c1ccccc1C#[N+][CH-]C", "c1ccccc1[C-]=[N+]=CC"},
	{"azomethine ylide", "C=[N+](C)[CH-]C(=O)OC", "[CH2-][N+](C)=CC(=O)OC"},
	{"azomethine ylide as enolate", "C=[N+](C)[CH-]C(=O)OC", "C=[N+](C)C=C([O-])OC"},
	{"carbonyl ylide", "C=[O+][CH-]C", "[CH2-][O+]=CC"},
	{"ozone", "O=[O+][O-]", "[O-][O+]=O"},
	{"acylpyridinium ylide", "O=C(C)[CH-][n+]1ccccc1", "CC([O-])=C[n+]1ccccc1"},
	{"carboxylate", "O=C([O-])c1ccccc1", "[O-]C(=O)c1ccccc1"},
	{"amidinium", "CC(N)=[NH2+]", "CC(=[NH2+])N"},
	{"guanidinium", "CNC(N)=[NH2+]", "C[NH+]=C(N)N"},
	{"imidazolium", "C[n+]1cc[nH]c1", "Cn1cc[nH+]c1"},
	{"benzimidazolium", "CC[n+]1cn(C)c2ccccc12", "CCn1c[n+](C)c2ccccc12"},
	{"aminopyridinium", "Nc1cc[nH+]cc1", "[NH2+]=C1C=CNC=C1"},
	{"2-aminopyridinium", "Nc1cccc[nH+]1", "[NH2+]=C1C=CC=CN1"},
	{"cyanine", "C[N+](C)=CC=CN(CC)CC", "CN(C)C=CC=[N+](CC)CC"},
	{"triarylmethyl dye", "CN(C)c1ccc(cc1)C(c1ccccc1)=C1C=CC(=[N+](C)C)C=C1", "CN(C)c1ccc(cc1)[C+](c1ccccc1)c1ccc(cc1)N(C)C"},
	{"iminium as carbocation", "C[N+](C)=CC=C", "CN(C)[CH+]C=C"},
	{"oxocarbenium", "C[O+]=Cc1ccccc1", "CO[CH+]c1ccccc1"},
	{"methoxybenzyl cation", "[CH2+]c1ccc(OC)cc1", "C=C1C=CC(=[O+]C)C=C1"},
	{"pyrylium", "c1cc[o+]cc1", "C1=CC=C[O+]=C1"},
	{"tropylium", "c1ccc[cH+]cc1", "[CH+]1C=CC=CC=C1"},
	{"hydroxytropylium", "OC1=CC=C[CH+]C=C1", "[OH+]=C1C=CC=CC=C1"},
	{"methylcyclopentadienide", "CC1=C[CH-]C=C1", "C[C-]1C=CC=C1"},
	{"allyl cation", "C[CH+]C=C", "CC=C[CH2+]"},
	{"allyl anion", "C[CH-]C=C", "CC=C[CH2-]"},
	{"allyl radical", "C[CH]C=C", "CC=C[CH2]"},
	{"enolate", "CC([O-])=C", "CC(=O)[CH2-]"},
	{"phenolate", "[O-]c1ccccc1", "O=C1C=C[CH-]C=C1"},
	{"acetylacetonate", "CC(=O)C=C([O-])CC", "CC([O-])=CC(=O)CC"},
	{"amide anion", "CC([O-])=Nc1ccccc1", "CC(=O)[N-]c1ccccc1"},
	{"thioamide anion", "CC(=S)[N-]c1ccccc1", "CC([S-])=Nc1ccccc1"},
	{"sulfoxide", "CS(=O)c1ccccc1", "C[S+]([O-])c1ccccc1"},
	{"sulfone", "CS(=O)(=O)c1ccccc1", "C[S+2]([O-])([O-])c1ccccc1"},
	{"sulfonamide", "NS(=O)(=O)c1ccccc1", "N[S+]([O-])(=O)c1ccccc1"},
	{"sulfinyl amine", "c1ccccc1N=S=O", "c1ccccc1N=[S+][O-]"},
	{"sulfur dioxide", "O=S=O", "O=[S+][O-]"},
	{"phosphine oxide", "CP(C)(=O)c1ccccc1", "C[P+](C)([O-])c1ccccc1"},
	{"phosphonium ylide", "CP(C)(C)=CC(=O)OC", "C[P+](C)(C)[CH-]C(=O)OC"},
	{"phosphonium ylide as enolate", "CP(C)(C)=CC(C)=O", "C[P+](C)(C)C=C(C)[O-]"},
	{"sulfonium ylide", "CS(C)=CC(C)=O", "C[S+](C)[CH-]C(C)=O"},
	{"sulfoxonium ylide", "CS(C)(=O)=CC(C)=O", "C[S+](C)(=O)[CH-]C(C)=O"},
	{"iminophosphorane", "CP(C)(C)=Nc1ccccc1", "C[P+](C)(C)[N-]c1ccccc1"},
	{"sulfilimine", "CS(C)=Nc1ccccc1", "C[S+](C)[N-]c1ccccc1"},
	{"sydnone", "[O-]c1c[n+](C)no1", "O=C1[CH-][N+](C)=NO1"},
	{"pyridinium-3-olate", "C[n+]1cccc([O-])c1", "C[N+]1=CC=CC(=O)[CH-]1"},
	{"acylium", "c1ccccc1C#[O+]", "c1ccccc1[C+]=O"},
	{"nitrilium", "c1ccccc1C#[N+]C", "c1ccccc1[C+]=NC"},
	{"propargyl cation", "C#C[CH+]c1ccccc1", "[CH+]=C=Cc1ccccc1"},
	{"propargyl radical", "C#C[CH]c1ccccc1", "[CH]=C=Cc1ccccc1"},
	{"ynolate", "c1ccccc1C#C[O-]", "c1ccccc1[C-]=C=O"},
	{"cyanate", "[O-]C#N", "O=C=[N-]"},
	{"malononitrile anion", "N#C[CH-]C#N", "[N-]=C=CC#N"},
	{"azaborine", "B1C=CC=CN1", "[BH-]1=[NH+]C=CC=C1"},
	{"vinylogous merocyanine", "CN(C)C=CC=O", "C[N+](C)=CC=C[O-]"},
	{"squarate", "[O-]C1=C([O-])C(=O)C1=O", "[O-]C1=C(C(=O)C1=O)[O-]"},
	{"imidazolide", "Cc1c[n-]cn1", "Cc1cnc[n-]1"},
	{"methylated pyrazolone in zwitterionic form", "O=C1C=CN(C)N1C", "[O-]C1=CC=[N+](C)N1C"},
	{"methylene blue skeleton", "CN(C)c1ccc2nc3ccc(=[N+](CC)CC)cc-3sc2c1", "C[N+](C)=c1ccc2nc3ccc(N(CC)CC)cc3sc-2c1"},
	{"dimethyl[10]annulene, its two Kekulé forms", "CC1=C(C)C=CC=CC=CC=C1", "CC1=CC=CC=CC=CC=C1C"},
	{"biphenylene", "c1ccc2c(c1)-c1ccccc1-2", "C1=CC2=C3C=CC=CC3=C2C=C1"},
	{"porphyrin core, its two Kekulé forms", "C1=CC2=CC3=CC=C(N3)C=C3C=CC(=N3)C=C3C=CC(N3)=CC1=N2", "C1=Cc2cc3ccc(cc4nc(cc5ccc(cc1n2)[nH]5)C=C4)[nH]3"},
}

func TestNotations(t *testing.T) {
	set := scrambled(t)
	if len(notations) < 40 {
		t.Fatalf("only %d pairs of notations", len(notations))
	}
	for _, n := range notations {
		a, err := molecule.ParseSMILES(n.a)
		if err != nil {
			t.Errorf("%s: %s: %v", n.name, n.a, err)
			continue
		}
		b, err := molecule.ParseSMILES(n.b)
		if err != nil {
			t.Errorf("%s: %s: %v", n.name, n.b, err)
			continue
		}
		if a.Formula() != b.Formula() {
			t.Errorf("%s: %s is %s, %s is %s: no two ways of writing one molecule", n.name, n.a, a.Formula(), n.b, b.Formula())
			continue
		}
		pa, err := Perceive(a, Options{})
		if err != nil {
			t.Errorf("%s: %s: %v", n.name, n.a, err)
			continue
		}
		pb, err := Perceive(b, Options{})
		if err != nil {
			t.Errorf("%s: %s: %v", n.name, n.b, err)
			continue
		}
		if fa, fb := fingerprint(t, set, pa), fingerprint(t, set, pb); fa != fb {
			t.Errorf("%s: %s and %s give different matrices\n%s\n%s", n.name, n.a, n.b, describe(pa), describe(pb))
		}
	}
	t.Logf("%d pairs of notations compared", len(notations))
}

// describe lists the systems of a π system for messages.
func describe(pi *Pi) string {
	var b strings.Builder
	for s, members := range pi.Systems {
		fmt.Fprintf(&b, "  local=%t:", pi.Local[s])
		for _, c := range members {
			x := pi.Centres[c]
			fmt.Fprintf(&b, " %d[%s %.3g]", pi.Molecule.Atoms[x.Atom].Number, x.Class, x.Electrons)
		}
		for _, l := range pi.Links {
			if l.Kind != AnyLink {
				fmt.Fprintf(&b, " %d-%d:%d", l.I, l.J, l.Kind)
			}
		}
		b.WriteString("\n")
	}
	return b.String()
}

// group is one row of the table of groups: the conjugated centres with their classes
// and electrons, in atom order, and the local systems beside them.
type group struct {
	name, smiles string
	centres      string // "atom:class:electrons …", conjugated real centres by atom number
	local        string // sizes and electrons of local systems, "2/2 3/4"
}

// The groups of the contract's table, one row each, plus variants. Electron counts
// follow from the octet rule; which lone pairs count is common practice of Hückel
// theory (Streitwieser 1961, from memory).
var groups = []group{
	{"alkene", "C=C", "1:C:1 2:C:1", ""},
	{"aldehyde", "CC=O", "2:C:1 3:O1 aldehyde:1", ""},
	{"ketone", "CC(C)=O", "2:C:1 4:O1 ketone:1", ""},
	{"acid", "CC(=O)O", "2:C:1 3:O1 acid:1 4:O2 acid:2", ""},
	{"ester", "CC(=O)OC", "2:C:1 3:O1 ester:1 4:O2 ester:2", ""},
	{"amide", "CC(=O)NC", "2:C:1 3:O1 amide:1 4:N2 amide:2", ""},
	{"carbamate", "COC(=O)NC", "2:O2 ester:2 3:C:1 4:O1 amide:1 5:N2 carbamate:2", ""},
	{"urea", "NC(=O)N", "1:N2 urea:2 2:C:1 3:O1 amide:1 4:N2 urea:2", ""},
	{"carboxylate", "CC(=O)[O-]", "2:C:1 3:O carboxylate:1.5 4:O carboxylate:1.5", ""},
	{"amidinium", "CC(N)=[NH2+]", "2:C:1 3:N amidinium:1.5 4:N amidinium:1.5", ""},
	{"guanidinium", "NC(N)=[NH2+]", "1:N amidinium:1.67 2:C:1 3:N amidinium:1.67 4:N amidinium:1.67", ""},
	{"imidazolium", "C[n+]1cc[nH]c1", "2:N amidinium:1.5 3:C:1 4:C:1 5:N amidinium:1.5 6:C:1", ""},
	{"imine", "CC=NC", "2:C:1 3:N1 imine:1", ""},
	{"pyridine", "n1ccccc1", "1:N1 azine:1 2:C:1 3:C:1 4:C:1 5:C:1 6:C:1", ""},
	{"pyridinium", "[nH+]1ccccc1", "1:N+ azinium:1 2:C:1 3:C:1 4:C:1 5:C:1 6:C:1", ""},
	{"iminium", "C[N+](C)=C", "2:N+ iminium:1 4:C:1", ""},
	{"pyrrole", "[nH]1cccc1", "1:N2 pyrrole:2 2:C:1 3:C:1 4:C:1 5:C:1", ""},
	{"furan", "o1cccc1", "1:O2 furan:2 2:C:1 3:C:1 4:C:1 5:C:1", ""},
	{"thiophene", "s1cccc1", "1:S2 thiophene:2 2:C:1 3:C:1 4:C:1 5:C:1", ""},
	{"vinylamine", "C=CN", "1:C:1 2:C:1 3:N2 amine:2", ""},
	{"enol ether", "C=COC", "1:C:1 2:C:1 3:O2 ether:2", ""},
	{"vinyl sulfide", "C=CSC", "1:C:1 2:C:1 3:S2 thioether:2", ""},
	{"vinyl halides", "FC=CI", "1:F:2 2:C:1 3:C:1 4:I:2", ""},
	{"nitroethene", "C=C[N+](=O)[O-]", "1:C:1 2:C:1 3:N+ nitro:1 4:O nitro:1.5 5:O nitro:1.5", ""},
	{"pyridine N-oxide", "[O-][n+]1ccccc1", "1:O- oxide:2 2:N+ oxide:1 3:C:1 4:C:1 5:C:1 6:C:1 7:C:1", ""},
	{"nitrone", "C=[N+](C)[O-]", "1:C:1 2:N+ oxide:1 4:O- oxide:2", ""},
	{"azide", "CN=[N+]=[N-]", "2:N- dipole:1.5 3:N+ dipole:1 4:N- dipole:1.5", "2/2"},
	{"diazo", "C=[N+]=[N-]", "1:C:1 2:N+ dipole:1 3:N- dipole:2", "2/2"},
	{"nitrile oxide", "CC#[N+][O-]", "2:C:1 3:N+ dipole:1 4:O- oxide:2", "3/4"},
	{"nitrous oxide", "[N-]=[N+]=O", "1:N1 diazonium:1 2:N+ dipole:1 3:O- oxide:2", "3/4"},
	{"nitrile imine", "CC#[N+][N-]C", "2:C:1 3:N+ dipole:1 4:N- dipole:2", "2/2"},
	{"nitrile ylide", "CC#[N+][CH-]C", "2:C:1.5 3:N+ dipole:1 4:C:1.5", "2/2"},
	{"azomethine ylide", "C=[N+](C)[CH2-]", "1:C:1.5 2:N+ iminium:1 4:C:1.5", ""},
	{"carbonyl ylide", "C=[O+][CH2-]", "1:C:1.5 2:O+:1 3:C:1.5", ""},
	{"ozone", "O=[O+][O-]", "1:O-:1.5 2:O+:1 3:O-:1.5", ""},
	{"ketene", "C=C=O", "1:C:1 2:C:1 3:O2:2", "2/2"},
	{"isocyanate", "CN=C=O", "2:N1 imine:1 3:C:1 4:O2:2", "2/2"},
	{"allene alone", "C=C=C", "", "2/2 2/2"},
	{"vinylallene", "C=CC=C=C", "1:C:1 2:C:1 3:C:1 4:C:1", "2/2"},
	{"butatriene", "C=C=C=C", "1:C:1 2:C:1 3:C:1 4:C:1", "2/2"},
	{"alkyne", "C#C", "1:C:1 2:C:1", "2/2"},
	{"nitrile", "C=CC#N", "1:C:1 2:C:1 3:C:1 4:N1 nitrile:1", "2/2"},
	{"aryne", "C1#CC=CC=C1", "1:C:1 2:C:1 3:C:1 4:C:1 5:C:1 6:C:1", "2/2"},
	{"vinyl cation carbon", "C=C[CH2+]", "1:C:0.5 2:C:1 3:C:0.5", ""},
	{"allyl anion", "C=C[CH2-]", "1:C:1.5 2:C:1 3:C:1.5", ""},
	{"allyl radical", "C=C[CH2]", "1:C:1 2:C:1 3:C:1", ""},
	{"vinylboronic acid", "C=CB(O)O", "1:C:1 2:C:1 3:B:0 4:O2 boron:2 5:O2 boron:2", ""},
	{"pyrylium", "[o+]1ccccc1", "1:O+:1 2:C:1 3:C:1 4:C:1 5:C:1 6:C:1", ""},
	{"tropylium", "[cH+]1cccccc1", "1:C:0.857 2:C:0.857 3:C:0.857 4:C:0.857 5:C:0.857 6:C:0.857 7:C:0.857", ""},
	{"cyclopentadienide", "[cH-]1cccc1", "1:C:1.2 2:C:1.2 3:C:1.2 4:C:1.2 5:C:1.2", ""},
	{"vinyl sulfone", "C=CS(C)(=O)=O", "1:C:1 2:C:1", ""},
	{"vinyl sulfoxide", "C=CS(C)=O", "1:C:1 2:C:1", ""},
	{"vinylphosphonate", "C=CP(=O)(O)O", "1:C:1 2:C:1", ""},
	{"vinylammonium", "C=C[N+](C)(C)C", "1:C:1 2:C:1", ""},
	{"trifluoropropene", "C=CC(F)(F)F", "1:C:1 2:C:1", ""},
	{"phosphonium ylide", "C[P+](C)(C)[CH-]C=O", "5:C:2 6:C:1 7:O1 aldehyde:1", ""},
	{"hydrazine: the first N only", "C=CNN", "1:C:1 2:C:1 3:N2 hydrazine:2", ""},
	{"alcohol off the π system", "C=CCO", "1:C:1 2:C:1", ""},
	{"diazonium", "C=C[N+]#N", "1:C:1 2:C:1 3:N+ dipole:1 4:N1 diazonium:1", "2/2"},
	{"isocyanide", "C=C[N+]#[C-]", "1:C:1 2:C:1 3:N+ dipole:1 4:C:1", "2/2"},
	{"nitroso", "C=CN=O", "1:C:1 2:C:1 3:N1 nitroso:1 4:O1 nitroso:1", ""},
	{"thiocarbonyl", "CC(=S)N", "2:C:1 3:S1:1 4:N2 amide:2", ""},
	{"selenophene", "[se]1cccc1", "1:Se2:2 2:C:1 3:C:1 4:C:1 5:C:1", ""},
	{"phosphaalkene", "CP=C", "2:P1:1 3:C:1", ""},
	{"vinylphosphine", "C=CP(C)C", "1:C:1 2:C:1 3:P2:2", ""},
	{"silene", "C[Si](C)=C", "2:Si:1 4:C:1", ""},
	{"imidazolylidene", "C[N]1C=CN(C)[C]1", "2:N2 pyrrole:2 3:C:1 4:C:1 5:N2 pyrrole:2 7:C:0", ""},
}

func TestGroups(t *testing.T) {
	for _, g := range groups {
		m, err := molecule.ParseSMILES(g.smiles)
		if err != nil {
			t.Errorf("%s: %v", g.name, err)
			continue
		}
		pi, err := Perceive(m, Options{})
		if err != nil {
			t.Errorf("%s: %v", g.name, err)
			continue
		}
		var conj, local []string
		for i, c := range pi.Centres {
			if !c.Alkyl && pi.CentreOf[c.Atom] == i {
				conj = append(conj, fmt.Sprintf("%d:%s:%.3g", m.Atoms[c.Atom].Number, c.Class, c.Electrons))
			}
		}
		for s, members := range pi.Systems {
			if pi.Local[s] {
				local = append(local, fmt.Sprintf("%d/%g", len(members), pi.SystemElectrons(s)))
			}
		}
		sort.Strings(local)
		if got := strings.Join(conj, " "); got != g.centres {
			t.Errorf("%s (%s): centres\n got %s\nwant %s", g.name, g.smiles, got, g.centres)
		}
		if got := strings.Join(local, " "); got != g.local {
			t.Errorf("%s (%s): local systems %q, want %q", g.name, g.smiles, got, g.local)
		}
		if pi.Warnings != nil && !strings.Contains(g.name, "radical") && !strings.Contains(g.name, "ylidene") {
			t.Errorf("%s: unexpected warning %q", g.name, pi.Warnings)
		}
		if math.Abs(pi.Electrons()-math.Round(pi.Electrons())) > 1e-9 {
			t.Errorf("%s: %v electrons", g.name, pi.Electrons())
		}
	}
}

// Alkyl groups hyperconjugate from carbon only; σ acceptors shift the carbon they are
// on and bring no centre.
func TestAlkylAndInductive(t *testing.T) {
	for _, c := range []struct {
		smiles string
		alkyl  string // classes of alkyl centres
		causes string // inductive causes on carbons other than by π heteroatoms
	}{
		{"Cc1ccccc1", "alkyl methyl", "alkyl"},
		{"CCc1ccccc1", "alkyl primary", "alkyl"},
		{"CC(C)c1ccccc1", "alkyl secondary", "alkyl"},
		{"CC(C)(C)c1ccccc1", "alkyl tertiary", "alkyl"},
		{"OCc1ccccc1", "alkyl hetero", "CH2X"},
		{"ClCc1ccccc1", "alkyl hetero", "CH2X"},
		{"C[N+](C)(C)Cc1ccccc1", "alkyl hetero", "CH2Z+"},
		{"FC(F)(F)c1ccccc1", "", "CX3"},
		{"ClC(Cl)c1ccccc1", "", "CX3"},
		{"CNc1ccccc1", "", ""},
		{"COc1ccccc1", "", ""},
		{"CS(=O)(=O)c1ccccc1", "", "SO2"},
		{"C[S+2]([O-])([O-])c1ccccc1", "", "SO2"},
		{"CS(=O)c1ccccc1", "", "SO"},
		{"C[S+](C)c1ccccc1", "", "SR2+"},
		{"FS(F)(F)(F)(F)c1ccccc1", "", "SF5"},
		{"C[N+](C)(C)c1ccccc1", "", "NR3+"},
		{"[NH3+]c1ccccc1", "", "NR3+"},
		{"C[P+](C)(C)c1ccccc1", "", "PR3+"},
		{"CP(C)(=O)c1ccccc1", "", "PO"},
		{"C[Si](C)(C)c1ccccc1", "", "SiR3"},
		{"Cl[I](Cl)c1ccccc1", "", "IR"},
		{"C1Cc2ccccc2C1", "alkyl primary alkyl primary", "alkyl alkyl"},
		{"C1C=CC=C1", "alkyl primary", "alkyl alkyl"},
	} {
		pi := mustPerceive(t, c.smiles)
		var alkyl, causes []string
		for _, x := range pi.Centres {
			if x.Alkyl {
				alkyl = append(alkyl, string(x.Class))
				if x.Electrons != 2 || pi.Molecule.Atoms[x.Atom].Element != 6 {
					t.Errorf("%s: alkyl centre %+v", c.smiles, x)
				}
			}
		}
		for _, d := range pi.Inductive {
			if _, root := classIndex[Class(d.Cause)]; !root || d.Cause == "alkyl" {
				causes = append(causes, d.Cause)
			}
		}
		if got := strings.Join(alkyl, " "); got != c.alkyl {
			t.Errorf("%s: alkyl groups %q, want %q", c.smiles, got, c.alkyl)
		}
		if got := strings.Join(causes, " "); got != c.causes {
			t.Errorf("%s: inductive causes %q, want %q", c.smiles, got, c.causes)
		}
	}
}
