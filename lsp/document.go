package lsp

import (
	"strings"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// document is one state of a text that the editor has open. It is immutable: a
// change makes a new one.
type document struct {
	uri     uri.URI
	path    string // "" for a text that is no file
	version int32
	text    *Text
	// lost is set when a change could not be applied: what the editor shows is
	// not known until it sends the whole text.
	lost bool
	// typing is shared by the states of a document.
	typing *typing
}

// scratchName is the name of a text that is no file, in its workspace of one.
// Names are paths, so the scheme keeps it apart from any file.
func scratchName(u uri.URI) string { return string(u) }

// changed applies the changes of one notification, in order. The edits that it
// returns are those of the text, for whoever follows offsets through it.
func (d *document) changed(version int32, changes []protocol.TextDocumentContentChangeEvent, unit encoding) (*document, []textEdit) {
	next := *d
	next.version = version
	var edits []textEdit
	for _, c := range changes {
		switch c := c.(type) {
		case *protocol.TextDocumentContentChangeWholeDocument:
			edits = append(edits, textEdit{0, next.text.Len(), int32(len(c.Text))})
			next.text, next.lost = NewText(strings.Clone(c.Text)), false
		case *protocol.TextDocumentContentChangePartial:
			if next.lost {
				continue
			}
			span, ok := positions{next.text, unit}.spanOf(c.Range)
			if !ok || int64(next.text.Len())+int64(len(c.Text)) > maxText {
				next.lost = true
				continue
			}
			edits = append(edits, textEdit{span.Start, span.End, int32(len(c.Text))})
			next.text = next.text.Replace(span.Start, span.End, c.Text)
		default:
			next.lost = true
		}
	}
	return &next, edits
}

// maxText is the longest text that is kept, in bytes: offsets have 32 bits.
const maxText = 1 << 30

// textEdit is a replacement of the bytes from start to end by grown bytes.
type textEdit struct{ start, end, with int32 }

// move follows an offset through the edit. What was replaced moves to its
// beginning.
func (e textEdit) move(offset int32) int32 {
	switch {
	case offset >= e.end:
		return offset + e.with - (e.end - e.start)
	case offset > e.start:
		return e.start
	}
	return offset
}
