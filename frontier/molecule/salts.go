package molecule

import "sync"

// AsideKind says what a component that was set aside is.
type AsideKind uint8

// Kinds of components that accompany a structure.
const (
	Unlisted   AsideKind = iota // an inorganic component without a name in the list
	CounterIon                  // an ion
	SaltAcid                    // an acid that makes a salt with a basic structure
	SaltBase                    // a base that makes a salt with an acidic structure
	Solvent                     // a solvent of crystallisation, or gas
)

// Aside is a component that accompanies a structure without being it.
type Aside struct {
	Name   string // "chloride", "hydrochloride", "trifluoroacetate"; the formula of an unlisted one
	SMILES string // canonical
	Kind   AsideKind
	Atoms  []int // indices in the molecule it was set aside from
}

// SetAside separates the structures that matter from counter-ions, acids and bases of
// salts, and solvents of crystallisation. main holds the organic components that are
// not in the list; those that carry no carbon are set aside, under their formula,
// unless they are free of metals and have a multiple bond (an azide, ozone). Never is
// everything set aside: where no component is left, the largest stays, organic ones
// before others, and the first of several.
//
// The list is meant for one compound with its companions. In a mixture of reagents a
// component that is listed (acetic acid, toluene, pyridine) may be what matters: the
// caller must decide.
func SetAside(m *Molecule) (main []*Molecule, aside []Aside) {
	parts := m.Split()
	if len(parts) == 1 {
		return parts, nil
	}
	members := m.Components()
	entries := make([]*companion, len(parts))
	apart := make([]bool, len(parts))
	left := 0
	for i, p := range parts {
		entries[i] = findCompanion(p)
		apart[i] = entries[i] != nil || p.isInorganic()
		if !apart[i] {
			left++
		}
	}
	if left == 0 {
		best := 0
		weight := func(p *Molecule) int {
			w := len(p.Atoms)
			if !p.isInorganic() {
				w += maxAtoms
			}
			return w
		}
		for i, p := range parts {
			if weight(p) > weight(parts[best]) {
				best = i
			}
		}
		apart[best] = false
	}
	for i, p := range parts {
		if !apart[i] {
			main = append(main, p)
			continue
		}
		a := Aside{SMILES: p.SMILES(), Atoms: members[i]}
		if e := entries[i]; e != nil {
			a.Name, a.Kind = e.nameOf(p), e.kind
		} else {
			a.Name = p.Formula()
		}
		aside = append(aside, a)
	}
	return main, aside
}

// CompanionName is the name under which the list of [SetAside] knows a molecule of one
// component, and whether it does.
func CompanionName(m *Molecule) (name string, kind AsideKind, ok bool) {
	if e := findCompanion(m); e != nil {
		return e.nameOf(m), e.kind, true
	}
	return "", Unlisted, false
}

// isInorganic tells whether the molecule has no carbon, and a metal or no multiple
// bond.
func (m *Molecule) isInorganic() bool {
	metal, multiple := false, false
	for i := range m.Atoms {
		if z := m.Atoms[i].Element; z == 6 || z == 0 {
			return false
		} else if IsMetal(z) {
			metal = true
		}
	}
	for i := range m.Bonds {
		multiple = multiple || m.Bonds[i].Order > 1
	}
	return metal || !multiple
}

// companion is an entry of the list.
type companion struct {
	name, smiles string
	kind         AsideKind
	cis, trans   string // names where the double bond tells, in place of name
	flat         string // canonical, without configuration
}

// nameOf is the name of a molecule that the entry fits.
func (c *companion) nameOf(m *Molecule) string {
	if c.cis != "" {
		for i := range m.Bonds {
			// The acid groups are the only substituents, so the references are theirs.
			switch m.Bonds[i].Geometry {
			case Together:
				return c.cis
			case Opposite:
				return c.trans
			}
		}
	}
	return c.name
}

