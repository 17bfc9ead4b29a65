package checker

import (
	"fmt"
	"slices"
	"strings"

	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// chosen looks whether the section is one of those that the member may have, and
// whether a lighter one of these would do. Neither says anything of the strength.
func (r *Result) chosen() {
	m := r.Member
	c := m.Choice
	if c == nil || m.Section == nil || len(m.Lifts) > 0 {
		return
	}
	at := m.SectionAt
	if at.Decl != m.Decl {
		at = lang.Place{Decl: m.Decl, Span: m.NameSpan}
	}
	related := []lang.Related{{Place: c.Place, Message: "the sections that it may have"}}
	if why := permitted(m.Section, c); why != "" {
		r.problems = append(r.problems, lang.Diagnostic{Decl: at.Decl, Problem: lang.Problem{Rule: "section-not-permitted", Severity: lang.Warning, Span: at.Span, Member: r.Name,
			Message: fmt.Sprintf("%s has %s, which is none of the sections that it may have: %s", r.Name, m.Section.Title(), why), Related: related}})
		return
	}
	if r.Verdict != standard.Passes || Fixed(m) != "" {
		return
	}
	killer := -1
	for _, x := range r.Candidates(c.Families, c.MaxDepth, c.MaxWidth) {
		if x.Section.Area >= m.Section.Area*(1-1e-9) {
			return
		}
		swap := func(m *model.Member) { m.Section = x.Section }
		if len(m.Requires) == 0 && r.FailsUnder(killer, swap) {
			continue
		}
		out := r.With(swap)
		if out.Verdict != standard.Passes || len(out.Missing) > 0 {
			if k, ok := out.GoverningCheck(); ok {
				killer = k.Combination
			}
			continue
		}
		p := lang.Problem{Rule: "lighter-section", Severity: lang.Information, Span: at.Span, Member: r.Name, Related: related,
			Message: fmt.Sprintf("%s would pass with %s at %s, %s less than with %s", r.Name, x.Section.Designation, Ratio(out.Utilisation),
				r.Units().Show((m.Section.Area-x.Section.Area)*m.Material.Density, unit.MassPerLength, 3), m.Section.Title())}
		if s := ownSection(m); s != nil {
			p.Fixes = append(p.Fixes, lang.Replace("Write "+x.Section.Designation, false, *s, `"`+x.Section.Designation+`"`))
		}
		r.problems = append(r.problems, lang.Diagnostic{Decl: at.Decl, Problem: p})
		return
	}
}

// permitted says why a section is none of a choice, "" when it is one.
func permitted(s *model.Section, c *model.Choice) string {
	family, _, _ := FamilyOf(s)
	d, w := Outside(s.Shape)
	switch {
	case !slices.Contains(c.Families, family):
		return "it is no " + strings.Join(c.Families, " or ")
	case c.MaxDepth > 0 && d > c.MaxDepth*(1+1e-9):
		return "it is " + unit.Short(d*1e3, 4) + " mm deep"
	case c.MaxWidth > 0 && w > c.MaxWidth*(1+1e-9):
		return "it is " + unit.Short(w*1e3, 4) + " mm wide"
	}
	return ""
}

// ownSection is the designation in the member's own block, nil for a section that
// is given elsewhere or otherwise.
func ownSection(m *model.Member) *lang.Span {
	if m.Stmt == nil || m.Stmt.Body == nil {
		return nil
	}
	for _, b := range m.Stmt.Body.Stmts {
		if value, ok := b.Assigned(); ok && b.Word == "section" && len(value) == 1 && value[0].Kind == lang.StringExpr {
			return &value[0].Span
		}
	}
	return nil
}
