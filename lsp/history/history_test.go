package history_test

import (
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"kern/lsp/history"

	"github.com/go-git/go-git/v5"
	"github.com/go-git/go-git/v5/plumbing"
	"github.com/go-git/go-git/v5/plumbing/filemode"
	"github.com/go-git/go-git/v5/plumbing/object"
	"github.com/google/go-cmp/cmp"
)

// depot is a repository that a test makes.
type depot struct {
	t    *testing.T
	dir  string
	repo *git.Repository
	day  int
}

func newDepot(t *testing.T) *depot {
	t.Helper()
	d := &depot{t: t, dir: t.TempDir()}
	repo, err := git.PlainInitWithOptions(d.dir, &git.PlainInitOptions{InitOptions: git.InitOptions{DefaultBranch: "refs/heads/main"}})
	d.must(err)
	d.repo = repo
	return d
}

func (d *depot) must(err error) {
	d.t.Helper()
	if err != nil {
		d.t.Fatal(err)
	}
}

func (d *depot) write(name, text string) {
	d.t.Helper()
	file := filepath.Join(d.dir, filepath.FromSlash(name))
	d.must(os.MkdirAll(filepath.Dir(file), 0o755))
	d.must(os.WriteFile(file, []byte(text), 0o644))
}

// commit commits files, given as name and text; a text of "-" removes the file.
func (d *depot) commit(parents []plumbing.Hash, files ...string) plumbing.Hash {
	d.t.Helper()
	tree, err := d.repo.Worktree()
	d.must(err)
	for i := 0; i < len(files); i += 2 {
		if files[i+1] == "-" {
			_, err := tree.Remove(files[i])
			d.must(err)
			continue
		}
		d.write(files[i], files[i+1])
		_, err := tree.Add(files[i])
		d.must(err)
	}
	d.day++
	who := &object.Signature{Name: "An Engineer", Email: "engineer@example.org", When: time.Unix(1_750_000_000+int64(d.day)*86400, 0).UTC()}
	hash, err := tree.Commit(fmt.Sprint("State ", d.day), &git.CommitOptions{Author: who, Committer: who, Parents: parents, AllowEmptyCommits: true})
	d.must(err)
	return hash
}

func (d *depot) branch(name string, from plumbing.Hash) {
	d.t.Helper()
	tree, err := d.repo.Worktree()
	d.must(err)
	d.must(tree.Checkout(&git.CheckoutOptions{Hash: from, Branch: plumbing.NewBranchReferenceName(name), Create: true}))
}

func (d *depot) checkout(name string) {
	d.t.Helper()
	tree, err := d.repo.Worktree()
	d.must(err)
	d.must(tree.Checkout(&git.CheckoutOptions{Branch: plumbing.NewBranchReferenceName(name)}))
}

