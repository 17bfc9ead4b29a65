package model

import (
	"math"
	"strings"

	"kern/checker/action"
	"kern/lang"
	"kern/lang/unit"
)

func (w *memberReader) height(r *reader) (float64, lang.Span, bool) {
	return r.quantity(want{what: "the " + r.stmt.Word, dim: unit.Length, unit: "m", min: 0.05, max: 200})
}

// level gives the height above datum of a level or of an expression.
func (w *memberReader) fromTo(r *reader) {
	w.m.HeightAt = r.place(r.stmt.Line)
	place := want{what: "a level or height", dim: unit.Length, unit: "m", max: 2000, signed: true, zero: true}
	from, _, ok := r.quantity(place)
	if !ok {
		return
	}
	if _, ok := r.wordOf("the upper end", "to"); !ok {
		return
	}
	to, span, ok := r.quantity(place)
	if !ok {
		return
	}
	if h := to - from; h < 0.05 || h > 200 {
		r.fail("impossible-value", span, "from %s to %s is no height of a member", w.env.Basis.Show.Place(from), w.env.Basis.Show.Place(to))
		return
	}
	w.m.From, w.m.Height, w.m.Levels = from, to-from, true
}

func (w *memberReader) axis(r *reader) (Axis, bool) {
	word, ok := r.wordOf("the axis", "major", "minor")
	return map[string]Axis{"major": Major, "minor": Minor}[word], ok
}

// end reads
//
//	base pinned|fixed|free|guided [about AXIS]
//	base spring STIFFNESS [about AXIS]
func (w *memberReader) end(r *reader) {
	word, ok := r.wordOf("the end condition", "pinned", "fixed", "free", "guided", "spring")
	if !ok {
		return
	}
	end := action.EndNames[word]
	axes := []Axis{Major, Minor}
	key := r.stmt.Word
	var spring Spring
	if word == "spring" {
		if spring, ok = r.spring(); !ok {
			return
		}
		if key += " spring"; spring.Lateral > 0 {
			key += " against moving sideways"
		} else {
			key += " against turning"
		}
	}
	if _, about := r.word("about"); about {
		a, ok := w.axis(r)
		if !ok {
			return
		}
		axes = []Axis{a}
	}
	for _, a := range axes {
		k := key + " about " + a.String()
		if first, again := w.first[k]; again {
			r.problem(lang.Problem{Rule: "value-given-twice", Span: r.stmt.Line, Message: "the end condition " + k + " is given twice",
				Related: []lang.Related{{Place: lang.Place{Decl: first.decl, Span: first.stmt.Line}, Message: "given here first"}}})
			return
		}
		w.first[k] = declared{r.decl, r.stmt}
		ends, springs := &w.m.Base, &w.m.BaseSpring
		if r.stmt.Word == "top" {
			ends, springs = &w.m.Top, &w.m.TopSpring
		}
		if word != "spring" {
			ends[a] = end
			continue
		}
		springs[a].Lateral += spring.Lateral
		springs[a].Turning += spring.Turning
	}
}

// lateral and turning are what a stiffness can be.
var (
	lateral = want{what: "the stiffness of a hold", dim: unit.ForcePerLength, unit: "kN/m", min: 1e-3, max: 1e13}
	turning = want{what: "the stiffness of an end against turning", dim: unit.RotationalStiffness, unit: "kNm/rad", min: 1e-3, max: 1e13}
)

// spring takes the stiffness of an end: its dimension tells what it is against.
func (r *reader) spring() (Spring, bool) {
	e := r.peek()
	if e == nil {
		r.problem(lang.Problem{Rule: "missing-value", Span: r.stmt.Line, Message: "the spring has no stiffness: " + r.stmt.Word + " spring 4000 kNm/rad against turning, " + r.stmt.Word + " spring 900 kN/m against moving sideways"})
		return Spring{}, false
	}
	if q, p := lang.Eval(e, r.names); p == nil && q.Dim == unit.ForcePerLength {
		sideways := lateral
		sideways.what = "the stiffness of an end against moving sideways"
		v, _, ok := r.quantity(sideways)
		return Spring{Lateral: v}, ok
	} else if p == nil && q.Dim == unit.Moment {
		r.take()
		problem := lang.Problem{Rule: "wrong-unit", Span: e.Span, Message: "the stiffness of an end against turning needs a unit of rotational stiffness, such as kNm/rad; this is a moment"}
		if e.Kind == lang.QuantExpr {
			problem.Fixes = append(problem.Fixes, lang.Replace("Write "+e.Text+"/rad", false, e.UnitSpan(), e.Text+"/rad"))
		}
		r.problem(problem)
		return Spring{}, false
	}
	v, _, ok := r.quantity(turning)
	return Spring{Turning: v}, ok
}

// settleEnds puts end conditions and springs together: an end of which only
// springs are said moves where a spring against moving sideways lets it, else it
// is held in place. A spring beside something rigid would say nothing.
func (w *memberReader) settleEnds() {
	for _, e := range []struct {
		word    string
		ends    *[2]action.End
		springs *[2]Spring
	}{{"base", &w.m.Base, &w.m.BaseSpring}, {"top", &w.m.Top, &w.m.TopSpring}} {
		for a, s := range e.springs {
			about := " about " + Axis(a).String()
			condition, said := w.first[e.word+about]
			if !said && s.Lateral > 0 {
				e.ends[a] = action.Free
			}
			end, rigid := e.ends[a], ""
			against := "moving sideways"
			switch {
			case said && s.Lateral > 0 && end.Held():
				rigid = "held in place"
			case s.Turning > 0 && (end == action.Fixed || end == action.Guided):
				rigid, against = "held against turning", "turning"
			}
			if rigid == "" {
				continue
			}
			at := w.first[e.word+" spring against "+against+about]
			r := w.reader(at.decl, at.stmt)
			r.problem(lang.Problem{Rule: "value-given-twice", Span: at.stmt.Line, Message: "the " + e.word + " is " + end.String() + about + ", so it is " + rigid + " already, and a spring against " + against + " has nothing to do",
				Related: []lang.Related{{Place: lang.Place{Decl: condition.decl, Span: condition.stmt.Line}, Message: "held here"}}})
			w.m.Missing = append(w.m.Missing, "a line in its block has an error")
			return
		}
	}
}

