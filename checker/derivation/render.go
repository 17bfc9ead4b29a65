package derivation

import (
	"math"
	"strings"

	"kern/lang"
	"kern/lang/unit"
)

// Units says in which unit a dimension is shown. Dimensions that are not in it
// are shown in the usual one.
type Units map[unit.Dim]unit.Unit

var usual = map[unit.Dim]string{
	unit.Length: "mm", unit.Area: "mm2", unit.Volume: "cm3", unit.Length4: "cm4", unit.Length6: "cm6", unit.Force: "kN",
	unit.Stress: "N/mm2", unit.Moment: "kNm", unit.ForcePerLength: "kN/m", unit.Density: "kg/m3", unit.MassPerLength: "kg/m",
	unit.Mass: "kg", unit.Angle: "rad", unit.Acceleration: "m/s2", unit.WeightDensity: "kN/m3", unit.RotationalStiffness: "kNm/rad",
	unit.Rigidity: "kN*m2",
}

// customary are the usual units where lengths are shown in inches or feet.
var customary = map[unit.Dim]string{
	unit.Length: "in", unit.Area: "in2", unit.Volume: "in3", unit.Length4: "in4", unit.Length6: "in6", unit.Force: "kip",
	unit.Stress: "ksi", unit.Moment: "kip-ft", unit.ForcePerLength: "klf", unit.Density: "pcf", unit.MassPerLength: "lb/ft", unit.Mass: "lb",
	unit.RotationalStiffness: "kip-ft/rad", unit.WeightDensity: "lbf/ft3", unit.Acceleration: "ft/s2", unit.Rigidity: "kip*in2",
}

// American tells whether what is not said is shown in US customary units: where
// lengths are, or where forces are and nothing is said of lengths.
func (u Units) American() bool {
	if l, ok := u[unit.Length]; ok {
		return l.Symbol == "in" || l.Symbol == "ft"
	}
	switch u[unit.Force].Symbol {
	case "kip", "kips", "lbf":
		return true
	}
	return false
}

// For gives the unit in which to show a quantity of the dimension.
func (u Units) For(dim unit.Dim) unit.Unit {
	if s, ok := u[dim]; ok {
		return s
	}
	text, ok := "", false
	if u.American() {
		text, ok = customary[dim]
	}
	if !ok {
		text, ok = usual[dim]
	}
	if !ok {
		text = dim.Base()
	}
	if s, err := unit.Parse(text); err == nil {
		return s
	}
	return unit.Unit{Factor: 1, Dim: dim}
}

// Show writes a value with its unit, to the given number of significant
// digits, so that the language reads it back.
func (u Units) Show(value float64, dim unit.Dim, digits int) string {
	if dim.IsNone() {
		return unit.Number(value, digits)
	}
	s := u.For(dim)
	return unit.Number(value/s.Factor, digits) + " " + s.Symbol
}

const foot = 0.3048 // m

// Place writes a height on a member (m) as messages do: in metres, or in feet where
// US customary units are shown, to a tenth of a millimetre or finer.
func (u Units) Place(z float64) string {
	if u.American() {
		return unit.Exact(math.Round(z/foot*1e4)/1e4) + " ft"
	}
	return unit.Exact(math.Round(z*1e4)/1e4) + " m"
}

// Long writes a length that is computed (m) in the same units, to the given number of
// significant digits.
func (u Units) Long(length float64, digits int) string {
	if u.American() {
		return unit.Short(length/foot, digits) + " ft"
	}
	return unit.Short(length, digits) + " m"
}

// Floor writes an area of floor (m2), to the given number of significant digits:
// nobody gives it in the unit of a section's area.
func (u Units) Floor(area float64, digits int) string {
	if u.American() {
		return unit.Short(area/(foot*foot), digits) + " ft2"
	}
	return unit.Short(area, digits) + " m2"
}

// Pressure is the unit of loads on a floor: nobody gives them in that of stresses.
func (u Units) Pressure() unit.Unit {
	text := "kN/m2"
	if u.American() {
		text = "psf"
	}
	p, err := unit.Parse(text)
	if err != nil {
		panic(err) // both are units of the language
	}
	return p
}

// Short writes a value with its unit to the given number of significant digits,
// without zeros at the end.
func (u Units) Short(value float64, dim unit.Dim, digits int) string {
	s := u.For(dim)
	return unit.Short(value/s.Factor, digits) + " " + s.Symbol
}

// Digits is how many significant digits derivations are printed with: enough
// that a checker who puts the printed numbers in finds the printed result.
const Digits = 5

// Numbers writes the formula of a step with its numbers put in. It is a text
// that the language evaluates. digits 0 writes every digit.
func (s Step) Numbers(set *Set, units Units, digits int) string {
	if s.Formula == nil {
		return ""
	}
	values := make(map[string]string, len(s.Inputs))
	for _, in := range s.Inputs {
		sym := set.At(in.Symbol)
		var text string
		if digits == 0 {
			text = unit.Exact(in.Value)
			if !sym.Dim.IsNone() {
				text += " " + sym.Dim.Base()
			}
		} else {
			text = units.Show(in.Value, sym.Dim, digits)
		}
		if in.Value < 0 || math.Signbit(in.Value) {
			text = "(" + text + ")"
		}
		values[sym.Name] = text
	}
	var b strings.Builder
	text := s.Formula.Text
	tokens := lang.Tokens(text)
	for i, t := range tokens {
		piece := t.Span().Of(text)
		if v, ok := values[piece]; ok && t.Kind == lang.Name {
			piece = v
			// "5 mm^2" is an area: a length to the power of two needs brackets
			if i+1 < len(tokens) && tokens[i+1].Span().Of(text) == "^" && !strings.HasPrefix(v, "(") && strings.Contains(v, " ") {
				piece = "(" + v + ")"
			}
		}
		b.WriteString(piece)
	}
	return b.String()
}
