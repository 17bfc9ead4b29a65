package model

import (
	"errors"
	"fmt"
	"slices"
	"sync"

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
		situation := r.situation()
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
		c.Factors, c.Source, c.Situation = factors, "combination "+name.Text, situation
		if env.Cases[env.SelfWeight].Place.Decl == nil && factors[env.SelfWeight] == 0 {
			factors[env.SelfWeight] = 1
		}
		c.Name = name.Text + ": " + action.Sum(plain, factors)
		n.Index = len(env.Combinations)
		env.Combinations = append(env.Combinations, c)
	}
	if env.Refused != "" {
		return
	}
	if env.Basis.Actions == "" {
		env.sums(plain)
		return
	}
	if !env.Declared() {
		env.Refused = "the calculation names no load cases"
		return
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
	if env.Basis.Actions == basicStandard {
		b.basics(good, at)
		return
	}
	rules := env.rules(at)
	made, err := action.Ultimate(good, rules)
	if err != nil {
		b.tooMany(err)
		return
	}
	env.Automatic = env.widen(made, at)
	env.service = sync.OnceValue(func() []Combination {
		made, _ := action.Service(good, rules) // it has the same limits
		return env.widen(made, at)
	})
	env.assume(rules)
}

// basics makes the combinations of ASCE/SEI 7 of the cases at some indices.
func (b *builder) basics(good []action.Case, at []int) {
	env := b.env
	rules := action.BasicRules{Method: action.Method(env.Basis.Equation), Companion: 1, Exclusive: env.rules(at).Exclusive}
	if o, ok := env.Basis.Overrides["companion_live"]; ok {
		rules.Companion = o.Value
	}
	made, err := action.Basic(good, rules)
	if err != nil {
		b.tooMany(err)
		return
	}
	env.Automatic = env.widen(made, at)
	env.service = sync.OnceValue(func() []Combination {
		made, _ := action.BasicService(good, rules) // it has the same limits
		return env.widen(made, at)
	})
	env.assumeBasic(rules)
}

// widen gives combinations of some of the cases a factor for every case.
func (env *Env) widen(made []action.Combination, at []int) []Combination {
	out := make([]Combination, len(made))
	for k, m := range made {
		factors := make([]float64, len(env.Cases))
		for i, factor := range m.Factors {
			factors[at[i]] = factor
		}
		m.Factors = factors
		if m.Accompanying != nil {
			psi := make([]bool, len(env.Cases))
			for i, p := range m.Accompanying {
				psi[at[i]] = p
			}
			m.Accompanying = psi
		}
		out[k] = Combination{Combination: m}
	}
	return out
}

// tooMany says which cases are too many to combine.
func (b *builder) tooMany(err error) {
	env := b.env
	most, what := action.MaxVariable, "variable cases"
	counts := action.Kind.Variable
	if errors.Is(err, action.ErrManyIndependent) {
		most, what = action.MaxIndependent, "independent permanent cases"
		counts = func(k action.Kind) bool { return k == action.Permanent }
	}
	env.Refused = fmt.Sprintf("there are more than %d %s", most, what)
	var of []*Case
	for _, c := range env.Cases {
		if counts(c.Kind) && !c.Bad && c.Place.Decl != nil {
			of = append(of, c)
		}
	}
	if len(of) == 0 {
		return
	}
	b.report(lang.Diagnostic{Decl: of[0].Place.Decl, Problem: lang.Problem{Rule: "too-many-cases", Span: of[0].Place.Span,
		Message: fmt.Sprintf("the calculation has more than %d %s: combinations are made for so many only; write them out", most, what),
		Related: []lang.Related{{Place: of[len(of)-1].Place, Message: "the last of them"}}}})
}

// sums adds all cases up where no standard of actions combines them: once, or,
// where cases exclude each other, for every largest selection that can act
// together. They stand for ultimate limit states when no such combination is
// written out, and for serviceability when none at all is.
func (env *Env) sums(plain []action.Case) {
	env.assumeExclusive()
	if slices.ContainsFunc(env.Combinations, func(c Combination) bool { return c.Situation.Ultimate() }) {
		return
	}
	together, ok := action.Together(plain, env.Exclusive)
	if !ok {
		env.Refused = fmt.Sprintf("more than %d cases exclude each other", action.MaxExclusive)
		return
	}
	var service []Combination
	for _, factors := range together {
		c := Combination{}
		c.Name, c.Factors, c.Source = action.Sum(plain, factors), factors, "sum of all cases"
		if !env.Declared() {
			c.Name = "all loads"
		}
		env.Automatic = append(env.Automatic, c)
		if len(env.Combinations) == 0 {
			c.Situation = action.Characteristic
			service = append(service, c)
		}
	}
	env.service = func() []Combination { return service }
}

// situation takes the word for the situation that a combination is for; one
// without is for persistent situations.
func (r *reader) situation() action.Situation {
	if e := r.peek(); e != nil && e.Kind == lang.NameExpr {
		w, _ := r.wordOf("what the combination is for", action.SituationNames()...)
		s, _ := action.SituationOf(w)
		return s
	}
	return action.Persistent
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

// All are the combinations for ultimate limit states, which resistances are
// checked in: those that are made, then those that are written out.
func (env *Env) All() []Combination {
	out := append([]Combination(nil), env.Automatic...)
	for _, c := range env.Combinations {
		if c.Situation.Ultimate() {
			out = append(out, c)
		}
	}
	return out
}

// Service are the combinations for limit states of serviceability, which
// deflections are checked in: those that are made, then those that are written
// out. There are none when the combinations could not be made, or when only
// ultimate ones are written out.
func (env *Env) Service() []Combination {
	var out []Combination
	if env.service != nil {
		out = append(out, env.service()...)
	}
	for _, c := range env.Combinations {
		if !c.Situation.Ultimate() {
			out = append(out, c)
		}
	}
	return out
}
