package checker_test

import (
	"strings"
	"testing"
)

// TestChoose says what a line of permitted sections brings, and that it never
// changes a verdict.
func TestChoose(t *testing.T) {
	text := `basis { standard "EN 1993-1-1:2005" }
column A1 {
    section  = "HEB 160"
    material = "S355"
    height   = 3 m
    CHOOSE
    load 600 kN
}
`
	for _, c := range []struct{ line, rule, says string }{
		{"choose section from HEB", "lighter-section", "HEB 140"},
		{"choose section from HEB, HEA", "lighter-section", "HEA 160"},
		{"choose section from HEB with depth <= 150 mm", "section-not-permitted", "160 mm deep"},
		{"choose section from heb with width <= 150 mm", "section-not-permitted", "160 mm wide"},
		{"choose section from IPE, UC", "section-not-permitted", "no IPE or UC"},
		{"choose section from HEM", "section-not-permitted", "no HEM"},
		{"note \"none\"", "", ""},
	} {
		r := checkFiles(map[string]string{"a.kern": strings.Replace(text, "CHOOSE", c.line, 1)})
		found := false
		for _, d := range r.Diagnostics {
			if d.Rule == "lighter-section" || d.Rule == "section-not-permitted" {
				found = true
				if d.Rule != c.rule || !strings.Contains(d.Message, c.says) {
					t.Errorf("%s: %s %s", c.line, d.Rule, d.Message)
				}
			}
		}
		if found != (c.rule != "") || r.Summary.Passes != 1 {
			t.Errorf("%s: found %v, %+v", c.line, found, r.Summary)
		}
	}
}
