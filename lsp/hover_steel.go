package lsp

import (
	"math"

	"kern/checker/catalogue"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/output"
	"kern/lang/unit"
)

// material writes about a material: the strengths of its grade by thickness, or
// the values that are stated.
func (h *hovering) material(m *model.Material) {
	if m.Grade != nil {
		h.grade(*m.Grade)
		return
	}
	h.page.Text(output.Strong(m.Name), output.Words(": a material with stated values"))
	var rows [][]output.Line
	for _, v := range []struct {
		name  string
		value float64
		dim   unit.Dim
	}{{"Young's modulus E", m.E, unit.Stress}, {"shear modulus G", m.G, unit.Stress}, {"yield strength fy", m.Fy, unit.Stress}, {"ultimate strength fu", m.Fu, unit.Stress}, {"density", m.Density, unit.Density}} {
		rows = append(rows, []output.Line{output.Words(v.name), output.Words(display(h.units(), v.value, v.dim))})
	}
	h.page.Table([]string{"", ""}, "lr", rows)
	for _, a := range m.Assumed {
		h.page.Text(output.Words("assumed: " + a))
	}
}

// grade writes the strengths of a grade by thickness, with their source.
func (h *hovering) grade(g catalogue.Grade) {
	units := h.units()
	h.page.Text(output.Strong(g.Name), output.Words(", "+g.Standard+": E = "+display(units, g.E, unit.Stress)+", G = "+display(units, g.G, unit.Stress)+", density "+display(units, g.Density, unit.Density)))
	if g.American() {
		h.page.Text(output.Words("Strengths by " + g.Standard + ":"))
		h.page.Table([]string{"product", "thickness", "fy", "fu"}, "llrr", formRows(units, g))
		h.page.Text(output.Words("The strengths of " + g.Standard + " were set down from memory: compare them with the standard."))
		return
	}
	table31 := h.calc != nil && h.calc.Env.Basis.TableFy
	product, eurocode := strengthRows(units, g, false), strengthRows(units, g, true)
	first, second := product, eurocode
	name, other := "by "+g.Standard, "by EN 1993-1-1 Table 3.1"
	if table31 {
		first, second, name, other = eurocode, product, other, name
	}
	h.page.Text(output.Words("Strengths " + name + ", which this calculation uses:"))
	h.strengths(first)
	if len(second) > 0 {
		h.page.Text(output.Words("Strengths " + other + ":"))
		h.strengths(second)
	}
	if g.Recalled {
		h.page.Text(output.Words("The strengths of " + g.Standard + " were set down from memory: compare them with the standard."))
	}
	if g.Eurocode != "" && g.Eurocode != "EN 1993-1-1" {
		h.page.Text(output.Words("In the scope of " + g.Eurocode + "."))
	}
}

func (h *hovering) strengths(rows [][]output.Line) {
	if len(rows) == 0 {
		h.page.Text(output.Words("none are given"))
		return
	}
	h.page.Table([]string{"thickness", "fy", "fu"}, "lrr", rows)
}

// formRows are the strengths of an American grade by form and thickness.
func formRows(units derivation.Units, g catalogue.Grade) [][]output.Line {
	var out [][]output.Line
	for _, f := range g.Forms() {
		out = append(out, []output.Line{output.Words(f.Form.String()), output.Words(f.Row), output.Words(display(units, f.Fy, unit.Stress)), output.Words(display(units, f.Fu, unit.Stress))})
	}
	return out
}

// strengthRows are the strengths of a grade by thickness, up to 250 mm: a row
// for each range in which both stay the same.
func strengthRows(units derivation.Units, g catalogue.Grade, table31 bool) [][]output.Line {
	strength := g.Strength
	if table31 {
		strength = g.Table31
	}
	type row struct {
		from, to float64 // mm
		fy, fu   float64
	}
	var rows []row
	const step = 0.5 // mm; the tables change at whole millimetres
	for t := step; t <= 250; t += step {
		fy, fu, _, ok := strength(t / 1000)
		if !ok {
			continue
		}
		if n := len(rows); n > 0 && rows[n-1].to == t-step && rows[n-1].fy == fy && rows[n-1].fu == fu {
			rows[n-1].to = t
			continue
		}
		rows = append(rows, row{t - step, t, fy, fu})
	}
	var out [][]output.Line
	for _, r := range rows {
		size := "up to " + unit.Short(r.to, 4) + " mm"
		switch {
		case r.from > 0 && math.Mod(r.to, 1) != 0: // a range that ends before a whole number
			size = "over " + unit.Short(r.from, 4) + ", below " + unit.Short(math.Ceil(r.to), 4) + " mm"
		case math.Mod(r.to, 1) != 0:
			size = "below " + unit.Short(math.Ceil(r.to), 4) + " mm"
		case math.Mod(r.from, 1) != 0: // one that begins with a whole number
			size = "from " + unit.Short(math.Ceil(r.from), 4) + " to " + unit.Short(r.to, 4) + " mm"
		case r.from > 0:
			size = "over " + unit.Short(r.from, 4) + " to " + unit.Short(r.to, 4) + " mm"
		}
		out = append(out, []output.Line{output.Words(size), output.Words(display(units, r.fy, unit.Stress)), output.Words(display(units, r.fu, unit.Stress))})
	}
	return out
}
