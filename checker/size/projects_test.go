package size_test

import (
	"fmt"
	"io/fs"
	"maps"
	"os"
	"path/filepath"
	"slices"
	"testing"

	"kern/checker"
	"kern/checker/size"
	"kern/checker/standard"
	"kern/lang"
)

// projects are the folders of calculations below testdata.
func projects(t *testing.T) map[string]map[string]string {
	t.Helper()
	out := map[string]map[string]string{}
	root := "../../testdata"
	err := filepath.WalkDir(root, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		if ext := filepath.Ext(path); ext != ".kern" && ext != ".csv" {
			return nil
		}
		data, err := os.ReadFile(path)
		dir := filepath.Dir(path)
		if out[dir] == nil {
			out[dir] = map[string]string{}
		}
		out[dir][filepath.Base(path)] = string(data)
		return err
	})
	if err != nil || len(out) < 2 {
		t.Fatalf("%d projects: %v", len(out), err)
	}
	return out
}

func checkAll(files map[string]string) *checker.Report {
	names := slices.DeleteFunc(slices.Sorted(maps.Keys(files)), func(name string) bool { return filepath.Ext(name) != ".kern" })
	return checker.Check(lang.Load(names, func(name string) (string, error) {
		if text, ok := files[name]; ok {
			return text, nil
		}
		return "", fmt.Errorf("there is no such file")
	}, nil), nil)
}

// TestProjects makes every mend of every member of the demonstration projects:
// the member passes then, nothing that passed fails, there is no new error and
// the files stay laid out.
func TestProjects(t *testing.T) {
	made := 0
	for _, dir := range slices.Sorted(maps.Keys(projects(t))) {
		files := projects(t)[dir]
		report := checkAll(files)
		for k, s := range size.All(report, report.Members, size.Options{}, nil) {
			if s.Result.Verdict == standard.Passes && k%5 > 0 {
				continue
			}
			for _, m := range s.Mends {
				made++
				changed := maps.Clone(files)
				for file, list := range byFile(m.Edits()) {
					changed[file] = lang.Apply(files[file], list)
					if lang.Format(files[file]) == files[file] && lang.Format(changed[file]) != changed[file] {
						t.Errorf("%s, %s: %s is not laid out any more", dir, s.Result.Name, m.Change)
					}
				}
				again := checkAll(changed)
				if faults(again) > faults(report) {
					t.Errorf("%s, %s: %s makes errors", dir, s.Result.Name, m.Change)
				}
				if now := named(again, s.Result.Name); now == nil || now.Verdict != standard.Passes {
					t.Errorf("%s, %s: %s does not make it pass", dir, s.Result.Name, m.Change)
				}
				for _, before := range report.Members {
					if before.Verdict == standard.Passes && before.Member.As == s.Result.Member.Decl {
						if now := named(again, before.Name); now.Verdict != standard.Passes {
							t.Errorf("%s: %s for %s has %s fail", dir, m.Change, s.Result.Name, before.Name)
						}
					}
				}
			}
		}
	}
	t.Logf("%d mends", made)
}

// faults counts the errors in the text; that a member fails is none.
func faults(r *checker.Report) int {
	n := 0
	for _, d := range r.Diagnostics {
		if d.Severity == lang.Error && d.Member == "" {
			n++
		}
	}
	return n
}

func byFile(edits []checker.Edit) map[string][]lang.Change {
	out := map[string][]lang.Change{}
	for _, e := range edits {
		out[e.File] = append(out[e.File], lang.Change{Span: e.Span, New: e.New})
	}
	return out
}
