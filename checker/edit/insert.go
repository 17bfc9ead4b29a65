// Package edit makes changes of calculations as text: lines put where they
// belong in a member's block, with the file's own line ends and layout.
package edit

import (
	"slices"
	"strings"

	"kern/lang"
)

// order is the place of a statement in a member's block: lines are put behind
// those that come before them in the table of forms.
var order = lang.WordsIn(lang.InMember)

func rank(word string) int {
	if word == "length" || word == "from" {
		word = "height" // one or the other
	}
	return slices.Index(order, word)
}

// Insert gives the change of a declaration's text that puts lines of one word
// into the block of a statement. It is false where the block is not closed, as
// nobody can tell then where it ends.
func Insert(text string, s *lang.Stmt, lines ...string) (lang.Change, bool) {
	at := func(offset int32, new string) (lang.Change, bool) {
		return lang.Change{Span: lang.Span{Start: offset, End: offset}, New: new}, true
	}
	if s.Body == nil {
		return at(s.Line.End, " {\n    "+strings.Join(lines, "\n    ")+"\n}")
	}
	open, end := s.Body.Span.Start+1, s.Body.Span.End-1
	if end < open || int(end) >= len(text) || text[end] != '}' {
		return lang.Change{}, false
	}
	inner := s.Body.Stmts
	word, _, _ := strings.Cut(lines[0], " ")
	i := len(inner)
	for i > 0 && rank(word) >= 0 && rank(inner[i-1].Word) > rank(word) {
		i--
	}
	if !strings.ContainsAny(text[open:end], "\r\n") {
		together := strings.Join(lines, "; ")
		switch {
		case len(inner) == 0:
			return lang.Change{Span: lang.Span{Start: open, End: end}, New: " " + together + " "}, true
		case i == len(inner):
			return at(inner[i-1].Span.End, "; "+together)
		}
		return at(inner[i].Span.Start, together+"; ")
	}
	before := open // what the new lines come behind
	indent := IndentOf(text, s.Span.Start) + "    "
	if i > 0 {
		before = inner[i-1].Span.End
	}
	if len(inner) > 0 && First(text, inner[max(i-1, 0)].Span.Start) {
		indent = IndentOf(text, inner[max(i-1, 0)].Span.Start)
	}
	if to, ok := Rest(text, before); ok {
		return at(to, "\n"+indent+strings.Join(lines, "\n"+indent))
	}
	together := strings.Join(lines, "; ")
	switch {
	case i > 0:
		return at(before, "; "+together)
	case len(inner) > 0:
		return at(inner[0].Span.Start, together+"; ")
	}
	return at(before, "\n"+indent+strings.Join(lines, "\n"+indent)+"\n")
}

// First tells whether a place is the first of its line that is not blank.
func First(text string, offset int32) bool {
	return strings.Trim(text[LineStart(text, offset):offset], " \t") == ""
}

// Rest gives the end of the line that a place stands in, if nothing but blanks,
// semicolons and a comment follows it there.
func Rest(text string, offset int32) (int32, bool) {
	end := int32(len(text))
	if i := strings.IndexAny(text[offset:], "\r\n"); i >= 0 {
		end = offset + int32(i)
	}
	tail := strings.TrimLeft(text[offset:end], " \t;")
	return end, tail == "" || tail[0] == '#'
}

// LineStart is where the line of a place begins.
func LineStart(text string, offset int32) int32 {
	return int32(strings.LastIndexAny(text[:offset], "\r\n") + 1)
}

// IndentOf is what the line of a place begins with.
func IndentOf(text string, offset int32) string {
	line := text[LineStart(text, offset):]
	return line[:len(line)-len(strings.TrimLeft(line, " \t"))]
}
