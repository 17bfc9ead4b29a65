package size

import (
	"math"
	"slices"

	"kern/checker/edit"
	"kern/lang"
)

// axisWords are the statements of a member that name axes of its section for what
// stands fast in the building: loads, ends, holds.
var axisWords = []string{"base", "top", "hold", "effective", "joints", "load"}

// turns gives the section turned by a right angle, where the member passes so: what
// bends or holds it about one axis does so about the other. A member that takes such
// lines over from another, or that says something else about an axis, is left alone.
func (s *subject) turns() []Mend {
	m := s.r.Member
	if m.Imported != nil || m.Section == nil || math.Abs(m.Section.IMajor-m.Section.IMinor) <= 1e-9*m.Section.IMajor {
		return nil // forces of a table belong to the axes that they were found for
	}
	var changes []lang.Change
	for _, l := range edit.Lines(s.calcs[0].Env, s.line) {
		own := l.Decl == s.line.Decl && s.line.Stmt.Body != nil && slices.Contains(s.line.Stmt.Body.Stmts, l.Stmt)
		for _, a := range l.Stmt.Args {
			other := map[bool]string{a.Is("major"): "minor", a.Is("minor"): "major"}[true]
			switch {
			case other == "":
				continue
			case !own || l.Stmt.Broken || !slices.Contains(axisWords, l.Stmt.Word):
				return nil
			}
			changes = append(changes, lang.Change{Span: a.Span, New: other})
		}
	}
	if len(changes) == 0 || len(m.Departs) > 0 || len(m.Requires) > 0 {
		return nil // nothing to turn, or a condition that names an axis
	}
	slices.SortFunc(changes, func(a, b lang.Change) int { return int(a.Span.Start - b.Span.Start) })
	r, ok := s.trial().passes(changes)
	if !ok {
		return nil
	}
	out := s.mend(Turn, "section turned by 90 degrees: major and minor exchanged", r, changes)
	out.Note = "the connections turn with the section"
	return []Mend{out}
}
