package lsp

import (
	"slices"
	"sort"
)

// Text is an immutable text that knows where its lines begin. Lines end with
// \n, \r\n or \r, as they do for the language itself.
type Text struct {
	s      string
	starts []int32 // of each line, in bytes; the first is 0
}

// NewText reads the line ends of a text.
func NewText(s string) *Text {
	t := &Text{s: s, starts: []int32{0}}
	t.starts = appendStarts(t.starts, s, 1, int32(len(s)))
	return t
}

// appendStarts appends the offsets p in [from, to] at which a line of s begins.
func appendStarts(starts []int32, s string, from, to int32) []int32 {
	for p := max(from, 1); p <= min(to, int32(len(s))); p++ {
		switch s[p-1] {
		case '\n':
			starts = append(starts, p)
		case '\r':
			if int(p) == len(s) || s[p] != '\n' {
				starts = append(starts, p)
			}
		}
	}
	return starts
}

// String is the text itself.
func (t *Text) String() string { return t.s }

// Len is the length in bytes.
func (t *Text) Len() int32 { return int32(len(t.s)) }

// Lines is the number of lines; an empty text has one.
func (t *Text) Lines() int { return len(t.starts) }

// Line is the number of the line, from 0, in which an offset lies. Offsets
// outside the text count as its ends.
func (t *Text) Line(offset int32) int {
	offset = min(max(offset, 0), t.Len())
	return sort.Search(len(t.starts), func(i int) bool { return t.starts[i] > offset }) - 1
}

// LineSpan is the range of a line without its end. Lines that do not exist are
// empty ranges at the ends of the text.
func (t *Text) LineSpan(line int) (start, end int32) {
	switch {
	case line < 0:
		return 0, 0
	case line >= len(t.starts):
		return t.Len(), t.Len()
	}
	start, end = t.starts[line], t.Len()
	if line+1 < len(t.starts) {
		end = t.starts[line+1]
	}
	for end > start && (t.s[end-1] == '\n' || t.s[end-1] == '\r') {
		end--
	}
	return start, end
}

// Replace gives the text with the bytes from start to end replaced. The offsets
// must lie in the text, in order. Only the lines that the change touches are
// read again: a line begins at p by what stands at p-1 and p alone.
func (t *Text) Replace(start, end int32, with string) *Text {
	grow := int32(len(with)) - (end - start)
	out := &Text{s: t.s[:start] + with + t.s[end:]}
	head, _ := slices.BinarySearch(t.starts, start)
	tail, found := slices.BinarySearch(t.starts, end)
	if found {
		tail++
	}
	head = max(head, 1) // the first line always begins at 0
	tail = max(tail, head)
	out.starts = make([]int32, head, len(t.starts)+16)
	copy(out.starts, t.starts[:head])
	out.starts = appendStarts(out.starts, out.s, start, start+int32(len(with)))
	for _, s := range t.starts[tail:] {
		out.starts = append(out.starts, s+grow)
	}
	return out
}
