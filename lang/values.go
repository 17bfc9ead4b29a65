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

// maxChain bounds how many definitions may lean on one another in a row; the
// evaluation recurses.
const maxChain = 1000

// Get computes the value. other resolves names that are no named values; it
// may be nil. The problem is the definition's own, with spans in its
// declaration; whoever uses the value stays silent about it.
func (v *Values) Get(d *Value, other Lookup) (unit.Quantity, *Problem) {
	switch d.state {
	case done:
		return d.quantity, d.problem
	case running:
		d.problem = &Problem{Rule: "defined-by-itself", Span: d.Stmt.Head, Message: "'" + d.Name + "' depends on itself: " + v.loop(d)}
		return unit.Quantity{}, Silent
	}
	if len(v.chain) >= maxChain {
		return unit.Quantity{}, &Problem{Rule: "defined-by-itself", Span: d.Stmt.Head, Message: "more than 1000 definitions lean on one another in a row"}
	}
	d.state = running
	v.chain = append(v.chain, d)
	q, p := Eval(d.Expr, func(name *Expr) (unit.Quantity, *Problem) {
		if n, ok := v.defs[name.Text]; ok {
			q, p := v.Get(n, other)
			if p != nil {
				return q, Silent
			}
			return q, nil
		}
		if other != nil {
			return other(name)
		}
		return unit.Quantity{}, &Problem{Rule: "unknown-name", Span: name.Span, Message: "there is no value '" + name.Text + "'"}
	})
	v.chain = v.chain[:len(v.chain)-1]
	d.state = done
	d.quantity = q
	if d.problem == nil { // a loop found below has set it
		d.problem = p
	}
	return d.quantity, d.problem
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
