package lang

import (
	"fmt"
	"math"
	"strings"

	"kern/lang/unit"
)

// Lookup gives the value of a name in an expression. A problem says that there
// is none; Silent says that the reason was reported where it lies.
type Lookup func(name *Expr) (unit.Quantity, *Problem)

// Silent stands for a problem that was reported already: whatever depends on it
// has no value and nothing more is said.
var Silent = &Problem{}

// Functions are the functions of the language with what they do.
var Functions = map[string]string{
	"sqrt": "square root", "min": "smallest of its values", "max": "largest of its values", "abs": "absolute value",
	"sin": "sine of an angle", "cos": "cosine of an angle", "tan": "tangent of an angle",
}

// Constants are the names that have a value without being defined: pi, and g,
// the standard acceleration of gravity (exactly 9.80665 m/s2, NIST SP 811).
var Constants = map[string]unit.Quantity{
	"pi": {Value: math.Pi},
	"g":  {Value: unit.StandardGravity, Dim: unit.Acceleration},
}

// Eval computes an expression in coherent SI units and checks its dimensions.
// Division by zero, roots of negative numbers and results that are not finite
// are problems, never values.
func Eval(e *Expr, names Lookup) (unit.Quantity, *Problem) {
	return eval(e, names)
}

// eval looks at every result on the way: 1 / (1e308 * 10) would be a harmless 0
// otherwise.
func eval(e *Expr, names Lookup) (unit.Quantity, *Problem) {
	q, p := compute(e, names)
	if p == nil && (math.IsNaN(q.Value) || math.IsInf(q.Value, 0)) {
		return q, &Problem{Rule: "no-value", Span: e.Span, Message: "this has no finite value"}
	}
	return q, p
}

func compute(e *Expr, names Lookup) (unit.Quantity, *Problem) {
	switch e.Kind {
	case NumberExpr:
		return unit.Quantity{Value: e.Value}, nil
	case QuantExpr:
		if e.Unit.Symbol == "" {
			return unit.Quantity{}, UnknownUnit(e, unit.None, true)
		}
		return unit.Quantity{Value: e.Value * e.Unit.Factor, Dim: e.Unit.Dim}, nil
	case NameExpr:
		if c, ok := Constants[e.Text]; ok {
			return c, nil
		}
		return names(e)
	case ParenExpr:
		return eval(e.Args[0], names)
	case UnaryExpr:
		q, p := eval(e.Args[0], names)
		if e.Op == '-' {
			q.Value = -q.Value
		}
		return q, p
	case BinaryExpr:
		return binary(e, names)
	case CallExpr:
		return call(e, names)
	case StringExpr:
		return unit.Quantity{}, &Problem{Rule: "misplaced-sign", Span: e.Span, Message: "a text stands where a value is due"}
	case BadExpr:
		return unit.Quantity{}, Silent
	}
	return unit.Quantity{}, &Problem{Rule: "misplaced-sign", Span: e.Span, Message: "'" + e.Text + "' stands where a value is due"}
}

func binary(e *Expr, names Lookup) (unit.Quantity, *Problem) {
	x, p := eval(e.Args[0], names)
	if p != nil {
		return x, p
	}
	y, p := eval(e.Args[1], names)
	if p != nil {
		return y, p
	}
	var ok bool
	switch e.Op {
	case '+', '-':
		if x.Dim != y.Dim {
			return x, clash(e, x, y)
		}
		if e.Op == '-' {
			y.Value = -y.Value
		}
		x.Value += y.Value
		return x, nil
	case '*':
		x.Value *= y.Value
		x.Dim, ok = x.Dim.Mul(y.Dim)
	case '/':
		if y.Value == 0 {
			return x, &Problem{Rule: "no-value", Span: e.Args[1].Span, Message: "division by zero"}
		}
		x.Value /= y.Value
		x.Dim, ok = x.Dim.Div(y.Dim)
	case '^':
		return power(e, x, y)
	}
	if !ok {
		return x, &Problem{Rule: "unit-mismatch", Span: e.Span, Message: "the unit of this product is beyond what the language holds"}
	}
	return x, nil
}

// clash is the problem of a sum of unlike quantities; both sides are shown.
func clash(e *Expr, x, y unit.Quantity) *Problem {
	verb := "add"
	if e.Op == '-' {
		verb = "subtract"
	}
	return &Problem{Rule: "unit-mismatch", Span: e.Span,
		Message: fmt.Sprintf("cannot %s %s and %s", verb, DimName(x.Dim), DimName(y.Dim)),
		Related: []Related{
			{Place: Place{Span: e.Args[0].Span}, Message: "this is " + DimName(x.Dim)},
			{Place: Place{Span: e.Args[1].Span}, Message: "this is " + DimName(y.Dim)}}}
}

// power takes a pure number as exponent; with a unit in the base the exponent
// must be a fraction that the dimensions can follow (1/2, 1/3, 2, …).
func power(e *Expr, x, y unit.Quantity) (unit.Quantity, *Problem) {
	if !y.Dim.IsNone() {
		return x, &Problem{Rule: "unit-mismatch", Span: e.Args[1].Span, Message: "an exponent is a pure number, this is " + DimName(y.Dim)}
	}
	dim := x.Dim
	if !dim.IsNone() {
		found := false
		for _, den := range []int{1, 2, 3, 6} {
			num := math.Round(y.Value * float64(den))
			if math.Abs(num) < 64 && math.Abs(num-y.Value*float64(den)) < 1e-12 {
				if dim, found = x.Dim.Pow(int(num), den); found {
					break
				}
			}
		}
		if !found {
			return x, &Problem{Rule: "unit-mismatch", Span: e.Args[1].Span, Message: "a quantity with a unit takes a simple exponent such as 2, 3 or 1/2"}
		}
	}
	return unit.Quantity{Value: math.Pow(x.Value, y.Value), Dim: dim}, nil
}

