package frontier

import "strings"

// Parameter is an index into the list of parameters common to all sets.
type Parameter int

// Term is one contribution to a matrix element: weight times parameter. Every element
// is a sum of such terms, so that ∂H/∂θ is exact.
type Term struct {
	Parameter Parameter
	Weight    float64
}

// The one parameter list: h of every class, k of C with every class, k of every pair
// of heteroatom roots, every inductive shift. All built once, at start.
var (
	parameterNames []string
	parameterOf    map[string]Parameter
	parentOf       []Parameter // of a class: its parent's parameter; itself for a root
	classIndex     map[Class]int
	rootIndex      []int         // by class: index of its root among the roots
	rootClass      []Class       // the roots, in order
	hOf            []Parameter   // by class
	kWithCarbon    []Parameter   // by class
	kOfRoots       [][]Parameter // by root, root
	inductiveOf    map[string]Parameter
	inductiveRoot  []Parameter // by root: auxiliary shift by a π heteroatom, -1 for none
)

func init() {
	classIndex = make(map[Class]int, len(classes))
	parameterOf = make(map[string]Parameter)
	inductiveOf = make(map[string]Parameter, len(inductives))
	add := func(name string, parent Parameter) Parameter {
		p := Parameter(len(parameterNames))
		if parent < 0 {
			parent = p
		}
		parameterNames = append(parameterNames, name)
		parameterOf[name] = p
		parentOf = append(parentOf, parent)
		return p
	}
	for i, c := range classes {
		classIndex[c.Class] = i
		if c.Parent == c.Class {
			rootIndex = append(rootIndex, len(rootClass))
			rootClass = append(rootClass, c.Class)
			hOf = append(hOf, add("h "+string(c.Class), -1))
		} else {
			parent := classIndex[c.Parent]
			rootIndex = append(rootIndex, rootIndex[parent])
			hOf = append(hOf, add("h "+string(c.Class), hOf[parent]))
		}
	}
	for _, c := range classes {
		parent := Parameter(-1)
		if c.Parent != c.Class {
			parent = kWithCarbon[classIndex[c.Parent]]
		}
		kWithCarbon = append(kWithCarbon, add("k C "+string(c.Class), parent))
	}
	kOfRoots = make([][]Parameter, len(rootClass))
	for i := range kOfRoots {
		kOfRoots[i] = make([]Parameter, len(rootClass))
		for j := range kOfRoots[i] {
			kOfRoots[i][j] = -1
		}
	}
	for i, a := range rootClass {
		for j, b := range rootClass[:i+1] {
			switch {
			case a == "alkyl" && b != "C", b == "alkyl" && a != "C":
				continue // alkyl groups count on carbon only
			case b == "C":
				kOfRoots[i][j] = kWithCarbon[classIndex[a]]
			default:
				kOfRoots[i][j] = add("k "+string(b)+" "+string(a), -1)
			}
			kOfRoots[j][i] = kOfRoots[i][j]
		}
	}
	for _, g := range inductives {
		inductiveOf[g.Name] = add("inductive "+g.Name, -1)
	}
	linkKindParameter = []Parameter{kWithCarbon[0]}
	for _, name := range linkKindNames[1:] {
		linkKindParameter = append(linkKindParameter, add(name, kWithCarbon[0]))
	}
	for _, r := range rootClass {
		p, ok := inductiveOf[string(r)]
		if !ok || r == "alkyl" {
			p = -1
		}
		inductiveRoot = append(inductiveRoot, p)
	}
}

// ParameterOf finds a parameter by name.
func ParameterOf(name string) (Parameter, bool) {
	p, ok := parameterOf[name]
	return p, ok
}

// Parent is the parameter whose value stands in where a set does not give p; p itself
// where there is none.
func (p Parameter) Parent() Parameter { return parentOf[p] }

// String is the parameter's name.
func (p Parameter) String() string { return parameterNames[p] }

// table splits a parameter name into the table of a set file and the key in it.
func table(name string) (table, key string) {
	table, key, _ = strings.Cut(name, " ")
	return table, key
}

// linkParameter is k between two classes.
func linkParameter(a, b int) Parameter {
	switch {
	case a == 0:
		return kWithCarbon[b]
	case b == 0:
		return kWithCarbon[a]
	}
	return kOfRoots[rootIndex[a]][rootIndex[b]]
}
