package complete

import (
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/action"
	"kern/checker/catalogue"
	"kern/checker/model"
	"kern/lang"
	"kern/lang/unit"
)

// scope is a place with the names that have a meaning there.
type scope struct {
	*caret
	report *checker.Report
	tree   *lang.File
	calc   *model.Calculation // nil for a file that no calculation reads
	env    *model.Env

	collected []use // see uses
}

// newScope reads a place. It is false where nothing can be offered.
func newScope(r *checker.Report, file string, offset int32) (*scope, bool) {
	tree := r.Project.Files[file]
	if tree == nil {
		return nil, false
	}
	c, ok := newCaret(tree, offset)
	if !ok {
		return nil, false
	}
	s := &scope{caret: c, report: r, tree: tree, env: &model.Env{}}
	if list := r.Calculations(file); len(list) > 0 {
		s.calc, s.env = list[0], list[0].Env
	}
	return s, true
}

// placeholderDims are the dimensions of what the writer puts in, by its name in
// the syntax. Names that are not here stand for something else than a quantity.
var placeholderDims = map[string]unit.Dim{
	"LENGTH": unit.Length, "HEIGHT": unit.Length, "LEVEL": unit.Length, "PLACE": unit.Length, "AREA": unit.Area,
	"LENGTH^3": unit.Volume, "LENGTH^4": unit.Length4, "LENGTH^6": unit.Length6,
	"FORCE": unit.Force, "FORCE/LENGTH": unit.ForcePerLength, "MOMENT": unit.Moment, "MOMENT/ANGLE": unit.RotationalStiffness, "STRESS": unit.Stress, "PRESSURE": unit.Stress,
	"DENSITY": unit.Density, "NUMBER": unit.None,
}

// dim is the dimension that an element wants; any for one that takes every
// dimension, and false for one that takes no quantity.
func (s *scope) dim(e *element) (dim unit.Dim, any, ok bool) {
	if e.kind != valueElement {
		return unit.None, false, false
	}
	if d, found := placeholderDims[e.name]; found {
		return d, false, true
	}
	if e.name != "VALUE" {
		return unit.None, false, false
	}
	if s.head == "require" && len(s.before) > 0 {
		if d, found := s.symbolDim(s.before[0].Text); found {
			return d, false, true
		}
	}
	return unit.None, true, true
}

// quantity gives the value of an expression at the place. The member's own
// height counts as one metre: it is there for its dimension.
func (s *scope) quantity(e *lang.Expr) (unit.Quantity, bool) {
	q, p := lang.Eval(e, func(n *lang.Expr) (unit.Quantity, *lang.Problem) {
		if v, ok := s.named(n.Text); ok {
			return v, nil
		}
		if s.member != nil && (n.Text == "height" || n.Text == "length" || n.Text == "span" && s.head == "limit") {
			return unit.Quantity{Value: 1, Dim: unit.Length}, nil
		}
		return unit.Quantity{}, lang.Silent
	})
	return q, p == nil
}

// named is the value of a name: of a named value or a level.
func (s *scope) named(name string) (unit.Quantity, bool) {
	n := s.env.Names[name]
	if n == nil || n.Bad || n.Twice {
		return unit.Quantity{}, false
	}
	switch n.Kind {
	case model.ValueName:
		if v, ok := s.env.Values.Lookup(name); ok {
			return s.env.Value(v)
		}
	case model.LevelName:
		if n.Index >= 0 && !s.env.Levels[n.Index].Bad {
			return unit.Quantity{Value: s.env.Levels[n.Index].At, Dim: unit.Length}, true
		}
	}
	return unit.Quantity{}, false
}

