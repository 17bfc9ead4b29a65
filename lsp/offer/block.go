package offer

import (
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

// takenOver are the lines of a word that a member has from the one that it is
// "as".
func takenOver(env *model.Env, o owner, word string) []string {
	return edit.TakenOver(env, edit.Line{Decl: o.decl, Stmt: o.stmt}, word)
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
