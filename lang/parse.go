package lang

import (
	"fmt"
	"runtime"
	"slices"
	"sort"
	"strings"
	"sync"
	"sync/atomic"
	"unicode"
	"unicode/utf8"

	"github.com/alecthomas/participle/v2/lexer"
)

// Limits that keep any input bounded in time and memory. They lie far above
// what a person writes.
const (
	maxFile   = 256 << 20 // bytes
	maxTokens = 20_000    // tokens of one statement's line
	maxBlocks = 8         // depth of blocks
	maxReport = 200       // problems reported in one declaration
)

// Parse reads a file. It never fails: what cannot be read is a problem of its
// own declaration. Parts of an earlier tree of the same file whose text did not
// change are used again; prev may be nil.
func Parse(id *FileID, text string, prev *File) *File {
	if prev != nil && prev.Data {
		prev = nil
	}
	if prev != nil && prev.Text == text && prev.Name == id.Name {
		return prev
	}
	f := &File{Name: id.Name, Text: text, Unreadable: unreadable(text)}
	if f.Unreadable != "" {
		f.whole(id)
		return f
	}
	head, tail, ranges := recut(text, prev)
	f.Decls = make([]*Decl, head+len(ranges)+tail)
	f.Starts = make([]int32, len(f.Decls))
	if prev != nil {
		shift := int32(len(text) - len(prev.Text))
		copy(f.Decls, prev.Decls[:head])
		copy(f.Starts, prev.Starts[:head])
		copy(f.Decls[head+len(ranges):], prev.Decls[len(prev.Decls)-tail:])
		for i := range tail {
			f.Starts[head+len(ranges)+i] = prev.Starts[len(prev.Decls)-tail+i] + shift
		}
	}
	for i, r := range ranges {
		f.Starts[head+i] = int32(r[0])
	}
	f.read(id, head, ranges)
	f.Flawed = f.numbers(prev, head, tail, func(f *File) []int32 { return f.Flawed }, func(d *Decl) bool { return len(d.Problems) > 0 })
	f.includes = f.numbers(prev, head, tail, func(f *File) []int32 { return f.includes }, func(d *Decl) bool {
		return slices.ContainsFunc(d.Stmts, func(s *Stmt) bool { return s.Word == "include" || s.Word == "forces" })
	})
	return f
}

// unreadable says why a text is not read at all, "" when it is.
func unreadable(text string) string {
	switch {
	case len(text) > maxFile:
		return "the file is larger than 256 MiB"
	case strings.IndexByte(text[:min(len(text), 1<<16)], 0) >= 0:
		return "the file is not text (it contains zero bytes)"
	}
	return ""
}

// whole makes the text one declaration without statements.
func (f *File) whole(id *FileID) {
	f.Decls = []*Decl{{File: id, Syntax: &Syntax{Text: f.Text}}}
	f.Starts = []int32{0}
}

// table takes a file that a forces statement names as it is: its figures are read
// by whoever knows what they mean.
func table(id *FileID, text string) *File {
	f := &File{Name: id.Name, Text: text, Data: true, Unreadable: unreadable(text)}
	f.whole(id)
	return f
}

// numbers lists the declarations of a kind, of which an earlier file has told
// those at its head and tail apart.
func (f *File) numbers(prev *File, head, tail int, of func(*File) []int32, is func(*Decl) bool) []int32 {
	var out []int32
	var before []int32
	if prev != nil {
		before = of(prev)
	}
	for _, i := range before {
		if int(i) < head {
			out = append(out, i)
		}
	}
	for i := head; i < len(f.Decls)-tail; i++ {
		if is(f.Decls[i]) {
			out = append(out, int32(i))
		}
	}
	for _, i := range before {
		if from := len(prev.Decls) - tail; int(i) >= from {
			out = append(out, i+int32(len(f.Decls)-len(prev.Decls)))
		}
	}
	return out
}

