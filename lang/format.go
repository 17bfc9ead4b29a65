package lang

import "strings"

const (
	indentWidth = 4   // columns of a block level
	inlineWidth = 100 // columns that a block on one line may reach
	commentGap  = 2   // columns between a line and its comment
)

const byteOrderMark = "\ufeff"

// Format lays a text out in the one layout of the language. Only blanks, line
// ends and the semicolons that stand for line ends change; words, numbers,
// texts and comments stay byte for byte, and so do statements that cannot be
// read. A text that is laid out already comes back as it is.
func Format(text string) string {
	return FormatFile(Parse(&FileID{}, text, nil))
}

// FormatFile is Format for a text that was parsed before.
func FormatFile(f *File) string {
	out := layout(f)
	if out == f.Text {
		return out
	}
	// The layout is made so that it reads the same. It is read again all the
	// same: a number that changes its meaning because of a blank must not leave
	// this function.
	if !readsAs(f, out) {
		return f.Text
	}
	return out
}

// layout is FormatFile without the proof that the result reads the same.
func layout(f *File) string {
	if f.Unreadable != "" {
		return f.Text
	}
	w := formatter{text: f.Text, eol: lineEnding(f.Text)}
	w.pieces = make([]piece, 0, len(f.Text)/4)
	w.rows = make([]row, 0, len(f.Text)/24)
	for i, d := range f.Decls {
		w.declaration(d.Syntax, f.Starts[i])
	}
	w.separate()
	w.align()
	return w.write()
}

// formatter collects the rows of a file. Offsets count in the file's text.
type formatter struct {
	text   string
	eol    string
	pieces []piece
	rows   []row

	// the declaration that is being read
	tokens []placed
	units  []segment
	next   int // the token after those that were laid out

	newlines int  // line ends since the last thing that was laid out
	blank    bool // a blank line stood before a semicolon that vanished
	onLine   bool // the line of the last row has not ended
}

// placed is a token with the number of its line in the declaration.
type placed struct {
	Token
	line int32
}

// piece is a text that is written as it is, with what stands before it.
type piece struct {
	start, end int32
	gap        int32 // columns before it, when it does not begin a line
	kind       Kind
	breaks     uint8 // line ends before it, inside a statement: 2 with a blank line
}

type rowKind uint8

const (
	statementRow rowKind = iota
	braceRow             // a { that a comment keeps off the line of its statement
	closeRow             // }
	commentRow
	rawRow   // lines that stay as they are
	aloneRow // a declaration that stays as it is, line ends included
)

// row is a line of the result, or the lines of a statement that goes on.
type row struct {
	first, last int32 // its pieces
	level       int16 // of blocks around it; around its end for a raw row
	kind        rowKind
	blank       bool // a blank line stands before it
	opens       bool // the next row lies in a block that it opens
	heads       bool // a statement of the top level with a block of several lines begins
	closes      bool // one ends
	single      bool // a statement on one line
}

// lineEnding is the line end that prevails. Only lines count that the layout
// neither drops nor joins to another, so that the next run counts the same.
func lineEnding(text string) string {
	lf, cr := strings.Count(text, "\n"), strings.Count(text, "\r")
	if cr == 0 {
		return "\n"
	}
	if crlf := strings.Count(text, "\r\n"); crlf == lf && crlf == cr {
		return "\r\n"
	}
	count := map[string]int{}
	for pos := 0; pos < len(text); {
		end, next := lineEnd(text, pos)
		if rest := trimBlank(text[pos:end]); rest != "" && rest[0] != '{' && rest[0] != ';' {
			count[text[end:next]]++
		}
		pos = next
	}
	best := "\n"
	for _, e := range []string{"\r\n", "\r"} {
		if count[e] > count[best] {
			best = e
		}
	}
	return best
}

// write puts the rows together.
func (w *formatter) write() string {
	var b strings.Builder
	b.Grow(len(w.text) + len(w.text)/4)
	rest := w.text
	if strings.HasPrefix(rest, byteOrderMark) {
		if len(w.rows) == 0 || w.pieces[w.rows[0].first].start > 0 {
			b.WriteString(byteOrderMark) // what stays as it is holds the mark itself
		}
	}
	for i := range w.rows {
		r := &w.rows[i]
		if r.blank && i > 0 {
			b.WriteString(w.eol)
		}
		switch r.kind {
		case aloneRow:
			p := w.pieces[r.first]
			b.WriteString(w.text[p.start:p.end])
			if c := w.text[p.end-1]; c == '\n' || c == '\r' {
				continue
			}
		case rawRow:
			p := w.pieces[r.first]
			b.WriteString(w.text[p.start:p.end])
		default:
			w.line(&b, r)
		}
		b.WriteString(w.eol)
	}
	return b.String()
}

const spaces = "                                                                "

func pad(b *strings.Builder, n int) {
	for ; n > len(spaces); n -= len(spaces) {
		b.WriteString(spaces)
	}
	b.WriteString(spaces[:n])
}

// line writes the pieces of a row; lines that a statement goes on to stand one
// level deeper.
func (w *formatter) line(b *strings.Builder, r *row) {
	indent := int(r.level) * indentWidth
	for i, p := range w.pieces[r.first:r.last] {
		switch {
		case i == 0:
			pad(b, indent)
		case p.breaks > 0:
			for range p.breaks {
				b.WriteString(w.eol)
			}
			pad(b, indent+indentWidth)
		default:
			pad(b, int(p.gap))
		}
		b.WriteString(w.text[p.start:p.end])
	}
}
