package lsp

import (
	"fmt"
	"math"
	"strings"

	"kern/checker"
	"kern/checker/action"
	"kern/checker/model"
	"kern/checker/output"
	"kern/lang"
	"kern/lang/unit"
)

// name writes about the name at a place: what it stands for and where it comes
// from. It is false where no name with a meaning stands.
func (h *hovering) name(offset int32) bool {
	m, ok := h.f.Report().NameAt(h.f.Name, offset)
	if !ok {
		return false
	}
	h.calc, h.span = m.Calculation, m.Place.Span
	n, env := m.Named, m.Calculation.Env
	if n.Twice {
		h.page.Text(output.Strong(n.Name), output.Words(" is given twice: nobody can tell which is meant."))
		return true
	}
	bad := func() {
		h.page.Text(output.Strong(n.Name), output.Words(": "+n.Kind.String()+" with an error"))
	}
	switch n.Kind {
	case model.ValueName:
		h.value(n)
	case model.MaterialName:
		if n.Index < 0 || env.Bad(n) {
			bad()
			break
		}
		h.material(env.Materials[n.Index])
	case model.SectionName:
		if n.Index < 0 || env.Bad(n) {
			bad()
			break
		}
		h.section(env.Sections[n.Index], densityOf(h.f.Report(), n))
	case model.CaseName:
		if n.Index < 0 || env.Cases[n.Index].Bad {
			bad()
			break
		}
		h.loadCase(n)
	case model.CombinationName:
		if n.Index < 0 {
			bad()
			break
		}
		h.combination(env.Combinations[n.Index])
	case model.LevelName:
		if n.Index < 0 || env.Levels[n.Index].Bad {
			bad()
			break
		}
		h.level(env.Levels[n.Index])
	case model.MemberName:
		for _, r := range h.f.Report().Results(n.Place.Decl) {
			if r.Name == n.Name {
				h.member(r)
			}
		}
	}
	h.comesFrom(n.Place)
	return true
}

// comesFrom says where a name was given, when that is another line.
func (h *hovering) comesFrom(at lang.Place) {
	if at.Decl == h.at.Decl && at.Span == h.span {
		return
	}
	file, span := h.f.Report().Where(at)
	if file == "" {
		return
	}
	line := h.f.textOf(file).Line(span.Start) + 1
	where := fmt.Sprintf("Given in line %d.", line)
	if file != h.f.Name {
		where = fmt.Sprintf("Given in %s, line %d.", file, line)
	}
	h.page.Text(output.Words(where))
}

// value writes about a named value.
func (h *hovering) value(n *model.Named) {
	expr, _ := n.Stmt.Assigned()
	q, ok := h.calc.Env.Quantity(n.Name)
	if !ok || len(expr) == 0 {
		h.page.Text(output.Strong(n.Name), output.Words(" has no value."))
		return
	}
	u := suitable(h.units(), q)
	h.page.Text(output.Strong(n.Name), output.Words(" = "), output.Strong(quantityText(h.units(), q)), output.Words(", "+lang.A(q.Dim.Name())))
	if e := expr[0]; e.Kind != lang.QuantExpr && e.Kind != lang.NumberExpr {
		line := output.Code(e.Span.Of(n.Place.Decl.Text))
		if numbers, names := withNumbers(h.calc, n.Place.Decl, e, h.units()); names > 0 {
			line = output.Join(line, output.Words(" = "), output.Code(numbers))
		}
		h.page.Text(line)
	}
	if !q.Dim.IsNone() {
		if base := q.Dim.Base(); base != u.Symbol {
			h.page.Text(output.Words("In SI: " + unit.Short(q.Value, 7) + " " + base))
		}
	}
}

// withNumbers writes an expression with the values of its names put in, and how
// many names it has.
func withNumbers(c *model.Calculation, d *lang.Decl, e *lang.Expr, units map[unit.Dim]unit.Unit) (string, int) {
	var b strings.Builder
	at, names := e.Span.Start, 0
	e.Walk(func(x *lang.Expr) {
		if x.Kind != lang.NameExpr || x.Span.Start < at {
			return
		}
		if _, constant := lang.Constants[x.Text]; constant {
			return
		}
		q, ok := c.Env.Quantity(x.Text)
		if !ok {
			return
		}
		text := quantityText(units, q)
		rest := strings.TrimLeft(d.Text[x.Span.End:min(int(e.Span.End), len(d.Text))], " ")
		if q.Value < 0 || strings.HasPrefix(rest, "^") && strings.Contains(text, " ") {
			text = "(" + text + ")"
		}
		b.WriteString(d.Text[at:x.Span.Start] + text)
		at = x.Span.End
		names++
	})
	b.WriteString(d.Text[at:e.Span.End])
	return strings.Join(strings.Fields(b.String()), " "), names
}

