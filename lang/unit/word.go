package unit

import "strings"

// words maps other names of units, in lower case, to the units that may be
// meant: the names of the atoms in the singular and plural, and otherNames.
var words = makeWords()

// otherNames are usual ways to write a unit that the language does not read,
// mostly because they can mean two things.
var otherNames = map[string]string{
	"meter": "m", "meters": "m", "mtr": "m", "millimeter": "mm", "millimeters": "mm",
	"centimeter": "cm", "centimeters": "cm", "kilometer": "km", "kilometers": "km",
	"micron": "µm", "microns": "µm", "dm": "cm m",
	"ins": "in", "inches": "in", "\"": "in", "feet": "ft", "'": "ft",
	"sec": "s", "secs": "s", "mins": "min", "hr": "h", "hrs": "h",
	"degs": "deg", "rads": "rad", "radians": "rad", "percentage": "%", "pct": "%",
	"g": "kg", "gram": "kg", "grams": "kg", "gr": "kg", "kgs": "kg", "kilo": "kg", "kilos": "kg",
	"lbs": "lb lbf", "lbm": "lb", "pounds": "lb lbf", "pound": "lb lbf", "#": "lb lbf",
	"ton": "t", "tons": "t", "tonnes": "t", "mt": "t", "te": "t", "tf": "kN kgf", "kgforce": "kgf", "kp": "kgf",
	"newtons": "N", "k": "kip", "kn": "kN", "mn": "MN", "lbforce": "lbf", "klb": "kip", "klbf": "kip",
	"pascals": "Pa", "bar": "kPa", "hpa": "kPa", "ksc": "kPa",
	"n.m": "Nm", "kn.m": "kNm", "mn.m": "MNm", "n.mm": "Nmm", "kn.mm": "kNmm", "kn.cm": "kNcm",
	"k-ft": "kip-ft", "kft": "kip-ft", "ft-k": "kip-ft", "ft-kip": "kip-ft", "ft-kips": "kip-ft", "kips-ft": "kip-ft",
	"k-in": "kip-in", "in-k": "kip-in", "in-kip": "kip-in", "in-kips": "kip-in", "kips-in": "kip-in",
	"ft-lb": "lbf-ft", "ft-lbs": "lbf-ft", "ft-lbf": "lbf-ft", "lb-ft": "lbf-ft", "lbs-ft": "lbf-ft", "ftlb": "lbf-ft",
	"in-lb": "lbf-in", "in-lbs": "lbf-in", "in-lbf": "lbf-in", "lb-in": "lbf-in", "lbs-in": "lbf-in",
	"pli": "lbf/in", "kli": "kip/in", "pci": "lb/in3", "kcf": "kip/ft3",
	"sqm": "m2", "sqmm": "mm2", "sqcm": "cm2", "sqin": "in2", "sqft": "ft2", "sf": "ft2",
	"cum": "m3", "cuft": "ft3", "cuin": "in3", "cf": "ft3",
}

func makeWords() map[string][]string {
	table := make(map[string][]string)
	for name, symbols := range otherNames {
		table[name] = strings.Fields(symbols)
	}
	for _, symbol := range atomOrder {
		k := atoms[symbol]
		if k.alias {
			continue
		}
		name := strings.ReplaceAll(k.Name, " ", "")
		for _, form := range []string{name, name + "s"} {
			if _, ok := table[form]; !ok {
				table[form] = []string{symbol}
			}
		}
	}
	return table
}