// accepts tells whether a part can stand at an element.
func (s *scope) accepts(e *element, part *lang.Expr) bool {
	switch e.kind {
	case signElement:
		switch part.Kind {
		case lang.EqualsExpr:
			return e.name == "="
		case lang.CommaExpr:
			return e.name == ","
		case lang.CompareExpr:
			return e.name == ">=" || e.name == part.Text // any comparison, or this one
		}
		return false
	case textElement:
		return part.Kind == lang.StringExpr
	case wordElement:
		return part.Kind == lang.NameExpr && slices.Contains(e.words, part.Text) ||
			part.Kind == lang.NumberExpr && len(e.words[0]) == 1 && slices.Contains(e.words, unit.Exact(part.Value))
	case blockElement:
		return false
	}
	switch part.Kind {
	case lang.EqualsExpr, lang.CommaExpr, lang.CompareExpr, lang.StringExpr:
		return false
	case lang.NameExpr:
		if e.name == "NAME" {
			return part.Text != "as"
		}
		n := s.env.Names[part.Text]
		switch e.name {
		case "CASE":
			return s.env.Declared() && (n != nil && n.Kind == model.CaseName || n == nil && !joining(part.Text) && part.Text != "floor")
		case "AXIS":
			return part.Text == "major" || part.Text == "minor"
		case "KIND":
			kind, known := action.KindNames[part.Text]
			return known && kind.Variable()
		case "FAMILY":
			return slices.Contains(catalogue.Families(), strings.ToUpper(part.Text))
		case "SITUATION":
			return slices.Contains(action.SituationNames(), part.Text)
		case "RESULT", "RULE", "UNIT", "SHAPE":
			return !joining(part.Text)
		case "PLACE":
			if part.Text == "top" || part.Text == "base" {
				return true
			}
		}
		if n == nil && (joining(part.Text) || part.Text == "floor") || n != nil && n.Kind == model.CaseName && e.name != "FACTOR CASE" {
			return false
		}
	default:
		switch e.name {
		case "NAME", "CASE", "AXIS", "SHAPE", "RESULT", "KIND", "SITUATION", "FAMILY":
			return false
		}
	}
	if dim, any, ok := s.dim(e); ok && !any {
		if q, known := s.quantity(part); known && q.Dim != dim {
			return false
		}
	}
	return true
}

// joining tells the words that stand before the parts of a statement.
func joining(word string) bool {
	switch word {
	case "major", "minor", "both", "twist", "top", "base", "by", "with", "stiffness":
		return false
	}
	return lang.Joins(word)
}

// duty is what can come where the caret is.
type duty struct {
	*element
	// operand is set inside of a calculation: a value is due, no word.
	operand bool
	// unit is set behind a number: its unit is due.
	unit bool
	// dims are the dimensions that fit, of a quantity; nil for any.
	dims []unit.Dim
}

// due tells what can come at the place, by the forms that fit what has been
// typed.
func (s *scope) due() []duty {
	var out []duty
	add := func(d duty) {
		for i := range out {
			o := &out[i]
			if o.operand == d.operand && o.unit == d.unit && o.sameAs(d.element) {
				for _, dim := range d.dims {
					if !slices.Contains(o.dims, dim) {
						o.dims = append(o.dims, dim)
					}
				}
				return
			}
		}
		out = append(out, d)
	}
	whole, value, opening := s.split()
	for _, fits := range []bool{true, false} {
		for _, p := range s.patterns() {
			if value != nil {
				before := s.before[:len(s.before)-len(value)]
				p.next(before, s.accepts, func(e *element) {
					dim, any, ok := s.dim(e)
					if !ok && e.name != "FACTOR CASE" || fits && !s.goesOn(p, e, before) {
						return
					}
					dims := []unit.Dim{dim}
					if any || !ok {
						dims = nil
					}
					_, dims = s.opening(value[len(value)-1], dims)
					add(duty{element: e, operand: opening == openOperand, unit: s.number, dims: dims})
				})
			}
			if whole {
				p.next(s.before, s.accepts, func(e *element) {
					dim, any, ok := s.dim(e)
					if fits && !s.goesOn(p, e, s.before) || ok && s.needsCase() {
						return
					}
					d := duty{element: e}
					if ok && !any {
						d.dims = []unit.Dim{dim}
					}
					add(d)
				})
			}
		}
		if len(out) > 0 || len(s.after) == 0 {
			break // with what stands behind; else as if nothing stood there
		}
	}
	return out
}

// needsCase tells whether the name of a load case has to come first: a load
// belongs to one where the calculation has any.
func (s *scope) needsCase() bool {
	return s.head == "load" && len(s.before) == 0 && s.env.Declared()
}