// critical reads what critical loads are found by.
func (r *reader) critical() bool {
	word, ok := r.wordOf("what critical loads are found by", "exact", "effective")
	if ok && word == "effective" {
		r.wordOf("the word 'lengths'", "lengths")
	}
	return word == "exact"
}

// placeOf names the height at which something stands.
func placeOf(what string) string {
	if strings.HasPrefix(what, "a ") {
		return "the place of " + what
	}
	return what
}

// place reads a height on the member: "top", "base", a level, a height above
// the base. A level counts from datum, everything else from the base.
func (w *memberReader) place(r *reader, what string) (float64, lang.Span, bool) {
	if e := r.peek(); e != nil && e.Kind == lang.NameExpr {
		if (e.Is("top") || e.Is("base")) && w.env.Names[e.Text] == nil {
			r.take()
			if math.IsNaN(w.m.Height) {
				return 0, e.Span, true // reported where the height is missing
			}
			return map[bool]float64{true: w.m.Height}[e.Is("top")], e.Span, true
		}
	}
	e := r.peek()
	if e != nil && e.Kind == lang.NameExpr && w.env.Names[e.Text] == nil {
		if _, constant := lang.Constants[e.Text]; !constant && e.Text != "height" && e.Text != "length" {
			r.problem(*w.env.unknownName(e, "level or place", []NameKind{ValueName, LevelName}, "top", "base"))
			return 0, e.Span, false
		}
	}
	v, span, ok := r.quantity(want{what: placeOf(what), dim: unit.Length, unit: "m", max: 2000, signed: true, zero: true})
	if !ok {
		return 0, span, false
	}
	fromDatum := false
	e.Walk(func(x *lang.Expr) {
		if n := w.env.Names[x.Text]; x.Kind == lang.NameExpr && n != nil && n.Kind == LevelName {
			fromDatum = true
		}
	})
	if fromDatum {
		if d, ok := w.first["height"]; !ok || d.stmt.Word != "from" {
			r.fail("level-without-levels", span, "a level can be named only in a member that stands between levels: from … to …")
			return 0, span, false
		}
		v -= w.m.From
	}
	if math.IsNaN(w.m.Height) {
		return v, span, true
	}
	if h := w.m.Height; v < -1e-9*h || v > h*(1+1e-9) {
		r.fail("outside-the-member", span, "%s at %s lies outside the member, which is %s high", what, w.env.Basis.Show.Place(v), w.env.Basis.Show.Place(h))
		return 0, span, false
	}
	return min(max(v, 0), w.m.Height), span, true
}

func (w *memberReader) hold(r *reader) {
	word, ok := r.wordOf("what the hold restrains", "major", "minor", "both", "twist")
	if !ok {
		return
	}
	if _, ok := r.wordOf("the place of the hold", "at"); !ok {
		return
	}
	at, span, ok := w.place(r, "a hold")
	if !ok || math.IsNaN(w.m.Height) {
		return
	}
	if at < 1e-6*w.m.Height || at > w.m.Height*(1-1e-6) {
		r.fail("outside-the-member", span, "a hold stands between the ends; what holds an end is said by base and top (top spring 900 kN/m)")
		return
	}
	stiffness := 0.0
	if _, sprung := r.word("stiffness"); sprung {
		if word == "twist" {
			r.fail("wrong-form", r.after(), "a hold against twist is rigid: its stiffness cannot be said here")
			return
		}
		if stiffness, _, ok = r.quantity(lateral); !ok {
			return
		}
	}
	for _, h := range w.m.Holds {
		if math.Abs(h.At-at) < 1e-6*w.m.Height && (h.Major && word != "minor" && word != "twist" || h.Minor && word != "major" && word != "twist" || h.Twist && word == "twist") {
			r.problem(lang.Problem{Rule: "value-given-twice", Span: r.stmt.Line, Message: "the member is held here already",
				Related: []lang.Related{{Place: h.Place, Message: "by this hold"}}})
			return
		}
	}
	w.m.Holds = append(w.m.Holds, Hold{At: at, Major: word == "major" || word == "both", Minor: word == "minor" || word == "both", Twist: word == "twist",
		Stiffness: stiffness, Place: r.place(r.stmt.Line)})
}

func (w *memberReader) effective(r *reader) {
	k, span, ok := r.quantity(want{what: "an effective length factor", min: 0.1, max: 10})
	if !ok {
		return
	}
	axes := []int{0, 1}
	if _, about := r.word("about"); about {
		word, ok := r.wordOf("the axis", "major", "minor", "twist")
		if !ok {
			return
		}
		axes = []int{map[string]int{"major": 0, "minor": 1, "twist": 2}[word]}
	}
	for _, a := range axes {
		if w.m.Factor[a] != 0 {
			r.fail("value-given-twice", span, "the effective length factor about this axis is given twice")
			return
		}
		w.m.Factor[a] = k
	}
}
