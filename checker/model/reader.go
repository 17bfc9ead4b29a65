package model

import (
	"fmt"
	"slices"
	"strings"

	"kern/lang"
	"kern/lang/unit"
)

// reader reads the parts of one statement in order. It reports the first thing
// that is wrong and is silent after that.
type reader struct {
	env    *Env
	decl   *lang.Decl
	stmt   *lang.Stmt
	args   []*lang.Expr
	report func(lang.Diagnostic)
	names  lang.Lookup
	failed bool
	// tried are the words that could have stood where the next part stands.
	tried  [8]string
	trials int
	// silent is set when the reason was reported where it lies.
	silent bool
}

func (r *reader) problem(p lang.Problem) {
	if r.failed || p.Rule == "" {
		r.silent = r.silent || !r.failed
		r.failed = true
		return
	}
	r.failed = true
	r.report(lang.Diagnostic{Decl: r.decl, Problem: p})
}

func (r *reader) fail(rule string, span lang.Span, format string, args ...any) {
	r.problem(lang.Problem{Rule: rule, Span: span, Message: fmt.Sprintf(format, args...)})
}

// place is a span of the statement's declaration.
func (r *reader) place(span lang.Span) lang.Place { return lang.Place{Decl: r.decl, Span: span} }

// peek is the next part, nil at the end.
func (r *reader) peek() *lang.Expr {
	if len(r.args) == 0 {
		return nil
	}
	return r.args[0]
}

func (r *reader) take() *lang.Expr {
	e := r.peek()
	if e != nil {
		r.args = r.args[1:]
		r.trials = 0
	}
	return e
}

// after is the span just behind what was read, for things that are missing.
func (r *reader) after() lang.Span {
	if e := r.peek(); e != nil {
		return e.Span
	}
	return r.stmt.Line
}

// word takes the next part when it is one of the words.
func (r *reader) word(words ...string) (string, bool) {
	if e := r.peek(); e != nil && e.Kind == lang.NameExpr {
		for _, w := range words {
			if e.Text == w {
				r.take()
				return w, true
			}
		}
		r.trials += copy(r.tried[r.trials:], words)
	}
	return "", false
}

// wordOf is word for a part that must be there.
func (r *reader) wordOf(what string, words ...string) (string, bool) {
	if w, ok := r.word(words...); ok {
		return w, true
	}
	e := r.peek()
	join := len(words) == 1 && lang.Joins(words[0])
	switch {
	case e == nil && join:
		r.fail("wrong-form", r.stmt.Line, "%s is missing: %s …", what, words[0])
	case e == nil:
		r.fail("wrong-form", r.stmt.Line, "%s is missing: %s", what, lang.OrList(words))
	case e.Kind == lang.NameExpr:
		p := lang.Problem{Rule: "unknown-word", Span: e.Span, Message: fmt.Sprintf("%s is %s, not '%s'", what, lang.OrList(words), e.Text)}
		if len(words) == 1 {
			p.Message = fmt.Sprintf("the word '%s' is due here, not '%s'", words[0], e.Text)
		}
		near, sure := nearest(e.Text, words, 1)
		for _, n := range near {
			p.Fixes = append(p.Fixes, lang.Replace("Write "+n, sure, e.Span, n))
		}
		r.problem(p)
	case join:
		r.problem(lang.Problem{Rule: "wrong-form", Span: e.Span, Message: fmt.Sprintf("%s begins with '%s'", what, words[0]),
			Fixes: []lang.Fix{lang.Replace("Add '"+words[0]+"'", false, lang.Span{Start: e.Span.Start, End: e.Span.Start}, words[0]+" ")}})
	default:
		r.fail("wrong-form", e.Span, "%s is due here: %s", what, lang.OrList(words))
	}
	return "", false
}

