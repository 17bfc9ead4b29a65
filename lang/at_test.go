package lang

import (
	"fmt"
	"math/rand/v2"
	"strings"
	"testing"
)

// describeAt writes what stands at an offset.
func describeAt(f *File, offset int32) string {
	a, ok := f.At(offset)
	if !ok {
		return "nothing"
	}
	var out []string
	for _, s := range a.Stmts {
		out = append(out, s.Word)
	}
	if a.Inside {
		out = append(out, "{}")
	}
	for _, e := range a.Exprs {
		out = append(out, fmt.Sprintf("‹%s›", e.Span.Of(a.Decl.Text)))
	}
	return strings.Join(out, " ")
}

// TestAt looks at places, each marked | and described behind it.
func TestAt(t *testing.T) {
	for text, want := range map[string]string{
		"|x = 5 m\n":          "x",
		"x| = 5 m\n":          "x",
		"x = |5 m\n":          "x ‹5 m›",
		"x = 5 m|\n":          "x ‹5 m›",
		"x = 2 * (y + |z)\n":  "x ‹2 * (y + z)› ‹(y + z)› ‹y + z› ‹z›",
		"x = 5 m\n\n|\ny = 3": "",
		"column A1 {\n  load G 8|0 kN at top\n}\n":  "column load ‹80 kN›",
		"column A1 {\n  load G 80 kN\n|\n}\n":       "column {}",
		"column A1 {|}\n":                           "column {}",
		"column A1 {}|\n":                           "column",
		"column A1 |{}\n":                           "column",
		"column |A1 {}\n":                           "column ‹A1›",
		"column A1 {\n  section = tube { width = |": "column section width",
		"column A1 {\n  load G 80 kN\n  |":          "column {}",
		"basis { show kN, |mm }":                    "basis show ‹mm›",
		"basis { |show kN; show mm }":               "basis show",
		"a = 1;b| = 2\n":                            "b",
		"":                                          "nothing",
		"|":                                         "nothing",
	} {
		offset := strings.Index(text, "|")
		plain := strings.Replace(text, "|", "", 1)
		if got := describeAt(Parse(&FileID{}, plain, nil), int32(max(0, offset))); got != want {
			t.Errorf("%q: %s, want %s", text, got, want)
		}
	}
}

// TestAtAnywhere holds for every text: each statement and expression contains
// the place, the inner ones lie in the outer ones, and the declaration is the
// one that the file has there.
func TestAtAnywhere(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 1))
	parts := []string{"column A1 {", "}", "\n", "load G 80 kN at top", "x = ", "(1 + y)", " ", "section = tube { width = 9 mm }", ";", "\"a", "\"", "ä", ",", "#", "5 kN"}
	for range 300 {
		var b strings.Builder
		for range r.IntN(25) {
			b.WriteString(parts[r.IntN(len(parts))])
		}
		f := Parse(&FileID{}, b.String(), nil)
		for offset := int32(-1); offset <= int32(b.Len())+1; offset++ {
			a, ok := f.At(offset)
			if !ok {
				if len(f.Decls) > 0 {
					t.Fatalf("%q at %d: nothing", b.String(), offset)
				}
				continue
			}
			outer := Span{-1 << 30, 1 << 30}
			for _, s := range a.Stmts {
				if !s.reaches(a.Decl.Text, a.Offset) || s.Span.Start < outer.Start || s.Span.End > outer.End {
					t.Fatalf("%q at %d: statement %q", b.String(), offset, s.Span.Of(a.Decl.Text))
				}
				outer = s.Span
			}
			for _, e := range a.Exprs {
				if !e.Span.Contains(a.Offset) || e.Span.Start < outer.Start || e.Span.End > outer.End {
					t.Fatalf("%q at %d: expression %q", b.String(), offset, e.Span.Of(a.Decl.Text))
				}
				outer = e.Span
			}
			if f.Decls[f.DeclAt(offset)] != a.Decl || a.Start+a.Offset != offset {
				t.Fatalf("%q at %d: another declaration", b.String(), offset)
			}
		}
	}
}

// TestIndex finds declarations in files that were edited, from wherever they
// stood before.
func TestIndex(t *testing.T) {
	r := rand.New(rand.NewPCG(2, 2))
	id := &FileID{Name: "a"}
	f := Parse(id, strings.Repeat("x = 1\n", 50), nil)
	for range 300 {
		at := 6 * r.IntN(len(f.Text)/6+1)
		cut := min(6*r.IntN(20), len(f.Text)-at)
		next := Parse(id, f.Text[:at]+strings.Repeat(fmt.Sprintf("y = %d\n", r.IntN(9)), r.IntN(20))+f.Text[at+cut:], f)
		for i, d := range next.Decls {
			if next.Index(d) != i {
				t.Fatalf("declaration %d is found at %d", i, next.Index(d))
			}
		}
		for _, d := range f.Decls {
			if i := next.Index(d); i >= 0 && next.Decls[i] != d {
				t.Fatalf("another declaration is found")
			}
		}
		if next.Index(&Decl{}) != -1 {
			t.Fatal("a declaration that the file does not have is found")
		}
		f = next
	}
}
