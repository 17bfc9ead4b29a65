package unit

import (
	"strconv"
	"strings"
)

// naming gives a dimension the trade's word and its coherent unit.
type naming struct{ name, base string }

var namings = map[Dim]naming{
	None:                {"pure number", "1"},
	Length:              {"length", "m"},
	Area:                {"area", "m2"},
	Volume:              {"volume or section modulus", "m3"},
	Length4:             {"second moment of area", "m4"},
	Length6:             {"warping constant", "m6"},
	Curvature:           {"curvature", "1/m"},
	Mass:                {"mass", "kg"},
	Time:                {"time", "s"},
	Frequency:           {"frequency", "Hz"},
	Angle:               {"angle", "rad"},
	Velocity:            {"velocity", "m/s"},
	Acceleration:        {"acceleration", "m/s2"},
	Force:               {"force", "N"},
	Moment:              {"moment", "N*m"},
	Stress:              {"stress or pressure", "Pa"},
	ForcePerLength:      {"force per length", "N/m"},
	Density:             {"density", "kg/m3"},
	MassPerLength:       {"mass per length", "kg/m"},
	MassPerArea:         {"mass per area", "kg/m2"},
	WeightDensity:       {"weight density", "N/m3"},
	RotationalStiffness: {"rotational stiffness", "N*m/rad"},
	Rigidity:            {"flexural rigidity", "N*m2"},
}

// Name returns the trade's word for d without an article ("length", "stress or
// pressure", "pure number"), or, for a dimension without such a word, its base
// units ("kg·m3/s2").
func (d Dim) Name() string {
	if n, ok := namings[d]; ok {
		return n.name
	}
	return strings.ReplaceAll(d.Base(), "*", "·")
}

// Base returns the coherent unit of d, the one whose factor is 1, as a text
// that Parse reads back to the same dimension: "1", "m", "N", "Pa", "N*m",
// "kg/m3", or a product of kg, m, s and rad. A root is written with an exponent
// in parentheses: "m^(1/2)".
func (d Dim) Base() string {
	if n, ok := namings[d]; ok {
		return n.base
	}
	var above, below []string
	for _, p := range [...]struct {
		symbol   string
		exponent int
	}{{"kg", int(d.M)}, {"m", int(d.L)}, {"s", int(d.T)}, {"rad", int(d.A)}} {
		if p.exponent > 0 {
			above = appendPower(above, p.symbol, p.exponent)
		} else {
			below = appendPower(below, p.symbol, -p.exponent)
		}
	}
	text := strings.Join(above, "*")
	if text == "" {
		text = "1"
	}
	if len(below) > 0 {
		text += "/" + strings.Join(below, "/")
	}
	return text
}

// appendPower appends the factors that raise symbol to e sixths: one, or two
// when the exponent is more than Parse reads.
func appendPower(factors []string, symbol string, e int) []string {
	const most = maxExponent * sixths
	for ; e > most; e -= most {
		factors = append(factors, symbol+strconv.Itoa(maxExponent))
	}
	switch g := divisor(e, sixths); {
	case e == 0:
		return factors
	case e == sixths:
		return append(factors, symbol)
	case g == sixths:
		return append(factors, symbol+strconv.Itoa(e/sixths))
	default:
		return append(factors, symbol+"^("+strconv.Itoa(e/g)+"/"+strconv.Itoa(sixths/g)+")")
	}
}