// text takes a quoted text.
func (r *reader) text(what string) (string, bool) {
	e := r.peek()
	if e != nil && e.Kind == lang.StringExpr {
		r.take()
		return e.Text, true
	}
	if e != nil && e.Kind == lang.NameExpr {
		span := e.Span
		for _, next := range r.args[1:] { // HEB 200, EN 10025-2: up to the next word of the language
			if next.Kind == lang.StringExpr || next.Kind == lang.CommaExpr || next.Kind == lang.NameExpr && lang.Joins(next.Text) {
				break
			}
			span = span.Join(next.Span)
		}
		r.problem(lang.Problem{Rule: "wrong-form", Span: span, Message: what + " stands in quotes",
			Fixes: []lang.Fix{lang.Replace("Put it in quotes", false, span, `"`+span.Of(r.decl.Text)+`"`)}})
		return "", false
	}
	r.fail("wrong-form", r.after(), "%s is due here, in quotes", what)
	return "", false
}

// because takes the reason that an override or departure must give.
func (r *reader) because() (string, bool) {
	if _, ok := r.word("because"); !ok {
		if r.slip() {
			return "", false
		}
		end := r.stmt.Line.End
		r.problem(lang.Problem{Rule: "missing-reason", Span: r.stmt.Line, Message: "this departs from the standard: say why with because \"…\"",
			Fixes: []lang.Fix{lang.Replace("Add a reason", false, lang.Span{Start: end, End: end}, ` because "…"`)}})
		return "", false
	}
	e := r.peek()
	reason, ok := r.text("the reason")
	if ok && (strings.TrimSpace(reason) == "" || reason == "…") {
		r.fail("missing-reason", e.Span, "the reason is empty")
		return "", false
	}
	return reason, ok
}

// may notes a word that could stand next, and tells whether it does.
func (r *reader) may(word string) bool {
	if r.peek().Is(word) {
		return true
	}
	r.trials += copy(r.tried[r.trials:], []string{word})
	return false
}

// slip reports the next part when it is a slip of a word that could stand there.
func (r *reader) slip() bool {
	e := r.peek()
	if e == nil || e.Kind != lang.NameExpr || r.failed {
		return false
	}
	near, sure := nearest(e.Text, r.tried[:r.trials], 1)
	if len(near) == 0 {
		return false
	}
	r.problem(lang.Problem{Rule: "unknown-word", Span: e.Span, Message: "'" + e.Text + "' has no meaning here; did you mean " + near[0] + "?",
		Fixes: []lang.Fix{lang.Replace("Write "+near[0], sure, e.Span, near[0])}})
	return true
}

// end complains about parts that nobody took.
func (r *reader) end() bool {
	if e := r.peek(); e != nil && !r.failed && !r.slip() {
		rest := e.Span.Join(r.args[len(r.args)-1].Span)
		p := lang.Problem{Rule: "left-over", Span: rest, Message: "'" + clip(e.Span.Of(r.decl.Text)) + "' does not belong here: " + lang.A("'"+r.stmt.Word+"'") + " statement ends before it",
			Fixes: []lang.Fix{lang.Replace("Remove it", false, rest, "")}}
		switch {
		case e.Kind == lang.NameExpr && unit.Known(e.Text):
			p.Notes = append(p.Notes, "a unit is written without blanks inside: kNm, kN/m")
		case e.Kind == lang.UnaryExpr:
			p.Notes = append(p.Notes, "a minus with a blank before it and none behind it begins a new part; to subtract write a - b")
		case len(r.args) > 1 && slices.ContainsFunc(r.args, func(a *lang.Expr) bool { return a.Kind == lang.EqualsExpr }):
			p.Notes = append(p.Notes, "statements on one line are parted by ;")
		}
		r.problem(p)
	}
	return !r.failed
}

func clip(s string) string {
	if len(s) > 30 {
		return strings.ToValidUTF8(s[:30], "") + "…"
	}
	return s
}

