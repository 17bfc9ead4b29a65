package lsp

import (
	"path"
	"sync"

	"kern/checker"
	"kern/checker/output"
	"kern/checker/review"
	"kern/lang"
	"kern/lsp/history"
)

// pasts keeps the state of the last commit for a workspace, so that results can
// be shown beside what they were. It is worked out once for a commit, when
// somebody first asks, and in the background: who asks meanwhile goes without.
type pasts struct {
	mu     sync.Mutex
	opened bool
	repo   *history.Repository // nil where there is none
	commit string              // of past, or of the one that is being worked out
	past   *review.Past
	title  string
}

// Bounds of what is held against the last commit without being asked to.
const (
	maxPastMembers = 5000
	maxPastFiles   = 2000
)

// past gives the state of the last commit; nil where there is no repository, where
// the calculation is very large, and while it is not worked out.
func (s *Snapshot) past() (*review.Past, string) {
	w := s.workspace
	if w.kind == scratchText || s.report == nil || s.report.Summary.Members > maxPastMembers {
		return nil, ""
	}
	p := &w.pasts
	p.mu.Lock()
	defer p.mu.Unlock()
	if !p.opened {
		p.opened = true
		repo, err := history.Open(w.folder.Dir)
		if err == nil {
			p.repo = repo
		} else if err != history.ErrNone {
			w.server.background(func() { w.server.log.warn("results are not held against the last commit: %v", err) })
		}
	}
	if p.repo == nil {
		return nil, ""
	}
	head := p.repo.Head()
	if head == p.commit {
		return p.past, p.title
	}
	p.commit, p.past = head, nil
	if head == "" {
		return nil, ""
	}
	w.server.background(func() {
		past, title := w.readPast(p.repo, head)
		p.mu.Lock()
		if p.commit == head {
			p.past, p.title = past, title
		}
		p.mu.Unlock()
		if past != nil {
			w.server.refresh.soon()
		}
	})
	return nil, ""
}

// readPast reads and checks the workspace as a commit has it.
func (w *workspace) readPast(repo *history.Repository, hash string) (*review.Past, string) {
	c, err := repo.Commit(hash)
	if err != nil {
		w.server.log.warn("the last commit cannot be read: %v", err)
		return nil, ""
	}
	base, err := w.folder.Name(w.base)
	if err != nil {
		return nil, ""
	}
	list, err := c.List(base)
	if err != nil {
		w.server.log.warn("the last commit cannot be read: %v", err)
		return nil, ""
	}
	var names []string
	for _, n := range list {
		if w.kind == wholeFolder || path.Dir(n) == base {
			names = append(names, n)
		}
	}
	if len(names) > maxPastFiles {
		return nil, ""
	}
	return review.NewPast(checker.Check(lang.Load(names, c.Read, nil), nil)), c.Short()
}

// was says what a member's result was in the last commit, ", was 0.74"; "" when it
// reads the same, or when there is nothing to compare with.
func (f *File) was(past *review.Past, r *checker.Result) string {
	if past == nil {
		return ""
	}
	before := past.Of(f.Name, r.Name)
	if before == nil || !review.Differs(review.StateOf(before), review.StateOf(r)) {
		return ""
	}
	return ", was " + output.Answer(review.StateOf(before))
}

// since writes what changed of a member since the last commit, and which edits did
// it.
func (f *File) since(p *output.Page, r *checker.Result) {
	past, title := f.past()
	if past == nil {
		return
	}
	if c, ok := past.Explain(f.report, r); ok {
		output.ChangePage(p, &c, "Since commit "+title, func(n string) string {
			if n == f.Name {
				return ""
			}
			return n
		})
	}
}
