package reactivity

import (
	"fmt"
	"math"
	"path/filepath"
	"sort"
	"strconv"
	"strings"

	"lobecast/frontier"
	"lobecast/frontier/molecule"
	"lobecast/frontier/terms"
)

// wilsonLimits is the 95 % interval of a fraction (E. B. Wilson, J. Am. Stat. Assoc. 1927, 22,
// 209).
func wilsonLimits(fraction, n float64) (low, high float64) {
	const z = 1.959963984540054
	if n <= 0 {
		return 0, 1
	}
	a := fraction + z*z/(2*n)
	b := z * math.Sqrt(fraction*(1-fraction)/n+z*z/(4*n*n))
	c := 1 + z*z/n
	return (a - b) / c, (a + b) / c
}

// recordRowsOf are the rows of the record that the refit found.
func (r *Refitting) recordRowsOf() []RecordRow {
	var rows []RecordRow
	for k, e := range fittedEvents {
		s, g := scoreOf(r.bySubstrate[k]), scoreOf(r.byGroup[k])
		low, high := wilsonLimits(s.top1, s.substrates)
		rows = append(rows, RecordRow{
			Event: e, Outcomes: s.n, Substrates: int(math.Round(s.substrates)), Top1: s.top1, Top1Limits: [2]float64{low, high},
			Top2: s.top2, LogLoss: s.logLoss, Calibration: s.calibration, ChanceLevel: s.blind,
			ClearShare: s.clear, ClearRight: s.clearHit, GroupTop1: g.top1,
		})
	}
	return rows
}

func (r *Refitting) recordCSV() []byte {
	rows := [][]string{recordHeader}
	for _, x := range r.recordRowsOf() {
		f := func(v float64) string { return strconv.FormatFloat(v, 'f', 6, 64) }
		rows = append(rows, []string{string(x.Event), strconv.Itoa(x.Outcomes), strconv.Itoa(x.Substrates), f(x.Top1), f(x.Top1Limits[0]),
			f(x.Top1Limits[1]), f(x.Top2), f(x.LogLoss), f(x.Calibration), f(x.ChanceLevel), f(x.ClearShare), f(x.ClearRight), f(x.GroupTop1)})
	}
	return csvBytes(rows)
}

// sameHalogen keeps the outcomes where the choice is between like halogens.
func sameHalogen(list []prediction) []prediction {
	var out []prediction
	for _, p := range list {
		if p.same {
			out = append(out, p)
		}
	}
	return out
}

// target is what the record was asked to show.
type target struct{ top1, loss, calibration, clear float64 }

var targets = map[terms.Event]target{
	terms.ElectrophilicSubstitution: {0.86, 0.43, 0.05, 0.93},
	terms.NucleophilicSubstitution:  {0.945, 0.16, 0.05, 0.97},
	terms.CycloadditionOrientation:  {0.88, 0.29, 0.05, 0.95},
}

var sameHalogenTarget = target{0.94, 0.17, 0.05, 0.97}

