package lsp

import (
	"math"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/section"
	"kern/lang/unit"
)

// sectionShort is the least that an engineer wants to know of a section: area,
// second moments of area about the major and the minor axis, and the mass where
// the density is known.
func sectionShort(units derivation.Units, s *model.Section, density float64) string {
	i := units.For(unit.Length4)
	text := "A " + display(units, s.Area, unit.Area) + ", I " + unit.Short(s.IMajor/i.Factor, 4) + "/" + unit.Short(s.IMinor/i.Factor, 4) + " " + i.Symbol
	if density > 0 && s.Shape.Kind != section.Given {
		text += ", " + display(units, s.Area*density, unit.MassPerLength)
	}
	return text
}

// densityFor is the density of a member's material, NaN when it is not known.
func densityFor(r *checker.Result) float64 {
	if r.Member.Material == nil {
		return math.NaN()
	}
	return r.Member.Material.Density
}
