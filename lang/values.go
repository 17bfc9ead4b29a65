package lang

import (
	"strings"

	"kern/lang/unit"
)

// Values are the named values of a calculation. They may be defined in any
// order; a value that depends on itself has no value.
type Values struct {
	defs  map[string]*Value
	chain []*Value // the definitions being computed, outermost first
}

// Value is one named value.
type Value struct {
	Name string
	Decl *Decl
	Stmt *Stmt
	Expr *Expr
	// Late is set for a value that leans on the result of a member: it is worked
	// out after that member, by whoever knows the results.
	Late bool

	state    evalState
	quantity unit.Quantity
	problem  *Problem
}

type evalState uint8

const (
	untouched evalState = iota
	running
	done
)

// Define adds a value; the first definition of a name counts.
func (v *Values) Define(d *Value) {
	if v.defs == nil {
		v.defs = map[string]*Value{}
	}
	if _, twice := v.defs[d.Name]; !twice {
		v.defs[d.Name] = d
	}
}

// Lookup finds the definition of a name.
func (v *Values) Lookup(name string) (*Value, bool) {
	d, ok := v.defs[name]
	return d, ok
}

// Get computes the value. other resolves names that are no named values; it
// may be nil. The problem is the definition's own, with spans in its
// declaration; whoever uses the value stays silent about it.
func (v *Values) Get(d *Value, other Lookup) (unit.Quantity, *Problem) {
	switch d.state {
	case running:
		v.close(d)
		return unit.Quantity{}, Silent
	case untouched:
		v.settle(d, other)
	}
	return d.quantity, d.problem
}

// leaning is a value on its way to be computed with those that it leans on.
type leaning struct {
	on   []*Value
	next int
}

// settle computes a value after those that it leans on, deepest first. It keeps
// its own stack: a chain of definitions may be as long as a file.
func (v *Values) settle(d *Value, other Lookup) {
	var stack []leaning
	enter := func(d *Value) {
		d.state = running
		v.chain = append(v.chain, d)
		stack = append(stack, leaning{on: v.named(d.Expr)})
	}
	for enter(d); len(stack) > 0; {
		top := &stack[len(stack)-1]
		if top.next < len(top.on) {
			n := top.on[top.next]
			top.next++
			switch n.state {
			case untouched:
				enter(n)
			case running:
				v.close(n)
			}
			continue
		}
		v.finish(v.chain[len(v.chain)-1], other)
		stack = stack[:len(stack)-1]
		v.chain = v.chain[:len(v.chain)-1]
	}
}

// named are the definitions that an expression names.
func (v *Values) named(e *Expr) []*Value {
	var out []*Value
	e.Walk(func(x *Expr) {
		if x.Kind != NameExpr {
			return
		}
		if _, constant := Constants[x.Text]; constant {
			return
		}
		if n, ok := v.defs[x.Text]; ok {
			out = append(out, n)
		}
	})
	return out
}

// finish computes a value all of whose names have been settled, but for those
// that lean on it in turn.
func (v *Values) finish(d *Value, other Lookup) {
	q, p := Eval(d.Expr, func(name *Expr) (unit.Quantity, *Problem) {
		if n, ok := v.defs[name.Text]; ok {
			if n.state != done || n.problem != nil {
				return unit.Quantity{}, Silent
			}
			return n.quantity, nil
		}
		if other != nil {
			return other(name)
		}
		return unit.Quantity{}, &Problem{Rule: "unknown-name", Span: name.Span, Message: "there is no value '" + name.Text + "'"}
	})
	d.state, d.quantity = done, q
	if d.problem == nil { // a loop found below has set it
		d.problem = p
	}
}

// close reports a loop at the definition where it closes.
func (v *Values) close(d *Value) {
	if d.problem == nil {
		d.problem = &Problem{Rule: "defined-by-itself", Span: d.Stmt.Head, Message: "'" + d.Name + "' depends on itself: " + v.loop(d)}
	}
}

// loop writes the circle that closes at d as "a → b → a".
func (v *Values) loop(d *Value) string {
	var names []string
	for _, c := range v.chain {
		if c == d || len(names) > 0 {
			names = append(names, c.Name)
		}
	}
	if len(names) > 6 {
		names = append(names[:6], "…")
	}
	return strings.Join(append(names, d.Name), " → ")
}
