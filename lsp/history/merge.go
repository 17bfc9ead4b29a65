package history

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/go-git/go-git/v5/utils/diff"
	"github.com/sergi/go-diff/diffmatchpatch"
)

// ErrConflict says that two sides changed the same lines.
var ErrConflict = errors.New("both sides changed the same lines")

// Texts are the calculations of one state.
type Texts interface {
	List(name string) ([]string, error)
	Read(name string) (string, error)
}

// Merged is what merging two states comes to, by text alone: file by file and line
// by line. A file that was renamed counts as one that was removed and one that was
// added.
type Merged struct{ Base, Ours, Theirs Texts }

// List lists the calculations of the merged state.
func (m Merged) List(name string) ([]string, error) {
	var out []string
	for _, side := range []Texts{m.Ours, m.Theirs} {
		list, err := side.List(name)
		if err != nil {
			return nil, err
		}
		for _, n := range list {
			if slices.Contains(out, n) {
				continue
			}
			if _, err := m.Read(n); err == nil || errors.Is(err, ErrConflict) {
				out = append(out, n)
			}
		}
	}
	slices.Sort(out)
	return out, nil
}

// Read gives the text of a merged file. The error is [ErrConflict] for one that
// does not merge.
func (m Merged) Read(name string) (string, error) {
	base, noBase := m.Base.Read(name)
	ours, noOurs := m.Ours.Read(name)
	theirs, noTheirs := m.Theirs.Read(name)
	switch {
	case noOurs != nil && noTheirs != nil:
		return "", noOurs
	case noOurs == nil && noTheirs == nil:
		if noBase != nil && ours != theirs {
			return "", fmt.Errorf("%w: both added the file", ErrConflict)
		}
		return MergeText(base, ours, theirs)
	case noBase != nil && noTheirs != nil: // ours added it
		return ours, nil
	case noBase != nil:
		return theirs, nil
	case noOurs == nil && ours == base:
		return "", noTheirs
	case noTheirs == nil && theirs == base:
		return "", noOurs
	}
	return "", fmt.Errorf("%w: one side removed the file and the other changed it", ErrConflict)
}

// hunk is a run of lines that a side put in the place of those from start to end.
type hunk struct {
	start, end int
	lines      []string
}

// hunks are the changes from one text to another.
func hunks(base, side string) []hunk {
	var out []hunk
	at, open := 0, false
	for _, d := range diff.Do(base, side) {
		lines := strings.SplitAfter(d.Text, "\n")
		if n := len(lines); lines[n-1] == "" {
			lines = lines[:n-1]
		}
		if d.Type == diffmatchpatch.DiffEqual {
			at += len(lines)
			open = false
			continue
		}
		if !open {
			out = append(out, hunk{start: at, end: at})
			open = true
		}
		h := &out[len(out)-1]
		if d.Type == diffmatchpatch.DiffDelete {
			at += len(lines)
			h.end = at
		} else {
			h.lines = append(h.lines, lines...)
		}
	}
	return out
}

// MergeText merges two texts that grew out of a third, line by line. Changes that
// touch one another are a conflict unless they are the same.
func MergeText(base, ours, theirs string) (string, error) {
	switch {
	case ours == theirs, theirs == base:
		return ours, nil
	case ours == base:
		return theirs, nil
	}
	lines := strings.SplitAfter(base, "\n")
	a, b := hunks(base, ours), hunks(base, theirs)
	var out strings.Builder
	at := 0
	for len(a) > 0 || len(b) > 0 {
		switch {
		case len(a) > 0 && len(b) > 0 && a[0].start == b[0].start && a[0].end == b[0].end && slices.Equal(a[0].lines, b[0].lines):
			b = b[1:] // both did the same
			continue
		case len(a) > 0 && len(b) > 0 && a[0].start <= b[0].end && b[0].start <= a[0].end:
			return "", fmt.Errorf("%w: line %d", ErrConflict, max(a[0].start, b[0].start)+1)
		}
		next := &a
		if len(a) == 0 || len(b) > 0 && b[0].start < a[0].start {
			next = &b
		}
		h := (*next)[0]
		*next = (*next)[1:]
		out.WriteString(strings.Join(lines[at:h.start], ""))
		out.WriteString(strings.Join(h.lines, ""))
		at = h.end
	}
	out.WriteString(strings.Join(lines[at:], ""))
	return out.String(), nil
}