// recut cuts the part of a text that differs from an earlier one into
// declarations, and tells how many of the earlier declarations stay at the head
// and at the tail. Where a declaration begins, nothing of what stands before it
// counts any more, so the cut is the same from there on.
func recut(text string, prev *File) (head, tail int, ranges [][2]int) {
	start, from := 0, len(text) // the cut begins at start; from is where the old tail could begin
	if prev != nil && prev.Unreadable == "" && len(prev.Decls) > 0 {
		same := commonPrefix(text, prev.Text)
		from = len(text) - commonSuffix(text[same:], prev.Text[same:])
		// The declaration in which the texts part, and the one before it: an edit
		// at its first line can join the two.
		head = sort.Search(len(prev.Starts), func(i int) bool { return int(prev.Starts[i]) > same }) - 1
		head = max(0, head-1)
		start = int(prev.Starts[head])
	} else {
		prev = nil
	}
	done := false
	cutFrom(text, start, func(begin, end int) bool {
		if prev != nil && begin >= from {
			old := int32(begin - (len(text) - len(prev.Text)))
			if i := sort.Search(len(prev.Starts), func(i int) bool { return prev.Starts[i] >= old }); i < len(prev.Starts) && prev.Starts[i] == old && i >= head {
				tail = len(prev.Starts) - i
				done = true
				return false
			}
		}
		ranges = append(ranges, [2]int{begin, end})
		return true
	})
	if !done {
		tail = 0
	}
	return head, tail, ranges
}

func commonPrefix(a, b string) int {
	n := min(len(a), len(b))
	i := 0
	for i+64 <= n && a[i:i+64] == b[i:i+64] {
		i += 64
	}
	for i < n && a[i] == b[i] {
		i++
	}
	return i
}

func commonSuffix(a, b string) int {
	n := min(len(a), len(b))
	i := 0
	for i+64 <= n && a[len(a)-i-64:len(a)-i] == b[len(b)-i-64:len(b)-i] {
		i += 64
	}
	for i < n && a[len(a)-1-i] == b[len(b)-1-i] {
		i++
	}
	return i
}

// read parses the declarations that are new, long files on all cores.
func (f *File) read(id *FileID, head int, ranges [][2]int) {
	text, tail := f.Text, len(ranges)
	// declarations do not depend on one another: long files are read on all cores
	const batch = 64
	var wait sync.WaitGroup
	next := atomic.Int64{}
	work := func() {
		for {
			first := int(next.Add(batch)) - batch
			if first >= tail {
				return
			}
			for i := first; i < min(first+batch, tail); i++ {
				r := ranges[i]
				f.Decls[head+i] = &Decl{File: id, Syntax: parseDecl(text[r[0]:r[1]])}
				f.Decls[head+i].index.Store(int32(head + i))
			}
		}
	}
	for range min(runtime.GOMAXPROCS(0)-1, tail/batch) {
		wait.Go(work)
	}
	work()
	wait.Wait()
}

// parseDecl reads the text of one declaration.
func parseDecl(text string) *Syntax {
	s := &Syntax{Text: text}
	b := builders.Get().(*builder)
	b.reset(s)
	s.Stmts = b.stmts(nil, 0)
	s.Dotted = dotted(text)
	b.syntax = nil
	builders.Put(b)
	return s
}

// dotted tells whether a dot stands between a letter, digit or _ and a letter.
func dotted(text string) bool {
	for i := strings.IndexByte(text, '.'); i >= 0 && i+1 < len(text); {
		if i > 0 && (text[i-1] >= utf8.RuneSelf || nameLength("_"+text[i-1:i]) == 2) && nameLength(text[i+1:]) > 0 {
			return true
		}
		next := strings.IndexByte(text[i+1:], '.')
		if next < 0 {
			return false
		}
		i += 1 + next
	}
	return false
}

var builders = sync.Pool{New: func() any { return new(builder) }}

// builder reads statements. It splits the tokens into statements by line ends,
// semicolons and braces alone, and hands each line to the grammar.
type builder struct {
	syntax *Syntax
	lex    Lexer
	tok    Token
	line   []Token
	feed   tokenSource
	depth  int
}

func (b *builder) reset(s *Syntax) {
	b.syntax, b.depth = s, 0
	b.lex = Lexer{text: s.Text}
	b.next()
}

func (b *builder) next() { b.tok = b.lex.Next() }

func (s *Syntax) problem(p Problem) {
	s.found++
	if len(s.Problems) < maxReport {
		s.Problems = append(s.Problems, p)
	}
}

