package model

import (
	"math"
	"slices"
	"strings"

	"kern/checker/section"
	"kern/lang"
)

// Lift is a part of a member's height with a section and a material of its own.
type Lift struct {
	Low, High string  // its ends as the text says them: "ground", "first"
	From, To  float64 // heights above the base, m
	Section   *Section
	Material  *Material
	Place     lang.Place // of the line; nothing for the rest of the member
}

// Name is what a lift is called: "ground to first".
func (l *Lift) Name() string { return l.Low + " to " + l.High }

// liftWords are the words that may begin a statement in a lift's block.
var liftWords = []string{"section", "material"}

// lift reads
//
//	lift PLACE to PLACE { section = …; material = … }
func (w *memberReader) lift(r *reader, d declared) {
	l := Lift{Place: r.place(r.stmt.Line)}
	low := r.peek()
	var ok bool
	if low == nil || low.Is("to") && w.env.Names["to"] == nil {
		r.fail("missing-value", r.after(), "a lift says where it begins and ends: lift ground to first { section = \"HEB 200\" }")
		return
	}
	if l.From, _, ok = w.place(r, "the lower end of the lift"); !ok {
		return
	}
	if e := r.peek(); e != nil && !e.Is("to") {
		r.problem(lang.Problem{Rule: "wrong-form", Span: e.Span, Message: "the upper end of a lift stands behind the word 'to'",
			Fixes: []lang.Fix{lang.Replace("Add 'to'", false, lang.Span{Start: e.Span.Start, End: e.Span.Start}, "to ")}})
		return
	}
	if _, ok = r.wordOf("the upper end of the lift", "to"); !ok {
		return
	}
	high := r.peek()
	var span lang.Span
	if l.To, span, ok = w.place(r, "the upper end of the lift"); !ok || !r.end() {
		return
	}
	text := func(e *lang.Expr) string { return strings.Join(strings.Fields(e.Span.Of(r.decl.Text)), " ") }
	l.Low, l.High = text(low), text(high)
	if d.stmt.Body == nil {
		end := r.stmt.Line.End
		r.problem(lang.Problem{Rule: "wrong-form", Span: r.stmt.Line, Message: "a lift opens a block that says its section, its material or both: { section = \"HEB 200\" }",
			Fixes: []lang.Fix{lang.Replace("Add a block", false, lang.Span{Start: end, End: end}, " { section = \"HEB 200\" }")}})
		return
	}
	w.liftBlock(r, d, &l)
	if r.failed || math.IsNaN(w.m.Height) {
		return
	}
	if l.To-l.From < minLift*w.m.Height {
		p := lang.Problem{Rule: "impossible-value", Span: span, Message: "the lift ends below where it begins"}
		if l.To >= l.From {
			p.Message = "the lift has no height: it ends where it begins"
		} else {
			p.Fixes = append(p.Fixes, lang.Fix{Title: "Exchange the ends", Edits: []lang.Edit{{Place: lang.Place{Span: low.Span}, New: text(high)}, {Place: lang.Place{Span: high.Span}, New: text(low)}}})
		}
		r.problem(p)
		return
	}
	for _, o := range w.m.Lifts {
		if from, to := max(l.From, o.From), min(l.To, o.To); to-from > 1e-9*w.m.Height {
			r.problem(lang.Problem{Rule: "lifts-overlap", Span: low.Span.Join(high.Span),
				Message: "the lift overlaps another from " + w.env.Basis.Show.Place(from) + " to " + w.env.Basis.Show.Place(to) + ": a part of the member has one section",
				Related: []lang.Related{{Place: o.Place, Message: "the other lift"}}})
			return
		}
	}
	w.m.Lifts = append(w.m.Lifts, l)
}

// minLift is the least height of a lift as a part of the member's; a shorter one
// costs the analysis its digits.
const minLift = 1e-4

// liftBlock reads what a lift is made of.
func (w *memberReader) liftBlock(r *reader, d declared, l *Lift) {
	seen := map[string]*lang.Stmt{}
	if len(d.stmt.Body.Stmts) == 0 {
		r.fail("missing-value", d.stmt.Body.Span, "the lift says neither its section nor its material")
		return
	}
	for _, s := range d.stmt.Body.Stmts {
		in := w.reader(d.decl, s)
		switch first := seen[s.Word]; {
		case s.Broken:
			in.failed = true
		case first != nil:
			twice(in, first)
		default:
			seen[s.Word] = s
			w.liftLine(in, declared{d.decl, s}, l)
		}
		if in.failed {
			r.failed, r.silent = true, r.silent || in.silent
		}
	}
}

