package action

import "math"

// Reducible tells whether imposed loads of a case may be reduced for columns: floors
// of categories A to D (EN 1991-1-1 6.3.1.2(10) and (11)). Storage, vehicles and
// roofs may not.
func (c Case) Reducible() bool {
	switch c.Category {
	case "A", "B", "C", "D":
		return c.Kind == Imposed
	}
	return false
}

// The categories of live loads that ASCE/SEI 7 treats apart.
const (
	Assembly = "assembly" // places of public assembly
	Garage   = "garage"   // passenger vehicles
)

// ReducibleLive tells whether live loads of a case may be reduced by ASCE/SEI 7
// 4.7: not those of garages and places of assembly (4.7.4, 4.7.5), nor of roofs,
// which have a rule of their own (4.8).
func (c Case) ReducibleLive() bool {
	if c.Kind != Imposed {
		return false
	}
	switch c.Category {
	case Assembly, Garage, "C", "F", "G", "H":
		return false
	}
	return true
}

// StoreyFactor is the reduction factor alpha_n for the imposed load of n storeys
// above, in 0.5 to 1: EN 1991-1-1 6.3.1.2(11) (6.2), (2 + (n - 2) psi_0)/n for
// n > 2 (printed in Steel Buildings in Europe, Multi-Storey Part 3, 6.3); in the
// United Kingdom 1.1 - n/10 up to five storeys, 0.6 up to ten, 0.5 above (printed in
// the Concrete Centre's Worked Examples to Eurocode 2, column of eight storeys).
func (v Values) StoreyFactor(n int, psi0 float64) float64 {
	if v.Annex == unitedKingdom.Annex {
		switch {
		case n <= 1:
			return 1
		case n <= 5:
			return 1.1 - float64(n)/10
		case n <= 10:
			return 0.6
		}
		return 0.5
	}
	if n <= 2 {
		return 1
	}
	return math.Min(1, (2+float64(n-2)*psi0)/float64(n))
}

// AreaFactor is the reduction factor alpha_A for the imposed load of a floor area
// in m2, in 0.5 to 1: EN 1991-1-1 6.3.1.2(10) (6.1), 5/7 psi_0 + 10 m2/A, no less
// than 0.6 for categories C and D; in the United Kingdom 1 - A/(1000 m2), no less than
// 0.75 (NA to BS EN 1991-1-1 NA.2.5). Both from memory.
func (v Values) AreaFactor(category string, area, psi0 float64) float64 {
	if !(area > 0) {
		return 1
	}
	if v.Annex == unitedKingdom.Annex {
		return math.Max(0.75, 1-area/1000)
	}
	a := math.Min(1, 5./7*psi0+10/area)
	if category == "C" || category == "D" {
		a = math.Max(a, 0.6)
	}
	return a
}

// foot2 is a square foot in m2.
const foot2 = 0.3048 * 0.3048

// heavyLive is the live load above which it counts as heavy, Pa: 100 psf.
const heavyLive = 100 * 4.4482216152605 / foot2

// LiveFactor is the reduction of live loads of ASCE/SEI 7 4.7.2 (4.7-1), in 0.4 to
// 1, for a member that carries the tributary area (m2) of a number of floors:
// 0.25 + 15/√(K_LL A_T) with A_T in square feet, no less than 0.5 for one floor and
// 0.4 for more, and nothing below K_LL A_T = 400 square feet. A heavy live load
// (pressure, Pa) is reduced by a fifth at most, and only under two floors or more
// (4.7.3). From memory; the limits also in the New York City Building Code 1607.11.1.
func LiveFactor(element, area float64, floors int, pressure float64) float64 {
	influence := element * area / foot2
	if !(influence >= 400) || floors < 1 {
		return 1
	}
	least := 0.5
	if floors > 1 {
		least = 0.4
	}
	if pressure > heavyLive*(1+1e-9) {
		if floors < 2 {
			return 1
		}
		least = 0.8
	}
	return math.Min(1, math.Max(least, 0.25+15/math.Sqrt(influence)))
}
