package offer

import (
	"strings"

	"kern/checker"
	"kern/checker/edit"
	"kern/checker/model"
	"kern/lang"
)

// inline offers to write the value of a name where the name stands.
func (l *list) inline(s site) {
	m, ok := l.Report.NameAt(l.File, l.Span.Start)
	if !ok || m.Named.Kind != model.ValueName || m.Named.Bad || m.Named.Twice {
		return
	}
	v, ok := m.Calculation.Env.Values.Lookup(m.Named.Name)
	if !ok || !l.plain(m.Calculation, v) {
		return
	}
	for _, other := range l.Report.References(m.Named) { // a slip: a dot stands behind members alone
		if at := other.Place; strings.HasPrefix(at.Decl.Text[at.Span.End:], ".") {
			return
		}
	}
	if !m.Declares {
		if text, ok := l.written(v, m.Place); ok {
			l.add(Offer{Kind: Inline, Title: "Write " + short(text) + " for " + v.Name + " here", edits: func() []checker.Edit {
				return []checker.Edit{l.editAt(m.Place, text)}
			}})
		}
	}
	l.add(Offer{Kind: Inline, Title: "Write " + short(v.Expr.Span.Of(v.Decl.Text)) + " for " + v.Name + " everywhere, and remove the name", edits: func() []checker.Edit {
		return l.everywhere(m.Named, v)
	}})
}

// short is a text for a title.
func short(text string) string {
	text = strings.Join(strings.Fields(text), " ")
	if r := []rune(text); len(r) > 40 {
		return string(r[:40]) + "…"
	}
	return text
}

// plain tells whether the text of a value means the same wherever the name can
// stand: it can be read, has no comment in it, and names no level, as a place
// that names one counts from datum and no longer from the member's base.
func (l *list) plain(c *model.Calculation, v *lang.Value) bool {
	if q, ok := c.Env.Value(v); !ok || q.Value != q.Value || v.Late {
		return false
	}
	file, span := l.Report.Where(lang.Place{Decl: v.Decl, Span: v.Stmt.Line})
	if file == "" || len(v.Stmt.Args) != 2 || v.Stmt.Body != nil || strings.ContainsAny(v.Expr.Span.Of(v.Decl.Text), "#\r\n") {
		return false
	}
	for _, d := range diagnosticsOf(l.Report, file) {
		if d.Severity == lang.Error && d.Span.Start < span.End && span.Start < max(d.Span.End, d.Span.Start+1) {
			return false
		}
	}
	fine := true
	v.Expr.Walk(func(e *lang.Expr) {
		n := c.Env.Names[e.Text]
		fine = fine && e.Kind != lang.BadExpr && !(e.Kind == lang.NameExpr && n != nil && n.Kind == model.LevelName)
	})
	return fine
}

// written is the text of a value as it must stand at a place: in brackets, unless
// it is one word or number there that nothing sticks to.
func (l *list) written(v *lang.Value, at lang.Place) (string, bool) {
	text := v.Expr.Span.Of(v.Decl.Text)
	around := at.Decl.Text
	next := ""
	if int(at.Span.End) < len(around) {
		next = around[at.Span.End:]
	}
	loose := next == "" || strings.ContainsAny(next[:1], " \t\r\n),;}#")
	power := strings.HasPrefix(strings.TrimLeft(next, " \t"), "^")
	switch v.Expr.Kind {
	case lang.NameExpr, lang.ParenExpr, lang.CallExpr:
		return text, true
	case lang.NumberExpr, lang.QuantExpr:
		if loose && !power && !l.unitFollows(v.Expr, next) {
			return text, true
		}
	case lang.BinaryExpr:
		if feetInches(v.Expr) && loose && !power {
			return text, true
		}
		if l.alone(at) {
			return text, true
		}
	case lang.UnaryExpr:
		if l.alone(at) {
			return text, true
		}
	}
	return "(" + text + ")", true
}

// unitFollows tells whether what follows would be read as the unit of a bare
// number, or as the inches of its feet.
func (l *list) unitFollows(e *lang.Expr, next string) bool {
	next = strings.TrimLeft(next, " \t")
	if e.Kind == lang.QuantExpr {
		return e.Text == "ft" && next != "" && '0' <= next[0] && next[0] <= '9'
	}
	for _, t := range lang.Tokens("1 " + next) {
		if t.Kind != lang.Number && t.Kind != lang.Blank {
			return t.Kind == lang.Unit
		}
	}
	return false
}

// alone tells whether a name is all that stands behind a sign =.
func (l *list) alone(at lang.Place) bool {
	for _, s := range at.Decl.Stmts {
		if found := aloneIn(s, at.Span); found {
			return true
		}
	}
	return false
}

func aloneIn(s *lang.Stmt, span lang.Span) bool {
	if value, ok := s.Assigned(); ok && len(value) == 1 && value[0].Span == span {
		return true
	}
	if s.Body != nil {
		for _, b := range s.Body.Stmts {
			if aloneIn(b, span) {
				return true
			}
		}
	}
	return false
}

// everywhere writes a value wherever its name stands and takes the declaration
// away. A comment on its line stays.
func (l *list) everywhere(n *model.Named, v *lang.Value) []checker.Edit {
	var out []checker.Edit
	for _, m := range l.Report.References(n) {
		if m.Declares {
			continue
		}
		text, ok := l.written(v, m.Place)
		if !ok {
			return nil
		}
		out = append(out, l.editAt(m.Place, text))
	}
	span := v.Stmt.Span
	text := v.Decl.Text
	if edit.First(text, span.Start) && len(v.Decl.Stmts) == 1 {
		end, ok := edit.Rest(text, span.End)
		tail := strings.TrimLeft(lang.Span{Start: span.End, End: end}.Of(text), " \t;")
		switch {
		case ok && tail == "": // the whole line, with its end
			span.Start, span.End = edit.LineStart(text, span.Start), end
			if strings.HasPrefix(text[end:], "\r\n") {
				span.End += 2
			} else if int(end) < len(text) {
				span.End++
			}
		case ok: // a comment stays, on a line of its own
			span.End = end - int32(len(tail))
		}
	} else if i := strings.IndexByte(text[span.End:], ';'); i >= 0 && strings.TrimSpace(text[span.End:int(span.End)+i]) == "" {
		span.End += int32(i) + 1
	}
	return append(out, l.editAt(lang.Place{Decl: v.Decl, Span: span}, ""))
}
