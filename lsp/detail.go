package lsp

import (
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"

	"go.lsp.dev/protocol"
)

// detail says in a few words what a named thing comes to: the verdict of a
// member, the value of a value, the steel of a material. It is "" where there is
// nothing to say, as of a definition with an error.
func (s *Snapshot) detail(c *model.Calculation, n *model.Named) string {
	env := c.Env
	show := func(q unit.Quantity) string { return shown(env, q) }
	switch n.Kind {
	case model.MemberName:
		return verdictOf(s.resultsAt(n.Place))
	case model.ValueName:
		return valueDetail(env, n, show)
	}
	if n.Index < 0 {
		return ""
	}
	switch n.Kind {
	case model.MaterialName:
		m := env.Materials[n.Index]
		switch {
		case m.Bad:
		case m.Grade != nil:
			return m.Grade.Name + ", " + m.Grade.Standard
		case m.Fy > 0:
			return "fy " + show(unit.Quantity{Value: m.Fy, Dim: unit.Stress})
		case m.E > 0:
			return "E " + show(unit.Quantity{Value: m.E, Dim: unit.Stress})
		}
	case model.SectionName:
		x := env.Sections[n.Index]
		switch {
		case x.Bad:
		case x.Designation != "":
			return x.Designation
		default:
			return x.Shape.Kind.String() + ", A " + show(unit.Quantity{Value: x.Area, Dim: unit.Area})
		}
	case model.CaseName:
		x := env.Cases[n.Index]
		switch {
		case x.Bad:
		case x.Given != "":
			return x.Kind.String() + ", " + x.Given
		default:
			return x.Kind.String()
		}
	case model.CombinationName:
		_, sum, _ := strings.Cut(env.Combinations[n.Index].Name, ": ")
		return sum
	case model.LevelName:
		x := env.Levels[n.Index]
		switch {
		case x.Bad:
		case len(n.Stmt.Args) > 2 && literal(n.Stmt.Args[2]):
			return "at " + n.Stmt.Args[2].Span.Of(n.Place.Decl.Text)
		default:
			return "at " + show(unit.Quantity{Value: x.At, Dim: unit.Length})
		}
	}
	return ""
}

// valueDetail is the value of a named value: as it is written, where it is a
// number with its unit and nothing else.
func valueDetail(env *model.Env, n *model.Named, show func(unit.Quantity) string) string {
	v, ok := env.Values.Lookup(n.Name)
	if !ok || n.Twice || v.Stmt != n.Stmt {
		return ""
	}
	q, ok := env.Value(v)
	switch {
	case !ok:
		return ""
	case literal(v.Expr):
		return v.Expr.Span.Of(v.Decl.Text)
	}
	return show(q)
}

// literal tells whether an expression is a number, with its unit or without.
func literal(e *lang.Expr) bool { return e.Kind == lang.QuantExpr || e.Kind == lang.NumberExpr }

// shown writes a quantity in the unit that the calculation shows it in or,
// where it names none, in the first usual one that gives a handy number.
func shown(env *model.Env, q unit.Quantity) string {
	if _, ok := env.Basis.Show[q.Dim]; !ok && !q.Dim.IsNone() {
		for _, u := range unit.For(q.Dim) {
			if v := max(q.Value, -q.Value) / u.Factor; v >= 0.1 && v < 10_000 {
				return unit.Short(q.Value/u.Factor, 4) + " " + u.Symbol
			}
		}
	}
	u := env.Basis.Show.For(q.Dim)
	if q.Dim.IsNone() {
		return unit.Short(q.Value, 4)
	}
	return unit.Short(q.Value/u.Factor, 4) + " " + u.Symbol
}

// resultsAt gives the results of the member whose name stands at a place.
func (s *Snapshot) resultsAt(at lang.Place) []*checker.Result {
	var out []*checker.Result
	for _, r := range s.report.Results(at.Decl) {
		if r.Member.NameSpan == at.Span {
			out = append(out, r)
		}
	}
	return out
}

// verdictOf is the verdict of a member in a few words: the worst, where two
// calculations judge it differently.
func verdictOf(results []*checker.Result) string {
	worst := (*checker.Result)(nil)
	rank := func(r *checker.Result) int {
		return map[standard.Verdict]int{standard.Passes: 1, standard.Undecided: 2, standard.Fails: 3}[r.Verdict]
	}
	for _, r := range results {
		if worst == nil || rank(r) > rank(worst) || rank(r) == rank(worst) && r.Utilisation > worst.Utilisation {
			worst = r
		}
	}
	switch {
	case worst == nil:
		return ""
	case worst.Verdict == standard.Undecided || worst.Governing == "":
		return worst.Verdict.String()
	}
	return worst.Verdict.String() + " " + checker.Ratio(worst.Utilisation) + " " + worst.Governing
}

// kindOf is the kind of symbol that a name is to the editor. Kinds that the
// client cannot show are replaced by those that every client can.
func kindOf(k model.NameKind, can func(protocol.SymbolKind) bool) protocol.SymbolKind {
	kinds := [...][2]protocol.SymbolKind{
		model.ValueName:       {protocol.SymbolKindConstant, protocol.SymbolKindConstant},
		model.MaterialName:    {protocol.SymbolKindClass, protocol.SymbolKindClass},
		model.SectionName:     {protocol.SymbolKindStruct, protocol.SymbolKindInterface},
		model.CaseName:        {protocol.SymbolKindEnumMember, protocol.SymbolKindEnum},
		model.CombinationName: {protocol.SymbolKindOperator, protocol.SymbolKindFunction},
		model.LevelName:       {protocol.SymbolKindNamespace, protocol.SymbolKindNamespace},
		model.MemberName:      {protocol.SymbolKindObject, protocol.SymbolKindVariable},
	}[k]
	if can(kinds[0]) {
		return kinds[0]
	}
	return kinds[1]
}
