package lsp

import (
	"encoding/json"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strings"
	"sync"
	"testing"

	"github.com/google/go-cmp/cmp"
	"go.lsp.dev/protocol"
	"golang.org/x/tools/txtar"
)

// built is the folder of the command, "" when no test needed it.
var built string

// program builds the command once.
var program = sync.OnceValues(func() (string, error) {
	dir, err := os.MkdirTemp("", "kern")
	if err != nil {
		return "", err
	}
	built = dir
	path := filepath.Join(dir, "kern")
	out, err := exec.Command("go", "build", "-o", path, "kern/cmd/kern").CombinedOutput()
	if err != nil {
		return "", fmt.Errorf("%w\n%s", err, out)
	}
	return path, nil
})

func TestMain(m *testing.M) {
	code := m.Run()
	if built != "" {
		os.RemoveAll(built)
	}
	os.Exit(code)
}

// TestSameAsCommand checks everything below testdata with the command and with
// the server: the same diagnostics at the same places.
func TestSameAsCommand(t *testing.T) {
	kern, err := program()
	if err != nil {
		t.Fatal(err)
	}
	projects := map[string]map[string]string{}
	root := "../testdata"
	err = filepath.WalkDir(root, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		name, err := filepath.Rel(root, path)
		if err != nil {
			return err
		}
		data, err := os.ReadFile(path)
		if err != nil {
			return err
		}
		switch filepath.Ext(path) {
		case ".txtar":
			for _, f := range txtar.Parse(data).Files {
				if filepath.Ext(f.Name) == ".kern" && filepath.IsLocal(f.Name) {
					put(projects, name, f.Name, string(f.Data))
				}
			}
		case ".kern":
			put(projects, filepath.Dir(name), filepath.Base(name), string(data))
		}
		return nil
	})
	if err != nil || len(projects) < 50 {
		t.Fatalf("%d projects: %v", len(projects), err)
	}
	dir, err := filepath.EvalSymlinks(t.TempDir())
	if err != nil {
		t.Fatal(err)
	}
	s := start(t, dir)
	s.initialize(`{"general": {"positionEncodings": ["utf-32"]}, "workspace": {"textDocumentContent": null}}`, "")
	diagnostics := 0
	for _, name := range slices.Sorted(keys(projects)) {
		folder := strings.ReplaceAll(strings.TrimSuffix(name, ".txtar"), string(filepath.Separator), "-")
		for file, text := range projects[name] {
			s.write(folder+"/"+file, text)
		}
		want := fromCommand(t, kern, filepath.Join(dir, folder))
		event := protocol.WorkspaceFoldersChangeEvent{Added: []protocol.WorkspaceFolder{{URI: uriOf(filepath.Join(dir, folder)), Name: folder}}, Removed: []protocol.WorkspaceFolder{}}
		s.send("workspace/didChangeWorkspaceFolders", &protocol.DidChangeWorkspaceFoldersParams{Event: event})
		s.settle()
		got := s.everything()
		if d := cmp.Diff(want, got); d != "" {
			t.Errorf("%s (-command +server)\n%s", name, d)
		}
		diagnostics += len(want)
		event.Added, event.Removed = event.Removed, event.Added
		s.send("workspace/didChangeWorkspaceFolders", &protocol.DidChangeWorkspaceFoldersParams{Event: event})
		s.settle()
		if got := s.everything(); len(got) > 0 {
			t.Errorf("%s is closed, but the client still has %s", name, got)
		}
	}
	if diagnostics < 100 {
		t.Errorf("only %d diagnostics were compared", diagnostics)
	}
}

func keys[V any](m map[string]V) func(func(string) bool) {
	return func(yield func(string) bool) {
		for k := range m {
			if !yield(k) {
				return
			}
		}
	}
}

func put(all map[string]map[string]string, project, file, text string) {
	if all[project] == nil {
		all[project] = map[string]string{}
	}
	all[project][file] = text
}

// fromCommand runs "kern check --output json" and gives its diagnostics.
func fromCommand(t *testing.T, kern, dir string) []string {
	t.Helper()
	c := exec.Command(kern, "check", "--output", "json")
	c.Dir = dir
	out, err := c.Output()
	var exit *exec.ExitError
	if err != nil && !(errors.As(err, &exit) && exit.ExitCode() == 1) {
		t.Fatalf("%s: %v", dir, err)
	}
	type position struct{ Line, Column int }
	var report struct {
		Diagnostics []struct {
			File                    string
			Range                   struct{ Start, End position }
			Severity, Rule, Message string
			Notes                   []string
			Related                 []struct {
				File    string
				Range   struct{ Start, End position }
				Message string
			}
		}
	}
	if err := json.Unmarshal(out, &report); err != nil {
		t.Fatalf("%s: %v", dir, err)
	}
	var all []string
	for _, d := range report.Diagnostics {
		text := fmt.Sprintf("%s %v %s %s %s", d.File, d.Range, d.Severity, d.Rule, strings.Join(append([]string{d.Message}, d.Notes...), "\n"))
		for _, r := range d.Related {
			text += fmt.Sprintf("\n  %s %v %s", r.File, r.Range, r.Message)
		}
		all = append(all, text)
	}
	slices.Sort(all)
	return all
}

// everything gives all that the client was told, as fromCommand does: lines and
// columns from 1.
func (s *session) everything() []string {
	s.mu.Lock()
	defer s.mu.Unlock()
	at := func(r protocol.Range) string {
		return fmt.Sprintf("{{%d %d} {%d %d}}", r.Start.Line+1, r.Start.Character+1, r.End.Line+1, r.End.Character+1)
	}
	file := func(name string) string { _, after, _ := strings.Cut(name, "/"); return after }
	var all []string
	for u, p := range s.diagnostics {
		for _, d := range p.Diagnostics {
			text := fmt.Sprintf("%s %s %s %s %s", file(s.name(u)), at(d.Range), severityWords[d.Severity], d.Code, d.Message)
			for _, r := range d.RelatedInformation {
				text += fmt.Sprintf("\n  %s %s %s", file(s.name(r.Location.URI)), at(r.Location.Range), r.Message)
			}
			all = append(all, text)
		}
	}
	slices.Sort(all)
	return all
}
