package history_test

import (
	"errors"
	"flag"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"

	"kern/lsp/history"
)

var merges = flag.Int("merges", 40, "number of random merges to compare with git's")

// TestMergeAsGit compares random merges with those of the git program (git
// merge-file), where there is one.
func TestMergeAsGit(t *testing.T) {
	if _, err := exec.LookPath("git"); err != nil {
		t.Skip("there is no git program")
	}
	dir := t.TempDir()
	r := rand.New(rand.NewPCG(1, 2))
	change := func(lines []string) []string {
		out := append([]string{}, lines...)
		for range 1 + r.IntN(3) {
			i := r.IntN(len(out) + 1)
			switch k := r.IntN(3); {
			case k == 0 || i == len(out):
				out = append(out[:i:i], append([]string{string(rune('A' + r.IntN(26)))}, out[i:]...)...)
			case k == 1:
				out = append(out[:i:i], out[i+1:]...)
			default:
				out[i] = string(rune('A' + r.IntN(26)))
			}
		}
		return out
	}
	clean, conflicts := 0, 0
	for range *merges {
		var base []string
		for i := range 4 + r.IntN(16) {
			base = append(base, string(rune('a'+i)))
		}
		text := func(l []string) string { return strings.Join(l, "\n") + "\n" }
		b, o, th := text(base), text(change(base)), text(change(base))
		var files []string
		for i, s := range []string{o, b, th} {
			files = append(files, filepath.Join(dir, string(rune('0'+i))))
			if err := os.WriteFile(files[i], []byte(s), 0o644); err != nil {
				t.Fatal(err)
			}
		}
		want, err := exec.Command("git", "merge-file", "-p", "--diff3", files[0], files[1], files[2]).Output()
		got, ours := history.MergeText(b, o, th)
		switch {
		case (err != nil) != errors.Is(ours, history.ErrConflict):
			t.Errorf("base %q, ours %q, theirs %q: git says %v, we say %v\n%s", b, o, th, err, ours, want)
		case err == nil && string(want) != got:
			t.Errorf("base %q, ours %q, theirs %q:\n%q, git merges to\n%q", b, o, th, got, want)
		case err == nil:
			clean++
		default:
			conflicts++
		}
	}
	t.Logf("%d clean, %d conflicts", clean, conflicts)
}
