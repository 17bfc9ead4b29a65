//go:build unix

package checker_test

import (
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/generate"
)

// BenchmarkCheckBentAISC is BenchmarkCheckBent to ANSI/AISC 360, by LRFD: flexure,
// lateral-torsional buckling, shear, combined forces and the bracing of columns.
func BenchmarkCheckBentAISC(b *testing.B) {
	const n = 10_000
	files := generate.BentProject(n, 1)
	found := false
	for name, text := range files {
		if i := strings.Index(text, "standard \"EN 1993"); i >= 0 {
			end := i + strings.IndexByte(text[i:], '\n')
			files[name], found = text[:i]+"standard \"ANSI/AISC 360-22\" by LRFD"+text[end:], true
		}
	}
	if !found {
		b.Fatal("the project names no standard")
	}
	busy := used()
	for b.Loop() {
		r := checker.Check(loaded(files), nil)
		if r.Summary.Members != n || r.Summary.Passes < n/4 {
			b.Fatalf("%+v", r.Summary)
		}
	}
	b.ReportMetric(b.Elapsed().Seconds()/float64(b.N), "s/job")
	b.ReportMetric((used()-busy).Seconds()/float64(b.N), "cpu-s/job")
}