// stmts reads statements up to the brace that closes the block open, or to the
// end of the text for the outermost level.
func (b *builder) stmts(open *Stmt, depth int) []*Stmt {
	var out []*Stmt
	for {
		switch b.tok.Kind {
		case Blank, Comment, Newline, Semicolon:
			b.next()
			continue
		case EOF:
			if open != nil {
				b.unclosed(open, out)
			}
			return out
		case CloseBrace:
			if open != nil {
				open.Body.Span.End = b.tok.End
				open.Span.End = b.tok.End
				b.next()
				return out
			}
			if b.syntax.found >= maxReport {
				b.syntax.found++ // not reported any more, and not written either
				b.next()
				continue
			}
			b.syntax.problem(Problem{Rule: "stray-brace", Span: b.tok.Span(), Message: "this } closes nothing",
				Fixes: []Fix{Replace("Remove the brace", true, b.tok.Span(), "")}})
			b.next()
			continue
		}
		out = append(out, b.stmt(depth))
	}
}

func (b *builder) unclosed(open *Stmt, inside []*Stmt) {
	at := Span{open.Body.Span.Start, open.Body.Span.Start + 1}
	end := int32(len(strings.TrimRight(b.syntax.Text, " \t\r\n")))
	if n := len(inside); n > 0 {
		end = max(end, inside[n-1].Span.End) // a text that is not closed ends with blanks
	}
	open.Body.Span.End, open.Span.End = end, end
	if open.Word == "" {
		return // the block itself is reported
	}
	b.syntax.problem(Problem{Rule: "unclosed-block", Span: at, Message: "the block of '" + open.Word + "' is not closed: a } is missing",
		Fixes: []Fix{Replace("Add the closing brace", false, Span{end, end}, "\n}")}})
}

// stmt reads one statement with its block.
func (b *builder) stmt(depth int) *Stmt {
	before := b.syntax.found
	b.collect()
	st := &Stmt{}
	if len(b.line) > 0 {
		st.Line = Span{b.line[0].Start, b.line[len(b.line)-1].End}
	} else {
		st.Line = Span{b.tok.Start, b.tok.Start}
	}
	st.Span = st.Line
	b.syntax.fill(st, b.line, &b.feed)
	st.Broken = b.syntax.found > before
	if b.tok.Kind != OpenBrace {
		return st
	}
	st.Body = &Block{Span: b.tok.Span()}
	st.Span.End = b.tok.End
	if depth >= maxBlocks {
		b.syntax.problem(Problem{Rule: "nested-too-deep", Span: b.tok.Span(), Message: "blocks are nested too deeply; what follows in this declaration was not read"})
		st.Broken = true
		for b.tok.Kind != EOF {
			b.next()
		}
		st.Body.Span.End = int32(len(b.syntax.Text))
		st.Span.End = st.Body.Span.End
		return st
	}
	b.next()
	st.Body.Stmts = b.stmts(st, depth+1)
	return st
}

// collect gathers the tokens of the statement's line, without blanks and
// comments, and stops on the token that ends it.
func (b *builder) collect() {
	b.line = b.line[:0]
	parens := 0
	dropped := false
	for {
		switch b.tok.Kind {
		case EOF, OpenBrace, CloseBrace:
			b.long(dropped)
			return
		case Semicolon:
			b.long(dropped)
			return
		case Newline:
			comma := len(b.line) > 0 && b.line[len(b.line)-1].Kind == Comma
			if !b.goesOn(parens > 0 || comma) {
				b.long(dropped)
				return
			}
			continue
		case Blank, Comment:
			b.next()
			continue
		case OpenParen:
			parens++
		case CloseParen:
			parens = max(0, parens-1)
		}
		if len(b.line) < maxTokens {
			b.line = append(b.line, b.tok)
		} else {
			dropped = true
		}
		b.next()
	}
}

func (b *builder) long(dropped bool) {
	if dropped {
		b.syntax.problem(Problem{Rule: "statement-too-long", Span: Span{b.line[0].Start, b.line[0].End},
			Message: "this statement has more than 20,000 words and signs and was not read"})
		b.line = b.line[:1]
	}
}

