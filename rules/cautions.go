package rules

import (
	"slices"

	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
	"lobecast/rules/agents"
)

// cautions are the hazards usually flagged; all are common practice, and none is a
// safety assessment.
var cautions = []Entry{
	{
		Code: "nitration-exotherm", Group: CautionGroup,
		Text:    "nitration is strongly exothermic and can run away; by-products with several nitro groups may be explosive: control addition and temperature, have the hazard review done before scale-up",
		Reason:  "heat of nitration and of dilution of the acid, autocatalysis by nitrogen oxides",
		Example: "mixed acid on phenols and anilines", Source: common,
		applies: func(s *Situation) bool {
			return s.incoming("nitration") && s.electrophilic() || s.nitrating()
		},
	},
	{
		Code: "polynitro", Group: CautionGroup,
		Text:   "two or more nitro groups in one molecule: treat as energetic; thermal analysis before it is dried, heated or distilled",
		Reason: "high decomposition energy", Example: "dinitrophenols, trinitroarenes", Source: common,
		applies: func(s *Situation) bool { return s.count("O=[N+]([O-])c") >= 2 || s.count("O=[N+]([O-])C") >= 2 },
	},
	{
		Code: "organic-azide", Group: CautionGroup,
		Text:   "azides are energetic and their salts toxic: no acid (hydrazoic acid), no heavy metals, no halogenated solvents, small carbon-to-nitrogen ratios not to be isolated",
		Reason: "loss of nitrogen with much heat", Example: "sodium azide and dichloromethane form diazidomethane", Source: common,
		applies: func(s *Situation) bool {
			return s.anywhere("[N-]=[N+]=N", "N=[N+]=[N-]", "N[N+]#N") || agentNamed(s, "sodium azide", "azide", "trimethylsilyl azide", "diphenylphosphoryl azide", "p-toluenesulfonyl azide", "tributyltin azide", "hydrazoic acid")
		},
	},
	{
		Code: "diazo", Group: CautionGroup,
		Text:   "diazo compounds and diazonium salts can detonate when concentrated, dried, heated or scratched; diazomethane is also very toxic",
		Reason: "loss of nitrogen", Example: "diazomethane; dry arenediazonium salts", Source: common,
		applies: func(s *Situation) bool {
			return s.anywhere("C=[N+]=[N-]", "[CH-][N+]#N", "[CH2-][N+]#N", "N#[N+]c") || s.agent(agents.Diazotizing) || agentNamed(s, "diazomethane", "trimethylsilyldiazomethane")
		},
	},
	{
		Code: "peroxide", Group: CautionGroup,
		Text:   "peroxides and peracids: explosive when concentrated or with metals; test and quench before work-up; ethers form them in air",
		Reason: "weak O–O bond", Example: "mCPBA, H2O2 with acetone", Source: common,
		applies: func(s *Situation) bool {
			return s.anywhere("COO", "C(=O)OO") || agentNamed(s, "hydrogen peroxide", "m-chloroperbenzoic acid", "tert-butyl hydroperoxide", "peracetic acid", "benzoyl peroxide")
		},
	},
	{
		Code: "ozonide", Group: CautionGroup,
		Text:   "ozone is poisonous, and ozonides and peroxides from it explode when concentrated or warmed: no accumulation, purge, quench with a reductant and test before work-up",
		Reason: "weak O–O bonds", Example: "ozonolysis of an alkene, solvent evaporated without a quench", Source: common,
		applies: func(s *Situation) bool { return agentNamed(s, "ozone") || s.has("O=[O+][O-]") },
	},
	{
		Code: "organolithium", Group: CautionGroup,
		Text:   "organolithium and Grignard reagents catch fire in air and react violently with water: inert gas, trained hands",
		Reason: "pyrophoric", Example: "tert-butyllithium", Source: common,
		applies: func(s *Situation) bool { return s.organometal() },
	},
	{
		Code: "metal-alkyl", Group: CautionGroup,
		Text:   "zinc and aluminium alkyls and alkylaluminium hydrides catch fire in air and react violently with water and alcohols: inert gas, trained hands, quench cold and slowly",
		Reason: "pyrophoric", Example: "diethylzinc, trimethylaluminium, DIBAL-H", Source: common,
		applies: func(s *Situation) bool {
			return agentNamed(s, metalAlkyls...) || agentNamed(s, "ethylaluminium dichloride", "diethylaluminium chloride", "diisobutylaluminium hydride")
		},
	},
	{
		Code: "halogenation", Group: CautionGroup,
		Text:   "halogens and N-halo compounds: toxic, corrosive, exothermic; N-halosuccinimides with DMF or amines can run away after an induction time",
		Reason: "oxidation of solvent or substrate", Example: "NBS in DMF on scale", Source: common,
		applies: func(s *Situation) bool {
			if s.delivers("chlorination", "bromination", "iodination", "fluorination") {
				return true
			}
			// A hydrogen halide adds as an acid; with an oxidant it makes the halogen.
			adds := s.event(terms.ElectrophilicAddition) && s.hydrogenHalide() && !s.agent(agents.Oxidant)
			return s.halogenation() && !adds
		},
	},
	{
		Code: "friedel-crafts", Group: CautionGroup,
		Text:   "aluminium chloride and acid chlorides give off HCl with much heat, above all at the quench: scrubber, slow addition to ice",
		Reason: "hydrolysis", Example: "quench of an AlCl3 complex", Source: common,
		applies: func(s *Situation) bool {
			friedelCrafts := s.incoming("acylation", "alkylation") || s.agent(agents.Acylating)
			return s.agent(agents.LewisAcid) && friedelCrafts && (agentNamed(s, "aluminium chloride", "ethylaluminium dichloride", "diethylaluminium chloride", "titanium tetrachloride", "tin tetrachloride", "boron trichloride") || s.acidChloride())
		},
	},
	{
		Code: "hydride", Group: CautionGroup,
		Text:   "metal hydrides give off hydrogen: NaH in DMF or DMSO can run away, LiAlH4 ignites with water",
		Reason: "hydrogen and heat", Example: "NaH in DMF above 50 °C", Source: common,
		applies: func(s *Situation) bool {
			return agentNamed(s, "sodium hydride", "potassium hydride", "hydride", "lithium aluminium hydride", "aluminium hydride", "borane", "diisobutylaluminium hydride", "Red-Al")
		},
	},
	{
		Code: "hydrogenation", Group: CautionGroup,
		Text:   "hydrogen and dry palladium or Raney nickel catalysts ignite in air: inert before opening, keep catalysts wet",
		Reason: "pyrophoric, flammable gas", Example: "filtering Pd/C dry", Source: common,
		applies: func(s *Situation) bool {
			return s.agent(agents.Hydrogen) || agentNamed(s, "palladium on carbon", "Raney nickel", "platinum oxide", "palladium hydroxide")
		},
	},
	{
		Code: "cyanide", Group: CautionGroup,
		Text:   "cyanides are deadly, and acid sets hydrogen cyanide free: alkaline work-up, second person, antidote plan under local rules",
		Reason: "toxicity", Example: "KCN with acid", Source: common,
		applies: func(s *Situation) bool {
			return s.has("BrC#N", "[CH]#N") || agentNamed(s, "sodium cyanide", "potassium cyanide", "cyanide", "trimethylsilyl cyanide", "copper(I) cyanide", "zinc cyanide", "hydrogen cyanide", "cyanogen bromide")
		},
	},
	{
		Code: "strong-alkylator", Group: CautionGroup,
		Text:   "methylating and alkylating agents (MeI, Me2SO4, MeOTf, chloromethyl ethers, benzyl halides) are toxic and often carcinogenic",
		Reason: "alkylation of tissue", Example: "dimethyl sulfate", Source: common,
		applies: func(s *Situation) bool {
			return s.agent(agents.Methylating) || agentNamed(s, "chloromethyl methyl ether", "SEM chloride", "benzyl bromide", "benzyl chloride")
		},
	},
	{
		Code: "strong-acid", Group: CautionGroup,
		Text:   "strong acids: heat of dilution, gas at neutralization; hydrofluoric acid needs its own first-aid measures",
		Reason: "corrosive, exothermic", Example: "quench of oleum", Source: common,
		applies: func(s *Situation) bool { return s.agent(agents.StrongAcid) },
	},
	{
		Code: "hydrofluoric-acid", Group: CautionGroup,
		Text:   "hydrogen fluoride and its amine complexes: burns that go deep and may hurt only hours later, poisoning through the skin; trained hands, never alone, calcium gluconate at hand, no glass; follow the safety data sheet",
		Reason: "fluoride binds calcium", Example: "HF·pyridine on a silyl ether", Source: common,
		applies: func(s *Situation) bool {
			return agentNamed(s, "hydrofluoric acid", "hydrogen fluoride pyridine", "triethylamine trihydrofluoride")
		},
	},
	{
		Code: "fuming-halide", Group: CautionGroup,
		Text:   "halides of boron, titanium and tin fume in air and react violently with water and alcohols, giving off hydrogen halide: inert gas, slow and cold quench, scrubber",
		Reason: "hydrolysis", Example: "quench of BBr3 or TiCl4", Source: common,
		applies: func(s *Situation) bool {
			return agentNamed(s, "boron tribromide", "boron trichloride", "boron trifluoride etherate", "titanium tetrachloride", "tin tetrachloride")
		},
	},
	{
		Code: "sulfur-fluoride", Group: CautionGroup,
		Text:   "DAST and like aminosulfur fluorides decompose violently when warmed, and give hydrogen fluoride with water: keep them cold, never distil or heat, quench with care",
		Reason: "decomposition and disproportionation with much heat", Example: "DAST above about 80 °C", Source: common,
		applies: func(s *Situation) bool {
			return agentNamed(s, "diethylaminosulfur trifluoride", "bis(2-methoxyethyl)aminosulfur trifluoride")
		},
	},
	{
		Code: "azodicarboxylate", Group: CautionGroup,
		Text:   "azodicarboxylates are sensitive to shock, light and heat, and irritant: not neat in quantity, not heated, as solution or a more stable analogue where possible",
		Reason: "loss of nitrogen", Example: "DEAD neat; Mitsunobu reactions on scale", Source: common,
		applies: func(s *Situation) bool {
			return agentNamed(s, "diethyl azodicarboxylate", "diisopropyl azodicarboxylate") || s.has("O=C(O)N=NC(=O)O")
		},
	},
	{
		Code: "dry-hydroxybenzotriazole", Group: CautionGroup,
		Text:   "HOBt and HOAt are explosive when dry: use the hydrate or a solution, no heating of the solid, watch waste that dries out",
		Reason: "loss of nitrogen", Example: "anhydrous HOBt", Source: common,
		applies: func(s *Situation) bool { return agentNamed(s, "1-hydroxybenzotriazole", "HOAt") },
	},
	{
		Code: "iodine-v-oxidant", Group: CautionGroup,
		Text:   "IBX and the Dess–Martin periodinane can explode on impact or when heated: no grinding, no heating of the solid, stabilized grades where possible",
		Reason: "energetic iodine(V) compounds", Example: "IBX above about 130 °C", Source: common,
		applies: func(s *Situation) bool { return agentNamed(s, "Dess–Martin periodinane", "2-iodoxybenzoic acid") },
	},
	{
		Code: "toxic-metal-oxidant", Group: CautionGroup,
		Text:   "lead, selenium, osmium and chromium(VI) compounds are very toxic, some carcinogenic, and OsO4 is volatile and harms the eyes: no dust or vapour, waste apart",
		Reason: "toxicity", Example: "Pb(OAc)4, SeO2, OsO4, K2Cr2O7", Source: common,
		applies: func(s *Situation) bool {
			return agentNamed(s, "lead tetraacetate", "selenium dioxide", "osmium tetroxide", "potassium dichromate", "sodium dichromate", "pyridinium dichromate", "pyridinium chlorochromate", "Jones reagent")
		},
	},
	{
		Code: "carbon-disulfide", Group: CautionGroup,
		Text:   "carbon disulfide catches fire on a steam line or a warm hotplate (autoignition near 100 °C) and is toxic: no hot surfaces, no open vessels, or another solvent",
		Reason: "very low flash and autoignition points", Example: "Friedel–Crafts acylation in CS2", Source: common,
		applies: func(s *Situation) bool { return agentNamed(s, "carbon disulfide") },
	},
	{
		Code: "organotin", Group: CautionGroup,
		Text:   "organotin compounds are toxic through skin and lungs and persist in waste: gloves, hood, waste apart, or a hydride free of tin",
		Reason: "toxicity", Example: "Bu3SnH, Bu3SnN3, stannanes in couplings", Source: common,
		applies: func(s *Situation) bool {
			return agentNamed(s, "tributyltin hydride", "tributyltin azide") || s.anywhere("C[Sn](C)(C)C")
		},
	},
	{
		Code: "alkali-metal", Group: CautionGroup,
		Text:   "alkali metals catch fire with water and alcohols, giving off hydrogen; liquid ammonia boils off in the hood: dry inert gas, quench with care once the metal is used up",
		Reason: "hydrogen and heat, toxic gas", Example: "Birch reduction: Na or Li in liquid NH3", Source: common,
		applies: func(s *Situation) bool { return agentNamed(s, "sodium", "lithium", "potassium") },
	},
	{
		Code: "nitroalkane-base", Group: CautionGroup,
		Text:   "nitromethane with bases or amines: the salts explode when dry, and the mixture is sensitive to shock and heat; small excess, no isolation of the salt, thermal analysis before scale-up",
		Reason: "energetic nitronates", Example: "nitromethane with NaOMe or with amines", Source: common,
		applies: func(s *Situation) bool {
			return (agentNamed(s, "nitromethane") || s.has("[CH3][N+](=O)[O-]")) && s.agent(agents.Base|agents.StrongBase)
		},
	},
	{
		Code: "toxic-solvent", Group: CautionGroup,
		Text:   "carbon tetrachloride and HMPA are toxic and suspected or known carcinogens: replace them where possible (HMPA by DMPU); CCl4 is restricted and reacts violently with metals and strong bases",
		Reason: "toxicity", Example: "CCl4 in a Wohl–Ziegler bromination", Source: common,
		applies: func(s *Situation) bool {
			return agentNamed(s, "carbon tetrachloride", "hexamethylphosphoramide")
		},
	},
	{
		Code: "cycloaddition-pressure", Group: CautionGroup,
		Text:   "cycloadditions of volatile or strained components: heat in closed vessels builds pressure, dienes and acrylates polymerize with much heat; inhibitor and relief",
		Reason: "exothermic addition and polymerization", Example: "butadiene or acrolein in a sealed tube", Source: common,
		applies: func(s *Situation) bool { return s.cycloaddition() && s.Activation != terms.Photochemical },
	},
	{
		Code: "oxidant", Group: CautionGroup,
		Text:   "strong oxidants with organic solvents: risk of fire and runaway; chromium and osmium compounds are very toxic",
		Reason: "oxidation", Example: "CrO3 added to acetone; OsO4 vapour", Source: common,
		applies: func(s *Situation) bool {
			return agentNamed(s, "Jones reagent", "osmium tetroxide", "potassium permanganate", "pyridinium chlorochromate", "ozone", "perchloric acid", "sodium chlorite", "potassium dichromate", "sodium dichromate", "pyridinium dichromate", "lithium perchlorate")
		},
	},
	{
		Code: "phosgene-type", Group: CautionGroup,
		Text:   "phosgene, triphosgene, thionyl and oxalyl chloride give off poisonous gases: hood, scrubber, detection",
		Reason: "toxic gases", Example: "SOCl2: SO2 and HCl", Source: common,
		applies: func(s *Situation) bool {
			return s.agent(agents.AcidChloride) || agentNamed(s, "phosgene", "triphosgene", "diphosgene", "phosphorus oxychloride", "phosphorus trichloride")
		},
	},
	{
		Code: "hydrazine", Group: CautionGroup,
		Text:   "hydrazine and hydroxylamine are toxic and energetic when concentrated or with metals",
		Reason: "decomposition", Example: "hydroxylamine free base", Source: common,
		applies: func(s *Situation) bool { return agentNamed(s, "hydrazine", "hydroxylamine") },
	},
	{
		Code: "snar-dmso-base", Group: CautionGroup,
		Text:   "strong bases with DMSO or DMF at high temperature decompose the solvent with heat; nitroarenes with base can run away",
		Reason: "base-catalysed decomposition", Example: "KOtBu in DMSO; nitroarenes with hydroxide at 150 °C", Source: common,
		applies: func(s *Situation) bool {
			return s.baseBesideMetal() && agentNamed(s, "dimethyl sulfoxide", "N,N-dimethylformamide")
		},
	},
	{
		Code: "nitrile-oxide-dipole", Group: CautionGroup,
		Text:   "nitrile oxides and diazo dipoles are made in place and used at once: concentrated solutions dimerize or decompose with heat",
		Reason: "energetic dipoles", Example: "acetonitrile oxide", Source: common,
		applies: func(s *Situation) bool { return s.cycloaddition() && s.has("[O-][N+]#C", "C=[N+]=[N-]") },
	},
	{
		Code: "n-nitro-nitroso", Group: CautionGroup,
		Text:   "N-nitroso compounds are carcinogenic and may form from secondary amines and nitrite or nitrogen oxides",
		Reason: "nitrosation", Example: "diethylamine and NaNO2 in acid", Source: common,
		applies: func(s *Situation) bool {
			return s.anywhere("O=NN(C)C", "O=NN(C)c") || s.agent(agents.Diazotizing) && s.has("C[NH]C", "C[NH]c")
		},
	},
}

