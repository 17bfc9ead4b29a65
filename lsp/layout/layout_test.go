package layout

import (
	"math/rand/v2"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"kern/lang"

	"golang.org/x/tools/txtar"
)

// texts are all kern files below testdata, and each with its blanks made worse.
func texts(t testing.TB) []string {
	t.Helper()
	var out []string
	paths, err := filepath.Glob("../../testdata/*/*")
	if err != nil || len(paths) < 100 {
		t.Fatalf("%d files: %v", len(paths), err)
	}
	for _, path := range paths {
		data, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		switch filepath.Ext(path) {
		case ".kern":
			out = append(out, string(data))
		case ".txtar":
			for _, f := range txtar.Parse(data).Files {
				if filepath.Ext(f.Name) == ".kern" {
					out = append(out, string(f.Data))
				}
			}
		}
	}
	r := rand.New(rand.NewPCG(5, 6))
	for _, text := range slices.Clone(out) {
		lines := strings.SplitAfter(text, "\n")
		for i := range lines {
			switch r.IntN(6) {
			case 0:
				lines[i] = "\t" + lines[i]
			case 1:
				lines[i] = strings.TrimLeft(lines[i], " ")
			case 2:
				lines[i] = strings.Replace(lines[i], " = ", "=", 1)
			case 3:
				lines[i] = strings.Replace(lines[i], "\n", "  \n\n\n", 1)
			}
		}
		out = append(out, strings.Join(lines, ""))
	}
	for _, text := range slices.Clone(out)[:40] {
		out = append(out, strings.ReplaceAll(text, "\n", "\r\n"))
	}
	return out
}

func parse(text string) *lang.File { return lang.Parse(&lang.FileID{Name: "a.kern"}, text, nil) }

// sound fails the test if changes cannot be applied together or write what was
// there.
func sound(t *testing.T, text string, changes []lang.Change) {
	t.Helper()
	for i, c := range changes {
		switch {
		case i > 0 && changes[i-1].Span.End > c.Span.Start, c.Span.Start > c.Span.End, int(c.Span.End) > len(text):
			t.Fatalf("%+v does not follow: %q", changes, text)
		case c.Span.Of(text) == c.New:
			t.Fatalf("%+v changes nothing: %q", c, text)
		case strings.Trim(c.Span.Of(text)+c.New, " \t\r\n;\ufeff\u00a0\u202f\u2009") != "":
			t.Fatalf("%+v changes more than blanks: %q", c, text)
		}
	}
}

// TestFile holds the small changes against the layout as a whole, and the layout
// against itself.
func TestFile(t *testing.T) {
	for _, text := range texts(t) {
		f := parse(text)
		changes := File(f)
		sound(t, text, changes)
		laid := lang.Apply(text, changes)
		if laid != lang.Format(text) {
			t.Fatalf("the changes come to another layout:\n%q\n%q", laid, lang.Format(text))
		}
		if again := File(parse(laid)); len(again) > 0 {
			t.Fatalf("laid out twice is not laid out once: %+v in\n%s", again, laid)
		}
		for _, c := range changes {
			if strings.Count(c.Span.Of(text), "\n") == 0 && strings.Count(c.New, "\n") == 0 {
				continue
			}
			if old := c.Span.Of(text); old != "" && c.New != "" && old[0] == c.New[0] && old[0] != '\r' {
				t.Fatalf("%+v could be smaller in %q", c, text)
			}
		}
	}
}

// TestRanges lays out parts: nothing outside of the lines of the range changes, what
// is changed is what the whole layout says, and doing it twice is doing it once.
func TestRanges(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 8))
	wanted, refused := 0, 0
	for _, text := range texts(t) {
		f := parse(text)
		all := File(f)
		for range 5 {
			start := r.IntN(len(text) + 1)
			end := start + r.IntN(len(text)-start+1)
			if r.IntN(2) == 0 {
				end = min(end, start+60)
			}
			w := lang.Span{Start: int32(start), End: int32(end)}
			changes := Ranges(f, w)
			sound(t, text, changes)
			from := strings.LastIndexAny(text[:start], "\r\n") + 1
			to := len(text)
			if i := strings.IndexAny(text[end:], "\r\n"); i >= 0 {
				to = end + i
			}
			inside := 0
			for _, c := range all {
				if int(c.Span.Start) >= from && int(c.Span.End) <= to {
					inside++
				}
			}
			for _, c := range changes {
				if int(c.Span.Start) < from || int(c.Span.End) > to {
					t.Fatalf("%+v lies outside of %+v in %q", c, w, text)
				}
				if !slices.Contains(all, c) {
					t.Fatalf("%+v is no part of the layout of %q", c, text)
				}
			}
			if inside > 0 {
				wanted++
			}
			part := lang.Apply(text, changes)
			if lang.Format(part) != lang.Format(text) {
				t.Fatalf("a part of the layout leads to another whole: %q", part)
			}
			if len(changes) == 0 && inside > 0 {
				refused++
				continue
			}
			grown := lang.Span{Start: w.Start, End: w.End + int32(len(part)-len(text))}
			if more := Ranges(parse(part), grown); len(more) > 0 {
				t.Fatalf("laid out twice is not laid out once: %+v in %q of %q", more, grown.Of(part), w.Of(text))
			}
		}
	}
	t.Logf("%d ranges with something to lay out, %d left alone", wanted, refused)
	if refused*2 > wanted {
		t.Errorf("of %d ranges with something to lay out %d were left alone", wanted, refused)
	}
}

