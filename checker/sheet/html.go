package sheet

import (
	_ "embed"
	"fmt"
	"html"
	"io"
	"regexp"
	"strconv"
	"strings"

	"kern/checker/drawing"
	"kern/checker/output"
)

//go:embed sheet.css
var stylesheet string

// HTML writes the sheet as one file that needs nothing else: no network and no
// script.
func (s *Sheet) HTML(w io.Writer) error {
	h := htmlWriter{sheet: s}
	h.page()
	_, err := io.WriteString(w, h.b.String())
	return err
}

type htmlWriter struct {
	sheet    *Sheet
	b        strings.Builder
	headings int
	open     bool // a section is open
}

func (h *htmlWriter) page() {
	s := h.sheet
	fmt.Fprintf(&h.b, "<!DOCTYPE html>\n<html lang=\"en\">\n<head>\n<meta charset=\"utf-8\">\n<title>%s</title>\n", text(s.Title))
	h.b.WriteString("<meta name=\"viewport\" content=\"width=device-width, initial-scale=1\">\n<meta name=\"color-scheme\" content=\"light dark\">\n")
	fmt.Fprintf(&h.b, "<meta name=\"generator\" content=\"%s\">\n<meta name=\"kern-sheet\" content=\"%s\">\n", html.EscapeString(s.Program), html.EscapeString(s.mark("html")))
	fmt.Fprintf(&h.b, "<style>\n%s%s@page { @top-left { content: %s } @top-right { content: %s } @bottom-left { content: %s } }\n</style>\n</head>\n<body>\n",
		stylesheet, drawing.CSS(), cssText(s.Running), cssText(s.RunningRight), cssText(s.Foot))
	h.b.WriteString("<main>\n")
	for i, b := range s.Blocks {
		if i == s.contentsAt {
			h.contents()
		}
		h.block(b)
	}
	h.close()
	h.b.WriteString("</main>\n</body>\n</html>\n")
}

// cssText quotes a text for a style sheet inside HTML.
func cssText(s string) string {
	var b strings.Builder
	b.WriteByte('"')
	for _, r := range s {
		switch {
		case r < 32 || r == 127:
			b.WriteByte(' ')
		case r == '"' || r == '\\' || r == '<' || r == '>' || r == '&':
			fmt.Fprintf(&b, `\%x `, r)
		default:
			b.WriteRune(r)
		}
	}
	b.WriteByte('"')
	return b.String()
}

func (h *htmlWriter) contents() {
	h.close()
	h.b.WriteString("<nav aria-label=\"Contents\" class=\"contents\">\n<h2>Contents</h2>\n")
	h.b.WriteString("<ol>\n")
	for i, c := range h.sheet.headings() {
		if c.Level == 2 {
			fmt.Fprintf(&h.b, "<li><a href=\"#h%d\">%s</a></li>\n", i+1, text(c.Text))
		}
	}
	h.b.WriteString("</ol>\n</nav>\n")
}

func (h *htmlWriter) close() {
	if h.open {
		h.b.WriteString("</section>\n")
		h.open = false
	}
}

func (h *htmlWriter) block(b output.Block) {
	switch b := b.(type) {
	case output.Heading:
		h.headings++
		class := ""
		if b.Level <= 3 {
			h.close()
			h.open = true
			fmt.Fprintf(&h.b, "<section class=\"l%d\">\n", b.Level)
		}
		fmt.Fprintf(&h.b, "<h%d id=\"h%d\"%s>%s</h%d>\n", b.Level, h.headings, class, text(b.Text), b.Level)
	case output.Paragraph:
		fmt.Fprintf(&h.b, "<p>%s</p>\n", line(b.Text))
	case output.List:
		h.b.WriteString("<ul>\n")
		for _, l := range b.Items {
			fmt.Fprintf(&h.b, "<li>%s</li>\n", line(l))
		}
		h.b.WriteString("</ul>\n")
	case output.Source:
		fmt.Fprintf(&h.b, "<pre><code>%s</code></pre>\n", html.EscapeString(strings.TrimRight(b.Text, "\n")))
	case output.Table:
		h.table(b)
	case output.Equations:
		h.equations(b)
	case Figures:
		h.b.WriteString("<div class=\"figures\">\n")
		for _, s := range b {
			fmt.Fprintf(&h.b, "<figure>%s<figcaption>%s</figcaption></figure>\n", s.SVG(drawing.InPage), text(s.Title))
		}
		h.b.WriteString("</div>\n")
	case Facts:
		h.b.WriteString("<dl>\n")
		for _, f := range b {
			fmt.Fprintf(&h.b, "<div><dt>%s</dt><dd>%s</dd></div>\n", text(f.Name), line(f.Value))
		}
		h.b.WriteString("</dl>\n")
	case Verdict:
		fmt.Fprintf(&h.b, "<p class=\"verdict %s\"><strong>%s</strong> %s</p>\n", b.Word, b.Word, text(b.Rest))
	case Signatures:
		h.b.WriteString("<table class=\"signatures\">\n<thead><tr><td></td><th scope=\"col\">name</th><th scope=\"col\">date</th><th scope=\"col\">signature</th></tr></thead>\n<tbody>\n")
		for _, f := range b {
			fmt.Fprintf(&h.b, "<tr><th scope=\"row\">%s</th><td>%s</td><td></td><td></td></tr>\n", text(f.Name), line(f.Value))
		}
		h.b.WriteString("</tbody>\n</table>\n")
	}
}

