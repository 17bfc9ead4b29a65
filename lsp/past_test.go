package lsp

import (
	"errors"
	"time"

	"github.com/go-git/go-git/v5"
	commit "github.com/go-git/go-git/v5/plumbing/object"
)

func init() {
	// commit: commits all files of the folder
	verbs["commit"] = func(s *scene, _ []string) { s.commit() }
}

// commit commits all files of the folder. It has the same hash every time.
func (s *scene) commit() {
	s.t.Helper()
	repo, err := git.PlainInit(s.dir, false)
	if errors.Is(err, git.ErrRepositoryAlreadyExists) {
		repo, err = git.PlainOpen(s.dir)
	}
	if err != nil {
		s.t.Fatal(err)
	}
	tree, err := repo.Worktree()
	if err != nil {
		s.t.Fatal(err)
	}
	if err := tree.AddGlob("."); err != nil {
		s.t.Fatal(err)
	}
	who := &commit.Signature{Name: "An Engineer", Email: "engineer@example.org", When: time.Unix(1_750_000_000, 0).UTC()}
	if _, err := tree.Commit("State", &git.CommitOptions{Author: who, Committer: who}); err != nil {
		s.t.Fatal(err)
	}
}
