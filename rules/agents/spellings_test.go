package agents

import (
	"strings"
	"testing"
)

// Notebook lines and the agents they name, in order; common practice (no source).
func TestNotebookLines(t *testing.T) {
	for _, row := range []struct{ text, names string }{
		{"Br2 (1.05 equiv), AcOH, rt, 3 h", "bromine|acetic acid"},
		{"mCPBA, CH2Cl2, 0 °C → rt", "m-chloroperbenzoic acid|dichloromethane"},
		{"TFA/DCM 1:1", "trifluoroacetic acid|dichloromethane"},
		{"TFA/CH2Cl2 (1:1, v/v), rt, 2h", "trifluoroacetic acid|dichloromethane"},
		{"Pd2(dba)3, XPhos, Cs2CO3, PhMe, 110 °C", "tris(dibenzylideneacetone)dipalladium|XPhos|cesium carbonate|toluene"},
		{"Pd(OAc)2 (5 mol%), SPhos (10 mol%), K3PO4 (2.0 equiv), PhMe/H2O (10:1), 100 °C, 16 h", "palladium(II) acetate|SPhos|potassium phosphate|toluene|water"},
		{"Pd(dppf)Cl2·CH2Cl2, 2M aq. Na2CO3, dioxane, 90 °C, o/n", "Pd(dppf)Cl2|sodium carbonate|1,4-dioxane"},
		{"H2 (1 atm), 10% Pd/C, MeOH", "hydrogen|palladium on carbon|methanol"},
		{"H2, Pd/C (10 wt%), EtOAc, 50 psi", "hydrogen|palladium on carbon|ethyl acetate"},
		{"n-BuLi (2.5 M in hexanes), THF, −78 °C, 1 h; then CO2", "n-butyllithium|tetrahydrofuran|carbon dioxide"},
		{"NaH (60% in mineral oil), DMF, 0 °C; MeI", "sodium hydride|N,N-dimethylformamide|methyl iodide"},
		{"LiOH·H2O, THF/MeOH/H2O 3:1:1, rt", "lithium hydroxide|tetrahydrofuran|methanol|water"},
		{"K2CO3, DMF, 60oC, 12h", "potassium carbonate|N,N-dimethylformamide"},
		{"HNO3/H2SO4, 0 °C, 30 min", "nitric acid|sulfuric acid"},
		{"fuming HNO3, c. H2SO4, –10 °C to 0 °C", "nitric acid|sulfuric acid"},
		{"HNO3 (70%), Ac2O, −20 °C", "nitric acid|acetic anhydride"},
		{"70% HNO3, AcOH", "nitric acid|acetic acid"},
		{"POCl3, DMF, 0 to 80 °C", "phosphorus oxychloride|N,N-dimethylformamide"},
		{"POCl3 (neat), cat. DMF, reflux, 4 hrs", "phosphorus oxychloride|N,N-dimethylformamide"},
		{"AlCl3 (1.2 eq), DCE, 0°C-rt", "aluminium chloride|1,2-dichloroethane"},
		{"NBS (1.0 equiv.), DMF, 0 °C, dark", "N-bromosuccinimide|N,N-dimethylformamide"},
		{"NIS, TFA (cat.), MeCN, RT", "N-iodosuccinimide|trifluoroacetic acid|acetonitrile"},
		{"I2, KI, H2O/EtOH", "iodine|potassium iodide|water|ethanol"},
		{"NCS, DMF, 50 ℃", "N-chlorosuccinimide|N,N-dimethylformamide"},
		{"SOCl2, reflux; then NH3 (aq.)", "thionyl chloride|ammonia"},
		{"(COCl)2, DMF (cat), DCM", "oxalyl chloride|N,N-dimethylformamide|dichloromethane"},
		{"EDC.HCl, HOBt, DIPEA, DMF", "EDC|1-hydroxybenzotriazole|diisopropylethylamine|N,N-dimethylformamide"},
		{"HATU (1.2 equiv), iPr2NEt (3 equiv), DMF", "HATU|diisopropylethylamine|N,N-dimethylformamide"},
		{"Boc₂O, Et₃N, DMAP, CH₂Cl₂", "di-tert-butyl dicarbonate|triethylamine|4-dimethylaminopyridine|dichloromethane"},
		{"NaBH(OAc)3, AcOH, 1,2-DCE", "sodium triacetoxyborohydride|acetic acid|1,2-dichloroethane"},
		{"NaBH4, MeOH, 0 °C", "sodium borohydride|methanol"},
		{"LiAlH4, THF, reflux", "lithium aluminium hydride|tetrahydrofuran"},
		{"DIBAL-H (1 M in toluene), DCM, -78 °C", "diisobutylaluminium hydride|dichloromethane"},
		{"DIBAL-H, toluene, -78 °C", "diisobutylaluminium hydride|toluene"},
		{"Fe, NH4Cl, EtOH/H2O, 80 °C", "iron|ammonium chloride|ethanol|water"},
		{"SnCl2·2H2O, EtOAc, reflux", "tin(II) chloride|ethyl acetate"},
		{"Zn dust, AcOH", "zinc|acetic acid"},
		{"BBr3 (1.0 M in CH2Cl2), −78 °C to rt", "boron tribromide"},
		{"TBAF (1 M in THF), THF", "tetrabutylammonium fluoride|tetrahydrofuran"},
		{"p-TsOH·H2O, toluene, Dean-Stark", "p-toluenesulfonic acid|toluene"},
		{"TsOH (10 mol %), PhMe, 110 °C, Dean–Stark trap", "p-toluenesulfonic acid|toluene"},
		{"H2O2 (30%), NaOH", "hydrogen peroxide|sodium hydroxide"},
		{"aq. HCl (6N), dioxane, 100 °C", "hydrochloric acid|1,4-dioxane"},
		{"4N HCl in dioxane, rt", "hydrochloric acid|1,4-dioxane"},
		{"4 M HCl/dioxane", "hydrochloric acid|1,4-dioxane"},
		{"conc. aq. NH3, EtOH, sealed tube, 100 °C", "ammonia|ethanol"},
		{"1N NaOH, MeOH", "sodium hydroxide|methanol"},
		{"NaOH (2N aq.), EtOH", "sodium hydroxide|ethanol"},
		{"NaOMe, MeOH, 65 °C", "sodium methoxide|methanol"},
		{"t-BuOK, THF", "potassium tert-butoxide|tetrahydrofuran"},
		{"KOt-Bu, DMSO", "potassium tert-butoxide|dimethyl sulfoxide"},
		{"NaOt-Bu, BINAP, Pd2dba3, toluene, 100 °C", "sodium tert-butoxide|BINAP|tris(dibenzylideneacetone)dipalladium|toluene"},
		{"i-Pr2NEt, n-BuOH, 120 °C, μW", "diisopropylethylamine|butan-1-ol"},
		{"DIPEA, i-PrOH, MW 150 °C", "diisopropylethylamine|propan-2-ol"},
		{"CuI, L-proline, K2CO3, DMSO, 90 °C", "copper(I) iodide|L-proline|potassium carbonate|dimethyl sulfoxide"},
		{"CuSO4·5H2O, sodium ascorbate, t-BuOH/H2O 1:1", "copper sulfate|sodium ascorbate|tert-butanol|water"},
		{"NaNO2, HCl, H2O, 0–5 °C", "sodium nitrite|hydrochloric acid|water"},
		{"NaNO2 (1.1 eq), conc HCl, 0 °C then CuCl", "sodium nitrite|hydrochloric acid|copper(I) chloride"},
		{"isoamyl nitrite, CH2I2", "isoamyl nitrite|diiodomethane"},
		{"Tf2O, pyridine, DCM, 0 °C", "triflic anhydride|pyridine|dichloromethane"},
		{"MsCl, Et3N", "methanesulfonyl chloride|triethylamine"},
		{"TsCl, py", "p-toluenesulfonyl chloride|pyridine"},
		{"BnBr, K2CO3, acetone, 56 °C", "benzyl bromide|potassium carbonate|acetone"},
		{"TBSCl, imid., DMF", "tert-butyldimethylsilyl chloride|imidazole|N,N-dimethylformamide"},
		{"Dess-Martin periodinane, NaHCO3, DCM", "Dess–Martin periodinane|sodium bicarbonate|dichloromethane"},
		{"(COCl)2, DMSO, Et3N, –78 °C", "oxalyl chloride|dimethyl sulfoxide|triethylamine"},
		{"OsO4 (cat.), NMO, acetone/water", "osmium tetroxide|N-methylmorpholine N-oxide|acetone|water"},
		{"AIBN (0.1 eq), NBS, CCl4, hv, reflux", "azobisisobutyronitrile|N-bromosuccinimide|carbon tetrachloride|light"},
		{"hν (254 nm), benzene", "light|benzene"},
		{"Ph3P, DIAD, THF", "triphenylphosphine|diisopropyl azodicarboxylate|tetrahydrofuran"},
		{"BF3.Et2O, CH2Cl2", "boron trifluoride etherate|dichloromethane"},
		{"TiCl4 (1M in DCM), Cl2CHOMe, 0 °C", "titanium tetrachloride|dichloromethyl methyl ether"},
		{"neat, 180 °C, 24 h", ""},
		{"xylenes, 140 °C, N2", "xylene|nitrogen"},
		{"o-DCB, 180 °C", "1,2-dichlorobenzene"},
		{"Selectfluor®, MeCN", "Selectfluor|acetonitrile"},
		{"Br₂ / CHCl₃", "bromine|chloroform"},
		{"Br2-AcOH", "bromine|acetic acid"},
		{"morpholine (2 eq.), EtOH, rt, 1 d", "morpholine|ethanol"},
		{"Lawesson's reagent, toluene, Δ", "Lawesson's reagent|toluene"},
		{"KNO3 + H2SO4", "potassium nitrate|sulfuric acid"},
		{"step 1: NaH, DMF; step 2: MeI", "sodium hydride|N,N-dimethylformamide|methyl iodide"},
		{"i) n-BuLi, THF, -78 °C; ii) DMF", "n-butyllithium|tetrahydrofuran|N,N-dimethylformamide"},
		{"1) BH3·THF 2) H2O2, NaOH", "borane|hydrogen peroxide|sodium hydroxide"},
		{"PhB(OH)2, Pd(PPh3)4, K2CO3", "phenylboronic acid|tetrakis(triphenylphosphine)palladium|potassium carbonate"},
		{"NH4OAc, AcOH, 110 °C (µW)", "ammonium acetate|acetic acid"},
		{"anh. AlCl3, AcCl, DCM, 0-5 °C", "aluminium chloride|acetyl chloride|dichloromethane"},
		{"Oxone®, acetone/H2O", "Oxone|acetone|water"},
		{"Grubbs II (5 mol %), DCM, 40 °C", "Grubbs catalyst|dichloromethane"},
		{"under argon, THF", "argon|tetrahydrofuran"},
		{"50% aq NaOH, TBAB, toluene", "sodium hydroxide|tetrabutylammonium bromide|toluene"},
		{"Et3SiH (3 eq), TFA", "triethylsilane|trifluoroacetic acid"},
		{"CAN, MeCN–H2O", "ceric ammonium nitrate|acetonitrile|water"},
		{"PIDA, I2, hν", "(diacetoxyiodo)benzene|iodine|light"},
	} {
		var names []string
		for _, a := range ParseWords(row.text) {
			if a.Name == "" {
				names = append(names, "?"+a.Written)
				continue
			}
			names = append(names, a.Name)
		}
		if got := strings.Join(names, "|"); got != row.names {
			t.Errorf("%q:\n  read %q\n  want %q", row.text, got, row.names)
		}
	}
}
