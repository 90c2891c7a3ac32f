package place

import (
	"strings"
	"testing"

	"lobecast/frontier/molecule"
)

// Sources of the numbering. The compound names are names in common use; the rules are
// those of the IUPAC recommendations (2013: P-…; fused rings 1998: FR-…), cited from
// memory.
const (
	hantzsch   = "P-22.2 (heteromonocycles), names in common use"
	retained   = "P-25.2.1 (retained names of fused rings)"
	fusedRule  = "P-25.3, FR-5 (numbering of fused systems: low locants to heteroatoms, then to fusion carbons)"
	exceptions = "P-25.2.1, retained numbering (anthracene, phenanthrene, acridine, carbazole, xanthene, purine)"
	lowest     = "P-31.1.4 (lowest locants: indicated hydrogen, principal group, hydro, all prefixes, first cited)"
	trade      = "common practice (no source)"
)

// locants pairs a compound, written with the atom in question mapped 1, with the place
// its usual name gives that atom.
var locants = []struct{ compound, smiles, place, source string }{
	// five-membered rings
	{"2-bromothiophene", "Br[c:1]1cccs1", "C-2 of the thiophene", hantzsch},
	{"3-bromothiophene", "Br[c:1]1ccsc1", "C-3 of the thiophene", hantzsch},
	{"5-methylfurfural, methyl carbon of the ring", "O=Cc1cc[c:1](C)o1", "C-5 of the furan", lowest},
	{"5-methylfurfural, aldehyde carbon of the ring", "O=C[c:1]1ccc(C)o1", "C-2 of the furan", lowest},
	{"3-acetylpyrrole", "CC(=O)[c:1]1cc[nH]c1", "C-3 of the pyrrole", hantzsch},
	{"1-tosylpyrrole", "Cc1ccc(cc1)S(=O)(=O)n1cc[cH:1]c1", "C-3 of the pyrrole", hantzsch},
	{"4-bromopyrazole", "Br[c:1]1cn[nH]c1", "C-4 of the pyrazole", hantzsch},
	{"1-methyl-5-chloropyrazole", "Cn1ncc[c:1]1Cl", "C-5 of the pyrazole", hantzsch},
	{"1-methyl-3-chloropyrazole", "Cn1cc[c:1](Cl)n1", "C-3 of the pyrazole", hantzsch},
	{"metronidazole, nitro carbon", "Cc1nc[c:1]([N+](=O)[O-])n1CCO", "C-5 of the imidazole", hantzsch},
	{"metronidazole, methyl carbon", "C[c:1]1ncc([N+](=O)[O-])n1CCO", "C-2 of the imidazole", hantzsch},
	{"1-methyl-4-nitroimidazole", "Cn1cn[c:1](c1)[N+](=O)[O-]", "C-4 of the imidazole", hantzsch},
	{"fluconazole ring (1-alkyl-1,2,4-triazole), between N-2 and N-4", "CCn1n[cH:1]nc1", "C-3 of the 1,2,4-triazole", hantzsch},
	{"1-benzyl-4-phenyl-1,2,3-triazole, C-5", "c1ccccc1Cn1[cH:1]c(nn1)c1ccccc1", "C-5 of the 1,2,3-triazole", hantzsch},
	{"1-benzyl-4-phenyl-1,2,3-triazole, C-4", "c1ccccc1Cn1c[c:1](nn1)c1ccccc1", "C-4 of the 1,2,3-triazole", hantzsch},
	{"5-phenyltetrazole", "c1ccccc1[c:1]1nnn[nH]1", "C-5 of the tetrazole", hantzsch},
	{"2-aminothiazole, C-5", "Nc1nc[cH:1]s1", "C-5 of the thiazole", hantzsch},
	{"2-aminothiazole, C-4", "Nc1n[cH:1]cs1", "C-4 of the thiazole", hantzsch},
	{"ethyl oxazole-4-carboxylate", "CCOC(=O)[c:1]1cocn1", "C-4 of the oxazole", hantzsch},
	{"3,5-dimethylisoxazole, C-4", "Cc1noc(C)[cH:1]1", "C-4 of the isoxazole", hantzsch},
	{"3,5-dimethylisoxazole, C-3", "C[c:1]1noc(C)c1", "C-3 of the isoxazole", hantzsch},
	{"5-chloro-2-methylisothiazol-3-one", "Cn1sc(Cl)[cH:1]c1=O", "C-4 of the isothiazol-3-one", hantzsch},
	{"2-phenyl-1,3,4-oxadiazole, C-5", "c1ccccc1-c1nn[cH:1]o1", "C-5 of the 1,3,4-oxadiazole", hantzsch},
	{"3-methyl-5-phenyl-1,2,4-oxadiazole", "Cc1no[c:1](n1)-c1ccccc1", "C-5 of the 1,2,4-oxadiazole", hantzsch},
	{"2-amino-5-bromo-1,3,4-thiadiazole", "Nc1nn[c:1](Br)s1", "C-5 of the 1,3,4-thiadiazole", lowest},
	{"2-bromo-5-chlorothiophene", "Cl[c:1]1ccc(Br)s1", "C-5 of the thiophene", lowest},
	{"selenophene-2-carbaldehyde", "O=C[c:1]1ccc[se]1", "C-2 of the selenophene", hantzsch},
	// six-membered rings
	{"nicotinamide, ring carbon of the amide", "NC(=O)[c:1]1cccnc1", "C-3 of the pyridine", hantzsch},
	{"nicotinic acid, C-6", "OC(=O)c1cc[cH:1]nc1", "C-6 of the pyridine", lowest},
	{"2-chloro-5-nitropyridine", "Cl[c:1]1ccc(cn1)[N+](=O)[O-]", "C-2 of the pyridine", lowest},
	{"2-amino-5-bromopyridine", "Nc1cc[c:1](Br)cn1", "C-5 of the pyridine", lowest},
	{"4-dimethylaminopyridine", "CN(C)[c:1]1ccncc1", "C-4 of the pyridine", hantzsch},
	{"pyridine N-oxide, C-4", "[O-][n+]1cc[cH:1]cc1", "C-4 of the pyridine N-oxide", trade},
	{"N-methylpyridinium, C-2", "C[n+]1cccc[cH:1]1", "C-2 of the pyridinium", hantzsch},
	{"2-pyridone, C-5", "O=c1cc[cH:1]c[nH]1", "C-5 of the 2-pyridone", trade},
	{"4-methoxy-6-methyl-2-pyrone, C-3", "COc1cc(C)oc(=O)[cH:1]1", "C-3 of the 2-pyrone", trade},
	{"maltol, C-2", "O=c1cco[c:1](C)c1O", "C-2 of the 4-pyrone", trade},
	{"3,6-dichloropyridazine", "Cl[c:1]1ccc(Cl)nn1", "C-3 of the pyridazine", hantzsch},
	{"2,4-dichloropyrimidine, C-4", "Clc1ncc[c:1](Cl)n1", "C-4 of the pyrimidine", hantzsch},
	{"2,4-dichloropyrimidine, C-2", "Cl[c:1]1nccc(Cl)n1", "C-2 of the pyrimidine", hantzsch},
	{"5-bromo-2-chloropyrimidine", "Clc1nc[c:1](Br)cn1", "C-5 of the pyrimidine", lowest},
	{"pyrazinamide, C-5", "NC(=O)c1cn[cH:1]cn1", "C-5 of the pyrazine", lowest},
	{"cyanuric chloride", "Clc1nc(Cl)n[c:1](Cl)n1", "C-2 of the 1,3,5-triazine", lowest},
	{"3-amino-1,2,4-triazine, C-5", "Nc1nnc[cH:1]n1", "C-5 of the 1,2,4-triazine", lowest},
	{"3,6-diphenyl-1,2,4,5-tetrazine", "c1ccccc1-[c:1]1nnc(nn1)-c1ccccc1", "C-3 of the 1,2,4,5-tetrazine", hantzsch},
	{"5-fluorouracil", "O=c1[nH]c[c:1](F)c(=O)[nH]1", "C-5 of the uracil", trade},
	{"6-methyluracil", "O=c1[nH]c(=O)c[c:1](C)[nH]1", "C-6 of the uracil", trade},
	{"N-Boc-piperidin-4-one", "O=[C:1]1CCN(CC1)C(=O)OC(C)(C)C", "C-4 of the piperidin-4-one, carbonyl carbon of the ketone", lowest},
	{"3,4-dihydro-2H-pyran, C-5 (enol ether)", "C1C[CH:1]=COC1", "C-5 of the 3,4-dihydro-2H-pyran, β-carbon of the enol ether", lowest},
	// benzo-fused five-membered rings
	{"indole-3-carbaldehyde", "O=C[c:1]1c[nH]c2ccccc12", "C-3 of the indole", retained},
	{"5-bromoindole", "Br[c:1]1ccc2[nH]ccc2c1", "C-5 of the indole", retained},
	{"6-nitroindole", "O=[N+]([O-])[c:1]1ccc2cc[nH]c2c1", "C-6 of the indole", retained},
	{"7-chloroindole", "Cl[c:1]1cccc2cc[nH]c12", "C-7 of the indole", retained},
	{"4-hydroxyindole", "O[c:1]1cccc2[nH]ccc12", "C-4 of the indole", retained},
	{"melatonin, C-2", "COc1ccc2[nH][cH:1]c(CCNC(C)=O)c2c1", "C-2 of the indole", retained},
	{"melatonin, methoxy carbon", "CO[c:1]1ccc2[nH]cc(CCNC(C)=O)c2c1", "C-5 of the indole", retained},
	{"3,3-dimethylindolenine, C-2", "CC1(C)[CH:1]=Nc2ccccc12", "C-2 of the 3H-indole, imine carbon", lowest},
	{"indoline, C-5", "C1CNc2cc[cH:1]cc12", "C-5 of the indoline", trade},
	{"N-acetylindoline, C-5", "CC(=O)N1CCc2c[cH:1]ccc12", "C-5 of the indoline", trade},
	{"oxindole, C-5", "O=C1Cc2c[cH:1]ccc2N1", "C-5 of the oxindole", trade},
	{"isatin, ketone carbon", "O=C1Nc2ccccc2[C:1]1=O", "C-3 of the isatin, carbonyl carbon of the ketone", trade},
	{"5-bromoisatin", "O=C1Nc2cc[c:1](Br)cc2C1=O", "C-5 of the isatin", trade},
	{"4-nitrophthalic anhydride (5-nitroisobenzofuran-1,3-dione)", "O=C1OC(=O)c2c[c:1](ccc12)[N+](=O)[O-]", "C-5 of the phthalic anhydride", lowest},
	{"3-nitrophthalic anhydride (4-nitroisobenzofuran-1,3-dione)", "O=C1OC(=O)c2[c:1](cccc12)[N+](=O)[O-]", "C-4 of the phthalic anhydride", lowest},
	{"benzofuran-2-carboxylic acid", "OC(=O)[c:1]1cc2ccccc2o1", "C-2 of the benzofuran", retained},
	{"5-nitrobenzofuran", "O=[N+]([O-])[c:1]1ccc2occc2c1", "C-5 of the benzofuran", retained},
	{"3-bromobenzothiophene", "Br[c:1]1csc2ccccc12", "C-3 of the benzothiophene", fusedRule},
	{"raloxifene core, phenol carbon", "O[c:1]1ccc2c(c1)sc(c2)-c1ccc(O)cc1", "C-6 of the benzothiophene", fusedRule},
	{"6-nitroindazole", "O=[N+]([O-])[c:1]1ccc2cn[nH]c2c1", "C-6 of the indazole", fusedRule},
	{"3-iodoindazole", "I[c:1]1n[nH]c2ccccc12", "C-3 of the indazole", fusedRule},
	{"2-methyl-2H-indazole, C-3", "Cn1[cH:1]c2ccccc2n1", "C-3 of the 2H-indazole", lowest},
	{"2-mercaptobenzimidazole-like 2-chlorobenzimidazole", "Cl[c:1]1nc2ccccc2[nH]1", "C-2 of the benzimidazole", fusedRule},
	{"omeprazole core, 5-methoxybenzimidazole", "CO[c:1]1ccc2[nH]cnc2c1", "C-5 of the benzimidazole", fusedRule},
	{"1-methyl-6-bromobenzimidazole", "Cn1cnc2cc[c:1](Br)cc12", "C-6 of the benzimidazole", lowest},
	{"5-chlorobenzotriazole", "Cl[c:1]1ccc2[nH]nnc2c1", "C-5 of the benzotriazole", fusedRule},
	{"2-chlorobenzoxazole", "Cl[c:1]1nc2ccccc2o1", "C-2 of the benzoxazole", fusedRule},
	{"6-nitrobenzothiazole", "O=[N+]([O-])[c:1]1ccc2ncsc2c1", "C-6 of the benzothiazole", fusedRule},
	{"risperidone core, 6-fluoro-1,2-benzisoxazole", "F[c:1]1ccc2cnoc2c1", "C-6 of the 1,2-benzisoxazole", fusedRule},
	{"saccharin-like 3-chloro-1,2-benzisothiazole", "Cl[c:1]1nsc2ccccc12", "C-3 of the 1,2-benzisothiazole", fusedRule},
	{"4-nitrobenzo-2,1,3-oxadiazole (NBD core)", "O=[N+]([O-])[c:1]1cccc2nonc12", "C-4 of the 2,1,3-benzoxadiazole", fusedRule},
	{"4,7-dibromo-2,1,3-benzothiadiazole", "Br[c:1]1ccc(Br)c2nsnc12", "C-4 of the 2,1,3-benzothiadiazole", fusedRule},
	{"piperonal", "O=C[c:1]1ccc2OCOc2c1", "C-5 of the 1,3-benzodioxole", fusedRule},
	{"6-nitropiperonal, nitro carbon", "O=Cc1cc2OCOc2c[c:1]1[N+](=O)[O-]", "C-6 of the 1,3-benzodioxole", lowest},
	{"2,3-dihydrobenzofuran, C-5", "C1COc2cc[cH:1]cc12", "C-5 of the 2,3-dihydrobenzofuran", trade},
	{"6-nitro-1-indanone", "O=C1CCc2cc[c:1](cc12)[N+](=O)[O-]", "C-6 of the 1-indanone", lowest},
	{"5-bromo-1-indanone", "O=C1CCc2c[c:1](Br)ccc12", "C-5 of the 1-indanone", lowest},
	{"5-nitroindane", "C1Cc2cc[c:1](cc2C1)[N+](=O)[O-]", "C-5 of the indane", lowest},
	{"3-methylindene", "C[C:1]1=CCc2ccccc12", "C-3 of the indene, α-carbon of the styrene-type alkene", lowest},
	{"4,5,6,7-tetrahydroindole, C-2", "C1CCc2[nH][cH:1]cc2C1", "C-2 of the 4,5,6,7-tetrahydroindole", lowest},
	// aza-fused
	{"7-azaindole-3-carbaldehyde", "O=C[c:1]1c[nH]c2ncccc12", "C-3 of the 7-azaindole", trade},
	{"5-bromo-7-azaindole", "Br[c:1]1cnc2[nH]ccc2c1", "C-5 of the 7-azaindole", trade},
	{"4-chloro-7-azaindole", "Cl[c:1]1ccnc2[nH]ccc12", "C-4 of the 7-azaindole", trade},
	{"4-azaindole, C-3", "c1cnc2[cH:1]c[nH]c2c1", "C-3 of the 4-azaindole", trade},
	{"5-azaindole, C-6", "c1n[cH:1]cc2[nH]ccc12", "C-6 of the 5-azaindole", trade},
	{"6-azaindole, C-7", "[cH:1]1nccc2cc[nH]c12", "C-7 of the 6-azaindole", trade},
	{"6-chloropurine", "Cl[c:1]1ncnc2[nH]cnc12", "C-6 of the purine", exceptions},
	{"caffeine, C-8", "Cn1[cH:1]nc2n(C)c(=O)n(C)c(=O)c12", "C-8 of the purine-2,6-dione", exceptions},
	{"caffeine, carbonyl between the nitrogens", "Cn1cnc2n(C)[c:1](=O)n(C)c(=O)c12", "C-2 of the purine-2,6-dione", exceptions},
	{"adenine, C-8", "Nc1ncnc2[nH][cH:1]nc12", "C-8 of the purine", exceptions},
	{"2-amino-6-chloropurine, C-2", "N[c:1]1nc(Cl)c2nc[nH]c2n1", "C-2 of the purine", exceptions},
	{"guanine, C-8", "Nc1nc2[nH][cH:1]nc2c(=O)[nH]1", "C-8 of the purin-6-one", exceptions},
	{"4-chloropyrrolo[2,3-d]pyrimidine", "Cl[c:1]1ncnc2[nH]ccc12", "C-4 of the pyrrolo[2,3-d]pyrimidine", fusedRule},
	{"tofacitinib core, C-5", "Clc1ncnc2[nH]c[cH:1]c12", "C-5 of the pyrrolo[2,3-d]pyrimidine", fusedRule},
	{"ibrutinib core, 4-aminopyrazolo[3,4-d]pyrimidine, C-3", "Nc1ncnc2[nH]n[cH:1]c12", "C-3 of the pyrazolo[3,4-d]pyrimidine", fusedRule},
	{"allopurinol, C-6", "O=c1[nH][cH:1]nc2[nH]ncc12", "C-6 of the pyrazolo[3,4-d]pyrimidin-4-one", fusedRule},
	{"5-bromopyrazolo[3,4-b]pyridine", "Br[c:1]1cnc2[nH]ncc2c1", "C-5 of the pyrazolo[3,4-b]pyridine", fusedRule},
	{"6-bromoimidazo[4,5-b]pyridine", "Br[c:1]1cnc2nc[nH]c2c1", "C-6 of the imidazo[4,5-b]pyridine", fusedRule},
	{"thieno[2,3-b]pyridine, C-3", "c1cnc2sc[cH:1]c2c1", "C-3 of the thieno[2,3-b]pyridine", fusedRule},
	{"ticlopidine core: 4,5,6,7-tetrahydrothieno[3,2-c]pyridine, C-2", "C1NCc2c[cH:1]sc2C1", "C-2 of the 4,5,6,7-tetrahydrothieno[3,2-c]pyridine", fusedRule},
	{"4-chlorothieno[3,2-d]pyrimidine", "Cl[c:1]1ncnc2ccsc12", "C-4 of the thieno[3,2-d]pyrimidine", fusedRule},
	{"4-chlorothieno[2,3-d]pyrimidine, C-6", "Clc1ncnc2s[cH:1]cc12", "C-6 of the thieno[2,3-d]pyrimidine", fusedRule},
	{"thieno[3,2-b]thiophene, C-2", "[cH:1]1cc2sccc2s1", "C-2 of the thieno[3,2-b]thiophene", fusedRule},
	{"7-chlorothiazolo[5,4-d]pyrimidine", "Cl[c:1]1ncnc2scnc12", "C-7 of the thiazolo[5,4-d]pyrimidine", fusedRule},
	{"5-chlorothiazolo[5,4-b]pyridine", "Cl[c:1]1ccc2ncsc2n1", "C-5 of the thiazolo[5,4-b]pyridine", fusedRule},
	{"4-chlorofuro[3,2-c]pyridine", "Cl[c:1]1nccc2occc12", "C-4 of the furo[3,2-c]pyridine", fusedRule},
	{"4-chlorofuro[2,3-d]pyrimidine, C-5", "Clc1ncnc2oc[cH:1]c12", "C-5 of the furo[2,3-d]pyrimidine", fusedRule},
	{"6-bromooxazolo[4,5-b]pyridine", "Br[c:1]1cnc2ncoc2c1", "C-6 of the oxazolo[4,5-b]pyridine", fusedRule},
	{"4H-thieno[3,2-b]pyrrole-5-carboxylic acid", "OC(=O)[c:1]1cc2sccc2[nH]1", "C-5 of the thieno[3,2-b]pyrrole", fusedRule},
	// bridgehead nitrogen
	{"zolpidem core, C-3", "Cc1ccc(cc1)-c1nc2ccccn2[cH:1]1", "C-3 of the imidazo[1,2-a]pyridine", fusedRule},
	{"6-bromoimidazo[1,2-a]pyridine", "Br[c:1]1ccc2nccn2c1", "C-6 of the imidazo[1,2-a]pyridine", fusedRule},
	{"imidazo[1,5-a]pyridine, C-1", "[cH:1]1ncn2ccccc12", "C-1 of the imidazo[1,5-a]pyridine", fusedRule},
	{"indolizine, C-1", "[cH:1]1ccn2ccccc12", "C-1 of the indolizine", fusedRule},
	{"indolizine, C-3", "c1c[cH:1]n2ccccc12", "C-3 of the indolizine", fusedRule},
	{"ponatinib core: imidazo[1,2-b]pyridazine, C-3", "c1cnn2[cH:1]cnc2c1", "C-3 of the imidazo[1,2-b]pyridazine", fusedRule},
	{"6-chloroimidazo[1,2-b]pyridazine", "Cl[c:1]1ccc2nccn2n1", "C-6 of the imidazo[1,2-b]pyridazine", fusedRule},
	{"zaleplon core: pyrazolo[1,5-a]pyrimidine, C-3", "c1cnc2[cH:1]cnn2c1", "C-3 of the pyrazolo[1,5-a]pyrimidine", fusedRule},
	{"7-chloropyrazolo[1,5-a]pyrimidine", "Cl[c:1]1ccnc2ccnn12", "C-7 of the pyrazolo[1,5-a]pyrimidine", fusedRule},
	{"pyrazolo[1,5-a]pyridine-3-carboxylic acid", "OC(=O)[c:1]1cnn2ccccc12", "C-3 of the pyrazolo[1,5-a]pyridine", fusedRule},
	{"remdesivir core: 4-aminopyrrolo[2,1-f][1,2,4]triazine, C-7", "Nc1ncnn2[cH:1]ccc12", "C-7 of the pyrrolo[2,1-f][1,2,4]triazine", fusedRule},
	{"filgotinib core: [1,2,4]triazolo[1,5-a]pyridine, C-2", "[cH:1]1nc2ccccn2n1", "C-2 of the [1,2,4]triazolo[1,5-a]pyridine", fusedRule},
	{"6-chloro[1,2,4]triazolo[4,3-b]pyridazine", "Cl[c:1]1ccc2nncn2n1", "C-6 of the [1,2,4]triazolo[4,3-b]pyridazine", fusedRule},
	{"sitagliptin core, trifluoromethyl carbon", "FC(F)(F)[c:1]1nnc2CNCCn12", "C-3 of the 5,6,7,8-tetrahydro[1,2,4]triazolo[4,3-a]pyrazine", fusedRule},
	{"7-chloro[1,2,4]triazolo[1,5-a]pyrimidine", "Cl[c:1]1ccnc2ncnn12", "C-7 of the [1,2,4]triazolo[1,5-a]pyrimidine", fusedRule},
	{"imidazo[2,1-b]thiazole, C-5", "c1cn2[cH:1]cnc2s1", "C-5 of the imidazo[2,1-b]thiazole", fusedRule},
	{"imidazo[1,2-a]pyrazine, 8-chloro", "Cl[c:1]1nccn2ccnc12", "C-8 of the imidazo[1,2-a]pyrazine", fusedRule},
	{"pyrido[1,2-a]pyrimidin-4-one, C-3", "O=c1[cH:1]cnc2ccccn12", "C-3 of the pyrido[1,2-a]pyrimidin-4-one", fusedRule},
	// two six-membered rings
	{"1-nitronaphthalene", "O=[N+]([O-])[c:1]1cccc2ccccc12", "C-1 of the naphthalene", retained},
	{"2-naphthol, C-1", "Oc1ccc2ccccc2[cH:1]1", "C-1 of the naphthalene", lowest},
	{"6-bromo-2-naphthol", "Oc1ccc2c[c:1](Br)ccc2c1", "C-6 of the naphthalene", lowest},
	{"4-bromo-1-naphthol", "Oc1cc[c:1](Br)c2ccccc12", "C-4 of the naphthalene", lowest},
	{"naproxen ring, methoxy carbon", "CO[c:1]1ccc2cc(ccc2c1)C(C)C(=O)O", "C-2 of the naphthalene", lowest},
	{"6-methoxy-2-naphthaldehyde, C-5", "O=Cc1ccc2[cH:1]c(OC)ccc2c1", "C-5 of the naphthalene", lowest},
	{"8-bromo-2-naphthol", "Oc1ccc2ccc[c:1](Br)c2c1", "C-8 of the naphthalene", lowest},
	{"tetralin, C-6", "C1CCc2c[cH:1]ccc2C1", "C-6 of the tetralin", trade},
	{"1-tetralone, C-7 (7-nitro)", "O=C1CCCc2cc[c:1](cc12)[N+](=O)[O-]", "C-7 of the 1-tetralone", trade},
	{"8-hydroxyquinoline", "O[c:1]1cccc2cccnc12", "C-8 of the quinoline", retained},
	{"8-hydroxyquinoline, C-5", "Oc1cc[cH:1]c2cccnc12", "C-5 of the quinoline", retained},
	{"6-methoxyquinoline", "CO[c:1]1ccc2ncccc2c1", "C-6 of the quinoline", retained},
	{"quinaldine, methyl carbon of the ring", "C[c:1]1ccc2ccccc2n1", "C-2 of the quinoline", retained},
	{"4,7-dichloroquinoline, C-4", "Cl[c:1]1ccnc2cc(Cl)ccc12", "C-4 of the quinoline", retained},
	{"4,7-dichloroquinoline, C-7", "Clc1ccnc2c[c:1](Cl)ccc12", "C-7 of the quinoline", retained},
	{"isoquinoline, C-5", "c1nccc2[cH:1]cccc12", "C-5 of the isoquinoline", retained},
	{"isoquinoline, C-4", "c1n[cH][cH:1]c2ccccc12", "C-4 of the isoquinoline", retained},
	{"1-chloroisoquinoline", "Cl[c:1]1nccc2ccccc12", "C-1 of the isoquinoline", retained},
	{"3,4-dihydroisoquinoline, C-1", "C1C[N]=[CH:1]c2ccccc12", "C-1 of the 3,4-dihydroisoquinoline, imine carbon", lowest},
	{"4-chloroquinazoline", "Cl[c:1]1ncnc2ccccc12", "C-4 of the quinazoline", retained},
	{"gefitinib core, C-6", "COc1cc2ncnc(Cl)c2c[c:1]1O", "C-6 of the quinazoline", retained},
	{"2,4-dichloroquinazoline, C-2", "Clc1n[c:1](Cl)nc2ccccc12", "C-2 of the quinazoline", retained},
	{"2,3-dichloroquinoxaline", "Cl[c:1]1nc2ccccc2nc1Cl", "C-2 of the quinoxaline", retained},
	{"6-nitroquinoxaline", "O=[N+]([O-])[c:1]1ccc2nccnc2c1", "C-6 of the quinoxaline", retained},
	{"4-chlorocinnoline", "Cl[c:1]1cnnc2ccccc12", "C-4 of the cinnoline", retained},
	{"1-chlorophthalazine", "Cl[c:1]1nncc2ccccc12", "C-1 of the phthalazine", retained},
	{"nalidixic acid, C-7", "CCn1cc(C(=O)O)c(=O)c2cc[c:1](C)nc12", "C-7 of the 1,8-naphthyridin-4-one", fusedRule},
	{"1,5-naphthyridine, C-3", "c1cnc2c[cH:1]cnc2c1", "C-3 of the 1,5-naphthyridine", retained},
	{"pteridine-7-carboxylic acid-like 7-methylpteridine", "C[c:1]1cnc2cncnc2n1", "C-7 of the pteridine", retained},
	{"palbociclib core, C-6", "O=C1[CH:1]=Cc2cncnc2N1", "C-6 of the pyrido[2,3-d]pyrimidin-7-one", fusedRule},
	{"4-chloropyrido[3,4-d]pyrimidine", "Cl[c:1]1ncnc2cnccc12", "C-4 of the pyrido[3,4-d]pyrimidine", fusedRule},
	{"3-chloropyrido[2,3-b]pyrazine", "Cl[c:1]1cnc2cccnc2n1", "C-3 of the pyrido[2,3-b]pyrazine", fusedRule},
	{"umbelliferone, phenol carbon", "O=c1ccc2cc[c:1](O)cc2o1", "C-7 of the coumarin", trade},
	{"4-methylcoumarin", "O=c1c[c:1](C)c2ccccc2o1", "C-4 of the coumarin", trade},
	{"coumarin, C-3", "O=c1[cH:1]cc2ccccc2o1", "C-3 of the coumarin", trade},
	{"3,4-dihydrocoumarin, C-6", "O=C1CCc2c[cH:1]ccc2O1", "C-6 of the 3,4-dihydrocoumarin", trade},
	{"flavone, C-3", "O=c1[cH:1]c(-c2ccccc2)oc2ccccc12", "C-3 of the chromone", trade},
	{"7-hydroxychromone", "O=c1ccoc2c[c:1](O)ccc12", "C-7 of the chromone", trade},
	{"chroman, C-6", "C1COc2cc[cH:1]cc2C1", "C-6 of the chroman", trade},
	{"chroman-4-one, C-6 (6-bromo)", "O=C1CCOc2cc[c:1](Br)cc12", "C-6 of the chroman-4-one", trade},
	{"norfloxacin core, C-7", "O=c1c(C(=O)O)cn(CC)c2c[c:1](Cl)c(F)cc12", "C-7 of the 4-quinolone", trade},
	{"2-quinolone, C-3", "O=c1[cH:1]cc2ccccc2[nH]1", "C-3 of the 2-quinolone", trade},
	{"methaqualone core, quinazolin-4-one, C-2", "O=c1[nH][cH:1]nc2ccccc12", "C-2 of the quinazolin-4-one", trade},
	{"isatoic anhydride, C-6 (5-chloroanthranilic series)", "O=c1[nH]c2cc[c:1](Cl)cc2c(=O)o1", "C-6 of the isatoic anhydride", fusedRule},
	{"1,4-benzodioxane, C-6", "C1COc2c[cH:1]ccc2O1", "C-6 of the 1,4-benzodioxane", trade},
	{"2H-1,4-benzoxazin-3(4H)-one, C-6", "O=C1COc2cc[cH:1]cc2N1", "C-6 of the 1,4-benzoxazin-3-one", fusedRule},
	{"2H-1,4-benzoxazin-3(4H)-one, C-7", "O=C1COc2c[cH:1]ccc2N1", "C-7 of the 1,4-benzoxazin-3-one", fusedRule},
	{"1,2,3,4-tetrahydroquinoxaline, C-6", "C1CNc2c[cH:1]ccc2N1", "C-6 of the 1,2,3,4-tetrahydroquinoxaline", lowest},
	{"1,2,3,4-tetrahydroquinoline, C-6", "C1CNc2cc[cH:1]cc2C1", "C-6 of the 1,2,3,4-tetrahydroquinoline", lowest},
	{"2H-chromene, C-3", "C1Oc2ccccc2C=[CH:1]1", "C-3 of the 2H-chromene, β-carbon of the styrene-type alkene", lowest},
	{"menadione, C-3", "CC1=[CH:1]C(=O)c2ccccc2C1=O", "C-3 of the 1,4-naphthoquinone, α-carbon of the enone", trade},
	{"diazepam core, C-7", "CN1C(=O)CN=C(c2ccccc2)c2c[c:1](Cl)ccc12", "C-7 of the 1,4-benzodiazepin-2-one", fusedRule},
	{"azulene, C-1", "[cH:1]1ccc2cccccc12", "C-1 of the azulene", retained},
	{"azulene, C-2", "c1[cH:1]cc2cccccc12", "C-2 of the azulene", retained},
	{"azulene, C-6", "c1ccc2cc[cH:1]ccc12", "C-6 of the azulene", retained},
	// three rings and more
	{"9-bromoanthracene", "Br[c:1]1c2ccccc2cc2ccccc12", "C-9 of the anthracene", exceptions},
	{"2-methylanthracene", "C[c:1]1ccc2cc3ccccc3cc2c1", "C-2 of the anthracene", exceptions},
	{"1-aminoanthraquinone", "N[c:1]1cccc2C(=O)c3ccccc3C(=O)c12", "C-1 of the anthraquinone", exceptions},
	{"9-bromophenanthrene", "Br[c:1]1cc2ccccc2c2ccccc12", "C-9 of the phenanthrene", exceptions},
	{"3-nitrophenanthrene", "O=[N+]([O-])[c:1]1ccc2ccc3ccccc3c2c1", "C-3 of the phenanthrene", exceptions},
	{"9-chloroacridine", "Cl[c:1]1c2ccccc2nc2ccccc12", "C-9 of the acridine", exceptions},
	{"proflavine, amine carbon", "N[c:1]1ccc2cc3ccc(N)cc3nc2c1", "C-3 of the acridine", exceptions},
	{"3-bromocarbazole", "Br[c:1]1ccc2[nH]c3ccccc3c2c1", "C-3 of the carbazole", exceptions},
	{"4-hydroxycarbazole", "O[c:1]1cccc2[nH]c3ccccc3c12", "C-4 of the carbazole", exceptions},
	{"2-aminofluorene", "N[c:1]1ccc2c(c1)Cc1ccccc12", "C-2 of the fluorene", retained},
	{"9-fluorenone, C-2", "O=C1c2ccccc2-c2cc[cH:1]cc12", "C-2 of the fluorenone", trade},
	{"xanthone, C-2", "O=c1c2ccccc2oc2cc[cH:1]cc12", "C-2 of the xanthone", exceptions},
	{"dibenzofuran, C-2", "c1ccc2c(c1)oc1cc[cH:1]cc12", "C-2 of the dibenzofuran", fusedRule},
	{"dibenzofuran, C-4", "c1ccc2c(c1)oc1[cH:1]cccc12", "C-4 of the dibenzofuran", fusedRule},
	{"dibenzothiophene-2-sulfonic acid", "OS(=O)(=O)[c:1]1ccc2sc3ccccc3c2c1", "C-2 of the dibenzothiophene", fusedRule},
	{"chlorpromazine, chlorine carbon", "CN(C)CCCN1c2ccccc2Sc2cc[c:1](Cl)cc12", "C-2 of the phenothiazine", fusedRule},
	{"phenothiazine, C-3", "N1c2ccccc2Sc2c[cH:1]ccc12", "C-3 of the phenothiazine", fusedRule},
	{"1-methoxyphenazine", "CO[c:1]1cccc2nc3ccccc3nc12", "C-1 of the phenazine", retained},
	{"1,10-phenanthroline, C-5", "c1cnc2c(c1)[cH:1]cc1cccnc12", "C-5 of the 1,10-phenanthroline", retained},
	{"6-chlorophenanthridine", "Cl[c:1]1nc2ccccc2c2ccccc12", "C-6 of the phenanthridine", retained},
	{"harman, methyl carbon of the ring", "C[c:1]1nccc2c3ccccc3[nH]c12", "C-1 of the β-carboline", trade},
	{"harmine, methoxy carbon", "CO[c:1]1ccc2c(c1)[nH]c1c(C)nccc12", "C-7 of the β-carboline", trade},
	{"γ-carboline, C-1", "[cH:1]1nccc2[nH]c3ccccc3c12", "C-1 of the γ-carboline", trade},
	{"quetiapine core, C-11", "Cl[C:1]1=Nc2ccccc2Sc2ccccc12", "C-11 of the dibenzo[b,f][1,4]thiazepine, imine carbon", fusedRule},
	{"carbamazepine, C-10", "NC(=O)N1c2ccccc2C=[CH:1]c2ccccc12", "C-10 of the dibenzo[b,f]azepine, α-carbon of the styrene-type alkene", fusedRule},
	{"imiquimod, amine carbon", "N[c:1]1nc2ccccc2c2n(CC(C)C)cnc12", "C-4 of the imidazo[4,5-c]quinoline", fusedRule},
	{"1-nitropyrene", "O=[N+]([O-])[c:1]1ccc2ccc3cccc4ccc1c2c34", "C-1 of the pyrene", retained},
	{"4-bromopyrene", "Br[c:1]1cc2cccc3ccc4cccc1c4c23", "C-4 of the pyrene", retained},
	{"3-nitrofluoranthene", "O=[N+]([O-])[c:1]1ccc2-c3ccccc3-c3cccc1c23", "C-3 of the fluoranthene", retained},
	{"5-nitroacenaphthene", "O=[N+]([O-])[c:1]1ccc2CCc3cccc1c23", "C-5 of the acenaphthene", retained},
	{"2-nitrotriphenylene", "O=[N+]([O-])[c:1]1ccc2c3ccccc3c3ccccc3c2c1", "C-2 of the triphenylene", retained},
	{"6-nitrochrysene", "O=[N+]([O-])[c:1]1cc2c3ccccc3ccc2c2ccccc12", "C-6 of the chrysene", retained},
	{"7-bromobenz[a]anthracene", "Br[c:1]1c2ccccc2cc2c1ccc1ccccc12", "C-7 of the benz[a]anthracene", fusedRule},
	{"5-bromotetracene", "Br[c:1]1c2ccccc2cc2cc3ccccc3cc12", "C-5 of the tetracene", retained},
	{"6-nitrobenzo[a]pyrene", "O=[N+]([O-])[c:1]1c2ccccc2c2ccc3cccc4ccc1c2c34", "C-6 of the benzo[a]pyrene", fusedRule},
	{"3-bromoperylene", "Br[c:1]1ccc2c3cccc4cccc(c5cccc1c25)c34", "C-3 of the perylene", retained},
	{"biphenylene, C-2", "c1ccc2c(c1)c1cc[cH:1]cc12", "C-2 of the biphenylene", retained},
}