func (w *memberReader) liftLine(r *reader, d declared, l *Lift) {
	value, assigned := r.stmt.Assigned()
	switch word := r.stmt.Word; {
	case !contains(liftWords, word):
		p := lang.Problem{Rule: "unknown-statement", Span: r.stmt.Head, Message: "'" + word + "' is nothing that a lift says"}
		near, sure := nearest(word, liftWords, 1)
		switch {
		case contains(memberWords, word):
			p.Message += ": it is said of the whole member, outside of the braces of the lift"
		case len(near) > 0:
			p.Message += "; did you mean " + near[0] + "?"
			p.Fixes = append(p.Fixes, lang.Replace("Write "+near[0], sure, r.stmt.Head, near[0]))
		default:
			p.Notes = append(p.Notes, "a lift says "+lang.OrList(liftWords))
		}
		r.problem(p)
	case !assigned:
		noSign(r)
	case word == "section":
		r.args = value
		l.Section, _ = w.section(r, d)
		r.end()
	default:
		r.args = value
		l.Material, _ = w.material(r)
		if d.stmt.Body != nil && !r.failed {
			r.fail("left-over", d.stmt.Body.Span, "'%s' takes no block", word)
		}
		r.end()
	}
}

// lifts orders the lifts and fills the gaps between them with what the member
// itself says. What the member says neither itself nor in a lift is missing.
func (w *memberReader) lifts(missing func(fix, what string)) {
	m := w.m
	if len(m.Lifts) == 0 || math.IsNaN(m.Height) {
		return
	}
	slices.SortStableFunc(m.Lifts, func(a, b Lift) int {
		if a.From < b.From {
			return -1
		}
		return 1
	})
	var all []Lift
	from := 0.0
	gap := func(to float64) {
		if to-from > minLift*m.Height {
			all = append(all, Lift{Low: w.env.PlaceName(m, from), High: w.env.PlaceName(m, to), From: from, To: to})
		} else if len(all) > 0 {
			all[len(all)-1].To = to
		}
	}
	for _, l := range m.Lifts {
		gap(l.From)
		if l.From-from <= minLift*m.Height {
			l.From = from
		}
		all = append(all, l)
		from = l.To
	}
	gap(m.Height)
	all[len(all)-1].To = m.Height
	lacks := func(what string, own bool, has func(l *Lift) bool) {
		if own {
			return
		}
		for i := range all {
			if !has(&all[i]) {
				missing("", what+" in its lift from "+all[i].Name())
				return
			}
		}
	}
	lacks("section", m.Section != nil, func(l *Lift) bool { return l.Section != nil })
	lacks("material", m.Material != nil, func(l *Lift) bool { return l.Material != nil })
	section, material := false, false // what the member says for itself counts somewhere
	for i := range all {
		if all[i].Section == nil {
			all[i].Section, section = m.Section, true
		}
		if all[i].Material == nil {
			all[i].Material, material = m.Material, true
		}
	}
	w.idle("section", m.SectionAt, section || m.Section == nil)
	w.idle("material", m.MaterialAt, material || m.Material == nil)
	m.Lifts = all
	if m.Section == nil {
		m.Section = all[0].Section
	}
	if m.Material == nil {
		m.Material = all[0].Material
	}
}

// idle warns of a section or material that the member says for itself and that no
// part of it has, as its lifts say their own. One that is taken over from another
// member is right where it stands.
func (w *memberReader) idle(what string, at lang.Place, used bool) {
	if m := w.m; !used && at.Decl == m.Decl && len(m.Missing) == 0 {
		m.Problems = append(m.Problems, lang.Diagnostic{Decl: at.Decl, Problem: lang.Problem{Rule: "unused-definition", Severity: lang.Warning, Span: at.Span, Unused: true,
			Message: "no part of the " + m.Kind.String() + " has this " + what + ": its lifts say their own over the whole height"}})
	}
}

// PlaceName names a height on a member: the level that lies there, its top or
// base, else metres above its base.
func (env *Env) PlaceName(m *Member, z float64) string {
	if m.Levels {
		for _, l := range env.Levels {
			if math.Abs(l.At-m.From-z) <= 1e-6*m.Height {
				return l.Name
			}
		}
	}
	switch {
	case z <= 1e-6*m.Height:
		return "base"
	case z >= m.Height*(1-1e-6):
		return "top"
	}
	return env.Basis.Show.Place(z)
}

// Parts are the lifts of a member, or the one part that a member of one section
// is.
func (m *Member) Parts() []Lift {
	if len(m.Lifts) > 0 {
		return m.Lifts
	}
	return []Lift{{From: 0, To: m.Height, Section: m.Section, Material: m.Material}}
}

// Same tells whether two sections are one and the same.
func (s *Section) Same(o *Section) bool {
	switch {
	case s == o:
		return true
	case s.Designation != "" || s.Shape.Kind != section.Given:
		return s.Designation == o.Designation && s.Shape == o.Shape && s.Class == o.Class && s.CurveMajor == o.CurveMajor && s.CurveMinor == o.CurveMinor
	}
	return false
}

// Same tells whether two materials are one and the same.
func (m *Material) Same(o *Material) bool {
	return m == o || m.Grade != nil && o.Grade != nil && m.Grade.Name == o.Grade.Name && m.Grade.Standard == o.Grade.Standard
}
