package unit

import "unicode"

// Costs of the ways in which one text differs from another. A difference of
// case alone must come before another name, and that before another letter.
const (
	caseCost    = 1 // m for M
	joinCost    = 1 // a star or a hyphen more or less: kN-m for kNm
	wordCost    = 3 // another name: feet for ft
	editCost    = 4 // a letter more or less, or two exchanged: kg for kgf
	changedCost = 5 // a letter changed: kg for kN
)

// distance returns the least cost of turning one text into the other (the
// optimal string alignment distance with the costs above), and whether it is
// small enough for the one to be a slip of the other.
func distance(a, b string) (int, bool) {
	from, to := []rune(a), []rune(b)
	longer := max(len(from), len(to))
	limit := changedCost
	switch {
	case len(from) >= 6:
		limit = 12
	case len(from) >= 4:
		limit = 9
	}
	shorter := min(len(from), len(to))
	if shorter == 0 || longer-shorter > limit {
		return 0, false
	}
	// Three rows of the table are enough: an exchange looks two rows back.
	before, above, row := make([]int, len(to)+1), make([]int, len(to)+1), make([]int, len(to)+1)
	for j, r := range to {
		above[j+1] = above[j] + gapCost(r)
	}
	for i, r := range from {
		row[0] = above[0] + gapCost(r)
		for j, s := range to {
			cost := min(above[j]+changeCost(r, s), above[j+1]+gapCost(r), row[j]+gapCost(s))
			if i > 0 && j > 0 && r == to[j-1] && from[i-1] == s {
				cost = min(cost, before[j-1]+editCost)
			}
			row[j+1] = cost
		}
		before, above, row = above, row, before
	}
	cost := above[len(to)]
	// With every letter changed there is nothing that the two share.
	return cost, cost <= limit && cost < changedCost*longer
}

// gapCost is the cost of a rune that one text has and the other has not.
func gapCost(r rune) int {
	if r == '*' || r == '-' {
		return joinCost
	}
	return editCost
}

// changeCost is the cost of one rune in place of another.
func changeCost(a, b rune) int {
	switch {
	case a == b:
		return 0
	case unicode.ToLower(a) == unicode.ToLower(b):
		return caseCost
	case (a == '*' || a == '-') && (b == '*' || b == '-'):
		return joinCost
	}
	return changedCost
}
