package lang

import (
	"strings"
	"testing"
)

// checkTokens holds a text against what the lexer promises: every byte in
// exactly one token, none of them empty.
func checkTokens(t testing.TB, text string) {
	t.Helper()
	l := NewLexer(text)
	end := int32(0)
	var joined strings.Builder
	for range len(text) + 1 {
		token := l.Next()
		if token.Kind == EOF {
			break
		}
		if token.Start != end || token.End <= token.Start || int(token.End) > len(text) {
			t.Fatalf("%q: token %v from %d to %d follows on %d", text, token.Kind, token.Start, token.End, end)
		}
		if token.Kind == Bad && token.Flaw == Sound {
			t.Fatalf("%q: unreadable text from %d to %d has no flaw", text, token.Start, token.End)
		}
		end = token.End
		joined.WriteString(token.Span().Of(text))
	}
	if joined.String() != text {
		t.Fatalf("%q: the tokens give %q", text, joined.String())
	}
	for range 2 {
		if token := l.Next(); token.Kind != EOF || int(token.Start) != len(text) || token.Start != token.End {
			t.Fatalf("%q: after the end comes %v from %d to %d", text, token.Kind, token.Start, token.End)
		}
	}
}

func TestLexerProperties(t *testing.T) {
	for seed := range uint64(5000) {
		checkTokens(t, random(seed))
	}
	for _, s := range seeds {
		for i := range len(s) {
			checkTokens(t, s[i:]) // cuts through characters too
		}
	}
}

func FuzzLexer(f *testing.F) {
	for _, s := range seeds {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, text string) { checkTokens(t, text) })
}

// write shows tokens as "kind:text", blanks left out.
func write(text string) string {
	short := map[Kind]string{Bad: "bad", Newline: "end", Comment: "comment", Name: "name", Number: "number", Unit: "unit", String: "text",
		OpenBrace: "brace", CloseBrace: "brace", OpenParen: "paren", CloseParen: "paren", Comma: "comma", Semicolon: "semicolon", Equals: "equals", Operator: "op"}
	var out []string
	for _, t := range Tokens(text) {
		if t.Kind == Blank {
			continue
		}
		s := short[t.Kind] + ":" + t.Span().Of(text)
		if t.Flaw != Sound {
			s += "!"
		}
		out = append(out, s)
	}
	return strings.Join(out, " ")
}

func TestLexerTable(t *testing.T) {
	for _, c := range []struct{ text, want string }{
		// units stand behind a number with one blank at most
		{"5 kN", "number:5 unit:kN"},
		{"5kN", "number:5 unit:kN"},
		{"5  kN", "number:5 name:kN"},
		{"5\tkN", "number:5 unit:kN"},
		{"5\u00a0kN", "number:5 unit:kN"},
		{"5\u202fkN", "number:5 unit:kN"},
		{"5\u2009kN", "number:5 unit:kN"},
		{"5\nkN", "number:5 end:\n name:kN"},
		{"5 # c\nkN", "number:5 comment:# c end:\n name:kN"},
		{"5 kN/m2", "number:5 unit:kN/m2"},
		{"5 kN / m2", "number:5 unit:kN op:/ name:m2"},
		{"5 kN/ m2", "number:5 unit:kN op:/ name:m2"},
		{"5 kN*m", "number:5 unit:kN*m"},
		{"5 kN·m", "number:5 unit:kN·m"},
		{"5 kN*2", "number:5 unit:kN op:* number:2"},
		{"5 mm^4", "number:5 unit:mm^4"},
		{"5 mm⁴", "number:5 unit:mm⁴"},
		{"5 m^-2", "number:5 unit:m op:^ op:- number:2"},
		{"5%", "number:5 unit:%"},
		{"30°", "number:30 unit:°"},
		{"5 kip-ft", "number:5 unit:kip-ft"},
		{"5 kip - ft", "number:5 unit:kip op:- name:ft"},
		{"5 kip-feet", "number:5 unit:kip op:- name:feet"},
		{"14 ft 6 in", "number:14 unit:ft number:6 unit:in"},
		// words of the language are no units
		{"0 at top", "number:0 name:at name:top"},
		{"0.85 about minor", "number:0.85 name:about name:minor"},
		{"5 because", "number:5 name:because"},
		{"5 atm", "number:5 unit:atm"},
		{"3 top", "number:3 name:top"},
		// numbers
		{"1_000", "number:1_000"},
		{"1__0", "number:1__0!"},
		{"1_", "number:1_!"},
		{".5", "number:.5!"},
		{"5.", "number:5.!"},
		{"1.2.3", "number:1.2.3!"},
		{"2,5", "number:2,5!"},
		{"2, 5", "number:2 comma:, number:5"},
		{"1,234,567", "number:1,234,567!"},
		{"(2,5)", "paren:( number:2 comma:, number:5 paren:)"},
		{"(\n2,5)", "paren:( end:\n number:2,5! paren:)"},
		{"8.67e-7", "number:8.67e-7"},
		{"1e3", "number:1e3"},
		{"1E+3 m", "number:1E+3 unit:m"},
		{"1e", "number:1 unit:e"},
		{"1e3x", "number:1 unit:e3x"},
		{"2e-", "number:2 unit:e op:-"},
		// words
		{"A1.N_Ed", "name:A1.N_Ed"},
		{"A1.5", "name:A1 number:.5!"},
		{"λ_1 = 柱", "name:λ_1 equals:= name:柱"},
		{"_x", "name:_x"},
		// signs
		{"a<=b>=c==d!=e<f>g", "name:a op:<= name:b op:>= name:c op:== name:d op:!= name:e op:< name:f op:> name:g"},
		{"= =", "equals:= equals:="},
		{"a ! b", "name:a bad:!! name:b"},
		// texts
		{`"a # b" # c`, `text:"a # b" comment:# c`},
		{"\"open\nx", "text:\"open! end:\n name:x"},
		{"\"open\r\nx", "text:\"open! end:\r\n name:x"},
		{"“curly” x", "text:“curly”! name:x"},
		{"„German“ x", "text:„German“! name:x"},
		{"«French» x", "text:«French»! name:x"},
		{"“open\nx", "bad:“open! end:\n name:x"},
		// line ends, blanks, bytes that are no text
		{"a\rb\r\nc\n", "name:a end:\r name:b end:\r\n name:c end:\n"},
		{"\ufeffa\ufeffb", "name:a name:b"},
		{"a\xff\xfeb", "name:a bad:\xff\xfe! name:b"},
		{"a § b", "name:a bad:§! name:b"},
		{"a\x00b", "name:a bad:\x00! name:b"},
		{"{;}", "brace:{ semicolon:; brace:}"},
	} {
		if got := write(c.text); got != c.want {
			t.Errorf("%q reads\n%s, want\n%s", c.text, got, c.want)
		}
		checkTokens(t, c.text)
	}
}
