package lang

import (
	"strings"
	"unicode"
	"unicode/utf8"
)

// Lexer cuts a text into tokens. It is total (every text has a reading, flaws
// are marked on the tokens) and lossless (the tokens joined are the text).
type Lexer struct {
	text   string
	pos    int
	parens int
	// afterNumber is set when the last token was a number and at most one
	// blank has followed: that is where a unit may stand.
	afterNumber bool
}

// NewLexer starts at the beginning of the text.
func NewLexer(text string) *Lexer { return &Lexer{text: text} }

// Tokens reads the whole text. It is meant for small texts (a declaration, a
// line); the parser itself streams.
func Tokens(text string) []Token {
	l := NewLexer(text)
	var out []Token
	for {
		t := l.Next()
		if t.Kind == EOF {
			return out
		}
		out = append(out, t)
	}
}

// Next returns the next token; at the end EOF with an empty span, again and
// again.
func (l *Lexer) Next() Token {
	start := l.pos
	if start >= len(l.text) {
		return Token{Kind: EOF, Start: int32(start), End: int32(start)}
	}
	kind, flaw := l.scan()
	t := Token{Kind: kind, Flaw: flaw, Start: int32(start), End: int32(l.pos)}
	switch kind {
	case Number:
		l.afterNumber = true
	case Blank:
		// one blank, be it a no-break space of several bytes
		l.afterNumber = l.afterNumber && (l.pos-start == 1 || l.text[start] >= utf8.RuneSelf)
	default:
		l.afterNumber = false
	}
	return t
}

func (l *Lexer) scan() (Kind, Flaw) {
	c := l.text[l.pos]
	switch {
	case c == ' ' || c == '\t':
		l.skip(func(c byte) bool { return c == ' ' || c == '\t' })
		return Blank, Sound
	case c == '\n':
		l.pos++
		l.parens = 0 // a decimal comma is looked for line by line
		return Newline, Sound
	case c == '\r':
		l.pos++
		if l.pos < len(l.text) && l.text[l.pos] == '\n' {
			l.pos++
		}
		l.parens = 0
		return Newline, Sound
	case c == '#':
		l.skip(func(c byte) bool { return c != '\n' && c != '\r' })
		return Comment, Sound
	case c == '"':
		return l.quoted()
	case isDigit(c), c == '.' && l.pos+1 < len(l.text) && isDigit(l.text[l.pos+1]):
		return l.number()
	}
	l.pos++
	switch c {
	case '{':
		return OpenBrace, Sound
	case '}':
		return CloseBrace, Sound
	case '(':
		l.parens++
		return OpenParen, Sound
	case ')':
		l.parens = max(0, l.parens-1)
		return CloseParen, Sound
	case ',':
		return Comma, Sound
	case ';':
		return Semicolon, Sound
	case '+', '-', '*', '/', '^':
		return Operator, Sound
	case '=':
		if l.peek() == '=' {
			l.pos++
			return Operator, Sound
		}
		return Equals, Sound
	case '<', '>':
		if l.peek() == '=' {
			l.pos++
		}
		return Operator, Sound
	case '!':
		if l.peek() == '=' {
			l.pos++
			return Operator, Sound
		}
	}
	l.pos--
	if l.afterNumber {
		if n := unitLength(l.text[l.pos:]); n > 0 {
			l.pos += n
			return Unit, Sound
		}
	}
	if n := nameLength(l.text[l.pos:]); n > 0 {
		l.pos += n
		return Name, Sound
	}
	return l.bad()
}

func (l *Lexer) peek() byte {
	if l.pos < len(l.text) {
		return l.text[l.pos]
	}
	return 0
}

func (l *Lexer) skip(while func(byte) bool) {
	for l.pos < len(l.text) && while(l.text[l.pos]) {
		l.pos++
	}
}

func (l *Lexer) quoted() (Kind, Flaw) {
	start := l.pos
	l.pos++
	for l.pos < len(l.text) {
		switch l.text[l.pos] {
		case '"':
			l.pos++
			return String, Sound
		case '\n', '\r':
			l.pos -= braces(l.text[start+1 : l.pos])
			return String, OpenString
		}
		l.pos++
	}
	l.pos -= braces(l.text[start+1 : l.pos])
	return String, OpenString
}

// braces is the length of the braces, and of the blanks around them, that a text
// ends with when its quote does not close: they are the block's, so that the text
// breaks itself alone.
func braces(text string) int {
	rest := strings.TrimRight(text, "{} \t")
	if strings.IndexAny(text[len(rest):], "{}") < 0 {
		return 0
	}
	return len(text) - len(rest)
}

// number reads digits, one point, one exponent; what sticks to it and cannot
// belong to a unit makes it a bad number as a whole, so that "1.2.3" is one
// mistake and not three tokens.
func (l *Lexer) number() (Kind, Flaw) {
	flaw := Sound
	points := 0
	last := byte(0)
	for l.pos < len(l.text) {
		c := l.text[l.pos]
		switch {
		case isDigit(c):
		case c == '_':
			if !isDigit(last) {
				flaw = BadNumber
			}
		case c == '.':
			points++
			if !isDigit(last) || points > 1 {
				flaw = BadNumber
			}
			if l.pos+1 >= len(l.text) || !isDigit(l.text[l.pos+1]) {
				flaw = BadNumber // "5." leaves the reader guessing
			}
		case c == ',' && l.parens == 0 && isDigit(last) && l.pos+1 < len(l.text) && isDigit(l.text[l.pos+1]):
			if flaw == Sound {
				flaw = DecimalComma
			}
		case (c == 'e' || c == 'E') && isDigit(last) && exponentLength(l.text[l.pos:]) > 0:
			l.pos += exponentLength(l.text[l.pos:])
			return Number, flaw
		default:
			if last == '_' {
				flaw = BadNumber
			}
			return Number, flaw
		}
		last = c
		l.pos++
	}
	if last == '_' {
		flaw = BadNumber
	}
	return Number, flaw
}

