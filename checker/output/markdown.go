package output

import (
	"encoding/base64"
	"fmt"
	"html"
	"strings"

	"github.com/mattn/go-runewidth"
)

// String is the page as it is so far, as Markdown or plain text; it ends with one
// line end unless it is empty.
func (p *Page) String() string {
	w := pageWriter{plain: p.plain}
	for _, b := range p.blocks {
		w.block(b)
	}
	if s := strings.TrimRight(w.b.String(), "\n"); s != "" {
		return s + "\n"
	}
	return ""
}

// pageWriter writes a page as Markdown or plain text.
type pageWriter struct {
	b     strings.Builder
	plain bool
}

// gap begins a new block: an empty line unless the page is still empty.
func (p *pageWriter) gap() {
	if p.b.Len() > 0 {
		p.b.WriteByte('\n')
	}
}

func (p *pageWriter) block(b Block) {
	switch b := b.(type) {
	case Heading:
		p.gap()
		if !p.plain {
			p.b.WriteString(strings.Repeat("#", b.Level) + " ")
		}
		p.b.WriteString(p.render(Words(b.Text), "", false) + "\n")
	case Paragraph:
		p.gap()
		s := p.render(b.Text, "", false)
		if !p.plain {
			s = guardStart(s)
		}
		p.b.WriteString(s + "\n")
	case List:
		p.list(b.Items)
	case Equations:
		items := make([]Line, len(b.Steps))
		for i, e := range b.Steps {
			items[i] = e.Line()
		}
		p.list(items)
	case Source:
		p.source(b.Text)
	case Picture:
		if p.plain {
			return
		}
		p.gap()
		p.b.WriteString("![" + escape(b.Alt, false) + "](data:image/svg+xml;base64," + base64.StdEncoding.EncodeToString([]byte(b.SVG)) + ")\n")
	case Table:
		p.table(b)
	case Fold:
		p.gap()
		if p.plain {
			p.b.WriteString(clean(b.Summary, false) + ":\n")
			return
		}
		p.b.WriteString("<details><summary>" + html.EscapeString(clean(b.Summary, false)) + "</summary>\n")
	case Unfold:
		if !p.plain {
			p.b.WriteString("\n</details>\n")
		}
	}
}

func (p *pageWriter) list(items []Line) {
	p.gap()
	for _, l := range items {
		s := p.render(l, "  ", false)
		if !p.plain {
			s = guardStart(s)
		}
		p.b.WriteString("- " + s + "\n")
	}
}

func (p *pageWriter) source(text string) {
	p.gap()
	text = strings.TrimRight(clean(text, true), "\n")
	if p.plain {
		for line := range strings.SplitSeq(text, "\n") {
			p.b.WriteString(strings.TrimRight("    "+line, " ") + "\n")
		}
		return
	}
	fence := "```"
	for strings.Contains(text, fence) {
		fence += "`"
	}
	p.b.WriteString(fence + "kern\n" + text + "\n" + fence + "\n")
}

func (p *pageWriter) table(t Table) {
	head, align, rows := t.Head, t.Align, t.Rows
	p.gap()
	cells := make([][]string, 0, len(rows)+1)
	top, empty := make([]string, len(head)), true
	for i, h := range head {
		top[i] = p.render(Words(h), "", true)
		empty = empty && h == ""
	}
	cells = append(cells, top)
	for _, row := range rows {
		line := make([]string, len(head))
		for i := range head {
			if i < len(row) {
				line[i] = p.render(row[i], "", true)
			}
		}
		cells = append(cells, line)
	}
	width := make([]int, len(head))
	for i := range head {
		width[i] = 1
		if !p.plain {
			width[i] = 3
		}
		for _, row := range cells {
			width[i] = max(width[i], runewidth.StringWidth(row[i]))
		}
	}
	for r, row := range cells {
		if r == 0 && p.plain && empty {
			continue
		}
		p.row(row, width, align)
		if r == 0 && !p.plain {
			p.b.WriteByte('|')
			for i, w := range width {
				if align[i] != 'l' {
					p.b.WriteString(strings.Repeat("-", w+1) + ":|")
				} else {
					p.b.WriteString(strings.Repeat("-", w+2) + "|")
				}
			}
			p.b.WriteByte('\n')
		}
	}
}

