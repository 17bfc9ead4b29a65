package complete

import (
	"strings"

	"kern/lang"
)

// caret is a place where somebody types: which statement it is in, what stands
// before it there, and the word that is being typed. Offsets count in bytes of
// the file.
type caret struct {
	text   string // of the file
	offset int32

	in     lang.Context
	decl   *lang.Decl   // nil in an empty file
	parent *lang.Stmt   // whose block the statement stands in, nil between declarations
	member *lang.Stmt   // the member that the place lies in, nil for none
	stmt   *lang.Stmt   // the statement itself as the tree has it, nil for none
	start  int32        // where the statement begins
	head   string       // its first word; "" while that is being typed
	before []*lang.Expr // the parts between the first word and the word being typed
	after  []*lang.Expr // the parts behind the word being typed
	// word is what is being typed, up to the caret, and whole what stands there,
	// beyond the caret too. In a quoted text both lie inside the quotes.
	word, whole lang.Span
	quoted      bool // inside a quoted text
	closed      bool // and the text has its closing quote
	// number is set behind a number to which the word is the unit; before then
	// ends with the number.
	number bool
	// fresh is set where a number ends and no blank follows.
	fresh bool
}

// newCaret reads a place of a file. It is false in a comment and inside of what
// has no words: a number, a sign.
func newCaret(tree *lang.File, offset int32) (*caret, bool) {
	c := &caret{text: tree.Text, offset: min(max(offset, 0), int32(len(tree.Text))), in: lang.InFile}
	if tree.Unreadable != "" {
		return nil, false
	}
	at, found := tree.At(c.offset)
	from := c.lineStart()
	if found {
		c.decl = at.Decl
		stmts := at.Stmts
		if n := len(stmts); n > 0 && !at.Inside {
			c.stmt, stmts = stmts[n-1], stmts[:n-1]
			from = min(from, at.Start+c.stmt.Span.Start)
		}
		c.surroundings(stmts)
	}
	return c, c.read(from)
}

func (c *caret) lineStart() int32 {
	return int32(strings.LastIndexAny(c.text[:c.offset], "\r\n") + 1)
}

// lineEnd is the end of the line that an offset lies in.
func (c *caret) lineEnd(offset int32) int32 {
	if i := strings.IndexAny(c.text[offset:], "\r\n"); i >= 0 {
		return offset + int32(i)
	}
	return int32(len(c.text))
}

// surroundings finds the kind of block that the statement stands in.
func (c *caret) surroundings(outer []*lang.Stmt) {
	for _, s := range outer {
		switch s.Word {
		case "column", "strut", "tie":
			c.member = s
		}
	}
	if len(outer) == 0 {
		return
	}
	c.parent = outer[len(outer)-1]
	switch c.parent.Word {
	case "project":
		c.in = lang.InProject
	case "basis":
		c.in = lang.InBasis
	case "level":
		c.in = lang.InLevel
	case "column", "strut", "tie":
		c.in = lang.InMember
	case "lift":
		c.in = lang.InLift
	case "material":
		c.in = lang.InMaterial
	case "section":
		c.in = lang.InSection
	default:
		c.in = "" // a block that the language does not have
	}
}

// read goes through the tokens from where the statement can begin to the end of
// the line.
func (c *caret) read(from int32) bool {
	end := c.lineEnd(c.offset)
	tokens := lang.Tokens(c.text[from:end])
	for i := range tokens {
		tokens[i].Start += from
		tokens[i].End += from
	}
	c.start = from
	c.word = lang.Span{Start: c.offset, End: c.offset}
	c.whole = c.word
	for i, t := range tokens {
		if t.Start >= c.offset {
			break
		}
		switch t.Kind {
		case lang.Comment:
			if t.End >= c.offset {
				return false
			}
		case lang.OpenBrace, lang.CloseBrace, lang.Semicolon:
			c.start = t.End
		}
		if t.End < c.offset {
			continue
		}
		// the caret lies in the token or behind its last letter
		switch t.Kind {
		case lang.Name, lang.Unit, lang.Bad:
			c.word.Start, c.whole = t.Start, t.Span()
			if dot := t.Kind == lang.Bad && c.text[t.Start:t.End] == "."; dot && i > 0 && tokens[i-1].Kind == lang.Name && tokens[i-1].End == t.Start {
				c.word.Start, c.whole.Start = tokens[i-1].Start, tokens[i-1].Start // A1. on its way to A1.N_Ed
			}
		case lang.String:
			if c.offset == t.End && t.Flaw != lang.OpenString {
				break
			}
			quote := openingQuote(c.text[t.Start:])
			if c.offset < t.Start+quote || t.Flaw == lang.CurlyQuotes && c.offset > t.End-closingQuote(c.text[:t.End]) {
				return false
			}
			c.quoted, c.closed = true, t.Flaw != lang.OpenString
			c.word.Start = t.Start + quote
			c.whole = lang.Span{Start: c.word.Start, End: c.offset}
			if c.closed {
				c.whole.End = t.End - closingQuote(c.text[:t.End])
			}
		case lang.Number, lang.Operator, lang.Newline:
			if c.offset < t.End {
				return false
			}
			c.fresh = t.Kind == lang.Number && (i+1 == len(tokens) || tokens[i+1].Kind != lang.Unit)
		}
	}
	c.start = c.offset - int32(len(strings.TrimLeft(c.text[c.start:c.offset], " \t\r\n\ufeff\u00a0\u202f\u2009")))
	c.joined(tokens)
	c.parts(end)
	return true
}

