// Package derivation is the working of a calculation as data. A standard
// declares its symbols and formulas once, as text in the language's own
// expressions; the same formula objects compute the values and are printed, so
// what is printed is what was calculated.
package derivation

import (
	"fmt"
	"math"

	"kern/lang"
	"kern/lang/unit"
)

// ID is a symbol's place in the sheets of its set.
type ID int

// Symbol is a letter of a standard with its meaning.
type Symbol struct {
	Name string // ASCII, "_" before a subscript: N_b_Rd
	What string // what it is, in words
	Dim  unit.Dim
}

// Set is the symbols of one standard. It is filled when the program starts and
// only read afterwards.
type Set struct {
	symbols  []Symbol
	index    map[string]ID
	formulas []*Formula
}

// NewSet returns an empty set.
func NewSet() *Set { return &Set{index: map[string]ID{}} }

// Symbol declares a symbol. A name declared twice is a defect of the program
// and panics at start.
func (s *Set) Symbol(name string, dim unit.Dim, what string) ID {
	if _, twice := s.index[name]; twice {
		panic("derivation: symbol " + name + " declared twice")
	}
	id := ID(len(s.symbols))
	s.symbols = append(s.symbols, Symbol{Name: name, What: what, Dim: dim})
	s.index[name] = id
	return id
}

// Find looks a symbol up by its name.
func (s *Set) Find(name string) (ID, bool) {
	id, ok := s.index[name]
	return id, ok
}

// At gives the symbol's words.
func (s *Set) At(id ID) Symbol { return s.symbols[id] }

// Len is the number of symbols.
func (s *Set) Len() int { return len(s.symbols) }

// Formula is an equation of a standard: a symbol and the expression that gives
// it.
type Formula struct {
	Symbol ID
	Text   string
	Clause string

	tree *lang.Expr
	uses []ID
	run  func(v []float64) float64
}

// Tree is the expression of the formula.
func (f *Formula) Tree() *lang.Expr { return f.tree }

// Uses are the symbols that the formula reads, each once, in order of first
// appearance.
func (f *Formula) Uses() []ID { return f.uses }

// Formula declares an equation. Text that cannot be read is a defect of the
// program and panics at start.
func (s *Set) Formula(symbol ID, text, clause string) *Formula {
	tree, err := lang.ParseExpr(text)
	if err != nil {
		panic(fmt.Sprintf("derivation: formula %q: %v", text, err))
	}
	f := &Formula{Symbol: symbol, Text: text, Clause: clause, tree: tree}
	s.formulas = append(s.formulas, f)
	return f
}

// Seal makes the formulas ready to compute, once all symbols are declared: a
// package's variables come to be in an order that formulas do not show. A
// formula that names an unknown symbol panics.
func (s *Set) Seal() {
	for _, f := range s.formulas {
		f.run = s.compile(f, f.tree)
	}
}

// Formulas are all equations of the set.
func (s *Set) Formulas() []*Formula { return s.formulas }

// compile turns an expression into a closure over a sheet's values. It follows
// lang.Eval exactly, without the dimensions, which a test checks for every
// formula.
func (s *Set) compile(f *Formula, e *lang.Expr) func(v []float64) float64 {
	switch e.Kind {
	case lang.NumberExpr:
		c := e.Value
		return func([]float64) float64 { return c }
	case lang.QuantExpr:
		c := e.Value * e.Unit.Factor
		return func([]float64) float64 { return c }
	case lang.NameExpr:
		if c, ok := lang.Constants[e.Text]; ok {
			return func([]float64) float64 { return c.Value }
		}
		id, ok := s.index[e.Text]
		if !ok {
			panic(fmt.Sprintf("derivation: formula %q: no symbol %q", f.Text, e.Text))
		}
		f.use(id)
		return func(v []float64) float64 { return v[id] }
	case lang.ParenExpr:
		return s.compile(f, e.Args[0])
	case lang.UnaryExpr:
		x := s.compile(f, e.Args[0])
		if e.Op == '-' {
			return func(v []float64) float64 { return -x(v) }
		}
		return x
	case lang.BinaryExpr:
		x, y := s.compile(f, e.Args[0]), s.compile(f, e.Args[1])
		switch e.Op {
		case '+':
			return func(v []float64) float64 { return x(v) + y(v) }
		case '-':
			return func(v []float64) float64 { return x(v) - y(v) }
		case '*':
			return func(v []float64) float64 { return x(v) * y(v) }
		case '/':
			return func(v []float64) float64 { return x(v) / y(v) }
		case '^':
			if n := e.Args[1]; n.Kind == lang.NumberExpr && n.Value == 2 {
				return func(v []float64) float64 { a := x(v); return a * a }
			}
			return func(v []float64) float64 { return math.Pow(x(v), y(v)) }
		}
	case lang.CallExpr:
		return s.compileCall(f, e)
	}
	panic(fmt.Sprintf("derivation: formula %q cannot be computed", f.Text))
}

func (s *Set) compileCall(f *Formula, e *lang.Expr) func(v []float64) float64 {
	args := make([]func([]float64) float64, len(e.Args))
	for i, a := range e.Args {
		args[i] = s.compile(f, a)
	}
	one := map[string]func(float64) float64{"sqrt": math.Sqrt, "abs": math.Abs, "sin": math.Sin, "cos": math.Cos, "tan": math.Tan}
	if g, ok := one[e.Text]; ok && len(args) == 1 {
		x := args[0]
		return func(v []float64) float64 { return g(x(v)) }
	}
	switch {
	case e.Text == "min" && len(args) > 0:
		return func(v []float64) float64 {
			m := args[0](v)
			for _, a := range args[1:] {
				m = min(m, a(v))
			}
			return m
		}
	case e.Text == "max" && len(args) > 0:
		return func(v []float64) float64 {
			m := args[0](v)
			for _, a := range args[1:] {
				m = max(m, a(v))
			}
			return m
		}
	}
	panic(fmt.Sprintf("derivation: formula %q: no function %q", f.Text, e.Text))
}

func (f *Formula) use(id ID) {
	for _, u := range f.uses {
		if u == id {
			return
		}
	}
	f.uses = append(f.uses, id)
}
