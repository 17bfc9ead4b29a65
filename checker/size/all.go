package size

import (
	"runtime"
	"sync"
	"sync/atomic"

	"kern/checker"
	"kern/checker/edit"
)

// Sized is a member with its mends.
type Sized struct {
	Result *checker.Result
	Mends  []Mend
}

// All sizes members on all cores; the answer is in their order. progress may be
// nil; it is called from several goroutines.
func All(report *checker.Report, members []*checker.Result, o Options, progress checker.Progress) []Sized {
	out := make([]Sized, len(members))
	layout := edit.NewLayout(report.Project)
	var next, done atomic.Int64
	var wait sync.WaitGroup
	for range min(runtime.GOMAXPROCS(0), len(members)) {
		wait.Go(func() {
			for {
				i := int(next.Add(1)) - 1
				if i >= len(members) {
					return
				}
				out[i] = Sized{members[i], mends(report, members[i], o, layout)}
				if d := done.Add(1); progress != nil {
					progress(int(d), len(members))
				}
			}
		})
	}
	wait.Wait()
	return out
}
