package lang

// Kind tells tokens apart.
type Kind uint8

// The kinds of token. Every byte of a text belongs to exactly one token, so
// joining the tokens gives the text back.
const (
	EOF        Kind = iota
	Bad             // bytes that no rule of the language accepts
	Blank           // spaces, tabs, a byte-order mark
	Newline         // \n, \r\n or \r
	Comment         // from # to the end of the line
	Name            // a word: keyword or name, dots included ("A1.N_Ed")
	Number          // 1, 2.5, 1_000, 8.67e-7
	Unit            // the unit after a number, written without spaces
	String          // "…", quotes included
	OpenBrace       // {
	CloseBrace      // }
	OpenParen       // (
	CloseParen      // )
	Comma           // ,
	Semicolon       // ;
	Equals          // =
	Operator        // + - * / ^ and < <= > >= == !=
)

var kindNames = [...]string{
	EOF: "end of file", Bad: "unreadable text", Blank: "blank", Newline: "end of line", Comment: "comment", Name: "word",
	Number: "number", Unit: "unit", String: "quoted text", OpenBrace: "{", CloseBrace: "}", OpenParen: "(", CloseParen: ")",
	Comma: ",", Semicolon: ";", Equals: "=", Operator: "operator",
}

// String names the kind as a message would.
func (k Kind) String() string { return kindNames[k] }

// Token is a piece of text with its kind. Start and End are byte offsets in
// the text that was scanned.
type Token struct {
	Kind       Kind
	Flaw       Flaw
	Start, End int32
}

// Span is the token's range.
func (t Token) Span() Span { return Span{t.Start, t.End} }

// Flaw says what is wrong with a token that could still be read for what it
// was meant to be.
type Flaw uint8

// The flaws that the lexer finds.
const (
	Sound         Flaw = iota
	OpenString         // no closing quote on the line
	CurlyQuotes        // typographic quotation marks
	DecimalComma       // 2,5 for 2.5
	BadNumber          // 1.2.3, 1__0, .5
	BadCharacters      // bytes that belong to nothing
	BadEncoding        // bytes that are not UTF-8
)
