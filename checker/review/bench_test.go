package review_test

import (
	"fmt"
	"strings"
	"testing"

	"kern/checker/generate"
	"kern/checker/review"
)

// BenchmarkReview reviews 2,000 members: one edit of one member, an edit of the
// basis that reaches all of them, and three edits that reach all of them.
func BenchmarkReview(b *testing.B) {
	before := generate.Project(2000, 1)
	with := func(old, new string) map[string]string {
		out := map[string]string{}
		for name, text := range before {
			out[name] = text
		}
		for i := 0; i < strings.Count(old, "|")+1; i++ {
			o, n := strings.Split(old, "|")[i], strings.Split(new, "|")[i]
			for name, text := range out {
				if strings.Contains(text, o) {
					out[name] = strings.Replace(text, o, n, 1)
				}
			}
		}
		return out
	}
	for _, c := range []struct{ name, old, new string }{
		{"one member", "column C7 \"Column on grid 7\" {", "column C7 \"Column on grid 7\" {\n    load G 10 kN"},
		{"basis", "show     kN, mm, MPa", "show     kN, mm, MPa\n    gamma_M1 = 1.05 because \"site\""},
		{"three shared edits", "show     kN, mm, MPa|\"E1\"|case S snow \"below 1000 m\"", "show     kN, mm, MPa\n    gamma_M1 = 1.05 because \"site\"\n    gamma_Q = 1.4 because \"site\"|\"E1\"|case S snow \"above 1000 m\""},
	} {
		after := with(c.old, c.new)
		b.Run(c.name, func(b *testing.B) {
			changes := 0
			for b.Loop() {
				changes = len(review.Compare(check(before), check(after)).Changes)
			}
			b.ReportMetric(float64(changes), "changes")
			if changes == 0 {
				b.Fatal(fmt.Sprint("nothing changed"))
			}
		})
	}
}
