package model

import (
	"fmt"
	"slices"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/lang"
	"kern/lang/unit"
)

// basis reads the design basis.
func (b *builder) basis() {
	env := b.env
	env.Basis = Basis{Overrides: map[string]Override{}, Show: derivation.Units{}, SelfWeight: true, Combining: Combining{Values: action.Recommended}}
	for i, d := range b.of("basis") {
		r := b.reader(d)
		if i > 0 {
			p := lang.Problem{Rule: "value-given-twice", Span: d.stmt.Head, Message: "a calculation has one basis", Related: []lang.Related{{Place: env.Basis.Place, Message: "the first one"}}}
			r.problem(p)
			env.refuse("the calculation has more than one basis")
			continue
		}
		env.Basis.Stated = true
		env.Basis.Place = lang.Place{Decl: d.decl, Span: d.stmt.Head}
		r.end()
		if d.stmt.Body == nil {
			r.fail("wrong-form", d.stmt.Line, "basis opens a block: basis { standard \"…\" }")
			continue
		}
		if hurt(d.decl, d.stmt) {
			env.refuse("the basis has an error")
		}
		seen := map[string]*lang.Stmt{}
		for _, s := range d.stmt.Body.Stmts {
			r := b.reader(declared{d.decl, s})
			if first := seen[sameWord(s.Word)]; first != nil && sameWord(s.Word) == "reduce" {
				r.reducedTwice(declared{d.decl, first})
			} else if first != nil && s.Word != "show" {
				twice(r, first)
			} else if !s.Broken {
				seen[sameWord(s.Word)] = s
				b.basisStmt(r)
			}
			if r.failed && s.Word != "show" {
				// what it was to say is not known, so no member can be judged by it
				env.refuse("a line of the basis has an error")
			}
		}
		if basis := &env.Basis; basis.Direct && basis.Standard != "" && len(b.standards.Methods(basis.Standard)) == 0 {
			r := b.reader(declared{basis.DirectAt.Decl, d.stmt})
			r.fail("wrong-form", basis.DirectAt.Span, "direct analysis is a method of ANSI/AISC 360; %s has none of that name", basis.Standard)
			env.refuse("a line of the basis has an error")
		}
		b.choices(d)
	}
	b.methods()
}

// choices refuses the choice of a method that the design standard does not leave
// open.
func (b *builder) choices(d declared) {
	basis := &b.env.Basis
	if basis.Standard == "" {
		return
	}
	for _, c := range []struct {
		word, what string
		Chosen
	}{{"lateral", "the method of lateral-torsional buckling", basis.Lateral}, {"interaction", "the annex of the interaction factors", basis.Interaction}} {
		if c.Word == "" || slices.Contains(b.standards.Choices(basis.Standard), c.word) {
			continue
		}
		var open []string
		for _, name := range b.standards.Names() {
			if slices.Contains(b.standards.Choices(name), c.word) {
				open = append(open, name)
			}
		}
		r := b.reader(declared{c.Place.Decl, d.stmt})
		r.problem(lang.Problem{Rule: "wrong-form", Span: c.Place.Span, Message: fmt.Sprintf("%s is a choice of %s; %s leaves none", c.what, lang.OrList(open), basis.Standard),
			Fixes: []lang.Fix{lang.Replace("Remove it", false, c.Place.Span, "")}})
		b.env.refuse("a line of the basis has an error")
	}
}

var basisWords = []string{"standard", "actions", "show", "effective", "stability", "lateral", "interaction", "selfweight", "strengths", "amplification", "critical", "imperfection", "permanent", "roofs", "accidental", "moments", "reduce", "reduction",
	"gamma_M0", "gamma_M1", "gamma_M2", "gamma_G_sup", "gamma_G_inf", "gamma_Q", "xi", "companion_live", "factor_yield", "factor_buckling"}

