package action

import (
	"slices"
	"strconv"
)

// Psi are the combination, frequent and quasi-permanent values psi_0, psi_1 and
// psi_2 of a variable action, EN 1990 4.1.3, each from 0 to 1.
type Psi [3]float64

// String writes the values as a person does: "0.7, 0.5, 0.3".
func (p Psi) String() string {
	return short(p[0]) + ", " + short(p[1]) + ", " + short(p[2])
}

// short writes a factor with no more digits than it has, up to six.
func short(x float64) string { return strconv.FormatFloat(x, 'g', 6, 64) }

// The equations for persistent and transient situations that a basis can name.
const (
	Equation610   = "6.10"
	Equation610ab = "6.10a/b" // the less favourable of (6.10a) and (6.10b)
)

// Equations lists the equations that a basis can name; the first is the default
// and the safer one.
func Equations() []string { return []string{Equation610, Equation610ab} }

// Values are what EN 1990 leaves to a country: the partial factors of Table
// A1.2(B), the reduction factor xi of (6.10b), and the table of psi values.
type Values struct {
	Annex             string
	GSup, GInf, Q     float64
	Xi                float64
	imposed           map[string]Psi // by category
	snow              map[string]Psi // by place
	wind, temperature Psi
}

// National is one number of an annex with its source.
type National struct {
	Annex, What, Value, Source string
}

const (
	tableA12  = "EN 1990 Table A1.2(B); printed in Steel Buildings in Europe, Multi-Storey Part 3, 3.2"
	tableA11  = "EN 1990 Table A1.1 (from memory; A, B, D to H, wind and temperature as in the Finnish decree of 15 October 2007, annex 1)"
	printed11 = "EN 1990 Table A1.1; printed in Steel Buildings in Europe, Multi-Storey Part 3, 3.2"
	snowHigh  = "EN 1990 Table A1.1 (from memory)"
	goodchild = "The Concrete Centre, Worked Examples to Eurocode 2, column of eight storeys"
	shearwall = "The Concrete Centre, Worked Examples to Eurocode 2, shear wall at ground to first floor"
)

// Recommended are the values that EN 1990:2002 recommends, Tables A1.1 and
// A1.2(B).
var Recommended = Values{
	Annex: "recommended", GSup: 1.35, GInf: 1.00, Q: 1.50, Xi: 0.85,
	imposed: map[string]Psi{
		"A": {0.7, 0.5, 0.3}, "B": {0.7, 0.5, 0.3}, "C": {0.7, 0.7, 0.6}, "D": {0.7, 0.7, 0.6}, "E": {1.0, 0.9, 0.8},
		"F": {0.7, 0.7, 0.6}, "G": {0.7, 0.5, 0.3}, "H": {0, 0, 0},
	},
	snow:        map[string]Psi{SnowLow: {0.5, 0.2, 0}, SnowHigh: {0.7, 0.5, 0.2}},
	wind:        Psi{0.6, 0.2, 0},
	temperature: Psi{0.6, 0.5, 0},
}

// unitedKingdom are the recommended values but for those that a printed example
// by the UK National Annex shows to be others.
var unitedKingdom = func() Values {
	v := Recommended
	v.Annex, v.Xi = "United Kingdom", 0.925
	v.imposed = map[string]Psi{}
	for k, p := range Recommended.imposed {
		v.imposed[k] = p
	}
	v.imposed["H"] = Psi{0.7, 0, 0}
	v.wind = Psi{0.5, 0.2, 0}
	return v
}()

var annexes = []Values{Recommended, unitedKingdom}

// Annexes lists the sets of national values of EN 1990 that are known, the
// default first. A country is in it when each of its values that is said to be
// national has a source; see Nationals.
func Annexes() []string {
	var out []string
	for _, v := range annexes {
		out = append(out, v.Annex)
	}
	return out
}

// AnnexOf finds a set of national values by its name; false when it is not
// known.
func AnnexOf(name string) (Values, bool) {
	for _, v := range annexes {
		if v.Annex == name {
			return v, true
		}
	}
	return Values{}, false
}

// Nationals are the numbers of every annex with their sources, in order. What a
// set does not list has the recommended value.
func Nationals() []National {
	const all, uk = "recommended", "United Kingdom"
	return []National{
		{all, "gamma_G_sup, gamma_G_inf", "1.35, 1.00", tableA12},
		{all, "gamma_Q", "1.50", tableA12},
		{all, "xi", "0.85", tableA12},
		{all, "psi of imposed A, B", Recommended.imposed["A"].String(), tableA11},
		{all, "psi of imposed C, D", Recommended.imposed["C"].String(), tableA11},
		{all, "psi of imposed E", Recommended.imposed["E"].String(), tableA11},
		{all, "psi of imposed F", Recommended.imposed["F"].String(), tableA11},
		{all, "psi of imposed G", Recommended.imposed["G"].String(), tableA11},
		{all, "psi of imposed H", Recommended.imposed["H"].String(), tableA11},
		{all, "psi of snow " + SnowLow, Recommended.snow[SnowLow].String(), printed11 + " (psi_0), the others from memory"},
		{all, "psi of snow " + SnowHigh, Recommended.snow[SnowHigh].String(), snowHigh},
		{all, "psi of wind", Recommended.wind.String(), printed11 + " (psi_0)"},
		{all, "psi of temperature", Recommended.temperature.String(), tableA11},
		{uk, "gamma_G_sup, gamma_G_inf", "1.35, 1.00", shearwall},
		{uk, "gamma_Q", "1.50", goodchild},
		{uk, "xi", "0.925", goodchild},
		{uk, "psi_0 of imposed A, B", "0.7", goodchild},
		{uk, "psi_0 of imposed H", "0.7", goodchild},
		{uk, "psi_0 of wind", "0.5", shearwall},
	}
}

// NationalsOf are the rows of one annex.
func NationalsOf(annex string) []National {
	return slices.DeleteFunc(Nationals(), func(n National) bool { return n.Annex != annex })
}

// Psi gives the psi values of a case: those that it states itself, the others by
// its kind and category. It is false when one of these is needed and the category
// is missing or unknown, and for actions that are not variable.
func (v Values) Psi(c Case) (Psi, bool) {
	if !c.Kind.Variable() {
		return Psi{}, false
	}
	p, ok := v.table(c)
	ok = ok || c.Stated == [3]bool{true, true, true}
	if !ok {
		return Psi{}, false
	}
	for i, stated := range c.Stated {
		if stated {
			p[i] = c.Own[i]
		}
	}
	return p, true
}

// table looks a variable action up in Table A1.1.
func (v Values) table(c Case) (Psi, bool) {
	switch c.Kind {
	case Imposed:
		p, ok := v.imposed[c.Category]
		return p, ok
	case Snow:
		p, ok := v.snow[c.Category]
		return p, ok
	case Wind:
		return v.wind, true
	case Temperature:
		return v.temperature, true
	case RoofLive:
		p, ok := v.imposed["H"]
		return p, ok
	}
	return Psi{}, false
}