// read returns a molecule, and the atoms equivalent to its atom mapped 1.
func read(t *testing.T, smiles string) (*molecule.Molecule, []int) {
	t.Helper()
	mapped, err := molecule.ParseSMILES(smiles)
	if err != nil {
		t.Fatalf("%s: %v", smiles, err)
	}
	a := mapped.AtomByMap(1)
	if a < 0 {
		t.Fatalf("%s: no atom mapped 1", smiles)
	}
	m, err := molecule.ParseSMILES(strings.ReplaceAll(smiles, ":1]", "]"))
	if err != nil {
		t.Fatalf("%s: %v", smiles, err)
	}
	var orbit []int
	for b, class := range m.Classes() {
		if class == m.Classes()[a] {
			orbit = append(orbit, b)
		}
	}
	return m, orbit
}

// TestLocants checks locants against compounds whose names fix them.
func TestLocants(t *testing.T) {
	systems := map[string]bool{}
	for _, row := range locants {
		m, orbit := read(t, row.smiles)
		namer := NewNamer(m)
		if got := namer.Site(orbit); got != row.place {
			t.Errorf("%s (%s): got %q, want %q (%s)", row.compound, row.smiles, got, row.place, row.source)
		}
		systems[namer.of(orbit[0]).title] = true
	}
	if len(locants) < 150 || len(systems) < 60 {
		t.Errorf("%d atoms over %d ring systems: fewer than 150 over 60", len(locants), len(systems))
	}
}

// TestLocantsDoNotDependOnWriting gives every compound again from its canonical SMILES.
func TestLocantsDoNotDependOnWriting(t *testing.T) {
	for _, row := range locants {
		mapped, err := molecule.ParseSMILES(row.smiles)
		if err != nil {
			t.Fatal(err)
		}
		_, orbit := read(t, mapped.MappedSMILES())
		m, _ := read(t, mapped.MappedSMILES())
		if got := NewNamer(m).Site(orbit); got != row.place {
			t.Errorf("%s, written %s: got %q, want %q", row.compound, mapped.MappedSMILES(), got, row.place)
		}
	}
}