func (p *pageWriter) row(row []string, width []int, align string) {
	var b strings.Builder
	for i, c := range row {
		room := strings.Repeat(" ", width[i]-runewidth.StringWidth(c))
		if align[i] != 'l' {
			c = room + c
		} else {
			c += room
		}
		switch {
		case !p.plain:
			b.WriteString("| " + c + " ")
		case i > 0:
			b.WriteString("  " + c)
		default:
			b.WriteString(c)
		}
	}
	if !p.plain {
		b.WriteByte('|')
	}
	p.b.WriteString(strings.TrimRight(b.String(), " ") + "\n")
}

// render writes a line in the form of the page. indent goes before what a break
// puts on a new line.
func (p *pageWriter) render(l Line, indent string, cell bool) string {
	var b strings.Builder
	for _, x := range l {
		text := clean(x.Text, false)
		switch {
		case x.Face == NewLine && cell:
			b.WriteString("; ")
		case x.Face == NewLine && p.plain:
			b.WriteString("\n" + indent)
		case x.Face == NewLine:
			b.WriteString("  \n" + indent)
		case text == "":
		case p.plain:
			b.WriteString(text)
		case x.Face == Linked:
			b.WriteString("[" + strings.ReplaceAll(escape(text, cell), "]", `\]`) + "](" + address(x.To) + ")")
		case x.Face == Mono:
			b.WriteString(codeSpan(text, cell))
		case x.Face == Bold:
			b.WriteString("**" + escape(text, cell) + "**")
		default:
			b.WriteString(escape(text, cell))
		}
	}
	return b.String()
}

// clean turns line ends and control characters into blanks, and those that turn
// the direction of writing, so that no text can write over another.
func clean(s string, lines bool) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r == '\n' && lines:
			return r
		case r < 32 || r == 127 || r >= 0x80 && r < 0xa0:
			return ' '
		case r == 0x202d || r == 0x202e || r >= 0x2066 && r <= 0x2069 || r == 0x2028 || r == 0x2029:
			return ' '
		}
		return r
	}, s)
}

// escape writes words so that Markdown shows them as they are, with as few marks
// as that takes: pages are read as text too.
func escape(s string, cell bool) string {
	var b strings.Builder
	letter := func(i int) bool {
		if i < 0 || i >= len(s) {
			return false
		}
		c := s[i]
		return c >= '0' && c <= '9' || c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' || c >= 0x80
	}
	for i := 0; i < len(s); i++ {
		mark := false
		switch c := s[i]; c {
		case '\\', '`', '*', '[', '~':
			mark = true
		case '_':
			mark = !letter(i-1) || !letter(i+1) // inside a word it is a letter
		case '<':
			mark = letter(i+1) || i+1 < len(s) && strings.IndexByte("/!?", s[i+1]) >= 0
		case '&':
			mark = letter(i+1) || i+1 < len(s) && s[i+1] == '#'
		case '|':
			mark = cell
		}
		if mark {
			b.WriteByte('\\')
		}
		b.WriteByte(s[i])
	}
	return b.String()
}

// codeSpan writes text between as many backticks as it takes.
func codeSpan(s string, cell bool) string {
	if cell {
		s = strings.ReplaceAll(s, "|", `\|`)
	}
	fence, gap := "`", ""
	for strings.Contains(s, fence) {
		fence, gap = fence+"`", " "
	}
	return fence + gap + s + gap + fence
}

// address writes an address so that it ends where it ends.
func address(s string) string {
	var b strings.Builder
	for i := 0; i < len(s); i++ {
		switch c := s[i]; {
		case c <= ' ' || c >= 0x7f || strings.IndexByte("<>()|\\`\"", c) >= 0:
			fmt.Fprintf(&b, "%%%02X", c)
		default:
			b.WriteByte(c)
		}
	}
	return b.String()
}

// guardStart keeps the first letters of a paragraph from being taken for the mark
// of a heading, a list or a quotation.
func guardStart(s string) string {
	if s == "" {
		return s
	}
	switch c := s[0]; {
	case c == '#' || c == '>' || (c == '-' || c == '+') && (len(s) == 1 || s[1] == ' ' || s[1] == c):
		return `\` + s
	case c >= '0' && c <= '9':
		n := len(s) - len(strings.TrimLeft(s, "0123456789"))
		if n < len(s) && (s[n] == '.' || s[n] == ')') && (n+1 == len(s) || s[n+1] == ' ') {
			return s[:n] + `\` + s[n:]
		}
	}
	return s
}
