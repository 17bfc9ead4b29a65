package size

import (
	"cmp"
	"slices"

	"kern/checker"
	"kern/checker/edit"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
)

// within are options that keep to what a calculation permits as well.
func (o Options) within(c *model.Choice) Options {
	if c == nil {
		return o
	}
	least := func(a, b float64) float64 {
		if a == 0 || b > 0 && b < a {
			return b
		}
		return a
	}
	o.MaxDepth, o.MaxWidth = least(o.MaxDepth, c.MaxDepth), least(o.MaxWidth, c.MaxWidth)
	if o.Families == nil {
		o.Families = c.Families
		return o
	}
	both := []string{}
	for _, f := range o.Families {
		if slices.Contains(c.Families, f) {
			both = append(both, f)
		}
	}
	o.Families = both
	return o
}

// sections gives the lightest section of the member's own family and of all that
// are allowed.
func (s *subject) sections(o Options) []Mend {
	m := s.r.Member
	if checker.Fixed(m) != "" {
		return nil
	}
	family, american, _ := checker.FamilyOf(m.Section)
	o = o.within(m.Choice)
	allowed := o.Families
	if allowed == nil {
		allowed = checker.Alike(m.Section, family, american)
	}
	t := s.trial()
	var out []Mend
	try := func(families []string) {
		if mend, ok := s.lightest(t, s.r.Candidates(families, o.MaxDepth, o.MaxWidth)); ok {
			if !slices.ContainsFunc(out, func(x Mend) bool { return x.Change == mend.Change }) {
				out = append(out, mend)
			}
		}
	}
	if slices.Contains(allowed, family) {
		try([]string{family})
	}
	if len(allowed) > 1 || !slices.Contains(allowed, family) {
		try(allowed)
	}
	return out
}

// lightest finds the first candidate with which the member passes; for a member
// that passes, one that is lighter than what it has.
func (s *subject) lightest(t *trial, list []checker.Candidate) (Mend, bool) {
	j := newJudge(s.r)
	passes := s.r.Verdict == standard.Passes
	refused := 0
	for _, c := range list {
		if passes && c.Section.Area >= s.r.Member.Section.Area*(1-1e-9) {
			break
		}
		if _, ok := j.passes(swap(c.Section)); !ok {
			continue
		}
		changes, ok := s.say("section", `section = "`+c.Section.Designation+`"`)
		if !ok {
			return Mend{}, false
		}
		if r, ok := t.passes(changes); ok {
			mend := s.mend(Section, c.Section.Designation, r, changes)
			mend.Family = c.Family
			if offset(s.r.Member) {
				mend.Note = "offsets of loads stay as they are: look whether they follow the size of the section"
			}
			return mend, true
		}
		if refused++; refused > 20 {
			break // others that are "as" this member hold it back, or the text does
		}
	}
	return Mend{}, false
}

func swap(to *model.Section) func(m *model.Member) {
	return func(m *model.Member) { m.Section = to }
}

// offset tells whether a load stands off the centroid.
func offset(m *model.Member) bool {
	return slices.ContainsFunc(m.Loads, func(l model.Load) bool { return l.Offset != [2]float64{} })
}

func used(r *checker.Result) float64 {
	u, _, _ := Used(r)
	return u
}

