package lang

import (
	"fmt"
	"strings"
	"testing"
)

// checkTree holds a tree against what the parser promises: the declarations
// make up the text, every span lies in the declaration and in its parent's
// span, brothers stand in order.
func checkTree(t testing.TB, f *File) {
	t.Helper()
	fail := func(format string, args ...any) {
		t.Helper()
		t.Fatalf("%s\ntext: %q", fmt.Sprintf(format, args...), f.Text)
	}
	var joined strings.Builder
	if len(f.Starts) != len(f.Decls) {
		fail("%d starts of %d declarations", len(f.Starts), len(f.Decls))
	}
	for i, d := range f.Decls {
		if int(f.Starts[i]) != joined.Len() || d.Text == "" && f.Text != "" {
			fail("declaration %d starts at %d, want %d", i, f.Starts[i], joined.Len())
		}
		joined.WriteString(d.Text)
		c := treeCheck{text: d.Text, fail: fail}
		c.stmts(d.Stmts, Span{0, int32(len(d.Text))})
		for _, p := range d.Problems {
			c.problem(p)
		}
		if len(d.Problems) > maxReport {
			fail("%d problems in a declaration", len(d.Problems))
		}
	}
	if joined.String() != f.Text {
		fail("the declarations joined are %q", joined.String())
	}
}

type treeCheck struct {
	text string
	fail func(string, ...any)
}

func (c *treeCheck) in(what string, s, parent Span) {
	if s.Start > s.End || s.Start < parent.Start || s.End > parent.End {
		c.fail("%s %v lies outside %v in %q", what, s, parent, c.text)
	}
}

func (c *treeCheck) stmts(stmts []*Stmt, parent Span) {
	end := parent.Start
	for _, s := range stmts {
		c.in("statement", s.Span, parent)
		if s.Span.Start < end {
			c.fail("statement %v begins before %d in %q", s.Span, end, c.text)
		}
		end = s.Span.End
		c.in("line", s.Line, s.Span)
		if s.Word != "" {
			c.in("first word", s.Head, s.Line)
			if s.Head.Of(c.text) != s.Word {
				c.fail("the word %q stands at %v in %q", s.Word, s.Head, c.text)
			}
		}
		c.exprs(s.Args, s.Line)
		if s.Body != nil {
			c.in("block", s.Body.Span, s.Span)
			if s.Body.Span.Start < s.Line.End || c.text[s.Body.Span.Start] != '{' {
				c.fail("the block %v begins with no brace in %q", s.Body.Span, c.text)
			}
			c.stmts(s.Body.Stmts, s.Body.Span)
		}
	}
}

func (c *treeCheck) exprs(exprs []*Expr, parent Span) {
	end := parent.Start
	for _, e := range exprs {
		c.in("part", e.Span, parent)
		if e.Span.Start < end {
			c.fail("part %v begins before %d in %q", e.Span, end, c.text)
		}
		end = e.Span.End
		if e.Kind == QuantExpr && e.UnitSpan().Of(c.text) != e.Text {
			c.fail("the unit %q stands at %v in %q", e.Text, e.UnitSpan(), c.text)
		}
		c.exprs(e.Args, e.Span)
	}
}

func (c *treeCheck) problem(p Problem) {
	whole := Span{0, int32(len(c.text))}
	if p.Rule == "" || p.Message == "" {
		c.fail("a problem without a rule or a message in %q", c.text)
	}
	c.in("problem "+p.Rule, p.Span, whole)
	if p.Span.Len() == 0 {
		c.fail("the problem %s at %v underlines nothing in %q", p.Rule, p.Span, c.text)
	}
	for _, fix := range p.Fixes {
		for _, e := range fix.Edits {
			c.in("fix of "+p.Rule, e.Place.Span, whole)
		}
	}
}

