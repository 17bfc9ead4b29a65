//go:build unix

package checker_test

import (
	"testing"

	"kern/checker"
	"kern/checker/generate"
)

// BenchmarkCheckBent is the main job with full checks: 10,000 columns under 26
// combinations each, all with axial force, moments about both axes,
// lateral-torsional buckling and the interaction of Annex B. It reports the time
// of a job and its processor time on all cores.
func BenchmarkCheckBent(b *testing.B) {
	const n = 10_000
	files := generate.BentProject(n, 1)
	busy := used()
	for b.Loop() {
		r := checker.Check(loaded(files), nil)
		if r.Summary.Members != n || r.Summary.Undecided > 0 || r.Summary.Passes < n/2 {
			b.Fatalf("%+v", r.Summary)
		}
	}
	b.ReportMetric(b.Elapsed().Seconds()/float64(b.N), "s/job")
	b.ReportMetric((used()-busy).Seconds()/float64(b.N), "cpu-s/job")
}
