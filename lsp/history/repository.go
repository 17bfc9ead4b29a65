// Package history reads the calculations of earlier states out of a git
// repository, without a checkout and without a git program.
package history

import (
	"errors"
	"fmt"
	"path"
	"strings"
	"sync"

	"kern/lsp/disk"

	"github.com/go-git/go-git/v5"
	"github.com/go-git/go-git/v5/plumbing"
	"github.com/go-git/go-git/v5/plumbing/filemode"
	"github.com/go-git/go-git/v5/plumbing/format/gitignore"
	"github.com/go-git/go-git/v5/plumbing/object"
)

// ErrNone says that a folder lies in no repository.
var ErrNone = errors.New("there is no git repository here")

// Repository is the repository of a checkout. It may be used from several
// goroutines.
type Repository struct {
	mu   sync.Mutex
	repo *git.Repository
}

// Commit is one state of a repository.
type Commit struct {
	// Hash is the full hash, in hexadecimal.
	Hash string
	// Given is what it was asked for by.
	Given string

	of     *Repository
	commit *object.Commit
	tree   *object.Tree
}

// Short is the hash as people write it.
func (c *Commit) Short() string { return c.Hash[:min(10, len(c.Hash))] }

// Title is the commit for people: what it was asked for by, and its hash.
func (c *Commit) Title() string {
	if c.Given == "" || strings.HasPrefix(c.Hash, c.Given) {
		return c.Short()
	}
	return c.Given + " (" + c.Short() + ")"
}

// Commit finds a commit by a branch, a tag, a hash or an expression such as
// HEAD~2.
func (r *Repository) Commit(given string) (*Commit, error) {
	r.mu.Lock()
	defer r.mu.Unlock()
	hash, err := r.repo.ResolveRevision(plumbing.Revision(given))
	if err != nil || hash == nil || hash.IsZero() {
		if given == "HEAD" {
			return nil, errors.New("the repository has no commit yet")
		}
		hint := ""
		if r.shallow() {
			hint = "; the clone is shallow: git fetch --unshallow brings the rest"
		}
		return nil, fmt.Errorf("'%s' is no branch, tag or commit of the repository%s", given, hint)
	}
	c, err := r.load(*hash)
	if err != nil {
		return nil, err
	}
	c.Given = given
	return c, nil
}

func (r *Repository) load(hash plumbing.Hash) (*Commit, error) {
	c, err := r.repo.CommitObject(hash)
	if err != nil {
		return nil, r.missing("the commit "+hash.String()[:10], err)
	}
	tree, err := c.Tree()
	if err != nil {
		return nil, r.missing("the files of commit "+hash.String()[:10], err)
	}
	return &Commit{Hash: hash.String(), of: r, commit: c, tree: tree}, nil
}

// missing words the error of an object that cannot be read.
func (r *Repository) missing(what string, err error) error {
	if errors.Is(err, plumbing.ErrObjectNotFound) || errors.Is(err, object.ErrFileNotFound) || errors.Is(err, object.ErrDirectoryNotFound) {
		return fmt.Errorf("%s: not in this clone, which may be shallow or partial; git fetch --unshallow --refetch brings it", what)
	}
	return fmt.Errorf("%s: %w", what, err)
}

func (r *Repository) shallow() bool {
	list, err := r.repo.Storer.Shallow()
	return err == nil && len(list) > 0
}

// Head is the hash of the last commit of the checkout; "" when there is none.
func (r *Repository) Head() string {
	r.mu.Lock()
	defer r.mu.Unlock()
	h, err := r.repo.Head()
	if err != nil {
		return ""
	}
	return h.Hash().String()
}

// defaults are the names under which the default branch is looked for.
var defaults = []string{"refs/remotes/origin/HEAD", "refs/remotes/origin/main", "refs/remotes/origin/master", "refs/heads/main", "refs/heads/master", "refs/heads/trunk"}

// Default gives the default branch: that of the remote origin, or main, master or
// trunk.
func (r *Repository) Default() (*Commit, error) {
	r.mu.Lock()
	names := defaults
	if cfg, err := r.repo.Config(); err == nil && cfg.Init.DefaultBranch != "" {
		names = append(append([]string{}, defaults...), "refs/heads/"+cfg.Init.DefaultBranch)
	}
	found := ""
	for _, name := range names {
		if ref, err := r.repo.Reference(plumbing.ReferenceName(name), true); err == nil {
			found = ref.Name().Short()
			break
		}
	}
	r.mu.Unlock()
	if found == "" {
		return nil, errors.New("the repository has no branch origin/main, origin/master, main, master or trunk: name the base, kern review BASE")
	}
	return r.Commit(found)
}

