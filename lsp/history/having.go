package history

import (
	"path"
	"strings"

	"kern/lsp/disk"

	"github.com/go-git/go-git/v5"
	"github.com/go-git/go-git/v5/plumbing"
	"github.com/go-git/go-git/v5/plumbing/filemode"
	"github.com/go-git/go-git/v5/plumbing/object"
	"github.com/go-git/go-git/v5/plumbing/storer"
)

// maxSearch bounds how many commits are looked through for a file.
const maxSearch = 2000

// Having finds the newest commit, HEAD and before, that has a calculation with
// this very text, and the file's name there; nil for none.
func (r *Repository) Having(text string) (*Commit, string) {
	r.mu.Lock()
	defer r.mu.Unlock()
	wanted := plumbing.ComputeHash(plumbing.BlobObject, []byte(text))
	head, err := r.repo.Head()
	if err != nil {
		return nil, ""
	}
	log, err := r.repo.Log(&git.LogOptions{From: head.Hash(), Order: git.LogOrderCommitterTime})
	if err != nil {
		return nil, ""
	}
	defer log.Close()
	lacking := map[plumbing.Hash]bool{} // folders without the file
	var search func(hash plumbing.Hash, dir string) string
	search = func(hash plumbing.Hash, dir string) string {
		if lacking[hash] {
			return ""
		}
		tree, err := object.GetTree(r.repo.Storer, hash)
		if err != nil {
			return ""
		}
		for _, e := range tree.Entries {
			if e.Hash == wanted && strings.HasSuffix(e.Name, disk.Extension) {
				return path.Join(dir, e.Name)
			}
			if e.Mode == filemode.Dir {
				if found := search(e.Hash, path.Join(dir, e.Name)); found != "" {
					return found
				}
			}
		}
		lacking[hash] = true
		return ""
	}
	var out *Commit
	name, seen := "", 0
	err = log.ForEach(func(c *object.Commit) error {
		if seen++; seen > maxSearch {
			return storer.ErrStop
		}
		if name = search(c.TreeHash, ""); name == "" {
			return nil
		}
		if found, err := r.load(c.Hash); err == nil {
			out = found
		}
		return storer.ErrStop
	})
	if out == nil || err != nil {
		return nil, ""
	}
	return out, name
}
