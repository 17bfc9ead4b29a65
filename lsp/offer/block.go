package offer

import (
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/model"
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

// owner is a statement with the declaration that it stands in.
type owner struct {
	decl *lang.Decl
	stmt *lang.Stmt
}

// insert gives the edit that puts lines of one word into the block of a
// statement. It is false where the block is not closed, as nobody can tell then
// where it ends.
func (l *list) insert(o owner, lines ...string) (checker.Edit, bool) {
	text, s := o.decl.Text, o.stmt
	at := func(offset int32, new string) (checker.Edit, bool) {
		return l.editAt(lang.Place{Decl: o.decl, Span: lang.Span{Start: offset, End: offset}}, new), true
	}
	if s.Body == nil {
		return at(s.Line.End, " {\n    "+strings.Join(lines, "\n    ")+"\n}")
	}
	open, end := s.Body.Span.Start+1, s.Body.Span.End-1
	if end < open || int(end) >= len(text) || text[end] != '}' {
		return checker.Edit{}, false
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
			return l.editAt(lang.Place{Decl: o.decl, Span: lang.Span{Start: open, End: end}}, " "+together+" "), true
		case i == len(inner):
			return at(inner[i-1].Span.End, "; "+together)
		}
		return at(inner[i].Span.Start, together+"; ")
	}
	before := open // what the new lines come behind
	indent := indentOf(text, s.Span.Start) + "    "
	if i > 0 {
		before = inner[i-1].Span.End
	}
	if len(inner) > 0 && first(text, inner[max(i-1, 0)].Span.Start) {
		indent = indentOf(text, inner[max(i-1, 0)].Span.Start)
	}
	if to, ok := rest(text, before); ok {
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

// first tells whether a place is the first of its line that is not blank.
func first(text string, offset int32) bool {
	return strings.Trim(text[lineStart(text, offset):offset], " \t") == ""
}

// rest gives the end of the line that a place stands in, if nothing but blanks,
// semicolons and a comment follows it there.
func rest(text string, offset int32) (int32, bool) {
	end := int32(len(text))
	if i := strings.IndexAny(text[offset:], "\r\n"); i >= 0 {
		end = offset + int32(i)
	}
	tail := strings.TrimLeft(text[offset:end], " \t;")
	return end, tail == "" || tail[0] == '#'
}

func lineStart(text string, offset int32) int32 {
	return int32(strings.LastIndexAny(text[:offset], "\r\n") + 1)
}

// indentOf is what the line of a place begins with.
func indentOf(text string, offset int32) string {
	line := text[lineStart(text, offset):]
	return line[:len(line)-len(strings.TrimLeft(line, " \t"))]
}

// statements are those that make up a member: its own, and those of the members
// that it is "as", but for the words that it says itself.
func statements(env *model.Env, o owner) []owner {
	var out []owner
	said := map[string]bool{}
	for depth := 0; depth < 100; depth++ {
		var own []owner
		if o.stmt.Body != nil {
			for _, b := range o.stmt.Body.Stmts {
				if !said[same(b.Word)] {
					own = append(own, owner{o.decl, b})
				}
			}
		}
		for _, b := range own {
			said[same(b.stmt.Word)] = true
		}
		out = append(own, out...)
		i := slices.IndexFunc(o.stmt.Args, func(e *lang.Expr) bool { return e.Is("as") })
		if i < 0 || i+1 >= len(o.stmt.Args) {
			break
		}
		n := env.Names[o.stmt.Args[i+1].Text]
		if n == nil || n.Kind != model.MemberName {
			break
		}
		o = owner{n.Place.Decl, n.Stmt}
	}
	return out
}

// same groups words that say the same thing in two ways.
func same(word string) string {
	if word == "from" || word == "length" {
		return "height"
	}
	return word
}

// takenOver are the lines of a word that a member has from the one that it is
// "as". A line of that word in its own block would replace them, so they are
// written out beside it.
func takenOver(env *model.Env, o owner, word string) []string {
	var out []string
	for _, b := range statements(env, o) {
		if same(b.stmt.Word) == same(word) && b.decl != o.decl {
			out = append(out, b.stmt.Span.Of(b.decl.Text))
		}
	}
	return out
}

// memberOf gives the member statement that a place of the file stands in.
func (l *list) memberOf(s site) (owner, bool) {
	switch s.top.Word {
	case "column", "strut", "tie":
		return owner{s.Decl, s.top}, !assigned(s.top)
	}
	return owner{}, false
}

func assigned(s *lang.Stmt) bool {
	_, ok := s.Assigned()
	return ok
}

// results are those of the members that a statement describes.
func (l *list) results(o owner) []*checker.Result {
	var out []*checker.Result
	for _, r := range l.Report.Results(o.decl) {
		if r.Member.Stmt == o.stmt {
			out = append(out, r)
		}
	}
	return out
}
