package checker_test

import (
	"fmt"
	"math"
	"testing"

	"kern/checker/standard"
)

// Columns written as an American engineer would, sections and steels by their
// names: the compressive strength by LRFD against AISC's design examples (v16.0,
// seen): E.1A and E.9, E.7 for the plane of the stem. The load is the printed
// strength, so that the utilisation is 1.
func TestPublishedAmericanColumns(t *testing.T) {
	for _, c := range []struct {
		what, made, lengths, rule string
		strength                  float64 // kip
		most                      float64 // per cent
	}{
		{"E.1A", `section = "W14x132"; material = "A992"`, "height = 30 ft", "flexural-buckling-minor", 893, 0.4},
		{"E.7", `section = "WT7x34"; material = "ASTM A992"`, "height = 20 ft", "", 128, 0.6},
		{"E.9", `section = "HSS12x10x3/8"; material = "A500 Grade C"`, "height = 16 ft", "flexural-buckling-minor", 556, 0.6},
		{"E.9 by the decimal wall", `section = "HSS12x10x.375"; material = "A500 Gr C"`, "height = 16 ft", "flexural-buckling-minor", 556, 0.6},
	} {
		text := fmt.Sprintf("basis { standard \"ANSI/AISC 360-22\" by LRFD; selfweight off }\ncase D permanent\ncombination LC1 = 1.0 D\ncolumn A1 { %s; %s; load D %g kip at top }\n", c.made, c.lengths, c.strength)
		r := publishedReport(t, text)
		worst := standard.Check{Utilisation: math.Inf(-1)}
		for _, k := range member(r, "A1").Checks {
			if k.Utilisation > worst.Utilisation {
				worst = k
			}
		}
		if !(math.Abs(100*(worst.Utilisation-1)) <= c.most) || c.rule != "" && worst.Rule != c.rule {
			t.Errorf("%s: %s %.4f, want 1 within %g %%", c.what, worst.Rule, worst.Utilisation, c.most)
		}
	}
}
