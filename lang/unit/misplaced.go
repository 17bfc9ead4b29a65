package unit

import "strings"

// weights pairs the units of mass with the forces that they weigh at standard
// gravity: the same value in the second unit is what was meant when a mass was
// written for a force.
var weights = [...][2]string{{"kg", "kgf"}, {"lb", "lbf"}}

// misplaced returns the units near to a text that is itself a unit, but of
// another dimension than the one that is due: those that it is the beginning
// of (kN/m2 for kN), and force for mass or mass for force (lbf/ft for lb/ft).
func misplaced(text string) []suggestion {
	var list []suggestion
	for _, s := range pool {
		rest, found := strings.CutPrefix(s.symbol, text)
		if found && strings.IndexAny(rest, "/-23456") == 0 { // not mm2 for m
			s.cost = editCost
			list = append(list, s)
		}
	}
	var factors strings.Builder
	for at := 0; at < len(text); {
		end, operator := factorEnd(text, at)
		atom, rest := splitExponent(text[at:end])
		for _, pair := range weights {
			if atom == pair[0] {
				atom = pair[1]
			} else if atom == pair[1] {
				atom = pair[0]
			}
		}
		factors.WriteString(atom + rest + text[end:end+operator])
		at = end + operator
	}
	if u, err := Parse(factors.String()); err == nil && u.Symbol != text {
		list = append(list, suggestion{symbol: u.Symbol, dim: u.Dim, cost: caseCost})
	}
	return list
}
