//go:build unix

package checker_test

import (
	"runtime"
	"strings"
	"syscall"
	"testing"
	"time"

	"kern/checker"
	"kern/checker/standard"
)

// The giants are made when the test runs; none is stored. Each stands between
// two good members, which must have the results that they have alone.
const (
	giantHead = `basis {
    standard "EN 1993-1-1:2005"
    actions  "EN 1990:2002" eq "6.10"
}
material s355 = "S355"
section mast = "HEB 160"
case G permanent
column OK1 { section = mast; material = s355; height = 4 m; load G 80 kN }
`
	giantTail = `
column OK2 { section = mast; material = s355; height = 5 m; load G 80 kN }
`
)

// TestGiants checks texts that are far too big for what they are: in bounded
// time and memory, with few diagnostics, and without harm to their neighbours.
// The bounds are several times what was measured on two cores.
func TestGiants(t *testing.T) {
	alone := checkFiles(map[string]string{"a.kern": giantHead + giantTail})
	line := func(n int) string { return strings.Repeat("load G 80 kN at top ", n/20) }
	giants := []struct {
		name string
		text string
		time time.Duration // of the processor
		heap uint64        // bytes above those before
		most int           // diagnostics
	}{
		{"100,000 nested brackets", "x = " + strings.Repeat("(", 100_000) + "1" + strings.Repeat(")", 100_000), 2 * time.Second, 100 << 20, 5},
		{"100,000 open brackets", "x = " + strings.Repeat("(", 100_000), 2 * time.Second, 100 << 20, 5},
		{"100,000 nested braces", strings.Repeat("a {", 100_000) + strings.Repeat("}", 100_000), 2 * time.Second, 100 << 20, 220},
		{"100,000 open braces", strings.Repeat("{\n", 100_000), 2 * time.Second, 100 << 20, 220},
		{"100,000 braces in a member", "column B1 {" + strings.Repeat("section = tube {", 100_000), 2 * time.Second, 100 << 20, 220},
		{"100,000 minus signs", "x = " + strings.Repeat("-", 100_000) + "1", 2 * time.Second, 100 << 20, 5},
		{"100,000 calls", "x = " + strings.Repeat("sqrt(", 100_000), 2 * time.Second, 100 << 20, 5},
		{"50 MB on a line", "column B1 { " + line(50<<20), 5 * time.Second, 600 << 20, 20},
		{"50 MB in quotes", "section b = \"" + strings.Repeat("x", 50<<20) + "\"", 5 * time.Second, 600 << 20, 20},
		{"50 MB of one name", strings.Repeat("x", 50<<20), 5 * time.Second, 600 << 20, 20},
		{"50 MB of one number", "x = " + strings.Repeat("9", 50<<20) + " m", 5 * time.Second, 600 << 20, 20},
		{"50 MB in one unit", "x = 1 " + strings.Repeat("m", 50<<20), 5 * time.Second, 600 << 20, 20},
		{"50 MB of what is not UTF-8", strings.Repeat("\xff", 50<<20), 5 * time.Second, 600 << 20, 20},
		{"50 MB of a comment", "# " + strings.Repeat("=", 50<<20), 5 * time.Second, 600 << 20, 5},
		{"1,000,000 lines of rubbish", strings.Repeat("%& x\n", 1_000_000), 60 * time.Second, 4 << 30, 1_000_020},
		{"200,000 lines of rubbish in a member", "column B1 {\n" + strings.Repeat("rub 1\n", 200_000) + "}", 20 * time.Second, 1 << 30, 200_020},
		{"20,000 values in a chain", chain(20_000), 5 * time.Second, 600 << 20, 20},
		{"20,000 members in a chain", members(20_000), 20 * time.Second, 2 << 30, 50_000},
		{"100,000 sections of one name", strings.Repeat("section b = \"HEB 200\"\n", 100_000), 10 * time.Second, 2 << 30, 100_020},
		{"50,000 values of like names", likeNames(50_000), 20 * time.Second, 2 << 30, 50_020},
	}
	for _, g := range giants {
		t.Run(g.name, func(t *testing.T) {
			files := map[string]string{"a.kern": giantHead + g.text + "\n" + giantTail}
			var r *checker.Report
			took, heap := measured(func() { r = checkFiles(files) })
			t.Logf("%.1f MB: %v, %d MB of heap at most, %d diagnostics", float64(len(g.text))/1e6, took.Round(time.Millisecond), heap>>20, len(r.Diagnostics))
			if took > g.time || heap > g.heap {
				t.Errorf("took %v and %d MB, allowed are %v and %d MB", took, heap>>20, g.time, g.heap>>20)
			}
			if len(r.Diagnostics) > g.most {
				t.Errorf("%d diagnostics", len(r.Diagnostics))
			}
			for _, name := range []string{"OK1", "OK2"} {
				m, want := member(r, name), member(alone, name)
				if m == nil || m.Verdict != standard.Passes || !sameResult(m, want) {
					t.Errorf("%s is not what it is alone: %+v", name, m)
				}
			}
			for _, d := range r.Diagnostics {
				if len(d.Message) > 2000 {
					t.Errorf("%s has a message of %d bytes", d.Rule, len(d.Message))
				}
			}
		})
	}
}

// chain is a row of values of which each needs the next.
func chain(n int) string {
	var b strings.Builder
	for i := range n {
		b.WriteString("v" + itoa(i) + " = v" + itoa(i+1) + " + 1 m\n")
	}
	return b.String() + "v" + itoa(n) + " = 1 m\n"
}

// members is a row of members of which each is like the one before.
func members(n int) string {
	var b strings.Builder
	b.WriteString("column M0 { section = mast; material = s355; height = 4 m; load G 80 kN }\n")
	for i := range n {
		b.WriteString("column M" + itoa(i+1) + " as M" + itoa(i) + " { height = 3 m }\n")
	}
	return b.String()
}

// likeNames is a row of unknown names, for each of which the nearest of many
// names is looked for.
func likeNames(n int) string {
	var b strings.Builder
	for i := range n {
		b.WriteString("length" + itoa(i) + " = 1 m\n")
	}
	for i := range 200 {
		b.WriteString("other" + itoa(i) + " = lenght" + itoa(i) + "\n")
	}
	return b.String()
}

func itoa(i int) string {
	if i < 10 {
		return string(rune('0' + i))
	}
	return itoa(i/10) + string(rune('0'+i%10))
}

// used is the processor time that the test has taken on all cores: unlike the
// time of day, it does not depend on what else the machine does.
func used() time.Duration {
	var u syscall.Rusage
	if syscall.Getrusage(syscall.RUSAGE_SELF, &u) != nil {
		return 0
	}
	return time.Duration(u.Utime.Nano() + u.Stime.Nano())
}

// measured runs f and gives its processor time and the most heap that was in use while it
// ran, above what was in use before, sampled every 5 milliseconds.
func measured(f func()) (time.Duration, uint64) {
	runtime.GC()
	var before runtime.MemStats
	runtime.ReadMemStats(&before)
	most := before.HeapAlloc
	stop, stopped := make(chan bool), make(chan bool)
	go func() {
		defer close(stopped)
		ticker := time.NewTicker(5 * time.Millisecond)
		defer ticker.Stop()
		for {
			var now runtime.MemStats
			runtime.ReadMemStats(&now)
			most = max(most, now.HeapAlloc)
			select {
			case <-stop:
				return
			case <-ticker.C:
			}
		}
	}()
	start := used()
	f()
	took := used() - start
	close(stop)
	<-stopped
	return took, most - before.HeapAlloc
}
