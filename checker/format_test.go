package checker_test

import (
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/generate"
	"kern/lang"

	"github.com/google/go-cmp/cmp"
	"golang.org/x/tools/txtar"
)

// demoReport works out the calculations of a folder.
func demoReport(t *testing.T, dir string) *checker.Report {
	files := map[string]string{}
	paths, err := filepath.Glob(filepath.Join(dir, "*.kern"))
	if err != nil || len(paths) == 0 {
		t.Fatalf("%s: %v, %d files", dir, err, len(paths))
	}
	for _, p := range paths {
		text, err := os.ReadFile(p)
		if err != nil {
			t.Fatal(err)
		}
		files[filepath.Base(p)] = string(text)
	}
	return checker.Check(loaded(files), nil)
}

// saidAll is all that a report says, without the places, which a layout moves.
func saidAll(r *checker.Report) []string {
	var out []string
	for _, m := range r.Members {
		out = append(out, fmt.Sprint(m.Name, m.Title, m.Verdict, m.Utilisation, m.Governing, m.Combination, m.Checks, m.Coverage, m.Assumptions, m.Missing))
	}
	for _, d := range r.Diagnostics {
		// a message may quote the text, blanks and all
		out = append(out, fmt.Sprint(d.File, d.Severity, d.Rule, strings.ReplaceAll(d.Message, " ", ""), d.Member))
	}
	return out
}

// TestFormatChangesNoResult lays out every calculation there is, good and
// broken, and random ones with their blanks scrambled: the report says the same
// before and after.
func TestFormatChangesNoResult(t *testing.T) {
	check := func(name string, files map[string]string) {
		done := map[string]string{}
		for file, text := range files {
			done[file] = lang.Format(text)
		}
		if d := cmp.Diff(saidAll(checker.Check(loaded(files), nil)), saidAll(checker.Check(loaded(done), nil))); d != "" {
			t.Errorf("%s: the layout changes the report (-before +after):\n%s", name, d)
		}
	}
	projects := map[string]map[string]string{}
	err := filepath.WalkDir("../testdata", func(path string, e fs.DirEntry, err error) error {
		if err != nil || e.IsDir() {
			return err
		}
		text, err := os.ReadFile(path)
		if err != nil {
			return err
		}
		switch filepath.Ext(path) {
		case ".kern":
			dir := filepath.Dir(path)
			if projects[dir] == nil {
				projects[dir] = map[string]string{}
			}
			projects[dir][filepath.Base(path)] = string(text)
		case ".txtar":
			files := map[string]string{}
			for _, f := range txtar.Parse(text).Files {
				if strings.HasSuffix(f.Name, ".kern") {
					files[f.Name] = string(f.Data)
				}
			}
			check(path, files)
		}
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	for dir, files := range projects {
		check(dir, files)
	}
	for seed := range uint64(20) {
		text := generate.Shared + generate.Columns(20, seed)
		for i, blank := range []string{"  ", "\t", "    "} {
			text = strings.ReplaceAll(text, "    ", []string{blank, "   ", "\t "}[(int(seed)+i)%3])
		}
		check(fmt.Sprint("random ", seed), map[string]string{"a.kern": text})
	}
}