// recordMarkdown is docs/record.md.
func (r *Refitting) recordMarkdown() ([]byte, error) {
	var b strings.Builder
	p := func(format string, args ...any) { fmt.Fprintf(&b, format+"\n", args...) }
	p("# Record: how often the calls were right\n")
	p("Written by the refit (`lobecast record --refit FOLDER`), which anyone can repeat: the same outcomes give the same file on one architecture. The method is in [calibration.md](calibration.md). A chance is the probability that a site (or an orientation) is the recorded main product. **It is not a yield and not an isomer ratio.**\n")
	p("All figures of this section are cross-validated: five fits, each without one fifth of the substrates (dealt by a hash of the canonical SMILES), each beginning at the published parameters, and each asked only about the substrates it has not seen. Each substrate weighs 1, however many outcomes are recorded for it. Log-loss is the mean of −ln(chance of the recorded site). Calibration is the expected calibration error: first chance against its hit, ten bins of equal weight. ± is one standard error over substrates.\n")
	p("| event | outcomes | substrates | first right (95 %%, Wilson) | first or second | log-loss | calibration | clear calls | of these right | blind choice |")
	p("|---|---|---|---|---|---|---|---|---|---|")
	line := func(name string, list []prediction) score {
		s := scoreOf(list)
		low, high := wilsonLimits(s.top1, s.substrates)
		p("| %s | %d | %.0f | %.3f ± %.3f (%.3f–%.3f) | %.3f | %.3f ± %.3f | %.3f | %.1f %% | %.1f %% | %.3f |", name, s.n, s.substrates,
			s.top1, s.errTop1, low, high, s.top2, s.logLoss, s.errLoss, s.calibration, 100*s.clear, 100*s.clearHit, s.blind)
		return s
	}
	scores := map[terms.Event]score{}
	var same score
	for k, e := range fittedEvents {
		scores[e] = line(eventTitle(e), r.bySubstrate[k])
		if e == terms.NucleophilicSubstitution {
			same = line("… choice between like halogens", sameHalogen(r.bySubstrate[k]))
		}
	}
	p("\n## Against what was asked\n")
	p("| event | first right: asked, found | log-loss: at most, found | calibration: at most, found | clear calls right: asked, found |")
	p("|---|---|---|---|---|")
	verdict := func(ok, near bool) string {
		switch {
		case ok:
			return "met"
		case near:
			return "within one standard error"
		}
		return "**not met**"
	}
	compare := func(name string, t target, s score) {
		p("| %s | %.3f, %.3f: %s | %.2f, %.3f: %s | %.2f, %.3f: %s | %.2f, %.3f: %s |", name,
			t.top1, s.top1, verdict(s.top1 >= t.top1, s.top1+s.errTop1 >= t.top1),
			t.loss, s.logLoss, verdict(s.logLoss <= t.loss, s.logLoss-s.errLoss <= t.loss),
			t.calibration, s.calibration, verdict(s.calibration <= t.calibration, false),
			t.clear, s.clearHit, verdict(s.clearHit >= t.clear, s.clearHit+math.Sqrt(s.clearHit*(1-s.clearHit)/(s.clear*s.substrates)) >= t.clear))
	}
	for _, e := range fittedEvents {
		compare(eventTitle(e), targets[e], scores[e])
		if e == terms.NucleophilicSubstitution {
			compare("… choice between like halogens", sameHalogenTarget, same)
		}
	}
	p("\n## Over groups\n")
	p("The same, but with all outcomes that share the ring system and the substituents around the site in one part: how well the fit carries over to ring systems it has not seen.\n")
	p("| event | groups | first right | log-loss | calibration |")
	p("|---|---|---|---|---|")
	for k, e := range fittedEvents {
		s := scoreOf(r.byGroup[k])
		p("| %s | %d | %.3f ± %.3f | %.3f ± %.3f | %.3f |", eventTitle(e), r.groups(k), s.top1, s.errTop1, s.logLoss, s.errLoss, s.calibration)
	}
	p("\n## What the calibrated parameters add\n")
	p("The same terms and the same cross-validation, with the parameters of the set held at the published values (%s) and the weights alone fitted:\n", publishedBase)
	p("| event | first right | log-loss |")
	p("|---|---|---|")
	for k, e := range fittedEvents {
		s := scoreOf(r.published[k])
		p("| %s | %.3f ± %.3f | %.3f ± %.3f |", eventTitle(e), s.top1, s.errTop1, s.logLoss, s.errLoss)
	}
	if err := r.singleIndices(p); err != nil {
		return nil, err
	}
	p("\n## Reliability\n")
	p("First chances in ten bins of equal weight against how often the first site was the recorded one; the interval is that of %d resamplings of the substrates (95 %%), or, where a bin holds no miss and resampling knows no spread, Wilson's.\n", bootstrapSamples)
	for k, e := range fittedEvents {
		p("![%s](%s)\n", eventTitle(e), diagramName(e))
		p("| %s: said | seen | interval | within |", eventTitle(e))
		p("|---|---|---|---|")
		good := 0
		for _, x := range scoreOf(r.bySubstrate[k]).bins {
			in := x.said >= x.low-1e-9 && x.said <= x.high+1e-9
			word := "no"
			if in {
				word = "yes"
				good++
			}
			p("| %.3f | %.3f | %.3f–%.3f | %s |", x.said, x.seen, x.low, x.high, word)
		}
		p("\n%d of %d bins within.\n", good, reliabilityBins)
	}
	p("## Limits\n")
	p("Parameters and weights were drawn %d times from the posterior, outcomes simulated for the same substrates, and everything refitted. The drawn chance of the site that the refit puts first lay inside the refit's 90 %% limits:\n", simulations)
	p("| event | cases | inside |")
	p("|---|---|---|")
	for _, c := range r.coverage {
		p("| %s | %d | %.1f %% |", eventTitle(c.event), c.cases, 100*c.inside)
	}
	r.measured(p)
	r.mediumEffect(p)
	r.misses(p)
	if len(r.data.pairs.skipped) > 0 {
		p("\n## Outcomes left out\n")
		for _, s := range r.data.pairs.skipped {
			p("- %s", s)
		}
	}
	return []byte(b.String()), nil
}

