package agents

import (
	"fmt"
	"regexp"
	"strings"
	"sync"
	"unicode"

	"lobecast/frontier/molecule"
)

// Agent is one agent of a step as it was written and what it was taken for.
type Agent struct {
	Written  string // as given
	Name     string // the table's name; empty where the agent is not known
	SMILES   string // canonical; empty where it is no single molecule
	Roles    Role
	Delivers string // the electrophilic substitution it brings about; empty where none
	Recorded bool   // given as a structure, not in words
}

// String shows what an agent was taken for: "NBS: N-bromosuccinimide (brominating)".
func (a Agent) String() string {
	if a.Name == "" {
		return a.Written + ": not in the vocabulary, passed over"
	}
	s := a.Name
	if a.Written != "" && !strings.EqualFold(a.Written, a.Name) {
		s = a.Written + ": " + a.Name
	}
	if r := a.Roles.String(); r != "" {
		s += " (" + r + ")"
	}
	return s
}

// index finds entries by spelling and by structure.
type index struct {
	word      map[string]*entry
	structure map[string]*entry // by canonical SMILES without configuration
	smiles    map[*entry]string
	prints    map[uint64]bool // fingerprints of the structures: most molecules have none of them
}

var lookup = sync.OnceValue(func() *index {
	x := &index{word: map[string]*entry{}, structure: map[string]*entry{}, smiles: map[*entry]string{}, prints: map[uint64]bool{}}
	for i := range table {
		e := &table[i]
		for _, w := range append([]string{e.name}, strings.Split(e.also, "|")...) {
			if w == "" {
				continue
			}
			k := fold(w)
			if old, taken := x.word[k]; taken && old != e {
				panic(fmt.Sprintf("agents: %q stands for both %s and %s", w, old.name, e.name))
			}
			x.word[k] = e
		}
		if e.smiles == "" {
			continue
		}
		m, err := molecule.ParseSMILES(e.smiles)
		if err != nil {
			panic(fmt.Sprintf("agents: %s: %v", e.name, err))
		}
		s := m.FlatSMILES()
		x.smiles[e] = s
		x.prints[fingerprint(m)] = true
		if _, taken := x.structure[s]; !taken {
			x.structure[s] = e
		}
	}
	return x
})

// fold makes spellings comparable: lower case, no spaces or hyphens, subscripts as
// plain digits. Case matters only where letters differ (CO and Co), which folding
// keeps apart by the table having one of the two.
func fold(s string) string {
	var b strings.Builder
	for _, r := range s {
		switch {
		case r >= '₀' && r <= '₉':
			b.WriteRune('0' + r - '₀')
		case unicode.IsSpace(r), r == '-', r == '–', r == '‐', r == '·', r == '•', r == '⋅', r == '∙', r == '.', r == '*':
		case r == '’':
			b.WriteRune('\'')
		default:
			b.WriteRune(unicode.ToLower(r))
		}
	}
	return b.String()
}

func (e *entry) agent(written string) Agent {
	return Agent{Written: written, Name: e.name, SMILES: lookup().smiles[e], Roles: e.roles, Delivers: e.delivers}
}

// quantity recognises what is no agent: temperatures, times, amounts, yields.
var quantity = regexp.MustCompile(`(?i)^(~|≈|ca\.?\s*)?[−–-]?\d+([.,]\d+)?\s*(–|-|to|→)?\s*([−–-]?\d+([.,]\d+)?)?\s*([°º˚o]\s*[ck]?|c|k|h|hr|hrs|hours?|min|mins|minutes?|d|days?|s|equiv\.?|eq\.?|mol\s*%|mol%|%|m|mm|bar|atm|psi|mpa|w|nm|ml|l|g|mg|mmol|x|v/v|vol|volumes?|wt\s*%|drops?|a|ma|weeks?|overnight)?\.?$`)

// ratio is the composition of a mixed solvent, "3:1:1", at the end of a word.
var ratio = regexp.MustCompile(`\s+\d+(\.\d+)?(\s*:\s*\d+(\.\d+)?)+$`)

// aside is a remark in brackets behind a word: an amount, a strength, an abbreviation.
var aside = regexp.MustCompile(`\s+\([^()]*\)([\s,;+/]|$)`)

