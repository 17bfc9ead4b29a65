package lsp

import (
	"math"
	"strings"

	"kern/checker"
	"kern/checker/output"
	"kern/checker/rule"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// member writes the verdict of a member with the table of its checks, what is
// assumed, what it departs from and what keeps it from a verdict.
func (h *hovering) member(r *checker.Result) {
	p := h.page
	head := output.Strong(r.Name)
	if r.Title != "" {
		head = output.Join(head, output.Words(" "+r.Title))
	}
	p.Text(output.Join(head, output.Words(": "), output.VerdictLine(r)))
	if m := r.Member; m.Section != nil && m.Material != nil && m.Height > 0 {
		p.Text(output.Words(output.SectionTitle(m.Section) + "; " + output.MaterialTitle(m.Material) + "; " + m.Kind.String() + " of " + output.Value(r.Units(), m.Height, unit.Length)))
	}
	output.Missing(p, r)
	if h.paper.history {
		h.f.since(p, r)
	}
	var rows [][]output.Line
	for _, c := range r.Checks {
		rows = append(rows, checkRow(r, c))
	}
	p.Table(checkHead, "lrrrl", rows)
	openPoints(p, r)
	h.sized(r)
	h.sensitivity(r)
	if len(r.Assumptions) > 0 {
		p.Text(output.Words("Assumed: " + strings.Join(r.Assumptions, "; ") + "."))
	}
}

// openPoints lists what keeps a member from a verdict, and what it departs from.
func openPoints(p *output.Page, r *checker.Result) {
	var open []output.Line
	for _, c := range r.Checks {
		if c.Verdict == standard.Undecided && c.Why != "" {
			open = append(open, output.Words("not decided: "+c.Rule+", "+c.Why))
		}
	}
	for _, c := range r.Coverage {
		if c.State == standard.NotCovered && !checkedRow(r, c.Rule) {
			open = append(open, output.Words("not covered: "+c.Rule+", "+c.Why))
		}
	}
	for _, d := range r.Departures {
		open = append(open, output.Words("departs from "+d.Rule+", because \""+d.Because+"\""))
	}
	p.List(open...)
}

// checkedRow tells whether a member has a row of a check.
func checkedRow(r *checker.Result, rule string) bool {
	for _, c := range r.Checks {
		if c.Rule == rule {
			return true
		}
	}
	return false
}

var checkHead = []string{"check", "utilisation", "demand", "capacity", "clause, combination"}

// checkRow is a row of the table of checks.
func checkRow(r *checker.Result, c standard.Check) []output.Line {
	name, clause := output.Words(c.Rule), c.Clause
	if c.Rule == "requirement" {
		name, clause = output.Words(c.Clause), ""
	}
	switch {
	case c.Departed && c.Verdict != standard.Passes:
		name = output.Join(name, output.Words(", departed from"))
	case c.Verdict == standard.Fails:
		name = output.Join(output.Strong("fails"), output.Words(" "), name)
	}
	if under := r.CombinationName(c); under != "" {
		clause = strings.TrimPrefix(clause+", "+under, ", ")
	}
	amount := func(v float64) output.Line {
		if math.IsNaN(v) {
			return output.Words("–")
		}
		return output.Words(r.Units().Show(v, c.Dim, 4))
	}
	return []output.Line{name, output.Words(checker.Ratio(c.Utilisation)), amount(c.Demand), amount(c.Capacity), output.Words(clause)}
}

// check writes about a check of the member: what it asks, what it comes to, and
// every step.
func (h *hovering) check(name string) {
	name = strings.Join(strings.Fields(name), "")
	page := rule.Find(name)
	if page == nil {
		return
	}
	h.page.Text(output.Strong(name), output.Words(": "+page.Summary))
	if r := h.result(); r != nil {
		output.CheckWorking(h.page, r, r.Derive(), name, 0)
	}
}

// symbol writes about a result of the member: its value and the steps to it.
func (h *hovering) symbol(word string) {
	r := h.result()
	if r == nil {
		return
	}
	if word == "utilisation" {
		h.page.Text(output.Strong(word), output.Words(": the greatest of all checks, "+lang.Words["utilisation"]))
		h.page.Text(output.VerdictLine(r))
		return
	}
	id, ok := r.Symbol(word)
	if !ok {
		return
	}
	sym := r.Symbols().At(id)
	name := output.Strong(sym.Name)
	if word != sym.Name {
		name = output.Join(output.Strong(word), output.Words(", by "+r.Standard+" "), output.Strong(sym.Name))
	}
	record := r.Derive()
	if record == nil {
		h.page.Text(name, output.Words(": "+sym.What+"; "+r.Name+" has no results"))
		return
	}
	steps := record.Leading(id)
	if len(steps) == 0 {
		h.page.Text(name, output.Words(": "+sym.What+"; the calculation of "+r.Name+" does not come to it"))
		return
	}
	h.page.Text(name, output.Words(": "+sym.What+", "+r.Name+" has "+output.Value(r.Units(), steps[len(steps)-1].Value, sym.Dim)))
	output.Steps(h.page, record.Set, r.Units(), steps)
}
