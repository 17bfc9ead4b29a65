package review

import (
	"maps"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/lang"
)

// side is one state of a calculation.
type side struct {
	report *checker.Report
	calc   *model.Calculation
	parts  *state
	lines  *lines
	places map[*lang.Decl][]string // what a declaration mentions, as ids
	ranks  map[*side]map[string]int
}

// newSide takes a calculation apart.
func newSide(r *checker.Report, c *model.Calculation, l *lines) *side {
	return &side{report: r, calc: c, parts: takeApart(c.Files), lines: l, places: map[*lang.Decl][]string{}, ranks: map[*side]map[string]int{}}
}

// rank gives every id of this state and an earlier one its place in the order of
// both: what only the earlier one has comes behind what it came behind there.
func (s *side) rank(earlier *side) map[string]int {
	if out, ok := s.ranks[earlier]; ok {
		return out
	}
	behind := map[string][]string{}
	last := ""
	for _, id := range earlier.parts.order {
		if s.parts.all[id] != nil {
			last = id
		} else {
			behind[last] = append(behind[last], id)
		}
	}
	out := map[string]int{}
	for _, id := range append([]string{""}, s.parts.order...) {
		out[id] = len(out)
		for _, x := range behind[id] {
			out[x] = len(out)
		}
	}
	s.ranks[earlier] = out
	return out
}

// kindFirst sorts the heads of tables before everything else.
func kindFirst(id string) string {
	if strings.HasPrefix(id, "table ") {
		return ""
	}
	return "x"
}

// inOrder lists ids by their rank.
func inOrder(ids map[string]bool, rank map[string]int) []string {
	out := make([]string, 0, len(ids))
	for id, in := range ids {
		if in {
			out = append(out, id)
		}
	}
	slices.SortFunc(out, func(x, y string) int { return rank[x] - rank[y] })
	return out
}

// mentions are the ids of what a declaration of the text speaks of.
func (s *side) mentions(d *lang.Decl) []string {
	if out, ok := s.places[d]; ok {
		return out
	}
	var out []string
	checker.Mentions(s.calc, d, func(m checker.Mention) {
		kind := [...]string{model.ValueName: "value", model.MaterialName: "material", model.SectionName: "section", model.LevelName: "level",
			model.MemberName: "member", model.CaseName: "", model.CombinationName: ""}[m.Named.Kind]
		if id := kind + " " + m.Named.Name; kind != "" && !slices.Contains(out, id) {
			out = append(out, id)
		}
	})
	s.places[d] = out
	return out
}

// closure are the declarations that a member depends on, itself among them.
func (s *side) closure(id string) map[string]bool {
	out := map[string]bool{}
	dotted := false
	follow := func(queue ...string) {
		for len(queue) > 0 {
			id := queue[0]
			queue = queue[1:]
			d := s.parts.all[id]
			if d == nil || out[id] {
				continue
			}
			out[id] = true
			if d.kind == "rows" {
				queue = append(queue, "forces")
			}
			for _, f := range d.facts {
				if f.table != "" {
					queue = append(queue, "table "+f.table)
				}
			}
			for _, decl := range d.decls {
				dotted = dotted || decl.Dotted && (d.kind == "member" || d.kind == "value")
				queue = append(queue, s.mentions(decl)...)
			}
		}
	}
	rows := func(id string) string { return strings.Replace(id, "member ", "rows ", 1) }
	follow(id, "basis", "cases", "combinations", "exclusives", rows(id))
	if dotted { // who uses another's result uses its forces too; a likeness takes over lines alone
		for other := range maps.Clone(out) {
			if strings.HasPrefix(other, "member ") {
				follow(rows(other))
			}
		}
	}
	return out
}