// MergeBase is the newest commit that both lead back to.
func (r *Repository) MergeBase(a, b *Commit) (*Commit, error) {
	r.mu.Lock()
	defer r.mu.Unlock()
	bases, err := a.commit.MergeBase(b.commit)
	if err == nil && len(bases) > 0 {
		c, err := r.load(bases[0].Hash)
		if err != nil {
			return nil, err
		}
		c.Given = "merge base of " + a.Given + " and " + b.Given
		return c, nil
	}
	if r.shallow() {
		return nil, fmt.Errorf("the clone is shallow and does not reach back to where %s and %s part: git fetch --unshallow, or name the base", a.Given, b.Given)
	}
	if err != nil {
		return nil, r.missing("the history of "+a.Given+" and "+b.Given, err)
	}
	return nil, fmt.Errorf("%s and %s have no commit in common: name the base", a.Given, b.Given)
}

// maxLinks bounds how many symbolic links may lead to one another.
const maxLinks = 8

// Read gives the text of a file; an error is worded for the user.
func (c *Commit) Read(name string) (string, error) {
	c.of.mu.Lock()
	defer c.of.mu.Unlock()
	for range maxLinks {
		entry, err := c.tree.FindEntry(name)
		if err != nil {
			for dir := path.Dir(name); dir != "."; dir = path.Dir(dir) {
				if e, err := c.tree.FindEntry(dir); err == nil && e.Mode == filemode.Submodule {
					return "", errors.New("it lies in the submodule " + dir + ", which is not read")
				}
			}
			return "", errors.New("there is no such file or folder")
		}
		switch {
		case entry.Mode == filemode.Submodule:
			return "", errors.New("it is a submodule, which is not read")
		case entry.Mode == filemode.Dir:
			return "", errors.New("it is a folder")
		}
		file, err := c.tree.File(name)
		if err != nil {
			return "", c.of.missing("its contents", err)
		}
		text, err := file.Contents()
		if err != nil {
			return "", c.of.missing("its contents", err)
		}
		if entry.Mode != filemode.Symlink {
			return text, nil
		}
		name = path.Join(path.Dir(name), text)
		if path.IsAbs(text) || name == ".." || strings.HasPrefix(name, "../") {
			return "", errors.New("it is a link that leads out of the repository")
		}
	}
	return "", errors.New("it is a link that leads nowhere")
}

// List lists the calculations at a name, in order: the file itself, or those in
// the folder and below, without hidden folders, submodules and what is ignored.
// "." is the whole repository. A name that the commit does not have has none.
func (c *Commit) List(name string) ([]string, error) {
	c.of.mu.Lock()
	defer c.of.mu.Unlock()
	tree := c.tree
	var patterns []gitignore.Pattern
	if name != "." {
		entry, err := c.tree.FindEntry(name)
		if err != nil {
			return nil, nil
		}
		if entry.Mode == filemode.Regular || entry.Mode == filemode.Executable || entry.Mode == filemode.Symlink {
			return []string{name}, nil
		}
		if entry.Mode != filemode.Dir {
			return nil, nil
		}
		parts := strings.Split(name, "/")
		for i := range parts {
			patterns = append(patterns, c.ignored(path.Join(parts[:i]...))...)
		}
		if tree, err = c.tree.Tree(name); err != nil {
			return nil, c.of.missing("the folder "+name, err)
		}
	} else {
		name = ""
	}
	var out []string
	err := c.walk(tree, name, patterns, &out)
	return out, err
}

func (c *Commit) walk(tree *object.Tree, dir string, patterns []gitignore.Pattern, out *[]string) error {
	patterns = append(patterns[:len(patterns):len(patterns)], c.ignored(dir)...)
	ignored := gitignore.NewMatcher(patterns)
	for _, e := range tree.Entries {
		name := path.Join(dir, e.Name)
		if strings.HasPrefix(e.Name, ".") || ignored.Match(strings.Split(name, "/"), e.Mode == filemode.Dir) {
			continue
		}
		switch {
		case e.Mode == filemode.Dir:
			below, err := object.GetTree(c.of.repo.Storer, e.Hash)
			if err != nil {
				return c.of.missing("the folder "+name, err)
			}
			if err := c.walk(below, name, patterns, out); err != nil {
				return err
			}
		case (e.Mode == filemode.Regular || e.Mode == filemode.Executable) && strings.HasSuffix(e.Name, disk.Extension):
			*out = append(*out, name)
		}
	}
	return nil
}

// ignored reads the ignore file of a folder.
func (c *Commit) ignored(dir string) []gitignore.Pattern {
	file, err := c.tree.File(path.Join(dir, ".gitignore"))
	if err != nil {
		return nil
	}
	text, err := file.Contents()
	if err != nil {
		return nil
	}
	return disk.Ignored(text, dir)
}
