package layout

import (
	"strings"

	"kern/lang"
)

const indentWidth = 4 // columns of a block level

// Typed gives the change of the line at a place on which a line end, a brace or a
// semicolon was just typed: its indent, and nothing else. Columns stay as they are
// while somebody types. A line that cannot be read stays as it is.
func Typed(f *lang.File, at int32, typed string) []lang.Change {
	i := f.DeclAt(at)
	if i < 0 || f.Unreadable != "" {
		return nil
	}
	at = min(max(at, 0), int32(len(f.Text)))
	if at > 0 && strings.HasPrefix(f.Text[at-1:], "\r\n") {
		at-- // inside a line end
	}
	d, start := f.Decls[i], f.Starts[i]
	line := lineStart(f.Text, at)
	end := line
	for int(end) < len(f.Text) && (f.Text[end] == ' ' || f.Text[end] == '\t') {
		end++
	}
	rest := f.Text[end:]
	switch typed {
	case "}":
		if !strings.HasPrefix(rest, "}") || at != end+1 {
			return nil // it closes a block on the line where that opened
		}
	case ";", "\n":
	default:
		return nil
	}
	if line < start {
		return nil // the first line of a file that begins with something unseen
	}
	depth, open := depthAt(d.Text, line-start)
	if strings.HasPrefix(rest, "}") {
		depth--
	}
	if broken(d.Stmts, end-start) {
		return nil
	}
	if open {
		depth++ // a statement goes on
	}
	want := strings.Repeat(" ", max(0, depth)*indentWidth)
	if have := f.Text[line:end]; have != want {
		return smallest(f.Text, []lang.Change{{Span: lang.Span{Start: line, End: end}, New: want}})
	}
	return nil
}

// depthAt counts the blocks that are open at the start of a line of a
// declaration, and tells whether a bracket or a trailing comma has the statement
// go on there.
func depthAt(text string, at int32) (depth int, open bool) {
	l := lang.NewLexer(text)
	parens, comma := 0, false
	for {
		t := l.Next()
		if t.Kind == lang.EOF || t.Start >= at {
			return depth, parens > 0 || comma
		}
		switch t.Kind {
		case lang.OpenBrace:
			depth, parens = depth+1, 0
		case lang.CloseBrace:
			depth, parens = max(0, depth-1), 0
		case lang.OpenParen:
			parens++
		case lang.CloseParen:
			parens = max(0, parens-1)
		}
		switch t.Kind {
		case lang.Blank, lang.Newline, lang.Comment:
		default:
			comma = t.Kind == lang.Comma
		}
	}
}

// broken tells whether a line that cannot be read has something at a place.
func broken(stmts []*lang.Stmt, at int32) bool {
	for _, s := range stmts {
		if s.Broken && s.Line.Start <= at && at < s.Line.End {
			return true
		}
		if s.Body != nil && broken(s.Body.Stmts, at) {
			return true
		}
	}
	return false
}
