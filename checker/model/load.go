package model

import (
	"fmt"

	"kern/lang"
	"kern/lang/unit"
)

// load reads
//
//	load [CASE] FORCE [at PLACE] [offset LENGTH about AXIS [and LENGTH about AXIS]]
//	load [CASE] FORCE across AXIS at PLACE
//	load [CASE] LINE about AXIS [from PLACE to PLACE]
//	load [CASE] MOMENT about AXIS [at PLACE]
//	load floor AREA at LEVEL [offset …]
func (w *memberReader) load(r *reader) {
	l := Load{Place: r.place(r.stmt.Line), Case: -1}
	if w.m.Height > 0 {
		l.At = w.m.Height
	}
	if e := r.peek(); e.Is("floor") && w.env.Names["floor"] == nil {
		r.take()
		w.floor(r, l)
		return
	}
	if e := r.peek(); e == nil || e.Kind == lang.NameExpr && isJoin(e.Text) && w.env.Names[e.Text] == nil {
		r.fail("missing-value", r.stmt.Line, "the load has no value: load G 80 kN at top")
		return
	}
	if !w.loadCase(r, &l) {
		return
	}
	e := r.take()
	if e == nil {
		r.fail("missing-value", r.stmt.Line, "the load has no value: load G 80 kN at top")
		return
	}
	if e.Kind == lang.QuantExpr && e.Unit.Symbol == "" {
		p := lang.UnknownUnit(e, unit.Force, true) // it may be a force per length or a moment
		if len(p.Fixes) == 0 {
			p = lang.UnknownUnit(e, unit.Force, false)
		}
		r.problem(*p)
		return
	}
	q, p := lang.Eval(e, w.lookup)
	if p != nil {
		r.problem(*p)
		return
	}
	l.Value = q.Value
	switch q.Dim {
	case unit.Force:
		if !r.possible(e, q.Value, want{what: "a load", dim: unit.Force, max: 1e9, signed: true, zero: true}) {
			return
		}
		w.force(r, l)
	case unit.ForcePerLength:
		l.Kind = LineLoad
		l.At, l.To = 0, l.At
		if !r.possible(e, q.Value, want{what: "a line load", dim: unit.ForcePerLength, max: 1e7, signed: true, zero: true}) {
			return
		}
		w.line(r, l)
	case unit.Moment:
		l.Kind = EndMoment
		if !r.possible(e, q.Value, want{what: "a moment", dim: unit.Moment, max: 1e9, signed: true, zero: true}) {
			return
		}
		w.moment(r, l)
	default:
		r.problem(loadMismatch(r, e, q))
	}
}

// loadMismatch says what a load can be.
func loadMismatch(r *reader, e *lang.Expr, q unit.Quantity) lang.Problem {
	w := want{what: "a load", dim: unit.Force, unit: "kN", max: 1e9}
	about := r.peek().Is("about")
	if about || q.Dim == unit.MassPerLength {
		w = want{what: "a load about an axis", dim: unit.ForcePerLength, unit: "kN/m", max: 1e7}
	}
	if q.Dim == unit.MassPerLength {
		w.what = "a line load"
	}
	p := r.mismatch(e, q, w)
	switch {
	case p.Rule == "wrong-unit":
		p.Message = fmt.Sprintf("a load is a force (along or across), a force per length or a moment; this is %s", lang.DimName(q.Dim))
	case p.Rule == "missing-unit" && about && e.Kind == lang.NumberExpr:
		value := unit.Exact(e.Value)
		p.Message = fmt.Sprintf("a load about an axis is a force per length or a moment; this is a bare number, write for instance %s kN/m or %s kNm", value, value)
		end := lang.Span{Start: e.Span.End, End: e.Span.End}
		p.Fixes = []lang.Fix{lang.Replace("Write "+value+" kN/m", false, end, " kN/m"), lang.Replace("Write "+value+" kNm", false, end, " kNm")}
	}
	return p
}

