package agents

import "strings"

// Role is a set of things an agent does.
type Role uint64

// The roles.
const (
	Solvent Role = 1 << iota
	Acid
	StrongAcid
	LewisAcid
	Base
	StrongBase
	Oxidant
	Reductant
	Hydride
	MetalCatalyst
	Ligand
	Nitrating
	Fluorinating
	Chlorinating
	Brominating
	Iodinating
	Acylating
	Formylating
	Sulfonating
	Alkylating
	Organometal // organolithium or Grignard reagent
	RadicalStarter
	Coupling // activates an acid for amide or ester formation
	Protecting
	Diazotizing
	Dehydrating
	Hydrogen
	Ion // counter-ion or inorganic ion without a part of its own
	Nucleophile
	PhaseTransfer
	Workup
	Light
	Methylating
	AcidChloride // makes acid chlorides
	Cleaving     // cleaves ethers or esters
	TransitionMetal
)

var roleNames = []struct {
	role Role
	name string
}{
	{StrongAcid, "strong acid"}, {Acid, "acid"}, {LewisAcid, "Lewis acid"}, {StrongBase, "strong base"}, {Base, "base"},
	{Organometal, "organometallic"}, {Nitrating, "nitrating"}, {Fluorinating, "fluorinating"},
	{Chlorinating, "chlorinating"}, {Brominating, "brominating"}, {Iodinating, "iodinating"},
	{Acylating, "acylating"}, {Formylating, "formylating"}, {Sulfonating, "sulfonating"},
	{Methylating, "methylating"}, {Alkylating, "alkylating"}, {Oxidant, "oxidant"}, {Hydride, "hydride donor"},
	{Reductant, "reductant"}, {Hydrogen, "hydrogen"}, {MetalCatalyst, "metal catalyst"}, {TransitionMetal, "transition metal"},
	{Ligand, "ligand"}, {RadicalStarter, "radical starter"}, {Coupling, "activates acids"}, {AcidChloride, "makes acid chlorides"},
	{Protecting, "protecting"}, {Cleaving, "cleaves ethers or esters"}, {Diazotizing, "diazotizing"}, {Dehydrating, "dehydrating"},
	{Nucleophile, "nucleophile"}, {PhaseTransfer, "phase-transfer catalyst"}, {Workup, "work-up"}, {Light, "light"},
	{Solvent, "solvent"}, {Ion, "ion"},
}

// String lists the roles in words.
func (r Role) String() string {
	var list []string
	for _, x := range roleNames {
		if r&x.role != 0 {
			list = append(list, x.name)
		}
	}
	return strings.Join(list, ", ")
}
