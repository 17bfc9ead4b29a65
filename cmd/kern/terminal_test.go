//go:build unix

package main

import (
	"bytes"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/creack/pty"
)

// TestColour: colour on a terminal alone, and never with NO_COLOR.
func TestColour(t *testing.T) {
	dir := t.TempDir()
	text := "basis { standard \"elastic\" }\ncolumn A1 { section = \"HEB 160\"; material = \"S355\"; height = 3 m; load 80 kN }\n"
	if err := os.WriteFile(filepath.Join(dir, "a.kern"), []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
	t.Chdir(dir)
	onTerminal := func() string {
		user, terminal, err := pty.Open()
		if err != nil {
			t.Fatal(err)
		}
		c := root()
		c.SetOut(terminal)
		c.SetArgs([]string{"check", "a.kern"})
		if err := c.Execute(); err != nil {
			t.Fatal(err)
		}
		if err := terminal.Close(); err != nil {
			t.Fatal(err)
		}
		out, err := io.ReadAll(user)
		if err != nil && len(out) == 0 {
			t.Fatal(err) // Linux ends a pseudo-terminal with an error, after the output
		}
		return string(out)
	}
	t.Setenv("TERM", "xterm")
	t.Setenv("NO_COLOR", "")
	if out := onTerminal(); !strings.Contains(out, "\x1b[") || !strings.Contains(out, "A1") {
		t.Errorf("no colour on a terminal: %q", out)
	}
	t.Setenv("NO_COLOR", "1")
	if out := onTerminal(); strings.Contains(out, "\x1b[") || !strings.Contains(out, "A1") {
		t.Errorf("colour in spite of NO_COLOR: %q", out)
	}
	t.Setenv("NO_COLOR", "")
	var file bytes.Buffer
	c := root()
	c.SetOut(&file)
	c.SetArgs([]string{"check", "a.kern"})
	if err := c.Execute(); err != nil || strings.Contains(file.String(), "\x1b[") {
		t.Errorf("%v, %q", err, file.String())
	}
}
