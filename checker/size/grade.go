package size

import (
	"cmp"
	"slices"
	"strings"

	"kern/checker/catalogue"
	"kern/checker/edit"
	"kern/checker/model"
)

// grades gives the next stronger grade of the same product standard with which
// the member passes.
func (s *subject) grades() []Mend {
	m := s.r.Member
	if m.Material == nil || m.Material.Grade == nil || m.Section == nil || len(m.Lifts) > 0 {
		return nil
	}
	table31 := s.r.Env().Basis.TableFy
	now, _, _, ok := m.Material.StrengthOf(m.Section, table31)
	if !ok {
		return nil
	}
	type step struct {
		grade catalogue.Grade
		fy    float64
	}
	var steps []step
	for _, g := range catalogue.Grades() {
		if g.Standard != m.Material.Grade.Standard || quality(g.Name) != quality(m.Material.Grade.Name) {
			continue
		}
		if fy, _, _, ok := model.GradedMaterial(g).StrengthOf(m.Section, table31); ok && fy > now {
			steps = append(steps, step{g, fy})
		}
	}
	slices.SortStableFunc(steps, func(a, b step) int { return cmp.Compare(a.fy, b.fy) })
	t := s.trial()
	for _, x := range steps {
		to := model.GradedMaterial(x.grade)
		if _, ok := newJudge(s.r).passes(func(m *model.Member) { m.Material = to }); !ok {
			continue
		}
		line := `material = "` + x.grade.Name + `"`
		if g, ok := catalogue.FindGrade(x.grade.Name, ""); !ok || g.Standard != x.grade.Standard {
			line += ` per "` + x.grade.Standard + `"`
		}
		changes, ok := s.say("material", line)
		if !ok {
			return nil
		}
		if r, ok := t.passes(changes); ok {
			return []Mend{s.mend(Grade, x.grade.Name, r, changes)}
		}
	}
	return nil
}

// quality is what stands in a European grade's name behind its strength: "J2" of
// "S355J2". All grades of an American standard count as alike.
func quality(name string) string {
	rest, ok := strings.CutPrefix(name, "S")
	if !ok {
		return ""
	}
	return strings.TrimLeft(rest, "0123456789")
}

// lengthUnit is the unit in which the member states its height, else metres.
func (s *subject) lengthUnit() string {
	for _, l := range edit.Lines(s.calcs[0].Env, s.line) {
		if value, ok := l.Stmt.Assigned(); ok && edit.Same(l.Stmt.Word) == "height" && len(value) == 1 {
			if u := unitOf(value[0]); u != "" && u != "mm" && u != "cm" {
				return u
			}
		}
	}
	if s.r.Units().American() {
		return "ft"
	}
	return "m"
}