// groups is the number of groups among the outcomes of fitted event k.
func (r *Refitting) groups(k int) int {
	seen := map[uint64]bool{}
	if k < len(r.data.sites) {
		for i := range r.data.sites[k].rows {
			seen[r.data.sites[k].rows[i].group] = true
		}
	} else {
		for i := range r.data.pairs.rows {
			seen[r.data.pairs.rows[i].group] = true
		}
	}
	return len(seen)
}

func diagramName(e terms.Event) string {
	return "reliability-" + strings.ReplaceAll(strings.ReplaceAll(string(e), ",", ""), " ", "-") + ".svg"
}

// reliabilitySVG draws the reliability diagram of fitted event k.
func (r *Refitting) reliabilitySVG(k int) []byte {
	const size, margin = 320.0, 44.0
	x := func(v float64) float64 { return margin + v*size }
	y := func(v float64) float64 { return margin/2 + (1-v)*size }
	var b strings.Builder
	e := fittedEvents[k]
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" width="%.0f" height="%.0f" viewBox="0 0 %.0f %.0f" font-family="sans-serif" font-size="11" role="img" aria-label="reliability, %s">`+"\n",
		size+1.5*margin, size+1.7*margin, size+1.5*margin, size+1.7*margin, eventTitle(e))
	fmt.Fprintf(&b, `<title>Reliability, %s: first chance said against how often it was right</title>`+"\n", eventTitle(e))
	fmt.Fprintf(&b, `<rect width="100%%" height="100%%" fill="#ffffff"/>`+"\n")
	for t := 0.0; t <= 1.0001; t += 0.2 {
		fmt.Fprintf(&b, `<path d="M%.1f %.1fH%.1fM%.1f %.1fV%.1f" stroke="#dddddd"/>`+"\n", x(0), y(t), x(1), x(t), y(0), y(1))
		fmt.Fprintf(&b, `<text x="%.1f" y="%.1f" text-anchor="middle">%.1f</text><text x="%.1f" y="%.1f" text-anchor="end">%.1f</text>`+"\n", x(t), y(0)+14, t, x(0)-5, y(t)+4, t)
	}
	fmt.Fprintf(&b, `<path d="M%.1f %.1fL%.1f %.1f" stroke="#888888" stroke-dasharray="4 3"/>`+"\n", x(0), y(0), x(1), y(1))
	for _, bin := range scoreOf(r.bySubstrate[k]).bins {
		fmt.Fprintf(&b, `<path d="M%.1f %.1fV%.1f" stroke="#1f5fa8" stroke-width="2"/><circle cx="%.1f" cy="%.1f" r="4" fill="#1f5fa8"/>`+"\n",
			x(bin.said), y(bin.low), y(bin.high), x(bin.said), y(bin.seen))
	}
	fmt.Fprintf(&b, `<text x="%.1f" y="%.1f" text-anchor="middle">first chance, as said</text>`+"\n", x(0.5), y(0)+30)
	fmt.Fprintf(&b, `<text transform="translate(%.1f %.1f) rotate(-90)" text-anchor="middle">share of first sites that were the recorded one</text>`+"\n", 12.0, y(0.5))
	b.WriteString("</svg>\n")
	return []byte(b.String())
}

