package main

import (
	"bytes"
	"flag"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
)

var update = flag.Bool("update", false, "write the golden texts anew")

// TestReadme keeps the pages true: every block behind a "run:" comment is what
// the command prints, every block behind a "file:" comment stands in the file.
func TestReadme(t *testing.T) {
	root, err := filepath.Abs("../..")
	if err != nil {
		t.Fatal(err)
	}
	t.Chdir(root)
	page, err := os.ReadFile("README.md")
	if err != nil {
		t.Fatal(err)
	}
	blocks := regexp.MustCompile("(?ms)^<!-- (run|file): (.*?) -->\n```\n(.*?)```$")
	found := 0
	done := blocks.ReplaceAllStringFunc(string(page), func(block string) string {
		found++
		m := blocks.FindStringSubmatch(block)
		want := shownOutput(t, m[1], m[2])
		if m[3] != want && !*update {
			t.Errorf("README.md, %s: %s (-page +now; -update writes it):\n%s", m[1], m[2], cmp.Diff(m[3], want))
		}
		return "<!-- " + m[1] + ": " + m[2] + " -->\n```\n" + want + "```"
	})
	if found < 3 {
		t.Errorf("README.md shows only %d blocks", found)
	}
	if *update {
		if err := os.WriteFile("README.md", []byte(done), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}

func shownOutput(t *testing.T, kind, arg string) string {
	fields := strings.Fields(arg)
	if kind == "file" {
		text, err := os.ReadFile(fields[0])
		if err != nil {
			t.Fatal(err)
		}
		from, to, _ := strings.Cut(fields[1], "-")
		a, err1 := strconv.Atoi(from)
		b, err2 := strconv.Atoi(to)
		if err1 != nil || err2 != nil {
			t.Fatalf("lines %q", fields[1])
		}
		return strings.Join(strings.Split(string(text), "\n")[a-1:b], "\n") + "\n"
	}
	var out bytes.Buffer
	c := root()
	c.SetOut(&out)
	c.SetArgs(fields)
	if err := c.Execute(); err != nil && err != errWrong {
		t.Fatalf("%s: %v", arg, err)
	}
	return "$ kern " + arg + "\n" + out.String()
}