// places writes down a file with all places, so that two trees can be compared.
func places(f *File) string {
	var b strings.Builder
	var stmts func([]*Stmt)
	var exprs func([]*Expr)
	exprs = func(list []*Expr) {
		for _, e := range list {
			fmt.Fprintf(&b, "(%d %d %v %q %v %q", e.Kind, e.Op, e.Span, e.Text, e.Value, e.Unit.Symbol)
			exprs(e.Args)
			b.WriteByte(')')
		}
	}
	stmts = func(list []*Stmt) {
		for _, s := range list {
			fmt.Fprintf(&b, "%v %v %v %q %v", s.Span, s.Line, s.Head, s.Word, s.Broken)
			exprs(s.Args)
			if s.Body != nil {
				fmt.Fprintf(&b, "{%v ", s.Body.Span)
				stmts(s.Body.Stmts)
				b.WriteByte('}')
			}
			b.WriteByte('\n')
		}
	}
	fmt.Fprintf(&b, "%q %q\n", f.Name, f.Unreadable)
	for i, d := range f.Decls {
		fmt.Fprintf(&b, "%d %q\n", f.Starts[i], d.Text)
		stmts(d.Stmts)
		for _, p := range d.Problems {
			fmt.Fprintf(&b, "%s %v %s\n", p.Rule, p.Span, p.Message)
		}
	}
	return b.String()
}

// checkEdit compares a parse that goes on from an earlier tree with one from
// scratch.
func checkEdit(t testing.TB, old *File, id *FileID, text string) *File {
	t.Helper()
	got, want := Parse(id, text, old), Parse(id, text, nil)
	if x, y := places(got), places(want); x != y {
		t.Fatalf("after the edit of\n%q to\n%q the tree is\n%s\nfrom scratch it is\n%s", old.Text, text, x, y)
	}
	for i, d := range got.Decls {
		if d.File != id {
			t.Fatalf("declaration %d of %q belongs to another file", i, text)
		}
	}
	return got
}

func TestParseProperties(t *testing.T) {
	id := &FileID{Name: "a.kern"}
	for seed := range uint64(2000) {
		g := newGenerator(seed)
		text := random(seed)
		f := Parse(id, text, nil)
		checkTree(t, f)
		for range 3 { // edits on edits: the tree before is itself no fresh one
			text = g.mangle(text)
			f = checkEdit(t, f, id, text)
			checkTree(t, f)
		}
		checkEdit(t, f, id, random(seed+1))
	}
}

// Whatever prefix and suffix two texts share, at line ends above all.
func TestParseEditsAtLineEnds(t *testing.T) {
	id := &FileID{Name: "a.kern"}
	pieces := []string{"", "\n", "\r", "\r\n", "a = 1", "{", "}", "# c", "case G wind", "(", "b,", " "}
	var texts []string
	for _, x := range pieces {
		for _, y := range pieces {
			for _, z := range []string{"", "\n", "{\n", "}\n", "\rb = 2\n"} {
				texts = append(texts, "x = 1\n"+x+y+z+"y = 2\n")
			}
		}
	}
	g := newGenerator(1)
	for _, from := range texts {
		old := Parse(id, from, nil)
		for range 12 {
			checkEdit(t, old, id, texts[g.IntN(len(texts))])
		}
	}
}

func TestParseKeepsDeclarations(t *testing.T) {
	id := &FileID{Name: "a.kern"}
	var b strings.Builder
	for i := range 50 {
		fmt.Fprintf(&b, "column A%d {\n    load %d kN\n}\n", i, i)
	}
	old := Parse(id, b.String(), nil)
	f := Parse(id, strings.Replace(b.String(), "load 25 kN", "load 25.5 kN", 1), old)
	kept := 0
	for i, d := range f.Decls {
		if d == old.Decls[i] {
			kept++
		} else if i < 24 || i > 25 {
			t.Errorf("declaration %d was read again", i)
		}
	}
	if kept < 48 || kept == 50 {
		t.Errorf("%d declarations of 50 were kept", kept)
	}
	if same := Parse(id, old.Text, old); same.Decls[0] != old.Decls[0] || same.Decls[49] != old.Decls[49] {
		t.Error("the same text was read again")
	}
}

func FuzzParse(f *testing.F) {
	for i, s := range seeds {
		f.Add(s, uint16(i), uint8(i), seeds[len(seeds)-1-i])
	}
	for seed := range uint64(20) {
		f.Add(random(seed), uint16(7*seed), uint8(seed), "{")
	}
	f.Fuzz(func(t *testing.T, text string, at uint16, cut uint8, insert string) {
		if len(text)+len(insert) > 1<<14 {
			return
		}
		id := &FileID{Name: "a.kern"}
		old := Parse(id, text, nil)
		checkTree(t, old)
		start := min(int(at), len(text))
		end := min(start+int(cut), len(text))
		checkTree(t, checkEdit(t, old, id, text[:start]+insert+text[end:]))
	})
}