// want is a quantity that a place needs.
type want struct {
	what string // with article: "a height"
	dim  unit.Dim
	unit string // the unit to offer for a bare number
	// min and max bound what can be, in SI units; zero for no bound.
	min, max float64
	signed   bool // negative values make sense
	zero     bool // zero makes sense
}

// fits tells whether a value lies within the bounds.
func (w want) fits(v float64) bool {
	return v == 0 || (w.min == 0 || abs(v) >= w.min) && (w.max == 0 || abs(v) <= w.max)
}

// quantity takes an expression and gives its value in SI units.
func (r *reader) quantity(w want) (float64, lang.Span, bool) {
	e := r.take()
	if e == nil {
		r.problem(lang.Problem{Rule: "missing-value", Span: r.stmt.Line, Message: w.what + " is missing"})
		return 0, lang.Span{}, false
	}
	if e.Kind == lang.EqualsExpr || e.Kind == lang.CommaExpr || e.Kind == lang.CompareExpr {
		r.fail("wrong-form", e.Span, "%s is due here", w.what)
		return 0, e.Span, false
	}
	if e.Kind == lang.QuantExpr && e.Unit.Symbol == "" {
		r.problem(*lang.UnknownUnit(e, w.dim, false))
		return 0, e.Span, false
	}
	q, p := lang.Eval(e, r.names)
	if p != nil {
		r.problem(*p)
		return 0, e.Span, false
	}
	if q.Dim != w.dim {
		r.problem(r.mismatch(e, q, w))
		return 0, e.Span, false
	}
	return q.Value, e.Span, r.possible(e, q.Value, w)
}

// mismatch is the problem of a quantity of another dimension than is due, in
// the light of what follows it.
func (r *reader) mismatch(e *lang.Expr, q unit.Quantity, w want) lang.Problem {
	next := r.peek()
	if e.Kind != lang.NumberExpr || next == nil {
		return mismatch(e, q, w)
	}
	both := e.Span.Join(next.Span)
	gap := lang.Span{Start: e.Span.End, End: next.Span.Start}
	switch next.Kind {
	case lang.NameExpr:
		if u, err := unit.Parse(next.Text); err == nil && u.Dim == w.dim && gap.Len() > 1 {
			return lang.Problem{Rule: "missing-unit", Span: both, Message: "a unit stands one blank at most behind its number",
				Fixes: []lang.Fix{lang.Replace("Leave one blank", true, gap, " ")}}
		}
	case lang.NumberExpr, lang.QuantExpr, lang.BinaryExpr:
		p := lang.Problem{Rule: "bad-number", Span: both, Message: "two numbers stand side by side"}
		if digits := next.Span.Of(r.decl.Text); len(digits) > 3 && next.Kind == lang.QuantExpr && strings.Trim(digits[:3], "0123456789") == "" && digits[3] == ' ' {
			p.Message += ": digits are grouped with _"
			p.Fixes = append(p.Fixes, lang.Replace("Group the digits", false, gap, "_"))
		}
		return p
	}
	return mismatch(e, q, w)
}

// possible refuses values that cannot be what was meant.
func (r *reader) possible(e *lang.Expr, v float64, w want) bool {
	switch {
	case v < 0 && !w.signed:
		r.fail("impossible-value", e.Span, "%s cannot be negative", w.what)
	case v == 0 && !w.zero:
		r.fail("impossible-value", e.Span, "%s cannot be zero", w.what)
	case w.min > 0 && v != 0 && abs(v) < w.min, w.max > 0 && abs(v) > w.max:
		r.problem(magnitude(e, v, w))
	default:
		return true
	}
	return false
}

func abs(x float64) float64 {
	if x < 0 {
		return -x
	}
	return x
}

