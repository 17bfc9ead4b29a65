// Package action holds load cases, their combinations, and the forces and
// moments that loads make in a column on its holds.
package action

import (
	"fmt"
	"math"
	"math/bits"
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
)

// KindNames are the words of the language for the kinds of action.
var KindNames = map[string]Kind{"permanent": Permanent, "imposed": Imposed, "snow": Snow, "wind": Wind, "temperature": Temperature}

// String is the kind's word in the language.
func (k Kind) String() string {
	for name, kind := range KindNames {
		if kind == k {
			return name
		}
	}
	return "unknown"
}

// Case is a load case: an action that comes and goes as one.
type Case struct {
	Name     string
	Kind     Kind
	Category string // EN 1990 Table A1.1: "A" to "H" of imposed loads, the place of snow
}

// Psi0 is the combination value of EN 1990 Table A1.1 (recommended values), by
// category. It is false when the category is missing or unknown.
func (c Case) Psi0() (float64, bool) {
	switch c.Kind {
	case Imposed:
		switch c.Category {
		case "A", "B", "C", "D", "F", "G":
			return 0.7, true
		case "E":
			return 1.0, true
		case "H":
			return 0, true
		}
	case Snow:
		switch c.Category {
		case SnowHigh:
			return 0.7, true
		case SnowLow:
			return 0.5, true
		}
	case Wind, Temperature:
		return 0.6, true
	}
	return 0, false
}

// The categories of snow in EN 1990 Table A1.1.
const (
	SnowLow  = "below 1000 m"
	SnowHigh = "above 1000 m"
)

// Combination is a sum of load cases with their factors.
type Combination struct {
	Name    string    // as a person writes it: "1.35 G + 1.5 Q"
	Factors []float64 // one a case, in the order of the cases
	Source  string    // the equation or statement that it comes from
}

// Factors are the partial factors of EN 1990 Table A1.2(B).
type Factors struct {
	GSup, GInf, Q float64
}

// Recommended are the values that EN 1990:2002 Table A1.2(B) recommends.
var Recommended = Factors{GSup: 1.35, GInf: 1.00, Q: 1.50}

// MaxVariable is how many variable cases the automatic combinations take: their
// number doubles with each.
const MaxVariable = 7

// Persistent makes the combinations of EN 1990 equation (6.10) for persistent
// and transient situations: permanent actions all with their upper or all with
// their lower factor (one source, Table A1.2(B) note 3), every selection of the
// variable actions (one that relieves is left out), each of them leading in
// turn. The cases must have their categories; false otherwise, or when there
// are more than MaxVariable variable cases.
func Persistent(cases []Case, f Factors) ([]Combination, bool) {
	var variable []int
	psi := make([]float64, len(cases))
	permanent := false
	for i, c := range cases {
		if c.Kind == Permanent {
			permanent = true
			continue
		}
		p, ok := c.Psi0()
		if !ok {
			return nil, false
		}
		psi[i] = p
		variable = append(variable, i)
	}
	if len(variable) > MaxVariable {
		return nil, false
	}
	gammas := []float64{f.GSup, f.GInf}
	if !permanent || f.GSup == f.GInf {
		gammas = gammas[:1]
	}
	var out []Combination
	seen := map[string]bool{}
	add := func(factors []float64) {
		// by the factors, not by the name: cases may share one, and it is rounded
		key := fmt.Sprint(factors)
		if nothing(factors) || seen[key] {
			return
		}
		seen[key] = true
		out = append(out, Combination{Name: Sum(cases, factors), Factors: factors, Source: "EN 1990:2002 (6.10)"})
	}
	for _, g := range gammas {
		base := make([]float64, len(cases))
		for i, c := range cases {
			if c.Kind == Permanent {
				base[i] = g
			}
		}
		add(base)
		// from few variable actions to many: of combinations that do the same to a
		// member, the first and so the shortest is named
		for _, set := range selections(len(variable)) {
			for lead := range variable {
				if set&(1<<lead) == 0 {
					continue
				}
				factors := append([]float64(nil), base...)
				for j, i := range variable {
					switch {
					case set&(1<<j) == 0:
					case j == lead:
						factors[i] = f.Q
					default:
						factors[i] = f.Q * psi[i]
					}
				}
				add(factors)
			}
		}
	}
	return out, true
}

// nothing tells whether no case has a part in a combination.
func nothing(factors []float64) bool {
	for _, f := range factors {
		if f != 0 {
			return false
		}
	}
	return true
}

// selections are the non-empty subsets of n things as bit sets, the small ones
// first.
func selections(n int) []int {
	out := make([]int, 0, 1<<n)
	for size := 1; size <= n; size++ {
		for set := 1; set < 1<<n; set++ {
			if bits.OnesCount(uint(set)) == size {
				out = append(out, set)
			}
		}
	}
	return out
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
