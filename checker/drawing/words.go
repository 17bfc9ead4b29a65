package drawing

import (
	"math"
	"strconv"

	"kern/checker/derivation"
	"kern/lang/unit"
)

// show writes a value with its unit to four digits; a dash for one that is not
// known.
func show(units derivation.Units, v float64, dim unit.Dim) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "–"
	}
	if dim.IsNone() {
		return unit.Short(v, 4)
	}
	u := units.For(dim)
	return unit.Short(v/u.Factor, 4) + " " + u.Symbol
}

// clip shortens words to a width, mm.
func clip(words string, size, width float64, bold bool) string {
	if Width(words, size, bold) <= width {
		return words
	}
	r := []rune(words)
	for len(r) > 0 && Width(string(r)+"…", size, bold) > width {
		r = r[:len(r)-1]
	}
	return string(r) + "…"
}

func decimal(n int) string { return strconv.Itoa(n) }
