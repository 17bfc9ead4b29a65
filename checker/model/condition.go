package model

import (
	"strings"

	"kern/lang"
	"kern/lang/unit"
)

func (w *memberReader) limit(r *reader) {
	e := r.peek()
	word, ok := r.wordOf("what to limit", "utilisation", "slenderness", "sway")
	if !ok {
		return
	}
	at := r.place(r.stmt.Line)
	if s := r.take(); s == nil || s.Kind != lang.EqualsExpr {
		r.fail("wrong-form", e.Span, "a limit has a value: limit %s = …", word)
		return
	}
	double := false
	switch word {
	case "utilisation":
		double = w.m.Limits.Utilisation != 0
		w.m.Limits.Utilisation, _, _ = r.quantity(want{what: "the limit of utilisation", min: 0.01, max: 1})
		w.m.Limits.UtilisationAt = at
	case "slenderness":
		double = w.m.Limits.Slenderness != 0
		w.m.Limits.Slenderness, _, _ = r.quantity(want{what: "the limit of slenderness", min: 5, max: 1000})
		w.m.Limits.SlendernessAt = at
	case "sway":
		double = w.m.Limits.Sway != 0
		w.m.Limits.Sway, _, _ = r.quantity(want{what: "the limit of sway", dim: unit.Length, unit: "mm", max: 10})
		w.m.Limits.SwayAt = at
	}
	if double {
		r.fail("value-given-twice", r.stmt.Line, "the limit of %s is given twice", word)
	}
}

func (w *memberReader) require(r *reader) {
	e := r.take()
	if e == nil || e.Kind != lang.NameExpr {
		r.fail("wrong-form", r.after(), "require names a result: require N_b_minor >= 400 kN because \"…\"")
		return
	}
	q := Require{Symbol: e.Text, SymbolAt: e.Span, Place: r.place(r.stmt.Line)}
	c := r.take()
	if c == nil || c.Kind != lang.CompareExpr || c.Text == "==" || c.Text == "!=" {
		span := e.Span
		if c != nil {
			span = c.Span
		}
		r.fail("wrong-form", span, "require compares with < <= > or >=: require N_b_minor >= 400 kN because \"…\"")
		return
	}
	q.Compare = c.Text
	v := r.take()
	if v == nil {
		r.fail("missing-value", r.stmt.Line, "require lacks the value to compare with")
		return
	}
	val, p := lang.Eval(v, w.lookup)
	if p != nil {
		r.problem(*p)
		return
	}
	q.Quantity, q.Value = val, v
	if r.may("because") {
		var ok bool
		if q.Because, ok = r.because(); !ok {
			return
		}
	}
	if r.end() {
		w.m.Requires = append(w.m.Requires, q)
	}
}

func (w *memberReader) depart(r *reader) {
	e := r.take()
	if e == nil || e.Is("because") {
		r.fail("wrong-form", r.stmt.Line, "depart names a check: depart slenderness because \"…\"")
		return
	}
	span := e.Span
	written := e.Span.Of(r.decl.Text)
	if e.Kind == lang.StringExpr {
		written = e.Text
	}
	// a rule's name has hyphens, which read as minus signs
	rule := strings.Join(strings.Fields(written), "")
	if e.Kind == lang.StringExpr && contains(w.known, rule) {
		r.problem(unquoted(e, "a check"))
		return
	}
	if !contains(w.known, rule) {
		p := lang.Problem{Rule: "unknown-rule", Span: span, Message: "'" + clip(rule) + "' is no check that a member can depart from"}
		near := Closest(rule, w.known, 2)
		if len(near) > 0 {
			p.Message += "; did you mean " + lang.OrList(near) + "?"
		}
		for _, n := range near {
			p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, span, n))
		}
		p.Notes = append(p.Notes, "`kern rules` lists the checks")
		r.problem(p)
		return
	}
	because, ok := r.because()
	if ok && r.end() {
		w.m.Departs = append(w.m.Departs, Departure{Rule: rule, Because: because, Place: r.place(r.stmt.Line)})
	}
}
