package size_test

import (
	"fmt"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/generate"
	"kern/checker/size"
	"kern/lang"
)

// twenty are 20 combinations of the cases of generate.Shared.
func twenty() string {
	var b strings.Builder
	for i := range 20 {
		fmt.Fprintf(&b, "combination U%d = %.2f G + %.2f Q + %.2f S + %.2f W\n", i, 1.35-0.01*float64(i%5), 1.5-0.03*float64(i%4), 0.75-0.02*float64(i%3), 0.9-0.04*float64(i%2))
	}
	return b.String()
}

func columns(n int) *checker.Report {
	shared := strings.Replace(generate.Shared, "    actions  \"EN 1990:2002\" eq \"6.10\"\n", "", 1)
	text := shared + twenty() + generate.Columns(n, 3)
	return checker.Check(lang.Load([]string{"a.kern"}, func(string) (string, error) { return text, nil }, nil), nil)
}

// BenchmarkSections is the lightest section, of the own family and of all that
// are alike, of 1,000 columns under 20 combinations.
func BenchmarkSections(b *testing.B) {
	report := columns(1000)
	for b.Loop() {
		found := 0
		for _, m := range size.All(report, report.Members, size.Options{Kinds: []size.Kind{size.Section}}, nil) {
			found += len(m.Mends)
		}
		b.ReportMetric(float64(found), "sections")
	}
}

// BenchmarkMends is all mends of one member that fails, as the editor asks for
// them, in a file of 1,000.
func BenchmarkMends(b *testing.B) {
	report := columns(1000)
	for _, m := range report.Members {
		if m.Verdict.String() != "fails" {
			continue
		}
		b.Run(m.Name, func(b *testing.B) {
			found := 0
			for b.Loop() {
				found = len(size.Mends(report, m, size.Options{}))
			}
			b.ReportMetric(float64(found), "mends")
		})
		break
	}
}
