// Package action holds load cases, their combinations, and the forces and
// moments that loads make in a column on its holds.
package action

import (
	"math"
	"strconv"
	"strings"
)

// Kind is what an action is.
type Kind uint8

// The kinds of action that a load case can be.
const (
	Permanent Kind = iota
	Imposed
	Snow
	Wind
	Temperature
	Accident   // the design value A_d of an accidental action
	Earthquake // the design value A_Ed of a seismic action; E of ASCE/SEI 7
	RoofLive   // L_r of ASCE/SEI 7; category H of EN 1990
	Rain       // R of ASCE/SEI 7
)

// kindWords are the words of the language for the kinds of action, and those that
// mean the same in the United States.
var kindWords = [...][]string{Permanent: {"permanent", "dead"}, Imposed: {"imposed", "live"}, Snow: {"snow"}, Wind: {"wind"}, Temperature: {"temperature"},
	Accident: {"accidental"}, Earthquake: {"seismic"}, RoofLive: {"roof"}, Rain: {"rain"}}

// KindNames are the words of the language for the kinds of action.
var KindNames = func() map[string]Kind {
	out := map[string]Kind{}
	for k, words := range kindWords {
		for _, w := range words {
			out[w] = Kind(k)
		}
	}
	return out
}()

// KindWords lists the words of the language for the kinds of action, in order.
func KindWords() []string {
	var out []string
	for _, words := range kindWords {
		out = append(out, words...)
	}
	return out
}

// String is the kind's first word in the language.
func (k Kind) String() string {
	if int(k) < len(kindWords) {
		return kindWords[k][0]
	}
	return "unknown"
}

// Variable tells whether actions of the kind are variable: they come and go, and
// have the values psi_0, psi_1 and psi_2.
func (k Kind) Variable() bool {
	switch k {
	case Imposed, Snow, Wind, Temperature, RoofLive, Rain:
		return true
	}
	return false
}

// Case is a load case: an action that comes and goes as one.
type Case struct {
	Name     string
	Kind     Kind
	Category string // EN 1990 Table A1.1: "A" to "H" of imposed loads, the place of snow
	// Own are the psi values that the calculation states for this case, where
	// Stated tells that it does; the others are those of the kind and category.
	Own    Psi
	Stated [3]bool
}

// roof tells whether a case is an imposed load on a roof that people enter for
// maintenance alone, EN 1991-1-1 Table 6.9.
func (c Case) roof() bool { return c.Kind == RoofLive || c.Kind == Imposed && c.Category == "H" }

// The categories of snow in EN 1990 Table A1.1.
const (
	SnowLow  = "below 1000 m"
	SnowHigh = "above 1000 m"
)

// Combination is a sum of load cases with their factors.
type Combination struct {
	Name      string    // as a person writes it: "1.35 G + 1.5 Q"
	Factors   []float64 // one a case, in the order of the cases
	Source    string    // the equation or statement that it comes from
	Situation Situation
	// Accompanying tells of each case whether its factor has a psi value in it; nil
	// for none.
	Accompanying []bool
}

// Sum writes a combination as a person does, leaving out what has no part.
func Sum(cases []Case, factors []float64) string {
	var b strings.Builder
	for i, f := range factors {
		if f == 0 || cases[i].Name == "" {
			continue
		}
		switch {
		case b.Len() == 0 && f < 0:
			b.WriteString("-")
		case f < 0:
			b.WriteString(" - ")
		case b.Len() > 0:
			b.WriteString(" + ")
		}
		factor := strconv.FormatFloat(math.Abs(f), 'g', 6, 64)
		if factor == "1" {
			factor = "1.0"
		}
		b.WriteString(factor + " " + cases[i].Name)
	}
	return b.String()
}
