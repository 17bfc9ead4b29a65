package size

import (
	"math"
	"strconv"

	"kern/lang"
	"kern/lang/unit"
)

var nan = math.NaN()

// unitOf is the unit that an expression is written in, "" for one that is no
// plain quantity.
func unitOf(e *lang.Expr) string {
	if e.Kind == lang.UnaryExpr && len(e.Args) == 1 {
		e = e.Args[0]
	}
	if e.Kind == lang.QuantExpr {
		return e.Unit.Symbol
	}
	return ""
}

func lengthOf(symbol string) unit.Unit {
	u, err := unit.Parse(symbol)
	if err != nil || u.Dim != unit.Length {
		return unit.Unit{Symbol: "m", Factor: 1, Dim: unit.Length}
	}
	return u
}

// Down writes a quantity with at most so many significant digits, rounded towards
// zero; what the rounding of a float64 alone took away is given back.
func Down(si float64, u unit.Unit, significant int) string {
	v := si / u.Factor
	if v == 0 {
		return "0 " + u.Symbol
	}
	scale := math.Pow(10, float64(significant-1)-math.Floor(math.Log10(math.Abs(v))))
	n := math.Trunc(v*scale*(1+1e-12)) / scale
	return unit.Short(n, significant) + " " + u.Symbol
}

// read gives the value of what Down wrote, in SI units.
func read(text string, u unit.Unit) float64 {
	n := len(text) - len(u.Symbol) - 1
	v, err := strconv.ParseFloat(text[:n], 64)
	if err != nil {
		return nan
	}
	return v * u.Factor
}

// state is what a check at a value of a quantity comes to.
type state uint8

const (
	unknown state = iota // no result
	fails
	passes
)

// greatest finds the greatest value of a quantity up to which the member passes
// from the first value on that has a result: it goes up a grid until the first
// value that fails, and cuts the last step in halves. Nothing is taken to be
// monotone but within one step of the grid. open is set when nothing fails up to
// the end of the grid. It is NaN when there is no such value.
func greatest(grid []float64, at func(v float64) state) (value float64, open bool) {
	last := nan
	for _, v := range grid {
		switch at(v) {
		case passes:
			last = v
			continue
		case unknown:
			if math.IsNaN(last) {
				continue
			}
		case fails:
			if math.IsNaN(last) {
				return nan, false
			}
		}
		low, high := last, v
		for range 24 {
			if high-low <= 1e-5*math.Abs(high) {
				break
			}
			if mid := (low + high) / 2; at(mid) == passes {
				low = mid
			} else {
				high = mid
			}
		}
		return low, false
	}
	return last, true
}
