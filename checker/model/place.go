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
		r.fail("impossible-value", span, "from %s m to %s m is no height of a member", unit.Short(from, 4), unit.Short(to, 4))
		return
	}
	w.m.From, w.m.Height, w.m.Levels = from, to-from, true
}

func (w *memberReader) axis(r *reader) (Axis, bool) {
	word, ok := r.wordOf("the axis", "major", "minor")
	return map[string]Axis{"major": Major, "minor": Minor}[word], ok
}

func (w *memberReader) end(r *reader) {
	word, ok := r.wordOf("the end condition", "pinned", "fixed", "free", "guided")
	if !ok {
		return
	}
	end := action.EndNames[word]
	axes := []Axis{Major, Minor}
	key := r.stmt.Word
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
		if key == "base" {
			w.m.Base[a] = end
		} else {
			w.m.Top[a] = end
		}
	}
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
		r.fail("outside-the-member", span, "%s at %s m lies outside the member, which is %s m high", what, unit.Short(v, 4), unit.Short(h, 4))
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
		r.fail("outside-the-member", span, "a hold stands between the ends; what holds an end is said by base and top")
		return
	}
	for _, h := range w.m.Holds {
		if math.Abs(h.At-at) < 1e-6*w.m.Height && (h.Major && word != "minor" && word != "twist" || h.Minor && word != "major" && word != "twist" || h.Twist && word == "twist") {
			r.problem(lang.Problem{Rule: "value-given-twice", Span: r.stmt.Line, Message: "the member is held here already",
				Related: []lang.Related{{Place: h.Place, Message: "by this hold"}}})
			return
		}
	}
	w.m.Holds = append(w.m.Holds, Hold{At: at, Major: word == "major" || word == "both", Minor: word == "minor" || word == "both", Twist: word == "twist", Place: r.place(r.stmt.Line)})
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