// shared are the members whose section is given in one place with that of the
// subject: a section that has a name, or a line that others take over. place is
// what is to be replaced there.
func (s *subject) shared() (users []*checker.Result, at edit.Line, ok bool) {
	m := s.r.Member
	if m.Section == nil {
		return nil, edit.Line{}, false
	}
	var named *model.Named
	for _, n := range m.Uses {
		if n.Kind == model.SectionName && n.Index >= 0 && n.Index < len(s.r.Env().Sections) && s.r.Env().Sections[n.Index] == m.Section {
			named = n
		}
	}
	for _, r := range s.report.Members {
		u := r.Member
		switch {
		case len(r.Missing) > 0 || u.Section == nil && named == nil:
		case named != nil && slices.ContainsFunc(u.Uses, func(n *model.Named) bool { return n.Place == named.Place }):
			if u.Section == nil || u.Section != m.Section && !u.Section.Same(m.Section) || checker.Fixed(u) != "" {
				return nil, edit.Line{}, false
			}
			users = append(users, r)
		case named == nil && u.SectionAt == m.SectionAt:
			if checker.Fixed(u) != "" {
				return nil, edit.Line{}, false
			}
			users = append(users, r)
		}
	}
	if named != nil {
		return users, edit.Line{Decl: named.Place.Decl, Stmt: named.Stmt}, !named.Twice
	}
	for _, l := range edit.Lines(s.calcs[0].Env, s.line) {
		if l.Stmt.Word == "section" {
			return users, l, true
		}
	}
	return nil, edit.Line{}, false
}

// manyUsers is how many members may share a section that one for all is looked
// for unasked.
const manyUsers = 300

// group gives the lightest section that serves all members that share one.
func (s *subject) group(o Options) []Mend {
	users, at, ok := s.shared()
	if o.Kinds == nil && len(users) > manyUsers {
		return nil // somebody waits; it is looked for where it is asked for
	}
	if !ok || len(users) < 2 || checker.Fixed(s.r.Member) != "" {
		return nil
	}
	family, american, _ := checker.FamilyOf(s.r.Member.Section)
	for _, u := range users {
		o = o.within(u.Member.Choice)
	}
	allowed := o.Families
	if allowed == nil {
		allowed = checker.Alike(s.r.Member.Section, family, american)
	}
	order := slices.Clone(users)
	slices.SortStableFunc(order, func(a, b *checker.Result) int { return cmp.Compare(b.Utilisation, a.Utilisation) })
	var judges []*judge
	all := true
	for _, r := range order {
		judges = append(judges, newJudge(r))
		all = all && r.Verdict == standard.Passes
	}
	var out []Mend
	try := func(families []string) {
		for _, c := range s.r.Candidates(families, o.MaxDepth, o.MaxWidth) {
			if (all || s.r.Verdict == standard.Passes) && c.Section.Area >= s.r.Member.Section.Area*(1-1e-9) {
				return
			}
			var worst *checker.Result
			fits := true
			for _, j := range judges {
				r, ok := j.passes(swap(c.Section))
				if fits = ok; !ok {
					break
				}
				if worst == nil || used(r) > used(worst) {
					worst = r
				}
			}
			if !fits {
				continue
			}
			if slices.ContainsFunc(out, func(x Mend) bool { return x.Change == c.Section.Designation }) {
				return
			}
			from, ok := valueStart(at.Stmt)
			if !ok {
				return
			}
			file, span := s.report.Where(lang.Place{Decl: at.Decl, Span: lang.Span{Start: from, End: at.Stmt.Span.End}})
			mass := c.Section.Area * s.r.Member.Material.Density
			most, governing, under := Used(worst)
			mend := Mend{Kind: Group, Change: c.Section.Designation, Family: c.Family, Utilisation: most, Governing: governing, Combination: under,
				MassPerLength: mass, Added: mass - Mass(s.r), Value: nan, Now: nan, Place: s.r.Member.SectionAt,
				edits: func() []checker.Edit {
					return s.layout.Tidy([]checker.Edit{{File: file, Span: span, New: `"` + c.Section.Designation + `"`}})
				}}
			for _, u := range users {
				mend.Serves = append(mend.Serves, u.Name)
			}
			out = append(out, mend)
			return
		}
	}
	if slices.Contains(allowed, family) {
		try([]string{family})
	}
	if len(allowed) > 1 || !slices.Contains(allowed, family) {
		try(allowed)
	}
	return out
}

// valueStart is where the value of a statement begins: behind its sign =.
func valueStart(s *lang.Stmt) (int32, bool) {
	for i, e := range s.Args {
		if e.Kind == lang.EqualsExpr && i+1 < len(s.Args) {
			return s.Args[i+1].Span.Start, true
		}
	}
	return 0, false
}
