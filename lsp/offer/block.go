package offer

import (
	"slices"

	"kern/checker"
	"kern/checker/edit"
	"kern/checker/model"
	"kern/lang"
)

// owner is a statement with the declaration that it stands in.
type owner struct {
	decl *lang.Decl
	stmt *lang.Stmt
}

// insert gives the edit that puts lines of one word into the block of a
// statement. It is false where the block is not closed, as nobody can tell then
// where it ends.
func (l *list) insert(o owner, lines ...string) (checker.Edit, bool) {
	c, ok := edit.Insert(o.decl.Text, o.stmt, lines...)
	if !ok {
		return checker.Edit{}, false
	}
	return l.editAt(lang.Place{Decl: o.decl, Span: c.Span}, c.New), true
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
