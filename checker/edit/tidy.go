package edit

import (
	"cmp"
	"maps"
	"slices"
	"strings"
	"sync"

	"kern/checker"
	"kern/lang"
)

// Layout makes edits of a project fit to be made: in order, with the line ends of
// their files, and laid out where the file was laid out before.
type Layout struct {
	project *lang.Project
	mu      sync.Mutex // of laid: members are sized on all cores
	laid    map[*lang.File]bool
}

// NewLayout is the layout of a project.
func NewLayout(project *lang.Project) *Layout {
	return &Layout{project: project, laid: map[*lang.File]bool{}}
}

// Tidy gives edits in order and has them end lines as their files do. A file that
// was laid out stays laid out. It is nil for edits of files that the project does
// not have, and for those that overlap.
func (l *Layout) Tidy(edits []checker.Edit) []checker.Edit {
	by := map[string][]lang.Change{}
	for _, e := range edits {
		if l.project.Files[e.File] == nil {
			return nil // no edit at all
		}
		by[e.File] = append(by[e.File], lang.Change{Span: e.Span, New: e.New})
	}
	var out []checker.Edit
	for _, name := range slices.Sorted(maps.Keys(by)) {
		f := l.project.Files[name]
		changes := by[name]
		slices.SortStableFunc(changes, func(a, b lang.Change) int {
			return cmp.Or(cmp.Compare(a.Span.Start, b.Span.Start), cmp.Compare(a.Span.End, b.Span.End))
		})
		for i := range changes {
			if i > 0 && changes[i].Span.Start < changes[i-1].Span.End {
				return nil // they overlap: a defect, and half a change would be worse than none
			}
			changes[i].New = withEnds(f.Text, changes[i].New)
		}
		for _, c := range l.lay(f, changes) {
			out = append(out, checker.Edit{File: name, Span: c.Span, New: c.New})
		}
	}
	return out
}

// TidyIn is Tidy for changes inside one declaration, whose spans count from its
// start: the layout of the rest of the file is not looked at again.
func (l *Layout) TidyIn(file string, decl *lang.Decl, changes []lang.Change) []checker.Edit {
	f := l.project.Files[file]
	if f == nil {
		return nil
	}
	i := f.Index(decl)
	if i < 0 || len(decl.Stmts) == 0 {
		return nil
	}
	p := Whole(decl.Text)
	changes = slices.Clone(changes)
	for i := range changes {
		changes[i].New = withEnds(f.Text, changes[i].New)
	}
	p.Apply(changes)
	if l.laidOut(f) {
		now := lang.Parse(&lang.FileID{Name: f.Name}, lang.Apply(decl.Text, changes), nil)
		if len(now.Decls) != 1 {
			return nil
		}
		first, last := now.Decls[0].Stmts[0].Span.Start, now.Decls[0].Stmts[len(now.Decls[0].Stmts)-1].Span.End
		edits := lang.FormatEdits(now)
		line := lang.Span{Start: decl.Stmts[0].Span.Start, End: decl.Stmts[len(decl.Stmts)-1].Span.End}.Of(decl.Text)
		laid := lang.Span{Start: first, End: last}.Of(now.Text)
		if !strings.ContainsAny(line, "\r\n") && (strings.ContainsAny(laid, "\r\n") || slices.ContainsFunc(edits, func(c lang.Change) bool {
			return c.Span.Start >= first && c.Span.End <= last && strings.Contains(c.New, "\n")
		})) { // a block that is no longer on one line parts from its neighbours
			var whole []checker.Edit
			for _, c := range changes {
				whole = append(whole, checker.Edit{File: file, Span: lang.Span{Start: f.Starts[i] + c.Span.Start, End: f.Starts[i] + c.Span.End}, New: c.New})
			}
			return l.Tidy(whole)
		}
		p.Apply(slices.DeleteFunc(edits, func(c lang.Change) bool { return c.Span.Start < first || c.Span.End > last }))
	}
	var out []checker.Edit
	for _, c := range p.Changes(decl.Text) {
		out = append(out, checker.Edit{File: file, Span: lang.Span{Start: f.Starts[i] + c.Span.Start, End: f.Starts[i] + c.Span.End}, New: withEnds(f.Text, c.New)})
	}
	return out
}

// lay makes changes to a file and lays the result out, if the file was laid out
// before.
func (l *Layout) lay(f *lang.File, changes []lang.Change) []lang.Change {
	p := Whole(f.Text)
	p.Apply(changes)
	if l.laidOut(f) {
		p.Apply(lang.FormatEdits(lang.Parse(&lang.FileID{Name: f.Name}, lang.Apply(f.Text, changes), f)))
	}
	return p.Changes(f.Text)
}

// maxLaid is the longest text, in bytes, that is laid out after a change: the
// user waits.
const maxLaid = 1 << 20

func (l *Layout) laidOut(f *lang.File) bool {
	l.mu.Lock()
	defer l.mu.Unlock()
	laid, known := l.laid[f]
	if !known {
		laid = len(f.Text) <= maxLaid && len(lang.FormatEdits(f)) == 0
		l.laid[f] = laid
	}
	return laid
}

// withEnds gives a text the line ends of another.
func withEnds(like, text string) string {
	if !strings.Contains(text, "\n") {
		return text
	}
	text = strings.ReplaceAll(text, "\r\n", "\n")
	if end := lineEnd(like); end != "\n" {
		text = strings.ReplaceAll(text, "\n", end)
	}
	return text
}

// lineEnd is the line end that a text uses first.
func lineEnd(text string) string {
	i := strings.IndexAny(text, "\r\n")
	switch {
	case i < 0 || text[i] == '\n':
		return "\n"
	case strings.HasPrefix(text[i:], "\r\n"):
		return "\r\n"
	}
	return "\r"
}