// TestRangeKeepsBroken never touches the line of a statement that cannot be read.
func TestRangeKeepsBroken(t *testing.T) {
	text := "column A1 {\n  section=\"HEB 100\"\n      load ((3   kN\n  height=3 m\n}\n"
	f := parse(text)
	got := lang.Apply(text, Ranges(f, lang.Span{Start: 0, End: int32(len(text))}))
	if !strings.Contains(got, "\n      load ((3   kN\n") || !strings.Contains(got, "    section = \"HEB 100\"\n") {
		t.Errorf("got\n%s", got)
	}
}

// TestRangeOfSome lays out the one statement that is marked.
func TestRangeOfSome(t *testing.T) {
	for in, want := range map[string]string{
		// a statement that the range has in part stays
		"column A1 {\n  sec⟦tion=s\n  material=m\n  hei⟧ght=3 m\n}\n": "column A1 {\n  section=s\n    material = m\n  height=3 m\n}\n",
		"⟦x=3 m\n⟧y  =  4 m\n":                                        "x = 3 m\ny  =  4 m\n",
		"x=3 m\n⟦⟧y  =  4 m\n":                                        "x=3 m\ny  =  4 m\n",
		"column A1 {  ⟦section=s;material=m⟧;height=3 m}\n":           "column A1 {  section = s; material = m;height=3 m}\n",
	} {
		before, rest, _ := strings.Cut(in, "⟦")
		marked, after, _ := strings.Cut(rest, "⟧")
		text := before + marked + after
		got := lang.Apply(text, Ranges(parse(text), lang.Span{Start: int32(len(before)), End: int32(len(before) + len(marked))}))
		if got != want {
			t.Errorf("%q\n got %q\nwant %q", in, got, want)
		}
	}
}

// TestTyped types a line end, a brace or a semicolon where ⟦⟧ stands.
func TestTyped(t *testing.T) {
	for _, c := range []struct{ in, typed, want string }{
		{"column A1 {\n⟦⟧", "\n", "column A1 {\n    "},
		{"column A1 {\n        ⟦⟧\n}\n", "\n", "column A1 {\n    \n}\n"},
		{"column A1 {\n    section = tube {\n    ⟦⟧", "\n", "column A1 {\n    section = tube {\n        "},
		{"column A1 {\n    height = 3 m\n    }⟦⟧\n", "}", "column A1 {\n    height = 3 m\n}\n"},
		{"column A1 {\n    section = tube {\n        wall = 3 mm\n        }⟦⟧", "}", "column A1 {\n    section = tube {\n        wall = 3 mm\n    }"},
		{"section a = bar { width = 3 mm }⟦⟧\n", "}", "section a = bar { width = 3 mm }\n"},
		{"column A1 {\nheight   =   3 m;⟦⟧\n}\n", ";", "column A1 {\n    height   =   3 m;\n}\n"},
		{"column A1 {\n    height = 3 m\n}\n    ⟦⟧", "\n", "column A1 {\n    height = 3 m\n}\n"},
		{"x = (3 m +\n⟦⟧", "\n", "x = (3 m +\n    "},
		{"column A1,\n⟦⟧A2 {\n}\n", "\n", "column A1,\n    A2 {\n}\n"},
		{"column A1 { # {\n  ⟦⟧note \"{\"\n}\n", "\n", "column A1 { # {\n    note \"{\"\n}\n"},
		{"column A1 {\n    height = 3 m\n  ⟦⟧\ncolumn A2 {\n}\n", "\n", "column A1 {\n    height = 3 m\n    \ncolumn A2 {\n}\n"},
		// half typed above: the new line has its indent all the same
		{"column A1 {\n    load G\n⟦⟧\n}\n", "\n", "column A1 {\n    load G\n    \n}\n"},
		// what cannot be read stays as it is
		{"column A1 {\n  load ((3;⟦⟧\n}\n", ";", "column A1 {\n  load ((3;\n}\n"},
		{"column A1 {\r\n\t⟦⟧\r\n}\r\n", "\n", "column A1 {\r\n    \r\n}\r\n"},
		{"", "\n", ""}, {"⟦⟧", "}", ""},
	} {
		before, after, _ := strings.Cut(c.in, "⟦⟧")
		text := before + after
		got := lang.Apply(text, Typed(parse(text), int32(len(before)), c.typed))
		if got != c.want {
			t.Errorf("%q typed %q\n got %q\nwant %q", c.in, c.typed, got, c.want)
		}
	}
}

// TestTypedEverywhere changes nothing but the blanks at the start of one line,
// wherever it is asked.
func TestTypedEverywhere(t *testing.T) {
	r := rand.New(rand.NewPCG(9, 10))
	for _, text := range texts(t) {
		f := parse(text)
		for range 10 {
			at := int32(r.IntN(len(text) + 1))
			typed := []string{"\n", "}", ";"}[r.IntN(3)]
			changes := Typed(f, at, typed)
			sound(t, text, changes)
			for _, c := range changes {
				if line := lineStart(text, at); c.Span.Start < line || strings.Trim(text[line:c.Span.End], " \t") != "" || strings.Trim(c.New, " ") != "" {
					t.Fatalf("%+v at %d in %q", c, at, text)
				}
			}
		}
	}
}