// magnitude is the problem of a value that is out by powers of ten; a unit that
// brings it into the range is offered.
func magnitude(e *lang.Expr, v float64, w want) lang.Problem {
	v = abs(v)
	side, bound := "small", w.min
	if w.max > 0 && v > w.max {
		side, bound = "large", w.max
	}
	show := func(x float64) string {
		if e.Kind == lang.QuantExpr && x/e.Unit.Factor >= 1e-3 && x/e.Unit.Factor < 1e6 {
			return unit.Short(x/e.Unit.Factor, 6) + " " + e.Text
		}
		for _, u := range unit.For(w.dim) {
			if y := x / u.Factor; y >= 0.1 && y < 10000 {
				return unit.Short(y, 3) + " " + u.Symbol
			}
		}
		return unit.Short(x, 3) + " " + w.dim.Base()
	}
	p := lang.Problem{Rule: "impossible-value", Span: e.Span,
		Message: fmt.Sprintf("%s of %s is far too %s to be meant: the limit is %s", w.what, show(v), side, show(bound))}
	if w.dim.IsNone() {
		p.Message = fmt.Sprintf("%s of %s is far too %s to be meant: the limit is %s", w.what, unit.Short(v, 3), side, unit.Short(bound, 3))
	}
	if e.Kind != lang.QuantExpr {
		return p
	}
	for _, u := range unit.For(w.dim) {
		x := e.Value * u.Factor
		ratio := x / v
		if (w.min == 0 || x >= w.min) && (w.max == 0 || x <= w.max) && u.Symbol != e.Text && powerOfTen(ratio) {
			p.Notes = append(p.Notes, fmt.Sprintf("%s would be %s times as much", unit.Exact(e.Value)+" "+u.Symbol, unit.Short(ratio, 1)))
			p.Fixes = append(p.Fixes, lang.Replace("Write "+unit.Exact(e.Value)+" "+u.Symbol, false, e.UnitSpan(), u.Symbol))
			break
		}
	}
	return p
}

func powerOfTen(x float64) bool {
	for _, p := range []float64{10, 100, 1e3, 1e6, 1e9, 1e-1, 1e-2, 1e-3, 1e-6, 1e-9} {
		if abs(x/p-1) < 1e-9 {
			return true
		}
	}
	return false
}

// offered are the units that a bare number most often lacks.
var offered = map[unit.Dim][]string{
	unit.Length: {"m", "mm", "ft", "in"}, unit.Force: {"kN", "N", "kip"}, unit.Stress: {"MPa", "kN/m2", "ksi"}, unit.Area: {"m2", "cm2", "mm2"},
	unit.Length4: {"cm4", "mm4", "in4"}, unit.Volume: {"cm3", "mm3", "in3"}, unit.Density: {"kg/m3"}, unit.ForcePerLength: {"kN/m"}, unit.Moment: {"kNm"}, unit.Length6: {"cm6"},
}

