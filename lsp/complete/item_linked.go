package complete

import (
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/lang"
	"kern/lang/unit"
)

// takesResults tells whether a place may use the results of members: a named
// value, and the block of a member but for what it is made of.
func (s *scope) takesResults() bool {
	switch s.in {
	case lang.InMember:
		return s.head != "section" && s.head != "material" && s.head != ""
	case lang.InFile:
		return !lang.StartsDeclaration(s.head, false)
	}
	return false
}

// resultsOfMember are the results of a member where one of some dimensions is
// due, with what they are now; nil takes any.
func (s *scope) resultsOfMember(name string, dims []unit.Dim) []Item {
	n := s.env.Names[name]
	if n == nil || n.Kind != model.MemberName || !s.takesResults() || s.member != nil && n.Stmt == s.member {
		return nil
	}
	var r *checker.Result
	for _, x := range s.report.Results(n.Place.Decl) {
		if x.Name == name {
			r = x
		}
	}
	if r == nil {
		return nil
	}
	var out []Item
	add := func(what, detail string, group int) {
		q, ok := r.Linked(what)
		switch {
		case !ok:
			detail += ", has no value"
			group = 5
		case !fitting(dims, q.Dim):
			return
		default:
			detail += ", now " + s.show(q)
		}
		out = append(out, Item{Label: name + "." + what, Detail: detail, Kind: ResultItem, Group: group, Eager: true})
	}
	for _, what := range []string{"base.N", "base.uplift"} {
		add(what, checker.BaseResults[what], 0)
	}
	for _, c := range s.env.OwnCases() {
		add("base."+c.Name, "the axial force at the base from "+c.Name+", without a factor", 0)
	}
	add("height", "the member's height", 2)
	value := r.Values()
	for _, x := range s.standards() {
		for _, item := range s.resultsOf(x, value, true) {
			if dim, ok := s.symbolDim(item.Label); !ok || !fitting(dims, dim) {
				continue
			}
			item.Label = name + "." + item.Label
			item.Group++
			out = append(out, item)
		}
	}
	typed := strings.ToLower(s.typed())
	kept := out[:0]
	for _, x := range out {
		if begins(x.Label, typed) {
			kept = append(kept, x)
		}
	}
	return kept
}
