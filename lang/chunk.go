package lang

import (
	"strings"
	"unicode/utf8"
)

// cut splits a text into the texts of its declarations. It looks at the first
// words of lines, at braces, brackets and quotes, and at nothing else: the rule
// must be so local that after an edit the same declarations come out wherever
// the text is the same.
//
// A line begins a declaration when it starts with one of the starter words, or
// when it has contents and no block, bracket or trailing comma of the lines
// before it is open. Comments and blank lines stay with what precedes them, and
// so does a line that starts with the brace of a block.
func cut(text string, emit func(start, end int)) {
	cutFrom(text, 0, func(start, end int) bool { emit(start, end); return true })
}

// cutFrom is cut from a place where a declaration begins. A declaration is
// handed out when its end is known; emit returns false to stop.
func cutFrom(text string, start int, emit func(start, end int) bool) {
	c := cutter{}
	for pos := start; pos < len(text); {
		end, next := lineEnd(text, pos)
		line := text[pos:end]
		if c.begins(line) {
			if pos > start {
				if !emit(start, pos) {
					return
				}
				start = pos
			}
			c.braces, c.parens, c.comma = 0, 0, false
		}
		c.read(line)
		pos = next
	}
	if len(text) > start {
		emit(start, len(text))
	}
}

type cutter struct {
	braces, parens int
	comma          bool // the last line ended with a comma
}

// begins tells whether the line starts a declaration.
func (c *cutter) begins(line string) bool {
	rest := trimBlank(line)
	if rest == "" || rest[0] == '#' || rest[0] == '{' {
		return false
	}
	if StartsDeclaration(rest, c.braces > 0) {
		return true
	}
	return c.braces == 0 && c.parens == 0 && !c.comma
}

// StartsDeclaration tells whether a line (without leading blanks) begins a
// declaration even when a block or bracket is open.
func StartsDeclaration(line string, inBlock bool) bool {
	n := nameLength(line)
	if n == 0 || !starters[line[:n]] {
		return false
	}
	word, rest := line[:n], trimBlank(line[n:])
	if strings.HasPrefix(rest, "=") {
		return false
	}
	if inBlock && blockAssigned[word] {
		// "section mast" in a block is a property that lacks its sign; "section
		// mast = …" and "material cast {" are declarations.
		m := nameLength(rest)
		rest = trimBlank(rest[m:])
		return m > 0 && (strings.HasPrefix(rest, "=") || strings.HasPrefix(rest, "{"))
	}
	return true
}

// trimBlank takes away the blanks that a line begins with.
func trimBlank(s string) string {
	for s != "" {
		n := blankLength(s)
		if n == 0 {
			break
		}
		s = s[n:]
	}
	return s
}

// blankLength is the length in bytes of the blank that s begins with, 0 when it
// begins with something else. The blanks are those of the lexer.
func blankLength(s string) int {
	switch c := s[0]; {
	case c == ' ' || c == '\t':
		return 1
	case c < utf8.RuneSelf:
		return 0
	}
	if r, n := utf8.DecodeRuneInString(s); isWideBlank(r) {
		return n
	}
	return 0
}

// read follows the braces, brackets and trailing comma of a line.
func (c *cutter) read(line string) {
	last := byte(0)
	for i := 0; i < len(line); i++ {
		switch b := line[i]; b {
		case '#':
			i = len(line)
			continue
		case '"':
			if j := strings.IndexByte(line[i+1:], '"'); j >= 0 {
				i += j + 1
			} else {
				i = len(line) - braces(line[i+1:]) - 1
			}
			last = '"'
			continue
		case '{':
			c.braces++
			c.parens = 0
		case '}':
			c.braces = max(0, c.braces-1)
			c.parens = 0
		case '(':
			c.parens++
		case ')':
			c.parens = max(0, c.parens-1)
		default:
			if n := blankLength(line[i:]); n > 0 {
				i += n - 1
				continue
			}
		}
		last = line[i]
	}
	if last != 0 {
		c.comma = last == ','
	}
}

// lineEnd gives the end of the line that starts at pos and the start of the
// next one.
func lineEnd(text string, pos int) (end, next int) {
	i := strings.IndexAny(text[pos:], "\r\n")
	if i < 0 {
		return len(text), len(text)
	}
	end = pos + i
	if strings.HasPrefix(text[end:], "\r\n") {
		return end, end + 2
	}
	return end, end + 1 // a lone \r ends a line too
}