// companionsByKey finds the entries by a fingerprint that is cheap to compute.
var companionsByKey = sync.OnceValue(func() map[uint64][]*companion {
	byKey := make(map[uint64][]*companion, len(companions))
	for i := range companions {
		c := &companions[i]
		m, err := ParseSMILES(c.smiles)
		if err != nil {
			panic("molecule: companion " + c.name + ": " + err.Error())
		}
		c.flat = m.FlatSMILES()
		k := m.fingerprint()
		byKey[k] = append(byKey[k], c)
	}
	return byKey
})

// largestCompanion is the number of atoms, hydrogens apart, of the largest entry.
const largestCompanion = 33

func findCompanion(m *Molecule) *companion {
	if len(m.Atoms) > largestCompanion {
		return nil
	}
	list := companionsByKey()[m.fingerprint()]
	if len(list) == 0 {
		return nil
	}
	flat := m.FlatSMILES()
	for _, c := range list {
		if c.flat == flat {
			return c
		}
	}
	return nil
}

// fingerprint depends on the kinds of atoms and their degrees, not on their order.
func (m *Molecule) fingerprint() uint64 {
	sum := uint64(len(m.Atoms))
	for i := range m.Atoms {
		a := &m.Atoms[i]
		x := uint64(a.Element) | uint64(a.Charge+16)<<8 | uint64(a.Hydrogens)<<16 | uint64(len(m.adjacency[i]))<<24 | uint64(a.Isotope)<<32
		// The finishing step of a 64-bit hash: multiply and fold.
		x *= 0x9e3779b97f4a7c15
		x ^= x >> 29
		x *= 0xbf58476d1ce4e5b9
		x ^= x >> 32
		sum += x
	}
	return sum
}