// exponentLength is the length of "e-7" at the start of s, 0 when the e begins
// something else.
func exponentLength(s string) int {
	i := 1
	if i < len(s) && (s[i] == '+' || s[i] == '-') {
		i++
	}
	first := i
	for i < len(s) && isDigit(s[i]) {
		i++
	}
	if i == first {
		return 0
	}
	if i < len(s) && (s[i] == '_' || s[i] < utf8.RuneSelf && isLetter(rune(s[i]))) {
		return 0
	}
	return i
}

// unitLength is the length of the unit at the start of s: letters, % or °,
// digits and superscripts, joined by * / · ^ without spaces. A word of the
// language ("at", "about") is no unit. A unit that would start with an operator
// has length 0.
func unitLength(s string) int {
	i := 0
	first := true
	for i < len(s) {
		n := atomLength(s[i:])
		if n == 0 {
			break
		}
		i += n
		if first && joinWords[s[:i]] {
			return 0
		}
		// kip-ft and its kin: the only hyphens in units.
		if h := hyphenLength(s, i); h > 0 {
			i += h
		}
		first = false
		// an operator belongs to the unit only with a letter right behind it
		op := 0
		switch {
		case i < len(s) && (s[i] == '*' || s[i] == '/'):
			op = 1
		case i+1 < len(s) && s[i:i+2] == "·":
			op = 2
		}
		if op == 0 || i+op >= len(s) || atomLength(s[i+op:]) == 0 {
			break
		}
		i += op
	}
	return i
}

func hyphenLength(s string, i int) int {
	switch s[:i] {
	case "kip", "lbf":
		if len(s) >= i+3 && (s[i:i+3] == "-ft" || s[i:i+3] == "-in") && nameLength(s[i+1:]) == 2 {
			return 3
		}
	}
	return 0
}

// atomLength is the length of one unit word with its exponent ("mm2", "m²",
// "in^4", "%", "°").
func atomLength(s string) int {
	i := 0
	for i < len(s) {
		r, n := decode(s[i:])
		if !(isLetter(r) || r == '_' || r == '%' || r == '‰' || r == '°') {
			break
		}
		i += n
	}
	if i == 0 {
		return 0
	}
	if i+1 < len(s) && s[i] == '^' && isDigit(s[i+1]) {
		i++
	}
	for i < len(s) {
		r, n := decode(s[i:])
		if !(r < utf8.RuneSelf && isDigit(byte(r)) || isSuperscript(r) || isLetter(r) || r == '_') {
			break
		}
		i += n
	}
	return i
}

// nameLength is the length of the word at the start of s: a letter or _, then
// letters, digits and _; a dot joins when a letter follows it.
func nameLength(s string) int {
	i := 0
	for i < len(s) {
		c := s[i]
		if 'a' <= c && c <= 'z' || 'A' <= c && c <= 'Z' || c == '_' || i > 0 && isDigit(c) {
			i++
			continue
		}
		if c == '.' && i > 0 && i+1 < len(s) {
			if r, _ := decode(s[i+1:]); isLetter(r) {
				i++
				continue
			}
			break
		}
		if c < utf8.RuneSelf {
			break
		}
		r, n := decode(s[i:])
		if !isLetter(r) {
			break
		}
		i += n
	}
	return i
}

func (l *Lexer) bad() (Kind, Flaw) {
	r, n := utf8.DecodeRuneInString(l.text[l.pos:])
	if r == utf8.RuneError && n == 1 {
		for l.pos < len(l.text) {
			if r, n := utf8.DecodeRuneInString(l.text[l.pos:]); r != utf8.RuneError || n != 1 {
				break
			}
			l.pos++
		}
		return Bad, BadEncoding
	}
	l.pos += n
	if isWideBlank(r) {
		return Blank, Sound
	}
	switch r {
	case '“', '”', '„', '«', '»':
		for l.pos < len(l.text) {
			r, n := utf8.DecodeRuneInString(l.text[l.pos:])
			if r == '\n' || r == '\r' {
				break
			}
			l.pos += n
			if r == '“' || r == '”' || r == '«' || r == '»' || r == '"' {
				return String, CurlyQuotes
			}
		}
		return Bad, BadCharacters
	}
	return Bad, BadCharacters
}

// isWideBlank tells the blanks beside space and tab: the byte-order mark and
// those that word processors make.
func isWideBlank(r rune) bool {
	return r == '\ufeff' || r == '\u00a0' || r == '\u202f' || r == '\u2009'
}

func isDigit(c byte) bool { return '0' <= c && c <= '9' }

func isLetter(r rune) bool {
	if r < utf8.RuneSelf {
		return 'a' <= r && r <= 'z' || 'A' <= r && r <= 'Z'
	}
	return r != utf8.RuneError && unicode.IsLetter(r)
}

func isSuperscript(r rune) bool {
	return r == '²' || r == '³' || r == '¹' || r == '⁰' || '⁴' <= r && r <= '⁹'
}

func decode(s string) (rune, int) {
	if s == "" {
		return utf8.RuneError, 0
	}
	if s[0] < utf8.RuneSelf {
		return rune(s[0]), 1
	}
	return utf8.DecodeRuneInString(s)
}
