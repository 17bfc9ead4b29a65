package lang

import (
	"runtime"
	"strings"
	"testing"
	"time"
)

// measure parses a text and gives the time and the bytes that were allocated in
// all and those that the tree holds.
func measure(text string) (f *File, took time.Duration, allocated, held int64) {
	var before, after, kept runtime.MemStats
	runtime.GC()
	runtime.ReadMemStats(&before)
	start := time.Now()
	f = Parse(&FileID{}, text, nil)
	took = time.Since(start)
	runtime.ReadMemStats(&after)
	runtime.GC()
	runtime.ReadMemStats(&kept)
	return f, took, int64(after.TotalAlloc - before.TotalAlloc), int64(kept.HeapAlloc) - int64(before.HeapAlloc)
}

// A line of 50 MB is one statement that is refused or one token: it costs time,
// not memory.
func TestLongLines(t *testing.T) {
	const whole, part = 50 << 20, 10 << 20
	repeat := func(s string, size int) string { return strings.Repeat(s, size/len(s)) }
	for _, c := range []struct{ name, text string }{
		{"terms", "x = 1" + repeat(" + 1", whole)},
		{"a text", "note \"" + repeat("a", whole) + "\""},
		{"closing braces", repeat("}", whole)},
		{"brackets", "x = " + repeat("(", part)},
		{"words", repeat("word ", part)},
		{"a name", repeat("a", part)},
		{"a number", "x = " + repeat("1", part)},
		{"an open text", "note \"" + repeat("a", part)},
		{"a comment", "# " + repeat("a", part)},
		{"blanks", "x =" + repeat(" ", part) + "1"},
		{"stray characters", "x = " + repeat("§", part)},
		{"bytes that are no text", "x = " + repeat("\xff", part)},
		{"semicolons", repeat(";", part)},
		{"feet", "x = " + repeat("1 ft ", part)},
	} {
		f, took, allocated, held := measure(c.text + "\nlast = 1\n")
		t.Logf("%-24s %6.2f s, %6.1f MB allocated, %6.1f MB held", c.name, took.Seconds(), float64(allocated)/1e6, float64(held)/1e6)
		if took > 3*time.Second {
			t.Errorf("%s took %v", c.name, took)
		}
		if allocated > 16<<20 || held > 8<<20 {
			t.Errorf("%s: %d bytes allocated, %d held", c.name, allocated, held)
		}
		last := f.Decls[len(f.Decls)-1]
		if s := last.Stmts[len(last.Stmts)-1]; s.Word != "last" || s.Broken {
			t.Errorf("%s: the line after it was not read", c.name)
		}
	}
}

// The time grows with the length of a text, not with its square, whatever the
// text is: 32 times the length takes 1000 times as long when a loop runs over
// the rest of the text for every piece, and 200 times are allowed for noise.
func TestTimeIsLinear(t *testing.T) {
	for _, piece := range []string{"\r", "\n", "a=1\r", "x = 1 ft 1 ft 1 ft 1 ft\n", "a = (\n", "a,\n", "a {\n", "}\n", "# c\n", "\"\n", "“\n", "x = 1e1e1e1e", "a.", "column \n", "note \"a\";", "(\n;", "{ }", "a\n{\n", "1 ft ", "\u00a0", "\ufeff\n"} {
		run := func(size, times int) time.Duration {
			text := strings.Repeat(piece, size/len(piece))
			best := time.Hour
			for range times {
				start := time.Now()
				out := Format(text)
				best = min(best, time.Since(start))
				if len(out) > 4*len(text)+100 {
					t.Errorf("%q: %d bytes became %d", piece, len(text), len(out))
				}
			}
			return best
		}
		short := max(run(8_000, 3), 200*time.Microsecond)
		if long := run(256_000, 1); long > 200*short {
			t.Errorf("%q: %v for 8 kB, %v for 256 kB", piece, short, long)
		}
	}
}
