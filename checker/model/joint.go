package model

import (
	"kern/checker/action"
	"kern/checker/section"
	"kern/lang"
	"kern/lang/unit"
)

// joints reads the stiffness ratios of rigid joints: "joints 1.2 at base, 2.0 at
// top about major sway".
func (w *memberReader) joints(r *reader) {
	var j action.Joints
	ratio := want{what: "the stiffness ratio of a joint", min: 0.01, max: 1000}
	var given [2]bool
	for i := range 2 {
		v, span, ok := r.quantity(ratio)
		if !ok {
			return
		}
		if _, ok := r.wordOf("the end of the joint", "at"); !ok {
			return
		}
		end, ok := r.wordOf("the end", "base", "top")
		if !ok {
			return
		}
		at := map[string]int{"base": 0, "top": 1}[end]
		if given[at] {
			r.fail("value-given-twice", span, "the joint at the %s is given twice", end)
			return
		}
		given[at] = true
		*[]*float64{&j.Base, &j.Top}[at] = v
		if i == 0 {
			if c := r.peek(); c == nil || c.Kind != lang.CommaExpr {
				r.fail("wrong-form", r.after(), "the joint at the other end is missing: joints 1.2 at base, 2.0 at top about major sway")
				return
			}
			r.take()
		}
	}
	if _, ok := r.wordOf("the axis", "about"); !ok {
		return
	}
	a, ok := w.axis(r)
	if !ok {
		return
	}
	kind, ok := r.wordOf("whether the joints can move sideways", "sway", "braced")
	if !ok {
		return
	}
	j.Sway = kind == "sway"
	key := "joints about " + a.String()
	if first, again := w.first[key]; again {
		r.problem(lang.Problem{Rule: "value-given-twice", Span: r.stmt.Line, Message: "the " + key + " are given twice",
			Related: []lang.Related{{Place: lang.Place{Decl: first.decl, Span: first.stmt.Line}, Message: "given here first"}}})
		return
	}
	w.first[key] = declared{r.decl, r.stmt}
	w.m.Joints[a] = &j
}

// connected reads the leg by which a single angle is connected: "connected by long
// leg", with "space" for a web member of a box or space truss.
func (w *memberReader) connected(r *reader) {
	if _, ok := r.wordOf("the leg", "by"); !ok {
		return
	}
	leg, ok := r.wordOf("the leg", "long", "short")
	if !ok {
		return
	}
	if _, ok := r.wordOf("what is connected", "leg"); !ok {
		return
	}
	_, space := r.word("space")
	w.m.Leg = Leg{Long: leg == "long", Short: leg == "short", Space: space, Place: r.place(r.stmt.Line)}
}

// connectors reads what connects a pair of angles: "connectors every 600 mm welded".
func (w *memberReader) connectors(r *reader) {
	if _, ok := r.wordOf("the distance of the connectors", "every"); !ok {
		return
	}
	v, _, ok := r.quantity(want{what: "the distance of the connectors", dim: unit.Length, unit: "mm", min: 0.01, max: 50})
	if !ok {
		return
	}
	kind, ok := r.wordOf("how they connect", "welded", "pretensioned", "snug")
	if !ok {
		return
	}
	w.m.Connectors = Connectors{Every: v, Kind: kind, Place: r.place(r.stmt.Line)}
}

// fits looks whether what was said of joints and legs fits the rest of the member.
func (w *memberReader) fits() {
	m := w.m
	problem := func(at lang.Place, p lang.Problem) {
		if len(m.Missing) == 0 {
			p.Span = at.Span
			d, news := lang.Diagnostic{Decl: at.Decl, Problem: p}, true
			if at.Decl != m.Decl {
				d, news = w.takenOver(d)
			}
			if news {
				m.Problems = append(m.Problems, d)
			}
		}
		m.Missing = append(m.Missing, "a line in its block has an error")
	}
	if m.Leg.Stated() && m.Section != nil && m.Section.Shape.Kind != section.Angle {
		problem(m.Leg.Place, lang.Problem{Rule: "wrong-kind", Message: "a single angle is connected by one leg; this member is " + lang.A(m.Section.Shape.Kind.String())})
	}
	if m.Connectors.Every > 0 && m.Section != nil && m.Section.Shape.Kind != section.DoubleAngle {
		problem(m.Connectors.Place, lang.Problem{Rule: "wrong-kind", Message: "connectors connect the angles of a pair; this member is " + lang.A(m.Section.Shape.Kind.String())})
	}
	if m.Leg.Stated() && len(m.Lifts) > 0 {
		problem(m.Leg.Place, lang.Problem{Rule: "wrong-form", Message: "a member that is connected by one leg has one section from end to end, without lifts"})
	}
	for a, j := range m.Joints {
		if j == nil {
			continue
		}
		key := "joints about " + Axis(a).String()
		at := w.first[key]
		place := lang.Place{Decl: at.decl, Span: at.stmt.Line}
		if m.Factor[a] > 0 {
			problem(place, lang.Problem{Rule: "value-given-twice", Message: "the effective length factor about " + Axis(a).String() + " is given by 'effective' too"})
		}
		if len(m.Lifts) > 0 {
			problem(place, lang.Problem{Rule: "wrong-form", Message: "stiffness ratios of joints hold for a column of one section from joint to joint, without lifts"})
		}
		for _, h := range m.Holds {
			if a == 0 && h.Major || a == 1 && h.Minor {
				problem(place, lang.Problem{Rule: "wrong-form", Message: "stiffness ratios of joints hold for a column from joint to joint; this one is held between them about " + Axis(a).String(),
					Related: []lang.Related{{Place: h.Place, Message: "by this hold"}}})
				break
			}
		}
	}
}
