package main

import (
	"bytes"
	"context"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"
)

// TestWatch saves a file several times in a burst: one check follows, and what has
// changed is told. A save that changes nothing says nothing.
func TestWatch(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "a.kern")
	write := func(load string) {
		text := "basis { standard \"elastic\" }\ncolumn A1 { section = \"HEB 100\"; material = \"S235\"; height = 3 m; load " + load + " }\n"
		if err := os.WriteFile(path, []byte(text), 0o666); err != nil {
			t.Fatal(err)
		}
	}
	write("100 kN")
	var out bytes.Buffer
	w, err := newWatching(&out, []string{dir})
	if err != nil {
		t.Fatal(err)
	}
	w.first()
	if !strings.Contains(out.String(), "1 member: 1 passes") || !strings.Contains(out.String(), "Ctrl-C") {
		t.Errorf("first: %s", out.String())
	}
	write("900 kN")
	out.Reset()
	w.again()
	if s := out.String(); !strings.Contains(s, "A1: passes 0.26, elastic-buckling-minor → fails 2.34") || !strings.Contains(s, "1 fails") {
		t.Errorf("another load: %s", s)
	}
	out.Reset()
	w.again()
	if out.Len() > 0 {
		t.Errorf("nothing has changed: %s", out.String())
	}
	write("900 Kn")
	w.again()
	if s := out.String(); !strings.Contains(s, "unknown-unit") || !strings.Contains(s, "→ undecided") {
		t.Errorf("an error: %s", s)
	}
	out.Reset()
	if err := os.Remove(path); err != nil {
		t.Fatal(err)
	}
	w.again()
	w.again()
	if s := out.String(); strings.Count(s, "there is no calculation") != 1 {
		t.Errorf("without a file: %q", s)
	}
	write("100 kN")
	out.Reset()
	w.again()
	if s := out.String(); !strings.Contains(s, "undecided → passes") {
		t.Errorf("again there: %s", s)
	}
}

// TestWatchLoop: a burst of saves is one check, and the loop ends with its context
// or its saves.
func TestWatchLoop(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "a.kern")
	if err := os.WriteFile(path, []byte("x = 3 Kn\n"), 0o666); err != nil {
		t.Fatal(err)
	}
	var out bytes.Buffer
	w, err := newWatching(&out, []string{path})
	if err != nil {
		t.Fatal(err)
	}
	saved := make(chan struct{}, 3)
	for range 3 {
		saved <- struct{}{}
	}
	ctx, stop := context.WithCancel(context.Background())
	done := make(chan struct{})
	go func() { w.loop(ctx, saved, time.Millisecond); close(done) }()
	for len(saved) > 0 {
		select {
		case <-done:
			t.Fatal("the loop ended by itself")
		default:
		}
	}
	stop()
	<-done
	closed := make(chan struct{})
	close(closed)
	w.loop(context.Background(), closed, 0)
}