// companions lists common companions of organic structures (common practice of the
// trade; no single source).
var companions = []companion{
	// Cations.
	{name: "lithium", smiles: "[Li+]", kind: CounterIon},
	{name: "sodium", smiles: "[Na+]", kind: CounterIon},
	{name: "potassium", smiles: "[K+]", kind: CounterIon},
	{name: "rubidium", smiles: "[Rb+]", kind: CounterIon},
	{name: "caesium", smiles: "[Cs+]", kind: CounterIon},
	{name: "magnesium", smiles: "[Mg+2]", kind: CounterIon},
	{name: "calcium", smiles: "[Ca+2]", kind: CounterIon},
	{name: "strontium", smiles: "[Sr+2]", kind: CounterIon},
	{name: "barium", smiles: "[Ba+2]", kind: CounterIon},
	{name: "zinc", smiles: "[Zn+2]", kind: CounterIon},
	{name: "copper(I)", smiles: "[Cu+]", kind: CounterIon},
	{name: "copper(II)", smiles: "[Cu+2]", kind: CounterIon},
	{name: "silver", smiles: "[Ag+]", kind: CounterIon},
	{name: "iron(II)", smiles: "[Fe+2]", kind: CounterIon},
	{name: "iron(III)", smiles: "[Fe+3]", kind: CounterIon},
	{name: "manganese(II)", smiles: "[Mn+2]", kind: CounterIon},
	{name: "cobalt(II)", smiles: "[Co+2]", kind: CounterIon},
	{name: "nickel(II)", smiles: "[Ni+2]", kind: CounterIon},
	{name: "palladium(II)", smiles: "[Pd+2]", kind: CounterIon},
	{name: "aluminium", smiles: "[Al+3]", kind: CounterIon},
	{name: "bismuth(III)", smiles: "[Bi+3]", kind: CounterIon},
	{name: "proton", smiles: "[H+]", kind: CounterIon},
	{name: "oxonium", smiles: "[OH3+]", kind: CounterIon},
	{name: "ammonium", smiles: "[NH4+]", kind: CounterIon},
	{name: "methylammonium", smiles: "C[NH3+]", kind: CounterIon},
	{name: "dimethylammonium", smiles: "C[NH2+]C", kind: CounterIon},
	{name: "diethylammonium", smiles: "CC[NH2+]CC", kind: CounterIon},
	{name: "triethylammonium", smiles: "CC[NH+](CC)CC", kind: CounterIon},
	{name: "diisopropylethylammonium", smiles: "CC[NH+](C(C)C)C(C)C", kind: CounterIon},
	{name: "dicyclohexylammonium", smiles: "C1CCCCC1[NH2+]C1CCCCC1", kind: CounterIon},
	{name: "tert-butylammonium", smiles: "CC(C)(C)[NH3+]", kind: CounterIon},
	{name: "2-hydroxyethylammonium", smiles: "OCC[NH3+]", kind: CounterIon},
	{name: "tris(hydroxymethyl)methylammonium", smiles: "OCC(CO)(CO)[NH3+]", kind: CounterIon},
	{name: "choline", smiles: "C[N+](C)(C)CCO", kind: CounterIon},
	{name: "tetramethylammonium", smiles: "C[N+](C)(C)C", kind: CounterIon},
	{name: "tetraethylammonium", smiles: "CC[N+](CC)(CC)CC", kind: CounterIon},
	{name: "tetrabutylammonium", smiles: "CCCC[N+](CCCC)(CCCC)CCCC", kind: CounterIon},
	{name: "benzyltrimethylammonium", smiles: "C[N+](C)(C)Cc1ccccc1", kind: CounterIon},
	{name: "benzyltriethylammonium", smiles: "CC[N+](CC)(CC)Cc1ccccc1", kind: CounterIon},
	{name: "tetraphenylphosphonium", smiles: "c1ccc(cc1)[P+](c1ccccc1)(c1ccccc1)c1ccccc1", kind: CounterIon},
	{name: "tetrabutylphosphonium", smiles: "CCCC[P+](CCCC)(CCCC)CCCC", kind: CounterIon},
	{name: "pyridinium", smiles: "c1cc[nH+]cc1", kind: CounterIon},

	// Anions.
	{name: "fluoride", smiles: "[F-]", kind: CounterIon},
	{name: "chloride", smiles: "[Cl-]", kind: CounterIon},
	{name: "bromide", smiles: "[Br-]", kind: CounterIon},
	{name: "iodide", smiles: "[I-]", kind: CounterIon},
	{name: "triiodide", smiles: "I[I-]I", kind: CounterIon},
	{name: "tribromide", smiles: "Br[Br-]Br", kind: CounterIon},
	{name: "hydroxide", smiles: "[OH-]", kind: CounterIon},
	{name: "oxide", smiles: "[O-2]", kind: CounterIon},
	{name: "hydride", smiles: "[H-]", kind: CounterIon},
	{name: "amide", smiles: "[NH2-]", kind: CounterIon},
	{name: "sulfide", smiles: "[S-2]", kind: CounterIon},
	{name: "hydrogen sulfide", smiles: "[SH-]", kind: CounterIon},
	{name: "cyanide", smiles: "[C-]#N", kind: CounterIon},
	{name: "thiocyanate", smiles: "[S-]C#N", kind: CounterIon},
	{name: "cyanate", smiles: "[O-]C#N", kind: CounterIon},
	{name: "nitrate", smiles: "[O-][N+](=O)[O-]", kind: CounterIon},
	{name: "nitrite", smiles: "[O-]N=O", kind: CounterIon},
	{name: "sulfate", smiles: "[O-]S(=O)(=O)[O-]", kind: CounterIon},
	{name: "hydrogensulfate", smiles: "OS(=O)(=O)[O-]", kind: CounterIon},
	{name: "sulfite", smiles: "[O-]S(=O)[O-]", kind: CounterIon},
	{name: "hydrogensulfite", smiles: "OS(=O)[O-]", kind: CounterIon},
	{name: "thiosulfate", smiles: "[O-]S(=O)(=S)[O-]", kind: CounterIon},
	{name: "phosphate", smiles: "[O-]P(=O)([O-])[O-]", kind: CounterIon},
	{name: "hydrogenphosphate", smiles: "OP(=O)([O-])[O-]", kind: CounterIon},
	{name: "dihydrogenphosphate", smiles: "OP(=O)(O)[O-]", kind: CounterIon},
	{name: "carbonate", smiles: "[O-]C(=O)[O-]", kind: CounterIon},
	{name: "hydrogencarbonate", smiles: "OC(=O)[O-]", kind: CounterIon},
	{name: "perchlorate", smiles: "[O-]Cl(=O)(=O)=O", kind: CounterIon},
	{name: "perchlorate", smiles: "[O-][Cl+3]([O-])([O-])[O-]", kind: CounterIon},
	{name: "chlorate", smiles: "[O-]Cl(=O)=O", kind: CounterIon},
	{name: "hypochlorite", smiles: "[O-]Cl", kind: CounterIon},
	{name: "periodate", smiles: "[O-]I(=O)(=O)=O", kind: CounterIon},
	{name: "tetrafluoroborate", smiles: "F[B-](F)(F)F", kind: CounterIon},
	{name: "tetraphenylborate", smiles: "c1ccc(cc1)[B-](c1ccccc1)(c1ccccc1)c1ccccc1", kind: CounterIon},
	{name: "hexafluorophosphate", smiles: "F[P-](F)(F)(F)(F)F", kind: CounterIon},
	{name: "hexafluoroantimonate", smiles: "F[Sb-](F)(F)(F)(F)F", kind: CounterIon},
	{name: "hexafluorosilicate", smiles: "F[Si-2](F)(F)(F)(F)F", kind: CounterIon},
	{name: "tetrachlorozincate", smiles: "Cl[Zn-2](Cl)(Cl)Cl", kind: CounterIon},
	{name: "tetrachloroferrate", smiles: "Cl[Fe-](Cl)(Cl)Cl", kind: CounterIon},
	{name: "tetrachloroaluminate", smiles: "Cl[Al-](Cl)(Cl)Cl", kind: CounterIon},
	{name: "formate", smiles: "[O-]C=O", kind: CounterIon},
	{name: "acetate", smiles: "CC(=O)[O-]", kind: CounterIon},
	{name: "propionate", smiles: "CCC(=O)[O-]", kind: CounterIon},
	{name: "trifluoroacetate", smiles: "[O-]C(=O)C(F)(F)F", kind: CounterIon},
	{name: "trichloroacetate", smiles: "[O-]C(=O)C(Cl)(Cl)Cl", kind: CounterIon},
	{name: "pivalate", smiles: "CC(C)(C)C(=O)[O-]", kind: CounterIon},
	{name: "2-ethylhexanoate", smiles: "CCCCC(CC)C(=O)[O-]", kind: CounterIon},
	{name: "stearate", smiles: "CCCCCCCCCCCCCCCCCC(=O)[O-]", kind: CounterIon},
	{name: "lactate", smiles: "CC(O)C(=O)[O-]", kind: CounterIon},
	{name: "glycolate", smiles: "OCC(=O)[O-]", kind: CounterIon},
	{name: "oxalate", smiles: "[O-]C(=O)C(=O)[O-]", kind: CounterIon},
	{name: "hydrogenoxalate", smiles: "OC(=O)C(=O)[O-]", kind: CounterIon},
	{name: "malonate", smiles: "[O-]C(=O)CC(=O)[O-]", kind: CounterIon},
	{name: "succinate", smiles: "[O-]C(=O)CCC(=O)[O-]", kind: CounterIon},
	{name: "hydrogensuccinate", smiles: "OC(=O)CCC(=O)[O-]", kind: CounterIon},
	{name: "maleate or fumarate", cis: "maleate", trans: "fumarate", smiles: "[O-]C(=O)C=CC(=O)[O-]", kind: CounterIon},
	{name: "hydrogenmaleate or hydrogenfumarate", cis: "hydrogenmaleate", trans: "hydrogenfumarate", smiles: "OC(=O)C=CC(=O)[O-]", kind: CounterIon},
	{name: "malate", smiles: "[O-]C(=O)CC(O)C(=O)[O-]", kind: CounterIon},
	{name: "tartrate", smiles: "[O-]C(=O)C(O)C(O)C(=O)[O-]", kind: CounterIon},
	{name: "hydrogentartrate", smiles: "OC(=O)C(O)C(O)C(=O)[O-]", kind: CounterIon},
	{name: "citrate", smiles: "[O-]C(=O)CC(O)(CC(=O)[O-])C(=O)[O-]", kind: CounterIon},
	{name: "dihydrogencitrate", smiles: "OC(=O)CC(O)(CC(=O)O)C(=O)[O-]", kind: CounterIon},
	{name: "dihydrogencitrate", smiles: "OC(=O)CC(O)(CC(=O)[O-])C(=O)O", kind: CounterIon},
	{name: "gluconate", smiles: "OCC(O)C(O)C(O)C(O)C(=O)[O-]", kind: CounterIon},
	{name: "benzoate", smiles: "[O-]C(=O)c1ccccc1", kind: CounterIon},
	{name: "salicylate", smiles: "[O-]C(=O)c1ccccc1O", kind: CounterIon},
	{name: "picrate", smiles: "[O-]c1c(cc(cc1[N+](=O)[O-])[N+](=O)[O-])[N+](=O)[O-]", kind: CounterIon},
	{name: "mesylate", smiles: "CS(=O)(=O)[O-]", kind: CounterIon},
	{name: "esylate", smiles: "CCS(=O)(=O)[O-]", kind: CounterIon},
	{name: "isethionate", smiles: "OCCS(=O)(=O)[O-]", kind: CounterIon},
	{name: "triflate", smiles: "[O-]S(=O)(=O)C(F)(F)F", kind: CounterIon},
	{name: "bistriflimide", smiles: "FC(F)(F)S(=O)(=O)[N-]S(=O)(=O)C(F)(F)F", kind: CounterIon},
	{name: "besylate", smiles: "[O-]S(=O)(=O)c1ccccc1", kind: CounterIon},
	{name: "tosylate", smiles: "Cc1ccc(cc1)S(=O)(=O)[O-]", kind: CounterIon},
	{name: "camsylate", smiles: "CC1(C)C2CCC1(CS(=O)(=O)[O-])C(=O)C2", kind: CounterIon},
	{name: "methyl sulfate", smiles: "COS(=O)(=O)[O-]", kind: CounterIon},
	{name: "dodecyl sulfate", smiles: "CCCCCCCCCCCCOS(=O)(=O)[O-]", kind: CounterIon},
	{name: "methoxide", smiles: "C[O-]", kind: CounterIon},
	{name: "ethoxide", smiles: "CC[O-]", kind: CounterIon},
	{name: "tert-butoxide", smiles: "CC(C)(C)[O-]", kind: CounterIon},

	// Acids, as written in salts.
	{name: "hydrofluoride", smiles: "F", kind: SaltAcid},
	{name: "hydrochloride", smiles: "Cl", kind: SaltAcid},
	{name: "hydrobromide", smiles: "Br", kind: SaltAcid},
	{name: "hydroiodide", smiles: "I", kind: SaltAcid},
	{name: "sulfuric acid", smiles: "OS(=O)(=O)O", kind: SaltAcid},
	{name: "nitric acid", smiles: "O[N+](=O)[O-]", kind: SaltAcid},
	{name: "phosphoric acid", smiles: "OP(=O)(O)O", kind: SaltAcid},
	{name: "perchloric acid", smiles: "OCl(=O)(=O)=O", kind: SaltAcid},
	{name: "perchloric acid", smiles: "O[Cl+3]([O-])([O-])[O-]", kind: SaltAcid},
	{name: "carbonic acid", smiles: "OC(=O)O", kind: SaltAcid},
	{name: "boric acid", smiles: "OB(O)O", kind: SaltAcid},
	{name: "formic acid", smiles: "OC=O", kind: SaltAcid},
	{name: "acetic acid", smiles: "CC(=O)O", kind: SaltAcid},
	{name: "propionic acid", smiles: "CCC(=O)O", kind: SaltAcid},
	{name: "trifluoroacetic acid", smiles: "OC(=O)C(F)(F)F", kind: SaltAcid},
	{name: "trichloroacetic acid", smiles: "OC(=O)C(Cl)(Cl)Cl", kind: SaltAcid},
	{name: "stearic acid", smiles: "CCCCCCCCCCCCCCCCCC(=O)O", kind: SaltAcid},
	{name: "lactic acid", smiles: "CC(O)C(=O)O", kind: SaltAcid},
	{name: "oxalic acid", smiles: "OC(=O)C(=O)O", kind: SaltAcid},
	{name: "malonic acid", smiles: "OC(=O)CC(=O)O", kind: SaltAcid},
	{name: "succinic acid", smiles: "OC(=O)CCC(=O)O", kind: SaltAcid},
	{name: "maleic or fumaric acid", cis: "maleic acid", trans: "fumaric acid", smiles: "OC(=O)C=CC(=O)O", kind: SaltAcid},
	{name: "malic acid", smiles: "OC(=O)CC(O)C(=O)O", kind: SaltAcid},
	{name: "tartaric acid", smiles: "OC(=O)C(O)C(O)C(=O)O", kind: SaltAcid},
	{name: "citric acid", smiles: "OC(=O)CC(O)(CC(=O)O)C(=O)O", kind: SaltAcid},
	{name: "benzoic acid", smiles: "OC(=O)c1ccccc1", kind: SaltAcid},
	{name: "salicylic acid", smiles: "OC(=O)c1ccccc1O", kind: SaltAcid},
	{name: "mandelic acid", smiles: "OC(=O)C(O)c1ccccc1", kind: SaltAcid},
	{name: "picric acid", smiles: "Oc1c(cc(cc1[N+](=O)[O-])[N+](=O)[O-])[N+](=O)[O-]", kind: SaltAcid},
	{name: "methanesulfonic acid", smiles: "CS(=O)(=O)O", kind: SaltAcid},
	{name: "ethanesulfonic acid", smiles: "CCS(=O)(=O)O", kind: SaltAcid},
	{name: "trifluoromethanesulfonic acid", smiles: "OS(=O)(=O)C(F)(F)F", kind: SaltAcid},
	{name: "benzenesulfonic acid", smiles: "OS(=O)(=O)c1ccccc1", kind: SaltAcid},
	{name: "toluenesulfonic acid", smiles: "Cc1ccc(cc1)S(=O)(=O)O", kind: SaltAcid},
	{name: "camphorsulfonic acid", smiles: "CC1(C)C2CCC1(CS(=O)(=O)O)C(=O)C2", kind: SaltAcid},

	// Bases, as written in salts.
	{name: "ammonia", smiles: "N", kind: SaltBase},
	{name: "diethylamine", smiles: "CCNCC", kind: SaltBase},
	{name: "triethylamine", smiles: "CCN(CC)CC", kind: SaltBase},
	{name: "diisopropylethylamine", smiles: "CCN(C(C)C)C(C)C", kind: SaltBase},
	{name: "tert-butylamine", smiles: "CC(C)(C)N", kind: SaltBase},
	{name: "dicyclohexylamine", smiles: "C1CCCCC1NC1CCCCC1", kind: SaltBase},
	{name: "2-aminoethanol", smiles: "NCCO", kind: SaltBase},
	{name: "diethanolamine", smiles: "OCCNCCO", kind: SaltBase},
	{name: "tromethamine", smiles: "NC(CO)(CO)CO", kind: SaltBase},
	{name: "meglumine", smiles: "CNCC(O)C(O)C(O)C(O)CO", kind: SaltBase},
	{name: "ethylenediamine", smiles: "NCCN", kind: SaltBase},
	{name: "piperazine", smiles: "C1CNCCN1", kind: SaltBase},
	{name: "morpholine", smiles: "C1COCCN1", kind: SaltBase},
	{name: "pyridine", smiles: "c1ccncc1", kind: SaltBase},
	{name: "lysine", smiles: "NCCCCC(N)C(=O)O", kind: SaltBase},
	{name: "arginine", smiles: "NC(=N)NCCCC(N)C(=O)O", kind: SaltBase},

	// Solvents of crystallisation, and gases.
	{name: "water", smiles: "O", kind: Solvent},
	{name: "heavy water", smiles: "[2H]O[2H]", kind: Solvent},
	{name: "methanol", smiles: "CO", kind: Solvent},
	{name: "ethanol", smiles: "CCO", kind: Solvent},
	{name: "1-propanol", smiles: "CCCO", kind: Solvent},
	{name: "2-propanol", smiles: "CC(C)O", kind: Solvent},
	{name: "1-butanol", smiles: "CCCCO", kind: Solvent},
	{name: "tert-butanol", smiles: "CC(C)(C)O", kind: Solvent},
	{name: "ethylene glycol", smiles: "OCCO", kind: Solvent},
	{name: "propylene glycol", smiles: "CC(O)CO", kind: Solvent},
	{name: "glycerol", smiles: "OCC(O)CO", kind: Solvent},
	{name: "acetone", smiles: "CC(C)=O", kind: Solvent},
	{name: "butanone", smiles: "CCC(C)=O", kind: Solvent},
	{name: "ethyl acetate", smiles: "CCOC(C)=O", kind: Solvent},
	{name: "isopropyl acetate", smiles: "CC(C)OC(C)=O", kind: Solvent},
	{name: "acetonitrile", smiles: "CC#N", kind: Solvent},
	{name: "dimethylformamide", smiles: "CN(C)C=O", kind: Solvent},
	{name: "dimethylacetamide", smiles: "CN(C)C(C)=O", kind: Solvent},
	{name: "N-methylpyrrolidone", smiles: "CN1CCCC1=O", kind: Solvent},
	{name: "dimethyl sulfoxide", smiles: "CS(C)=O", kind: Solvent},
	{name: "dimethyl sulfoxide", smiles: "C[S+](C)[O-]", kind: Solvent},
	{name: "hexamethylphosphoramide", smiles: "CN(C)P(=O)(N(C)C)N(C)C", kind: Solvent},
	{name: "diethyl ether", smiles: "CCOCC", kind: Solvent},
	{name: "diisopropyl ether", smiles: "CC(C)OC(C)C", kind: Solvent},
	{name: "tert-butyl methyl ether", smiles: "COC(C)(C)C", kind: Solvent},
	{name: "1,2-dimethoxyethane", smiles: "COCCOC", kind: Solvent},
	{name: "tetrahydrofuran", smiles: "C1CCOC1", kind: Solvent},
	{name: "2-methyltetrahydrofuran", smiles: "CC1CCCO1", kind: Solvent},
	{name: "1,4-dioxane", smiles: "C1COCCO1", kind: Solvent},
	{name: "dichloromethane", smiles: "ClCCl", kind: Solvent},
	{name: "chloroform", smiles: "ClC(Cl)Cl", kind: Solvent},
	{name: "carbon tetrachloride", smiles: "ClC(Cl)(Cl)Cl", kind: Solvent},
	{name: "1,2-dichloroethane", smiles: "ClCCCl", kind: Solvent},
	{name: "pentane", smiles: "CCCCC", kind: Solvent},
	{name: "hexane", smiles: "CCCCCC", kind: Solvent},
	{name: "heptane", smiles: "CCCCCCC", kind: Solvent},
	{name: "cyclohexane", smiles: "C1CCCCC1", kind: Solvent},
	{name: "benzene", smiles: "c1ccccc1", kind: Solvent},
	{name: "toluene", smiles: "Cc1ccccc1", kind: Solvent},
	{name: "dinitrogen", smiles: "N#N", kind: Solvent},
	{name: "dihydrogen", smiles: "[H][H]", kind: Solvent},
	{name: "carbon dioxide", smiles: "O=C=O", kind: Solvent},
}
