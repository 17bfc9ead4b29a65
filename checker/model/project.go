package model

import (
	"fmt"
	"regexp"
	"time"

	"kern/lang"
)

// Project is what the cover of a printed sheet says of a calculation. Everything
// may be left out; nothing is computed from it.
type Project struct {
	Stated                                              bool
	Place                                               lang.Place
	Name, Number, PreparedBy, CheckedBy, Revision, Date string // Date is year-month-day
}

var projectWords = []string{"name", "number", "prepared", "checked", "revision", "date"}

// project reads what the cover says. A slip in it takes nothing from the members:
// no result depends on it.
func (b *builder) project() {
	env := b.env
	for i, d := range b.of("project") {
		r := b.reader(d)
		if i > 0 {
			r.problem(lang.Problem{Rule: "value-given-twice", Span: d.stmt.Head, Message: "a calculation says once which project it belongs to",
				Related: []lang.Related{{Place: env.Project.Place, Message: "said here first"}}})
			continue
		}
		env.Project.Stated, env.Project.Place = true, r.place(d.stmt.Head)
		if e := r.peek(); e != nil && e.Kind == lang.StringExpr {
			r.fail("wrong-form", e.Span, "the project's name stands inside the block: project { name \"%s\" }", clip(e.Text))
		}
		r.end()
		if d.stmt.Body == nil {
			r.fail("wrong-form", d.stmt.Line, "project opens a block: project { name \"…\" }")
			continue
		}
		seen := map[string]*lang.Stmt{}
		for _, s := range d.stmt.Body.Stmts {
			r := b.reader(declared{d.decl, s})
			if first := seen[s.Word]; first != nil {
				twice(r, first)
			} else if !s.Broken {
				seen[s.Word] = s
				b.projectStmt(r)
			}
		}
	}
}

func (b *builder) projectStmt(r *reader) {
	p, s := &b.env.Project, r.stmt
	if s.Word == "" {
		return
	}
	if value, assigned := s.Assigned(); assigned && contains(projectWords, s.Word) {
		problem := lang.Problem{Rule: "wrong-form", Span: s.Args[0].Span, Message: "'" + s.Word + "' takes no sign ="}
		if len(value) > 0 && s.Word != "prepared" && s.Word != "checked" {
			problem.Fixes = []lang.Fix{lang.Replace("Remove the sign", true, lang.Span{Start: s.Args[0].Span.Start, End: value[0].Span.Start}, "")}
		}
		r.problem(problem)
		return
	}
	by := func() bool {
		_, ok := r.wordOf("who "+s.Word+" it", "by")
		return ok
	}
	switch s.Word {
	case "name":
		p.Name, _ = r.text("the project's name")
	case "number":
		p.Number, _ = r.text("the project's number")
	case "prepared":
		if by() {
			p.PreparedBy, _ = r.text("who prepared it")
		}
	case "checked":
		if by() {
			p.CheckedBy, _ = r.text("who checked it")
		}
	case "revision":
		p.Revision, _ = r.text("the revision")
	case "date":
		p.Date = r.date()
	default:
		problem := lang.Problem{Rule: "unknown-statement", Span: s.Head, Message: "'" + s.Word + "' is nothing that a project says"}
		near, sure := nearest(s.Word, projectWords, 1)
		if len(near) > 0 {
			problem.Message += "; did you mean " + near[0] + "?"
			problem.Fixes = []lang.Fix{lang.Replace("Write "+near[0], sure, s.Head, near[0])}
		} else {
			problem.Notes = []string{"a project says " + lang.OrList([]string{"name", "number", "prepared by", "checked by", "revision", "date"})}
		}
		r.problem(problem)
		return
	}
	r.end()
}

// pointed is a date with the day first and points, as it is written in much of
// Europe; with strokes nobody can tell the day from the month.
var pointed = regexp.MustCompile(`^(\d{1,2})\. ?(\d{1,2})\. ?(\d{4})$`)

// date takes a date in the order that cannot be misread, ISO 8601.
func (r *reader) date() string {
	e := r.peek()
	text, ok := r.text("the date")
	if !ok {
		return ""
	}
	if _, err := time.Parse(time.DateOnly, text); err == nil {
		return text
	}
	problem := lang.Problem{Rule: "impossible-value", Span: e.Span, Message: fmt.Sprintf("'%s' is no date: a date is written year-month-day, \"2026-03-31\"", clip(text))}
	if m := pointed.FindStringSubmatch(text); m != nil {
		if day, err := time.Parse("2.1.2006", m[1]+"."+m[2]+"."+m[3]); err == nil {
			due := day.Format(time.DateOnly)
			problem.Fixes = []lang.Fix{lang.Replace("Write "+due, false, e.Span, `"`+due+`"`)}
		}
	}
	r.problem(problem)
	return ""
}
