// Package editors_test writes what the editors' files take from the Go tables:
// the words of the language, its units, the settings of the server, the version.
package editors_test

import (
	"encoding/json"
	"flag"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"kern/lsp"
)

//go:generate go test -run TestGenerated -update .

var update = flag.Bool("update", false, "write the generated parts of the editors' files")

// part is a generated part of a file. In a file with comments it stands between
// the lines "generated: NAME" and "end of NAME"; in JSON, which has none, it is
// the line below `"comment": "generated: NAME",`.
type part struct {
	file, name string
	lines      []string
}

func parts() []part {
	var all []part
	all = append(all, vscodeParts()...)
	all = append(all, vimParts()...)
	all = append(all, emacsParts()...)
	all = append(all, kateParts()...)
	return all
}

// TestGenerated holds every generated part against the tables; -update writes
// the parts anew.
func TestGenerated(t *testing.T) {
	files := map[string]string{}
	text := func(name string) string {
		if _, ok := files[name]; !ok {
			raw, err := os.ReadFile(name)
			if err != nil {
				t.Fatal(err)
			}
			files[name] = string(raw)
		}
		return files[name]
	}
	want := map[string]string{}
	for _, p := range parts() {
		if want[p.file] == "" {
			want[p.file] = text(p.file)
		}
		got, ok := p.put(want[p.file])
		if !ok {
			t.Fatalf("%s has no place for the part %q", p.file, p.name)
		}
		want[p.file] = got
	}
	const manifest = "vscode/package.json"
	want[manifest] = putVersion(t, putSettings(t, text(manifest)))
	for _, name := range []string{"ftdetect/kern.vim", "ftplugin/kern.vim", "syntax/kern.vim", "indent/kern.vim"} {
		source := filepath.Join("vim", name)
		if _, ok := want[source]; !ok {
			want[source] = text(source)
		}
		// Neovim reads the same files; each folder is to work by itself.
		copied := filepath.Join("neovim", name)
		if raw, err := os.ReadFile(copied); err == nil {
			files[copied] = string(raw)
		}
		want[copied] = want[source]
	}
	for name, content := range want {
		if files[name] == content {
			continue
		}
		if !*update {
			t.Errorf("%s is not what the tables say; write it with: go generate ./editors", name)
			continue
		}
		if err := os.WriteFile(name, []byte(content), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}

// TestEveryMarkerIsFilled: a marker in a file that no part fills would be a list
// kept by hand.
func TestEveryMarkerIsFilled(t *testing.T) {
	filled := map[string]bool{}
	for _, p := range parts() {
		filled[p.file+" "+p.name] = true
	}
	marker := regexp.MustCompile(`generated: ([a-z-]+)`)
	err := filepath.WalkDir(".", func(path string, d os.DirEntry, err error) error {
		if err != nil {
			return err
		}
		if d.IsDir() && (d.Name() == "node_modules" || path == "neovim") {
			return filepath.SkipDir
		}
		if d.IsDir() || strings.HasSuffix(path, ".go") {
			return nil
		}
		raw, err := os.ReadFile(path)
		if err != nil {
			return err
		}
		for _, m := range marker.FindAllStringSubmatch(string(raw), -1) {
			if !filled[path+" "+m[1]] {
				t.Errorf("%s: nothing fills the part %q", path, m[1])
			}
		}
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
}

// put writes the part into the text of its file.
func (p part) put(text string) (string, bool) {
	lines := strings.Split(text, "\n")
	for i, line := range lines {
		if !strings.Contains(line, "generated: "+p.name) || !wordEnds(line, "generated: "+p.name) {
			continue
		}
		end := i + 2
		if !strings.HasSuffix(p.file, ".json") {
			for end = i + 1; end < len(lines) && !strings.Contains(lines[end], "end of "+p.name); end++ {
			}
			if end == len(lines) {
				return text, false
			}
		}
		if end > len(lines) {
			return text, false
		}
		indent := line[:len(line)-len(strings.TrimLeft(line, " "))]
		out := append([]string(nil), lines[:i+1]...)
		for _, l := range p.lines {
			out = append(out, indent+l)
		}
		return strings.Join(append(out, lines[end:]...), "\n"), true
	}
	return text, false
}

// wordEnds tells whether what follows the word in the line is not part of it:
// "units" is not "units-alone".
func wordEnds(line, word string) bool {
	rest := line[strings.Index(line, word)+len(word):]
	return rest == "" || !strings.ContainsAny(rest[:1], "abcdefghijklmnopqrstuvwxyz-")
}

// putSettings writes the server's settings into the extension's manifest: the
// last "properties" in it.
func putSettings(t *testing.T, text string) string {
	const opening = "\"properties\": {\n"
	at := strings.LastIndex(text, opening)
	if at < 0 {
		t.Fatal("the manifest has no place for the settings")
	}
	lineStart := strings.LastIndexByte(text[:at], '\n') + 1
	indent := text[lineStart:at]
	end := strings.Index(text[at:], "\n"+indent+"}")
	if end < 0 {
		t.Fatal("the settings in the manifest do not end")
	}
	var out []string
	for _, s := range lsp.SettingsTable() {
		type property struct {
			Type        string   `json:"type"`
			Default     any      `json:"default"`
			Values      []string `json:"enum,omitempty"`
			Least       *int     `json:"minimum,omitempty"`
			Most        *int     `json:"maximum,omitempty"`
			Scope       string   `json:"scope"`
			Description string   `json:"description"`
		}
		p := property{Type: s.Type, Default: s.Default, Values: s.Values, Scope: "resource", Description: s.Description}
		if s.Type == "integer" {
			p.Least, p.Most = &s.Least, &s.Most
		}
		raw, err := json.MarshalIndent(p, indent+"  ", "  ")
		if err != nil {
			t.Fatal(err)
		}
		out = append(out, indent+"  \"kern."+s.Name+"\": "+string(raw))
	}
	return text[:at+len(opening)] + strings.Join(out, ",\n") + text[at+end:]
}

// putVersion writes the release of the program into the manifest.
func putVersion(t *testing.T, text string) string {
	raw, err := os.ReadFile("../cmd/kern/version.go")
	if err != nil {
		t.Fatal(err)
	}
	release := regexp.MustCompile(`const release = "([^"]+)"`).FindSubmatch(raw)
	if release == nil {
		t.Fatal("cmd/kern/version.go names no release")
	}
	version := regexp.MustCompile(`"version": "[^"]*"`)
	if len(version.FindAllString(text, -1)) != 1 {
		t.Fatal("the manifest does not have one version")
	}
	return version.ReplaceAllString(text, `"version": "`+string(release[1])+`"`)
}
