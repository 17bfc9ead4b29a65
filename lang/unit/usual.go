package unit

import (
	"slices"
	"strings"
)

// usualTexts lists the usual units of each dimension: SI units first, the most
// usual one in front, then US customary ones.
var usualTexts = []struct {
	dim   Dim
	texts string
}{
	{None, "% ‰"},
	{Length, "mm m cm km µm in ft yd"},
	{Area, "mm2 cm2 m2 in2 ft2"},
	{Volume, "cm3 mm3 m3 in3 ft3"},
	{Length4, "cm4 mm4 m4 in4 ft4"},
	{Length5, "cm5 mm5 m5 in5"},
	{Length6, "cm6 mm6 m6 in6"},
	{Curvature, "1/m 1/mm 1/in 1/ft"},
	{Mass, "kg t lb slug"},
	{Time, "s min h"},
	{Frequency, "Hz"},
	{Angle, "rad mrad deg"},
	{Velocity, "m/s km/h ft/s"},
	{Acceleration, "m/s2 ft/s2 in/s2"},
	{Force, "kN N MN kgf kip lbf"},
	{Moment, "kNm Nm MNm kNcm kNmm Nmm kip-ft kip-in lbf-ft lbf-in"},
	{Stress, "MPa GPa kPa Pa N/mm2 kN/m2 kN/cm2 kN/mm2 N/m2 ksi psi psf ksf Msi"},
	{ForcePerLength, "kN/m N/m N/mm kN/mm MN/m plf klf kip/ft kip/in lbf/ft lbf/in"},
	{Density, "kg/m3 t/m3 pcf lb/ft3 lb/in3"},
	{MassPerLength, "kg/m t/m lb/ft"},
	{MassPerArea, "kg/m2 t/m2 lb/ft2"},
	{WeightDensity, "kN/m3 N/m3 lbf/ft3 kip/ft3 lbf/in3"},
	{RotationalStiffness, "kNm/rad MNm/rad Nm/rad kNm/mrad kNm/deg kip-ft/rad kip-in/rad lbf-ft/rad"},
	{Rigidity, "kN*m2 MN*m2 N*m2 kN*cm2 N*mm2 kip*in2 kip*ft2 lbf*in2"},
}

var usual = makeUsual()

func makeUsual() map[Dim][]Unit {
	table := make(map[Dim][]Unit, len(usualTexts))
	for _, row := range usualTexts {
		for text := range strings.FieldsSeq(row.texts) {
			u, err := Parse(text)
			if err != nil || u.Dim != row.dim {
				panic("unit: usual unit " + text) // a mistake in the table above
			}
			table[row.dim] = append(table[row.dim], u)
		}
	}
	return table
}

// For returns the usual units of a dimension: SI units first with the most
// usual one in front, then US customary ones. A dimension without usual units
// has its coherent unit alone; a pure number has the percent and per mille
// signs, since as a rule it is written without a unit. The slice is the
// caller's own.
func For(dim Dim) []Unit {
	if list, ok := usual[dim]; ok {
		return slices.Clone(list)
	}
	u, err := Parse(dim.Base())
	if err != nil {
		return nil // cannot be: Parse reads every Base
	}
	return []Unit{u}
}
