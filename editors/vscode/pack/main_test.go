package main

import (
	"archive/zip"
	"encoding/xml"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// folder makes the folder of an extension.
func folder(t *testing.T, files map[string]string) string {
	t.Helper()
	dir := t.TempDir()
	for name, content := range files {
		file := filepath.Join(dir, filepath.FromSlash(name))
		if err := os.MkdirAll(filepath.Dir(file), 0o755); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(file, []byte(content), 0o600); err != nil {
			t.Fatal(err)
		}
	}
	return dir
}

const description = `{"name": "x", "displayName": "X & Y", "description": "of <x>", "version": "1.2.3", "publisher": "p",
	"engines": {"vscode": "^1.91.0"}, "categories": ["Linters"], "keywords": ["a", "b"]}`

func TestPack(t *testing.T) {
	from := folder(t, map[string]string{"package.json": description, "bin/kern": "server", "bin/kern.exe": "server", "dist/extension.js": "//", "LICENSE.txt": "l"})
	to := t.TempDir()
	name, err := pack("linux-x64", from, to)
	if err != nil {
		t.Fatal(err)
	}
	if filepath.Base(name) != "x-1.2.3-linux-x64.vsix" {
		t.Errorf("the package is called %s", name)
	}
	z, err := zip.OpenReader(name)
	if err != nil {
		t.Fatal(err)
	}
	defer z.Close()
	modes := map[string]fs.FileMode{}
	texts := map[string]string{}
	for _, f := range z.File {
		modes[f.Name] = f.Mode().Perm()
		r, err := f.Open()
		if err != nil {
			t.Fatal(err)
		}
		raw, err := io.ReadAll(r)
		if err != nil {
			t.Fatal(err)
		}
		texts[f.Name] = string(raw)
	}
	for name, mode := range map[string]fs.FileMode{"extension.vsixmanifest": 0o644, "[Content_Types].xml": 0o644, "extension/package.json": 0o644,
		"extension/bin/kern": 0o755, "extension/bin/kern.exe": 0o755, "extension/dist/extension.js": 0o644, "extension/LICENSE.txt": 0o644} {
		if modes[name] != mode {
			t.Errorf("%s has the mode %v, want %v", name, modes[name], mode)
		}
	}
	if len(z.File) != 7 {
		t.Errorf("the package has %d files", len(z.File))
	}
	for _, name := range []string{"extension.vsixmanifest", "[Content_Types].xml"} {
		if err := xml.Unmarshal([]byte(texts[name]), new(struct{})); err != nil {
			t.Errorf("%s: %v", name, err)
		}
	}
	for _, want := range []string{`Id="x" Version="1.2.3" Publisher="p" TargetPlatform="linux-x64"`, "X &amp; Y", "of &lt;x&gt;", "<Tags>a,b</Tags>", `Value="^1.91.0"`} {
		if !strings.Contains(texts["extension.vsixmanifest"], want) {
			t.Errorf("the manifest lacks %s:\n%s", want, texts["extension.vsixmanifest"])
		}
	}
	for _, want := range []string{`Extension=".js" ContentType="application/javascript"`, `PartName="/extension/bin/kern" ContentType="application/octet-stream"`} {
		if !strings.Contains(texts["[Content_Types].xml"], want) {
			t.Errorf("the content types lack %s:\n%s", want, texts["[Content_Types].xml"])
		}
	}
	again, err := pack("linux-x64", from, t.TempDir())
	if err != nil {
		t.Fatal(err)
	}
	first, err := os.ReadFile(name)
	if err != nil {
		t.Fatal(err)
	}
	if second, err := os.ReadFile(again); err != nil || string(first) != string(second) {
		t.Errorf("the same files give other bytes (%v)", err)
	}
}

func TestPackRefuses(t *testing.T) {
	for name, c := range map[string]struct{ target, manifest string }{
		"no target":    {"", description},
		"no version":   {"linux-x64", strings.Replace(description, "1.2.3", "", 1)},
		"no publisher": {"linux-x64", strings.Replace(description, `"p"`, `""`, 1)},
		"no JSON":      {"linux-x64", "{"},
	} {
		t.Run(name, func(t *testing.T) {
			if _, err := pack(c.target, folder(t, map[string]string{"package.json": c.manifest}), t.TempDir()); err == nil {
				t.Error("it was packed")
			}
		})
	}
}
