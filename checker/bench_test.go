//go:build unix

package checker_test

import (
	"fmt"
	"io/fs"
	"maps"
	"runtime"
	"slices"
	"testing"
	"time"

	"kern/checker"
	"kern/checker/generate"
	"kern/lang"
)

func loaded(files map[string]string) *lang.Project {
	return lang.Load(slices.Sorted(maps.Keys(files)), func(name string) (string, error) {
		text, ok := files[name]
		if !ok {
			return "", fs.ErrNotExist
		}
		return text, nil
	}, nil)
}

// BenchmarkCheck is the main job from the texts of the files to the report, on
// all cores: 26 combinations a column. It reports columns per second, the heap
// that the report holds, the processor time a column, and that time against the
// smallest size's (1.0 is exactly linear growth).
func BenchmarkCheck(b *testing.B) {
	perColumn := 0.0
	for _, n := range []int{1_000, 10_000, 100_000} {
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			files := generate.Project(n, 1)
			var report *checker.Report
			runtime.GC()
			start, busy := time.Now(), used()
			rounds := 0
			for b.Loop() {
				report = checker.Check(loaded(files), nil)
				rounds++
			}
			each := time.Since(start).Seconds() / float64(rounds) / float64(n)
			cpu := (used() - busy).Seconds() / float64(rounds) / float64(n)
			if report.Summary.Members != n || report.Summary.Errors > report.Summary.Fails*3 {
				b.Fatalf("%+v", report.Summary)
			}
			runtime.GC()
			var m runtime.MemStats
			runtime.ReadMemStats(&m)
			if perColumn == 0 {
				perColumn = cpu
			}
			b.ReportMetric(1/each, "columns/s")
			b.ReportMetric(float64(m.HeapAlloc)/(1<<20), "heap-MiB")
			b.ReportMetric(cpu*1e6, "cpu-us/column")
			b.ReportMetric(cpu/perColumn, "growth")
			runtime.KeepAlive(report)
		})
	}
}