// loadCase reads the case of a load. It may be left out when the calculation
// declares none.
func (w *memberReader) loadCase(r *reader, l *Load) bool {
	e := r.peek()
	if e != nil && e.Kind == lang.StringExpr && w.env.Names[e.Text] != nil && w.env.Names[e.Text].Kind == CaseName {
		r.problem(unquoted(e, "a load case of the calculation"))
		return false
	}
	if e != nil && e.Kind == lang.BinaryExpr && (e.Op == '-' || e.Op == '+') && e.Args[0].Kind == lang.NameExpr {
		if n := w.env.Names[e.Args[0].Text]; n != nil && n.Kind == CaseName {
			at := lang.Span{Start: e.Args[0].Span.End, End: e.Args[1].Span.Start}
			r.problem(lang.Problem{Rule: "misplaced-sign", Span: at, Message: "a sign with blanks on both sides adds or subtracts; the sign of a value stands right before it",
				Fixes: []lang.Fix{lang.Replace("Write "+string(e.Op)+" right before the value", false, at, " "+string(e.Op))}})
			return false
		}
	}
	if e != nil && e.Kind == lang.NameExpr {
		n, ok := w.env.Names[e.Text]
		next := len(r.args) > 1 && startsValue(r.args[1])
		if ok && n.Kind == CaseName || !ok && next || next && ok && n.Kind != ValueName {
			r.take()
			if !ok || n.Kind != CaseName || n.Index < 0 {
				w.wrongName(r, e, n, "load case", CaseName)
				return false
			}
			w.m.Uses = append(w.m.Uses, n)
			l.Case = n.Index
			if w.env.Cases[n.Index].Bad || n.Twice {
				w.m.Missing = append(w.m.Missing, "its load case '"+e.Text+"' has an error")
				r.problem(*lang.Silent)
				return false
			}
			return true
		}
	}
	if w.env.Declared() {
		span := r.after()
		p := lang.Problem{Rule: "load-without-case", Span: span, Message: "the load belongs to no case: load CASE " + clip(span.Of(r.decl.Text))}
		for i, c := range w.env.Cases {
			if c.Place.Decl != nil && i < 4 {
				p.Fixes = append(p.Fixes, lang.Replace("Put it into "+c.Name, false, lang.Span{Start: span.Start, End: span.Start}, c.Name+" "))
			}
		}
		r.problem(p)
		return false
	}
	l.Case = 0
	return true
}

// startsValue tells whether the part could be the value of a load.
func startsValue(e *lang.Expr) bool {
	switch e.Kind {
	case lang.NumberExpr, lang.QuantExpr, lang.UnaryExpr, lang.BinaryExpr, lang.CallExpr, lang.ParenExpr:
		return true
	case lang.NameExpr:
		return !isJoin(e.Text)
	}
	return false
}

func isJoin(word string) bool {
	switch word {
	case "at", "about", "across", "offset", "from", "to", "and":
		return true
	}
	return false
}

// force reads the rest of a load that is a force.
func (w *memberReader) force(r *reader, l Load) {
	if _, ok := r.word("across"); ok {
		var fine bool
		if l.Axis, fine = w.axis(r); !fine {
			return
		}
		l.Kind = PointLoad
		if _, ok := r.wordOf("the place of the load", "at"); !ok {
			return
		}
		if l.At, _, fine = w.place(r, "a load"); fine && r.end() {
			w.m.Loads = append(w.m.Loads, l)
		}
		return
	}
	if _, ok := r.word("at"); ok {
		var fine bool
		if l.At, _, fine = w.place(r, "a load"); !fine {
			return
		}
	}
	if r.peek().Is("about") {
		r.fail("wrong-form", r.after(), "a force bends about an axis by its offset (offset 20 mm about major) or goes across one (across major at 2 m)")
		return
	}
	if w.offset(r, &l) && r.end() {
		w.m.Loads = append(w.m.Loads, l)
	}
}