func call(e *Expr, names Lookup) (unit.Quantity, *Problem) {
	if _, ok := Functions[e.Text]; !ok {
		return unit.Quantity{}, &Problem{Rule: "unknown-name", Span: Span{e.Span.Start, e.Span.Start + int32(len(e.Text))},
			Message: "there is no function '" + e.Text + "'; the language has abs, cos, max, min, sin, sqrt and tan"}
	}
	args := make([]unit.Quantity, len(e.Args))
	for i, a := range e.Args {
		q, p := eval(a, names)
		if p != nil {
			return q, p
		}
		args[i] = q
	}
	several := e.Text == "min" || e.Text == "max"
	if len(args) == 0 || !several && len(args) != 1 {
		want := "one value"
		if several {
			want = "at least one value"
		}
		return unit.Quantity{}, &Problem{Rule: "wrong-count", Span: e.Span, Message: fmt.Sprintf("%s takes %s, here are %d", e.Text, want, len(args))}
	}
	x := args[0]
	switch e.Text {
	case "sqrt":
		if x.Value < 0 {
			return x, &Problem{Rule: "no-value", Span: e.Span, Message: "square root of a negative value"}
		}
		dim, ok := x.Dim.Pow(1, 2)
		if !ok {
			return x, &Problem{Rule: "unit-mismatch", Span: e.Span, Message: "the unit has no square root"}
		}
		return unit.Quantity{Value: math.Sqrt(x.Value), Dim: dim}, nil
	case "abs":
		x.Value = math.Abs(x.Value)
		return x, nil
	case "min", "max":
		for i, y := range args[1:] {
			if y.Dim != x.Dim {
				return x, &Problem{Rule: "unit-mismatch", Span: e.Args[i+1].Span,
					Message: fmt.Sprintf("%s compares like with like: the first value is %s, this is %s", e.Text, DimName(x.Dim), DimName(y.Dim)),
					Related: []Related{{Place: Place{Span: e.Args[0].Span}, Message: "this is " + DimName(x.Dim)}}}
			}
			if e.Text == "min" {
				x.Value = min(x.Value, y.Value)
			} else {
				x.Value = max(x.Value, y.Value)
			}
		}
		return x, nil
	}
	if !x.Dim.IsNone() && x.Dim != unit.Angle {
		return x, &Problem{Rule: "unit-mismatch", Span: e.Args[0].Span, Message: e.Text + " takes an angle, this is " + DimName(x.Dim)}
	}
	f := map[string]func(float64) float64{"sin": math.Sin, "cos": math.Cos, "tan": math.Tan}[e.Text]
	return unit.Quantity{Value: f(x.Value)}, nil
}

// UnknownUnit is the problem of a quantity whose unit does not exist. With any
// false, dim is what the place wants and orders the offers.
func UnknownUnit(e *Expr, dim unit.Dim, any bool) *Problem {
	p := &Problem{Rule: "unknown-unit", Span: e.UnitSpan(), Message: "'" + e.Text + "' is not a unit"}
	if i := strings.IndexAny(e.Text, "*/"); i > 0 && unit.Known(e.Text[:i]) {
		p.Notes = append(p.Notes, "for arithmetic with a name put blanks around the sign: "+e.Text[:i]+" "+e.Text[i:i+1]+" "+e.Text[i+1:])
	}
	near := unit.Nearest(e.Text, dim, any, 3)
	if !any {
		near = fitting(near, dim)
	}
	if len(near) > 0 && strings.EqualFold(near[0], e.Text) {
		near = near[:1] // the letters are right, their size is not
	}
	if len(near) > 0 {
		p.Message += "; did you mean " + orList(near) + "?"
	}
	for _, n := range near {
		p.Fixes = append(p.Fixes, Replace("Write "+n, len(near) == 1 && strings.EqualFold(n, e.Text), e.UnitSpan(), n))
	}
	return p
}

// fitting keeps the units of a dimension, when there is any; where a pure number
// is due, none is meant.
func fitting(symbols []string, dim unit.Dim) []string {
	var out []string
	for _, s := range symbols {
		if u, err := unit.Parse(s); err == nil && u.Dim == dim && !dim.IsNone() {
			out = append(out, s)
		}
	}
	if len(out) == 0 && !dim.IsNone() {
		return symbols
	}
	return out
}

// orList joins names as "a, b or c".
func orList(names []string) string {
	switch len(names) {
	case 0:
		return ""
	case 1:
		return names[0]
	}
	return strings.Join(names[:len(names)-1], ", ") + " or " + names[len(names)-1]
}

// A puts the article before a noun.
func A(noun string) string {
	if first := strings.TrimLeft(noun, "'"); first != "" && strings.IndexByte("aeiouAEIOU", first[0]) >= 0 {
		return "an " + noun
	}
	return "a " + noun
}

// DimName says what sort of quantity has the dimension, with its article.
func DimName(d unit.Dim) string {
	name := d.Name()
	if name == strings.ReplaceAll(d.Base(), "*", "·") {
		return "a quantity in " + name
	}
	return A(name)
}

// OrList joins names for a message: "a, b or c".
func OrList(names []string) string { return orList(names) }
