package model

import (
	"fmt"

	"kern/lang"
)

// section reads a section of the member or of one of its lifts, and where it is
// named; nil for one with an error.
func (w *memberReader) section(r *reader, d declared) (*Section, lang.Place) {
	at := r.place(r.stmt.Line)
	e := r.peek()
	if e != nil && e.Kind == lang.NameExpr && (d.stmt.Body == nil || w.env.Names[e.Text] != nil) {
		if contains(shapeWords, e.Text) && w.env.Names[e.Text] == nil {
			r.fail("wrong-form", r.stmt.Line, "a %s has a block with its dimensions: %s", e.Text, shapeForms[e.Text])
			return nil, at
		}
		n, ok := w.env.Names[e.Text]
		if p, found := r.inQuotes("a section of the catalogue", inCatalogue); found && !ok {
			r.problem(p)
			return nil, at
		}
		r.take()
		at = r.place(e.Span)
		if !ok || n.Kind != SectionName || n.Index < 0 {
			w.wrongName(r, e, n, "section", SectionName)
			return nil, at
		}
		if d.stmt.Body != nil {
			r.fail("left-over", d.stmt.Body.Span, "a section that is given by its name takes no block")
			return nil, at
		}
		w.m.Uses = append(w.m.Uses, n)
		s := w.env.Sections[n.Index]
		if n.Twice {
			w.m.Missing = append(w.m.Missing, "its section '"+e.Text+"' is given twice")
		}
		if s.Bad {
			w.m.Missing = append(w.m.Missing, "its section '"+e.Text+"' has an error")
		}
		return s, at
	}
	s := &Section{Name: w.m.Name, Place: r.place(r.stmt.Line)}
	if s.Name == "" {
		s.Name = "section"
	}
	if readSection(r, func(d declared) *reader { return w.reader(d.decl, d.stmt) }, d, s) {
		return s, at
	}
	return nil, at
}

// wrongName reports a name that is unknown or stands for something else.
func (w *memberReader) wrongName(r *reader, e *lang.Expr, n *Named, what string, kind NameKind) {
	if n != nil && (n.Bad || n.Kind == kind) {
		r.problem(*lang.Silent)
		return
	}
	if n != nil {
		r.problem(lang.Problem{Rule: "wrong-kind", Span: e.Span, Message: fmt.Sprintf("'%s' is %s, not a %s", e.Text, n.Kind, what),
			Related: []lang.Related{{Place: n.Place, Message: "given here"}}})
		return
	}
	r.problem(*w.env.unknownName(e, what, []NameKind{kind}))
}

// material reads a material of the member or of one of its lifts, and where it is
// named; nil for one with an error.
func (w *memberReader) material(r *reader) (*Material, lang.Place) {
	at := r.place(r.stmt.Line)
	e := r.peek()
	if e != nil && e.Kind == lang.StringExpr {
		m := &Material{Name: e.Text, Place: r.place(e.Span)}
		if readGrade(r, m) {
			return m, at
		}
		return nil, at
	}
	if e == nil || e.Kind != lang.NameExpr {
		r.fail("wrong-form", r.after(), "a material is a name or a grade in quotes: material = s355, or material = \"S355\"")
		return nil, at
	}
	n, ok := w.env.Names[e.Text]
	if p, found := r.inQuotes("a steel grade", isGrade); found && !ok {
		r.problem(p)
		return nil, at
	}
	r.take()
	at = r.place(e.Span)
	if !ok || n.Kind != MaterialName || n.Index < 0 {
		w.wrongName(r, e, n, "material", MaterialName)
		return nil, at
	}
	w.m.Uses = append(w.m.Uses, n)
	m := w.env.Materials[n.Index]
	if n.Twice {
		w.m.Missing = append(w.m.Missing, "its material '"+e.Text+"' is given twice")
	}
	if m.Bad {
		w.m.Missing = append(w.m.Missing, "its material '"+e.Text+"' has an error")
	}
	return m, at
}
