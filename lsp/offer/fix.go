package offer

import (
	"errors"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/edit"
	"kern/lang"
)

// fixes offers what mends the diagnostics at the place.
func (l *list) fixes() {
	for _, d := range l.diagnostics() {
		if d.Span.Start > l.Span.End {
			break
		}
		if d.Span.End < l.Span.Start {
			continue
		}
		l.missing(&d)
		for i, f := range d.Fixes {
			if d.Rule == "missing-value" && adds(f) {
				continue // l.missing knows where a line goes
			}
			l.add(Offer{Kind: QuickFix, Title: f.Title, Preferred: i == safe(&d), Mends: &d, edits: func() []checker.Edit { return slices.Clone(f.Edits) }})
		}
		l.sized(&d)
		l.depart(&d)
	}
}

// adds tells whether a fix puts a line into a block, be it a block on one line.
func adds(f checker.Fix) bool {
	if len(f.Edits) != 1 || f.Edits[0].Span.Len() > 0 {
		return false
	}
	text := f.Edits[0].New
	return strings.HasPrefix(text, "\n") || strings.HasPrefix(text, " ") && strings.HasSuffix(text, ";")
}

// safe is the number of a diagnostic's safe fix, -1 when it has none or several.
func safe(d *checker.Diagnostic) int {
	found := -1
	for i, f := range d.Fixes {
		if !f.Safe {
			continue
		}
		if found >= 0 {
			return -1
		}
		found = i
	}
	return found
}

// all offers to make every safe fix of the file.
func (l *list) all() {
	for _, d := range l.diagnostics() {
		if i := safe(&d); i >= 0 && within(d.Fixes[i], l.File) {
			l.add(Offer{Kind: FixAll, Title: "Apply all safe fixes", edits: l.mendAll})
			return
		}
	}
}

// within tells whether a fix changes one file alone.
func within(f checker.Fix, file string) bool {
	return len(f.Edits) > 0 && !slices.ContainsFunc(f.Edits, func(e checker.Edit) bool { return e.File != file })
}

// maxRounds bounds how often the text is checked again while it is mended.
const maxRounds = 10

// mendAll makes every safe fix of the file, looks at the result again, and goes
// on until nothing safe is left.
func (l *list) mendAll() []checker.Edit {
	report, p := l.Report, edit.Whole(l.file.Text)
	for range maxRounds {
		changes := safeChanges(diagnosticsOf(report, l.File), l.File)
		if len(changes) == 0 {
			break
		}
		p.Apply(changes)
		text := lang.Apply(report.Project.Files[l.File].Text, changes)
		report = checker.CheckAgain(report, with(report.Project, l.File, text), nil)
	}
	var out []checker.Edit
	for _, c := range p.Changes(l.file.Text) {
		out = append(out, checker.Edit{File: l.File, Span: c.Span, New: c.New})
	}
	return out
}

// safeChanges are the safe fixes of a file's diagnostics that can be made
// together, in order. Where two touch, the second waits for the next round.
func safeChanges(diagnostics []checker.Diagnostic, file string) []lang.Change {
	var out []lang.Change
	for _, d := range diagnostics {
		i := safe(&d)
		if i < 0 || !within(d.Fixes[i], file) {
			continue
		}
		free := true
		for _, e := range d.Fixes[i].Edits {
			free = free && !slices.ContainsFunc(out, func(c lang.Change) bool { return c.Span.Start <= e.Span.End && e.Span.Start <= c.Span.End })
		}
		if !free {
			continue
		}
		for _, e := range d.Fixes[i].Edits {
			out = append(out, lang.Change{Span: e.Span, New: e.New})
		}
	}
	slices.SortStableFunc(out, func(a, b lang.Change) int { return int(a.Span.Start) - int(b.Span.Start) })
	return out
}

// with is a project in which one file has another text.
func with(p *lang.Project, file, text string) *lang.Project {
	names := make([]string, 0, len(p.Asked))
	for name := range p.Asked {
		names = append(names, name)
	}
	slices.Sort(names)
	return lang.Load(names, func(name string) (string, error) {
		if name == file {
			return text, nil
		}
		if f := p.Files[name]; f != nil {
			return f.Text, nil
		}
		return "", errGone
	}, p)
}

var errGone = errors.New("there is no such file")
