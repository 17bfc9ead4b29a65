package lang

import (
	"sort"
	"unicode/utf8"
)

// Lines finds lines and columns in a text. Line ends are \n, \r\n and \r.
type Lines struct {
	text   string
	starts []int32
}

// NewLines reads the line ends of a text.
func NewLines(text string) *Lines {
	l := &Lines{text: text, starts: []int32{0}}
	for i := 0; i < len(text); i++ {
		switch text[i] {
		case '\r':
			if i+1 < len(text) && text[i+1] == '\n' {
				continue
			}
			l.starts = append(l.starts, int32(i+1))
		case '\n':
			l.starts = append(l.starts, int32(i+1))
		}
	}
	return l
}

// Count is the number of lines; an empty text has one.
func (l *Lines) Count() int { return len(l.starts) }

// Line is the number of the line, from 0, in which an offset lies.
func (l *Lines) Line(offset int32) int {
	offset = min(max(offset, 0), int32(len(l.text)))
	return sort.Search(len(l.starts), func(i int) bool { return l.starts[i] > offset }) - 1
}

// Start is where a line begins; lines beyond the last begin at the end.
func (l *Lines) Start(line int) int32 {
	switch {
	case line < 0:
		return 0
	case line >= len(l.starts):
		return int32(len(l.text))
	}
	return l.starts[line]
}

// Text is a line without its line end.
func (l *Lines) Text(line int) string {
	start, end := l.Start(line), l.Start(line+1)
	for end > start && (l.text[end-1] == '\n' || l.text[end-1] == '\r') {
		end--
	}
	return l.text[start:end]
}

// Position gives line and column of an offset as people count them: from 1, the
// column in characters.
func (l *Lines) Position(offset int32) (line, column int) {
	offset = min(max(offset, 0), int32(len(l.text)))
	n := l.Line(offset)
	return n + 1, utf8.RuneCountInString(l.text[l.starts[n]:offset]) + 1
}
