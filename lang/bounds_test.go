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

// A line of 50 MB is one statement that is refused or one token: it costs time in
// proportion (with the square of it this test would not end), not memory.
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
		text := c.text + "\nlast = 1\n"
		f, took, allocated, held := measure(text)
		t.Logf("%-24s %6.2f s, %6.1f MB allocated, %6.1f MB held", c.name, took.Seconds(), float64(allocated)/1e6, float64(held)/1e6)
		if allocated > 16<<20 || held > 8<<20 {
			t.Errorf("%s: %d bytes allocated, %d held", c.name, allocated, held)
		}
		last := f.Decls[len(f.Decls)-1]
		if s := last.Stmts[len(last.Stmts)-1]; s.Word != "last" || s.Broken {
			t.Errorf("%s: the line after it was not read", c.name)
		}
	}
}