func (b *builder) basisStmt(r *reader) {
	basis := &b.env.Basis
	if value, ok := r.stmt.Assigned(); ok {
		r.args = value
		if r.stmt.Word == "reduction" {
			basis.Reduction, _ = r.reduction()
			return
		}
		b.override(r)
		return
	}
	switch r.stmt.Word {
	case "standard":
		e := r.peek()
		name, ok := r.text("the design standard")
		if !ok {
			return
		}
		basis.StandardAt = r.place(e.Span)
		if !b.standards.Known(name) {
			p := lang.Problem{Rule: "unknown-standard", Span: e.Span, Message: "'" + name + "' is no standard that kern checks to: " + lang.OrList(b.standards.Names())}
			for _, n := range Closest(name, b.standards.Names(), 2) {
				p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, e.Span, `"`+n+`"`))
			}
			r.problem(p)
			return
		}
		basis.Standard = name
		if !b.method(r, name, e) {
			basis.Standard = ""
			return
		}
		if _, ok := r.word("annex"); ok {
			e := r.peek()
			annex, ok := r.text("the annex")
			if !ok {
				return
			}
			basis.Annex = annex
			known := b.standards.Annexes(name)
			if len(known) == 0 {
				basis.Standard = ""
				r.fail("unknown-annex", e.Span, "%s has no annexes", name)
				return
			}
			found := false
			for _, k := range known {
				found = found || k == annex
			}
			if !found {
				basis.Standard = ""
				p := lang.Problem{Rule: "unknown-annex", Span: e.Span, Message: fmt.Sprintf("the annex '%s' is not known; known is %s. Other national values are given one by one: gamma_M1 = 1.1 because \"…\"", annex, lang.OrList(known))}
				for _, n := range Closest(annex, known, 1) {
					p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, e.Span, `"`+n+`"`))
				}
				r.problem(p)
				return
			}
		}
	case "actions":
		if !b.actions(r) {
			return
		}
	case "permanent", "roofs", "accidental":
		b.combining(r)
	case "show":
		b.show(r)
		return
	case "effective":
		if _, ok := r.wordOf("what to set", "lengths"); ok {
			w, _ := r.wordOf("the effective lengths", "theoretical", "recommended")
			basis.Recommended = w == "recommended"
		}
	case "selfweight":
		w, _ := r.wordOf("the setting of self-weight", "on", "off")
		basis.SelfWeight = w != "off"
	case "strengths":
		e := r.peek()
		if from, ok := r.text("where strengths come from"); ok {
			switch from {
			case "product standard":
			case "EN 1993-1-1 Table 3.1":
				basis.TableFy = true
			default:
				r.fail("unknown-word", e.Span, "strengths come from the \"product standard\" or from \"EN 1993-1-1 Table 3.1\"")
			}
		}
	case "moments":
		basis.Nominal = r.moments()
	case "reduce":
		basis.Reduction, _ = r.reduce()
	case "reduction":
		noSign(r)
	case "stability":
		w, _ := r.wordOf("the method of stability", "direct", "effective")
		basis.Direct, basis.DirectAt = w == "direct", r.place(r.stmt.Line)
	case "lateral":
		if _, ok := r.wordOf("what to set", "buckling"); ok {
			w, _ := r.wordOf("the method of lateral-torsional buckling", "general", "rolled")
			basis.Lateral = Chosen{w, r.place(r.stmt.Line)}
		}
	case "interaction":
		if _, ok := r.wordOf("what to set", "annex"); ok {
			w, _ := r.wordOf("the annex of the interaction factors", "A", "B")
			basis.Interaction = Chosen{w, r.place(r.stmt.Line)}
		}
	case "amplification":
		w, _ := r.wordOf("the amplification", "secant", "simple")
		basis.Simple = w == "simple"
	case "critical":
		basis.Exact = r.critical()
	case "imperfection":
		w, _ := r.wordOf("the setting of the sway imperfection", "on", "off")
		basis.Imperfect = w == "on"
	case "":
		return
	default:
		p := lang.Problem{Rule: "unknown-statement", Span: r.stmt.Head, Message: "'" + r.stmt.Word + "' is no part of a basis"}
		near, sure := nearest(r.stmt.Word, basisWords, 1)
		for _, n := range near {
			p.Message += "; did you mean " + n + "?"
			p.Fixes = append(p.Fixes, lang.Replace("Write "+n, sure, r.stmt.Head, n))
		}
		r.problem(p)
		return
	}
	r.end()
}