// singleIndices tabulates how often one index alone finds the recorded site.
func (r *Refitting) singleIndices(p func(string, ...any)) error {
	p("\n## Single indices\n")
	p("How often one index alone puts the recorded site first (equal values share the hit), with the published set and, in brackets, with the calibrated one; the latter was fitted to these outcomes.\n")
	p("| event | %s |", strings.Join(IndexNames[:7], " | "))
	p("|---%s|", strings.Repeat("|---", 7))
	sets := []*frontier.Set{r.data.base, r.data.prior.setWith(r.data.base, r.point.theta)}
	for _, f := range r.data.sites {
		var cells [7][2]string
		for s, set := range sets {
			hits, total, err := f.indexHits(set)
			if err != nil {
				return err
			}
			for k := range cells {
				cells[k][s] = fmt.Sprintf("%.3f", hits[k]/total)
			}
		}
		row := "| " + eventTitle(f.event)
		for _, c := range cells {
			row += " | " + c[0] + " (" + c[1] + ")"
		}
		p("%s |", row)
	}
	p("\nDiels–Alder orientation, by the energy of the better first bond alone, and with the second bond under way:\n")
	p("| | published set | calibrated set |")
	p("|---|---|---|")
	for _, tau := range []float64{0, r.point.weights[len(r.data.sites)][1]} {
		var cells []string
		for _, set := range sets {
			hit, total := 0.0, 0.0
			for i := range r.data.pairs.rows {
				row := r.data.pairs.rows[i] // a copy: the linearization stays
				row.active = nil
				if err := row.linearize(set.Solve, tau, nil); err != nil {
					return err
				}
				a, b := math.Min(row.z[0], row.z[1]), math.Min(row.z[2], row.z[3])
				total += row.weight
				switch {
				case math.Abs(a-b) <= rankTolerance:
					hit += row.weight / 2
				case a < b:
					hit += row.weight
				}
			}
			cells = append(cells, fmt.Sprintf("%.3f", hit/total))
		}
		p("| τ = %.2f | %s |", tau, strings.Join(cells, " | "))
	}
	return nil
}

// indexHits counts, weighted, how often each index alone puts the recorded site first, in
// the form as written.
func (f *siteFit) indexHits(set *frontier.Set) (hits [7]float64, total float64, err error) {
	toward := f.event.Toward()
	sign := witnesses(toward)
	sign["free_valence"], sign["self_polarizability"] = 1, 1
	var w Workspace
	values := map[*substrateData][][8]float64{}
	for i := range f.rows {
		row := &f.rows[i]
		v := values[row.sub]
		if v == nil {
			form := row.sub.forms[0]
			v = make([][8]float64, len(row.sub.sites))
			for t, pi := range form.pi {
				sol, err := set.Solve(pi)
				if err != nil {
					return hits, 0, err
				}
				e, err := evaluate(sol, SmoothingDecay, &w)
				if err != nil {
					return hits, 0, err
				}
				for c, centres := range form.centre[t] {
					for _, centre := range centres {
						for k, x := range e.values(centre, toward) {
							v[c][k] += x / float64(len(centres)*len(form.pi))
						}
					}
				}
			}
			values[row.sub] = v
		}
		total += row.weight
		for k := range hits {
			s := sign[IndexNames[k]]
			best, ties, mine := math.Inf(-1), 0, false
			for c := range v {
				x := s * v[c][k]
				switch {
				case math.IsNaN(x):
				case x > best+rankTolerance:
					best, ties, mine = x, 1, c == row.truth
				case x >= best-rankTolerance:
					ties++
					mine = mine || c == row.truth
				}
			}
			if mine {
				hits[k] += row.weight / float64(ties)
			}
		}
	}
	return hits, total, nil
}

