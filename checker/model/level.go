package model

import (
	"kern/lang"
	"kern/lang/unit"
)

// levels reads the levels of the building.
func (b *builder) levels() {
	env := b.env
	for _, d := range b.of("level") {
		r := b.reader(d)
		name := r.name("a level")
		if name == nil {
			continue
		}
		n := env.Names[name.Text]
		if n == nil || n.Stmt != d.stmt {
			continue // given twice, or a word that the language has taken
		}
		l := &Level{Name: name.Text, Place: r.place(name.Span)}
		if _, ok := r.wordOf("the height of the level", "at"); ok {
			l.At, _, _ = r.quantity(want{what: "the height of a level", dim: unit.Length, unit: "m", max: 1000, signed: true, zero: true})
		}
		r.end()
		l.Bad = r.failed || hurt(d.decl, d.stmt)
		n.Index = len(env.Levels)
		env.Levels = append(env.Levels, l)
		if d.stmt.Body == nil {
			continue
		}
		seen := map[string]*lang.Stmt{}
		for _, s := range d.stmt.Body.Stmts {
			r := b.reader(declared{d.decl, s})
			c, known := env.Names[s.Word]
			if s.Broken {
				l.Bad = true
				continue
			}
			if !known || c.Kind != CaseName || c.Index < 0 {
				e := &lang.Expr{Kind: lang.NameExpr, Text: s.Word, Span: s.Head}
				r.problem(*env.unknownName(e, "load case", []NameKind{CaseName}))
				l.Bad = true
				continue
			}
			if first := seen[s.Word]; first != nil {
				twice(r, first)
				l.Bad = true
				continue
			}
			seen[s.Word] = s
			v, _, ok := r.quantity(want{what: "a load on a floor", dim: unit.Stress, unit: "kN/m2", max: 1e7, min: 0.1, signed: true, zero: true})
			if ok && r.end() {
				l.Pressures = append(l.Pressures, Pressure{Case: c.Index, Value: v, Place: r.place(s.Line)})
			} else {
				l.Bad = true
			}
		}
	}
}
