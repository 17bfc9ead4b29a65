//go:build unix

package lang

import (
	"strings"
	"syscall"
	"testing"
	"time"
)

// spent is the processor time of the process: other than the time on the wall
// it does not depend on what else the machine does.
func spent(t *testing.T) time.Duration {
	var r syscall.Rusage
	if err := syscall.Getrusage(syscall.RUSAGE_SELF, &r); err != nil {
		t.Fatal(err)
	}
	return time.Duration(r.Utime.Nano() + r.Stime.Nano())
}

// The time grows with the length of a text, not with its square, whatever the
// text is: 32 times the length takes 1000 times as long when a loop runs over
// the rest of the text for every piece, and 200 times are allowed for noise.
func TestTimeIsLinear(t *testing.T) {
	for _, piece := range []string{"\r", "\n", "a=1\r", "x = 1 ft 1 ft 1 ft 1 ft\n", "a = (\n", "a,\n", "a {\n", "}\n", "# c\n", "\"\n", "\"}", "“\n", "x = 1e1e1e1e", "a.", "column \n", "note \"a\";", "(\n;", "{ }", "a\n{\n", "1 ft ", "\u00a0", "\ufeff\n"} {
		run := func(size int) time.Duration {
			text := strings.Repeat(piece, size/len(piece))
			start := spent(t)
			out := Format(text)
			took := spent(t) - start
			if len(out) > 4*len(text)+100 {
				t.Errorf("%q: %d bytes became %d", piece, len(text), len(out))
			}
			return took
		}
		short := max(min(run(8_000), run(8_000), run(8_000)), time.Millisecond)
		long := run(256_000)
		for range 4 {
			if long <= 200*short {
				break
			}
			long = min(long, run(256_000))
		}
		if long > 200*short {
			t.Errorf("%q: %v for 8 kB, %v for 256 kB", piece, short, long)
		}
	}
}
