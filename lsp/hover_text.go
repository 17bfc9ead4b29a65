package lsp

import (
	"fmt"
	"strings"

	"kern/checker"
	"kern/checker/action"
	"kern/checker/catalogue"
	"kern/checker/output"
	"kern/lang"
)

// quoted writes about text in quotes, which names the outside world: what it is
// depends on the statement that it stands in.
func (h *hovering) quoted(s *lang.Stmt) {
	e, _ := h.expr(lang.StringExpr)
	if e == nil {
		return
	}
	h.span = e.Span
	before := "" // the word before it
	for _, a := range s.Args {
		if a == e {
			break
		}
		if before = ""; a.Kind == lang.NameExpr {
			before = a.Text
		}
	}
	switch context := h.context(); {
	case (s.Word == "include" || s.Word == "forces") && context == lang.InFile:
		h.include(s)
	case s.Word == "section" && before == "":
		h.sectionText(e.Text)
	case s.Word == "material" && before == "per":
		h.productStandard(e.Text)
	case s.Word == "material":
		standard := ""
		for i, a := range s.Args {
			if a.Is("per") && i+1 < len(s.Args) {
				standard = s.Args[i+1].Text
			}
		}
		if g, ok := catalogue.FindGrade(e.Text, standard); ok {
			h.grade(g)
		}
	case s.Word == "case" && context == lang.InFile:
		h.category(s, e.Text)
	case s.Word == "actions" && before == "annex":
		h.annex(e.Text, "EN 1990", action.NationalsOf(e.Text))
	case s.Word == "standard" && before == "annex":
		name := s.Args[0].Text
		h.annex(e.Text, name, checker.Nationals(name, e.Text))
	case s.Word == "standard":
		h.standard(e.Text)
	case s.Word == "actions" && before == "":
		h.actions()
	case contextOf(s) == lang.InMember && context == lang.InFile: // its title
		if r := h.result(); r != nil {
			h.member(r)
		}
	}
}

// sectionText writes about a designation in quotes.
func (h *hovering) sectionText(text string) {
	e, ok := catalogue.Find(text)
	if !ok {
		return
	}
	if r := h.result(); r != nil && h.context() == lang.InMember && r.Member.Section != nil && r.Member.Section.Designation == e.Designation {
		density := float64(steelDensity)
		if r.Member.Material != nil {
			density = r.Member.Material.Density
		}
		h.section(r.Member.Section, density)
		return
	}
	if s := h.at.Stmts[0]; h.calc != nil && h.context() == lang.InFile && len(s.Args) > 0 {
		if n := h.calc.Env.Names[s.Args[0].Text]; n != nil && n.Stmt == s && n.Index >= 0 && !h.calc.Env.Bad(n) {
			h.section(h.calc.Env.Sections[n.Index], densityOf(h.f.Report(), n))
			return
		}
	}
	h.designation(e)
}

// productStandard lists the grades of a product standard.
func (h *hovering) productStandard(text string) {
	var names []string
	found := ""
	for _, g := range catalogue.Grades() {
		if other, ok := catalogue.FindGrade(g.Name, text); ok && other.Standard == g.Standard {
			names, found = append(names, g.Name), g.Standard
		}
	}
	if found != "" {
		h.page.Text(output.Strong(found), output.Words(": a product standard of structural steel"))
		h.page.Text(output.Words("Grades: " + strings.Join(names, ", ")))
	}
}

// category writes about the category of a load case.
func (h *hovering) category(s *lang.Stmt, text string) {
	if h.calc == nil {
		return
	}
	for _, c := range h.calc.Env.Cases {
		if c.Given != text || len(s.Args) == 0 || c.Name != s.Args[0].Text {
			continue
		}
		h.page.Text(output.Strong(text), output.Words(": category of "+c.Kind.String()+" actions"))
		if psi := h.psi(c); psi != "" {
			h.page.Text(output.Words(psi))
		}
	}
}

// standard writes which checks a design standard makes.
func (h *hovering) standard(name string) {
	rules := checker.Rules(name)
	if rules == nil {
		return
	}
	h.page.Text(output.Strong(name), output.Words(": the design standard that members are checked to"))
	h.page.Text(output.Words("Checks: " + strings.Join(rules, ", ") + "."))
	if a := checker.Annexes(name); len(a) > 0 {
		h.page.Text(output.Words("Sets of national values: " + strings.Join(a, ", ") + "."))
	}
	if o := checker.Overrides(name); len(o) > 0 {
		h.page.Text(output.Words("A basis may replace: " + strings.Join(o, ", ") + "."))
	}
}

// actions writes the combinations that the basis makes.
func (h *hovering) actions() {
	if h.calc == nil || h.calc.Env.Basis.Actions == "" {
		return
	}
	b := h.calc.Env.Basis
	by := "equation (" + b.Equation + ")"
	if b.Basic() {
		by = b.Equation
	}
	h.page.Text(output.Strong(b.Actions), output.Words(fmt.Sprintf(": combinations by %s, %d in this calculation", by, len(h.calc.Env.Automatic))))
	const most = 12
	var items []output.Line
	for i, c := range h.calc.Env.Automatic {
		if i == most {
			items = append(items, output.Words(fmt.Sprintf("and %d more", len(h.calc.Env.Automatic)-most)))
			break
		}
		items = append(items, output.Words(c.Name))
	}
	h.page.List(items...)
}

// annex writes the numbers of an annex to a standard.
func (h *hovering) annex(name, standard string, numbers []action.National) {
	var rows [][]output.Line
	for _, n := range numbers {
		rows = append(rows, []output.Line{output.Words(n.What), output.Words(n.Value), output.Words(n.Source)})
	}
	h.page.Text(output.Strong(name), output.Words(": "+lang.Words["annex"]+" to "+standard))
	if len(rows) > 0 {
		h.page.Table([]string{"number", "value", "source"}, "lll", rows)
	}
}

// include writes which file an include means and what it brings.
func (h *hovering) include(s *lang.Stmt) {
	project := h.f.Project()
	name := project.Included(h.f.Name, s)
	file := project.Files[name]
	if name == "" || file == nil {
		return
	}
	h.page.Text(output.Strong(name))
	brings := map[string][]string{}
	order := []string{"basis", "case", "level", "combination", "material", "section", "column", "strut", "tie", "value", "include"}
	for _, d := range file.Decls {
		for _, st := range d.Stmts {
			word, what := st.Word, ""
			if _, assigned := st.Assigned(); assigned {
				word, what = "value", st.Word
			} else if len(st.Args) > 0 {
				what = st.Args[0].Text
			}
			switch word {
			case "basis":
				what = "the design basis"
			case "column", "strut", "tie":
				for i, a := range st.Args {
					if a.Kind == lang.NameExpr && i > 0 && st.Args[i-1].Kind == lang.CommaExpr {
						what += ", " + a.Text
					}
				}
			}
			if what != "" {
				brings[word] = append(brings[word], what)
			}
		}
	}
	var rows [][]output.Line
	for _, word := range order {
		list := brings[word]
		const most = 12
		if len(list) > most {
			list = append(list[:most:most], fmt.Sprintf("… (%d in all)", len(brings[word])))
		}
		if len(list) > 0 {
			rows = append(rows, []output.Line{output.Words(word), output.Words(strings.Join(list, ", "))})
		}
	}
	h.page.Table([]string{"brings", ""}, "ll", rows)
}
