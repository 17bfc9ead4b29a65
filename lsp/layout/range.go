// Package layout gives the parts of the one layout of the language that an
// editor asks for: of some lines, or of the line on which somebody types. The
// layout itself is made by package lang.
package layout

import (
	"slices"
	"strings"

	"kern/lang"
)

// File gives the changes that lay a whole file out, each as small as it can be.
func File(f *lang.File) []lang.Change {
	return smallest(f.Text, lang.FormatEdits(f))
}

// Ranges gives the changes that lay out the statements that lie wholly in one of
// the ranges. Nothing outside of these is touched, and nothing at all when the
// statements cannot be laid out by themselves.
func Ranges(f *lang.File, within ...lang.Span) []lang.Change {
	all := File(f)
	if len(all) == 0 {
		return nil
	}
	var regions []lang.Span
	for _, w := range within {
		regions = append(regions, statements(f, wholeLines(f.Text, w))...)
	}
	var kept []lang.Change
	for _, c := range all {
		if slices.ContainsFunc(regions, func(r lang.Span) bool { return r.Start <= c.Span.Start && c.Span.End <= r.End }) {
			kept = append(kept, c)
		}
	}
	if len(kept) == len(all) || len(kept) == 0 {
		return kept
	}
	// A part of the layout must be a step towards the whole: then it reads the same.
	part := lang.Parse(&lang.FileID{Name: f.Name}, lang.Apply(f.Text, kept), f)
	if lang.FormatFile(part) != lang.FormatFile(f) {
		return nil
	}
	return kept
}

// smallest leaves out of changes what both texts have.
func smallest(text string, changes []lang.Change) []lang.Change {
	out := changes[:0:0]
	for _, c := range changes {
		old := c.Span.Of(text)
		for old != "" && c.New != "" && old[0] == c.New[0] {
			old, c.New, c.Span.Start = old[1:], c.New[1:], c.Span.Start+1
		}
		for old != "" && c.New != "" && old[len(old)-1] == c.New[len(c.New)-1] {
			old, c.New, c.Span.End = old[:len(old)-1], c.New[:len(c.New)-1], c.Span.End-1
		}
		if old != "" || c.New != "" {
			out = append(out, whole(text, c))
		}
	}
	return out
}

// whole widens a change that cuts a character or a line end in two.
func whole(text string, c lang.Change) lang.Change {
	inside := func(at int32) bool {
		return at > 0 && int(at) < len(text) && (text[at]&0xC0 == 0x80 || text[at] == '\n' && text[at-1] == '\r')
	}
	for inside(c.Span.Start) {
		c.Span.Start--
		c.New = text[c.Span.Start:c.Span.Start+1] + c.New
	}
	for inside(c.Span.End) {
		c.New += text[c.Span.End : c.Span.End+1]
		c.Span.End++
	}
	return c
}

// wholeLines shrinks a range to what it has of statements: a range that begins or
// ends in the blanks at the ends of a line has that whole line.
func wholeLines(text string, w lang.Span) lang.Span {
	w.Start = min(max(w.Start, 0), int32(len(text)))
	w.End = min(max(w.End, w.Start), int32(len(text)))
	start := lineStart(text, w.Start)
	if strings.Trim(text[start:w.Start], " \t") == "" {
		w.Start = start
	}
	return w
}

// statements are the parts of a range that statements fill: those that lie in it
// with their blocks, with the blanks before them on their line, the comment behind
// them, and what stands between one and the next.
func statements(f *lang.File, w lang.Span) []lang.Span {
	var out []lang.Span
	var walk func(start int32, text string, stmts []*lang.Stmt)
	walk = func(start int32, text string, stmts []*lang.Stmt) {
		joined := false // the statement before lies in the range too
		for _, s := range stmts {
			span := lang.Span{Start: start + s.Span.Start, End: start + s.Span.End}
			if span.Start < w.Start || span.End > w.End {
				joined = false
				if s.Body != nil && span.Start < w.End && w.Start < span.End {
					walk(start, text, s.Body.Stmts)
				}
				continue
			}
			begin := lineStart(f.Text, span.Start)
			if begin < w.Start || strings.Trim(f.Text[begin:span.Start], " \t") != "" {
				begin = span.Start
			}
			end := behind(f.Text, span.End)
			if end > w.End {
				end = span.End
			}
			if n := len(out); joined && n > 0 {
				out[n-1].End = end
			} else {
				out = append(out, lang.Span{Start: begin, End: end})
			}
			joined = true
		}
	}
	for i := max(0, f.DeclAt(w.Start)); i < len(f.Decls) && f.Starts[i] < w.End; i++ {
		before := len(out)
		walk(f.Starts[i], f.Decls[i].Text, f.Decls[i].Stmts)
		// between two whole declarations
		if before > 0 && len(out) > before && i > 0 && wholly(f, i-1, w) && wholly(f, i, w) {
			out[before-1].End = out[before].End
			out = slices.Delete(out, before, before+1)
		}
	}
	return out
}

// wholly tells whether every statement of a declaration lies in a range.
func wholly(f *lang.File, i int, w lang.Span) bool {
	stmts := f.Decls[i].Stmts
	if len(stmts) == 0 {
		return false
	}
	return f.Starts[i]+stmts[0].Span.Start >= w.Start && f.Starts[i]+stmts[len(stmts)-1].Span.End <= w.End
}

// behind is the end of what follows a statement on its line: blanks, semicolons
// and a comment. Where another statement follows, it is the statement's end.
func behind(text string, end int32) int32 {
	line := end
	for int(line) < len(text) && text[line] != '\n' && text[line] != '\r' {
		line++
	}
	rest := strings.TrimLeft(text[end:line], " \t;")
	if rest == "" || rest[0] == '#' {
		return line
	}
	return end
}

func lineStart(text string, at int32) int32 {
	return int32(strings.LastIndexAny(text[:at], "\r\n") + 1)
}
