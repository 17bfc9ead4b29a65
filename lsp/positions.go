package lsp

import (
	"unicode/utf8"

	"kern/lang"

	"go.lsp.dev/protocol"
)

// encoding is the unit in which the protocol counts the columns of a line.
type encoding uint8

const (
	utf16Units encoding = iota // the protocol's default
	utf8Units
	utf32Units
)

var encodingKinds = [...]protocol.PositionEncodingKind{
	utf16Units: protocol.PositionEncodingKindUTF16,
	utf8Units:  protocol.PositionEncodingKindUTF8,
	utf32Units: protocol.PositionEncodingKindUTF32,
}

// negotiate chooses the encoding: bytes where the client knows them, as that is
// what everything inside counts in, then UTF-16, which it must know.
func negotiate(client []protocol.PositionEncodingKind) encoding {
	best := utf16Units
	for _, kind := range client {
		switch {
		case kind == protocol.PositionEncodingKindUTF8:
			return utf8Units
		case kind == protocol.PositionEncodingKindUTF32 && len(client) == 1:
			best = utf32Units
		}
	}
	return best
}

// positions converts between byte offsets in a text and the protocol's lines
// and columns. It is the only place that does. Whatever does not exist in the
// text is clamped: a column behind the end of its line is the line's end, a
// line behind the last is the text's end, and the middle of a character is its
// beginning.
type positions struct {
	text *Text
	unit encoding
}

// position gives line and column of an offset.
func (p positions) position(offset int32) protocol.Position {
	offset = min(max(offset, 0), p.text.Len())
	line := p.text.Line(offset)
	start, end := p.text.LineSpan(line)
	offset = min(offset, end)
	s := p.text.s[start:end]
	column, at := int32(0), start
	for at < offset {
		width, units := p.next(s[at-start:])
		if at+width > offset {
			break // inside a character
		}
		at += width
		column += units
	}
	return protocol.Position{Line: uint32(line), Character: uint32(column)}
}

// offset gives the byte at a line and column.
func (p positions) offset(at protocol.Position) int32 {
	if int64(at.Line) >= int64(p.text.Lines()) {
		return p.text.Len()
	}
	start, end := p.text.LineSpan(int(at.Line))
	s := p.text.s[start:end]
	left, i := int64(at.Character), int32(0)
	for int(i) < len(s) {
		width, units := p.next(s[i:])
		if left < int64(units) {
			break
		}
		left -= int64(units)
		i += width
	}
	return start + i
}

// next gives the length of the first character of s in bytes and in units of
// the encoding. A byte that is no UTF-8 counts as one character.
func (p positions) next(s string) (width, units int32) {
	if s[0] < utf8.RuneSelf {
		return 1, 1
	}
	r, n := utf8.DecodeRuneInString(s)
	switch {
	case p.unit == utf8Units:
		return int32(n), int32(n)
	case p.unit == utf16Units && r >= 1<<16:
		return int32(n), 2
	}
	return int32(n), 1
}

// rangeOf converts a span of the text.
func (p positions) rangeOf(s lang.Span) protocol.Range {
	return protocol.Range{Start: p.position(s.Start), End: p.position(s.End)}
}

// spanOf converts a range. It is false for a range that ends before it begins.
func (p positions) spanOf(r protocol.Range) (lang.Span, bool) {
	s := lang.Span{Start: p.offset(r.Start), End: p.offset(r.End)}
	return s, s.Start <= s.End
}