// mismatch is the problem of a quantity of another dimension than is due.
func mismatch(e *lang.Expr, q unit.Quantity, w want) lang.Problem {
	src := func(suffix string) lang.Fix {
		at := lang.Span{Start: e.Span.End, End: e.Span.End}
		return lang.Fix{Edits: []lang.Edit{{Place: lang.Place{Span: at}, New: suffix}}}
	}
	switch {
	case q.Dim.IsNone() && !w.dim.IsNone():
		p := lang.Problem{Rule: "missing-unit", Span: e.Span, Message: fmt.Sprintf("%s needs a unit of %s; this is a bare number", w.what, w.dim.Name())}
		if e.Kind == lang.NumberExpr {
			units := append([]string{w.unit}, offered[w.dim]...)
			for i, u := range units {
				if known, err := unit.Parse(u); err != nil || i > 0 && (u == w.unit || !w.fits(e.Value*known.Factor)) {
					continue // none to offer, offered already, or beyond what can be
				}
				f := src(" " + u)
				f.Title = "Write " + unit.Exact(e.Value) + " " + u
				p.Fixes = append(p.Fixes, f)
			}
			if w.unit != "" {
				p.Message += fmt.Sprintf(", write for instance %s %s", unit.Exact(e.Value), w.unit)
			}
		}
		return p
	case weighs(q.Dim, w.dim):
		p := lang.Problem{Rule: "mass-for-force", Span: e.Span, Message: fmt.Sprintf("%s needs a unit of %s; this is %s. Say kgf for the weight of a kilogram, or multiply by g", w.what, w.dim.Name(), lang.DimName(q.Dim))}
		if e.Kind == lang.QuantExpr {
			for _, pair := range [][2]string{{"kg", "kgf"}, {"lb", "lbf"}} {
				rest, ok := strings.CutPrefix(e.Text, pair[0])
				if u, err := unit.Parse(pair[1] + rest); ok && err == nil && u.Dim == w.dim {
					p.Fixes = append(p.Fixes, lang.Replace("Write "+u.Symbol, false, e.UnitSpan(), pair[1]+rest))
				}
			}
		}
		p.Fixes = append(p.Fixes, times(e, "Multiply by g", " * g"))
		return p
	case weighs(w.dim, q.Dim):
		return lang.Problem{Rule: "wrong-unit", Span: e.Span, Message: fmt.Sprintf("%s needs a unit of %s; this is %s, which divided by g is one", w.what, w.dim.Name(), lang.DimName(q.Dim)),
			Fixes: []lang.Fix{times(e, "Divide by g", " / g")}}
	}
	p := lang.Problem{Rule: "wrong-unit", Span: e.Span, Message: fmt.Sprintf("%s needs a unit of %s; this is %s", w.what, w.dim.Name(), lang.DimName(q.Dim))}
	if w.unit != "" {
		p.Message = fmt.Sprintf("%s needs a unit of %s, such as %s; this is %s", w.what, w.dim.Name(), w.unit, lang.DimName(q.Dim))
	}
	if w.dim.IsNone() {
		p.Message = fmt.Sprintf("%s is a pure number; this is %s", w.what, lang.DimName(q.Dim))
		if e.Kind == lang.QuantExpr {
			p.Fixes = append(p.Fixes, lang.Replace("Remove the unit", false, lang.Span{Start: e.Span.Start, End: e.Span.End}, unit.Exact(e.Value)))
		}
	} else if e.Kind == lang.QuantExpr {
		for _, n := range unit.Nearest(e.Text, w.dim, false, 6) {
			if u, err := unit.Parse(n); err == nil && u.Dim == w.dim && w.fits(e.Value*u.Factor) && len(p.Fixes) < 2 {
				p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, e.UnitSpan(), n))
			}
		}
	}
	return p
}

// weighs tells whether the second dimension is the weight of what the first is
// the mass of, under gravity.
func weighs(mass, weight unit.Dim) bool {
	d, ok := mass.Mul(unit.Acceleration)
	return ok && d == weight && mass.M != 0
}

// times multiplies an expression; a sum gets brackets around it.
func times(e *lang.Expr, title, by string) lang.Fix {
	f := lang.Fix{Title: title}
	end := lang.Span{Start: e.Span.End, End: e.Span.End}
	if e.Kind == lang.BinaryExpr && (e.Op == '+' || e.Op == '-') {
		start := lang.Span{Start: e.Span.Start, End: e.Span.Start}
		f.Edits = []lang.Edit{{Place: lang.Place{Span: start}, New: "("}, {Place: lang.Place{Span: end}, New: ")" + by}}
		return f
	}
	f.Edits = []lang.Edit{{Place: lang.Place{Span: end}, New: by}}
	return f
}

// Unlike is the problem of a quantity that is compared with one of another
// dimension.
func Unlike(what string, e *lang.Expr, q unit.Quantity, dim unit.Dim) lang.Problem {
	w := want{what: what, dim: dim}
	if usual := unit.For(dim); len(usual) > 0 && !dim.IsNone() {
		w.unit = usual[0].Symbol
	}
	return mismatch(e, q, w)
}
