package rules

import (
	"lobecast/frontier"
	"lobecast/frontier/terms"
	"lobecast/rules/agents"
)

// limits are blind spots of a π-electron model that a structure or a step shows.
var limits = []Entry{
	{
		Code: "kinetic-only", Group: OutsideGroup,
		Text:    "acylation and alkylation of naphthalene-type rings can turn with solvent and time: only the first, kinetic attack is ranked",
		Reason:  "reversibility and the size of the complex move it to the β position",
		Example: "naphthalene, AcCl, AlCl3: α in CS2, β in nitrobenzene", Source: common,
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.incoming("acylation", "alkylation", "sulfonation") && s.substrate("c1ccc2ccccc2c1")
		},
	},
	{
		Code: "sigma-acceptors", Group: OutsideGroup,
		Text:    "CF3, NR3+, SR2+ and sulfonyl groups act through the σ frame: the model holds them as a shift of the attached carbon only",
		Reason:  "they have no p orbital of their own in the conjugated system",
		Example: "trifluoromethylbenzene nitrates meta by field effect", Source: "Carey & Sundberg, Part A, 5th ed., Table 9.2 (seen)",
		applies: func(s *Situation) bool {
			return (s.electrophilic() || s.nucleophilic()) && s.substrate("FC(F)(F)c", "C[N+](C)(C)c", "O=S(=O)(C)c", "O=S(=O)(N)c", "O=S(=O)(c)c")
		},
	},
	{
		Code: "halobenzene-rate", Group: OutsideGroup,
		Text:    "halogens look activating to a π model: sites within a halobenzene are ranked, its rate against benzene is not",
		Reason:  "σ withdrawal lowers the rate to 0.03–0.15 of benzene",
		Example: "chlorobenzene nitration, 0.033 of benzene", Source: "Carey & Sundberg, Part A, 5th ed. (seen)",
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.substrate("Fc1ccccc1", "Clc1ccccc1", "Brc1ccccc1", "Ic1ccccc1")
		},
	},
	{
		Code: "twisted-biaryl", Group: OutsideGroup,
		Text:    "a biaryl or styrene with ortho groups is not planar: state the angle with --twist if it matters",
		Reason:  "resonance across the bond falls with the cosine of the angle",
		Example: "2,6-dimethylbiphenyl, about 70°", Source: common,
		applies: func(s *Situation) bool {
			for i, m := range s.Molecules {
				var stated []frontier.Twist
				if i < len(s.Twists) {
					stated = s.Twists[i]
				}
				if twistedBiaryl(m, stated) {
					return true
				}
			}
			return false
		},
	},
	{
		Code: "strained-ring", Group: OutsideGroup,
		Text:    "a small ring fused to the arene strains its bonds: positions beside it (α) lose, the next (β) gain, which the model does not see",
		Reason:  "rehybridization at the fusion carbons (Mills–Nixon type effect)",
		Example: "biphenylene reacts at C-2; benzocyclobutene at C-4", Source: "Taylor, J. Chem. Soc. B 1971, 536 (seen)",
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.substrate("C1Cc2ccccc12", "c1ccc2c(c1)-c1ccccc1-2")
		},
	},
	{
		Code: "lewis-acid-complex", Group: OutsideGroup,
		Text:    "a Lewis acid binds carbonyl, nitrile and amine groups: what is attacked is the complex; the ranking is of the free molecule",
		Reason:  "complexation lowers all levels and changes the order of the acceptor positions",
		Example: "thiophene-2-carbaldehyde with AlCl3: C-4; N-sulfonylpyrrole: C-3 with AlCl3, C-2 with BF3", Source: "Joule & Mills (from memory)",
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.agent(agents.LewisAcid) && s.substrate("O=C", "N#C", "O=Cc")
		},
	},
	{
		Code: "desymmetry-of-medium", Group: OutsideGroup,
		Text:    "solvent and counter-ion are not modelled beyond neutral and acidic",
		Reason:  "hydrogen bonds to acceptors and ion pairs change charges by more than most substituents",
		Example: "fluoronitrobenzenes: ortho/para ratio in polar and apolar solvents", Source: common,
		applies: func(s *Situation) bool {
			return s.event(terms.NucleophilicSubstitution) && s.substrate("O=[N+]([O-])c1c(F)cccc1", "O=[N+]([O-])c1c(Cl)cccc1") && !s.substrate("n")
		},
	},
	{
		Code: "nucleophile-size", Group: OutsideGroup,
		Text:    "a hindered amine or alkoxide prefers the more open of two activated carbons: only ortho groups of the ring are counted",
		Reason:  "the size of the nucleophile does not enter the fit",
		Example: "2,4-dichloropyrimidine: C-4 with amines, more C-2 with bulky ones", Source: common,
		applies: func(s *Situation) bool {
			return s.event(terms.NucleophilicSubstitution) && s.has("CC([NH2])(C)C", "CC([NH]C)C", "CC([NH]C(C)C)C", "CC(C)([O-])C", "CC(C)([OH])C") && s.substrate("Clc1nc(Cl)ncc1", "Clc1nc(Cl)ccn1")
		},
	},
	{
		Code: "soft-sulfur", Group: OutsideGroup,
		Text:    "thiolates can react by electron transfer (S_RN1) and reversibly: the position may differ from that of amines",
		Reason:  "a soft, easily oxidized nucleophile",
		Example: "iodoarenes and thiolates under light", Source: common,
		applies: func(s *Situation) bool { return s.event(terms.NucleophilicSubstitution) && s.Nucleophile == "S" },
	},
	{
		Code: "ambident-azole", Group: OutsideGroup,
		Text:    "an azole as nucleophile has two or three nitrogens: which of them binds is not ranked",
		Reason:  "sterics and the counter-ion decide between N-1 and N-2 (N-1 and N-3)",
		Example: "indazole with 2-chloropyrimidine: N-1 and N-2", Source: common,
		applies: func(s *Situation) bool {
			for i, m := range s.Molecules {
				if i > 0 && s.nucleophilic() && holds(m, "[nH]1nccc1", "[nH]1cncc1", "[nH]1nncc1", "[nH]1ncnc1", "[nH]1nnnc1") {
					return true
				}
			}
			return false
		},
	},
	{
		Code: "tautomers", Group: OutsideGroup,
		Text:    "hydroxyazines are mostly pyridone-type NH tautomers: give the structure of the form that reacts",
		Reason:  "only the fast NH tautomers of azoles are averaged",
		Example: "4-hydroxyquinoline: the cation nitrates at 6, the neutral quinolone at 3", Source: "J. Chem. Soc. B 1971, 1493 (seen)",
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.substrate("[OH]c1ncccc1", "[OH]c1ccncc1", "[OH]c1ncncc1", "[OH]c1ncccn1")
		},
	},
	{
		Code: "polyhalogen-order", Group: OutsideGroup,
		Text:    "in polyfluoroarenes a fluorine ortho or meta to the attacked carbon activates it, para deactivates: σ effects that the π terms hold only in part",
		Reason:  "repulsion of the fluorine lone pairs with the adduct's charge",
		Example: "pentafluoropyridine: C-4; pentafluoronitrobenzene: para to NO2", Source: "activation order meta > ortho > para to the attacked carbon (seen)",
		applies: func(s *Situation) bool { return s.nucleophilic() && s.count("Fc") >= 3 && !s.substrate("FC(F)(F)c") },
	},
	{
		Code: "minisci", Group: OutsideGroup,
		Text:    "radical substitution of azines in acid (Minisci): alkyl and acyl radicals are nucleophilic and take the α and γ carbons (C-2, C-4) of the protonated ring whatever the radical index says; solvent and acid move one against the other",
		Reason:  "the polarity of the radical is not in the index; addition is reversible, loss of a proton the slow step",
		Example: "quinoline: C-2 or C-4 by solvent", Source: "Thieme 10.1055/s-0040-1707888 (seen)",
		applies: func(s *Situation) bool {
			return s.event(terms.RadicalSubstitution) && s.substrate("n1ccccc1", "n1cccc2ccccc12", "n1cnccc1")
		},
	},
	{
		Code: "n-silyl-pyrrole", Group: OutsideGroup,
		Text:    "a bulky N-silyl group (TIPS) on a pyrrole or indole shields C-2: electrophiles go to C-3 of the pyrrole; the steric terms hold this only in part",
		Reason:  "the size of the silyl group is counted by few outcomes",
		Example: "N-TIPS-pyrrole and NBS: C-3", Source: "Joule & Mills, Heterocyclic Chemistry (from memory); a sure miss of the record",
		applies: func(s *Situation) bool { return s.electrophilic() && s.substrate("[Si]n1cccc1") },
	},
	{
		Code: "copper-ortho-benzoate", Group: OutsideGroup,
		Text:    "a halogen ortho to a carboxylate is displaced by copper (Ullmann–Goldberg type) before one that the π model ranks higher",
		Reason:  "the carboxylate holds the copper beside the halogen; recorded reagents often leave the copper out",
		Example: "2,4-dichlorobenzoic acid, aniline, copper: at C-2", Source: "common practice; sure misses of the record",
		applies: func(s *Situation) bool {
			return s.event(terms.NucleophilicSubstitution) && s.substrate("[OH]C(=O)c1c(Cl)cccc1", "[OH]C(=O)c1c(Br)cccc1", "[OH]C(=O)c1c(F)cccc1", "[O-]C(=O)c1c(Cl)cccc1", "[O-]C(=O)c1c(Br)cccc1")
		},
	},
	{
		Code: "o-protonated-quinolone", Group: OutsideGroup,
		Text:    "quinolones and pyridones are protonated at oxygen in strong acid: the cation reacts at other positions than the form that is computed",
		Reason:  "only protonation at nitrogen is modelled",
		Example: "4-quinolone: neutral at C-3, cation at C-6 and C-8", Source: "J. Chem. Soc. B 1971, 1493 (seen); sure misses of the record",
		applies: func(s *Situation) bool {
			return s.electrophilic() && (s.Medium == terms.Acidic || s.incoming("nitration")) && s.substrate("O=c1cc[nH]c2ccccc12", "O=c1ccc2ccccc2[nH]1", "O=c1cccc[nH]1", "O=c1cc[nH]cc1")
		},
	},
	{
		Code: "pyrone-benzo-ring", Group: OutsideGroup,
		Text:    "coumarins and chromones in strong acid are attacked on the benzo ring (nitration: C-6 of both), not on the pyrone ring that ranks first",
		Reason:  "the carbonyl oxygen is protonated and the pyrone ring of the cation is poor in electrons; only protonation at nitrogen is modelled",
		Example: "coumarin, HNO3, H2SO4: 6-nitrocoumarin; chromone: 6-nitrochromone", Source: common,
		applies: func(s *Situation) bool {
			acid := s.Medium == terms.Acidic || s.strongAcid() || s.incoming("nitration", "sulfonation", "chlorosulfonation")
			if !s.electrophilic() || !acid || len(s.Molecules) == 0 {
				return false
			}
			if len(s.Site) > 0 {
				return s.siteHas(pyroneRing)
			}
			return s.substrate("O=c1ccc2ccccc2o1", "O=c1ccoc2ccccc12", "O=C1C=COc2ccccc12", "O=C1C=Cc2ccccc2O1")
		},
	},
	{
		Code: "friedel-crafts-rearrangement", Group: OutsideGroup,
		Text:    "Friedel–Crafts alkylation with a primary or a longer secondary alkyl halide or alcohol: the carbocation rearranges, and the branched isomer is often the main product",
		Reason:  "hydride and alkyl shifts are faster than attack on the arene; the chain that comes in is taken as it is written",
		Example: "benzene, 1-chloropropane, AlCl3: cumene beside propylbenzene", Source: common,
		applies: func(s *Situation) bool {
			return s.friedelCraftsAlkylation() && s.partnerHas(rearranges)
		},
	},
	{
		Code: "over-alkylation", Group: OutsideGroup,
		Text:    "Friedel–Crafts alkylation does not stop: the product is more reactive than the arene, and isomers equilibrate with time; only the first, kinetic attack is ranked",
		Reason:  "an alkyl group is a donor, and alkylation is reversible under Lewis acid",
		Example: "benzene, chloroethane, AlCl3: di- and polyethylbenzenes unless benzene is in excess", Source: common,
		applies: func(s *Situation) bool { return s.friedelCraftsAlkylation() },
	},
	{
		Code: "reimer-tiemann", Group: OutsideGroup,
		Text:    "phenols with chloroform and hydroxide (Reimer–Tiemann) are formylated mainly ortho to the oxygen, where para ranks first",
		Reason:  "dichlorocarbene meets the phenoxide as an ion pair, held beside the oxygen",
		Example: "phenol, CHCl3, NaOH: salicylaldehyde", Source: common,
		applies: func(s *Situation) bool { return s.reimerTiemann() },
	},
	{
		Code: "metal-diels-alder", Group: OutsideGroup,
		Text:    "unactivated alkynes and dienes are often joined by cobalt, rhodium or nickel: the metal's orientation is not that of the frontier orbitals",
		Reason:  "the collection behind the fit does not record catalysts of cycloadditions",
		Example: "isoprene and phenylacetylene with cobalt", Source: "sure misses of the record",
		applies: func(s *Situation) bool { return s.cycloaddition() && s.has("[CH]#Cc") && !s.dipole() },
	},
	{
		Code: "cyclopropylidene-diene", Group: OutsideGroup,
		Text:    "a diene that ends in a cyclopropylidene is bent by the strain of the three-ring: its orientation is often the other one",
		Reason:  "the strained end reacts by its σ bonds too, which the π model does not see",
		Example: "vinylidenecyclopropane-type dienes with acrylates", Source: "sure misses of the record",
		applies: func(s *Situation) bool {
			return s.cycloaddition() && s.has("C=CC=C1CC1", "C=CC(C)=C1CC1", "C=C(C)C=C1CC1", "C=C(c)C=C1CC1", "C=C(C)C(C)=C1CC1", "C=C(c)C(C)=C1CC1")
		},
	},
	{
		Code: "endo-caveat", Group: OutsideGroup,
		Text:    "endo preference is a rule for cyclic and strongly conjugated dienophiles: simple ones (acrolein, acrylates, acrylonitrile) are often near 1:1",
		Reason:  "secondary overlap is small beside sterics and solvent",
		Example: "butadiene-d and methyl acrylate, about 1:1", Source: "Lording et al., Chem. Sci. 2020, d0sc04553e (seen)",
		applies: func(s *Situation) bool {
			return s.cycloaddition() && s.has("C=CC=O", "C=CC#N", "C=C[N+](=O)[O-]") && !s.dipole()
		},
	},
	{
		Code: "dipolar-sterics", Group: OutsideGroup,
		Text:    "in 1,3-dipolar additions a substituent at the β carbon of the dipolarophile can turn the orientation by size alone",
		Reason:  "both frontier interactions are weak and nearly balanced",
		Example: "nitrile oxides with acrylate 5-, with crotonate mixed", Source: "Huisgen series (abstracts seen)",
		applies: func(s *Situation) bool {
			return s.cycloaddition() && s.has("[O-][N+]#C", "[N-]=[N+]=N", "N=[N+]=[N-]", "[O-][N+]=C", "C=[N+]=[N-]", "[CH-][N+]#N") && s.has("CC=CC=O", "CC#CC=O", "c1ccccc1C=CC=O")
		},
	},
	{
		Code: "stepwise-cycloaddition", Group: OutsideGroup,
		Text:    "with very strong donors and acceptors the addition may be stepwise (zwitterion): configuration need not be kept",
		Reason:  "one bond forms long before the other",
		Example: "enamines with nitroalkenes; tetracyanoethylene with enol ethers", Source: common,
		applies: func(s *Situation) bool {
			return s.cycloaddition() && s.has("CN(C)C=C", "CN(C)C=CC", "C1CCCN1C=C") && s.has("C=C[N+](=O)[O-]", "N#CC(C#N)=C")
		},
	},
	{
		Code: "photo-stepwise", Group: OutsideGroup,
		Text:    "photochemical [2+2] of enones and the Paternò–Büchi reaction go through triplets, in steps: head-to-tail against ground-state matching",
		Reason:  "symmetry rules hold for concerted singlet processes only",
		Example: "cyclohexenone and isobutene: head-to-tail", Source: "Corey et al. 1964 (from memory)",
		applies: func(s *Situation) bool {
			return s.Activation == terms.Photochemical && s.has("O=CC=C", "O=C(c)c", "O=C(C)C")
		},
	},
	{
		Code: "allowed-not-fast", Group: OutsideGroup,
		Text:    "allowed does not mean fast and forbidden does not mean impossible: strain, torquoselectivity and stepwise paths are not in the rule",
		Reason:  "orbital symmetry speaks of the concerted path only",
		Example: "Dewar benzene opens in days although forbidden", Source: "Woodward & Hoffmann 1970 (from memory)",
		applies: func(s *Situation) bool { return s.pericyclic() },
	},
	{
		Code: "thermodynamic-electrocyclic", Group: OutsideGroup,
		Text:    "the direction of an electrocyclic reaction is set by strain and bond energies, not by symmetry",
		Reason:  "symmetry decides the mode, the σ bonds decide the equilibrium",
		Example: "cyclobutene opens, hexatriene closes", Source: common,
		applies: func(s *Situation) bool { return s.Kind == terms.Electrocyclic },
	},
	{
		Code: "charged-substrate", Group: OutsideGroup,
		Text:    "a charged substrate: attraction or repulsion of a charged reagent acts at every site and is not in the indices",
		Reason:  "Coulomb terms between reagent and substrate are left out",
		Example: "phenoxide ortho attack by metal-held electrophiles", Source: common,
		applies: func(s *Situation) bool {
			if len(s.Molecules) == 0 || s.cycloaddition() || s.pericyclic() {
				return false
			}
			q := 0
			for _, a := range s.Molecules[0].Atoms {
				q += a.Charge
			}
			return q != 0
		},
	},
	{
		Code: "organometallic-substrate", Group: OutsideGroup,
		Text:    "boronic acids, stannanes and silanes are usually meant for coupling: the carbon–metalloid bond reacts first with many electrophiles",
		Reason:  "ipso attack and transmetallation",
		Example: "arylboronic acid and NBS: aryl bromide", Source: common,
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.substrate("[OH]B([OH])c", "CC1(C)OB(c)OC1(C)C", "[Sn]c")
		},
	},
	{
		Code: "degenerate-frontier", Group: OutsideGroup,
		Text:    "no ring carbon carries a group that lifts the degeneracy: the frontier densities of this molecule are averages over a shell",
		Reason:  "benzene, triphenylene and coronene have degenerate frontier levels",
		Example: "triphenylene: nitration 1 and 2 alike", Source: "Taylor 1977 (abstract seen)",
		applies: func(s *Situation) bool { return s.electrophilic() && s.substrate("c1ccc2c(c1)c1ccccc1c1ccccc21") },
	},
}
