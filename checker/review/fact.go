package review

import (
	"fmt"
	"strconv"
	"strings"

	"kern/lang"
)

// fact is one statement of a calculation, or one part of a declaration's first
// line: the smallest thing that an edit changes.
type fact struct {
	// word is what the fact is about: the statement's first word, or "kind",
	// "title", "as" and "made of" for the parts of a first line.
	word string
	// text is the fact as the language reads it.
	text string
	// key is the same for two facts that read the same, however they are laid
	// out.
	key   string
	place lang.Place
	stmt  *lang.Stmt // nil for a part of a first line
	table string     // the file of a table of forces that it names or stands in
}

// declared is what gives a name its meaning, or the basis: a first line and the
// statements in its block.
type declared struct {
	id    string // "member A1", "section mast", "basis", "cases"
	kind  string // member, section, material, value, level, case, combination, exclusive, basis
	name  string
	facts []fact
	// stmts are the declarations that it was read from: two when a name is given
	// twice.
	stmts []*lang.Stmt
	decls []*lang.Decl
}

// kinds are the words that begin a declaration, with what they declare.
var kinds = map[string]string{"column": "member", "strut": "member", "tie": "member", "section": "section", "material": "material", "level": "level",
	"case": "case", "combination": "combination", "exclusive": "exclusive", "basis": "basis", "forces": "forces"}

// state is one state of a calculation, taken apart.
type state struct {
	all    map[string]*declared
	order  []string
	owners map[*lang.Decl][]string // what each declaration of the text gives
}

// takeApart reads the files of a calculation into facts.
func takeApart(files []*lang.File) *state {
	s := &state{all: map[string]*declared{}, owners: map[*lang.Decl][]string{}}
	for _, f := range files {
		for _, d := range f.Decls {
			for _, stmt := range d.Stmts {
				s.read(d, stmt)
			}
		}
		if f.Data {
			s.readTable(f)
		}
	}
	return s
}

// of gives a declaration by kind and name, made when it is new.
func (s *state) of(kind, name string, d *lang.Decl, stmt *lang.Stmt) *declared {
	id := strings.TrimSpace(kind + " " + name)
	x := s.all[id]
	if x == nil {
		x = &declared{id: id, kind: kind, name: name}
		s.all[id] = x
		s.order = append(s.order, id)
	}
	x.stmts, x.decls = append(x.stmts, stmt), append(x.decls, d)
	s.owners[d] = append(s.owners[d], id)
	return x
}

func (s *state) read(d *lang.Decl, stmt *lang.Stmt) {
	whole := func(word string) fact {
		return fact{word: word, text: textOf(d, stmt.Span), key: keyOf(d, stmt), place: lang.Place{Decl: d, Span: stmt.Line}, stmt: stmt}
	}
	if _, ok := stmt.Assigned(); ok {
		x := s.of("value", stmt.Word, d, stmt)
		x.facts = append(x.facts, whole("value"))
		return
	}
	switch kind := kinds[stmt.Word]; kind {
	case "forces":
		f := whole(kind)
		if len(stmt.Args) > 0 {
			f.table, _ = lang.Resolve(d.File.Name, stmt.Args[0].Text)
		}
		x := s.of(kind, "", d, stmt)
		x.facts = append(x.facts, f)
	case "case", "combination", "exclusive":
		// their order counts: self-weight belongs to the first permanent case
		x := s.of(kind+"s", "", d, stmt)
		f := whole(kind)
		f.word = kind
		if names := namesOf(stmt); len(names) > 0 && kind != "exclusive" {
			f.word = kind + " " + names[0].Text
		}
		x.facts = append(x.facts, f)
	case "basis":
		x := s.of(kind, "", d, stmt)
		x.facts = append(x.facts, block(d, stmt)...)
	case "member":
		for _, name := range namesOf(stmt) {
			x := s.of(kind, name.Text, d, stmt)
			x.facts = append(x.facts, memberFacts(d, stmt)...)
		}
	case "section", "material", "level":
		names := namesOf(stmt)
		if len(names) == 0 {
			return
		}
		x := s.of(kind, names[0].Text, d, stmt)
		head := *stmt
		head.Body = nil
		text := textOf(d, lang.Span{Start: names[0].Span.End, End: stmt.Line.End})
		x.facts = append(x.facts, fact{word: "made of", text: text, key: keyOf(d, &head), place: lang.Place{Decl: d, Span: stmt.Line}})
		x.facts = append(x.facts, block(d, stmt)...)
	}
}

