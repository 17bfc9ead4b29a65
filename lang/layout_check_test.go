package lang

import (
	"fmt"
	"strings"
	"testing"
)

// checkLayout holds a text against what the formatter promises.
func checkLayout(t testing.TB, text string) {
	t.Helper()
	before := Parse(&FileID{}, text, nil)
	out := layout(before)
	after := Parse(&FileID{}, out, nil)
	fail := func(format string, args ...any) {
		t.Helper()
		t.Fatalf("%s\ntext:   %q\nlayout: %q", fmt.Sprintf(format, args...), text, out)
	}
	if got := Format(text); got != out {
		fail("the layout reads differently and was given up")
	}
	if again := layout(after); again != out {
		fail("not stable: %q", again)
	}
	if x, y := reading(before), reading(after); x != y {
		fail("read as\n%safter\n%s", x, y)
	}
	if !sameReading(before, after) {
		fail("sameReading sees a difference that the test does not")
	}
	// the short way must come to the same answer as the long one
	for _, other := range []string{out, text, strings.Replace(text, " ", "", 1), strings.Replace(text, " ", "  ", 1), strings.Replace(text, "\n", " ", 1)} {
		if x, y := readsAs(before, other), sameReading(before, Parse(&FileID{}, other, nil)); x != y {
			fail("%q reads the same: %v in short, %v in full", other, x, y)
		}
	}
	if before.Unreadable != "" {
		if out != text {
			fail("an unreadable text was changed")
		}
		return
	}
	x, y := visible(text), visible(out)
	if len(x) != len(y) {
		fail("%d tokens became %d", len(x), len(y))
	}
	for i := range x {
		if x[i] != y[i] {
			fail("token %d: %q became %q", i, x[i].text, y[i].text)
		}
	}
	if out != "" && out != byteOrderMark && !strings.HasSuffix(out, "\n") && !strings.HasSuffix(out, "\r") {
		fail("no line end at the end")
	}
	checkUntouched(fail, before, after)
	if got := Apply(text, FormatEdits(before)); got != out {
		fail("the edits give %q", got)
	}
	for _, e := range FormatEdits(before) {
		if gapLength(e.Span.Of(text)) != e.Span.Len() {
			fail("the edit of %q touches more than a gap", e.Span.Of(text))
		}
	}
}

// checkUntouched looks for the lines of every statement that cannot be read,
// and for every declaration whose braces do not match.
func checkUntouched(fail func(string, ...any), before, after *File) {
	x, y := brokenLines(before), brokenLines(after)
	if len(x) != len(y) {
		fail("%d broken statements became %d", len(x), len(y))
	}
	for i := range x {
		if x[i] != y[i] {
			fail("a broken statement changed from %q to %q", x[i], y[i])
		}
	}
	x, y = unmatched(before), unmatched(after)
	if len(x) != len(y) {
		fail("%d unmatched declarations became %d", len(x), len(y))
	}
	for i := range x {
		// comments behind it may come to belong to it, and the last line ends
		if !strings.HasPrefix(y[i], x[i]) {
			fail("an unmatched declaration changed from %q to %q", x[i], y[i])
		}
	}
}

func brokenLines(f *File) []string {
	var out []string
	for i, d := range f.Decls {
		var walk func(stmts []*Stmt)
		walk = func(stmts []*Stmt) {
			for _, s := range stmts {
				if s.Broken {
					start := lineStart(f.Text, int(f.Starts[i]+s.Line.Start))
					end, _ := lineEnd(f.Text, int(f.Starts[i]+s.Line.End))
					out = append(out, strings.TrimPrefix(f.Text[start:end], byteOrderMark))
				}
				if s.Body != nil {
					walk(s.Body.Stmts)
				}
			}
		}
		walk(d.Stmts)
	}
	return out
}

func unmatched(f *File) []string {
	var out []string
	for _, d := range f.Decls {
		for _, p := range d.Problems {
			if p.Rule == "unclosed-block" || p.Rule == "stray-brace" {
				out = append(out, strings.TrimPrefix(d.Text, byteOrderMark))
				break
			}
		}
	}
	return out
}

type seen struct {
	kind Kind
	text string
}

// visible are the tokens of a text without blanks, line ends and the semicolons
// that stand for line ends.
func visible(text string) []seen {
	var out []seen
	for _, t := range Tokens(text) {
		switch t.Kind {
		case Blank, Newline, Semicolon:
		default:
			out = append(out, seen{t.Kind, t.Span().Of(text)})
		}
	}
	return out
}

// reading writes down what a file says, without places.
func reading(f *File) string {
	var b strings.Builder
	var rules []string
	for _, d := range f.Decls {
		for _, s := range d.Stmts {
			writeStmt(&b, s, 0)
		}
		for _, p := range d.Problems {
			rules = append(rules, p.Rule)
		}
	}
	fmt.Fprintln(&b, rules)
	return b.String()
}

func writeStmt(b *strings.Builder, s *Stmt, depth int) {
	fmt.Fprintf(b, "%*s%q broken=%v", 2*depth, "", s.Word, s.Broken)
	for _, e := range s.Args {
		b.WriteByte(' ')
		writeExpr(b, e)
	}
	if s.Body == nil {
		b.WriteByte('\n')
		return
	}
	b.WriteString(" {\n")
	for _, inner := range s.Body.Stmts {
		writeStmt(b, inner, depth+1)
	}
	fmt.Fprintf(b, "%*s}\n", 2*depth, "")
}

func writeExpr(b *strings.Builder, e *Expr) {
	op := ""
	if e.Op != 0 {
		op = string(rune(e.Op))
	}
	fmt.Fprintf(b, "[%d%s %q %v %q", e.Kind, op, e.Text, e.Value, e.Unit.Symbol)
	for _, a := range e.Args {
		b.WriteByte(' ')
		writeExpr(b, a)
	}
	b.WriteByte(']')
}
