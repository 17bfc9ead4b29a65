package model

import (
	"fmt"
	"slices"

	"kern/checker/action"
	"kern/lang"
	"kern/lang/unit"
)

// cases reads the load cases.
func (b *builder) cases() {
	env := b.env
	for _, d := range b.of("case") {
		r := b.reader(d)
		name := r.name("a load case")
		if name == nil {
			continue
		}
		c := &Case{Place: r.place(name.Span)}
		c.Name = name.Text
		n := env.Names[c.Name]
		if n == nil || n.Stmt != d.stmt {
			continue // given twice, or a word that the language has taken
		}
		n.Index = len(env.Cases)
		env.Cases = append(env.Cases, c)
		kind, ok := r.wordOf("the kind of action", action.KindWords()...)
		if !ok {
			c.Bad = true
			continue
		}
		c.Kind = action.KindNames[kind]
		if e := r.peek(); e != nil && e.Kind == lang.StringExpr {
			r.take()
			c.Given = e.Text
			c.Category, ok = category(c.Kind, e.Text)
			switch {
			case ok:
			case c.Kind == action.Imposed || c.Kind == action.Snow:
				r.fail("unknown-category", e.Span, "'%s' is no category of %s action: %s", e.Text, lang.A(kind), categories[c.Kind])
			default:
				r.problem(lang.Problem{Rule: "unknown-category", Span: e.Span, Message: lang.A(kind) + " action has no category",
					Fixes: []lang.Fix{lang.Replace("Remove it", false, e.Span, "")}})
			}
		}
		r.psi(c)
		r.end()
		c.Bad = r.failed
		if env.Basis.Actions == basicStandard && !c.Bad && (c.Kind == action.Temperature || c.Kind == action.Accident) {
			c.Bad = true
			r.problem(lang.Problem{Rule: "action-not-combined", Span: name.Span, Message: fmt.Sprintf("the case '%s' is a %s action, which is not among the basic combinations of %s: write its combinations out, without an actions standard", c.Name, c.Kind, basicStandard)})
		}
		if env.Basis.Actions == actionsStandard && c.Kind == action.Rain && !c.Bad && c.Stated != [3]bool{true, true, true} {
			c.Bad = true
			r.problem(lang.Problem{Rule: "action-not-combined", Span: name.Span, Message: fmt.Sprintf("%s has no combination values for rain: state psi_0, psi_1 and psi_2 of the case '%s' with the reason", actionsStandard, c.Name)})
		}
		if env.Basis.Actions == actionsStandard && !c.Bad && c.Kind.Variable() {
			if _, ok := env.Basis.Combining.Values.Psi(c.Case); !ok {
				c.Bad = true
				r.problem(lang.Problem{Rule: "missing-category", Span: name.Span, Message: fmt.Sprintf("the case '%s' needs a category for the combinations of %s: %s", c.Name, env.Basis.Actions, categories[c.Kind]),
					Fixes: []lang.Fix{lang.Replace("Add a category", false, lang.Span{Start: d.stmt.Line.End, End: d.stmt.Line.End}, map[action.Kind]string{action.Imposed: ` "B"`, action.Snow: ` "below 1000 m"`}[c.Kind])}})
			}
		}
	}
	if len(env.Cases) == 0 {
		c := &Case{}
		c.Name = "load"
		env.Cases = append(env.Cases, c)
	}
	env.caseNames = make([]*Named, len(env.Cases)+1)
	for i, c := range env.Cases {
		env.caseNames[i] = env.Names[c.Name]
	}
	env.SelfWeight = -1
	for i, c := range env.Cases {
		if c.Kind == action.Permanent && !c.Bad {
			env.SelfWeight = i
			break
		}
	}
	if env.SelfWeight < 0 {
		c := &Case{}
		c.Name = "selfweight"
		env.SelfWeight = len(env.Cases)
		env.Cases = append(env.Cases, c)
	}
}

// Declared tells whether the calculation declares load cases of its own.
func (env *Env) Declared() bool {
	return len(env.Cases) > 0 && env.Cases[0].Place.Decl != nil
}

var categories = map[action.Kind]string{
	action.Permanent: "it has none",
	action.Imposed:   `"A" homes, "B" offices, "C1" to "C5" congregation, "D1", "D2" shops, "E1", "E2" storage, "F", "G" vehicles, "H" roofs (EN 1990 Table A1.1); "assembly" or "garage" for ASCE/SEI 7`,
	action.Snow:      `"below 1000 m" or "above 1000 m" (height above sea level, EN 1990 Table A1.1)`,
	action.RoofLive:  "it has none", action.Rain: "it has none",
	action.Wind: "it has none", action.Temperature: "it has none", action.Accident: "it has none", action.Earthquake: "it has none",
}

// psi reads the psi values that a case states for itself.
func (r *reader) psi(c *Case) {
	words := []string{"psi_0", "psi_1", "psi_2"}
	first := r.peek()
	for {
		at := r.peek()
		w, ok := r.word(words...)
		if !ok {
			if c.Stated != [3]bool{} { // behind a comma
				r.wordOf("the next value", words...)
			}
			return
		}
		i := slices.Index(words, w)
		switch {
		case !c.Kind.Variable():
			r.fail("left-over", at.Span, "%s action has no %s: it is for variable ones", lang.A(c.Kind.String()), w)
			return
		case c.Stated[i]:
			r.fail("value-given-twice", at.Span, "%s is given twice", w)
			return
		}
		if e := r.peek(); e != nil && e.Kind == lang.QuantExpr && slices.Contains(words, e.Text) {
			end := e.UnitSpan().Start
			for end > 0 && r.decl.Text[end-1] == ' ' {
				end--
			}
			r.problem(lang.Problem{Rule: "wrong-form", Span: e.UnitSpan(), Message: "psi values stand with commas between them: psi_0 0.5, psi_1 0.2",
				Fixes: []lang.Fix{lang.Replace("Put a comma between them", false, lang.Span{Start: end, End: end}, ",")}})
			return
		}
		if c.Own[i], _, ok = r.quantity(want{what: w, min: 1e-3, max: 1, zero: true}); !ok {
			return
		}
		c.Stated[i] = true
		if comma := r.peek(); comma == nil || comma.Kind != lang.CommaExpr {
			break
		}
		r.take()
	}
	if p, ok := r.env.Basis.Combining.Values.Psi(c.Case); ok && p[2] > p[1] {
		r.fail("impossible-value", first.Span, "psi_2 = %s is more than psi_1 = %s: what is exceeded for more of the time is less (EN 1990 4.1.3)", unit.Exact(p[2]), unit.Exact(p[1]))
		return
	}
	c.Because, _ = r.because()
}

// category reads a category of EN 1990 Table A1.1, with the subdivisions of EN
// 1991-1-1 Tables 6.1 and 6.3.
func category(kind action.Kind, text string) (string, bool) {
	switch kind {
	case action.Imposed:
		switch text {
		case action.Assembly, action.Garage:
			return text, true
		case "A", "B", "C", "C1", "C2", "C3", "C4", "C5", "D", "D1", "D2", "E", "E1", "E2", "F", "G", "H":
			return text[:1], true
		}
	case action.Snow:
		if text == action.SnowLow || text == action.SnowHigh {
			return text, true
		}
	}
	return "", false
}
