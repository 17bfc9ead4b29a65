package model

import (
	"strings"

	"kern/checker/catalogue"
	"kern/lang"
	"kern/lang/unit"
)

// Choice are the sections that a calculation permits for a member.
type Choice struct {
	Families []string // of the catalogue, as it spells them
	// MaxDepth and MaxWidth are the greatest outside dimensions, m; 0 for none.
	MaxDepth, MaxWidth float64
	Place              lang.Place
}

// choose reads
//
//	choose section from FAMILY[, FAMILY …] [with depth|width <= LENGTH [and depth|width <= LENGTH]]
func (w *memberReader) choose(r *reader) {
	c := &Choice{Place: r.place(r.stmt.Line)}
	if _, ok := r.wordOf("what is chosen", "section"); !ok {
		return
	}
	if _, ok := r.wordOf("the list of families", "from"); !ok {
		return
	}
	for {
		e := r.peek()
		if e == nil || e.Kind != lang.NameExpr && e.Kind != lang.StringExpr {
			r.fail("wrong-form", r.after(), "a family of sections is missing: choose section from HEB, HEA with depth <= 200 mm")
			return
		}
		r.take()
		family := ""
		for _, f := range catalogue.Families() {
			if strings.EqualFold(f, e.Text) {
				family = f
			}
		}
		if family == "" {
			p := lang.Problem{Rule: "unknown-section", Span: e.Span, Message: "'" + clip(e.Text) + "' is no family of the catalogue"}
			near, sure := nearest(strings.ToUpper(e.Text), catalogue.Families(), 3)
			if len(near) > 0 {
				p.Message += "; the nearest are " + lang.OrList(near)
			}
			for _, n := range near {
				p.Fixes = append(p.Fixes, lang.Replace("Write "+n, sure && len(near) == 1, e.Span, n))
			}
			r.problem(p)
			return
		}
		c.Families = append(c.Families, family)
		if next := r.peek(); next == nil || next.Kind != lang.CommaExpr {
			break
		}
		r.take()
	}
	if _, ok := r.word("with"); ok {
		for {
			what, ok := r.wordOf("what is bounded", "depth", "width")
			if !ok {
				return
			}
			sign := r.take()
			if sign == nil || sign.Kind != lang.CompareExpr || sign.Text != "<=" {
				r.fail("wrong-form", r.stmt.Line, "a dimension of the section is bounded from above: %s <= 200 mm", what)
				return
			}
			v, _, ok := r.quantity(want{what: "the greatest " + what, dim: unit.Length, unit: "mm", min: 0.01, max: 5})
			if !ok {
				return
			}
			to := map[string]*float64{"depth": &c.MaxDepth, "width": &c.MaxWidth}[what]
			if *to > 0 {
				r.fail("value-given-twice", r.stmt.Line, "the greatest %s is given twice", what)
				return
			}
			*to = v
			if _, more := r.word("and"); !more {
				break
			}
		}
	}
	w.m.Choice = c
}
