package lsp

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/action"
	"kern/checker/model"
	"kern/checker/output"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// member gives the hints of a column, strut or tie.
func (c *collector) member(s *lang.Stmt) {
	var own []*checker.Result
	for _, r := range c.report.Results(c.decl) {
		if r.Member.Stmt == s {
			own = append(own, r)
		}
	}
	if len(own) == 0 {
		return
	}
	c.results(s, own)
	r := own[0] // several names of one block differ in their names alone
	if len(r.Missing) == 0 && c.shows(assumptionHint) {
		c.assumptions(s, r)
	}
	if s.Body == nil {
		return
	}
	for _, b := range s.Body.Stmts {
		if b.Broken {
			continue
		}
		c.madeOf(b, r.Member)
		c.worth(b, r)
	}
}

// results gives utilisation and governing check after the first line.
func (c *collector) results(s *lang.Stmt, own []*checker.Result) {
	say := resultLabel
	if c.past != nil {
		say = func(r *checker.Result) string { return resultLabel(r) + c.f.was(c.past, r) }
	}
	for _, g := range groupsOf(own, say) {
		label := g.label
		if len(g.results) < len(own) {
			label = g.names() + " " + label
		}
		r := g.results[0]
		c.add(c.behind(s), resultHint, label, func(p *output.Page) {
			p.Text(output.VerdictLine(r))
			output.Missing(p, r)
			openPoints(p, r)
			if check, ok := r.GoverningCheck(); ok && r.Verdict != standard.Undecided {
				output.CheckWorking(p, r, r.Derive(), check.Rule, 0)
			}
			if c.past != nil {
				c.f.since(p, r)
			}
		})
	}
}

// group is the results of one block that say the same.
type group struct {
	label   string
	results []*checker.Result
}

func (g group) names() string {
	var names []string
	for _, r := range g.results {
		names = append(names, r.Name)
	}
	return strings.Join(names, ", ")
}

// groupsOf groups results by what is said of them, in their order.
func groupsOf(own []*checker.Result, say func(*checker.Result) string) []group {
	var out []group
	for _, r := range own {
		label := say(r)
		i := slices.IndexFunc(out, func(g group) bool { return g.label == label })
		if i < 0 {
			i = len(out)
			out = append(out, group{label: label})
		}
		out[i].results = append(out[i].results, r)
	}
	return out
}

// resultLabel is a member's result in a few words. What a departure allows is
// said with it; an undecided member shows no number that could be taken for an
// answer.
func resultLabel(r *checker.Result) string {
	departs := ""
	if len(r.Departures) > 0 {
		departs = ", departs"
	}
	switch {
	case r.Verdict == standard.Undecided:
		return "undecided" + departs
	case math.IsNaN(r.Utilisation):
		return r.Verdict.String() + departs
	case r.Verdict == standard.Fails:
		return "fails " + checker.Ratio(r.Utilisation) + " " + r.Governing + departs
	}
	return checker.Ratio(r.Utilisation) + " " + r.Governing + departs
}

// assumptions gives what is assumed about a member, each at the line that brings
// it about, all else after the first line.
func (c *collector) assumptions(s *lang.Stmt, r *checker.Result) {
	m := r.Member
	at := map[*lang.Stmt][]string{}
	for _, a := range m.Assumed {
		text, _, _ := strings.Cut(a, " (")
		text = strings.Replace(text, "pinned at both ends", "pinned both ends", 1)
		at[s] = append(at[s], strings.Replace(text, " of the "+m.Kind.String(), "", 1))
	}
	for line, label := range c.factors(s, r) {
		at[line] = append(at[line], label)
	}
	if w := r.OwnWeight(); w > 0 {
		line := c.said(s, m, "selfweight")
		if line == nil {
			line = s
		}
		at[line] = append(at[line], "self-weight "+unit.Short(w/r.Units().For(unit.Force).Factor, 3)+" "+r.Units().For(unit.Force).Symbol+" in "+r.Env().Cases[r.Env().SelfWeight].Name)
	}
	for _, a := range r.Assumptions {
		if strings.HasPrefix(a, "twist held") || strings.HasPrefix(a, "an end is free to twist") {
			line := c.said(s, m, "hold twist")
			if line == nil {
				line = s
			}
			at[line] = append(at[line], twistShort(a))
		}
	}
	for line, labels := range at {
		c.add(c.behind(line), assumptionHint, strings.Join(labels, ", "), func(p *output.Page) {
			p.Text(output.Words("What is assumed about " + r.Name + ":"))
			var items []output.Line
			for _, a := range r.Assumptions {
				items = append(items, output.Words(a))
			}
			p.List(items...)
		})
	}
}

// twistShort is an assumption about twist in a few words.
func twistShort(a string) string {
	switch {
	case strings.Contains(a, "holds against twist"):
		return "twist held at ends and holds"
	case strings.HasPrefix(a, "twist held at both ends"):
		return "twist held at both ends"
	}
	text, _, _ := strings.Cut(a, ":")
	return text
}

// said is the first line of a member's own block that begins with some words.
func (c *collector) said(s *lang.Stmt, m *model.Member, words string) *lang.Stmt {
	if s.Body == nil {
		return nil
	}
	first, _, _ := strings.Cut(words, " ")
	for _, b := range s.Body.Stmts {
		if b.Word == first && strings.HasPrefix(strings.Join(strings.Fields(b.Line.Of(c.decl.Text)), " ")+" ", words+" ") {
			return b
		}
	}
	return nil
}

