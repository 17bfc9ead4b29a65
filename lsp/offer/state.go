package offer

import (
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/checker/section"
)

// state offers to write out what is assumed, so that it can be seen and signed.
func (l *list) state(s site) {
	if o, ok := l.memberOf(s); ok {
		if len(s.Stmts) == 1 || s.stmt.Word == "base" || s.stmt.Word == "top" {
			l.ends(o)
		}
		if s.stmt.Word == "section" || len(s.Stmts) > 2 && s.Stmts[1].Word == "section" {
			for _, r := range l.results(o) {
				if sec := r.Member.Section; sec != nil && sec.Place.Decl == s.Decl {
					l.making(owner{s.Decl, s.Stmts[1]}, sec)
				}
			}
		}
		return
	}
	for _, c := range l.calculations {
		name := ""
		if len(s.top.Args) > 0 {
			name = s.top.Args[0].Text
		}
		n := c.Env.Names[name]
		if n == nil || n.Stmt != s.top || n.Twice || n.Index < 0 {
			continue
		}
		o := owner{s.Decl, s.top}
		switch n.Kind {
		case model.SectionName:
			if sec := c.Env.Sections[n.Index]; !sec.Bad {
				l.making(o, sec)
			}
		case model.MaterialName:
			if m := c.Env.Materials[n.Index]; !m.Bad && slices.Contains(m.Assumed, "nu = 0.3 for '"+m.Name+"'") {
				l.lines(o, "nu = 0.3", "nu = 0.3")
			}
		}
		return
	}
}

// ends offers to write out the ends that are taken as pinned.
func (l *list) ends(o owner) {
	all := l.results(o)
	if len(all) == 0 {
		return
	}
	m := all[0].Member
	if o.stmt.Body == nil && m.As == nil {
		return // it has no block yet, and needs more than this
	}
	var base, top []string
	for _, a := range m.Assumed {
		rest, ok := strings.CutPrefix(a, "pinned at ")
		if !ok {
			continue
		}
		where, axis, _ := strings.Cut(rest, " about ")
		if axis != "" {
			axis = " about " + axis
		}
		if where == "both ends" || where == "the base" {
			base = append(base, "base pinned"+axis)
		}
		if where == "both ends" || where == "the top" {
			top = append(top, "top pinned"+axis)
		}
	}
	said := append(slices.Clone(base), top...)
	if len(said) == 0 {
		return
	}
	env := l.envOf(all[0])
	var lines []string
	if len(base) > 0 {
		lines = append(lines, append(takenOver(env, o, "base"), base...)...)
	}
	if len(top) > 0 {
		lines = append(lines, append(takenOver(env, o, "top"), top...)...)
	}
	l.lines(o, strings.Join(said, ", "), lines...)
}

// making offers to write out how a section is made.
func (l *list) making(o owner, sec *model.Section) {
	if o.stmt.Body == nil || !slices.ContainsFunc(sec.Assumed, func(a string) bool { return strings.Contains(a, "(made is not given)") }) {
		return
	}
	if word := map[section.Made]string{section.Rolled: "rolled", section.Hot: "hot", section.Cold: "cold", section.Welded: "welded"}[sec.Shape.Made]; word != "" {
		l.lines(o, "made = "+word, "made = "+word)
	}
}

// lines offers to write an assumption as lines of a block.
func (l *list) lines(o owner, said string, lines ...string) {
	if e, ok := l.insert(o, lines...); ok {
		l.add(Offer{Kind: Rewrite, Title: "State what is assumed: " + said, edits: func() []checker.Edit { return []checker.Edit{e} }})
	}
}

// envOf is the part of the calculation that a result was worked out with.
func (l *list) envOf(r *checker.Result) *model.Env {
	for _, c := range l.calculations {
		if n := c.Env.Names[r.Name]; n != nil && n.Stmt == r.Member.Stmt {
			return c.Env
		}
	}
	return &model.Env{}
}
