package output

import (
	"fmt"
	"html"
	"strings"

	"kern/checker/review"
)

// ReviewHTML is a review as a page for a browser. It needs nothing but itself.
func ReviewHTML(r *review.Review, f ReviewForm) string {
	w := &reviewing{r, f, NewPage(true), false}
	w.compose()
	p := &htmlPage{}
	for _, b := range w.Blocks() {
		p.block(b)
	}
	title := html.EscapeString(w.headline())
	return "<!DOCTYPE html>\n<html lang=\"en\">\n<head>\n<meta charset=\"utf-8\">\n<meta name=\"viewport\" content=\"width=device-width, initial-scale=1\">\n<title>" + title +
		"</title>\n<style>\n" + reviewStyle + "</style>\n</head>\n<body>\n<main>\n" + p.b.String() + "</main>\n</body>\n</html>\n"
}

const reviewStyle = `:root { color-scheme: light dark; --line: #8886; --strong: #a40000; }
@media (prefers-color-scheme: dark) { :root { --strong: #ff8f80; } }
body { font: 16px/1.45 system-ui, sans-serif; margin: 0; }
main { max-width: 78rem; margin: 0 auto; padding: 1rem 1.25rem 3rem; }
h2 { font-size: 1.45rem; margin: 1rem 0 .5rem; } h3 { font-size: 1.1rem; margin: 1.6rem 0 .4rem; }
.wide { overflow-x: auto; }
table { border-collapse: collapse; font-variant-numeric: tabular-nums; }
th, td { text-align: left; vertical-align: top; padding: .3rem .8rem .3rem 0; border-bottom: 1px solid var(--line); }
th { font-weight: 600; } .r { text-align: right; white-space: nowrap; }
td strong { color: var(--strong); } ul { padding-left: 1.2rem; } li { margin: .2rem 0; overflow-wrap: anywhere; }
summary { cursor: pointer; margin: 1rem 0; font-weight: 600; }
@media print { details { display: block; } }
`

// htmlPage writes the blocks of a review in HTML.
type htmlPage struct{ b strings.Builder }

func (p *htmlPage) line(l Line) string {
	var b strings.Builder
	for _, x := range l {
		text := html.EscapeString(clean(x.Text, false))
		switch x.Face {
		case NewLine:
			b.WriteString("<br>")
		case Bold:
			b.WriteString("<strong>" + text + "</strong>")
		case Mono:
			b.WriteString("<code>" + text + "</code>")
		case Linked:
			b.WriteString(`<a href="` + html.EscapeString(address(x.To)) + `">` + text + "</a>")
		default:
			b.WriteString(text)
		}
	}
	return b.String()
}

func (p *htmlPage) block(b Block) {
	switch b := b.(type) {
	case Heading:
		fmt.Fprintf(&p.b, "<h%d>%s</h%d>\n", b.Level, html.EscapeString(clean(b.Text, false)), b.Level)
	case Paragraph:
		p.b.WriteString("<p>" + p.line(b.Text) + "</p>\n")
	case List:
		p.b.WriteString("<ul>\n")
		for _, l := range b.Items {
			p.b.WriteString("<li>" + p.line(l) + "</li>\n")
		}
		p.b.WriteString("</ul>\n")
	case Table:
		p.table(b)
	case Fold:
		p.b.WriteString("<details><summary>" + html.EscapeString(b.Summary) + "</summary>\n")
	case Unfold:
		p.b.WriteString("</details>\n")
	}
}

func (p *htmlPage) table(t Table) {
	class := func(i int) string {
		if t.Align[i] == 'r' {
			return ` class="r"`
		}
		return ""
	}
	p.b.WriteString("<div class=\"wide\"><table>\n<thead><tr>")
	for i, h := range t.Head {
		p.b.WriteString("<th scope=\"col\"" + class(i) + ">" + html.EscapeString(h) + "</th>")
	}
	p.b.WriteString("</tr></thead>\n<tbody>\n")
	for _, row := range t.Rows {
		p.b.WriteString("<tr>")
		for i, l := range row {
			p.b.WriteString("<td" + class(i) + ">" + p.line(l) + "</td>")
		}
		p.b.WriteString("</tr>\n")
	}
	p.b.WriteString("</tbody>\n</table></div>\n")
}
