package lang

import (
	"io"

	"github.com/alecthomas/participle/v2"
	"github.com/alecthomas/participle/v2/lexer"
)

// line is the grammar of a statement without its block: a row of parts. It is
// wide on purpose: a half-typed statement has a tree too, and which parts a
// statement wants is said by the reader of that statement, in words of the
// language and not of a grammar. It reads itself (participle's Parseable): the
// same production as a tagged struct, "@@*", ran at 5 MB/s instead of 10.
type line struct {
	parts []*Expr
	slab  []Expr // expressions are handed out from here, several to an allocation
}

var lineParser = participle.MustBuild[line](participle.Lexer(definition{}))

// Parse reads the parts of a line up to its end. It never fails: what cannot
// be read becomes a bad expression.
func (l *line) Parse(lex *lexer.PeekingLexer) error {
	r := exprReader{lex: lex, line: l}
	for !lex.Peek().EOF() {
		r.end = 0
		l.parts = append(l.parts, r.part())
	}
	return nil
}

func (l *line) expr(e Expr) *Expr {
	if len(l.slab) == cap(l.slab) {
		l.slab = make([]Expr, 0, min(8, 2*cap(l.slab)+2)) // most lines are short
	}
	l.slab = append(l.slab, e)
	return &l.slab[len(l.slab)-1]
}

// definition hands the tokens of Lexer to participle.
type definition struct{}

// Symbols names the token kinds for participle.
func (definition) Symbols() map[string]lexer.TokenType {
	symbols := map[string]lexer.TokenType{"EOF": lexer.EOF}
	for k := Bad; k <= Operator; k++ {
		symbols[k.String()] = tokenType(k)
	}
	return symbols
}

// Lex reads the text whole and scans it; blanks and comments are left out, as
// the grammar never looks at them.
func (definition) Lex(_ string, r io.Reader) (lexer.Lexer, error) {
	b, err := io.ReadAll(r)
	if err != nil {
		return nil, err
	}
	text := string(b)
	tokens := Tokens(text)
	kept := tokens[:0]
	for _, t := range tokens {
		if t.Kind != Blank && t.Kind != Comment && t.Kind != Newline {
			kept = append(kept, t)
		}
	}
	return &tokenSource{text: text, tokens: kept}, nil
}

func tokenType(k Kind) lexer.TokenType { return lexer.TokenType(k) + 1 }

func kindOf(t lexer.TokenType) Kind {
	if t == lexer.EOF {
		return EOF
	}
	return Kind(t - 1)
}

// tokenSource feeds tokens that were scanned before to participle.
type tokenSource struct {
	text   string
	tokens []Token
	next   int
}

func (s *tokenSource) Next() (lexer.Token, error) {
	if s.next >= len(s.tokens) {
		end := 0
		if n := len(s.tokens); n > 0 {
			end = int(s.tokens[n-1].End)
		}
		return lexer.EOFToken(lexer.Position{Offset: end}), nil
	}
	t := s.tokens[s.next]
	s.next++
	return lexer.Token{Type: tokenType(t.Kind), Value: s.text[t.Start:t.End], Pos: lexer.Position{Offset: int(t.Start)}}, nil
}
