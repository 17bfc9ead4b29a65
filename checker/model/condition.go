package model

import (
	"strings"

	"kern/checker/action"
	"kern/lang"
	"kern/lang/unit"
)

func (w *memberReader) limit(r *reader) {
	e := r.peek()
	word, ok := r.wordOf("what to limit", "utilisation", "slenderness", "sway", "deflection")
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
		double = w.m.Limits.Sway.Set()
		l := Movement{Place: at}
		names := r.names
		r.names = func(e *lang.Expr) (unit.Quantity, *lang.Problem) {
			if e.Text == "span" && w.env.Names["span"] == nil {
				return unit.Quantity{}, &lang.Problem{Rule: "unknown-name", Span: e.Span, Message: "sway is that of the whole member: it has a height, and no span",
					Fixes: []lang.Fix{lang.Replace("Write height", false, e.Span, "height")}}
			}
			return names(e)
		}
		l.Limit, _, _ = r.quantity(want{what: "the limit of sway", dim: unit.Length, unit: "mm", max: 10})
		w.under(r, &l)
		w.m.Limits.Sway = l
	case "deflection":
		double = w.m.Limits.Deflection.Set()
		w.deflection(r, at)
	}
	if double {
		r.fail("value-given-twice", r.stmt.Line, "the limit of %s is given twice", word)
	}
}

// under reads in which combinations a movement is limited.
func (w *memberReader) under(r *reader, l *Movement) {
	l.Under = action.Characteristic
	if _, ok := r.word("under"); ok {
		word, _ := r.wordOf("the situation of the limit", "characteristic", "frequent", "quasipermanent")
		l.Under, _ = action.SituationOf(word)
	}
}

// deflection reads the limit of deflections. The word "span" in it is the
// distance of neighbouring holds, which is known when all holds are.
func (w *memberReader) deflection(r *reader, at lang.Place) {
	span := w.m.Height
	names := r.names
	r.names = func(e *lang.Expr) (unit.Quantity, *lang.Problem) {
		if e.Text == "span" && w.env.Names["span"] == nil {
			return unit.Quantity{Value: span, Dim: unit.Length}, nil
		}
		return names(e)
	}
	e := r.peek()
	if e != nil && e.Kind != lang.QuantExpr { // one of a bad unit says so itself
		if q, p := lang.Eval(e, r.names); p == nil && q.Dim.IsNone() {
			r.take()
			at := lang.Span{Start: e.Span.Start, End: e.Span.Start}
			r.problem(lang.Problem{Rule: "missing-unit", Span: e.Span, Message: "the limit of deflection is a length: span / 300, 8 mm; this is a bare number",
				Fixes: []lang.Fix{lang.Replace("Write span * before it", false, at, "span * ")}})
			return
		}
	}
	v, _, ok := r.quantity(want{what: "the limit of deflection", dim: unit.Length, unit: "mm", max: 10})
	l := Movement{Place: at, Limit: v}
	w.under(r, &l)
	w.m.Limits.Deflection = l
	if !ok {
		return
	}
	lookup := r.names
	w.spans = func() {
		for a := range l.Spans {
			l.Spans[a] = nil
			for _, s := range w.m.Spans(Axis(a)) {
				span = s[1] - s[0]
				q, p := lang.Eval(e, lookup)
				if p != nil || !(q.Value > 0) {
					q.Value = unknown
				}
				l.Spans[a] = append(l.Spans[a], q.Value)
			}
		}
		w.m.Limits.Deflection = l
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
