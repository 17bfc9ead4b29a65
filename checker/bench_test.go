package checker

import (
	"fmt"
	"io/fs"
	"maps"
	"runtime"
	"slices"
	"testing"
	"time"

	"kern/checker/generate"
	"kern/lang"
)

func load(files map[string]string) *lang.Project {
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
// that the report holds, and the time per column against that of the smallest
// size (1.0 is exactly linear growth).
func BenchmarkCheck(b *testing.B) {
	perColumn := 0.0
	for _, n := range []int{1_000, 10_000, 100_000} {
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			files := generate.Project(n, 1)
			var report *Report
			runtime.GC()
			start := time.Now()
			rounds := 0
			for b.Loop() {
				report = Check(load(files), nil)
				rounds++
			}
			each := time.Since(start).Seconds() / float64(rounds) / float64(n)
			if report.Summary.Members != n || report.Summary.Errors > report.Summary.Fails*3 {
				b.Fatalf("%+v", report.Summary)
			}
			runtime.GC()
			var m runtime.MemStats
			runtime.ReadMemStats(&m)
			if perColumn == 0 {
				perColumn = each
			}
			b.ReportMetric(1/each, "columns/s")
			b.ReportMetric(float64(m.HeapAlloc)/(1<<20), "heap-MiB")
			b.ReportMetric(each/perColumn, "growth")
			runtime.KeepAlive(report)
		})
	}
}
