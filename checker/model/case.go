package model

import (
	"fmt"

	"kern/checker/action"
	"kern/lang"
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
		kind, ok := r.wordOf("the kind of action", "permanent", "imposed", "snow", "wind", "temperature")
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
		r.end()
		c.Bad = r.failed
		if env.Basis.Actions != "" && !c.Bad && c.Kind != action.Permanent {
			if _, ok := c.Psi0(); !ok {
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
	action.Imposed:   `"A" homes, "B" offices, "C1" to "C5" congregation, "D1", "D2" shops, "E1", "E2" storage, "F", "G" vehicles, "H" roofs (EN 1990 Table A1.1)`,
	action.Snow:      `"below 1000 m" or "above 1000 m" (height above sea level, EN 1990 Table A1.1)`,
	action.Wind:      "it has none", action.Temperature: "it has none",
}

// category reads a category of EN 1990 Table A1.1, with the subdivisions of EN
// 1991-1-1 Tables 6.1 and 6.3.
func category(kind action.Kind, text string) (string, bool) {
	switch kind {
	case action.Imposed:
		switch text {
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
