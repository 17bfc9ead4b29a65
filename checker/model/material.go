package model

import (
	"math"

	"kern/checker/catalogue"
	"kern/lang"
	"kern/lang/unit"
)

// materials reads the materials.
func (b *builder) materials() {
	for _, d := range b.of("material") {
		r := b.reader(d)
		name := r.name("a material")
		if name == nil {
			continue
		}
		n := b.env.Names[name.Text]
		if n == nil || n.Stmt != d.stmt {
			continue // given twice, or a word that the language has taken
		}
		m := &Material{Name: name.Text, Place: r.place(name.Span), Bad: hurt(d.decl, d.stmt)}
		n.Index = len(b.env.Materials)
		b.env.Materials = append(b.env.Materials, m)
		if d.stmt.Body != nil {
			r.end()
			m.Bad = m.Bad || r.failed
			b.statedMaterial(d, m)
			continue
		}
		if e := r.take(); e == nil || e.Kind != lang.EqualsExpr {
			r.fail("wrong-form", d.stmt.Line, "a material is a published grade or a block: material %s = \"S355\" per \"EN 10025-2\", or material %s { E = …; fy = … }", name.Text, name.Text)
			m.Bad = true
			continue
		}
		if !readGrade(r, m) || !r.end() {
			m.Bad = true
		}
	}
}

// readGrade reads "S355" per "EN 10025-2".
func readGrade(r *reader, m *Material) bool {
	e := r.peek()
	grade, ok := r.text("the steel grade")
	if !ok {
		return false
	}
	standard := ""
	var at *lang.Expr
	if _, per := r.word("per"); per {
		at = r.peek()
		if standard, ok = r.text("the product standard"); !ok {
			return false
		}
	}
	g, ok := catalogue.FindGrade(grade, standard)
	if n := r.env.Names[e.Text]; !ok && n != nil && n.Kind == MaterialName {
		r.problem(unquoted(e, "a material of the calculation"))
		return false
	}
	if !ok {
		if _, elsewhere := catalogue.FindGrade(grade, ""); elsewhere && standard != "" {
			r.fail("unknown-grade", at.Span, "'%s' has no grade '%s'", standard, grade)
			return false
		}
		p := lang.Problem{Rule: "unknown-grade", Span: e.Span, Message: "'" + grade + "' is no steel grade of the catalogue"}
		near := catalogue.NearestGrades(grade, 3)
		if len(near) > 0 {
			p.Message += "; the nearest are " + lang.OrList(near)
		}
		p.Notes = append(p.Notes, "own values: material NAME { E = 210 GPa; fy = 355 MPa; density = 7850 kg/m3 }")
		for _, n := range near {
			p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, e.Span, `"`+n+`"`))
		}
		r.problem(p)
		return false
	}
	m.grade(g)
	return true
}

// GradedMaterial is a steel grade as a calculation has it that names it.
func GradedMaterial(g catalogue.Grade) *Material {
	m := &Material{Name: g.Name}
	m.grade(g)
	return m
}

func (m *Material) grade(g catalogue.Grade) {
	m.Grade = &g
	m.E, m.G, m.Density = g.E, g.G, g.Density
	m.Nu = 0.3
	m.Fy, m.Fu = unknown, unknown
}

// Ranges outside of which a material value is a slip of the unit, not a
// material: from plastics and wood along the grain to tungsten.
var (
	wantE       = want{what: "Young's modulus", dim: unit.Stress, unit: "GPa", min: 0.5e9, max: 1000e9}
	wantG       = want{what: "the shear modulus", dim: unit.Stress, unit: "GPa", min: 0.05e9, max: 500e9}
	wantFy      = want{what: "the yield strength", dim: unit.Stress, unit: "MPa", min: 1e6, max: 5e9}
	wantFu      = want{what: "the ultimate strength", dim: unit.Stress, unit: "MPa", min: 1e6, max: 5e9}
	wantDensity = want{what: "the density", dim: unit.Density, unit: "kg/m3", min: 50, max: 25000}
)

// statedMaterial reads a material's block.
func (b *builder) statedMaterial(d declared, m *Material) {
	m.E, m.G, m.Fy, m.Fu, m.Density, m.Nu = unknown, unknown, unknown, unknown, unknown, unknown
	set := func(to *float64, w want) func(r *reader) {
		return func(r *reader) {
			if v, _, ok := r.quantity(w); ok {
				*to = v
			}
		}
	}
	ok := b.body("material", d, d.stmt.Body, map[string]func(r *reader){
		"E": set(&m.E, wantE), "G": set(&m.G, wantG), "fy": set(&m.Fy, wantFy), "fu": set(&m.Fu, wantFu),
		"density": set(&m.Density, wantDensity),
		"nu":      set(&m.Nu, want{what: "Poisson's ratio", max: 0.5, zero: true}),
	})
	m.Bad = m.Bad || !ok
	if math.IsNaN(m.E) && ok {
		r := b.reader(d)
		r.fail("missing-value", m.Place.Span, "the material '%s' has no Young's modulus: E = 210 GPa", m.Name)
		m.Bad = true
	}
	if math.IsNaN(m.G) {
		if math.IsNaN(m.Nu) {
			m.Nu = 0.3
			m.Assumed = append(m.Assumed, "nu = 0.3 for '"+m.Name+"'")
		}
		m.G = m.E / (2 * (1 + m.Nu))
	}
}
