package lsp

import (
	"math"

	"kern/checker/catalogue"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/output"
	"kern/checker/section"
	"kern/lang/unit"
)

// steelDensity is the density that masses of sections are given with where no
// material is known, kg/m3: the one that the dimensional standards use.
const steelDensity = 7850

// drawingSize is the side of the square that drawings fit, in pixels.
const drawingSize = 120

// section writes about a cross-section: a drawing to scale, dimensions and
// properties. density is that of its material, NaN where several are known.
func (h *hovering) section(s *model.Section, density float64) {
	h.page.Text(output.Strong(output.SectionTitle(s)))
	for _, a := range s.Assumed {
		h.page.Text(output.Words(a))
	}
	if h.paper.pictures {
		h.page.Picture(output.SectionTitle(s), output.Drawing(s.Shape, s.Properties, drawingSize))
	}
	h.page.Table([]string{"", ""}, "lr", dimensions(h.units(), s.Shape))
	h.page.Table([]string{"property", "major", "minor"}, "lrr", axisProperties(h.units(), s.Properties))
	h.page.Table([]string{"", ""}, "lr", otherProperties(h.units(), s, density))
}

// designation writes about a designation, found without a calculation.
func (h *hovering) designation(e catalogue.Entry) {
	p, err := section.Compute(e.Shape)
	if err != nil {
		return
	}
	s := &model.Section{Name: e.Designation, Designation: e.Designation, Standard: e.Standard, Shape: e.Shape, Properties: p, Thickness: math.NaN()}
	if e.Assumed != "" {
		s.Assumed = append(s.Assumed, "taken as "+e.Assumed)
	}
	if !e.Listed {
		s.Assumed = append(s.Assumed, "not among the common sizes of "+e.Standard)
	}
	h.section(s, steelDensity)
}

// dimensions are the rows of a shape's dimensions.
func dimensions(units derivation.Units, s section.Shape) [][]output.Line {
	var rows [][]output.Line
	for _, d := range []struct {
		name  string
		value float64
	}{{"depth", s.Depth}, {"width", s.Width}, {"outside diameter", s.Diameter}, {"web", s.Web}, {"flange", s.Flange}, {"wall", s.Wall}, {"root radius", s.Root},
		{"toe radius", s.Toe}, {"corner radius, outside", s.OuterRadius}} {
		if d.value > 0 {
			rows = append(rows, []output.Line{output.Words(d.name), output.Words(display(units, d.value, unit.Length))})
		}
	}
	if s.Made != section.MadeUnknown {
		rows = append(rows, []output.Line{output.Words("made"), output.Words(s.Made.String())})
	}
	return rows
}

// axisProperties are the rows of the properties about both axes.
func axisProperties(units derivation.Units, p section.Properties) [][]output.Line {
	var rows [][]output.Line
	for _, d := range []struct {
		name         string
		major, minor float64
		dim          unit.Dim
	}{
		{"second moment of area I", p.IMajor, p.IMinor, unit.Length4}, {"radius of gyration i", p.RMajor, p.RMinor, unit.Length},
		{"elastic modulus W", p.WelMajor, p.WelMinor, unit.Volume}, {"plastic modulus Wpl", p.WplMajor, p.WplMinor, unit.Volume},
	} {
		if d.major > 0 || d.minor > 0 {
			rows = append(rows, []output.Line{output.Words(d.name), output.Words(display(units, d.major, d.dim)), output.Words(display(units, d.minor, d.dim))})
		}
	}
	return rows
}

// otherProperties are the rows of area, mass, torsion and the rest.
func otherProperties(units derivation.Units, s *model.Section, density float64) [][]output.Line {
	var rows [][]output.Line
	add := func(name, value string) {
		rows = append(rows, []output.Line{output.Words(name), output.Words(value)})
	}
	add("area A", display(units, s.Area, unit.Area))
	if density > 0 {
		add("mass", display(units, s.Area*density, unit.MassPerLength))
	}
	if s.It > 0 {
		add("torsion constant I_t", display(units, s.It, unit.Length4))
	}
	if s.Iw > 0 {
		add("warping constant I_w", display(units, s.Iw, unit.Length6))
	}
	if s.Thickness > 0 {
		add("thickest part, decides strengths", display(units, s.Thickness, unit.Length))
	}
	return rows
}

// display writes a value to four digits without zeros at its end; a dash for one
// that is not known.
func display(units derivation.Units, v float64, dim unit.Dim) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "–"
	}
	u := units.For(dim)
	return unit.Short(v/u.Factor, 4) + " " + u.Symbol
}