// factors gives the effective length factors by the line that brings them about:
// the hold at the upper or lower end of a stretch, the end condition, or, where
// nothing is said, the first line. A member that is like another says nothing of
// the factors that it takes over.
func (c *collector) factors(s *lang.Stmt, r *checker.Result) map[*lang.Stmt]string {
	frame := r.Frame()
	if frame == nil {
		return nil
	}
	m := r.Member
	type row struct{ factors [2][]string }
	rows := map[*lang.Stmt]*row{}
	for axis := range frame.Stretches {
		if !frame.Stands[axis] || frame.Exact[axis] {
			continue
		}
		for _, t := range frame.Stretches[axis] {
			line := c.cause(s, m, axis, t)
			if t.Overridden || line == nil || frame.Stepped(t.From, t.To) {
				continue
			}
			if rows[line] == nil {
				rows[line] = &row{}
			}
			rows[line].factors[axis] = append(rows[line].factors[axis], factor(t.K))
		}
	}
	out := map[*lang.Stmt]string{}
	for line, x := range rows {
		var parts []string
		for axis, list := range x.factors {
			if slices.ContainsFunc(list, func(k string) bool { return k != list[0] }) {
				parts = append(parts, strings.Join(list, "/")+" "+model.Axis(axis).String())
			} else if len(list) > 0 {
				parts = append(parts, list[0]+" "+model.Axis(axis).String())
			}
		}
		if len(parts) == 2 && strings.TrimSuffix(parts[0], "major") == strings.TrimSuffix(parts[1], "minor") {
			parts = []string{strings.TrimSuffix(parts[0], " major")}
		}
		out[line] = "K = " + strings.Join(parts, ", ")
	}
	return out
}

// cause is the line of the member's own block that brings a stretch about, its
// first line where nothing is said, and nil where another member says it.
func (c *collector) cause(s *lang.Stmt, m *model.Member, axis int, t action.Stretch) *lang.Stmt {
	of := func(at lang.Place) *lang.Stmt {
		if at.Decl == c.decl && s.Body != nil {
			for _, b := range s.Body.Stmts {
				if b.Line == at.Span {
					return b
				}
			}
		}
		return nil
	}
	about := model.Axis(axis).String()
	if t.Joints {
		if s.Body != nil {
			for _, b := range s.Body.Stmts {
				if b.Word == "joints" && slices.ContainsFunc(b.Args, func(e *lang.Expr) bool { return e.Is(about) }) {
					return b
				}
			}
		}
		return nil
	}
	taken := false // by a line of another member
	for _, z := range []float64{t.To, t.From} {
		for _, h := range m.Holds {
			if h.At == z && (axis == 0 && h.Major || axis == 1 && h.Minor) {
				if b := of(h.Place); b != nil {
					return b
				}
				taken = true
			}
		}
	}
	for _, word := range []string{"base", "top"} {
		if word == "base" && t.From > 0 || word == "top" && t.To < m.Height {
			continue
		}
		if s.Body == nil {
			break
		}
		for _, b := range s.Body.Stmts {
			if b.Word != word || len(b.Args) == 0 {
				continue
			}
			if len(b.Args) < 3 || !b.Args[1].Is("about") || b.Args[2].Is(about) {
				return b
			}
		}
	}
	if m.As != nil || taken {
		return nil
	}
	return s
}

// worth gives the value of heights and loads that are worked out.
func (c *collector) worth(s *lang.Stmt, r *checker.Result) {
	m, units := r.Member, r.Units()
	switch s.Word {
	case "height", "length":
		if value, ok := s.Assigned(); ok && len(value) == 1 && !writtenOut(value[0]) && m.Height > 0 {
			c.add(c.behind(s), valueHint, "= "+display(units, m.Height, unit.Length), nil)
		}
	case "from":
		if m.Height > 0 {
			c.add(c.behind(s), valueHint, "= "+display(units, m.Height, unit.Length), nil)
		}
	case "load":
		var parts []string
		floor := len(s.Args) > 0 && s.Args[0].Is("floor")
		written := true
		for i, e := range s.Args {
			if i < 2 && e.Kind != lang.NameExpr && !writtenOut(e) || i == 1 && e.Kind == lang.NameExpr && !lang.Joins(e.Text) {
				written = false
			}
		}
		if len(s.Args) > 0 && s.Args[0].Kind == lang.NameExpr && (len(s.Args) == 1 || lang.Joins(s.Args[1].Text)) {
			written = false
		}
		if written && !floor {
			return
		}
		for _, l := range m.Loads {
			if l.Place.Decl != c.decl || l.Place.Span != s.Line {
				continue
			}
			dim := output.LoadDim(l)
			value := unit.Quantity{Value: l.Value, Dim: dim}
			u := suitable(units, value)
			text := unit.Short(l.Value/u.Factor, 4) + " " + u.Symbol
			if floor {
				text = r.Env().Cases[l.Case].Name + " " + text
			}
			parts = append(parts, text)
		}
		if len(parts) > 0 {
			c.add(c.behind(s), valueHint, fmt.Sprintf("= %s", strings.Join(parts, ", ")), nil)
		}
	}
}
