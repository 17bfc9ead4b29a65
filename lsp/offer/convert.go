package offer

import (
	"math"
	"strconv"

	"kern/checker"
	"kern/lang"
	"kern/lang/unit"
)

// literal is a quantity as it is written: a number with its unit, or feet with
// inches.
type literal struct {
	expr     *lang.Expr
	quantity unit.Quantity
}

// literalOf gives the quantity that an expression writes out.
func literalOf(e *lang.Expr) (literal, bool) {
	switch {
	case e.Kind == lang.QuantExpr && e.Unit.Symbol != "":
		return literal{e, unit.Quantity{Value: e.Value * e.Unit.Factor, Dim: e.Unit.Dim}}, true
	case feetInches(e):
		a, ok := literalOf(e.Args[0])
		b, also := literalOf(e.Args[1])
		if ok && also && a.quantity.Dim == b.quantity.Dim {
			return literal{e, unit.Quantity{Value: a.quantity.Value + b.quantity.Value, Dim: a.quantity.Dim}}, true
		}
	}
	return literal{}, false
}

func feetInches(e *lang.Expr) bool { return e.Kind == lang.BinaryExpr && e.Text == "ft-in" }

// literalAt is the quantity that stands at the place. What a combination writes
// behind a number is a case, not a unit.
func (l *list) literalAt(s site) (literal, bool) {
	if s.top.Word == "combination" {
		return literal{}, false
	}
	for i, e := range s.Exprs { // feet with inches before the inches alone
		if e.Kind == lang.BadExpr {
			return literal{}, false
		}
		if lit, ok := literalOf(e); ok {
			file := lang.Span{Start: s.Start + e.Span.Start, End: s.Start + e.Span.End}
			line := lang.Span{Start: s.Start + s.stmt.Line.Start, End: s.Start + s.stmt.Line.End}
			return lit, i < len(s.Exprs) && l.Span.End <= file.End && l.sound(line)
		}
	}
	return literal{}, false
}

const (
	maxUnits   = 8    // units offered
	leastShown = 0.01 // the least and the greatest number that is worth reading
	mostShown  = 1e5
	digits     = 12 // kept when a value has no short form in the new unit
)

// convert offers to write the quantity in another unit. Those of the results come
// first.
func (l *list) convert(s site) {
	lit, ok := l.literalAt(s)
	if !ok || lit.quantity.Dim.IsNone() || lit.quantity.Value == 0 {
		return
	}
	var units []unit.Unit
	shown := ""
	for _, c := range l.calculations {
		if u, ok := c.Env.Basis.Show[lit.quantity.Dim]; ok {
			units, shown = append(units, u), u.Symbol
			break
		}
	}
	for _, u := range unit.For(lit.quantity.Dim) {
		if u.Symbol != shown {
			units = append(units, u)
		}
	}
	offered := 0
	for _, u := range units {
		v := math.Abs(lit.quantity.In(u))
		if lit.expr.Kind == lang.QuantExpr && u.Symbol == lit.expr.Text || offered == maxUnits || !(v >= leastShown && v < mostShown) {
			continue
		}
		text, exact := inUnit(lit.quantity, u)
		if text == "" {
			continue
		}
		title := "Convert to " + text
		if !exact {
			title += " (rounded)"
		}
		offered++
		l.add(Offer{Kind: Rewrite, Title: title, edits: func() []checker.Edit { return []checker.Edit{l.edit(s.Start, lit.expr.Span, text)} }})
	}
}

// inUnit writes a quantity in a unit: with as few digits as give the same value,
// up to the last bits of a float64, or rounded to twelve. It is "" when the
// language would read something else.
func inUnit(q unit.Quantity, u unit.Unit) (text string, exact bool) {
	v := q.In(u)
	number := unit.Short(v, digits)
	for n := 1; n <= digits; n++ {
		short := unit.Short(v, n)
		if x, err := strconv.ParseFloat(short, 64); err == nil && math.Abs(x*u.Factor-q.Value) <= 4e-16*math.Abs(q.Value) {
			number, exact = short, true
			break
		}
	}
	text = number + " " + u.Symbol
	e, err := lang.ParseExpr(text)
	if err != nil {
		return "", false
	}
	back, ok := literalOf(e)
	if !ok || back.quantity.Dim != q.Dim || math.Abs(back.quantity.Value-q.Value) > 1e-11*math.Abs(q.Value) {
		return "", false
	}
	return text, exact
}
