package lsp

import (
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"kern/lang"

	"github.com/google/go-cmp/cmp"
	"go.lsp.dev/uri"
	"golang.org/x/tools/txtar"
)

var update = flag.Bool("update", false, "write what the archives want anew")

// scene is an archive that is being played: testdata/TOPIC/*.txtar, one
// behaviour each. See doc.go for its form.
type scene struct {
	*session
	files map[string]string
	marks map[string]place // by name, where they are in the text as it is now
	out   strings.Builder
	// results are the names of the sets that were pulled
	results map[uri.URI]string
}

// place is a mark: a span of a file's present text.
type place struct {
	file string
	span lang.Span
}

// verbs are what a script can say. A feature's test adds its own:
//
//	func init() { verbs["hover"] = func(s *scene, args []string) { … } }
var verbs = map[string]func(s *scene, args []string){}

// TestArchives plays every archive and compares what happened with what its
// section "want" says.
func TestArchives(t *testing.T) {
	paths, err := filepath.Glob("testdata/*/*.txtar")
	if err != nil || len(paths) < 10 {
		t.Fatalf("%d archives: %v", len(paths), err)
	}
	for _, path := range paths {
		t.Run(strings.TrimSuffix(strings.TrimPrefix(filepath.ToSlash(path), "testdata/"), ".txtar"), func(t *testing.T) {
			t.Parallel()
			data, err := os.ReadFile(path)
			if err != nil {
				t.Fatal(err)
			}
			archive := txtar.Parse(data)
			got := play(t, archive)
			for i, f := range archive.Files {
				if f.Name != "want" {
					continue
				}
				if *update {
					archive.Files[i].Data = []byte(got)
					if err := os.WriteFile(path, txtar.Format(archive), 0o666); err != nil {
						t.Fatal(err)
					}
					return
				}
				if d := cmp.Diff(string(f.Data), got); d != "" {
					t.Errorf("(-want +got; -update writes it)\n%s", d)
				}
				return
			}
			t.Error("the archive has no section want")
		})
	}
}

// play runs the script of an archive and gives what happened.
func play(t *testing.T, archive *txtar.Archive) string {
	dir, err := filepath.EvalSymlinks(t.TempDir())
	if err != nil {
		t.Fatal(err)
	}
	s := &scene{session: start(t, dir), files: map[string]string{}, marks: map[string]place{}}
	script, client := "", "{}"
	for _, f := range archive.Files {
		switch f.Name {
		case "script":
			script = string(f.Data)
		case "client.json":
			client = string(f.Data)
		case "want":
		default:
			s.files[f.Name] = s.strip(f.Name, string(f.Data))
			if !strings.Contains(f.Name, ":") && !strings.HasPrefix(f.Name, "later/") {
				s.write(f.Name, s.files[f.Name])
			}
		}
	}
	var config struct {
		Capabilities map[string]any
		Options      map[string]any
		Settings     map[string]any
		Folders      []string
		Commit       bool // the files are committed to a repository first
	}
	config.Folders = []string{"."}
	if err := unmarshal(client, &config); err != nil {
		t.Fatalf("client.json: %v", err)
	}
	if config.Commit {
		s.commit()
	}
	s.config = remarshal(t, config.Settings)
	options := ""
	if config.Options != nil {
		options = string(remarshal(t, config.Options))
	}
	s.initialize(string(remarshal(t, config.Capabilities)), options, config.Folders...)
	for line := range strings.Lines(script) {
		line = strings.TrimSpace(line)
		if line == "" || strings.HasPrefix(line, "#") {
			continue
		}
		args := words(t, line)
		verb := verbs[args[0]]
		if verb == nil {
			t.Fatalf("the script says %q, which nobody knows", line)
		}
		s.settle()
		before := s.out.Len()
		verb(s, args[1:])
		if said := s.out.String()[before:]; said != "" {
			whole := s.out.String()[:before] + "> " + line + "\n" + said + "\n"
			s.out.Reset()
			s.out.WriteString(whole)
		}
	}
	return s.out.String()
}

// strip takes the marks out of a text: ⟦name⟧ is a place, ⟦name:text⟧ a part.
func (s *scene) strip(file, text string) string {
	var b strings.Builder
	for {
		before, rest, ok := strings.Cut(text, "⟦")
		b.WriteString(before)
		if !ok {
			return b.String()
		}
		inside, after, ok := strings.Cut(rest, "⟧")
		if !ok {
			s.t.Fatalf("%s: a mark is not closed", file)
		}
		name, marked, _ := strings.Cut(inside, ":")
		if _, twice := s.marks[name]; twice {
			s.t.Fatalf("%s: the mark %s stands twice", file, name)
		}
		start := int32(b.Len())
		b.WriteString(marked)
		s.marks[name] = place{file, lang.Span{Start: start, End: int32(b.Len())}}
		text = after
	}
}

// mark finds a mark by its name.
func (s *scene) mark(name string) place {
	s.t.Helper()
	m, ok := s.marks[name]
	if !ok {
		s.t.Fatalf("there is no mark %q", name)
	}
	return m
}

// print adds to what happened.
func (s *scene) print(format string, args ...any) { fmt.Fprintf(&s.out, format, args...) }

// words cuts a line of a script: by blanks, quoted ones as Go reads them, and a
// word that begins with { or [ is the rest of the line, as JSON.
func words(t testing.TB, line string) []string {
	var out []string
	for line = strings.TrimSpace(line); line != ""; line = strings.TrimSpace(line) {
		switch {
		case line[0] == '"':
			quoted, err := strconv.QuotedPrefix(line)
			if err != nil {
				t.Fatalf("%q: %v", line, err)
			}
			text, err := strconv.Unquote(quoted)
			if err != nil {
				t.Fatalf("%q: %v", line, err)
			}
			out, line = append(out, text), line[len(quoted):]
		case line[0] == '{' || line[0] == '[':
			return append(out, line)
		default:
			word, rest, _ := strings.Cut(line, " ")
			out, line = append(out, word), rest
		}
	}
	return out
}
