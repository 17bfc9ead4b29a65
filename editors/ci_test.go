package editors

import (
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"strings"
	"testing"

	"gopkg.in/yaml.v3"
)

// recipes are the files for build servers with the words that must stand in them.
var recipes = map[string][]string{
	"ci/github.yml":             {"--output github", "--output sarif", "review", "--method PATCH"},
	"ci/gitlab.yml":             {"--output junit", "review", "--request PUT"},
	"../.pre-commit-hooks.yaml": {"kern check --recorded"},
}

// TestRecipes reads the recipes as YAML; each runs commands that kern has.
func TestRecipes(t *testing.T) {
	for file, words := range recipes {
		text, err := os.ReadFile(filepath.FromSlash(file))
		if err != nil {
			t.Fatal(err)
		}
		var tree any
		if err := yaml.Unmarshal(text, &tree); err != nil {
			t.Errorf("%s: %v", file, err)
		}
		for _, w := range words {
			if !strings.Contains(string(text), w) {
				t.Errorf("%s lacks %q", file, w)
			}
		}
	}
}

// TestComment runs the step that keeps the comment, with a stand-in for gh and for
// kern: the first time a comment is made, the second time it is changed.
func TestComment(t *testing.T) {
	bash, err := exec.LookPath("bash")
	if err != nil || runtime.GOOS == "windows" {
		t.Skip("there is no bash")
	}
	text, err := os.ReadFile("ci/github.yml")
	if err != nil {
		t.Fatal(err)
	}
	var w struct {
		Jobs map[string]struct {
			Steps []struct{ Name, Run string }
		}
	}
	if err := yaml.Unmarshal(text, &w); err != nil {
		t.Fatal(err)
	}
	run := ""
	for _, s := range w.Jobs["check"].Steps {
		if s.Name == "Review what changed" {
			run = s.Run
		}
	}
	dir := t.TempDir()
	script := func(name, body string) {
		if err := os.WriteFile(filepath.Join(dir, name), []byte("#!"+bash+"\n"+body), 0o777); err != nil {
			t.Fatal(err)
		}
	}
	script("kern", `echo "reviewed $*"; exit 1`)
	script("gh", `echo "$*" >> said; for a in "$@"; do [ "$a" = --jq ] && cat ids; done; exit 0`)
	for ids, want := range map[string]string{"": "--method POST repos/o/r/issues/7/comments -F body=@review.md", "41\n42\n": "--method PATCH repos/o/r/issues/comments/41 -F body=@review.md"} {
		for name, text := range map[string]string{"ids": ids, "said": ""} {
			if err := os.WriteFile(filepath.Join(dir, name), []byte(text), 0o666); err != nil {
				t.Fatal(err)
			}
		}
		c := exec.Command(bash, "-e", "-c", run)
		c.Dir = dir
		c.Env = append(os.Environ(), "PATH="+dir+string(os.PathListSeparator)+os.Getenv("PATH"), "KERN=kern", "BASE=origin/main", "NUMBER=7", "GITHUB_REPOSITORY=o/r")
		if out, err := c.CombinedOutput(); err != nil {
			t.Fatalf("%v\n%s", err, out)
		}
		said, err := os.ReadFile(filepath.Join(dir, "said"))
		if err != nil {
			t.Fatal(err)
		}
		if !strings.Contains(string(said), want) {
			t.Errorf("with comments %q: %s", ids, said)
		}
		review, err := os.ReadFile(filepath.Join(dir, "review.md"))
		if err != nil {
			t.Fatal(err)
		}
		if string(review) != "<!-- kern review -->\nreviewed review origin/main HEAD --output markdown\n" {
			t.Errorf("%q", review)
		}
	}
}
