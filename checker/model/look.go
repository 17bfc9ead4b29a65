package model

import (
	"math"
	"strings"

	"kern/lang"
	"kern/lang/unit"
)

// Quantity gives the value of a named value or the height of a level, in
// coherent SI units. It is false for a name that has none.
func (env *Env) Quantity(name string) (unit.Quantity, bool) {
	return env.Eval(&lang.Expr{Kind: lang.NameExpr, Text: name})
}

// Eval computes an expression as it stands outside of members, in coherent SI
// units. It is false when it has no value.
func (env *Env) Eval(e *lang.Expr) (unit.Quantity, bool) {
	q, p := lang.Eval(e, env.settledLookup)
	return q, p == nil
}

// settledLookup finds names when members are worked out already: their results
// too.
func (env *Env) settledLookup(e *lang.Expr) (unit.Quantity, *lang.Problem) {
	if strings.Contains(e.Text, ".") {
		q, p, _ := env.Result(e, env.results)
		return q, p
	}
	if v, ok := env.Values.Lookup(e.Text); ok && v.Late {
		if q, ok := env.Value(v); ok {
			return q, nil
		}
		return unit.Quantity{}, lang.Silent
	}
	return env.lookup(e)
}

// EvalIn computes an expression as it stands in a member's block: height and
// length are the member's own. It is false when it has no value.
func (env *Env) EvalIn(m *Member, e *lang.Expr) (unit.Quantity, bool) {
	q, p := lang.Eval(e, func(n *lang.Expr) (unit.Quantity, *lang.Problem) {
		if (n.Text == "height" || n.Text == "length") && env.Names[n.Text] == nil {
			if math.IsNaN(m.Height) {
				return unit.Quantity{}, lang.Silent
			}
			return unit.Quantity{Value: m.Height, Dim: unit.Length}, nil
		}
		return env.settledLookup(n)
	})
	return q, p == nil
}

// OwnCases are the load cases that the calculation declares or takes for
// granted, without the one that is made for self-weight alone.
func (env *Env) OwnCases() []*Case {
	if n := len(env.Cases); n > 0 && env.SelfWeight == n-1 && env.Cases[n-1].Place.Decl == nil && n > 1 {
		return env.Cases[:n-1]
	}
	return env.Cases
}