// mediumEffect reports what the mixture of protonated and neutral form does.
func (r *Refitting) mediumEffect(p func(string, ...any)) {
	f := r.data.sites[0]
	w := r.point.weights[0]
	delta := make([]float64, r.data.prior.columns.n+1)
	var s fitScratch
	p("\n## Medium\n")
	p("Electrophilic substitution of substrates with a basic nitrogen, by the fit to all outcomes: the mixture of both forms in fitted proportion, against each form alone.\n")
	p("| outcomes | number | share of the protonated form | log-loss mixed | as written | protonated | first right mixed | as written | protonated |")
	p("|---|---|---|---|---|---|---|---|---|")
	names := []string{"strong acid among the reagents", "nitration, acid not recorded", "other, acid not recorded"}
	for part, name := range names {
		var total, share float64
		var loss, hit [3]float64
		n := 0
		for i := range f.rows {
			row := f.rows[i]
			if len(row.sub.forms) < 2 || row.medium[part] == 0 {
				continue
			}
			n++
			total += row.weight
			share += row.weight * f.mixture(&row, w)
			full := *row.sub
			for v := range 3 {
				sub := full
				row := row
				row.sub = &sub
				if v > 0 {
					sub.forms = full.forms[v-1 : v]
					row.features = row.features[v-1 : v]
				}
				x := prediction{chances: f.chances(&row, delta, w, &s), truth: row.truth}
				loss[v] -= row.weight * math.Log(x.chances[row.truth])
				hit[v] += row.weight * boolFloat(x.place() == 0)
			}
		}
		if n == 0 {
			continue
		}
		p("| %s | %d | %.2f | %.3f | %.3f | %.3f | %.3f | %.3f | %.3f |", name, n, share/total,
			loss[0]/total, loss[1]/total, loss[2]/total, hit[0]/total, hit[1]/total, hit[2]/total)
	}
}

