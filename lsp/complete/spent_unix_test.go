//go:build unix

package complete

import (
	"syscall"
	"testing"
	"time"
)

// spent is the processor time of the process, which does not depend on what else
// the machine does.
func spent(tb testing.TB) time.Duration {
	var r syscall.Rusage
	if err := syscall.Getrusage(syscall.RUSAGE_SELF, &r); err != nil {
		tb.Fatal(err)
	}
	return time.Duration(r.Utime.Nano() + r.Stime.Nano())
}
