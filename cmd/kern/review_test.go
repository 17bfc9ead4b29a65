package main

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"github.com/go-git/go-git/v5"
	"github.com/go-git/go-git/v5/plumbing"
	"github.com/go-git/go-git/v5/plumbing/object"
)

const reviewBasis = "basis {\n    standard \"EN 1993-1-1:2005\"\n    actions \"EN 1990:2002\"\n}\ncase G permanent\ncase Q imposed \"B\"\nsection post = \"HEB 160\"\n"

const reviewPosts = "include \"basis.kern\"\n\ncolumn A1 {\n    section  = post\n    material = \"S355\"\n    height   = 4 m\n    load G 300 kN\n    load Q 200 kN\n}\n"

// depot is a repository in the working directory.
type depot struct {
	t    *testing.T
	repo *git.Repository
	day  int
}

func newDepot(t *testing.T, files ...string) *depot {
	t.Helper()
	t.Chdir(t.TempDir())
	repo, err := git.PlainInitWithOptions(".", &git.PlainInitOptions{InitOptions: git.InitOptions{DefaultBranch: "refs/heads/main"}})
	if err != nil {
		t.Fatal(err)
	}
	d := &depot{t: t, repo: repo}
	d.commit(files...)
	return d
}

func writeAll(t *testing.T, files ...string) {
	t.Helper()
	for i := 0; i < len(files); i += 2 {
		if err := os.MkdirAll(filepath.Dir(files[i]), 0o755); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(files[i], []byte(files[i+1]), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}

func (d *depot) commit(files ...string) plumbing.Hash {
	d.t.Helper()
	writeAll(d.t, files...)
	tree, err := d.repo.Worktree()
	if err == nil {
		err = tree.AddGlob(".")
	}
	if err != nil {
		d.t.Fatal(err)
	}
	d.day++
	who := &object.Signature{Name: "An Engineer", Email: "engineer@example.org", When: time.Unix(1_750_000_000+int64(d.day)*86400, 0).UTC()}
	hash, err := tree.Commit("State", &git.CommitOptions{Author: who, Committer: who})
	if err != nil {
		d.t.Fatal(err)
	}
	return hash
}

func (d *depot) branch(name, from string) {
	d.t.Helper()
	hash, err := d.repo.ResolveRevision(plumbing.Revision(from))
	if err != nil {
		d.t.Fatal(err)
	}
	tree, err := d.repo.Worktree()
	if err == nil {
		err = tree.Checkout(&git.CheckoutOptions{Hash: *hash, Branch: plumbing.NewBranchReferenceName(name), Create: true})
	}
	if err != nil {
		d.t.Fatal(err)
	}
}

// kern runs the command and gives what it printed and its exit status.
func kern(t *testing.T, args ...string) (string, int) {
	t.Helper()
	var out bytes.Buffer
	c := root()
	c.SetOut(&out)
	c.SetArgs(args)
	switch err := c.Execute(); {
	case err == nil:
		return out.String(), exitRight
	case errors.Is(err, errWrong):
		return out.String(), exitWrong
	default:
		return out.String() + err.Error(), exitBroken
	}
}

// want holds an exit status and some words of what was printed.
func want(t *testing.T, status int, words []string, args ...string) string {
	t.Helper()
	out, got := kern(t, args...)
	if got != status {
		t.Errorf("kern %v: exit status %d, want %d\n%s", args, got, status, out)
	}
	for _, w := range words {
		if !strings.Contains(out, w) {
			t.Errorf("kern %v: %q is not in\n%s", args, w, out)
		}
	}
	return out
}

// TestReview reviews a branch: the working directory, commits, paths, forms.
func TestReview(t *testing.T) {
	d := newDepot(t, "basis.kern", reviewBasis, "frame/.keep", "", "posts.kern", reviewPosts)
	want(t, exitRight, []string{"Nothing changed in any result", "1 member, each with the same"}, "review")
	d.branch("work", "main")
	edited := strings.Replace(reviewPosts, "load Q 200 kN", "load Q 260 kN", 1)
	d.commit("posts.kern", edited)
	want(t, exitWrong, []string{"1 member newly fails", "merge base of HEAD and main", "load Q 200 kN → load Q 260 kN (posts.kern:8)", "without it: passes"}, "review")
	want(t, exitWrong, []string{"1 member newly fails", "HEAD ("}, "review", "main", "HEAD")
	want(t, exitRight, []string{"1 member passes now"}, "review", "work", "main")
	want(t, exitRight, []string{"Nothing changed"}, "review", "HEAD")
	want(t, exitBroken, []string{"no calculation"}, "review", "main", "--", "frame")
	writeAll(t, "posts.kern", strings.Replace(edited, "height   = 4 m", "height   = 3 m", 1))
	md := want(t, exitRight, []string{"## 1 other member changed", "<details>", "[posts.kern:3](https://example.org/b/posts.kern#L3)"}, "review", "-o", "markdown", "--link", "https://example.org/b/{file}#L{line}")
	if again, _ := kern(t, "review", "-o", "markdown", "--link", "https://example.org/b/{file}#L{line}"); again != md {
		t.Error("the same states give another review")
	}
	want(t, exitRight, []string{"<!DOCTYPE html>", "1 other member changed"}, "review", "-o", "html")
	var doc struct {
		Worse   bool
		Changes []struct {
			Method string
			Before struct{ Utilisation float64 }
			After  struct{ Utilisation float64 }
			Causes []struct{ Share float64 }
		}
	}
	if err := json.Unmarshal([]byte(want(t, exitRight, nil, "review", "-o", "json")), &doc); err != nil || len(doc.Changes) != 1 || doc.Changes[0].Method != "exact" || len(doc.Changes[0].Causes) != 2 {
		t.Errorf("%v %+v", err, doc)
	}
	// a folder below is the same checkout
	t.Chdir("frame")
	want(t, exitWrong, []string{"../posts.kern:8"}, "review", "main", "HEAD", "--", "..")
	want(t, exitBroken, []string{"outside of the repository"}, "review", "main", "--", "../..")
	want(t, exitBroken, []string{"'nothing' is no branch"}, "review", "nothing")
	want(t, exitBroken, []string{"--output is text"}, "review", "-o", "pdf")
}

// TestReviewStrict exits with 1 for what was loosened when it is asked to.
func TestReviewStrict(t *testing.T) {
	newDepot(t, "basis.kern", reviewBasis, "posts.kern", strings.Replace(reviewPosts, "}", "    limit slenderness = 150\n}", 1))
	writeAll(t, "posts.kern", reviewPosts)
	words := []string{"Loosened", "limit slenderness removed", "no reason given"}
	want(t, exitRight, words, "review")
	want(t, exitWrong, words, "review", "--strict")
}

// TestReviewStates meets states that are odd: line ends, a base that does not
// parse, a file that an include gains, a detached head.
func TestReviewStates(t *testing.T) {
	d := newDepot(t, "basis.kern", reviewBasis, "posts.kern", reviewPosts)
	crlf := strings.ReplaceAll(reviewPosts, "\n", "\r\n")
	writeAll(t, "posts.kern", crlf)
	want(t, exitRight, []string{"Nothing changed in any result"}, "review")
	writeAll(t, "posts.kern", strings.Replace(crlf, "200 kN", "120 kN", 1))
	want(t, exitRight, []string{"load Q 200 kN → load Q 120 kN (posts.kern:8)"}, "review")
	writeAll(t, "steel.kern", "section post = \"HEB 140\"\n", "basis.kern", strings.Replace(reviewBasis, "section post = \"HEB 160\"\n", "include \"steel.kern\"\n", 1), "posts.kern", reviewPosts)
	want(t, exitWrong, []string{"section post: \"HEB 160\" → \"HEB 140\" (steel.kern:1)"}, "review")
	// what lies in a checkout of its own belongs to no state
	writeAll(t, "module/.git", "gitdir: elsewhere\n", "module/deep/posts.kern", strings.Replace(reviewPosts, "\"basis", "\"../../basis", 1))
	if out, _ := kern(t, "review"); strings.Contains(out, "module") {
		t.Errorf("a submodule is reviewed:\n%s", out)
	}
	if err := os.RemoveAll("module"); err != nil {
		t.Fatal(err)
	}
	d.commit("basis.kern", "basis { standard \"EN 1993", "posts.kern", "column {{{")
	writeAll(t, "basis.kern", reviewBasis, "posts.kern", reviewPosts)
	want(t, exitRight, []string{"A1"}, "review", "HEAD")
	head, err := d.repo.Head()
	if err != nil {
		t.Fatal(err)
	}
	tree, err := d.repo.Worktree()
	if err == nil {
		err = tree.Checkout(&git.CheckoutOptions{Hash: head.Hash(), Force: true})
	}
	if err != nil {
		t.Fatal(err)
	}
	want(t, exitRight, []string{"Nothing changed"}, "review")
}

// TestReviewDisk compares two folders and two files, in no repository.
func TestReviewDisk(t *testing.T) {
	t.Chdir(t.TempDir())
	edited := strings.Replace(reviewPosts, "200 kN", "260 kN", 1)
	writeAll(t, "old/basis.kern", reviewBasis, "old/posts.kern", reviewPosts, "new/basis.kern", reviewBasis, "new/posts.kern", edited, "new/deep/more.kern", strings.Replace(edited, "\"basis", "\"../basis", 1))
	want(t, exitBroken, []string{"two folders are compared whole"}, "review", "old", "new", "--", ".")
	want(t, exitWrong, []string{"newly fail", "new/posts.kern:8", "Added members"}, "review", "old", "new")
	want(t, exitWrong, []string{"1 member newly fails", "new/posts.kern:8"}, "review", "old/posts.kern", "new/posts.kern")
	want(t, exitBroken, []string{"a folder and a file"}, "review", "old", "new/posts.kern")
	want(t, exitBroken, []string{"no git repository"}, "review")
}

// TestReviewMerge tells of a merge that is clean as text and wrong as a
// calculation.
func TestReviewMerge(t *testing.T) {
	d := newDepot(t, "basis.kern", reviewBasis, "posts.kern", reviewPosts)
	d.branch("taller", "main")
	d.commit("posts.kern", strings.Replace(reviewPosts, "height   = 4 m", "height   = 4.15 m", 1))
	d.branch("lighter", "main")
	d.commit("basis.kern", reviewBasis+"# A remark.\n", "posts.kern", strings.Replace(reviewPosts, "load Q 200 kN", "load Q 215 kN", 1))
	d.branch("clash", "main")
	d.commit("posts.kern", strings.Replace(reviewPosts, "height   = 4 m", "height   = 3 m", 1))
	want(t, exitRight, []string{"Nothing changed"}, "review", "--merge", "main", "main")
	want(t, exitWrong, []string{"each side is right by itself, and together A1 fails", "height = 4 m → height = 4.15 m", "load Q 200 kN → load Q 215 kN"}, "review", "--merge", "taller", "lighter")
	want(t, exitRight, []string{"The merge is clean"}, "review", "--merge", "clash", "lighter")
	want(t, exitWrong, nil, "review", "--merge", "clash", "taller")
	want(t, exitBroken, []string{"two commits"}, "review", "--merge", "taller")
}

// TestReviewTextconv prints results beside members, of files that git hands over
// by themselves too.
func TestReviewTextconv(t *testing.T) {
	d := newDepot(t, "basis.kern", reviewBasis, "posts.kern", reviewPosts)
	line := "column A1 {  # passes 0.94 flexural-buckling-minor"
	want(t, exitRight, []string{line}, "review", "--textconv", "posts.kern")
	d.commit("basis.kern", strings.Replace(reviewBasis, "HEB 160", "HEB 200", 1), "posts.kern", strings.Replace(reviewPosts, "300 kN", "301 kN", 1))
	alone := filepath.Join(t.TempDir(), "posts.kern")
	writeAll(t, alone, reviewPosts)
	want(t, exitRight, []string{line}, "review", "--textconv", alone) // with the basis of its own time
	writeAll(t, alone, strings.ReplaceAll(strings.Replace(reviewPosts, "300 kN", "302 kN", 1), "\n", "\r\n"))
	want(t, exitRight, []string{"{  # passes", "\r\n"}, "review", "--textconv", alone) // in no commit
	writeAll(t, alone, "x = ")
	want(t, exitRight, []string{"x = "}, "review", "--textconv", alone)
	want(t, exitRight, []string{"git config diff.kern.textconv"}, "review", "--driver")
	want(t, exitBroken, nil, "review", "--textconv", fmt.Sprint(alone, ".not"))
}
