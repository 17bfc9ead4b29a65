package model

import (
	"fmt"

	"kern/checker/action"
	"kern/lang"
)

// combinations reads the combinations that are written out and makes those of
// the basis.
func (b *builder) combinations() {
	env := b.env
	plain := make([]action.Case, len(env.Cases))
	for i, c := range env.Cases {
		plain[i] = c.Case
	}
	for _, d := range b.of("combination") {
		r := b.reader(d)
		name := r.name("a combination")
		if name == nil {
			env.refuse("a combination has an error")
			continue
		}
		n := env.Names[name.Text]
		if n == nil || n.Stmt != d.stmt {
			continue // given twice, or a word that the language has taken
		}
		// a combination that was meant and cannot be read leaves members
		// undecided: without it they would be checked for less than was asked
		refused := "the combination '" + name.Text + "' has an error"
		if e := r.take(); e == nil || e.Kind != lang.EqualsExpr {
			r.fail("wrong-form", r.stmt.Line, "a combination is a sum of cases: combination %s = 1.1 G + 0.5 W", name.Text)
			env.refuse(refused)
			continue
		}
		e := r.take()
		if e == nil {
			r.fail("missing-value", r.stmt.Line, "a combination is a sum of cases: combination %s = 1.1 G + 0.5 W", name.Text)
			env.refuse(refused)
			continue
		}
		factors := make([]float64, len(env.Cases))
		if !b.sum(r, e, 1, factors) || !r.end() {
			env.refuse(refused)
			continue
		}
		c := Combination{Label: name.Text, Place: r.place(name.Span)}
		c.Factors, c.Source = factors, "combination "+name.Text
		if env.Cases[env.SelfWeight].Place.Decl == nil && factors[env.SelfWeight] == 0 {
			factors[env.SelfWeight] = 1
		}
		c.Name = name.Text + ": " + action.Sum(plain, factors)
		n.Index = len(env.Combinations)
		env.Combinations = append(env.Combinations, c)
	}
	if env.Basis.Actions == "" {
		if len(env.Combinations) > 0 || env.Refused != "" {
			return
		}
		factors := make([]float64, len(plain))
		for i := range factors {
			factors[i] = 1
		}
		c := Combination{}
		c.Name, c.Factors, c.Source = action.Sum(plain, factors), factors, "sum of all cases"
		if !env.Declared() {
			c.Name = "all loads"
		}
		env.Automatic = []Combination{c}
		return
	}
	if env.Refused != "" {
		return
	}
	if !env.Declared() {
		env.Refused = "the calculation names no load cases"
		return
	}
	f := action.Recommended
	for name, at := range map[string]*float64{"gamma_G_sup": &f.GSup, "gamma_G_inf": &f.GInf, "gamma_Q": &f.Q} {
		if o, ok := env.Basis.Overrides[name]; ok {
			*at = o.Value
		}
	}
	// a case with an error takes no part: a member that has a load of it is
	// undecided for that load, and the others are what they are without it
	var good []action.Case
	var at []int
	for i, c := range env.Cases {
		if !c.Bad {
			good, at = append(good, c.Case), append(at, i)
		}
	}
	made, ok := action.Persistent(good, f)
	if !ok {
		env.Refused = fmt.Sprintf("there are more than %d variable cases", action.MaxVariable)
		c := env.Cases[len(env.Cases)-1]
		b.report(lang.Diagnostic{Decl: env.Cases[0].Place.Decl, Problem: lang.Problem{Rule: "too-many-cases", Span: env.Cases[0].Place.Span,
			Message: fmt.Sprintf("the calculation has more than %d variable cases: combinations are made for so many only; write them out", action.MaxVariable),
			Related: []lang.Related{{Place: c.Place, Message: "the last case"}}}})
		return
	}
	for _, m := range made {
		factors := make([]float64, len(env.Cases))
		for i, factor := range m.Factors {
			factors[at[i]] = factor
		}
		m.Factors = factors
		env.Automatic = append(env.Automatic, Combination{Combination: m})
	}
}

// hurt tells whether the text of a statement has a problem that belongs to none
// of its lines, such as a block that is not closed: what it was to say is then
// not known for certain.
func hurt(d *lang.Decl, s *lang.Stmt) bool {
	for _, p := range d.Problems {
		if p.Severity == lang.Error && s.Span.Start <= p.Span.Start && p.Span.Start < s.Span.End {
			return true
		}
	}
	return false
}

// sum reads "1.1 G + 0.5 W - Q": a name after a number is a case, not a unit.
func (b *builder) sum(r *reader, e *lang.Expr, sign float64, factors []float64) bool {
	caseAt := func(name string, span lang.Span) (int, bool) {
		n, ok := b.env.Names[name]
		if ok && n.Kind == CaseName && n.Index >= 0 {
			if b.env.Cases[n.Index].Bad || n.Twice {
				r.failed = true
				return 0, false
			}
			return n.Index, true
		}
		r.problem(*b.env.unknownName(&lang.Expr{Kind: lang.NameExpr, Text: name, Span: span}, "load case", []NameKind{CaseName}))
		return 0, false
	}
	switch e.Kind {
	case lang.ParenExpr:
		return b.sum(r, e.Args[0], sign, factors)
	case lang.UnaryExpr:
		if e.Op == '-' {
			sign = -sign
		}
		return b.sum(r, e.Args[0], sign, factors)
	case lang.NameExpr:
		i, ok := caseAt(e.Text, e.Span)
		if ok {
			factors[i] += sign
		}
		return ok
	case lang.QuantExpr:
		i, ok := caseAt(e.Text, e.UnitSpan())
		if ok {
			factors[i] += sign * e.Value
		}
		return ok
	case lang.BinaryExpr:
		switch e.Op {
		case '+':
			return b.sum(r, e.Args[0], sign, factors) && b.sum(r, e.Args[1], sign, factors)
		case '-':
			return b.sum(r, e.Args[0], sign, factors) && b.sum(r, e.Args[1], -sign, factors)
		case '*':
			if name := e.Args[1]; name.Kind == lang.NameExpr {
				q, p := lang.Eval(e.Args[0], b.env.lookup)
				if p != nil {
					r.problem(*p)
					return false
				}
				i, ok := caseAt(name.Text, name.Span)
				if ok && q.Dim.IsNone() {
					factors[i] += sign * q.Value
					return true
				}
				if !ok {
					return false
				}
			}
		}
	}
	r.fail("wrong-form", e.Span, "a combination is a sum of cases with their factors: 1.1 G + 0.5 W")
	return false
}

// All are the combinations that members are checked for.
func (env *Env) All() []Combination {
	return append(append([]Combination(nil), env.Automatic...), env.Combinations...)
}