// split tells whether what was typed is whole, so that a new part can follow,
// and gives the parts of a value that goes on at the caret, nil for none.
func (s *scope) split() (whole bool, value []*lang.Expr, opening openKind) {
	n := len(s.before)
	if n == 0 {
		return !s.number, nil, openNone
	}
	opening, _ = s.opening(s.before[n-1], nil)
	switch {
	case s.number:
		value = s.before[n-1:]
		if feet := s.before[max(0, n-2)]; n > 1 && feet.Kind == lang.QuantExpr && feet.Text == "ft" {
			value = s.before[n-2:] // the inches that follow feet
		}
		return opening == openNone && !s.fresh, value, opening
	case opening == openOperand:
		return false, s.before[n-1:], opening
	case opening == openBracket:
		return false, nil, opening
	}
	return true, nil, opening
}

// sameAs tells whether two elements want the same thing, of several forms of a
// statement.
func (e *element) sameAs(o *element) bool {
	if e == o {
		return true
	}
	if e.kind != o.kind || e.pattern.form.Word != o.pattern.form.Word || !slices.Equal(e.words, o.words) {
		return false
	}
	_, quantity := placeholderDims[e.name]
	_, other := placeholderDims[o.name]
	return e.name == o.name || quantity && other && e.name != "PLACE" && o.name != "PLACE" && e.name != "LEVEL" && o.name != "LEVEL"
}

// goesOn tells whether what stands behind the caret can follow an element.
func (s *scope) goesOn(p *pattern, e *element, before []*lang.Expr) bool {
	if len(s.after) == 0 {
		return true
	}
	filler := &lang.Expr{}
	parts := append(append(slices.Clone(before), filler), s.after...)
	followed, _ := p.next(parts, func(x *element, part *lang.Expr) bool {
		if part == filler {
			return x == e
		}
		return s.accepts(x, part)
	}, func(*element) {})
	return followed == len(parts)
}

// openKind is how a part that was typed ends.
type openKind uint8

const (
	openNone    openKind = iota // it is whole
	openOperand                 // behind an operator, an opening bracket or a comma
	openNumber                  // with a number that has no unit
	openBracket                 // whole, in a bracket that is open
)

// opening tells how a part ends and, from the dimensions that the part may have,
// those that its end may have.
func (s *scope) opening(e *lang.Expr, dims []unit.Dim) (openKind, []unit.Dim) {
	switch e.Kind {
	case lang.NumberExpr:
		return openNone, dims // a number that is whole may still get a unit: the caret knows
	case lang.UnaryExpr:
		return s.opening(e.Args[0], dims)
	case lang.BinaryExpr:
		left := e.Args[0]
		switch e.Op {
		case '*', '/':
			q, ok := s.quantity(left)
			var out []unit.Dim
			for _, d := range dims {
				quotient, fine := d.Div(q.Dim)
				if e.Op == '/' {
					quotient, fine = q.Dim.Div(d)
				}
				if ok && fine {
					out = append(out, quotient)
				}
			}
			dims = out
		case '^':
			dims = []unit.Dim{unit.None}
		case '+', '-':
			if q, ok := s.quantity(left); ok {
				dims = []unit.Dim{q.Dim}
			}
		}
		return s.opening(e.Args[1], dims)
	case lang.BadExpr:
		switch e.Text {
		case "end":
			return openOperand, dims
		case "(":
			return s.bracket(e, dims)
		}
	}
	return openNone, dims
}

// bracket is opening for a bracket or a call that is not closed.
func (s *scope) bracket(e *lang.Expr, dims []unit.Dim) (openKind, []unit.Dim) {
	if len(e.Args) == 0 {
		return openOperand, dims
	}
	function := calledIn(e, s.text[s.start:])
	switch function {
	case "", "abs":
	case "min", "max":
		if len(e.Args) > 1 {
			if q, ok := s.quantity(e.Args[0]); ok {
				dims = []unit.Dim{q.Dim}
			}
		}
	case "sqrt":
		var out []unit.Dim
		for _, d := range dims {
			if square, ok := d.Pow(2, 1); ok {
				out = append(out, square)
			}
		}
		dims = out
	default: // of angles
		dims = []unit.Dim{unit.Angle}
	}
	kind, dims := s.opening(e.Args[len(e.Args)-1], dims)
	if kind == openNone {
		kind = openBracket
	}
	return kind, dims
}

// calledIn is the function of a call that is not closed; "" for a bracket.
func calledIn(e *lang.Expr, text string) string {
	name, _, _ := strings.Cut(e.Span.Of(text), "(")
	return strings.TrimSpace(name)
}