// quotes are the quotation marks that a text may stand between; only straight
// ones are right.
var quotes = []string{`"`, "“", "”", "„", "«", "»"}

// openingQuote is the length of the mark that a text begins with.
func openingQuote(s string) int32 {
	for _, q := range quotes {
		if strings.HasPrefix(s, q) {
			return int32(len(q))
		}
	}
	return 0
}

// closingQuote is the length of the mark that a text ends with.
func closingQuote(s string) int32 {
	for _, q := range quotes {
		if strings.HasSuffix(s, q) {
			return int32(len(q))
		}
	}
	return 0
}

// joined stretches the word over the signs that belong to it: a unit behind a
// number (kN/m, kip-ft), the unit of a show statement, the name of a rule.
func (c *caret) joined(tokens []lang.Token) {
	if c.quoted {
		return
	}
	head, _, _ := strings.Cut(c.text[c.start:c.offset], " ")
	if c.in == lang.InMember && head == "depart" || c.in == lang.InBasis && head == "show" {
		signs := "-"
		if head == "show" {
			signs = "-/*^·²³⁴⁶°%‰"
		}
		c.stretch(c.start+int32(len(head)), signs)
		return
	}
	for i := len(tokens) - 1; i >= 0; i-- {
		t := tokens[i]
		if t.Kind != lang.Number || t.End > c.offset {
			continue
		}
		between := c.text[t.End:c.offset]
		run := strings.TrimPrefix(strings.TrimPrefix(between, " "), "\u00a0")
		if strings.ContainsAny(run, " \t\r\n,;(){}=\"#<>!+") || run != "" && strings.ContainsAny(run[:1], "-*/^") {
			return
		}
		c.number = true
		c.word.Start = c.offset - int32(len(run))
		c.whole.Start = c.word.Start
		return
	}
}

// stretch moves the beginning of the word back, and its end on, over letters,
// digits and some signs, but not before a place.
func (c *caret) stretch(from int32, signs string) {
	part := func(r rune) bool { return !strings.ContainsRune(" \t\r\n,;(){}=\"#", r) && (r > ' ') }
	kept := func(s string) bool {
		return !strings.ContainsFunc(s, func(r rune) bool { return strings.ContainsRune("+*/^<>!-", r) && !strings.ContainsRune(signs, r) })
	}
	before := c.text[from:c.offset]
	run := before[strings.LastIndexFunc(before, func(r rune) bool { return !part(r) })+1:]
	rest := c.text[c.offset:c.lineEnd(c.offset)]
	if i := strings.IndexFunc(rest, func(r rune) bool { return !part(r) }); i >= 0 {
		rest = rest[:i]
	}
	if kept(run) && kept(rest) && strings.HasPrefix(before, " ") {
		c.word.Start = c.offset - int32(len(run))
		c.whole = lang.Span{Start: c.word.Start, End: c.offset + int32(len(rest))}
	}
}

// parts reads what stands before the word being typed, as the language would.
func (c *caret) parts(end int32) {
	stop := c.word.Start
	if c.quoted {
		stop -= closingQuote(c.text[:stop])
	}
	if stmt := lineOf(c.text[c.start:max(c.start, stop)]); stmt != nil {
		c.head, c.before = stmt.Word, stmt.Args
	}
	rest := max(c.whole.End, c.offset)
	if c.quoted && c.closed {
		rest += openingQuote(c.text[c.whole.End:])
	}
	for _, t := range lang.Tokens(c.text[rest:end]) {
		switch t.Kind {
		case lang.OpenBrace, lang.CloseBrace, lang.Semicolon, lang.Comment:
			end = min(end, rest+t.Start)
		}
	}
	// a word before the rest makes it read as the parts of a statement
	if text := strings.TrimSpace(c.text[rest:end]); text != "" {
		if s := lineOf("x " + text); s != nil {
			c.after = s.Args
		}
	}
}

// lineOf reads a text as one statement, nil for none.
func lineOf(text string) *lang.Stmt {
	if strings.TrimSpace(text) == "" {
		return nil
	}
	f := lang.Parse(&lang.FileID{}, text, nil)
	if len(f.Decls) != 1 || len(f.Decls[0].Stmts) != 1 {
		return nil
	}
	return f.Decls[0].Stmts[0]
}

// typed is the word being typed as far as it is there.
func (c *caret) typed() string { return c.word.Of(c.text) }

// last is the character before the word being typed, 0 at the beginning of the
// text.
func (c *caret) last() byte {
	if c.word.Start == 0 {
		return 0
	}
	return c.text[c.word.Start-1]
}

// shape is the word for the shape in whose block the caret lies, "" for none.
func (c *caret) shape() string {
	if c.in != lang.InSection {
		return ""
	}
	for _, e := range c.parent.Args {
		if e.Kind == lang.NameExpr && shapeWords[e.Text] != nil {
			return e.Text
		}
	}
	return ""
}

// said are the words of the statements that the block has besides the one being
// typed.
func (c *caret) said() map[string]bool {
	out := map[string]bool{}
	if c.parent != nil && c.parent.Body != nil {
		for _, s := range c.parent.Body.Stmts {
			if s != c.stmt {
				out[s.Word] = true
			}
		}
	}
	return out
}