// method reads by which method of a standard strengths are found: "by LRFD". A
// standard that has methods needs one, since none of them is the usual one.
func (b *builder) method(r *reader, name string, at *lang.Expr) bool {
	methods := b.standards.Methods(name)
	by := r.peek()
	if len(methods) == 0 {
		if !by.Is("by") {
			return true
		}
		span := by.Span
		if r.take(); r.peek() != nil && r.peek().Kind == lang.NameExpr {
			span = span.Join(r.peek().Span)
		}
		r.problem(lang.Problem{Rule: "left-over", Span: span, Message: name + " has one method alone: 'by' does not belong here",
			Fixes: []lang.Fix{lang.Replace("Remove it", false, span, "")}})
		return false
	}
	if !b.methodOf(r, name, methods, at) {
		return false
	}
	w, ok := r.wordOf("the method", methods...)
	b.env.Basis.Method = w
	return ok
}

// methodOf takes the word that stands before the method of a standard.
func (b *builder) methodOf(r *reader, name string, methods []string, at *lang.Expr) bool {
	if _, ok := r.word("by"); !ok {
		if r.slip() {
			return false
		}
		p := lang.Problem{Rule: "missing-method", Span: at.Span, Message: fmt.Sprintf("%s is used by one of several methods; say which: by %s", name, lang.OrList(methods))}
		for _, m := range methods {
			p.Fixes = append(p.Fixes, lang.Replace("Add by "+m, false, lang.Span{Start: at.Span.End, End: at.Span.End}, " by "+m))
		}
		r.problem(p)
		return false
	}
	return true
}

// override reads a number that replaces one of a standard.
func (b *builder) override(r *reader) {
	name := r.stmt.Word
	needs := map[string]bool{"gamma_G_sup": true, "gamma_G_inf": true, "gamma_Q": true, "xi": true, "companion_live": true}
	for _, s := range b.standards.Names() {
		for k, v := range b.standards.Overrides(s) {
			needs[k] = v
		}
	}
	reason, known := needs[name]
	if !known {
		var words []string
		for w := range needs {
			words = append(words, w)
		}
		sortStrings(words)
		p := lang.Problem{Rule: "unknown-property", Span: r.stmt.Head, Message: "'" + name + "' is no number that a basis can set: " + lang.OrList(words)}
		near, sure := nearest(name, words, 3)
		for _, n := range near {
			p.Fixes = append(p.Fixes, lang.Replace("Write "+n, sure && len(near) == 1, r.stmt.Head, n))
		}
		r.problem(p)
		return
	}
	due := want{what: "a factor", min: 0.1, max: 20}
	if name == "xi" {
		due = want{what: "a reduction factor", min: 0.5, max: 1}
	}
	if name == "companion_live" {
		due = want{what: "the factor of live loads beside others (ASCE/SEI 7 2.3.1)", min: 0.5, max: 1}
	}
	v, span, ok := r.quantity(due)
	if !ok {
		return
	}
	o := Override{Value: v, Place: r.place(span)}
	if r.may("because") || reason {
		if o.Because, ok = r.because(); !ok {
			return
		}
	}
	if r.end() {
		b.env.Basis.Overrides[name] = o
	}
}

// show reads the units that results are shown in.
func (b *builder) show(r *reader) {
	for {
		e := r.take()
		if e == nil {
			r.fail("missing-value", r.stmt.Line, "show names units: show kN, kNm, mm, MPa")
			return
		}
		text := e.Span.Of(r.decl.Text)
		u, err := unit.Parse(text)
		if err != nil {
			p := lang.Problem{Rule: "unknown-unit", Span: e.Span, Message: "'" + clip(text) + "' is not a unit"}
			for _, n := range unit.Nearest(text, unit.None, true, 3) {
				p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, e.Span, n))
			}
			r.problem(p)
			return
		}
		b.env.Basis.Show[u.Dim] = u
		if c := r.peek(); c == nil || c.Kind != lang.CommaExpr {
			r.end()
			return
		}
		r.take()
	}
}
