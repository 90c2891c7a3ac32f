package rules

import (
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
			return s.anywhere("[N-]=[N+]=N", "N=[N+]=[N-]", "N[N+]#N") || agentNamed(s, "sodium azide", "azide", "trimethylsilyl azide", "diphenylphosphoryl azide")
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
		Code: "organolithium", Group: CautionGroup,
		Text:   "organolithium and Grignard reagents catch fire in air and react violently with water: inert gas, trained hands",
		Reason: "pyrophoric", Example: "tert-butyllithium", Source: common,
		applies: func(s *Situation) bool { return s.agent(agents.Organometal) },
	},
	{
		Code: "halogenation", Group: CautionGroup,
		Text:   "halogens and N-halo compounds: toxic, corrosive, exothermic; N-halosuccinimides with DMF or amines can run away after an induction time",
		Reason: "oxidation of solvent or substrate", Example: "NBS in DMF on scale", Source: common,
		applies: func(s *Situation) bool {
			return s.halogenation() || s.delivers("chlorination", "bromination", "iodination", "fluorination")
		},
	},
	{
		Code: "friedel-crafts", Group: CautionGroup,
		Text:   "aluminium chloride and acid chlorides give off HCl with much heat, above all at the quench: scrubber, slow addition to ice",
		Reason: "hydrolysis", Example: "quench of an AlCl3 complex", Source: common,
		applies: func(s *Situation) bool {
			return s.agent(agents.LewisAcid) && (s.incoming("acylation", "alkylation") || s.agent(agents.Acylating))
		},
	},
	{
		Code: "hydride", Group: CautionGroup,
		Text:   "metal hydrides give off hydrogen: NaH in DMF or DMSO can run away, LiAlH4 ignites with water",
		Reason: "hydrogen and heat", Example: "NaH in DMF above 50 °C", Source: common,
		applies: func(s *Situation) bool {
			return agentNamed(s, "sodium hydride", "potassium hydride", "hydride", "lithium aluminium hydride", "aluminium hydride", "borane")
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
			return agentNamed(s, "sodium cyanide", "potassium cyanide", "cyanide", "trimethylsilyl cyanide", "copper(I) cyanide", "zinc cyanide")
		},
	},
	{
		Code: "strong-alkylator", Group: CautionGroup,
		Text:   "methylating and alkylating agents (MeI, Me2SO4, MeOTf, chloromethyl ethers, benzyl halides) are toxic and often carcinogenic",
		Reason: "alkylation of tissue", Example: "dimethyl sulfate", Source: common,
		applies: func(s *Situation) bool {
			return s.agent(agents.Methylating) || agentNamed(s, "chloromethyl methyl ether", "benzyl bromide", "benzyl chloride")
		},
	},
	{
		Code: "strong-acid", Group: CautionGroup,
		Text:   "strong acids: heat of dilution, gas at neutralization; hydrofluoric acid needs its own first-aid measures",
		Reason: "corrosive, exothermic", Example: "quench of oleum", Source: common,
		applies: func(s *Situation) bool { return s.agent(agents.StrongAcid) },
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
			return agentNamed(s, "Jones reagent", "osmium tetroxide", "potassium permanganate", "pyridinium chlorochromate", "ozone", "perchloric acid", "sodium chlorite")
		},
	},
	{
		Code: "phosgene-type", Group: CautionGroup,
		Text:   "phosgene, triphosgene, thionyl and oxalyl chloride give off poisonous gases: hood, scrubber, detection",
		Reason: "toxic gases", Example: "SOCl2: SO2 and HCl", Source: common,
		applies: func(s *Situation) bool {
			return s.agent(agents.AcidChloride) || agentNamed(s, "phosgene", "triphosgene", "phosphorus oxychloride", "phosphorus trichloride")
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
