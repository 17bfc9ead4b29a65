package lsp

import (
	"slices"
	"sort"
	"sync"
	"time"

	"kern/checker"
	"kern/checker/rule"
	"kern/lang"
)

// typing knows where in a document somebody is typing and which diagnostics
// they have seen there, so that the errors of a half-typed line do not flash up
// at every key: a new error on that line is held back for a moment, one that is
// mended disappears at once.
type typing struct {
	mu    sync.Mutex
	steps []step // the edits since the diagnostics last shown, in order
	last  step   // the newest edit
	until time.Time
	shown []mark // what the editor shows, as of the version shownAt
	at    int32
}

// step is one edit with the version of the document that it led to.
type step struct {
	version int32
	edit    textEdit
	line    int
}

// mark is a diagnostic that the editor shows.
type mark struct {
	rule   string
	offset int32
}

// edited notes the edits of a change; text is the text after it.
func (t *typing) edited(version int32, edits []textEdit, text *Text, until time.Time) {
	if len(edits) == 0 {
		return
	}
	t.mu.Lock()
	defer t.mu.Unlock()
	for _, e := range edits {
		t.last = step{version, e, text.Line(e.start + e.with)}
		t.steps = append(t.steps, t.last)
	}
	const enough = 1000 // no editor shows diagnostics that old
	if len(t.steps) > enough {
		t.steps = slices.Delete(t.steps, 0, len(t.steps)-enough)
	}
	t.until = until
}

// release ends the holding back, as when the document is saved.
func (t *typing) release() {
	t.mu.Lock()
	defer t.mu.Unlock()
	t.until = time.Time{}
}

// filter takes out the diagnostics of a version that are to wait, and gives the
// time until which, zero when nothing waits. What it lets through counts as
// shown.
func (t *typing) filter(version int32, file *lang.File, text *Text, all []checker.Diagnostic, now time.Time) ([]checker.Diagnostic, time.Time) {
	t.mu.Lock()
	defer t.mu.Unlock()
	shown := map[string][]int{} // lines on which a rule is shown, as this version counts them
	for _, m := range t.shown {
		at := m.offset
		for _, s := range t.steps {
			if s.version <= version && s.version > t.at {
				at = s.edit.move(at)
			}
		}
		shown[m.rule] = append(shown[m.rule], text.Line(at))
	}
	var out []checker.Diagnostic
	var wait time.Time
	if line, on := t.lineOf(version); on && now.Before(t.until) {
		decl := declarationAt(file, text, line)
		held := func(d checker.Diagnostic) bool {
			return holds(d) && text.Line(d.Span.Start) == line && !slices.Contains(shown[d.Rule], line)
		}
		any := slices.ContainsFunc(all, held)
		for _, d := range all {
			// that a member is undecided is a consequence of the error that waits
			consequence := any && d.Rule == "undecided" && decl.Contains(d.Span.Start) && !slices.Contains(shown[d.Rule], text.Line(d.Span.Start))
			if held(d) || consequence {
				wait = t.until
				continue
			}
			out = append(out, d)
		}
	} else {
		out = all
	}
	t.shown, t.at = t.shown[:0], version
	for _, d := range out {
		t.shown = append(t.shown, mark{d.Rule, d.Span.Start})
	}
	t.steps = slices.DeleteFunc(t.steps, func(s step) bool { return s.version <= version })
	return out, wait
}

// lineOf is the line of the last edit that led to a version.
func (t *typing) lineOf(version int32) (int, bool) {
	for i := len(t.steps) - 1; i >= 0; i-- {
		if t.steps[i].version <= version {
			return t.steps[i].line, true
		}
	}
	return t.last.line, t.last != (step{})
}

// holds tells whether a diagnostic can wait: it is about the text, not about
// what the text's members come to.
func holds(d checker.Diagnostic) bool {
	r := rule.Find(d.Rule)
	return r != nil && !r.Check && d.Member == "" && d.Severity <= lang.Warning
}

// declarationAt is the range of the declaration that a line belongs to.
func declarationAt(file *lang.File, text *Text, line int) lang.Span {
	start, _ := text.LineSpan(line)
	i := sort.Search(len(file.Starts), func(i int) bool { return file.Starts[i] > start }) - 1
	if i < 0 {
		return lang.Span{Start: -1, End: -1}
	}
	end := int32(len(file.Text))
	if i+1 < len(file.Starts) {
		end = file.Starts[i+1]
	}
	return lang.Span{Start: file.Starts[i], End: end - 1}
}
