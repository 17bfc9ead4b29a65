package checker

import (
	"strings"

	"kern/checker/model"
	"kern/lang"
)

// Mentions calls f for every name that stands in a declaration and has a
// meaning in the calculation, in the order of the text. It knows where a
// statement has names and where it has words of the language, so that a level
// called "top" is not found in "hold minor at top".
func Mentions(c *model.Calculation, d *lang.Decl, f func(Mention)) {
	w := mentions{c: c, decl: d, tell: f}
	for _, s := range d.Stmts {
		w.declaration(s)
	}
}

type mentions struct {
	c    *model.Calculation
	decl *lang.Decl
	tell func(Mention)
}

// name tells of a name, if it has a meaning.
func (w *mentions) name(text string, span lang.Span) {
	if name, _, dot := strings.Cut(text, "."); dot { // A1.N_Ed speaks of A1
		text, span.End = name, span.Start+int32(len(name))
	}
	n := w.c.Env.Names[text]
	if n == nil {
		return
	}
	place := lang.Place{Decl: w.decl, Span: span}
	w.tell(Mention{Named: n, Place: place, Declares: n.Place == place, Calculation: w.c})
}

// value tells of the names in a calculation.
func (w *mentions) value(e *lang.Expr) {
	e.Walk(func(x *lang.Expr) {
		if x.Kind == lang.NameExpr {
			if _, constant := lang.Constants[x.Text]; !constant {
				w.name(x.Text, x.Span)
			}
		}
	})
}

// values tells of the names in a row of parts that are values, signs apart.
func (w *mentions) values(args []*lang.Expr) {
	for _, e := range args {
		w.value(e)
	}
}

// first tells of the name that a declaration begins with and gives the rest.
func (w *mentions) first(args []*lang.Expr) []*lang.Expr {
	if len(args) == 0 || args[0].Kind != lang.NameExpr {
		return args
	}
	w.name(args[0].Text, args[0].Span)
	return args[1:]
}

func (w *mentions) declaration(s *lang.Stmt) {
	if value, ok := s.Assigned(); ok {
		w.name(s.Word, s.Head)
		w.values(value)
		return
	}
	switch s.Word {
	case "column", "strut", "tie":
		w.member(s)
	case "material", "section":
		w.first(s.Args)
		w.properties(s)
	case "case":
		rest := w.first(s.Args)
		for i, e := range rest {
			if i > 0 && strings.HasPrefix(rest[i-1].Text, "psi_") {
				w.value(e)
			}
		}
	case "exclusive":
		w.values(s.Args)
	case "level":
		rest := w.first(s.Args)
		if len(rest) > 1 && rest[0].Is("at") {
			w.value(rest[1])
		}
		for _, b := range block(s) {
			w.name(b.Word, b.Head)
			w.values(b.Args)
		}
	case "combination":
		rest := w.first(s.Args)
		if len(rest) > 0 && rest[0].Kind == lang.NameExpr {
			rest = rest[1:] // what the combination is for
		}
		if len(rest) > 1 && rest[0].Kind == lang.EqualsExpr {
			for _, e := range rest[1:] {
				w.sum(e)
			}
		}
	case "basis":
		for _, b := range block(s) {
			if value, ok := b.Assigned(); ok && len(value) > 0 {
				w.value(value[0])
			}
		}
	}
}

func block(s *lang.Stmt) []*lang.Stmt {
	if s.Body == nil {
		return nil
	}
	return s.Body.Stmts
}

// properties tells of the names in a block of properties. A few properties take
// words.
func (w *mentions) properties(s *lang.Stmt) {
	for _, b := range block(s) {
		switch b.Word {
		case "made", "curve", "curve_major", "curve_minor":
			continue
		}
		if value, ok := b.Assigned(); ok {
			w.values(value)
		}
	}
}

// sum tells of the cases of a combination: in "1.1 G" the case stands where a
// unit would.
func (w *mentions) sum(e *lang.Expr) {
	switch e.Kind {
	case lang.QuantExpr:
		w.name(e.Text, e.UnitSpan())
	case lang.BinaryExpr:
		if e.Op == '*' {
			w.value(e.Args[0])
			w.sum(e.Args[1])
			return
		}
		w.sum(e.Args[0])
		w.sum(e.Args[1])
	case lang.ParenExpr, lang.UnaryExpr, lang.BadExpr:
		for _, a := range e.Args {
			w.sum(a)
		}
	case lang.NameExpr:
		w.value(e)
	}
}

// member tells of the names of a member: its own, the member it is like, and
// those in its block.
func (w *mentions) member(s *lang.Stmt) {
	args := s.Args
	for len(args) > 0 && args[0].Kind == lang.NameExpr && !args[0].Is("as") {
		args = w.first(args)
		if len(args) == 0 || args[0].Kind != lang.CommaExpr {
			break
		}
		args = args[1:]
	}
	for i, e := range args {
		if e.Is("as") && i+1 < len(args) {
			w.value(args[i+1])
			break
		}
	}
	for _, b := range block(s) {
		w.statement(b)
	}
}

// statement tells of the names in a statement of a member's block.
func (w *mentions) statement(s *lang.Stmt) {
	args := s.Args
	value, assigned := s.Assigned()
	if assigned {
		args = value
	}
	at := func(i int) {
		if i < len(args) {
			w.value(args[i])
		}
	}
	switch s.Word {
	case "section", "material", "height", "length", "effective", "net", "reduction":
		if assigned {
			at(0)
			w.properties(s)
		}
	case "from": // from A to B
		at(0)
		at(2)
	case "reduce": // reduce live by tributary area K_LL NUMBER
		at(5)
	case "connectors": // connectors every LENGTH KIND
		at(1)
	case "joints": // joints RATIO at base, RATIO at top about AXIS
		at(0)
		at(4)
	case "lift": // lift A to B { section = … }
		at(0)
		at(2)
		for _, b := range block(s) {
			w.statement(b)
		}
	case "hold": // hold minor at PLACE stiffness VALUE
		at(2)
		if len(args) > 3 && args[3].Is("stiffness") {
			at(4)
		}
	case "base", "top": // base spring VALUE
		if len(args) > 0 && args[0].Is("spring") {
			at(1)
		}
	case "limit": // limit sway = VALUE
		at(2)
	case "require": // require SYMBOL >= VALUE
		at(2)
	case "load":
		w.load(args)
	}
}

// load tells of the names of a load: its case, its value, and what stands
// behind the words that a place or an offset follows.
func (w *mentions) load(args []*lang.Expr) {
	if len(args) == 0 {
		return
	}
	i := 0
	if args[0].Is("floor") && w.c.Env.Names["floor"] == nil {
		i = 1
		if len(args) > 1 && !joins(args[1]) {
			w.value(args[1])
			i = 2
		}
	} else if args[0].Kind == lang.NameExpr {
		w.value(args[0])
		i = 1
		if len(args) > 1 && !joins(args[1]) {
			w.value(args[1])
			i = 2
		}
	}
	for ; i < len(args); i++ {
		switch e := args[i]; {
		case e.Is("about"), e.Is("across"):
			i++ // an axis
		case e.Is("at"), e.Is("offset"), e.Is("from"), e.Is("to"), e.Is("and"):
			i++
			if i < len(args) {
				w.value(args[i])
			}
		case e.Kind != lang.NameExpr:
			w.value(e)
		}
	}
}

func joins(e *lang.Expr) bool {
	switch e.Text {
	case "at", "about", "across", "offset", "from", "to", "and":
		return e.Kind == lang.NameExpr
	}
	return false
}