// ordinal begins one of several stages: "i) … ii) …", "1) … 2) …", "step 2: …".
var ordinal = regexp.MustCompile(`(?i)(^|[\s;,.])\s*(?:(?:step|stage)\s*\d+\s*[:.)]?|\(?(?:i{1,3}|iv|vi{0,3}|[1-9]|[a-d])\))\s+`)

// water is the crystal water of a salt.
var water = regexp.MustCompile(`\s*[·•.*⋅]\s*(\d+(\.\d+)?|x|n)?\s*H[2₂]O$`)

// suffixWords say in what form an agent was taken.
var suffixWords = regexp.MustCompile(`(?i)\s+(dust|powder|turnings|flakes|pellets|solution|soln\.?|aq\.?|gas|atmosphere|balloon|monohydrate|hydrate)$`)

var conditionWords = map[string]bool{
	"rt": true, "r.t.": true, "roomtemperature": true, "reflux": true, "overnight": true, "heat": true, "δ": true,
	"cat": true, "cat.": true, "catalytic": true, "then": true, "excess": true, "neat": true, "sealedtube": true,
	"microwave": true, "mw": true, "dark": true, "ice": true, "icebath": true, "stirring": true, "slowaddition": true,
	"dropwise": true, "quench": true, "workup": true, "dry": true, "anhydrous": true, "pressure": true, "ambient": true,
	"dean-stark": true, "dean–stark": true, "dean-starktrap": true, "dean–starktrap": true, "μw": true, "µw": true,
	"µwave": true, "μwave": true, "microwaveirradiation": true, "sealed": true, "tube": true, "balloon": true, "steps": true,
	"darkness": true, "inthedark": true, "solventfree": true, "sonication": true, "ultrasound": true, "onepot": true,
	"inertatmosphere": true, "inert": true, "gradually": true, "slow": true, "ice-bath": true, "reflux,": true,
	"warm": true, "cold": true, "0": true, "o/n": true, "on": true,
}

var prefixWords = regexp.MustCompile(`(?i)^(then\s+|under\s+|with\s+|c\.\s*|sat'?d\.?\s+|abs\.?\s+|absolute\s+|dried\s+|freshly\s+distilled\s+|(\d+([.,]\d+)?\s*(m|n|mm|%|equiv\.?|eq\.?|mol\s*%)\s+)|aq\.?\s+|aqueous\s+|conc\.?\s+|concentrated\s+|dil\.?\s+|dilute\s+|sat\.?\s+|saturated\s+|cat\.?\s+|catalytic\s+|dry\s+|anhydrous\s+|anh\.?\s+|glacial\s+|fuming\s+|liq\.?\s+|liquid\s+|excess\s+|solid\s+|powdered\s+)+`)

var amountTail = regexp.MustCompile(`(?i)\s*\((cat\.?|aq\.?|conc\.?|neat|\d+([.,]\d+)?\s*(m|n|equiv\.?|eq\.?|mol\s*%|mol%|%)?)\)$|\s+\d+([.,]\d+)?\s*(equiv\.?|eq\.?|mol\s*%|mol%|wt\s*%|%|m|n)$`)

var separators = regexp.MustCompile(`\s*(?:[,;+]\s+|;|\s\+\s|\sin\s|\sand\s|\sthen\s|\s/\s)\s*|\n`)

// marks takes away what carries no chemistry.
var marks = strings.NewReplacer("®", "", "™", "", "℃", "°C", "\u00a0", " ", "\u2009", " ", "\u202f", " ", "⟶", "→", "\r", "")

// ParseWords reads agents as they stand in a notebook: "NBS, MeCN, 0 °C". Conditions
// (temperatures, times, amounts) are passed over; words that are not in the
// vocabulary are returned without roles.
func ParseWords(text string) []Agent {
	if len(text) > 1<<14 {
		text = text[:1<<14]
	}
	text = marks.Replace(text)
	for aside.MatchString(text) {
		text = aside.ReplaceAllString(text, "$1")
	}
	text = ordinal.ReplaceAllString(text, "$1; ")
	var list []Agent
	if lit.MatchString(text) {
		if a, ok := fromWord("light"); ok {
			a.Written = lit.FindString(text)
			list = append(list, a)
			text = lit.ReplaceAllString(text, " ")
		}
	}
	add := func(w string) {
		if a, ok := fromWord(w); ok {
			list = append(list, a)
			return
		}
		// "MeOH/H2O", "THF-water", "KNO3, H2SO4" without spaces
		for _, sep := range []string{"/", ",", "–", "-"} {
			parts := strings.Split(w, sep)
			if len(parts) < 2 {
				continue
			}
			var found []Agent
			known := 0
			for _, p := range parts {
				if a, ok := fromWord(p); ok {
					found = append(found, a)
					known++
				} else if !isCondition(p) {
					found = append(found, Agent{Written: strings.TrimSpace(p)})
				}
			}
			if known > 0 && (known == len(found) || sep == "/" || sep == ",") {
				list = append(list, found...)
				return
			}
		}
		list = append(list, Agent{Written: w})
	}
	for _, part := range separators.Split(text, -1) {
		part = strings.Trim(part, " \t.,;:")
		part = ratio.ReplaceAllString(part, "")
		if part == "" || isCondition(part) {
			continue
		}
		add(part)
	}
	return list
}

