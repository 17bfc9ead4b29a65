package edit

import (
	"slices"

	"kern/checker/model"
	"kern/lang"
)

// Line is a statement with the declaration that it stands in.
type Line struct {
	Decl *lang.Decl
	Stmt *lang.Stmt
}

// Text is the statement as it is written.
func (l Line) Text() string { return l.Stmt.Span.Of(l.Decl.Text) }

// Lines are the statements that make up a member: its own, and those of the
// members that it is "as", but for the words that it says itself.
func Lines(env *model.Env, member Line) []Line {
	var out []Line
	said := map[string]bool{}
	for depth := 0; depth < 100; depth++ {
		var own []Line
		if member.Stmt.Body != nil {
			for _, b := range member.Stmt.Body.Stmts {
				if !said[Same(b.Word)] {
					own = append(own, Line{member.Decl, b})
				}
			}
		}
		for _, b := range own {
			said[Same(b.Stmt.Word)] = true
		}
		out = append(own, out...)
		i := slices.IndexFunc(member.Stmt.Args, func(e *lang.Expr) bool { return e.Is("as") })
		if i < 0 || i+1 >= len(member.Stmt.Args) {
			break
		}
		n := env.Names[member.Stmt.Args[i+1].Text]
		if n == nil || n.Kind != model.MemberName {
			break
		}
		member = Line{n.Place.Decl, n.Stmt}
	}
	return out
}

// Same groups words that say the same thing in two ways.
func Same(word string) string {
	if word == "from" || word == "length" {
		return "height"
	}
	return word
}

// TakenOver are the lines of a word that a member has from the one that it is
// "as". A line of that word in its own block would replace them, so they are
// written out beside it.
func TakenOver(env *model.Env, member Line, word string) []string {
	var out []string
	for _, b := range Lines(env, member) {
		if Same(b.Stmt.Word) == Same(word) && b.Decl != member.Decl {
			out = append(out, b.Text())
		}
	}
	return out
}
