package unit

// Sources of the definitions. The table numbers are those of the 9th edition
// (2019) of the SI Brochure and of the 2008 edition of NIST Special
// Publication 811.
const (
	siBase    = "SI Brochure, Table 2"
	siNamed   = "SI Brochure, Table 4"
	siPrefix  = "SI Brochure, Table 7"
	siBeside  = "SI Brochure, Table 8"
	customary = "NIST SP 811, B.8"
	percent   = "NIST SP 811, 7.10.2"
)

// form says how a symbol behaves in a compound unit.
type form uint8

const (
	simple   form = iota
	joined        // two units run together: an exponent belongs to the second
	sign          // a sign that takes no exponent
	spelling      // another spelling of a unit that stands above it
)

// definition defines a unit by a number and a unit made of those above it.
type definition struct {
	symbol, name, value, source string
	form                        form
}

// definitions of every atom but the base units. Left out on purpose: g (the
// language's constant of gravity) and the gram with it; mN (a millinewton, next
// to MN); tf and ton (three different tons); bar (a word of the language).
var definitions = []definition{
	{"mm", "millimetre", "0.001 m", siPrefix, simple},
	{"cm", "centimetre", "0.01 m", siPrefix, simple},
	{"km", "kilometre", "1000 m", siPrefix, simple},
	{"\u00b5m", "micrometre", "1e-6 m", siPrefix, simple},
	{"\u03bcm", "micrometre", "1 \u00b5m", siPrefix, spelling}, // Greek letter in place of the micro sign
	{"um", "micrometre", "1 \u00b5m", siPrefix, spelling},
	{"in", "inch", "0.0254 m", customary, simple},
	{"ft", "foot", "12 in", customary, simple},
	{"yd", "yard", "3 ft", customary, simple},

	{"min", "minute", "60 s", siBeside, simple},
	{"h", "hour", "60 min", siBeside, simple},
	{"Hz", "hertz", "1 1/s", siNamed, simple},

	{"mrad", "milliradian", "0.001 rad", siPrefix, simple},
	{"deg", "degree", "pi/180 rad", siBeside, simple},
	{"°", "degree", "pi/180 rad", siBeside, sign},
	{"%", "percent", "0.01 1", percent, sign},
	{"‰", "per mille", "0.001 1", "one thousandth, by definition", sign},

	{"t", "tonne", "1000 kg", siBeside, simple},
	{"lb", "pound", "0.45359237 kg", customary, simple},

	{"N", "newton", "1 kg*m/s2", siNamed, simple},
	{"kN", "kilonewton", "1000 N", siPrefix, simple},
	{"MN", "meganewton", "1e6 N", siPrefix, simple},
	{"kgf", "kilogram-force", "9.80665 kg*m/s2", customary, simple},
	{"lbf", "pound-force", "9.80665 lb*m/s2", customary, simple},
	{"kip", "kip", "1000 lbf", customary, simple},
	{"kips", "kip", "1 kip", customary, spelling},
	{"slug", "slug", "1 lbf*s2/ft", customary, simple},

	{"Pa", "pascal", "1 N/m2", siNamed, simple},
	{"kPa", "kilopascal", "1000 Pa", siPrefix, simple},
	{"MPa", "megapascal", "1e6 Pa", siPrefix, simple},
	{"GPa", "gigapascal", "1e9 Pa", siPrefix, simple},
	{"psi", "pound-force per square inch", "1 lbf/in2", customary, simple},
	{"ksi", "kip per square inch", "1 kip/in2", customary, simple},
	{"Msi", "million pounds-force per square inch", "1000 ksi", customary + " (psi)", simple},
	{"psf", "pound-force per square foot", "1 lbf/ft2", customary, simple},
	{"ksf", "kip per square foot", "1 kip/ft2", customary + " (kip, foot)", simple},

	{"Nm", "newton metre", "1 N*m", siNamed + " (newton)", joined},
	{"kNm", "kilonewton metre", "1 kN*m", siPrefix, joined},
	{"MNm", "meganewton metre", "1 MN*m", siPrefix, joined},
	{"Nmm", "newton millimetre", "1 N*mm", siPrefix, joined},
	{"kNmm", "kilonewton millimetre", "1 kN*mm", siPrefix, joined},
	{"kNcm", "kilonewton centimetre", "1 kN*cm", siPrefix, joined},
	{"lbf-ft", "pound-force foot", "1 lbf*ft", customary, joined},
	{"lbf-in", "pound-force inch", "1 lbf*in", customary, joined},
	{"kip-ft", "kip foot", "1 kip*ft", customary + " (kip, foot)", joined},
	{"kip-in", "kip inch", "1 kip*in", customary + " (kip, inch)", joined},

	{"plf", "pound-force per foot", "1 lbf/ft", customary, simple},
	{"klf", "kip per foot", "1 kip/ft", customary + " (kip, foot)", simple},
	{"pcf", "pound per cubic foot", "1 lb/ft3", customary, simple},
}
