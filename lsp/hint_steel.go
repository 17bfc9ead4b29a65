package lsp

import (
	"math"
	"slices"
	"strings"

	"kern/checker/catalogue"
	"kern/checker/model"
	"kern/checker/output"
	"kern/checker/section"
	"kern/lang"
	"kern/lang/unit"
)

// declaredSection gives the properties of a section that the calculation names.
func (c *collector) declaredSection(s *lang.Stmt) {
	n := c.own(s)
	if n == nil {
		return
	}
	density, known := c.usage().densities[n.Place]
	if !known {
		density = steelDensity
	}
	c.section(s, c.calc.Env.Sections[n.Index], density)
}

// usage is what the members of a report make of the sections and materials that
// calculations name, by where these are named.
type usage struct {
	densities map[lang.Place]float64          // of a section's materials; NaN where they differ
	sections  map[lang.Place][]*model.Section // of a material, one of each thickness and form
}

// usage goes through the members once.
func (c *collector) usage() *usage {
	if c.used != nil {
		return c.used
	}
	u := &usage{densities: map[lang.Place]float64{}, sections: map[lang.Place][]*model.Section{}}
	c.used = u
	for _, r := range c.report.Members {
		sec, m := r.Member.Section, r.Member.Material
		if sec == nil || m == nil {
			continue
		}
		if d, seen := u.densities[sec.Place]; !seen {
			u.densities[sec.Place] = m.Density
		} else if d != m.Density {
			u.densities[sec.Place] = math.NaN()
		}
		alike := func(x *model.Section) bool {
			return x.Thickness == sec.Thickness && catalogue.FormOf(x.Shape) == catalogue.FormOf(sec.Shape)
		}
		if list := u.sections[m.Place]; !slices.ContainsFunc(list, alike) {
			u.sections[m.Place] = append(list, sec)
		}
	}
	return u
}

// section gives the properties of a section and what is assumed about it.
func (c *collector) section(s *lang.Stmt, sec *model.Section, density float64) {
	at := c.behind(s)
	if sec.Shape.Kind != section.Given { // its properties stand there already
		c.add(at, sectionHint, sectionShort(c.units(), sec, density), func(p *output.Page) {
			p.Text(output.Strong(output.SectionTitle(sec)))
			p.Table([]string{"", ""}, "lr", dimensions(c.units(), sec.Shape))
			p.Table([]string{"property", "major", "minor"}, "lrr", axisProperties(c.units(), sec.Properties))
			p.Table([]string{"", ""}, "lr", otherProperties(c.units(), sec, density))
		})
	}
	var labels []string
	for _, a := range sec.Assumed {
		labels = append(labels, shortly(a))
	}
	c.add(at, assumptionHint, strings.Join(labels, ", "), func(p *output.Page) {
		for _, a := range sec.Assumed {
			p.Text(output.Words(a))
		}
	})
}

// shortly is the heart of an assumption about a section: what stands between
// what it is about and its reason.
func shortly(assumption string) string {
	text, _, _ := strings.Cut(assumption, " (")
	if _, after, ok := strings.Cut(text, " taken as "); ok {
		text, _, _ = strings.Cut(after, ", as ")
		return text
	}
	if _, after, ok := strings.Cut(text, " with corners of outside radius "); ok {
		return "corner " + after
	}
	if strings.Contains(text, " is not among the common sizes of ") {
		return "not a common size"
	}
	return text
}

// declaredMaterial gives the strength of a grade that the calculation names, for
// the thicknesses that it is used with.
func (c *collector) declaredMaterial(s *lang.Stmt) {
	n := c.own(s)
	if n == nil {
		return
	}
	m := c.calc.Env.Materials[n.Index]
	for _, a := range m.Assumed {
		text, _, _ := strings.Cut(a, " for ")
		c.add(c.behind(s), assumptionHint, text, func(p *output.Page) { p.Text(output.Words(a)) })
	}
	if m.Grade == nil {
		return
	}
	table31 := c.calc.Env.Basis.TableFy
	var used []float64 // strengths, each once
	for _, sec := range c.usage().sections[n.Place] {
		if fy, _, _, ok := m.StrengthOf(sec, table31); ok && !slices.Contains(used, fy) {
			used = append(used, fy)
		}
	}
	slices.Sort(used)
	label := ""
	switch len(used) {
	case 0:
		fy, _, row, ok := m.Strength(1e-2, table31)
		if !ok {
			return
		}
		parts := strings.Split(row, ", ")
		label = "fy " + display(c.units(), fy, unit.Stress) + " for " + parts[len(parts)-1]
	case 1:
		label = "fy " + display(c.units(), used[0], unit.Stress)
	default:
		u := c.units().For(unit.Stress)
		label = "fy " + unit.Short(used[0]/u.Factor, 4) + " to " + display(c.units(), used[len(used)-1], unit.Stress)
	}
	c.add(c.behind(s), strengthHint, label, func(p *output.Page) { c.strengthTip(p, m) })
}

// strengthTip writes the strengths of a grade by thickness.
func (c *collector) strengthTip(p *output.Page, m *model.Material) {
	h := &hovering{f: c.f, page: p, calc: c.calc}
	h.grade(*m.Grade)
}

// madeOf gives the properties of a member's section and the strength of its
// material, where the member says them.
func (c *collector) madeOf(s *lang.Stmt, m *model.Member) {
	value, _ := s.Assigned()
	if len(value) == 0 {
		return
	}
	switch s.Word {
	case "section":
		if m.Section == nil {
			return
		}
		if value[0].Kind == lang.StringExpr || s.Body != nil {
			density := math.NaN()
			if m.Material != nil {
				density = m.Material.Density
			}
			c.section(s, m.Section, density)
			return
		}
		if m.Section.Designation != "" { // a name says little
			c.add(c.behind(s), sectionHint, m.Section.Designation, func(p *output.Page) {
				p.Text(output.Words(output.SectionTitle(m.Section) + ": " + sectionShort(c.units(), m.Section, math.NaN())))
			})
		}
	case "material":
		if m.Material == nil || m.Material.Grade == nil || m.Section == nil {
			return
		}
		if fy, _, source, ok := m.Material.StrengthOf(m.Section, c.calc.Env.Basis.TableFy); ok {
			c.add(c.behind(s), strengthHint, "fy "+display(c.units(), fy, unit.Stress), func(p *output.Page) {
				p.Text(output.Words(source + "; the thickest part of " + m.Section.Title() + " is " + display(c.units(), m.Section.Thickness, unit.Length)))
				c.strengthTip(p, m.Material)
			})
		}
	}
}
