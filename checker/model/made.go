package model

import (
	"fmt"

	"kern/lang"
)

func (w *memberReader) section(r *reader, d declared) {
	w.m.SectionAt = r.place(r.stmt.Line)
	e := r.peek()
	if e != nil && e.Kind == lang.NameExpr && (d.stmt.Body == nil || w.env.Names[e.Text] != nil) {
		if contains(shapeWords, e.Text) && w.env.Names[e.Text] == nil {
			r.fail("wrong-form", r.stmt.Line, "a %s has a block with its dimensions: %s", e.Text, shapeForms[e.Text])
			return
		}
		n, ok := w.env.Names[e.Text]
		if p, found := r.inQuotes("a section of the catalogue", inCatalogue); found && !ok {
			r.problem(p)
			return
		}
		r.take()
		w.m.SectionAt = r.place(e.Span)
		if !ok || n.Kind != SectionName || n.Index < 0 {
			w.wrongName(r, e, n, "section", SectionName)
			return
		}
		if d.stmt.Body != nil {
			r.fail("left-over", d.stmt.Body.Span, "a section that is given by its name takes no block")
			return
		}
		w.m.Uses = append(w.m.Uses, n)
		w.m.Section = w.env.Sections[n.Index]
		if n.Twice {
			w.m.Missing = append(w.m.Missing, "its section '"+e.Text+"' is given twice")
		}
		if w.m.Section.Bad {
			w.m.Missing = append(w.m.Missing, "its section '"+e.Text+"' has an error")
		}
		return
	}
	s := &Section{Name: w.m.Name, Place: r.place(r.stmt.Line)}
	if s.Name == "" {
		s.Name = "section"
	}
	if readSection(r, func(d declared) *reader { return w.reader(d.decl, d.stmt) }, d, s) {
		w.m.Section = s
	}
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

func (w *memberReader) material(r *reader) {
	w.m.MaterialAt = r.place(r.stmt.Line)
	e := r.peek()
	if e != nil && e.Kind == lang.StringExpr {
		m := &Material{Name: e.Text, Place: r.place(e.Span)}
		if readGrade(r, m) {
			w.m.Material = m
		}
		return
	}
	if e == nil || e.Kind != lang.NameExpr {
		r.fail("wrong-form", r.after(), "a material is a name or a grade in quotes: material = s355, or material = \"S355\"")
		return
	}
	n, ok := w.env.Names[e.Text]
	if p, found := r.inQuotes("a steel grade", isGrade); found && !ok {
		r.problem(p)
		return
	}
	r.take()
	w.m.MaterialAt = r.place(e.Span)
	if !ok || n.Kind != MaterialName || n.Index < 0 {
		w.wrongName(r, e, n, "material", MaterialName)
		return
	}
	w.m.Uses = append(w.m.Uses, n)
	w.m.Material = w.env.Materials[n.Index]
	if n.Twice {
		w.m.Missing = append(w.m.Missing, "its material '"+e.Text+"' is given twice")
	}
	if w.m.Material.Bad {
		w.m.Missing = append(w.m.Missing, "its material '"+e.Text+"' has an error")
	}
}