// offset reads "offset 180 mm about major [and 50 mm about minor]".
func (w *memberReader) offset(r *reader, l *Load) bool {
	if _, ok := r.word("offset"); !ok {
		return true
	}
	for {
		v, _, ok := r.quantity(want{what: "an offset", dim: unit.Length, unit: "mm", max: 10, signed: true, zero: true})
		if !ok {
			return false
		}
		if _, ok := r.wordOf("the axis that the offset bends about", "about"); !ok {
			return false
		}
		a, ok := w.axis(r)
		if !ok {
			return false
		}
		if l.Offset[a] != 0 {
			r.fail("value-given-twice", r.stmt.Line, "the offset about %s is given twice", a)
			return false
		}
		l.Offset[a] = v
		if _, more := r.word("and"); !more {
			return true
		}
	}
}

func (w *memberReader) line(r *reader, l Load) {
	if _, ok := r.wordOf("the axis that a line load bends about", "about"); !ok {
		return
	}
	var ok bool
	if l.Axis, ok = w.axis(r); !ok {
		return
	}
	if _, from := r.word("from"); from {
		if l.At, _, ok = w.place(r, "the lower end of the load"); !ok {
			return
		}
		if _, ok := r.wordOf("the upper end of the load", "to"); !ok {
			return
		}
		var span lang.Span
		if l.To, span, ok = w.place(r, "the upper end of the load"); !ok {
			return
		}
		if l.To <= l.At && w.m.Height > 0 {
			r.fail("impossible-value", span, "the load ends below where it begins")
			return
		}
	}
	if r.end() {
		w.m.Loads = append(w.m.Loads, l)
	}
}

func (w *memberReader) moment(r *reader, l Load) {
	for _, part := range []string{"about", "at"} {
		word, ok := r.word("about", "at")
		if !ok {
			if part == "about" {
				r.wordOf("the axis of the moment", "about")
				return
			}
			break
		}
		if word == "about" {
			if l.Axis, ok = w.axis(r); !ok {
				return
			}
			continue
		}
		if part == "about" {
			r.fail("wrong-form", r.after(), "a moment says its axis first: load Q 5 kNm about major at top")
			return
		}
		if l.At, _, ok = w.place(r, "a moment"); !ok {
			return
		}
	}
	if r.end() {
		w.m.Loads = append(w.m.Loads, l)
	}
}

// floor turns an area of a level into a load for each pressure of the level.
func (w *memberReader) floor(r *reader, l Load) {
	area, _, ok := r.quantity(want{what: "the area of floor that the member carries", dim: unit.Area, unit: "m2", max: 1e5})
	if !ok {
		return
	}
	if _, ok := r.wordOf("the level of the floor", "at"); !ok {
		return
	}
	e := r.peek()
	if e == nil || e.Kind != lang.NameExpr {
		r.fail("wrong-form", r.after(), "a floor lies at a level: load floor 18 m2 at gallery")
		return
	}
	n, known := w.env.Names[e.Text]
	if !known || n.Kind != LevelName || n.Index < 0 {
		r.take()
		w.wrongName(r, e, n, "level", LevelName)
		return
	}
	w.m.Uses = append(w.m.Uses, n)
	level := w.env.Levels[n.Index]
	if level.Bad || n.Twice {
		w.m.Missing = append(w.m.Missing, "its level '"+level.Name+"' has an error")
		r.problem(*lang.Silent)
		return
	}
	if l.At, _, ok = w.place(r, "a floor"); !ok || !w.offset(r, &l) || !r.end() {
		return
	}
	if len(level.Pressures) == 0 {
		r.problem(lang.Problem{Rule: "load-on-nothing", Span: e.Span, Message: "the level '" + level.Name + "' has no loads to carry",
			Related: []lang.Related{{Place: level.Place, Message: "declared here"}}})
		return
	}
	for _, p := range level.Pressures {
		if c := w.env.Cases[p.Case]; c.Bad {
			w.m.Missing = append(w.m.Missing, "its load case '"+c.Name+"' has an error")
			continue
		}
		f := l
		f.Case, f.Value, f.Level, f.Area = p.Case, p.Value*area, level, area
		w.m.Loads = append(w.m.Loads, f)
		if c := w.env.caseNames[p.Case]; c != nil {
			w.m.Uses = append(w.m.Uses, c)
		}
	}
}