// block are the facts of a statement's block.
func block(d *lang.Decl, stmt *lang.Stmt) []fact {
	if stmt.Body == nil {
		return nil
	}
	var out []fact
	for _, b := range stmt.Body.Stmts {
		out = append(out, fact{word: b.Word, text: textOf(d, b.Span), key: keyOf(d, b), place: lang.Place{Decl: d, Span: b.Line}, stmt: b})
	}
	return out
}

// memberFacts are the facts of a member, but for its name.
func memberFacts(d *lang.Decl, stmt *lang.Stmt) []fact {
	line := lang.Place{Decl: d, Span: stmt.Line}
	out := []fact{{word: "kind", text: stmt.Word, key: stmt.Word, place: line}}
	rest := stmt.Args
	if names := namesOf(stmt); len(names) > 0 {
		rest = rest[2*len(names)-1:]
	}
	for i, e := range rest {
		switch {
		case e.Kind == lang.StringExpr && i == 0:
			out = append(out, fact{word: "title", text: textOf(d, e.Span), key: e.Text, place: line})
		case e.Is("as") && i+1 < len(rest):
			text := textOf(d, e.Span.Join(rest[i+1].Span))
			out = append(out, fact{word: "as", text: text, key: text, place: line})
		}
	}
	return append(out, block(d, stmt)...)
}

// namesOf are the names that a declaration gives, before what else its line says.
func namesOf(s *lang.Stmt) []*lang.Expr {
	var out []*lang.Expr
	for i, e := range s.Args {
		if e.Kind == lang.NameExpr && !e.Is("as") {
			out = append(out, e)
			if kinds[s.Word] == "member" && i+1 < len(s.Args) && s.Args[i+1].Kind == lang.CommaExpr {
				continue
			}
			break
		}
		if e.Kind != lang.CommaExpr {
			break
		}
	}
	return out
}

// textOf is a part of a declaration on one line: comments are left out, and a
// line end in a block is written as a semicolon.
func textOf(d *lang.Decl, s lang.Span) string {
	text := s.Of(d.Text)
	var b strings.Builder
	gap, end := false, false
	open, round := 0, 0
	var last lang.Kind
	for _, t := range lang.Tokens(text) {
		switch t.Kind {
		case lang.Blank, lang.Comment:
			gap = true
			continue
		case lang.Newline:
			gap = true
			end = open > 0 && round == 0
			continue
		}
		if b.Len() > 0 && gap {
			if end && last != lang.OpenBrace && last != lang.Semicolon && last != lang.Comma && t.Kind != lang.CloseBrace && t.Kind != lang.OpenBrace {
				b.WriteByte(';')
			}
			b.WriteByte(' ')
		}
		gap, end = false, false
		switch t.Kind {
		case lang.OpenBrace:
			open++
		case lang.CloseBrace:
			open--
		case lang.OpenParen:
			round++
		case lang.CloseParen:
			round--
		}
		last = t.Kind
		b.WriteString(t.Span().Of(text))
	}
	return b.String()
}

// keyOf writes what a statement says without how it is laid out.
func keyOf(d *lang.Decl, s *lang.Stmt) string {
	if s.Broken {
		return "broken " + textOf(d, s.Span)
	}
	var b strings.Builder
	b.WriteString(s.Word)
	for _, e := range s.Args {
		b.WriteByte(' ')
		keyOfExpr(&b, e)
	}
	if s.Body != nil {
		b.WriteString(" {")
		for _, x := range s.Body.Stmts {
			b.WriteString(keyOf(d, x))
			b.WriteByte(';')
		}
		b.WriteByte('}')
	}
	return b.String()
}

func keyOfExpr(b *strings.Builder, e *lang.Expr) {
	switch e.Kind {
	case lang.NumberExpr, lang.QuantExpr:
		b.WriteString(strconv.FormatFloat(e.Value, 'g', -1, 64))
		b.WriteByte('_')
		b.WriteString(e.Text)
	case lang.StringExpr:
		b.WriteString(strconv.Quote(e.Text))
	case lang.NameExpr:
		b.WriteString(e.Text)
	default:
		fmt.Fprintf(b, "(%d %d %s", e.Kind, e.Op, e.Text)
		for _, a := range e.Args {
			b.WriteByte(' ')
			keyOfExpr(b, a)
		}
		b.WriteByte(')')
	}
}