// measured compares with partial rate factors and isomer percentages, which were not
// fitted, where their file lies beside the outcomes.
func (r *Refitting) measured(p func(string, ...any)) {
	path := filepath.Join(filepath.Dir(filepath.Clean(r.folder)), "rate_factors.csv")
	type site struct {
		m     *molecule.Molecule
		atom  int
		value float64
	}
	type key struct{ reaction, substrate string }
	byMolecule := map[key][]site{}
	var order []key
	err := table(path, []string{"reaction", "substrate", "smiles_site_mapped", "value", "unit"}, func(get func(string) string) error {
		v, ok := rangeMiddle(get("value"))
		m, err := molecule.ParseSMILES(get("smiles_site_mapped"))
		if !ok || err != nil || m.AtomByMap(1) < 0 {
			return nil
		}
		unit := get("unit")
		if !strings.HasPrefix(unit, "partial rate factor") && !strings.HasPrefix(unit, "% of product") {
			return nil
		}
		k := key{get("reaction"), get("substrate")}
		if len(byMolecule[k]) == 0 {
			order = append(order, k)
		}
		byMolecule[k] = append(byMolecule[k], site{m, m.AtomByMap(1), v})
		return nil
	})
	if err != nil {
		p("\n(No file of rate factors stands beside the outcomes: no comparison with measured ratios.)")
		return
	}
	p("\n## Measured rate factors and isomer percentages\n")
	p("Not fitted. Pairs of sites within one polycyclic or substituted hydrocarbon, ordered as their partial rate factors: localization energy with the published and with the calibrated set, and the chances (per position).\n")
	calibrated := r.data.prior.setWith(r.data.base, r.point.theta)
	var pairs, published, fitted, chances float64
	var rows []string
	var said, found []float64
	for _, k := range order {
		list := byMolecule[k]
		if len(list) < 2 {
			continue
		}
		percent := strings.Contains(k.reaction, "isomer")
		incoming := ""
		if strings.Contains(k.reaction, "nitration") {
			incoming = "nitration"
		} else if strings.Contains(k.reaction, "bromination") || strings.Contains(k.reaction, "chlorination") {
			incoming = "bromination"
		} else if strings.Contains(k.reaction, "cetylation") {
			incoming = "acylation"
		}
		l0, err0 := siteValues(list[0].m, r.data.base, r, false, incoming)
		l1, err1 := siteValues(list[0].m, calibrated, r, false, incoming)
		ch, err2 := siteValues(list[0].m, calibrated, r, true, incoming)
		if err0 != nil || err1 != nil || err2 != nil {
			continue
		}
		// All rows of a substrate map another atom of the same molecule: find the atom in the
		// first one by its canonical place.
		at := make([]int, len(list))
		for i, s := range list {
			at[i] = sameAtom(s.m, s.atom, list[0].m)
		}
		if percent {
			sum := 0.0
			for i := range list {
				if at[i] >= 0 {
					sum += list[i].value
				}
			}
			for i := range list {
				if at[i] >= 0 && sum > 50 {
					said = append(said, ch[at[i]].whole)
					found = append(found, list[i].value/100)
				}
			}
			continue
		}
		if strings.Contains(k.reaction, "radical") || strings.Contains(k.reaction, "phenylation") {
			continue
		}
		n, a, b, c := 0.0, 0.0, 0.0, 0.0
		for i := range list {
			for j := range i {
				d := list[i].value - list[j].value
				if at[i] < 0 || at[j] < 0 || d == 0 {
					continue
				}
				n++
				order := func(x float64) float64 { // 1 where x has the sign of d
					switch {
					case math.Abs(x) < rankTolerance:
						return 0.5
					case (x > 0) == (d > 0):
						return 1
					}
					return 0
				}
				a += order(l0[at[j]].each - l0[at[i]].each)
				b += order(l1[at[j]].each - l1[at[i]].each)
				c += order(ch[at[i]].each - ch[at[j]].each)
			}
		}
		if n == 0 {
			continue
		}
		pairs += n
		published += a
		fitted += b
		chances += c
		rows = append(rows, fmt.Sprintf("| %s | %s | %.0f | %.1f | %.1f | %.1f |", k.reaction, k.substrate, n, a, b, c))
	}
	p("| reaction | substrate | pairs | L, published | L, calibrated | chances |")
	p("|---|---|---|---|---|---|")
	sort.Strings(rows)
	for _, row := range rows {
		p("%s", row)
	}
	p("| all | | %.0f | %.1f | %.1f | %.1f |", pairs, published, fitted, chances)
	if len(said) > 2 {
		var sx, sy, sxx, syy, sxy, dev float64
		for i := range said {
			sx += said[i]
			sy += found[i]
			sxx += said[i] * said[i]
			syy += found[i] * found[i]
			sxy += said[i] * found[i]
			dev += math.Abs(said[i] - found[i])
		}
		n := float64(len(said))
		corr := (n*sxy - sx*sy) / math.Sqrt((n*sxx-sx*sx)*(n*syy-sy*sy))
		p("\nChances of nitration against measured isomer percentages (%d sites of monosubstituted benzenes, all equivalent positions together): correlation %.2f, mean absolute difference %.2f. The chance of the main product is meant to be farther from the middle than a ratio of isomers: where 60 %% of the product is para, the para product is nearly always the recorded one.", len(said), corr, dev/n)
	}
}

// rangeMiddle reads "18", "15-20", "~1", "0-2"; ranges stand for their middle.
func rangeMiddle(text string) (float64, bool) {
	text = strings.TrimLeft(strings.TrimSpace(text), "~<>≈")
	if a, b, ok := strings.Cut(text, "-"); ok && a != "" {
		x, err1 := strconv.ParseFloat(a, 64)
		y, err2 := strconv.ParseFloat(b, 64)
		return (x + y) / 2, err1 == nil && err2 == nil
	}
	v, err := strconv.ParseFloat(text, 64)
	return v, err == nil
}

// sameAtom finds in another reading of one molecule an atom that is equivalent to the
// given one; -1 where the molecules differ.
func sameAtom(m *molecule.Molecule, atom int, other *molecule.Molecule) int {
	if m.FlatSMILES() != other.FlatSMILES() {
		return -1
	}
	want := m.CanonicalOrder()[atom]
	for i, r := range other.CanonicalOrder() {
		if r == want {
			return i
		}
	}
	return -1
}

