package page

import (
	"bytes"
	"strings"
	"testing"
	"time"

	"lobecast/reactivity/report"
)

// FuzzRender: every report that can be read gives a page, or an error with words, in
// bounded time; nothing of the report gets into the page as markup.
func FuzzRender(f *testing.F) {
	for _, r := range []*report.Report{sitesReport(f, "C=CC")} {
		var b bytes.Buffer
		if err := r.Write(&b); err != nil {
			f.Fatal(err)
		}
		f.Add(b.String())
	}
	f.Add("format = 1\nkind = \"review\"\ntitle = \"<script>\"\n[[step]]\n[step.planned]\natoms = [-1, 99999]\nrank = -3\n")
	f.Add("format = 1\nkind = \"pair\"\n[[pair]]\n[[pair.adduct]]\nbonds = [[1, 2], [3, 4], [5]]\n[[pair.joining]]\na_atoms = [0]\n")
	f.Add("format = 1\nkind = \"symmetry\"\n[[process]]\ncomponents = \"π4s+π2s\"\n")
	f.Add("format = 1\nkind = \"orbitals\"\n[[structure]]\nsmiles = \"C=C\"\n[[structure.level]]\nx = nan\ncoefficients = [inf, 1]\n[[structure.atom]]\ncentre = 7\n")
	f.Fuzz(func(t *testing.T, text string) {
		r, err := report.Read([]byte(text))
		if err != nil {
			return
		}
		began := time.Now()
		html, err := Render(r)
		if d := time.Since(began); d > 4*time.Second {
			t.Fatalf("%d bytes took %v", len(text), d)
		}
		if err != nil {
			if err.Error() == "" {
				t.Error("an error without a word")
			}
		} else if strings.Contains(strings.ToLower(string(html)), "<script") {
			t.Error("a script in the page")
		}
		if svg, err := Picture(r, Choice{}); err == nil && !bytes.Contains(svg, []byte("<svg")) {
			t.Error("a picture without svg")
		}
	})
}