// goesOn moves past the line end and what is blank behind it, and tells whether
// the statement goes on there: always when an opening brace stands first, and
// for an open bracket or trailing comma unless the next line plainly starts a
// statement of its own.
func (b *builder) goesOn(open bool) bool {
	saveLex, saveTok := b.lex, b.tok
	for b.tok.Kind == Newline || b.tok.Kind == Blank || b.tok.Kind == Comment {
		b.next()
	}
	on := false
	switch b.tok.Kind {
	case OpenBrace:
		on = true
	case Name:
		rest := b.syntax.Text[b.tok.Start:]
		on = open && !verbs[b.tok.Span().Of(b.syntax.Text)] && !StartsDeclaration(rest, true) && !strings.HasPrefix(trimBlank(rest[nameLength(rest):]), "=")
	case EOF, CloseBrace:
	default:
		on = open
	}
	if !on {
		b.lex, b.tok = saveLex, saveTok
	}
	return on
}

// fill reads the tokens of a line into the statement.
func (s *Syntax) fill(st *Stmt, tokens []Token, feed *tokenSource) {
	if len(tokens) == 0 {
		s.problem(Problem{Rule: "missing-statement", Span: Span{st.Line.Start, st.Line.Start + 1}, Message: "a block opens here without a statement before it"})
		return
	}
	bad := s.flaws(tokens)
	first := tokens[0]
	if first.Kind == Name {
		st.Head = first.Span()
		st.Word = st.Head.Of(s.Text)
		tokens = tokens[1:]
		// "width=90 mm" and "A1*2" both begin with a word: what follows decides
	} else if !bad {
		s.problem(Problem{Rule: "missing-statement", Span: first.Span(),
			Message: "a statement begins with a word, not with " + describe(first, s.Text)})
		bad = true
	}
	if len(tokens) == 0 {
		return
	}
	feed.text, feed.tokens, feed.next = s.Text, tokens, 0
	st.Args = s.read(feed, bad)
}

// parts reads tokens that are no statement, such as a formula.
func (s *Syntax) parts(tokens []Token) []*Expr {
	bad := s.flaws(tokens)
	return s.read(&tokenSource{text: s.Text, tokens: tokens}, bad)
}

// read runs the grammar over a line's tokens. Problems of the expressions are
// reported unless the line has a flaw reported already.
func (s *Syntax) read(feed *tokenSource, silent bool) []*Expr {
	peeking, err := lexer.Upgrade(feed)
	if err != nil {
		return nil // cannot be: the source never fails
	}
	parsed, err := lineParser.ParseFromLexer(peeking)
	if err != nil {
		return nil // cannot be: a part never fails and takes at least one token
	}
	for _, e := range parsed.parts {
		if !silent && s.complain(e) {
			silent = true
		}
	}
	return parsed.parts
}

// complain reports the first bad expression below e.
func (s *Syntax) complain(e *Expr) bool {
	if e.Kind == BadExpr {
		for _, a := range e.Args {
			if s.complain(a) {
				return true
			}
		}
		p := Problem{Span: e.Span}
		switch e.Text {
		case "(":
			p.Rule, p.Message = "unclosed-bracket", "this bracket is not closed: a ) is missing"
			p.Fixes = []Fix{Replace("Add the closing bracket", false, Span{e.Span.End, e.Span.End}, ")")}
			p.Span.End = p.Span.Start + 1
			if i := strings.IndexByte(s.Text[e.Span.Start:e.Span.End], '('); i >= 0 {
				p.Span = Span{e.Span.Start + int32(i), e.Span.Start + int32(i) + 1}
			}
		case "deep":
			p.Rule, p.Message = "nested-too-deep", "brackets are nested too deeply"
			p.Span.End = min(p.Span.End, p.Span.Start+1)
		case "number":
			p.Rule, p.Message = "bad-number", "this number is too large or too small to compute with"
		case "end":
			p.Rule, p.Message = "missing-value", "a value is missing here"
			p.Span = s.lastVisible(e.Span)
		default:
			p.Rule, p.Message = "misplaced-sign", "'"+e.Span.Of(s.Text)+"' does not belong here"
		}
		s.problem(p)
		return true
	}
	if e.Kind == StringExpr {
		return false
	}
	for _, a := range e.Args {
		if a.Kind == StringExpr {
			s.problem(Problem{Rule: "misplaced-sign", Span: a.Span, Message: "a text cannot be part of a calculation"})
			return true
		}
		if s.complain(a) {
			return true
		}
	}
	return false
}

