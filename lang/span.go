// Package lang is the language of column calculations as text: tokens,
// statements, a tree with byte spans, expressions with dimensions, and the
// formatter. It knows the words of the language but nothing of engineering,
// and it reads no disk and no clock.
package lang

// Span is a half-open range of bytes. Inside a tree it counts from the start
// of the declaration it belongs to, so that an unchanged declaration keeps its
// spans wherever an edit elsewhere moves it.
type Span struct{ Start, End int32 }

// Join returns the smallest span that covers both.
func (s Span) Join(t Span) Span {
	return Span{min(s.Start, t.Start), max(s.End, t.End)}
}

// Len is the number of bytes in the span.
func (s Span) Len() int { return int(s.End - s.Start) }

// Contains tells whether the offset lies in the span or at its end, which is
// where a cursor behind the last letter of a word stands.
func (s Span) Contains(offset int32) bool { return s.Start <= offset && offset <= s.End }

// Of cuts the span out of a text; a span that does not fit gives "".
func (s Span) Of(text string) string {
	if s.Start < 0 || s.End < s.Start || int(s.End) > len(text) {
		return ""
	}
	return text[s.Start:s.End]
}

// Place is a span in a declaration: it stays true while the declaration's own
// text does not change.
type Place struct {
	Decl *Decl
	Span Span
}