// siteValue is a number per atom: of one position, and of all equivalent ones.
type siteValue struct{ each, whole float64 }

// siteValues gives localization energies toward an electrophile, or chances of
// electrophilic substitution by the fit, atom by atom.
func siteValues(m *molecule.Molecule, set *frontier.Set, r *Refitting, chances bool, incoming string) (map[int]siteValue, error) {
	sub, err := newSubstrate(terms.ElectrophilicSubstitution, m, nil)
	if err != nil {
		return nil, err
	}
	sub.forms = sub.forms[:1]
	f := r.data.sites[0]
	var w Workspace
	form := sub.forms[0]
	if err := form.linearize(f.event, f.count, set, nil, &w); err != nil {
		return nil, err
	}
	out := map[int]siteValue{}
	row := siteRow{sub: sub, class: attackerClassOf(f.event, incoming)}
	features := make([][]feature, len(sub.sites))
	for c, x := range form.features {
		features[c] = crossFeatures(f.event, row.class, f.share, plainTerms(f.event), x)
	}
	row.features = [][][]feature{features}
	var s fitScratch
	p := f.chances(&row, nil, r.point.weights[0], &s)
	for c, atoms := range sub.sites {
		v := siteValue{each: form.z[c*f.count], whole: form.z[c*f.count]}
		if chances {
			v = siteValue{p[c] / float64(len(atoms)), p[c]}
		}
		for _, a := range atoms {
			out[a] = v
		}
	}
	return out, nil
}

// mostMisses is the number of misses of each event listed.
const mostMisses = 20

// misses lists the surest misses of each event, each with what it teaches where someone
// has looked at it.
func (r *Refitting) misses(p func(string, ...any)) {
	p("\n## The surest misses\n")
	p("The %d outcomes of each event (one per substrate) for which the fit that had not seen them was surest and wrong, looked at one by one. Atom numbers from 1.", mostMisses)
	lessons := map[string]string{}
	_ = calibrationTable("lessons.csv", 2, func(rec []string) error {
		lessons[rec[0]] = rec[1]
		return nil
	})
	number := func(m *molecule.Molecule, atoms []int) string { return listNumbers(m, atoms) }
	for k, e := range fittedEvents {
		p("\n### %s\n", eventTitle(e))
		p("| outcome | structure | first said (chance) | recorded (chance) | what it teaches |")
		p("|---|---|---|---|---|")
		list := r.bySubstrate[k]
		var order []int
		for i := range list {
			if list[i].place() > 0 {
				order = append(order, i)
			}
		}
		sort.SliceStable(order, func(a, b int) bool { return list[order[a]].first() > list[order[b]].first() })
		seen := map[int]bool{}
		n := 0
		for _, i := range order {
			if n == mostMisses {
				break
			}
			x := &list[i]
			if seen[x.key] {
				continue
			}
			seen[x.key] = true
			n++
			best := x.best()
			if k < len(r.data.sites) {
				row := &r.data.sites[k].rows[i]
				p("| %s | `%s` | %s (%.2f) | %s (%.3f) | %s |", row.id, row.sub.m.Source, number(row.sub.m, row.sub.sites[best]), x.chances[best],
					number(row.sub.m, row.sub.sites[x.truth]), x.chances[x.truth], lessons[row.id])
				continue
			}
			row := &r.data.pairs.rows[i]
			atom := func(m *molecule.Molecule, pi *frontier.Pi, c int) int { return m.Atoms[pi.Centres[c].Atom].Number }
			a, c := atom(row.a, row.piA, row.ends[0]), atom(row.a, row.piA, row.ends[1])
			b, d := atom(row.b, row.piB, row.ends[2]), atom(row.b, row.piB, row.ends[3])
			p("| %s | `%s` + `%s` | %d–%d, %d–%d (%.2f) | %d–%d, %d–%d (%.3f) | %s |", row.id, row.a.Source, row.b.Source,
				a, d, c, b, x.chances[1], a, b, c, d, x.chances[0], lessons[row.id])
		}
	}
}
