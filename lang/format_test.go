package lang

import (
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"golang.org/x/tools/txtar"
)

var update = flag.Bool("update", false, "write the results of the formatter into the golden files")

func TestFormatGolden(t *testing.T) {
	paths, err := filepath.Glob("testdata/format/*.txtar")
	if err != nil || len(paths) == 0 {
		t.Fatalf("no golden files: %v", err)
	}
	for _, path := range paths {
		t.Run(strings.TrimSuffix(filepath.Base(path), ".txtar"), func(t *testing.T) {
			data, err := os.ReadFile(path)
			if err != nil {
				t.Fatal(err)
			}
			a := txtar.Parse(data)
			if len(a.Files) != 2 || a.Files[0].Name != "input" || a.Files[1].Name != "want" {
				t.Fatalf("%s holds not just input and want", path)
			}
			input := string(a.Files[0].Data)
			got := Format(input)
			if *update {
				a.Files[1].Data = []byte(got)
				if err := os.WriteFile(path, txtar.Format(a), 0o644); err != nil {
					t.Fatal(err)
				}
			}
			if want := string(a.Files[1].Data); got != want {
				t.Errorf("got:\n%s\nwant:\n%s", got, want)
			}
			checkLayout(t, input)
		})
	}
}

func TestFormatLineEnds(t *testing.T) {
	for _, c := range []struct{ name, input, want string }{
		{"empty", "", ""},
		{"blank", " \n\t\n", ""},
		{"no final line end", "a=1", "a = 1\n"},
		{"CRLF", "a=1\r\n\r\n\r\nb=2\r\n", "a = 1\r\n\r\nb = 2\r\n"},
		{"CRLF without a final line end", "a=1\r\nb=2", "a = 1\r\nb = 2\r\n"},
		{"CR", "a=1\rb=2\r", "a = 1\rb = 2\r"},
		{"mostly CRLF", "a=1\r\nb=2\nc=3\r\n", "a = 1\r\nb = 2\r\nc = 3\r\n"},
		{"mostly LF", "a=1\r\nb=2\nc=3\n", "a = 1\nb = 2\nc = 3\n"},
		{"as many of each", "a=1\r\nb=2\n", "a = 1\nb = 2\n"},
		{"blank lines do not count", "\r\n\r\n\r\na=1\nb=2\n", "a = 1\nb = 2\n"},
		{"inside a statement", "a=(1\r\n+2)\r\n", "a = (1\r\n    + 2)\r\n"},
		{"inside a broken statement", "a=(1..2 +\n2)\r\nb=2\r\n", "a=(1..2 +\n2)\r\nb = 2\r\n"},
		{"split", "a=1;b=2\r\n", "a = 1\r\nb = 2\r\n"},
		{"byte-order mark", "\ufeffa=1\n", "\ufeffa = 1\n"},
		{"byte-order mark before a blank line", "\ufeff\n\na=1\n", "\ufeffa = 1\n"},
		{"byte-order mark before a broken line", "\ufeff  a=1..2\n", "\ufeff  a=1..2\n"},
		{"byte-order mark before an open block", "\ufeff\ncolumn A {\n x  = 1", "\ufeffcolumn A {\n x  = 1\n"},
		{"byte-order mark alone", "\ufeff", "\ufeff"},
		{"no-break spaces", "a\u00a0=\u00a05\u00a0kN\u00a0\n", "a = 5 kN\n"},
		{"thin spaces", "a\u2009= 5\u202fkN\n", "a = 5 kN\n"},
		{"blanks behind a comment stay", "a=1 # b  \t\n", "a = 1  # b  \t\n"},
		{"zero byte", "a  =  1\x00\n", "a  =  1\x00\n"},
	} {
		if got := Format(c.input); got != c.want {
			t.Errorf("%s: Format(%q) = %q, want %q", c.name, c.input, got, c.want)
		}
		checkLayout(t, c.input)
	}
}

// A name of a megabyte among short ones must not make every line a megabyte
// wide.
func TestFormatBoundsColumns(t *testing.T) {
	long := strings.Repeat("a", 1<<20)
	text := strings.Repeat("b = 1 # c\n", 2000) + long + " = 1 # c\n" + strings.Repeat("b = 1 # c\n", 2000)
	if got := Format(text); len(got) > 2*len(text) {
		t.Errorf("%d bytes became %d", len(text), len(got))
	}
	for _, text := range []string{
		strings.Repeat("x", alignWidth-1) + " = 1\ny = 2\n",
		strings.Repeat("x", alignWidth) + " = 1\ny = 2\n",
		strings.Repeat("x", alignWidth+1) + " = 1\ny = 2\n",
	} {
		checkLayout(t, text)
		first, second, _ := strings.Cut(Format(text), "\n")
		aligned := strings.IndexByte(first, '=') == strings.IndexByte(second, '=')
		if want := strings.IndexByte(text, ' ') <= alignWidth; aligned != want {
			t.Errorf("aligned %v, want %v:\n%s", aligned, want, Format(text))
		}
	}
}

func TestFormatInlineWidth(t *testing.T) {
	for n := range 20 {
		text := "section a = " + strings.Repeat("x", 50+n) + " { width = 90 mm; wall = 6 mm }\n"
		got := Format(text)
		width := len(text) - 1
		if one := strings.Count(got, "\n") == 1; one != (width <= inlineWidth) {
			t.Errorf("a block of %d columns on one line: %v\n%s", width, one, got)
		}
	}
}

func TestFormatEdits(t *testing.T) {
	text := "a=1;b  =2 # c\n\n\ncolumn A {\nload  G 5kN\n load G 6 kN\n    note \"a  ; b\"\n}\n"
	f := Parse(&FileID{}, text, nil)
	edits := FormatEdits(f)
	if got := Apply(text, edits); got != Format(text) {
		t.Errorf("the edits give\n%s\nthe formatter\n%s", got, Format(text))
	}
	// a=1 | ; | = 2 | # | blank lines | indent, blanks of the first load | indent of the second
	for _, e := range edits {
		if old := e.Span.Of(text); strings.Trim(old, " \n;") != "" || old == e.New {
			t.Errorf("%q becomes %q", old, e.New)
		}
	}
	if got := FormatEdits(Parse(&FileID{}, Format(text), nil)); got != nil {
		t.Errorf("a text laid out already has edits: %v", got)
	}
	second := int32(strings.Index(text, " load G 6"))
	got := Apply(text, FormatRange(f, Span{second + 3, second + 3}))
	if want := strings.Replace(text, " load G 6", "    load G 6", 1); got != want {
		t.Errorf("the range gave\n%s\nwant\n%s", got, want)
	}
	if got := Apply(text, FormatRange(f, Span{0, int32(len(text))})); got != Format(text) {
		t.Errorf("the range of everything gave\n%s", got)
	}
}
