package model

import (
	"maps"
	"slices"

	"kern/lang"
)

// Change is a declaration of members that was edited.
type Change struct{ Before, Now *lang.Decl }

// Again is NewEnv after an edit, if that is easily said: when nothing but the
// insides of declarations of members changed, so that every name still has its
// meaning, the reading stays what it was. It gives the declarations that
// changed; nil where all has to be read anew.
func (env *Env) Again(before, files []*lang.File) (*Env, []Change) {
	if len(before) != len(files) {
		return nil, nil
	}
	var changed []Change
	for i, f := range files {
		old := before[i]
		if f == old {
			continue
		}
		if f.Name != old.Name || len(f.Decls) != len(old.Decls) || f.Unreadable != old.Unreadable {
			return nil, nil
		}
		for k, d := range f.Decls {
			if d == old.Decls[k] {
				continue
			}
			if !env.owned(old.Decls[k]) || !sameNames(old.Decls[k], d) {
				return nil, nil
			}
			changed = append(changed, Change{old.Decls[k], d})
		}
	}
	if len(changed) == 0 {
		return env, nil
	}
	if len(changed) > 100 || env.speaksOf(changed) {
		return nil, nil
	}
	next := *env
	next.Linked = env.Linked || slices.ContainsFunc(changed, func(c Change) bool { return c.Now.Dotted })
	next.Names = maps.Clone(env.Names)
	next.members = slices.Clone(env.members)
	for _, c := range changed {
		for _, s := range c.Now.Stmts {
			for _, e := range memberNames(s) {
				n := *env.Names[e.Text]
				n.Place, n.Stmt = lang.Place{Decl: c.Now, Span: e.Span}, s
				next.Names[e.Text] = &n
				next.members[n.Index] = c.Now
			}
		}
	}
	return &next, changed
}

// owned tells whether a declaration is one of members with names, all its own.
func (env *Env) owned(d *lang.Decl) bool {
	if len(d.Stmts) == 0 {
		return false
	}
	for _, s := range d.Stmts {
		names := memberNames(s)
		if !isMember(s) || len(names) == 0 {
			return false
		}
		for _, e := range names {
			if n := env.Names[e.Text]; n == nil || n.Place != (lang.Place{Decl: d, Span: e.Span}) || n.Twice || n.Bad {
				return false
			}
		}
	}
	return true
}

func isMember(s *lang.Stmt) bool {
	_, assigned := s.Assigned()
	return !assigned && (s.Word == "column" || s.Word == "strut" || s.Word == "tie")
}

// sameNames tells whether two declarations of members give the same names in
// the same order.
func sameNames(a, b *lang.Decl) bool {
	return slices.EqualFunc(a.Stmts, b.Stmts, func(s, t *lang.Stmt) bool {
		return isMember(t) && slices.EqualFunc(memberNames(s), memberNames(t), func(x, y *lang.Expr) bool { return x.Text == y.Text })
	})
}

// speaksOf tells whether a problem of the reading stands in one of the
// declarations that changed, or points there.
func (env *Env) speaksOf(changed []Change) bool {
	in := func(d *lang.Decl) bool {
		return d != nil && slices.ContainsFunc(changed, func(c Change) bool { return c.Before == d })
	}
	for _, p := range env.Problems {
		if in(p.Decl) {
			return true
		}
		for _, r := range p.Related {
			if in(r.Place.Decl) {
				return true
			}
		}
		for _, f := range p.Fixes {
			for _, e := range f.Edits {
				if in(e.Place.Decl) {
					return true
				}
			}
		}
	}
	return false
}

// Definitions are the names of sections and materials, in the order of the text.
func (env *Env) Definitions() []*Named { return env.definitions }