// lit finds lamps, wavelengths and other words for light that no table can list.
var lit = regexp.MustCompile(`(?i)\b(UV[ -]?)?\d{3}(\s*[-–]\s*\d{3})?\s?nm\b(\s*(LEDs?|lamps?|light))?` +
	`|\b((medium|low|high|pressure|hg|mercury|xenon|xe|kessil|uv|halogen|tungsten|blue|green|white|purple|violet|red|\d+\s?w)[ -]*)*\b(lamps?|LEDs?|sunlamps?)\b` +
	`|\b(sunlight|photoreactor|rayonet|floodlight|irradiated|ultraviolet( light)?|UV[ -]light)\b`)

func isCondition(w string) bool {
	w = strings.TrimSpace(w)
	if w == "" || quantity.MatchString(w) || conditionWords[strings.ReplaceAll(strings.ToLower(w), " ", "")] {
		return true
	}
	// "0 °C to rt", "reflux 3 h", "rt overnight"
	for _, f := range strings.Fields(strings.NewReplacer("→", " ", "–", " ", "->", " ", "°C", " ", "° C", " ", "(", " ", ")", " ").Replace(w)) {
		f = strings.TrimLeft(f, "-")
		l := strings.ToLower(f)
		if !quantity.MatchString(f) && !conditionWords[l] && l != "" && l != "to" && l != "at" && l != "for" && l != "h" && l != "min" && l != "°c" && l != "c" && l != "under" {
			return false
		}
	}
	return true
}

// fromWord looks a single word up, with and without amounts.
func fromWord(w string) (Agent, bool) {
	w = strings.TrimSpace(w)
	x := lookup()
	for _, try := range []string{w, ratio.ReplaceAllString(w, ""), amountTail.ReplaceAllString(w, ""), prefixWords.ReplaceAllString(w, "")} {
		for _, bare := range []string{try, prefixWords.ReplaceAllString(try, ""), water.ReplaceAllString(prefixWords.ReplaceAllString(try, ""), ""), suffixWords.ReplaceAllString(prefixWords.ReplaceAllString(try, ""), "")} {
			if e, ok := x.word[fold(bare)]; ok && bare != "" {
				return e.agent(w), true
			}
		}
	}
	return Agent{}, false
}

// FromMolecule looks an agent up by structure. The second result is false, and the
// agent empty, where the molecule is not in the vocabulary.
func FromMolecule(m *molecule.Molecule) (Agent, bool) {
	x := lookup()
	if !x.prints[fingerprint(m)] {
		return Agent{}, false
	}
	s := m.FlatSMILES()
	if e, ok := x.structure[s]; ok {
		a := e.agent(e.name)
		a.Recorded = true
		return a, true
	}
	return Agent{}, false
}

// fingerprint is a sum over the atoms that does not depend on their order.
func fingerprint(m *molecule.Molecule) uint64 {
	h := uint64(len(m.Atoms))
	for i := range m.Atoms {
		a := &m.Atoms[i]
		x := uint64(a.Element)<<24 | uint64(a.Charge+64)<<16 | uint64(a.Hydrogens)<<8 | uint64(m.Degree(i))
		x *= 0x9e3779b97f4a7c15
		h += x ^ x>>29
	}
	return h
}

// Any tells whether one of the agents has one of the roles.
func Any(list []Agent, r Role) bool {
	for _, a := range list {
		if a.Roles&r != 0 {
			return true
		}
	}
	return false
}