func open(t *testing.T, dir string) *history.Repository {
	t.Helper()
	r, err := history.Open(dir)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func commit(t *testing.T, r *history.Repository, given string) *history.Commit {
	t.Helper()
	c, err := r.Commit(given)
	if err != nil {
		t.Fatal(err)
	}
	return c
}

// reads holds the text of a file of a commit.
func reads(t *testing.T, c *history.Commit, name, want string) {
	t.Helper()
	if got, err := c.Read(name); err != nil || got != want {
		t.Errorf("%s in %s: %q, %v; want %q", name, c.Given, got, err, want)
	}
}

func fails(t *testing.T, err error, words string) {
	t.Helper()
	if err == nil || !strings.Contains(err.Error(), words) {
		t.Errorf("the error is %v, want something about %q", err, words)
	}
}

// TestCommits reads branches, tags, hashes and expressions, and what parts two
// branches.
func TestCommits(t *testing.T) {
	d := newDepot(t)
	first := d.commit(nil, "a.kern", "one\n", "deep/b.kern", "b\n", "deep/note.txt", "no\n", ".hidden/c.kern", "no\n")
	_, err := d.repo.CreateTag("issued", first, nil)
	d.must(err)
	second := d.commit(nil, "a.kern", "two\r\n", "built/x.kern", "x\n", ".gitignore", "built/\n")
	d.branch("work", first)
	third := d.commit(nil, "a.kern", "three\n", "deep/b.kern", "-")
	r := open(t, d.dir)
	reads(t, commit(t, r, "HEAD"), "a.kern", "three\n")
	reads(t, commit(t, r, "HEAD~1"), "a.kern", "one\n")
	reads(t, commit(t, r, "main"), "a.kern", "two\r\n")
	reads(t, commit(t, r, "issued"), "a.kern", "one\n")
	reads(t, commit(t, r, second.String()[:9]), "a.kern", "two\r\n")
	if r.Head() != third.String() {
		t.Errorf("the head is %s", r.Head())
	}
	main := commit(t, r, "main")
	if got, err := main.List("."); err != nil || cmp.Diff([]string{"a.kern", "deep/b.kern"}, got) != "" {
		t.Errorf("%v, %v", got, err)
	}
	if got, err := main.List("deep"); err != nil || cmp.Diff([]string{"deep/b.kern"}, got) != "" {
		t.Errorf("%v, %v", got, err)
	}
	if got, err := main.List("nowhere"); err != nil || got != nil {
		t.Errorf("%v, %v", got, err)
	}
	base, err := r.MergeBase(commit(t, r, "work"), main)
	if err != nil || base.Hash != first.String() {
		t.Errorf("%v, %v", base, err)
	}
	branch, err := r.Default()
	if err != nil || branch.Hash != second.String() {
		t.Errorf("%v, %v", branch, err)
	}
	_, err = r.Commit("nothing")
	fails(t, err, "'nothing' is no branch")
	_, err = main.Read("deep")
	fails(t, err, "folder")
	_, err = main.Read("c.kern")
	fails(t, err, "no such file")
	if c, name := r.Having("one\n"); c == nil || c.Hash != first.String() || name != "a.kern" {
		t.Errorf("%v %s", c, name)
	}
	if c, _ := r.Having("never\n"); c != nil {
		t.Errorf("%v", c)
	}
}

// TestMergedHistory finds the base behind a merge, and an origin's default branch
// before a local one.
func TestMergedHistory(t *testing.T) {
	d := newDepot(t)
	first := d.commit(nil, "a.kern", "one\n")
	d.branch("work", first)
	side := d.commit(nil, "b.kern", "b\n")
	d.checkout("main")
	second := d.commit(nil, "a.kern", "two\n")
	d.checkout("work")
	merge := d.commit([]plumbing.Hash{side, second}, "a.kern", "two\n")
	d.checkout("main")
	third := d.commit(nil, "a.kern", "three\n")
	r := open(t, d.dir)
	base, err := r.MergeBase(commit(t, r, "work"), commit(t, r, "main"))
	if err != nil || base.Hash != second.String() {
		t.Errorf("%v, %v", base, err)
	}
	d.must(d.repo.Storer.SetReference(plumbing.NewHashReference("refs/remotes/origin/next", merge)))
	d.must(d.repo.Storer.SetReference(plumbing.NewSymbolicReference("refs/remotes/origin/HEAD", "refs/remotes/origin/next")))
	if b, err := r.Default(); err != nil || b.Hash != merge.String() {
		t.Errorf("%v, %v; third is %s", b, err, third)
	}
}

// TestDetached reads a head that is no branch, and one without a commit.
func TestDetached(t *testing.T) {
	d := newDepot(t)
	r := open(t, d.dir)
	if r.Head() != "" {
		t.Error("a head without a commit")
	}
	_, err := r.Commit("HEAD")
	fails(t, err, "no commit yet")
	_, err = r.Default()
	fails(t, err, "name the base")
	first := d.commit(nil, "a.kern", "one\n")
	d.commit(nil, "a.kern", "two\n")
	tree, err := d.repo.Worktree()
	d.must(err)
	d.must(tree.Checkout(&git.CheckoutOptions{Hash: first}))
	if r.Head() != first.String() {
		t.Errorf("the head is %s", r.Head())
	}
	reads(t, commit(t, r, "HEAD"), "a.kern", "one\n")
	if _, err := history.Open(t.TempDir()); !errors.Is(err, history.ErrNone) {
		t.Errorf("no repository: %v", err)
	}
}

// TestWorktree reads through a .git that is a file.
func TestWorktree(t *testing.T) {
	d := newDepot(t)
	first := d.commit(nil, "a.kern", "one\n")
	d.branch("work", first)
	d.commit(nil, "a.kern", "two\n")
	d.checkout("main")
	// what git worktree add makes
	beside, admin := t.TempDir(), filepath.Join(d.dir, ".git", "worktrees", "beside")
	d.must(os.MkdirAll(admin, 0o755))
	for name, text := range map[string]string{filepath.Join(admin, "HEAD"): "ref: refs/heads/work\n", filepath.Join(admin, "commondir"): "../..\n",
		filepath.Join(admin, "gitdir"): filepath.Join(beside, ".git") + "\n", filepath.Join(beside, ".git"): "gitdir: " + admin + "\n"} {
		d.must(os.WriteFile(name, []byte(text), 0o644))
	}
	r := open(t, beside)
	reads(t, commit(t, r, "HEAD"), "a.kern", "two\n")
	reads(t, commit(t, r, "main"), "a.kern", "one\n")
	if base, err := r.MergeBase(commit(t, r, "HEAD"), commit(t, r, "main")); err != nil || base.Hash != first.String() {
		t.Errorf("%v, %v", base, err)
	}
}

// TestExtensions reads repositories with extensions that are of no matter to a
// reader, and says which one it cannot read.
func TestExtensions(t *testing.T) {
	d := newDepot(t)
	d.commit(nil, "a.kern", "one\n")
	file := filepath.Join(d.dir, ".git", "config")
	old, err := os.ReadFile(file)
	d.must(err)
	d.must(os.WriteFile(file, append(old, "[extensions]\n\tworktreeConfig = true\n\tpartialClone = origin\n"...), 0o644))
	reads(t, commit(t, open(t, d.dir), "HEAD"), "a.kern", "one\n")
	d.must(os.WriteFile(file, []byte("[core]\n\trepositoryformatversion = 1\n[extensions]\n\trefStorage = reftable\n"), 0o644))
	_, err = history.Open(d.dir)
	fails(t, err, "refstorage")
	beside := t.TempDir()
	d.must(os.WriteFile(filepath.Join(beside, ".git"), []byte("gitdir: ../gone\n"), 0o644))
	_, err = history.Open(beside)
	fails(t, err, "not there")
}

// TestShallow says that the history of a shallow clone ends.
func TestShallow(t *testing.T) {
	d := newDepot(t)
	first := d.commit(nil, "a.kern", "one\n")
	d.branch("work", first)
	d.commit(nil, "a.kern", "two\n")
	d.checkout("main")
	d.commit(nil, "b.kern", "b\n")
	dir := t.TempDir()
	_, err := git.PlainClone(dir, false, &git.CloneOptions{URL: d.dir, Depth: 1})
	if err != nil {
		t.Skip("a clone with a depth needs the git program: ", err)
	}
	r := open(t, dir)
	reads(t, commit(t, r, "HEAD"), "b.kern", "b\n")
	_, err = r.MergeBase(commit(t, r, "HEAD"), commit(t, r, "origin/work"))
	fails(t, err, "shallow")
	_, err = r.Commit(first.String())
	fails(t, err, "shallow")
}

// TestOddEntries: submodules are absent, links stay inside.
func TestOddEntries(t *testing.T) {
	d := newDepot(t)
	d.commit(nil, "common.kern", "c = 1 m\n", "sub/real.kern", "r = 1 m\n")
	link := func(target string) plumbing.Hash {
		o := d.repo.Storer.NewEncodedObject()
		o.SetType(plumbing.BlobObject)
		w, err := o.Writer()
		d.must(err)
		_, err = w.Write([]byte(target))
		d.must(err)
		h, err := d.repo.Storer.SetEncodedObject(o)
		d.must(err)
		return h
	}
	head, err := d.repo.Head()
	d.must(err)
	old, err := d.repo.CommitObject(head.Hash())
	d.must(err)
	tree, err := old.Tree()
	d.must(err)
	entries := append([]object.TreeEntry{}, tree.Entries...)
	entries = append(entries, object.TreeEntry{Name: "zlink.kern", Mode: filemode.Symlink, Hash: link("sub/real.kern")},
		object.TreeEntry{Name: "zloop.kern", Mode: filemode.Symlink, Hash: link("zloop.kern")},
		object.TreeEntry{Name: "zmodule", Mode: filemode.Submodule, Hash: head.Hash()},
		object.TreeEntry{Name: "zout.kern", Mode: filemode.Symlink, Hash: link("../outside.kern")})
	o := d.repo.Storer.NewEncodedObject()
	d.must((&object.Tree{Entries: entries}).Encode(o))
	treeHash, err := d.repo.Storer.SetEncodedObject(o)
	d.must(err)
	c := *old
	c.TreeHash, c.ParentHashes = treeHash, []plumbing.Hash{head.Hash()}
	o = d.repo.Storer.NewEncodedObject()
	d.must(c.Encode(o))
	hash, err := d.repo.Storer.SetEncodedObject(o)
	d.must(err)
	r := open(t, d.dir)
	x := commit(t, r, hash.String())
	if got, err := x.List("."); err != nil || cmp.Diff([]string{"common.kern", "sub/real.kern"}, got) != "" {
		t.Errorf("%v, %v", got, err)
	}
	reads(t, x, "zlink.kern", "r = 1 m\n")
	_, err = x.Read("zout.kern")
	fails(t, err, "out of the repository")
	_, err = x.Read("zloop.kern")
	fails(t, err, "leads nowhere")
	_, err = x.Read("zmodule")
	fails(t, err, "submodule")
	_, err = x.Read("zmodule/deep/a.kern")
	fails(t, err, "in the submodule zmodule")
}

// TestMergeText merges as git does: touching changes are a conflict.
func TestMergeText(t *testing.T) {
	const base = "a\nb\nc\nd\ne\nf\n"
	for _, c := range []struct{ ours, theirs, want string }{
		{base, "a\nb\nX\nd\ne\nf\n", "a\nb\nX\nd\ne\nf\n"},
		{"A\nb\nc\nd\ne\nf\n", "a\nb\nc\nd\ne\nF\n", "A\nb\nc\nd\ne\nF\n"},
		{"a\nb\nc\nd\ne\nf\ng\n", "0\na\nb\nc\nd\ne\nf\n", "0\na\nb\nc\nd\ne\nf\ng\n"},
		{"a\nc\nd\ne\nf\n", "a\nb\nc\nd\nf\n", "a\nc\nd\nf\n"},
		{"a\nX\nc\nd\ne\nf\n", "a\nX\nc\nd\ne\nY\n", "a\nX\nc\nd\ne\nY\n"},
		{"a\nX\nc\nd\ne\nf\n", "a\nY\nc\nd\ne\nf\n", "conflict"},
		{"a\nX\nc\nd\ne\nf\n", "a\nb\nY\nd\ne\nf\n", "conflict"},
		{"a\nb\nc\nd\ne\nf\nX\n", "a\nb\nc\nd\ne\nf\nY\n", "conflict"},
		{"", base, ""},
		{"a\nb\nc\nd\ne\nf", "0\na\nb\nc\nd\ne\nf\n", "0\na\nb\nc\nd\ne\nf"},
	} {
		got, err := history.MergeText(base, c.ours, c.theirs)
		if errors.Is(err, history.ErrConflict) {
			got = "conflict"
		} else if err != nil {
			t.Fatal(err)
		}
		if got != c.want {
			t.Errorf("%q and %q: %q, want %q", c.ours, c.theirs, got, c.want)
		}
	}
}

// TestMerged merges files that were added and removed.
func TestMerged(t *testing.T) {
	d := newDepot(t)
	first := d.commit(nil, "a.kern", "1\n2\n3\n", "gone.kern", "g\n", "torn.kern", "t\n")
	d.branch("ours", first)
	d.commit(nil, "a.kern", "1\n2\nthree\n", "ours.kern", "o\n", "gone.kern", "-", "torn.kern", "t\nu\n")
	d.branch("theirs", first)
	d.commit(nil, "a.kern", "one\n2\n3\n", "theirs.kern", "t\n", "torn.kern", "-")
	r := open(t, d.dir)
	m := history.Merged{Base: commit(t, r, first.String()), Ours: commit(t, r, "ours"), Theirs: commit(t, r, "theirs")}
	got, err := m.List(".")
	if err != nil || cmp.Diff([]string{"a.kern", "ours.kern", "theirs.kern", "torn.kern"}, got) != "" {
		t.Errorf("%v, %v", got, err)
	}
	if text, err := m.Read("a.kern"); err != nil || text != "one\n2\nthree\n" {
		t.Errorf("%q, %v", text, err)
	}
	if _, err := m.Read("torn.kern"); !errors.Is(err, history.ErrConflict) {
		t.Errorf("%v", err)
	}
	if _, err := m.Read("gone.kern"); err == nil || errors.Is(err, history.ErrConflict) {
		t.Errorf("%v", err)
	}
}
