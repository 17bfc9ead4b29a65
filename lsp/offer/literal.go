package offer

import (
	"fmt"
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/lang"
	"kern/lang/unit"
)

// use is a place where a quantity stands, and what it is there.
type use struct {
	decl int
	expr *lang.Expr
	role string // "height", "load G", "offset"
	// whole is set where the quantity is all that a named value is.
	whole bool
	name  string // of that value
}

// literal offers to give a name to a quantity that stands in the file more than
// once: in the lines that say the same sort of thing, and everywhere.
func (l *list) literal(s site) {
	lit, ok := l.literalAt(s)
	if !ok {
		return
	}
	uses := l.uses(lit.quantity)
	here, role := -1, ""
	for i, u := range uses {
		if u.expr == lit.expr {
			here, role = i, u.role
		}
	}
	if here < 0 || uses[here].whole {
		return
	}
	text := lit.expr.Span.Of(s.Decl.Text)
	var alike, others []use
	for _, u := range uses {
		if u.whole {
			if l.gives(u.name, s.Decl.File.Name) {
				others = nil
				l.useName(u.name, text, uses)
				return
			}
			continue
		}
		others = append(others, u)
		if u.role == role {
			alike = append(alike, u)
		}
	}
	name := l.free(propose(role, lit.quantity.Dim))
	offer := func(uses []use, where string) {
		edits := func() []checker.Edit {
			e, ok := l.above(uses[0].decl, name+" = "+text)
			if !ok {
				return nil
			}
			return append([]checker.Edit{e}, l.replace(uses, name)...)
		}
		if edits() != nil {
			l.add(Offer{Kind: Extract, Title: fmt.Sprintf("Name the value: %s = %s (%s)", name, text, where), edits: edits})
		}
	}
	if len(alike) > 1 {
		offer(alike, fmt.Sprintf("%s, %d places", role, len(alike)))
	}
	if len(others) > 1 && len(others) > len(alike) {
		offer(others, fmt.Sprintf("all %d places", len(others)))
	}
}

// gives tells whether a name is the value that it seems to be in every
// calculation of the file.
func (l *list) gives(name, file string) bool {
	for _, c := range l.calculations {
		n := c.Env.Names[name]
		if n == nil || n.Kind != model.ValueName || n.Bad || n.Twice || n.Place.Decl.File.Name != file {
			return false
		}
	}
	return len(l.calculations) > 0
}

// useName offers to use a named value where its quantity is written out again.
func (l *list) useName(name, text string, uses []use) {
	var rest []use
	for _, u := range uses {
		if !u.whole {
			rest = append(rest, u)
		}
	}
	title := fmt.Sprintf("Use the named value %s for %s", name, text)
	if len(rest) > 1 {
		title += fmt.Sprintf(" (%d places)", len(rest))
	}
	l.add(Offer{Kind: Extract, Title: title, edits: func() []checker.Edit { return l.replace(rest, name) }})
}

// replace writes a name for quantities.
func (l *list) replace(uses []use, name string) []checker.Edit {
	var out []checker.Edit
	for _, u := range uses {
		out = append(out, l.edit(l.file.Starts[u.decl], u.expr.Span, name))
	}
	return out
}

// uses finds a quantity, the very same number and dimension, in the declarations
// of the file.
func (l *list) uses(q unit.Quantity) []use {
	var out []use
	for i, d := range l.file.Decls {
		for _, s := range d.Stmts {
			if s.Word == "combination" || s.Broken {
				continue
			}
			w := walker{list: l, decl: i, want: q, found: &out}
			w.stmt(nil, s)
		}
	}
	return out
}

// walker looks for a quantity in a declaration.
type walker struct {
	*list
	decl  int
	want  unit.Quantity
	found *[]use
}

func (w *walker) stmt(parent, s *lang.Stmt) {
	if !s.Broken {
		before := len(*w.found)
		for i, e := range s.Args {
			w.expr(parent, s, i, e)
		}
		start := w.file.Starts[w.decl]
		if len(*w.found) > before && !w.sound(lang.Span{Start: start + s.Line.Start, End: start + s.Line.End}) {
			*w.found = (*w.found)[:before]
		}
	}
	if s.Body != nil {
		for _, b := range s.Body.Stmts {
			w.stmt(s, b)
		}
	}
}

func (w *walker) expr(parent, s *lang.Stmt, i int, e *lang.Expr) {
	if e.Kind == lang.QuantExpr || feetInches(e) {
		if lit, ok := literalOf(e); ok && lit.quantity == w.want {
			u := use{decl: w.decl, expr: e, role: role(parent, s, i)}
			if parent == nil && assigned(s) && len(s.Args) == 2 && e == s.Args[1] {
				u.whole, u.name = true, s.Word
			}
			*w.found = append(*w.found, u)
		}
		return
	}
	for _, a := range e.Args {
		w.expr(parent, s, i, a)
	}
}

// role says what a value is in a statement.
func role(parent, s *lang.Stmt, i int) string {
	before := func(words ...string) bool {
		for _, word := range words {
			if i > 0 && s.Args[i-1].Is(word) {
				return true
			}
		}
		return false
	}
	switch {
	case parent != nil && parent.Word == "level":
		return "floor load " + s.Word
	case s.Word == "load" && before("offset", "and"):
		return "offset"
	case s.Word == "load" && before("at", "from", "to"):
		return "place"
	case s.Word == "load" && before("floor"):
		return "floor"
	case s.Word == "load" && i > 0 && s.Args[0].Kind == lang.NameExpr:
		return "load " + s.Args[0].Text
	case (s.Word == "limit" || s.Word == "require") && len(s.Args) > 0:
		return s.Args[0].Text
	case parent == nil && assigned(s):
		return "value"
	}
	return s.Word
}

// propose gives a name for a value.
func propose(role string, dim unit.Dim) string {
	if name, ok := quantityNames[role]; ok {
		return name
	}
	switch {
	case strings.HasPrefix(role, "floor load "):
		return "floor_" + strings.TrimPrefix(role, "floor load ")
	case strings.HasPrefix(role, "load "):
		return "load_" + strings.TrimPrefix(role, "load ")
	}
	if name, ok := dimensionNames[dim]; ok {
		return name
	}
	return "common_value"
}
