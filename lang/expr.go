package lang

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"kern/lang/unit"

	"github.com/alecthomas/participle/v2/lexer"
)

// maxDepth bounds how deep brackets and signs may nest. The parser recurses,
// and a stack that overflows cannot be recovered.
const maxDepth = 64

// ParseExpr reads a text that is one expression. The error names the first
// problem.
func ParseExpr(text string) (*Expr, error) {
	s := &Syntax{Text: text}
	exprs := s.parts(significant(text))
	if len(s.Problems) > 0 {
		return nil, fmt.Errorf("%s", s.Problems[0].Message)
	}
	if len(exprs) != 1 {
		return nil, fmt.Errorf("%q is not one expression", text)
	}
	return exprs[0], nil
}

func significant(text string) []Token {
	tokens := Tokens(text)
	kept := tokens[:0]
	for _, t := range tokens {
		if t.Kind != Blank && t.Kind != Comment && t.Kind != Newline {
			kept = append(kept, t)
		}
	}
	return kept
}

// exprReader is a precedence-climbing reader on participle's tokens.
type exprReader struct {
	lex   *lexer.PeekingLexer
	line  *line
	depth int
	// inside is the number of open brackets: only there do a comma and a minus
	// before a word belong to the expression without question.
	inside int
	end    int // end offset of the last token consumed
}

func (r *exprReader) take() *lexer.Token {
	t := r.lex.Next()
	r.end = t.Pos.Offset + len(t.Value)
	return t
}

func spanOf(t *lexer.Token) Span {
	return Span{int32(t.Pos.Offset), int32(t.Pos.Offset + len(t.Value))}
}

func (r *exprReader) part() *Expr {
	t := r.lex.Peek()
	switch kindOf(t.Type) {
	case Equals:
		r.take()
		return r.line.expr(Expr{Kind: EqualsExpr, Span: spanOf(t), Text: "="})
	case Comma:
		r.take()
		return r.line.expr(Expr{Kind: CommaExpr, Span: spanOf(t), Text: ","})
	case String:
		r.take()
		return r.line.expr(Expr{Kind: StringExpr, Span: spanOf(t), Text: strings.Trim(t.Value, "\"“”„«»")})
	case Operator:
		switch t.Value {
		case "<", "<=", ">", ">=", "==", "!=":
			r.take()
			return r.line.expr(Expr{Kind: CompareExpr, Span: spanOf(t), Text: t.Value})
		}
	}
	return r.binary(0)
}

// binding gives how tightly an operator binds; 0 is no operator.
func binding(op string) int {
	switch op {
	case "+", "-":
		return 1
	case "*", "/":
		return 2
	case "^":
		return 4 // above the sign: -2^2 is -(2^2)
	}
	return 0
}

// operator looks for an operator that goes on with the expression. Between the
// parts of a statement a minus with a blank before it and none behind it begins
// a new part ("load G -5 kN").
func (r *exprReader) operator() (string, int) {
	t := r.lex.Peek()
	if kindOf(t.Type) != Operator {
		return "", 0
	}
	b := binding(t.Value)
	if r.inside == 0 && (t.Value == "-" || t.Value == "+") && t.Pos.Offset > r.end && r.glued() {
		return "", 0
	}
	return t.Value, b
}

// glued tells whether the token after the one ahead follows it without a blank.
func (r *exprReader) glued() bool {
	mark := r.lex.MakeCheckpoint()
	t := r.lex.Next()
	n := r.lex.Peek()
	r.lex.LoadCheckpoint(mark)
	return !n.EOF() && n.Pos.Offset == t.Pos.Offset+len(t.Value)
}

func (r *exprReader) binary(least int) *Expr {
	if r.depth++; r.depth > maxDepth {
		return r.tooDeep()
	}
	defer func() { r.depth-- }()
	left := r.unary()
	for {
		op, b := r.operator()
		if b == 0 || b <= least {
			return left
		}
		r.take()
		// ^ groups to the right, the others to the left
		below := b
		if op == "^" {
			below = b - 1
		}
		right := r.binary(below)
		left = r.line.expr(Expr{Kind: BinaryExpr, Op: op[0], Span: left.Span.Join(right.Span), Args: []*Expr{left, right}})
	}
}

func (r *exprReader) unary() *Expr {
	t := r.lex.Peek()
	if kindOf(t.Type) == Operator && (t.Value == "-" || t.Value == "+") {
		r.take()
		x := r.binary(3)
		return r.line.expr(Expr{Kind: UnaryExpr, Op: t.Value[0], Span: spanOf(t).Join(x.Span), Args: []*Expr{x}})
	}
	return r.primary()
}

