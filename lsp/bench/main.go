// Command bench measures the language server as an editor sees it: it starts
// the built program, opens a file of columns over its pipes, types in it, and
// takes the time from each change to the diagnostics that answer it.
//
//	go build -o /tmp/kern ./cmd/kern && go run ./lsp/bench -kern /tmp/kern
package main

import (
	"flag"
	"fmt"
	"os"
	"slices"
	"strconv"
	"strings"
	"time"

	"kern/checker/generate"
)

func main() {
	kern := flag.String("kern", "kern", "the program to measure")
	sizes := flag.String("columns", "20,1000,10000", "sizes of the file")
	intervals := flag.String("every", "10ms,50ms,150ms", "times between two keys")
	keys := flag.Int("keys", 100, "keys to type at each")
	flag.Parse()
	if err := run(*kern, *sizes, *intervals, *keys); err != nil {
		fmt.Fprintln(os.Stderr, "bench:", err)
		os.Exit(1)
	}
}

func run(kern, sizes, intervals string, keys int) error {
	fmt.Printf("%8s %8s %9s %9s %9s %9s %9s %9s %9s\n", "columns", "every", "p50", "p95", "most", "CPU/key", "memory", "start", "opened")
	for size := range strings.SplitSeq(sizes, ",") {
		n, err := strconv.Atoi(size)
		if err != nil {
			return err
		}
		for interval := range strings.SplitSeq(intervals, ",") {
			every, err := time.ParseDuration(interval)
			if err != nil {
				return err
			}
			if err := measure(kern, n, every, keys); err != nil {
				return fmt.Errorf("%d columns, %s: %w", n, every, err)
			}
		}
	}
	return nil
}

// measure types in a file of n columns, a key at a time.
func measure(kern string, n int, every time.Duration, keys int) error {
	started := time.Now()
	s, err := start(kern)
	if err != nil {
		return err
	}
	defer s.stop()
	if err := s.initialize(); err != nil {
		return err
	}
	text := generate.Shared + generate.Columns(n, 1)
	// a column that fails whatever is typed: its numbers change with every key
	at := strings.Index(text, fmt.Sprintf("column C%d ", n/2))
	at += strings.Index(text[at:], "load G ") + len("load G ")
	text = text[:at] + "99" + text[at:]
	at += 2
	line, column := strings.Count(text[:at], "\n"), at-strings.LastIndex(text[:at], "\n")-1
	opened := time.Now()
	s.open(text)
	first := s.await(1)
	if first.IsZero() {
		return fmt.Errorf("no diagnostics when the file is opened")
	}
	// the first keys warm up
	for i := range 10 {
		s.key(line, column, i)
		s.await(s.version)
	}
	cpu := s.cpu()
	tick := time.NewTicker(every)
	defer tick.Stop()
	sent := make([]time.Time, keys)
	from := s.version + 1
	for i := range keys {
		<-tick.C
		sent[i] = time.Now()
		s.key(line, column, i)
	}
	took := make([]time.Duration, keys)
	for i := range keys {
		came := s.await(from + i)
		if came.IsZero() {
			return fmt.Errorf("no diagnostics for version %d", from+i)
		}
		took[i] = came.Sub(sent[i])
	}
	cpu = (s.cpu() - cpu) / time.Duration(keys)
	slices.Sort(took)
	ms := func(d time.Duration) string { return fmt.Sprintf("%.2f ms", float64(d.Microseconds())/1000) }
	fmt.Printf("%8d %8s %9s %9s %9s %9s %6d MB %9s %9s\n", n, every, ms(took[keys/2]), ms(took[keys*95/100]), ms(took[keys-1]), ms(cpu), s.memory(), ms(first.Sub(started)), ms(first.Sub(opened)))
	return s.requests(n, line, column)
}
