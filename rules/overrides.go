package rules

import (
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/rules/agents"
)

// overrides are cases in which practice goes another way than the orbitals say.
var overrides = []Entry{
	{
		Code: "directed-metalation", Group: OverrideGroup,
		Text:    "an organometallic base with a directing group present: directed ortho-metalation decides the position, not the frontier orbitals",
		Reason:  "the base is bound by the directing group and takes the hydrogen beside it; the electrophile then meets a carbanion in the plane of the ring",
		Example: "N,N-diethylbenzamide, sBuLi, then DMF: ortho", Source: "Snieckus, Chem. Rev. 1990, 90, 879 (from memory)",
		applies: func(s *Situation) bool { return s.electrophilic() && s.organometal() },
	},
	{
		Code: "metal-catalysis", Group: OverrideGroup,
		Text:    "a transition-metal catalyst is among the agents: oxidative addition or C–H activation decides the position, not the frontier orbitals",
		Reason:  "the metal, its ligands and the carbon–halogen bond strengths set the order (C–I before C–Br before C–Cl)",
		Example: "5-bromo-2-chloropyridine with palladium reacts at C–Br, with an amine alone at C–Cl", Source: common,
		applies: func(s *Situation) bool {
			return (s.electrophilic() || s.nucleophilic()) && s.agent(agents.MetalCatalyst|agents.TransitionMetal)
		},
	},
	{
		Code: "radical-halogenation", Group: OverrideGroup,
		Text:    "a radical starter or light with a halogenating agent: a benzylic or allylic C–H is halogenated rather than the ring",
		Reason:  "hydrogen abstraction gives the stabilized radical; the ring is attacked by the polar reagent only",
		Example: "toluene, NBS, AIBN, CCl4: benzyl bromide; 4-methylanisole, NBS, MeCN: ring", Source: common,
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.agent(agents.RadicalStarter|agents.Light) && s.substrate("[CH3]c", "[CH2]c", "[CH3]C=C", "[CH2]C=C")
		},
	},
	{
		Code: "free-aniline-amide-first", Group: OverrideGroup,
		Text:    "a free NH2, NHR or OH meets an acylating agent first: N- or O-acylation comes before the ring",
		Reason:  "the lone pair on nitrogen or oxygen is the better nucleophile; the ring follows only under Lewis acid, after rearrangement or protection",
		Example: "aniline with acetyl chloride: acetanilide", Source: common,
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.incoming("acylation", "alkylation", "formylation", "sulfonylation") && s.substrate("[NH2]c", "[NH]([*])c", "[OH]c", "[NH2]C", "[OH]C") && !s.reimerTiemann()
		},
	},
	{
		Code: "friedel-crafts-basic-nitrogen", Group: OverrideGroup,
		Text:    "a basic nitrogen binds the Lewis acid of a Friedel–Crafts reaction: pyridines and free amines do not react, or react as deactivated complexes",
		Reason:  "complexation turns the donor into an acceptor and uses up the Lewis acid",
		Example: "pyridine is not acylated by AcCl/AlCl3", Source: common,
		applies: func(s *Situation) bool {
			if !s.electrophilic() || !s.incoming("acylation", "alkylation") {
				return false
			}
			if len(s.Site) > 0 {
				return s.siteHas(basicRing)
			}
			return s.has("n1ccccc1", "n1cnccc1", "[NH2]c", "CN(C)c", "c1cncs1")
		},
	},
	{
		Code: "friedel-crafts-deactivated", Group: OverrideGroup,
		Text:    "Friedel–Crafts reaction of a ring with a strong acceptor (NO2, CN, C=O, SO2R, CF3): usually fails, whatever site ranks first",
		Reason:  "the acylium ion is too weak an electrophile for a ring less reactive than a halobenzene",
		Example: "nitrobenzene is a solvent for Friedel–Crafts acylation", Source: common,
		applies: func(s *Situation) bool {
			if !s.electrophilic() || !s.incoming("acylation", "alkylation") {
				return false
			}
			if len(s.Site) > 0 {
				return s.siteHas(poorRing)
			}
			return s.substrate("O=[N+]([O-])c1ccccc1", "N#Cc1ccccc1", "O=S(=O)c1ccccc1", "FC(F)(F)c1ccccc1")
		},
	},
	{
		Code: "ipso-labile", Group: OverrideGroup,
		Text:    "a group that leaves easily as a cation (SiR3, SnR3, B(OR)2, CO2H, SO3H, tBu, I) sits on the ring: ipso replacement competes with C–H attack",
		Reason:  "attack at the substituted carbon gives a cation that loses the group instead of a proton",
		Example: "2,4,6-tri-tert-butylphenol and trimethylsilylarenes are substituted ipso; salicylic acids lose CO2 on nitration", Source: common,
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.substrate("[Si]c", "[Sn]c", "B(O)c", "[OH]C(=O)c1c([OH])cccc1", "[OH]S(=O)(=O)c", "CC(C)(C)c", "Ic")
		},
	},
	{
		Code: "carbonyl-before-ring", Group: OverrideGroup,
		Text:    "a nucleophile also meets a free aldehyde, ketone, acid chloride or anhydride: addition at C=O is usually faster than displacement on the ring",
		Reason:  "the carbonyl carbon is reached without loss of aromaticity",
		Example: "2-chloronicotinaldehyde with a primary amine: imine first", Source: common,
		applies: func(s *Situation) bool {
			return s.nucleophilic() && s.has("[CH]=O", "ClC=O", "O=C(C)C", "O=C1OC(=O)*=*1") && s.event(terms.NucleophilicSubstitution)
		},
	},
	{
		Code: "which-halide-fluoride", Group: OverrideGroup,
		Text:    "fluorine and another halogen compete: in addition–elimination F leaves much faster than Cl, Br and I at equally activated carbons",
		Reason:  "addition of the nucleophile is rate-determining, and fluorine stabilizes the adduct most",
		Example: "2,4-dinitrofluorobenzene reacts about 10³ times faster than the chloride", Source: common,
		applies: func(s *Situation) bool {
			return s.event(terms.NucleophilicSubstitution) && s.substrate("Fc") && s.substrate("Clc", "Brc", "Ic") &&
				(len(s.Site) == 0 || s.siteHas(mixedHalides))
		},
	},
	{
		Code: "unactivated-halide", Group: OverrideGroup,
		Text:    "no azine nitrogen and no strong acceptor ortho or para to a halogen: displacement without a metal is slow or does not occur",
		Reason:  "the adduct needs an acceptor to hold the charge",
		Example: "bromobenzene and morpholine: only with palladium or copper, or through the aryne", Source: common,
		applies: func(s *Situation) bool {
			if !s.event(terms.NucleophilicSubstitution) || len(s.Molecules) == 0 {
				return false
			}
			if len(s.Site) > 0 {
				return s.siteHas(unactivated)
			}
			return unactivatedHalides(s.Molecules[0])
		},
	},
	{
		Code: "leaving-sulfone-or-nitro", Group: OverrideGroup,
		Text:    "a sulfonyl, sulfinyl or nitro group sits at a carbon that is activated too: it leaves about as readily as a halide, often more so, and is not among the candidates",
		Reason:  "addition of the nucleophile is rate-determining, and these groups favour it; only halogens and the like are ranked as leaving groups",
		Example: "4-chloro-2-(methylsulfonyl)pyrimidine with an amine: the sulfinate leaves beside, or before, the chloride", Source: common,
		applies: func(s *Situation) bool {
			return s.event(terms.NucleophilicSubstitution) && len(s.Molecules) > 0 && leavesBeside(s.Molecules[0], s.Site)
		},
	},
	{
		Code: "aryne", Group: OverrideGroup,
		Text:    "an amide base with an unactivated aryl halide: elimination to the aryne, then addition to either end",
		Reason:  "the base takes the ortho hydrogen before it adds",
		Example: "chlorobenzene, NaNH2, NH3: aniline with scrambling", Source: "Roberts et al., J. Am. Chem. Soc. 1953, 75, 3290 (from memory)",
		applies: func(s *Situation) bool {
			if !s.event(terms.NucleophilicSubstitution) {
				return false
			}
			for _, a := range s.Agents {
				if a.Name == "sodium amide" || a.Name == "amide ion" || a.Roles&agents.Organometal != 0 && a.Roles&agents.StrongBase != 0 {
					return s.substrate("Clc1ccccc1", "Brc1ccccc1", "Fc1ccccc1", "Ic1ccccc1")
				}
			}
			return false
		},
	},
	{
		Code: "azole-nitrogen-first", Group: OverrideGroup,
		Text:    "an azole or indole N–H with base and an electrophile: alkylation and acylation go to nitrogen, not to carbon",
		Reason:  "the anion carries most charge on nitrogen; carbon attack needs magnesium or zinc as counter-ion, or no base",
		Example: "indole, NaH, MeI: N-methylindole; indole, MeMgBr, then MeI: 3-methylindole", Source: common,
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.agent(agents.Base|agents.StrongBase) && s.incoming("alkylation", "acylation", "sulfonylation", "") && s.substrate("[nH]")
		},
	},
	{
		Code: "pyridine-c-attack-at-n", Group: OverrideGroup,
		Text:    "a free azine nitrogen takes alkylating and acylating agents (and halogens) first: what reacts further is the azinium ion",
		Reason:  "the lone pair in the plane is the better nucleophile and is not part of the π system",
		Example: "pyridine and bromine: N-bromopyridinium", Source: common,
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.incoming("alkylation", "acylation", "formylation") && s.has("n1ccccc1", "n1cnccc1", "n1ccncc1")
		},
	},
	{
		Code: "enolate-c-or-o", Group: OverrideGroup,
		Text:    "an enolate can react at carbon or at oxygen: hard electrophiles and free (naked) enolates favour oxygen, soft ones and lithium enolates carbon",
		Reason:  "charge control at oxygen, frontier control at carbon",
		Example: "β-keto ester enolate: MeI at C, Me2SO4 in HMPA at O", Source: "Fleming, Molecular Orbitals and Organic Chemical Reactions (from memory)",
		applies: func(s *Situation) bool {
			return s.has("[O-]C=C", "O=C[CH2]C=O") && (s.electrophilic() || s.agent(agents.Base|agents.StrongBase))
		},
	},
	{
		Code: "acid-labile-ring", Group: OverrideGroup,
		Text:    "pyrroles, furans and indoles polymerize or open in strong acid: mixed acid, oleum and AlCl3 are not used on them",
		Reason:  "protonation at carbon gives an electrophile that attacks the next molecule",
		Example: "furan is nitrated with acetyl nitrate, not with HNO3/H2SO4", Source: common,
		applies: func(s *Situation) bool {
			return s.electrophilic() && (s.Medium == terms.Acidic || s.strongAcid() || s.agent(agents.Nitrating) && s.substrate("o1cccc1")) &&
				s.substrate("o1cccc1", "[nH]1cccc1", "Cn1cccc1") &&
				!s.substrate("O=Cc1[nH]ccc1", "O=Cc1occc1", "O=Cc1c[nH]cc1", "O=Cc1cocc1", "O=[N+]([O-])c1[nH]ccc1", "O=[N+]([O-])c1occc1", "O=Cn1cccc1", "O=S(=O)n1cccc1")
		},
	},
	{
		Code: "nitration-anilinium", Group: OverrideGroup,
		Text:    "an aniline in strong acid reacts partly as anilinium ion (meta) and partly as the free base (ortho, para): protect it as the amide, or expect both",
		Reason:  "the free amine is present in traces but far more reactive",
		Example: "aniline in mixed acid: about 47 % m-nitroaniline", Source: "Hoggett, Moodie, Penton & Schofield, Nitration and Aromatic Reactivity, 1971 (from memory)",
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.incoming("nitration") && s.substrate("[NH2]c1ccccc1", "[CH3][NH]c1ccccc1", "[CH2][NH]c1ccccc1", "[CH3]N([CH3])c1ccccc1", "[CH2]N([CH2])c1ccccc1")
		},
	},
	{
		Code: "free-base-coupling", Group: OverrideGroup,
		Text:    "azo coupling and nitrosation of anilines go in dilute acid on the free base, ortho and para (mostly para) to the amino group: the ranking of the protonated form does not hold",
		Reason:  "diazonium and nitrosonium ions are too weak for the anilinium ion; the little free amine reacts instead",
		Example: "N,N-dimethylaniline, NaNO2, HCl: the 4-nitroso compound", Source: common,
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.incoming("azo coupling", "nitrosation") && (s.Medium == terms.Acidic || s.agent(agents.Acid|agents.StrongAcid)) &&
				s.substrate("[NH2]c1ccccc1", "[CH3][NH]c1ccccc1", "[CH2][NH]c1ccccc1", "[CH3]N([CH3])c1ccccc1", "[CH2]N([CH2])c1ccccc1", "[CH2]N([CH3])c1ccccc1") &&
				!s.siteHas(besideAmine)
		},
	},
	{
		Code: "azine-hardly-attacked", Group: OverrideGroup,
		Text:    "an azine ring without a donor hardly takes electrophiles: pyridines need forcing conditions and give little, whatever site ranks first",
		Reason:  "acid or the Lewis acid makes the azinium ion, which reacts far more slowly than nitrobenzene",
		Example: "pyridine, KNO3, H2SO4, 300 °C: a few per cent of 3-nitropyridine", Source: common,
		applies: func(s *Situation) bool {
			if !s.electrophilic() || !s.incoming("nitration", "nitrosation", "azo coupling", "sulfonation", "chlorosulfonation", "formylation") {
				return false
			}
			if len(s.Site) > 0 {
				return s.siteHas(bareAzine)
			}
			return len(s.Molecules) > 0 && len(s.Molecules[0].RingSystems()) == 1 && s.substrate("n1ccccc1", "n1cnccc1", "n1ccncc1", "n1ncccc1") && onlyAzines(s.Molecules[0])
		},
	},
	{
		Code: "n-oxide-or-amine-oxidation", Group: OverrideGroup,
		Text:    "nitric acid and halogens also oxidize: free anilines, phenols, hydroquinones, thiols and sulfides may be oxidized rather than substituted",
		Reason:  "the HOMO is high enough for electron transfer",
		Example: "hydroquinone and HNO3: quinone; thioanisole and NCS: sulfoxide", Source: common,
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.incoming("nitration", "chlorination", "bromination") && s.substrate("[NH2]c1ccc([NH2])cc1", "[OH]c1ccc([OH])cc1", "[OH]c1c([OH])cccc1", "[SH]", "CSC", "CSc", "[NH2]c1ccc([OH])cc1")
		},
	},
	{
		Code: "sulfonation-reversible", Group: OverrideGroup,
		Text:    "sulfonation is reversible: hot acid gives the thermodynamic isomer, cold acid the kinetic one that is ranked here",
		Reason:  "the sulfonic acid group leaves by ipso protonation and the less hindered isomer wins",
		Example: "naphthalene: 1-sulfonic acid at 80 °C, 2-sulfonic acid at 160 °C", Source: "common practice; textbooks (from memory)",
		applies: func(s *Situation) bool { return s.electrophilic() && s.incoming("sulfonation") },
	},
	{
		Code: "addition-not-substitution", Group: OverrideGroup,
		Text:    "anthracene, phenanthrene, furan and benzofuran take halogens by addition; the substitution product comes after loss of HX, or not at all",
		Reason:  "the localized intermediate keeps one or more whole benzene rings",
		Example: "anthracene and Br2: 9,10-dibromide; furan and Br2 in methanol: 2,5-dimethoxy-2,5-dihydrofuran", Source: common,
		applies: func(s *Situation) bool {
			return s.halogenation() && s.substrate("c1ccc2cc3ccccc3cc2c1", "c1ccc2c(c1)ccc1ccccc12", "o1cccc1", "o1ccc2ccccc12")
		},
	},
	{
		Code: "hetero-ring-halogenation", Group: OverrideGroup,
		Text:    "halogenation of quinoline and isoquinoline without strong acid starts at nitrogen and ends on the hetero-ring (C-3 or C-4), not on the benzo ring",
		Reason:  "addition of halide to the N-halogenated ring, attack on the enamine formed, elimination",
		Example: "quinoline·Br2, heat: 3-bromoquinoline; quinoline, Br2, Ag2SO4, H2SO4: 5- and 8-bromoquinoline", Source: "Joule & Mills, Heterocyclic Chemistry (abstract seen)",
		applies: func(s *Situation) bool {
			return s.halogenation() && s.Medium != terms.Acidic && s.substrate("n1cccc2ccccc12", "c1nccc2ccccc12")
		},
	},
	{
		Code: "hard-nucleophile-azine", Group: OverrideGroup,
		Text:    "organolithium, amide ion and hydride reagents are held by the azine nitrogen and add at C-2, though C-4 may rank first",
		Reason:  "the metal coordinates nitrogen and delivers the nucleophile beside it",
		Example: "quinoline and NaNH2: 2-aminoquinoline; pyridinium and cyanide: C-4", Source: "Joule & Mills, Heterocyclic Chemistry (from memory)",
		applies: func(s *Situation) bool {
			return s.event(terms.NucleophilicAddition) && s.agent(agents.Organometal|agents.Hydride) && s.has("n1ccccc1", "n1cnccc1")
		},
	},
	{
		Code: "one-two-or-one-four", Group: OverrideGroup,
		Text:    "1,2- against 1,4-addition depends on the reagent: organolithiums and hydrides take C=O, cuprates, thiols, amines and stabilized carbanions the β carbon",
		Reason:  "charge control (hard) against frontier control (soft) and reversibility",
		Example: "cyclohexenone: MeLi at C-1, Me2CuLi at C-3", Source: "Fleming, Molecular Orbitals and Organic Chemical Reactions (from memory)",
		applies: func(s *Situation) bool { return s.event(terms.NucleophilicAddition) && s.has("O=CC=C") },
	},
	{
		Code: "chelation", Group: OverrideGroup,
		Text:    "a donor two or three atoms from the site can hold the nitronium ion, metal or Lewis acid and raise the share of the ortho product",
		Reason:  "delivery from the complex; medium-dependent",
		Example: "benzyl methyl ether, acetyl nitrate: 51 % ortho", Source: "Carey & Sundberg, Part A, 5th ed., Table 9.3 (seen)",
		applies: func(s *Situation) bool {
			return s.electrophilic() && s.incoming("nitration", "acylation", "chlorination") && s.substrate("CO[CH2]c", "[OH][CH2]c", "COC(=O)c", "NC(=O)c")
		},
	},
	{
		Code: "blocked-site", Group: OverrideGroup,
		Text:    "the site ranked or intended lies beside a quaternary group (tBu, SiR3, CR3): steric hindrance beyond the counted terms",
		Reason:  "the approach above the plane is blocked",
		Example: "tert-butylbenzene nitration: ortho 4.5, para 75 (partial rate factors)", Source: "Knowles, Norman & Radda, J. Chem. Soc. 1960 (from memory)",
		applies: func(s *Situation) bool { return s.electrophilic() && s.siteHas(bulkyBeside) },
	},
	{
		Code: "between-two-groups", Group: OverrideGroup,
		Text:    "the site lies between two substituents: such positions are seldom the main product unless all others are taken",
		Reason:  "both ortho groups hinder; the steric terms count them only roughly",
		Example: "1,3-dimethoxybenzene: 4, not 2", Source: common,
		applies: func(s *Situation) bool {
			return s.event(terms.ElectrophilicSubstitution) && s.siteHas(func(m *molecule.Molecule, a int) bool { return m.Atoms[a].Hydrogens > 0 && betweenTwo(m, a) })
		},
	},
	{
		Code: "azide-alkyne-copper", Group: OverrideGroup,
		Text:    "azide and alkyne with copper: the 1,4-triazole forms whatever the frontier orbitals say; with ruthenium the 1,5-isomer",
		Reason:  "a copper acetylide, not the alkyne, reacts",
		Example: "phenyl azide, phenylacetylene, CuSO4/ascorbate: 1,4-diphenyltriazole", Source: common,
		applies: func(s *Situation) bool {
			return s.cycloaddition() && s.agent(agents.TransitionMetal|agents.MetalCatalyst) && s.has("[N-]=[N+]=N", "N=[N+]=[N-]")
		},
	},
}