func agentNamed(s *Situation, names ...string) bool {
	for _, a := range s.Agents {
		for _, n := range names {
			if a.Name == n {
				return true
			}
		}
	}
	return false
}

// metalAlkyls are alkyls of zinc and aluminium: they catch fire, yet take no hydrogen
// from a ring.
var metalAlkyls = []string{"diethylzinc", "dimethylzinc", "trimethylaluminium", "triethylaluminium"}

// organometal tells whether an agent is an organolithium or Grignard reagent or the like,
// other than an alkyl of zinc or aluminium.
func (s *Situation) organometal() bool {
	for _, a := range s.Agents {
		if a.Roles&agents.Organometal != 0 && !slices.Contains(metalAlkyls, a.Name) {
			return true
		}
	}
	return false
}

// hydrogenHalide tells whether a hydrogen halide is among the agents or the reactants.
func (s *Situation) hydrogenHalide() bool {
	return agentNamed(s, "hydrochloric acid", "hydrobromic acid", "hydriodic acid", "hydrofluoric acid", "hydrogen fluoride pyridine") ||
		s.has("[FH]", "[ClH]", "[BrH]", "[IH]")
}

// acidChloride tells whether an acid chloride is among the agents or the reactants.
func (s *Situation) acidChloride() bool {
	return s.has("ClC=O") || s.agent(agents.AcidChloride) || s.partnerHas(func(m *molecule.Molecule) bool { return holds(m, "ClC=O") })
}