// loadCase writes about a load case: its kind, its category with the combination
// factor, and who has loads of it.
func (h *hovering) loadCase(n *model.Named) {
	c := h.calc.Env.Cases[n.Index]
	text := ": " + c.Kind.String() + " action"
	if c.Given != "" {
		text += ", category " + c.Given
	}
	h.page.Text(output.Strong(c.Name), output.Words(text))
	if psi := h.psi(c); psi != "" {
		h.page.Text(output.Words(psi))
	}
	if h.calc.Env.SelfWeight == n.Index {
		h.page.Text(output.Words("Self-weight is added to this case."))
	}
	var members, levels []string
	for _, m := range h.calc.Members {
		for _, l := range m.Loads {
			if l.Case == n.Index && m.Name != "" {
				members = append(members, m.Name)
				break
			}
		}
	}
	for _, l := range h.calc.Env.Levels {
		for _, p := range l.Pressures {
			if p.Case == n.Index {
				levels = append(levels, l.Name)
			}
		}
	}
	h.users("Loads of it: ", members, "none")
	h.users("On the floors of: ", levels, "")
}

// psi writes the combination, frequent and quasi-permanent values of a case, and
// where they come from; "" for a case that has none.
func (h *hovering) psi(c *model.Case) string {
	env := h.calc.Env
	if env.Basis.Basic() {
		return ""
	}
	values := env.Basis.Combining.Values
	if env.Basis.Actions == "" {
		values = action.Recommended
	}
	psi, ok := values.Psi(c.Case)
	if !ok {
		return ""
	}
	source := "EN 1990 Table A1.1, " + values.Annex
	if c.Stated != [3]bool{} {
		source = "stated with the case, because \"" + c.Because + "\""
		if c.Stated != [3]bool{true, true, true} {
			source += ", the others from EN 1990 Table A1.1, " + values.Annex
		}
	}
	return fmt.Sprintf("psi_0 = %s, psi_1 = %s, psi_2 = %s (%s)", unit.Short(psi[0], 3), unit.Short(psi[1], 3), unit.Short(psi[2], 3), source)
}

// users lists who uses something, the first few by name.
func (h *hovering) users(head string, names []string, none string) {
	const most = 8
	switch n := len(names); {
	case n == 0 && none == "":
	case n == 0:
		h.page.Text(output.Words(head + none))
	case n > most:
		h.page.Text(output.Words(fmt.Sprintf("%s%s and %d more", head, strings.Join(names[:most], ", "), n-most)))
	default:
		h.page.Text(output.Words(head + strings.Join(names, ", ")))
	}
}

// combination writes the factors of a combination that is written out.
func (h *hovering) combination(c model.Combination) {
	h.page.Text(output.Strong(c.Label), output.Words(": a combination of load cases"))
	var rows [][]output.Line
	for i, factor := range c.Factors {
		if factor != 0 && i < len(h.calc.Env.Cases) {
			k := h.calc.Env.Cases[i]
			rows = append(rows, []output.Line{output.Words(k.Name), output.Words(k.Kind.String()), output.Words(unit.Short(factor, 6))})
		}
	}
	h.page.Table([]string{"case", "kind", "factor"}, "llr", rows)
	var governs []string
	own := map[*model.Member]bool{}
	for _, m := range h.calc.Members {
		own[m] = true
	}
	for _, r := range h.f.Report().Members {
		if own[r.Member] && r.Combination == c.Name {
			governs = append(governs, r.Name)
		}
	}
	h.users("It governs: ", governs, "no member")
}

// level writes about a level: its height, its loads and who stands between it
// and another.
func (h *hovering) level(l *model.Level) {
	h.page.Text(output.Strong(l.Name), output.Words(": a level at "+quantityText(h.units(), unit.Quantity{Value: l.At, Dim: unit.Length})+" above datum"))
	var rows [][]output.Line
	pressure := h.units().Pressure()
	for _, p := range l.Pressures {
		c := h.calc.Env.Cases[p.Case]
		rows = append(rows, []output.Line{output.Words(c.Name), output.Words(c.Kind.String()), output.Words(unit.Short(p.Value/pressure.Factor, 5) + " " + pressure.Symbol)})
	}
	h.page.Table([]string{"case", "kind", "load on the floor"}, "llr", rows)
}

// densityOf is the density of the material that a section is used with: that of
// steel where nobody uses it, NaN where users differ.
func densityOf(r *checker.Report, n *model.Named) float64 {
	density := 0.0
	for _, m := range r.Users(n) {
		if m.Member.Section == nil || m.Member.Section.Name != n.Name || m.Member.Material == nil {
			continue
		}
		switch d := m.Member.Material.Density; {
		case density == 0:
			density = d
		case d != density:
			return math.NaN()
		}
	}
	if density == 0 {
		return steelDensity
	}
	return density
}
