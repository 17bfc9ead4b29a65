package output_test

import (
	"strings"
	"testing"

	"kern/checker/output"
)

// TestPageForms writes the same page in both forms.
func TestPageForms(t *testing.T) {
	build := func(markdown bool) string {
		p := output.NewPage(markdown)
		p.Head(2, "A_b #1")
		p.Text(output.Words("1. first *not* a list "), output.Strong("all"), output.Words(" of `N_Ed`"))
		p.List(output.Code("a|b`c"), output.Join(output.Words("- one"), output.Break(), output.Words("two")))
		p.Table([]string{"", "x|y"}, "lr", [][]output.Line{{output.Code("a|b"), output.Words("1 | 2")}, {output.Words("–")}})
		p.Block("load 1 kN\n```")
		p.Picture("a [b]", "<svg/>")
		return p.String()
	}
	want := strings.ReplaceAll("## A_b #1\n\n1\\. first \\*not\\* a list **all** of \\`N_Ed\\`\n\n- ``a|b`c``\n- \\- one  \n  two\n\n"+
		"|        |   x\\|y |\n|--------|-------:|\n| `a\\|b` | 1 \\| 2 |\n| –      |        |\n\n````kern\nload 1 kN\n```\n````\n\n![a \\[b]](data:image/svg+xml;base64,PHN2Zy8+)\n", "``a|b`c``", "`` a|b`c ``")
	if got := build(true); got != want {
		t.Errorf("Markdown:\n%s\nwant:\n%s", got, want)
	}
	want = "A_b #1\n\n1. first *not* a list all of `N_Ed`\n\n- a|b`c\n- - one\n  two\n\n       x|y\na|b  1 | 2\n–\n\n    load 1 kN\n    ```\n"
	if got := build(false); got != want {
		t.Errorf("plain:\n%s\nwant:\n%s", got, want)
	}
}

// TestPageHarmless puts texts into a page that would be marks, pictures, pages of
// the web or letters that write backwards.
func TestPageHarmless(t *testing.T) {
	for _, text := range []string{"<img src=x>", "![x](http://example.org/x)", "[x](y)", "a\n# b", "\u202eabc", "&lt;", "~~x~~", "a\x1b[31mb", "| x |", "\\*x*"} {
		p := output.NewPage(true)
		p.Table([]string{"h"}, "l", [][]output.Line{{output.Words(text)}})
		p.Text(output.Words(text))
		got := p.String()
		for _, bad := range []string{"| <img", "\n<img", "\n[x](", "\n![x](", "\n# b", "\u202e", " &lt", "\n&lt", "\x1b"} {
			if strings.Contains(got, bad) {
				t.Errorf("%q becomes %q", text, got)
			}
		}
	}
}
