package offer

import (
	"cmp"
	"maps"
	"slices"
	"strings"

	"kern/checker"
	"kern/lang"
)

// tidy puts edits in order and has them end lines as their files do. A file that
// was laid out stays laid out.
func (l *list) tidy(edits []checker.Edit) []checker.Edit {
	by := map[string][]lang.Change{}
	for _, e := range edits {
		if l.Report.Project.Files[e.File] == nil {
			return nil // a place that the report does not have: no edit at all
		}
		by[e.File] = append(by[e.File], lang.Change{Span: e.Span, New: e.New})
	}
	var out []checker.Edit
	for _, name := range slices.Sorted(maps.Keys(by)) {
		f := l.Report.Project.Files[name]
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

// lay makes changes to a file and lays the result out, if the file was laid out
// before.
func (l *list) lay(f *lang.File, changes []lang.Change) []lang.Change {
	p := whole(f.Text)
	p.apply(changes)
	if l.laidOut(f) {
		p.apply(lang.FormatEdits(lang.Parse(&lang.FileID{Name: f.Name}, lang.Apply(f.Text, changes), f)))
	}
	return p.changes(f.Text)
}

// maxLaid is the longest text, in bytes, that is laid out after a change: the
// user waits.
const maxLaid = 1 << 20

func (l *list) laidOut(f *lang.File) bool {
	laid, known := l.laid[f]
	if !known {
		laid = len(f.Text) <= maxLaid && len(lang.FormatEdits(f)) == 0
		if l.laid == nil {
			l.laid = map[*lang.File]bool{}
		}
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