func (h *htmlWriter) equations(e output.Equations) {
	h.b.WriteString("<ol class=\"steps\">\n")
	for _, x := range e.Steps {
		if x.Note != "" {
			fmt.Fprintf(&h.b, "<li class=\"note\">%s</li>\n", text(x.Note))
			continue
		}
		h.b.WriteString("<li>")
		fmt.Fprintf(&h.b, "<p class=\"what\">%s", text(x.What))
		if x.Clause != "" {
			fmt.Fprintf(&h.b, " <span class=\"clause\">%s</span>", text(x.Clause))
		}
		h.b.WriteString("</p><p class=\"formula\">")
		h.formula(symbolMark(x.Symbol), "")
		for _, f := range []string{x.Formula, x.Numbers} {
			if f != "" && f != x.Value { // "W = W_pl = 5 cm3" says it once
				h.formula(row(mark{kind: operatorMark, text: "="}, expression(f)), "")
			}
		}
		h.formula(row(mark{kind: operatorMark, text: "="}, expression(x.Value)), ` class="result"`)
		h.b.WriteString("</p></li>\n")
	}
	h.b.WriteString("</ol>\n")
}

// formula writes a formula in pieces between which its line may be broken.
func (h *htmlWriter) formula(m mark, attributes string) {
	for _, c := range chunks(m) {
		h.b.WriteString("<math displaystyle=\"true\"" + attributes + ">")
		mathml(&h.b, c)
		h.b.WriteString("</math> ")
	}
}

// table writes a table. A column of numbers is parted into numbers, which stand on
// their points, and units.
func (h *htmlWriter) table(t output.Table) {
	columns := columnsOf(t)
	h.b.WriteString("<div class=\"wide\"><table>\n<thead><tr>")
	for i, head := range t.Head {
		span, class := "", ""
		if columns[i].units {
			span = ` colspan="2"`
		}
		if t.Align[i] != 'l' {
			class = ` class="n"`
		}
		if head == "" {
			fmt.Fprintf(&h.b, "<td%s%s></td>", span, class)
			continue
		}
		fmt.Fprintf(&h.b, "<th scope=\"col\"%s%s>%s</th>", span, class, header(head))
	}
	h.b.WriteString("</tr></thead>\n<tbody>\n")
	for _, cells := range t.Rows {
		h.b.WriteString("<tr>")
		for i := range t.Head {
			var l output.Line
			if i < len(cells) {
				l = cells[i]
			}
			h.cell(l, t.Align[i], columns[i], i == 0)
		}
		h.b.WriteString("</tr>\n")
	}
	h.b.WriteString("</tbody>\n</table></div>\n")
}

func (h *htmlWriter) cell(l output.Line, align byte, c column, first bool) {
	tag, scope := "td", ""
	if first && align == 'l' && len(l) > 0 {
		tag, scope = "th", ` scope="row"`
	}
	switch {
	case align == 'l':
		fmt.Fprintf(&h.b, "<%s%s>%s</%s>", tag, scope, line(l), tag)
	case align == 'r':
		fmt.Fprintf(&h.b, "<%s%s class=\"n\">%s</%s>", tag, scope, line(l), tag)
	default:
		q := quantityOf(l.String())
		room := ""
		if n := c.decimals - len(q.decimals); n > 0 {
			width := float64(n)
			if q.decimals == "" {
				width = float64(n-1) + 0.3 // the point is narrow
			}
			room = fmt.Sprintf(` style="padding-right:calc(var(--gap) + %sch)"`, strconv.FormatFloat(width, 'f', -1, 64))
		}
		fmt.Fprintf(&h.b, "<td class=\"n\"%s>%s</td>", room, text(q.number()))
		if c.units {
			fmt.Fprintf(&h.b, "<td class=\"u\">%s</td>", html.EscapeString(raisedUnit(clean(q.unit))))
		}
	}
}

// line writes words in HTML.
func line(l output.Line) string {
	var b strings.Builder
	for _, x := range l {
		switch x.Face {
		case output.Bold:
			b.WriteString("<strong>" + text(x.Text) + "</strong>")
		case output.Mono:
			b.WriteString(symbolic(x.Text))
		case output.NewLine:
			b.WriteString("<br>")
		default:
			b.WriteString(text(x.Text))
		}
	}
	return b.String()
}

// symbolName is text of the language that is one symbol.
var symbolName = regexp.MustCompile(`^\p{L}\w{0,23}$`)

// symbolic sets text of the language: a symbol as formulas set it.
func symbolic(s string) string {
	if !symbolName.MatchString(s) {
		return "<code>" + html.EscapeString(s) + "</code>"
	}
	var b strings.Builder
	b.WriteString("<math>")
	mathml(&b, symbolMark(s))
	b.WriteString("</math>")
	return b.String()
}

// header writes the head of a column: a symbol as formulas set it.
func header(s string) string {
	if headSymbol.MatchString(s) {
		return symbolic(s)
	}
	return text(s)
}

// headSymbol is the head of a column that is a symbol: a letter, or one with
// something below it.
var headSymbol = regexp.MustCompile(`^([A-Za-z]|[A-Za-z]+_\w+)$`)

// text writes words in HTML, powers of units raised.
func text(s string) string { return html.EscapeString(raised(clean(s))) }