func (r *exprReader) primary() *Expr {
	t := r.lex.Peek()
	switch kindOf(t.Type) {
	case Number:
		return r.number()
	case Name:
		r.take()
		if n := r.lex.Peek(); kindOf(n.Type) == OpenParen && n.Pos.Offset == r.end {
			return r.call(t)
		}
		return r.line.expr(Expr{Kind: NameExpr, Span: spanOf(t), Text: t.Value})
	case OpenParen:
		r.take()
		r.inside++
		x := r.binary(0)
		r.inside--
		span := Span{int32(t.Pos.Offset), x.Span.End}
		if c := r.lex.Peek(); kindOf(c.Type) == CloseParen {
			r.take()
			span.End = int32(r.end)
			return r.line.expr(Expr{Kind: ParenExpr, Span: span, Args: []*Expr{x}})
		}
		// a bracket that never closes: the reader of problems finds it
		return r.line.expr(Expr{Kind: BadExpr, Text: "(", Span: span, Args: []*Expr{x}})
	case EOF:
		return r.line.expr(Expr{Kind: BadExpr, Text: "end", Span: Span{int32(r.end), int32(r.end)}})
	case String:
		r.take()
		return r.line.expr(Expr{Kind: StringExpr, Span: spanOf(t), Text: strings.Trim(t.Value, "\"“”„«»")})
	case Equals, Comma:
		// an operand is missing; the sign belongs to the statement
		return r.line.expr(Expr{Kind: BadExpr, Text: "end", Span: Span{int32(r.end), int32(r.end)}})
	}
	r.take()
	return r.line.expr(Expr{Kind: BadExpr, Text: "token", Span: spanOf(t)})
}

// number reads a number with its unit, and the inches that follow feet.
func (r *exprReader) number() *Expr {
	t := r.take()
	value, err := strconv.ParseFloat(plainNumber(t.Value), 64)
	span := spanOf(t)
	if err != nil || math.IsInf(value, 0) || value == 0 && strings.ContainsAny(mantissa(t.Value), "123456789") {
		return r.line.expr(Expr{Kind: BadExpr, Text: "number", Span: span})
	}
	u := r.lex.Peek()
	if kindOf(u.Type) != Unit {
		return r.line.expr(Expr{Kind: NumberExpr, Span: span, Value: value})
	}
	r.take()
	e := r.line.expr(Expr{Kind: QuantExpr, Span: Span{span.Start, int32(r.end)}, Value: value, Text: u.Value})
	e.Unit, err = unit.Parse(u.Value)
	if err != nil {
		e.Unit = unit.Unit{} // its Symbol is "": the evaluator reports it, where the unit is needed
	}
	if u.Value == "ft" && r.inchesAhead() {
		mark := r.lex.MakeCheckpoint()
		end := r.end
		if inches := r.number(); inches.Kind == QuantExpr {
			return r.line.expr(Expr{Kind: BinaryExpr, Op: '+', Span: e.Span.Join(inches.Span), Text: "ft-in", Args: []*Expr{e, inches}})
		}
		r.lex.LoadCheckpoint(mark)
		r.end = end
	}
	return e
}

// inchesAhead tells whether a number and "in" come next. It looks no further:
// a row of feet must not be read again for each of them.
func (r *exprReader) inchesAhead() bool {
	if kindOf(r.lex.Peek().Type) != Number {
		return false
	}
	mark := r.lex.MakeCheckpoint()
	r.lex.Next()
	u := r.lex.Peek()
	r.lex.LoadCheckpoint(mark)
	return kindOf(u.Type) == Unit && u.Value == "in"
}

// mantissa is a number's text without its exponent.
func mantissa(s string) string {
	if i := strings.IndexAny(s, "eE"); i >= 0 {
		return s[:i]
	}
	return s
}

func plainNumber(s string) string {
	if strings.IndexByte(s, '_') >= 0 {
		return strings.ReplaceAll(s, "_", "")
	}
	return s
}

func (r *exprReader) call(name *lexer.Token) *Expr {
	e := r.line.expr(Expr{Kind: CallExpr, Text: name.Value, Span: spanOf(name)})
	r.take()
	r.inside++
	defer func() { r.inside-- }()
	for {
		if kindOf(r.lex.Peek().Type) == CloseParen {
			break
		}
		e.Args = append(e.Args, r.binary(0))
		if kindOf(r.lex.Peek().Type) != Comma {
			break
		}
		r.take()
	}
	if kindOf(r.lex.Peek().Type) != CloseParen {
		return r.line.expr(Expr{Kind: BadExpr, Text: "(", Span: Span{e.Span.Start, int32(r.end)}, Args: e.Args})
	}
	r.take()
	e.Span.End = int32(r.end)
	return e
}

// tooDeep consumes what is left: nothing in it can be read any more.
func (r *exprReader) tooDeep() *Expr {
	r.depth--
	start := int32(r.lex.Peek().Pos.Offset)
	for !r.lex.Peek().EOF() {
		r.take()
	}
	return r.line.expr(Expr{Kind: BadExpr, Text: "deep", Span: Span{start, int32(max(r.end, int(start)))}})
}
