package checker_test

import (
	"math"
	"testing"

	"kern/checker"
	"kern/lang"
)

// probed checks a calculation of one file.
func probed(t *testing.T, text string) *checker.Report {
	t.Helper()
	p := lang.Load([]string{"a.kern"}, func(string) (string, error) { return text, nil }, nil)
	r := checker.Check(p, nil)
	for _, d := range r.Diagnostics {
		t.Logf("%s: %s", d.Rule, d.Message)
	}
	return r
}

// TestProbe: probing with the loads as they are gives the member's own answer,
// and probing with other loads gives that of a text which says them.
func TestProbe(t *testing.T) {
	for _, standard := range checker.Stated() {
		text := func(n, m string) string {
			return "basis { standard " + standard + " }\ncase G permanent\ncolumn A { section = \"HEB 160\"; material = \"S355\"; height = 4.8 m; selfweight off\n" +
				"load G " + n + " kN at top\nload G " + m + " kN at top offset 100 mm about major\nload G " + m + " kN/m about minor\n}\n"
		}
		r := probed(t, text("300", "2")).Members[0]
		for k := range r.Combinations() {
			if u, rule := r.Probe(k, 1, 1); math.Abs(u-r.Utilisation) > 1e-12 || rule != r.Governing {
				t.Errorf("%s: %g by %s, probed %g by %s", standard, r.Utilisation, r.Governing, u, rule)
			}
		}
		bare := probed(t, `basis { standard `+standard+` }
case G permanent
column A { section = "HEB 160"; material = "S355"; height = 4.8 m; selfweight off
load G 453 kN at top
load G 0.6 kNm about major at top
load G 6 kN/m about minor
}
`).Members[0]
		if u, rule := r.Probe(0, 1.5, 3); math.Abs(u-bare.Utilisation) > 1e-9 || rule != bare.Governing {
			t.Errorf("%s: %g by %s, probed %g by %s", standard, bare.Utilisation, bare.Governing, u, rule)
		}
		if u, _ := r.Probe(99, 1, 1); !math.IsNaN(u) {
			t.Errorf("a combination that is not there has the utilisation %g", u)
		}
	}
}
