package checker

import (
	"fmt"
	"math/rand/v2"
	"strings"
	"testing"

	"kern/checker/generate"
	"kern/lang"

	"github.com/google/go-cmp/cmp"
)

// print writes a report in full, for comparison.
func print(r *Report) string {
	var b strings.Builder
	for _, d := range r.Diagnostics {
		fmt.Fprintln(&b, d.File, d.Span, d.Severity, d.Rule, d.Message, d.Member, d.Related, d.Fixes, d.Notes)
	}
	for _, m := range r.Members {
		file, at := r.Place(m)
		fmt.Fprintln(&b, file, at, m.Name, m.Title, m.Verdict, m.Utilisation, m.Governing, m.Combination, m.Coverage, m.Assumptions, m.Missing)
		for _, c := range m.Checks {
			fmt.Fprintln(&b, "  ", c)
		}
	}
	for _, c := range r.AllCalculations() {
		for _, v := range c.Env.LateValues() {
			q, ok := c.Env.Value(v)
			fmt.Fprintln(&b, v.Name, q, ok)
		}
	}
	fmt.Fprintln(&b, r.Summary)
	return b.String()
}

// TestAgainEqualsFromScratch edits calculations at random, piece by piece, and
// holds the incremental report against one from scratch after every edit.
func TestAgainEqualsFromScratch(t *testing.T) {
	snippets := []string{"\n", "}", "{", "load G 10 kN at top\n", "column C3 as C1 { height = 3 m }\n", "column C1", "section s1 = \"HEB 180\"\n", "section s9 = \"IPE 200\"\n",
		"height = 4 m\n", "5", "kN", "as C2", " ", "#", "\"", "(", "x = 3 m\n", "case H imposed \"H\"\n", "include \"other.kern\"\n", "C2, C9", "}basis {\n    selfweight off\n}\n", "x = 1 m; column C9 { section = \"HEB 100\" }\n", "basis {\n}\n", "depart slenderness because \"x\"\n", "require N_b_minor >= 1 kN\n",
		"load G C1.N_Ed\n", "load G L2.base.G at top\n", "require utilisation <= C2.utilisation\n", "pad = C1.base.N / 3 kPa\n", "load G pad * 1 kPa\n", "C3.", ".N_Ed",
		"lift base to 1 m { section = s1 }\n", "lift 1 m to top { section = \"HEB 120\" }\n", "reduce imposed by storeys\n", "moments nominal\n"}
	r := rand.New(rand.NewPCG(3, 4))
	rounds := 60
	if testing.Short() {
		rounds = 10
	}
	for range rounds {
		files := map[string]string{"a.kern": generate.Shared + generate.Columns(6, r.Uint64()) + "column D1 as C1 { height = 2 m }\ncolumn D2, D3 as D1 { top fixed }\ncolumn D4 as Q { load G 5 kN }\n" +
			"column L1 as C1 { load G 0.1 * C2.base.N at top }\ncolumn L2 as L1 { require N_b_minor > L1.N_Ed }\ncolumn L3 as C1 { load Q share }\nshare = twice / 4\ntwice = L1.base.N + L2.base.Q\nforces \"t.csv\" compression positive\ncolumn T1, T2 { section = \"HEB 100\"; material = \"S235\"; height = 3 m }\n",
			"t.csv": "member,combination,N [kN],M_major [kNm]\nT1,U,100,5\nT2,U,120,0\nT2,V,130,7\n", "other.kern": "y = 2 m\ncolumn Z1 { section = \"HEB 100\"; material = \"S235\"; height = y; load 5 kN }\n"}
		names := []string{"a.kern", "other.kern"}
		read := func(name string) (string, error) {
			if text, ok := files[name]; ok {
				return text, nil
			}
			return "", fmt.Errorf("there is no such file")
		}
		project := lang.Load(names, read, nil)
		report := Check(project, nil)
		for range 25 {
			name := []string{"a.kern", "a.kern", "a.kern", "a.kern", "a.kern", "a.kern", "other.kern", "t.csv"}[r.IntN(8)]
			text := files[name]
			i := r.IntN(len(text) + 1)
			j := i + r.IntN(min(12, len(text)-i)+1)
			files[name] = text[:i] + snippets[r.IntN(len(snippets))] + text[j:]
			project = lang.Load(names, read, project)
			report = CheckAgain(report, project, nil)
			want := print(Check(lang.Load(names, read, nil), nil))
			if got := print(report); got != want {
				t.Fatalf("after an edit of %s at %d (-from scratch +incremental):\n%s\n%s", name, i, cmp.Diff(strings.Split(want, "\n"), strings.Split(got, "\n")), files[name])
			}
		}
	}
}