// lastVisible turns an empty span at the end of something into the last
// character before it, so that there is something to underline.
func (s *Syntax) lastVisible(at Span) Span {
	if at.Len() > 0 || at.Start == 0 {
		return at
	}
	_, n := utf8.DecodeLastRuneInString(s.Text[:at.Start])
	return Span{at.Start - int32(n), at.Start}
}

// flaws reports what the lexer marked. It tells whether there was anything.
func (s *Syntax) flaws(tokens []Token) bool {
	found, stray := false, false
	for _, t := range tokens {
		if t.Flaw == Sound || t.Flaw == BadCharacters && stray {
			continue // one stray character of a statement is enough to look at
		}
		found = true
		text := t.Span().Of(s.Text)
		p := Problem{Span: t.Span()}
		switch t.Flaw {
		case OpenString:
			p.Rule, p.Message = "unclosed-text", "the quoted text is not closed on its line"
			p.Fixes = []Fix{Replace("Close the text", false, Span{t.End, t.End}, `"`)}
		case CurlyQuotes:
			p.Rule, p.Message = "curly-quotes", "quoted text stands between straight quotes \"…\""
			p.Fixes = []Fix{Replace("Use straight quotes", true, t.Span(), `"`+strings.Trim(text, "\"“”„«»")+`"`)}
		case DecimalComma:
			p.Rule, p.Message = "decimal-comma", "a decimal comma: numbers are written with a point"
			point := strings.Replace(text, ",", ".", 1)
			if strings.Count(text, ",") > 1 {
				p.Message = "commas in a number: write the decimal point as . and group digits with _"
				p.Fixes = []Fix{Replace("Write "+strings.ReplaceAll(text, ",", "_"), false, t.Span(), strings.ReplaceAll(text, ",", "_"))}
				break
			}
			p.Message += ", " + point
			p.Fixes = []Fix{Replace("Write "+point, false, t.Span(), point)}
			if thousands := strings.Replace(text, ",", "_", 1); len(text)-strings.IndexByte(text, ',') == 4 {
				p.Notes = append(p.Notes, "for thousands write "+thousands)
				p.Fixes = append(p.Fixes, Replace("Write "+thousands, false, t.Span(), thousands))
			}
		case BadNumber:
			p.Rule, p.Message = "bad-number", "'"+text+"' is not a number"
			if mended := mendNumber(text); mended != "" {
				p.Message += ": write " + mended
				p.Fixes = []Fix{Replace("Write "+mended, text[0] == '.', t.Span(), mended)}
			}
		case BadEncoding:
			p.Rule, p.Message = "stray-character", "these bytes are not UTF-8 text"
		default:
			stray = true
			p.Rule, p.Message = "stray-character", printable(text)+" has no meaning in the language"
			switch text {
			case "'":
				p.Message = "single quotes have no meaning in the language: text stands between \"…\""
			case ":":
				p.Notes = append(p.Notes, "a value is given with =")
			}
		}
		s.problem(p)
	}
	return found
}

// printable shows a character in a message: by its number when it would not be
// seen, or would do something to the terminal.
func printable(s string) string {
	r, n := utf8.DecodeRuneInString(s)
	if n == len(s) && !unicode.IsGraphic(r) {
		return fmt.Sprintf("the character U+%04X", r)
	}
	return "'" + s + "'"
}

// mendNumber writes ".5" and "5." as a reader would; "" when there is more
// wrong than that.
func mendNumber(s string) string {
	m := s
	if strings.HasPrefix(m, ".") {
		m = "0" + m
	}
	m = strings.TrimSuffix(m, ".")
	l := NewLexer(m)
	if t := l.Next(); t.Kind == Number && t.Flaw == Sound && int(t.End) == len(m) {
		return m
	}
	return ""
}

func describe(t Token, text string) string {
	s := t.Span().Of(text)
	if len(s) > 20 {
		s = strings.ToValidUTF8(s[:20], "") + "…"
	}
	return "'" + s + "'"
}
