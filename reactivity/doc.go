// Package reactivity says where a molecule reacts: it ranks the sites of a substitution or
// an addition, and the ways round of a cycloaddition, from the Hückel orbitals of package
// frontier, with chances fitted to published outcomes, their limits, and reasons in words.
//
// [Judge] answers for one molecule, [Pair] for the cycloaddition of two (or within one),
// [RetroDielsAlder] for its reverse, and [RecordFor] says how often such answers were
// right. Chances are probabilities that a site is the recorded main product; they are
// neither yields nor rates. The methods are in docs/method.md, docs/cycloadditions.md and
// docs/calibration.md.
//
// # One molecule
//
// Judge (ranking.go; its conditions and its answer in attack.go) perceives the molecule
// as written, its fast tautomers and, by medium, its protonated form, and solves each.
//
// Indices describe every centre of a π system. A [Workspace] (workspace.go) serves one
// system after another. The localization energy, which ranks, comes for all centres from
// one solution, by an integral along a line through the gap (localization.go,
// quadrature.go), its derivatives likewise (localizationgradient.go); where that does not
// serve, the residue is solved (residue.go, bondlocalization.go). Beside it stand frontier
// and smoothed densities (frontierdensity.go), superdelocalizabilities and reactivity
// numbers (superdelocalizability.go, reactivitynumber.go). evaluate.go collects them by
// centre, indexlimits.go gives limits to four of them.
//
// Candidates are sets of equivalent atoms that an event may hit (candidates.go, view.go;
// delocalized.go for carbons that share a charge). Their surroundings are told in named
// terms (environment.go, substituent.go, siteterms.go).
//
// Chances of substitution weigh indices and terms with the numbers of the fitted model
// (model.go, response.go, chance.go); because.go says which of them decided. Other events
// are ranked by the localization energy alone.
//
// What comes in is an [Incoming] group (incoming.go), what goes is found in leaving.go, and
// [Product] puts them on the site (product.go).
//
// # Two molecules
//
// [FindEnds] finds dienes, 1,3-dipoles and the π bonds they add to, on the graph alone
// (pairends.go, diene.go, dipole.go, pairpartner.go, pairkekule.go). [Meet] combines them
// (paircombine.go, with a bound in pairsize.go). Pair (pair.go) solves both sides once and
// orders the joinings, then the orientations of each, by the energy of the better first
// bond (pairside.go, pairforming.go); a Lewis acid on a carbonyl group is a second solution
// (lewisacid.go). Orientations of Diels–Alder reactions get chances from the first bond
// with the second under way (halfbond.go) and from terms of the two ends (pairterms.go,
// orientation.go). Relations and the endo rule are put into words (pairrelation.go,
// endo.go), and the products are built with their configuration (adduct.go).
//
// # The fit
//
// [Refit] reads published outcomes (outcomes.go), prepares them (sitefit.go, pairfit.go),
// finds the parameters of the calibrated set and the weights of all events together under
// a prior (calibrate.go, prior.go), cross-validates (crossvalidation.go), simulates what
// the limits cover (coverage.go), and writes the calibrated set of package frontier, the
// tables in calibration/ and docs/record.md (refit.go, recordfile.go). The program embeds
// the set and the tables (defaultset.go, model.go, recorddata.go).
//
// # Conventions
//
// Energies are in |β|, levels x in β relative to α: larger x is more bonding. Atoms are
// indices from 0; a centre is a place in a π system. Degenerate shells are treated as a
// whole, so that equivalent atoms get equal numbers. The same input gives the same bytes.
package reactivity
