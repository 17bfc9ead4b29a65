package history

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"github.com/go-git/go-billy/v5/osfs"
	"github.com/go-git/go-git/v5"
	"github.com/go-git/go-git/v5/config"
	"github.com/go-git/go-git/v5/plumbing/cache"
	format "github.com/go-git/go-git/v5/plumbing/format/config"
	"github.com/go-git/go-git/v5/storage/filesystem"
	"github.com/go-git/go-git/v5/storage/filesystem/dotgit"
)

// Open opens the repository of a checkout by its absolute path. A checkout whose
// .git is a file (of a worktree or a submodule) is one too.
func Open(dir string) (*Repository, error) {
	dot, err := dotGit(dir)
	if errors.Is(err, fs.ErrNotExist) {
		return nil, ErrNone
	}
	if err != nil {
		return nil, fmt.Errorf("the git repository cannot be read: %w", err)
	}
	common := dot
	if text, err := os.ReadFile(filepath.Join(dot, "commondir")); err == nil {
		common = beside(dot, string(text))
	}
	storage := filesystem.NewStorage(dotgit.NewRepositoryFilesystem(osfs.New(dot), osfs.New(common)), cache.NewObjectLRUDefault())
	repo, err := git.Open(reading{storage}, nil)
	if err != nil {
		return nil, fmt.Errorf("the git repository cannot be read: %w", err)
	}
	return &Repository{repo: repo}, nil
}

// dotGit is the folder with what git keeps of a checkout.
func dotGit(dir string) (string, error) {
	dot := filepath.Join(dir, ".git")
	info, err := os.Stat(dot)
	if err != nil || info.IsDir() {
		return dot, err
	}
	text, err := os.ReadFile(dot)
	if err != nil {
		return "", err
	}
	at, ok := strings.CutPrefix(string(text), "gitdir:")
	if !ok {
		return "", errors.New("the file .git does not say where the repository is")
	}
	at = beside(dir, at)
	if _, err := os.Stat(at); err != nil {
		return "", fmt.Errorf("the file .git leads to %s, which is not there", at)
	}
	return at, nil
}

// beside is a path that a file of git's names, from a folder.
func beside(dir, path string) string {
	path = filepath.FromSlash(strings.TrimSpace(path))
	if filepath.IsAbs(path) {
		return path
	}
	return filepath.Join(dir, path)
}

// reading is a store whose configuration leaves out what is of no matter to
// somebody who only reads: the library refuses repositories with extensions that
// it does not know.
type reading struct{ *filesystem.Storage }

// harmless are extensions of git's that change nothing about how a commit is read.
// What a partial clone lacks is reported where it is missed.
var harmless = []string{"worktreeConfig", "partialClone", "preciousObjects", "relativeWorktrees"}

// Config gives the configuration of the repository.
func (r reading) Config() (*config.Config, error) {
	c, err := r.Storage.Config()
	if err == nil && c.Raw != nil && c.Raw.HasSection("extensions") {
		s := c.Raw.Section("extensions")
		s.Options = slices.DeleteFunc(s.Options, func(o *format.Option) bool {
			return slices.ContainsFunc(harmless, func(name string) bool { return strings.EqualFold(name, o.Key) })
		})
	}
	return c, err
}
